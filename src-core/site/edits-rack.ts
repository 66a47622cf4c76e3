/**
 * Edits of the rack: runs, bays, frames and levels. Each gives a new site and leaves the given one
 * as it was; a RangeError says what cannot be taken, in a sentence for whoever asked for it.
 */
import { requirePart } from './check-part';
import { copyOfBay, copyOfFrame, copyOfGoods, copyOfLevel, type NewId } from './copies';
import { changeBay, changed, changeFrame, changeLevel, changeRun, inOrder, moved, refuseNewId, withRun, withRuns } from './edit-paths';
import { findBay, findLevel, findRun } from './lookup';
import type { Bay, Frame, Id, Level, Run, Site } from './site';

// ---------------------------------------------------------------- runs

/** Adds a whole run at the end. */
export function addRun(site: Site, run: Run): Site {
  if (run.backToBack !== null) throw new RangeError(`Add the run ${JSON.stringify(run.name)} first and tie it to the run behind it then.`);
  return withRuns(site, [...site.runs, requirePart(site, 'run', run, null)]);
}

/** Removes a run with all that stands in it; a run tied to it then stands alone. */
export function removeRun(site: Site, runId: Id): Site {
  const gone = findRun(site, runId);
  const rest = site.runs.filter((run) => run !== gone);
  return withRuns(
    site,
    rest.map((run) => (run.backToBack?.runId === runId ? { ...run, backToBack: null } : run)),
  );
}

export const moveRun = (site: Site, runId: Id, toIndex: number): Site =>
  withRuns(site, moved(site.runs, site.runs.indexOf(findRun(site, runId)), toIndex));

/** Changes a run's own fields. Being back to back is changed on both runs. */
export function editRun(site: Site, runId: Id, { backToBack, ...part }: Partial<Omit<Run, 'bays' | 'frames'>>): Site {
  refuseNewId(runId, part);
  const edited = changeRun(site, runId, (run) => changed(run, part));
  return backToBack === undefined ? edited : tieBackToBack(edited, runId, backToBack);
}

/** Ties two runs back to back, or unties the run from the one behind it. Former ties of either are undone. */
function tieBackToBack(site: Site, runId: Id, tie: Run['backToBack']): Site {
  const run = findRun(site, runId);
  if (tie?.runId === runId) throw new RangeError('A run cannot stand back to back with itself. Choose another run.');
  if (tie !== null) requirePart(site, 'run', { ...run, backToBack: tie }, run);
  const pair: readonly Id[] = tie === null ? [runId] : [runId, tie.runId];
  return withRuns(
    site,
    site.runs.map((one) => {
      if (one.id === runId) return { ...one, backToBack: tie };
      if (tie !== null && one.id === tie.runId) return { ...one, backToBack: { ...tie, runId } };
      return one.backToBack !== null && pair.includes(one.backToBack.runId) ? { ...one, backToBack: null } : one;
    }),
  );
}

// ---------------------------------------------------------------- bays and frames

/** Puts a bay into a run at `index`, with a new frame to its right; at the right end without `index`. */
export function addBay(site: Site, runId: Id, bay: Bay, frame: Frame, index?: number): Site {
  const run = findRun(site, runId);
  const at = index ?? run.bays.length;
  if (!(Number.isInteger(at) && at >= 0 && at <= run.bays.length))
    throw new RangeError(`A bay goes to a place from 1 to ${run.bays.length + 1} of the run, not to ${at + 1}.`);
  return changeRun(site, runId, (one) => ({
    ...one,
    bays: one.bays.toSpliced(at, 0, bay),
    frames: one.frames.toSpliced(at + 1, 0, frame),
  }));
}

/** Removes a bay with its goods and the frame to its right; with the first bay the frame to its left goes. */
export function removeBay(site: Site, bayId: Id): Site {
  const { run, index } = findBay(site, bayId);
  const frame = index === 0 && run.bays.length > 1 ? 0 : index + 1;
  return withRun(site, run, { ...run, bays: run.bays.toSpliced(index, 1), frames: run.frames.toSpliced(frame, 1) });
}

/** Moves a bay within its run; the frames stay where they stand. */
export function moveBay(site: Site, bayId: Id, toIndex: number): Site {
  const { run, index } = findBay(site, bayId);
  const bays = moved(run.bays, index, toIndex);
  return bays === run.bays ? site : withRun(site, run, { ...run, bays });
}

export function editBay(site: Site, bayId: Id, part: Partial<Bay>): Site {
  refuseNewId(bayId, part);
  return changeBay(site, bayId, (bay) => changed(bay, part));
}

export function editFrame(site: Site, frameId: Id, part: Partial<Frame>): Site {
  refuseNewId(frameId, part);
  return changeFrame(site, frameId, (frame) => changed(frame, part));
}

/** The bay once more, with goods, to its right; with a frame like that on its right. */
export function duplicateBay(site: Site, bayId: Id, { name, frameName, newId }: { name: string; frameName: string; newId: NewId }): Site {
  const { run, bay, index } = findBay(site, bayId);
  const frame = copyOfFrame(run.frames[index + 1] as Frame, frameName, newId);
  return addBay(site, run.id, copyOfBay(bay, name, newId), frame, index + 1);
}

/**
 * Gives other bays of any run what one bay has: its levels with or without their goods, in place of
 * their own, or its goods only, level by level as far as both have them. Every bay keeps its name,
 * clear entry and id.
 */
export function fillBays(
  site: Site,
  patternId: Id,
  bayIds: readonly Id[],
  what: 'levels' | 'levels and goods' | 'goods',
  newId: NewId,
): Site {
  const { bay: pattern } = findBay(site, patternId);
  const levels = what === 'levels' ? pattern.levels.map((level) => ({ ...level, placements: [] })) : pattern.levels;
  const filled = (bay: Bay): Bay => {
    if (what === 'levels') return { ...bay, noticeId: pattern.noticeId, levels: levels.map((level) => copyOfLevel(level, newId)) };
    const onFloor = copyOfGoods(pattern.onFloor, newId);
    if (what === 'levels and goods')
      return { ...bay, noticeId: pattern.noticeId, levels: levels.map((level) => copyOfLevel(level, newId)), onFloor };
    const own = bay.levels.map((level, i) => {
      const from = levels[i];
      return from ? { ...level, placements: copyOfGoods(from.placements, newId) } : level;
    });
    return { ...bay, levels: own, onFloor };
  };
  return bayIds.filter((id) => id !== patternId).reduce((next, id) => changeBay(next, id, filled), site);
}

// ---------------------------------------------------------------- levels

export const addLevel = (site: Site, bayId: Id, level: Level): Site =>
  changeBay(site, bayId, (bay) => ({ ...bay, levels: inOrder([...bay.levels, level]) }));

/** Removes a level with its goods. */
export function removeLevel(site: Site, levelId: Id): Site {
  const { bay } = findLevel(site, levelId);
  return changeBay(site, bay.id, (one) => ({ ...one, levels: one.levels.filter(({ id }) => id !== levelId) }));
}

/** Changes a level's own fields; at another height it takes its place among the others. */
export function editLevel(site: Site, levelId: Id, part: Partial<Level>): Site {
  refuseNewId(levelId, part);
  return changeLevel(site, levelId, (level) => changed(level, part));
}

export const moveLevel = (site: Site, levelId: Id, heightMm: number): Site => editLevel(site, levelId, { heightMm });

/** Two levels of one bay exchange their heights, each with its beams, deck and goods. */
export function swapLevels(site: Site, levelId: Id, otherId: Id): Site {
  const { bay, level } = findLevel(site, levelId);
  const other = bay.levels.find(({ id }) => id === otherId);
  if (other === undefined)
    throw new RangeError('Only levels of the same bay change places. Copy the level and paste it into the other bay.');
  return changeBay(site, bay.id, (one) => ({
    ...one,
    levels: inOrder(
      one.levels.map((each) => {
        if (each === level) return changed(level, { heightMm: other.heightMm });
        return each === other ? changed(other, { heightMm: level.heightMm }) : each;
      }),
    ),
  }));
}

/** The level once more, with its goods, at another height of the same bay. */
export function duplicateLevel(site: Site, levelId: Id, heightMm: number, newId: NewId): Site {
  const { bay, level } = findLevel(site, levelId);
  return addLevel(site, bay.id, { ...copyOfLevel(level, newId), heightMm });
}

/** Puts a copied level with its goods into a bay; a level that stands at that height already gives way. */
export function pasteLevel(site: Site, bayId: Id, level: Level, newId: NewId): Site {
  return changeBay(site, bayId, (bay) => ({
    ...bay,
    levels: inOrder([...bay.levels.filter(({ heightMm }) => heightMm !== level.heightMm), copyOfLevel(level, newId)]),
  }));
}
