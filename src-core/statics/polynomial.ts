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
 * start, when the intensity runs straight from `w0` to `w1` (both ≥ 0, not both 0).
 *
 * The quadratic is solved from the end whose shear is the smaller, in the form 2V / (w + √(w² + 2kV)):
 * there the two terms under the root never cancel, not even at a double root.
 */
export function zeroOfFallingShear(start: number, end: number, w0: number, w1: number, length: number): number {
  // Scaled by the greater intensity, so that squares of very small or very great ones stay in range.
  const scale = Math.max(w0, w1);
  const slope = (w1 / scale - w0 / scale) / length;
  const fromStart = start <= -end;
  const near = fromStart ? w0 / scale : w1 / scale;
  const v = fromStart ? start / scale : -end / scale;
  if (!(v > 0)) return fromStart ? 0 : length;
  const under = near * near + 2 * (fromStart ? slope : -slope) * v;
  const distance = Math.min((2 * v) / (near + Math.sqrt(Math.max(under, 0))), length);
  return fromStart ? distance : length - distance;
}

/**
 * Root of a falling function between `low` and `high`, by Newton's method from `from`, kept inside the
 * bracket by halving. The caller says that the function is above 0 at `low` and below 0 at `high`.
 * @param at writes the function and its derivative at x into `out`
 * Accuracy: to the last place of x that the function can tell.
 */
export function rootOfFalling(at: (x: number, out: [number, number]) => void, low: number, high: number, from: number): number {
  const out: [number, number] = [0, 0];
  let x = from;
  for (let step = 0; step < 100; step++) {
    at(x, out);
    const [value, derivative] = out;
    if (value === 0) return x;
    if (value > 0) low = x;
    else high = x;
    let next = x - value / derivative;
    if (!(next >= low && next <= high)) next = low + (high - low) / 2;
    if (Math.abs(next - x) <= Number.EPSILON * Math.abs(next)) return next;
    x = next;
  }
  return x;
}
