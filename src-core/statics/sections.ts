/**
 * Everything that is needed at the sections of a beam, as sums carried from piece to piece.
 *
 * For a section at x, with y = L − x, the loads left of it count by their distance a from the left
 * support, those right of it by their distance b from the right support (influence lines):
 *
 *     L·M = y·A + x·B          L·V = B − A
 *     6L·EI·θ = (3y² − L²)·A + (L² − 3x²)·B + A₃ − B₃
 *     6L·EI·δ = x·y·((L + y)·A + (L + x)·B) − y·A₃ − x·B₃
 *
 * with A₃ = Σ W·a³ of the loads on the left, B₃ = Σ W·b³ of those on the right, and on a pinned beam
 * A = Σ W·a, B = Σ W·b. Held ends subtract their moments: A becomes Σleft (W·a − m) − Σright m, with m
 * the moment that a bit of load causes at the left end, and B likewise with the right end's. In each sum
 * all terms have one sign, so that it is right to its last place however small a reaction is beside the load.
 *
 * A load standing exactly over a support has a = 0 or b = 0 there and so no part in the beam.
 * Source: derived from EI·δ'''' = w; the reference cases and handbook rows test it.
 */
import type { EndCoefficients, HeldEnds } from './beam-ends';
import type { Pieces } from './pieces';
import { integralOfProduct } from './polynomial';
import { sumsFromLeft, sumsFromRight } from './sums';

/** Sections in pairs: 2i is just right of breakpoint i, 2i + 1 just left of breakpoint i + 1. */
export interface Sections {
  readonly a: readonly number[];
  readonly b: readonly number[];
  readonly a3: readonly number[];
  readonly b3: readonly number[];
  /** Size of the terms that make up L·V, N·mm: the measure of its rounding. */
  readonly size: readonly number[];
}

/** What each event adds as seen from one end: W·a less that end's moment, that moment, and W·a³. */
interface Terms {
  readonly own: number[];
  readonly held: number[];
  readonly cubed: number[];
}

export function sectionsOf({ count, x, wFrom, wTo, points }: Pieces, span: number, ends: HeldEnds): Sections {
  const left: Terms = { own: [], held: [], cubed: [] };
  const right: Terms = { own: [], held: [], cubed: [] };
  // Event 2i is the point load at breakpoint i, event 2i + 1 the line load of piece i.
  for (let i = 0; i <= count; i++) {
    const force = points[i] as number;
    const a = x[i] as number;
    const b = span - a;
    addPoint(left, force, a, b, span, ends.left);
    addPoint(right, force, b, a, span, ends.right);
    if (i === count) break;
    const a1 = x[i + 1] as number;
    const b1 = span - a1;
    const w0 = wFrom[i] as number;
    const w1 = wTo[i] as number;
    addLine(left, w0, w1, a, a1, b, b1, a1 - a, span, ends.left);
    addLine(right, w0, w1, b, b1, a, a1, a1 - a, span, ends.right);
  }
  const ownLeft = sumsFromLeft(left.own);
  const heldLeft = sumsFromLeft(right.held);
  const ownRight = sumsFromRight(right.own);
  const heldRight = sumsFromRight(left.held);
  const a: number[] = [];
  const b: number[] = [];
  const size: number[] = [];
  for (let k = 0; k < 2 * count; k++) {
    const p = ownLeft[k] as number;
    const q = ownRight[k + 1] as number;
    const m = heldRight[k + 1] as number;
    const n = heldLeft[k] as number;
    a.push(p - m);
    b.push(q - n);
    size.push(p + q + m + n);
  }
  return { a, b, a3: sumsFromLeft(left.cubed), b3: sumsFromRight(right.cubed).slice(1), size };
}

/** Adds a point load; `a` is its distance from the end in question, `b` from the other. */
function addPoint({ own, held, cubed }: Terms, force: number, a: number, b: number, span: number, end: EndCoefficients): void {
  if (force === 0) {
    own.push(0);
    held.push(0);
    cubed.push(0);
    return;
  }
  const { near, far, rest, lead } = end;
  own.push(force * a * (rest + (a / span) * (near + lead * (b / span))));
  held.push(force * a * (b / span) * (near * (b / span) + far * (a / span)));
  cubed.push(force * a * a * a);
}

/** Adds a straight piece of load with intensities w0 to w1 at the distances a0 to a1. */
function addLine(
  { own, held, cubed }: Terms,
  w0: number,
  w1: number,
  a0: number,
  a1: number,
  b0: number,
  b1: number,
  length: number,
  span: number,
  end: EndCoefficients,
): void {
  const { near, far, rest, lead } = end;
  const moment = (length / 6) * (w0 * (2 * a0 + a1) + w1 * (a0 + 2 * a1));
  cubed.push(length * integralOfProduct(w0, w1, a0, a1, a0, a1, a0, a1));
  if (near === 0) {
    own.push(moment);
    held.push(0);
    return;
  }
  const r0 = b0 / span;
  const r1 = b1 / span;
  const s0 = a0 / span;
  const s1 = a1 / span;
  own.push(rest * moment + length * integralOfProduct(w0, w1, a0, a1, s0, s1, near + lead * r0, near + lead * r1));
  held.push(length * integralOfProduct(w0, w1, a0, a1, r0, r1, near * r0 + far * s0, near * r1 + far * s1));
}
