/**
 * The file system as the store uses it: few calls, so that every one of them can be made to fail
 * in a test, and so that what is on disk after a crash can be worked out from the calls.
 */
import { constants } from 'node:fs';
import { link, mkdir, open, readdir, readFile, rename, stat, unlink, utimes } from 'node:fs/promises';

export interface OpenFile {
  /** Writes all the bytes at the file's end. */
  write(bytes: Uint8Array): Promise<void>;
  /** Returns when what was written is on the disk, not only on its way. */
  sync(): Promise<void>;
  /** The file's size in bytes. */
  size(): Promise<number>;
  /** Cuts the file down to so many bytes. */
  cut(size: number): Promise<void>;
  close(): Promise<void>;
}

interface FileFacts {
  readonly bytes: number;
  /** Time of the last change, ms. */
  readonly changed: number;
  readonly isFolder: boolean;
}

/** Every call rejects with the system's own error and its `code`. */
export interface FsPort {
  read(path: string): Promise<Uint8Array>;
  facts(path: string): Promise<FileFacts>;
  /** Names in the folder. */
  list(folder: string): Promise<readonly string[]>;
  /** Makes one folder whose parent is there; content with one that is there already. */
  makeFolder(folder: string): Promise<void>;
  /** Fails where something stands already. */
  create(path: string): Promise<OpenFile>;
  append(path: string): Promise<OpenFile>;
  /** Puts the file in the place of one that may stand there, at once and whole. */
  rename(from: string, to: string): Promise<void>;
  /** A second name for the same file; fails where something stands already. */
  link(from: string, to: string): Promise<void>;
  remove(path: string): Promise<void>;
  touch(path: string): Promise<void>;
  /** Returns when the folder's names are on the disk. */
  syncFolder(folder: string): Promise<void>;
}

/** The system's code of an error, such as ENOENT; empty if it has none. */
export function systemCode(error: unknown): string {
  const { code } = (error ?? {}) as { code?: unknown };
  return typeof code === 'string' ? code : '';
}

/** What file systems answer that cannot sync a folder at all. */
const NO_FOLDER_SYNC = ['EINVAL', 'ENOTSUP', 'EOPNOTSUPP', 'ENOSYS', 'EISDIR'];

async function openNode(path: string, flags: string | number): Promise<OpenFile> {
  const handle = await open(path, flags);
  return {
    // Unlike a single write, this goes on until the last byte or an error.
    write: (bytes) => handle.writeFile(bytes),
    sync: () => handle.sync(),
    size: async () => (await handle.stat()).size,
    cut: (size) => handle.truncate(size),
    close: () => handle.close(),
  };
}

export const nodeFs: FsPort = {
  read: (path) => readFile(path),
  facts: async (path) => {
    const facts = await stat(path);
    return { bytes: facts.size, changed: facts.mtimeMs, isFolder: facts.isDirectory() };
  },
  list: (folder) => readdir(folder),
  makeFolder: async (folder) => {
    try {
      await mkdir(folder);
    } catch (error) {
      if (systemCode(error) !== 'EEXIST') throw error;
    }
  },
  create: (path) => openNode(path, 'wx'),
  append: (path) => openNode(path, constants.O_WRONLY | constants.O_APPEND | constants.O_CREAT),
  rename,
  link,
  remove: unlink,
  touch: async (path) => {
    const now = new Date();
    await utimes(path, now, now);
  },
  syncFolder: async (folder) => {
    // Windows gives no handle to a folder.
    if (process.platform === 'win32') return;
    const handle = await open(folder, 'r');
    try {
      await handle.sync();
    } catch (error) {
      if (!NO_FOLDER_SYNC.includes(systemCode(error))) throw error;
    } finally {
      await handle.close();
    }
  },
};
