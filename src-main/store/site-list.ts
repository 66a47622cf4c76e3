/** The list of sites. Files that have not changed since they were last read are not read again. */
import { setImmediate } from 'node:timers/promises';
import { join } from 'node:path';
import type { SiteEntry } from '../../src-core/host';
import { checkBytes, misnamed, revisionOf, sentences, sha256 } from './checked-site';
import { idInName, SITE_FILE_END, type Folders } from './file-names';
import { systemCode, type FsPort } from './fs-port';
import { troubleOf } from '../trouble';

interface Listed {
  readonly bytes: number;
  readonly changed: number;
  readonly entry: SiteEntry;
}

export class SiteList {
  readonly #fs: FsPort;
  readonly #folders: Folders;
  #listed = new Map<string, Listed>();

  constructor(fs: FsPort, folders: Folders) {
    this.#fs = fs;
    this.#folders = folders;
  }

  async read(): Promise<readonly SiteEntry[]> {
    const names = (await this.#fs.list(this.#folders.sites)).filter((name) => name.endsWith(SITE_FILE_END) && !name.startsWith('.'));
    const listed = new Map<string, Listed>();
    for (const name of names) {
      const one = await this.#listOne(name);
      if (one !== null) listed.set(name, one);
      // A large folder must not keep other calls waiting.
      await setImmediate();
    }
    this.#listed = listed;
    return [...listed.values()].map(({ entry }) => entry).sort((a, b) => a.name.localeCompare(b.name) || (a.id < b.id ? -1 : 1));
  }

  async #listOne(name: string): Promise<Listed | null> {
    const path = join(this.#folders.sites, name);
    const named = idInName(name);
    // A name that is none of the program's can only be looked at here and imported.
    const id = named ?? `file-${sha256(name).slice(0, 16)}`;
    try {
      const { bytes, changed, isFolder } = await this.#fs.facts(path);
      if (isFolder) return null;
      const before = this.#listed.get(name);
      if (before?.bytes === bytes && before.changed === changed) return before;
      const content = await this.#fs.read(path);
      const revision = named === null ? null : revisionOf(content);
      const reading = checkBytes(content);
      if (!reading.ok) {
        const problem = sentences(reading.problems, 3);
        return { bytes, changed, entry: { id, name, revision, savedAt: '', bytes, bays: null, problem } };
      }
      const { site, savedAt } = reading;
      const bays = site.runs.reduce((sum, run) => sum + run.bays.length, 0);
      const problem = named === site.id ? null : misnamed(name, site.id);
      return { bytes, changed, entry: { id, name: site.name, revision, savedAt, bytes, bays, problem } };
    } catch (error) {
      if (systemCode(error) === 'ENOENT') return null;
      // Not kept for the next time, when it may be readable.
      const problem = troubleOf(error, 'The file could not be read').message;
      return { bytes: -1, changed: -1, entry: { id, name, revision: null, savedAt: '', bytes: 0, bays: null, problem } };
    }
  }
}
