/** The page's way to its machine: the preload's `Host` in the window, the same over HTTP in a browser. */
import { HOST_ERROR_CODES, type HostErrorCode, type HostFailure } from '../src-core/host';

/** What any rejected host call says, as a code and a sentence. */
export function failureOf(error: unknown): HostFailure {
  if (typeof error === 'object' && error !== null) {
    const { code, message } = error as { code?: unknown; message?: unknown };
    if (isCode(code) && typeof message === 'string') return { code, message };
    if (typeof message === 'string' && message !== '') return { code: 'failed', message };
  }
  return { code: 'failed', message: 'The program could not do this and gave no reason. Try again; nothing on disk was changed.' };
}

const isCode = (code: unknown): code is HostErrorCode => HOST_ERROR_CODES.some((known) => known === code);
