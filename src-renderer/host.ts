/** The page's way to its machine: the preload's `Host` in the window, the same over HTTP in a browser. */
import { HOST_ERROR_CODES, type Host, type HostErrorCode, type HostFailure } from '../src-core/host';
import { HOST_PATH, hostOver, KEY_HEADER, KEY_IN_ADDRESS, TAB_HEADER, type HostAnswer } from '../src-core/host-wire';

declare global {
  interface Window {
    /** Put there by the preload, in the program's own window only. */
    readonly tallybeam?: Host;
  }
}

/** What the HTTP carrier needs of its surroundings. */
export interface BrowserParts {
  readonly location: Pick<Location, 'hash' | 'pathname' | 'search'>;
  readonly history: Pick<History, 'replaceState'>;
  readonly storage: Pick<Storage, 'getItem' | 'setItem'>;
  readonly fetch: typeof fetch;
}

const KEY = 'tallybeam-key';

/** The secret from the opening address, kept for this tab and taken out of the address bar. */
function keyFrom({ location, history, storage }: BrowserParts): string {
  if (location.hash.startsWith(KEY_IN_ADDRESS)) {
    storage.setItem(KEY, location.hash.slice(KEY_IN_ADDRESS.length));
    history.replaceState(null, '', location.pathname + location.search);
  }
  return storage.getItem(KEY) ?? '';
}

/** @returns the host over HTTP; a program that cannot be reached rejects like any other failure */
export function hostOverHttp(parts: BrowserParts): Host {
  // One for each load of the page: a tab that was doubled or loaded again edits into a journal of its own.
  const headers = { 'content-type': 'application/json', [KEY_HEADER]: keyFrom(parts), [TAB_HEADER]: crypto.randomUUID() };
  return hostOver(async (method, given): Promise<HostAnswer> => {
    let response: Response;
    try {
      response = await parts.fetch(HOST_PATH + method, { method: 'POST', headers, body: JSON.stringify(given) });
    } catch {
      return {
        ok: false,
        code: 'timed-out',
        message:
          'The program cannot be reached: it was stopped or is starting again. Keep this page open, start the program, then try again.',
      };
    }
    const answer: unknown = await response.json().catch(() => null);
    if (isAnswer(answer)) return answer;
    return { ok: false, code: 'failed', message: `The program answered with something unexpected (${response.status}). Start it again.` };
  }, false);
}

const isAnswer = (value: unknown): value is HostAnswer => typeof value === 'object' && value !== null && 'ok' in value;

export const connect = (): Host =>
  window.tallybeam ?? hostOverHttp({ location, history, storage: sessionStorage, fetch: window.fetch.bind(window) });

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
