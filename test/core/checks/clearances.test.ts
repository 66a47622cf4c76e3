import { expect, test } from 'vitest';
import { clearanceAbove, type ClearanceAboveInput } from '../../../src-core/checks/clearance-above';
import { clearanceAcross, type BackOfGoods } from '../../../src-core/checks/clearance-across';
import { clearanceAlong, clearEntryNeeded, type ClearanceAlongInput, type LeaningOutline } from '../../../src-core/checks/clearance-along';
import { clearanceKeys, type LoadedBy } from '../../../src-core/checks/clearance-rules';
import { resolveRules, type RuleSetName } from '../../../src-core/checks/rule-sets';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const rulesOf = (set: RuleSetName = 'european', changed: Parameters<typeof resolveRules>[0]['changed'] = []) =>
  resolveRules({ set, changed });
const place = { runId: 'r' };
const missing = { input: 'what puts goods away in run A', how: 'State it.', field: 'run:r:loadedBy' };
const handling = (loadedBy: LoadedBy = 'class-400') => ({ loadedBy, missing });

const outline = (placementId: string, from: number, width: number, part: Partial<LeaningOutline> = {}): LeaningOutline => ({
  placementId,
  name: placementId,
  from,
  to: from + width,
  rear: -600,
  front: 600,
  lean: 0,
  ...part,
});

const along = (goods: readonly LeaningOutline[], part: Partial<ClearanceAlongInput> = {}) =>
  clearanceAlong({ place, level: 'Level 1', height: 1500, clearEntry: 2700, goods, handling: handling(), rules: rulesOf(), ...part });

test('2 625 and 2 700 mm clear entries come out of the 75 mm rule', () => {
  // 2 × 1 200 + 3 × 75 and 3 × 800 + 4 × 75: UK trade association Q&A, December 2014 (F-55)
  expect(clearEntryNeeded([1200, 1200], 75, 75)).toBe(2625);
  expect(clearEntryNeeded([800, 800, 800], 75, 75)).toBe(2700);
  expect(clearEntryNeeded([], 75, 75)).toBe(0);
});

test.each([
  [2625, [1200, 1200]],
  [2700, [800, 800, 800]],
])('goods with gaps of exactly 75 mm in %d mm are within, and one millimetre less is over', (clearEntry, widths) => {
  let from = 75;
  const row = widths.map((width, i) => {
    const one = outline(`P${i + 1}`, from, width);
    from += width + 75;
    return one;
  });
  const found = along(row, { clearEntry });
  expect(found.map(({ verdict }) => verdict)).toEqual(['within']);
  expect(found[0]?.notes.map(plain)[0]).toBe(
    `Side by side these goods need a clear entry of ${clearEntry} mm; the bay has ${clearEntry} mm.`,
  );
  const tight = along(row, { clearEntry: clearEntry - 1 });
  expect(tight.map(({ verdict, place: { placementId } }) => [verdict, placementId])).toEqual([['over', `P${widths.length}`]]);
  expect(plain(tight[0]?.says ?? [])).toContain('there is 74 mm, and 75 mm is needed');
});

test('each gap that is too small is named with its neighbours', () => {
  const found = along([outline('a', 20, 800), outline('b', 870, 800), outline('c', 1850, 800)]);
  // left 20, between a and b 50, between b and c 180, right 2 700 − 2 650 = 50
  expect(found.map((one) => [plain(one.says).split(' there')[0], one.allowed?.value])).toEqual([
    ['Between the left upright and a', 20],
    ['Between a and b', 50],
    ['Between c and the right upright', 50],
  ]);
  for (const one of found) expectWorked(one);
  expect(found[1]?.utilisation).toBeCloseTo(75 / 50, 12);
});

test('a lean takes its offset off the gap it leans into, and none off the other', () => {
  const found = along([outline('a', 75, 800, { lean: 30 }), outline('b', 950, 800)], { clearEntry: 1825 });
  expect(found.map(({ allowed }) => allowed?.value)).toEqual([45]);
  const mirrored = along([outline('a', 75, 800, { lean: -30 }), outline('b', 950, 800)], { clearEntry: 1825 });
  expect(mirrored.map((one) => plain(one.says))).toEqual([
    'Between the left upright and a there is 45 mm, and 75 mm is needed. Move them apart, or put fewer or narrower goods here.',
  ]);
  for (const one of [...found, ...mirrored]) expectWorked(one);
});

test('goods that lean into each other have no room', () => {
  const [found] = along([outline('a', 75, 800, { lean: 60 }), outline('b', 900, 800, { lean: -20 })]);
  expect(found?.verdict).toBe('over');
  expect(found?.utilisation).toBe(Infinity);
  expect(plain(found?.says ?? [])).toContain('there is no room');
});

test('goods one behind the other across the level are no neighbours along it', () => {
  const found = along([outline('front', 75, 800, { rear: 0 }), outline('rear', 300, 800, { front: 0 })], { clearEntry: 1200 });
  expect(found.map(({ verdict }) => verdict)).toEqual(['within']);
});

test.each<[RuleSetName, LoadedBy, number, number, number, number]>([
  // F-62 to F-70: to upright, between loads, above the load
  ['european', 'class-400', 3000, 75, 75, 75],
  ['european', 'class-400', 3001, 75, 75, 100],
  ['european', 'class-400', 6000, 75, 75, 100],
  ['european', 'class-400', 9000, 75, 75, 125],
  ['european', 'class-400', 13_000, 100, 100, 150],
  ['european', 'class-300a', 9000, 75, 75, 75],
  ['european', 'class-300b', 3000, 75, 75, 75],
  ['european', 'class-300b', 13_000, 100, 100, 150],
  ['european', 'class-300b', 15_000, 100, 100, 175],
  ['united-states', 'class-400', 5000, 76.2, 101.6, 101.6],
  ['australian', 'class-400', 5999, 75, 100, 100],
  ['australian', 'class-400', 6001, 75, 100, 125],
  ['australian', 'class-300a', 7000, 75, 100, 100],
])('%s, %s, %d mm up: %d, %d and %d mm', (set, loadedBy, height, upright, loads, above) => {
  const keys = clearanceKeys(loadedBy, height);
  const { value } = rulesOf(set);
  expect(keys && [value[keys.upright], value[keys.loads], value[keys.above]].map((mm) => Number(mm.toFixed(9)))).toEqual([
    upright,
    loads,
    above,
  ]);
});

test.each<[LoadedBy, number]>([
  ['class-400', 13_001],
  ['class-300a', 9001],
  ['class-300b', 15_001],
])('%s states no clearance above %d mm, which is not assessable', (loadedBy, height) => {
  expect(clearanceKeys(loadedBy, height)).toBeNull();
  const [found] = along([outline('a', 500, 800)], { height, handling: handling(loadedBy) });
  expect(found?.verdict).toBe('not-assessable');
  expect(found?.missing[0]?.how).toContain('Ask the suppliers');
});

test('an unknown class is not assessable, goods put away by hand need no clearance', () => {
  const [unknown] = along([outline('a', 0, 800)], { handling: handling('unknown') });
  expect(unknown?.missing).toEqual([missing]);
  expect(along([outline('a', 0, 800)], { handling: handling('by-hand') })[0]?.verdict).toBe('within');
  expect(along([], { handling: handling('unknown') })[0]?.verdict).toBe('within');
});

test('a changed clearance is used and named as changed', () => {
  const rules = rulesOf('european', [{ key: 'clearanceUprightTo3m', value: 50, reason: 'guide rails' }]);
  const [found] = along([outline('a', 50, 800)], { rules, clearEntry: 900 });
  expect(found?.verdict).toBe('within');
  expect(found?.notes.map(plain).join(' ')).toContain('changed from the European rule set: guide rails');
});

const above = (height: number, part: Partial<ClearanceAboveInput> = {}, sag = 5) =>
  clearanceAbove({
    place,
    level: 'Level 1',
    height: 1500,
    goods: [
      { placementId: 'low', name: 'Low', height: 800 },
      { placementId: 'tall', name: 'Tall', height },
    ],
    beam: { level: 'level 2', top: 3000, beamHeight: 120, missing: [], sag, sagFrom: 'computed from the goods on it' },
    handling: handling(),
    rules: rulesOf(),
    ...part,
  });

test.each([
  // 3 000 − 120 − 5 − 1 500 − h against 75
  [1300, 'within', 75],
  [1301, 'over', 74],
  [1375, 'over', 0],
  [1380, 'over', -5],
  [1381, 'not-possible', -6],
])('goods %d mm high under a beam that sags 5 mm: %s, %d mm left', (height, verdict, room) => {
  const [found, ...others] = above(height);
  expect(others).toEqual([]);
  expect(found?.verdict).toBe(verdict);
  expect(found?.allowed?.value).toBeCloseTo(room, 9);
  expect(found?.place.placementId).toBe('tall');
  if (found) expectWorked(found);
});

test('the sag of the beam above decides, and its origin is told', () => {
  expect(above(1300, {}, 13.5)[0]?.verdict).toBe('over');
  expect(above(1300)[0]?.notes.map(plain)[0]).toContain('hang through by 5 mm: computed from the goods on it');
});

test('without a beam above there is nothing to meet; with one of unknown height it is not assessable', () => {
  expect(above(5000, { beam: null })[0]?.verdict).toBe('within');
  const height = { input: 'beam type of level 2', how: 'Choose it.', field: 'level:l2:beamTypeId' };
  const beam = { level: 'level 2', top: 3000, beamHeight: null, missing: [height], sag: 0, sagFrom: '' };
  expect(above(800, { beam })[0]?.missing).toEqual([height]);
  expect(above(800, { handling: handling('unknown') })[0]?.missing).toEqual([missing]);
});

test('goods put away by hand only have to fit', () => {
  expect(above(1375, { handling: handling('by-hand') })[0]?.verdict).toBe('within');
  expect(above(1376, { handling: handling('by-hand') })[0]?.verdict).toBe('over');
});

const back = (placementId: string, past: number, part: Partial<BackOfGoods> = {}): BackOfGoods => ({
  placementId,
  name: placementId,
  bottom: 1500,
  top: 2500,
  from: 75,
  to: 875,
  past,
  ...part,
});
const across = (
  goods: readonly BackOfGoods[],
  gap: number,
  behind: readonly BackOfGoods[],
  part: Partial<Parameters<typeof clearanceAcross>[0]> = {},
) =>
  clearanceAcross({
    place,
    level: 'Level 1',
    goods,
    behind: { run: 'B', gap, goods: behind },
    handling: handling(),
    missing: [],
    rules: rulesOf(),
    ...part,
  });

test.each([
  // gap between the frames less 50 mm of overhang each side, against 100 mm (F-68)
  [200, 'within', 100],
  [199, 'over', 99],
  [100, 'over', 0],
  [90, 'not-possible', -10],
])('loads back to back over a gap of %d mm: %s, %d mm', (gap, verdict, room) => {
  const found = across([back('a', 50)], gap, [back('b', 50)]);
  expect(found.verdict).toBe(verdict);
  expect(found.allowed?.value).toBeCloseTo(room, 9);
  if (verdict !== 'not-possible') expectWorked(found);
  // below 100 mm a push-through stop is needed as well (F-73)
  expect(found.notes.map(plain).join(' ').includes('push-through stop')).toBe(room < 100);
});

test('only goods that stand behind each other in height and along the bay meet', () => {
  expect(across([back('a', 50)], 120, [back('b', 50, { bottom: 2500, top: 3500 })]).verdict).toBe('within');
  expect(across([back('a', 50)], 120, [back('b', 50, { from: 875, to: 1600 })]).verdict).toBe('within');
  expect(across([back('a', 50)], 120, [back('b', 50, { from: 874, to: 1600 })]).verdict).toBe('over');
});

test('nothing behind is within; an unknown depth or class is not assessable', () => {
  expect(across([back('a', 50)], 0, [], { behind: null }).verdict).toBe('within');
  const depth = { input: 'type of frame F1', how: 'Choose it.', field: 'frame:f1:typeId' };
  expect(across([back('a', 50)], 200, [back('b', 50)], { missing: [depth] }).missing).toEqual([depth]);
  expect(across([back('a', 50)], 200, [back('b', 50)], { handling: handling('unknown') }).missing).toEqual([missing]);
});

test('the United States set asks for a flue of 6 in', () => {
  // 6 × 25.4 = 152.4 (F-71, from memory of NFPA 13)
  const found = across([back('a', 50)], 250, [back('b', 50)], { rules: rulesOf('united-states') });
  expect(found.demand?.value).toBeCloseTo(152.4, 9);
  expect(found.verdict).toBe('over');
  expect(found.notes.map(plain).join(' ')).toContain('to be confirmed');
});
