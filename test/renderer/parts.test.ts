import { expect, test } from 'vitest';
import type { StandingLoad } from '../../src-core/audit/context';
import { STANDARD_GRAVITY as g } from '../../src-core/units/quantity';
import { partsOf, pointsOf, stretchesOf, type Division } from '../../src-renderer/drawing/parts';

/** 0 rising to 3 kg/mm over 800 mm: 1 200 kg at two thirds of the width. */
const ramp = { lines: [{ from: 0, to: 800, wFrom: 0, wTo: 3 * g }], points: [] };
/** 1 rising to 2 kg/mm over 600 mm: a rectangle of 600 kg and a triangle of 300 kg. */
const trapezoid = { lines: [{ from: 0, to: 600, wFrom: g, wTo: 2 * g }], points: [] };
const feet = { lines: [], points: [{ at: 100, force: 50 * g }] };

const standing = (id: string, fromMm: number, widthMm: number, pieces: typeof ramp, mirrored = false, frontShare = 0.5) =>
  ({
    placement: { id, mirrored },
    goods: { unitLoad: { name: id, widthMm }, pieces },
    fromMm,
    toMm: fromMm + widthMm,
    frontShare,
  }) as unknown as StandingLoad;

const level = [standing('ramp', 100, 800, ramp), standing('trapezoid', 1000, 600, trapezoid), standing('feet', 2000, 400, feet as never)];
const massAndPlace = (division: Division) => partsOf(stretchesOf(level, 'pair', 50), division).map(({ massKg, at }) => [massKg, at]);

test('as a whole it is one resultant: 2 150 kg at the first moment over the mass', () => {
  // Σ m x = 1 200 × (150 + 1 600/3) + 600 × 1 350 + 300 × 1 450 + 50 × 2 150
  const moment = 1200 * (150 + 1600 / 3) + 600 * 1350 + 300 * 1450 + 50 * 2150;
  const [[massKg, at] = []] = massAndPlace('whole');
  expect(massKg).toBeCloseTo(2150, 9);
  expect(at).toBeCloseTo(moment / 2150, 9);
});

test('by unit loads each has its own resultant', () => {
  const found = massAndPlace('unit loads');
  expect(found.map(([massKg]) => Math.round(massKg ?? 0))).toEqual([1200, 900, 50]);
  expect(found[0]?.[1]).toBeCloseTo(150 + 1600 / 3, 9);
});

test('in pieces a trapezoid is its rectangle and the triangle on top of it', () => {
  const found = partsOf(stretchesOf(level, 'pair', 50), 'pieces');
  expect(found.map(({ label }) => label)).toEqual(['ramp, triangle', 'trapezoid, rectangle', 'trapezoid, triangle', 'feet, foot']);
  expect(found.map(({ massKg }) => Math.round(massKg))).toEqual([1200, 600, 300, 50]);
  const triangle = found[2];
  expect(triangle?.area.map(({ x, y }) => [x, Math.round(y * 1000) / 1000])).toEqual([
    [1050, 1],
    [1650, 2],
    [1650, 1],
  ]);
});

test('in every division the parts weigh the same together', () => {
  for (const division of ['whole', 'unit loads', 'pieces'] as const) {
    const total = massAndPlace(division).reduce((sum, [massKg]) => sum + (massKg ?? 0), 0);
    expect(total).toBeCloseTo(2150, 9);
  }
});

test('mirrored goods lie the other way round, and each beam has its share', () => {
  const goods = [standing('ramp', 0, 800, ramp, true, 0.75)];
  const [front] = partsOf(stretchesOf(goods, 'front', 0), 'whole');
  const [rear] = partsOf(stretchesOf(goods, 'rear', 0), 'whole');
  expect(front?.massKg).toBeCloseTo(900, 9);
  expect(rear?.massKg).toBeCloseTo(300, 9);
  expect(front?.at).toBeCloseTo(800 / 3, 9);
});

test('feet are told as points, where they stand', () => {
  const [point] = pointsOf(stretchesOf(level, 'pair', 50));
  expect(point?.at).toBe(2150);
  expect(point?.massKg).toBeCloseTo(50, 9);
});
