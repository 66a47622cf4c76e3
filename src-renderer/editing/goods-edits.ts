/** What is done with goods: put on, taken off, copied, turned, spaced. Each is one step of undo. */
import { addEntry, evenlySpace, mirrorPlacement, removePlacements } from '../../src-core/site/edits';
import type { Id, Placement, Site, UnitLoad } from '../../src-core/site/site';
import { formatQuantity } from '../../src-core/units/format';
import { lengthOf } from '../../src-core/units/quantity';
import { putOn, standOf } from './finding-room';
import { newId } from './ids';
import { afterGoods } from './neighbours';
import type { OpenSite } from '../state/open-site.svelte';
import { nameOfPlace, placementPlace, type PlacementPlace } from './places';
import { refusal, type Refused } from '../state/refusal';
import { countOf } from '../say';

/** Goods as they were copied: what they are and how they stand, without their ids. */
type CopiedGoods = readonly Omit<Placement, 'id'>[];

/**
 * Puts goods on the chosen level, or on the floor of the bay, at its first free place.
 * @returns why it could not be done, as a sentence; null if it was
 */
export function putGoods(open: OpenSite, unitLoad: UnitLoad, isNew: boolean): Refused | null {
  const { bayId, levelId } = open.selection;
  const stand = bayId === null ? null : standOf(open.site, bayId, levelId);
  if (stand === null) return refusal('No bay is chosen. Choose the bay and level that the goods go to.');
  const place = nameOfPlace(stand.bay, stand.level);
  const id = newId();
  const refused = open.edit(`Put ${unitLoad.name} on ${place}`, (site) => {
    const stocked = isNew ? addEntry(site, 'unitLoads', unitLoad) : site;
    return putOn(stocked, stand, { id, unitLoadId: unitLoad.id, atMm: null, mirrored: false, towardsFrontMm: 0 }, open);
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
  const ids = places.map(({ placement }) => placement.id);
  const neighbour = afterGoods(open.site, ids);
  if (open.edit(`Take off ${name}`, (site) => removePlacements(site, ids)) !== null) return;
  open.goOnTo(neighbour);
  open.sayDone(`${name} taken off. Undo puts ${ids.length === 1 ? 'it' : 'them'} back.`);
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

/** Each copy where it stood if that is free, else at the first place that is, or at one that is made; what finds none is left out and said. */
function addCopies(open: OpenSite, copies: CopiedGoods, bayId: Id, levelId: Id | null, verb: string): void {
  const ids: Id[] = [];
  let whyNot = '';
  const put = (before: Site): Site => {
    const after = copies.reduce((site, copy) => {
      const stand = standOf(site, bayId, levelId);
      if (stand === null) return site;
      const id = newId();
      try {
        const next = putOn(site, stand, { ...copy, id }, open);
        ids.push(id);
        return next;
      } catch (error) {
        if (!(error instanceof RangeError)) throw error;
        whyNot = error.message;
        return site;
      }
    }, before);
    if (ids.length === 0) throw new RangeError(whyNot);
    return after;
  };
  if (open.editGoods(`${verb} ${countOf(copies.length, 'unit load')}`, put) !== null) return;
  const stand = standOf(open.site, bayId, levelId);
  if (stand === null) return;
  open.select({ placementIds: ids });
  const done = `${countOf(ids.length, 'unit load')} put on ${nameOfPlace(stand.bay, stand.level)}.`;
  const left = copies.length - ids.length;
  if (left === 0) return open.sayDone(done);
  open.refusedMove = `${countOf(left, 'unit load')} of ${copies.length} found no place. ${whyNot}`;
  open.say(`${done} ${open.refusedMove}`);
}

/** The goods of the level in their order, with equal gaps between them and to the uprights. */
export function spaceEvenly(open: OpenSite): void {
  const { bay, level } = open;
  if (bay === null || level === null || level.placements.length === 0) return;
  const place = nameOfPlace(bay, level);
  const wide = level.placements.reduce(
    (sum, { unitLoadId }) => sum + (open.site.unitLoads.find(({ id }) => id === unitLoadId)?.widthMm ?? 0),
    0,
  );
  if (wide > bay.clearEntryMm) {
    const said = (mm: number) => formatQuantity(lengthOf(mm), open.reading);
    open.refusedMove = `The goods of ${place} are ${said(wide)} wide together, ${said(wide - bay.clearEntryMm)} more than the clear entry. Take one off first.`;
    return open.say(open.refusedMove);
  }
  if (open.edit(`Space the goods of ${place} evenly`, (site) => evenlySpace(site, level.id)) === null)
    open.sayDone(`Goods of ${place} spaced evenly.`);
}
