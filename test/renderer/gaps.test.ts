import { expect, test } from 'vitest';
import { resolveRules } from '../../src-core/checks/rule-sets';
import { gapsAt } from '../../src-renderer/drawing/gaps';

const rules = resolveRules({ set: 'european', changed: [{ key: 'clearanceLoadsTo6m', value: 90, reason: 'site practice' }] });

test.each([
  [0, 'clearanceUprightTo3m', 'clearanceLoadsTo3m'],
  [3000, 'clearanceUprightTo3m', 'clearanceLoadsTo3m'],
  [3001, 'clearanceUprightTo6m', 'clearanceLoadsTo6m'],
  [9000, 'clearanceUprightTo9m', 'clearanceLoadsTo9m'],
  [12000, 'clearanceUprightTo13m', 'clearanceLoadsTo13m'],
] as const)('a level at %d mm catches at the gaps of its height band', (height, upright, loads) => {
  expect(gapsAt(rules, height)).toEqual({ upright: rules.value[upright], loads: rules.value[loads] });
});

test('a gap that the site changed is the one it catches at', () => {
  expect(gapsAt(rules, 4000).loads).toBe(90);
});

test('a height that is no number is refused', () => {
  expect(() => gapsAt(rules, NaN)).toThrow(RangeError);
});
