/** Small drawn bays for tests of the page's geometry. */
import type { BayDrawn, GoodsDrawn, LevelDrawn } from '../../src-renderer/drawing/bay-model';

export const goods = (placementId: string, at: number, widthMm = 800, height = 1000): GoodsDrawn =>
  ({
    placementId,
    name: placementId,
    unitLoad: { widthMm },
    at,
    mirrored: false,
    rear: -600,
    front: 600,
    outline: { goods: [], pallet: [], width: widthMm, height },
    weighed: { grossKg: 500, pieces: null },
    trouble: null,
  }) as unknown as GoodsDrawn;

/** Floor, and beam levels at 1 500 and 3 000 mm with beams 100 mm high, in an entry of 2 700 mm. */
export function bayOf(onLevels: readonly (readonly GoodsDrawn[])[] = []): BayDrawn {
  const level = (number: number, height: number, room: number): LevelDrawn => ({
    levelId: number === 0 ? null : `level ${number}`,
    number,
    height,
    beamHeight: number === 0 ? 0 : 100,
    room,
    goods: onLevels[number] ?? [],
  });
  return {
    bayId: 'bay',
    name: 'A1',
    entry: 2700,
    leftUpright: { frameId: 'f0', width: 100, height: 4000 },
    rightUpright: { frameId: 'f1', width: 100, height: 4000 },
    height: 4000,
    levels: [level(0, 0, 1400), level(1, 1500, 1400), level(2, 3000, 1000)],
  };
}
