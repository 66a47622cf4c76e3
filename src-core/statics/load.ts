/**
 * The load on one beam: intensity in straight pieces plus point loads.
 *
 * Units: x in mm from the left support, intensity in N/mm (down positive), forces in N (down
 * positive). Pieces may overlap and stand in any order; they add.
 */

/** Intensity running straight from `wFrom` at `from` to `wTo` at `to`; `from < to`. */
export interface LineLoad {
  readonly from: number;
  readonly to: number;
  readonly wFrom: number;
  readonly wTo: number;
}

export interface PointLoad {
  readonly at: number;
  readonly force: number;
}

export interface BeamLoad {
  readonly lines: readonly LineLoad[];
  readonly points: readonly PointLoad[];
}

export const NO_LOAD: BeamLoad = { lines: [], points: [] };
