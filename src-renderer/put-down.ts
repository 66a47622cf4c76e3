/** Where moved goods end up: as they were put, or with their neighbours pushed apart. */
import { resolveRules } from '../src-core/checks/rule-sets';
import { movePlacement } from '../src-core/site/edits';
import { makeRoom } from '../src-core/site/making-room';
import type { Id, Site } from '../src-core/site/site';
import { gapsAt } from './drawing/gaps';
import { placementPlace, type Target } from './places';

/** Positions are whole millimetres. */
export const moved = (site: Site, placementId: Id, target: Target): Site =>
  movePlacement(site, placementId, { ...target, atMm: Math.round(target.atMm) });

/** @throws RangeError if the goods do not fit beside each other there */
export function pushedApart(site: Site, placementIds: readonly Id[]): Site {
  return placementIds.reduce((next, id) => {
    const place = placementPlace(next, id);
    return place === null ? next : makeRoom(next, id, gapsAt(resolveRules(next.rules), place.run.loadedBy, place.level?.heightMm ?? 0));
  }, site);
}
