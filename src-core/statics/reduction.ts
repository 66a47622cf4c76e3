/** Exact reduction of a load to its resultant and place, as a whole or in its parts. */
import type { BeamLoad, LineLoad } from './load';

export interface Reduction {
  /** Area of the diagram, N. */
  readonly resultant: number;
  /** Its place, mm from the left; null where there is no load. */
  readonly centroid: number | null;
}

/** A rectangle, a triangle or a point of the diagram with its own resultant. */
export interface LoadPart extends Reduction {
  readonly shape: 'rectangle' | 'triangle' | 'point';
  readonly from: number;
  readonly to: number;
  /** Intensity at both ends of the part, N/mm; for the triangle above a rectangle, above that. */
  readonly wFrom: number;
  readonly wTo: number;
}

const area = ({ from, to, wFrom, wTo }: LineLoad): number => ((to - from) * (wFrom + wTo)) / 2;

/** First moment about the left support. */
const firstMoment = ({ from, to, wFrom, wTo }: LineLoad): number => {
  const h = to - from;
  return (h * (wFrom + wTo) * from) / 2 + (h * h * (wFrom + 2 * wTo)) / 6;
};

/**
 * Resultant and its place: area and first moment over area.
 * Equivalent to the load for the reactions only; shear, moment and deflection come from the diagram.
 * Source: trapezoid h(w₁+w₂)/2 at h(w₁+2w₂)/(3(w₁+w₂)), statics.
 * @example 250 to 650 over 2 400 → 1 080 000 at 1 377.8
 */
export function reduce(load: BeamLoad): Reduction {
  let resultant = 0;
  let moment = 0;
  for (const line of load.lines) {
    resultant += area(line);
    moment += firstMoment(line);
  }
  for (const { at, force } of load.points) {
    resultant += force;
    moment += at * force;
  }
  return { resultant, centroid: resultant > 0 ? moment / resultant : null };
}

/** The load in its parts: each straight piece as a rectangle and the triangle above it, each point by itself. */
export function partsOf(load: BeamLoad): readonly LoadPart[] {
  const parts: LoadPart[] = [];
  for (const { from, to, wFrom, wTo } of load.lines) {
    const h = to - from;
    const low = Math.min(wFrom, wTo);
    if (low > 0) parts.push({ shape: 'rectangle', from, to, wFrom: low, wTo: low, resultant: low * h, centroid: from + h / 2 });
    if (wFrom === wTo) continue;
    const resultant = (Math.abs(wTo - wFrom) * h) / 2;
    const centroid = wTo > wFrom ? from + (2 * h) / 3 : from + h / 3;
    parts.push({ shape: 'triangle', from, to, wFrom: wFrom - low, wTo: wTo - low, resultant, centroid });
  }
  for (const { at, force } of load.points)
    parts.push({ shape: 'point', from: at, to: at, wFrom: 0, wTo: 0, resultant: force, centroid: at });
  return parts;
}
