/** How a unit load's weight lies across the rack, as the load on a strip that spans from rear to front. */
import type { BeamLoad } from '../statics/load';
import type { DepthShape } from './shapes';

/**
 * The goods' weight across their depth, scaled to 1 N in all; x in mm from the rear edge towards the front.
 * Goods of which only the centre is stated are taken as pressing in a straight line, as a stiff base does:
 * a trapezoid while the centre lies in the middle third, a triangle at the near edge beyond it.
 * @throws RangeError if the depth is not above 0 or a stated centre lies outside the goods
 * Source: pressure under an eccentrically loaded base, any text on foundations.
 * @example centre 200 in front of the middle of 1 200 → a triangle, nothing at the rear
 */
export function acrossStrip(depthMm: number, across: DepthShape): BeamLoad {
  if (!(depthMm > 0)) throw new RangeError(`the goods must be deeper than 0 mm, got ${depthMm}`);
  const line = (from: number, to: number, wFrom: number, wTo: number) => ({ from, to, wFrom, wTo });
  switch (across.kind) {
    case 'even':
      return { lines: [line(0, depthMm, 1 / depthMm, 1 / depthMm)], points: [] };
    case 'sloped': {
      const front = 2 / (depthMm * (1 + across.rearOverFront));
      return { lines: [line(0, depthMm, front * across.rearOverFront, front)], points: [] };
    }
    case 'stepped': {
      const total = across.columns.reduce((sum, { massKg }) => sum + massKg, 0);
      let front = depthMm;
      const lines = across.columns.flatMap(({ depthMm: depth, massKg }) => {
        const from = Math.max(0, front - depth);
        const to = front;
        front = from;
        const w = massKg / total / (to - from);
        return to > from && w > 0 ? [line(from, to, w, w)] : [];
      });
      return { lines, points: [] };
    }
    case 'centre':
      return aroundCentre(depthMm, across.towardsFrontMm);
  }
}

function aroundCentre(depth: number, towardsFront: number): BeamLoad {
  const off = Math.abs(towardsFront);
  if (!(off <= depth / 2))
    throw new RangeError(`the centre must lie within the goods, got ${towardsFront} mm off the middle of ${depth} mm`);
  const toFront = towardsFront > 0;
  if (off <= depth / 6) {
    const change = (6 * towardsFront) / depth;
    return { lines: [{ from: 0, to: depth, wFrom: (1 - change) / depth, wTo: (1 + change) / depth }], points: [] };
  }
  const length = 3 * (depth / 2 - off);
  // On an edge of less than a millimetre it is a point for all that matters.
  if (length < 1) return { lines: [], points: [{ at: depth / 2 + towardsFront, force: 1 }] };
  const w = 2 / length;
  const piece = toFront ? { from: depth - length, to: depth, wFrom: 0, wTo: w } : { from: 0, to: length, wFrom: w, wTo: 0 };
  return { lines: [piece], points: [] };
}
