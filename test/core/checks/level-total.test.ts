import { expect, test } from 'vitest';
import type { LevelRating } from '../../../src-core/checks/level-rating';
import { bayTotal, levelTotal, type LevelTotalInput } from '../../../src-core/checks/level-total';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const place = { runId: 'r' };
const rated = (kg: number): LevelRating => ({ kg, by: 'the notice', from: 'load notice LN-1', notes: [], missing: [] });
const unrated: LevelRating = {
  kg: null,
  by: '',
  from: '',
  notes: [],
  missing: [{ input: 'rated capacity of level 2', how: 'Read it.', field: 'notice:n:levelKg' }],
};
const load = (id: string, massKg: number | null, frontShare: number | null = 0.5): LevelTotalInput['goods'][number] => ({
  placementId: id,
  name: `Goods ${id}`,
  massKg,
  from: 'weighed',
  frontShare,
  missing: massKg === null ? [{ input: `mass of Goods ${id}`, how: 'Weigh it.', field: `unitLoad:${id}:goodsKg` }] : [],
});
const check = (goods: LevelTotalInput['goods'], rating: LevelRating) =>
  levelTotal({
    place,
    level: 'Level 2',
    goods,
    rated: rating,
    missingShare: [{ input: 'type of frame A', how: 'Choose it.', field: 'frame:a:typeId' }],
    closeAbove: 0.9,
  });

test('2 400 kg of 2 500 kg is 0.96, close', () => {
  // scenario S1 of test/reference/scenarios.md
  const found = check([load('a', 800), load('b', 800), load('c', 800)], rated(2500));
  expect(found.verdict).toBe('close');
  expect(found.utilisation).toBeCloseTo(0.96, 12);
  expect(plain(found.says)).toBe('Level 2 carries 2400 kg. The notice allows 2500 kg.');
  expectWorked(found);
});

test('a level exactly at its rating is not over', () => {
  expect(check([load('a', 0.1), load('b', 0.2)], rated(0.3)).verdict).toBe('close');
});

test('1 000 kg with 70 % on the front beam count as 1 400 kg', () => {
  // twice the mass on the worse beam: 2 · 0.7 · 1 000
  const found = check([load('a', 600, 0.7), load('b', 400, 0.7)], rated(1300));
  expect(found.verdict).toBe('over');
  expect(found.demand?.value).toBeCloseTo(1400, 9);
  expect(found.place.beam).toBe('front');
  expect(plain(found.says)).toContain('of which 700 kg on the front beam: as much as 1400 kg shared alike');
  expectWorked(found);
});

test('the rear beam is named where it carries more', () => {
  const found = check([load('a', 1000, 0.2)], rated(2000));
  expect(found.place.beam).toBe('rear');
  expect(found.demand?.value).toBeCloseTo(1600, 9);
  expectWorked(found);
});

test('an unrated level is never within, not even empty', () => {
  for (const goods of [[], [load('a', 10)]]) {
    const found = check(goods, unrated);
    expect(found.verdict).toBe('not-assessable');
    expect(found.missing).toEqual(unrated.missing);
  }
});

test('an unknown mass is not assessable, unless the rest is over already', () => {
  const unknown = load('b', null);
  expect(check([load('a', 800), unknown], rated(2500))).toMatchObject({ verdict: 'not-assessable', utilisation: null });
  const over = check([load('a', 2600), unknown], rated(2500));
  expect(over.verdict).toBe('over');
  expect(over.missing.map(({ field }) => field)).toEqual(['unitLoad:b:goodsKg']);
});

test('an unknown share of front and rear is not assessable and names the frame', () => {
  const found = check([load('a', 800, null)], rated(2500));
  expect(found.verdict).toBe('not-assessable');
  expect(found.missing.map(({ field }) => field)).toEqual(['frame:a:typeId']);
});

test('a rating of zero is used up by any load', () => {
  expect(check([load('a', 1)], rated(0)).verdict).toBe('over');
  expect(check([], rated(0)).verdict).toBe('within');
});

test('a bay’s levels are added up and compared with the rated bay load', () => {
  const levels = [
    { name: 'level 1', kg: 2400 },
    { name: 'level 2', kg: 1600 },
  ];
  const found = bayTotal({ place, bay: 'bay A1', levels, missing: [], limit: { value: 3900, from: 'LN-1', missing: [] }, closeAbove: 0.9 });
  expect(found.verdict).toBe('over');
  expect(found.utilisation).toBeCloseTo(4000 / 3900, 12);
  expect(plain(found.says)).toBe('The beam levels of bay A1 carry 4000 kg. The notice allows 3900 kg for the bay.');
  expectWorked(found);
});

test('a bay with an unknown level or without a bay load is not assessable', () => {
  const lack = [{ input: 'mass', how: 'Weigh it.', field: 'unitLoad:x:goodsKg' }];
  const limit = { value: 3900, from: 'LN-1', missing: [] };
  const levels = [{ name: 'level 1', kg: null }];
  expect(bayTotal({ place, bay: 'bay A1', levels, missing: lack, limit, closeAbove: 0.9 })).toMatchObject({
    verdict: 'not-assessable',
    missing: lack,
  });
  const noLimit = { value: null, from: '', missing: [{ input: 'rated bay load', how: 'Read it.', field: 'notice:n:bayKg' }] };
  expect(bayTotal({ place, bay: 'bay A1', levels: [], missing: [], limit: noLimit, closeAbove: 0.9 }).missing).toEqual(noLimit.missing);
});
