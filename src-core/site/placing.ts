/**
 * Finding room along a beam level. Lengths in mm; a position is that of the left edge from the left
 * upright's face.
 */

export interface Standing {
  readonly at: number;
  readonly width: number;
}

export interface Stretch {
  readonly from: number;
  readonly to: number;
}

/** The free stretches of an entry between what stands in it, from left to right; overlapping goods count once. */
export function freeGaps(entry: number, standing: readonly Standing[]): readonly Stretch[] {
  const gaps: Stretch[] = [];
  let from = 0;
  for (const { at, width } of standing.toSorted((a, b) => a.at - b.at)) {
    if (at > from) gaps.push({ from, to: Math.min(at, entry) });
    from = Math.max(from, at + width);
    if (from >= entry) return gaps;
  }
  return [...gaps, { from, to: entry }];
}

/**
 * Places in whole mm, from left to right, with equal gaps between goods of these widths and to the
 * uprights; null where they are wider together than the entry.
 */
export function evenPlaces(entry: number, widths: readonly number[]): readonly number[] | null {
  const gap = (entry - widths.reduce((sum, width) => sum + width, 0)) / (widths.length + 1);
  if (!(gap >= 0)) return null;
  let at = gap;
  return widths.map((width) => {
    const place = Math.round(at);
    at += width + gap;
    return place;
  });
}

export interface PushApart {
  readonly entry: number;
  /** Least gap to leave between goods, and to the uprights. */
  readonly gaps: { readonly upright: number; readonly loads: number };
  /** What was put down; it keeps to its place as nearly as the uprights allow. */
  readonly fixed: Standing;
  /** The others, in any order. */
  readonly others: readonly Standing[];
}

/**
 * Pushes neighbours away from what was put down, each no further than it must: those whose middle is
 * to its left go left, the others right.
 * @returns the new places of `fixed` and of the others, in the order given; null where they do not fit
 */
export function pushApart({
  entry,
  gaps,
  fixed,
  others,
}: PushApart): { readonly fixed: number; readonly others: readonly number[] } | null {
  const middle = ({ at, width }: Standing) => at + width / 2;
  const order = others.map((_, i) => i).toSorted((a, b) => middle(others[a] as Standing) - middle(others[b] as Standing));
  const left = order.filter((i) => middle(others[i] as Standing) < middle(fixed)).toReversed();
  const right = order.filter((i) => !left.includes(i));
  // Room that each side needs at least, with its goods pushed together against the upright.
  const needed = (side: readonly number[]) => side.reduce((sum, i) => sum + (others[i] as Standing).width + gaps.loads, gaps.upright);
  const least = needed(left);
  const most = entry - needed(right) - fixed.width;
  if (!(least <= most)) return null;
  const at = Math.min(Math.max(fixed.at, least), most);
  const places = others.map((other) => other.at);
  // Outwards from what was put down: each gives way only as far as the last one pushes it.
  let edge = at;
  for (const i of left) places[i] = edge = Math.min((others[i] as Standing).at, edge - gaps.loads - (others[i] as Standing).width);
  edge = at + fixed.width;
  for (const i of right) {
    places[i] = Math.max((others[i] as Standing).at, edge + gaps.loads);
    edge = (places[i] as number) + (others[i] as Standing).width;
  }
  return { fixed: at, others: keptIn(entry, gaps, left, right, others, places) };
}

/** Brings goods that were outside or too near an upright back in, pushing inwards; there is room by then. */
function keptIn(
  entry: number,
  gaps: PushApart['gaps'],
  left: readonly number[],
  right: readonly number[],
  others: readonly Standing[],
  places: number[],
): readonly number[] {
  let wall = gaps.upright;
  for (const i of left.toReversed()) {
    places[i] = Math.max(places[i] as number, wall);
    wall = (places[i] as number) + (others[i] as Standing).width + gaps.loads;
  }
  wall = entry - gaps.upright;
  for (const i of right.toReversed()) {
    places[i] = Math.min(places[i] as number, wall - (others[i] as Standing).width);
    wall = (places[i] as number) - gaps.loads;
  }
  return places;
}
