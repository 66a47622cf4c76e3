/** The reduction of a load to its resultant, as a whole and in its simple parts. */
import type { BeamLoad, LineLoad } from './load';
import { sumOf } from './sums';

export interface Reduction {
  /** Area of the diagram, N. */
  readonly resultant: number;
  /** Its place, mm in the load's own x; null where there is no load. */
  readonly centroid: number | null;
}

/** A rectangle, a triangle or a point of the diagram with its own resultant. */
export interface LoadPart extends Reduction {
  readonly shape: 'rectangle' | 'triangle' | 'point';
  readonly from: number;
  readonly to: number;
  /** Intensity at both ends of the part, N/mm; a triangle's is counted from the top of the rectangle under it. */
  readonly wFrom: number;
  readonly wTo: number;
}

/** Area of a trapezoid: h(w₁ + w₂)/2. */
const areaOf = ({ from, to, wFrom, wTo }: LineLoad): number => ((to - from) * (wFrom + wTo)) / 2;

/** Centre of a trapezoid, x₁ + h(w₁ + 2w₂)/(3(w₁ + w₂)); null where it has no area. */
function centreOf({ from, to, wFrom, wTo }: LineLoad): number | null {
  const both = wFrom + wTo;
  return both === 0 ? null : from + ((to - from) * (wFrom + 2 * wTo)) / (3 * both);
}

/**
 * The resultant and where it acts: area of the diagram, and first moment over area. It stands for the
 * load in reactions only; shear, moment and deflection come from the diagram.
 * Lines and points add, whatever their order. N, mm.
 * Source: centroid tables of any statics text.
 * @example 2 N/mm at 0 rising to 4 N/mm at 300 → 900 N at 166.67 mm
 */
export function reduce({ lines, points }: BeamLoad): Reduction {
  const count = lines.length + points.length;
  const force = (i: number): number => {
    const line = lines[i];
    return line === undefined ? (points[i - lines.length]?.force ?? 0) : areaOf(line);
  };
  const place = (i: number): number => {
    const line = lines[i];
    return line === undefined ? (points[i - lines.length]?.at ?? 0) : (centreOf(line) ?? 0);
  };
  const resultant = sumOf(count, force);
  return { resultant, centroid: resultant === 0 ? null : sumOf(count, (i) => force(i) * place(i)) / resultant };
}

/**
 * The load in its parts: each line as a rectangle and a triangle on top of it (either may be missing),
 * each point by itself. Their resultants together are the whole's; a diagram or its resultants, never both.
 */
export function partsOf(load: BeamLoad): readonly LoadPart[] {
  const parts: LoadPart[] = [];
  const add = (shape: LoadPart['shape'], line: LineLoad) => {
    if (line.wFrom + line.wTo > 0) parts.push({ shape, ...line, resultant: areaOf(line), centroid: centreOf(line) });
  };
  for (const { from, to, wFrom, wTo } of load.lines) {
    const least = Math.min(wFrom, wTo);
    add('rectangle', { from, to, wFrom: least, wTo: least });
    add('triangle', { from, to, wFrom: wFrom - least, wTo: wTo - least });
  }
  for (const { at, force } of load.points)
    if (force > 0) parts.push({ shape: 'point', from: at, to: at, wFrom: 0, wTo: 0, resultant: force, centroid: at });
  return parts;
}
