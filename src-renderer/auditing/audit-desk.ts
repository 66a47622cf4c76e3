/**
 * The audit worker's work, wherever it is done: follows the site by its changes, checks one run after
 * another in slices of time so that a newer edit never waits long, and gives out what changed.
 */
import { auditRunInSteps } from '../../src-core/audit/audit';
import { createAuditCache } from '../../src-core/audit/cache';
import type { RunAudit } from '../../src-core/audit/types';
import type { Id, Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import type { FromWorker, ToWorker } from './audit-protocol';
import { lightBay, lightRun } from './light-audit';
import { applyChange, auditChangeOf, inParts, runsTouched } from '../state/site-change';

/** Work goes on for this long before a newer change is let in, ms. */
const SLICE = 20;
/** Bays in one message at most: taking it in is then a short task of the page. */
const BAYS_AT_ONCE = 12;

export class AuditDesk {
  #cache = createAuditCache();
  /** Findings as they were last sent. */
  #sent = new Map<Id, RunAudit>();
  #site: Site | null = null;
  #version = 0;
  #today = '';
  /** Runs still to be audited; the first is under way. */
  #due: readonly Id[] = [];
  #working = false;

  /** @param pause lets messages in that have come meanwhile */
  constructor(
    private readonly post: (message: FromWorker) => void,
    private readonly pause: () => Promise<void> = () => new Promise((resolve) => setTimeout(resolve, 0)),
  ) {}

  take(message: ToWorker): void {
    if (message.kind === 'change') this.#follow(message);
    else this.post({ kind: 'written', ask: message.ask, body: this.#written() });
  }

  #follow(message: Extract<ToWorker, { kind: 'change' }>): void {
    const next = applyChange(this.#site, message.change);
    const touched = runsTouched(this.#site, next);
    const there = new Set(next.runs.map(({ id }) => id));
    // What was just edited comes first; what was still waiting and exists stays in line.
    this.#due = [...touched, ...this.#due.filter((id) => there.has(id) && !touched.includes(id))];
    this.#site = next;
    this.#version = message.version;
    this.#today = message.today;
    for (const id of this.#sent.keys()) if (!there.has(id)) this.#sent.delete(id);
    if (!this.#working) void this.#work();
  }

  async #work(): Promise<void> {
    this.#working = true;
    for (;;) {
      const [runId] = this.#due;
      if (runId === undefined || this.#site === null) break;
      if (this.#step(this.#site, runId)) this.#due = this.#due.slice(1);
      await this.pause();
    }
    this.#working = false;
    this.post({ kind: 'done', version: this.#version });
  }

  /** @returns false where the time was up before the run was done; the caches keep how far it came */
  #step(site: Site, runId: Id): boolean {
    const until = performance.now() + SLICE;
    try {
      const steps = auditRunInSteps(site, runId, this.#today, this.#cache);
      for (;;) {
        const { done, value } = steps.next();
        if (done) {
          this.#give(lightRun(value));
          return true;
        }
        lightBay(value);
        if (performance.now() > until) return false;
      }
    } catch (error) {
      this.post({ kind: 'trouble', version: this.#version, runId, message: error instanceof Error ? error.message : String(error) });
      return true;
    }
  }

  #give(audit: RunAudit): void {
    const change = auditChangeOf(this.#sent.get(audit.runId), audit);
    for (const part of inParts(change, BAYS_AT_ONCE)) this.post({ kind: 'audit', version: this.#version, change: part });
    this.#sent.set(audit.runId, audit);
  }

  #written(): string | null {
    try {
      return this.#site === null ? null : writeSite(this.#site);
    } catch {
      return null;
    }
  }
}
