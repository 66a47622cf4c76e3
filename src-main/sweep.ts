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
    ...ids.map((id) => join(folders.earlier, id)),
    ...beside.flatMap((own) => [own, ...['visits', 'photos', 'records'].map((part) => join(own, part))]),
  ];
  for (const place of places) {
    for (const name of await namesIn(fs, place)) {
      const maker = makerOfTemp(name);
      if (maker === null) continue;
      const path = join(place, name);
      const ended = maker.machine === thisMaker.machine && (maker.pid === thisMaker.pid || !isAlive(maker.pid));
      if (ended || (await olderThan(fs, path, HOUR, now))) await fs.remove(path).catch(() => undefined);
    }
  }
  for (const name of await namesIn(fs, folders.leftOut)) {
    const path = join(folders.leftOut, name);
    if (await olderThan(fs, path, LEFT_OUT_KEPT, now)) await fs.remove(path).catch(() => undefined);
  }
}

const namesIn = (fs: FsPort, folder: string): Promise<readonly string[]> => fs.list(folder).catch(() => []);

async function olderThan(fs: FsPort, path: string, age: number, now: Date): Promise<boolean> {
  const facts = await fs.facts(path).catch(() => null);
  return facts !== null && !facts.isFolder && now.getTime() - facts.changed > age;
}
