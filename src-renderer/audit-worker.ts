/** Runs the audit off the page's thread, one run at a time so that a newer edit never waits long. */
import { auditRun } from '../src-core/audit/audit';
import { createAuditCache } from '../src-core/audit/cache';
import type { RunAudit } from '../src-core/audit/types';
import type { Id, Site } from '../src-core/site/site';
import { writeSite } from '../src-core/site/write';
import type { FromWorker, ToWorker } from './audit-protocol';
import { lightRun } from './light-audit';
import { applyChange, auditChangeOf, runsTouched } from './site-change';

const cache = createAuditCache();
/** Findings as they were last sent. */
const sent = new Map<Id, RunAudit>();
let site: Site | null = null;
let version = 0;
let today = '';
let due: Id[] = [];
let working = false;

const post = (message: FromWorker) => self.postMessage(message);

function take(message: Extract<ToWorker, { kind: 'change' }>): void {
  const next = applyChange(site, message.change);
  const touched = runsTouched(site, next);
  // What was just edited comes first; what was still waiting and exists stays in line.
  due = [...touched, ...due.filter((id) => !touched.includes(id) && next.runs.some((run) => run.id === id))];
  site = next;
  version = message.version;
  today = message.today;
  for (const id of sent.keys()) if (!next.runs.some((run) => run.id === id)) sent.delete(id);
  if (!working) void work();
}

async function work(): Promise<void> {
  working = true;
  for (;;) {
    const runId = due.shift();
    if (runId === undefined || site === null) break;
    try {
      const audit = lightRun(auditRun(site, runId, today, cache));
      post({ kind: 'audit', version, change: auditChangeOf(sent.get(runId), audit) });
      sent.set(runId, audit);
    } catch (error) {
      post({ kind: 'trouble', version, runId, message: error instanceof Error ? error.message : String(error) });
    }
    // Lets a newer change in before the next run is taken up.
    await new Promise((resolve) => setTimeout(resolve, 0));
  }
  working = false;
  post({ kind: 'done', version });
}

self.onmessage = (event: MessageEvent<ToWorker>) => {
  const message = event.data;
  if (message.kind === 'change') take(message);
  else post({ kind: 'written', ask: message.ask, body: written() });
};

function written(): string | null {
  try {
    return site === null ? null : writeSite(site);
  } catch {
    return null;
  }
}
