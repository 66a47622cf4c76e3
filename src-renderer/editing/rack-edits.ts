/** Changing the rack itself: runs, bays and levels added, copied, moved and taken out. Each is one step of undo. */
import type { LoadedBy } from '../../src-core/checks/clearance-rules';
import { copyOfBay, copyOfFrame } from '../../src-core/site/copies';
import {
  addBay,
  addEntry,
  addLevel,
  addRun,
  duplicateBay,
  duplicateLevel,
  editBay,
  editFrame,
  editLevel,
  editRun,
  fillBays,
  moveBay,
  moveLevel,
  moveRun,
  removeBay,
  removeLevel,
  removeRun,
  swapLevels,
} from '../../src-core/site/edits';
import { holesOf, nextHole } from '../../src-core/site/holes';
import { findRun } from '../../src-core/site/lookup';
import { bayByPlan, frameByPlan, planOfBay, runByPlan, type BayPlan } from '../../src-core/site/new-site';
import type { Bay, Frame, Id, Level, LoadNotice, Run, Site } from '../../src-core/site/site';
import { formatQuantity } from '../../src-core/units/format';
import { lengthOf, type UnitSystem } from '../../src-core/units/quantity';
import { firstBay, firstSizes } from './first-sizes';
import { newId } from './ids';
import { frameNameBetween, nextName, nextRunName } from './names';
import { afterBay, afterLevel, afterRun } from './neighbours';
import type { OpenSite } from '../state/open-site.svelte';
import { bayPlace } from './places';
import type { Refused } from '../state/refusal';
import { countOf } from '../say';

/** A run to lay out: its bays all alike, by a plan. */
export interface RunPlan {
  readonly name: string;
  readonly bays: number;
  readonly plan: BayPlan;
  readonly floorId: Id | null;
  readonly loadedBy: LoadedBy;
}

/**
 * @param notice a load notice that is entered together with the run
 * @returns why it was refused, as a sentence; null if it was made
 */
export function layOutRun(
  open: OpenSite,
  { name, bays: count, plan, floorId, loadedBy }: RunPlan,
  notice: LoadNotice | null,
): Refused | null {
  const run: Run = { ...runByPlan(plan, { name, count, floorId, newId }), loadedBy };
  const refused = open.edit(`Lay out run ${name}`, (site) => addRun(notice === null ? site : addEntry(site, 'notices', notice), run));
  if (refused !== null) return refused;
  const bay = run.bays[0];
  open.select({ runId: run.id, bayId: bay?.id ?? null });
  open.select({ levelId: bay?.levels[0]?.id ?? null });
  const goods = goodsInPlan(plan);
  const standing = goods === 0 ? '' : `, each with ${countOf(goods, 'unit load')}`;
  open.say(`Run ${name} laid out: ${countOf(count, 'bay')} of ${countOf(plan.levels.length, 'level')}${standing}.`);
  return null;
}

export const goodsInPlan = ({ levels, onFloor }: BayPlan): number =>
  levels.reduce((sum, level) => sum + level.placements.length, onFloor.length);

/**
 * Name of the frame that comes with a bay, on its right: after both bays at its sides, and at the end
 * of a run after the bay that would be next there.
 */
function newFrameName({ bays, frames }: Run, bayName: string, index: number): string {
  const right = bays[index]?.name ?? nextName(bayName, new Set(bays.map(({ name }) => name)));
  return frameNameBetween(bayName, right, new Set(frames.map(({ name }) => name)));
}

const bayNames = (site: Site): ReadonlySet<string> => new Set(site.runs.flatMap((run) => run.bays.map((bay) => bay.name)));

/**
 * Puts bays by a plan into a run, to the right of the bay with this index; -1 for the left end.
 * @returns why it was refused, as a sentence; null if they were added
 */
export function addBays(open: OpenSite, run: Run, plan: BayPlan, { after, count }: { after: number; count: number }): Refused | null {
  const taken = new Set(bayNames(open.site));
  let last = run.bays[after]?.name ?? `${run.name}0`;
  const bays = Array.from({ length: count }, () => {
    last = nextName(last, taken);
    taken.add(last);
    return bayByPlan(plan, last, newId);
  });
  const [first] = bays;
  if (first === undefined) return null;
  const what = count === 1 ? `bay ${first.name}` : countOf(count, 'bay');
  // From right to left, so that every bay finds its neighbour there.
  const refused = open.edit(`Add ${what}`, (site) =>
    bays.toReversed().reduce((next, bay) => {
      const frameName = newFrameName(findRun(next, run.id), bay.name, after + 1);
      return addBay(next, run.id, bay, frameByPlan(plan, frameName, newId), after + 1);
    }, site),
  );
  if (refused !== null) return refused;
  open.select({ bayId: first.id });
  open.say(count === 1 ? `Bay ${first.name} added to run ${run.name}.` : `${what}, ${first.name} to ${last}, added to run ${run.name}.`);
  return null;
}

/** An empty bay like the chosen one, to its right. */
export function addBayAfter(open: OpenSite): void {
  const { run, bay } = open;
  if (run === null) return;
  if (bay === null) return addBayTo(open, run);
  addBays(open, run, planOfBay(open.site, bay.id, 'without goods'), { after: run.bays.indexOf(bay), count: 1 });
}

/** An empty bay at the right end of the run, like its last one. */
export function addBayTo(open: OpenSite, run: Run): void {
  const last = run.bays.at(-1);
  const plan = last ? planOfBay(open.site, last.id, 'without goods') : firstBay(open.reading.units);
  addBays(open, run, plan, { after: run.bays.length - 1, count: 1 });
}

export function duplicateBayHere(open: OpenSite): void {
  if (open.run !== null && open.bay !== null) copyBay(open, open.run, open.bay);
}

export function copyBay(open: OpenSite, run: Run, bay: Bay): void {
  const name = nextName(bay.name, bayNames(open.site));
  const refused = open.edit(`Duplicate bay ${bay.name}`, (site) =>
    duplicateBay(site, bay.id, { name, frameName: newFrameName(run, name, run.bays.indexOf(bay) + 1), newId }),
  );
  if (refused !== null) return;
  open.select({ bayId: open.site.runs.find(({ id }) => id === run.id)?.bays[run.bays.indexOf(bay) + 1]?.id ?? null });
  open.say(`Bay ${bay.name} duplicated as bay ${name}.`);
}

export function removeBayHere(open: OpenSite): void {
  if (open.run !== null && open.bay !== null) removeBayFrom(open, open.run, open.bay);
}

export function removeBayFrom(open: OpenSite, run: Run, bay: Bay): void {
  const neighbour = afterBay(open.site, bay.id);
  if (open.edit(`Delete bay ${bay.name}`, (site) => removeBay(site, bay.id)) !== null) return;
  open.goOnTo(neighbour);
  open.say(`Bay ${bay.name} of run ${run.name} deleted. Undo brings it back.`);
}

export function shiftBay(open: OpenSite, run: Run, bay: Bay, by: 1 | -1): void {
  const side = by > 0 ? 'right' : 'left';
  if (run.bays[run.bays.indexOf(bay) + by] === undefined) return open.say(`No bay of run ${run.name} stands further ${side}.`);
  if (open.edit(`Move bay ${bay.name} ${side}`, (site) => moveBay(site, bay.id, run.bays.indexOf(bay) + by)) === null)
    open.say(`Bay ${bay.name} moved ${side}. The frames stay where they stand.`);
}

export const changeBay = (open: OpenSite, bay: Bay, what: string, part: Partial<Bay>): Refused | null =>
  open.edit(`Change ${what} of bay ${bay.name}`, (site) => editBay(site, bay.id, part));

export const changeRun = (open: OpenSite, run: Run, what: string, part: Partial<Omit<Run, 'bays' | 'frames'>>): Refused | null =>
  open.edit(`Change ${what} of run ${run.name}`, (site) => editRun(site, run.id, part));

export function copyRun(open: OpenSite, run: Run): void {
  const name = nextRunName(new Set(open.site.runs.map((one) => one.name)));
  const renamed = (text: string) => (text.startsWith(run.name) ? name + text.slice(run.name.length) : text);
  const taken = new Set(bayNames(open.site));
  const bays = run.bays.map((bay) => {
    const wanted = renamed(bay.name);
    const free = taken.has(wanted) ? nextName(wanted, taken) : wanted;
    taken.add(free);
    return copyOfBay(bay, free, newId);
  });
  const frames = run.frames.map((frame) => copyOfFrame(frame, frame.name.split('|').map(renamed).join('|'), newId));
  const copy: Run = { ...run, id: newId(), name, backToBack: null, frames, bays };
  if (open.edit(`Duplicate run ${run.name}`, (site) => addRun(site, copy)) === null) open.say(`Run ${run.name} duplicated as run ${name}.`);
}

export function shiftRun(open: OpenSite, run: Run, by: 1 | -1): void {
  const index = open.site.runs.findIndex((one) => one.id === run.id);
  const way = by > 0 ? 'down' : 'up';
  if (open.site.runs[index + by] === undefined) return open.say(`Run ${run.name} is the ${by > 0 ? 'last' : 'first'} of the site.`);
  if (open.edit(`Move run ${run.name} ${way}`, (site) => moveRun(site, run.id, index + by)) === null)
    open.say(`Run ${run.name} moved ${way}.`);
}

export function removeRunFrom(open: OpenSite, run: Run): void {
  const neighbour = afterRun(open.site, run.id);
  if (open.edit(`Delete run ${run.name}`, (site) => removeRun(site, run.id)) !== null) return;
  open.goOnTo(neighbour);
  open.say(`Run ${run.name} with ${countOf(run.bays.length, 'bay')} deleted. Undo brings it back.`);
}

/** An empty level on top. */
export function addLevelOnTop(open: OpenSite): void {
  const { bay } = open;
  if (bay === null) return;
  const level: Level = {
    id: newId(),
    heightMm: nextHeight(bay.levels, open.reading.units),
    beamTypeId: bay.levels.at(-1)?.beamTypeId ?? null,
    locks: 'unknown',
    deck: { kind: 'none' },
    beamDamages: [],
    sags: [],
    placements: [],
  };
  putOnTop(open, bay, `Add a level to bay ${bay.name}`, (site) => addLevel(site, bay.id, level));
}

export function duplicateLevelHere(open: OpenSite): void {
  const { bay, level } = open;
  if (bay === null || level === null) return;
  putOnTop(open, bay, `Duplicate level ${bay.levels.indexOf(level) + 1} of bay ${bay.name}`, (site) =>
    duplicateLevel(site, level.id, nextHeight(bay.levels, open.reading.units), newId),
  );
}

function putOnTop(open: OpenSite, bay: Bay, what: string, put: (site: Site) => Site): void {
  if (open.edit(what, put) !== null) return;
  open.select({ levelId: bayPlace(open.site, bay.id)?.bay.levels.at(-1)?.id ?? null });
  open.say(`Level ${bay.levels.length + 1} added to bay ${bay.name}.`);
}

/** As far above the highest level as that is above the one below it; a first level where new runs have theirs. */
export function nextHeight(levels: readonly Pick<Level, 'heightMm'>[], units: UnitSystem): number {
  const top = levels.at(-1)?.heightMm ?? 0;
  return top + (top - (levels.at(-2)?.heightMm ?? 0) || firstSizes(units).pitchMm);
}

export function removeLevelHere(open: OpenSite): void {
  const { bay, level } = open;
  if (bay === null || level === null) return;
  const number = bay.levels.indexOf(level) + 1;
  const neighbour = afterLevel(open.site, level.id);
  if (open.edit(`Delete level ${number} of bay ${bay.name}`, (site) => removeLevel(site, level.id)) !== null) return;
  open.goOnTo(neighbour);
  open.say(`Level ${number} of bay ${bay.name} deleted with its goods. Undo brings it back.`);
}

/** The chosen level one hole up (+1) or down (−1), by the holes of the bay's frames; it never passes a neighbour. */
export function shiftLevelHere(open: OpenSite, by: 1 | -1): void {
  const { run, bay, level } = open;
  if (run === null || bay === null || level === null) return;
  const index = bay.levels.indexOf(level);
  const heightMm = nextHole(level.heightMm, holesOf(open.site, run, run.bays.indexOf(bay)).pitch, by);
  const next = bay.levels[index + by]?.heightMm ?? (by > 0 ? Infinity : 0);
  if (by > 0 ? heightMm >= next : heightMm <= next)
    return open.say(
      by > 0 ? 'The level above is in the way.' : index === 0 ? 'This level is as low as it goes.' : 'The level below is in the way.',
    );
  const name = `Move level ${index + 1} of bay ${bay.name} ${by > 0 ? 'up' : 'down'}`;
  if (open.edit(name, (site) => moveLevel(site, level.id, heightMm), `height ${level.id}`) === null)
    open.sayDone(`Level ${index + 1} of bay ${bay.name} now at ${formatQuantity(lengthOf(heightMm), open.reading)}.`);
}

/** The chosen level and the one above (+1) or below (−1) exchange their heights, each with its beams and goods. */
export function swapLevelHere(open: OpenSite, by: 1 | -1): void {
  const { bay, level } = open;
  if (bay === null || level === null) return;
  const number = bay.levels.indexOf(level) + 1;
  const other = bay.levels[number - 1 + by];
  if (other === undefined) return open.say(by > 0 ? 'This is the highest level of the bay.' : 'This is the lowest level of the bay.');
  if (open.edit(`Swap levels ${number} and ${number + by} of bay ${bay.name}`, (site) => swapLevels(site, level.id, other.id)) === null)
    open.sayDone(`Levels ${number} and ${number + by} of bay ${bay.name} swapped, each with its beams and goods.`);
}

/** Gives other bays, of whichever run, what the chosen one has. */
export function fillLike(open: OpenSite, targets: readonly Bay[], what: 'levels' | 'levels and goods' | 'goods'): void {
  const pattern = open.bay;
  if (pattern === null || targets.length === 0) return;
  const ids = targets.map((bay) => bay.id);
  const done = open.edit(`Give ${countOf(ids.length, 'bay')} the ${what} of bay ${pattern.name}`, (site) =>
    fillBays(site, pattern.id, ids, what, newId),
  );
  if (done === null) open.say(`${countOf(ids.length, 'bay')} filled like bay ${pattern.name}.`);
}

/** Gives other frames the type, height and anchoring of one; surveys and damages stay their own. */
export function likeFrame(open: OpenSite, { name, typeId, heightMm, anchored, restrained }: Frame, others: readonly Frame[]): void {
  const what = countOf(others.length, 'frame');
  const refused = open.edit(`Make ${what} like frame ${name}`, (site) =>
    others.reduce((next, { id }) => editFrame(next, id, { typeId, heightMm, anchored, restrained }), site),
  );
  if (refused === null) open.sayDone(`${what} now like frame ${name}.`);
}

/** Gives other levels the beams, locks and deck of one; heights and goods stay their own. */
export function likeLevel(open: OpenSite, { beamTypeId, locks, deck }: Level, others: readonly Level[]): void {
  const what = countOf(others.length, 'level');
  const refused = open.edit(`Give ${what} the same beams, locks and deck`, (site) =>
    others.reduce((next, { id }) => editLevel(next, id, { beamTypeId, locks, deck }), site),
  );
  if (refused === null) open.sayDone(`${what} now with the same beams, locks and deck.`);
}
