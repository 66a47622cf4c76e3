/** Carries what a bay's visit found into the site, so that its checks know of it from then on. */
import type { Answer, Bay, Frame, Id, Level, Site } from '../site/site';
import { carrySags, damagesBefore, placeOf, sameFind, withBeamDamages, withFrameDamages, type Finds } from './carry-finds';
import { differences } from './differences';
import { bayOf, finishBay, markCarried } from './edits';
import { closingOf, type FollowUp } from './follow-up';
import type { BayVisit, SagReading, Seen, SeenDamage, Visit } from './visit';

/**
 * Damages and plumb readings as they were measured, sag readings of beams, locks and anchors as they were
 * answered. What was not looked at stays as the site has it. Damage keeps its id, so that carrying twice
 * changes nothing; what this visit carried before and no longer has is taken back. Places that the site no
 * longer has are left out.
 * @returns the same site where nothing of it changes
 * @throws RangeError if the visit has no such bay
 */
export const carryIntoSite = (site: Site, visit: Visit, bayId: Id): Site => carried(site, bayOf(visit, bayId));

export interface Finishing {
  readonly bayId: Id;
  readonly person: string;
  readonly date: string;
  readonly followUp: FollowUp;
  readonly newId: () => Id;
}

/**
 * Finishes a bay and carries it. What was closed since it was carried, and is not in the site any more, is
 * not carried again; where it was measured anew meanwhile it has come back, and is a new damage under an id
 * of its own, so that what was closed stays closed.
 * @throws RangeError if the visit is signed, has no such bay, or the bay is finished already
 */
export function finishInto(
  site: Site,
  visit: Visit,
  { bayId, followUp, newId, ...by }: Finishing,
): { readonly site: Site; readonly visit: Visit } {
  const before = bayOf(visit, bayId);
  const known = damagesBefore(site);
  const was = before.carried;
  const settled = isSettled(known, followUp);
  const asCarried = (damage: SeenDamage): boolean => was?.damages.some((one) => sameFind(one, damage)) ?? false;
  let after = visit;
  for (const damage of before.damages)
    if (settled(damage) && !asCarried(damage)) after = swapDamage(after, bayId, damage.id, { ...damage, id: newId() });
  after = finishBay(after, bayId, by);
  const seen = bayOf(after, bayId);
  const own = new Set(was?.damages.map(({ id }) => id));
  const carrying: BayVisit = {
    ...seen,
    damages: seen.damages.filter((damage) => !settled(damage)),
    sags: seen.sags.flatMap((reading) => stillRead(site, followUp, reading, was?.sags.find(ofBeam(reading)))),
  };
  return {
    site: carried(site, carrying),
    visit: markCarried(after, bayId, { damages: seen.damages.filter(({ id }) => own.has(id) || !known.has(id)), sags: seen.sags }),
  };
}

/** Closed, and so taken off the site. */
const isSettled =
  (known: ReadonlySet<Id>, followUp: FollowUp) =>
  ({ id }: SeenDamage): boolean =>
    !known.has(id) && ['damage', 'beam-damage'].some((kind) => closingOf(followUp, `${kind}:${id}`) !== null);

/**
 * Damages that finishing a bay of the visit put into the site and that it has no longer, though nobody said
 * that they were put right: undone, most likely. Where their frame or level is gone as well, there is nothing to say.
 */
export function lostDamages(site: Site, visit: Visit, followUp: FollowUp): readonly SeenDamage[] {
  const known = damagesBefore(site);
  const places = placesOf(site);
  const settled = isSettled(known, followUp);
  return visit.bays.flatMap(({ finished, carried, damages }) =>
    finished && carried !== null
      ? damages.filter((damage) => !known.has(damage.id) && !settled(damage) && places.has(placeOf(damage)))
      : [],
  );
}

/** The site with those damages as they were seen, and nothing else of the visit. */
export const withLost = (site: Site, damages: readonly SeenDamage[]): Site =>
  withFinds(site, { damages, was: null, places: placesOf(site) });

function withFinds(site: Site, finds: Finds): Site {
  const runs = mapped(site.runs, (run) => {
    const frames = mapped(run.frames, (frame) => {
      const damages = withFrameDamages(frame, finds);
      return damages === frame.damages ? frame : { ...frame, damages };
    });
    const bays = mapped(run.bays, (bay) => {
      const levels = mapped(bay.levels, (level) => {
        const beamDamages = withBeamDamages(level, finds);
        return beamDamages === level.beamDamages ? level : { ...level, beamDamages };
      });
      return levels === bay.levels ? bay : { ...bay, levels };
    });
    return frames === run.frames && bays === run.bays ? run : { ...run, frames, bays };
  });
  return runs === site.runs ? site : { ...site, runs };
}

const swapDamage = (visit: Visit, bayId: Id, oldId: Id, damage: SeenDamage): Visit => {
  const { damages } = bayOf(visit, bayId);
  const others = damages.map((one) => (one.id === oldId ? damage : one));
  return { ...visit, bays: visit.bays.map((bay) => (bay.bayId === bayId ? { ...bay, damages: others } : bay)) };
};

const ofBeam =
  ({ levelId, beam }: SagReading) =>
  (one: SagReading): boolean =>
    one.levelId === levelId && one.beam === beam;

/**
 * The reading without what was put right since it was carried as `was`: whoever replaces the beams of a level
 * takes the readings of both off, and a level that was unloaded sags no longer as it was read.
 */
function stillRead(site: Site, { closings }: FollowUp, reading: SagReading, was: SagReading | undefined): readonly SagReading[] {
  const { levelId, beam, unloadedMm, sidewaysMm } = reading;
  const closed = (start: string) => closings.some(({ actionId }) => actionId.startsWith(start));
  const level = site.runs.flatMap(({ bays }) => bays.flatMap(({ levels }) => levels)).find(({ id }) => id === levelId);
  const held = level?.sags.find((one) => one.beam === beam);
  if (was === undefined || !closed(`sag:${levelId}:`)) return [reading];
  if (held === undefined) return sameFind(was, reading) ? [] : [reading];
  const relieved = closed(`sag:${levelId}:${beam}@`) && held.loadedMm === null && reading.loadedMm === was.loadedMm;
  if (!relieved) return [reading];
  return unloadedMm === null && sidewaysMm === null ? [] : [{ ...reading, loadedMm: null }];
}

function carried(site: Site, seen: BayVisit): Site {
  const finds: Finds = { damages: seen.damages, was: seen.carried, places: placesOf(site) };
  const runs = mapped(site.runs, (run) => {
    const index = run.bays.findIndex(({ id }) => id === seen.bayId);
    const own = new Set([run.frames[index]?.id, run.frames[index + 1]?.id]);
    const frames = mapped(run.frames, (frame) => carryIntoFrame(frame, seen, finds, index >= 0 && own.has(frame.id)));
    const bays = mapped(run.bays, (bay) => carryIntoBay(bay, seen, finds));
    return frames === run.frames && bays === run.bays ? run : { ...run, frames, bays };
  });
  return runs === site.runs ? site : { ...site, runs };
}

const placesOf = (site: Site): ReadonlySet<Id> =>
  new Set(
    site.runs.flatMap(({ frames, bays }) => [...frames.map(({ id }) => id), ...bays.flatMap(({ levels }) => levels.map(({ id }) => id))]),
  );

/** The same list where every entry stays the same. */
function mapped<T>(all: readonly T[], change: (one: T) => T): readonly T[] {
  const after = all.map(change);
  return after.every((one, i) => one === all[i]) ? all : after;
}

const answered = (seen: Seen, before: Answer): Answer => (seen === 'not-looked-at' ? before : seen);

function carryIntoBay(bay: Bay, seen: BayVisit, finds: Finds): Bay {
  const own = bay.id === seen.bayId;
  const levels = mapped(bay.levels, (level) => {
    const beamDamages = withBeamDamages(level, finds);
    const sags = own ? carrySags(level, seen) : level.sags;
    const locks = own ? locksOf(level, seen) : level.locks;
    return beamDamages === level.beamDamages && sags === level.sags && locks === level.locks
      ? level
      : { ...level, locks, beamDamages, sags };
  });
  return levels === bay.levels ? bay : { ...bay, levels };
}

function locksOf({ id, locks }: Level, { checklist, missingLocks }: BayVisit): Answer {
  if (checklist.locks !== 'no') return answered(checklist.locks, locks);
  const without = new Set(missingLocks.map(({ levelId }) => levelId));
  // "Not all are there", without saying where: none of the levels is known to be locked.
  return without.size === 0 || without.has(id) ? 'no' : 'yes';
}

function carryIntoFrame(frame: Frame, { checklist, plumb }: BayVisit, finds: Finds, ofBay: boolean): Frame {
  const reading = plumb.find(({ frameId }) => frameId === frame.id);
  const anchored = ofBay ? answered(checklist.anchors, frame.anchored) : frame.anchored;
  const { frameId: _, ...offsets } = reading ?? { frameId: '' };
  const after = { ...frame, anchored, plumb: 'heightMm' in offsets ? offsets : frame.plumb, damages: withFrameDamages(frame, finds) };
  return differences(frame, after).length === 0 ? frame : after;
}
