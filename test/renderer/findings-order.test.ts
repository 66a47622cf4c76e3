import { expect, test } from 'vitest';
import type { Finding } from '../../src-core/checks/finding';
import { byWeight, groupsOf, keyOf, missingOf, titleOf } from '../../src-renderer/findings/order';

const finding = (change: Partial<Finding>): Finding => ({
  check: 'beam-bending',
  place: { runId: 'r' },
  verdict: 'within',
  utilisation: null,
  demand: null,
  allowed: null,
  says: [],
  missing: [],
  worked: [],
  notes: [],
  counts: true,
  ...change,
});

test('the worst verdict comes first, and of equals the most used', () => {
  const list = [
    finding({ verdict: 'within', utilisation: 0.5 }),
    finding({ verdict: 'close', utilisation: 0.92 }),
    finding({ verdict: 'over', utilisation: 1.1 }),
    finding({ verdict: 'over', utilisation: 1.4 }),
    finding({ verdict: 'not-possible' }),
  ];
  expect(byWeight(list).map((one) => one.utilisation)).toEqual([null, 1.4, 1.1, 0.92, 0.5]);
});

test('what only informs comes after all that counts, however it reads', () => {
  const information = finding({ verdict: 'over', utilisation: 2, counts: false });
  expect(byWeight([information, finding({})])).toEqual([finding({}), information]);
});

test('a finding is named by its check and the member it was made on', () => {
  expect(titleOf(finding({ place: { runId: 'r', beam: 'front', end: 'left' } }))).toBe('Beam bending, front beam, left end');
  expect(titleOf(finding({ check: 'leg-load', place: { runId: 'r', post: 'rear' } }))).toBe('Leg load, rear post');
});

test('groups without findings are not shown, and the chosen level comes first', () => {
  const level = { levelId: 'l', findings: [finding({})] };
  const bay = { bayId: 'b', findings: [finding({ check: 'bay-total' })] };
  const frame = { frameId: 'f', findings: [finding({ check: 'plumb' })] };
  const groups = groupsOf({ run: null, bay, level, frames: [null, frame], frameName: () => 'A1|A2' } as never, 'Level 2');
  expect(groups.map((group) => group.heading)).toEqual(['Level 2', 'This bay', 'Frame A1|A2']);
});

test('keys tell findings of the same check on front and rear apart', () => {
  const [front, rear] = (['front', 'rear'] as const).map((beam) => finding({ place: { runId: 'r', beam } }));
  expect(front && rear && keyOf(front, 0) !== keyOf(rear, 0)).toBe(true);
});

test('an input that several checks wait for is asked for once, with their names', () => {
  const missing = { input: 'mass of drums', how: 'Weigh one.', field: 'unit-load:u1:goodsKg' };
  const findings = [finding({ check: 'level-total', missing: [missing] }), finding({ check: 'bay-total', missing: [missing] })];
  expect(missingOf([{ heading: 'Level 1', findings }])).toEqual([{ ...missing, checks: ['Level total', 'Bay total'] }]);
});

test('a clearance that no level names is that of the goods on the floor', () => {
  expect(titleOf(finding({ check: 'clearance-along', place: { runId: 'r', bayId: 'b' } }))).toBe('Clearance along, on the floor');
  expect(titleOf(finding({ check: 'clearance-along', place: { runId: 'r', bayId: 'b', levelId: 'l' } }))).toBe('Clearance along');
  expect(titleOf(finding({ check: 'bay-total', place: { runId: 'r', bayId: 'b' } }))).toBe('Bay total');
});
