/**
 * Do the heavier goods stand low: the height of the bay's centre of mass against that of the best order
 * of the same goods in the same places, and the top level against the mean.
 *
 * Source: facts M-19; the rule "heavy low" and its limit are common practice.
 */
import { lengthOf, massOf, quantity } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type Text, type WorkedStep } from './finding';
import { distinctMissing, finding, notAssessable } from './make-finding';
import { listed, opening } from './phrase';
import { ruleQuantity, sourceOf, type ResolvedRules } from './rule-sets';
import { above, put } from './worked-values';

export interface StackedGoods {
  readonly placementId: string;
  readonly name: string;
  readonly massKg: number | null;
  readonly from: string;
  /** Floor to their foot, and their own height, mm. */
  readonly foot: number;
  readonly height: number;
  /** "level 2". */
  readonly level: string;
  readonly missing: readonly Missing[];
}

export interface HeavyLowInput {
  readonly place: Place;
  readonly bay: string;
  /** On the beam levels; goods on the floor load no rack. */
  readonly goods: readonly StackedGoods[];
  /** Every beam level from the lowest up, empty ones too. */
  readonly levels: readonly string[];
  readonly rules: ResolvedRules;
}

interface Known extends StackedGoods {
  readonly massKg: number;
}

/** The best order: the heaviest goods on the lowest places, each place with the goods it should hold. */
export interface BestOrder {
  /** Height of the centre of mass, mm. */
  readonly height: number;
  readonly places: readonly { readonly level: string; readonly goods: Known }[];
}

/** Floor to the common centre of mass, mm; each unit load's own lies at half its height. */
export const centreHeight = (goods: readonly { readonly massKg: number; readonly foot: number; readonly height: number }[]): number =>
  goods.reduce((sum, { massKg, foot, height }) => sum + massKg * (foot + height / 2), 0) /
  goods.reduce((sum, { massKg }) => sum + massKg, 0);

/**
 * Masses in falling order on places in rising order give the lowest centre there is.
 * Source: the rearrangement inequality (Hardy, Littlewood, Pólya, Inequalities, 1934, chapter X).
 */
export function bestOrder(goods: readonly Known[]): BestOrder {
  const byMass = [...goods].sort((a, b) => b.massKg - a.massKg);
  const byFoot = [...goods].sort((a, b) => a.foot - b.foot);
  const places = byFoot.map(({ level, foot }, i) => ({ level, foot, goods: byMass[i] as Known }));
  return { height: centreHeight(places.map(({ foot, goods: one }) => ({ ...one, foot }))), places };
}

export function heavyLow(input: HeavyLowInput): Finding {
  const { place, bay, goods, levels, rules } = input;
  const check = 'heavy-low';
  if (goods.length === 0)
    return finding({ check, place, verdict: 'within', says: () => say`No goods stand on the beam levels of ${bay}.` });
  const known = goods.flatMap((one): Known[] => (one.massKg === null ? [] : [{ ...one, massKg: one.massKg }]));
  if (known.length < goods.length)
    return notAssessable(check, place, distinctMissing(goods.flatMap((one) => (one.massKg === null ? one.missing : []))));
  const total = known.reduce((sum, { massKg }) => sum + massKg, 0);
  if (!(total > 0)) return finding({ check, place, verdict: 'within', says: () => say`The goods of ${bay} weigh nothing.` });
  const best = bestOrder(known);
  const centre = centreHeight(known);
  const percent = 100 * (centre / best.height - 1);
  const high = percent > rules.value.topHeavy + 1e-9;
  const topLevel = levels.at(-1);
  const topKg = known.reduce((sum, { level, massKg }) => (level === topLevel ? sum + massKg : sum), 0);
  const meanKg = total / levels.length;
  const heavyTop = levels.length > 1 && topKg > meanKg * (1 + 1e-9);
  return finding({
    check,
    place,
    verdict: high || heavyTop ? 'close' : 'within',
    demand: lengthOf(centre),
    allowed: lengthOf(best.height * (1 + rules.value.topHeavy / 100)),
    says: () => {
      const so = say`The goods on the levels of ${bay} have their centre of mass ${lengthOf(centre)} high; heaviest low, it would be ${lengthOf(best.height)}`;
      const heavier = heavyTop ? say` The topmost level carries ${massOf(topKg)}, more than the mean of ${massOf(meanKg)}.` : say``;
      return high
        ? say`${so}, so it is ${quantity('percent', percent)} above the best order.${heavier} Put the heavier goods lower.`
        : say`${so}.${heavier}${heavyTop ? ' Put the heavier goods lower.' : ''}`;
    },
    worked: () => worked(known, best, centre, percent),
    notes: () => [
      ...(percent > 1e-9 ? [order(best, levels)] : []),
      say`${opening(inversions(known))}. Pointed out above ${ruleQuantity(rules, 'topHeavy')} over the best order (${sourceOf(rules, 'topHeavy')}), or where the topmost level carries more than the mean. Pickers’ reach may ask otherwise.`,
    ],
  });
}

/** "Best order: level 1 Motors and Pumps; level 2 Boxes." */
function order({ places }: BestOrder, levels: readonly string[]): Text {
  const parts = levels.flatMap((level) => {
    const names = places.filter((one) => one.level === level).map(({ goods }) => goods.name);
    return names.length === 0 ? [] : [`${level} ${listed(names)}`];
  });
  return say`Best order, by mass alone: ${parts.join('; ')}.`;
}

/** Pairs in which the heavier goods stand higher. */
function inversions(goods: readonly Known[]): string {
  let count = 0;
  goods.forEach((one, i) =>
    goods.slice(i + 1).forEach((other) => {
      if ((one.massKg - other.massKg) * (one.foot - other.foot) > 0) count += 1;
    }),
  );
  return count === 1
    ? 'one pair of unit loads has the heavier one higher'
    : `${count === 0 ? 'no' : count} pairs of unit loads have the heavier one higher`;
}

function worked(goods: readonly Known[], best: BestOrder, centre: number, percent: number): readonly WorkedStep[] {
  const sums = (step: string, mark: string, all: readonly Known[], height: number): WorkedStep => ({
    what: step,
    formula: `(${all.map((_, i) => `m${mark}${i + 1} · (h${mark}${i + 1} + z${mark}${i + 1} / 2)`).join(' + ')}) / (${all.map((_, i) => `m${mark}${i + 1}`).join(' + ')})`,
    values: all.flatMap((one, i) => [
      put(`m${mark}${i + 1}`, `mass of ${one.name}`, massOf(one.massKg), one.from),
      put(`h${mark}${i + 1}`, `foot of its place, ${one.level}`, lengthOf(one.foot), 'beam levels'),
      put(`z${mark}${i + 1}`, 'its height', lengthOf(one.height), 'goods'),
    ]),
    result: { symbol: `H${mark}`, quantity: lengthOf(height) },
    source: 'statics: first moment over mass',
  });
  const placed = best.places.map(({ level, goods: one }, i) => ({ ...one, level, foot: footOf(goods, i) }));
  return [
    sums('Centre of mass as it stands', 's', goods, centre),
    sums('Centre of mass heaviest low', 'b', placed, best.height),
    {
      what: 'Above the best order',
      formula: '100 · (Hs / Hb − 1)',
      values: [put('Hs', 'as it stands', lengthOf(centre), 'line above'), above('Hb', 'heaviest low', lengthOf(best.height))],
      result: { symbol: 'p', quantity: quantity('percent', percent) },
      source: 'common practice, no source',
    },
  ];
}

const footOf = (goods: readonly Known[], i: number): number => [...goods].sort((a, b) => a.foot - b.foot)[i]?.foot ?? 0;
