/** What the page and its audit worker say to each other. The site crosses in the parts that changed. */
import type { RunAudit } from '../src-core/audit/types';
import type { Id, Run, Site } from '../src-core/site/site';

export type ToWorker =
  | {
      readonly kind: 'change';
      readonly version: number;
      readonly today: string;
      /** Everything of the site but its runs; null where only runs changed. */
      readonly rest: Site | null;
      readonly order: readonly Id[];
      readonly runs: readonly Run[];
    }
  | { readonly kind: 'write'; readonly ask: number };

export type FromWorker =
  | { readonly kind: 'audit'; readonly version: number; readonly audit: RunAudit }
  | { readonly kind: 'done'; readonly version: number }
  | { readonly kind: 'written'; readonly ask: number; readonly body: string }
  | { readonly kind: 'trouble'; readonly version: number; readonly runId: Id; readonly message: string };

/** Ids of the runs whose findings an edit may change: itself and whoever stands back to back with it. */
export function runsTouched(before: Site | null, after: Site): readonly Id[] {
  const all = after.runs.map((run) => run.id);
  if (before === null || !sameButRuns(before, after)) return all;
  const old = new Map(before.runs.map((run) => [run.id, run]));
  const changed = new Set(after.runs.filter((run) => old.get(run.id) !== run).map((run) => run.id));
  for (const run of before.runs) if (!all.includes(run.id)) changed.add(run.id);
  const touched = new Set(changed);
  for (const run of after.runs) {
    const other = run.backToBack?.runId;
    if (other === undefined) continue;
    if (changed.has(other)) touched.add(run.id);
    if (changed.has(run.id)) touched.add(other);
  }
  return all.filter((id) => touched.has(id));
}

/** Whether two sites share every part but their runs, by identity. */
export function sameButRuns(a: Site, b: Site): boolean {
  return (Object.keys(b) as (keyof Site)[]).every((key) => key === 'runs' || a[key] === b[key]);
}
