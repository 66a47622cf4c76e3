/** The load on the front and the rear beam of a level, and on both together. */
import type { BeamLoad, LineLoad, PointLoad } from '../statics/load';

/** One unit load on its level. */
export interface StandingGoods {
  readonly id: string;
  /** N, x in mm from the unit load's own left edge. */
  readonly load: BeamLoad;
  readonly widthMm: number;
  /** Left support to the unit load's left edge, mm. */
  readonly at: number;
  readonly mirrored: boolean;
  readonly frontShare: number;
}

export interface PairLoads {
  readonly whole: BeamLoad;
  readonly front: BeamLoad;
  readonly rear: BeamLoad;
}

/** Turns a load left for right within its width. */
export const mirrored = (load: BeamLoad, width: number): BeamLoad => ({
  lines: load.lines.map(({ from, to, wFrom, wTo }) => ({ from: width - to, to: width - from, wFrom: wTo, wTo: wFrom })),
  points: load.points.map(({ at, force }) => ({ at: width - at, force })),
});

/** Shares this far outside 0…1 are rounding; beyond it the goods tip. */
const SHARE_ROUNDING = 1e-12;

function checkedShare({ id, frontShare }: StandingGoods): number {
  if (!(frontShare >= -SHARE_ROUNDING && frontShare <= 1 + SHARE_ROUNDING))
    throw new RangeError(`unit load "${id}" would tip off: the front beam's share is ${frontShare}, not between 0 and 1`);
  return Math.min(Math.max(frontShare, 0), 1);
}

/**
 * Superposes the goods of a level: the whole load, and each beam's by the goods' shares.
 * @returns x in mm from the left support, N and N/mm
 * @throws RangeError if goods would tip off the pair, their front share being outside 0…1
 * @example 1 000 N even, front share 0.6 → 600 N on the front beam, 400 N on the rear one
 */
export function pairLoads(goods: readonly StandingGoods[]): PairLoads {
  const placed = goods.map((one) => ({
    share: checkedShare(one),
    at: one.at,
    load: one.mirrored ? mirrored(one.load, one.widthMm) : one.load,
  }));
  const part = (factor: (share: number) => number): BeamLoad => {
    const lines: LineLoad[] = [];
    const points: PointLoad[] = [];
    for (const { share, at, load } of placed) {
      const by = factor(share);
      for (const { from, to, wFrom, wTo } of load.lines) lines.push({ from: at + from, to: at + to, wFrom: wFrom * by, wTo: wTo * by });
      for (const point of load.points) points.push({ at: at + point.at, force: point.force * by });
    }
    return { lines, points };
  };
  return { whole: part(() => 1), front: part((share) => share), rear: part((share) => 1 - share) };
}
