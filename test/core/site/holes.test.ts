import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { holesBeside, nextHole } from '../../../src-core/site/holes';

// Pitches of 50 and 75 mm and 2 in: facts.md F-60, common practice, no source.

test('from a hole a beam goes to the next one, from between two to the nearest that way', () => {
  expect(nextHole(1500, 50, 1)).toBe(1550);
  expect(nextHole(1500, 50, -1)).toBe(1450);
  expect(nextHole(1512, 50, 1)).toBe(1550);
  expect(nextHole(1512, 50, -1)).toBe(1500);
  expect(nextHole(1512, 75, 1)).toBe(1575);
  // 30 holes of 2 in, exactly.
  expect(nextHole(1473.2, 50.8, 1)).toBe(1524);
});

test('a height measured to the millimetre stands at its hole', () => {
  // 59 × 50.8 = 2997.2.
  expect(holesBeside(2997, 50.8)).toBeNull();
  expect(nextHole(2997, 50.8, 1)).toBe(3048);
  expect(holesBeside(1512, 50)).toEqual([1500, 1550]);
});

test('a pitch of nothing is refused', () => {
  expect(() => nextHole(1500, 0, 1)).toThrow('hole pitch must be above 0 mm, got 0');
  expect(() => holesBeside(1500, -50)).toThrow('hole pitch must be above 0 mm, got -50');
  expect(() => nextHole(1500, Number.NaN, 1)).toThrow('hole pitch must be above 0 mm, got NaN');
});

test('up and down again comes back to the same hole, at any pitch', () => {
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 400 }), fc.constantFrom(25, 50, 66.7, 75, 50.8, 76.2, 101.6), (number, pitch) => {
      const height = Number((number * pitch).toFixed(4));
      expect(nextHole(nextHole(height, pitch, 1), pitch, -1)).toBe(height);
      expect(holesBeside(height, pitch)).toBeNull();
    }),
  );
});
