/**
 * One straight beam of constant section between two supports: reactions, shear, moment and deflection
 * under loads that act downwards, with every extreme and its place.
 *
 * Signs, written here once for the whole core:
 *   x           mm from the left support, to the right
 *   load        N and N/mm, down; reactions N, up
 *   shear       N, the sum of the upward forces left of the section
 *   moment      N·mm, sagging positive, hogging negative, at both ends alike
 *   deflection  mm, down, from the chord through the supports; rotation is its slope, rad
 *
 * Left out: deflection by shear, large displacements, supports that move.
 */
import { heldEnds, type BeamEnd } from './beam-ends';
import type { BeamLoad } from './load';
import { greatestDeflection, greatestSagging } from './peaks';
import { cutIntoPieces, type Pieces } from './pieces';
import { sectionsOf, type Sections } from './sections';
import { deflectionIn, momentIn, rotationIn, shearIn, type Segment } from './segment';
import { sumOf } from './sums';

export type { BeamEnd } from './beam-ends';

export interface Beam {
  /** Between the supports, mm. */
  readonly span: number;
  /** EI, N·mm², above 0. With pinned and fixed ends any value gives the same forces and moments. */
  readonly rigidity: number;
  readonly left: BeamEnd;
  readonly right: BeamEnd;
}

export interface BeamAnswer {
  readonly span: number;
  readonly rigidity: number;
  /** All the load, N, that over a support included, and its position, mm; null where there is no load. */
  readonly resultant: number;
  readonly centroid: number | null;
  /** N, any load standing exactly over that support included. */
  readonly reactionLeft: number;
  readonly reactionRight: number;
  /** N·mm, hogging, so 0 or less. */
  readonly endMomentLeft: number;
  readonly endMomentRight: number;
  /** Greatest size of the shear inside the span, N, always at an end (the left one where both are alike). */
  readonly shear: { readonly force: number; readonly at: number };
  /** Greatest sagging moment. `from` and `to` differ only where it is the same over a stretch, from end to end of it. */
  readonly sagging: { readonly moment: number; readonly from: number; readonly to: number };
  /** Greatest hogging moment, 0 or less, always at an end; no place where there is none. */
  readonly hogging: { readonly moment: number; readonly at: number | null };
  /** Greatest deflection. Without load inside the span it is 0, at 0. */
  readonly deflection: { readonly sag: number; readonly at: number };
  /** Polynomials between breakpoints, from left to right; they fill the span. */
  readonly segments: readonly Segment[];
}

/**
 * Everything about one loaded beam.
 * A load standing exactly over a support goes into that reaction and not through the beam.
 * @throws RangeError if span or rigidity is not above 0, a stiffness is negative, the load is negative,
 *   not a number or reaches past either end, or is too great for the computer's numbers
 * Accuracy: closed forms and roots, no samples; about 1e-15 of each greatest value.
 * Source: any text on strength of materials; semi-rigid ends by compatibility (see beam-ends.ts).
 * @example 4 kN at the middle of a pinned 2.4 m beam → reactions 2 kN, moment PL/4 = 2.4 kN·m
 */
export function solveBeam(beam: Beam, load: BeamLoad): BeamAnswer {
  const { span, rigidity } = beam;
  if (!(rigidity > 0 && rigidity < Infinity)) throw new RangeError(`rigidity EI must be above 0 N·mm², got ${rigidity}`);
  const pieces = cutIntoPieces(load, span);
  const sections = sectionsOf(pieces, span, heldEnds(beam.left, beam.right, rigidity, span));
  const segments = segmentsOf(pieces, sections, span, rigidity);
  const { resultant, centroid } = wholeOf(pieces);

  const last = 2 * pieces.count - 1;
  const leftShear = shearAt(sections, 0, span);
  const rightShear = Math.abs(shearAt(sections, last, span));
  const endMomentLeft = (sections.a[0] as number) + 0;
  const endMomentRight = (sections.b[last] as number) + 0;
  const { at, ...sagging } = greatestSagging(segments, sections, span);
  const deflection = sagging.moment > 0 ? greatestDeflection(segments, at, rigidity) : { sag: 0, at: 0 };
  const finite = [resultant, leftShear, rightShear, sagging.moment, deflection.sag].every(Number.isFinite);
  if (!finite || !segments.every((segment) => isComputable(segment, rigidity)))
    throw new RangeError(`a load of ${resultant} N on ${span} mm with EI = ${rigidity} N·mm² is beyond what can be computed`);
  return {
    span,
    rigidity,
    resultant,
    centroid,
    reactionLeft: leftShear + (pieces.points[0] as number),
    reactionRight: rightShear + (pieces.points[pieces.count] as number),
    endMomentLeft,
    endMomentRight,
    shear: leftShear >= rightShear ? { force: leftShear, at: 0 } : { force: rightShear, at: span },
    sagging,
    hogging: hoggingOf(endMomentLeft, endMomentRight, span),
    deflection,
    segments,
  };
}

/** Whether a segment's polynomials stay within the computer's numbers all along it. */
const isComputable = (segment: Segment, rigidity: number): boolean => {
  const s = segment.length;
  return [
    segment.moment,
    shearIn(segment, s),
    momentIn(segment, s),
    rotationIn(segment, s, rigidity),
    deflectionIn(segment, s, rigidity),
  ].every(Number.isFinite);
};

const shearAt = ({ a, b }: Sections, section: number, span: number): number => ((b[section] as number) - (a[section] as number)) / span;

function hoggingOf(left: number, right: number, span: number): BeamAnswer['hogging'] {
  if (left === 0 && right === 0) return { moment: 0, at: null };
  return left <= right ? { moment: left, at: 0 } : { moment: right, at: span };
}

/** The load as one force and its position, that over the supports included. */
function wholeOf({ count, x, wFrom, wTo, points }: Pieces): { resultant: number; centroid: number | null } {
  const length = (i: number): number => (x[i + 1] as number) - (x[i] as number);
  const resultant = sumOf(2 * count + 1, (k) => {
    const i = k >> 1;
    return k % 2 === 0 ? (points[i] as number) : (length(i) * ((wFrom[i] as number) + (wTo[i] as number))) / 2;
  });
  if (resultant === 0) return { resultant, centroid: null };
  const moment = sumOf(2 * count + 1, (k) => {
    const i = k >> 1;
    const at = x[i] as number;
    if (k % 2 === 0) return (points[i] as number) * at;
    const to = x[i + 1] as number;
    return (length(i) / 6) * ((wFrom[i] as number) * (2 * at + to) + (wTo[i] as number) * (at + 2 * to));
  });
  return { resultant, centroid: moment / resultant };
}

/** The state at each breakpoint by the formulas of sections.ts. */
function segmentsOf(pieces: Pieces, sections: Sections, span: number, rigidity: number): Segment[] {
  const segments: Segment[] = [];
  for (let i = 0; i < pieces.count; i++) {
    const x = pieces.x[i] as number;
    const y = span - x;
    const a = sections.a[2 * i] as number;
    const b = sections.b[2 * i] as number;
    const a3 = sections.a3[2 * i] as number;
    const b3 = sections.b3[2 * i] as number;
    segments.push({
      from: x,
      length: (pieces.x[i + 1] as number) - x,
      wFrom: pieces.wFrom[i] as number,
      wTo: pieces.wTo[i] as number,
      shear: (b - a) / span,
      moment: (y * a + x * b) / span,
      rotation: ((3 * y * y - span * span) * a + (span * span - 3 * x * x) * b + a3 - b3) / (6 * span * rigidity),
      deflection: i === 0 ? 0 : (x * y * ((span + y) * a + (span + x) * b) - y * a3 - x * b3) / (6 * span * rigidity),
    });
  }
  return segments;
}
