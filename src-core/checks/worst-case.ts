/**
 * What the worst case of a level's beams does to a finding: the verdict is by the stated case; where that
 * is within and the worst case is not, it is close, and says with which arrangement. Else it is a figure.
 *
 * Source: facts M-22 and M-23, common practice.
 */
import { lengthOf, massOf, quantity, ratioOf } from '../units/quantity';
import { say, type Text, type Verdict, type WorkedStep } from './finding';
import type { LoosePair, WorstEffect } from './loose-pair';
import { utilisationOf } from './make-finding';
import { alike, type Effect, type PairInput, type WorseBeam } from './pair';
import { inside } from './phrase';
import { ruleValue, sourceOf } from './rule-sets';
import { put } from './worked-values';

export interface WorstCaseInput {
  readonly pair: PairInput;
  readonly effect: Effect;
  /** By the stated case. */
  readonly verdict: Verdict;
  /** Null where there is nothing to compare with. */
  readonly utilisation: number | null;
  readonly allowedKg: number | null;
  /** How many times the even mass on the pair is what `allowedKg` is for: 1, or 4 for one beam end. */
  readonly parts: number;
  /** False where the finding only informs. */
  readonly counts: boolean;
  readonly worked: (pair: PairInput, worse: WorseBeam) => readonly WorkedStep[];
}

export interface WorstCase {
  /** The stated case is within and the worst case is over. */
  readonly changes: boolean;
  /** Goes after the finding's own sentence; empty where the verdict stays. */
  readonly why: () => Text;
  readonly notes: () => readonly Text[];
  readonly worked: () => readonly WorkedStep[];
}

/** Without tolerance and without more weight there is no other case than the stated one. */
const NONE: WorstCase = { changes: false, why: () => say``, notes: () => [], worked: () => [] };

export function worstCase(input: WorstCaseInput): WorstCase {
  const { pair, effect, verdict, utilisation, allowedKg, parts, counts } = input;
  const { loose } = pair;
  if (loose === null) return NONE;
  const used = () => utilisationOf(loose.worst(effect).kg / parts, allowedKg ?? 0);
  const changes =
    counts && verdict === 'within' && allowedKg !== null && loose.most(effect, pair) / parts > allowedKg && used() > 1 + ROUNDING;
  const how = () => arrangementWords(pair, loose, loose.worst(effect));
  return {
    changes,
    why: () =>
      changes ? say` That is ${ratioOf(utilisation ?? 0)} of it; with ${how()} it would be ${ratioOf(used())}, so it is close.` : say``,
    notes: () => {
      const { kg, arrangement, end } = loose.worst(effect);
      const comes = parts === 4 ? say`put ${massOf(kg / parts)} on the ${end ?? ''} end` : say`count as ${massOf(kg)}`;
      const compared = allowedKg === null ? say`` : say` (utilisation ${ratioOf(used())})`;
      const origin = loose.tolerance > 0 ? say` Placement tolerance: ${sourceOf(pair.rules, 'placementTolerance')}.` : say``;
      return [
        say`Worst case: with ${how()} it would ${comes}${compared}.${origin}`,
        ...(loose.tolerance > 0 && loose.beamDistance === null
          ? [say`The distance of the beams is not known, so the worst case is by the tolerance along them alone.`]
          : []),
        ...(arrangement.apart ? [] : [say`In the worst case unit loads overlap, which is on the safe side.`]),
      ];
    },
    worked: () => workedWorst(input, loose),
  };
}

/** As a verdict's: the rounding of the computation, not a margin. */
const ROUNDING = 1e-12;
/** Shifts below this are said as none, mm. */
const STILL = 0.05;

/** "its loads 50 mm nearer the middle, 50 mm nearer the front beam and 2 % heavier". */
function arrangementWords(pair: PairInput, loose: LoosePair, worst: WorstEffect): Text {
  const { goods, tolerance, beamDistance } = loose;
  const heaviest = Math.max(0, ...goods.map(({ percent }) => percent));
  const across =
    tolerance > 0 && beamDistance !== null
      ? [say`${lengthOf(tolerance)} nearer ${alike(pair) ? 'one beam' : `the ${worst.side} beam`}`]
      : [];
  const upTo = goods.every(({ percent }) => percent === heaviest) ? '' : 'up to ';
  const heavier = heaviest > 0 ? [say`${upTo}${quantity('percent', heaviest)} heavier`] : [];
  const one = goods.length === 1;
  const who = one ? 'the load' : 'its loads';
  const { all, each } = alongWords(loose, worst);
  if (each.length > 0) {
    const rest = [...across, ...heavier];
    const moved = say`${who}, from left to right, ${andJoined(each)}`;
    return rest.length === 0 ? moved : say`${moved}, all ${andJoined(rest)}`;
  }
  const parts = [...all, ...across, ...heavier];
  return parts.length === 0 ? say`${who} as stated` : say`${who} ${andJoined(parts)}`;
}

const andJoined = (parts: readonly Text[]): Text =>
  parts.reduce<Text>((all, part, i) => (i === 0 ? part : i < parts.length - 1 ? say`${all}, ${part}` : say`${all} and ${part}`), say``);

/** Beyond this many the shifts are not named one by one. */
const NAMED = 4;

/** What all unit loads do alike, or what each does. */
function alongWords(
  { goods, span, tolerance }: LoosePair,
  { arrangement: { shifts, at } }: WorstEffect,
): { readonly all: readonly Text[]; readonly each: readonly Text[] } {
  const alikeAll = (...all: readonly Text[]) => ({ all, each: [] });
  const moves = goods
    .map(({ at: stated, width }, i) => ({ middle: stated + width / 2, shift: shifts[i] as number }))
    .sort((a, b) => a.middle - b.middle);
  const first = moves[0]?.shift ?? 0;
  if (moves.every(({ shift }) => Math.abs(shift) < STILL)) return alikeAll();
  const inwards = moves.every(({ middle, shift }) => Math.abs(span / 2 - middle - shift) < Math.abs(span / 2 - middle));
  if (inwards && moves.every(({ shift }) => Math.abs(Math.abs(shift) - Math.abs(first)) < STILL))
    return alikeAll(say`${lengthOf(Math.abs(first))} nearer the middle`);
  if (moves.every(({ shift }) => Math.abs(shift - first) < STILL)) return alikeAll(oneMove(first));
  if (moves.length > NAMED) return alikeAll(say`up to ${lengthOf(tolerance)} nearer a place ${lengthOf(at)} from the left support`);
  return { all: [], each: moves.map(({ shift }) => oneMove(shift)) };
}

const oneMove = (shift: number): Text =>
  Math.abs(shift) < STILL ? say`not moved` : say`${lengthOf(Math.abs(shift))} to the ${shift > 0 ? 'right' : 'left'}`;

/** The same calculation for the arrangement, each line marked, after what makes it of the stated case. */
function workedWorst({ pair, effect, worked }: WorstCaseInput, loose: LoosePair): readonly WorkedStep[] {
  const worst = loose.worst(effect);
  const { front, rear } = loose.beams(worst);
  const stated = pair.goods();
  const goods = stated.map((one, i) => {
    const share = worst.shares[i] as number;
    return {
      ...one,
      massKg: one.massKg * (1 + (loose.goods[i]?.percent ?? 0) / 100),
      centre: one.centre + (worst.arrangement.shifts[i] as number),
      frontShare: worst.side === 'front' ? share : 1 - share,
    };
  });
  const arranged: PairInput = {
    ...pair,
    loose: null,
    front,
    rear,
    goods: () => goods,
    totalKg: goods.reduce((sum, one) => sum + one.massKg, 0),
  };
  const beam = worst.side === 'front' ? front : rear;
  const steps = worked(arranged, { side: worst.side, beam, kg: worst.kg, otherKg: NaN });
  return [...stated.flatMap((one, i) => loosened(pair, loose, worst, one, i)), ...steps].map((step, i, all) => ({
    ...step,
    what: `Worst case: ${inside(step.what)}`,
    // The utilisation of the finding is that of the stated case.
    result: i === all.length - 1 && step.result.symbol === 'u' ? { ...step.result, symbol: 'u_worst' } : step.result,
  }));
}

/** From what is stated of a unit load to what it is in the worst case, by what changes. */
function loosened(
  pair: PairInput,
  loose: LoosePair,
  worst: WorstEffect,
  one: ReturnType<PairInput['goods']>[number],
  i: number,
): readonly WorkedStep[] {
  const { percent, frontShare } = loose.goods[i] as LoosePair['goods'][number];
  const shift = worst.arrangement.shifts[i] as number;
  const share = worst.shares[i] as number;
  const statedShare = worst.side === 'front' ? frontShare : 1 - frontShare;
  const n = i + 1;
  const tolerance = ruleValue(pair.rules, 'placementTolerance', 't');
  const steps: WorkedStep[] = [];
  if (percent > 0)
    steps.push({
      what: `Mass of ${one.name}`,
      formula: `m${n}_stated · (1 + p${n} / 100)`,
      values: [
        put(`m${n}_stated`, `mass of ${one.name} as stated`, massOf(one.massKg), one.from),
        put(`p${n}`, 'may be heavier by', quantity('percent', percent), 'goods list'),
      ],
      result: { symbol: `m${n}`, quantity: massOf(one.massKg * (1 + percent / 100)) },
      source: 'weight uncertainty, all at once on the heavy side',
    });
  if (shift !== 0)
    steps.push({
      what: `Place of ${one.name}`,
      formula: `x${n}_stated + e${n}`,
      values: [
        put(`x${n}_stated`, `middle of ${one.name} as stated`, lengthOf(one.centre), 'goods and where they stand'),
        put(`e${n}`, 'shift to the right, within the placement tolerance', lengthOf(shift), HOW_SHIFTED[worst.arrangement.how]),
      ],
      result: { symbol: `x${n}`, quantity: lengthOf(one.centre + shift) },
      source: sourceOf(pair.rules, 'placementTolerance'),
    });
  if (loose.beamDistance !== null && loose.tolerance > 0 && share === statedShare + loose.tolerance / loose.beamDistance)
    steps.push({
      what: `Share of ${one.name} on the ${worst.side} beam`,
      formula: `s${n}_stated + t / b`,
      values: [
        put(`s${n}_stated`, 'its share as stated', ratioOf(statedShare), 'front and rear'),
        tolerance,
        put('b', 'distance of the beams', lengthOf(loose.beamDistance), 'frame depth less the width of one beam'),
      ],
      result: { symbol: `s${n}`, quantity: ratioOf(share) },
      source: sourceOf(pair.rules, 'placementTolerance'),
    });
  return steps;
}

const HOW_SHIFTED = {
  exact: 'worst of all arrangements, by influence lines',
  searched: 'worst arrangement found, by influence lines',
} as const;
