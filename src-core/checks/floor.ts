/**
 * The legs of a frame on the floor, against what the floor's owner states and nothing else: force of a
 * leg, pressure under its plate, and two legs that stand back to back.
 *
 * Source: facts M-26 and F-135 to F-137; slabs are not calculated.
 */
import { forceOf, lengthOf, quantity, weightOf, type Quantity } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type Text, type WorkedStep, type WorkedValue } from './finding';
import { compared, distinctMissing, finding, notAssessable } from './make-finding';
import { opening } from './phrase';
import { ruleQuantity, ruleValue, sourceOf, type ResolvedRules } from './rule-sets';
import { utilisationStep, type Stated } from './unit-load';
import { above, GRAVITY, put } from './worked-values';

/** The two legs of a frame, everything above them included, kg; null = not known. */
export interface Legs {
  readonly frontKg: number;
  readonly rearKg: number;
}

export interface FrameOnFloor {
  readonly place: Place;
  /** "frame A-F2". */
  readonly frame: string;
  readonly legs: Legs | null;
  /** What the legs lack; empty with legs of null means that goods cannot stand as they were entered. */
  readonly missing: readonly Missing[];
  readonly rules: ResolvedRules;
}

export const FLOOR_NOTE: Text = say`The floor is not calculated here: joints, edges, voids and suspended floors need an engineer.`;

type FloorCheck = 'leg-load' | 'plate-pressure' | 'back-to-back-legs';

/** The finding where the legs are not known, or something else lacks; null if all is there. */
function lacking(check: FloorCheck, input: FrameOnFloor, more: readonly Missing[]): Finding | null {
  const missing = distinctMissing([...(input.legs === null ? input.missing : []), ...more]);
  if (missing.length > 0) return notAssessable(check, input.place, missing);
  if (input.legs !== null) return null;
  return finding({
    check,
    place: input.place,
    verdict: 'not-possible',
    says: () => say`Not worked out: goods beside ${input.frame} cannot stand as they were entered.`,
  });
}

const worse = ({ frontKg, rearKg }: Legs) =>
  rearKg > frontKg ? ({ side: 'rear', kg: rearKg } as const) : ({ side: 'front', kg: frontKg } as const);

const legStep = (kg: number, side: string, symbol: string): WorkedStep => ({
  what: `Force of the ${side} leg`,
  formula: 'm_leg · g',
  values: [put('m_leg', 'mass on the leg, down from every level', { value: kg, kind: 'mass' }, 'upright frame, storey by storey'), GRAVITY],
  result: { symbol, quantity: forceOf(weightOf(kg)) },
  source: 'statics',
});

/** @param limit N that the floor's owner allows under one leg */
export function legLoad(input: FrameOnFloor, limit: Stated): Finding {
  const lack = lacking('leg-load', input, limit.missing);
  const { legs, place, frame, rules } = input;
  if (lack !== null || legs === null || limit.value === null) return lack ?? notAssessable('leg-load', place, limit.missing);
  const { side, kg } = worse(legs);
  const force = forceOf(weightOf(kg));
  const allowed = forceOf(limit.value);
  return finding({
    check: 'leg-load',
    place: { ...place, post: side },
    ...compared(force, allowed, rules.value.closeAbove),
    says: () => say`The ${side} leg of ${frame} presses on the floor with ${force}. Its owner allows ${allowed} under one leg.`,
    worked: () => [
      legStep(kg, side, 'N'),
      utilisationStep(above('N', 'force of the leg', force), put('N_floor', 'allowed under one leg', allowed, limit.from), 'floor’s owner'),
    ],
    notes: () => [FLOOR_NOTE],
  });
}

/** Size of a base plate along and across the run, mm, each as its maker states it. */
export interface Plate {
  readonly width: Stated;
  readonly depth: Stated;
}

/** @param limit N/mm² that the floor's owner allows */
export function platePressure(input: FrameOnFloor, plate: Plate, limit: Stated): Finding {
  const { width, depth } = plate;
  const missing = [...width.missing, ...depth.missing, ...limit.missing];
  const lack = lacking('plate-pressure', input, missing);
  const { legs, place, frame, rules } = input;
  if (lack !== null || legs === null || width.value === null || depth.value === null || limit.value === null)
    return lack ?? notAssessable('plate-pressure', place, missing);
  const { side, kg } = worse(legs);
  const force = weightOf(kg);
  const pressure = quantity('stress', force / (width.value * depth.value));
  const allowed = quantity('stress', limit.value);
  const values: readonly WorkedValue[] = [
    above('N', 'force of the leg', forceOf(force)),
    put('b', 'plate along the run', lengthOf(width.value), width.from),
    put('d', 'plate across the run', lengthOf(depth.value), depth.from),
  ];
  return finding({
    check: 'plate-pressure',
    place: { ...place, post: side },
    ...compared(pressure, allowed, rules.value.closeAbove),
    says: () => say`The ${side} base plate of ${frame} presses on the floor with ${pressure}. Its owner allows ${allowed}.`,
    worked: () => [
      legStep(kg, side, 'N'),
      {
        what: 'Pressure under the base plate',
        formula: 'N / (b · d)',
        values,
        result: { symbol: 'q', quantity: pressure },
        source: 'the whole plate is taken to press alike',
      },
      utilisationStep(
        above('q', 'pressure under the plate', pressure),
        put('q_floor', 'allowed pressure', allowed, limit.from),
        'floor’s owner',
      ),
    ],
    notes: () => [FLOOR_NOTE, say`A thin plate presses hardest under its post; how much of it carries is for the engineer.`],
  });
}

/** The run behind, as its legs stand against this frame's. */
export interface LegsBehind {
  /** "frame B-F3 of run B". */
  readonly name: string;
  /** Rear leg of the frame behind, kg; null = not known, and `missing` says why. */
  readonly rearKg: number | null;
  readonly missing: readonly Missing[];
  /** Free gap from frame to frame, mm. */
  readonly gap: number;
}

/**
 * Two legs back to back, where they stand nearer than the rule set's multiple of the slab's thickness.
 * @param limit N that the floor's owner allows under two legs together
 * @param thickness of the slab, mm
 */
export function backToBackLegs(input: FrameOnFloor, behind: LegsBehind | null, limit: Stated, thickness: Stated): Finding {
  const { legs, place, frame, rules } = input;
  if (behind === null)
    return finding({ check: 'back-to-back-legs', place, verdict: 'within', says: () => say`No run stands behind ${frame}.` });
  const missing = [...(behind.rearKg === null ? behind.missing : []), ...limit.missing, ...thickness.missing];
  const lack = lacking('back-to-back-legs', input, missing);
  if (lack !== null || legs === null || limit.value === null || thickness.value === null)
    return lack ?? notAssessable('back-to-back-legs', place, missing);
  if (behind.rearKg === null)
    return finding({
      check: 'back-to-back-legs',
      place,
      verdict: 'not-possible',
      says: () => say`Not worked out: goods beside ${behind.name} cannot stand as they were entered.`,
    });
  const near = rules.value.slabPairSpacing * thickness.value;
  const spacing: WorkedStep = {
    what: 'Spacing below which two legs count as a pair',
    formula: 'n · t',
    values: [ruleValue(rules, 'slabPairSpacing', 'n'), put('t', 'thickness of the slab', lengthOf(thickness.value), thickness.from)],
    result: { symbol: 's', quantity: lengthOf(near) },
    source: sourceOf(rules, 'slabPairSpacing'),
  };
  const limitNote = say`Legs count as a pair below ${ruleQuantity(rules, 'slabPairSpacing')} slab thicknesses (${sourceOf(rules, 'slabPairSpacing')}); the free gap between the frames is taken as their spacing, which is the safe side.`;
  if (behind.gap >= near)
    return finding({
      check: 'back-to-back-legs',
      place,
      verdict: 'within',
      says: () =>
        say`The rear leg of ${frame} stands ${lengthOf(behind.gap)} from that of ${behind.name}, which is far enough for each to be judged by itself.`,
      worked: () => [spacing],
      notes: () => [limitNote],
    });
  const pair = forceOf(weightOf(legs.rearKg + behind.rearKg));
  const allowed: Quantity = forceOf(limit.value);
  const behindKg = behind.rearKg;
  return finding({
    check: 'back-to-back-legs',
    place: { ...place, post: 'rear' },
    ...compared(pair, allowed, rules.value.closeAbove),
    says: () =>
      say`${opening(frame)} and ${behind.name} press on the floor with ${pair} under their two rear legs, ${lengthOf(behind.gap)} apart. The floor’s owner allows ${allowed} under two legs.`,
    worked: () => [
      spacing,
      {
        what: 'Force of the two rear legs',
        formula: '(m_this + m_behind) · g',
        values: [
          put('m_this', `mass on the rear leg of ${frame}`, { value: legs.rearKg, kind: 'mass' }, 'upright frame, storey by storey'),
          put('m_behind', `mass on the rear leg of ${behind.name}`, { value: behindKg, kind: 'mass' }, 'upright frame, storey by storey'),
          GRAVITY,
        ],
        result: { symbol: 'N', quantity: pair },
        source: 'statics',
      },
      utilisationStep(
        above('N', 'force of the two legs', pair),
        put('N_floor', 'allowed under two legs', allowed, limit.from),
        'floor’s owner',
      ),
    ],
    notes: () => [limitNote, FLOOR_NOTE],
  });
}
