/**
 * What differs between two states of a site or of its findings, by identity, so that only that much
 * crosses to the audit worker and back. What did not change keeps its identity on the other side,
 * which is what the audit's memory goes by.
 */
import type { BayAudit, FrameAudit, RunAudit } from '../../src-core/audit/types';
import type { Bay, Frame, Id, Run, Site } from '../../src-core/site/site';

/** A list by id: its order, null where that stayed, and the entries that are new or changed. */
interface ListChange<T> {
  readonly order: readonly Id[] | null;
  readonly changed: readonly T[];
}

interface RunChange {
  /** The run without its bays and frames. */
  readonly run: Run;
  readonly bays: ListChange<Bay>;
  readonly frames: ListChange<Frame>;
}

export interface SiteChange {
  /** Every part of the site but its runs that is new or changed. */
  readonly rest: Partial<Site>;
  readonly order: readonly Id[];
  readonly runs: readonly RunChange[];
}

function listChange<T>(before: readonly T[], after: readonly T[], idOf: (one: T) => Id): ListChange<T> {
  // An empty list is always told whole: the other side may still hold one that was taken out before.
  const inOrder =
    before.length > 0 && before.length === after.length && before.every((one, i) => one === after[i] || idOf(one) === idOf(after[i] as T));
  // One edit changes a few of a thousand, and then their ids need not be written out and read again.
  if (inOrder) return { order: null, changed: after.filter((one, i) => one !== before[i]) };
  const known = new Set<T>(before);
  return { order: after.map(idOf), changed: after.filter((one) => !known.has(one)) };
}

function applyList<T>(before: readonly T[], { order, changed }: ListChange<T>, idOf: (one: T) => Id): readonly T[] {
  if (changed.length === 0 && order === null) return before;
  if (order === null) {
    const instead = new Map(changed.map((one) => [idOf(one), one]));
    return before.map((one) => instead.get(idOf(one)) ?? one);
  }
  const byId = new Map([...before, ...changed].map((one) => [idOf(one), one]));
  return order.flatMap((id) => byId.get(id) ?? []);
}

const idOf = (one: { readonly id: Id }): Id => one.id;

export function changeOf(before: Site | null, after: Site): SiteChange {
  const rest: Record<string, unknown> = {};
  for (const key of Object.keys(after) as (keyof Site)[]) if (key !== 'runs' && after[key] !== before?.[key]) rest[key] = after[key];
  const old = new Map(before?.runs.map((run) => [run.id, run]));
  const changed = after.runs.filter((run) => old.get(run.id) !== run);
  return {
    rest,
    order: after.runs.map(idOf),
    runs: changed.map((run) => {
      const was = old.get(run.id);
      return {
        run: { ...run, bays: [], frames: [] },
        bays: listChange(was?.bays ?? [], run.bays, idOf),
        frames: listChange(was?.frames ?? [], run.frames, idOf),
      };
    }),
  };
}

/** @param before the state that the change was made from; null for the first */
export function applyChange(before: Site | null, { rest, order, runs }: SiteChange): Site {
  const byId = new Map(before?.runs.map((run) => [run.id, run]));
  for (const { run, bays, frames } of runs) {
    const was = byId.get(run.id);
    byId.set(run.id, { ...run, bays: applyList(was?.bays ?? [], bays, idOf), frames: applyList(was?.frames ?? [], frames, idOf) });
  }
  return { ...before, ...rest, runs: order.flatMap((id) => byId.get(id) ?? []) } as Site;
}

export interface AuditChange {
  /** The run's audit without its bays and frames. */
  readonly run: RunAudit;
  readonly bays: ListChange<BayAudit>;
  readonly frames: ListChange<FrameAudit>;
  /** More of the same audit follows: until then the run is not whole. */
  readonly more: boolean;
}

const bayIdOf = (bay: BayAudit): Id => bay.bayId;
const frameIdOf = (frame: FrameAudit): Id => frame.frameId;

export const auditChangeOf = (before: RunAudit | undefined, after: RunAudit): AuditChange => ({
  run: { ...after, bays: [], frames: [] },
  bays: listChange(before?.bays ?? [], after.bays, bayIdOf),
  frames: listChange(before?.frames ?? [], after.frames, frameIdOf),
  more: false,
});

/** The same change in parts of so many bays and frames at most, so that no part is long to take in. */
export function inParts(change: AuditChange, most: number): readonly AuditChange[] {
  const { bays, frames } = change;
  const count = Math.max(1, Math.ceil(Math.max(bays.changed.length, frames.changed.length) / most));
  const part = <T>({ order, changed }: ListChange<T>, i: number): ListChange<T> => ({
    order,
    changed: changed.slice(i * most, (i + 1) * most),
  });
  return Array.from({ length: count }, (_, i) => ({ ...change, bays: part(bays, i), frames: part(frames, i), more: i < count - 1 }));
}

/** Parts of one change, as `inParts` made them, as one again. */
export const inOne = (parts: readonly [AuditChange, ...AuditChange[]]): AuditChange => ({
  ...parts[0],
  bays: { ...parts[0].bays, changed: parts.flatMap(({ bays }) => bays.changed) },
  frames: { ...parts[0].frames, changed: parts.flatMap(({ frames }) => frames.changed) },
  more: false,
});

export const applyAuditChange = (before: RunAudit | undefined, { run, bays, frames }: AuditChange): RunAudit => ({
  ...run,
  bays: applyList(before?.bays ?? [], bays, bayIdOf),
  frames: applyList(before?.frames ?? [], frames, frameIdOf),
});

/**
 * Ids of the runs whose findings an edit may change: themselves and whoever stands back to back with them.
 * @param change what `changeOf` gives for the two
 */
export function runsTouched(before: Site | null, after: Site, { rest, runs } = changeOf(before, after)): readonly Id[] {
  const all = after.runs.map(idOf);
  if (before === null || Object.keys(rest).length > 0) return all;
  const changed = new Set(runs.map(({ run }) => run.id));
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
