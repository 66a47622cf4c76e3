/**
 * The same goods brought down through the runners or block lines of their pallets instead of evenly: a
 * flexible pallet loads its middle line most, a rigid one all alike. The worse of the two is shown.
 *
 * Source: shares ¼–½–¼ and ⅓ each are common practice (facts F-108); the effect is statics.
 */
import { massOf, ratioOf } from '../units/quantity';
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

export interface RunnersInput {
  /** The beams under the goods as they are stated. */
  readonly stated: PairInput;
  /** The same beams with the goods on their pallets' lines of runners. */
  readonly onRunners: Readonly<Record<Spread, PairInput>>;
  /** False where the level is judged as a designed full complement. */
  readonly counts: boolean;
}

export function runners({ stated, onRunners, counts }: RunnersInput): Finding {
  const { level, rated, rules, place } = stated;
  const worst = SPREADS.flatMap((spread) =>
    (['bending', 'deflection'] as const).map((effect) => ({
      spread,
      effect,
      input: onRunners[spread],
      worse: worseBeam(onRunners[spread], effect),
    })),
  ).reduce((most, one) => (one.worse.kg > most.worse.kg ? one : most));
  const { spread, effect, input, worse } = worst;
  const even = worseBeam(stated, effect).kg;
  const does = effect === 'bending' ? 'bends' : 'makes';
  const sag = effect === 'bending' ? '' : ' sag';
  const says = () =>
    say`On the lines of its pallets, ${inside(level)} ${does} ${nameOf(stated, worse.side)}${sag} as ${massOf(worse.kg)} evenly spread on the pair would; spread as stated, as ${massOf(even)}.${rated.kg === null ? say`` : say` ${opening(rated.by)} allows ${massOf(rated.kg)}.`}`;
  const at = { ...place, beam: worse.side };
  const worked = () => (effect === 'bending' ? bendingSteps : deflectionSteps)(input, worse);
  if (rated.kg === null) return notAssessable('pallet-bearing', at, rated.missing, { counts, says, worked, demand: massOf(worse.kg) });
  return finding({
    check: 'pallet-bearing',
    place: at,
    ...compared(massOf(worse.kg), massOf(rated.kg), rules.value.closeAbove),
    counts,
    says,
    worked,
    notes: () => [
      say`Worst for ${SPREAD_WORDS[spread]}; the other way it counts as ${massOf(worseBeam(onRunners[spread === 'rigid' ? 'flexible' : 'rigid'], effect).kg)} (utilisation ${ratioOf(otherUse(onRunners, spread, effect, rated.kg ?? 1))}).`,
      ...(counts ? [] : [say`For information: this level is judged as a designed full complement, by its total and its unit loads.`]),
    ],
  });
}

const otherUse = (onRunners: RunnersInput['onRunners'], spread: Spread, effect: 'bending' | 'deflection', ratedKg: number): number => {
  const other: WorseBeam = worseBeam(onRunners[spread === 'rigid' ? 'flexible' : 'rigid'], effect);
  return other.kg / ratedKg;
};
