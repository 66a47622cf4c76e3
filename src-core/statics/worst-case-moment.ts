/**
 * The greatest moment of a pinned beam over all sections and all places of a row of unit loads, in closed
 * form and with none of them overlapping.
 *
 * At a section x the moment's influence line is a triangle with its peak there. Whatever stands left of x
 * goes to the right as far as it may, whatever stands right of it to the left. So once the unit load that x
 * cuts is known, and its place, all other places follow; those that touch it move with it as one block.
 * Between two places at which another one begins to touch, the moment is greatest at an end or where both
 * its slopes are zero:
 *
 *     along x:          V(x) = 0
 *     along the place:  the part x/L of the block's weight lies left of x
 *
 * With intensities in straight pieces that is one quadratic a piece; under a point load one linear equation.
 */
import { cutIntoPieces, type Pieces } from './pieces';
import { zeroOfFallingShear } from './polynomial';
import type { Row } from './worst-case-row';

interface RowMoment {
  readonly moment: number;
  readonly at: number;
  /** As in `Row`. */
  readonly places: readonly number[];
}

/** The unit load under which the section lies. */
interface Cut {
  /** Its place in the row. */
  readonly at: number;
  readonly pieces: Pieces;
  readonly factor: number;
}

/** Shear below this part of the load is rounding. */
const SHEAR_ROUNDING = 64 * Number.EPSILON;

/** @returns N·mm, mm from the left support; the places as stated where there is no moment */
export function greatestMomentApart(span: number, row: Row): RowMoment {
  const total = row.weight.reduce((sum, weight) => sum + weight, 0);
  const slack = SHEAR_ROUNDING * total;
  let best: Peak = { moment: 0, at: 0 };
  let bestCut = -1;
  let bestPlace = 0;
  for (let cut = 0; cut < row.weight.length; cut++) {
    const weight = row.weight[cut] as number;
    const least = row.least[cut] as number;
    const most = row.most[cut] as number;
    // Further right the shear before it only falls; where it never passes zero under this one, no moment is greatest there.
    if (weight === 0 || shearBefore(span, row, cut, least) < -slack || shearBefore(span, row, cut, most) - weight > slack) continue;
    const { load, width, factor } = row.load[cut] as Row['load'][number];
    const under: Cut = { at: cut, pieces: cutIntoPieces(load, width), factor };
    const look = (place: number): void => {
      const peak = peakUnder(span, row, under, place);
      if (peak.moment > best.moment) {
        best = peak;
        bestCut = cut;
        bestPlace = place;
      }
    };
    look(least);
    if (most > least) {
      const touching = placesOfTouch(row, cut, least, most);
      for (let i = 1; i < touching.length; i++) {
        look(touching[i] as number);
        levelPlaces(span, row, under, touching[i - 1] as number, touching[i] as number, look);
      }
    }
  }
  const places = bestCut < 0 ? row.stated : row.weight.map((_, i) => placeOf(row, bestCut, bestPlace, i));
  return { ...best, places };
}

/** Place of unit load `i` once the cut one's is chosen. */
function placeOf(row: Row, cut: number, place: number, i: number): number {
  if (i === cut) return place;
  return i < cut ? Math.min(row.most[i] as number, place) : Math.max(row.least[i] as number, place);
}

/** From the least to the greatest place of the cut one, with all at which another begins or ends to touch it. */
function placesOfTouch(row: Row, cut: number, least: number, most: number): readonly number[] {
  const places = [least, most];
  for (let i = 0; i < row.weight.length; i++) {
    const at = i < cut ? (row.most[i] as number) : (row.least[i] as number);
    if (i !== cut && at > least && at < most) places.push(at);
  }
  return places.length === 2 ? places : places.sort((a, b) => a - b);
}

/** Shear just left of the cut unit load. */
function shearBefore(span: number, row: Row, cut: number, place: number): number {
  let turning = 0;
  for (let i = 0; i < row.weight.length; i++) {
    const x = placeOf(row, cut, place, i) + (row.ahead[i] as number) + (row.centre[i] as number);
    turning += (row.weight[i] as number) * (i < cut ? -x : span - x);
  }
  return turning / span;
}

interface Peak {
  readonly moment: number;
  readonly at: number;
}

/** The greatest moment under the cut unit load when it stands at `place`. */
function peakUnder(span: number, row: Row, { at: cut, pieces, factor }: Cut, place: number): Peak {
  let a = 0;
  let b = 0;
  for (let i = 0; i < row.weight.length; i++) {
    const x = placeOf(row, cut, place, i) + (row.ahead[i] as number) + (row.centre[i] as number);
    if (i < cut) a += (row.weight[i] as number) * x;
    else b += (row.weight[i] as number) * (span - x);
  }
  const left = place + (row.ahead[cut] as number);
  const tolerance = (SHEAR_ROUNDING * (a + b)) / span;
  const { count, x, wFrom, wTo, points } = pieces;
  let shear = (b - a) / span;
  let moment = ((span - left) * a + left * b) / span;
  for (let i = 0; i <= count; i++) {
    const u = x[i] as number;
    shear -= factor * (points[i] as number);
    if (shear <= tolerance || i === count) return { moment, at: left + u };
    const h = (x[i + 1] as number) - u;
    const w0 = factor * (wFrom[i] as number);
    const w1 = factor * (wTo[i] as number);
    const next = shear - (h * (w0 + w1)) / 2;
    if (next < -tolerance) {
      const s = zeroOfFallingShear(shear, next, w0, w1, h);
      // As the shear is zero at s, its slope drops out of the integral.
      return { moment: moment + (s * (4 * shear - w0 * s)) / 6, at: left + u + s };
    }
    moment += h * (shear - (h * (2 * w0 + w1)) / 6);
    shear = next;
  }
  return { moment, at: left };
}

/**
 * Places of the cut unit load between `low` and `high` at which both slopes of the moment are zero, for a
 * section at u from its left edge: place + ahead = (K·L/W − u)/2, with W the block's weight and K as below.
 */
function levelPlaces(
  span: number,
  row: Row,
  { at: cut, pieces, factor }: Cut,
  low: number,
  high: number,
  look: (place: number) => void,
): void {
  const ahead = row.ahead[cut] as number;
  let block = row.weight[cut] as number;
  let blockBefore = 0;
  for (let i = 0; i < row.weight.length; i++) {
    const weight = row.weight[i] as number;
    if (i < cut && (row.most[i] as number) > low) {
      block += weight;
      blockBefore += weight;
    } else if (i > cut && (row.least[i] as number) < high) block += weight;
  }
  const k = blockBefore + shearBefore(span, row, cut, low) + (block * (low + ahead)) / span;
  const offer = (u: number): void => {
    const place = ((k * span) / block - u) / 2 - ahead;
    if (place > low && place < high) look(place);
  };
  const { count, x, wFrom, wTo, points } = pieces;
  let before = 0;
  for (let i = 0; i <= count; i++) {
    const u = x[i] as number;
    const force = factor * (points[i] as number);
    before += force;
    if (force > 0) offer(u);
    if (i === count) return;
    const h = (x[i + 1] as number) - u;
    const w0 = factor * (wFrom[i] as number);
    const w1 = factor * (wTo[i] as number);
    const rise = block / (2 * span);
    eachRoot((w1 - w0) / (2 * h), w0 - rise, before - k / 2 - rise * u + blockBefore, h, (s) => offer(u + s));
    before += (h * (w0 + w1)) / 2;
  }
}

/** A root this far outside its piece, as a part of it, is at its end. */
const EDGE = 1e-9;

/** Roots of a·s² + b·s + c from 0 to h. */
function eachRoot(a: number, b: number, c: number, h: number, use: (s: number) => void): void {
  const keep = (s: number): void => {
    if (s >= -EDGE * h && s <= (1 + EDGE) * h) use(Math.min(Math.max(s, 0), h));
  };
  if (Math.abs(a * h) <= 1e-14 * Math.abs(b)) {
    if (b !== 0) keep(-c / b);
    return;
  }
  const square = b * b - 4 * a * c;
  if (square < 0) return;
  const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(square)) / 2;
  keep(q / a);
  if (q !== 0) keep(c / q);
}
