/**
 * What the beam needs of polynomials: integrals of products of straight lines, and two kinds of root.
 *
 * All are written so that no digits are lost by subtracting like numbers.
 */

/**
 * Integral from 0 to 1 of the product of four straight lines, each given by its values at 0 and 1.
 * Where all values have one sign so have all terms, and nothing cancels.
 * Accuracy: exact formula, a few units in the last place. Source: Bernstein form; the integral of
 * uᵏ(1−u)⁴⁻ᵏ is k!(4−k)!/5!. Example: all lines 1 → 1.
 */
export function integralOfProduct(a0: number, a1: number, b0: number, b1: number, c0: number, c1: number, d0: number, d1: number): number {
  const p0 = a0 * b0;
  const p1 = a0 * b1 + a1 * b0;
  const p2 = a1 * b1;
  const q0 = c0 * d0;
  const q1 = c0 * d1 + c1 * d0;
  const q2 = c1 * d1;
  return (12 * (p0 * q0 + p2 * q2) + 3 * (p0 * q1 + p1 * q0 + p1 * q2 + p2 * q1) + 2 * (p0 * q2 + p1 * q1 + p2 * q0)) / 60;
}

/**
 * Where a shear that falls from `start` ≥ 0 to `end` ≤ 0 over a length passes zero, measured from the
 * start, when the intensity runs straight from `w0` to `w1` (both ≥ 0; 0 where both are 0 and the shear cannot fall).
 *
 * The quadratic is solved from the end whose shear is the smaller, in the form 2V / (w + √(w² + 2kV)):
 * there the two terms under the root never cancel, not even at a double root.
 */
export function zeroOfFallingShear(start: number, end: number, w0: number, w1: number, length: number): number {
  const scale = Math.max(w0, w1);
  if (!(scale > 0)) return 0;
  // Squares of very small or very great intensities would leave the computer's numbers.
  if (!(scale > 1e-100 && scale < 1e100)) return zeroOfFallingShear(start / scale, end / scale, w0 / scale, w1 / scale, length);
  const slope = (w1 - w0) / length;
  if (start <= -end) {
    if (!(start > 0)) return 0;
    return Math.min((2 * start) / (w0 + Math.sqrt(Math.max(w0 * w0 + 2 * slope * start, 0))), length);
  }
  if (!(end < 0)) return length;
  return length - Math.min((-2 * end) / (w1 + Math.sqrt(Math.max(w1 * w1 + 2 * slope * end, 0))), length);
}

/**
 * Where a rotation that falls through zero does so, as the distance s from the start of a piece:
 * the root between `low` and `high` of `rotation − moment·s − shear·s²/2 + w·s³/6 + slope·s⁴/24`, with
 * rotation, moment and shear those at the start of the piece (rotation as EI·θ), w the intensity there and
 * slope its change per mm. Halley's method from `from`, kept inside the bracket by halving; it ends when a
 * step is below `precision`, and is then off by about the cube of that step beside the length.
 */
export function zeroOfFallingRotation(
  rotation: number,
  moment: number,
  shear: number,
  w: number,
  slope: number,
  low: number,
  high: number,
  from: number,
  precision: number,
): number {
  const shear2 = shear / 2;
  const w2 = w / 2;
  const w6 = w / 6;
  const slope6 = slope / 6;
  const slope24 = slope / 24;
  const slope2 = slope / 2;
  let s = from;
  for (let step = 0; step < 100; step++) {
    const value = rotation - s * (moment + s * (shear2 - s * (w6 + s * slope24)));
    if (value === 0) return s;
    if (value > 0) low = s;
    else high = s;
    const fall = moment + s * (shear - s * (w2 + s * slope6));
    const bend = shear - s * (w + s * slope2);
    let next = s + (value * fall) / (fall * fall + value * bend * 0.5);
    if (!(next >= low && next <= high)) next = low + (high - low) / 2;
    if (Math.abs(next - s) <= precision) return next;
    s = next;
  }
  return s;
}
