/** `Host` on this machine's store, journal and settings; carried to the page by IPC or HTTP. */
import { createHash, randomBytes } from 'node:crypto';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import type { About, Host } from '../src-core/host';
import { readSite } from '../src-core/site/read';
import type { Site } from '../src-core/site/site';
import { writeSite } from '../src-core/site/write';
import { BesideStore } from './store/beside-store';
import { foldersIn } from './store/file-names';
import { nodeFs, type FsPort } from './store/fs-port';
import { Incoming } from './store/incoming';
import { Journal } from './store/journal';
import { JournalFiles, type JournalPlace } from './store/journal-files';
import { PackageDesk } from './store/package-desk';
import { PackageStore } from './store/package-store';
import { RecordStore } from './store/record-store';
import type { Settings } from './settings';
import { SiteStore } from './store/site-store';
import { sweep } from './store/sweep';
import { TIME_LIMITS, withTimeLimit, type TimeLimits } from './store/time-limit';
import { HostError } from './trouble';

export interface MachineOptions {
  /** The user's own folder, always on this machine. */
  readonly ownFolder: string;
  /** Where the sites are; null for what the settings say, or a folder in the user's own. */
  readonly sitesFolder: string | null;
  readonly settings: Settings;
  readonly version: string;
  readonly carrier: About['carrier'];
  readonly demo: () => Promise<Site>;
  readonly fs?: FsPort;
  readonly limits?: TimeLimits;
  readonly now?: () => Date;
}

/** What only a window can offer. */
export type WindowParts = Pick<Host, 'savePdf' | 'chooseSitesFolder'>;

export interface PageHost extends Host {
  /** The page is gone; its journal stays. */
  close(): void;
}

/** The two seconds within which an edit is on the disk leave so much to a folder that may not answer, ms. */
const JOURNAL_LIMITS: TimeLimits = { quick: 500, bytes: 900 };
/** Longest wait for the sites folder at the start, ms. */
const READY_WITHIN = 3000;
const SITES_FOLDER = 'sitesFolder';

/** The sites of one folder with what is kept beside them. */
interface Kept {
  readonly store: SiteStore;
  readonly beside: BesideStore;
  readonly records: RecordStore;
  readonly incoming: Incoming;
  readonly packages: PackageStore;
}

/** One store for all pages of this run. */
export class Machine {
  readonly #options: MachineOptions;
  readonly #fs: FsPort;
  readonly #now: () => Date;
  readonly #notices: string[] = [];
  #kept: Kept;

  private constructor(options: MachineOptions, folder: string) {
    this.#options = options;
    this.#fs = options.fs ?? nodeFs;
    this.#now = options.now ?? (() => new Date());
    this.#kept = this.#keptIn(folder);
  }

  get #store(): SiteStore {
    return this.#kept.store;
  }

  /** Makes ready: the folder, what an earlier run left in it, and sites of which only the journal is left. */
  static async start(options: MachineOptions): Promise<Machine> {
    const own = join(options.ownFolder, 'sites');
    const chosen = options.sitesFolder ?? options.settings.get(SITES_FOLDER);
    const folder = typeof chosen === 'string' && chosen !== '' ? chosen : own;
    // Only the user's own folder is made: where a chosen one is missing, its drive or share is.
    if (folder === own || options.sitesFolder !== null) await atMost(READY_WITHIN, mkdir(folder, { recursive: true }));
    const machine = new Machine(options, folder);
    await machine.#makeReady();
    return machine;
  }

  get sitesFolder(): string {
    return this.#store.folders.sites;
  }

  /** Goes on with another folder and remembers it. */
  async useFolder(folder: string): Promise<void> {
    this.#options.settings.set({ [SITES_FOLDER]: folder });
    this.#kept = this.#keptIn(folder);
    await this.#makeReady();
  }

  /** The host of one load of the page. */
  page(window: WindowParts = { savePdf: null, chooseSitesFolder: null }): PageHost {
    const session = randomBytes(4).toString('hex');
    const journals = new Map<SiteStore, Journal>();
    const journal = (): Journal => {
      const store = this.#store;
      const there = journals.get(store) ?? new Journal({ places: this.#journalPlaces(store), session, now: this.#now });
      journals.set(store, there);
      return there;
    };
    const { settings } = this.#options;
    const desk = new PackageDesk(() => this.#kept.packages);
    return {
      about: async () => this.#about([...journals.values()].flatMap(({ notices }) => notices)),
      listSites: () => this.#store.list(),
      readSite: async (id) => {
        const { text, revision, savedAt, site } = await this.#store.read(id);
        return { id, text, revision, savedAt, recovered: await journal().recovered(id, writeSite(site)) };
      },
      saveSite: async (request) => {
        await journal().saving(request);
        const saved = await this.#store.save(request);
        await journal().saved(request.id, request.body);
        return saved;
      },
      removeSite: async (id, baseRevision) => {
        await this.#store.remove(id, baseRevision);
        await journal().removed(id);
      },
      importSite: (text, unchecked = false) => this.#store.importText(text, unchecked),
      addDemoSite: () => this.#addDemo(),
      listGenerations: (id) => this.#store.generations(id),
      readGeneration: (id, generation) => this.#store.readGeneration(id, generation),
      appendJournal: (request) => journal().append(request),
      clearJournal: (id) => journal().clear(id),
      ...this.#beside(),
      readPreferences: async () => settings.preferences(),
      savePreferences: async (change) => settings.savePreferences(change),
      ...window,
      makePackage: (siteId, withPhotos) => desk.make(siteId, withPhotos),
      readPackage: (from) => desk.read(from),
      sendPackage: (from, base64) => desk.send(from, base64),
      lookAtPackage: () => desk.look(),
      takePackage: (how) => desk.take(how),
      dropPackage: async () => desk.drop(),
      close: () => {
        journals.forEach((one) => one.close());
        desk.drop();
      },
    };
  }

  /** What is kept beside the sites of the folder that is in use when it is asked for; all pages take turns at it. */
  #beside() {
    return {
      listVisits: (siteId) => this.#kept.beside.visits(siteId),
      saveVisit: (request) => this.#kept.beside.saveVisit(request),
      readFollowUp: (siteId) => this.#kept.beside.followUp(siteId),
      saveFollowUp: (request) => this.#kept.beside.saveFollowUp(request),
      addPhoto: (request) => this.#kept.beside.addPhoto(request),
      readPhoto: (siteId, file) => this.#kept.beside.readPhoto(siteId, file),
      listRecords: (siteId) => this.#kept.records.list(siteId),
      readRecord: (siteId, number, chain) => this.#kept.records.contents(siteId, number, chain),
      appendRecord: (request) => this.#kept.records.append(request),
    } satisfies Partial<Host>;
  }

  #keptIn(folder: string): Kept {
    const { version: program, limits = TIME_LIMITS } = this.#options;
    const fs = withTimeLimit(this.#fs, limits);
    const now = this.#now;
    const store = new SiteStore({ fs, folder, program, now });
    // Waits of its own: a site's file that is slow must not keep visits from being saved.
    const besideFs = withTimeLimit(this.#fs, limits);
    const beside = new BesideStore(besideFs, store.folders);
    const records = new RecordStore({ fs: besideFs, beside, program, now });
    const incoming = new Incoming(besideFs, store.folders);
    return { store, beside, records, incoming, packages: new PackageStore({ store, beside, records, incoming, program, now }) };
  }

  #journalPlaces(store: SiteStore): readonly JournalPlace[] {
    const { journal, leftOut, sites } = store.folders;
    // Sites of two folders may have the same ids, so each has its own folder here.
    const here = join(this.#options.ownFolder, 'journal', createHash('sha256').update(sites).digest('hex').slice(0, 16));
    return [
      { fs: withTimeLimit(this.#fs, JOURNAL_LIMITS), folder: journal, leftOut },
      { fs: withTimeLimit(this.#fs), folder: here, leftOut: join(here, 'left-out') },
    ];
  }

  async #makeReady(): Promise<void> {
    await mkdir(join(this.#options.ownFolder, 'journal'), { recursive: true });
    const fs = withTimeLimit(this.#fs, this.#options.limits ?? TIME_LIMITS);
    const { incoming } = this.#kept;
    const ready = sweep(fs, foldersIn(this.sitesFolder), this.#now())
      .then(() => incoming.finish(this.#now()))
      .then((told) => void this.#notices.push(...told))
      // What could not be finished now is finished before the next package is brought in.
      .catch(() => undefined)
      .then(() => this.#putBackLost());
    // A folder that does not answer must not keep the program from coming up and saying so.
    await atMost(READY_WITHIN, ready);
  }

  /** A site whose file is gone while its journal is there is put back as the journal has it. */
  async #putBackLost(): Promise<void> {
    const journals = new JournalFiles(this.#journalPlaces(this.#store));
    for (const [id, body] of await journals.left()) {
      const there = await this.#store.read(id).then(
        () => true,
        (error: unknown) => !(error instanceof HostError && error.code === 'not-found'),
      );
      if (there) continue;
      try {
        await this.#store.save({ id, body, baseRevision: null });
        this.#notices.push(
          `The file of "${nameIn(body)}" was gone, but unsaved changes to it were in the journal. It was put back as it was after the last of them.`,
        );
      } catch {
        // The journal stays, so nothing is lost by trying again at the next start.
      }
    }
    this.#notices.push(...journals.notices);
  }

  #about(more: readonly string[]): About {
    const { version, carrier, settings } = this.#options;
    return { version, carrier, sitesFolder: this.sitesFolder, notices: [...settings.notices, ...this.#notices, ...more] };
  }

  async #addDemo(): Promise<string> {
    const demo = await this.#options.demo();
    try {
      await this.#store.read(demo.id);
      return demo.id;
    } catch (error) {
      if (error instanceof HostError && error.code === 'folder-gone') throw error;
      return this.#store.add(demo);
    }
  }
}

function nameIn(body: string): string {
  const reading = readSite(JSON.parse(body));
  return reading.ok ? reading.site.name : 'a site';
}

/** Waits for the task, but no longer than that; it goes on by itself. */
async function atMost(limit: number, task: Promise<unknown>): Promise<void> {
  let timer: NodeJS.Timeout | undefined;
  const over = new Promise<void>((resolve) => {
    timer = setTimeout(resolve, limit);
  });
  await Promise.race([task, over]).finally(() => clearTimeout(timer));
}
