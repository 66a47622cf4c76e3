/** What is done with goods: put on, taken off, copied, turned, spaced. Each is one step of undo. */
import { resolveRules } from '../src-core/checks/rule-sets';
import { addEntry, evenlySpace, mirrorPlacement, placeGoods, removePlacements } from '../src-core/site/edits';
import type { Bay, Id, Level, Placement, Site, UnitLoad } from '../src-core/site/site';
import { formatQuantity } from '../src-core/units/format';
import { lengthOf } from '../src-core/units/quantity';
import { gapsAt } from './drawing/gaps';
import { catchingPlaces, overlaps } from './drawing/snap';
import { newId } from './ids';
import type { OpenSite } from './open-site.svelte';
import { bayPlace, levelPlace, nameOfPlace, placementPlace, type PlacementPlace, type Target } from './places';
import { refusal, type Refused } from './refusal';
import { countOf } from './say';

/** Goods as they were copied: what they are and how they stand, without their ids. */
export type CopiedGoods = readonly Omit<Placement, 'id'>[];

interface Stand {
  readonly bay: Bay;
  readonly level: Level | null;
}

const standOf = (site: Site, bayId: Id, levelId: Id | null): Stand | null => {
  if (levelId === null) {
    const bay = bayPlace(site, bayId)?.bay;
    return bay ? { bay, level: null } : null;
  }
  const place = levelPlace(site, levelId);
  return place ? { bay: place.bay, level: place.level } : null;
};

const targetAt = ({ bay, level }: Stand, atMm: number): Target =>
  level ? { levelId: level.id, atMm } : { levelId: null, bayId: bay.id, atMm };

/** The leftmost place that keeps the gaps asked for, else the leftmost that is free at all; null where none is. */
export function freePlace(site: Site, { bay, level }: Stand, widthMm: number): number | null {
  const width = (id: Id) => site.unitLoads.find((one) => one.id === id)?.widthMm ?? 0;
  const others = (level?.placements ?? bay.onFloor).map((one) => ({ at: one.atMm, width: width(one.unitLoadId) }));
  const loadedBy = bayPlace(site, bay.id)?.run.loadedBy ?? 'unknown';
  const gaps = gapsAt(resolveRules(site.rules), loadedBy, level?.heightMm ?? 0);
  const opening = { entry: bay.clearEntryMm, gaps, width: widthMm, others };
  const [first] = catchingPlaces(opening);
  const [tight] = catchingPlaces({ ...opening, gaps: { upright: 0, loads: 0 } });
  return (first ?? tight)?.at ?? null;
}

/**
 * Puts goods on the chosen level, or on the floor of the bay, at its first free place.
 * @returns why it could not be done, as a sentence; null if it was
 */
export function putGoods(open: OpenSite, unitLoad: UnitLoad, isNew: boolean): Refused | null {
  const { bayId, levelId } = open.selection;
  const stand = bayId === null ? null : standOf(open.site, bayId, levelId);
  if (stand === null) return refusal('No bay is chosen. Choose the bay and level that the goods go to.');
  const at = freePlace(open.site, stand, unitLoad.widthMm);
  const place = nameOfPlace(stand.bay, stand.level);
  if (at === null)
    return refusal(
      `There is no free place ${formatQuantity(lengthOf(unitLoad.widthMm), open.reading)} wide on ${place}. Make room there, or choose another level.`,
    );
  const id = newId();
  const refused = open.edit(`Put ${unitLoad.name} on ${place}`, (site) => {
    const stocked = isNew ? addEntry(site, 'unitLoads', unitLoad) : site;
    return placeGoods(stocked, { id, unitLoadId: unitLoad.id, mirrored: false }, targetAt(stand, at));
  });
  if (refused !== null) return refused;
  open.lastGoods = unitLoad.id;
  open.select({ placementIds: [id] });
  open.sayDone(`${unitLoad.name} put on ${place}.`);
  return null;
}

const chosen = (open: OpenSite): readonly PlacementPlace[] =>
  open.selection.placementIds.flatMap((id) => placementPlace(open.site, id) ?? []);

const nameOf = (places: readonly PlacementPlace[]): string =>
  places.length === 1 ? (places[0]?.unitLoad.name ?? '') : countOf(places.length, 'unit load');

export function deleteGoods(open: OpenSite): void {
  const places = chosen(open);
  if (places.length === 0) return;
  const name = nameOf(places);
  open.edit(`Take off ${name}`, (site) =>
    removePlacements(
      site,
      places.map(({ placement }) => placement.id),
    ),
  );
  open.sayDone(`${name} taken off. Undo puts it back.`);
}

export function mirrorGoods(open: OpenSite): void {
  const places = chosen(open);
  if (places.length === 0) return;
  const name = nameOf(places);
  open.edit(`Turn ${name} left for right`, (site) => places.reduce((next, { placement }) => mirrorPlacement(next, placement.id), site));
  open.sayDone(`${name} turned left for right.`);
}

export function copyGoods(open: OpenSite): void {
  const places = chosen(open);
  if (places.length === 0) return;
  open.copied = places.map(({ placement: { id: _, ...rest } }) => rest);
  open.copiedLevel = null;
  open.say(`${nameOf(places)} copied.`);
}

export function cutGoods(open: OpenSite): void {
  copyGoods(open);
  deleteGoods(open);
}

export function pasteGoods(open: OpenSite): void {
  const { bayId, levelId } = open.selection;
  if (open.copied.length === 0) return open.say('Nothing is copied yet. Select goods and copy them first.');
  if (bayId !== null) addCopies(open, open.copied, bayId, levelId, 'Paste');
}

export function duplicateGoods(open: OpenSite): void {
  const places = chosen(open);
  const first = places[0];
  if (first === undefined) return;
  const copies = places.map(({ placement: { id: _, ...rest } }) => rest);
  addCopies(open, copies, first.bay.id, first.level?.id ?? null, 'Duplicate');
}

/** Each copy at its own place where that is free, else at the first that is; what finds none is left out and said. */
function addCopies(open: OpenSite, copies: CopiedGoods, bayId: Id, levelId: Id | null, verb: string): void {
  const ids: Id[] = [];
  const put = (site: Site): Site =>
    copies.reduce((next, copy) => {
      const stand = standOf(next, bayId, levelId);
      const unitLoad = next.unitLoads.find((one) => one.id === copy.unitLoadId);
      if (stand === null || unitLoad === undefined) return next;
      const at = isFree(next, stand, copy, unitLoad.widthMm) ? copy.atMm : freePlace(next, stand, unitLoad.widthMm);
      if (at === null) return next;
      const { unitLoadId, mirrored, towardsFrontMm } = copy;
      const id = newId();
      ids.push(id);
      return placeGoods(next, { id, unitLoadId, mirrored }, { ...targetAt(stand, at), towardsFrontMm });
    }, site);
  open.edit(`${verb} ${countOf(copies.length, 'unit load')}`, put);
  const stand = standOf(open.site, bayId, levelId);
  if (stand === null) return;
  const place = nameOfPlace(stand.bay, stand.level);
  if (ids.length === 0) return open.say(`There is no free place for that on ${place}.`);
  open.select({ placementIds: ids });
  const left = copies.length - ids.length;
  open.sayDone(
    `${countOf(ids.length, 'unit load')} put on ${place}.${left > 0 ? ` ${countOf(left, 'unit load')} found no free place there.` : ''}`,
  );
}

function isFree(site: Site, { bay, level }: Stand, { atMm }: Pick<Placement, 'atMm'>, width: number): boolean {
  const widths = new Map(site.unitLoads.map((one) => [one.id, one.widthMm]));
  const others = level?.placements ?? bay.onFloor;
  return others.every((one) => !overlaps({ at: atMm, width }, { at: one.atMm, width: widths.get(one.unitLoadId) ?? 0 }));
}

/** The goods of the level in their order, with equal gaps between them and to the uprights. */
export function spaceEvenly(open: OpenSite): void {
  const { bay, level } = open;
  if (bay === null || level === null || level.placements.length === 0) return;
  const place = nameOfPlace(bay, level);
  if (open.edit(`Space the goods of ${place} evenly`, (site) => evenlySpace(site, level.id)) === null)
    open.sayDone(`Goods of ${place} spaced evenly.`);
}
