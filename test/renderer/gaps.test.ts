import { expect, test } from 'vitest';
import { resolveRules } from '../../src-core/checks/rule-sets';
import { gapsAt } from '../../src-renderer/drawing/gaps';

const rules = resolveRules({ set: 'european', changed: [{ key: 'clearanceLoadsTo6m', value: 90, reason: 'site practice' }] });

test.each([
  [0, 'clearanceUprightTo3m', 'clearanceLoadsTo3m'],
  [3000, 'clearanceUprightTo3m', 'clearanceLoadsTo3m'],
  [3001, 'clearanceUprightTo6m', 'clearanceLoadsTo6m'],
  [12000, 'clearanceUprightTo13m', 'clearanceLoadsTo13m'],
] as const)('a level at %d mm catches at the gaps that its clearances are checked by', (height, upright, loads) => {
  expect(gapsAt(rules, 'class-400', height)).toEqual({ upright: rules.value[upright], loads: rules.value[loads] });
});

test('a gap that the site changed is the one it catches at', () => {
  expect(gapsAt(rules, 'class-400', 4000).loads).toBe(90);
});

test('put away by hand, goods catch touching; not known by what, at the gaps of the common trucks', () => {
  expect(gapsAt(rules, 'by-hand', 1000)).toEqual({ upright: 0, loads: 0 });
  expect(gapsAt(rules, 'unknown', 4000)).toEqual(gapsAt(rules, 'class-400', 4000));
});
