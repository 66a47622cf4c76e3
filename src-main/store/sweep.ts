/** At the start: what a program that was stopped in the middle left in the sites folder. */
import { join } from 'node:path';
import { isAlive, makerOfTemp, thisMaker, type Folders } from './file-names';
import type { FsPort } from './fs-port';

/** By then no program can still be writing it. */
const HOUR = 60 * 60 * 1000;
/** How long journals that the user left out can be brought back by hand. */
const LEFT_OUT_KEPT = 30 * 24 * HOUR;

/**
 * Removes temporary files of programs that have ended. One of a program on another machine goes
 * once it is an hour old. What cannot be removed is left for the next start.
 */
export async function sweep(fs: FsPort, folders: Folders, now: Date): Promise<void> {
  const ids = await namesIn(fs, folders.earlier);
  const beside = (await namesIn(fs, folders.beside)).map((id) => join(folders.beside, id));
  const places = [
    folders.sites,
    folders.setAside,
    folders.journal,
    folders.locks,
    folders.incoming,
    ...ids.map((id) => join(folders.earlier, id)),
    ...beside.flatMap((own) => [own, ...['visits', 'photos', 'records'].map((part) => join(own, part))]),
  ];
  for (const place of places) {
    for (const name of await namesIn(fs, place)) {
      const maker = makerOfTemp(name);
      if (maker === null) continue;
      const path = join(place, name);
      const here = maker.machine === thisMaker.machine;
      // One with our own number was left by an earlier run that had the same, or is being written now.
      const age = here && maker.pid === thisMaker.pid ? now.getTime() - performance.timeOrigin : HOUR;
      if ((here && !isAlive(maker.pid)) || (await olderThan(fs, path, age, now))) await fs.remove(path).catch(() => undefined);
    }
  }
  // No lock is held for longer than some seconds; after a power cut one may have lost its owner's name.
  await removeOlder(fs, folders.locks, HOUR / 6, now);
  await removeOlder(fs, folders.leftOut, LEFT_OUT_KEPT, now);
}

async function removeOlder(fs: FsPort, folder: string, age: number, now: Date): Promise<void> {
  for (const name of await namesIn(fs, folder)) {
    const path = join(folder, name);
    if (await olderThan(fs, path, age, now)) await fs.remove(path).catch(() => undefined);
  }
}

const namesIn = (fs: FsPort, folder: string): Promise<readonly string[]> => fs.list(folder).catch(() => []);

async function olderThan(fs: FsPort, path: string, age: number, now: Date): Promise<boolean> {
  const facts = await fs.facts(path).catch(() => null);
  return facts !== null && !facts.isFolder && now.getTime() - facts.changed > age;
}
