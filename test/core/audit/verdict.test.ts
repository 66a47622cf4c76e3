import { expect, test } from 'vitest';
import { governingOf, verdictOfFindings } from '../../../src-core/audit/verdict';
import { say, type CheckName, type Verdict } from '../../../src-core/checks/finding';
import { finding } from '../../../src-core/checks/make-finding';

const made = (check: CheckName, verdict: Verdict, utilisation?: number, counts = true) =>
  finding({ check, place: { runId: 'r' }, verdict, counts, ...(utilisation === undefined ? {} : { utilisation }), says: () => say`Said.` });

test('the worst verdict is given, and "over" before "not assessable"', () => {
  const over = made('beam-bending', 'over', 1.2);
  const unknown = made('unit-load', 'not-assessable');
  for (const findings of [
    [over, unknown],
    [unknown, over],
  ]) {
    expect(verdictOfFindings(findings)).toBe('over');
    expect(governingOf(findings)?.check).toBe('beam-bending');
  }
  expect(verdictOfFindings([made('placement', 'not-possible'), over])).toBe('not-possible');
  expect(verdictOfFindings([made('placement', 'within'), unknown])).toBe('not-assessable');
});

test('of findings with one verdict the one used furthest governs', () => {
  const findings = [
    made('level-total', 'over', 1.1),
    made('beam-bending', 'over', 1.3),
    made('beam-deflection', 'over', 1.2),
    made('damage', 'over'),
  ];
  expect(governingOf(findings)?.check).toBe('beam-bending');
});

test('what does not count neither makes the verdict nor governs', () => {
  const findings = [made('level-total', 'close', 0.95), made('beam-bending', 'over', 1.01, false)];
  expect(verdictOfFindings(findings)).toBe('close');
  expect(governingOf(findings)?.check).toBe('level-total');
});

test('nothing that counts is not assessable, never within', () => {
  expect(verdictOfFindings([])).toBe('not-assessable');
  expect(verdictOfFindings([made('level-total', 'within', 0.1, false)])).toBe('not-assessable');
  expect(governingOf([])).toBeNull();
});
