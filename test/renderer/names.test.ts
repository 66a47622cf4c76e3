import { expect, test } from 'vitest';
import { editBay, editEntry, movePlacement, removeBay, removePlacement } from '../../src-core/site/edits';
import { findIn } from '../../src-renderer/find';
import { frameNameBetween, nextName, nextRunName } from '../../src-renderer/editing/names';
import { countOf, sayBytes, sayTime } from '../../src-renderer/say';
import { differences } from '../../src-renderer/state/site-differences';
import { usedBy } from '../../src-renderer/editing/used-by';
import { smallSite } from './sites';

test.each([
  ['A6', [], 'A7'],
  ['A6', ['A7', 'A8'], 'A9'],
  ['Bay', [], 'Bay2'],
  ['007', [], '008'],
  ['A9', [], 'A10'],
])('after %s, with %j taken, comes %s', (name, taken, next) => {
  expect(nextName(name, new Set(taken))).toBe(next);
});

test('a frame is called after both bays at its sides, and never like another of its run', () => {
  expect(frameNameBetween('A6', 'A3', new Set(['A2|A3']))).toBe('A6|A3');
  expect(frameNameBetween('A6', 'A3', new Set(['A6|A3', 'A6|A3 (2)']))).toBe('A6|A3 (3)');
});

test('runs are lettered, and the first free letter is taken', () => {
  expect(nextRunName(new Set())).toBe('A');
  expect(nextRunName(new Set(['A', 'B', 'D']))).toBe('C');
  expect(nextRunName(new Set(Array.from({ length: 26 }, (_, i) => String.fromCharCode(65 + i))))).toBe('A1');
});

test('bays are found by name with their run, goods by name with their place; all words must match', () => {
  const site = smallSite();
  expect(findIn(site, 'A2').map((one) => one.name)).toEqual(['Bay A2']);
  expect(findIn(site, 'crate').map((one) => one.where)).toEqual(['run A, bay A1, level 1', 'run A, bay A1, level 1']);
  expect(findIn(site, 'crate a1')).toHaveLength(2);
  expect(findIn(site, 'crate a2')).toEqual([]);
  expect(findIn(site, '  ')).toEqual([]);
  expect(findIn(site, 'crate')[1]?.selection).toMatchObject({ placementIds: ['p2'] });
});

test('what a library entry touches is named by its place', () => {
  const site = smallSite();
  expect(usedBy(site, 'unitLoads', 'crate')).toEqual(['bay A1, level 1']);
  expect(usedBy(site, 'notices', 'notice')).toEqual(['bay A1', 'bay A2', 'bay A3']);
  expect(usedBy(site, 'floors', 'none')).toEqual([]);
});

test('two states are told apart in sentences: goods moved, taken off, bays changed and gone, entries changed', () => {
  const before = smallSite();
  const [first, second, third] = before.runs[0]?.bays ?? [];
  if (!first || !second || !third) throw new Error('three bays');
  const level = first.levels[1]?.id ?? '';
  let after = movePlacement(before, 'p1', { levelId: level, atMm: 75 });
  after = removePlacement(after, 'p2');
  after = editBay(after, second.id, { clearEntryMm: 2625 });
  after = removeBay(after, third.id);
  after = editEntry(after, 'unitLoads', 'crate', { goodsKg: 410 });
  expect(differences(before, before)).toEqual([]);
  expect(differences(before, after)).toEqual([
    'Unit load Crate changed',
    'Bay A1: Crate from level 1 to level 2',
    'Bay A1, level 1: Crate taken off',
    'Bay A2: clear entry 2700 → 2625 mm',
    'Bay A3 taken out',
    'Frame A3|A4 taken out',
  ]);
  expect(differences(before, movePlacement(before, 'p1', { levelId: first.levels[0]?.id ?? '', atMm: 80 }))).toEqual([
    'Bay A1, level 1: Crate from 75 to 80 mm',
  ]);
});

test('times, sizes and counts are said as people say them', () => {
  const noon = new Date(2026, 11, 1, 12, 0);
  expect(sayTime(new Date(2026, 11, 1, 9, 5).toISOString(), 'en-GB', noon)).toBe('today 9:05');
  expect(sayTime(new Date(2026, 4, 3, 9, 5).toISOString(), 'en-GB', noon)).toBe('3 May 2026 9:05');
  expect(sayTime(new Date(2026, 11, 1, 9, 5, 7).toISOString(), 'en-GB', noon, true)).toBe('today 9:05:07');
  expect(sayTime('no time', 'en-GB')).toBe('at an unknown time');
  expect(sayBytes(22_400_000, 'en-GB')).toBe('22 MB');
  expect(sayBytes(3_450, 'en-GB')).toBe('3.5 kB');
  expect([countOf(1, 'bay'), countOf(0, 'bay'), countOf(2, 'entry', 'entries')]).toEqual(['1 bay', '0 bays', '2 entries']);
});
