/** Where moved goods end up: with their neighbours pushed apart, or not at all where they would stand in others. */
import { resolveRules } from '../../src-core/checks/rule-sets';
import { movePlacement } from '../../src-core/site/edits';
import { makeRoom, standsIn } from '../../src-core/site/making-room';
import type { Id, Site } from '../../src-core/site/site';
import { formatQuantity, type Reading } from '../../src-core/units/format';
import { lengthOf } from '../../src-core/units/quantity';
import { gapsAt } from '../drawing/gaps';
import { nameOfPlace, placementPlace, type PlacementPlace, type Target } from './places';

/** Positions stay as they were typed, in inches as well; steps of keys and drags add no digits of their own. */
export const moved = (site: Site, placementId: Id, target: Target): Site =>
  movePlacement(site, placementId, { ...target, atMm: Number(target.atMm.toFixed(4)) });

/** One unit load and where it goes. */
export interface Move {
  readonly placementId: Id;
  readonly target: Target;
}

export const allMoved = (site: Site, moves: readonly Move[]): Site =>
  moves.reduce((next, { placementId, target }) => moved(next, placementId, target), site);

export interface PutDown {
  /** The site before anything was moved. */
  readonly before: Site;
  /** With the goods where they were put. */
  readonly after: Site;
  /** What was put down. */
  readonly placementIds: readonly Id[];
  /** Whether neighbours are pushed apart; else goods are refused where they would stand in others. */
  readonly pushing: boolean;
  readonly reading: Reading;
}

/**
 * The one rule for goods that are put down, by whichever way: dragged, by keys, clicks or menu, pasted,
 * duplicated, or put on from the library.
 * @throws RangeError with a sentence that says how many millimetres are in the way or missing
 */
export function putDown({ before, after, placementIds, pushing, reading }: PutDown): Site {
  const settle = pushing ? pushedApart : refusedWhereTaken(before);
  return placementIds.reduce((next, id) => {
    const place = placementPlace(next, id);
    return place === null ? next : settle(next, place, reading);
  }, after);
}

/** "bay A4, level 2" of where it stands. */
const there = ({ bay, level }: PlacementPlace): string => nameOfPlace(bay, level);

function pushedApart(site: Site, place: PlacementPlace, reading: Reading): Site {
  const { placement, run, level, unitLoad } = place;
  const room = makeRoom(site, placement.id, gapsAt(resolveRules(site.rules), run.loadedBy, level?.heightMm ?? 0));
  if ('site' in room) return room.site;
  const missing = formatQuantity(lengthOf(room.missingMm), reading);
  throw new RangeError(
    `There is no room for ${unitLoad.name} on ${there(place)}, even with its neighbours pushed together: ${missing} are missing. Nothing was moved. Take goods off there first, or choose another place.`,
  );
}

/** Goods that stood in each other before may come apart by steps; none may go deeper into others. */
function refusedWhereTaken(before: Site) {
  return (site: Site, place: PlacementPlace, reading: Reading): Site => {
    const { placement, level, bay, unitLoad } = place;
    const now = standsIn(site, placement.id);
    const [most] = now.toSorted((a, b) => b.byMm - a.byMm);
    if (most === undefined) return site;
    const was = placementPlace(before, placement.id);
    const stood = was !== null && was.bay.id === bay.id && was.level?.id === level?.id ? standsIn(before, placement.id) : [];
    const sum = (all: typeof now) => all.reduce((mm, { byMm }) => mm + byMm, 0);
    if (sum(now) <= sum(stood)) return site;
    const other = site.unitLoads.find(({ id }) => id === most.placement.unitLoadId)?.name ?? 'other goods';
    throw new RangeError(
      `${unitLoad.name} would stand ${formatQuantity(lengthOf(most.byMm), reading)} in ${other} on ${there(place)}. Nothing was moved. Choose a free place, or have neighbours pushed apart.`,
    );
  };
}
