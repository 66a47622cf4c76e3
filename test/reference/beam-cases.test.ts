/**
 * Sources: beam-cases-open.json names its own for each case (SymPy, SciPy, CalculiX; published formulas).
 * beam-cases-hard.json: exact rational integration in Python, roots with mpmath at 80 digits.
 * beam-cases-random.json: by a second script of the same kind, written apart, with mpmath at 60 digits.
 */
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { compareCase, isWithin } from './compare';
import { readCases, type CaseFile } from './read-cases';
import { reportCases } from './report-cases';

const file = (name: string): string => join(import.meta.dirname, name);
const read = (name: string): CaseFile => readCases(readFileSync(file(name), 'utf8'));

describe.each(['beam-cases-open.json', 'beam-cases-hard.json', 'beam-cases-random.json'])('%s', (name) => {
  const { cases, tolerances } = read(name);
  test.each(cases.map((one) => [one.id, one] as const))('%s is within the tolerances of its file', (_, one) => {
    const { comparisons, unknown, refused } = compareCase(one, tolerances);
    expect(refused).toBeNull();
    expect(unknown).toEqual([]);
    expect(comparisons.length).toBeGreaterThan(10);
    expect(comparisons.filter((each) => !isWithin(each))).toEqual([]);
  });
});

test('the open cases hold to 5e-15 of each scale, places to 1e-15 of the span', () => {
  const { cases, tolerances } = read('beam-cases-open.json');
  for (const one of cases)
    for (const { quantity, error } of compareCase(one, tolerances).comparisons)
      expect(error, `${one.id} ${quantity}`).toBeLessThanOrEqual(quantity.startsWith('at') ? 1e-15 : 5e-15);
});

const made = mkdtempSync(join(tmpdir(), 'cases-'));
afterAll(() => rmSync(made, { recursive: true }));

/** Writes a file of cases, runs it, and gives the exit code with what was printed. */
function run(text: string): { code: number; said: string } {
  const path = join(made, 'cases.json');
  writeFileSync(path, text);
  const lines: string[] = [];
  return { code: reportCases(path, (line) => lines.push(line)), said: lines.join('\n') };
}

// 4 kN at the middle of a pinned 2.4 m beam: PL/4, PL³/48EI.
const central = {
  id: 'T1',
  span_mm: 2400,
  EI_Nmm2: 2e11,
  ends: { left: 'pinned', right: 'pinned' },
  loads: [{ kind: 'point', at_mm: 1200, force_N: 4000 }],
  expect: { resultant_N: 4000, maxSagging_Nmm: 2400000, atSagging_mm: 1200, maxDeflection_mm: (4000 * 2400 ** 3) / (48 * 2e11) },
};
const cases = (...list: object[]): string => JSON.stringify({ cases: list });

describe('the runner', () => {
  test('exits 0 and names the worst error of each quantity', () => {
    const { code, said } = run(cases(central));
    expect(code).toBe(0);
    expect(said).toMatch(/maxDeflection_mm +1 .* T1 +within/);
    expect(said).toMatch(/cases: 1, values: 4, all within/);
  });

  test('exits 1 where a value is off by more than its tolerance, and says by how much', () => {
    const { code, said } = run(cases(central, { ...central, id: 'T2', expect: { ...central.expect, maxSagging_Nmm: 2400000.03125 } }));
    expect(code).toBe(1);
    expect(said).toMatch(/T2 {2}maxSagging_Nmm is 2400000, expected 2400000\.03125/);
    expect(said).toMatch(/outside: 1/);
  });

  test('exits 1 where the core refuses a case', () => {
    const { code, said } = run(cases({ ...central, loads: [{ kind: 'point', at_mm: 5000, force_N: 1 }] }));
    expect(code).toBe(1);
    expect(said).toMatch(/T1 {2}refused: point load at 5000 mm/);
  });

  test('allows a place more only where the note says that it is ill-conditioned', () => {
    const off = { ...central, expect: { ...central.expect, atSagging_mm: 1201 } };
    expect(run(cases(off)).code).toBe(1);
    expect(run(cases({ ...off, note: 'the place is ill-conditioned' })).code).toBe(0);
    const named = { suggestedTolerances: 'places 1e-6*span_mm; looser where a place is ill-conditioned (T1 place: 1e-3*span_mm)' };
    expect(run(JSON.stringify({ conventions: named, cases: [off] })).code).toBe(0);
    expect(run(JSON.stringify({ conventions: named, cases: [{ ...off, id: 'T11' }] })).code).toBe(1);
  });

  test('takes its tolerances from the file', () => {
    const off = { ...central, expect: { ...central.expect, maxSagging_Nmm: 2400000 * (1 + 1e-8) } };
    expect(run(JSON.stringify({ conventions: { suggestedTolerances: 'moments 1e-7*resultant_N*span/8' }, cases: [off] })).code).toBe(0);
  });

  test('compares a stretch end by end, and a single place with a stretch', () => {
    const loads = [
      { kind: 'point', at_mm: 800, force_N: 100 },
      { kind: 'point', at_mm: 1600, force_N: 100 },
    ];
    const level = (at: object) => run(cases({ ...central, loads, expect: { resultant_N: 200, ...at } })).code;
    expect(level({ atSagging_mm: null, atSaggingRange: [800, 1600] })).toBe(0);
    expect(level({ atSagging_mm: null, atSaggingRange: [800, 1500] })).toBe(1);
    expect(level({ atSagging_mm: 800 })).toBe(1);
    expect(level({ atSagging_mm: null })).toBe(0);
  });

  test('names expected quantities that it does not know', () => {
    const { code, said } = run(cases({ ...central, expect: { ...central.expect, twist_rad: 3 } }));
    expect(code).toBe(0);
    expect(said).toMatch(/T1 {2}not compared, unknown to this runner: twist_rad/);
  });

  test.each([
    ['{', /not JSON/],
    ['[]', /no list "cases"/],
    [cases({ ...central, span_mm: '2' }), /T1: "span_mm" is not a number but "2"/],
    [cases({ ...central, ends: { left: 'loose', right: 'pinned' } }), /left end is "loose"/],
    [cases({ ...central, loads: [{ kind: 'torque' }] }), /load 1 is of kind "torque"/],
  ])('exits 2 on a file that cannot be read: %s', (text, message) => {
    const { code, said } = run(text);
    expect(code).toBe(2);
    expect(said).toMatch(message);
  });

  test('exits 2 on a file that is not there', () => {
    expect(reportCases(join(made, 'none.json'), () => undefined)).toBe(2);
  });
});
