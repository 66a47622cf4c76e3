/**
 * Visits, follow-up and records of the open site: read from beside it, and every change put there at
 * once. What is shown as saved is on the disk; what could not be saved is tried again and said.
 */
import { createContext } from 'svelte';
import { SvelteMap } from 'svelte/reactivity';
import { auditBay } from '../../src-core/audit/audit';
import { createAuditCache } from '../../src-core/audit/cache';
import type { BayAudit } from '../../src-core/audit/types';
import type { Host, HostFailure, RecordsOnDisk } from '../../src-core/host';
import { RULE_SET_TITLES } from '../../src-core/checks/rule-sets';
import type { Id, Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import { actionsOf, type OpenAction } from '../../src-core/visit/actions';
import { contentsText } from '../../src-core/visit/contents';
import { newFollowUp, readFollowUp, writeFollowUp, type FollowUp } from '../../src-core/visit/follow-up';
import { readVisit, writeVisit } from '../../src-core/visit/read-visit';
import type { FrozenRecord, RecordKind } from '../../src-core/visit/records';
import { todayList, type TodayItem } from '../../src-core/visit/rounds';
import type { Visit } from '../../src-core/visit/visit';
import { base64Of } from './base64';
import { sha256Of } from './checksum';
import { failureOf } from '../host';
import type { OpenSite } from './open-site.svelte';
import { roundsAudit } from '../visit/rounds-audit';

/** Wait before what could not be saved is tried again, ms. */
const AGAIN = 5000;

export interface Freeze {
  readonly kind: RecordKind;
  readonly title: string;
  readonly person: string;
  readonly bayIds: readonly Id[];
  readonly figures: unknown;
  /** The paper that is made of it, as data. */
  readonly paper: unknown;
}

export class Rounds {
  readonly host: Host;
  readonly open: OpenSite;
  /** False until everything beside the site has been read. */
  loaded = $state(false);
  visits = $state.raw<readonly Visit[]>([]);
  followUp = $state.raw<FollowUp>() as FollowUp;
  records = $state.raw<RecordsOnDisk | null>(null);
  /** Files that cannot be read, each with what is wrong. They are left as they are. */
  unreadable = $state.raw<readonly { readonly name: string; readonly problem: string }[]>([]);
  /** The visit that is walked at the moment, and the bay of it that is looked at. */
  visitId = $state<Id | null>(null);
  bayId = $state<Id | null>(null);
  failure = $state.raw<HostFailure | null>(null);

  /** What is not on the disk yet, by the id under which it is saved. */
  #waiting = new SvelteMap<string, () => Promise<void>>();
  #cache = createAuditCache();
  #revisions: Record<string, string> = {};
  /** Changes of the follow-up that are not on the disk yet. */
  #changes: ((book: FollowUp) => FollowUp)[] = [];
  #queue: Promise<void> = Promise.resolve();
  #timer: ReturnType<typeof setTimeout> | null = null;

  visit = $derived(this.visits.find(({ id }) => id === this.visitId) ?? null);
  /** The site's findings as far as they are known now, whole for bays where a sag was read. */
  audit = $derived.by(() => roundsAudit(this.open.site, this.open.audits, this.visits, this.bayAudit));
  actions = $derived.by((): readonly OpenAction[] =>
    actionsOf({ site: this.open.site, audit: this.audit, visits: this.visits, followUp: this.followUp, today: this.open.today() }),
  );
  today = $derived.by((): readonly TodayItem[] => todayList(this.open.site, this.visits, this.followUp, this.actions, this.open.today()));

  constructor(host: Host, open: OpenSite) {
    this.host = host;
    this.open = open;
    this.followUp = newFollowUp(open.id);
  }

  /** One bay with every calculation. */
  bayAudit = (runId: Id, bayId: Id): BayAudit => auditBay(this.open.site, runId, bayId, this.open.today(), this.#cache);

  get saved(): boolean {
    return this.#waiting.size === 0;
  }

  load = async (): Promise<void> => {
    if (this.loaded) return;
    try {
      const kept = await this.host.listVisits(this.open.id);
      const unreadable: { name: string; problem: string }[] = [];
      const visits: Visit[] = [];
      for (const { id, text, revision, problem } of kept) {
        this.#revisions[id] = revision;
        const reading = problem === null ? readVisit(JSON.parse(text)) : null;
        if (reading?.ok) visits.push(reading.document);
        else unreadable.push({ name: `Visit ${id}`, problem: problem ?? '' });
      }
      const problem = await this.#takeFollowUp();
      if (problem !== null) unreadable.push({ name: 'The follow-up', problem });
      this.visits = visits;
      this.unreadable = unreadable;
      this.loaded = true;
    } catch (error) {
      this.failure = failureOf(error);
    }
  };

  // ------------------------------------------------------------ changing

  addVisit = (visit: Visit): void => {
    this.visits = [...this.visits, visit];
    this.visitId = visit.id;
    this.bayId = visit.bays[0]?.bayId ?? null;
    this.#keepVisit(visit.id);
  };

  /** The one way in which the visit that is walked changes. */
  edit = (change: (visit: Visit) => Visit): void => {
    const { visit } = this;
    if (visit === null) return;
    const after = change(visit);
    if (after === visit) return;
    this.visits = this.visits.map((one) => (one.id === visit.id ? after : one));
    this.#keepVisit(visit.id);
  };

  /** Changes made elsewhere meanwhile stay: ours are made again on what is there. */
  editFollowUp = (change: (book: FollowUp) => FollowUp): void => {
    this.followUp = change(this.followUp);
    this.#changes.push(change);
    this.#keep(FOLLOW_UP, async () => {
      try {
        await this.#saveFollowUp();
      } catch (error) {
        if (failureOf(error).code !== 'stale') throw error;
        await this.#takeFollowUp();
        for (const ours of this.#changes) this.followUp = madeAgain(this.followUp, ours);
        await this.#saveFollowUp();
      }
    });
  };

  /**
   * Where another window changed the visit that is walked: ours stays as a visit of its own, and theirs
   * is read. Nothing of either is lost.
   */
  sortOut = async (copyId: Id): Promise<void> => {
    const ours = this.visit;
    this.#waiting.clear();
    this.loaded = false;
    await this.load();
    if (ours !== null) this.addVisit({ ...ours, id: copyId, name: `${ours.name} (copy)` });
    this.failure = null;
  };

  async #saveFollowUp(): Promise<void> {
    const sent = this.#changes.length;
    const baseRevision = this.#revisions[FOLLOW_UP] ?? null;
    const body = writeFollowUp(this.followUp);
    const { revision } = await this.host.saveFollowUp({ siteId: this.open.id, body, baseRevision });
    this.#revisions[FOLLOW_UP] = revision;
    this.#changes.splice(0, sent);
  }

  /** @returns what is wrong with it; null where it could be read, or there is none */
  async #takeFollowUp(): Promise<string | null> {
    const book = await this.host.readFollowUp(this.open.id);
    if (book === null) return null;
    this.#revisions[FOLLOW_UP] = book.revision;
    const reading = book.problem === null ? readFollowUp(JSON.parse(book.text)) : null;
    if (!reading?.ok) return book.problem ?? '';
    this.followUp = reading.document;
    return null;
  }

  /** @returns the name under which the photo is kept; null where it is not, and then why is said */
  addPhoto = async (photoId: Id, file: Blob): Promise<string | null> => {
    try {
      const kept = await this.host.addPhoto({ siteId: this.open.id, photoId, base64: base64Of(new Uint8Array(await file.arrayBuffer())) });
      this.failure = null;
      return kept.file;
    } catch (error) {
      this.failure = failureOf(error);
      return null;
    }
  };

  // ------------------------------------------------------------ records

  /**
   * Seals the figures with the site as it stands and as it is on the disk.
   * @returns the record; null where it was not kept, and then why is said
   */
  freeze = async ({ kind, title, person, bayIds, figures, paper }: Freeze): Promise<FrozenRecord | null> => {
    try {
      const { site } = this.open;
      const record = await this.host.appendRecord({
        siteId: this.open.id,
        draft: {
          kind,
          title,
          person,
          siteId: site.id,
          siteName: site.name,
          siteChecksum: await checksumOf(site),
          ruleSet: RULE_SET_TITLES[site.rules.set],
          bayIds,
        },
        contents: contentsText(site, bayIds, figures, paper),
      });
      this.failure = null;
      await this.listRecords();
      return record;
    } catch (error) {
      this.failure = failureOf(error);
      return null;
    }
  };

  listRecords = async (): Promise<void> => {
    try {
      this.records = await this.host.listRecords(this.open.id);
    } catch (error) {
      this.failure = failureOf(error);
    }
  };

  // ------------------------------------------------------------ disk

  /** Resolves when everything so far is on the disk, or could not be put there. */
  settled = async (): Promise<void> => {
    await this.#queue;
  };

  saveAgain = (): void => {
    for (const [id, task] of this.#waiting) this.#send(id, task);
  };

  close(): void {
    if (this.#timer !== null) clearTimeout(this.#timer);
  }

  #keepVisit(id: Id): void {
    this.#keep(id, async () => {
      const visit = this.visits.find((one) => one.id === id);
      if (visit === undefined) return;
      const baseRevision = this.#revisions[id] ?? null;
      const { revision } = await this.host.saveVisit({ siteId: this.open.id, visitId: id, body: writeVisit(visit), baseRevision });
      this.#revisions[id] = revision;
    });
  }

  #keep(id: string, task: () => Promise<void>): void {
    this.#waiting.set(id, task);
    this.#send(id, task);
  }

  /** One after the other; of several changes that wait only the last is sent, as it is by then. */
  #send(id: string, task: () => Promise<void>): void {
    this.#queue = this.#queue.then(async () => {
      if (this.#waiting.get(id) !== task) return;
      try {
        await task();
        this.failure = null;
        if (this.#waiting.get(id) === task) this.#waiting.delete(id);
      } catch (error) {
        this.failure = failureOf(error);
        this.#timer ??= setTimeout(() => {
          this.#timer = null;
          this.saveAgain();
        }, AGAIN);
      }
    });
  }
}

const FOLLOW_UP = 'follow-up';

/** A change that was made elsewhere as well, such as the closing of the same action, is not made twice. */
function madeAgain(book: FollowUp, change: (book: FollowUp) => FollowUp): FollowUp {
  try {
    return change(book);
  } catch {
    return book;
  }
}

/** Hash of the site's canonical text, the same wherever it is made. */
export const checksumOf = async (site: Site): Promise<string> => sha256Of(writeSite(site));

export const [useRounds, setRounds] = createContext<Rounds>();
