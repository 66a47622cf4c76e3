import { expect, test } from 'vitest';
import { evaluate } from './evaluate';

test('the calculator keeps the order of operations and the symbols given', () => {
  expect(evaluate('8 · M / L', { M: 3, L: 6 })).toBe(4);
  expect(evaluate('2 + 3 · 4 − 1', {})).toBe(13);
  expect(evaluate('384 · D / (5 · L^3)', { D: 10, L: 2 })).toBe(96);
  expect(evaluate('a / b / c', { a: 12, b: 3, c: 2 })).toBe(2);
  expect(evaluate('−M_end', { M_end: -7 })).toBe(7);
});

test.each([
  ['8 · Q', /"Q"/],
  ['(1 + 2', /bracket/],
  ['1 +', /missing/],
  ['1 2', /goes on/],
  ['1 % 2', /cannot read/],
])('the calculator refuses %s', (formula, message) => {
  expect(() => evaluate(formula, {})).toThrow(message);
});
