/** What leaves the site when an action is done: the damage that was repaired, the readings of beams that were replaced. */
import type { Id, Level, Site } from '../site/site';
import type { Action } from './actions';

/** What closing an action takes off the rack, in words for whoever closes it; null where it takes nothing. */
export type TakesOff = 'damage' | 'beam-damage' | 'readings' | 'loaded-reading' | null;

export function takesOff({ id, kind }: Pick<Action, 'id' | 'kind'>): TakesOff {
  const [what] = id.split(':');
  if (what === 'damage' || what === 'beam-damage') return what;
  if (what !== 'sag') return null;
  return kind === 'out-of-use' ? 'readings' : 'loaded-reading';
}

/** The site after an action was done. Places that it no longer has are left out. */
export function afterClosing(site: Site, action: Pick<Action, 'id' | 'kind'>): Site {
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
