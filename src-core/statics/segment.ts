/** One stretch of a solved beam between two breakpoints, as polynomials of its own coordinate. */

/**
 * `s` runs from 0 at `from` to `length`. Units: mm, N/mm, N, N·mm, rad; signs as in beam.ts. Shear is a
 * quadratic of s, moment a cubic, rotation a quartic and deflection a quintic.
 */
export interface Segment {
  readonly from: number;
  readonly length: number;
  /** Intensity at both ends, straight between. */
  readonly wFrom: number;
  readonly wTo: number;
  /** State just right of `from`. */
  readonly shear: number;
  readonly moment: number;
  readonly rotation: number;
  readonly deflection: number;
}

/** Change of the intensity per mm. */
const slopeOf = ({ length, wFrom, wTo }: Segment): number => (wFrom === wTo ? 0 : (wTo - wFrom) / length);

export function intensityIn(segment: Segment, s: number): number {
  const { length, wFrom, wTo } = segment;
  return s === length ? wTo : wFrom === wTo ? wFrom : wFrom + (wTo - wFrom) * (s / length);
}

export const shearIn = (segment: Segment, s: number): number => segment.shear - s * (segment.wFrom + s * (slopeOf(segment) / 2));

export const momentIn = (segment: Segment, s: number): number =>
  segment.moment + s * (segment.shear - s * (segment.wFrom / 2 + s * (slopeOf(segment) / 6)));

/** @param rigidity EI, N·mm² */
export const rotationIn = (segment: Segment, s: number, rigidity: number): number =>
  segment.rotation - (s * (segment.moment + s * (segment.shear / 2 - s * (segment.wFrom / 6 + s * (slopeOf(segment) / 24))))) / rigidity;

/** @param rigidity EI, N·mm² */
export const deflectionIn = (segment: Segment, s: number, rigidity: number): number =>
  segment.deflection +
  s * segment.rotation -
  (s * s * (segment.moment / 2 + s * (segment.shear / 6 - s * (segment.wFrom / 24 + s * (slopeOf(segment) / 120))))) / rigidity;
