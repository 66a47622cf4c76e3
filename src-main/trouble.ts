/** What goes wrong at the machine, told in words: what was not done, why, and how to mend it. */
import type { HostErrorCode, HostFailure } from '../src-core/host';
import { systemCode } from './store/fs-port';

export class HostError extends Error implements HostFailure {
  override readonly name = 'HostError';
  readonly code: HostErrorCode;

  constructor(code: HostErrorCode, message: string, cause?: unknown) {
    super(message, { cause });
    this.code = code;
  }
}

interface Reason {
  readonly code: HostErrorCode;
  readonly why: string;
  readonly mend: string;
}

const FULL: Reason = {
  code: 'disk-full',
  why: 'there is no room left for it',
  mend: 'Free some space on the disk or choose another sites folder, then try again.',
};
const FORBIDDEN: Reason = {
  code: 'no-permission',
  why: 'the system does not allow it',
  mend: 'Check who may write to the sites folder and that it is not write-protected, then try again.',
};
const GONE: Reason = {
  code: 'folder-gone',
  why: 'the sites folder is not there',
  mend: 'Connect the drive or network share again, or choose another sites folder.',
};

const REASONS: Readonly<Record<string, Reason>> = {
  ENOSPC: FULL,
  EDQUOT: FULL,
  EFBIG: { ...FULL, why: 'it is larger than files may be there' },
  EACCES: FORBIDDEN,
  EPERM: FORBIDDEN,
  EROFS: { ...FORBIDDEN, why: 'the disk is write-protected' },
  EBUSY: {
    code: 'failed',
    why: 'another program holds the file',
    mend: 'Close the program that has it open (a virus scanner or a synchroniser often does for a moment), then try again.',
  },
  ENOENT: GONE,
  ENOTDIR: GONE,
  ENODEV: GONE,
  ENXIO: GONE,
  ESTALE: GONE,
  ENOTCONN: GONE,
  EHOSTDOWN: GONE,
  EHOSTUNREACH: GONE,
  ENETUNREACH: GONE,
  ETIMEDOUT: {
    code: 'timed-out',
    why: 'the sites folder does not answer',
    mend: 'Check the drive or network, then try again; or choose another sites folder.',
  },
  EIO: {
    code: 'failed',
    why: 'the disk reported a fault',
    mend: 'Check the disk, and copy the sites folder to another one soon.',
  },
  ENAMETOOLONG: {
    code: 'failed',
    why: 'the path of the file is too long for the system',
    mend: 'Choose a sites folder with a shorter path.',
  },
  EMFILE: { code: 'failed', why: 'too many files are open', mend: 'Close other programs, then try again.' },
};

/** @param notDone what was not done, as a clause: "Depot was not saved" */
export function troubleOf(error: unknown, notDone: string): HostError {
  if (error instanceof HostError) return error;
  const system = systemCode(error);
  const reason = REASONS[system];
  if (reason) return new HostError(reason.code, `${notDone}, because ${reason.why} (${system}). ${reason.mend}`, error);
  const detail = error instanceof Error ? error.message : String(error);
  return new HostError('failed', `${notDone}: ${detail}. Try again.`, error);
}

/** Does the task; a system error comes out in words. */
export async function telling<T>(notDone: string, task: () => Promise<T>): Promise<T> {
  try {
    return await task();
  } catch (error) {
    throw troubleOf(error, notDone);
  }
}
