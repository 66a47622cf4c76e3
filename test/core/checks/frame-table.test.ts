import fc from 'fast-check';
import { expect, test } from 'vitest';
import { frameTableRating, type FrameTableAnswer } from '../../../src-core/checks/frame-table';
import { plain } from '../plain';

// The invented table of scenario S5: greatest unsupported height in mm, rated kg of one frame.
const S5 = [
  { heightMm: 1000, ratedKg: 11_800 },
  { heightMm: 1250, ratedKg: 10_900 },
  { heightMm: 1500, ratedKg: 9800 },
  { heightMm: 1750, ratedKg: 8700 },
  { heightMm: 2000, ratedKg: 7600 },
  { heightMm: 2250, ratedKg: 6600 },
];

const read = (answer: FrameTableAnswer): number | string => (answer.ok ? answer.kg : answer.reason);
const both = (rows: typeof S5, height: number) => [
  read(frameTableRating(rows, height, 'next-taller-row')),
  read(frameTableRating(rows, height, 'interpolate')),
];

test.each([
  // height, next taller row, interpolated: read off the table; 8 700 − 1 100 · 150/250 = 8 040 (scenario S5)
  [1000, 11_800, 11_800],
  [1500, 9800, 9800],
  [2250, 6600, 6600],
  [1900, 7600, 8040],
  [1001, 10_900, 11_796.4],
  [2249, 6600, 6604],
  [500, 11_800, 11_800],
  [1, 11_800, 11_800],
  [2251, 'beyond', 'beyond'],
  [2400, 'beyond', 'beyond'],
])('an unsupported height of %d mm: %s by the next taller row, %s interpolated', (height, next, between) => {
  const [step, line] = both(S5, height);
  for (const [found, expected] of [
    [step, next],
    [line, between],
  ])
    if (typeof expected === 'number') expect(found).toBeCloseTo(expected, 9);
    else expect(found).toBe(expected);
});

test('a table of one row rates up to its height, exactly and below, and nothing above', () => {
  const rows = [{ heightMm: 1500, ratedKg: 9000 }];
  expect(both(rows, 1500)).toEqual([9000, 9000]);
  expect(both(rows, 900)).toEqual([9000, 9000]);
  expect(both(rows, 1500.1)).toEqual(['beyond', 'beyond']);
});

test('no rows are no table', () => expect(both([], 1500)).toEqual(['empty', 'empty']));

test('the order of the rows does not matter', () => {
  fc.assert(
    fc.property(fc.shuffledSubarray(S5, { minLength: S5.length }), fc.double({ min: 100, max: 2600, noNaN: true }), (rows, height) => {
      expect(both(rows, height)).toEqual(both(S5, height));
    }),
  );
});

test('of two rows for one height the lower rating holds', () => {
  const rows = [...S5, { heightMm: 1500, ratedKg: 9500 }];
  expect(both(rows, 1500)).toEqual([9500, 9500]);
  expect(both(rows, 1400)).toEqual([9500, expect.closeTo(10_900 - 1400 * 0.6, 9)]);
  expect(both([...S5, { heightMm: 1500, ratedKg: 9800 }], 1500)).toEqual([9800, 9800]);
});

test('a table that rates a taller row higher contradicts itself and rates nothing', () => {
  const rows = [
    { heightMm: 1000, ratedKg: 8000 },
    { heightMm: 1500, ratedKg: 9000 },
  ];
  expect(both(rows, 1000)).toEqual(['contradictory', 'contradictory']);
  const answer = frameTableRating(rows, 1000, 'next-taller-row');
  expect(answer.ok ? '' : plain(answer.says)).toBe(
    'The table contradicts itself: it rates 9000 kg at 1500 mm and only 8000 kg at the lesser height of 1000 mm. Correct it from the maker’s sheet.',
  );
});

test('interpolation never rates below the next taller row or above the shorter one, and print says which way it was read', () => {
  fc.assert(
    fc.property(fc.double({ min: 1000, max: 2250, noNaN: true }), (height) => {
      const [next, between] = both(S5, height);
      expect(between).toBeGreaterThanOrEqual((next as number) - 1e-9);
      expect(between).toBeLessThanOrEqual(11_800);
    }),
  );
  const notes = (choice: 'next-taller-row' | 'interpolate', height: number) => {
    const answer = frameTableRating(S5, height, choice);
    return answer.ok ? answer.notes.map(plain).join(' ') : '';
  };
  expect(notes('next-taller-row', 1900)).toBe('The table has no row for 1900 mm: its next taller one, 2000 mm, is used.');
  expect(notes('interpolate', 1900)).toContain('Interpolated between the rows of 1750 mm and 2000 mm, as this site chooses');
  expect(notes('interpolate', 1900)).toContain('the next taller row gives 7600 kg');
  expect(notes('next-taller-row', 800)).toContain('below the table’s first row');
  expect(notes('interpolate', 1750)).toBe('');
});

test.each([
  [[{ heightMm: 0, ratedKg: 100 }], 1000, '0 mm'],
  [[{ heightMm: 1000, ratedKg: NaN }], 1000, 'NaN'],
  [[{ heightMm: 1000, ratedKg: -5 }], 1000, '-5'],
  [S5, 0, '0'],
  [S5, NaN, 'NaN'],
])('a row or height that cannot be is refused with its value', (rows, height, quoted) => {
  expect(() => frameTableRating(rows, height, 'interpolate')).toThrow(quoted);
});
