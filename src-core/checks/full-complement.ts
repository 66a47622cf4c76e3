/**
 * The loading that the trade itself calls uniform: the number of unit loads that the notice is made for,
 * near equal and evenly spaced. It is judged by its total and its unit loads, with the equivalent even
 * loads beside it as information. It stops applying as soon as one is missing, moved or heavier.
 */
import { lengthOf, massOf, quantity, ratioOf } from '../units/quantity';
import { say, type Finding, type Place, type Text, type WorkedStep } from './finding';
import type { LevelRating } from './level-rating';
import { compared, distinctMissing, finding, notAssessable } from './make-finding';
import type { EvenMasses } from './pair';
import { inside } from './phrase';
import { ruleQuantity, sourceOf, type ResolvedRules } from './rule-sets';
import { utilisationStep, type Stated } from './unit-load';

export interface ComplementGoods {
  readonly name: string;
  readonly massKg: number;
  readonly from: string;
  /** Outline along the bay, mm from the left upright's face. */
  readonly left: number;
  readonly width: number;
}

export interface FullComplementInput {
  readonly place: Place;
  readonly level: string;
  /** The site's switch. */
  readonly on: boolean;
  /** Unit loads that a level is made for. */
  readonly number: Stated;
  readonly goods: readonly ComplementGoods[];
  /** Free width between the uprights, mm. */
  readonly clearEntry: number;
  /** Even masses of the worse beam, by effect, kg on the pair; null where they could not be found. */
  readonly even: EvenMasses | null;
  readonly rated: LevelRating;
  readonly rules: ResolvedRules;
}

export interface FullComplement {
  /** Whether the level is judged as one; the checks by equivalent load then only inform. */
  readonly judged: boolean;
  readonly finding: Finding;
}

export function fullComplement(input: FullComplementInput): FullComplement {
  const { place, level, on, number, rated, even, goods, rules } = input;
  const informs = (says: () => Text): FullComplement => ({
    judged: false,
    finding: finding({ check: 'full-complement', place, verdict: 'within', counts: false, says }),
  });
  if (!on) return informs(() => say`This site does not judge levels as a designed full complement: the equivalent even loads decide.`);
  if (goods.length === 0 && even !== null) return informs(() => say`${level} is empty.`);
  if (number.value === null || rated.kg === null || even === null) {
    const missing = distinctMissing([...(number.value === null ? number.missing : []), ...rated.missing]);
    if (missing.length === 0) return informs(() => say`Not worked out before everything on ${inside(level)} is known and can stand so.`);
    return { judged: false, finding: notAssessable('full-complement', place, missing, { counts: false }) };
  }
  const made = number.value;
  const ratedKg = rated.kg;
  const departure = departs(input, made, ratedKg, even);
  if (departure !== null) return informs(() => say`Not the designed full complement: ${departure} The equivalent even loads decide.`);

  const heaviest = goods.reduce((most, one) => (one.massKg > most.massKg ? one : most));
  const byTotal = compared(massOf(even.total), massOf(ratedKg), rules.value.closeAbove);
  const byUnit = compared(massOf(heaviest.massKg), massOf(ratedKg / made), rules.value.closeAbove);
  const governs = byUnit.utilisation > byTotal.utilisation ? byUnit : byTotal;
  return {
    judged: true,
    finding: finding({
      check: 'full-complement',
      place,
      ...governs,
      says: () =>
        say`${level} holds its designed full complement of ${made} unit loads, near equal and evenly spaced. It counts as ${massOf(even.total)} of the ${massOf(ratedKg)} allowed, and its heaviest unit load as ${massOf(heaviest.massKg)} of ${massOf(ratedKg / made)}.`,
      worked: () => worked(input, heaviest, ratedKg, made, even.total),
      notes: () => [
        say`For information, the equivalent even loads: ${massOf(even.bending)} by bending, ${massOf(even.endShear)} by end shear, ${massOf(even.deflection)} by deflection; the greatest is ${ratioOf(greatest(even) / even.total)} times the total.`,
        ...(greatest(even) > ratedKg ? [say`By them the level has no spare.`] : []),
        say`Near equal is within ${ruleQuantity(rules, 'fullComplementMass')} (${sourceOf(rules, 'fullComplementMass')}), evenly spaced within ${ruleQuantity(rules, 'fullComplementSpacing')} (${sourceOf(rules, 'fullComplementSpacing')}).`,
        say`It stops applying as soon as a unit load is missing, moved or heavier. Put-away within the placement tolerance is part of that loading and does not count against it; how much heavier its goods may be counts in the level’s total.`,
      ],
    }),
  };
}

const greatest = (even: EvenMasses): number => Math.max(even.bending, even.endShear, even.deflection);

/** Why this is not the designed full complement, as a sentence; null if it is. */
function departs({ goods, clearEntry, rules }: FullComplementInput, made: number, ratedKg: number, even: EvenMasses): Text | null {
  if (goods.length !== made) return say`the notice is made for ${made} unit loads and ${goods.length} stand here.`;
  const mean = goods.reduce((sum, { massKg }) => sum + massKg, 0) / made;
  const width = goods.reduce((sum, one) => sum + one.width, 0);
  const gap = (clearEntry - width) / (made + 1);
  const { fullComplementMass, fullComplementSpacing, fullComplementFactor } = rules.value;
  let place = gap;
  for (const one of [...goods].sort((a, b) => a.left - b.left)) {
    if (Math.abs(one.massKg - mean) > (fullComplementMass / 100) * mean * (1 + ROUNDING))
      return say`${one.name} weighs ${massOf(one.massKg)} and the mean is ${massOf(mean)}, more than ${quantity('percent', fullComplementMass)} apart.`;
    if (one.massKg > (ratedKg / made) * (1 + ROUNDING) && goods.some(({ massKg }) => massKg < one.massKg))
      return say`${one.name} weighs ${massOf(one.massKg)}, more than its ${massOf(ratedKg / made)} of the rating.`;
    if (Math.abs(one.width - width / made) > fullComplementSpacing)
      return say`${one.name} is ${lengthOf(one.width)} wide, unlike the others.`;
    const off = Math.abs(one.left - place);
    if (off > fullComplementSpacing + 1e-6) return say`${one.name} stands ${lengthOf(off)} from its evenly spaced place.`;
    place += one.width + gap;
  }
  const factor = greatest(even) / even.total;
  if (factor > fullComplementFactor)
    return say`its equivalent even load is ${ratioOf(factor)} times its total, more than the ${ratioOf(fullComplementFactor)} of evenly spaced standard unit loads.`;
  return null;
}

const ROUNDING = 1e-12;

/**
 * Masses of one more unit load with which a level's others are near equal, and none is above its part of
 * the rating while another is lighter; what else the rule asks for is not looked at.
 * @param others kg, one less than the level is made for
 * @param percent greatest difference of one from their mean, of the mean
 * @returns kg; null where no mass makes them so
 * @example others of 800 and 800 kg within 5 %, rated 2 500 kg → 741.5 to 833.3 kg: 0.95 · 1 600 / 2.05 and 2 500 / 3
 */
export function fullComplementRange(
  others: readonly number[],
  ratedKg: number,
  percent: number,
): { readonly fromKg: number; readonly toKg: number } | null {
  const number = others.length + 1;
  const part = percent / 100;
  const sum = others.reduce((total, massKg) => total + massKg, 0);
  let from = number > 1 ? ((1 - part) * sum) / (number - 1 + part) : 0;
  let to = Math.min(ratedKg / number, number - 1 > part ? ((1 + part) * sum) / (number - 1 - part) : Infinity);
  for (const massKg of others) {
    if (massKg > (ratedKg / number) * (1 + ROUNDING)) return null;
    from = Math.max(from, (number * massKg) / (1 + part) - sum);
    to = Math.min(to, (number * massKg) / (1 - part) - sum);
  }
  return from <= to && to > 0 ? { fromKg: Math.max(0, from), toKg: to } : null;
}

function worked(
  { goods, number, rated }: FullComplementInput,
  heaviest: ComplementGoods,
  ratedKg: number,
  made: number,
  pairKg: number,
): readonly WorkedStep[] {
  const rating = { symbol: 'm_rated', is: 'rating of the pair', quantity: massOf(ratedKg), from: rated.from };
  const share = massOf(ratedKg / made);
  return [
    utilisationStep(
      { symbol: 'm', is: 'mass on the level, as twice its worse beam', quantity: massOf(pairKg), from: 'level total' },
      rating,
      rated.by,
      'Utilisation by the total',
    ),
    {
      what: 'Each unit load’s part of the rating',
      formula: 'm_rated / n',
      values: [
        rating,
        { symbol: 'n', is: 'unit loads that a level is made for', quantity: { value: made, kind: 'count' }, from: number.from },
      ],
      result: { symbol: 'm_part', quantity: share },
      source: 'designed full complement',
    },
    utilisationStep(
      {
        symbol: 'm1',
        is: `mass of ${heaviest.name}, the heaviest of ${goods.length}`,
        quantity: massOf(heaviest.massKg),
        from: heaviest.from,
      },
      { symbol: 'm_part', is: 'each unit load’s part of the rating', quantity: share, from: 'line above' },
      'designed full complement',
      'Utilisation by the heaviest unit load',
    ),
  ];
}
