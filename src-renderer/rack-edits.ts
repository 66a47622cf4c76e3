/** Changing the rack itself: runs, bays and levels added, copied, moved and taken out. Each is one step of undo. */
import type { LoadedBy } from '../src-core/checks/clearance-rules';
import { copyOfBay, copyOfFrame, copyOfLevel } from '../src-core/site/copies';
import {
  addBay,
  addEntry,
  addLevel,
  addRun,
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
} from '../src-core/site/edits';
import { holesOf, nextHole } from '../src-core/site/holes';
import { evenPlan, runByPlan } from '../src-core/site/new-site';
import type { Bay, Frame, Id, Level, LoadNotice, Run, Site } from '../src-core/site/site';
import { formatQuantity } from '../src-core/units/format';
import { lengthOf } from '../src-core/units/quantity';
import { newId } from './ids';
import { nextName, nextRunName } from './names';
import { afterBay, afterLevel, afterRun } from './neighbours';
import type { OpenSite } from './open-site.svelte';
import type { Refused } from './refusal';
import { countOf } from './say';

export interface RunPlan {
  readonly name: string;
  readonly bays: number;
  readonly clearEntryMm: number;
  readonly levels: number;
  /** Floor to top of the first beam, and from beam to beam. */
  readonly firstBeamMm: number;
  readonly pitchMm: number;
  readonly noticeId: Id | null;
  readonly beamTypeId: Id | null;
  readonly frameTypeId: Id | null;
  readonly floorId: Id | null;
  readonly loadedBy: LoadedBy;
}

/**
 * @param notice a load notice that is entered together with the run
 * @returns why it was refused, as a sentence; null if it was made
 */
export function layOutRun(open: OpenSite, plan: RunPlan, notice: LoadNotice | null): Refused | null {
  const { name, bays: count, floorId } = plan;
  const run: Run = { ...runByPlan(evenPlan(plan), { name, count, floorId, newId }), loadedBy: plan.loadedBy };
  const refused = open.edit(`Lay out run ${name}`, (site) => addRun(notice === null ? site : addEntry(site, 'notices', notice), run));
  if (refused !== null) return refused;
  const bay = run.bays[0];
  open.select({ runId: run.id, bayId: bay?.id ?? null });
  open.select({ levelId: bay?.levels[0]?.id ?? null });
  open.say(`Run ${name} laid out: ${countOf(count, 'bay')} of ${countOf(plan.levels, 'level')}.`);
  return null;
}

const bayNames = (site: Site): ReadonlySet<string> => new Set(site.runs.flatMap((run) => run.bays.map((bay) => bay.name)));

const withoutGoods = (bay: Bay): Bay => ({ ...bay, levels: bay.levels.map((level) => ({ ...level, placements: [] })), onFloor: [] });

/** Everything of a first bay that nobody has stated is not known. */
const firstBay = (name: string): Bay =>
  runByPlan(
    evenPlan({ clearEntryMm: 2700, levels: 3, firstBeamMm: 1500, pitchMm: 1500, noticeId: null, beamTypeId: null, frameTypeId: null }),
    { name, count: 1, floorId: null, newId },
  ).bays.map((bay) => ({ ...bay, name }))[0] as Bay;

/** The frame that closes a bay which is put in after `index`. */
function frameAfter(run: Run, index: number, bayName: string): Frame {
  const like = (run.frames[index + 1] ?? run.frames.at(-1)) as Frame;
  return copyOfFrame(like, `${bayName}|`, newId);
}

function insertBay(open: OpenSite, run: Run, bay: Bay, after: number, what: string): void {
  if (open.edit(what, (site) => addBay(site, run.id, bay, frameAfter(run, after, bay.name), after + 1)) !== null) return;
  open.select({ bayId: bay.id });
  open.say(`Bay ${bay.name} added to run ${run.name}.`);
}

/** An empty bay like the chosen one, to its right. */
export function addBayAfter(open: OpenSite): void {
  const { run, bay } = open;
  if (run === null) return;
  if (bay === null) return addBayTo(open, run);
  const name = nextName(bay.name, bayNames(open.site));
  insertBay(open, run, copyOfBay(withoutGoods(bay), name, newId), run.bays.indexOf(bay), `Add bay ${name}`);
}

/** An empty bay at the right end of the run, like its last one. */
export function addBayTo(open: OpenSite, run: Run): void {
  const last = run.bays.at(-1);
  const name = nextName(last?.name ?? `${run.name}0`, bayNames(open.site));
  const bay = last ? copyOfBay(withoutGoods(last), name, newId) : firstBay(name);
  insertBay(open, run, bay, run.bays.length - 1, `Add bay ${name}`);
}

export function duplicateBayHere(open: OpenSite): void {
  if (open.run !== null && open.bay !== null) copyBay(open, open.run, open.bay);
}

export function copyBay(open: OpenSite, run: Run, bay: Bay): void {
  const name = nextName(bay.name, bayNames(open.site));
  insertBay(open, run, copyOfBay(bay, name, newId), run.bays.indexOf(bay), `Duplicate bay ${bay.name}`);
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
  open.edit(`Move run ${run.name} ${by > 0 ? 'down' : 'up'}`, (site) => moveRun(site, run.id, index + by));
}

export function removeRunFrom(open: OpenSite, run: Run): void {
  const neighbour = afterRun(open.site, run.id);
  if (open.edit(`Delete run ${run.name}`, (site) => removeRun(site, run.id)) !== null) return;
  open.goOnTo(neighbour);
  open.say(`Run ${run.name} with ${countOf(run.bays.length, 'bay')} deleted. Undo brings it back.`);
}

/** A level on top, as far above the highest as that is above the one below it. */
export function addLevelOnTop(open: OpenSite): void {
  const { bay } = open;
  if (bay === null) return;
  const level: Level = {
    id: newId(),
    heightMm: nextHeight(bay),
    beamTypeId: bay.levels.at(-1)?.beamTypeId ?? null,
    locks: 'unknown',
    deck: { kind: 'none' },
    beamDamages: [],
    sags: [],
    placements: [],
  };
  putOnTop(open, bay, level, `Add a level to bay ${bay.name}`);
}

export function duplicateLevelHere(open: OpenSite): void {
  const { bay, level } = open;
  if (bay === null || level === null) return;
  const copy = { ...copyOfLevel(level, newId), heightMm: nextHeight(bay) };
  putOnTop(open, bay, copy, `Duplicate level ${bay.levels.indexOf(level) + 1} of bay ${bay.name}`);
}

function putOnTop(open: OpenSite, bay: Bay, level: Level, what: string): void {
  if (open.edit(what, (site) => addLevel(site, bay.id, level)) !== null) return;
  open.select({ levelId: level.id });
  open.say(`Level ${bay.levels.length + 1} added to bay ${bay.name}.`);
}

function nextHeight(bay: Bay): number {
  const top = bay.levels.at(-1)?.heightMm ?? 0;
  return top + (top - (bay.levels.at(-2)?.heightMm ?? 0) || 1500);
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

/** Gives other bays the goods, or the levels and goods, of the chosen one. */
export function fillLike(open: OpenSite, targets: readonly Bay[], what: 'goods' | 'levels and goods'): void {
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
