/**
 * One writer at a time to a site's file, over all windows and programs that use the folder. It is
 * held only for the moment between comparing the revision and replacing the file.
 */
import { randomBytes } from 'node:crypto';
import { basename, dirname, join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { isAlive, machineTag, tempName } from './file-names';
import { systemCode, type FsPort } from './fs-port';
import { HostError } from '../trouble';

export interface LockTimes {
  /** A holder that has not replaced the file by then gives up, ms. */
  readonly hold: number;
  /** A lock that stays the same for so long belongs to a program that has ended, ms. */
  readonly abandoned: number;
  /** Longest wait for the lock, ms. */
  readonly wait: number;
}
const LOCK_TIMES: LockTimes = { hold: 5_000, abandoned: 12_000, wait: 20_000 };

export interface Held {
  /** @throws HostError if the time that others leave to the holder is over */
  stillHeld(): void;
}

interface Owner {
  readonly machine: string;
  readonly pid: number;
  readonly token: string;
}

/** Locks that this process holds, so that one of its own that could not be removed is known as abandoned. */
const heldHere = new Set<string>();

export async function withLock<T>(fs: FsPort, path: string, task: (held: Held) => Promise<T>, times: LockTimes = LOCK_TIMES): Promise<T> {
  const token = randomBytes(12).toString('hex');
  heldHere.add(token);
  try {
    await acquire(fs, path, token, times);
    const since = performance.now();
    try {
      return await task({
        stillHeld: () => {
          if (performance.now() - since > times.hold) throw busy('the sites folder answered too slowly');
        },
      });
    } finally {
      // One that cannot be removed is recognised as abandoned by the next writer.
      await fs.remove(path).catch(() => undefined);
    }
  } finally {
    heldHere.delete(token);
  }
}

const busy = (why: string): HostError => new HostError('timed-out', `Not done, because ${why}. The file is as it was. Try again.`);

async function acquire(fs: FsPort, path: string, token: string, times: LockTimes): Promise<void> {
  const began = performance.now();
  const owner: Owner = { machine: machineTag, pid: process.pid, token };
  const text = new TextEncoder().encode(JSON.stringify(owner));
  const own = join(dirname(path), tempName(basename(path)));
  try {
    await write(fs, own, text);
    let seen = '';
    let seenSince = began;
    while (!(await take(fs, own, path, text))) {
      const now = performance.now();
      if (now - began > times.wait) throw busy('another program is saving this site');
      const found = await contentOf(fs, path);
      if (found !== seen) {
        seen = found ?? '';
        seenSince = now;
      }
      if (found !== null && (isOver(found) || now - seenSince > times.abandoned)) await breakLock(fs, path, found);
      else await wait(3 + Math.random() * 12);
    }
  } finally {
    await fs.remove(own).catch(() => undefined);
  }
}

/**
 * Takes the lock by a second name for a file that is written already, so that no lock is ever there
 * without its owner's name: a program that ended in between would leave one that nobody can judge.
 * @returns whether the lock is ours now
 */
async function take(fs: FsPort, own: string, path: string, text: Uint8Array): Promise<boolean> {
  try {
    await fs.link(own, path);
    return true;
  } catch (error) {
    if (systemCode(error) === 'EEXIST') return false;
  }
  // The file system has no links.
  try {
    await write(fs, path, text);
    return true;
  } catch (error) {
    if (systemCode(error) === 'EEXIST') return false;
    throw error;
  }
}

async function write(fs: FsPort, path: string, bytes: Uint8Array): Promise<void> {
  const file = await fs.create(path);
  try {
    try {
      await file.write(bytes);
    } finally {
      await file.close();
    }
  } catch (error) {
    await fs.remove(path).catch(() => undefined);
    throw error;
  }
}

async function contentOf(fs: FsPort, path: string): Promise<string | null> {
  try {
    return new TextDecoder().decode(await fs.read(path));
  } catch (error) {
    // Gone meanwhile, or for a moment neither there nor gone, as Windows has it.
    if (['ENOENT', 'EPERM', 'EBUSY', 'EACCES'].includes(systemCode(error))) return null;
    throw error;
  }
}

/** Whether the owner has certainly ended. One that cannot be told by its text only is over by time. */
function isOver(text: string): boolean {
  try {
    const { machine, pid, token } = JSON.parse(text) as Partial<Owner>;
    if (machine !== machineTag || typeof pid !== 'number') return false;
    return pid === process.pid ? !heldHere.has(String(token)) : !isAlive(pid);
  } catch {
    return false;
  }
}

/**
 * Removes an abandoned lock. Two that find it abandoned at once must not remove the lock that the
 * quicker one has taken by then, so only who makes the second file looks again and removes.
 */
async function breakLock(fs: FsPort, path: string, abandoned: string): Promise<void> {
  const breaking = `${path}.breaking`;
  try {
    await (await fs.create(breaking)).close();
  } catch (error) {
    if (systemCode(error) !== 'EEXIST') throw error;
    // Left by a program that ended in this very moment: only its age tells.
    const facts = await fs.facts(breaking).catch(() => null);
    if (facts !== null && Math.abs(Date.now() - facts.changed) > 60_000) await fs.remove(breaking).catch(() => undefined);
    await wait(5);
    return;
  }
  try {
    if ((await contentOf(fs, path)) === abandoned) await fs.remove(path);
  } finally {
    await fs.remove(breaking).catch(() => undefined);
  }
}
