import { expect, test } from 'vitest';
import { frameDamage, type FrameDamageInput } from '../../../src-core/checks/damage';
import { classOfDamage, type DamageClass, type FoundDamage } from '../../../src-core/checks/damage-class';
import { resolveRules, type RuleSetName } from '../../../src-core/checks/rule-sets';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const rulesOf = (set: RuleSetName) => resolveRules({ set, changed: [] });
const TODAY = '2026-06-01';
const bend = (
  member: FoundDamage['member'],
  alongMm: number | null,
  acrossMm: number | null,
  part: Partial<FoundDamage> = {},
): FoundDamage => ({
  id: 'd',
  member,
  alongMm,
  acrossMm,
  gaugeMm: 1000,
  torn: false,
  found: TODAY,
  ...part,
});

// Limits per metre (F-77 to F-85): upright 5 mm along, 3 mm across, bracing 10 mm; green to 1 ×, amber to 2 ×, red above.
test.each<[FoundDamage['member'], number, number, number, DamageClass]>([
  ['upright-front', 0, 0, 1000, 'green'],
  ['upright-front', 5, 0, 1000, 'green'],
  ['upright-front', 5.1, 0, 1000, 'amber'],
  ['upright-front', 10, 0, 1000, 'amber'],
  ['upright-front', 10.1, 0, 1000, 'red'],
  ['upright-rear', 0, 3, 1000, 'green'],
  ['upright-rear', 0, 3.1, 1000, 'amber'],
  ['upright-rear', 0, 6, 1000, 'amber'],
  ['upright-rear', 0, 6.1, 1000, 'red'],
  ['bracing', 10, 0, 1000, 'green'],
  ['bracing', 0, 10.1, 1000, 'amber'],
  ['bracing', 20, 0, 1000, 'amber'],
  ['bracing', 0, 20.1, 1000, 'red'],
  // pro rata for shorter gauges (F-80): half over 500 mm, three tenths over 300 mm
  ['upright-front', 2.5, 0, 500, 'green'],
  ['upright-front', 2.6, 0, 500, 'amber'],
  ['upright-front', 5.1, 0, 500, 'red'],
  ['upright-front', 1.5, 0, 300, 'green'],
  ['upright-front', 1.6, 0, 300, 'amber'],
  ['upright-rear', 0, 0.9, 300, 'green'],
  ['upright-rear', 0, 1.9, 300, 'red'],
  ['bracing', 7, 0, 700, 'green'],
  ['bracing', 14.1, 0, 700, 'red'],
  // a longer gauge allows no more than a metre does
  ['upright-front', 5.1, 0, 2000, 'amber'],
  // worst of both directions (F-81)
  ['upright-front', 5, 6.1, 1000, 'red'],
  ['upright-front', 10.1, 3, 1000, 'red'],
])('%s bent %d mm along and %d mm across over %d mm is %s', (member, along, across, gaugeMm, expected) => {
  for (const set of ['european', 'australian'] as const)
    expect(classOfDamage(bend(member, along, across, { gaugeMm }), rulesOf(set), TODAY).class).toBe(expected);
  // The United States set has no green (F-87).
  expect(classOfDamage(bend(member, along, across, { gaugeMm }), rulesOf('united-states'), TODAY)).toMatchObject({
    class: 'red',
    because: 'any-damage',
  });
});

test('dents and tears are red whatever they measure', () => {
  for (const member of ['upright-front', 'bracing', 'base-plate'] as const)
    expect(classOfDamage(bend(member, 0, 0, { torn: true }), rulesOf('european'), TODAY)).toMatchObject({ class: 'red', because: 'torn' });
});

test('a bent base plate has no published limit and is not assessable', () => {
  expect(classOfDamage(bend('base-plate', 1, 1), rulesOf('european'), TODAY)).toMatchObject({ class: 'unclassed', because: 'no-limit' });
});

test('a direction that was not measured is named, unless the other is red already', () => {
  const unknown = classOfDamage(bend('upright-front', 4, null), rulesOf('european'), TODAY);
  expect(unknown.class).toBe('unclassed');
  expect(unknown.missing.map(({ field }) => field)).toEqual(['damage:d:acrossMm']);
  expect(classOfDamage(bend('upright-front', 11, null), rulesOf('european'), TODAY).class).toBe('red');
  expect(classOfDamage(bend('bracing', null, null), rulesOf('european'), TODAY).missing).toHaveLength(2);
});

test.each([
  // four weeks from the day it was found (F-84): 28 days amber, red on the 29th
  ['2026-05-05', '2026-06-01', 'amber'],
  ['2026-05-04', '2026-06-01', 'amber'],
  ['2026-05-03', '2026-06-01', 'red'],
  // across the leap day of 2028 and the change of clocks on 29 March 2026
  ['2028-02-05', '2028-03-04', 'amber'],
  ['2028-02-05', '2028-03-05', 'red'],
  ['2026-03-10', '2026-04-07', 'amber'],
  ['2026-03-10', '2026-04-08', 'red'],
])('amber found on %s is on %s %s', (found, today, expected) => {
  expect(classOfDamage(bend('upright-front', 8, 0, { found }), rulesOf('european'), today).class).toBe(expected);
});

const frame = (damages: readonly FoundDamage[], part: Partial<FrameDamageInput> = {}) =>
  frameDamage({
    place: { runId: 'r', frameId: 'f' },
    frame: 'frame F2',
    unload: ['bay A1', 'bay A2'],
    perhapsTied: null,
    damages,
    twoAmbersMakeRed: true,
    rules: rulesOf('european'),
    today: TODAY,
    ...part,
  });

test('S10: 8 mm along is 1.6 times, 4 mm across 1.33 times, a diagonal of 12 mm 1.2 times their limits: amber each', () => {
  // 8/5 = 1.6; 4/3 = 1.33; 12/10 = 1.2 (scenario S10)
  const upright = classOfDamage(bend('upright-front', 8, 4), rulesOf('european'), TODAY);
  expect(upright.bends.map(({ direction, ratio, class: one }) => [direction, ratio.toFixed(2), one])).toEqual([
    ['along', '1.60', 'amber'],
    ['across', '1.33', 'amber'],
  ]);
  const diagonal = classOfDamage(bend('bracing', 12, 0), rulesOf('european'), TODAY);
  expect(diagonal.bends[0]?.ratio.toFixed(1)).toBe('1.2');
  expect([upright.class, diagonal.class]).toEqual(['amber', 'amber']);
});

test('S10: two ambers on one frame count as red and unload both bays, where the site says so', () => {
  const damages = [bend('upright-front', 8, 4), bend('bracing', 12, 0, { id: 'e' })];
  const found = frame(damages);
  expect(found.map(({ verdict }) => verdict)).toEqual(['close', 'close', 'over']);
  expect(plain(found[2]?.says ?? [])).toBe(
    '3 bends on frame F2 are amber, and this site counts two ambers on one frame as red. Unload every level of bay A1 and bay A2 at once, bar them from reloading, and have the part repaired with the maker’s own.',
  );
  for (const one of found.slice(0, 2)) expectWorked(one);
  expect(frame(damages, { twoAmbersMakeRed: false }).map(({ verdict }) => verdict)).toEqual(['close', 'close']);
  expect(frame([bend('upright-front', 8, 0)]).map(({ verdict }) => verdict)).toEqual(['close']);
});

test('amber says until when it may stand, red what to unload', () => {
  expect(plain(frame([bend('upright-front', 8, 0)])[0]?.says ?? [])).toBe(
    'The front upright of frame F2 is bent 8 mm along the run over 1000 mm, 1.6 times the limit of 5 mm: amber. Do not reload what is emptied, and have it repaired by 29 June 2026; after that day it counts as red.',
  );
  const [red] = frame([bend('upright-front', 11, 0)]);
  expect(red?.verdict).toBe('over');
  expect(red?.place.post).toBe('front');
  expect(plain(red?.says ?? [])).toContain('red. Unload every level of bay A1 and bay A2 at once');
  if (red) expectWorked(red);
  const [old] = frame([bend('upright-front', 8, 0, { found: '2026-04-01' })]);
  expect(plain(old?.says ?? [])).toContain('amber until 29 April 2026, and red since');
});

test('amber without the day it was found, and damage that cannot be classed, are not assessable', () => {
  const [undated] = frame([bend('upright-front', 8, 0, { found: '' })]);
  expect(undated?.verdict).toBe('not-assessable');
  expect(undated?.missing.map(({ field }) => field)).toEqual(['damage:d:found']);
  expect(frame([bend('base-plate', 0, 0)])[0]?.verdict).toBe('not-assessable');
});

test('a frame without damage, and one with green damage, are within', () => {
  expect(frame([]).map(({ verdict }) => verdict)).toEqual(['within']);
  expect(frame([bend('upright-front', 5, 3)]).map(({ verdict }) => verdict)).toEqual(['within']);
});

test('the United States set unloads on any damage that is recorded', () => {
  const [found] = frame([bend('upright-front', 1, 0)], { rules: rulesOf('united-states') });
  expect(found?.verdict).toBe('over');
  expect(plain(found?.says ?? [])).toContain('asks to unload on any visible damage');
});

test('where one limit is set to nothing, any bend that way is red and no number without end is shown', () => {
  const rules = resolveRules({ set: 'european', changed: [{ key: 'damageUprightAcross', value: 0, reason: 'owner’s rule' }] });
  const [found] = frame([bend('upright-front', 0, 1)], { rules });
  expect(found?.verdict).toBe('over');
  expect(plain(found?.says ?? [])).toContain(
    'is bent 1 mm in the plane of the frame over 1000 mm, where this site allows no bend at all: red',
  );
});

test('a part of a week counts to its last whole day', () => {
  // 2.5 weeks are 17.5 days: amber on the 17th day, red on the 18th
  const rules = resolveRules({ set: 'european', changed: [{ key: 'amberWeeks', value: 2.5, reason: 'owner’s rule' }] });
  const on = (today: string) => classOfDamage(bend('upright-front', 8, 0, { found: '2026-05-01' }), rules, today).class;
  expect([on('2026-05-18'), on('2026-05-19')]).toEqual(['amber', 'red']);
});
