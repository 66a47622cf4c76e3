/**
 * A bay before and after a change, figure by figure: its elevation, its levels, itself and its two frames.
 * What a planner shows the maker before a beam is moved.
 *
 * Source: facts M-14 and section 1.4: any change of a bay alters what it and its neighbours may carry; the
 * maker confirms it in writing, the levels above are emptied first, and a new notice follows.
 */
import { compareVerdicts, say, type CheckName, type Finding, type Place, type Text, type Verdict } from '../checks/finding';
import { findRun } from '../site/lookup';
import type { Bay, Id, Level, Site } from '../site/site';
import { countOf, lengthOf, massOf, type Quantity } from '../units/quantity';
import { auditRun } from './audit';
import type { AuditCache } from './cache';
import type { BayAudit, FrameAudit } from './types';
import { governingOf } from './verdict';

/** A bay with its audit and those of its two frames. */
export interface BayState {
  readonly place: Place;
  readonly bay: Bay;
  readonly audit: BayAudit;
  readonly frames: readonly FrameAudit[];
}

/** One figure or verdict that differs; null = not there, or not known. */
export interface FigureChange {
  readonly place: Place;
  /** Check whose figure it is; null for a measure of the bay itself. */
  readonly check: CheckName | null;
  /** "height of level 2", "demand", "allowed", "utilisation". */
  readonly what: string;
  readonly before: Quantity | null;
  readonly after: Quantity | null;
}

export interface VerdictChange {
  readonly place: Place;
  readonly check: CheckName;
  /** Null where the check was not made. */
  readonly before: Verdict | null;
  readonly after: Verdict | null;
  readonly worse: boolean;
}

export interface BayComparison {
  readonly figures: readonly FigureChange[];
  readonly verdicts: readonly VerdictChange[];
  /** What has to be done before and after the change, in order; empty where the rack itself is not changed. */
  readonly steps: readonly Text[];
}

/**
 * @throws RangeError if the site has no such run or bay
 */
export function bayState(site: Site, runId: Id, bayId: Id, today: string, cache?: AuditCache): BayState {
  const run = findRun(site, runId);
  const index = run.bays.findIndex(({ id }) => id === bayId);
  const bay = run.bays[index];
  const audited = auditRun(site, runId, today, cache);
  const audit = audited.bays[index];
  if (bay === undefined || audit === undefined) throw new RangeError(`no bay "${bayId}" in run "${runId}"`);
  return { place: { runId, bayId }, bay, audit, frames: audited.frames.slice(index, index + 2) };
}

/** Every figure that changed, from the elevation down to the frames; levels and frames are paired by their ids. */
export function compareBays(before: BayState, after: BayState): BayComparison {
  const groups = (state: BayState): ReadonlyMap<string, Group> => groupsOf(state);
  const [was, is] = [groups(before), groups(after)];
  const figures: FigureChange[] = [...elevationChanges(before, after)];
  const verdicts: VerdictChange[] = [];
  for (const key of new Set([...was.keys(), ...is.keys()])) {
    const [old, now] = [was.get(key), is.get(key)];
    const place = (now ?? old)?.place ?? after.place;
    figures.push(...measureChanges(place, old?.measures ?? [], now?.measures ?? []));
    for (const check of new Set([...(old?.checks.keys() ?? []), ...(now?.checks.keys() ?? [])])) {
      const [one, other] = [old?.checks.get(check) ?? null, now?.checks.get(check) ?? null];
      figures.push(...findingChanges(place, check, one, other));
      if (one?.verdict !== other?.verdict)
        verdicts.push({
          place,
          check,
          before: one?.verdict ?? null,
          after: other?.verdict ?? null,
          worse: other !== null && (one === null ? other.verdict !== 'within' : compareVerdicts(other.verdict, one.verdict) > 0),
        });
    }
  }
  return { figures, verdicts, steps: stepsFor(before.bay, after.bay) };
}

type Measure = readonly [what: string, value: Quantity | null];

interface Group {
  readonly place: Place;
  readonly measures: readonly Measure[];
  readonly checks: ReadonlyMap<CheckName, Finding>;
}

const mass = (kg: number | null): Quantity | null => (kg === null ? null : massOf(kg));
const force = (newtons: number | null): Quantity | null => (newtons === null ? null : { value: newtons, kind: 'force' });

function groupsOf({ place, audit, frames }: BayState): ReadonlyMap<string, Group> {
  const groups = new Map<string, Group>();
  for (const level of audit.levels)
    groups.set(`level ${level.levelId}`, {
      place: { ...place, levelId: level.levelId },
      measures: [
        ['mass on the level', mass(level.totalKg)],
        ['rating of the pair of beams', mass(level.ratedKg)],
      ],
      checks: worstByCheck(level.findings),
    });
  groups.set('bay', { place, measures: [['mass on the bay’s levels', mass(audit.totalKg)]], checks: worstByCheck(audit.findings) });
  for (const frame of frames)
    groups.set(`frame ${frame.frameId}`, {
      place: { runId: place.runId, frameId: frame.frameId },
      measures: [
        ...frame.storeys.flatMap(({ fromMm, toMm, totalKg, ratedKg }, i): readonly Measure[] => [
          [`unsupported height of storey ${i + 1}`, lengthOf(toMm - fromMm)],
          [`mass carried in storey ${i + 1}`, mass(totalKg)],
          [`rating of storey ${i + 1}`, mass(ratedKg)],
        ]),
        ['force of the front leg', force(frame.legFrontN)],
        ['force of the rear leg', force(frame.legRearN)],
      ],
      checks: worstByCheck(frame.findings),
    });
  return groups;
}

/** Of several findings of one check the one that weighs most; information where none counts. */
function worstByCheck(findings: readonly Finding[]): ReadonlyMap<CheckName, Finding> {
  const byCheck = new Map<CheckName, Finding[]>();
  for (const one of findings) byCheck.set(one.check, [...(byCheck.get(one.check) ?? []), one]);
  return new Map([...byCheck].map(([check, all]) => [check, governingOf(all) ?? (all[0] as Finding)]));
}

/** Rounding of the computation is no change. */
const same = (a: Quantity | null, b: Quantity | null): boolean =>
  a === null || b === null
    ? a === b
    : a.kind === b.kind && Math.abs(a.value - b.value) <= 1e-12 * Math.max(Math.abs(a.value), Math.abs(b.value));

function measureChanges(place: Place, was: readonly Measure[], is: readonly Measure[]): readonly FigureChange[] {
  const [old, now] = [new Map(was), new Map(is)];
  return [...new Set([...old.keys(), ...now.keys()])].flatMap((what) =>
    change(place, null, what, old.get(what) ?? null, now.get(what) ?? null),
  );
}

function findingChanges(place: Place, check: CheckName, was: Finding | null, is: Finding | null): readonly FigureChange[] {
  const ratio = (finding: Finding | null): Quantity | null =>
    finding === null || finding.utilisation === null ? null : { value: finding.utilisation, kind: 'ratio' };
  return [
    ...change(place, check, 'demand', was?.demand ?? null, is?.demand ?? null),
    ...change(place, check, 'allowed', was?.allowed ?? null, is?.allowed ?? null),
    ...change(place, check, 'utilisation', ratio(was), ratio(is)),
  ];
}

const change = (
  place: Place,
  check: CheckName | null,
  what: string,
  before: Quantity | null,
  after: Quantity | null,
): readonly FigureChange[] => (same(before, after) ? [] : [{ place, check, what, before, after }]);

function elevationChanges(before: BayState, after: BayState): readonly FigureChange[] {
  const { place } = after;
  const heights = ({ levels }: Bay) => new Map(levels.map(({ id, heightMm }) => [id, heightMm]));
  const [was, is] = [heights(before.bay), heights(after.bay)];
  const named = new Map(
    [...before.bay.levels, ...after.bay.levels].map(({ id }) => [id, numberOf(after.bay, id) ?? numberOf(before.bay, id)]),
  );
  const length = (mm: number | undefined | null): Quantity | null => (mm === undefined || mm === null ? null : lengthOf(mm));
  return [
    ...change(place, null, 'clear entry', length(before.bay.clearEntryMm), length(after.bay.clearEntryMm)),
    ...change(place, null, 'number of beam levels', countOf(before.bay.levels.length), countOf(after.bay.levels.length)),
    ...change(place, null, 'first beam height', length(before.bay.levels[0]?.heightMm), length(after.bay.levels[0]?.heightMm)),
    ...change(place, null, 'greatest gap between beams', length(greatestGap(before.bay)), length(greatestGap(after.bay))),
    ...[...named].flatMap(([id, number]) =>
      change({ ...place, levelId: id }, null, `height of level ${number ?? ''}`.trim(), length(was.get(id)), length(is.get(id))),
    ),
  ];
}

const numberOf = ({ levels }: Bay, id: Id): number | null => {
  const index = levels.findIndex((level) => level.id === id);
  return index < 0 ? null : index + 1;
};

function greatestGap({ levels }: Bay): number | null {
  const gaps = levels.slice(1).map(({ heightMm }, i) => heightMm - (levels[i] as Level).heightMm);
  return gaps.length === 0 ? null : Math.max(...gaps);
}

function stepsFor(before: Bay, after: Bay): readonly Text[] {
  const kept = new Map(after.levels.map((level) => [level.id, level]));
  const known = new Set(before.levels.map(({ id }) => id));
  const moved = before.levels.filter(({ id, heightMm, beamTypeId }) => {
    const now = kept.get(id);
    return now === undefined || now.heightMm !== heightMm || now.beamTypeId !== beamTypeId;
  });
  const added = after.levels.filter(({ id }) => !known.has(id));
  const widened = before.clearEntryMm !== after.clearEntryMm;
  if (moved.length === 0 && added.length === 0 && !widened) return [];
  const lowest = Math.min(...moved.map(({ heightMm }) => heightMm), ...added.map(({ heightMm }) => heightMm));
  const from = before.levels.findIndex(({ heightMm }) => heightMm >= lowest);
  return [
    say`Have the maker or supplier confirm the change in writing: it alters what bay ${before.name} and its neighbours may carry. Until then the changed bay is not assessable beyond its notice.`,
    widened || from <= 0
      ? say`Empty every level of bay ${before.name} before any part is moved, and leave its neighbours as they are.`
      : say`Empty level ${from + 1} of bay ${before.name} and every level above it before any beam is moved.`,
    say`Fit every lock, look at both frames for damage, and renew the load notice before the bay is loaded again.`,
  ];
}
