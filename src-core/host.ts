/**
 * What the program asks of its machine. The page knows nothing else of it: the same interface is
 * carried over IPC in the desktop window and over HTTP by the loopback host.
 *
 * The page knows sites by id, never by path. Every method may reject with a `HostError`.
 */
import type { IfVisitDiffers } from './package/package';
import type { FrozenRecord, RecordDraft } from './visit/records';

/** One site in the list. `problem` is a sentence if its file cannot be read. */
export interface SiteEntry {
  readonly id: string;
  readonly name: string;
  /** Revision of the file as it was when listed; an unreadable file can be replaced or removed by it. Null if there is none. */
  readonly revision: string | null;
  readonly savedAt: string;
  readonly bytes: number;
  readonly bays: number | null;
  readonly problem: string | null;
}

/** A site as it lies on disk. */
export interface SiteOnDisk {
  readonly id: string;
  /** The site's file, whole, as text. */
  readonly text: string;
  /** Changes with every save; a save carries the revision it was read at. */
  readonly revision: string;
  readonly savedAt: string;
  /** Edits journalled after the last save, if the program ended before it; null if none. */
  readonly recovered: RecoveredEdits | null;
}

export interface RecoveredEdits {
  /** The site's body as it was after the last edit that reached the journal. */
  readonly body: string;
  readonly editedAt: string;
  readonly edits: readonly string[];
  /**
   * Revision the edits were made on. Where it is not the site's present one, someone saved the site
   * since: a save of these edits has to carry this revision, so that the host asks.
   */
  readonly baseRevision: string | null;
  /** Journal lines that were damaged and could not be used. */
  readonly damagedLines: number;
  /** Made in another page of this run of the program, which may still be open, or in this one before it was loaded again. */
  readonly otherPage: boolean;
}

export interface SaveRequest {
  readonly id: string;
  /** The site as JSON text, as `writeSite` gives it; the host puts the envelope round it. */
  readonly body: string;
  /** Revision the site was read at; null for a new site. */
  readonly baseRevision: string | null;
}

export interface Saved {
  readonly revision: string;
  readonly savedAt: string;
}

/** An earlier state of a site that was kept when it was replaced. */
export interface Generation {
  readonly id: string;
  readonly savedAt: string;
  readonly bytes: number;
}

export interface JournalRequest {
  readonly id: string;
  readonly baseRevision: string | null;
  /** The whole body after the edit; the host keeps only what changed. */
  readonly body: string;
  /** What was done, in words. */
  readonly edit: string;
}

/** A document kept beside a site, as text; `problem` says what is wrong where it cannot be read. */
export interface KeptText {
  readonly id: string;
  readonly text: string;
  readonly revision: string;
  readonly problem: string | null;
}

export interface SaveVisit {
  readonly siteId: string;
  readonly visitId: string;
  /** The visit as JSON text, as `writeVisit` gives it. */
  readonly body: string;
  /** Revision it was read at; null for a new one. */
  readonly baseRevision: string | null;
}

export interface SaveFollowUp {
  readonly siteId: string;
  /** As `writeFollowUp` gives it. */
  readonly body: string;
  readonly baseRevision: string | null;
}

export interface PhotoRequest {
  readonly siteId: string;
  readonly photoId: string;
  /** The picture's bytes: JPEG, PNG or WebP. */
  readonly base64: string;
}

export interface AppendRecord {
  readonly siteId: string;
  /** The host adds its version and the time. */
  readonly draft: Omit<RecordDraft, 'program' | 'at'>;
  /** Inputs and figures as JSON text. */
  readonly contents: string;
}

export interface RecordsOnDisk {
  /** Those that can be relied on. */
  readonly records: readonly FrozenRecord[];
  /** Number of the first one that was altered, and a sentence; null where all are as they were written. */
  readonly altered: number | null;
  readonly message: string | null;
  /** Chains that came in packages and went on apart from the site's own; each is verified by itself. */
  readonly others: readonly OtherRecords[];
}

export interface OtherRecords extends Omit<RecordsOnDisk, 'others'> {
  /** Names the chain where one of its records is read. */
  readonly chain: string;
}

export interface PackageCounts {
  readonly visits: number;
  readonly photos: number;
  /** Photos that visits name and that are not with them. */
  readonly photosMissing: number;
  readonly records: number;
}

/** A package that the host keeps ready for the page: a site's file with everything that is kept beside it. */
export interface MadePackage extends PackageCounts {
  readonly bytes: number;
}

/** What a package holds, and what bringing it in would do. Everything in it was read and verified. */
export interface PackageLook extends PackageCounts {
  readonly siteName: string;
  /** ISO time. */
  readonly madeAt: string;
  /** The site of the same id that is here already; null where there is none. */
  readonly here: {
    readonly name: string;
    /** What would become of the parts of the package, a sentence each. */
    readonly steps: readonly string[];
    /** Visits that are here in another state: what becomes of them is asked. */
    readonly visitsDiffer: readonly string[];
    /** Why they cannot be brought into the site here; null where they can. */
    readonly problem: string | null;
  } | null;
}

export type TakePackage = { readonly as: 'copy' } | { readonly as: 'join'; readonly ifVisitDiffers: IfVisitDiffers };

export interface TakenPackage {
  /** Id of the site that holds it now. */
  readonly id: string;
  /** What was done, a sentence each. */
  readonly done: readonly string[];
}

/** Stands for "as the machine's user writes": the language that is none, as BCP 47 has it. */
export const MACHINE_LOCALE = 'und';

export interface Preferences {
  readonly theme: 'system' | 'light' | 'dark';
  /** Text scale in per cent. */
  readonly textScale: number;
  readonly recentSiteIds: readonly string[];
  readonly person: string;
  /** How numbers and dates are written, such as "de-DE", or MACHINE_LOCALE. */
  readonly locale: string;
}

export interface About {
  readonly version: string;
  readonly carrier: 'window' | 'browser';
  readonly sitesFolder: string;
  /** Sentences the user must be told once, such as a preferences file that was set aside. */
  readonly notices: readonly string[];
}

export interface Host {
  about(): Promise<About>;
  listSites(): Promise<readonly SiteEntry[]>;
  readSite(id: string): Promise<SiteOnDisk>;
  saveSite(request: SaveRequest): Promise<Saved>;
  /** Puts the site aside in the removed folder; it can be brought back by hand. */
  removeSite(id: string, baseRevision: string): Promise<void>;
  /**
   * Takes a site file's text from elsewhere, under a new id if its own is taken; returns the id.
   * Rejects with `altered` if its checksum does not match; `unchecked` takes it all the same, for a
   * file that the user says was edited by hand.
   */
  importSite(text: string, unchecked?: boolean): Promise<string>;
  /** Adds the demo site that ships with the program; returns its id. */
  addDemoSite(): Promise<string>;
  listGenerations(id: string): Promise<readonly Generation[]>;
  readGeneration(id: string, generationId: string): Promise<string>;
  appendJournal(request: JournalRequest): Promise<void>;
  clearJournal(id: string): Promise<void>;
  listVisits(siteId: string): Promise<readonly KeptText[]>;
  saveVisit(request: SaveVisit): Promise<{ readonly revision: string }>;
  readFollowUp(siteId: string): Promise<KeptText | null>;
  saveFollowUp(request: SaveFollowUp): Promise<{ readonly revision: string }>;
  /** Keeps a photo beside the site; returns the name under which it is kept. */
  addPhoto(request: PhotoRequest): Promise<{ readonly file: string }>;
  /** A photo's bytes in base64. */
  readPhoto(siteId: string, file: string): Promise<string>;
  /** Every record, verified against alteration. */
  listRecords(siteId: string): Promise<RecordsOnDisk>;
  /** @param chain one of the `others`; the site's own if it is left out */
  readRecord(siteId: string, number: number, chain?: string | null): Promise<string>;
  /** Seals a record behind the last one; it can no longer be changed unnoticed. */
  appendRecord(request: AppendRecord): Promise<FrozenRecord>;
  /**
   * Puts a site and all that is kept beside it into one package, as they are on the disk. The page reads
   * it piece by piece; one package at a time is kept for a page.
   */
  makePackage(siteId: string, withPhotos: boolean): Promise<MadePackage>;
  /** The bytes from there on in base64, at most `PACKAGE_PIECE` of them. */
  readPackage(from: number): Promise<string>;
  /** The next piece of a package from elsewhere; `from` 0 begins a new one. */
  sendPackage(from: number, base64: string): Promise<void>;
  /** Reads and verifies the whole package that was sent. */
  lookAtPackage(): Promise<PackageLook>;
  /** Brings in the package that was looked at, whole or not at all. */
  takePackage(how: TakePackage): Promise<TakenPackage>;
  /** The package that was made or sent is not needed any more. */
  dropPackage(): Promise<void>;
  readPreferences(): Promise<Preferences>;
  savePreferences(change: Partial<Preferences>): Promise<Preferences>;
  /** Saves the page as PDF; null where the host has none and the page's own print is used. */
  savePdf: ((name: string) => Promise<{ readonly saved: boolean }>) | null;
  /** Lets the user choose the sites folder; null where the host has none. */
  chooseSitesFolder: (() => Promise<About>) | null;
}

export const HOST_ERROR_CODES = [
  'not-found',
  'stale',
  'unreadable',
  'altered',
  'newer-version',
  'too-large',
  'disk-full',
  'no-permission',
  'folder-gone',
  'timed-out',
  'bad-request',
  'refused',
  'failed',
] as const;
export type HostErrorCode = (typeof HOST_ERROR_CODES)[number];

/** What every rejected call gives, and what crosses the boundary when a call fails: a code and a sentence that says what, where and how to mend it. */
export interface HostFailure {
  readonly code: HostErrorCode;
  readonly message: string;
}
