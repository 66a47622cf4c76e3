/**
 * Every change to a visit, `(visit, …) => visit`. New ids and days are arguments.
 *
 * A signed visit is a record: changing it is refused. A finished bay is taken up again before it is
 * changed. Both throw, and so does a bay that the visit does not have; each error quotes the id.
 */
import type { Id } from '../site/site';
import {
  CHECKLIST,
  unseenBay,
  type BayVisit,
  type Carried,
  type ChecklistItem,
  type MissingLock,
  type NoticeSeen,
  type Photo,
  type PlumbSeen,
  type SagReading,
  type Seen,
  type SeenDamage,
  type SignOff,
  type Visit,
} from './visit';

// ---------------------------------------------------------------- the round

/** @throws RangeError if the visit is signed or has the bay already */
export function addBay(visit: Visit, runId: Id, bayId: Id): Visit {
  unsigned(visit);
  if (visit.bays.some((bay) => bay.bayId === bayId)) throw new RangeError(`bay "${bayId}" is already part of this visit`);
  return { ...visit, bays: [...visit.bays, unseenBay(runId, bayId)] };
}

export function leaveOutBay(visit: Visit, bayId: Id): Visit {
  unsigned(visit);
  bayOf(visit, bayId);
  return { ...visit, bays: visit.bays.filter((bay) => bay.bayId !== bayId) };
}

/** @throws RangeError if a bay is unfinished, or if there is none */
export function sign(visit: Visit, signed: SignOff): Visit {
  unsigned(visit);
  const open = unfinishedBays(visit);
  if (visit.bays.length === 0) throw new RangeError(`visit "${visit.id}" has no bay to sign for`);
  if (open.length > 0)
    throw new RangeError(`visit "${visit.id}" has ${open.length} unfinished bays, the first of them "${open[0]?.bayId}"`);
  return { ...visit, signed };
}

export const unfinishedBays = (visit: Visit): readonly BayVisit[] => visit.bays.filter(({ finished }) => !finished);

// ---------------------------------------------------------------- one bay

/** @throws RangeError if the visit has no such bay */
export function bayOf(visit: Visit, bayId: Id): BayVisit {
  const bay = visit.bays.find((one) => one.bayId === bayId);
  if (bay === undefined) throw new RangeError(`visit "${visit.id}" has no bay "${bayId}"`);
  return bay;
}

/** What was not looked at stays so: finishing says that no more will be looked at, not that all is well. */
export const finishBay = (visit: Visit, bayId: Id, by: { readonly person: string; readonly date: string }): Visit =>
  changed(visit, bayId, (bay) => ({ ...bay, ...by, finished: true }));

/** Notes what finishing put into the site, so that the site can follow when the bay is taken up again. */
export const markCarried = (visit: Visit, bayId: Id, carried: Carried): Visit => swapped(visit, { ...bayOf(visit, bayId), carried });

export function resumeBay(visit: Visit, bayId: Id): Visit {
  unsigned(visit);
  return swapped(visit, { ...bayOf(visit, bayId), finished: false });
}

export const answer = (visit: Visit, bayId: Id, item: ChecklistItem, seen: Seen): Visit =>
  changed(visit, bayId, (bay) => ({ ...bay, checklist: { ...bay.checklist, [item]: seen } }));

/** Everything that has no answer yet is as it must be: for a bay that was looked at and is in order. */
export const restInOrder = (visit: Visit, bayId: Id): Visit =>
  changed(visit, bayId, (bay) => {
    const checklist = { ...bay.checklist };
    for (const item of CHECKLIST) if (checklist[item] === 'not-looked-at') checklist[item] = 'yes';
    return { ...bay, checklist };
  });

/** A missing lock also answers the checklist's question about locks with "no". */
export const markLock = (visit: Visit, bayId: Id, lock: MissingLock, missing: boolean): Visit =>
  changed(visit, bayId, (bay) => {
    const others = bay.missingLocks.filter((one) => !sameLock(one, lock));
    if (!missing) return { ...bay, missingLocks: others };
    return { ...bay, missingLocks: [...others, lock], checklist: { ...bay.checklist, locks: 'no' } };
  });

export const seeNotice = (visit: Visit, bayId: Id, part: Partial<NoticeSeen>): Visit =>
  changed(visit, bayId, (bay) => ({ ...bay, notice: { ...bay.notice, ...part } }));

/** Adds the damage, or puts it in place of the one with its id. */
export const recordDamage = (visit: Visit, bayId: Id, damage: SeenDamage): Visit =>
  changed(visit, bayId, (bay) => ({ ...bay, damages: replaced(bay.damages, damage, (one) => one.id === damage.id) }));

export const removeDamage = (visit: Visit, bayId: Id, damageId: Id): Visit =>
  changed(visit, bayId, (bay) => ({ ...bay, damages: bay.damages.filter(({ id }) => id !== damageId) }));

/** One reading a beam; one without any figure is taken out. */
export const recordSag = (visit: Visit, bayId: Id, reading: SagReading): Visit =>
  changed(visit, bayId, (bay) => {
    const same = (one: SagReading) => one.levelId === reading.levelId && one.beam === reading.beam;
    const empty = reading.loadedMm === null && reading.unloadedMm === null && reading.sidewaysMm === null;
    return { ...bay, sags: empty ? bay.sags.filter((one) => !same(one)) : replaced(bay.sags, reading, same) };
  });

/** One reading a frame. */
export const recordPlumb = (visit: Visit, bayId: Id, reading: PlumbSeen): Visit =>
  changed(visit, bayId, (bay) => ({ ...bay, plumb: replaced(bay.plumb, reading, (one) => one.frameId === reading.frameId) }));

export const removePlumb = (visit: Visit, bayId: Id, frameId: Id): Visit =>
  changed(visit, bayId, (bay) => ({ ...bay, plumb: bay.plumb.filter((one) => one.frameId !== frameId) }));

/** Adds the photo, or puts it in place of the one with its id. */
export const attachPhoto = (visit: Visit, bayId: Id, photo: Photo): Visit =>
  changed(visit, bayId, (bay) => ({ ...bay, photos: replaced(bay.photos, photo, (one) => one.id === photo.id) }));

export const removePhoto = (visit: Visit, bayId: Id, photoId: Id): Visit =>
  changed(visit, bayId, (bay) => ({ ...bay, photos: bay.photos.filter(({ id }) => id !== photoId) }));

export const note = (visit: Visit, bayId: Id, notes: string): Visit => changed(visit, bayId, (bay) => ({ ...bay, notes }));

// ---------------------------------------------------------------- parts

export const sameLock = (one: MissingLock, other: MissingLock): boolean =>
  one.levelId === other.levelId && one.beam === other.beam && one.end === other.end;

function unsigned(visit: Visit): void {
  if (visit.signed !== null) throw new RangeError(`visit "${visit.id}" was signed on ${visit.signed.date} and can no longer be changed`);
}

function changed(visit: Visit, bayId: Id, change: (bay: BayVisit) => BayVisit): Visit {
  unsigned(visit);
  const bay = bayOf(visit, bayId);
  if (bay.finished) throw new RangeError(`bay "${bayId}" of visit "${visit.id}" is finished; take it up again first`);
  return swapped(visit, change(bay));
}

const swapped = (visit: Visit, bay: BayVisit): Visit => ({
  ...visit,
  bays: visit.bays.map((one) => (one.bayId === bay.bayId ? bay : one)),
});

function replaced<T>(all: readonly T[], one: T, same: (other: T) => boolean): readonly T[] {
  return all.some(same) ? all.map((other) => (same(other) ? one : other)) : [...all, one];
}
