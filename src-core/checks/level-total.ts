/** Is the mass on a level within the pair's rating, each beam within its half. */
import { massOf, ratioOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type Text, type WorkedStep, type WorkedValue } from './finding';
import { mayBeHeavier } from './heavier';
import type { LevelRating } from './level-rating';
import { compared, distinctMissing, finding, notAssessable } from './make-finding';
import { inside, opening } from './phrase';
import { heaviestOf, utilisationStep, type Stated, type Weighed } from './unit-load';

export interface LevelTotalInput {
  readonly place: Place;
  readonly level: string;
  readonly goods: readonly (Weighed & { readonly frontShare: number | null })[];
  readonly rated: LevelRating;
  /** What to enter where a share is not known. */
  readonly missingShare: readonly Missing[];
  readonly closeAbove: number;
}

/**
 * Twice the mass on the worse beam against the pair's rating: for goods standing centrally this is the
 * level's total. Where something is not known, goods that are over by themselves are over all the same.
 */
export function levelTotal(input: LevelTotalInput): Finding {
  const { place, level, goods, rated, missingShare, closeAbove } = input;
  const known = sum(goods.map(({ massKg }) => massKg ?? 0));
  const missing = distinctMissing([
    ...goods.flatMap((one) => (one.massKg === null ? one.missing : [])),
    ...(goods.some(({ frontShare }) => frontShare === null) ? missingShare : []),
    ...rated.missing,
  ]);
  if (rated.kg === null) {
    const partly = missing.length > rated.missing.length;
    return notAssessable('level-total', place, missing, {
      demand: massOf(known),
      says: () => say`${level} carries ${partly ? 'at least ' : ''}${massOf(known)}. What it may carry is not known.`,
    });
  }
  const ratedKg = rated.kg;
  const allowed = massOf(ratedKg);
  const limit = () => say`${opening(rated.by)} allows ${allowed}.`;
  if (missing.length > 0) {
    if (known > ratedKg) {
      return finding({
        check: 'level-total',
        place,
        ...compared(massOf(known), allowed, closeAbove),
        missing,
        says: () => say`What is known of ${inside(level)} weighs ${massOf(known)} already, and more is not known. ${limit()}`,
      });
    }
    return notAssessable('level-total', place, missing, { demand: massOf(known) });
  }
  const front = 2 * sum(goods.map((one) => (one.massKg ?? 0) * (one.frontShare ?? 0)));
  const even = goods.every(({ frontShare }) => frontShare === 0.5);
  const worse = even ? known : Math.max(front, 2 * known - front);
  const beam = front >= known ? 'front' : 'rear';
  const result = compared(massOf(worse), allowed, closeAbove);
  const most = sum(goods.map(heaviestOf));
  const mostFront = 2 * sum(goods.map((one) => heaviestOf(one) * (one.frontShare ?? 0)));
  const heavier = mayBeHeavier(result, massOf(even ? most : Math.max(mostFront, 2 * most - mostFront)), closeAbove);
  return finding({
    check: 'level-total',
    place: even ? place : { ...place, beam },
    ...result,
    verdict: heavier.verdict,
    says: () =>
      even
        ? say`${level} carries ${massOf(known)}. ${limit()}${heavier.why()}`
        : say`${level} carries ${massOf(known)}, of which ${massOf(worse / 2)} on the ${beam} beam: as much as ${massOf(worse)} shared alike. ${limit()}${heavier.why()}`,
    worked: () => worked(input, ratedKg, even ? null : beam, known, worse),
    notes: () => [...heavier.notes(), ...rated.notes, deckNote],
  });
}

const deckNote: Text = say`Beams and decks are taken as already allowed for in the rating.`;

function worked(
  { goods, rated }: LevelTotalInput,
  ratedKg: number,
  beam: 'front' | 'rear' | null,
  total: number,
  worse: number,
): readonly WorkedStep[] {
  const masses = goods.map((one, i): WorkedValue => ({
    symbol: `m${i + 1}`,
    is: `mass of ${one.name}`,
    quantity: massOf(one.massKg ?? 0),
    from: one.from,
  }));
  const shares = goods.map((one, i): WorkedValue => ({
    symbol: `s${i + 1}`,
    is: `share of ${one.name} on the ${beam} beam`,
    quantity: ratioOf(beam === 'front' ? (one.frontShare ?? 0) : 1 - (one.frontShare ?? 0)),
    from: 'front and rear',
  }));
  const rating: WorkedValue = { symbol: 'm_rated', is: 'rating of the pair', quantity: massOf(ratedKg), from: rated.from };
  const sumStep: WorkedStep = {
    what: 'Mass on the level',
    formula: goods.map((_, i) => `m${i + 1}`).join(' + ') || '0',
    values: masses,
    result: { symbol: 'm', quantity: massOf(total) },
    source: 'goods on the level',
  };
  if (beam === null) {
    const demand: WorkedValue = { symbol: 'm', is: 'mass on the level', quantity: massOf(total), from: 'line above' };
    return [sumStep, utilisationStep(demand, rating, rated.by)];
  }
  const demand: WorkedValue = { symbol: 'm_pair', is: 'twice the mass on the worse beam', quantity: massOf(worse), from: 'line above' };
  return [
    sumStep,
    {
      what: `Twice the mass on the ${beam} beam`,
      formula: `2 · (${goods.map((_, i) => `s${i + 1} · m${i + 1}`).join(' + ')})`,
      values: [...masses, ...shares],
      result: { symbol: 'm_pair', quantity: massOf(worse) },
      source: 'a rating of a pair is two even halves',
    },
    utilisationStep(demand, rating, rated.by),
  ];
}

export interface BayTotalInput {
  readonly place: Place;
  readonly bay: string;
  /** kg on each beam level from the lowest up; null = not known. */
  readonly levels: readonly { readonly name: string; readonly kg: number | null }[];
  readonly missing: readonly Missing[];
  readonly limit: Stated;
  readonly closeAbove: number;
}

/** Everything on the bay's beam levels against the rated bay load; goods on the floor are not part of it. */
export function bayTotal({ place, bay, levels, missing, limit, closeAbove }: BayTotalInput): Finding {
  const known = sum(levels.map(({ kg }) => kg ?? 0));
  const lacking = distinctMissing([...missing, ...limit.missing]);
  const limitKg = limit.value;
  if (limitKg === null || (lacking.length > 0 && known <= limitKg))
    return notAssessable('bay-total', place, lacking, { demand: massOf(known) });
  return finding({
    check: 'bay-total',
    place,
    ...compared(massOf(known), massOf(limitKg), closeAbove),
    missing: lacking,
    says: () =>
      say`The beam levels of ${bay} carry ${lacking.length > 0 ? 'at least ' : ''}${massOf(known)}. The notice allows ${massOf(limitKg)} for the bay.`,
    worked: () => [
      {
        what: 'Mass on the bay’s beam levels',
        formula: levels.map((_, i) => `m${i + 1}`).join(' + ') || '0',
        values: levels.map(({ name, kg }, i) => ({
          symbol: `m${i + 1}`,
          is: `mass on ${name}`,
          quantity: massOf(kg ?? 0),
          from: 'level total',
        })),
        result: { symbol: 'm', quantity: massOf(known) },
        source: 'goods on the levels',
      },
      utilisationStep(
        { symbol: 'm', is: 'mass on the beam levels', quantity: massOf(known), from: 'line above' },
        { symbol: 'm_bay', is: 'rated bay load', quantity: massOf(limitKg), from: limit.from },
        'load notice',
      ),
    ],
  });
}

const sum = (numbers: readonly number[]): number => numbers.reduce((total, one) => total + one, 0);
