/** How far pallets, or goods without one, stand past the frame's front and rear face. */
import { lengthOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type WorkedStep } from './finding';
import { finding, notAssessable } from './make-finding';
import { inside } from './phrase';
import { TOUCH } from './placement';
import { ruleQuantity, ruleValue, sourceOf, type ResolvedRules } from './rule-sets';
import { above, put } from './worked-values';

/** What stands on the beams, seen across the rack. Lengths in mm. */
export interface AcrossBeams {
  readonly placementId: string;
  readonly name: string;
  /** "Its pallet", or "it" where the goods stand without one. */
  readonly what: 'pallet' | 'goods';
  /** Of the pallet, or of the goods without one. */
  readonly depth: number;
  /** Middle in front of the middle of the pair of beams. */
  readonly towardsFront: number;
  /** How far the goods reach past their pallet on each side, along the run and across it; 0 without one. */
  readonly pastPallet: { readonly along: number; readonly across: number };
}

export interface OverhangInput {
  readonly place: Place;
  readonly level: string;
  readonly goods: readonly AcrossBeams[];
  /** Outside to outside of the frame, the shallower of the bay's two, mm; null = not known. */
  readonly frameDepth: number | null;
  readonly missing: readonly Missing[];
  /** Support bars or a deck carry the pallet wherever it stands. */
  readonly carried: boolean;
  readonly rules: ResolvedRules;
}

/**
 * One finding for each that stands out too far; else one for the one that stands out most. Standing out
 * too far is close, not over: whether the pallet still bears on both beams is judged by itself.
 */
export function overhang(input: OverhangInput): readonly Finding[] {
  const { place, level, goods, frameDepth, missing } = input;
  if (goods.length === 0)
    return [finding({ check: 'overhang', place, verdict: 'within', says: () => say`No goods stand on ${inside(level)}.` })];
  if (frameDepth === null) return [notAssessable('overhang', place, missing)];
  const limit = input.rules.value.overhangMost;
  const most = (one: AcrossBeams) => (one.depth - frameDepth) / 2 + Math.abs(one.towardsFront);
  const far = input.carried ? [] : goods.filter((one) => most(one) > limit + TOUCH);
  if (far.length > 0) return far.map((one) => judge(input, one, frameDepth));
  return [
    judge(
      input,
      goods.reduce((furthest, one) => (most(one) > most(furthest) ? one : furthest)),
      frameDepth,
    ),
  ];
}

function judge({ place, carried, rules }: OverhangInput, goods: AcrossBeams, frameDepth: number): Finding {
  const nominal = (goods.depth - frameDepth) / 2;
  const front = nominal + goods.towardsFront;
  const rear = nominal - goods.towardsFront;
  const side = front >= rear ? 'front' : 'rear';
  const most = Math.max(front, rear);
  const limit = rules.value.overhangMost;
  const far = most > limit + TOUCH;
  const who = goods.what === 'pallet' ? `The pallet of ${goods.name}` : goods.name;
  const { along, across } = goods.pastPallet;
  return finding({
    check: 'overhang',
    place: { ...place, placementId: goods.placementId },
    verdict: far && !carried ? 'close' : 'within',
    demand: lengthOf(most),
    allowed: lengthOf(limit),
    ...(limit > TOUCH ? { utilisation: Math.max(0, most) / limit } : {}),
    says: () => {
      const stands =
        most >= 0
          ? say`${who} stands ${lengthOf(most)} past the ${side} face of the frame`
          : say`${who} stands inside the frame’s front and rear face`;
      if (!far) return say`${stands}; ${lengthOf(limit)} is allowed.`;
      if (carried) return say`${stands}, more than ${lengthOf(limit)}, and is carried by support bars or a deck.`;
      return say`${stands}, more than the ${lengthOf(limit)} allowed. Put it back, use a deeper frame, or fit support bars or a deck.`;
    },
    worked: () => worked(goods, frameDepth, nominal, most, side, rules),
    notes: () => [
      say`Limit: ${sourceOf(rules, 'overhangMost')}. Put-away misses its mark by about ${ruleQuantity(rules, 'placementTolerance')}.`,
      ...(along > TOUCH || across > TOUCH
        ? [
            say`The goods reach past their pallet by ${lengthOf(Math.max(0, along))} on each side along the run and ${lengthOf(Math.max(0, across))} front and rear. Clearances are judged on the goods.`,
          ]
        : []),
    ],
  });
}

function worked(
  goods: AcrossBeams,
  frameDepth: number,
  nominal: number,
  most: number,
  side: 'front' | 'rear',
  rules: ResolvedRules,
): readonly WorkedStep[] {
  const sign = side === 'front' ? '+' : '−';
  const steps: readonly WorkedStep[] = [
    {
      what: 'Overhang when centred',
      formula: '(p − D) / 2',
      values: [
        put('p', `depth of the ${goods.what}`, lengthOf(goods.depth), 'goods'),
        put('D', 'depth of the frame, outside to outside', lengthOf(frameDepth), 'frame type'),
      ],
      result: { symbol: 'o_mid', quantity: lengthOf(nominal) },
      source: 'geometry',
    },
    {
      what: `Overhang at the ${side}`,
      formula: `o_mid ${sign} t`,
      values: [
        above('o_mid', 'overhang when centred', lengthOf(nominal)),
        put('t', 'how far it stands towards the front', lengthOf(goods.towardsFront), 'where it stands'),
      ],
      result: { symbol: 'o', quantity: lengthOf(most) },
      source: 'geometry',
    },
  ];
  if (!(most > 0) || rules.value.overhangMost < TOUCH) return steps;
  return [
    ...steps,
    {
      what: 'Over the limit',
      formula: 'o / o_most',
      values: [above('o', 'overhang', lengthOf(most)), ruleValue(rules, 'overhangMost', 'o_most')],
      result: { symbol: 'u', quantity: { value: most / rules.value.overhangMost, kind: 'ratio' } },
      source: sourceOf(rules, 'overhangMost'),
    },
  ];
}
