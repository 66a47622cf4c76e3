/**
 * The same goods brought down through the runners or block lines of their pallets instead of evenly: a
 * flexible pallet loads its middle line most, a rigid one all alike. The worse of the two is shown.
 *
 * Source: shares ¼–½–¼ and ⅓ each are common practice (facts F-108); the effect is statics.
 */
import { massOf } from '../units/quantity';
import { bendingSteps, deflectionSteps } from './beam-worked';
import { say, type Finding } from './finding';
import { compared, finding, notAssessable } from './make-finding';
import { nameOf, worseBeam, type PairInput, type WorseBeam } from './pair';
import { inside, opening } from './phrase';

const SPREADS = ['flexible', 'rigid'] as const;
export type Spread = (typeof SPREADS)[number];

/**
 * Share of each line of runners, from one edge to the other.
 * @example three lines → ¼, ½, ¼ flexible; ⅓ each rigid
 */
export function runnerShares(lines: number, spread: Spread): readonly number[] {
  if (!(Number.isInteger(lines) && lines > 0)) throw new RangeError(`a pallet has 1 line of runners or more, got ${lines}`);
  if (spread === 'rigid' || lines < 3) return Array.from({ length: lines }, () => 1 / lines);
  return Array.from({ length: lines }, (_, i) => (i === 0 || i === lines - 1 ? 0.5 : 1) / (lines - 1));
}

const SPREAD_WORDS: Readonly<Record<Spread, string>> = {
  flexible: 'a flexible pallet, whose inner lines carry twice what its outer ones do',
  rigid: 'a rigid pallet, whose lines all carry alike',
};

/** A unit load whose weight comes down on the lines of its pallet. */
export interface OnLines {
  readonly massKg: number;
  /** mm. */
  readonly width: number;
  readonly frontShare: number;
  /** Its lines carry it at the same centre as an even spread does. */
  readonly centred: boolean;
}

export interface RunnersInput {
  /** The beams under the goods as they are stated. */
  readonly stated: PairInput;
  readonly onLines: readonly OnLines[];
  /** The same beams with the goods on their pallets' lines of runners. */
  readonly onRunners: () => Readonly<Record<Spread, PairInput>>;
  /** False where the level is judged as a designed full complement. */
  readonly counts: boolean;
}

/** The worse of both spreads by bending and deflection. */
interface Worst {
  readonly spread: Spread;
  readonly effect: 'bending' | 'deflection';
  readonly input: PairInput;
  readonly worse: WorseBeam;
  readonly otherKg: number;
}

/**
 * A level that must be within by a bound is not solved again until someone reads its figures, and then
 * has no utilisation of its own: that of the goods as stated stands beside it.
 */
export function runners(input: RunnersInput): Finding {
  const { stated, counts } = input;
  const { level, rated, rules, place } = stated;
  let solved: Worst | null = null;
  const worst = () => (solved ??= worstOf(input));
  const says = () => {
    const { effect, worse } = worst();
    const does = effect === 'bending' ? 'bends' : 'makes';
    const sag = effect === 'bending' ? '' : ' sag';
    const even = worseBeam(stated, effect).kg;
    return say`On the lines of its pallets, ${inside(level)} ${does} ${nameOf(stated, worse.side)}${sag} as ${massOf(worse.kg)} evenly spread on the pair would; spread as stated, as ${massOf(even)}.${rated.kg === null ? say`` : say` ${opening(rated.by)} allows ${massOf(rated.kg)}.`}`;
  };
  const worked = () => {
    const { effect, input: pair, worse } = worst();
    return (effect === 'bending' ? bendingSteps : deflectionSteps)(pair, worse);
  };
  const notes = () => {
    const { spread, otherKg } = worst();
    return [
      say`Worst for ${SPREAD_WORDS[spread]}; the other way it counts as ${massOf(otherKg)}.`,
      ...(counts ? [] : [say`For information: this level is judged as a designed full complement, by its total and its unit loads.`]),
    ];
  };
  if (rated.kg === null) return notAssessable('pallet-bearing', place, rated.missing, { counts, says, worked });
  if (mostKg(input) <= rules.value.closeAbove * rated.kg)
    return finding({ check: 'pallet-bearing', place, verdict: 'within', counts, says, worked, notes });
  const { worse } = worst();
  return finding({
    check: 'pallet-bearing',
    place: { ...place, beam: worse.side },
    ...compared(massOf(worse.kg), massOf(rated.kg), rules.value.closeAbove),
    counts,
    says,
    worked,
    notes,
  });
}

function worstOf({ onRunners }: RunnersInput): Worst {
  const pairs = onRunners();
  const all = SPREADS.flatMap((spread) =>
    (['bending', 'deflection'] as const).map((effect) => ({
      spread,
      effect,
      input: pairs[spread],
      worse: worseBeam(pairs[spread], effect),
      otherKg: worseBeam(pairs[spread === 'rigid' ? 'flexible' : 'rigid'], effect).kg,
    })),
  );
  return all.reduce((most, one) => (one.worse.kg > most.worse.kg ? one : most));
}

/**
 * No spread with the same centre can do more than this, kg on the pair: a unit load of mass m and width w
 * raises the moment at a section under it by m·g·w/8 at most, and the deflection anywhere by m·g·w²·L/96EI,
 * which is what a point at its centre would. Infinite where that does not hold: ends that are not pinned,
 * or lines off the centre. Two unit loads may stand over one section, one behind the other.
 * Source: Jensen's inequality on the influence lines of moment and deflection, which are concave.
 */
export function mostKg({ stated, onLines }: Pick<RunnersInput, 'stated' | 'onLines'>): number {
  if (stated.fixity > 0 || onLines.some(({ centred }) => !centred)) return Infinity;
  const { span, front, rear } = stated;
  const side = (even: PairInput['front']['even'], share: (goods: OnLines) => number): number => {
    const bends = onLines.map((one) => (2 * share(one) * one.massKg * one.width) / span).sort((a, b) => b - a);
    const sags = onLines.reduce((sum, one) => sum + 2 * share(one) * one.massKg * 0.8 * (one.width / span) ** 2, 0);
    return Math.max(even.bending + (bends[0] ?? 0) + (bends[1] ?? 0), even.deflection + sags);
  };
  return Math.max(
    side(front.even, ({ frontShare }) => frontShare),
    side(rear.even, ({ frontShare }) => 1 - frontShare),
  );
}
