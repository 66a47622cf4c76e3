/** The worked calculation of a measured sag, each line in the symbols of its values. */
import type { WorkedStep, WorkedValue } from './finding';
import { ruleValue, sourceOf } from './rule-sets';
import { forceOf, lengthOf, massOf, momentOf, quantity, ratioOf, weightOf, STANDARD_GRAVITY, type Quantity } from '../units/quantity';
import type { ImpliedLoad } from './implied-load';
import type { SagInput, SagJudgement } from './sag';

type Found = Pick<SagJudgement, 'limitMm' | 'elasticMm' | 'setPercent' | 'sidewaysPercent' | 'implied' | 'atLeastKg'>;

const BACK_CHECK = 'measured against calculated sag; common practice, no source';
const READ = 'measured at the rack';
const value = (symbol: string, is: string, amount: Quantity, from: string): WorkedValue => ({ symbol, is, quantity: amount, from });

/** One reading against its limit. */
interface Against {
  readonly measured: Quantity;
  readonly limit: Quantity;
  readonly ratio: number;
}

interface Limited extends Found {
  /** Loaded sag that stands for a set that was not read, mm. */
  readonly setAtMost: number | null;
  readonly loaded: Against | null;
  readonly set: Against | null;
  readonly sideways: Against | null;
}

const spanOf = (input: SagInput): WorkedValue => value('L', 'span', lengthOf(input.span), input.spanFrom);
const limitOf = ({ limitMm }: Found): WorkedValue => value('s_lim', 'allowed sag', lengthOf(limitMm), 'line above');

/** Allowed sag, and each reading as its part of what is allowed. */
export function limitSteps(input: SagInput, found: Limited): readonly WorkedStep[] {
  const limit = limitOf(found);
  const atMost = found.setAtMost !== null;
  const down = { way: 'down', symbol: '0', rule: 'setVertical', mm: found.setAtMost ?? input.unloadedMm, atMost, set: found.set } as const;
  const sideways = {
    way: 'sideways',
    symbol: 'h',
    rule: 'setHorizontal',
    mm: input.sidewaysMm,
    atMost: false,
    set: found.sideways,
  } as const;
  return [
    {
      what: 'Allowed sag',
      formula: 'L / n',
      values: [spanOf(input), ruleValue(input.rules, 'deflectionDivisor', 'n')],
      result: { symbol: 's_lim', quantity: lengthOf(found.limitMm) },
      source: sourceOf(input.rules, 'deflectionDivisor'),
    },
    ...[down, sideways].flatMap((one) => setSteps(input, limit, one)),
    ...(found.loaded === null || !Number.isFinite(found.loaded.ratio)
      ? []
      : [
          {
            what: 'Loaded sag over the allowed one',
            formula: 's / s_lim',
            values: [value('s', 'reading loaded', found.loaded.measured, READ), limit],
            result: { symbol: 'r_s', quantity: ratioOf(found.loaded.ratio) },
            source: 'measured over limit: over above 1',
          },
        ]),
  ];
}

interface SetReading {
  readonly way: 'down' | 'sideways';
  readonly symbol: '0' | 'h';
  readonly rule: 'setVertical' | 'setHorizontal';
  readonly mm: number | null;
  /** The loaded reading stands for it. */
  readonly atMost: boolean;
  readonly set: Against | null;
}

function setSteps(input: SagInput, limit: WorkedValue, { way, symbol, rule, mm, atMost, set }: SetReading): readonly WorkedStep[] {
  if (mm === null || set === null) return [];
  const percent: WorkedStep = {
    what: `Permanent set ${way}, ${atMost ? 'at most, ' : ''}of the allowed sag`,
    formula: `100 · s_${symbol} / s_lim`,
    values: [
      value(`s_${symbol}`, `set ${way}, ${atMost ? 'no more than the reading loaded' : 'read unloaded'}`, lengthOf(mm), READ),
      limit,
    ],
    result: { symbol: `p_${symbol}`, quantity: set.measured },
    source: sourceOf(input.rules, rule),
  };
  if (!Number.isFinite(set.ratio)) return [percent];
  return [
    percent,
    {
      what: `Permanent set ${way} over its limit`,
      formula: `p_${symbol} / p_most_${symbol}`,
      values: [value(`p_${symbol}`, 'of the allowed sag', set.measured, 'line above'), ruleValue(input.rules, rule, `p_most_${symbol}`)],
      result: { symbol: `r_${symbol}`, quantity: ratioOf(set.ratio) },
      source: 'measured over limit: out of use above 1',
    },
  ];
}

function elasticSteps({ loadedMm, unloadedMm }: SagInput, elasticMm: number): readonly WorkedStep[] {
  if (loadedMm === null || unloadedMm === null) return [];
  return [
    {
      what: 'Elastic sag',
      formula: 's − s_0',
      values: [value('s', 'reading loaded', lengthOf(loadedMm), READ), value('s_0', 'reading unloaded', lengthOf(unloadedMm), READ)],
      result: { symbol: 's_el', quantity: lengthOf(elasticMm) },
      source: 'what springs back is the load’s doing',
    },
  ];
}

/** What load the elastic sag stands for. */
export function impliedSteps(input: SagInput, found: Found): readonly WorkedStep[] {
  const { elasticMm, implied, atLeastKg, limitMm } = found;
  if (elasticMm === null) return [];
  const elastic = value('s_el', 'elastic sag', lengthOf(elasticMm), 'line above');
  const span = spanOf(input);
  if (atLeastKg !== null && input.rated !== null)
    return [
      ...elasticSteps(input, elasticMm),
      {
        what: 'Even load on the pair, at least',
        formula: 'm_rated · s_el / s_lim',
        values: [
          value('m_rated', 'rating of the pair', massOf(input.rated.kg), input.rated.from),
          elastic,
          value('s_lim', 'allowed sag', lengthOf(limitMm), `span and ${sourceOf(input.rules, 'deflectionDivisor')}`),
        ],
        result: { symbol: 'm_least', quantity: massOf(atLeastKg) },
        source: `${BACK_CHECK}; equal only where the rating is governed by deflection`,
      },
    ];
  if (implied === null || input.section === null) return [];
  const rigidity = value('EI', 'rigidity of one beam', quantity('rigidity', input.section.rigidity), input.section.from);
  return [
    ...elasticSteps(input, elasticMm),
    ...endSteps(input, implied.pinned, 'pinned', elastic, rigidity, span, implied.pinned),
    ...endSteps(input, implied.stiffer, 'stiffer', elastic, rigidity, span, implied.pinned),
  ];
}

function endSteps(
  input: SagInput,
  implied: ImpliedLoad,
  ends: 'pinned' | 'stiffer',
  elastic: WorkedValue,
  rigidity: WorkedValue,
  span: WorkedValue,
  pinned: ImpliedLoad,
): readonly WorkedStep[] {
  const stiff = ends === 'stiffer';
  const known = (input.section?.fixity ?? null) !== null;
  const fixity = value(
    'f',
    'fixity of the beam ends',
    ratioOf(implied.fixity),
    known ? 'stiffness of the connectors and EI' : sourceOf(input.rules, 'likelyFixity'),
  );
  const words = stiff ? 'with that fixity' : 'with pinned beam ends';
  const even: WorkedStep = {
    what: `Even load on the pair that sags so, ${words}`,
    formula: stiff ? '2 · 384 · EI · s_el / (5 · L^3 · g · (1 − 4 · f / 5))' : '2 · 384 · EI · s_el / (5 · L^3 · g)',
    values: [
      rigidity,
      elastic,
      span,
      value('g', 'standard gravity, N per kg', ratioOf(STANDARD_GRAVITY), 'exact by definition'),
      ...(stiff ? [fixity] : []),
    ],
    result: { symbol: stiff ? 'm_even_f' : 'm_even', quantity: massOf(implied.evenKg) },
    source: 'statics: sag at mid-span under an even load, 5WL³/384EI · (1 − 4f/5)',
  };
  if (implied.declared === null || pinned.declared === null || input.declared === null) return [even];
  const { sag, ratio, kg, endMoments } = implied.declared;
  // The even load with the same sag at mid-span stands for the diagram, so that the line can be followed by hand.
  const evenForce = weightOf(pinned.evenKg / pinned.declared.ratio) / 2;
  const calculated: WorkedStep = stiff
    ? {
        what: 'Sag at mid-span under the declared load, with that fixity',
        formula: 's_pinned + (M_left + M_right) · L^2 / (16 · EI)',
        values: [
          value('s_pinned', 'sag with pinned ends', lengthOf(pinned.declared.sag), 'line above'),
          value('M_left', 'end moment left, as half of both', momentOf(endMoments / 2), 'beam with that fixity'),
          value('M_right', 'end moment right, as half of both', momentOf(endMoments / 2), 'beam with that fixity'),
          span,
          rigidity,
        ],
        result: { symbol: 's_fixed', quantity: lengthOf(sag) },
        source: 'statics',
      }
    : {
        what: 'Sag at mid-span under the declared load, with pinned beam ends',
        formula: '5 · W · L^3 / (384 · EI)',
        values: [
          value('W', 'even load on one beam with the same sag as the declared one', forceOf(evenForce), 'intensity diagram'),
          span,
          rigidity,
        ],
        result: { symbol: 's_pinned', quantity: lengthOf(sag) },
        source: 'statics',
      };
  const symbols = stiff ? { sag: 's_fixed', ratio: 'r_f', kg: 'm_f' } : { sag: 's_pinned', ratio: 'r', kg: 'm_implied' };
  return [
    even,
    calculated,
    {
      what: `Implied over declared load, ${words}`,
      formula: `s_el / ${symbols.sag}`,
      values: [elastic, value(symbols.sag, 'sag under the declared load', lengthOf(sag), 'line above')],
      result: { symbol: symbols.ratio, quantity: ratioOf(ratio) },
      source: BACK_CHECK,
    },
    {
      what: `Implied mass on the level, ${words}`,
      formula: `m · ${symbols.ratio}`,
      values: [
        value('m', 'declared mass on the level', massOf(input.declared.kg), 'goods of the level'),
        value(symbols.ratio, 'implied over declared load', ratioOf(ratio), 'line above'),
      ],
      result: { symbol: symbols.kg, quantity: massOf(kg) },
      source: BACK_CHECK,
    },
  ];
}
