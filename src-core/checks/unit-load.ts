/** Is each unit load within the notice's unit load limit, and are there no more of them than it is made for. */
import { countOf, massOf, ratioOf } from '../units/quantity';
import { compareVerdicts, say, type Finding, type Missing, type Place, type WorkedStep } from './finding';
import { mayBeHeavier } from './heavier';
import { compared, distinctMissing, finding, notAssessable } from './make-finding';

/** A unit load on a level, pallet included. */
export interface Weighed {
  readonly placementId: string;
  readonly name: string;
  /** kg with pallet; null = not known. */
  readonly massKg: number | null;
  /** Where the mass came from, in words. */
  readonly from: string;
  /** What to enter where the mass is not known. */
  readonly missing: readonly Missing[];
  /** The mass may be this many per cent more than stated; none where it is not given. */
  readonly percent?: number;
}

/** kg, as heavy as it may be; 0 where it is not known. */
export const heaviestOf = ({ massKg, percent = 0 }: Pick<Weighed, 'massKg' | 'percent'>): number => (massKg ?? 0) * (1 + percent / 100);

/** A number that a load notice states, or what to enter where it does not. */
export interface Stated {
  readonly value: number | null;
  readonly from: string;
  readonly missing: readonly Missing[];
}

export interface UnitLoadInput {
  readonly place: Place;
  readonly goods: readonly Weighed[];
  /** kg. */
  readonly limit: Stated;
  readonly closeAbove: number;
}

/**
 * One finding for each unit load that is over or cannot be judged; else one for the heaviest.
 * Source: notices state the greatest unit load beside the level's rating (ANSI MH16.1 §1.4.2, secondary).
 */
export function unitLoad({ place, goods, limit, closeAbove }: UnitLoadInput): readonly Finding[] {
  if (goods.length === 0) return [finding({ check: 'unit-load', place, verdict: 'within', says: () => say`No unit loads stand here.` })];
  const limitKg = limit.value;
  const found: Finding[] = [];
  let heaviest: Finding | null = null;
  for (const one of goods) {
    const at = { ...place, placementId: one.placementId };
    if (one.massKg === null || limitKg === null) {
      const missing = one.massKg === null ? [...one.missing, ...limit.missing] : limit.missing;
      found.push(notAssessable('unit-load', at, distinctMissing(missing)));
      continue;
    }
    const judged = judge(one, one.massKg, limit, limitKg, closeAbove, at);
    if (judged.verdict === 'over') found.push(judged);
    if (heaviest === null || outweighs(judged, heaviest)) heaviest = judged;
  }
  return found.length > 0 || heaviest === null ? found : [heaviest];
}

/** One that may be too heavy comes before one that is heavier as stated. */
function outweighs(one: Finding, other: Finding): boolean {
  const worse = compareVerdicts(one.verdict, other.verdict);
  return worse > 0 || (worse === 0 && (one.utilisation ?? 0) > (other.utilisation ?? 0));
}

function judge(goods: Weighed, massKg: number, limit: Stated, limitKg: number, closeAbove: number, place: Place): Finding {
  const stated = compared(massOf(massKg), massOf(limitKg), closeAbove);
  const heavier = mayBeHeavier(stated, massOf(heaviestOf(goods)), closeAbove);
  const result = { ...stated, verdict: heavier.verdict };
  return finding({
    check: 'unit-load',
    place,
    ...result,
    says: () =>
      result.verdict === 'over'
        ? say`${goods.name} weighs ${massOf(massKg)} with its pallet. The notice allows unit loads of ${massOf(limitKg)}.`
        : result.verdict !== stated.verdict
          ? say`${goods.name} weighs ${massOf(massKg)} of the ${massOf(limitKg)} allowed.${heavier.why()}`
          : say`The heaviest unit load, ${goods.name}, weighs ${massOf(massKg)} of the ${massOf(limitKg)} allowed.`,
    notes: heavier.notes,
    worked: () => [
      utilisationStep(
        { symbol: 'm', is: `mass of ${goods.name}`, quantity: massOf(massKg), from: goods.from },
        { symbol: 'm_limit', is: 'unit load limit', quantity: massOf(limitKg), from: limit.from },
        'load notice',
      ),
    ],
  });
}

export interface PositionsInput {
  readonly place: Place;
  readonly level: string;
  readonly count: number;
  readonly allowed: Stated;
}

/** A full level is within, not close: a place is there to be used. */
export function positions({ place, level, count, allowed }: PositionsInput): Finding {
  if (count === 0) return finding({ check: 'positions', place, verdict: 'within', says: () => say`No unit loads stand here.` });
  const most = allowed.value;
  if (most === null) return notAssessable('positions', place, allowed.missing);
  const result = compared(countOf(count), countOf(most), 1);
  return finding({
    check: 'positions',
    place,
    ...result,
    says: () => say`${level} holds ${count} of the ${most} unit loads that the notice is made for.`,
    worked: () => [
      utilisationStep(
        { symbol: 'n', is: 'unit loads on the level', quantity: countOf(count), from: 'goods and where they stand' },
        { symbol: 'n_notice', is: 'unit loads that a level is made for', quantity: countOf(most), from: allowed.from },
        'load notice',
      ),
    ],
  });
}

/** The last line of every comparison: demand over what is allowed. */
export function utilisationStep(
  demand: WorkedStep['values'][number],
  allowed: WorkedStep['values'][number],
  source: string,
  what = 'Utilisation',
): WorkedStep {
  return {
    what,
    formula: `${demand.symbol} / ${allowed.symbol}`,
    values: [demand, allowed],
    result: { symbol: 'u', quantity: ratioOf(demand.quantity.value / allowed.quantity.value) },
    source,
  };
}
