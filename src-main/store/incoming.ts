/**
 * Several files put in their places together: after any interruption, either all of them are there or
 * none. They are written aside first; then one note that says what goes where, and from that moment they
 * count; then each is renamed into its place. A program that ended in between is finished by the next.
 *
 *   incoming/<who>.0001.part …   the files, not yet in their places
 *   incoming/<who>.note          what goes where; without it the parts are worth nothing
 */
import { randomBytes } from 'node:crypto';
import { dirname, join } from 'node:path';
import { isRecord } from '../../src-core/site/fields';
import { sha256 } from './checked-site';
import { isAlive, machineTag, thisMaker, type Folders } from './file-names';
import { systemCode, type FsPort } from './fs-port';
import { HostError, troubleOf } from '../trouble';
import { addSurely, renameOver, writeBeside } from './whole-file';

export interface Placing {
  /** Below the sites folder, with "/" between the parts. */
  readonly to: string;
  readonly bytes: Uint8Array;
  /** Hash of the file that stands there and may be replaced; null where none may. */
  readonly replaces: string | null;
}

interface Step {
  readonly part: string;
  readonly to: string;
  readonly hash: string;
  readonly replaces: string | null;
}

const NOTE_END = '.note';
const PART = /^([0-9a-f]{8}-\d+-[0-9a-f]{12})\.(?:\d{4,5}\.part|note)$/;
const HOUR = 60 * 60 * 1000;
/** Only below the folder of what is kept beside the sites, or a site's own file. */
const PLACE = /^(?:beside(?:\/[A-Za-z0-9_-][A-Za-z0-9._-]*){2,4}|[A-Za-z0-9_-]+\.tallybeam\.json)$/;

/** What this process is about at the moment; one of its own that is not among them was left by a failure. */
const underWay = new Set<string>();

export class Incoming {
  readonly #fs: FsPort;
  readonly #folders: Folders;

  constructor(fs: FsPort, folders: Folders) {
    this.#fs = fs;
    this.#folders = folders;
  }

  /**
   * Puts the files in their places, and returns once they are there and on the disk.
   * @param alone does a task while no other program changes the same places
   * @throws HostError `stale` if another file than the one to be replaced stands in a place; then, as after
   *   any error before the note is written, everything is as it was
   */
  async place(placings: readonly Placing[], alone: (task: () => Promise<void>) => Promise<void>): Promise<void> {
    const who = `${machineTag}-${process.pid}-${randomBytes(6).toString('hex')}`;
    underWay.add(who);
    let noted = false;
    try {
      await this.#fs.makeFolder(this.#folders.incoming);
      const steps: Step[] = [];
      for (const { to, bytes, replaces } of placings) {
        if (!PLACE.test(to)) throw new Error(`${to} is no place for a file that is brought in`);
        const part = `${who}.${String(steps.length + 1).padStart(4, '0')}.part`;
        await this.#write(this.#pathOf(part), bytes);
        steps.push({ part, to, hash: sha256(bytes), replaces });
      }
      await alone(async () => {
        for (const { to, replaces } of steps) {
          if ((await this.#hashAt(this.#target(to))) !== replaces)
            throw new HostError(
              'stale',
              'Nothing was brought in, because another window or program changed something meanwhile. Look at it again.',
            );
        }
        await this.#note(who, steps);
        noted = true;
        await this.#carryOut(who, steps);
      });
    } catch (error) {
      if (!noted) {
        await this.#drop(who);
        throw error;
      }
      const { code, message } = troubleOf(error, 'Not everything of the package is in its place yet');
      throw new HostError(code, `${message} Nothing of it is lost: the rest is put there when the program is started again.`, error);
    } finally {
      underWay.delete(who);
    }
  }

  /** Finishes what programs that have ended left; what never counted is removed. @returns sentences about what could not be put in its place */
  async finish(now: Date): Promise<readonly string[]> {
    const told: string[] = [];
    for (const who of await this.#left(now)) {
      const steps = await this.#steps(who);
      if (steps === null) await this.#drop(who);
      else told.push(...(await this.#carryOut(who, steps)));
    }
    return told;
  }

  async #carryOut(who: string, steps: readonly Step[]): Promise<readonly string[]> {
    const told: string[] = [];
    const touched = new Set<string>([this.#folders.incoming]);
    for (const { part, to, hash, replaces } of steps) {
      const path = this.#target(to);
      const there = await this.#hashAt(path);
      if (there === hash) {
        await this.#fs.remove(this.#pathOf(part)).catch(() => undefined);
        touched.add(dirname(path));
        continue;
      }
      let target = path;
      if (there !== replaces) {
        // Changed since by another program: its file stays, and this one is kept where it can be found.
        target = join(this.#folders.setAside, `${to.replaceAll('/', '-')}-${hash.slice(0, 16)}`);
        told.push(`${to} was changed while a package was brought in. What came with the package is in ${target}.`);
      }
      await this.#makeFolders(dirname(target));
      touched.add(dirname(target));
      try {
        await renameOver(this.#fs, this.#pathOf(part), target);
      } catch (error) {
        if (systemCode(error) !== 'ENOENT') throw error;
        told.push(`${to} could not be brought in, because its part was taken away from ${this.#folders.incoming}.`);
      }
    }
    for (const folder of touched) await this.#fs.syncFolder(folder);
    await this.#fs.remove(this.#pathOf(who + NOTE_END));
    await this.#fs.syncFolder(this.#folders.incoming);
    return told;
  }

  async #note(who: string, steps: readonly Step[]): Promise<void> {
    const json = JSON.stringify(steps);
    const path = this.#pathOf(who + NOTE_END);
    await this.#fs.syncFolder(this.#folders.incoming);
    const temp = await writeBeside(this.#fs, path, new TextEncoder().encode(`${sha256(json)} ${json}`));
    try {
      await renameOver(this.#fs, temp, path);
    } catch (error) {
      await this.#fs.remove(temp).catch(() => undefined);
      throw error;
    }
    await this.#fs.syncFolder(this.#folders.incoming);
  }

  /** Steps of a note; null where there is none, or none that was written to its end. */
  async #steps(who: string): Promise<readonly Step[] | null> {
    const bytes = await this.#read(this.#pathOf(who + NOTE_END));
    if (bytes === null) return null;
    const text = new TextDecoder().decode(bytes);
    const json = text.slice(65);
    if (sha256(json) !== text.slice(0, 64)) return null;
    const steps: unknown = JSON.parse(json);
    return Array.isArray(steps) && steps.every(isStep) ? steps : null;
  }

  /** Those that no running program is about. */
  async #left(now: Date): Promise<ReadonlySet<string>> {
    const left = new Set<string>();
    const names = await this.#fs.list(this.#folders.incoming).catch(() => []);
    for (const name of names) {
      const who = PART.exec(name)?.[1];
      if (who === undefined || left.has(who) || underWay.has(who)) continue;
      const [machine = '', pid = ''] = who.split('-');
      const here = machine === thisMaker.machine;
      const ended = here && (Number(pid) === thisMaker.pid || !isAlive(Number(pid)));
      const facts = ended ? null : await this.#fs.facts(this.#pathOf(name)).catch(() => null);
      if (ended || (facts !== null && now.getTime() - facts.changed > HOUR)) left.add(who);
    }
    return left;
  }

  /** Takes away parts that never counted. */
  async #drop(who: string): Promise<void> {
    // The note first: while it is there, its parts count.
    await this.#fs.remove(this.#pathOf(who + NOTE_END)).catch(() => undefined);
    const names = await this.#fs.list(this.#folders.incoming).catch(() => []);
    for (const name of names) if (name.startsWith(`${who}.`)) await this.#fs.remove(this.#pathOf(name)).catch(() => undefined);
  }

  async #write(path: string, bytes: Uint8Array): Promise<void> {
    const file = await this.#fs.create(path);
    try {
      await addSurely(file, 0, bytes);
    } finally {
      await file.close();
    }
  }

  async #makeFolders(folder: string): Promise<void> {
    const below = folder.slice(this.#folders.sites.length).split(/[\\/]/);
    let path = this.#folders.sites;
    for (const part of below.filter((one) => one !== '')) {
      path = join(path, part);
      await this.#fs.makeFolder(path);
    }
  }

  async #hashAt(path: string): Promise<string | null> {
    const bytes = await this.#read(path);
    return bytes === null ? null : sha256(bytes);
  }

  async #read(path: string): Promise<Uint8Array | null> {
    try {
      return await this.#fs.read(path);
    } catch (error) {
      if (systemCode(error) === 'ENOENT') return null;
      throw error;
    }
  }

  #pathOf = (name: string): string => join(this.#folders.incoming, name);
  #target = (to: string): string => join(this.#folders.sites, ...to.split('/'));
}

/** A folder may be shared, so what its notes say is not taken on trust. */
const isStep = (value: unknown): value is Step =>
  isRecord(value) &&
  typeof value['part'] === 'string' &&
  PART.test(value['part']) &&
  typeof value['to'] === 'string' &&
  PLACE.test(value['to']) &&
  typeof value['hash'] === 'string' &&
  (value['replaces'] === null || typeof value['replaces'] === 'string');
