/**
 * Keeps the open site safe: every edit to the journal within two seconds, saves that carry the
 * revision the site was read at, and the truth about which value is on disk.
 */
import type { Host, HostFailure } from '../../src-core/host';
import type { Site } from '../../src-core/site/site';
import { failureOf } from '../host';

export type SavedState = 'saved' | 'unsaved' | 'saving' | 'failed';

/** An edit waits this long for others that follow at once, ms. */
const JOURNAL_AFTER = 300;
/**
 * The journal takes the whole site, so entries keep this distance, ms: it is also the longest an edit
 * waits for its place in it. The rest of the two seconds is for the disk.
 */
const JOURNAL_EVERY = 1500;
/** Wait before a journal that could not be written is tried again, ms. */
const JOURNAL_AGAIN = 5000;

export interface SavingOptions {
  readonly host: Host;
  readonly id: string;
  readonly revision: string | null;
  readonly savedAt: string | null;
  /** The value that lies on disk; null if what is open is not on disk yet. */
  readonly onDisk: Site | null;
  readonly write: (site: Site) => Promise<string>;
}

export class Saving {
  /** The value that lies on disk, compared by identity. */
  onDisk = $state.raw<Site | null>(null);
  savedAt = $state.raw<string | null>(null);
  busy = $state(false);
  /** Why the last save failed; null after one that did not. */
  failure = $state.raw<HostFailure | null>(null);
  /** Why edits do not reach the journal at the moment; null while they do. */
  journalFailure = $state.raw<HostFailure | null>(null);
  revision: string | null;

  readonly id: string;
  #host: Host;
  #write: (site: Site) => Promise<string>;
  /** Saves and journal entries reach the host one after another, in order. */
  #queue: Promise<unknown> = Promise.resolve();
  #current: Site | null;
  /** Names of the edits since the last save, and how many of them are in the journal. */
  #edits: string[] = [];
  #journalled = 0;
  /** Number of edits that are on disk, counted since the site was opened. */
  #onDiskEdits = 0;
  #timer: ReturnType<typeof setTimeout> | null = null;
  /** When an edit was last sent to the journal. */
  #journalledAt = -Infinity;
  #closed = false;

  constructor(options: SavingOptions) {
    this.#host = options.host;
    this.#write = options.write;
    this.id = options.id;
    this.revision = options.revision;
    this.savedAt = options.savedAt;
    this.onDisk = options.onDisk;
    this.#current = options.onDisk;
  }

  stateOf(site: Site): SavedState {
    if (this.busy) return 'saving';
    if (site === this.onDisk) return 'saved';
    return this.failure === null ? 'unsaved' : 'failed';
  }

  /** Tells of an edit, an undo or a redo; the journal gets it soon. */
  edited(site: Site, name: string): void {
    this.#current = site;
    this.#edits.push(name);
    this.#journalIn(Math.max(JOURNAL_AFTER, this.#journalledAt + JOURNAL_EVERY - performance.now()));
  }

  /** @returns whether the site is on disk now */
  save = (site: Site): Promise<boolean> => {
    this.#current = site;
    const covered = this.#onDiskEdits + this.#edits.length;
    return this.#inTurn(async () => {
      this.busy = true;
      try {
        const body = await this.#write(site);
        const saved = await this.#host.saveSite({ id: this.id, body, baseRevision: this.revision });
        this.revision = saved.revision;
        this.savedAt = saved.savedAt;
        this.onDisk = site;
        this.failure = null;
        // The save cleared the journal; what was edited meanwhile has to go in, perhaps again.
        this.#forget(covered);
        if (this.#edits.length > 0) this.#journalIn(0);
        return true;
      } catch (error) {
        this.failure = failureOf(error);
        return false;
      } finally {
        this.busy = false;
      }
    });
  };

  /** Resolves when every edit so far is in the journal or on disk, or could not be put there. */
  settled = async (): Promise<void> => {
    if (this.unjournalled) await this.#journal();
    await this.#queue;
  };

  /** Whether some edit is neither in the journal nor on disk yet. */
  get unjournalled(): boolean {
    return this.#edits.length > this.#journalled;
  }

  close(): void {
    this.#closed = true;
    if (this.#timer !== null) clearTimeout(this.#timer);
  }

  #journalIn(wait: number): void {
    if (this.#timer !== null || this.#closed) return;
    this.#timer = setTimeout(() => {
      this.#timer = null;
      void this.#journal();
    }, wait);
  }

  #journal(): Promise<void> {
    return this.#inTurn(async () => {
      const site = this.#current;
      if (site === null || !this.unjournalled) return;
      const count = this.#edits.length;
      try {
        if (site === this.onDisk) {
          await this.#host.clearJournal(this.id);
          this.#forget(this.#onDiskEdits + count);
        } else {
          this.#journalledAt = performance.now();
          const body = await this.#write(site);
          const edit = this.#edits.slice(this.#journalled, count).join('; ');
          await this.#host.appendJournal({ id: this.id, baseRevision: this.revision, body, edit });
          this.#journalled = count;
        }
        this.journalFailure = null;
      } catch (error) {
        this.journalFailure = failureOf(error);
        this.#journalIn(JOURNAL_AGAIN);
      }
    });
  }

  /** The journal is empty now, and the site on disk holds the edits up to this one. */
  #forget(edits: number): void {
    this.#edits = this.#edits.slice(edits - this.#onDiskEdits);
    this.#onDiskEdits = edits;
    this.#journalled = 0;
  }

  #inTurn<T>(task: () => Promise<T>): Promise<T> {
    const result = this.#queue.then(task);
    this.#queue = result.catch(() => undefined);
    return result;
  }
}
