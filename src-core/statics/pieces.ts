/** A beam's load cut at every breakpoint, so that between two of them the intensity is one straight line. */
import type { BeamLoad, LineLoad, PointLoad } from './load';

/** Parallel arrays; piece i reaches from x[i] to x[i + 1]. */
export interface Pieces {
  readonly count: number;
  /** Breakpoints, mm, ascending from 0 to the span; `count + 1` of them. */
  readonly x: readonly number[];
  /** Intensity at each piece's left and right end, N/mm. */
  readonly wFrom: readonly number[];
  readonly wTo: readonly number[];
  /** Point load at each breakpoint, N. */
  readonly points: readonly number[];
}

/**
 * Positions within this part of the span of a support are at it: sums of decimal millimetres differ by
 * rounding in that order, and goods that end exactly at the upright must not count as past it.
 */
const POSITION_ROUNDING = 1e-13;

/**
 * The same load whatever the order in which it is given: bit for bit, because it is added up in a
 * settled order.
 * @throws RangeError if a number is not finite, an intensity or force is negative, a piece has no
 *   length, or the load reaches past either end of the span
 */
export function cutIntoPieces(load: BeamLoad, span: number): Pieces {
  if (!(span > 0 && span < Infinity)) throw new RangeError(`span must be above 0 mm, got ${span}`);
  const slack = span * POSITION_ROUNDING;
  const onBeam = (x: number): number => (x <= slack ? 0 : x >= span - slack ? span : x);
  const lines = load.lines.map((line) => placed(line, span, slack, onBeam)).sort(byPlaceThenSize);
  const points = load.points.map((point) => checkedPoint(point, span, slack, onBeam)).sort((a, b) => a.at - b.at || a.force - b.force);

  const all = new Float64Array(2 * lines.length + points.length + 2);
  all[0] = span;
  let filled = 2;
  for (const { from, to } of lines) {
    all[filled++] = from;
    all[filled++] = to;
  }
  for (const { at } of points) all[filled++] = at;
  all.sort();
  const x: number[] = [];
  const wFrom: number[] = [];
  const wTo: number[] = [];
  const forces: number[] = [];
  for (let i = 0; i < all.length; i++) {
    const place = all[i] as number;
    if (place === x[x.length - 1]) continue;
    x.push(place);
    wFrom.push(0);
    wTo.push(0);
    forces.push(0);
  }
  for (const line of lines)
    for (let i = indexOf(x, line.from); (x[i] as number) < line.to; i++) {
      wFrom[i] = (wFrom[i] as number) + intensityAt(line, x[i] as number);
      wTo[i] = (wTo[i] as number) + intensityAt(line, x[i + 1] as number);
    }
  for (const { at, force } of points) {
    const i = indexOf(x, at);
    forces[i] = (forces[i] as number) + force;
  }
  return { count: x.length - 1, x, wFrom, wTo, points: forces };
}

/** Intensity of a straight piece at x, exact at both of its ends. */
function intensityAt({ from, to, wFrom, wTo }: LineLoad, x: number): number {
  if (wFrom === wTo || x === from) return wFrom;
  if (x === to) return wTo;
  return wFrom * ((to - x) / (to - from)) + wTo * ((x - from) / (to - from));
}

/** Index of a value that is known to be among the ascending ones. */
function indexOf(ascending: readonly number[], value: number): number {
  let low = 0;
  let high = ascending.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((ascending[middle] as number) < value) low = middle + 1;
    else high = middle;
  }
  return low;
}

const byPlaceThenSize = (a: LineLoad, b: LineLoad): number => a.from - b.from || a.to - b.to || a.wFrom - b.wFrom || a.wTo - b.wTo;

function placed(line: LineLoad, span: number, slack: number, onBeam: (x: number) => number): LineLoad {
  const { from, to, wFrom, wTo } = line;
  if (!(from < to)) throw new RangeError(`line load must reach from left to right, got from ${from} to ${to} mm`);
  if (!(from >= -slack && to <= span + slack))
    throw new RangeError(`line load from ${from} to ${to} mm reaches past the beam, which is from 0 to ${span} mm`);
  checkIntensity(wFrom);
  checkIntensity(wTo);
  const start = onBeam(from);
  const end = onBeam(to);
  // A strip that lies wholly within the rounding of a support keeps its place inside the beam.
  return start < end ? { from: start, to: end, wFrom, wTo } : { from: Math.max(from, 0), to: Math.min(to, span), wFrom, wTo };
}

function checkedPoint({ at, force }: PointLoad, span: number, slack: number, onBeam: (x: number) => number): PointLoad {
  if (!(at >= -slack && at <= span + slack))
    throw new RangeError(`point load at ${at} mm stands past the beam, which is from 0 to ${span} mm`);
  if (!(force >= 0 && force < Infinity)) throw new RangeError(`point load must be 0 N or more, got ${force}`);
  return { at: onBeam(at), force };
}

function checkIntensity(w: number): void {
  if (!(w >= 0 && w < Infinity)) throw new RangeError(`load intensity must be 0 N/mm or more, got ${w}`);
}
