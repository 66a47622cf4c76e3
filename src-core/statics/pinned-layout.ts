/** What stands where in the arrays of the pinned pair's fast solution. */

/** Each beam's twelve results in the output; the rear beam's follow the front beam's. N, mm, N·mm. */
export const RESULT = {
  resultant: 0,
  /** NaN where the beam carries nothing. */
  centroid: 1,
  reactionLeft: 2,
  reactionRight: 3,
  shear: 4,
  moment: 5,
  /** One place of the greatest moment: the left end where it is level over a stretch. */
  momentAt: 6,
  /** EI times the greatest deflection, N·mm³. */
  deflectionEI: 7,
  deflectionAt: 8,
  /** Equivalent uniform loads, N on the beam. */
  bending: 9,
  endShear: 10,
  deflection: 11,
  size: 12,
} as const;

/** Unit loads of many levels, one after another; those of one level from left to right. */
export interface PlacedProfiles {
  /** Packed profiles (profile.ts), one after another. */
  readonly profiles: Float64Array;
  /** Start of each unit load's profile in `profiles`. */
  readonly profile: Int32Array;
  /** Left edge of each unit load, mm from the left support. */
  readonly at: Float64Array;
  /** Share of each unit load that the front beam carries, 0…1. */
  readonly share: Float64Array;
}

/**
 * A unit load in the scratch space: its edges, its profile and what it adds to the sums from the right;
 * then for each beam the part that it carries and the sums of sections.ts over all unit loads before this
 * one (A) and from this one on (B). One more entry holds the sums past the last unit load.
 */
export const GOODS = {
  from: 0,
  to: 1,
  profile: 2,
  ownB: 3,
  ownB3: 4,
  front: 5,
  rear: 10,
  size: 15,
} as const;

/** Within a beam's five numbers of a unit load. */
export const BEAM = { part: 0, a: 1, a3: 2, b: 3, b3: 4 } as const;

/** Numbers of scratch space that a level of this many unit loads needs. */
export const scratchFor = (goods: number): number => GOODS.size * (goods + 1);
