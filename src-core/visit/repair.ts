/** What an action that is done changes in the site: the damage that was repaired, readings that hold no longer, locks and anchors. */
import type { Bay, Frame, Id, Level, Site } from '../site/site';
import type { Action } from './actions';

/** What closing an action takes off the rack, in words for whoever closes it; null where it takes nothing. */
export type TakesOff = 'damage' | 'beam-damage' | 'readings' | 'loaded-reading' | 'plumb-reading' | 'locks' | 'anchors' | null;

export function takesOff({ id, kind }: Pick<Action, 'id' | 'kind'>): TakesOff {
  const [what] = id.split(':');
  if (what === 'damage' || what === 'beam-damage' || what === 'anchors') return what;
  if (what === 'plumb') return kind === 're-plumb' ? 'plumb-reading' : null;
  if (what === 'lock' || what === 'locks') return 'locks';
  if (what !== 'sag') return null;
  return kind === 'out-of-use' ? 'readings' : 'loaded-reading';
}

/**
 * The site after an action was done. Places that it no longer has are left out.
 * @param open actions that are open besides: a lock or an anchor that another one still misses stays missing
 */
export function afterClosing(site: Site, action: Pick<Action, 'id' | 'kind'>, open: readonly Pick<Action, 'id'>[] = []): Site {
  const of = takesOff(action);
  const [, about = '', beam = ''] = action.id.split(/[:@]/);
  switch (of) {
    case 'damage':
    case 'beam-damage':
      return repaired(site, about);
    case 'readings':
      return changedLevel(site, about, (level) => ({ ...level, sags: [] }));
    case 'loaded-reading':
      return changedLevel(site, about, (level) => withoutLoaded(level, beam));
    case 'plumb-reading':
      return changedFrames(site, new Set([about]), (frame) => ({ ...frame, plumb: null }));
    case 'locks':
      return locked(site, action, open);
    case 'anchors':
      return anchored(site, about, new Set(open.filter(({ id }) => id !== action.id).map(({ id }) => id.split('@')[0] ?? '')));
    case null:
      return site;
  }
}

/** A damage that was repaired is no longer the frame's or the level's; its record stays. */
export function repaired(site: Site, damageId: Id): Site {
  const isIt = ({ id }: { readonly id: Id }) => id === damageId;
  const others = <T extends { readonly id: Id }>(damages: readonly T[]) => damages.filter((one) => !isIt(one));
  return {
    ...site,
    runs: site.runs.map((run) => {
      if (run.frames.some(({ damages }) => damages.some(isIt)))
        return { ...run, frames: run.frames.map((frame) => ({ ...frame, damages: others(frame.damages) })) };
      const bay = run.bays.find(({ levels }) => levels.some(({ beamDamages }) => beamDamages.some(isIt)));
      if (bay === undefined) return run;
      const levels = bay.levels.map((level) => ({ ...level, beamDamages: others(level.beamDamages) }));
      return { ...run, bays: run.bays.map((one) => (one === bay ? { ...bay, levels } : one)) };
    }),
  };
}

/** A level that was relieved sags no longer as it was read; what stayed bent stays. */
const withoutLoaded = (level: Level, beam: string): Level => ({
  ...level,
  sags: level.sags.flatMap((one) => {
    if (one.beam !== beam) return [one];
    return one.unloadedMm === null && one.sidewaysMm === null ? [] : [{ ...one, loadedMm: null }];
  }),
});

const changedLevel = (site: Site, levelId: Id, change: (level: Level) => Level): Site => ({
  ...site,
  runs: site.runs.map((run) => {
    const bay = run.bays.find(({ levels }) => levels.some(({ id }) => id === levelId));
    if (bay === undefined) return run;
    const levels = bay.levels.map((level) => (level.id === levelId ? change(level) : level));
    return { ...run, bays: run.bays.map((one) => (one === bay ? { ...bay, levels } : one)) };
  }),
});

/** Levels are locked again where nothing else that is open misses a lock of theirs. */
function locked(site: Site, action: Pick<Action, 'id'>, open: readonly Pick<Action, 'id'>[]): Site {
  const about = ({ id }: Pick<Action, 'id'>) => id.split(/[:@]/).slice(0, 2).join(':');
  const others = new Set(open.filter(({ id }) => id !== action.id).map(about));
  const own = about(action);
  return changedBays(site, (bay) => {
    if (others.has(`locks:${bay.id}`)) return bay;
    const levels = bay.levels.map((level): Level => {
      const isIt = own === `lock:${level.id}` || own === `locks:${bay.id}`;
      return isIt && level.locks === 'no' && !others.has(`lock:${level.id}`) ? { ...level, locks: 'yes' } : level;
    });
    return levels.every((level, i) => level === bay.levels[i]) ? bay : { ...bay, levels };
  });
}

/** The bay's two frames are anchored again where nothing that is open says otherwise of the bay beside it. */
function anchored(site: Site, bayId: Id, others: ReadonlySet<string>): Site {
  const frames = new Set(
    site.runs.flatMap(({ bays, frames }) => {
      const index = bays.findIndex(({ id }) => id === bayId);
      if (index < 0) return [];
      const free = (beside: Bay | undefined) => beside === undefined || !others.has(`anchors:${beside.id}`);
      return [...(free(bays[index - 1]) ? [frames[index]?.id] : []), ...(free(bays[index + 1]) ? [frames[index + 1]?.id] : [])];
    }),
  );
  return changedFrames(site, frames, (frame) => (frame.anchored === 'no' ? { ...frame, anchored: 'yes' } : frame));
}

const changedFrames = (site: Site, ids: ReadonlySet<Id | undefined>, change: (frame: Frame) => Frame): Site => ({
  ...site,
  runs: site.runs.map((run) =>
    run.frames.some(({ id }) => ids.has(id))
      ? { ...run, frames: run.frames.map((frame) => (ids.has(frame.id) ? change(frame) : frame)) }
      : run,
  ),
});

const changedBays = (site: Site, change: (bay: Bay) => Bay): Site => ({
  ...site,
  runs: site.runs.map((run) => {
    const bays = run.bays.map(change);
    return bays.every((bay, i) => bay === run.bays[i]) ? run : { ...run, bays };
  }),
});
