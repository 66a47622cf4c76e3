/** Quick capture of what stands on a level: so many of one unit load, side by side at equal gaps. */
import { placeGoods, removePlacements } from '../site/edits';
import { findEntry, findLevel } from '../site/lookup';
import { evenPlaces } from '../site/placing';
import type { Id, Site } from '../site/site';

/** How many of a unit load have room side by side. */
export function mostOnLevel(site: Site, levelId: Id, unitLoadId: Id): number {
  const { bay } = findLevel(site, levelId);
  return Math.floor(bay.clearEntryMm / findEntry(site, 'unitLoads', unitLoadId).widthMm);
}

/**
 * Takes off what stood on the level and puts so many of the unit load there, evenly spaced; none with a count of 0.
 * @throws RangeError if they have no room side by side, or if level or unit load are not in the site
 */
export function captureLevel(site: Site, levelId: Id, unitLoadId: Id, count: number, newId: () => Id): Site {
  const { bay, level } = findLevel(site, levelId);
  const { widthMm } = findEntry(site, 'unitLoads', unitLoadId);
  const places = evenPlaces(
    bay.clearEntryMm,
    Array.from({ length: count }, () => widthMm),
  );
  if (places === null) throw new RangeError(`${count} unit loads of ${widthMm} mm have no room in ${bay.clearEntryMm} mm`);
  const emptied = removePlacements(
    site,
    level.placements.map(({ id }) => id),
  );
  return places.reduce((after, atMm) => placeGoods(after, { id: newId(), unitLoadId }, { levelId, atMm }), emptied);
}
