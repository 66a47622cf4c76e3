import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { LIMITS } from '../../../src-core/site/limits';
import { readSite } from '../../../src-core/site/read';
import type { BearingShape, Site, Slope } from '../../../src-core/site/site';
import { writeSite } from '../../../src-core/site/write';
import { makeFrame, makePlacement, UNKNOWN_SOURCE } from '../../make';
import { arbitrarySite } from '../../make-random';
import { sound, spoilt } from './sound-site';

const damage = {
  id: 'damage',
  member: 'bracing' as const,
  alongMm: null,
  acrossMm: 4,
  gaugeMm: 1000,
  torn: false,
  note: '',
  found: '2026-05-04',
};

function problemsOf(json: unknown) {
  const reading = readSite(json);
  return reading.ok ? [] : reading.problems;
}

test('a sound site reads', () => {
  expect(readSite(JSON.parse(writeSite(sound())))).toEqual({ ok: true, site: sound() });
});

test('any site reads back as it was written', () => {
  fc.assert(
    fc.property(arbitrarySite(), (site) => {
      expect(readSite(JSON.parse(writeSite(site)))).toEqual({ ok: true, site });
    }),
    { numRuns: 500 },
  );
});

const level = ['runs', 1, 'bays', 0, 'levels', 1] as const;
const placed = [...level, 'placements', 0] as const;
const shape = (bearing: unknown): readonly [readonly (string | number)[], unknown] => [['unitLoads', 0, 'bearing'], bearing];

// Each class of fault: where it is put, its value, and what must be said where. The words are ours.
test.each<[string, readonly [readonly (string | number)[], unknown], string, RegExp]>([
  ['no site at all', [['name'], 17], 'name', /Must be text of at most 200 letters, at least one of them visible, but is 17/],
  [
    'a missing key',
    [[...placed, 'atMm'], undefined],
    'runs[1].bays[0].levels[1].placements[0].atMm',
    /^Is missing\. Add it: a number of mm/,
  ],
  ['a missing list', [['runs'], undefined], 'runs', /^Is missing\. Add it: a list of at most 10000 runs/],
  [
    'an unknown key',
    [[...placed, 'atMM'], 3],
    'runs[1].bays[0].levels[1].placements[0].atMM',
    /^No placement has this key: it has id, unitLoadId, atMm, mirrored and towardsFrontMm\. Remove it or correct its name/,
  ],
  ['a constructor key', [['constructor'], 1], 'constructor', /^No site has this key/],
  ['a key that is no word', [['a b.c'], 1], '["a b.c"]', /^No site has this key/],
  [
    'text for a number',
    [[...placed, 'atMm'], '75 mm'],
    'runs[1].bays[0].levels[1].placements[0].atMm',
    /but is "75 mm"\. Write the plain number, without quotation marks or unit/,
  ],
  ['a number for text', [['runs', 0, 'name'], 7], 'runs[0].name', /Must be text .* but is 7/],
  ['an empty name', [['runs', 0, 'name'], '  '], 'runs[0].name', /at least one of them visible, but is " {2}"/],
  ['null for what must be known', [['runs', 0, 'bays', 1, 'clearEntryMm'], null], 'runs[0].bays[1].clearEntryMm', /null means "not known"/],
  ['a list for an object', [['rules'], []], 'rules', /Must be an object that describes a set of rules, but is a list of 0/],
  ['an object for a list', [['runs'], {}], 'runs', /Must be a list of at most \d+ runs, but is an object/],
  [
    'a text for a truth',
    [[...placed, 'mirrored'], 'false'],
    'runs[1].bays[0].levels[1].placements[0].mirrored',
    /Must be true or false, but is "false"/,
  ],
  [
    'a negative mass',
    [['unitLoads', 0, 'goodsKg'], -5],
    'unitLoads[0].goodsKg',
    /from 0 to 1000000, or null where it is not known, but is -5/,
  ],
  ['a zero clear entry', [['runs', 0, 'bays', 0, 'clearEntryMm'], 0], 'runs[0].bays[0].clearEntryMm', /of mm above 0 .* but is 0/],
  ['a zero rating', [['notices', 0, 'levelKg', 0], 0], 'notices[0].levelKg[0]', /of kg above 0 .* or null where none is stated, but is 0/],
  ['a rating over no span', [['beamTypes', 0, 'ratings', 0, 'spanMm'], 0], 'beamTypes[0].ratings[0].spanMm', /above 0/],
  ['a length of kilometres', [[...level, 'heightMm'], 1e9], 'runs[1].bays[0].levels[1].heightMm', /at most 100000, but is 1000000000/],
  ['a mass beyond reason', [['unitLoads', 0, 'goodsKg'], 2e6], 'unitLoads[0].goodsKg', /to 1000000/],
  ['a name as long as a book', [['name'], 'x'.repeat(5000)], 'name', /but is "x{40}…"/],
  ['a word that is no answer', [['seismic'], 'maybe'], 'seismic', /Must be one of "yes", "no" or "unknown", but is "maybe"/],
  ['an unknown rule set', [['rules', 'set'], 'lunar'], 'rules.set', /"european", "united-states" or "australian", but is "lunar"/],
  ['an unknown check', [['rules', 'leftOut'], [{ check: 'colour', reason: 'x' }]], 'rules.leftOut[0].check', /but is "colour"/],
  ['a check left out without a reason', [['rules', 'leftOut'], [{ check: 'plumb', reason: ' ' }]], 'rules.leftOut[0].reason', /visible/],
  [
    'a check left out twice',
    [['rules', 'leftOut'], ['a', 'b'].map((reason) => ({ check: 'plumb', reason }))],
    'rules.leftOut[1].check',
    /"plumb" is left out twice/,
  ],
  ['an unknown rule', [['rules', 'changed'], [{ key: 'toString', value: 1, reason: 'x' }]], 'rules.changed[0].key', /but is "toString"/],
  [
    'a rule beyond its bounds',
    [['rules', 'changed'], [{ key: 'deflectionDivisor', value: 3, reason: 'x' }]],
    'rules.changed[0].value',
    /from 50 to 2000, but is 3/,
  ],
  [
    'a fractional count',
    [[...level, 'deck'], { kind: 'mesh', count: 2.5, panelKg: null, massKg: null, source: UNKNOWN_SOURCE }],
    'runs[1].bays[0].levels[1].deck.count',
    /a number without decimals from 1/,
  ],
  [
    'an unknown deck',
    [[...level, 'deck'], { kind: 'carpet' }],
    'runs[1].bays[0].levels[1].deck.kind',
    /"none", "support-bars", "mesh" or "panels", but is "carpet"/,
  ],
  ['a deck of no kind', [[...level, 'deck'], {}], 'runs[1].bays[0].levels[1].deck.kind', /^Is missing/],
  ['a day that is not in the calendar', [['floors', 0, 'source', 'date'], '2026-02-29'], 'floors[0].source.date', /a date as YYYY-MM-DD/],
  ['a date the wrong way round', [['floors', 0, 'source', 'date'], '04.05.2026'], 'floors[0].source.date', /a date as YYYY-MM-DD/],
  [
    'levels out of order',
    [[...level, 'heightMm'], 900],
    'runs[1].bays[0].levels[1].heightMm',
    /from the lowest up, but 900 comes after 1500/,
  ],
  [
    'two levels at one height',
    [[...level, 'heightMm'], 1500],
    'runs[1].bays[0].levels[1].heightMm',
    /from the lowest up, but two have 1500/,
  ],
  [
    'too few frames',
    [['runs', 0, 'frames'], [makeFrame({ id: 'only' })]],
    'runs[0].frames',
    /^2 bays stand between 3 frames, but there are 1/,
  ],
  ['an id that is a path', [['id'], '../etc/passwd'], 'id', /Must be an id .* but is "\.\.\/etc\/passwd"/],
  ['an id that objects answer to', [['id'], 'constructor'], 'id', /Must be an id/],
  ['an id of a million letters', [['id'], 'a'.repeat(1e6)], 'id', /Must be an id/],
  [
    'no such unit load',
    [[...placed, 'unitLoadId'], 'gone'],
    'runs[1].bays[0].levels[1].placements[0].unitLoadId',
    /no unit load of this site has the id "gone"/,
  ],
  [
    'the id of something else',
    [[...placed, 'unitLoadId'], 'floor'],
    'runs[1].bays[0].levels[1].placements[0].unitLoadId',
    /not a unit load but a floor has the id "floor"/,
  ],
  ['no such pallet', [['unitLoads', 0, 'palletId'], 'gone'], 'unitLoads[0].palletId', /no pallet of this site has the id "gone"/],
  ['no such notice', [['runs', 0, 'bays', 0, 'noticeId'], 'gone'], 'runs[0].bays[0].noticeId', /no load notice/],
  ['no such beam type on a level', [[...level, 'beamTypeId'], 'gone'], 'runs[1].bays[0].levels[1].beamTypeId', /no beam type/],
  ['no such beam type on a notice', [['notices', 0, 'beamTypeId'], 'gone'], 'notices[0].beamTypeId', /no beam type/],
  ['no such frame type', [['runs', 0, 'frames', 2, 'typeId'], 'gone'], 'runs[0].frames[2].typeId', /no frame type/],
  ['no such floor', [['runs', 0, 'floorId'], 'gone'], 'runs[0].floorId', /no floor/],
  [
    'no such run behind',
    [['runs', 0, 'backToBack'], { runId: 'gone', gapMm: 200, rowSpacers: 'yes' }],
    'runs[0].backToBack.runId',
    /no run/,
  ],
  [
    'a run behind itself',
    [['runs', 0, 'backToBack'], { runId: 'one', gapMm: 200, rowSpacers: 'yes' }],
    'runs[0].backToBack.runId',
    /with itself/,
  ],
  [
    'a tie known on one side only',
    [['runs', 0, 'backToBack'], { runId: 'two', gapMm: 200, rowSpacers: 'yes' }],
    'runs[0].backToBack.runId',
    /does not name this one back/,
  ],
  [
    'frame heights out of order',
    [['frameTypes', 0, 'table'], [2000, 1500].map((heightMm) => ({ heightMm, ratedKg: 1 }))],
    'frameTypes[0].table[1].heightMm',
    /1500 comes after 2000/,
  ],
  [
    'a shape of no known kind',
    shape({ kind: 'blob' }),
    'unitLoads[0].bearing.kind',
    /"even", "stepped", "sloped", "profile", "bearers" or "feet", but is "blob"/,
  ],
  ['a shape that is a word', shape('even'), 'unitLoads[0].bearing', /Must be an object that describes a bearing shape, but is "even"/],
  [
    'steps without columns',
    shape({ kind: 'stepped', columns: [] }),
    'unitLoads[0].bearing.columns',
    /a list of 1 to 1000 columns, but is a list of 0/,
  ],
  [
    'a column by mass and by density',
    shape({ kind: 'stepped', columns: [{ widthMm: 1, massKg: 1, heightMm: 1 }] }),
    'unitLoads[0].bearing.columns[0].heightMm',
    /No column has this key: it has widthMm and massKg/,
  ],
  [
    'a column without width',
    shape({ kind: 'stepped', columns: [{ widthMm: 0, massKg: 1 }] }),
    'unitLoads[0].bearing.columns[0].widthMm',
    /above 0/,
  ],
  [
    'a column of air',
    shape({ kind: 'stepped', columns: [{ widthMm: 10, heightMm: 1, densityKgPerM3: 0 }] }),
    'unitLoads[0].bearing.columns[0].densityKgPerM3',
    /above 0/,
  ],
  [
    'a slope of no known kind',
    shape({ kind: 'sloped', slope: { by: 'eye' } }),
    'unitLoads[0].bearing.slope.by',
    /"intensities", "heights", "ratio" or "end-and-slope"/,
  ],
  [
    'a negative intensity',
    shape({ kind: 'sloped', slope: { by: 'intensities', leftKgPerM: -1, rightKgPerM: 1 } satisfies Slope }),
    'unitLoads[0].bearing.slope.leftKgPerM',
    /from 0/,
  ],
  [
    'a profile of one point',
    shape({ kind: 'profile', points: [{ xMm: 0, heightMm: 1 }], densityKgPerM3: null } satisfies BearingShape),
    'unitLoads[0].bearing.points',
    /a list of 2 to 1000 points, but is a list of 1/,
  ],
  [
    'a profile that runs back',
    shape({ kind: 'profile', points: [5, 3].map((xMm) => ({ xMm, heightMm: 1 })), densityKgPerM3: null }),
    'unitLoads[0].bearing.points[1].xMm',
    /from left to right, but 3 comes after 5/,
  ],
  ['goods on no bearers', shape({ kind: 'bearers', bearers: [] }), 'unitLoads[0].bearing.bearers', /1 to 1000 bearers/],
  [
    'a negative share',
    shape({ kind: 'feet', feet: [{ xMm: 0, share: -0.5 }] }),
    'unitLoads[0].bearing.feet[0].share',
    /from 0 .* or null where it is to be found by statics, but is -0\.5/,
  ],
  [
    'damage with a made-up member',
    [['runs', 0, 'frames', 0, 'damages'], [{ ...damage, member: 'roof' }]],
    'runs[0].frames[0].damages[0].member',
    /but is "roof"/,
  ],
])('%s is told with its place', (_, [path, value], place, says) => {
  const problems = problemsOf(spoilt(path, value));
  expect(problems.map((problem) => problem.path)).toEqual([place]);
  expect(problems[0]?.message).toMatch(says);
});

test.each([
  ['1e999', 'Infinity'],
  ['-1e999', '-Infinity'],
])('%s in the text of a file is no length', (number, quoted) => {
  const json: unknown = JSON.parse(writeSite(sound()).replace('"clearEntryMm":2700', `"clearEntryMm":${number}`));
  expect(problemsOf(json)).toEqual([
    {
      path: 'runs[0].bays[0].clearEntryMm',
      message: `Must be a number of mm above 0 and at most 100000, but is ${quoted}. That is beyond what a number can hold. Correct it.`,
    },
  ]);
});

test('NaN is no number of anything', () => {
  expect(problemsOf(spoilt(['unitLoads', 0, 'goodsKg'], Number.NaN))[0]?.message).toMatch(/but is NaN/);
});

test('a __proto__ key of a file is told and changes no object', () => {
  const json: unknown = JSON.parse(writeSite(sound()).replace('"name":', '"__proto__":{"name":"x","polluted":1},"name":'));
  expect(problemsOf(json).map(({ path }) => path)).toContain('["__proto__"]');
  expect(({} as Record<string, unknown>).polluted).toBeUndefined();
});

test('what is no site is told as a whole', () => {
  for (const json of [null, 3, 'site', [], true, undefined])
    expect(problemsOf(json)).toEqual([{ path: '', message: expect.stringMatching(/^Must be an object that describes a site, but is /) }]);
});

test('the same id twice is told at its second place and names the first, wherever they stand', () => {
  expect(problemsOf(spoilt(['runs', 1, 'bays', 1, 'id'], 'goods'))).toEqual([
    { path: 'runs[1].bays[1].id', message: 'The id "goods" already stands at unitLoads[0].id. Give one of the two an id of its own.' },
  ]);
  expect(problemsOf(spoilt(['runs', 0, 'frames', 0, 'damages'], [damage, damage])).map(({ path }) => path)).toEqual([
    'runs[0].frames[0].damages[1].id',
  ]);
});

test('every problem of a file is told, not only the first', () => {
  const json = spoilt(['unitLoads', 0, 'goodsKg'], -1) as { runs: { name: unknown; bays: { levels: unknown }[] }[]; notes?: string };
  delete json.notes;
  (json.runs[0] as { name: unknown }).name = null;
  (json.runs[1]?.bays[1] as { levels: unknown }).levels = 'none';
  expect(problemsOf(json).map(({ path }) => path)).toEqual(['notes', 'unitLoads[0].goodsKg', 'runs[0].name', 'runs[1].bays[1].levels']);
});

test('two runs tied back to back must agree on gap and spacers', () => {
  const tie = (runId: string, gapMm: number) => ({ runId, gapMm, rowSpacers: 'yes' as const });
  const tied = (gap: number): Site => {
    const [one, two] = sound().runs;
    if (!one || !two) throw new Error('the sound site has two runs');
    return {
      ...sound(),
      runs: [
        { ...one, backToBack: tie('two', 200) },
        { ...two, backToBack: tie('one', gap) },
      ],
    };
  };
  expect(readSite(tied(200)).ok).toBe(true);
  expect(problemsOf(tied(250)).map(({ path }) => path)).toEqual(['runs[0].backToBack', 'runs[1].backToBack']);
});

test('what the rack makes impossible is no problem of the file', () => {
  // Off the end, over one another, tipping, heavier than any rating: findings of the audit.
  const overlapping = ['a', 'b'].map((id) => makePlacement('goods', 3000, { id, towardsFrontMm: 2000 }));
  expect(readSite(spoilt([...level, 'placements'], overlapping)).ok).toBe(true);
});

test('a mass that is not known is taken as not known', () => {
  const reading = readSite(spoilt(['unitLoads', 0, 'goodsKg'], null));
  expect(reading.ok && reading.site.unitLoads[0]?.goodsKg).toBeNull();
});

test('problems beyond the first thousand are counted as more', () => {
  const placements = Array.from({ length: LIMITS.goodsOnLevel }, (_, i) => ({
    ...makePlacement('goods', -1e9, { id: `p${i}` }),
    mirrored: 0,
  }));
  const problems = problemsOf(spoilt([...level, 'placements'], placements));
  expect(problems).toHaveLength(LIMITS.problems + 1);
  expect(problems.at(-1)).toEqual({ path: '', message: expect.stringMatching(/more problems than the first 1000/) });
});

test('an object nested a hundred thousand deep is refused and breaks nothing', () => {
  const deep: unknown = JSON.parse('['.repeat(100_000) + ']'.repeat(100_000));
  expect(problemsOf(spoilt(['notes'], deep)).map(({ path }) => path)).toEqual(['notes']);
  expect(problemsOf(spoilt(['extra'], deep)).map(({ path }) => path)).toEqual(['extra']);
  expect(problemsOf(deep)).toHaveLength(1);
});

test('a random value anywhere either reads as just that value or is told, and never throws', () => {
  const paths = everyPath(sound());
  fc.assert(
    fc.property(fc.constantFrom(...paths), fc.jsonValue({ maxDepth: 2 }), (path, value) => {
      const json = spoilt(path, value);
      const reading = readSite(json);
      if (reading.ok) expect(JSON.parse(writeSite(reading.site))).toEqual(JSON.parse(JSON.stringify(json)));
      else expect(reading.problems.every(({ message }) => message.length > 10 && message.length < 700)).toBe(true);
    }),
    { numRuns: 3000 },
  );
});

function everyPath(value: unknown): (string | number)[][] {
  if (typeof value !== 'object' || value === null) return [];
  const keys = Array.isArray(value) ? [...value.keys()] : Object.keys(value);
  return keys.flatMap((key) => [[key], ...everyPath((value as Record<string | number, unknown>)[key]).map((below) => [key, ...below])]);
}
