/**
 * Exact fractions, so that what is typed in one unit is stored in another without a rounding of the
 * factor: 106.5 in is 2 705.1 mm, not 2 705.1000000000004.
 */
export interface Exact {
  readonly n: bigint;
  readonly d: bigint;
}

/** @throws RangeError if the text is no plain decimal such as "25.4" */
export function exact(decimal: string): Exact {
  const [, whole, decimals = ''] = /^(\d+)(?:\.(\d+))?$/.exec(decimal) ?? [];
  if (whole === undefined) throw new RangeError(`not a plain decimal: ${JSON.stringify(decimal)}`);
  return { n: BigInt(whole + decimals), d: 10n ** BigInt(decimals.length) };
}

export const times = (a: Exact, b: Exact): Exact => ({ n: a.n * b.n, d: a.d * b.d });
export const over = (a: Exact, b: Exact): Exact => ({ n: a.n * b.d, d: a.d * b.n });
export const plus = (a: Exact, b: Exact): Exact => ({ n: a.n * b.d + b.n * a.d, d: a.d * b.d });

/** Digits taken along when a fraction becomes a number: far more than a double tells apart. */
const DIGITS = 40;

/** The nearest double. */
export function toNumber({ n, d }: Exact): number {
  const scale = Math.max(0, DIGITS + d.toString().length - n.toString().length);
  return Number(`${(n * 10n ** BigInt(scale)) / d}e-${scale}`);
}
