/** A file system in which one call fails, or every later call of the same kind. */
import type { FsPort, OpenFile } from '../../src-main/store/fs-port';

export interface Fault {
  /** The call that fails, counted from 0. */
  readonly at: number;
  /** The system's code, or a write that reports success though only half of it arrived. */
  readonly kind: string;
  /** Whether later calls of the same kind fail as well, as on a disk that stays full. */
  readonly stays: boolean;
}

export interface FaultyFs {
  readonly fs: FsPort;
  /** Names of the calls made so far. */
  readonly calls: readonly string[];
}

export const faultyFs = (real: FsPort, fault: Fault | null): FaultyFs => {
  const calls: string[] = [];
  let failing: string | null = null;

  async function guarded<T>(name: string, call: () => Promise<T>, short?: () => Promise<T>): Promise<T> {
    const i = calls.push(name) - 1;
    if (fault === null) return call();
    const fails = i === fault.at || (fault.stays && failing === name);
    if (!fails) return call();
    failing = name;
    if (fault.kind !== 'short write') throw Object.assign(new Error(`${fault.kind}: put in by the test, ${name}`), { code: fault.kind });
    return short ? short() : call();
  }

  const opened = async (name: string, open: () => Promise<OpenFile>): Promise<OpenFile> => {
    const file = await guarded(name, open);
    return {
      write: (bytes) =>
        guarded(
          'write',
          () => file.write(bytes),
          () => file.write(bytes.slice(0, bytes.length >> 1)),
        ),
      sync: () => guarded('sync', () => file.sync()),
      size: () => guarded('size', () => file.size()),
      cut: (size) => guarded('cut', () => file.cut(size)),
      // The handle is closed all the same: only the answer is a fault.
      close: async () => {
        await file.close();
        await guarded('close', async () => undefined);
      },
    };
  };

  const fs: FsPort = {
    read: (path) => guarded('read', () => real.read(path)),
    facts: (path) => guarded('facts', () => real.facts(path)),
    list: (folder) => guarded('list', () => real.list(folder)),
    makeFolder: (folder) => guarded('makeFolder', () => real.makeFolder(folder)),
    create: (path) => opened('create', () => real.create(path)),
    append: (path) => opened('append', () => real.append(path)),
    rename: (from, to) => guarded('rename', () => real.rename(from, to)),
    link: (from, to) => guarded('link', () => real.link(from, to)),
    remove: (path) => guarded('remove', () => real.remove(path)),
    touch: (path) => guarded('touch', () => real.touch(path)),
    syncFolder: (folder) => guarded('syncFolder', () => real.syncFolder(folder)),
  };
  return { fs, calls };
};
