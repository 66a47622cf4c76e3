import { expect, test } from 'vitest';
import { fullComplement, type ComplementGoods, type FullComplementInput } from '../../../src-core/checks/full-complement';
import type { LevelRating } from '../../../src-core/checks/level-rating';
import { resolveRules, type RuleChoice } from '../../../src-core/checks/rule-sets';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const load = (name: string, left: number, massKg = 800, width = 800): ComplementGoods => ({ name, massKg, from: 'weighed', left, width });
const THREE = [load('a', 75), load('b', 950), load('c', 1825)];
const rated: LevelRating = { kg: 2500, by: 'the notice', from: 'load notice LN-1', notes: [], missing: [] };
// Scenario S1 of test/reference/scenarios.md: 2 488.9, 2 400 and 2 483.8 kg.
const even = { total: 2400, bending: 2488.9, endShear: 2400, deflection: 2483.8 };

const judge = (change: Partial<FullComplementInput>, changed: RuleChoice['changed'] = []) =>
  fullComplement({
    place: { runId: 'r' },
    level: 'Level 1',
    on: true,
    number: { value: 3, from: 'load notice LN-1', missing: [] },
    goods: THREE,
    clearEntry: 2700,
    even,
    rated,
    rules: resolveRules({ set: 'european', changed }),
    ...change,
  });

test('three pallets of 800 kg on a level made for three and 2 500 kg are judged by 2 400 kg: 0.96, close', () => {
  // scenario S1: u = 0.960 by total, and 800 of 833.3 kg is the same
  const { judged, finding } = judge({});
  expect(judged).toBe(true);
  expect(finding.counts).toBe(true);
  expect(finding.verdict).toBe('close');
  expect(finding.utilisation).toBeCloseTo(0.96, 12);
  expect(finding.notes.map(plain)[0]).toContain('1.03704 times the total');
  expectWorked(finding);
});

test('goods entered from right to left are the same complement', () => {
  expect(judge({ goods: [...THREE].reverse() }).judged).toBe(true);
});

test('an equivalent even load above the rating is said, and does not decide', () => {
  // scenario S1 on runners ¼–½–¼: 2 518.5 kg, 1.007
  const { judged, finding } = judge({ even: { ...even, bending: 2518.5 } });
  expect(judged).toBe(true);
  expect(finding.verdict).toBe('close');
  expect(finding.notes.map(plain)).toContain('By them the level has no spare.');
});

test.each<[string, Partial<FullComplementInput>, string]>([
  ['one is missing', { goods: THREE.slice(0, 2) }, 'the notice is made for 3 unit loads and 2 stand here'],
  ['there is one more', { goods: [...THREE, load('d', 2700, 800, 0)] }, 'the notice is made for 3 unit loads and 4 stand here'],
  ['one has moved by 30 mm', { goods: [load('a', 75), load('b', 980), load('c', 1825)] }, 'b stands 30 mm from its evenly spaced place'],
  ['one is heavier', { goods: [load('a', 75), load('b', 950, 900), load('c', 1825)] }, 'b weighs 900 kg and the mean is 833.333 kg'],
  [
    'one is heavier than its part of the rating, though near equal',
    { goods: [load('a', 75, 810), load('b', 950, 840), load('c', 1825, 810)] },
    'b weighs 840 kg, more than its 833.333 kg of the rating',
  ],
  ['one is narrower', { goods: [load('a', 75), load('b', 950, 800, 700), load('c', 1825)] }, 'wide, unlike the others'],
  ['its equivalent load is far above its total', { even: { ...even, bending: 2641 } }, '1.10042 times its total'],
  ['the site has switched it off', { on: false }, 'does not judge levels as a designed full complement'],
])('it does not apply when %s', (_, change, reason) => {
  const { judged, finding } = judge(change);
  expect(judged).toBe(false);
  expect(finding.counts).toBe(false);
  expect(plain(finding.says)).toContain(reason);
});

test('within the tolerances of mass and spacing it still applies', () => {
  // common practice, no source: 5 % of the mean mass and 25 mm
  expect(judge({ goods: [load('a', 99, 780), load('b', 950, 800), load('c', 1801, 790)], even: { ...even, total: 2370 } }).judged).toBe(
    true,
  );
});

test('tolerances are the site’s to change', () => {
  const goods = [load('a', 75), load('b', 980), load('c', 1825)];
  expect(judge({ goods }, [{ key: 'fullComplementSpacing', value: 40, reason: 'long gaps' }]).judged).toBe(true);
  expect(judge({}, [{ key: 'fullComplementFactor', value: 1.03, reason: 'strict' }]).judged).toBe(false);
});

test('a front-heavy complement is judged by its front beam', () => {
  // 0.53 of 2 400 kg on the front beam counts as 2 · 0.53 · 2 400 = 2 544 kg of 2 500 kg
  const { judged, finding } = judge({ even: { total: 2544, bending: 2638, endShear: 2544, deflection: 2633 } });
  expect(judged).toBe(true);
  expect(finding.verdict).toBe('over');
  expect(finding.utilisation).toBeCloseTo(1.0176, 12);
});

test('equal unit loads that are all too heavy are over by their total', () => {
  const goods = THREE.map((one) => ({ ...one, massKg: 900 }));
  const { judged, finding } = judge({ goods, even: { total: 2700, bending: 2800, endShear: 2700, deflection: 2794 } });
  expect(judged).toBe(true);
  expect(finding.verdict).toBe('over');
  expect(finding.utilisation).toBeCloseTo(1.08, 12);
});

test('without the notice’s number it cannot be told, and the equivalent loads decide', () => {
  const missing = [{ input: 'number', how: 'Read it.', field: 'notice:n:unitLoadsPerLevel' }];
  const { judged, finding } = judge({ number: { value: null, from: '', missing } });
  expect(judged).toBe(false);
  expect(finding).toMatchObject({ verdict: 'not-assessable', counts: false, missing });
});
