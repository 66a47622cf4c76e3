/**
 * A unit load on trial: the checks of its level, its bay and both frames with any mass put in place of
 * its own, and with nothing in its place.
 */
import type { Finding, Missing } from '../checks/finding';
import { fullComplementRange } from '../checks/full-complement';
import { TOUCH } from '../checks/placement';
import { findEntry, findPlacement, type PlacementPlace } from '../site/lookup';
import type { Bay, Id, Placement, Run, Site, UnitLoad } from '../site/site';
import { auditBay, auditFrame } from './audit';
import { createAuditCache } from './cache';
import { asked, contextOf } from './context';
import { goodsWork } from './goods';
import type { Trial } from './greatest-mass';
import type { LevelAudit } from './types';

export interface SiteTrial extends Trial {
  readonly findings: readonly Finding[];
}

export interface Trials {
  /** Mass of the pallet that the goods stand on, kg; 0 without one and where it is not known. */
  readonly palletKg: number;
  /** A mass that is worth trying first, kg, above that of the pallet. */
  readonly guessKg: number;
  /** The findings with nothing in its place. */
  readonly without: readonly Finding[];
  /** At a gross mass, by the equivalent even loads alone. */
  readonly evenly: (grossKg: number) => SiteTrial;
  /** At a gross mass as the site judges, its designed full complements by their own rule. */
  readonly asJudged: (grossKg: number) => SiteTrial;
  /** Gross masses with which the level may be a designed full complement; null where it cannot be one. */
  readonly complementRange: { readonly fromKg: number; readonly toKg: number } | null;
  /** A missing input named for whoever has to find it. */
  readonly named: (one: Missing) => Missing;
}

/** No id of a site looks like this one. */
const TRIAL = ' trial';

/** @throws RangeError if the site has no such placement */
export function trialsOf(site: Site, placementId: Id, today: string): Trials {
  const place = findPlacement(site, placementId);
  const unitLoad = findEntry(site, 'unitLoads', place.placement.unitLoadId);
  const pallet = unitLoad.palletId === null ? null : findEntry(site, 'pallets', unitLoad.palletId);
  const palletKg = pallet?.massKg ?? 0;
  const around = onlyAround(site, place.run);
  const standing = withPlacements(around, place, (all) =>
    all.map((one) => (one === place.placement ? { ...one, unitLoadId: TRIAL } : one)),
  );
  const emptied = withPlacements(around, place, (all) => all.filter((one) => one !== place.placement));
  const rules = { ...site.rules, fullComplement: false };
  const attempt = (judged: Site) => (grossKg: number) => {
    const trial: UnitLoad = { ...unitLoad, id: TRIAL, goodsKg: Math.max(0, grossKg - palletKg) };
    return trialOf(grossKg, findingsAt({ ...judged, unitLoads: [...judged.unitLoads, trial] }, place, today).findings);
  };
  const without = findingsAt(emptied, place, today);
  return {
    palletKg,
    guessKg: guess(without.level),
    without: without.findings,
    evenly: attempt({ ...standing, rules }),
    asJudged: attempt(standing),
    complementRange: complementRange(emptied, place, today, without.level?.ratedKg ?? null),
    named: renamed(unitLoad.id),
  };
}

/**
 * Whether everything about a unit load is met as it stands, with the mass it has.
 * @throws RangeError if the site has no such placement
 */
export const isMet = (site: Site, placementId: Id, today: string): boolean =>
  failing(findingsAt(site, findPlacement(site, placementId), today).findings).length === 0;

/** A trial's own unit load is named by fields as the one whose shape it has. */
const renamed =
  (unitLoadId: Id) =>
  (one: Missing): Missing => ({ ...one, field: one.field.replace(`unitLoad:${TRIAL}:`, `unitLoad:${unitLoadId}:`) });

/** The run and the one behind it: all that its checks look at. */
function onlyAround(site: Site, run: Run): Site {
  const runs = site.runs.filter((one) => one === run || one.id === run.backToBack?.runId);
  const used = new Set(runs.flatMap(({ bays }) => bays.flatMap(everyPlacement)).map(({ unitLoadId }) => unitLoadId));
  return { ...site, runs, unitLoads: site.unitLoads.filter(({ id }) => used.has(id)) };
}

const everyPlacement = ({ levels, onFloor }: Bay): readonly Placement[] => [...levels.flatMap(({ placements }) => placements), ...onFloor];

function withPlacements(site: Site, place: PlacementPlace, change: (all: readonly Placement[]) => readonly Placement[]): Site {
  const { run, bay, level } = place;
  const changed: Bay =
    level === null
      ? { ...bay, onFloor: change(bay.onFloor) }
      : { ...bay, levels: bay.levels.map((one) => (one === level ? { ...one, placements: change(one.placements) } : one)) };
  const bays = run.bays.map((one) => (one === bay ? changed : one));
  return { ...site, runs: site.runs.map((one) => (one === run ? { ...one, bays } : one)) };
}

interface Around {
  readonly findings: readonly Finding[];
  readonly level: LevelAudit | null;
}

/**
 * Of the level, the bay and both frames. Of the level below only the room under these beams, which sag
 * with what stands on them; what else is found on other levels no goods here can change.
 */
function findingsAt(site: Site, { run, bay, level, index }: PlacementPlace, today: string): Around {
  const cache = createAuditCache();
  const audit = auditBay(site, run.id, bay.id, today, cache);
  const at = level === null ? -1 : bay.levels.indexOf(level);
  const own = audit.levels[at] ?? null;
  const below = audit.levels[at - 1]?.findings.filter(({ check }) => check === 'clearance-above') ?? [];
  const frames = run.frames.slice(index, index + 2).flatMap(({ id }) => auditFrame(site, run.id, id, today, cache).findings);
  return { findings: [...(own?.findings ?? []), ...below, ...audit.findings, ...frames], level: own };
}

export const isOver = ({ verdict }: Finding): boolean => verdict === 'over' || verdict === 'not-possible';

/** What is not met, of what counts. */
export const failing = (findings: readonly Finding[]): readonly Finding[] =>
  findings.filter((one) => one.counts && (isOver(one) || one.verdict === 'not-assessable'));

function trialOf(kg: number, findings: readonly Finding[]): SiteTrial {
  const beyond = new Map<string, number>();
  for (const one of findings) {
    const by = one.counts ? beyondOf(one) : null;
    if (by === null) continue;
    const check = `${one.check} ${one.place.levelId ?? ''} ${one.place.frameId ?? ''}`;
    beyond.set(check, Math.max(by, beyond.get(check) ?? -Infinity));
  }
  return { kg, met: failing(findings).length === 0, beyond, findings };
}

/** How far beyond its limit; of a clearance what is short of it, since that is straight in the sag and its ratio is not. */
function beyondOf({ check, utilisation, demand, allowed }: Finding): number | null {
  if (check === 'clearance-above' && demand !== null && allowed !== null)
    return (demand.value - allowed.value - TOUCH) / Math.max(demand.value, 1);
  return utilisation === null || !Number.isFinite(utilisation) ? null : utilisation - 1;
}

/** What the rating leaves, by mass alone. */
function guess(level: LevelAudit | null): number {
  const left = (level?.ratedKg ?? 0) - (level?.totalKg ?? 0);
  return left > 0 ? left : 1000;
}

/** @param without the site with nothing in the place of the trial */
function complementRange(without: Site, place: PlacementPlace, today: string, ratedKg: number | null): Trials['complementRange'] {
  const { bay, level } = place;
  const context = contextOf(without, today);
  const made = bay.noticeId === null ? null : (context.notices.get(bay.noticeId)?.unitLoadsPerLevel ?? null);
  if (!without.rules.fullComplement || !asked(context, 'full-complement') || level === null || ratedKg === null) return null;
  const others = level.placements.filter((one) => one !== place.placement);
  if (made !== others.length + 1) return null;
  const masses = others.map(({ unitLoadId }) => goodsWork(context, unitLoadId).grossKg).filter((kg) => kg !== null);
  return masses.length < others.length ? null : fullComplementRange(masses, ratedKg, context.rules.value.fullComplementMass);
}
