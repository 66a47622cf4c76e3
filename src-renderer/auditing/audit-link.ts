/**
 * Carries the site to the audit worker and the findings back. Where no worker can be had the same
 * work is done at once on the page's own thread.
 */
import { auditRun } from '../../src-core/audit/audit';
import type { AuditCache } from '../../src-core/audit/cache';
import type { RunAudit } from '../../src-core/audit/types';
import type { Id, Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import type { FromWorker, ToWorker } from './audit-protocol';
import { lightRun } from './light-audit';
import { applyAuditChange, changeOf, inOne, runsTouched, type AuditChange } from '../state/site-change';

/** The part of a `Worker` that is used. */
export interface WorkerLike {
  postMessage(message: ToWorker): void;
  onmessage: ((event: MessageEvent<FromWorker>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
  terminate(): void;
}

export interface AuditListener {
  /** Findings of one run of the newest site, light. */
  audited(audit: RunAudit): void;
  /** Every run of the newest site has been audited. */
  done(): void;
  /** The audit of a run itself failed: a fault of the program, told to the user, never a pass. */
  trouble(runId: Id, message: string): void;
}

interface Asked {
  readonly site: Site;
  readonly resolve: (body: string) => void;
  readonly reject: (error: unknown) => void;
}

function writeHere({ site, resolve, reject }: Asked): void {
  try {
    resolve(writeSite(site));
  } catch (error) {
    reject(error);
  }
}

export class AuditLink {
  #site: Site | null = null;
  #version = 0;
  #ask = 0;
  #waiting = new Map<number, Asked>();
  /** Version in which each run's findings last became out of date. */
  #touchedAt = new Map<Id, number>();
  /** Findings as the worker last sent them, which its next change builds on. */
  #received = new Map<Id, RunAudit>();
  /** Parts of one run's findings that have come so far; the worker sends them one after another. */
  #parts: AuditChange[] = [];
  #worker: WorkerLike | null;

  constructor(
    makeWorker: (() => WorkerLike) | null,
    private readonly today: () => string,
    private readonly listener: AuditListener,
    /** Used where the page audits for itself. */
    private readonly cache: AuditCache,
  ) {
    this.#worker = this.#start(makeWorker);
  }

  /** Makes this the site that is audited. Only what changed since the last one is sent and checked. */
  update(site: Site): void {
    const before = this.#site;
    if (site === before) return;
    this.#site = site;
    this.#version += 1;
    const change = changeOf(before, site);
    const touched = runsTouched(before, site, change);
    for (const runId of touched) this.#touchedAt.set(runId, this.#version);
    if (this.#worker === null) this.#auditHere(site, touched);
    else this.#worker.postMessage({ kind: 'change', version: this.#version, today: this.today(), change });
  }

  /** The site as text, written off the page's thread where it is the one last sent. */
  async write(site: Site): Promise<string> {
    const worker = this.#worker;
    if (worker === null || site !== this.#site) return writeSite(site);
    const ask = ++this.#ask;
    return new Promise((resolve, reject) => {
      this.#waiting.set(ask, { site, resolve, reject });
      worker.postMessage({ kind: 'write', ask });
    });
  }

  close(): void {
    this.#worker?.terminate();
    this.#worker = null;
    for (const asked of this.#waiting.values()) writeHere(asked);
    this.#waiting.clear();
  }

  #start(makeWorker: (() => WorkerLike) | null): WorkerLike | null {
    if (makeWorker === null) return null;
    try {
      const worker = makeWorker();
      worker.onmessage = (event) => this.#take(event.data);
      worker.onerror = () => this.#goOnHere();
      return worker;
    } catch {
      // A page that may not start workers checks on its own thread instead; the findings are the same.
      return null;
    }
  }

  #take(message: FromWorker): void {
    if (message.kind === 'written') {
      const asked = this.#waiting.get(message.ask);
      this.#waiting.delete(message.ask);
      if (asked === undefined) return;
      // A site that cannot be written says why here, where the save can tell it.
      if (message.body === null) writeHere(asked);
      // In a turn of its own: taking in a large site's text and sending it on are long enough apart.
      else setTimeout(asked.resolve, 0, message.body);
    } else if (message.kind === 'done') {
      if (message.version === this.#version) this.listener.done();
    } else if (message.kind === 'trouble') {
      if (this.#upToDate(message.runId, message.version)) this.listener.trouble(message.runId, message.message);
    } else {
      this.#parts.push(message.change);
      if (!message.change.more) this.#whole(message.version);
    }
  }

  /** All parts of a run's findings are here. */
  #whole(version: number): void {
    const [first, ...others] = this.#parts;
    this.#parts = [];
    if (first === undefined) return;
    const { runId } = first.run;
    const audit = applyAuditChange(this.#received.get(runId), inOne([first, ...others]));
    this.#received.set(runId, audit);
    if (this.#upToDate(runId, version)) this.listener.audited(audit);
  }

  /** Findings of a run that has been edited since are out of date; newer ones are on their way. */
  #upToDate(runId: Id, version: number): boolean {
    return version >= (this.#touchedAt.get(runId) ?? Infinity);
  }

  /** The worker could not be loaded or broke down: take its work over. */
  #goOnHere(): void {
    this.close();
    const site = this.#site;
    if (site === null) return;
    this.#auditHere(site, runsTouched(null, site));
  }

  #auditHere(site: Site, runIds: readonly Id[]): void {
    for (const runId of runIds) {
      try {
        this.listener.audited(lightRun(auditRun(site, runId, this.today(), this.cache)));
      } catch (error) {
        this.listener.trouble(runId, error instanceof Error ? error.message : String(error));
      }
    }
    this.listener.done();
  }
}
