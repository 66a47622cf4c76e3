/** Do the two bays load their shared frame much alike: where not, the posts bend, which frame ratings leave out. */
import { massOf, quantity, ratioOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type WorkedStep } from './finding';
import { finding, notAssessable } from './make-finding';
import { opening } from './phrase';
import { ruleQuantity, sourceOf, type ResolvedRules } from './rule-sets';
import { put } from './worked-values';

export interface FrameImbalanceInput {
  readonly place: Place;
  readonly frame: string;
  /** Goods that each bay puts on the frame, kg; null = an end frame without a bay on that side. */
  readonly left: { readonly bay: string; readonly kg: number } | null;
  readonly right: { readonly bay: string; readonly kg: number } | null;
  /** What is not known of them. */
  readonly missing: readonly Missing[];
  readonly impossible: boolean;
  /** Of the frame, by its worst storey; null = not known, and `utilisationMissing` says why. */
  readonly utilisation: number | null;
  readonly utilisationMissing: readonly Missing[];
  readonly rules: ResolvedRules;
}

/** Source: facts M-16; the limits are common practice and a choice of the site. */
export function frameImbalance(input: FrameImbalanceInput): Finding {
  const { place, frame, left, right, missing, impossible, utilisation, utilisationMissing, rules } = input;
  if (left === null || right === null)
    return finding({
      check: 'frame-imbalance',
      place,
      verdict: 'within',
      says: () => say`${opening(frame)} ends its run and has a bay on one side only, as its rating provides for.`,
    });
  if (impossible)
    return finding({
      check: 'frame-imbalance',
      place,
      verdict: 'not-possible',
      says: () => say`Not worked out: goods or beams at ${frame} cannot stand as they were entered.`,
    });
  if (missing.length > 0) return notAssessable('frame-imbalance', place, missing);
  const greater = Math.max(left.kg, right.kg);
  const percent = greater > 0 ? (100 * Math.abs(left.kg - right.kg)) / greater : 0;
  const uneven = percent > rules.value.imbalance * (1 + 1e-12);
  if (uneven && utilisation === null) return notAssessable('frame-imbalance', place, utilisationMissing);
  const flagged = uneven && (utilisation ?? 0) > rules.value.imbalanceUtilisation * (1 + 1e-12);
  return finding({
    check: 'frame-imbalance',
    place,
    verdict: flagged ? 'close' : 'within',
    demand: quantity('percent', percent),
    allowed: ruleQuantity(rules, 'imbalance'),
    says: () => {
      const loads = say`${opening(left.bay)} puts ${massOf(left.kg)} of goods on ${frame} and ${right.bay} ${massOf(right.kg)}, ${quantity('percent', percent)} apart`;
      if (flagged)
        return say`${loads}, on a frame used to ${ratioOf(utilisation ?? 0)} of its rating. Even the two bays out, or unload the heavier one first.`;
      return uneven ? say`${loads}, on a frame that is used lightly enough.` : say`${loads}.`;
    },
    worked: () => worked(left.kg, right.kg, percent),
    notes: () => [
      say`Pointed out above ${ruleQuantity(rules, 'imbalance')} on a frame used above ${ruleQuantity(rules, 'imbalanceUtilisation')} (${sourceOf(rules, 'imbalance')}).`,
      say`Taking a load off never makes beams worse, but uneven bays bend the posts. Frame ratings are for load along the posts; bending is for the engineer.`,
    ],
  });
}

function worked(left: number, right: number, percent: number): readonly WorkedStep[] {
  if (!(Math.max(left, right) > 0)) return [];
  const [greater, less] = left >= right ? [left, right] : [right, left];
  return [
    {
      what: 'Difference of the two bays, of the heavier',
      formula: '100 · (m_a − m_b) / m_a',
      values: [
        put('m_a', 'goods of the heavier bay on the frame', massOf(greater), 'level checks'),
        put('m_b', 'goods of the lighter bay on the frame', massOf(less), 'level checks'),
      ],
      result: { symbol: 'i', quantity: quantity('percent', percent) },
      source: 'common practice, no source',
    },
  ];
}
