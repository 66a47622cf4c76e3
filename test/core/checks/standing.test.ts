/** How pallets stand: overhang, bearing on the beams, the spread on their runners, and the form of the goods. */
import { expect, test } from 'vitest';
import { goodsForm, type FormedGoods, type GoodsFormInput } from '../../../src-core/checks/goods-form';
import { overhang, type AcrossBeams, type OverhangInput } from '../../../src-core/checks/overhang';
import { palletBearing, type BearingPallet, type PalletBearingInput } from '../../../src-core/checks/pallet-bearing';
import { resolveRules } from '../../../src-core/checks/rule-sets';
import { runnerShares } from '../../../src-core/checks/runners';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const rules = resolveRules({ set: 'european', changed: [] });
const us = resolveRules({ set: 'united-states', changed: [] });
const place = { runId: 'r' };
const depthMissing = { input: 'type of frame F1', how: 'Choose it.', field: 'frame:f1:typeId' };

const pallet = (part: Partial<BearingPallet> = {}): BearingPallet => ({
  placementId: 'p',
  name: 'Flour',
  pallet: true,
  depth: 1200,
  towardsFront: 0,
  boards: 'front-to-rear',
  ...part,
});
const bearing = (part: Partial<BearingPallet> = {}, input: Partial<PalletBearingInput> = {}) =>
  palletBearing({
    place,
    level: 'Level 1',
    goods: [pallet(part)],
    frameDepth: 1100,
    beamWidth: 50,
    missing: [],
    deck: 'none',
    rules,
    ...input,
  });

test.each([
  // frame 1 100 for 1 200 deep, 900 for 1 000 deep: 50 mm overhang front and rear (F-56)
  [1200, 1100],
  [1000, 900],
])('a pallet %d mm deep on a frame of %d mm bears fully, and still does 50 mm off its mark', (depth, frameDepth) => {
  const [found] = bearing({ depth }, { frameDepth });
  expect(found?.verdict).toBe('within');
  expect(found?.allowed?.value).toBe(50);
  if (found) expectWorked(found);
});

test.each([
  // Bearing left on the worse beam: 50 + (1 200 − 1 100)/2 − |offset| − 50, at most 50.
  [0, 'within', 50],
  [10, 'close', 40],
  [49, 'close', 1],
  [50, 'over', 0],
  [51, 'over', 0],
  [-20, 'close', 30],
])('put away %d mm off the middle: %s, %d mm of the beam left in the worst case', (towardsFront, verdict, left) => {
  const [found] = bearing({ towardsFront });
  expect(found?.verdict).toBe(verdict);
  expect(found?.allowed?.value).toBe(left);
  expect(found?.place.beam).toBe(towardsFront < 0 ? 'front' : 'rear');
  if (found) expectWorked(found);
});

test('a pallet too short for its frame does not reach the beams', () => {
  const [found] = bearing({ depth: 1000 });
  expect(found?.verdict).toBe('over');
  expect(plain(found?.says ?? [])).toContain('does not reach the rear beam');
  const [partly] = bearing({ depth: 1060 });
  // (1 060 − 1 100)/2 = −20: 30 of 50 mm bear as it stands
  expect(plain(partly?.says ?? [])).toContain('bears on only 30 mm of the 50 mm of the rear beam');
  expect(partly?.verdict).toBe('over');
});

test.each([
  // end blocks of 145 mm (EN 13698-1, from memory): overhang 150 leaves them off the beam, 100 on 45 of 50 mm
  [900, 'over', 'miss the beam'],
  [1000, 'close', 'part of the beam only'],
  [1020, 'within', 'fully'],
])('a 1 200 mm pallet on a frame of %d mm: %s', (frameDepth, verdict, words) => {
  const [found] = bearing({}, { frameDepth });
  expect(found?.verdict).toBe(verdict);
  expect(plain(found?.says ?? [])).toContain(words);
});

test('a pallet turned so that its boards run along the beams is over without bars or a deck, and carried with them', () => {
  const [found] = bearing({ boards: 'along-the-run' }, { frameDepth: null, beamWidth: null });
  expect(found?.verdict).toBe('over');
  expect(plain(found?.says ?? [])).toContain('do not reach from one to the other');
  for (const deck of ['support-bars', 'mesh', 'panels'] as const)
    expect(bearing({ boards: 'along-the-run' }, { deck })[0]?.verdict).toBe('within');
  expect(plain(bearing({ boards: 'none' })[0]?.says ?? [])).toContain('stands on feet');
});

test('a half pallet of 600 mm does not reach the beams of a frame 1 100 mm deep', () => {
  expect(bearing({ depth: 600 })[0]?.verdict).toBe('over');
});

test('an unknown frame or beam is not assessable', () => {
  expect(bearing({}, { frameDepth: null, missing: [depthMissing] })[0]).toMatchObject({
    verdict: 'not-assessable',
    missing: [depthMissing],
  });
  expect(bearing({}, { beamWidth: null, missing: [depthMissing] })[0]?.verdict).toBe('not-assessable');
});

test('a 48 in pallet on a 42 in frame, 3 in out each side, bears fully in the United States set', () => {
  // 48 in = 1 219.2, 42 in = 1 066.8, 2 in beams = 50.8 mm; F-57
  const [found] = bearing({ depth: 1219.2 }, { frameDepth: 1066.8, beamWidth: 50.8, rules: us });
  expect(found?.verdict).toBe('within');
  const [out] = standsOut({ depth: 1219.2 }, { frameDepth: 1066.8, rules: us });
  expect(out?.demand?.value).toBeCloseTo(76.2, 9);
  expect(out?.verdict).toBe('within');
});

const standing = (part: Partial<AcrossBeams> = {}): AcrossBeams => ({
  placementId: 'p',
  name: 'Flour',
  what: 'pallet',
  depth: 1200,
  towardsFront: 0,
  pastPallet: { along: 0, across: 0 },
  ...part,
});
function standsOut(part: Partial<AcrossBeams> = {}, input: Partial<OverhangInput> = {}) {
  return overhang({ place, level: 'Level 1', goods: [standing(part)], frameDepth: 1100, missing: [], carried: false, rules, ...input });
}

test.each([
  [0, 'within', 50, 'front'],
  [1, 'close', 51, 'front'],
  [-30, 'close', 80, 'rear'],
])('%d mm towards the front: %s, %d mm out at the %s', (towardsFront, verdict, most, side) => {
  const [found] = standsOut({ towardsFront });
  expect(found?.verdict).toBe(verdict);
  expect(found?.demand?.value).toBe(most);
  expect(plain(found?.says ?? [])).toContain(`past the ${side} face`);
  if (found) expectWorked(found);
});

test('bars or a deck carry a pallet that stands out further', () => {
  expect(standsOut({ towardsFront: 40 }, { carried: true })[0]?.verdict).toBe('within');
});

test('four drums of 585 mm on a pallet 1 000 mm wide reach 85 mm past it on each side', () => {
  // 2 × 585 = 1 170; (1 170 − 1 000)/2 = 85 (F-128)
  const [found] = standsOut({ pastPallet: { along: (2 * 585 - 1000) / 2, across: (2 * 585 - 1200) / 2 } });
  expect(found?.notes.map(plain).join(' ')).toContain(
    'reach past their pallet by 85 mm on each side along the run and 0 mm front and rear',
  );
});

test('overhang needs the depth of the frame', () => {
  expect(standsOut({}, { frameDepth: null, missing: [depthMissing] })[0]?.missing).toEqual([depthMissing]);
});

test.each([
  // F-108: ¼–½–¼ flexible, ⅓ each rigid
  [3, 'flexible', [0.25, 0.5, 0.25]],
  [3, 'rigid', [1 / 3, 1 / 3, 1 / 3]],
  [2, 'flexible', [0.5, 0.5]],
  [1, 'rigid', [1]],
  [5, 'flexible', [0.125, 0.25, 0.25, 0.25, 0.125]],
] as const)('%d lines of runners, %s', (lines, spread, shares) => {
  expect(runnerShares(lines, spread)).toEqual(shares);
});

test('a pallet without lines is refused', () => expect(() => runnerShares(0, 'rigid')).toThrow('got 0'));

const formed = (part: Partial<FormedGoods> = {}): FormedGoods => ({
  placementId: 'g',
  name: 'Coil',
  height: 1000,
  lean: 0,
  contact: 'flat',
  chocked: 'unknown',
  missing: { input: 'whether Coil is chocked', how: 'Look.', field: 'unitLoad:g:chocked' },
  onPallet: false,
  ...part,
});
const form = (part: Partial<FormedGoods>, deck: GoodsFormInput['deck'] = 'none') =>
  goodsForm({ place, level: 'Level 1', goods: [formed(part)], deck, rules });

test.each([
  ['yes', 'within'],
  ['no', 'over'],
  ['unknown', 'not-assessable'],
] as const)('round goods lying on a pallet, chocked %s: %s', (chocked, verdict) => {
  const found = form({ contact: 'lying-round', chocked, onPallet: true });
  expect(found.map((one) => one.verdict)).toEqual([verdict]);
});

test.each([
  ['rims', 'mesh', 'close'],
  ['wheels', 'panels', 'close'],
  ['feet', 'mesh', 'close'],
  ['rims', 'none', 'over'],
  ['wheels', 'support-bars', 'over'],
  ['feet', 'none', 'within'],
  ['rims', 'floor', 'within'],
  ['flat', 'mesh', 'within'],
] as const)('goods on %s over %s: %s', (contact, deck, verdict) => {
  expect(form({ contact }, deck)[0]?.verdict).toBe(verdict);
});

test('a pallet under drums makes their rims no matter of the deck', () => {
  expect(form({ contact: 'rims', onPallet: true }, 'mesh')[0]?.verdict).toBe('within');
});

test('a stack leaning 2 % counts as upright, one leaning more does not', () => {
  // 2 % of 1 000 mm (F-75)
  expect(form({ lean: -20 })[0]?.verdict).toBe('within');
  const [found] = form({ lean: 21 });
  expect(found?.verdict).toBe('over');
  expect(found?.utilisation).toBeCloseTo(21 / 20, 12);
  if (found) expectWorked(found);
});
