import fc from 'fast-check';
import { expect, test } from 'vitest';
import { addDays, addMonths, daysBetween } from '../../../src-core/units/dates';

// Expected days: from a printed perpetual calendar, counted by hand.
test.each([
  ['2026-05-01', 28, '2026-05-29'],
  ['2028-02-01', 28, '2028-02-29'],
  ['2028-02-02', 28, '2028-03-01'],
  ['2027-02-01', 28, '2027-03-01'],
  ['2100-02-01', 28, '2100-03-01'],
  ['2000-02-01', 28, '2000-02-29'],
  ['2026-12-10', 28, '2027-01-07'],
  // The clocks change on 29 March and 25 October 2026 in Europe, on 8 March and 1 November in the United States.
  ['2026-03-15', 28, '2026-04-12'],
  ['2026-10-11', 28, '2026-11-08'],
  ['2026-02-22', 28, '2026-03-22'],
  ['2026-01-31', -31, '2025-12-31'],
])('%s and %i days is %s', (from, days, to) => {
  expect(addDays(from, days)).toBe(to);
  expect(daysBetween(from, to)).toBe(days);
});

test.each([
  ['2026-01-31', 1, '2026-02-28'],
  ['2028-02-29', 12, '2029-02-28'],
  ['2026-06-15', 12, '2027-06-15'],
  ['2026-11-30', 3, '2027-02-28'],
])('%s and %i months is %s', (from, months, to) => expect(addMonths(from, months)).toBe(to));

test('days agree with the proleptic Gregorian calendar of ECMAScript, in UTC', () => {
  const asDate = (day: number) => new Date(day * 86_400_000).toISOString().slice(0, 10);
  fc.assert(
    fc.property(fc.integer({ min: -100_000, max: 2_000_000 }), fc.integer({ min: -20_000, max: 20_000 }), (day, days) => {
      expect(addDays(asDate(day), days)).toBe(asDate(day + days));
      expect(daysBetween(asDate(day), asDate(day + days))).toBe(days);
    }),
    { numRuns: 2_000 },
  );
});

test.each(['2026-02-29', '2026-13-01', '2026-00-10', '26-01-01', '2026-1-1', '', 'tomorrow', '2026-04-31'])(
  '%j is no day and is refused by its name',
  (date) => {
    expect(() => addDays(date, 1)).toThrow(JSON.stringify(date));
    expect(() => addMonths(date, 1)).toThrow(RangeError);
    expect(() => daysBetween('2026-01-01', date)).toThrow(RangeError);
  },
);
