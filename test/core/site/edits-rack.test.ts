import { expect, test } from 'vitest';
import {
  addBay,
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
  pasteLevel,
  removeBay,
  removeLevel,
  removeRun,
  swapLevels,
} from '../../../src-core/site/edits';
import { findBay, findFrame, findLevel, findRun } from '../../../src-core/site/lookup';
import { planOfBay, evenPlan, newSite, runByPlan } from '../../../src-core/site/new-site';
import { readSite } from '../../../src-core/site/read';
import type { Bay, Site } from '../../../src-core/site/site';
import { makeBay, makeFrame, makeLevel, makeNotice, makePlacement, makeRun, makeSite, makeUnitLoad } from '../../make';

const goods = makeUnitLoad({ id: 'goods' });
const notice = makeNotice({ id: 'notice' });

function bayOf(id: string): Bay {
  const level = (n: number) =>
    makeLevel([], { id: `${id}-l${n}`, heightMm: 1500 * n, placements: [makePlacement('goods', 75, { id: `${id}-l${n}-g` })] });
  return makeBay([level(1), level(2)], {
    id,
    name: id.toUpperCase(),
    noticeId: 'notice',
    onFloor: [makePlacement('goods', 0, { id: `${id}-floor` })],
  });
}

function runOf(id: string, bays: number) {
  const frames = Array.from({ length: bays + 1 }, (_, i) => makeFrame({ id: `${id}-f${i}`, name: `${id}-F${i}`, heightMm: 5000 + i }));
  return makeRun(
    Array.from({ length: bays }, (_, i) => bayOf(`${id}${i + 1}`)),
    { id, name: id.toUpperCase(), frames },
  );
}

const site: Site = makeSite({ id: 'site', unitLoads: [goods], notices: [notice], runs: [runOf('a', 3), runOf('b', 2)] });

let made = 0;
const newId = () => `new-${++made}`;

const names = (given: Site, runId = 'a') => findRun(given, runId).bays.map(({ name }) => name);
const frames = (given: Site, runId = 'a') => findRun(given, runId).frames.map(({ id }) => id);
const heights = (given: Site, bayId = 'a1') => findBay(given, bayId).bay.levels.map(({ heightMm }) => heightMm);

/** Every edit leaves the given site as it was and gives one that can be saved and read. */
function sound(after: Site): Site {
  expect(readSite(JSON.parse(JSON.stringify(after)))).toMatchObject({ ok: true });
  return after;
}

test('an edit of one bay leaves every other run, bay and frame the same object', () => {
  const after = editBay(site, 'a2', { clearEntryMm: 2500 });
  expect(after.runs[1]).toBe(site.runs[1]);
  expect(findRun(after, 'a').frames).toBe(findRun(site, 'a').frames);
  expect(findBay(after, 'a1').bay).toBe(findBay(site, 'a1').bay);
  expect(findBay(after, 'a2').bay.levels).toBe(findBay(site, 'a2').bay.levels);
  expect(findBay(site, 'a2').bay.clearEntryMm).toBe(2700);
});

test('an edit that changes nothing gives the same site back', () => {
  expect(editBay(site, 'a2', { clearEntryMm: 2700, name: 'A2' })).toBe(site);
  expect(editLevel(site, 'a1-l1', { heightMm: 1500 })).toBe(site);
  expect(editFrame(site, 'a-f0', { anchored: 'yes' })).toBe(site);
  expect(moveBay(site, 'a2', 1)).toBe(site);
  expect(moveRun(site, 'b', 1)).toBe(site);
});

test('a bay goes in with a new frame to its right', () => {
  const after = sound(addBay(site, 'a', makeBay([], { id: 'n', name: 'N' }), makeFrame({ id: 'nf' }), 1));
  expect(names(after)).toEqual(['A1', 'N', 'A2', 'A3']);
  expect(frames(after)).toEqual(['a-f0', 'a-f1', 'nf', 'a-f2', 'a-f3']);
  expect(names(addBay(site, 'a', makeBay([], { id: 'n', name: 'N' }), makeFrame({ id: 'nf' })))).toEqual(['A1', 'A2', 'A3', 'N']);
});

test('a bay leaves with the frame to its right, the first one with the frame to its left', () => {
  expect(frames(sound(removeBay(site, 'a2')))).toEqual(['a-f0', 'a-f1', 'a-f3']);
  expect(frames(sound(removeBay(site, 'a1')))).toEqual(['a-f1', 'a-f2', 'a-f3']);
  expect(frames(sound(removeBay(site, 'a3')))).toEqual(['a-f0', 'a-f1', 'a-f2']);
  const last = ['a1', 'a2', 'a3'].reduce(removeBay, site);
  expect(findRun(sound(last), 'a').frames).toHaveLength(1);
});

test('bays and runs change places while the frames stay', () => {
  expect(names(moveBay(site, 'a1', 2))).toEqual(['A2', 'A3', 'A1']);
  expect(frames(moveBay(site, 'a1', 2))).toEqual(frames(site));
  expect(moveRun(site, 'b', 0).runs.map(({ id }) => id)).toEqual(['b', 'a']);
  expect(() => moveBay(site, 'a1', 3)).toThrow('There is no place 4 among 3. Choose one from 1 to 3.');
});

test('a duplicate has ids of its own and stands to the right; the new frame brings no damage along', () => {
  const damaged = editFrame(site, 'a-f1', {
    damages: [{ id: 'd', member: 'bracing', alongMm: 3, acrossMm: null, gaugeMm: 1000, torn: false, note: '', found: '' }],
    plumb: { alongMm: 1, acrossMm: 1, heightMm: 3000, loaded: true },
  });
  const after = sound(duplicateBay(damaged, 'a1', { name: 'A1b', frameName: 'F new', newId }));
  expect(names(after)).toEqual(['A1', 'A1b', 'A2', 'A3']);
  const [original, copy] = findRun(after, 'a').bays;
  expect(copy?.levels.map(({ placements }) => placements.map(({ atMm }) => atMm))).toEqual([[75], [75]]);
  expect(copy?.levels[0]?.id).not.toBe(original?.levels[0]?.id);
  expect(findRun(after, 'a').frames[2]).toMatchObject({ name: 'F new', heightMm: 5001, damages: [], plumb: null, anchored: 'unknown' });
});

test('whatever is copied, what was seen at the rack is not taken along', () => {
  const seen = editLevel(site, 'a1-l1', {
    locks: 'yes',
    beamDamages: [{ id: 'dent', beam: 'front', member: 'beam', torn: false, note: '', found: '' }],
  });
  const copies = [
    duplicateBay(seen, 'a1', { name: 'A1b', frameName: 'F new', newId }).runs[0]?.bays[1]?.levels[0],
    findBay(duplicateLevel(seen, 'a1-l1', 6000, newId), 'a1').bay.levels.at(-1),
    findBay(pasteLevel(seen, 'b1', findLevel(seen, 'a1-l1').level, newId), 'b1').bay.levels[0],
    findBay(fillBays(seen, 'a1', ['b2'], 'levels and goods', newId), 'b2').bay.levels[0],
  ];
  expect(copies.map((level) => [level?.locks, level?.beamDamages, level?.placements.length])).toEqual(copies.map(() => ['unknown', [], 1]));
});

test('levels stand in order of height, whatever the order in which they came', () => {
  expect(heights(sound(addLevel(site, 'a1', makeLevel([], { id: 'n', heightMm: 2200 }))))).toEqual([1500, 2200, 3000]);
  const moved = sound(moveLevel(site, 'a1-l1', 4000));
  expect(findBay(moved, 'a1').bay.levels.map(({ id }) => id)).toEqual(['a1-l2', 'a1-l1']);
  expect(() => moveLevel(site, 'a1-l1', 3000)).toThrow(/Levels go from the lowest up, but two have 3000/);
  expect(() => moveLevel(site, 'a1-l1', 0)).toThrow(/heightMm: Must be a number of mm above 0 .* but is 0/);
  expect(heights(sound(removeLevel(site, 'a1-l1')))).toEqual([3000]);
});

test('a level is copied with its goods, and pasted over one at the same height', () => {
  const doubled = sound(duplicateLevel(site, 'a1-l2', 4500, newId));
  expect(heights(doubled)).toEqual([1500, 3000, 4500]);
  const bare = editLevel(site, 'b1-l1', { placements: [] });
  const pasted = sound(pasteLevel(bare, 'b1', findLevel(site, 'a1-l1').level, newId));
  expect(heights(pasted, 'b1')).toEqual([1500, 3000]);
  expect(findBay(pasted, 'b1').bay.levels[0]?.placements).toHaveLength(1);
  expect(() => findLevel(pasted, 'b1-l1')).toThrow('there is no level with the id "b1-l1" in this site');
});

test('two levels of a bay change places with all that stands on them; levels of two bays do not', () => {
  const after = sound(swapLevels(site, 'a1-l1', 'a1-l2'));
  const { bay } = findBay(after, 'a1');
  expect(bay.levels.map(({ id, heightMm, placements }) => [id, heightMm, placements[0]?.id])).toEqual([
    ['a1-l2', 1500, 'a1-l2-g'],
    ['a1-l1', 3000, 'a1-l1-g'],
  ]);
  expect(swapLevels(after, 'a1-l2', 'a1-l1')).toEqual(site);
  expect(() => swapLevels(site, 'a1-l1', 'a2-l2')).toThrow('Only levels of the same bay change places.');
});

test('bays are filled from one bay with its goods, its levels, or both', () => {
  const bare = ['a2-l1', 'a2-l2', 'a3-l1'].reduce((next, id) => editLevel(next, id, { placements: [] }), moveLevel(site, 'a2-l2', 3300));
  const withGoods = sound(fillBays(bare, 'a1', ['a2', 'a3'], 'goods', newId));
  expect(findBay(withGoods, 'a2').bay.levels.map(({ heightMm, placements }) => [heightMm, placements.length])).toEqual([
    [1500, 1],
    [3300, 1],
  ]);
  const withLevels = sound(fillBays(bare, 'a1', ['a1', 'a2', 'b1'], 'levels', newId));
  expect(heights(withLevels, 'a2')).toEqual([1500, 3000]);
  expect(findBay(withLevels, 'a2').bay.levels.every(({ placements }) => placements.length === 0)).toBe(true);
  expect(findBay(withLevels, 'a1').bay).toBe(findBay(bare, 'a1').bay);
  expect(findBay(withLevels, 'a3').bay).toBe(findBay(bare, 'a3').bay);
  const both = sound(fillBays(bare, 'a1', ['b2'], 'levels and goods', newId));
  expect(findBay(both, 'b2').bay).toMatchObject({ id: 'b2', name: 'B2', onFloor: [{ unitLoadId: 'goods' }] });
});

test('a tie is made and undone on both runs', () => {
  const tie = { runId: 'b', gapMm: 200, rowSpacers: 'yes' as const };
  const tied = sound(editRun(site, 'a', { backToBack: tie }));
  expect(findRun(tied, 'b').backToBack).toEqual({ ...tie, runId: 'a' });
  expect(findRun(sound(editRun(tied, 'b', { backToBack: { ...tie, runId: 'a', gapMm: 250 } })), 'a').backToBack?.gapMm).toBe(250);
  expect(findRun(sound(editRun(tied, 'b', { backToBack: null })), 'a').backToBack).toBeNull();
  expect(findRun(sound(removeRun(tied, 'b')), 'a').backToBack).toBeNull();
  const three = addRun(tied, runOf('c', 1));
  const retied = sound(editRun(three, 'c', { backToBack: { ...tie, runId: 'a' } }));
  expect(['a', 'b', 'c'].map((id) => findRun(retied, id).backToBack?.runId ?? null)).toEqual(['c', null, 'a']);
  expect(() => editRun(site, 'a', { backToBack: { ...tie, runId: 'a' } })).toThrow(/cannot stand back to back with itself/);
  expect(() => editRun(site, 'a', { backToBack: { ...tie, gapMm: -1 } })).toThrow(/gapMm: Must be a number of mm from 0/);
});

test('a template gives runs like any bay of the site, without its goods', () => {
  const run = runByPlan(planOfBay(site, 'a1', 'without goods'), { name: 'C', count: 4, floorId: null, newId });
  const after = sound(addRun(site, run));
  expect(names(after, run.id)).toEqual(['C1', 'C2', 'C3', 'C4']);
  expect(run.frames.map(({ name }) => name)).toEqual(['C0|C1', 'C1|C2', 'C2|C3', 'C3|C4', 'C4|C5']);
  expect(run.bays[3]).toMatchObject({ clearEntryMm: 2700, noticeId: 'notice', onFloor: [] });
  expect(run.bays[3]?.levels.map(({ heightMm, placements }) => [heightMm, placements.length])).toEqual([
    [1500, 0],
    [3000, 0],
  ]);
});

test('a plan with goods lays out the goods in every bay, each with an id of its own, and nothing that has to be seen at the rack', () => {
  const seen = editLevel(site, 'a1-l1', {
    locks: 'yes',
    sags: [{ beam: 'front', loadedMm: 4, unloadedMm: null, sidewaysMm: null, found: '2026-11-30' }],
  });
  const run = runByPlan(planOfBay(seen, 'a1', 'with goods'), { name: 'C', count: 3, floorId: null, newId });
  const after = sound(addRun(seen, run));
  for (const { id } of run.bays) {
    const { bay } = findBay(after, id);
    expect(
      bay.levels.map(({ locks, sags, placements }) => [locks, sags.length, placements.map(({ unitLoadId, atMm }) => [unitLoadId, atMm])]),
    ).toEqual([
      ['unknown', 0, [['goods', 75]]],
      ['unknown', 0, [['goods', 75]]],
    ]);
    expect(bay.onFloor).toMatchObject([{ unitLoadId: 'goods', atMm: 0 }]);
  }
  const ids = run.bays.flatMap((bay) => [...bay.onFloor, ...bay.levels.flatMap(({ placements }) => placements)].map(({ id }) => id));
  expect(new Set(ids).size).toBe(9);
  // Frames stand to the right of the bay that was the plan, and are like it.
  expect(run.frames.map(({ heightMm }) => heightMm)).toEqual([5001, 5001, 5001, 5001]);
});

test('ten bays of five levels come from one template on an empty site', () => {
  const plan = { clearEntryMm: 2700, levels: 5, firstBeamMm: 1500, pitchMm: 1600, noticeId: null, beamTypeId: null, frameTypeId: null };
  const run = runByPlan(evenPlan(plan), { name: 'A', count: 10, floorId: null, newId });
  const after = sound(addRun(newSite('s', 'Depot'), run));
  expect(after.runs[0]?.bays.map(({ levels }) => levels.length)).toEqual(Array(10).fill(5));
  expect(heights(after, run.bays[9]?.id)).toEqual([1500, 3100, 4700, 6300, 7900]);
  expect(run.frames[0]?.heightMm).toBe(8200);
  expect(() => runByPlan(evenPlan(plan), { name: 'A', count: 1.5, floorId: null, newId })).toThrow(/whole number of bays, not 1.5/);
});

test.each<[string, () => Site, string]>([
  [
    'an id that is used already',
    () => addBay(site, 'a', makeBay([], { id: 'b2' }), makeFrame({ id: 'nf' })),
    'The id "b2" is used already',
  ],
  [
    'an id used twice in what is added',
    () => addBay(site, 'a', makeBay([], { id: 'n' }), makeFrame({ id: 'n' })),
    'The id "n" is used already',
  ],
  ['a notice that is not there', () => editBay(site, 'a1', { noticeId: 'gone' }), 'There is no load notice with the id "gone"'],
  ['a name without a letter', () => editRun(site, 'a', { name: ' ' }), 'name: Must be text'],
  ['an entry of no width', () => editBay(site, 'a1', { clearEntryMm: 0 }), 'clearEntryMm: Must be a number of mm above 0'],
  ['no number', () => editBay(site, 'a1', { clearEntryMm: Number.NaN }), 'but is NaN'],
  ['another id', () => editBay(site, 'a1', { id: 'z' }), 'The id "a1" stays as it is and cannot become "z"'],
  ['a bay that is not there', () => removeBay(site, 'gone'), 'there is no bay with the id "gone"'],
  ['a run that is not there', () => moveRun(site, 'gone', 0), 'there is no run with the id "gone"'],
  ['a frame that is not there', () => editFrame(site, 'gone', {}), 'there is no frame with the id "gone"'],
  ['a place beyond the run', () => addBay(site, 'a', makeBay(), makeFrame(), 9), 'A bay goes to a place from 1 to 4'],
])('%s is refused and quoted', (_, edit, says) => {
  const before = JSON.stringify(site);
  expect(edit).toThrow(RangeError);
  expect(edit).toThrow(says);
  expect(JSON.stringify(site)).toBe(before);
});

test('frames keep what is said of them', () => {
  expect(findFrame(editFrame(site, 'b-f1', { restrained: 'yes' }), 'b-f1').frame.restrained).toBe('yes');
});
