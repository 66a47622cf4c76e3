/** Goods that stand in others, and making room for goods that were put down onto them. */
import { TOUCH } from '../checks/placement';
import { movePlacement, type PlaceTarget } from './edits-goods';
import { findEntry, findPlacement } from './lookup';
import { pushApart, type PushApart } from './placing';
import type { Id, Placement, Site } from './site';

interface Outline {
  readonly at: number;
  readonly width: number;
  readonly rear: number;
  readonly front: number;
}

function outlineOf(site: Site, { unitLoadId, atMm, towardsFrontMm }: Placement): Outline {
  const { widthMm, depthMm } = findEntry(site, 'unitLoads', unitLoadId);
  return { at: atMm, width: widthMm, rear: towardsFrontMm - depthMm / 2, front: towardsFrontMm + depthMm / 2 };
}

/** Goods wholly before or behind one another are in nobody's way. */
export const inOneRow = (a: Pick<Outline, 'rear' | 'front'>, b: Pick<Outline, 'rear' | 'front'>): boolean =>
  a.rear < b.front - TOUCH && b.rear < a.front - TOUCH;

/** What one lies over the other along the beam, mm; 0 where they touch at most. */
function shared(a: Outline, b: Outline): number {
  const over = Math.min(a.at + a.width, b.at + b.width) - Math.max(a.at, b.at);
  return over > TOUCH ? over : 0;
}

/** The others of its level or floor that have its place along the beam to share with it. */
function rowOf(site: Site, { bay, level, placement }: ReturnType<typeof findPlacement>): readonly Placement[] {
  const own = outlineOf(site, placement);
  return (level?.placements ?? bay.onFloor).filter((one) => one !== placement && inOneRow(outlineOf(site, one), own));
}

export interface StandsIn {
  readonly placement: Placement;
  /** How much of the beam both take, mm. */
  readonly byMm: number;
}

/** The unit loads that one stands in, and by how much, from left to right. */
export function standsIn(site: Site, placementId: Id): readonly StandsIn[] {
  const place = findPlacement(site, placementId);
  const own = outlineOf(site, place.placement);
  return rowOf(site, place)
    .map((placement) => ({ placement, byMm: shared(own, outlineOf(site, placement)) }))
    .filter(({ byMm }) => byMm > 0);
}

/** The site with room made; or by how much the goods are too wide together to stand beside each other, touching. */
export type Room = { readonly site: Site } | { readonly missingMm: number };

/**
 * Pushes apart what stands in a unit load that was put down; nothing moves where it stands in nothing.
 * Goods keep the gaps asked for if there is room for them, else they touch. Whole millimetres.
 */
export function makeRoom(site: Site, placementId: Id, gaps: PushApart['gaps']): Room {
  if (standsIn(site, placementId).length === 0) return { site };
  const place = findPlacement(site, placementId);
  const { bay, level, placement } = place;
  const row = rowOf(site, place);
  const whole = (one: Placement) => ({ at: one.atMm, width: Math.ceil(outlineOf(site, one).width) });
  const around = { entry: Math.floor(bay.clearEntryMm), fixed: whole(placement), others: row.map(whole) };
  const wide = { upright: Math.ceil(gaps.upright), loads: Math.ceil(gaps.loads) };
  const places = pushApart({ ...around, gaps: wide }) ?? pushApart({ ...around, gaps: { upright: 0, loads: 0 } });
  if (places === null) {
    const together = [around.fixed, ...around.others].reduce((sum, { width }) => sum + width, 0);
    return { missingMm: together - around.entry };
  }
  const to = (one: Placement, atMm: number): PlaceTarget =>
    level
      ? { levelId: level.id, atMm, towardsFrontMm: one.towardsFrontMm }
      : { levelId: null, bayId: bay.id, atMm, towardsFrontMm: one.towardsFrontMm };
  const cleared = row.reduce((next, one, i) => movePlacement(next, one.id, to(one, places.others[i] ?? one.atMm)), site);
  return { site: movePlacement(cleared, placementId, to(placement, places.fixed)) };
}
