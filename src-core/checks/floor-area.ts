/**
 * Load by area on the floor under a bay, against what the floor's owner states, and under a whole run for
 * information. Slabs are not calculated.
 *
 * Source: facts M-26.
 */
import { forceOf, lengthOf, quantity, ratioOf, weightOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place } from './finding';
import { FLOOR_NOTE } from './floor';
import { compared, distinctMissing, finding, notAssessable } from './make-finding';
import { opening } from './phrase';
import type { ResolvedRules } from './rule-sets';
import { utilisationStep, type Stated } from './unit-load';
import { above, GRAVITY, put } from './worked-values';

export interface FloorAreaInput {
  readonly place: Place;
  /** "bay A1". */
  readonly bay: string;
  readonly kind: 'ground-slab' | 'suspended' | 'unknown' | null;
  /** What to fill in where floor or kind is not known. */
  readonly kindMissing: Missing;
  /** Everything that stands in the bay, on its levels and its floor, with half of each of its frames, kg; null = not known. */
  readonly massKg: number | null;
  readonly missing: readonly Missing[];
  /** From upright middle to upright middle, and the depth of the frames, mm; null where no frame type is known. */
  readonly width: number | null;
  readonly depth: number | null;
  /** N/mm² that the floor's owner allows. */
  readonly limit: Stated;
  readonly rules: ResolvedRules;
}

/** A suspended floor also answers for load by area; a slab on the ground does where its owner states a limit. */
export function floorArea(input: FloorAreaInput): Finding {
  const { place, bay, kind, kindMissing, massKg, width, depth, limit, rules } = input;
  if (kind === null || kind === 'unknown') return notAssessable('floor-area', place, [kindMissing]);
  if (kind === 'ground-slab' && limit.value === null)
    return finding({
      check: 'floor-area',
      place,
      verdict: 'within',
      says: () => say`${opening(bay)} stands on a slab on the ground, for which its owner states no limit by area: its legs decide.`,
    });
  const missing = distinctMissing([...input.missing, ...limit.missing]);
  if (missing.length > 0 || massKg === null || width === null || depth === null || limit.value === null)
    return notAssessable('floor-area', place, missing);
  const load = quantity('stress', weightOf(massKg) / (width * depth));
  const allowed = quantity('stress', limit.value);
  return finding({
    check: 'floor-area',
    place,
    ...compared(load, allowed, rules.value.closeAbove),
    says: () => say`${opening(bay)} loads the floor with ${load} over its own footprint. The floor’s owner allows ${allowed}.`,
    worked: () => [
      {
        what: 'Load by area over the bay’s footprint',
        formula: 'm · g / (w · d)',
        values: [
          put('m', 'goods, beams, decks and half of each frame', { value: massKg, kind: 'mass' }, 'levels and frames of the bay'),
          GRAVITY,
          put('w', 'from upright middle to upright middle', lengthOf(width), 'bay and frame types'),
          put('d', 'depth of the frames', lengthOf(depth), 'frame types'),
        ],
        result: { symbol: 'q', quantity: load },
        source: 'common practice, no source; the aisle in front is not counted',
      },
      utilisationStep(above('q', 'load by area', load), put('q_floor', 'allowed by area', allowed, limit.from), 'floor’s owner'),
    ],
    notes: () => [
      FLOOR_NOTE,
      say`Over the footprint alone the load is ${ratioOf(load.value / allowed.value)} times the limit; with its share of the aisle it is less.`,
    ],
  });
}

export interface RunOnFloor {
  readonly place: Place;
  /** "run A". */
  readonly run: string;
  /** Sum of all its legs, N. */
  readonly legs: number;
  /** Outside to outside of its end frames, and depth of its frames, mm. */
  readonly length: number;
  readonly depth: number;
  readonly limit: Stated;
}

/** What a whole run brings on a suspended floor, for whoever has to prove it; each bay is judged by itself. */
export function runOnFloor({ place, run, legs, length, depth, limit }: RunOnFloor): Finding {
  const mean = quantity('stress', legs / (length * depth));
  return finding({
    check: 'floor-area',
    place,
    verdict: 'within',
    counts: false,
    demand: mean,
    ...(limit.value === null ? {} : { allowed: quantity('stress', limit.value), utilisation: mean.value / limit.value }),
    says: () =>
      say`${opening(run)} stands on a suspended floor and presses on it with ${forceOf(legs)} under all its legs, ${mean} over its footprint.`,
    worked: () => [
      {
        what: 'Mean load by area over the run’s footprint',
        formula: 'N / (l · d)',
        values: [
          put('N', 'force of all legs', forceOf(legs), 'upright frames, storey by storey'),
          put('l', 'length of the run', lengthOf(length), 'bays and frame types'),
          put('d', 'depth of the frames', lengthOf(depth), 'frame types'),
        ],
        result: { symbol: 'q', quantity: mean },
        source: 'common practice, no source',
      },
    ],
    notes: () => [
      say`For information: each bay is judged by itself, where the floor may be loaded harder. Goods standing on the floor come on top.`,
      FLOOR_NOTE,
    ],
  });
}
