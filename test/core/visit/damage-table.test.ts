/**
 * Damage measured at frames and beams, on and just either side of each limit, with the class and the
 * action that each rule set asks for.
 *
 * Sources of the expected classes: facts F-77 (upright along the beams, 5 mm on a 1 m straightedge), F-78
 * (upright in the plane of the bracing, 3 mm), F-79 (bracing, 10 mm per 1 m), F-80 (pro rata for shorter
 * lengths), F-81 (each direction by itself), F-82 (dents and tears never by millimetres), F-83 to F-85
 * (green up to the limit, amber up to twice it, red above), F-87 (United States: unload on any visible
 * damage); F-88 and F-89 (sets of beams, from memory of EN 15635 §9.7, to be confirmed). The Australian
 * limits are from memory of AS 4084, to be confirmed.
 */
import { expect, test } from 'vitest';
import { auditSite } from '../../../src-core/audit/audit';
import { editFrame } from '../../../src-core/site/edits';
import type { Damage, Site } from '../../../src-core/site/site';
import { actionsOf, type OpenAction } from '../../../src-core/visit/actions';
import { carryIntoSite } from '../../../src-core/visit/carry';
import { finishBay, recordDamage, recordSag } from '../../../src-core/visit/edits';
import { newFollowUp } from '../../../src-core/visit/follow-up';
import { startVisit, type Visit } from '../../../src-core/visit/visit';
import { siteOf } from './make-run';

type Class = 'green' | 'amber' | 'red' | 'unclassed';
type Row = readonly [member: Damage['member'], along: number | null, across: number | null, gauge: number, torn: boolean, expected: Class];

const g = 'green';
const a = 'amber';
const r = 'red';
const u = 'unclassed';

const ROWS: readonly Row[] = [
  // front upright, along the beams: 5 mm on 1 m
  ['upright-front', 0, 0, 1000, false, g],
  ['upright-front', 4.9, 0, 1000, false, g],
  ['upright-front', 5, 0, 1000, false, g],
  ['upright-front', 5.1, 0, 1000, false, a],
  ['upright-front', 9.9, 0, 1000, false, a],
  ['upright-front', 10, 0, 1000, false, a],
  ['upright-front', 10.1, 0, 1000, false, r],
  ['upright-front', 25, 0, 1000, false, r],
  // 750, 500 and 300 mm: pro rata
  ['upright-front', 3.75, 0, 750, false, g],
  ['upright-front', 3.8, 0, 750, false, a],
  ['upright-front', 7.5, 0, 750, false, a],
  ['upright-front', 7.6, 0, 750, false, r],
  ['upright-front', 2.5, 0, 500, false, g],
  ['upright-front', 2.6, 0, 500, false, a],
  ['upright-front', 5, 0, 500, false, a],
  ['upright-front', 5.1, 0, 500, false, r],
  ['upright-front', 1.5, 0, 300, false, g],
  ['upright-front', 1.6, 0, 300, false, a],
  ['upright-front', 3, 0, 300, false, a],
  ['upright-front', 3.1, 0, 300, false, r],
  // rear upright, in the plane of the bracing: 3 mm on 1 m
  ['upright-rear', 0, 2.9, 1000, false, g],
  ['upright-rear', 0, 3, 1000, false, g],
  ['upright-rear', 0, 3.1, 1000, false, a],
  ['upright-rear', 0, 5.9, 1000, false, a],
  ['upright-rear', 0, 6, 1000, false, a],
  ['upright-rear', 0, 6.1, 1000, false, r],
  ['upright-rear', 0, 2.4, 800, false, g],
  ['upright-rear', 0, 2.5, 800, false, a],
  ['upright-rear', 0, 4.8, 800, false, a],
  ['upright-rear', 0, 4.9, 800, false, r],
  ['upright-rear', 0, 1.5, 500, false, g],
  ['upright-rear', 0, 1.6, 500, false, a],
  ['upright-rear', 0, 3, 500, false, a],
  ['upright-rear', 0, 3.1, 500, false, r],
  ['upright-rear', 0, 0.9, 300, false, g],
  ['upright-rear', 0, 1, 300, false, a],
  ['upright-rear', 0, 1.8, 300, false, a],
  ['upright-rear', 0, 1.9, 300, false, r],
  // the worse of both directions decides, each by its own limit
  ['upright-front', 5, 3, 1000, false, g],
  ['upright-front', 5, 3.1, 1000, false, a],
  ['upright-front', 5.1, 3, 1000, false, a],
  ['upright-front', 8, 3, 1000, false, a],
  ['upright-front', 5, 6.1, 1000, false, r],
  ['upright-front', 10.1, 3, 1000, false, r],
  ['upright-rear', 9, 2, 1000, false, a],
  ['upright-rear', 2, 6.5, 1000, false, r],
  // bracing, either way: 10 mm per 1 m, pro rata
  ['bracing', 9.9, 0, 1000, false, g],
  ['bracing', 10, 0, 1000, false, g],
  ['bracing', 10.1, 0, 1000, false, a],
  ['bracing', 12, 0, 1000, false, a],
  ['bracing', 20, 0, 1000, false, a],
  ['bracing', 20.1, 0, 1000, false, r],
  ['bracing', 0, 10, 1000, false, g],
  ['bracing', 0, 10.1, 1000, false, a],
  ['bracing', 0, 20, 1000, false, a],
  ['bracing', 0, 20.1, 1000, false, r],
  ['bracing', 5, 0, 500, false, g],
  ['bracing', 5.1, 0, 500, false, a],
  ['bracing', 10, 0, 500, false, a],
  ['bracing', 10.1, 0, 500, false, r],
  ['bracing', 0, 3, 300, false, g],
  ['bracing', 0, 3.1, 300, false, a],
  ['bracing', 0, 6, 300, false, a],
  ['bracing', 0, 6.1, 300, false, r],
  // a gauge longer than the straightedge allows no more than the straightedge does
  ['upright-front', 5.1, 0, 1500, false, a],
  ['bracing', 0, 20.1, 2000, false, r],
  // dents, tears and cracked welds, whatever was measured
  ['upright-front', 0, 0, 1000, true, r],
  ['upright-front', 1, 1, 300, true, r],
  ['upright-rear', null, null, 1000, true, r],
  ['bracing', 2, 0, 1000, true, r],
  ['base-plate', null, null, 1000, true, r],
  // what was not measured is not green; what is red is red whatever else is not known
  ['upright-front', 4, null, 1000, false, u],
  ['upright-front', 8, null, 1000, false, u],
  ['upright-front', null, 4, 1000, false, u],
  ['upright-front', null, null, 1000, false, u],
  ['upright-front', 10.1, null, 1000, false, r],
  ['upright-rear', null, 6.1, 1000, false, r],
  ['bracing', null, 12, 1000, false, u],
  // no limit is published for base plates
  ['base-plate', 2, 2, 1000, false, u],
  ['base-plate', 0, 0, 1000, false, u],
];

const FOUND = '2026-06-02';
const ACTION: Readonly<Record<Class, string>> = { green: 'watch', amber: 'do-not-reload', red: 'unload', unclassed: 'unload' };
/** Frame 2 of three bays stands between bays 1 and 2, of two levels each. */
const BOTH_BAYS = ['A1-level-1', 'A1-level-2', 'A2-level-1', 'A2-level-2'];

const damage = ([member, alongMm, acrossMm, gaugeMm, torn]: Row, id = 'd1'): Damage => ({
  id,
  member,
  alongMm,
  acrossMm,
  gaugeMm,
  torn,
  note: '',
  found: FOUND,
});

function actions(site: Site, visits: readonly Visit[] = [], today = FOUND): readonly OpenAction[] {
  return actionsOf({ site, audit: auditSite(site, today), visits, followUp: newFollowUp(site.id), today });
}

const bySet = (set: Site['rules']['set'], twoAmbersMakeRed = false): Site => {
  const site = siteOf();
  return { ...site, rules: { ...site.rules, set, twoAmbersMakeRed } };
};

const ofDamage = (site: Site, id = 'd1', today = FOUND) => {
  const found = actions(site, [], today).find((action) => action.id === `damage:${id}`);
  if (found === undefined) throw new Error('no action for the damage');
  return found;
};

test('the table has at least 60 measurements of frames', () => expect(ROWS.length).toBeGreaterThanOrEqual(60));

test.each(ROWS.map((row) => [...row, row] as const))(
  'European and Australian: %s, %s along, %s across, on %i mm, torn %s: %s',
  (_member, _along, _across, _gauge, _torn, expected, row) => {
    for (const set of ['european', 'australian'] as const) {
      const action = ofDamage(editFrame(bySet(set), 'A-frame-2', { damages: [damage(row)] }));
      expect(action.class, set).toBe(expected);
      expect(action.kind, set).toBe(ACTION[expected]);
      expect(action.levels.map(({ levelId }) => levelId)).toEqual(expected === 'green' ? [] : BOTH_BAYS);
      expect(action.due).toBe(expected === 'amber' ? '2026-06-30' : null);
    }
  },
);

test.each(ROWS.map((row) => [row[0], row[1], row[2], row[3], row] as const))(
  'United States: %s, %s along, %s across, on %i mm: unload, never green',
  (_member, _along, _across, _gauge, row) => {
    const action = ofDamage(editFrame(bySet('united-states'), 'A-frame-2', { damages: [damage(row)] }));
    expect(action).toMatchObject({ class: 'red', kind: 'unload', due: null });
    expect(action.levels.map(({ levelId }) => levelId)).toEqual(BOTH_BAYS);
  },
);

// Two ambers on one frame (F-86), a choice of the site. Counted bend by bend, as scenario S10 counts them.
test.each([
  ['one upright bent both ways', [['upright-front', 8, 4, 1000, false, a]], true],
  [
    'an upright and a diagonal',
    [
      ['upright-front', 8, 0, 1000, false, a],
      ['bracing', 12, 0, 1000, false, a],
    ],
    true,
  ],
  [
    'one amber and one green',
    [
      ['upright-front', 8, 0, 1000, false, a],
      ['bracing', 2, 0, 1000, false, g],
    ],
    false,
  ],
  ['one amber', [['upright-front', 8, 3, 1000, false, a]], false],
] as readonly [string, readonly Row[], boolean][])('two ambers make red: %s', (_, rows, red) => {
  const damages = rows.map((row, i) => damage(row, `d${i}`));
  const strict = actions(editFrame(bySet('european', true), 'A-frame-2', { damages }));
  const both = strict.find(({ id }) => id === 'two-ambers:A-frame-2');
  expect(both?.kind).toBe(red ? 'unload' : undefined);
  if (red) expect(both?.levels.map(({ levelId }) => levelId)).toEqual(BOTH_BAYS);
  const lenient = actions(editFrame(bySet('european', false), 'A-frame-2', { damages }));
  expect(lenient.some(({ id }) => id === 'two-ambers:A-frame-2')).toBe(false);
});

test('ambers on two frames are not two ambers on one frame', () => {
  const row: Row = ['upright-front', 8, 0, 1000, false, a];
  let site = editFrame(bySet('european', true), 'A-frame-1', { damages: [damage(row, 'd1')] });
  site = editFrame(site, 'A-frame-2', { damages: [damage(row, 'd2')] });
  expect(actions(site).map(({ kind }) => kind)).toEqual(['do-not-reload', 'do-not-reload']);
});

// Permanent set of beams over 2 700 mm: 20 % and 40 % of L/200 = 13.5 mm and of L/180 = 15 mm.
test.each([
  ['european', 2.7, 0, null],
  ['european', 2.8, 0, 'out-of-use'],
  ['european', 0, 5.4, null],
  ['european', 0, 5.5, 'out-of-use'],
  ['united-states', 3, 0, null],
  ['united-states', 3.1, 0, 'out-of-use'],
  ['united-states', 0, 6, null],
  ['united-states', 0, 6.1, 'out-of-use'],
  ['australian', 3, 0, null],
  ['australian', 3.1, 0, 'out-of-use'],
] as const)('%s: a beam set by %f mm down and %f mm sideways', (set, unloadedMm, sidewaysMm, kind) => {
  const site = bySet(set);
  let visit = startVisit({
    id: 'v',
    siteId: 'site',
    name: 'Round',
    kind: 'weekly',
    person: 'R. W.',
    started: FOUND,
    bays: [{ runId: 'run-A', bayId: 'A-bay-2' }],
  });
  visit = recordSag(visit, 'A-bay-2', { levelId: 'A2-level-1', beam: 'front', loadedMm: 8, unloadedMm, sidewaysMm });
  visit = finishBay(visit, 'A-bay-2', { person: 'R. W.', date: FOUND });
  const found = actions(site, [visit]);
  expect(found.map((action) => action.kind)).toEqual(kind === null ? [] : [kind]);
  if (kind !== null) expect(found[0]?.levels.map(({ levelId }) => levelId)).toEqual(['A2-level-1']);
});

test.each(['european', 'united-states', 'australian'] as const)('%s: a dented beam or torn connector empties its level', (set) => {
  let visit = startVisit({
    id: 'v',
    siteId: 'site',
    name: 'Round',
    kind: 'weekly',
    person: 'R. W.',
    started: FOUND,
    bays: [{ runId: 'run-A', bayId: 'A-bay-2' }],
  });
  const part = { on: 'beam', beam: 'rear', torn: true, note: '', found: FOUND } as const;
  visit = recordDamage(visit, 'A-bay-2', { ...part, id: 'b1', levelId: 'A2-level-1', member: 'beam' });
  visit = recordDamage(visit, 'A-bay-2', { ...part, id: 'b2', levelId: 'A2-level-2', member: 'connector' });
  visit = finishBay(visit, 'A-bay-2', { person: 'R. W.', date: FOUND });
  const site = carryIntoSite(bySet(set), visit, 'A-bay-2');
  expect(actions(site, [visit]).map(({ kind, levels }) => [kind, levels.map(({ levelId }) => levelId)])).toEqual([
    ['unload', ['A2-level-1']],
    ['unload', ['A2-level-2']],
  ]);
});

// Four weeks (F-84): day 28 is the last amber day, day 29 is red. Dates by a printed calendar.
test.each([
  ['an ordinary month', '2026-06-02', '2026-06-29', '2026-06-30', '2026-07-01'],
  ['over the change to summer time in Europe, 29 March 2026', '2026-03-15', '2026-04-11', '2026-04-12', '2026-04-13'],
  ['over the change to winter time in Europe, 25 October 2026', '2026-10-11', '2026-11-07', '2026-11-08', '2026-11-09'],
  ['over the change in the United States, 8 March 2026', '2026-02-20', '2026-03-19', '2026-03-20', '2026-03-21'],
  ['ending on a leap day', '2028-02-01', '2028-02-28', '2028-02-29', '2028-03-01'],
  ['over a leap day', '2028-02-10', '2028-03-08', '2028-03-09', '2028-03-10'],
  ['found on a leap day', '2028-02-29', '2028-03-27', '2028-03-28', '2028-03-29'],
  ['over the end of February in a common year', '2027-02-10', '2027-03-09', '2027-03-10', '2027-03-11'],
  ['over the end of the year', '2026-12-10', '2027-01-06', '2027-01-07', '2027-01-08'],
])('amber days 27, 28 and 29, %s', (_, found, day27, day28, day29) => {
  const row = damage(['upright-front', 8, 0, 1000, false, a]);
  const site = editFrame(bySet('european'), 'A-frame-2', { damages: [{ ...row, found }] });
  const amber = { class: 'amber', kind: 'do-not-reload', due: day28 };
  expect(ofDamage(site, 'd1', found)).toMatchObject({ ...amber, age: 0, overdue: -28 });
  expect(ofDamage(site, 'd1', day27)).toMatchObject({ ...amber, age: 27, overdue: -1 });
  expect(ofDamage(site, 'd1', day28)).toMatchObject({ ...amber, age: 28, overdue: 0 });
  expect(ofDamage(site, 'd1', day29)).toMatchObject({ class: 'red', kind: 'unload', due: day28, age: 29, overdue: 1 });
});

test('amber of an unknown day has no clock, and says so', () => {
  const row = damage(['upright-front', 8, 0, 1000, false, a]);
  const action = ofDamage(editFrame(bySet('european'), 'A-frame-2', { damages: [{ ...row, found: '' }] }));
  expect(action).toMatchObject({ class: 'amber', kind: 'do-not-reload', due: null, age: null, overdue: null });
  expect(action.says.join('')).toContain('its clock cannot run');
});
