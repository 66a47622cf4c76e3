import { expect, test } from 'vitest';
import { markOf, resolveRules, RULE_KEYS, ruleValue, sourceOf, type RuleKey, type RuleSetName } from '../../../src-core/checks/rule-sets';
import { RULES } from '../../../src-core/checks/rule-table';

const rules = (set: RuleSetName) => resolveRules({ set, changed: [] });

// The domain facts sheet's rows F-01 to F-89; the source of each number is named there and in the table.
test.each<[RuleKey, number, number, number]>([
  ['closeAbove', 0.9, 0.9, 0.9], // common practice, no source
  ['deflectionDivisor', 200, 180, 180], // F-01 to F-03
  ['likelyFixity', 0.4, 0.4, 0.4], // common practice, no source
  ['frontShareWarn', 0.55, 0.55, 0.55], // common practice, no source
  ['placementTolerance', 50, 50, 50], // common practice, no source
  ['overhangMost', 50, 76.2, 50], // F-56, F-57
  ['clearanceAboveTo6m', 100, 101.6, 100], // F-63, F-70, F-69
  ['clearanceAboveTo13m', 150, 101.6, 125], // F-65, F-70, F-69
  ['clearanceLoadsTo3m', 75, 101.6, 100], // F-62, F-70, F-69
  ['plumbUnloadedDivisor', 350, 240, 500], // F-36, F-39, F-41
  ['plumbLoadedDivisor', 300, 240, 500], // F-38, F-39, F-41
  ['heightToDepthAnchored', 6, 6, 6], // F-49
  ['heightToDepthTied', 8, 8, 8], // F-51
  ['damageUprightAlong', 5, 0, 5], // F-77, F-87
  ['damageUprightAcross', 3, 0, 3], // F-78, F-87
  ['damageBracing', 10, 0, 10], // F-79, F-87
  ['setVertical', 20, 20, 20], // F-88
  ['setHorizontal', 40, 40, 40], // F-89
])('%s is its own in each rule set', (key, european, unitedStates, australian) => {
  expect(rules('european').value[key]).toBeCloseTo(european, 12);
  expect(rules('united-states').value[key]).toBeCloseTo(unitedStates, 12);
  expect(rules('australian').value[key]).toBeCloseTo(australian, 12);
});

test('350 lbf is 1 556.877 565 341 175 N', () => {
  // 350 × 4.448 221 615 260 5 N, exact by definition (NIST SP 811, Appendix B)
  expect(rules('united-states').value.anchorPullForce).toBeCloseTo(1556.877565341175, 9);
});

test('every rule names its origin in every set and lies inside its own bounds', () => {
  for (const key of RULE_KEYS) {
    for (const set of ['european', 'united-states', 'australian'] as const) {
      const { value, text } = RULES[key][set];
      expect(value, key).toBeGreaterThanOrEqual(RULES[key].least);
      expect(value, key).toBeLessThanOrEqual(RULES[key].most);
      expect(text.length, key).toBeGreaterThan(3);
      expect(sourceOf(rules(set), key)).toContain('rule set');
    }
  }
});

test('a changed value says so, gives its reason and leaves the others alone', () => {
  const changed = resolveRules({ set: 'european', changed: [{ key: 'closeAbove', value: 0.8, reason: 'insurer asks' }] });
  expect(changed.value.closeAbove).toBe(0.8);
  expect(markOf(changed, 'closeAbove')).toBe('changed');
  expect(sourceOf(changed, 'closeAbove')).toBe('changed from the European rule set: insurer asks');
  expect(markOf(changed, 'deflectionDivisor')).toBe('source');
  expect(ruleValue(changed, 'deflectionDivisor', 'n').from).toContain('European rule set');
});

test('what comes from memory says that it is to be confirmed', () => {
  expect(markOf(rules('european'), 'clearanceAboveTo3m')).toBe('from memory, to be confirmed');
  expect(sourceOf(rules('european'), 'clearanceAboveTo3m')).toMatch(/from memory of EN 15620.*to be confirmed/);
});

test('a value outside its bounds is refused with the value', () => {
  expect(() => resolveRules({ set: 'european', changed: [{ key: 'closeAbove', value: -1, reason: '' }] })).toThrow(/closeAbove.*-1/);
  expect(() => resolveRules({ set: 'european', changed: [{ key: 'closeAbove', value: NaN, reason: '' }] })).toThrow(/NaN/);
});
