/**
 * Unit loads that stand in a row, one beside the other, and how far each may move.
 *
 * Their places are kept as if the widths of all before them were taken away: a row of touching unit loads
 * then has one place for all, and "none may overlap" is "places may not fall".
 */
import { reduce } from './reduction';
import type { LooseBeam, LooseLoad } from './worst-case-loads';

/** Parallel arrays, from left to right. N, mm. */
export interface Row {
  /** Index of each in the list that was given. */
  readonly order: readonly number[];
  /** Sum of the widths before it: its left edge is its place plus this. */
  readonly ahead: readonly number[];
  /** Places as stated, and the bounds that tolerance and beam set; none of the three falls along the row. */
  readonly stated: readonly number[];
  readonly least: readonly number[];
  readonly most: readonly number[];
  /** By their factors. */
  readonly weight: readonly number[];
  /** From the unit load's own left edge. */
  readonly centre: readonly number[];
  readonly load: readonly LooseLoad[];
}

/** Unit loads may overlap by this and still count as touching: rounding of their places, mm. */
const TOUCH = 1e-6;

/** Null where unit loads overlap along the beam as stated. */
export function rowOf({ from, to, tolerance }: LooseBeam, loads: readonly LooseLoad[]): Row | null {
  const order = loads.map((_, i) => i).sort((a, b) => (loads[a] as LooseLoad).at - (loads[b] as LooseLoad).at);
  const row = { order, ahead: [0], stated: [], least: [], most: [], weight: [], centre: [], load: [] } as {
    -readonly [K in keyof Row]: Row[K] extends readonly (infer T)[] ? T[] : never;
  };
  let ahead = 0;
  let before = -Infinity;
  for (const given of order) {
    const { load, width, at, factor } = loads[given] as LooseLoad;
    const place = at - ahead;
    if (place < before - TOUCH) return null;
    before = Math.max(place, before);
    const { resultant, centroid } = reduce(load);
    row.stated.push(before);
    row.weight.push(resultant * factor);
    row.centre.push(centroid ?? width / 2);
    row.load.push(loads[given] as LooseLoad);
    ahead += width;
    row.ahead.push(ahead);
  }
  for (const place of row.stated) {
    row.least.push(Math.min(Math.max(place - tolerance, from), place));
    row.most.push(Math.max(Math.min(place + tolerance, to - ahead), place));
  }
  return row;
}
