import { expect, test } from 'vitest';
import { backToBackLegs, legLoad, platePressure, type FrameOnFloor, type LegsBehind } from '../../../src-core/checks/floor';
import { floorArea, runOnFloor } from '../../../src-core/checks/floor-area';
import { frameImbalance } from '../../../src-core/checks/frame-imbalance';
import { resolveRules } from '../../../src-core/checks/rule-sets';
import type { Stated } from '../../../src-core/checks/unit-load';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const rules = resolveRules({ set: 'european', changed: [] });
const place = { runId: 'r', frameId: 'f' };
const stated = (value: number | null, field = 'floor:s:legN'): Stated => ({
  value,
  from: 'floor Hall slab; engineer',
  missing: value === null ? [{ input: 'force allowed', how: 'Ask the floor’s owner.', field }] : [],
});
const mass = { input: 'mass of Motor', how: 'Weigh it.', field: 'unitLoad:m:goodsKg' };

/** Frame of scenario S5: 8 164 kg, 4 082 on each leg. */
const on = (part: Partial<FrameOnFloor> = {}): FrameOnFloor => ({
  place,
  frame: 'frame F2',
  legs: { frontKg: 4082, rearKg: 4082 },
  missing: [],
  rules,
  ...part,
});

test('a leg of 4 082 kg presses with 40.03 kN', () => {
  // 4 082 × 9.806 65 = 40 030.745 N
  const found = legLoad(on(), stated(50_000));
  expect(found.demand?.value).toBeCloseTo(40_030.7453, 3);
  expect(found.utilisation).toBeCloseTo(0.800615, 6);
  expect(found.verdict).toBe('within');
  expectWorked(found);
  expect(legLoad(on(), stated(40_000)).verdict).toBe('over');
});

test('the heavier leg decides and is named', () => {
  const found = legLoad(on({ legs: { frontKg: 3000, rearKg: 5164 } }), stated(60_000));
  expect(found.place.post).toBe('rear');
  expect(found.demand?.value).toBeCloseTo(5164 * 9.80665, 6);
});

test('a plate of 120 × 120 mm under it presses with 2.780 N/mm²', () => {
  // 40 030.745 / 14 400 = 2.779 913
  const plate = { width: stated(120), depth: stated(120) };
  const found = platePressure(on(), plate, stated(3));
  expect(found.demand?.value).toBeCloseTo(2.779913, 6);
  expect(found.verdict).toBe('close');
  expectWorked(found);
  for (const lacking of [
    platePressure(on(), { ...plate, width: stated(null, 'frameType:t:plateWidthMm') }, stated(3)),
    platePressure(on(), { ...plate, depth: stated(null, 'frameType:t:plateDepthMm') }, stated(3)),
    platePressure(on(), plate, stated(null)),
    platePressure(on({ legs: null, missing: [mass] }), plate, stated(3)),
  ])
    expect(lacking.verdict).toBe('not-assessable');
});

const behind = (part: Partial<LegsBehind> = {}): LegsBehind => ({
  name: 'frame B-F2 of run B',
  rearKg: 4082,
  missing: [],
  gap: 200,
  ...part,
});

test('two legs back to back, 200 mm apart on a slab of 150 mm, press with 80.06 kN', () => {
  // 2 × 40 030.745 = 80 061.49 N; they count as a pair below 3 × 150 = 450 mm (F-136 row of M-26, common practice)
  const found = backToBackLegs(on(), behind(), stated(90_000), stated(150));
  expect(found.demand?.value).toBeCloseTo(80_061.4906, 3);
  expect(found.utilisation).toBeCloseTo(0.889572, 6);
  expect(found.verdict).toBe('within');
  expectWorked(found);
  expect(backToBackLegs(on(), behind(), stated(80_000), stated(150)).verdict).toBe('over');
});

test.each([
  [449, 'over'],
  [450, 'within'],
])('legs %d mm apart on a slab of 150 mm: %s', (gap, verdict) => {
  const found = backToBackLegs(on(), behind({ gap }), stated(80_000), stated(150));
  expect(found.verdict).toBe(verdict);
  expectWorked(found);
});

test('a pair needs the legs behind, the limit and the slab', () => {
  for (const lacking of [
    backToBackLegs(on(), behind({ rearKg: null, missing: [mass] }), stated(90_000), stated(150)),
    backToBackLegs(on(), behind(), stated(null, 'floor:s:legPairN'), stated(150)),
    backToBackLegs(on(), behind(), stated(90_000), stated(null, 'floor:s:thicknessMm')),
    backToBackLegs(on({ legs: null, missing: [mass] }), behind(), stated(90_000), stated(150)),
  ]) {
    expect(lacking.verdict).toBe('not-assessable');
    expect(lacking.missing).toHaveLength(1);
  }
  expect(backToBackLegs(on(), null, stated(null), stated(null)).verdict).toBe('within');
});

test('legs of goods that cannot stand are not possible, of unknown masses not assessable', () => {
  expect(legLoad(on({ legs: null }), stated(50_000)).verdict).toBe('not-possible');
  expect(legLoad(on({ legs: null, missing: [mass] }), stated(50_000)).missing).toEqual([mass]);
  expect(legLoad(on(), stated(null)).missing.map(({ field }) => field)).toEqual(['floor:s:legN']);
  expect(backToBackLegs(on(), behind({ rearKg: null }), stated(90_000), stated(150)).verdict).toBe('not-possible');
});

const area = (part: Partial<Parameters<typeof floorArea>[0]> = {}) =>
  floorArea({
    place: { runId: 'r', bayId: 'b' },
    bay: 'bay A1',
    kind: 'suspended',
    kindMissing: { input: 'kind of floor Mezzanine', how: 'Ask.', field: 'floor:s:kind' },
    massKg: 4112,
    missing: [],
    width: 2800,
    depth: 1100,
    limit: stated(0.015),
    rules,
    ...part,
  });

test('a suspended floor answers by area: 4 112 kg on 2.8 × 1.1 m are 13.09 kN/m²', () => {
  // 4 112 × 9.806 65 / (2 800 × 1 100) = 0.013 092 5 N/mm²
  const found = area();
  expect(found.demand?.value).toBeCloseTo(0.0130925, 7);
  expect(found.utilisation).toBeCloseTo(0.872834, 6);
  expectWorked(found);
  expect(area({ limit: stated(0.0119) }).verdict).toBe('over');
});

test('a slab on the ground answers by area only where its owner states a limit', () => {
  expect(area({ kind: 'ground-slab', limit: stated(null), massKg: null, missing: [mass] }).verdict).toBe('within');
  expect(area({ kind: 'ground-slab', limit: stated(0.01) }).verdict).toBe('over');
  expect(area({ kind: 'unknown' }).missing.map(({ field }) => field)).toEqual(['floor:s:kind']);
  expect(area({ limit: stated(null, 'floor:s:areaNPerMm2') }).verdict).toBe('not-assessable');
  expect(area({ massKg: null, missing: [mass] }).missing).toEqual([mass]);
});

test('the sum of a run’s legs on a suspended floor informs', () => {
  const found = runOnFloor({ place: { runId: 'r' }, run: 'run A', legs: 160_000, length: 8400, depth: 1100, limit: stated(0.015) });
  expect(found.counts).toBe(false);
  expect(found.demand?.value).toBeCloseTo(160_000 / (8400 * 1100), 12);
  expectWorked(found);
});

const imbalance = (left: number | null, right: number | null, utilisation: number | null, part = {}) =>
  frameImbalance({
    place,
    frame: 'frame F2',
    left: left === null ? null : { bay: 'bay A1', kg: left },
    right: right === null ? null : { bay: 'bay A2', kg: right },
    missing: [],
    impossible: false,
    utilisation,
    utilisationMissing: [mass],
    rules,
    ...part,
  });

test.each([
  // difference over the heavier bay, flagged above 50 % on a frame used above 0.8 (M-16, common practice)
  [4000, 2000, 0.9, 'within', 50],
  [4000, 1999, 0.9, 'close', 50.025],
  [1000, 4000, 0.81, 'close', 75],
  [1000, 4000, 0.8, 'within', 75],
  [4000, 0, 1.2, 'close', 100],
  [0, 0, 0.1, 'within', 0],
])('bays that put %d and %d kg on a frame used %d: %s, %d %%', (left, right, used, verdict, percent) => {
  const found = imbalance(left, right, used);
  expect(found.verdict).toBe(verdict);
  expect(found.demand?.value).toBeCloseTo(percent, 9);
  if (left + right > 0) expectWorked(found);
});

test('an end frame has one bay by design; an unknown load or use is not assessable where it matters', () => {
  expect(imbalance(4000, null, null).verdict).toBe('within');
  expect(imbalance(4000, 0, null).missing).toEqual([mass]);
  expect(imbalance(4000, 3900, null).verdict).toBe('within');
  expect(imbalance(4000, 0, 0.9, { missing: [mass] }).verdict).toBe('not-assessable');
  expect(imbalance(4000, 0, 0.9, { impossible: true }).verdict).toBe('not-possible');
  expect(plain(imbalance(4000, 0, 0.9).says)).toContain('Even the two bays out');
});
