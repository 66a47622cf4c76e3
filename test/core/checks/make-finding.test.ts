import { expect, test } from 'vitest';
import { say } from '../../../src-core/checks/finding';
import { compared, finding, notAssessable } from '../../../src-core/checks/make-finding';
import { massOf } from '../../../src-core/units/quantity';

const made = () =>
  finding({
    check: 'level-total',
    place: { runId: 'r' },
    ...compared(massOf(3), massOf(2), 0.9),
    says: () => say`Level 1 carries ${massOf(3)}.`,
    notes: () => [say`A note.`],
  });

const PLAIN = {
  check: 'level-total',
  place: { runId: 'r' },
  verdict: 'over',
  utilisation: 1.5,
  demand: { value: 3, kind: 'mass' },
  allowed: { value: 2, kind: 'mass' },
  missing: [],
  counts: true,
  says: ['Level 1 carries ', { value: 3, kind: 'mass' }, '.'],
  worked: [],
  notes: [['A note.']],
};

test('a finding is plain data to whoever reads, clones, spreads or serialises it', () => {
  expect(made()).toEqual(PLAIN);
  expect(structuredClone(made())).toEqual(PLAIN);
  expect({ ...made(), counts: false }).toEqual({ ...PLAIN, counts: false });
  expect(JSON.parse(JSON.stringify(made()))).toEqual(PLAIN);
});

test('what is missing is named in the sentence, and never passes', () => {
  const missing = ['the rating', 'the mass', 'the frame'].map((input) => ({ input, how: 'Ask.', field: input }));
  const found = notAssessable('level-total', { runId: 'r' }, missing);
  expect(found.verdict).toBe('not-assessable');
  expect(found.says).toEqual(['Not known: the rating, the mass and the frame.']);
  expect(found.utilisation).toBeNull();
});
