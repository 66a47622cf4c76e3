/** Where goods can be put that have no place yet: the first free place of a level, or one that is made. */
import { resolveRules } from '../../src-core/checks/rule-sets';
import { placeGoods } from '../../src-core/site/edits';
import { inOneRow } from '../../src-core/site/making-room';
import { freeGaps } from '../../src-core/site/placing';
import type { Bay, Id, Level, Placement, Site } from '../../src-core/site/site';
import { formatQuantity, type Reading } from '../../src-core/units/format';
import { lengthOf } from '../../src-core/units/quantity';
import { gapsAt } from '../drawing/gaps';
import { catchingPlaces, overlaps, type Opening } from '../drawing/snap';
import { bayPlace, levelPlace, nameOfPlace, type Target } from './places';

/** A level, or the floor of a bay. */
export interface Stand {
  readonly bay: Bay;
  readonly level: Level | null;
}

export function standOf(site: Site, bayId: Id, levelId: Id | null): Stand | null {
  const place = levelId === null ? null : levelPlace(site, levelId);
  if (levelId !== null) return place && { bay: place.bay, level: place.level };
  const bay = bayPlace(site, bayId)?.bay;
  return bay ? { bay, level: null } : null;
}

/** Goods to be put down; the place along the beam is where they would stand best, null for anywhere. */
export type Goods = Omit<Placement, 'atMm'> & { readonly atMm: number | null };

export interface PuttingOn {
  readonly pushing: boolean;
  readonly reading: Reading;
  /** Settles what was put down onto others. */
  readonly roomFor: (site: Site, placementIds: readonly Id[]) => Site;
}

/**
 * Puts goods at their place if that is free, else at the leftmost place that keeps the gaps asked for,
 * else where they touch; where nothing is free neighbours are pushed apart, if that is wanted.
 * @throws RangeError with a sentence that says how many millimetres are missing and where there is room
 */
export function putOn(site: Site, stand: Stand, goods: Goods, { pushing, reading, roomFor }: PuttingOn): Site {
  const opening = openingFor(site, stand, goods);
  const own = goods.atMm;
  const isFree = own !== null && opening.others.every((one) => !overlaps({ at: own, width: opening.width }, one));
  const at = isFree ? own : firstPlace(opening);
  const put = (atMm: number) => placeGoods(site, goods, { ...targetAt(stand, atMm), towardsFrontMm: goods.towardsFrontMm });
  if (at !== null) return put(at);
  const widest = widestGap(opening);
  if (pushing) return roomFor(put(own ?? Math.max(0, Math.round((widest.from + widest.to - opening.width) / 2))), [goods.id]);
  throw new RangeError(noRoom(site, stand, goods, opening, reading));
}

/** The leftmost place that keeps the gaps asked for, else the leftmost that is free at all; null where none is. */
function firstPlace(opening: Opening): number | null {
  const [first] = catchingPlaces(opening);
  const [tight] = catchingPlaces({ ...opening, gaps: { upright: 0, loads: 0 } });
  return (first ?? tight)?.at ?? null;
}

/** What goods meet on a level: what stands wholly before or behind them is no neighbour. */
function openingFor(
  site: Site,
  { bay, level }: Stand,
  { unitLoadId, towardsFrontMm }: Pick<Goods, 'unitLoadId' | 'towardsFrontMm'>,
): Opening {
  const sizeOf = (id: Id) => site.unitLoads.find((one) => one.id === id) ?? { widthMm: 0, depthMm: 0 };
  const across = (depth: number, middle: number) => ({ rear: middle - depth / 2, front: middle + depth / 2 });
  const { widthMm, depthMm } = sizeOf(unitLoadId);
  const own = across(depthMm, towardsFrontMm);
  const others = (level?.placements ?? bay.onFloor)
    .filter((one) => inOneRow(own, across(sizeOf(one.unitLoadId).depthMm, one.towardsFrontMm)))
    .map((one) => ({ at: one.atMm, width: sizeOf(one.unitLoadId).widthMm }));
  const loadedBy = bayPlace(site, bay.id)?.run.loadedBy ?? 'unknown';
  return { entry: bay.clearEntryMm, gaps: gapsAt(resolveRules(site.rules), loadedBy, level?.heightMm ?? 0), width: widthMm, others };
}

const targetAt = ({ bay, level }: Stand, atMm: number): Target =>
  level ? { levelId: level.id, atMm } : { levelId: null, bayId: bay.id, atMm };

const widestGap = ({ entry, others }: Opening) =>
  freeGaps(entry, others).reduce((widest, gap) => (gap.to - gap.from > widest.to - widest.from ? gap : widest), { from: 0, to: 0 });

function noRoom(site: Site, stand: Stand, goods: Goods, opening: Opening, reading: Reading): string {
  const said = (mm: number) => formatQuantity(lengthOf(mm), reading);
  const { from, to } = widestGap(opening);
  const free = to - from;
  const gap = free > 0 ? `the widest gap there is ${said(free)}, ${said(opening.width - free)} too little` : 'it is full';
  const together = opening.others.reduce((sum, { width }) => sum + width, opening.width);
  const apart = together <= opening.entry ? ' Its goods would make room if neighbours were pushed apart.' : '';
  const elsewhere = roomElsewhere(site, stand, goods);
  const next = elsewhere === null ? 'Take something off there, or choose another bay.' : `There is a free place on ${elsewhere}.`;
  return `There is no free place ${said(opening.width)} wide on ${nameOfPlace(stand.bay, stand.level)}: ${gap}.${apart} ${next}`;
}

/** The nearest place of the run where the goods would stand with their gaps, levels of the same bay first. */
function roomElsewhere(site: Site, { bay, level }: Stand, goods: Goods): string | null {
  const place = bayPlace(site, bay.id);
  if (place === null) return null;
  const near = place.run.bays
    .map((one, i) => ({ one, far: Math.abs(i - place.index) }))
    .toSorted((a, b) => a.far - b.far)
    .map(({ one }) => one);
  for (const one of near)
    for (const other of one.levels) {
      if (other === level || catchingPlaces(openingFor(site, { bay: one, level: other }, goods)).length === 0) continue;
      return nameOfPlace(one, other);
    }
  return null;
}
