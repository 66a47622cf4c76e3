import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { evenPlaces, freeGaps, pushApart, type Standing } from '../../../src-core/site/placing';

const gaps = { upright: 75, loads: 75 };

test('free stretches lie between the goods and the uprights', () => {
  const standing = [
    { at: 1825, width: 800 },
    { at: 75, width: 800 },
  ];
  expect(freeGaps(2700, standing)).toEqual([
    { from: 0, to: 75 },
    { from: 875, to: 1825 },
    { from: 2625, to: 2700 },
  ]);
  expect(freeGaps(2700, [])).toEqual([{ from: 0, to: 2700 }]);
});

test('overlapping goods and goods past the end leave no negative stretch', () => {
  const standing = [
    { at: -100, width: 300 },
    { at: 100, width: 900 },
    { at: 150, width: 50 },
    { at: 2600, width: 900 },
  ];
  expect(freeGaps(2700, standing)).toEqual([{ from: 1000, to: 2600 }]);
  expect(freeGaps(2700, [{ at: 3000, width: 10 }])).toEqual([{ from: 0, to: 2700 }]);
});

test('even places leave equal gaps, in whole millimetres', () => {
  expect(evenPlaces(2700, [800, 800, 800])).toEqual([75, 950, 1825]);
  expect(evenPlaces(2700, [1200])).toEqual([750]);
  // Gap (2700 − 2000) ÷ 3 = 233.33 mm.
  expect(evenPlaces(2700, [1000, 1000])).toEqual([233, 1467]);
  expect(evenPlaces(2000, [1200, 1000])).toBeNull();
  expect(evenPlaces(2700, [])).toEqual([]);
});

test('a neighbour gives way no further than it must', () => {
  const others = [
    { at: 950, width: 800 },
    { at: 75, width: 600 },
  ];
  // 1 700 − 75 − 800 = 825, which leaves 825 − 75 − 600 = 150 for the other: it may stay at 75.
  expect(pushApart({ entry: 2700, gaps, fixed: { at: 1700, width: 800 }, others })).toEqual({ fixed: 1700, others: [825, 75] });
});

test('what is pushed against the upright pushes back', () => {
  const others = [{ at: 75, width: 800 }];
  // The neighbour cannot go left of 75, so what was put down moves to 75 + 800 + 75 = 950.
  expect(pushApart({ entry: 2700, gaps, fixed: { at: 600, width: 800 }, others })).toEqual({ fixed: 950, others: [75] });
});

test('where goods do not fit nothing is pushed', () => {
  const others = [
    { at: 75, width: 1200 },
    { at: 1425, width: 1200 },
  ];
  expect(pushApart({ entry: 2700, gaps, fixed: { at: 900, width: 800 }, others })).toBeNull();
});

const standing = fc.record({ at: fc.integer({ min: -300, max: 3300 }), width: fc.integer({ min: 50, max: 1200 }) });

test('pushed apart, every gap is kept, or there is no room for them all', () => {
  fc.assert(
    fc.property(standing, fc.array(standing, { maxLength: 4 }), (fixed, others) => {
      const entry = 3300;
      const after = pushApart({ entry, gaps, fixed, others });
      const total = [fixed, ...others].reduce((sum, { width }) => sum + width, 0) + gaps.loads * others.length + 2 * gaps.upright;
      if (after === null) {
        expect(total).toBeGreaterThan(entry);
        return;
      }
      const all: Standing[] = [
        { at: after.fixed, width: fixed.width },
        ...others.map(({ width }, i) => ({ at: after.others[i] ?? Number.NaN, width })),
      ];
      all.sort((a, b) => a.at - b.at);
      expect(all[0]?.at).toBeGreaterThanOrEqual(gaps.upright);
      const last = all.at(-1);
      expect((last?.at ?? 0) + (last?.width ?? 0)).toBeLessThanOrEqual(entry - gaps.upright);
      all.slice(1).forEach((right, i) => expect(right.at - (all[i]?.at ?? 0) - (all[i]?.width ?? 0)).toBeGreaterThanOrEqual(gaps.loads));
    }),
    { numRuns: 2000 },
  );
});
