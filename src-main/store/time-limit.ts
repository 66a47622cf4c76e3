/**
 * The file system with an end to every wait. A network share that went away can hold a call for
 * minutes; the program says so instead, and asks no more of it until it answers again, so that the
 * few threads that Node has for files stay free for the other folders.
 */
import type { FsPort, OpenFile } from './fs-port';

export interface TimeLimits {
  /** For calls on names, ms. */
  readonly quick: number;
  /** For calls that carry a file's bytes, ms. */
  readonly bytes: number;
}

export const TIME_LIMITS: TimeLimits = { quick: 10_000, bytes: 30_000 };

class TimedOut extends Error {
  readonly code = 'ETIMEDOUT';
}

export function withTimeLimit(fs: FsPort, limits: TimeLimits = TIME_LIMITS): FsPort {
  let stuck = 0;

  function limited<T>(limit: number, call: () => Promise<T>, late?: (value: T) => void): Promise<T> {
    if (stuck > 0) return Promise.reject(new TimedOut('the folder has not answered an earlier call yet'));
    return new Promise((resolve, reject) => {
      let over = false;
      const timer = setTimeout(() => {
        over = true;
        stuck++;
        reject(new TimedOut(`no answer within ${limit} ms`));
      }, limit);
      const settle = (finish: () => void, afterwards: () => void) => {
        clearTimeout(timer);
        if (!over) return finish();
        stuck--;
        afterwards();
      };
      call().then(
        (value) =>
          settle(
            () => resolve(value),
            () => late?.(value),
          ),
        (error: unknown) =>
          settle(
            () => reject(error as Error),
            () => undefined,
          ),
      );
    });
  }
  const quick = <T>(call: () => Promise<T>) => limited(limits.quick, call);
  const slow = <T>(call: () => Promise<T>) => limited(limits.bytes, call);

  async function opened(call: () => Promise<OpenFile>): Promise<OpenFile> {
    const file = await limited(limits.quick, call, (late) => void late.close().catch(() => undefined));
    return {
      write: (bytes) => slow(() => file.write(bytes)),
      sync: () => slow(() => file.sync()),
      size: () => quick(() => file.size()),
      cut: (size) => quick(() => file.cut(size)),
      close: () => quick(() => file.close()),
    };
  }

  return {
    read: (path) => slow(() => fs.read(path)),
    facts: (path) => quick(() => fs.facts(path)),
    list: (folder) => quick(() => fs.list(folder)),
    makeFolder: (folder) => quick(() => fs.makeFolder(folder)),
    create: (path) => opened(() => fs.create(path)),
    append: (path) => opened(() => fs.append(path)),
    rename: (from, to) => quick(() => fs.rename(from, to)),
    link: (from, to) => quick(() => fs.link(from, to)),
    remove: (path) => quick(() => fs.remove(path)),
    touch: (path) => quick(() => fs.touch(path)),
    syncFolder: (folder) => slow(() => fs.syncFolder(folder)),
  };
}
