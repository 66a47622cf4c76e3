/**
 * The recovery journal: every edit that is not saved yet, on the disk beside the sites. Each opening
 * of a site writes a file of its own, so that two windows never write into one.
 *
 * Where the sites folder does not answer, edits go to a folder on this machine instead.
 */
import { join } from 'node:path';
import type { JournalRequest, RecoveredEdits } from '../../src-core/host';
import { thisMaker } from './file-names';
import type { FsPort } from './fs-port';
import { JournalFiles, latestOf, type Found, type JournalPlace } from './journal-files';
import { changeLine, wholeLine } from './journal-lines';
import { telling } from '../trouble';
import { Turns } from './turns';
import { addSurely, renameOver, writeBeside } from './whole-file';

export interface JournalOptions {
  /** The first that takes an edit has it. */
  readonly places: readonly JournalPlace[];
  /** Names one load of the page; lower-case letters, digits and "-". */
  readonly session: string;
  readonly now: () => Date;
}

/** A whole body is written again after so many lines, so that one damaged line cannot spoil many. */
const LINES_TO_A_WHOLE = 100;
/** Beyond this many bytes, and four bodies, the journal is written anew with its last state only. */
const LONGEST = 16 * 1024 * 1024;
/** Tells other programs that a journal is in use; see `JournalFiles`. */
const TOUCH_EVERY = 20_000;

/** What this run has written for one open site. */
interface Own {
  readonly name: string;
  place: JournalPlace | null;
  body: string;
  edits: readonly string[];
  lines: number;
  /** Size of the file as it was left. */
  bytes: number;
  /** Edits since the page last read the site. */
  sinceRead: number;
  /** Whether it goes on from edits that were recovered. */
  tookUp: boolean;
}

const ENCODER = new TextEncoder();

export class Journal {
  readonly #options: JournalOptions;
  readonly #files: JournalFiles;
  readonly #turns = new Turns();
  readonly #own = new Map<string, Own>();
  readonly #offered = new Map<string, Found>();
  #openings = 0;
  #touching: NodeJS.Timeout | null = null;

  constructor(options: JournalOptions) {
    this.#options = options;
    this.#files = new JournalFiles(options.places);
  }

  /** Sentences about journals that could not be used. */
  get notices(): readonly string[] {
    return this.#files.notices;
  }

  /** Returns when the edit is on the disk. */
  append(request: JournalRequest): Promise<void> {
    return this.#turns.take(request.id, () => telling('The change is not in the journal yet', () => this.#append(request)));
  }

  /**
   * Before a save: what the journal does not have yet. If the program ends between the save and
   * `saved`, the journal then says what the file says, and nothing is offered by mistake.
   */
  async saving(request: Omit<JournalRequest, 'edit'>): Promise<void> {
    const own = this.#own.get(request.id);
    if (own === undefined || own.body === request.body) return;
    // A journal that fails must not keep the site from being saved.
    await this.append({ ...request, edit: 'Last changes before saving' }).catch(() => undefined);
  }

  /** After a save: the edits are in the site's file, and those that were taken up as well. */
  saved(id: string, body: string): Promise<void> {
    return this.#turns.take(id, async () => {
      const offered = this.#offered.get(id);
      const own = this.#own.get(id);
      this.#own.delete(id);
      if (own !== undefined) await this.#files.remove(own.name);
      if (offered === undefined || (offered.name !== own?.name && offered.state.body !== body)) return;
      this.#offered.delete(id);
      await this.#files.remove(offered.name);
    });
  }

  /**
   * The edits are not wanted. Those made since the site was read are dropped; those that were found
   * then are put away where they can be brought back by hand, unless only later ones were dropped.
   */
  clear(id: string): Promise<void> {
    return this.#turns.take(id, () =>
      telling('The recovered changes could not be put away', async () => {
        const offered = this.#offered.get(id);
        const own = this.#own.get(id);
        if (own?.tookUp === true) await this.#files.putAway(own.name);
        if (offered !== undefined && (own?.sinceRead ?? 0) === 0) {
          await this.#files.putAway(offered.name);
          this.#offered.delete(id);
        }
        this.#own.delete(id);
        if (own !== undefined) await this.#files.remove(own.name);
      }),
    );
  }

  /** After the site was removed: no edits of it are offered or bring it back, but they can be found. */
  removed(id: string): Promise<void> {
    return this.#turns.take(id, async () => {
      this.#own.delete(id);
      this.#offered.delete(id);
      for (const { name } of await this.#files.find(id)) await this.#files.putAway(name).catch(() => undefined);
    });
  }

  /** The latest edits in a journal that are not in the site as it is on disk. */
  recovered(id: string, bodyOnDisk: string): Promise<RecoveredEdits | null> {
    return this.#turns.take(id, async () => {
      const own = this.#own.get(id);
      if (own !== undefined) own.sinceRead = 0;
      this.#offered.delete(id);
      const unsaved: Found[] = [];
      for (const found of await this.#files.find(id)) {
        if (found.state.body !== bodyOnDisk) unsaved.push(found);
        else if (found.name !== own?.name) await this.#files.remove(found.name);
      }
      const latest = latestOf(unsaved);
      if (latest === null) return null;
      const { body, editedAt, edits, base, damagedLines } = latest.state;
      this.#offered.set(id, latest);
      const otherPage =
        latest.name.includes(`.${thisMaker.machine}-${thisMaker.pid}-`) && !latest.name.includes(`-${this.#options.session}-`);
      return { body, editedAt, edits, baseRevision: base, damagedLines, otherPage };
    });
  }

  close(): void {
    if (this.#touching !== null) clearInterval(this.#touching);
    this.#touching = null;
  }

  async #append({ id, baseRevision, body, edit }: JournalRequest): Promise<void> {
    const offered = this.#offered.get(id);
    const own = this.#own.get(id) ?? this.#newOwn(id);
    // The page goes on from what it was offered: from here on this journal says all that the other one said.
    const takesUp = offered !== undefined && offered.name !== own.name && offered.state.body === body;
    if (takesUp) own.edits = [...offered.state.edits];
    const took = takesUp ? { tookUp: offered.name } : {};
    const said = { at: this.#options.now().toISOString(), edit, base: baseRevision, ...took };
    const whole = () => wholeLine(said, body, own.edits);
    const change = () => changeLine(said, own.body, body);
    let failure: unknown = new Error('there is no place for a journal');
    for (const place of this.#options.places) {
      const goesOn = own.place === place;
      try {
        let bytes: number;
        if (!goesOn) bytes = await this.#begin(place, own.name, whole());
        else if (own.bytes > Math.max(LONGEST, 4 * body.length)) bytes = await this.#writeAnew(place, own.name, whole());
        else bytes = await this.#goOn(place, own, own.lines % LINES_TO_A_WHOLE === 0 ? whole : change, whole);
        const { name, edits, lines, sinceRead } = own;
        const tookUp = own.tookUp || takesUp;
        this.#own.set(id, { name, place, body, edits: [...edits, edit], lines: lines + 1, bytes, sinceRead: sinceRead + 1, tookUp });
        this.#keepTouching();
        if (takesUp) {
          this.#offered.delete(id);
          await this.#files.remove(offered.name);
        }
        return;
      } catch (error) {
        failure = error;
        // What reached the file is not known: the next line there has to stand for itself.
        own.place = null;
      }
    }
    throw failure;
  }

  #newOwn(id: string): Own {
    this.#openings++;
    const name = `${id}.${thisMaker.machine}-${thisMaker.pid}-${this.#options.session}-${this.#openings}.journal`;
    const own: Own = { name, place: null, body: '', edits: [], lines: 0, bytes: 0, sinceRead: 0, tookUp: false };
    this.#own.set(id, own);
    return own;
  }

  /** @returns the file's size afterwards, as from the other writers here */
  async #begin({ fs, folder }: JournalPlace, name: string, line: string): Promise<number> {
    await fs.makeFolder(folder);
    const bytes = await addTo(fs, join(folder, name), () => line);
    await fs.syncFolder(folder);
    return bytes;
  }

  async #goOn({ fs, folder }: JournalPlace, { name, bytes }: Own, line: () => string, whole: () => string): Promise<number> {
    let asLeft = true;
    const after = await addTo(fs, join(folder, name), (size) => {
      // Another page may have put the file away meanwhile: what is written then has to stand for itself.
      asLeft = size === bytes;
      return asLeft ? line() : whole();
    });
    if (!asLeft) await fs.syncFolder(folder);
    return after;
  }

  async #writeAnew({ fs, folder }: JournalPlace, name: string, line: string): Promise<number> {
    const path = join(folder, name);
    const bytes = ENCODER.encode(line);
    await renameOver(fs, await writeBeside(fs, path, bytes), path);
    await fs.syncFolder(folder);
    return bytes.length;
  }

  /** Tells other programs that these journals are in use. */
  #keepTouching(): void {
    if (this.#touching !== null) return;
    this.#touching = setInterval(() => {
      for (const { name, place } of this.#own.values()) void place?.fs.touch(join(place.folder, name)).catch(() => undefined);
    }, TOUCH_EVERY);
    this.#touching.unref();
  }
}

/** Adds a line that may depend on the file's size before, and returns the size after it. */
async function addTo(fs: FsPort, path: string, line: (size: number) => string): Promise<number> {
  const file = await fs.append(path);
  try {
    const before = await file.size();
    const bytes = ENCODER.encode(line(before));
    await addSurely(file, before, bytes);
    return before + bytes.length;
  } finally {
    await file.close();
  }
}
