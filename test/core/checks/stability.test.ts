/** Height to depth, anchor pull, plumb, and the order of heavy goods. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { bestOrder, centreHeight, heavyLow, type HeavyLowInput, type StackedGoods } from '../../../src-core/checks/heavy-low';
import { anchorPull, heightToDepth, type HeightToDepthInput } from '../../../src-core/checks/height-to-depth';
import { plumb, type PlumbSurvey } from '../../../src-core/checks/plumb';
import { resolveRules, type RuleSetName } from '../../../src-core/checks/rule-sets';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const rulesOf = (set: RuleSetName = 'european') => resolveRules({ set, changed: [] });
const place = { runId: 'r', frameId: 'f' };
const missing = (field: string) => ({ input: field, how: 'Look.', field });
const asked = (answer: 'yes' | 'no' | 'unknown', field: string) => ({ answer, missing: missing(field) });

const slender = (height: number | null, part: Partial<HeightToDepthInput> = {}): HeightToDepthInput => ({
  place,
  frame: 'frame F1',
  height,
  depth: 1000,
  depthMissing: missing('frame:f:typeId'),
  rules: rulesOf('united-states'),
  anchored: asked('yes', 'frame:f:anchored'),
  restrained: asked('no', 'frame:f:restrained'),
  behind: null,
  ...part,
});

test.each([
  // 6:1 normal anchoring, above it engineered anchors, above 8:1 a tie (F-49 to F-51)
  [6000, 'within'],
  [6001, 'close'],
  [8000, 'close'],
  [8001, 'over'],
])('beams %d mm high on a depth of 1 000 mm, not held at the top: %s', (height, verdict) => {
  const found = heightToDepth(slender(height));
  expect(found.verdict).toBe(verdict);
  expect(found.demand?.value).toBeCloseTo(height / 1000, 12);
  expectWorked(found);
});

test('in inches: 252 on 42 is 6.0, 300 on 44 is 6.82, 345 on 42 is 8.21', () => {
  // 252/42 = 6; 300/44 = 6.818; 345/42 = 8.214
  const inch = (height: number, depth: number) => heightToDepth(slender(height * 25.4, { depth: depth * 25.4 }));
  expect([inch(252, 42), inch(300, 44), inch(345, 42)].map(({ demand, verdict }) => [demand?.value.toFixed(2), verdict])).toEqual([
    ['6.00', 'within'],
    ['6.82', 'close'],
    ['8.21', 'over'],
  ]);
});

test.each([
  ['yes', 7000, 'within'],
  ['yes', 9000, 'within'],
  ['unknown', 6000, 'within'],
  ['unknown', 7000, 'not-assessable'],
  ['unknown', 9000, 'not-assessable'],
] as const)('held at the top: %s, %d mm high: %s', (answer, height, verdict) => {
  const found = heightToDepth(slender(height, { restrained: asked(answer, 'frame:f:restrained') }));
  expect(found.verdict).toBe(verdict);
  if (verdict === 'not-assessable') expect(found.missing.map(({ field }) => field)).toEqual(['frame:f:restrained']);
});

test('normal anchoring is taken for granted, so it is asked for', () => {
  expect(heightToDepth(slender(3000, { anchored: asked('no', 'frame:f:anchored') })).verdict).toBe('over');
  const unknown = heightToDepth(slender(3000, { anchored: asked('unknown', 'frame:f:anchored') }));
  expect(unknown.missing.map(({ field }) => field)).toEqual(['frame:f:anchored']);
  expect(heightToDepth(slender(3000, { depth: null })).missing.map(({ field }) => field)).toEqual(['frame:f:typeId']);
});

test('two runs tied by row spacers count over both depths and the gap', () => {
  // 9 000 / (1 000 + 200 + 1 000) = 4.09
  const behind = (answer: 'yes' | 'no' | 'unknown') => ({
    run: 'B',
    depth: 1000,
    gap: 200,
    spacers: asked(answer, 'run:r:backToBack.rowSpacers'),
  });
  const tied = heightToDepth(slender(9000, { behind: behind('yes') }));
  expect(tied.verdict).toBe('within');
  expect(tied.demand?.value).toBeCloseTo(9000 / 2200, 12);
  expect(tied.notes.map(plain).join(' ')).toContain('By itself it stands at 9 to 1');
  expectWorked(tied);
  expect(heightToDepth(slender(9000, { behind: behind('no') })).verdict).toBe('over');
  expect(heightToDepth(slender(9000, { behind: behind('unknown') })).missing.map(({ field }) => field)).toEqual([
    'run:r:backToBack.rowSpacers',
  ]);
  expect(heightToDepth(slender(5000, { behind: behind('unknown') })).verdict).toBe('within');
});

test('anchor pull informs: 350 lbf at 6 m on a frame of 1 m and 100 kg pulls with 8.85 kN', () => {
  // (1 556.878·6 000 − 100·9.806 65·1 000/2)/1 000 = 9 341.265 − 490.3325 = 8 850.933 N
  const found = anchorPull({ ...slender(6000), emptyKg: 100, missing: [] });
  expect(found.demand?.value).toBeCloseTo(8850.933, 2);
  expect(found).toMatchObject({ counts: false, verdict: 'within' });
  expectWorked(found);
  const heavy = anchorPull({ ...slender(500), emptyKg: 1000, missing: [] });
  expect(heavy.demand?.value).toBe(0);
  expect(plain(heavy.says)).toContain('its own weight holds it');
  const unknown = anchorPull({ ...slender(6000), emptyKg: null, missing: [missing('frameType:t:massKg')] });
  expect(unknown).toMatchObject({ verdict: 'not-assessable', counts: false });
});

const survey = (part: Partial<PlumbSurvey>, set: RuleSetName = 'european') =>
  plumb({
    place,
    frame: 'frame F1',
    survey: { alongMm: 0, acrossMm: 0, heightMm: 6000, loaded: true, ...part },
    missing: missing('frame:f:plumb'),
    rules: rulesOf(set),
  });

test.each<[RuleSetName, boolean, number, string]>([
  // F-36 to F-41: 6 000/300 = 20, /350 = 17.14, /240 = 25, /500 = 12
  ['european', true, 20, 'close'],
  ['european', true, 20.1, 'over'],
  ['european', true, 18, 'within'],
  ['european', false, 17.1, 'close'],
  ['european', false, 17.2, 'over'],
  ['united-states', true, 25, 'close'],
  ['united-states', true, 25.1, 'over'],
  ['australian', false, 12.1, 'over'],
])('%s, loaded %s: %d mm over 6 m is %s', (set, loaded, offset, verdict) => {
  for (const part of [{ alongMm: offset }, { alongMm: -offset }, { acrossMm: offset, alongMm: 1 }]) {
    const found = survey({ ...part, loaded }, set);
    expect(found.verdict).toBe(verdict);
    expect(found.notes.map(plain)[0]).toMatch(
      new RegExp({ european: 'European', 'united-states': 'United States', australian: 'Australian' }[set]),
    );
    expectWorked(found);
  }
});

test('½ in over 10 ft is the United States limit', () => {
  // F-39: 12.7/3 048 = 1/240
  expect(survey({ alongMm: 12.7, heightMm: 3048 }, 'united-states').utilisation).toBeCloseTo(1, 12);
});

test('without a survey plumb is not assessable', () => {
  const found = plumb({ place, frame: 'frame F1', survey: null, missing: missing('frame:f:plumb'), rules: rulesOf() });
  expect(found.missing.map(({ field }) => field)).toEqual(['frame:f:plumb']);
});

const stacked = (name: string, massKg: number | null, level: number, height = 1000): StackedGoods => ({
  placementId: name,
  name,
  massKg,
  from: 'weighed',
  foot: 1500 * level,
  height,
  level: `level ${level}`,
  missing: [{ input: `mass of ${name}`, how: 'Weigh it.', field: `unitLoad:${name}:goodsKg` }],
});
const heavy = (goods: readonly StackedGoods[], part: Partial<HeavyLowInput> = {}) =>
  heavyLow({ place, bay: 'bay A1', goods, levels: ['level 1', 'level 2', 'level 3'], rules: rulesOf(), ...part });

test('900 kg on top and 300 kg at the bottom have their centre 4 m high, 3 m heaviest low', () => {
  // As it stands: (300·2 000 + 600·3 500 + 900·5 000)/1 800 = 7 200 000/1 800 = 4 000
  // Best: (900·2 000 + 600·3 500 + 300·5 000)/1 800 = 5 400 000/1 800 = 3 000; 33.3 % above
  const found = heavy([stacked('light', 300, 1), stacked('middle', 600, 2), stacked('heavy', 900, 3)]);
  expect(found.demand?.value).toBeCloseTo(4000, 9);
  expect(found.allowed?.value).toBeCloseTo(3000 * 1.1, 9);
  expect(found.verdict).toBe('close');
  expect(plain(found.says)).toContain('33.3333 % above the best order');
  const notes = found.notes.map(plain).join(' ');
  expect(notes).toContain('Best order, by mass alone: level 1 heavy; level 2 middle; level 3 light.');
  expect(notes).toContain('3 pairs of unit loads have the heavier one higher');
  expectWorked(found);
});

test('heaviest low is within', () => {
  const found = heavy([stacked('heavy', 900, 1), stacked('middle', 600, 2), stacked('light', 300, 3)]);
  expect(found.verdict).toBe('within');
  expectWorked(found);
});

test('a topmost level above the mean is pointed out though the centre is low', () => {
  // 1 000, 900, 1 010: mean 970; best order swaps little
  const found = heavy([stacked('a', 1000, 1), stacked('b', 900, 2), stacked('c', 1010, 3)]);
  expect(found.verdict).toBe('close');
  expect(plain(found.says)).toContain('The topmost level carries 1010 kg, more than the mean of 970 kg');
});

test('no order of the same goods has a lower centre than the best one', () => {
  const goods = fc.array(fc.tuple(fc.integer({ min: 1, max: 1000 }), fc.integer({ min: 1, max: 5 }), fc.integer({ min: 100, max: 2000 })), {
    minLength: 1,
    maxLength: 6,
  });
  fc.assert(
    fc.property(
      goods.chain((list) => fc.tuple(fc.constant(list), fc.shuffledSubarray(list, { minLength: list.length }))),
      ([list, shuffled]) => {
        const known = list.map(([massKg, level, height], i) => ({ ...stacked(`g${i}`, massKg, level, height), massKg }));
        const best = bestOrder(known).height;
        const other = shuffled.map(([massKg, , height], i) => ({ massKg, height, foot: known[i]?.foot ?? 0 }));
        expect(best).toBeLessThanOrEqual(centreHeight(known) * (1 + 1e-12));
        expect(best).toBeLessThanOrEqual(centreHeight(other) * (1 + 1e-12));
      },
    ),
    { numRuns: 300 },
  );
});

test('an unknown mass is not assessable; an empty bay is within', () => {
  expect(heavy([stacked('a', null, 1), stacked('b', 10, 2)]).missing.map(({ field }) => field)).toEqual(['unitLoad:a:goodsKg']);
  expect(heavy([]).verdict).toBe('within');
});
