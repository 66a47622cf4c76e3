/**
 * The sites folder: one file per site, replaced whole or not at all, with its earlier states beside
 * it. What is answered as saved is on the disk.
 */
import { randomUUID } from 'node:crypto';
import { join } from 'node:path';
import type { Generation, Saved, SaveRequest, SiteEntry } from '../../src-core/host';
import { writeSiteFile } from '../../src-core/site/envelope';
import type { Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import { checkBody, checkBytes, checkImport, misnamed, revisionOf, sentences, sha256 } from './checked-site';
import { keepEarlier, listEarlier, readEarlier, thinOut } from './earlier';
import { canNameFile, checkedId, foldersIn, siteFileName, SITE_FILE_END, stampOf, type Folders } from './file-names';
import { systemCode, type FsPort } from './fs-port';
import { withLock, type Held, type LockTimes } from './lock';
import { SiteList } from './site-list';
import { HostError, telling, troubleOf } from '../trouble';
import { Turns } from './turns';
import { keepAs, renameOver, writeBeside } from './whole-file';

export interface StoreOptions {
  readonly fs: FsPort;
  readonly folder: string;
  readonly program: string;
  readonly now?: () => Date;
  readonly lockTimes?: LockTimes;
}

/** A site as it is on disk now. */
export interface StoredSite {
  readonly text: string;
  readonly revision: string;
  readonly savedAt: string;
  readonly site: Site;
}

interface Present {
  readonly bytes: Uint8Array;
  readonly revision: string;
}

export class SiteStore {
  readonly folders: Folders;
  readonly #fs: FsPort;
  readonly #program: string;
  readonly #now: () => Date;
  readonly #lockTimes: LockTimes | undefined;
  readonly #turns = new Turns();
  readonly #list: SiteList;
  /** What was last read or written of each site and found right, so that it is not checked once more. */
  readonly #known = new Map<string, { readonly revision: string; readonly savedAt: string }>();
  /** Revisions whose rename was not answered in time: if one turns up on disk, it is our own. */
  readonly #unsure = new Map<string, { readonly base: string | null; readonly written: string }>();

  constructor({ fs, folder, program, now = () => new Date(), lockTimes }: StoreOptions) {
    this.folders = foldersIn(folder);
    this.#fs = fs;
    this.#program = program;
    this.#now = now;
    this.#lockTimes = lockTimes;
    this.#list = new SiteList(fs, this.folders);
  }

  list(): Promise<readonly SiteEntry[]> {
    return telling('The sites could not be listed', () => this.#list.read());
  }

  /** @throws HostError that lists every problem where the file cannot be read as a site */
  async read(id: string): Promise<StoredSite> {
    const present = await telling('The site could not be read', () => this.#present(id));
    if (present === null) throw await this.#missing(id, 'The site could not be read');
    const reading = checkBytes(present.bytes);
    if (!reading.ok) {
      const intro = `The site in ${siteFileName(id)} cannot be opened; its file was left as it is.`;
      throw new HostError(reading.code, `${intro}\n${sentences(reading.problems)}`);
    }
    if (reading.site.id !== id) throw new HostError('unreadable', misnamed(siteFileName(id), reading.site.id));
    const { text, savedAt, site } = reading;
    this.#known.set(id, { revision: present.revision, savedAt });
    return { text, revision: present.revision, savedAt, site };
  }

  /**
   * Puts the site's file on the disk in place of the one at the base revision.
   * @throws HostError `stale` if another revision is there; then, as after any other error, the file is as it was
   */
  save({ id, body, baseRevision }: SaveRequest): Promise<Saved> {
    return this.#turns.take(checkedId(id), () =>
      telling('Not saved', async () => {
        const checked = checkBody(body);
        if (checked.site.id !== id) throw new HostError('bad-request', `Not saved: the site says its id is ${checked.site.id}, not ${id}.`);
        return this.#locked(id, (held) => this.#replace(id, checked.body, baseRevision, held));
      }),
    );
  }

  /** Puts the file into the removed folder, from where it can be brought back by hand. */
  remove(id: string, baseRevision: string): Promise<void> {
    return this.#turns.take(checkedId(id), () =>
      telling('Not removed', () =>
        this.#locked(id, async (held) => {
          const present = await this.#present(id);
          if (present === null) throw await this.#missing(id, 'Not removed');
          if (present.revision !== baseRevision) throw new HostError('stale', changed('Not removed'));
          await this.#fs.makeFolder(this.folders.removed);
          held.stillHeld();
          const kept = `${id}-${stampOf(this.#now().toISOString())}-${present.revision.slice(0, 8)}${SITE_FILE_END}`;
          await renameOver(this.#fs, this.#pathOf(id), join(this.folders.removed, kept));
          // It is removed; after a power cut it may be back, which loses nothing.
          await this.#fs.syncFolder(this.folders.removed).catch(() => undefined);
          await this.#fs.syncFolder(this.folders.sites).catch(() => undefined);
        }),
      ),
    );
  }

  /** @returns the id under which the site was taken */
  async importText(text: string, unchecked: boolean): Promise<string> {
    const reading = checkImport(text, unchecked);
    if (!reading.ok) throw new HostError(reading.code, `The file was not imported.\n${sentences(reading.problems)}`);
    return this.add(reading.site);
  }

  /** Adds a site, under a new id if its own is taken. */
  async add(site: Site): Promise<string> {
    for (let id = canNameFile(site.id) ? site.id : randomUUID(); ; id = randomUUID()) {
      try {
        await this.save({ id, body: writeSite({ ...site, id }), baseRevision: null });
        return id;
      } catch (error) {
        if (!(error instanceof HostError) || error.code !== 'stale') throw error;
      }
    }
  }

  /** The file of a site that is not here yet, as `save` would write it. @throws HostError where it cannot be saved */
  fileOf(site: Site): Uint8Array {
    const { body } = checkBody(writeSite(site));
    return this.#fileOf(body, this.#now().toISOString());
  }

  /** Whether a file of that site is here, readable or not. */
  async has(id: string): Promise<boolean> {
    return (await this.#present(id)) !== null;
  }

  generations(id: string): Promise<readonly Generation[]> {
    return telling('The earlier states could not be listed', () => listEarlier(this.#fs, this.folders, id));
  }

  async readGeneration(id: string, generation: string): Promise<string> {
    const bytes = await telling('The earlier state could not be read', () => readEarlier(this.#fs, this.folders, id, generation));
    const reading = checkBytes(bytes);
    if (reading.ok) return reading.text;
    throw new HostError(reading.code, `This earlier state cannot be opened; its file was left as it is.\n${sentences(reading.problems)}`);
  }

  #fileOf(body: string, savedAt: string): Uint8Array {
    return new TextEncoder().encode(writeSiteFile(body, { program: this.#program, savedAt }, sha256));
  }

  #pathOf(id: string): string {
    return join(this.folders.sites, siteFileName(id));
  }

  async #present(id: string): Promise<Present | null> {
    try {
      const bytes = await this.#fs.read(this.#pathOf(id));
      return { bytes, revision: revisionOf(bytes) };
    } catch (error) {
      if (systemCode(error) === 'ENOENT') return null;
      throw error;
    }
  }

  /** Tells a folder that is gone from a file that is gone. */
  async #missing(id: string, notDone: string): Promise<HostError> {
    try {
      await this.#fs.facts(this.folders.sites);
    } catch (error) {
      return troubleOf(error, notDone);
    }
    return new HostError('not-found', `${notDone}: ${siteFileName(id)} is not in the sites folder. It may have been removed or moved.`);
  }

  async #locked<T>(id: string, task: (held: Held) => Promise<T>): Promise<T> {
    await this.#fs.makeFolder(this.folders.locks);
    return withLock(this.#fs, join(this.folders.locks, `${id}.lock`), task, this.#lockTimes);
  }

  async #replace(id: string, body: string, baseRevision: string | null, held: Held): Promise<Saved> {
    const path = this.#pathOf(id);
    const present = await this.#present(id);
    this.#compare(id, present, baseRevision);
    const savedAt = this.#now().toISOString();
    const bytes = this.#fileOf(body, savedAt);
    const revision = revisionOf(bytes);
    const temp = await writeBeside(this.#fs, path, bytes);
    try {
      if (present !== null) await this.#keep(id, path, present);
      held.stillHeld();
      this.#unsure.set(id, { base: baseRevision, written: revision });
      await renameOver(this.#fs, temp, path);
    } catch (error) {
      // A rename that was not answered in time may still happen.
      if (systemCode(error) !== 'ETIMEDOUT') this.#unsure.delete(id);
      await this.#fs.remove(temp).catch(() => undefined);
      throw error;
    }
    try {
      await this.#fs.syncFolder(this.folders.sites);
    } catch (error) {
      await this.#putBack(id, path, present);
      throw error;
    }
    this.#unsure.delete(id);
    this.#known.set(id, { revision, savedAt });
    // The site is safe; what is kept too long is a matter for the next save.
    await thinOut(this.#fs, this.folders, id, this.#now()).catch(() => undefined);
    return { revision, savedAt };
  }

  #compare(id: string, present: Present | null, baseRevision: string | null): void {
    const revision = present?.revision ?? null;
    if (revision === baseRevision) return;
    const unsure = this.#unsure.get(id);
    if (unsure !== undefined && unsure.base === baseRevision && unsure.written === revision) return;
    if (revision === null)
      throw new HostError('stale', 'Not saved, because the site was removed or moved elsewhere since it was opened here.');
    if (baseRevision === null) throw new HostError('stale', 'Not saved, because there is a site with this id already.');
    throw new HostError('stale', changed('Not saved'));
  }

  /** A state that can be read becomes an earlier state; one that cannot is set aside for good. */
  async #keep(id: string, path: string, { bytes, revision }: Present): Promise<void> {
    const savedAt = this.#savedAt(id, bytes, revision);
    if (savedAt !== null) return keepEarlier(this.#fs, this.folders, id, { path, bytes, revision, savedAt });
    await this.#fs.makeFolder(this.folders.setAside);
    await keepAs(this.#fs, path, bytes, join(this.folders.setAside, `${id}-${revision.slice(0, 16)}${SITE_FILE_END}`));
  }

  /** When a site that can be read was saved; null for a file that cannot be read. */
  #savedAt(id: string, bytes: Uint8Array, revision: string): string | null {
    const known = this.#known.get(id);
    if (known?.revision === revision) return known.savedAt;
    const reading = checkBytes(bytes);
    return reading.ok ? reading.savedAt : null;
  }

  /**
   * The new file is there, but the disk would not say that it will stay. Rather than tell the user
   * that it may or may not be saved, the old one is put back.
   */
  async #putBack(id: string, path: string, before: Present | null): Promise<void> {
    try {
      if (before === null) await this.#fs.remove(path);
      else await renameOver(this.#fs, await writeBeside(this.#fs, path, before.bytes), path);
      this.#unsure.delete(id);
      await this.#fs.syncFolder(this.folders.sites);
    } catch {
      // The next save finds our own revision there and takes it as its base.
    }
  }
}

const changed = (notDone: string): string => `${notDone}, because another window or program saved the site since it was opened here.`;
