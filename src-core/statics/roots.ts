/**
 * Roots without loss of digits: of a quadratic shear, and of a function between brackets.
 */

/**
 * Roots of v − w·s − k·s²/2 in 0 < s < h, ascending: where the shear of a piece is zero.
 * Uses 2v / (w ± √(w² + 2kv)), which loses no digits where k is small.
 */
export function shearRoots(v: number, w: number, k: number, h: number): number[] {
  const discriminant = w * w + 2 * k * v;
  if (!(discriminant >= 0)) return [];
  const root = Math.sqrt(discriminant);
  const q = w + (w >= 0 ? root : -root);
  const found: number[] = [];
  const keep = (s: number) => {
    if (s > 0 && s < h && !found.includes(s)) found.push(s);
  };
  if (q !== 0) keep((2 * v) / q);
  if (k !== 0) keep(-q / k);
  return found.sort((a, b) => a - b);
}

/**
 * The root of a function that is monotone between `low` and `high` and changes sign there:
 * Newton's steps, and a bisection wherever a step would leave the bracket or gain too little.
 * Ends when the bracket or the step is down to the rounding of s.
 */
export function bracketedRoot(f: (s: number) => number, slope: (s: number) => number, low: number, high: number): number {
  const fLow = f(low);
  if (fLow === 0) return low;
  if (f(high) === 0) return high;
  const rising = fLow < 0;
  let a = low;
  let b = high;
  let s = (a + b) / 2;
  for (let i = 0; i < 200; i++) {
    const value = f(s);
    if (value === 0) return s;
    if (value < 0 === rising) a = s;
    else b = s;
    const step = s - value / slope(s);
    const next = step > a && step < b ? step : (a + b) / 2;
    if (Math.abs(next - s) <= 2 ** -52 * Math.abs(next) || !(a < next && next < b)) return next;
    s = next;
  }
  return s;
}
