/** Greatest moment and deflection of one pinned beam from its unit loads' sums; see pinned-pair.ts. */
import { BEAM, GOODS, RESULT } from './pinned-layout';
import { zeroOfFallingRotation, zeroOfFallingShear } from './polynomial';
import { PIECE, PROFILE } from './profile';

/** As in peaks.ts: shear below this part of what it is made of is rounding. */
const SHEAR_ROUNDING = 64 * Number.EPSILON;

/** A step of Halley's method this small beside the span leaves an error of its cube, which is below rounding. */
const STEP_PRECISION = 1e-6;

// Divisions take longer than products, and the compiler may not replace them.
const BY_6 = 1 / 6;
const BY_24 = 1 / 24;
const BY_120 = 1 / 120;

/** Opens the first unit load after which the shear is no longer positive. */
export function peakMoment(
  span: number,
  profiles: Float64Array,
  count: number,
  scratch: Float64Array,
  beam: number,
  out: Float64Array,
  o: number,
): void {
  let low = 0;
  let high = count - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    const next = GOODS.size * (middle + 1);
    const a = scratch[next + beam + BEAM.a] as number;
    const b = scratch[next + beam + BEAM.b] as number;
    if (b - a > SHEAR_ROUNDING * (a + b)) low = middle + 1;
    else high = middle;
  }
  const k = GOODS.size * low;
  const p = scratch[k + GOODS.profile] as number;
  const part = scratch[k + beam + BEAM.part] as number;
  const x = scratch[k + GOODS.from] as number;
  const a = scratch[k + beam + BEAM.a] as number;
  const b = scratch[k + beam + BEAM.b] as number;
  const perSpan = 1 / span;
  const tolerance = SHEAR_ROUNDING * (a + b) * perSpan;
  const pieces = profiles[p + PROFILE.pieces] as number;
  let shear = (b - a) * perSpan;
  let moment = ((span - x) * a + x * b) * perSpan;
  let s = 0;
  let q = p + PROFILE.firstPiece;
  for (let i = 0; ; i++, q += PIECE.size) {
    shear -= part * (profiles[q + PIECE.point] as number);
    if (shear <= tolerance || i === pieces) break;
    const h = profiles[q + PIECE.length] as number;
    const w0 = part * (profiles[q + PIECE.wFrom] as number);
    const w1 = part * (profiles[q + PIECE.wTo] as number);
    const next = shear - (h * (w0 + w1)) / 2;
    if (next < -tolerance) {
      s = zeroOfFallingShear(shear, next, w0, w1, h);
      // As the shear is zero at s, its slope drops out of the integral.
      moment += s * (4 * shear - w0 * s) * BY_6;
      break;
    }
    moment += h * (shear - h * (2 * w0 + w1) * BY_6);
    shear = next;
  }
  out[o + RESULT.moment] = Math.max(moment, 0);
  out[o + RESULT.momentAt] = x + (profiles[q] as number) + s;
}

/** 6L·EI·θ at x, from the sums of the unit loads on either side (sections.ts). */
const turnAt = (span: number, x: number, a: number, b: number, a3: number, b3: number): number =>
  (3 * (span - x) * (span - x) - span * span) * a + (span * span - 3 * x * x) * b + a3 - b3;

/** 6L·EI·δ at x. */
const sagAt = (span: number, x: number, a: number, b: number, a3: number, b3: number): number => {
  const y = span - x;
  return x * y * ((span + y) * a + (span + x) * b) - y * a3 - x * b3;
};

/**
 * Finds the gap or the unit load in which the rotation passes zero. Halving asks for the left edges of the
 * unit loads; the gap before the first one at which the rotation is no longer positive, or the unit load
 * before that gap, holds the root.
 */
export function peakDeflection(
  span: number,
  profiles: Float64Array,
  count: number,
  scratch: Float64Array,
  beam: number,
  out: Float64Array,
  o: number,
): void {
  let low = 0;
  let high = count;
  while (low < high) {
    const middle = (low + high) >> 1;
    const k = GOODS.size * middle;
    const turn = turnAt(
      span,
      scratch[k + GOODS.from] as number,
      scratch[k + beam + BEAM.a] as number,
      scratch[k + beam + BEAM.b] as number,
      scratch[k + beam + BEAM.a3] as number,
      scratch[k + beam + BEAM.b3] as number,
    );
    if (turn > 0) low = middle + 1;
    else high = middle;
  }
  const k = GOODS.size * low;
  const a = scratch[k + beam + BEAM.a] as number;
  const b = scratch[k + beam + BEAM.b] as number;
  const a3 = scratch[k + beam + BEAM.a3] as number;
  const b3 = scratch[k + beam + BEAM.b3] as number;
  const from = low === 0 ? 0 : (scratch[k - GOODS.size + GOODS.to] as number);
  const turn = turnAt(span, from, a, b, a3, b3);
  if (low > 0 && turn <= 0) {
    inGoods(span, profiles, k - GOODS.size, scratch, beam, out, o);
    return;
  }
  // In a gap the moment is a straight line, so that the rotation falls as a shear does.
  const to = low === count ? span : (scratch[k + GOODS.from] as number);
  let x = from;
  if (to > from) {
    const momentFrom = 6 * ((span - from) * a + from * b);
    const momentTo = 6 * ((span - to) * a + to * b);
    x += zeroOfFallingShear(turn, turnAt(span, to, a, b, a3, b3), momentFrom, momentTo, to - from);
  }
  out[o + RESULT.deflectionAt] = x;
  out[o + RESULT.deflectionEI] = sagAt(span, x, a, b, a3, b3) / (6 * span);
}

/** Carries the state through the pieces of the unit load at `k` in the scratch, up to the root of the rotation. */
function inGoods(span: number, profiles: Float64Array, k: number, scratch: Float64Array, beam: number, out: Float64Array, o: number): void {
  const p = scratch[k + GOODS.profile] as number;
  const part = scratch[k + beam + BEAM.part] as number;
  const x = scratch[k + GOODS.from] as number;
  const a = scratch[k + beam + BEAM.a] as number;
  const b = scratch[k + beam + BEAM.b] as number;
  const a3 = scratch[k + beam + BEAM.a3] as number;
  const b3 = scratch[k + beam + BEAM.b3] as number;
  const perSpan = 1 / span;
  let shear = (b - a) * perSpan;
  let moment = ((span - x) * a + x * b) * perSpan;
  let turn = turnAt(span, x, a, b, a3, b3) * BY_6 * perSpan;
  let sag = sagAt(span, x, a, b, a3, b3) * BY_6 * perSpan;
  const last = (profiles[p + PROFILE.pieces] as number) - 1;
  let q = p + PROFILE.firstPiece;
  for (let i = 0; ; i++, q += PIECE.size) {
    shear -= part * (profiles[q + PIECE.point] as number);
    const h = profiles[q + PIECE.length] as number;
    const w0 = part * (profiles[q + PIECE.wFrom] as number);
    const w1 = part * (profiles[q + PIECE.wTo] as number);
    const next = turn - h * (moment + h * (shear / 2 - h * (3 * w0 + w1) * BY_24));
    if (next <= 0 || i === last) {
      const slope = (w1 - w0) / h;
      const guess = next < turn ? Math.min((h * turn) / (turn - next), h) : h;
      const s = zeroOfFallingRotation(turn, moment, shear, w0, slope, 0, h, guess, STEP_PRECISION * span);
      sag += s * (turn - s * (moment / 2 + s * (shear * BY_6 - s * (w0 * BY_24 + s * slope * BY_120))));
      out[o + RESULT.deflectionAt] = x + (profiles[q] as number) + s;
      out[o + RESULT.deflectionEI] = Math.max(sag, 0);
      return;
    }
    sag += h * (turn - h * (moment / 2 + h * (shear * BY_6 - h * (4 * w0 + w1) * BY_120)));
    moment += h * (shear - h * (2 * w0 + w1) * BY_6);
    shear -= (h * (w0 + w1)) / 2;
    turn = next;
  }
}
