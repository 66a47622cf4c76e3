import { expect, test } from 'vitest';
import type { BearingShape, Pallet, UnitLoad } from '../../src-core/site/site';
import { outlineOf, type Outline } from '../../src-renderer/drawing/outline';

const source = { kind: 'unknown', detail: '', person: '', date: '' } as const;
const pallet: Pallet = {
  id: 'p1',
  name: 'Flat pallet',
  lengthMm: 1200,
  widthMm: 800,
  heightMm: 150,
  massKg: 25,
  boards: 'along-length',
  runners: [50, 400, 750].map((centreMm) => ({ centreMm, widthMm: 100 })),
  ratedKg: null,
  source,
};
const unitLoad = (bearing: BearingShape, change: Partial<UnitLoad> = {}): UnitLoad => ({
  id: 'u1',
  name: 'Goods',
  widthMm: 800,
  depthMm: 1200,
  heightMm: 1150,
  goodsKg: 600,
  massUncertaintyPercent: 0,
  massSource: source,
  palletId: 'p1',
  palletFace: 'width',
  bearing,
  across: { kind: 'even' },
  contact: 'flat',
  chocked: 'yes',
  leanMm: 0,
  ...change,
});
const corners = (outline: Outline) => outline.goods.map((polygon) => polygon.map(({ x, y }) => [x, y]));

test('even goods are a box on their pallet, as high as the unit load', () => {
  const outline = outlineOf(unitLoad({ kind: 'even' }), pallet, false);
  const box = [
    [0, 150],
    [800, 150],
    [800, 1150],
    [0, 1150],
  ];
  expect(corners(outline)).toEqual([box]);
  expect(outline.height).toBe(1150);
});

test('stepped goods: the heaviest column per mm is full height, the others in proportion', () => {
  const columns = [
    { widthMm: 400, massKg: 400 },
    { widthMm: 400, massKg: 200 },
  ];
  const tops = outlineOf(unitLoad({ kind: 'stepped', columns }), null, false).goods.map((polygon) => Math.max(...polygon.map((p) => p.y)));
  expect(tops).toEqual([1150, 575]);
});

test('a slope by heights is drawn with those heights, and mirrored it falls the other way', () => {
  const shape: BearingShape = { kind: 'sloped', slope: { by: 'heights', leftMm: 900, rightMm: 300 } };
  const top = (mirrored: boolean) =>
    outlineOf(unitLoad(shape), null, mirrored)
      .goods[0]?.filter((p) => p.y > 0)
      .map(({ x, y }) => [x, y])
      .toSorted((a, b) => (a[0] ?? 0) - (b[0] ?? 0));
  expect(top(false)).toEqual([
    [0, 900],
    [800, 300],
  ]);
  expect(top(true)).toEqual([
    [0, 300],
    [800, 900],
  ]);
});

test('the four ways to state a slope of 3 : 1 are drawn alike', () => {
  const slopes = [
    { by: 'intensities', leftKgPerM: 300, rightKgPerM: 900 },
    { by: 'heights', leftMm: 1150 / 3, rightMm: 1150 },
    { by: 'ratio', rightOverLeft: 3 },
    // 300 + 750 × 0.8 = 900 kg/m at the other end
    { by: 'end-and-slope', end: 'left', endKgPerM: 300, changeKgPerM2: 750 },
  ] as const;
  const drawn = slopes.map((slope) => outlineOf(unitLoad({ kind: 'sloped', slope }), null, false).goods[0]?.map((p) => Math.round(p.y)));
  for (const outline of drawn) expect(outline).toEqual([0, 0, 1150, 383]);
});

test('a profile follows its points', () => {
  const points = [
    { xMm: 0, heightMm: 200 },
    { xMm: 300, heightMm: 900 },
    { xMm: 800, heightMm: 0 },
  ];
  const outline = outlineOf(unitLoad({ kind: 'profile', points, densityKgPerM3: null }), null, false);
  expect(corners(outline)[0]).toEqual([
    [0, 0],
    [800, 0],
    [800, 0],
    [300, 900],
    [0, 200],
  ]);
});

test('goods on bearers and feet stand clear of the beam on them', () => {
  const onBearers = outlineOf(unitLoad({ kind: 'bearers', bearers: [{ centreMm: 200, widthMm: 100, share: null }] }), null, false);
  expect(onBearers.goods).toHaveLength(2);
  expect(Math.min(...(onBearers.goods[1] ?? []).map((p) => p.y))).toBe(90);
  const onFeet = outlineOf(unitLoad({ kind: 'feet', feet: [{ xMm: 0, share: null }] }), null, false);
  expect(onFeet.goods[0]?.[0]).toEqual({ x: 0, y: 0 });
});

test('a lean moves the top by its offset and leaves the base where it stands', () => {
  const outline = outlineOf(unitLoad({ kind: 'even' }, { leanMm: 40 }), pallet, false);
  expect(corners(outline)[0]).toEqual([
    [0, 150],
    [800, 150],
    [840, 1150],
    [40, 1150],
  ]);
});

test('runners that point at the aisle are seen on end, others as one long board', () => {
  expect(outlineOf(unitLoad({ kind: 'even' }), pallet, false).pallet).toHaveLength(4);
  expect(outlineOf(unitLoad({ kind: 'even' }, { palletFace: 'length', widthMm: 1200 }), pallet, false).pallet).toHaveLength(2);
});
