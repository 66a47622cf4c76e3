/**
 * Worked calculations of a level's worse beam. Formulas are arithmetic in the symbols of their values,
 * each line using the results before it, so that anyone can follow them with a pocket calculator.
 * Distances x from the left support; forces on one beam in N; sagging moments positive.
 */
import { forceOf, lengthOf, massOf, momentOf, quantity, ratioOf, STANDARD_GRAVITY, type Quantity } from '../units/quantity';
import type { WorkedStep, WorkedValue } from './finding';
import { leftOf } from './left-of';
import { alike, type OneBeam, type PairInput, type WorseBeam } from './pair';
import { utilisationStep } from './unit-load';

const STATICS = 'statics';
const EVEN = 'equivalent uniform load: a rating is for load evenly spread on the pair, half on each beam';

const value = (symbol: string, is: string, amount: Quantity, from: string): WorkedValue => ({ symbol, is, quantity: amount, from });
const gravity = value('g', 'standard gravity, N per kg', ratioOf(STANDARD_GRAVITY), 'exact by definition');
const spanValue = (input: PairInput) => value('L', 'span', lengthOf(input.span), input.spanFrom);

export function bendingSteps(input: PairInput, worse: WorseBeam): readonly WorkedStep[] {
  const { sagging } = worse.beam.answer;
  const even = evenForce(worse);
  return [
    ...saggingSteps(input, worse),
    {
      what: 'Evenly spread load that bends one beam alike',
      formula: input.fixity > 0 ? '8 · M / (L · (1 − 2 · f / 3))' : '8 · M / L',
      values: [value('M', 'greatest bending moment', momentOf(sagging.moment), 'line above'), spanValue(input), ...fixityValue(input)],
      result: { symbol: 'W_even', quantity: forceOf(even) },
      source: EVEN,
    },
    ...pairSteps(input, worse, even),
  ];
}

/** Up to the greatest sagging moment. */
export function saggingSteps(input: PairInput, worse: OneBeam): readonly WorkedStep[] {
  const { answer, load } = worse.beam;
  const { sagging, reactionLeft, endMomentLeft } = answer;
  const x = sagging.from;
  const left = leftOf(load, x);
  const sprung = input.fixity > 0;
  return [
    ...reactionSteps(input, worse),
    {
      what: 'Greatest bending moment, where the shear passes through zero',
      formula: sprung ? 'R_left · x − W_x · a + M_left' : 'R_left · x − W_x · a',
      values: [
        value('R_left', 'left support reaction', forceOf(reactionLeft), 'line above'),
        value('x', 'place of the greatest moment', lengthOf(x), 'where the shear passes through zero'),
        value('W_x', 'load left of that place', forceOf(left.force), 'intensity diagram'),
        value('a', 'distance back to the middle of that load', lengthOf(left.arm), 'intensity diagram'),
        ...(sprung ? [leftEnd(endMomentLeft)] : []),
      ],
      result: { symbol: 'M', quantity: momentOf(sagging.moment) },
      source: STATICS,
    },
  ];
}

export function endShearSteps(input: PairInput, worse: WorseBeam): readonly WorkedStep[] {
  const most = Math.max(worse.beam.answer.reactionLeft, worse.beam.answer.reactionRight);
  return [
    ...reactionSteps(input, worse),
    {
      what: 'Evenly spread load that loads its end alike',
      formula: '2 · R',
      values: [value('R', 'greater support reaction', forceOf(most), 'lines above')],
      result: { symbol: 'W_even', quantity: forceOf(2 * most) },
      source: EVEN,
    },
    ...pairSteps(input, worse, 2 * most),
  ];
}

/** Against the maker's value for one beam end. */
export function endValueSteps(
  input: PairInput,
  worse: WorseBeam,
  end: { readonly kg: number; readonly from: string },
): readonly WorkedStep[] {
  const most = Math.max(worse.beam.answer.reactionLeft, worse.beam.answer.reactionRight);
  const onEnd = massOf(most / STANDARD_GRAVITY);
  return [
    ...reactionSteps(input, worse),
    {
      what: 'Mass on that beam end',
      formula: 'R / g',
      values: [value('R', 'greater support reaction', forceOf(most), 'lines above'), gravity],
      result: { symbol: 'm_end', quantity: onEnd },
      source: STATICS,
    },
    utilisationStep(
      value('m_end', 'mass on that beam end', onEnd, 'line above'),
      value('m_maker', 'maker’s value for one beam end', massOf(end.kg), end.from),
      'maker’s value for one beam end',
    ),
  ];
}

export function deflectionSteps(input: PairInput, worse: WorseBeam): readonly WorkedStep[] {
  const sprung = input.fixity > 0;
  const { bent, steps } = sagSteps(input, worse);
  const even = evenForce(worse);
  return [
    ...reactionSteps(input, worse),
    ...steps,
    {
      what: 'Evenly spread load under which one beam sags alike; EI cancels',
      formula: sprung ? '384 · D / (5 · L^3 · (1 − 4 · f / 5))' : '384 · D / (5 · L^3)',
      values: [value('D', 'sag times EI', bent, 'line above'), spanValue(input), ...fixityValue(input)],
      result: { symbol: 'W_even', quantity: forceOf(even) },
      source: EVEN,
    },
    ...pairSteps(input, worse, even),
  ];
}

/**
 * Slope at the left support and greatest sag, both times EI, from reactions and loads alone.
 */
export function sagSteps(input: PairInput, worse: OneBeam): { readonly bent: Quantity; readonly steps: readonly WorkedStep[] } {
  const { load, answer } = worse.beam;
  const { reactionLeft, endMomentLeft, deflection } = answer;
  const { span, rigidity } = input;
  const sprung = input.fixity > 0;
  const all = leftOf(load, span);
  const left = leftOf(load, deflection.at);
  const slope = quantity(
    'rigidity',
    (reactionLeft * span ** 2) / 6 - (all.force * all.cubeArm ** 3) / (6 * span) + (sprung ? (endMomentLeft * span) / 2 : 0),
  );
  const bent = quantity('sagRigidity', deflection.sag * rigidity);
  const end = sprung ? [leftEnd(endMomentLeft)] : [];
  const reaction = value('R_left', 'left support reaction', forceOf(reactionLeft), 'line above');
  return {
    bent,
    steps: [
      {
        what: 'Slope at the left support, times EI',
        formula: sprung ? 'R_left · L^2 / 6 − W · c^3 / (6 · L) + M_left · L / 2' : 'R_left · L^2 / 6 − W · c^3 / (6 · L)',
        values: [
          reaction,
          spanValue(input),
          value('W', 'load on the beam', forceOf(all.force), 'line above'),
          value('c', 'cube-mean distance of the load from the right support', lengthOf(all.cubeArm), 'intensity diagram'),
          ...end,
        ],
        result: { symbol: 'T', quantity: slope },
        source: 'statics: the bending line integrated twice, no sag at the right support',
      },
      {
        what: 'Greatest sag, times EI',
        formula: sprung ? 'T · x − R_left · x^3 / 6 + W_x · c_x^3 / 6 − M_left · x^2 / 2' : 'T · x − R_left · x^3 / 6 + W_x · c_x^3 / 6',
        values: [
          value('T', 'slope at the left support, times EI', slope, 'line above'),
          value('x', 'place of the greatest sag', lengthOf(deflection.at), 'where the bending line is level'),
          reaction,
          value('W_x', 'load left of that place', forceOf(left.force), 'intensity diagram'),
          value('c_x', 'its cube-mean distance from that place', lengthOf(left.cubeArm), 'intensity diagram'),
          ...end,
        ],
        result: { symbol: 'D', quantity: bent },
        source: 'statics: the bending line integrated twice',
      },
    ],
  };
}

/** Load of the worse beam and its two reactions, from the goods list. */
export function reactionSteps(input: PairInput, worse: OneBeam): readonly WorkedStep[] {
  const { fixity } = input;
  const goods = input.goods();
  const { answer } = worse.beam;
  const even = alike(input);
  const share = (one: (typeof goods)[number]) => (worse.side === 'front' ? one.frontShare : 1 - one.frontShare);
  const term = (i: number) => (even ? `m${i + 1}` : `s${i + 1} · m${i + 1}`);
  const terms = goods.map((_, i) => term(i)).join(' + ') || '0';
  const masses = goods.flatMap((one, i) => [
    value(`m${i + 1}`, `mass of ${one.name}`, massOf(one.massKg), one.from),
    ...(even ? [] : [value(`s${i + 1}`, `its share on the ${worse.side} beam`, ratioOf(share(one)), 'front and rear')]),
  ]);
  const half = even ? ' / 2' : '';
  const moments = goods.map((_, i) => `${term(i)} · (L − x${i + 1})`).join(' + ') || '0';
  const places = goods.map((one, i) => value(`x${i + 1}`, `middle of ${one.name}`, lengthOf(one.centre), 'goods and where they stand'));
  const ends =
    fixity > 0
      ? [
          leftEnd(answer.endMomentLeft),
          value(
            'M_right',
            'moment at the right end',
            momentOf(answer.endMomentRight),
            'connector stiffness, by compatibility of rotations',
          ),
        ]
      : [];
  const pinned = `(${moments}) · g / L${half}`;
  return [
    {
      what: `Load on ${even ? 'each beam' : `the ${worse.side} beam`}`,
      formula: `(${terms}) · g${half}`,
      values: [...masses, gravity],
      result: { symbol: 'W', quantity: forceOf(answer.resultant) },
      source: STATICS,
    },
    {
      what: 'Left support reaction',
      formula: fixity > 0 ? `${pinned} + (M_right − M_left) / L` : pinned,
      values: [...masses, ...places, spanValue(input), gravity, ...ends],
      result: { symbol: 'R_left', quantity: forceOf(answer.reactionLeft) },
      source: 'statics: moments about the right support',
    },
    {
      what: 'Right support reaction',
      formula: 'W − R_left',
      values: [
        value('W', 'load on the beam', forceOf(answer.resultant), 'step 1'),
        value('R_left', 'left support reaction', forceOf(answer.reactionLeft), 'step 2'),
      ],
      result: { symbol: 'R_right', quantity: forceOf(answer.reactionRight) },
      source: STATICS,
    },
  ];
}

/** From one beam to the pair, and against the rating where there is one. */
function pairSteps({ rated }: PairInput, { kg }: WorseBeam, evenOnOne: number): readonly WorkedStep[] {
  const onPair: WorkedStep = {
    what: 'Evenly spread mass on the pair',
    formula: '2 · W_even / g',
    values: [value('W_even', 'even load on one beam', forceOf(evenOnOne), 'line above'), gravity],
    result: { symbol: 'm_even', quantity: massOf(kg) },
    source: EVEN,
  };
  if (rated.kg === null) return [onPair];
  const demand = value('m_even', 'evenly spread mass on the pair', massOf(kg), 'line above');
  return [onPair, utilisationStep(demand, value('m_rated', 'rating of the pair', massOf(rated.kg), rated.from), rated.by)];
}

const evenForce = (worse: WorseBeam): number => (worse.kg * STANDARD_GRAVITY) / 2;

const leftEnd = (moment: number): WorkedValue =>
  value('M_left', 'moment at the left end', momentOf(moment), 'connector stiffness, by compatibility of rotations');

const fixityValue = (input: PairInput): readonly WorkedValue[] =>
  input.fixity > 0 ? [value('f', 'fixity of the beam ends', ratioOf(input.fixity), input.fixityFrom)] : [];
