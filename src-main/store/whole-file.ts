/** Writing a file so that after any interruption either the old or the new one is there, whole. */
import { basename, dirname, join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { tempName } from './file-names';
import { systemCode, type FsPort, type OpenFile } from './fs-port';

/** What a virus scanner or synchroniser that holds a file for a moment makes a rename answer. */
const HELD = ['EPERM', 'EBUSY', 'EACCES'];
/** Waits before each new attempt, ms: about two seconds together. */
const RETRY_AFTER = [10, 30, 60, 100, 200, 300, 400, 400, 500];

/**
 * Adds the bytes to a file of so many before, and returns once all of them are on the disk. Where
 * that fails, what did arrive is cut off again, so that it does not take up the last room of a full disk.
 */
export async function addSurely(file: OpenFile, before: number, bytes: Uint8Array): Promise<void> {
  try {
    await file.write(bytes);
    await file.sync();
    // Some layers report a write as done that was cut short by a full disk.
    const arrived = (await file.size()) - before;
    if (arrived !== bytes.length) throw Object.assign(new Error(`only ${arrived} of ${bytes.length} bytes arrived`), { code: 'ENOSPC' });
  } catch (error) {
    await file.cut(before).catch(() => undefined);
    throw error;
  }
}

/**
 * Puts all the bytes into a new file beside `path` and returns its path once they are on the disk.
 * Nothing stays behind where that fails.
 */
export async function writeBeside(fs: FsPort, path: string, bytes: Uint8Array): Promise<string> {
  const temp = join(dirname(path), tempName(basename(path)));
  try {
    const file = await fs.create(temp);
    try {
      await addSurely(file, 0, bytes);
    } finally {
      await file.close();
    }
    return temp;
  } catch (error) {
    await fs.remove(temp).catch(() => undefined);
    throw error;
  }
}

/** Renames over what is there, trying again for about two seconds where another program holds it. */
export async function renameOver(fs: FsPort, from: string, to: string): Promise<void> {
  for (const pause of [...RETRY_AFTER, null]) {
    try {
      await fs.rename(from, to);
      return;
    } catch (error) {
      if (pause === null || !HELD.includes(systemCode(error))) throw error;
      await wait(pause);
    }
  }
}

/**
 * A second name for a file's present content, which a later rename over the first name leaves
 * alone. Copied where the file system has no links.
 */
export async function keepAs(fs: FsPort, path: string, bytes: Uint8Array, keptPath: string): Promise<void> {
  try {
    await fs.link(path, keptPath);
  } catch (error) {
    if (systemCode(error) === 'EEXIST') return;
    const temp = await writeBeside(fs, keptPath, bytes);
    await renameOver(fs, temp, keptPath);
  }
}
