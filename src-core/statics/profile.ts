/**
 * The load of one unit load, packed once into numbers that serve it wherever it stands.
 *
 * Kept are its weight and the moments of its load about its left and its right edge, up to the third:
 * from them follow, by the binomial formula with positive terms alone, all that the rest of a pinned beam
 * feels of it at any place. Its pieces follow, for the one or two unit loads that must be opened because
 * the greatest moment or deflection lies under them.
 */
import type { BeamLoad } from './load';
import { cutIntoPieces } from './pieces';
import { integralOfProduct } from './polynomial';

/** Where a packed profile keeps what, counted from its start. N, mm. */
export const PROFILE = {
  width: 0,
  weight: 1,
  /** Σ W·u, Σ W·u², Σ W·u³, with u from the left edge. */
  fromLeft: 2,
  /** The same with distances from the right edge. */
  fromRight: 5,
  /** Point load exactly at the left and at the right edge. */
  pointLeft: 8,
  pointRight: 9,
  pieces: 10,
  firstPiece: 11,
} as const;

/** A piece: its start from the left edge, its length, intensity at both ends, point load at its start. */
export const PIECE = { start: 0, length: 1, wFrom: 2, wTo: 3, point: 4, size: 5 } as const;

/**
 * @param load N, x in mm from the unit load's left edge, within 0…width
 * @throws RangeError as a beam of that span would
 */
export function packProfile(load: BeamLoad, width: number): Float64Array {
  const { count, x, wFrom, wTo, points } = cutIntoPieces(load, width);
  const packed = new Float64Array(PROFILE.firstPiece + PIECE.size * (count + 1));
  packed[PROFILE.width] = width;
  packed[PROFILE.pointLeft] = points[0] as number;
  packed[PROFILE.pointRight] = points[count] as number;
  packed[PROFILE.pieces] = count;
  const add = (at: number, value: number): void => {
    packed[at] = (packed[at] as number) + value;
  };
  for (let i = 0; i <= count; i++) {
    const u = x[i] as number;
    const v = width - u;
    const force = points[i] as number;
    const last = i === count;
    const u1 = last ? width : (x[i + 1] as number);
    const w0 = last ? 0 : (wFrom[i] as number);
    const w1 = last ? 0 : (wTo[i] as number);
    packed.set([u, u1 - u, w0, w1, force], PROFILE.firstPiece + PIECE.size * i);
    add(PROFILE.weight, force + ((u1 - u) * (w0 + w1)) / 2);
    addMoments(PROFILE.fromLeft, u, u1);
    addMoments(PROFILE.fromRight, v, width - u1);

    function addMoments(at: number, d0: number, d1: number): void {
      const h = u1 - u;
      add(at, force * d0 + h * integralOfProduct(w0, w1, d0, d1, 1, 1, 1, 1));
      add(at + 1, force * d0 * d0 + h * integralOfProduct(w0, w1, d0, d1, d0, d1, 1, 1));
      add(at + 2, force * d0 * d0 * d0 + h * integralOfProduct(w0, w1, d0, d1, d0, d1, d0, d1));
    }
  }
  return packed;
}
