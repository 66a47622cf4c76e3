/**
 * Edits of where goods stand. Goods of a level keep to their order from left to right, wherever they
 * came from, so that the same move ends in the same file by whichever way it was made.
 */
import { requirePart } from './check-part';
import { changed, refuseNewId, replaced, withBay } from './edit-paths';
import { LIMITS } from './limits';
import { findBay, findEntry, findLevel, findPlacement, type BayPlace, type PlacementPlace } from './lookup';
import { evenPlaces } from './placing';
import type { Id, Level, Placement, Site } from './site';

/** Where a unit load goes: its left edge from the left upright's face, on a beam level or on the floor of a bay. */
export type PlaceTarget =
  | { readonly levelId: Id; readonly atMm: number; readonly towardsFrontMm?: number }
  | { readonly levelId: null; readonly bayId: Id; readonly atMm: number; readonly towardsFrontMm?: number };

/** Puts a unit load of the library on a level or on the floor of a bay. */
export function placeGoods(
  site: Site,
  goods: { readonly id: Id; readonly unitLoadId: Id; readonly mirrored?: boolean },
  target: PlaceTarget,
): Site {
  const { id, unitLoadId, mirrored = false } = goods;
  const { atMm, towardsFrontMm = 0 } = target;
  return inserted(site, target, requirePart(site, 'placement', { id, unitLoadId, atMm, mirrored, towardsFrontMm }, null));
}

/** Moves a unit load along its level, to another level or to a floor, of any bay. Depth stays as it is unless the target says. */
export function movePlacement(site: Site, placementId: Id, target: PlaceTarget): Site {
  const from = findPlacement(site, placementId);
  const { atMm, towardsFrontMm = from.placement.towardsFrontMm } = target;
  const after = changed(from.placement, { atMm, towardsFrontMm });
  if (after === from.placement && isThere(from, target)) return site;
  requirePart(site, 'placement', after, from.placement);
  return inserted(without(site, from), target, after);
}

export function mirrorPlacement(site: Site, placementId: Id): Site {
  const { placement } = findPlacement(site, placementId);
  return editPlacement(site, placementId, { mirrored: !placement.mirrored });
}

export function editPlacement(site: Site, placementId: Id, part: Partial<Placement>): Site {
  refuseNewId(placementId, part);
  const from = findPlacement(site, placementId);
  const after = changed(from.placement, part);
  if (after === from.placement) return site;
  requirePart(site, 'placement', after, from.placement);
  const { atMm } = after;
  return inserted(without(site, from), from.level ? { levelId: from.level.id, atMm } : { levelId: null, bayId: from.bay.id, atMm }, after);
}

export const removePlacement = (site: Site, placementId: Id): Site => without(site, findPlacement(site, placementId));

export const removePlacements = (site: Site, placementIds: readonly Id[]): Site => placementIds.reduce(removePlacement, site);

/**
 * Spaces the goods of a level with equal gaps between them and to the uprights, in whole millimetres.
 * @throws RangeError if they are wider together than the clear entry
 */
export function evenlySpace(site: Site, levelId: Id): Site {
  const place = findLevel(site, levelId);
  const { bay, level } = place;
  const ordered = level.placements.toSorted((a, b) => a.atMm - b.atMm);
  const widths = ordered.map(({ unitLoadId }) => findEntry(site, 'unitLoads', unitLoadId).widthMm);
  const places = evenPlaces(bay.clearEntryMm, widths);
  if (places === null)
    throw new RangeError(
      `The goods of this level are ${widths.reduce((sum, width) => sum + width, 0)} mm wide together, more than the clear entry of ${bay.clearEntryMm} mm. Take one off first.`,
    );
  const placements = ordered.map((placement, i) => changed(placement, { atMm: places[i] ?? placement.atMm }));
  return placements.every((placement, i) => placement === level.placements[i])
    ? site
    : withLevel(site, place, level, { ...level, placements });
}

const isThere = ({ bay, level }: PlacementPlace, target: PlaceTarget): boolean =>
  target.levelId === null ? level === null && bay.id === target.bayId : level?.id === target.levelId;

const without = (site: Site, place: PlacementPlace): Site => {
  const { level, placement } = place;
  const rest = (placements: readonly Placement[]) => placements.filter((one) => one !== placement);
  return level
    ? withLevel(site, place, level, { ...level, placements: rest(level.placements) })
    : withBay(site, place, { ...place.bay, onFloor: rest(place.bay.onFloor) });
};

/** The placement has been checked; where it goes needs no more than room in the list. */
function inserted(site: Site, target: PlaceTarget, placement: Placement): Site {
  if (target.levelId !== null) {
    const place = findLevel(site, target.levelId);
    return withLevel(site, place, place.level, { ...place.level, placements: among(place.level.placements, placement) });
  }
  const place = findBay(site, target.bayId);
  return withBay(site, place, { ...place.bay, onFloor: among(place.bay.onFloor, placement) });
}

const withLevel = (site: Site, place: BayPlace, before: Level, after: Level): Site =>
  withBay(site, place, { ...place.bay, levels: replaced(place.bay.levels, before, after) });

/** Before the first that stands further right, without touching the order of the others. */
function among(placements: readonly Placement[], placement: Placement): readonly Placement[] {
  if (placements.length >= LIMITS.goodsOnLevel)
    throw new RangeError(`A level holds at most ${LIMITS.goodsOnLevel} unit loads. Take some off first.`);
  const next = placements.findIndex(({ id, atMm }) => atMm > placement.atMm || (atMm === placement.atMm && id > placement.id));
  return next < 0 ? [...placements, placement] : placements.toSpliced(next, 0, placement);
}
