/** Making room for goods that were put down onto others. */
import { TOUCH } from '../checks/placement';
import { movePlacement, type PlaceTarget } from './edits-goods';
import { findEntry, findPlacement } from './lookup';
import { pushApart, type PushApart } from './placing';
import type { Id, Placement, Site } from './site';

/**
 * Pushes apart what stands in a unit load that was put down; nothing moves where it stands in nothing.
 * Goods keep the gaps asked for if there is room for them, else they touch. Whole millimetres.
 * @throws RangeError if the goods do not fit beside each other at all
 */
export function makeRoom(site: Site, placementId: Id, gaps: PushApart['gaps']): Site {
  const { bay, level, placement } = findPlacement(site, placementId);
  const outline = ({ unitLoadId, atMm, towardsFrontMm }: Placement) => {
    const { widthMm, depthMm } = findEntry(site, 'unitLoads', unitLoadId);
    return { at: atMm, width: widthMm, rear: towardsFrontMm - depthMm / 2, front: towardsFrontMm + depthMm / 2 };
  };
  const own = outline(placement);
  // Goods wholly before or behind it are in nobody's way.
  const row = (level?.placements ?? bay.onFloor).filter((one) => {
    const { rear, front } = outline(one);
    return one !== placement && rear < own.front - TOUCH && own.rear < front - TOUCH;
  });
  const standsIn = row.map(outline).some(({ at, width }) => at < own.at + own.width - TOUCH && own.at < at + width - TOUCH);
  if (!standsIn) return site;

  const whole = (one: Placement) => ({ at: one.atMm, width: Math.ceil(outline(one).width) });
  const around = { entry: Math.floor(bay.clearEntryMm), fixed: whole(placement), others: row.map(whole) };
  const wide = { upright: Math.ceil(gaps.upright), loads: Math.ceil(gaps.loads) };
  const places = pushApart({ ...around, gaps: wide }) ?? pushApart({ ...around, gaps: { upright: 0, loads: 0 } });
  if (places === null)
    throw new RangeError(
      'The goods do not fit beside each other there, so nothing was pushed apart. Take one off first, or choose another level.',
    );
  const to = (one: Placement, atMm: number): PlaceTarget =>
    level
      ? { levelId: level.id, atMm, towardsFrontMm: one.towardsFrontMm }
      : { levelId: null, bayId: bay.id, atMm, towardsFrontMm: one.towardsFrontMm };
  const cleared = row.reduce((next, one, i) => movePlacement(next, one.id, to(one, places.others[i] ?? one.atMm)), site);
  return movePlacement(cleared, placementId, to(placement, places.fixed));
}
