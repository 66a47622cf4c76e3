import { expect, test } from 'vitest';
import { frameLevels, storeysOf, type FrameBeamEnd } from '../../../src-core/checks/frame-loads';
import { frameStorey, type FrameStoreyInput } from '../../../src-core/checks/frame-storey';
import type { FrameBay } from '../../../src-core/checks/frame-rating';
import { resolveRules } from '../../../src-core/checks/rule-sets';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const rules = resolveRules({ set: 'european', changed: [] });
const TABLE = [
  [1000, 11_800],
  [1250, 10_900],
  [1500, 9800],
  [1750, 8700],
  [2000, 7600],
  [2250, 6600],
].map(([heightMm = 0, ratedKg = 0]) => ({ heightMm, ratedKg }));

const end = (side: 'left' | 'right', height: number, part: Partial<FrameBeamEnd> = {}): FrameBeamEnd => ({
  name: `the level at ${height} of bay ${side}`,
  side,
  height,
  goodsFrontKg: 500,
  goodsRearKg: 500,
  beamKg: 6.5,
  deckKg: 0,
  ...part,
});

const bay = (
  side: 'left' | 'right',
  heights: readonly number[],
  notice: Partial<NonNullable<FrameBay['notice']>> | null = null,
): FrameBay => ({
  name: `bay ${side}`,
  side,
  firstBeam: heights[0] ?? null,
  greatestGap: heights.length < 2 ? null : Math.max(...heights.slice(1).map((height, i) => height - (heights[i] ?? 0))),
  notice:
    notice === null
      ? null
      : { from: 'load notice LN-1', frameKg: null, firstBeam: null, greatestGap: null, field: `notice:${side}:`, ...notice },
  field: `bay:${side}:`,
  firstBeamField: `level:${side}-1:heightMm`,
});

/** Scenario S5: four levels of 2 000 kg, all central; beams of 13 kg, a frame of 60 kg. */
const s5 = (
  heights: readonly number[],
  part: Partial<FrameStoreyInput> = {},
  sides: readonly ('left' | 'right')[] = ['left', 'right'],
): FrameStoreyInput => ({
  place: { runId: 'r', frameId: 'f' },
  frame: 'frame F2',
  bays: sides.map((side) => bay(side, heights)),
  table: { rows: TABLE, by: 'greatest-height', from: 'table of F 100', field: 'frameType:t:table' },
  choice: 'next-taller-row',
  levels: frameLevels(
    sides.flatMap((side) => heights.map((height) => end(side, height))),
    50,
  ),
  massKg: 60,
  massFrom: 'frame type F 100',
  height: 8000,
  missing: [],
  impossible: false,
  rules,
  ...part,
});

const AT_1500 = [1500, 3000, 4500, 6000];
const AT_1900 = [1900, 3400, 4900, 6400];

test('S5: an inner frame carries 8 164 kg and an end frame 4 112 kg', () => {
  // 4·2 000 + 4·2·13 + 60 = 8 164; 4 000 + 52 + 60 = 4 112 (scenario S5)
  expect(frameStorey(s5(AT_1500)).finding.demand?.value).toBeCloseTo(8164, 9);
  expect(frameStorey(s5(AT_1500, {}, ['right'])).finding.demand?.value).toBeCloseTo(4112, 9);
});

test('S5: with its first beam at 1 500 mm it is within, 0.833', () => {
  const { finding, utilisation } = frameStorey(s5(AT_1500));
  expect(utilisation?.toFixed(3)).toBe('0.833');
  expect(finding.verdict).toBe('within');
  expect(plain(finding.says)).toBe('Frame F2 carries 8164 kg at its foot. The maker’s table allows 9800 kg.');
  expectWorked(finding);
});

test.each([
  // 8 164 / 7 600 and 8 164 / 8 040; what is left for goods: (7 600 − 164) / 4 and (8 040 − 164) / 4 (scenario S5)
  ['next-taller-row', '7600', '1.074', '1859 kg a level'],
  ['interpolate', '8040', '1.015', '1969 kg a level'],
] as const)('S5: raised to 1 900 mm it is over, by %s %s kg, %s', (choice, rated, used, left) => {
  const { finding } = frameStorey(s5(AT_1900, { choice }));
  expect(finding.allowed?.value.toFixed(0)).toBe(rated);
  expect(finding.utilisation?.toFixed(3)).toBe(used);
  expect(finding.verdict).toBe('over');
  expect(finding.notes.map(plain).join(' ')).toContain(left);
  expectWorked(finding);
});

test('S5: raised to 2 400 mm there is no rating and no number', () => {
  const { finding, utilisation } = frameStorey(s5([2400, 3900, 5400, 6900]));
  expect(finding.verdict).toBe('not-assessable');
  expect([finding.utilisation, finding.allowed, utilisation]).toEqual([null, null, null]);
  expect(finding.missing.map(({ field }) => field)).toEqual(['frameType:t:table']);
  expect(finding.missing[0]?.how).toContain('no rating is taken from beyond a table');
  expect(finding.notes.map(plain).join(' ')).toContain('The table ends at 2250 mm');
});

test('storey by storey from the top down, each with its own foot of the frame', () => {
  // Top: 2 · (1 000 + 13) + 60 · (1 − 4 500/8 000) = 2 026 + 26.25; each below adds 2 026 and 11.25 of the frame.
  const storeys = storeysOf(s5(AT_1500).levels, 60, 8000);
  expect(storeys.map(({ from, to, height }) => [from, to, height])).toEqual([
    [0, 1500, 1500],
    [1500, 3000, 1500],
    [3000, 4500, 1500],
    [4500, 6000, 1500],
  ]);
  const totals = storeys.map(({ frontKg, rearKg }) => frontKg + rearKg);
  for (const [i, kg] of [8164, 6126.75, 4089.5, 2052.25].entries()) expect(totals[i]).toBeCloseTo(kg, 9);
});

test('a table by each storey’s height judges each at its own, one by the greatest height all at that', () => {
  // Levels at 1 500 and 3 700: lower storey 1 500 (9 800), upper 2 200 (row 2 250, 6 600).
  // At the foot 2 · 2 026 + 60 = 4 112; above 1 500: 2 026 + 60 · (1 − 1 500/8 000) = 2 074.75.
  const heights = [1500, 3700];
  const table = { rows: TABLE, from: 'table of F 100', field: 'frameType:t:table' };
  const each = frameStorey(s5(heights, { table: { ...table, by: 'storey-height' } }));
  expect(each.storeys.map(({ rating }) => rating.kg)).toEqual([9800, 6600]);
  expect(each.utilisation).toBeCloseTo(4112 / 9800, 12);
  const greatest = frameStorey(s5(heights, { table: { ...table, by: 'greatest-height' } }));
  expect(greatest.storeys.map(({ rating }) => rating.kg)).toEqual([6600, 6600]);
  expect(greatest.utilisation).toBeCloseTo(4112 / 6600, 12);
});

test('an upper storey governs where its own rating is low enough, and is named', () => {
  const rows = [
    { heightMm: 1500, ratedKg: 9800 },
    { heightMm: 2250, ratedKg: 3000 },
  ];
  const found = frameStorey(s5([1500, 3700], { table: { rows, by: 'storey-height', from: 'table of F 100', field: 'f' } })).finding;
  // 2 074.75 / 3 000 = 0.692 against 4 112 / 9 800 = 0.420
  expect(found.utilisation).toBeCloseTo(2074.75 / 3000, 12);
  expect(plain(found.says)).toContain('from 1500 mm to 3700 mm');
  expectWorked(found);
});

test('the worse post decides: 700 kg front and 300 kg rear a beam end count as 1 400 kg', () => {
  // Front: 8 · (700 + 6.5) + 30 = 5 682; twice that is 11 364 of 9 800.
  const levels = frameLevels(
    (['left', 'right'] as const).flatMap((side) => AT_1500.map((height) => end(side, height, { goodsFrontKg: 700, goodsRearKg: 300 }))),
    50,
  );
  const { finding } = frameStorey(s5(AT_1500, { levels }));
  expect(finding.demand?.value).toBeCloseTo(11_364, 9);
  expect(finding.place.post).toBe('front');
  expect(finding.verdict).toBe('over');
  expect(plain(finding.says)).toContain('8164 kg at its foot, 5682 kg of it on its front post: as much as 11364 kg shared alike');
  expectWorked(finding);
});

test('a beam that the neighbour lacks makes it not assessable and names the bay and the beam', () => {
  const levels = frameLevels(
    [...AT_1500.map((height) => end('left', height)), ...[3000, 4500, 6000].map((height) => end('right', height))],
    50,
  );
  const { finding } = frameStorey(s5(AT_1500, { levels, bays: [bay('left', AT_1500), bay('right', [3000, 4500, 6000])] }));
  expect(finding.verdict).toBe('not-assessable');
  expect(finding.missing).toEqual([
    {
      input: 'beams of bay right beside the level at 1500 of bay left',
      how: expect.stringContaining('held from one side only'),
      field: 'bay:right:levels',
    },
  ]);
});

test.each([
  [1550, 'within'],
  [1551, 'not-assessable'],
])('beams at 1 500 and %d mm: %s', (height, verdict) => {
  const heights = [height, 3000, 4500, 6000];
  const levels = frameLevels([...AT_1500.map((one) => end('left', one)), ...heights.map((one) => end('right', one))], 50);
  const { finding, storeys } = frameStorey(s5(AT_1500, { levels, bays: [bay('left', AT_1500), bay('right', heights)] }));
  // At 1 550 the greatest unsupported height is 1 550, so the row of 1 750 holds: 8 164 / 8 700 = 0.938, close.
  expect(finding.verdict).toBe(verdict === 'within' ? 'close' : verdict);
  if (verdict === 'within') expect(storeys[0]?.height).toBe(1550);
});

test('an end frame has one bay only and is assessable', () => {
  expect(frameStorey(s5(AT_1500, {}, ['left'])).finding.verdict).toBe('within');
});

test('a first beam above its notice is not assessable by itself, and over where the table proves that', () => {
  const bays = [bay('left', AT_1900, { firstBeam: 1900 }), bay('right', AT_1900, { firstBeam: 1500 })];
  const light = frameLevels(
    (['left', 'right'] as const).flatMap((side) => AT_1900.map((height) => end(side, height, { goodsFrontKg: 100, goodsRearKg: 100 }))),
    50,
  );
  const found = frameStorey(s5(AT_1900, { bays, levels: light })).finding;
  expect(found.verdict).toBe('not-assessable');
  expect(found.missing).toEqual([
    {
      input: 'rating of the frame for the first beam of bay right',
      how: expect.stringContaining('Lower it'),
      field: 'level:right-1:heightMm',
    },
  ]);
  const heavy = frameStorey(s5(AT_1900, { bays })).finding;
  expect(heavy.verdict).toBe('over');
  expect(heavy.missing).toHaveLength(1);
});

test('an unknown mass is never zero: not assessable below the rating, over where what is known is over already', () => {
  const missing = [{ input: 'mass of frame type F 100', how: 'Ask.', field: 'frameType:t:massKg' }];
  const unknown = frameStorey(s5(AT_1500, { massKg: 0, missing })).finding;
  expect(unknown.verdict).toBe('not-assessable');
  expect(unknown.utilisation).toBeNull();
  expect(plain(unknown.says)).toContain('carries at least 8104 kg');
  expect(frameStorey(s5(AT_1900, { massKg: 0, missing })).finding.verdict).toBe('over');
});

test('without a table the lower number of the two notices holds, for the bays as they stand on them', () => {
  const shown = { firstBeam: 1500, greatestGap: 1500 };
  const input = s5(AT_1500, {
    table: null,
    bays: [bay('left', AT_1500, { frameKg: 9000, ...shown }), bay('right', AT_1500, { frameKg: 8500, ...shown })],
  });
  const { finding } = frameStorey(input);
  expect(finding.utilisation).toBeCloseTo(8164 / 8500, 12);
  expect(plain(finding.says)).toContain('The notice of bay right allows 8500 kg');
  expectWorked(finding);
});

test('of a table and a lower number on a notice the lower one holds, and a higher one changes nothing', () => {
  const noticed = (frameKg: number) =>
    frameStorey(s5(AT_1500, { bays: [bay('left', AT_1500, { frameKg }), bay('right', AT_1500)] })).finding;
  expect(noticed(9000).utilisation).toBeCloseTo(8164 / 9000, 12);
  expect(noticed(9000).notes.map(plain).join(' ')).toContain(
    'The lower of two ratings is used: 9000 kg by the notice of bay left, 9800 kg by the maker’s table.',
  );
  expectWorked(noticed(9000));
  expect(noticed(9900).utilisation).toBeCloseTo(8164 / 9800, 12);
});

test.each([
  ['no notice', null, 'bay:right:noticeId'],
  ['no number of the frame', { firstBeam: 1500, greatestGap: 1500 }, 'notice:right:frameKg'],
  ['no first beam', { frameKg: 9000, greatestGap: 1500 }, 'notice:right:firstBeamMm'],
  ['no greatest gap', { frameKg: 9000, firstBeam: 1500 }, 'notice:right:greatestGapMm'],
  ['a gap greater than the notice’s', { frameKg: 9000, firstBeam: 1500, greatestGap: 1400 }, 'bay:right:levels'],
])('without a table and with %s on one notice it is not assessable', (_, notice, field) => {
  const left = bay('left', AT_1500, { frameKg: 9000, firstBeam: 1500, greatestGap: 1500 });
  const { finding } = frameStorey(s5(AT_1500, { table: null, bays: [left, bay('right', AT_1500, notice)] }));
  expect(finding.verdict).toBe('not-assessable');
  expect(finding.missing.map((one) => one.field)).toEqual([field]);
});

test('beams above the top of the frame are not possible', () => {
  const { finding } = frameStorey(s5(AT_1500, { height: 5000 }));
  expect(finding.verdict).toBe('not-possible');
  expect(plain(finding.says)).toContain('6000 mm, and it is only 5000 mm high');
});

test('a frame without beams carries itself', () => {
  expect(frameStorey(s5([], { levels: [] })).finding.verdict).toBe('within');
});
