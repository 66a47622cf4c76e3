import { expect, test } from 'vitest';
import { integralOfProduct, zeroOfFallingShear } from '../../../src-core/statics/polynomial';
import { sumOf, sumsFromLeft, sumsFromRight } from '../../../src-core/statics/sums';
import { expectClose } from '../../close';

test('a sum keeps what plain addition loses', () => {
  const terms = [1, 1e100, 1, -1e100];
  expect(terms.reduce((sum, term) => sum + term, 0)).toBe(0);
  expect(sumOf(4, (i) => terms[i] as number)).toBe(2);
  // Ten tenths are one.
  expect(sumOf(10, () => 0.1)).toBe(1);
});

test('running sums from both sides', () => {
  const terms = [1, 2, 3, 4];
  expect(sumsFromLeft(terms)).toEqual([1, 3, 6, 10]);
  expect(sumsFromRight(terms)).toEqual([10, 9, 7, 4]);
  expect(terms).toEqual([1, 2, 3, 4]);
});

test('the integral of four straight lines, by hand: u⁴ → 1/5, u²(1 − u)² → 1/30, all ones → 1', () => {
  expect(integralOfProduct(1, 1, 1, 1, 1, 1, 1, 1)).toBe(1);
  expectClose(integralOfProduct(0, 1, 0, 1, 0, 1, 0, 1), 1 / 5, 1e-15);
  expectClose(integralOfProduct(0, 1, 1, 0, 0, 1, 1, 0), 1 / 30, 1e-15);
  expectClose(integralOfProduct(2, 2, 0, 1, 3, 3, 1, 1), 3, 1e-15);
});

test('where a falling shear is zero: uniform, rising and falling intensity, and a double root', () => {
  // V = 6 − 2s; V = 3 − s²/2·(1/3); V = 3 − 2s + s²/6 over 6, with roots by the schoolbook formula.
  expect(zeroOfFallingShear(6, -4, 2, 2, 5)).toBe(3);
  expectClose(zeroOfFallingShear(3, -3, 0, 2, 6), Math.sqrt(18), 1e-15);
  expectClose(zeroOfFallingShear(3, -3, 2, 0, 6), 6 - Math.sqrt(18), 1e-15);
  expect(zeroOfFallingShear(6, 0, 2, 0, 6)).toBe(6);
  expectClose(zeroOfFallingShear(3e-200, -3e-200, 0, 2e-200, 6), Math.sqrt(18), 1e-15);
  expectClose(zeroOfFallingShear(3e200, -3e200, 0, 2e200, 6), Math.sqrt(18), 1e-15);
  // No intensity, no fall: an answer all the same.
  expect(zeroOfFallingShear(0, 0, 0, 0, 6)).toBe(0);
});
