/** Carries what a bay's visit found into the site, so that its checks know of it from then on. */
import type { Answer, Bay, Damage, Frame, Id, Level, Site } from '../site/site';
import { differences } from './differences';
import { bayOf } from './edits';
import type { BayVisit, FrameDamage, Seen, Visit } from './visit';

/**
 * Damage of frames and plumb readings as they were measured; locks and anchors as they were answered.
 * What was not looked at stays as the site has it. Damage keeps its id, so that carrying twice changes
 * nothing. Places that the site no longer has are left out.
 * @returns the same site where nothing of it changes
 * @throws RangeError if the visit has no such bay
 */
export function carryIntoSite(site: Site, visit: Visit, bayId: Id): Site {
  const seen = bayOf(visit, bayId);
  const runs = mapped(site.runs, (run) => {
    const index = run.bays.findIndex(({ id }) => id === bayId);
    const own = new Set([run.frames[index]?.id, run.frames[index + 1]?.id]);
    const frames = mapped(run.frames, (frame) => carryIntoFrame(frame, seen, index >= 0 && own.has(frame.id)));
    const bays = mapped(run.bays, (bay) => (bay.id === bayId ? carryIntoBay(bay, seen) : bay));
    return frames === run.frames && bays === run.bays ? run : { ...run, frames, bays };
  });
  return runs === site.runs ? site : { ...site, runs };
}

/** The same list where every entry stays the same. */
function mapped<T>(all: readonly T[], change: (one: T) => T): readonly T[] {
  const after = all.map(change);
  return after.every((one, i) => one === all[i]) ? all : after;
}

const answered = (seen: Seen, before: Answer): Answer => (seen === 'not-looked-at' ? before : seen);

function carryIntoBay(bay: Bay, { checklist, missingLocks }: BayVisit): Bay {
  if (checklist.locks === 'not-looked-at') return bay;
  const without = new Set(missingLocks.map(({ levelId }) => levelId));
  const locksOf = ({ id }: Level): Answer => {
    if (checklist.locks === 'yes') return 'yes';
    // "Not all are there", without saying where: none of the levels is known to be locked.
    return without.size === 0 || without.has(id) ? 'no' : 'yes';
  };
  const levels = mapped(bay.levels, (level) => (locksOf(level) === level.locks ? level : { ...level, locks: locksOf(level) }));
  return levels === bay.levels ? bay : { ...bay, levels };
}

function carryIntoFrame(frame: Frame, { checklist, plumb, damages }: BayVisit, ofBay: boolean): Frame {
  const reading = plumb.find(({ frameId }) => frameId === frame.id);
  const own = damages.filter((damage): damage is FrameDamage => damage.on === 'frame' && damage.frameId === frame.id);
  const anchored = ofBay ? answered(checklist.anchors, frame.anchored) : frame.anchored;
  const { frameId: _, ...offsets } = reading ?? { frameId: '' };
  const after = {
    ...frame,
    anchored,
    plumb: 'heightMm' in offsets ? offsets : frame.plumb,
    damages: own.reduce(withDamage, frame.damages),
  };
  return differences(frame, after).length === 0 ? frame : after;
}

function withDamage(damages: readonly Damage[], { on: _, frameId: __, ...damage }: FrameDamage): readonly Damage[] {
  return damages.some(({ id }) => id === damage.id) ? damages.map((one) => (one.id === damage.id ? damage : one)) : [...damages, damage];
}

/** A damage that was repaired is no longer the frame's; its record stays. */
export const repaired = (site: Site, damageId: Id): Site => ({
  ...site,
  runs: site.runs.map((run) =>
    run.frames.some(({ damages }) => damages.some(({ id }) => id === damageId))
      ? { ...run, frames: run.frames.map((frame) => ({ ...frame, damages: frame.damages.filter(({ id }) => id !== damageId) })) }
      : run,
  ),
});
