import { expect, test } from 'vitest';
import { positions, unitLoad, type Weighed } from '../../../src-core/checks/unit-load';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const place = { runId: 'r' };
const limit = { value: 833, from: 'load notice LN-1', missing: [] };
const unstated = { value: null, from: '', missing: [{ input: 'greatest unit load', how: 'Read it.', field: 'notice:n:unitLoadKg' }] };
const load = (placementId: string, massKg: number | null): Weighed => ({
  placementId,
  name: `Pallet ${placementId}`,
  massKg,
  from: 'weighed',
  missing: massKg === null ? [{ input: `mass of Pallet ${placementId}`, how: 'Weigh it.', field: `unitLoad:${placementId}:goodsKg` }] : [],
});

test('three pallets of 800 kg against 833 kg give one finding, for the heaviest', () => {
  // scenario S1 of test/reference/scenarios.md: each 800 ≤ 833
  const found = unitLoad({ place, goods: [load('a', 800), load('b', 790), load('c', 800)], limit, closeAbove: 0.9 });
  expect(found).toHaveLength(1);
  expect(found[0]?.verdict).toBe('close');
  expect(found[0]?.utilisation).toBeCloseTo(800 / 833, 12);
  expect(found[0]?.place.placementId).toBe('a');
  if (found[0]) expectWorked(found[0]);
});

test('each unit load over the limit is named', () => {
  const found = unitLoad({ place, goods: [load('a', 834), load('b', 100), load('c', 900)], limit, closeAbove: 0.9 });
  expect(found.map(({ verdict, place: { placementId } }) => [placementId, verdict])).toEqual([
    ['a', 'over'],
    ['c', 'over'],
  ]);
  expect(found[1] && plain(found[1].says)).toBe('Pallet c weighs 900 kg with its pallet. The notice allows unit loads of 833 kg.');
});

test('a unit load exactly at its limit is not over', () => {
  expect(unitLoad({ place, goods: [load('a', 833)], limit, closeAbove: 0.9 })[0]?.verdict).toBe('close');
});

test('an unknown mass is not assessable and is never taken as zero', () => {
  const found = unitLoad({ place, goods: [load('a', 100), load('b', null)], limit, closeAbove: 0.9 });
  expect(found.map(({ verdict }) => verdict)).toEqual(['not-assessable']);
  expect(found[0]?.missing.map(({ field }) => field)).toEqual(['unitLoad:b:goodsKg']);
  expect(found[0]?.utilisation).toBeNull();
});

test('a limit that the notice does not state is not assessable and says how to get it', () => {
  const found = unitLoad({ place, goods: [load('a', 100)], limit: unstated, closeAbove: 0.9 });
  expect(found[0]?.verdict).toBe('not-assessable');
  expect(found[0]?.missing).toEqual(unstated.missing);
});

test('a level made for three unit loads is within when full and over with a fourth', () => {
  const allowed = { value: 3, from: 'load notice LN-1', missing: [] };
  expect(positions({ place, level: 'Level 1', count: 3, allowed }).verdict).toBe('within');
  const four = positions({ place, level: 'Level 1', count: 4, allowed });
  expect(four.verdict).toBe('over');
  expect(plain(four.says)).toBe('Level 1 holds 4 of the 3 unit loads that the notice is made for.');
  expectWorked(four);
});

test('an empty level needs neither limit nor number', () => {
  expect(unitLoad({ place, goods: [], limit: unstated, closeAbove: 0.9 })[0]?.verdict).toBe('within');
  expect(positions({ place, level: 'Level 1', count: 0, allowed: unstated }).verdict).toBe('within');
});
