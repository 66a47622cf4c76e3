/** Runs the audit off the page's thread, one run at a time so that a newer edit never waits long. */
import { auditRun } from '../src-core/audit/audit';
import type { Id, Run, Site } from '../src-core/site/site';
import { writeSite } from '../src-core/site/write';
import { runsTouched, type FromWorker, type ToWorker } from './audit-protocol';

let site: Site | null = null;
let version = 0;
let today = '';
let due: Id[] = [];
let working = false;

const post = (message: FromWorker) => self.postMessage(message);

function take(message: Extract<ToWorker, { kind: 'change' }>): void {
  const rest = message.rest ?? site;
  if (rest === null) return;
  const known = new Map<Id, Run>((site?.runs ?? []).map((run) => [run.id, run]));
  for (const run of message.runs) known.set(run.id, run);
  const next: Site = { ...rest, runs: message.order.flatMap((id) => known.get(id) ?? []) };
  const touched = runsTouched(message.rest === null ? site : null, next);
  // What was just edited comes first; what was still waiting and exists stays in line.
  due = [...touched, ...due.filter((id) => !touched.includes(id) && message.order.includes(id))];
  site = next;
  version = message.version;
  today = message.today;
  if (!working) void work();
}

async function work(): Promise<void> {
  working = true;
  for (;;) {
    const runId = due.shift();
    if (runId === undefined || site === null) break;
    try {
      post({ kind: 'audit', version, audit: auditRun(site, runId, today) });
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
  else if (site !== null) post({ kind: 'written', ask: message.ask, body: writeSite(site) });
};
