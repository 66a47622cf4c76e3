/**
 * Sums that keep their digits: each rounding error is caught and added at the end, so that a sum of n
 * terms of one sign is right to about one unit in the last place, whatever n.
 *
 * Source: A. Neumaier's improved Kahan summation (1974), from memory; tested against whole-number sums.
 */

/** Sum of `term(i)` for i from 0 to `count - 1`. */
export function sumOf(count: number, term: (i: number) => number): number {
  let sum = 0;
  let lost = 0;
  for (let i = 0; i < count; i++) {
    const value = term(i);
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
  }
  return sum + lost;
}

/** Entry i is the sum of terms 0 … i. */
export function sumsFromLeft(terms: readonly number[]): number[] {
  const sums: number[] = [];
  let sum = 0;
  let lost = 0;
  for (const value of terms) {
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
    sums.push(sum + lost);
  }
  return sums;
}

/** Entry i is the sum of terms i … last. */
export function sumsFromRight(terms: readonly number[]): number[] {
  const sums = new Array<number>(terms.length);
  let sum = 0;
  let lost = 0;
  for (let i = terms.length - 1; i >= 0; i--) {
    const value = terms[i] as number;
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
    sums[i] = sum + lost;
  }
  return sums;
}
