import { expect, test } from 'vitest';
import { peakIntensity, skylineOf, summed, skylineRate } from '../../src-renderer/drawing/skyline';
import type { GoodsDrawn } from '../../src-renderer/drawing/bay-model';
import { bayOf, goods as drawnGoods } from './make-bay';

const line = (from: number, to: number, wFrom: number, wTo = wFrom) => ({ from, to, wFrom, wTo });
const goods = (lines: readonly ReturnType<typeof line>[], change: Partial<GoodsDrawn> = {}) =>
  ({
    at: 100,
    mirrored: false,
    unitLoad: { widthMm: 800 },
    weighed: { grossKg: 1, pieces: { lines, points: [{ at: 200, force: 300 }] } },
    ...change,
  }) as unknown as GoodsDrawn;
const place = { x: (mm: number) => mm / 10, base: 50, rate: 10, cut: Infinity };

test('pieces that lie over one another add, and gaps stay gaps', () => {
  expect(summed([line(0, 800, 1), line(200, 400, 2, 4), line(900, 1000, 1)])).toEqual([
    line(0, 200, 1),
    line(200, 400, 3, 5),
    line(400, 800, 1),
    line(900, 1000, 1),
  ]);
});

test('the peak counts the pallet under the goods, and a point load as spread over 150 mm', () => {
  expect(peakIntensity({ lines: [line(0, 800, 1), line(0, 800, 0, 3)], points: [] })).toBe(4);
  expect(peakIntensity({ lines: [], points: [{ at: 0, force: 300 }] })).toBe(2);
  expect(peakIntensity(null)).toBe(0);
});

test('one stretch under load is one polygon standing on the beam', () => {
  const { areas, arrows } = skylineOf(goods([line(0, 400, 1), line(400, 800, 2)]), place);
  expect(areas).toEqual([
    [
      { x: 10, y: 50 },
      { x: 10, y: 40 },
      { x: 50, y: 40 },
      { x: 50, y: 30 },
      { x: 90, y: 30 },
      { x: 90, y: 50 },
    ],
  ]);
  expect(arrows).toEqual([{ x: 30, height: 20 }]);
});

test('mirrored goods press the other way round', () => {
  const { areas, arrows } = skylineOf(goods([line(0, 400, 1)], { mirrored: true }), place);
  expect(areas[0]?.map((point) => point.x)).toEqual([50, 50, 90, 90]);
  expect(arrows[0]?.x).toBe(70);
});

test('goods of unknown load have no skyline', () => {
  expect(skylineOf(goods([], { weighed: { grossKg: null, pieces: null } }), place)).toEqual({ areas: [], arrows: [], cuts: [] });
});

test('peaks beyond the room are cut off there and marked, the rest keeps its height', () => {
  const { areas, cuts } = skylineOf(goods([line(0, 400, 1), line(400, 800, 9)]), { ...place, cut: 40 });
  expect(areas[0]?.map((point) => point.y)).toEqual([50, 40, 40, 10, 10, 50]);
  expect(cuts).toEqual([70]);
});

test('narrow feet do not flatten the skylines of everything else', () => {
  const even = drawnGoods('even', 75);
  const feet = drawnGoods('feet', 950);
  const weigh = (wide: number, mm: number) => ({ grossKg: 500, pieces: { lines: [line(0, mm, wide)], points: [] } });
  const bay = (extra: GoodsDrawn[]) => bayOf([[], [{ ...even, weighed: weigh(6, 800) }, ...extra], []]);
  const alone = skylineRate([bay([])], 0.1);
  const beside = skylineRate([bay([{ ...feet, weighed: weigh(80, 60) }])], 0.1);
  expect(beside).toBeGreaterThan(0.3 * alone);
  expect(skylineRate([bayOf()], 0.1)).toBe(0);
});
