/**
 * The findings of the open site. Every run's come from the audit worker, light: verdicts and
 * sentences without their calculations. What is looked at is audited here, whole and at once, which
 * takes a few milliseconds because only what an edit touched is done again.
 */
import { SvelteMap } from 'svelte/reactivity';
import { auditBay, auditFrame } from '../../src-core/audit/audit';
import { createAuditCache } from '../../src-core/audit/cache';
import type { BayAudit, FrameAudit, RunAudit } from '../../src-core/audit/types';
import { worstVerdict } from '../../src-core/checks/finding';
import type { Bay, Id, Run, Site } from '../../src-core/site/site';
import { AuditLink, type WorkerLike } from './audit-link';

/** A bay and the two frames at its sides, with every calculation; or why the audit of them broke down. */
export interface Near {
  readonly bay: BayAudit | null;
  readonly frames: readonly FrameAudit[];
  readonly trouble: string | null;
}

const NOTHING: Near = { bay: null, frames: [], trouble: null };

export class Findings {
  /** By run id. A run that has just been made has none until the audit has seen it. */
  readonly audits = new SvelteMap<Id, RunAudit>();
  /** Runs whose audit broke down, with what it said. They have no findings and pass nothing. */
  readonly troubles = new SvelteMap<Id, string>();
  /** True while findings of some run are older than the site. */
  auditing = $state(false);
  #link: AuditLink;
  #cache = createAuditCache();

  constructor(
    makeWorker: (() => WorkerLike) | null,
    private readonly today: () => string,
  ) {
    const listener = {
      audited: (audit: RunAudit) => {
        this.troubles.delete(audit.runId);
        this.audits.set(audit.runId, audit);
      },
      trouble: (runId: Id, message: string) => {
        this.audits.delete(runId);
        this.troubles.set(runId, message);
      },
      done: () => {
        this.auditing = false;
      },
    };
    this.#link = new AuditLink(makeWorker, today, listener, this.#cache);
  }

  /** Checks this site from now on. */
  follow(site: Site): void {
    this.auditing = true;
    for (const runId of [...this.audits.keys(), ...this.troubles.keys()]) {
      if (site.runs.some((run) => run.id === runId)) continue;
      this.audits.delete(runId);
      this.troubles.delete(runId);
    }
    this.#link.update(site);
  }

  near(site: Site, run: Run | null, bay: Bay | null): Near {
    if (run === null || bay === null) return NOTHING;
    const index = run.bays.indexOf(bay);
    const sides = run.frames.slice(index, index + 2);
    try {
      return {
        bay: auditBay(site, run.id, bay.id, this.today(), this.#cache),
        frames: sides.map((frame) => auditFrame(site, run.id, frame.id, this.today(), this.#cache)),
        trouble: null,
      };
    } catch (error) {
      return { ...NOTHING, trouble: messageOf(error) };
    }
  }

  /** The run as last audited by the worker, with what is near in its place; null until the worker has seen the run. */
  run(runId: Id | null, near: Near): RunAudit | null {
    const light = this.audits.get(runId ?? '');
    if (light === undefined) return null;
    const bays = [...light.bays];
    const at = bays.findIndex(({ bayId }) => bayId === near.bay?.bayId);
    if (at >= 0 && near.bay !== null) bays[at] = near.bay;
    const frames = [...light.frames];
    for (const frame of near.frames) {
      const i = frames.findIndex(({ frameId }) => frameId === frame.frameId);
      if (i >= 0) frames[i] = frame;
    }
    const verdict = worstVerdict([...bays, ...light.findings.filter(({ counts }) => counts)].map((one) => one.verdict));
    return { ...light, verdict, bays, frames };
  }

  /** Runs whose audit broke down, the run that is looked at among them. */
  troublesWith(run: Run | null, { trouble }: Near): ReadonlyMap<Id, string> {
    return trouble === null || run === null ? this.troubles : new SvelteMap([...this.troubles, [run.id, trouble]]);
  }

  /** A bay of the run with every calculation; null where its audit breaks down. */
  wholeBay(site: Site, runId: Id, bayId: Id): BayAudit | null {
    return orNull(() => auditBay(site, runId, bayId, this.today(), this.#cache));
  }

  /** A frame of the run with every calculation; null where its audit breaks down. */
  wholeFrame(site: Site, runId: Id, frameId: Id): FrameAudit | null {
    return orNull(() => auditFrame(site, runId, frameId, this.today(), this.#cache));
  }

  /** A frame anywhere in the site, light. */
  frame(frameId: Id): FrameAudit | null {
    for (const run of this.audits.values()) {
      const found = run.frames.find((frame) => frame.frameId === frameId);
      if (found) return found;
    }
    return null;
  }

  /** The site as text, written off the page's thread where that can be. */
  write(site: Site): Promise<string> {
    return this.#link.write(site);
  }

  close(): void {
    this.#link.close();
  }
}

/** The worker meets the same trouble and tells it. */
function orNull<T>(audit: () => T): T | null {
  try {
    return audit();
  } catch {
    return null;
  }
}

const messageOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));
