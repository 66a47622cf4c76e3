/**
 * The worst arrangement of unit loads by influence lines: for the section at hand each unit load goes where
 * the line takes most of it, then the section goes where that arrangement does most, until neither betters
 * the other. Both steps can only raise the effect.
 *
 * An influence line of a straight beam is a cubic of the distance from the nearer-named support on either
 * side of its section, whatever holds the ends.
 */
import { solveBeam, type Beam } from './beam';
import { heldEnds } from './beam-ends';
import type { BeamLoad } from './load';
import { RESULT, scratchFor } from './pinned-layout';
import { solvePinnedPair } from './pinned-pair';
import { packProfile } from './profile';
import { arrangedLoad, leastPlace, mostPlace, type LooseBeam, type LooseLoad } from './worst-case-loads';

export interface Searched {
  /** N·mm for the moment, mm for the sag. */
  readonly value: number;
  readonly at: number;
  readonly shifts: readonly number[];
}

/** c₁·d + c₂·d² + c₃·d³ of the distance d from a support; at the support itself it is 0. */
type Cubic = readonly [number, number, number];

interface InfluenceLine {
  readonly section: number;
  /** Left of the section, by the distance from the left support; right of it, by that from the right one. */
  readonly left: Cubic;
  readonly right: Cubic;
}

const MOST_ROUNDS = 60;
/** A round that raises the effect by less than this part of it is the last. */
const SETTLED = 1e-13;
/** mm; at its greatest an effect is off by the square of such a step beside the span. */
const PLACE_PRECISION = 1e-5;
/** With held ends a line bends both ways, so that a unit load's best place is looked for in this many parts. */
const PARTS = 16;

export function searchWorst(beam: LooseBeam, loads: readonly LooseLoad[], effect: 'moment' | 'sag'): Searched {
  const pinned = beam.left.kind === 'pinned' && beam.right.kind === 'pinned';
  const line = effect === 'moment' ? momentLine(beam) : sagLine(beam);
  const parts = pinned ? 1 : PARTS;
  let best: Searched | null = null;
  const quick = pinned && effect === 'sag' ? quickSag(beam, loads) : null;
  const measure = (shifts: readonly number[]): Searched => {
    const found = quick?.(shifts);
    if (found !== undefined && found !== null) return found;
    const answer = solveBeam(beam, arrangedLoad(loads, shifts, beam.span));
    const { sagging, deflection } = answer;
    return effect === 'moment'
      ? { value: sagging.moment, at: (sagging.from + sagging.to) / 2, shifts }
      : { value: deflection.sag, at: deflection.at, shifts };
  };
  const stated = measure(loads.map(() => 0));
  for (const start of startsOf(beam, loads, effect, pinned, stated.at)) {
    let last = stated;
    let section = start;
    for (let round = 0; round < MOST_ROUNDS; round++) {
      const here = line(section);
      const next = measure(loads.map((one) => bestPlace(beam, one, here, parts) - one.at));
      const risen = round === 0 || next.value > last.value * (1 + SETTLED);
      last = next;
      section = next.at;
      if (best === null || next.value > best.value) best = next;
      if (!risen) break;
    }
  }
  return best !== null && best.value > stated.value ? best : stated;
}

/** The greatest sag by the sums of whole unit loads, for as long as none overlaps; null where one does. */
function quickSag({ span, rigidity }: Beam, loads: readonly LooseLoad[]): (shifts: readonly number[]) => Searched | null {
  const order = loads.map((_, i) => i).sort((a, b) => (loads[a] as LooseLoad).at - (loads[b] as LooseLoad).at);
  const packed = order.map((i) => {
    const { load, width, factor } = loads[i] as LooseLoad;
    // Each beam of the pair that is solved takes half of it.
    return packProfile(times(load, 2 * factor), width);
  });
  const profiles = new Float64Array(packed.reduce((sum, one) => sum + one.length, 0));
  const profile = new Int32Array(loads.length);
  let filled = 0;
  packed.forEach((one, i) => {
    profile[i] = filled;
    profiles.set(one, filled);
    filled += one.length;
  });
  const at = new Float64Array(loads.length);
  const share = new Float64Array(loads.length).fill(0.5);
  const scratch = new Float64Array(scratchFor(loads.length));
  const out = new Float64Array(2 * RESULT.size);
  return (shifts) => {
    order.forEach((given, i) => {
      at[i] = (loads[given] as LooseLoad).at + (shifts[given] as number);
    });
    if (!solvePinnedPair(span, { profiles, profile, at, share }, 0, loads.length, scratch, out)) return null;
    return { value: (out[RESULT.deflectionEI] as number) / rigidity, at: out[RESULT.deflectionAt] as number, shifts };
  };
}

const times = ({ lines, points }: BeamLoad, factor: number): BeamLoad => ({
  lines: lines.map((line) => ({ ...line, wFrom: line.wFrom * factor, wTo: line.wTo * factor })),
  points: points.map((point) => ({ ...point, force: point.force * factor })),
});

/** A beam sags most near its middle wherever its loads stand; its moment may be greatest under any of them. */
function startsOf(
  { span }: LooseBeam,
  loads: readonly LooseLoad[],
  effect: 'moment' | 'sag',
  pinned: boolean,
  stated: number,
): readonly number[] {
  if (effect === 'sag') return pinned ? [stated] : [stated, span / 2];
  return [stated, span / 2, ...loads.flatMap(({ at, width }) => [at, at + width / 2, at + width])];
}

function bestPlace(beam: LooseBeam, one: LooseLoad, line: InfluenceLine, parts: number): number {
  const least = leastPlace(beam, one);
  const most = mostPlace(beam, one);
  if (most <= least) return one.at;
  const slope = (place: number) => taken(beam.span, one, place, line, true);
  const candidates: number[] = [];
  let low = least;
  let slopeLow = slope(low);
  if (slopeLow <= 0) candidates.push(least);
  for (let i = 1; i <= parts; i++) {
    const high = i === parts ? most : least + ((most - least) * i) / parts;
    const slopeHigh = slope(high);
    if (slopeLow > 0 && slopeHigh < 0) candidates.push(crossing(slope, low, high, slopeLow, slopeHigh));
    low = high;
    slopeLow = slopeHigh;
  }
  if (slopeLow >= 0) candidates.push(most);
  if (candidates.length === 1) return candidates[0] as number;
  const value = (place: number) => taken(beam.span, one, place, line, false);
  return candidates.reduce((best, place) => (value(place) > value(best) ? place : best), candidates[0] ?? one.at);
}

/** Where a falling function passes zero: regula falsi with the Illinois rule, then halving. */
function crossing(of: (x: number) => number, low: number, high: number, atLow: number, atHigh: number): number {
  let kept = 0;
  for (let step = 0; step < 80; step++) {
    if (high - low <= PLACE_PRECISION) break;
    const x = step < 40 ? low + ((high - low) * atLow) / (atLow - atHigh) : low + (high - low) / 2;
    const value = of(x);
    if (value === 0) return x;
    if (value > 0) {
      low = x;
      atLow = value;
      if (kept === 1) atHigh /= 2;
      kept = 1;
    } else {
      high = x;
      atHigh = value;
      if (kept === -1) atLow /= 2;
      kept = -1;
    }
  }
  return low + ((high - low) * atLow) / (atLow - atHigh);
}

// Three Gauss points are exact up to the fifth power; intensity times a cubic is the fourth.
const NODE = Math.sqrt(0.6) / 2;

/** What the line takes of a unit load whose left edge is at `place`, or how fast that rises as it goes right. */
function taken(span: number, { load }: LooseLoad, place: number, line: InfluenceLine, slope: boolean): number {
  const { section, left, right } = line;
  let sum = 0;
  for (const { from, to, wFrom, wTo } of load.lines) {
    const a = place + from;
    const b = place + to;
    if (section >= b) sum += ofPart(left, 0, 1, slope, a, b, wFrom, wTo);
    else if (section <= a) sum += ofPart(right, span, -1, slope, a, b, wFrom, wTo);
    else {
      const w = wFrom + ((wTo - wFrom) * (section - a)) / (b - a);
      sum += ofPart(left, 0, 1, slope, a, section, wFrom, w) + ofPart(right, span, -1, slope, section, b, w, wTo);
    }
  }
  for (const { at, force } of load.points) {
    const x = place + at;
    sum += force * (x < section ? ofLine(left, x, 1, slope) : ofLine(right, span - x, -1, slope));
  }
  return sum;
}

/** A straight piece of load from a to b; distances are `way`·(x − origin), with `way` 1 or −1. */
function ofPart(line: Cubic, origin: number, way: 1 | -1, slope: boolean, a: number, b: number, wFrom: number, wTo: number): number {
  const h = b - a;
  const w = (wFrom + wTo) / 2;
  const lean = (wTo - wFrom) * NODE;
  const middle = way * (a + h / 2 - origin);
  const step = way * h * NODE;
  return (
    (h / 18) *
    (5 * (w - lean) * ofLine(line, middle - step, way, slope) +
      8 * w * ofLine(line, middle, way, slope) +
      5 * (w + lean) * ofLine(line, middle + step, way, slope))
  );
}

/** The line at the distance d from its support, or its slope to the right. */
const ofLine = ([c1, c2, c3]: Cubic, d: number, way: 1 | -1, slope: boolean): number =>
  slope ? way * (c1 + d * (2 * c2 + d * 3 * c3)) : d * (c1 + d * (c2 + d * c3));

/** Moment at the section under 1 N: the triangle of the pinned beam, less what the end moments take. */
function momentLine({ span, rigidity, left, right }: Beam): (section: number) => InfluenceLine {
  const ends = heldEnds(left, right, rigidity, span);
  // End moments, by the distance d from the left support: (near·d·(L−d)² + far·d²·(L−d))/L² at the left end.
  const own = ({ near, far }: typeof ends.left): Cubic => [near, (far - 2 * near) / span, (near - far) / span / span];
  const other = ({ near, far }: typeof ends.left): Cubic => [far, (near - 2 * far) / span, (far - near) / span / span];
  const less = (triangle: number, a: Cubic, partA: number, b: Cubic, partB: number): Cubic => [
    triangle - partA * a[0] - partB * b[0],
    -partA * a[1] - partB * b[1],
    -partA * a[2] - partB * b[2],
  ];
  return (section) => {
    const r = section / span;
    return {
      section,
      left: less(1 - r, own(ends.left), 1 - r, other(ends.right), r),
      right: less(r, other(ends.left), 1 - r, own(ends.right), r),
    };
  };
}

/** EI times the deflection at the section under 1 N; by Maxwell's theorem the bending line under 1 N at the section. */
function sagLine({ span, rigidity, left, right }: Beam): (section: number) => InfluenceLine {
  const ends = heldEnds(left, right, rigidity, span);
  return (section) => {
    const a = section;
    const b = span - section;
    const atLeft = (a * b * (ends.left.near * b + ends.left.far * a)) / span / span;
    const atRight = (a * b * (ends.right.near * a + ends.right.far * b)) / span / span;
    const side = (far: number, own: number, other: number): Cubic => [
      (a * b * (span + far)) / (6 * span) - (span * own) / 3 - (span * other) / 6,
      own / 2,
      -(far + own - other) / (6 * span),
    ];
    return { section, left: side(b, atLeft, atRight), right: side(a, atRight, atLeft) };
  };
}
