/** What is chosen on the page: always something that stands in the site. */
import type { Id, Site } from '../../src-core/site/site';
import { bayPlace, levelPlace, placementPlace } from '../editing/places';

export interface Selection {
  readonly runId: Id | null;
  readonly bayId: Id | null;
  /** Null for the floor of the bay, or where nothing is chosen. */
  readonly levelId: Id | null;
  readonly placementIds: readonly Id[];
}

export const NOTHING: Selection = { runId: null, bayId: null, levelId: null, placementIds: [] };

/** The lowest level of the first bay. */
export function firstOf(site: Site): Selection {
  const run = site.runs[0];
  const bay = run?.bays[0];
  return { runId: run?.id ?? null, bayId: bay?.id ?? null, levelId: bay?.levels[0]?.id ?? null, placementIds: [] };
}

/** The selection as far as it still stands in the site; where its bay is gone, the nearest that is left. */
export function existing(site: Site, wanted: Selection): Selection {
  const run = site.runs.find((one) => one.id === wanted.runId) ?? site.runs[0];
  if (run === undefined) return NOTHING;
  const bay = run.bays.find((one) => one.id === wanted.bayId) ?? run.bays[0];
  if (bay === undefined) return { ...NOTHING, runId: run.id };
  const level = bay.levels.find((one) => one.id === wanted.levelId) ?? null;
  const standing = new Set([...bay.levels.flatMap((one) => one.placements), ...bay.onFloor].map((one) => one.id));
  const placementIds = wanted.placementIds.filter((id) => standing.has(id));
  return { runId: run.id, bayId: bay.id, levelId: level?.id ?? null, placementIds };
}

/** What is named brings its run, bay and level along; what is not named stays where it still fits. */
export function completed(site: Site, now: Selection, part: Partial<Selection>): Selection {
  const named = part.placementIds?.[0];
  const standing = named === undefined ? null : placementPlace(site, named);
  if (standing) {
    const placementIds = part.placementIds ?? [];
    return { runId: standing.run.id, bayId: standing.bay.id, levelId: standing.level?.id ?? null, placementIds };
  }
  if (part.levelId) {
    const there = levelPlace(site, part.levelId);
    if (there) return { runId: there.run.id, bayId: there.bay.id, levelId: part.levelId, placementIds: [] };
  }
  if (part.bayId && part.bayId !== now.bayId) {
    const there = bayPlace(site, part.bayId);
    const levelId = part.levelId === null ? null : sameLevel(site, now, part.bayId);
    if (there) return { runId: there.run.id, bayId: part.bayId, levelId, placementIds: [] };
  }
  if (part.runId && part.runId !== now.runId) {
    const bay = site.runs.find((run) => run.id === part.runId)?.bays[0];
    return { runId: part.runId, bayId: bay?.id ?? null, levelId: bay?.levels[0]?.id ?? null, placementIds: [] };
  }
  return { ...now, ...('levelId' in part ? { levelId: part.levelId ?? null } : {}), placementIds: part.placementIds ?? [] };
}

/** Walking from bay to bay stays on the level one was on. */
function sameLevel(site: Site, now: Selection, bayId: Id): Id | null {
  const from = levelPlace(site, now.levelId);
  const bay = bayPlace(site, bayId)?.bay;
  if (bay === undefined) return null;
  return (bay.levels[from?.levelIndex ?? 0] ?? bay.levels.at(-1))?.id ?? null;
}
