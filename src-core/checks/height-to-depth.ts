/** Is the run low enough for its depth, anchored, or held at the top; and how a sideways push would pull on the anchors. */
import { forceOf, lengthOf, massOf, ratioOf, weightOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type Text, type Verdict, type WorkedStep } from './finding';
import { distinctMissing, finding, notAssessable } from './make-finding';
import { opening } from './phrase';
import { ruleQuantity, ruleValue, sourceOf, type ResolvedRules } from './rule-sets';
import { GRAVITY, put } from './worked-values';

type Answer = 'yes' | 'no' | 'unknown';

interface Slenderness {
  readonly place: Place;
  readonly frame: string;
  /** Floor to the top of the topmost beams at the frame, mm; null = no beams. */
  readonly height: number | null;
  /** Outside to outside, mm; null = not known. */
  readonly depth: number | null;
  readonly depthMissing: Missing;
  readonly rules: ResolvedRules;
}

/** An answer of the site and what to do where it is not known. */
export interface Asked {
  readonly answer: Answer;
  readonly missing: Missing;
}

export interface HeightToDepthInput extends Slenderness {
  readonly anchored: Asked;
  /** Tied overhead or otherwise held at the top. */
  readonly restrained: Asked;
  /** The run behind with its own depth, and whether row spacers tie the two; null = none. */
  readonly behind: { readonly run: string; readonly depth: number | null; readonly gap: number; readonly spacers: Asked } | null;
}

/**
 * Up to the anchored ratio, normal anchoring is enough; above it, anchors are engineered; above the tied
 * ratio, a tie is needed. Two runs tied by row spacers count over the depth of both and the gap.
 * Source: facts F-49 to F-51 and M-17; that tied runs count together is common practice.
 */
export function heightToDepth(input: HeightToDepthInput): Finding {
  const { place, frame, height, depth, depthMissing, anchored, restrained, behind, rules } = input;
  const check = 'height-to-depth';
  if (height === null) return finding({ check, place, verdict: 'within', says: () => say`No beams hang on ${frame}.` });
  const lacking = [...(depth === null ? [depthMissing] : []), ...(anchored.answer === 'unknown' ? [anchored.missing] : [])];
  if (depth === null || lacking.length > 0) return notAssessable(check, place, lacking);
  const { heightToDepthAnchored: plain, heightToDepthTied: tied } = rules.value;
  const single = height / depth;
  const over = (limit: number, ratio: number) => ratio > limit * (1 + 1e-12);
  // Whether row spacers tie the runs matters only where the run alone is too slender.
  if (over(plain, single) && behind !== null && behind.spacers.answer === 'unknown' && restrained.answer !== 'yes')
    return notAssessable(check, place, [behind.spacers.missing]);
  const together = over(plain, single) && behind !== null && behind.spacers.answer === 'yes' && behind.depth !== null;
  const base = together && behind !== null && behind.depth !== null ? depth + behind.gap + behind.depth : depth;
  const ratio = height / base;
  if (over(plain, ratio) && restrained.answer === 'unknown') return notAssessable(check, place, [restrained.missing]);

  const held = restrained.answer === 'yes';
  const beyond = over(plain, ratio);
  const verdict: Verdict = anchored.answer === 'no' ? 'over' : !beyond || held ? 'within' : over(tied, ratio) ? 'over' : 'close';
  const limit = beyond ? tied : plain;
  return finding({
    check,
    place,
    verdict,
    utilisation: ratio / limit,
    demand: ratioOf(ratio),
    allowed: ratioOf(limit),
    says: () => {
      const so = say`The topmost beams at ${frame} stand ${lengthOf(height)} high on a depth of ${lengthOf(base)}: ${ratioOf(ratio)} to 1`;
      if (anchored.answer === 'no') return say`${so}, and it is not anchored. Anchor it, or unload it.`;
      if (!beyond) return say`${so}. Up to ${ratioOf(plain)} to 1 normal anchoring is enough.`;
      if (held) return say`${so}. It is held at the top.`;
      if (verdict === 'over')
        return say`${so}, above ${ratioOf(tied)} to 1 and not held at the top. Tie it overhead, or take the topmost beams out.`;
      return say`${so}, above ${ratioOf(plain)} to 1. Have the anchors designed for it by an engineer, or tie it overhead.`;
    },
    worked: () => worked(input, height, base, ratio, together),
    notes: () => [
      say`Limits: ${ruleQuantity(rules, 'heightToDepthAnchored')} (${sourceOf(rules, 'heightToDepthAnchored')}) and ${ruleQuantity(rules, 'heightToDepthTied')} (${sourceOf(rules, 'heightToDepthTied')}).`,
      ...(together && behind !== null
        ? [
            say`Row spacers tie it to run ${behind.run}: the depth of both runs and the gap between them is counted (common practice, no source). By itself it stands at ${ratioOf(single)} to 1.`,
          ]
        : []),
    ],
  });
}

function worked(
  { depth, behind, rules }: HeightToDepthInput,
  height: number,
  base: number,
  ratio: number,
  together: boolean,
): readonly WorkedStep[] {
  const both: readonly WorkedStep[] =
    together && behind !== null && behind.depth !== null
      ? [
          {
            what: 'Depth of both runs',
            formula: 'D_1 + b + D_2',
            values: [
              put('D_1', 'depth of this frame, outside to outside', lengthOf(depth ?? 0), 'frame type'),
              put('b', 'gap between the runs', lengthOf(behind.gap), 'run'),
              put('D_2', 'depth of the frame behind', lengthOf(behind.depth), 'frame type'),
            ],
            result: { symbol: 'D', quantity: lengthOf(base) },
            source: 'common practice, no source: two runs tied by row spacers',
          },
        ]
      : [];
  return [
    ...both,
    {
      what: 'Height to depth',
      formula: 'H / D',
      values: [
        put('H', 'floor to the top of the topmost beams', lengthOf(height), 'beam levels'),
        put('D', 'depth, outside to outside', lengthOf(base), together ? 'line above' : 'frame type'),
      ],
      result: { symbol: 'r', quantity: ratioOf(ratio) },
      source: sourceOf(rules, 'heightToDepthAnchored'),
    },
  ];
}

export interface AnchorPullInput extends Slenderness {
  /** Frame and half of its bays' beams and decks, empty, kg; null = not known. */
  readonly emptyKg: number | null;
  readonly missing: readonly Missing[];
}

/**
 * Pull on one line of anchors when a sideways force at the topmost beams tries to turn the empty frame
 * over: (F·H − G·D/2)/D. For information only.
 * Source: facts M-18 and F-50; statics.
 */
export function anchorPull(input: AnchorPullInput): Finding {
  const { place, frame, height, depth, depthMissing, emptyKg, missing, rules } = input;
  const check = 'anchor-pull';
  if (height === null) return finding({ check, place, verdict: 'within', counts: false, says: () => say`No beams hang on ${frame}.` });
  const lacking = distinctMissing([...(depth === null ? [depthMissing] : []), ...(emptyKg === null ? missing : [])]);
  if (depth === null || emptyKg === null) return notAssessable(check, place, lacking, { counts: false });
  const push = rules.value.anchorPullForce;
  const pull = (push * height - (weightOf(emptyKg) * depth) / 2) / depth;
  const says = (): Text =>
    pull > 0
      ? say`A sideways force of ${forceOf(push)} at the topmost beams would pull on the anchors of ${frame} with ${forceOf(pull)} on one side.`
      : say`A sideways force of ${forceOf(push)} at the topmost beams would not lift ${frame}: its own weight holds it.`;
  return finding({
    check,
    place,
    verdict: 'within',
    counts: false,
    demand: forceOf(Math.max(0, pull)),
    says,
    worked: () => [
      {
        what: 'Pull on one line of anchors',
        formula: '(F · H − m · g · D / 2) / D',
        values: [
          ruleValue(rules, 'anchorPullForce', 'F'),
          put('H', 'floor to the top of the topmost beams', lengthOf(height), 'beam levels'),
          put('m', 'empty frame with half of its beams and decks', massOf(emptyKg), 'frame, beam types and decks'),
          GRAVITY,
          put('D', 'depth of the frame', lengthOf(depth), 'frame type'),
        ],
        result: { symbol: 'T', quantity: forceOf(pull) },
        source: 'statics: moments about the far leg',
      },
    ],
    notes: () => [
      say`For information only: ${opening(sourceOf(rules, 'anchorPullForce'))}. Anchors are chosen by the supplier or an engineer.`,
    ],
  });
}
