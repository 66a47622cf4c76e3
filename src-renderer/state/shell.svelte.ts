/** The program round the open site: list of sites, which screen and dialog are up, preferences. */
import { createContext } from 'svelte';
import { MACHINE_LOCALE } from '../../src-core/host';
import type { About, Generation, Host, HostFailure, PackageLook, Preferences, RecoveredEdits, SiteEntry } from '../../src-core/host';
import type { PaperKind } from '../../src-core/paper/paper';
import { SITE_FILE_BYTES } from '../../src-core/site/envelope';
import { newSite } from '../../src-core/site/new-site';
import type { Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import type { WorkerLike } from '../auditing/audit-link';
import { LIBRARIES, type LibraryKind } from '../forms/library-items';
import { failureOf } from '../host';
import { newId } from '../editing/ids';
import { machineLocale, withLocale } from '../machine-locale';
import { fileNameOf, offerFile } from './offer-file';
import type { OpenSite } from './open-site.svelte';
import { isPackage, Packages, UNSAVED_BESIDE } from './packages.svelte';
import type { Refusal } from './refusal';
import { readBody, readSiteFile, type FileReading } from './site-text';

export type Screen = 'rack' | 'run' | 'layout' | 'libraries' | 'rules' | 'visits' | 'paper' | 'records' | 'history' | 'help';

export type Dialog =
  | { readonly kind: 'commands' | 'find' | 'move-to' | 'new-run' | 'new-site' | 'preferences' | 'stale' | 'leave' | 'fill-run' }
  | { readonly kind: 'add-bays' | 'keep-template' | 'paste-level' }
  | { readonly kind: 'recovered'; readonly recovered: RecoveredEdits; readonly site: Site | null; readonly problem: string | null }
  | { readonly kind: 'new-entry'; readonly of: LibraryKind; readonly then: (id: string) => Refusal }
  | { readonly kind: 'remove-site' | 'mend-site'; readonly entry: SiteEntry }
  | { readonly kind: 'altered'; readonly name: string; readonly text: string }
  | { readonly kind: 'package'; readonly look: PackageLook }
  | { readonly kind: 'package-done'; readonly done: readonly string[] }
  | { readonly kind: 'working' | 'without-photos' }
  | { readonly kind: 'problems'; readonly name: string; readonly problems: readonly string[] };

export class Shell {
  readonly host: Host;
  open = $state.raw<OpenSite | null>(null);
  screen = $state<Screen>('rack');
  dialog = $state.raw<Dialog | null>(null);
  /** Which paper the paper screen shows. */
  paperKind = $state<PaperKind>('bay-sheet');
  sites = $state.raw<readonly SiteEntry[] | null>(null);
  about = $state.raw<About | null>(null);
  /** With the locale that numbers are written by, chosen or the machine's. */
  preferences = $state.raw<Preferences | null>(null);
  /** Whether numbers are written as the machine's user writes them. */
  asMachine = $state(true);
  locale = $derived(this.preferences?.locale ?? machineLocale());
  /** What last went wrong outside an open site, said until it is put away. */
  trouble = $state.raw<HostFailure | null>(null);
  busy = $state(false);
  readonly packages: Packages;
  /** What was done last outside an open site, for whoever cannot see the list change. */
  said = $state('');
  /** Whether a visit or its follow-up waits to be put on the disk. */
  unsavedBeside: () => boolean = () => false;

  #makeWorker: (() => WorkerLike) | null;
  #today: (() => string) | undefined;

  constructor(host: Host, makeWorker: (() => WorkerLike) | null, today?: () => string) {
    this.host = host;
    this.packages = new Packages(this);
    this.#makeWorker = makeWorker;
    this.#today = today;
  }

  start = (): Promise<void> =>
    this.attempt(async () => {
      this.#prefer(await this.host.readPreferences());
      this.about = await this.host.about();
      this.sites = await this.host.listSites();
    });

  refresh = (): Promise<void> =>
    this.attempt(async () => {
      this.sites = await this.host.listSites();
    });

  openSite = (id: string): Promise<void> =>
    this.attempt(async () => {
      const onDisk = await this.host.readSite(id);
      const reading = readSiteFile(onDisk.text);
      if (!reading.ok) {
        this.#showProblems(this.sites?.find((entry) => entry.id === id)?.name ?? id, reading);
        return;
      }
      await this.#take(reading.site, id, onDisk.revision, onDisk.savedAt);
      if (onDisk.recovered !== null) {
        const body = readBody(onDisk.recovered.body);
        const problem = body.ok ? null : body.problems.join(' ');
        this.dialog = { kind: 'recovered', recovered: onDisk.recovered, site: body.ok ? body.site : null, problem };
      }
      await this.#remember(id);
    });

  newSite = (name: string): Promise<void> =>
    this.attempt(async () => {
      const site = newSite(newId(), name.trim());
      const saved = await this.host.saveSite({ id: site.id, body: writeSite(site), baseRevision: null });
      await this.#take(site, site.id, saved.revision, saved.savedAt);
      await this.#remember(site.id);
    });

  openDemo = (): Promise<void> =>
    this.attempt(async () => {
      const id = await this.host.addDemoSite();
      this.sites = await this.host.listSites();
      await this.openSite(id);
    });

  /** A site file, or a package of a site with its visits and records: told by what is in it. */
  importFile = (file: File): Promise<void> =>
    this.attempt(async () => {
      if (await isPackage(file)) return this.packages.bringIn(file);
      // More than twice the largest site file is not even read.
      if (file.size > 2 * SITE_FILE_BYTES) throw tooLarge(file.name);
      const text = await file.text();
      const reading = readSiteFile(text);
      if (!reading.ok) {
        this.#showProblems(file.name, reading);
        return;
      }
      try {
        await this.#takeIn(text, false);
      } catch (error) {
        // A file that was edited by hand can be taken knowingly; everything in it was read as strictly.
        if (failureOf(error).code !== 'altered') throw error;
        this.dialog = { kind: 'altered', name: file.name, text };
      }
    });

  /** Takes a file that does not match its checksum, because the user says it was edited by hand. */
  importUnchecked = (text: string): Promise<void> => this.attempt(() => this.#takeIn(text, true));

  async #takeIn(text: string, unchecked: boolean): Promise<void> {
    const id = await this.host.importSite(text, unchecked);
    this.sites = await this.host.listSites();
    await this.openSite(id);
  }

  /** Puts a site aside as it was listed; one that changed since is not. */
  removeSite = (entry: SiteEntry): Promise<void> =>
    this.attempt(async () => {
      if (entry.revision !== null) await this.host.removeSite(entry.id, entry.revision);
      this.sites = await this.host.listSites();
    });

  /** Puts an earlier state in the place of a file that cannot be read. */
  restoreUnreadable = (entry: SiteEntry, generationId: string): Promise<void> =>
    this.attempt(async () => {
      const reading = readSiteFile(await this.host.readGeneration(entry.id, generationId));
      if (!reading.ok) {
        this.#showProblems(`The earlier state of ${entry.name}`, reading);
        return;
      }
      await this.host.saveSite({ id: entry.id, body: writeSite(reading.site), baseRevision: entry.revision });
      this.dialog = null;
      this.sites = await this.host.listSites();
      await this.openSite(entry.id);
    });

  /** Saves the open site; where it was changed elsewhere meanwhile, asks what is to become of the two. */
  save = async (): Promise<void> => {
    const open = this.open;
    if (open === null || (await open.save())) return;
    if (open.saving.failure?.code === 'stale') this.dialog = { kind: 'stale' };
  };

  /**
   * Takes up edits that reached the journal but were not saved, as one edit that can be undone.
   * They were made on `baseRevision`: if someone saved the site since, saving them asks first.
   */
  takeUp = (site: Site, baseRevision: string | null): void => {
    const { open } = this;
    this.dialog = null;
    if (open === null) return;
    open.edit('Take up recovered changes', () => site);
    open.saving.revision = baseRevision;
    open.say('The recovered changes are back. They are not saved yet.');
  };

  leaveOut = (): Promise<void> =>
    this.attempt(async () => {
      const { open } = this;
      this.dialog = null;
      if (open === null) return;
      await this.host.clearJournal(open.id);
      open.say('The recovered changes were left out.');
    });

  /** Back to the list of sites; asks first where something is not saved. */
  leave = (): void => {
    if (this.open === null) return;
    if (this.unsavedBeside()) {
      this.show('visits');
      this.trouble = UNSAVED_BESIDE;
      return;
    }
    if (this.open.saved === 'saved' && this.open.unfinished.length === 0) void this.closeSite();
    else this.dialog = { kind: 'leave' };
  };

  closeSite = async (): Promise<void> => {
    const open = this.open;
    this.dialog = null;
    if (open === null) return;
    await open.saving.settled();
    open.close();
    this.open = null;
    this.screen = 'rack';
    await this.refresh();
  };

  /** Leaves without the unsaved edits: they are taken out of the journal as well. */
  discardAndClose = async (): Promise<void> => {
    const open = this.open;
    if (open === null) return;
    await open.saving.settled();
    await this.attempt(() => this.host.clearJournal(open.id));
    open.close();
    this.open = null;
    this.dialog = null;
    this.screen = 'rack';
    await this.refresh();
  };

  /** Reads the other program's state in place of ours. */
  reopen = async (): Promise<void> => {
    const open = this.open;
    if (open === null) return;
    await this.discardAndClose();
    await this.openSite(open.id);
  };

  /** Our state over the other program's; theirs stays among the earlier states. */
  saveOver = async (): Promise<void> => {
    const open = this.open;
    if (open === null) return;
    await this.attempt(async () => {
      const { revision } = await this.host.readSite(open.id);
      open.saving.revision = revision;
      this.dialog = null;
      await open.save();
    });
  };

  saveCopy = (): Promise<void> =>
    this.attempt(async () => {
      const open = this.open;
      if (open === null) return;
      const copy: Site = { ...open.site, id: newId(), name: `${open.site.name} (copy)` };
      const saved = await this.host.saveSite({ id: copy.id, body: writeSite(copy), baseRevision: null });
      await open.saving.settled();
      await this.host.clearJournal(open.id);
      this.dialog = null;
      await this.#take(copy, copy.id, saved.revision, saved.savedAt);
    });

  generations = (): Promise<readonly Generation[]> => (this.open === null ? Promise.resolve([]) : this.host.listGenerations(this.open.id));

  readGeneration = async (generationId: string): Promise<FileReading> =>
    readSiteFile(await this.host.readGeneration(this.open?.id ?? '', generationId));

  /** Hands the site's file, as it lies on disk after saving, to the browser's own save dialog. */
  exportFile = (): Promise<void> =>
    this.attempt(async () => {
      const open = this.open;
      if (open === null || (open.saved !== 'saved' && !(await open.save()))) return;
      const { text } = await this.host.readSite(open.id);
      offerFile(new Blob([text], { type: 'application/json' }), `${fileNameOf(open.site.name)}.tallybeam.json`);
    });

  chooseFolder = (): Promise<void> =>
    this.attempt(async () => {
      if (this.host.chooseSitesFolder === null) return;
      this.about = await this.host.chooseSitesFolder();
      this.sites = await this.host.listSites();
    });

  savePreferences = (change: Partial<Preferences>): Promise<void> =>
    this.attempt(async () => {
      this.#prefer(await this.host.savePreferences(change));
      if (this.open !== null) this.open.locale = this.locale;
    });

  show = (screen: Screen): void => {
    this.dialog = null;
    this.screen = screen;
  };

  showPaper = (kind: PaperKind): void => {
    this.paperKind = kind;
    this.show('paper');
  };

  ask = (dialog: Dialog): void => {
    this.dialog = dialog;
  };

  close = (): void => {
    this.dialog = null;
  };

  async #take(site: Site, id: string, revision: string, savedAt: string): Promise<void> {
    // With the checks it is most of the program, and the list of sites does not wait for it.
    const { OpenSite } = await import('./open-site.svelte');
    this.open?.close();
    this.dialog = null;
    this.screen = 'rack';
    this.open = new OpenSite({
      host: this.host,
      id,
      site,
      revision,
      savedAt,
      locale: this.locale,
      makeWorker: this.#makeWorker,
      onTask: ({ kind }) => this.#bringUp(kind),
      ...(this.#today === undefined ? {} : { today: this.#today }),
    });
  }

  /** Forms stand beside the drawing, so that verdicts follow what is typed; libraries and rules have screens of their own as well. */
  #bringUp(kind: string): void {
    this.dialog = null;
    const isEntry = LIBRARIES.some((one) => one.kind === kind);
    if (this.screen === 'libraries' && isEntry) return;
    if (this.screen === 'rules' && kind === 'site') return;
    if (this.screen === 'run' && (isEntry || ['frame', 'run', 'site'].includes(kind))) return;
    this.screen = 'rack';
  }

  #showProblems(name: string, reading: Extract<FileReading, { ok: false }>): void {
    this.dialog = { kind: 'problems', name, problems: reading.problems };
  }

  #prefer(preferences: Preferences): void {
    this.asMachine = preferences.locale === MACHINE_LOCALE;
    this.preferences = withLocale(preferences);
  }

  async #remember(id: string): Promise<void> {
    const recent = [id, ...(this.preferences?.recentSiteIds ?? []).filter((one) => one !== id)].slice(0, 12);
    this.#prefer(await this.host.savePreferences({ recentSiteIds: recent }));
  }

  /** Does what may fail; why it failed is told. */
  async attempt(task: () => Promise<void>): Promise<void> {
    this.busy = true;
    this.trouble = null;
    try {
      await task();
    } catch (error) {
      this.trouble = failureOf(error);
    } finally {
      this.busy = false;
    }
  }
}

const tooLarge = (name: string): HostFailure => ({
  code: 'too-large',
  message: `${name} is larger than any site file, and no package of one. Choose a file that Tallybeam exported.`,
});

export const [useShell, setShell] = createContext<Shell>();
