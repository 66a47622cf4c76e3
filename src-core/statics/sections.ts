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
  readonly a: Float64Array;
  readonly b: Float64Array;
  readonly a3: Float64Array;
  readonly b3: Float64Array;
  /** Size of the terms that make up L·V, N·mm: the measure of its rounding. */
  readonly size: Float64Array;
}

export function sectionsOf(pieces: Pieces, span: number, ends: HeldEnds): Sections {
  const events = 2 * pieces.count + 1;
  const terms = { pA: new Float64Array(events), mA: new Float64Array(events), a3: new Float64Array(events) };
  const mirrored = { pB: new Float64Array(events), mB: new Float64Array(events), b3: new Float64Array(events) };
  const out = new Float64Array(3);
  // Event 2i is the point load at breakpoint i, event 2i + 1 the line load of piece i.
  for (let i = 0; i <= pieces.count; i++) {
    const force = pieces.points[i] as number;
    const a = pieces.x[i] as number;
    const b = span - a;
    pointTerms(force, a, b, span, ends.left, out);
    store(out, 2 * i, terms.pA, terms.mA, terms.a3);
    pointTerms(force, b, a, span, ends.right, out);
    store(out, 2 * i, mirrored.pB, mirrored.mB, mirrored.b3);
    if (i === pieces.count) break;
    const a1 = pieces.x[i + 1] as number;
    const b1 = span - a1;
    const w0 = pieces.wFrom[i] as number;
    const w1 = pieces.wTo[i] as number;
    lineTerms(w0, w1, a, a1, b, b1, a1 - a, span, ends.left, out);
    store(out, 2 * i + 1, terms.pA, terms.mA, terms.a3);
    lineTerms(w0, w1, b, b1, a, a1, a1 - a, span, ends.right, out);
    store(out, 2 * i + 1, mirrored.pB, mirrored.mB, mirrored.b3);
  }
  const pALeft = sumsFromLeft(terms.pA);
  const mBLeft = sumsFromLeft(mirrored.mB);
  const a3Left = sumsFromLeft(terms.a3);
  const pBRight = sumsFromRight(mirrored.pB);
  const mARight = sumsFromRight(terms.mA);
  const b3Right = sumsFromRight(mirrored.b3);

  const count = events - 1;
  const sections: Sections = {
    a: new Float64Array(count),
    b: new Float64Array(count),
    a3: a3Left,
    b3: b3Right.subarray(1),
    size: new Float64Array(count),
  };
  for (let k = 0; k < count; k++) {
    const p = pALeft[k] as number;
    const q = pBRight[k + 1] as number;
    const m = mARight[k + 1] as number;
    const n = mBLeft[k] as number;
    sections.a[k] = p - m;
    sections.b[k] = q - n;
    sections.size[k] = p + q + m + n;
  }
  return sections;
}

function store(from: Float64Array, at: number, p: Float64Array, m: Float64Array, cubed: Float64Array): void {
  p[at] = from[0] as number;
  m[at] = from[1] as number;
  cubed[at] = from[2] as number;
}

/** Writes W·a less the near end's moment, that moment, and W·a³; `a` is the distance from the near end. */
function pointTerms(force: number, a: number, b: number, span: number, end: EndCoefficients, out: Float64Array): void {
  const { near, far, rest, lead } = end;
  out[0] = force * a * (rest + (a / span) * (near + lead * (b / span)));
  out[1] = force * a * (b / span) * (near * (b / span) + far * (a / span));
  out[2] = force * a * a * a;
}

/** The same, integrated over a straight piece of load with intensities w0 to w1 at the distances a0 to a1. */
function lineTerms(
  w0: number,
  w1: number,
  a0: number,
  a1: number,
  b0: number,
  b1: number,
  length: number,
  span: number,
  end: EndCoefficients,
  out: Float64Array,
): void {
  const { near, far, rest, lead } = end;
  const moment = (length / 6) * (w0 * (2 * a0 + a1) + w1 * (a0 + 2 * a1));
  out[2] = length * integralOfProduct(w0, w1, a0, a1, a0, a1, a0, a1);
  if (near === 0) {
    out[0] = moment;
    out[1] = 0;
    return;
  }
  const r0 = b0 / span;
  const r1 = b1 / span;
  const s0 = a0 / span;
  const s1 = a1 / span;
  out[0] = rest * moment + length * integralOfProduct(w0, w1, a0, a1, s0, s1, near + lead * r0, near + lead * r1);
  out[1] = length * integralOfProduct(w0, w1, a0, a1, r0, r1, near * r0 + far * s0, near * r1 + far * s1);
}
