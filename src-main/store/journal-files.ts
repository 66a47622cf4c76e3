/** The journal files in their places: which there are, which can be used, and putting them away. */
import { join } from 'node:path';
import { isAlive, thisMaker } from './file-names';
import { systemCode, type FsPort } from './fs-port';
import { replay, type Replay } from './journal-lines';
import { renameOver } from './whole-file';

export interface JournalPlace {
  readonly fs: FsPort;
  readonly folder: string;
  /** Where journals go that the user did not want. */
  readonly leftOut: string;
}

/** A journal in use is touched more often than this, ms. */
const IN_USE = 60_000;

interface JournalFile {
  readonly place: JournalPlace;
  readonly path: string;
  readonly name: string;
}

export interface Found extends JournalFile {
  readonly state: Replay;
}

export class JournalFiles {
  readonly places: readonly JournalPlace[];
  readonly #notices: string[] = [];

  constructor(places: readonly JournalPlace[]) {
    this.places = places;
  }

  /** Sentences about journals that could not be used. */
  get notices(): readonly string[] {
    return this.#notices;
  }

  /** Sites with journals that no running program is writing, each with the last body in them. */
  async left(): Promise<ReadonlyMap<string, string>> {
    const bodies = new Map<string, string>();
    for (const place of this.places) {
      for (const name of await place.fs.list(place.folder).catch(() => [])) {
        const id = /^([A-Za-z0-9_-]+)\.[0-9a-z-]+\.journal$/.exec(name)?.[1];
        const latest = id === undefined || bodies.has(id) ? null : latestOf(await this.find(id));
        if (id !== undefined && latest !== null) bodies.set(id, latest.state.body);
      }
    }
    return bodies;
  }

  /** One journal may lie in several places, where one of them did not answer for a while. */
  async remove(name: string): Promise<void> {
    for (const { fs, folder } of this.places) {
      try {
        await fs.remove(join(folder, name));
        // So that a power cut cannot bring edits back that are older than what is saved next.
        await fs.syncFolder(folder);
      } catch {
        // It is not there, or the next reading finds that it says what the site says.
      }
    }
  }

  /** Every journal of the site that is not another running program's and can be used. */
  async find(id: string): Promise<readonly Found[]> {
    const found = new Map<string, Found>();
    for (const place of this.places) {
      for (const name of await place.fs.list(place.folder).catch(() => [])) {
        const file = { place, path: join(place.folder, name), name };
        if (!name.startsWith(`${id}.`) || !name.endsWith('.journal') || !(await this.#isLeft(file))) continue;
        const bytes = await place.fs.read(file.path).catch(() => null);
        if (bytes === null) continue;
        const text = new TextDecoder().decode(bytes);
        const state = replay(text);
        if (state === null) await this.#unusable(file, text);
        else {
          const elsewhere = found.get(name);
          if (elsewhere === undefined || elsewhere.state.editedAt <= state.editedAt) found.set(name, { ...file, state });
        }
      }
    }
    // Where the program ended between taking edits up and removing their journal, it does so now.
    for (const { state } of [...found.values()]) for (const name of state.tookUp) if (found.delete(name)) await this.remove(name);
    return [...found.values()];
  }

  /** Whether no other running program is still writing it. */
  async #isLeft({ place, path, name }: JournalFile): Promise<boolean> {
    const [, machine, pid] = /\.([0-9a-f]{8})-(\d+)-[0-9a-z-]+\.journal$/.exec(name) ?? [];
    if (machine === thisMaker.machine && (Number(pid) === thisMaker.pid || !isAlive(Number(pid)))) return true;
    const facts = await place.fs.facts(path).catch(() => null);
    return facts !== null && Date.now() - facts.changed > IN_USE;
  }

  async #unusable(found: JournalFile, text: string): Promise<void> {
    const lines = text.split('\n').filter((line) => line !== '').length;
    if (lines === 0) return void (await found.place.fs.remove(found.path).catch(() => undefined));
    await this.#putOne(found).catch(() => undefined);
    this.#notices.push(
      `A journal of unsaved changes was damaged (${lines} of ${lines} lines) and could not be used. It was put into ${found.place.leftOut}.`,
    );
  }

  async #putOne({ place, path, name }: JournalFile): Promise<void> {
    try {
      await place.fs.makeFolder(place.leftOut);
      await renameOver(place.fs, path, join(place.leftOut, name));
    } catch (error) {
      if (systemCode(error) !== 'ENOENT') throw error;
    }
  }

  async putAway(name: string): Promise<void> {
    for (const place of this.places) {
      const path = join(place.folder, name);
      if (await isThere(place.fs, path)) await this.#putOne({ place, path, name });
    }
  }
}

export function latestOf(found: readonly Found[]): Found | null {
  return found.reduce<Found | null>((latest, one) => (latest !== null && latest.state.editedAt > one.state.editedAt ? latest : one), null);
}

const isThere = (fs: FsPort, path: string): Promise<boolean> =>
  fs.facts(path).then(
    () => true,
    () => false,
  );
