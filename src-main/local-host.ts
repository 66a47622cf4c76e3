/** `Host` on this machine's store, journal and settings; carried to the page by IPC or HTTP. */
import { createHash, randomBytes } from 'node:crypto';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import type { About, Host } from '../src-core/host';
import { readSite } from '../src-core/site/read';
import type { Site } from '../src-core/site/site';
import { writeSite } from '../src-core/site/write';
import { BesideStore } from './beside-store';
import { foldersIn } from './file-names';
import { nodeFs, type FsPort } from './fs-port';
import { Journal } from './journal';
import { JournalFiles, type JournalPlace } from './journal-files';
import { RecordStore } from './record-store';
import type { Settings } from './settings';
import { SiteStore } from './site-store';
import { sweep } from './sweep';
import { TIME_LIMITS, withTimeLimit, type TimeLimits } from './time-limit';
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

/** One store for all pages of this run. */
export class Machine {
  readonly #options: MachineOptions;
  readonly #fs: FsPort;
  readonly #now: () => Date;
  readonly #notices: string[] = [];
  #store: SiteStore;

  private constructor(options: MachineOptions, folder: string) {
    this.#options = options;
    this.#fs = options.fs ?? nodeFs;
    this.#now = options.now ?? (() => new Date());
    this.#store = this.#storeIn(folder);
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
    this.#store = this.#storeIn(folder);
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
      close: () => journals.forEach((one) => one.close()),
    };
  }

  /** What is kept beside the sites of the folder that is in use when it is asked for. */
  #beside() {
    const { version: program } = this.#options;
    let made: { store: SiteStore; beside: BesideStore; records: RecordStore } | null = null;
    const kept = () => {
      if (made?.store === this.#store) return made;
      const fs = withTimeLimit(this.#fs, this.#options.limits ?? TIME_LIMITS);
      const beside = new BesideStore(fs, this.#store.folders);
      made = { store: this.#store, beside, records: new RecordStore({ fs, beside, program, now: this.#now }) };
      return made;
    };
    return {
      listVisits: (siteId) => kept().beside.visits(siteId),
      saveVisit: (request) => kept().beside.saveVisit(request),
      readFollowUp: (siteId) => kept().beside.followUp(siteId),
      saveFollowUp: (request) => kept().beside.saveFollowUp(request),
      addPhoto: (request) => kept().beside.addPhoto(request),
      readPhoto: (siteId, file) => kept().beside.readPhoto(siteId, file),
      listRecords: (siteId) => kept().records.list(siteId),
      readRecord: (siteId, number) => kept().records.contents(siteId, number),
      appendRecord: (request) => kept().records.append(request),
    } satisfies Partial<Host>;
  }

  #storeIn(folder: string): SiteStore {
    const fs = withTimeLimit(this.#fs, this.#options.limits ?? TIME_LIMITS);
    return new SiteStore({ fs, folder, program: this.#options.version, now: this.#now });
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
    const ready = sweep(fs, foldersIn(this.sitesFolder), this.#now()).then(() => this.#putBackLost());
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
