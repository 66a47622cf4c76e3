/** Goods on bearers or feet: what each of them carries. */
import type { BeamLoad } from '../statics/load';
import { FITS_MM } from './across';

export interface Bearer {
  readonly centreMm: number;
  readonly widthMm: number;
  readonly share: number | null;
}

export interface Foot {
  readonly xMm: number;
  readonly share: number | null;
}

type Problem = 'bearers' | 'feet' | 'shares';
interface Fault {
  readonly ok: false;
  readonly problem: Problem;
  readonly message: string;
}
type Carried = { readonly ok: true; readonly load: BeamLoad } | Fault;
type Shares = { readonly ok: true; readonly shares: readonly number[] } | Fault;

const fault = (problem: Problem, message: string): Fault => ({ ok: false, problem, message });

/** Shares typed as decimals or per cents add up to 1 within this. */
const SHARES_FIT = 1e-6;

/** How the supports are spoken of. */
interface Called {
  readonly one: string;
  readonly many: string;
}
const BEARERS: Called = { one: 'bearer', many: 'bearers' };
const FEET: Called = { one: 'foot', many: 'feet' };

/**
 * Shares of goods that lie evenly over their width, by statics. Two supports share by moments, overhangs
 * included. On three or more the goods are taken as simple spans between neighbouring supports, the
 * outer spans with their overhangs, as loose goods bridge from one to the next. Either way the shares
 * act together at the goods' middle.
 * @param at the supports' middles, mm from the goods' left edge, ascending, no two alike
 * @returns one share each, 1 together; null if the goods would tip, or lift off one of them
 * @example at 100 and 700 under 800 mm → 1/2 each; at 0, 400 and 800 → 1/4, 1/2, 1/4
 */
function sharesByStatics(at: readonly number[], width: number): readonly number[] | null {
  if (at.length === 1) return Math.abs((at[0] as number) - width / 2) <= FITS_MM ? [1] : null;
  const shares = at.map(() => 0);
  const last = at.length - 2;
  for (let i = 0; i <= last; i++) {
    const left = at[i] as number;
    const right = at[i + 1] as number;
    const from = i === 0 ? 0 : left;
    const to = i === last ? width : right;
    const part = (to - from) / width;
    const middle = (from + to) / 2;
    shares[i] = (shares[i] as number) + (part * (right - middle)) / (right - left);
    shares[i + 1] = (shares[i + 1] as number) + (part * (middle - left)) / (right - left);
  }
  return shares.every((share) => share >= -Number.EPSILON) ? shares.map((share) => Math.max(share, 0)) : null;
}

/** The shares as given, or by statics where none is given; in the order of the list. */
function sharesOf(at: readonly number[], given: readonly (number | null)[], width: number, called: Called): Shares {
  const known = given.filter((share) => share !== null);
  if (known.length === 0) return defaultShares(at, width, called);
  if (known.length < given.length)
    return fault('shares', `Some shares are given and others are not. Give every ${called.one} its share, or none.`);
  const bad = known.findIndex((share) => !(share >= 0));
  if (bad >= 0) return fault('shares', `The share of ${called.one} ${bad + 1} must be 0 or more; it is ${known[bad]}.`);
  const sum = known.reduce((total, share) => total + share, 0);
  if (!(Math.abs(sum - 1) <= SHARES_FIT))
    return fault(
      'shares',
      `The shares add up to ${Number(sum.toPrecision(6))}, not to 1. Change them so that together they carry the whole load.`,
    );
  return { ok: true, shares: known.map((share) => share / sum) };
}

function defaultShares(at: readonly number[], width: number, { one, many }: Called): Shares {
  const order = at.map((_, i) => i).sort((a, b) => (at[a] as number) - (at[b] as number));
  const sorted = order.map((i) => at[i] as number);
  if (sorted.some((x, i) => i > 0 && x === sorted[i - 1]))
    return fault('shares', `Two of the ${many} stand at one place. Move one of them, or give every ${one} its share.`);
  const shares = sharesByStatics(sorted, width);
  if (shares === null)
    return fault(
      'shares',
      at.length === 1
        ? `The goods would tip: their only ${one} does not stand under their middle. Move it there, or add another.`
        : `Even goods would tip or lift off one of the ${many}. Move the ${many} further out, or give every ${one} its share.`,
    );
  const inPlace = at.map(() => 0);
  order.forEach((i, place) => (inPlace[i] = shares[place] as number));
  return { ok: true, shares: inPlace };
}

/** Load of 1 N in all, on bearers as rectangles; x in mm from the goods' left edge. */
export function bearersOf(bearers: readonly Bearer[], width: number): Carried {
  if (bearers.length === 0) return fault('bearers', 'There is no bearer. Add at least two under the goods.');
  for (const [i, { centreMm, widthMm }] of bearers.entries()) {
    if (!(widthMm > 0)) return fault('bearers', `Bearer ${i + 1} must be wider than 0 mm; it is ${widthMm} mm wide.`);
    if (!(centreMm - widthMm / 2 >= -FITS_MM && centreMm + widthMm / 2 <= width + FITS_MM))
      return fault(
        'bearers',
        `Bearer ${i + 1} reaches from ${centreMm - widthMm / 2} to ${centreMm + widthMm / 2} mm, beyond the goods, which are ${width} mm wide. Move it under them.`,
      );
  }
  const found = sharesOf(
    bearers.map(({ centreMm }) => centreMm),
    bearers.map(({ share }) => share),
    width,
    BEARERS,
  );
  if (!found.ok) return found;
  const lines = bearers.map(({ centreMm, widthMm }, i) => {
    const from = Math.max(0, centreMm - widthMm / 2);
    const to = Math.min(width, centreMm + widthMm / 2);
    const w = (found.shares[i] as number) / (to - from);
    return { from, to, wFrom: w, wTo: w };
  });
  return { ok: true, load: { lines, points: [] } };
}

/** Load of 1 N in all, on feet as points; x in mm from the goods' left edge. */
export function feetOf(feet: readonly Foot[], width: number): Carried {
  if (feet.length === 0) return fault('feet', 'There is no foot. Add at least two under the goods.');
  for (const [i, { xMm }] of feet.entries())
    if (!(xMm >= -FITS_MM && xMm <= width + FITS_MM))
      return fault('feet', `Foot ${i + 1} stands at ${xMm} mm, beyond the goods, which are ${width} mm wide. Move it under them.`);
  const found = sharesOf(
    feet.map(({ xMm }) => xMm),
    feet.map(({ share }) => share),
    width,
    FEET,
  );
  if (!found.ok) return found;
  const points = feet.map(({ xMm }, i) => ({ at: Math.min(Math.max(xMm, 0), width), force: found.shares[i] as number }));
  return { ok: true, load: { lines: [], points } };
}
