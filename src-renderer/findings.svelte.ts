/** The findings of the open site, fed by the audit, and whether they are of the site as it stands. */
import { SvelteMap } from 'svelte/reactivity';
import type { FrameAudit, RunAudit } from '../src-core/audit/types';
import type { Id, Site } from '../src-core/site/site';
import { AuditLink, type WorkerLike } from './audit-link';

export class Findings {
  /** By run id. A run that has just been made has none until the audit has seen it. */
  readonly audits = new SvelteMap<Id, RunAudit>();
  /** Runs whose audit broke down, with what it said. They have no findings and pass nothing. */
  readonly troubles = new SvelteMap<Id, string>();
  /** True while findings of some run are older than the site. */
  auditing = $state(false);
  #link: AuditLink;

  constructor(makeWorker: (() => WorkerLike) | null, today: () => string, onaudit: (audit: RunAudit) => void) {
    this.#link = new AuditLink(makeWorker, today, {
      audited: (audit) => {
        this.troubles.delete(audit.runId);
        this.audits.set(audit.runId, audit);
        onaudit(audit);
      },
      trouble: (runId, message) => {
        this.audits.delete(runId);
        this.troubles.set(runId, message);
      },
      done: () => {
        this.auditing = false;
      },
    });
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
