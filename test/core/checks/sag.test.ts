import { expect, test } from 'vitest';
import { fixityOf } from '../../../src-core/checks/pair';
import { resolveRules } from '../../../src-core/checks/rule-sets';
import { weightOf } from '../../../src-core/units/quantity';
import { boxSecondMoment } from '../../../src-core/checks/implied-load';
import { judgeSag, type SagInput } from '../../../src-core/checks/sag';
import { plain } from '../plain';
import { expectSteps } from '../worked';

const rules = (set: 'european' | 'united-states' | 'australian') => resolveRules({ set, changed: [] });
const rigidity = 210_000 * boxSecondMoment(120, 50, 1.5);
const pallet = weightOf(620) / 2 / 800;

/** Bay scenario S10 of the domain facts. */
const s10: SagInput = {
  beam: 'the front beam of level 1',
  span: 2700,
  spanFrom: 'clear entry',
  loadedMm: 17,
  unloadedMm: 4,
  sidewaysMm: 0,
  found: null,
  field: 'level:l1:sags.front.',
  section: { rigidity, from: 'box 120 × 50 × 1.5 measured, E = 210 000 N/mm²', fixity: null },
  declared: {
    load: { lines: [75, 950, 1825].map((from) => ({ from, to: from + 800, wFrom: pallet, wTo: pallet })), points: [] },
    kg: 1860,
  },
  rated: null,
  rules: rules('european'),
};

test('S10: 17 mm is over the 13.5 mm allowed, and a set of 29.6 % takes the beams out of use', () => {
  const found = judgeSag(s10);
  expect(found).toMatchObject({ verdict: 'over', outOfUse: true, limitMm: 13.5, elasticMm: 13 });
  expect(found.setPercent).toBeCloseTo(29.6, 1);
  expect(found.implied?.pinned.declared?.kg).toBeCloseTo(1945.9, 1);
  expect(plain(found.says[0] ?? [])).toBe(
    'Unloaded, the front beam of level 1 stays bent down by 4 mm, 29.6296 % of the allowed sag; more than 20 % takes it out of use.',
  );
  expect(found.notes.map(plain).join(' ')).toContain('1860 kg is declared; the sag stands for 1945.9');
  expect(found.notes.map(plain).join(' ')).toContain('never a licence to add load');
  expectSteps('S10', found.worked);
});

test('S10: the range ends at the likely fixity, or at the known stiffness of the connectors', () => {
  // Fixity 0.257 belongs to 50 kN·m/rad, for which S10 prints 1.318.
  const known = judgeSag({ ...s10, section: { rigidity, from: 'measured', fixity: fixityOf(50e6, rigidity, 2700) } });
  expect(known.implied?.stiffer.declared?.ratio).toBeCloseTo(1.318, 3);
  expectSteps('known ends', known.worked);
  const likely = judgeSag(s10);
  expect(likely.implied?.stiffer.fixity).toBe(0.4);
  // Between the ratios that S10 prints for fixities 0.257 and 0.409.
  expect(likely.implied?.stiffer.declared?.ratio).toBeGreaterThan(1.318);
  expect(likely.implied?.stiffer.declared?.ratio).toBeLessThan(1.557);
});

// Limits: L/200 = 13.5 mm and 20 % of it, 2.7 mm; L/180 = 15 mm and 3 mm; sideways 40 %: 5.4 mm and 6 mm.
// Facts F-01, F-02, F-03, F-88, F-89. Close begins above 0.9 of a limit: method, section 13.
test.each([
  ['european', 10, 2.43, 0, 'within', false],
  ['european', 10, 2.44, 0, 'close', false],
  ['european', 10, 2.7, 0, 'close', false],
  ['european', 10, 2.701, 0, 'over', true],
  ['european', 12.15, 1, 0, 'within', false],
  ['european', 12.16, 1, 0, 'close', false],
  ['european', 13.5, 1, 0, 'close', false],
  ['european', 13.501, 1, 0, 'over', false],
  ['european', 10, 1, 4.86, 'within', false],
  ['european', 10, 1, 5.4, 'close', false],
  ['european', 10, 1, 5.401, 'over', true],
  ['european', 10, 1, null, 'not-assessable', false],
  ['united-states', 13.5, 2.7, 5.4, 'within', false],
  ['united-states', 15, 3, 6, 'close', false],
  ['united-states', 15.001, 3, null, 'over', false],
  ['united-states', 10, 3.001, null, 'over', true],
  ['united-states', 10, 1, 6.001, 'over', true],
  ['australian', 13.5, 2.7, 5.4, 'within', false],
  ['australian', 15, 3, 6, 'close', false],
  ['australian', 15, 3.001, null, 'over', true],
] as const)(
  '%s: %f mm loaded, %f unloaded, %s sideways is %s (out of use: %s)',
  (set, loadedMm, unloadedMm, sidewaysMm, verdict, outOfUse) => {
    const found = judgeSag({ ...s10, section: null, loadedMm, unloadedMm, sidewaysMm, rules: rules(set) });
    expect(found).toMatchObject({ verdict, outOfUse });
    expectSteps('limits', found.worked);
  },
);

test('a sag that was read only loaded, or only unloaded, is not assessable unless it is over already', () => {
  const loaded = judgeSag({ ...s10, loadedMm: 5, unloadedMm: null });
  expect(loaded).toMatchObject({ verdict: 'not-assessable', elasticMm: null, implied: null });
  expect(loaded.missing.map(({ input }) => input)).toEqual(['unloaded sag of the front beam of level 1']);
  expect(judgeSag({ ...s10, loadedMm: null, unloadedMm: 1 }).verdict).toBe('not-assessable');
  expect(judgeSag({ ...s10, loadedMm: 14, unloadedMm: null }).verdict).toBe('over');
  expect(judgeSag({ ...s10, loadedMm: null, unloadedMm: 3 })).toMatchObject({ verdict: 'over', outOfUse: true });
});

// The set is part of the loaded sag, so it is no larger: 20 % of 13.5 mm is 2.7 mm, and close begins above 0.9 of that, 2.43 mm.
test.each([
  [2.43, 0, 'within'],
  [2.44, 0, 'close'],
  [2.7, 0, 'close'],
  [2.701, 0, 'not-assessable'],
  [2, null, 'not-assessable'],
  [2, 5.401, 'over'],
] as const)('%f mm loaded, not read unloaded, %s sideways is %s', (loadedMm, sidewaysMm, verdict) => {
  const found = judgeSag({ ...s10, loadedMm, unloadedMm: null, sidewaysMm });
  expect(found).toMatchObject({ verdict, elasticMm: null, setPercent: null, implied: null });
  const down = found.missing.filter(({ field }) => field.endsWith('unloadedMm'));
  expect(down).toHaveLength(loadedMm > 2.7 ? 1 : 0);
  const says = found.says.map(plain).join(' ');
  expect(says).toContain(loadedMm > 2.7 ? 'empty the level and measure again at the same place' : 'was not read and need not be');
  expect(says).not.toContain('stays bent down by');
  expectSteps('bound', found.worked);
});

test('a small loaded sag spares the unloaded reading only where the whole of it stands for less than the rating', () => {
  // 2 mm stand for 2013.8 · 2/13 = 310 kg evenly spread with pinned ends, for 310/0.68 = 456 kg at a fixity of 0.4.
  const read = { ...s10, loadedMm: 2, unloadedMm: null };
  expect(judgeSag({ ...read, rated: { kg: 460, from: 'notice' } }).verdict).toBe('within');
  for (const kg of [450, 300]) {
    const found = judgeSag({ ...read, rated: { kg, from: 'notice' } });
    expect(found.verdict).toBe('not-assessable');
    expect(found.missing.map(({ input }) => input)).toEqual(['unloaded sag of the front beam of level 1']);
  }
});

test('less sag loaded than unloaded is a wrong reading, not a result', () => {
  const found = judgeSag({ ...s10, loadedMm: 1, unloadedMm: 2 });
  expect(found).toMatchObject({ verdict: 'not-assessable', elasticMm: null, implied: null });
  expect(found.says.map(plain).join(' ')).toContain('cannot be');
  expect(found.missing.map(({ field }) => field)).toEqual(['level:l1:sags.front.loadedMm', 'level:l1:sags.front.unloadedMm']);
  expect(() => judgeSag({ ...s10, loadedMm: -1 })).toThrow('-1');
});

test('without section data the rating gives a lower bound, and says that it proves no pass', () => {
  // 2 500 kg rated, elastic 9 of 13.5 mm allowed: at least 2 500 · 9 / 13.5 = 1 666.7 kg.
  const found = judgeSag({ ...s10, section: null, loadedMm: 10, unloadedMm: 1, rated: { kg: 2500, from: 'load notice' } });
  expect(found.atLeastKg).toBeCloseTo(1666.67, 2);
  expect(found.implied).toBeNull();
  expect(found.notes.map(plain).join(' ')).toContain('proves no pass');
  expectSteps('by rating', found.worked);
});

test('with neither section nor rating the sag tells nothing of the load, and says so', () => {
  const found = judgeSag({ ...s10, section: null, loadedMm: 10, unloadedMm: 1 });
  expect(found).toMatchObject({ implied: null, atLeastKg: null });
  expect(found.notes.map(plain).join(' ')).toContain('tells nothing of the load');
});

test('a load implied beyond the rating is over, or close where only stiffer ends imply it', () => {
  const light = { ...s10, loadedMm: 11, unloadedMm: 1 };
  // 10 mm elastic stand for 2013.8 · 10/13 = 1 549 kg evenly spread with pinned ends, for 1 549/0.68 = 2 278 kg at a fixity of 0.4.
  const over = judgeSag({ ...light, rated: { kg: 1500, from: 'notice' } });
  expect(over).toMatchObject({ verdict: 'over', outOfUse: false, decides: { limit: { value: 1500, kind: 'mass' } } });
  expect(over.decides?.measured.value).toBeCloseTo(1549, 0);
  expect(over.says.map(plain).join(' ')).toContain('Unload the level: it is overloaded');
  expect(judgeSag({ ...light, rated: { kg: 2000, from: 'notice' } }).verdict).toBe('close');
});

test('implied and declared load that disagree by more than a fifth are said, not judged: the goods are to be weighed', () => {
  // The declared load sags 12.43 mm with pinned ends: an elastic sag of 9 mm is 0.72 of it.
  const found = judgeSag({ ...s10, loadedMm: 10, unloadedMm: 1 });
  expect(found.verdict).toBe('within');
  expect(found.notes.map(plain).join(' ')).toContain('Weigh the goods.');
  // 10.2 mm is 0.82 with pinned ends and 1.2 of the 8.4 mm at the likely fixity.
  expect(
    judgeSag({ ...s10, loadedMm: 11.1, unloadedMm: 1 })
      .says.map(plain)
      .join(' '),
  ).not.toContain('Weigh the goods.');
});

test('without a declared load the sag still stands for an even load', () => {
  const found = judgeSag({ ...s10, declared: null, loadedMm: 10, unloadedMm: 1 });
  expect(found.implied?.pinned.declared).toBeNull();
  expect(found.notes.map(plain).join(' ')).toContain('evenly spread on the pair with pinned beam ends');
  expectSteps('no declared load', found.worked);
});
