/** A host that keeps sites in memory, with revisions and journal as the real ones keep them, and can be made to fail. */
import type { Host, HostFailure, JournalRequest, PackageLook, Preferences, SiteOnDisk, TakePackage } from '../../src-core/host';
import { memoryBeside } from './memory-beside';

interface Kept {
  body: string;
  revision: number;
  journal: JournalRequest[];
}

export class MemoryHost implements Host {
  readonly kept = new Map<string, Kept>();
  /** Every call, in order. */
  readonly calls: string[] = [];
  /** What the named call answers with from now on, in place of doing it. */
  readonly failing = new Map<string, HostFailure>();
  /** Resolves before the named call goes on. */
  readonly waiting = new Map<string, Promise<void>>();
  savePdf = null;
  chooseSitesFolder = null;
  readonly #beside = memoryBeside((name) => this.#call(name));
  readonly listVisits = this.#beside.listVisits;
  readonly saveVisit = this.#beside.saveVisit;
  readonly readFollowUp = this.#beside.readFollowUp;
  readonly saveFollowUp = this.#beside.saveFollowUp;
  readonly addPhoto = this.#beside.addPhoto;
  readonly readPhoto = this.#beside.readPhoto;
  readonly listRecords = this.#beside.listRecords;
  readonly readRecord = this.#beside.readRecord;
  readonly appendRecord = this.#beside.appendRecord;
  #preferences: Preferences = { theme: 'system', textScale: 100, recentSiteIds: [], person: '', locale: 'und' };

  async #call(name: string): Promise<void> {
    this.calls.push(name);
    await this.waiting.get(name);
    const failure = this.failing.get(name);
    if (failure !== undefined) throw failure;
  }

  #site(id: string): Kept {
    const kept = this.kept.get(id);
    if (kept === undefined) throw { code: 'not-found', message: `There is no site ${id}.` } satisfies HostFailure;
    return kept;
  }

  async about() {
    await this.#call('about');
    return { version: '0.0.0', carrier: 'browser' as const, sitesFolder: 'memory', notices: [] };
  }
  async listSites() {
    await this.#call('listSites');
    return [...this.kept].map(([id, { body, revision }]) => ({
      id,
      name: id,
      revision: String(revision),
      savedAt: SAVED_AT,
      bytes: body.length,
      bays: null,
      problem: null,
    }));
  }
  async readSite(id: string): Promise<SiteOnDisk> {
    await this.#call('readSite');
    const { body, revision, journal } = this.#site(id);
    const last = journal.at(-1);
    const recovered = last
      ? {
          body: last.body,
          editedAt: SAVED_AT,
          edits: journal.map((one) => one.edit),
          baseRevision: last.baseRevision,
          damagedLines: 0,
          otherPage: false,
        }
      : null;
    return { id, text: body, revision: String(revision), savedAt: SAVED_AT, recovered };
  }
  async saveSite({ id, body, baseRevision }: { id: string; body: string; baseRevision: string | null }) {
    await this.#call('saveSite');
    const kept = this.kept.get(id);
    if ((kept === undefined ? null : String(kept.revision)) !== baseRevision)
      throw { code: 'stale', message: 'The site was changed elsewhere.' } satisfies HostFailure;
    const revision = (kept?.revision ?? 0) + 1;
    this.kept.set(id, { body, revision, journal: [] });
    return { revision: String(revision), savedAt: SAVED_AT };
  }
  async removeSite(id: string) {
    await this.#call('removeSite');
    this.kept.delete(id);
  }
  async importSite(text: string) {
    await this.#call('importSite');
    this.kept.set('imported', { body: text, revision: 1, journal: [] });
    return 'imported';
  }
  async addDemoSite() {
    await this.#call('addDemoSite');
    return 'demo';
  }
  async listGenerations() {
    await this.#call('listGenerations');
    return [];
  }
  async readGeneration(id: string) {
    await this.#call('readGeneration');
    return this.#site(id).body;
  }
  async appendJournal(request: JournalRequest) {
    await this.#call('appendJournal');
    this.#site(request.id).journal.push(request);
  }
  async clearJournal(id: string) {
    await this.#call('clearJournal');
    this.#site(id).journal = [];
  }
  /** The bytes of the package that was sent last, or is made next. */
  packed = new Uint8Array();
  look: PackageLook = { siteName: 'Depot', madeAt: SAVED_AT, visits: 1, photos: 0, photosMissing: 0, records: 0, here: null };
  taken: TakePackage | null = null;
  async makePackage() {
    await this.#call('makePackage');
    return { bytes: this.packed.length, visits: 1, photos: 0, photosMissing: 0, records: 2 };
  }
  async readPackage(from: number) {
    await this.#call('readPackage');
    return Buffer.from(this.packed.subarray(from, from + 5)).toString('base64');
  }
  async sendPackage(from: number, base64: string) {
    await this.#call('sendPackage');
    this.packed = Uint8Array.from([...this.packed.subarray(0, from), ...Buffer.from(base64, 'base64')]);
  }
  async lookAtPackage() {
    await this.#call('lookAtPackage');
    return this.look;
  }
  async takePackage(how: TakePackage) {
    await this.#call('takePackage');
    this.taken = how;
    this.kept.set('taken', { body: this.kept.values().next().value?.body ?? '', revision: 1, journal: [] });
    return { id: 'taken', done: ['1 visit is added.'] };
  }
  async dropPackage() {
    await this.#call('dropPackage');
  }
  async readPreferences() {
    await this.#call('readPreferences');
    return this.#preferences;
  }
  async savePreferences(change: Partial<Preferences>) {
    await this.#call('savePreferences');
    this.#preferences = { ...this.#preferences, ...change };
    return this.#preferences;
  }
}

const SAVED_AT = '2026-12-01T12:00:00.000Z';
