/** What to go on with when something is taken out: the nearest that is left. */
import type { Id, Level, Site } from '../../src-core/site/site';
import { bayPlace, levelPlace, placementPlace } from './places';
import type { Selection } from '../state/selection';

/** What is chosen next, and what of it gets the focus. */
export interface Neighbour {
  readonly select: Partial<Selection>;
  readonly focus: { readonly on: 'placement' | 'level' | 'bay' | 'run' | 'nothing'; readonly id: Id };
}

const NOTHING_LEFT: Neighbour['focus'] = { on: 'nothing', id: '' };

/** The one that takes its place, else the one before it; undefined where it was the only one. */
const nextTo = <T>(all: readonly T[], gone: number): T | undefined => all[gone + 1] ?? all[gone - 1];

const level = (bayId: Id, { id }: { readonly id: Id | null }): Neighbour => ({
  select: { bayId, levelId: id, placementIds: [] },
  focus: { on: 'level', id: id ?? bayId },
});

/** After goods are taken off: the next to their right on the level, else to their left, else the level itself. */
export function afterGoods(site: Site, placementIds: readonly Id[]): Neighbour | null {
  const place = placementPlace(site, placementIds[0] ?? null);
  if (place === null) return null;
  const row = place.level?.placements ?? place.bay.onFloor;
  const gone = row.indexOf(place.placement);
  const left = (one: { readonly id: Id }) => !placementIds.includes(one.id);
  const next = row.slice(gone + 1).find(left) ?? row.slice(0, gone).findLast(left);
  return next === undefined
    ? level(place.bay.id, place.level ?? { id: null })
    : { select: { placementIds: [next.id] }, focus: { on: 'placement', id: next.id } };
}

/** After a level is taken out: the one below it, else the one above, else the floor. */
export function afterLevel(site: Site, levelId: Id): Neighbour | null {
  const place = levelPlace(site, levelId);
  if (place === null) return null;
  const next: Level | undefined = place.bay.levels[place.levelIndex - 1] ?? place.bay.levels[place.levelIndex + 1];
  return level(place.bay.id, next ?? { id: null });
}

/** After a bay is taken out: the one to its right, which takes its place, else to its left, else its run. */
export function afterBay(site: Site, bayId: Id): Neighbour | null {
  const place = bayPlace(site, bayId);
  if (place === null) return null;
  const next = nextTo(place.run.bays, place.index);
  return next === undefined
    ? { select: {}, focus: { on: 'run', id: place.run.id } }
    : { select: { bayId: next.id }, focus: { on: 'bay', id: next.id } };
}

/** After a run is taken out: the one below it in the list, else above, else nothing is left. */
export function afterRun(site: Site, runId: Id): Neighbour | null {
  const index = site.runs.findIndex((run) => run.id === runId);
  if (index < 0) return null;
  const next = nextTo(site.runs, index);
  return next === undefined ? { select: {}, focus: NOTHING_LEFT } : { select: { runId: next.id }, focus: { on: 'run', id: next.id } };
}
