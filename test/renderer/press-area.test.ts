import { expect, test } from 'vitest';
import { pressAcross, pressUp } from '../../src-renderer/drawing/press-area';

const RATE = 0.03; // px per mm: a bay of 2 700 mm in some 80 px

test('goods that stand alone are at least 24 px to press, in their middle', () => {
  // 80 mm are 2.4 px; 24 − 2.4 = 21.6, half of it on each side.
  expect(pressAcross({ at: 500, width: 80 }, [], RATE)).toEqual({ before: 10.8, width: 24 });
  expect(pressUp(200, 6)).toEqual({ top: 176, height: 24 });
  expect(pressUp(200, 60)).toEqual({ top: 140, height: 60 });
});

test('of thirty small goods side by side each is pressed where it is drawn', () => {
  const row = Array.from({ length: 30 }, (_, i) => ({ at: 75 + 86 * i, width: 80 }));
  const areas = row.map((one) => {
    const { before, width } = pressAcross(
      one,
      row.filter((other) => other !== one),
      RATE,
    );
    const left = one.at * RATE - before;
    return { left, right: left + width };
  });
  for (const [i, { right }] of areas.entries()) expect(right).toBeLessThanOrEqual((areas[i + 1]?.left ?? Infinity) + 1e-9);
});

test('wide goods are pressed over their own width', () => {
  expect(pressAcross({ at: 75, width: 800 }, [{ at: 950, width: 800 }], RATE)).toEqual({ before: 0, width: 24 });
});
