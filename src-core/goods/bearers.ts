/** Goods on bearers or feet: who carries how much. */
import type { BeamLoad } from '../statics/load';
import { FITS_MM } from './across';

type Carried =
  | { readonly ok: true; readonly load: BeamLoad }
  | { readonly ok: false; readonly problem: 'bearers' | 'feet' | 'shares'; readonly message: string };
type Problem = 'bearers' | 'feet' | 'shares';

const wrong = (problem: Problem, message: string) => ({ ok: false, problem, message }) as const;

/** Shares typed as decimals or per cents agree to this. */
const SHARES_FIT = 1e-6;

/**
 * Shares of even goods over their supports, by statics: with two supports by moments, overhangs
 * included; with more, the goods are taken as simple spans between neighbouring supports (each carries
 * half of the spans beside it and its own overhang), as loose goods bridge from bearer to bearer.
 * @param at the supports' middles, mm from the left edge, ascending
 * @returns null if the goods would tip off
 * @example bearers at 100 and 700 under 800 mm → 1/2 each
 */
export function sharesByStatics(at: readonly number[], width: number): readonly number[] | null {
  const [first, second] = at;
  if (first === undefined) return null;
  if (second === undefined) return Math.abs(first - width / 2) <= FITS_MM ? [1] : null;
  if (at.length === 2) {
    const right = (width / 2 - first) / (second - first);
    return right >= 0 && right <= 1 ? [1 - right, right] : null;
  }
  return at.map((x, i) => {
    const from = i === 0 ? 0 : ((at[i - 1] as number) + x) / 2;
    const to = i === at.length - 1 ? width : (x + (at[i + 1] as number)) / 2;
    return (to - from) / width;
  });
}

/** The shares as given, or by statics; each support's own place in the list is kept. */
function sharesOf(
  at: readonly number[],
  given: readonly (number | null)[],
  width: number,
  name: 'bearer' | 'foot',
): readonly number[] | ReturnType<typeof wrong> {
  const known = given.filter((share) => share !== null);
  if (known.length === 0) {
    const order = at.map((_, i) => i).sort((a, b) => (at[a] as number) - (at[b] as number));
    const sorted = order.map((i) => at[i] as number);
    if (sorted.some((x, i) => i > 0 && x === sorted[i - 1]))
      return wrong('shares', `Two of the ${name === 'foot' ? 'feet' : 'bearers'} stand at one place. Move one, or give shares.`);
    const shares = sharesByStatics(sorted, width);
    if (shares === null)
      return wrong(
        'shares',
        `The goods would tip off: their middle does not lie between the ${name === 'foot' ? 'feet' : 'bearers'}. Move them, or give shares.`,
      );
    const result: number[] = [];
    for (const [place, i] of order.entries()) result[i] = shares[place] as number;
    return result;
  }
  if (known.length < given.length)
    return wrong('shares', `Some shares are given and others are not. Give every ${name} its share, or none.`);
  if (known.some((share) => !(share >= 0))) return wrong('shares', 'A share must be 0 or more.');
  const sum = known.reduce((total, share) => total + share, 0);
  if (Math.abs(sum - 1) > SHARES_FIT)
    return wrong(
      'shares',
      `The shares add up to ${Number(sum.toPrecision(6))}, not to 1. Mend them so that together they carry the whole load.`,
    );
  return known.map((share) => share / sum);
}

/** Load of 1 N in all, on bearers as rectangles. */
export function bearersOf(bearers: readonly { centreMm: number; widthMm: number; share: number | null }[], width: number): Carried {
  if (bearers.length === 0) return wrong('bearers', 'There is no bearer. Add at least two under the goods.');
  for (const [i, { centreMm, widthMm }] of bearers.entries()) {
    if (!(widthMm > 0)) return wrong('bearers', `Bearer ${i + 1} must be wider than 0 mm; it is ${widthMm} mm wide.`);
    if (!(centreMm - widthMm / 2 >= -FITS_MM && centreMm + widthMm / 2 <= width + FITS_MM))
      return wrong(
        'bearers',
        `Bearer ${i + 1} stands beyond the goods, which are ${width} mm wide: it reaches from ${centreMm - widthMm / 2} to ${centreMm + widthMm / 2} mm.`,
      );
  }
  const shares = sharesOf(
    bearers.map(({ centreMm }) => centreMm),
    bearers.map(({ share }) => share),
    width,
    'bearer',
  );
  if (!Array.isArray(shares)) return shares as ReturnType<typeof wrong>;
  const lines = bearers.map(({ centreMm, widthMm }, i) => {
    const from = Math.max(0, centreMm - widthMm / 2);
    const to = Math.min(width, centreMm + widthMm / 2);
    const w = (shares[i] as number) / (to - from);
    return { from, to, wFrom: w, wTo: w };
  });
  return { ok: true, load: { lines, points: [] } };
}

/** Load of 1 N in all, on feet as points. */
export function feetOf(feet: readonly { xMm: number; share: number | null }[], width: number): Carried {
  if (feet.length === 0) return wrong('feet', 'There is no foot. Add at least two under the goods.');
  for (const [i, { xMm }] of feet.entries())
    if (!(xMm >= -FITS_MM && xMm <= width + FITS_MM))
      return wrong('feet', `Foot ${i + 1} stands at ${xMm} mm, beyond the goods, which are ${width} mm wide.`);
  const shares = sharesOf(
    feet.map(({ xMm }) => xMm),
    feet.map(({ share }) => share),
    width,
    'foot',
  );
  if (!Array.isArray(shares)) return shares as ReturnType<typeof wrong>;
  return {
    ok: true,
    load: { lines: [], points: feet.map(({ xMm }, i) => ({ at: Math.min(Math.max(xMm, 0), width), force: shares[i] as number })) },
  };
}
