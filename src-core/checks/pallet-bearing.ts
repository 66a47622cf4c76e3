/**
 * Do the blocks or runners of each pallet bear on both beams: the way its boards run, how much of each
 * beam is under it as it stands, and how much is left when it is put away off its mark.
 *
 * Source: blocks must carry, not boards in bending (facts F-56, F-107, F-109: UK trade association Q&A);
 * the procedure is common practice (M-07).
 */
import { lengthOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type Text, type Verdict, type WorkedStep } from './finding';
import { distinctMissing, finding, notAssessable } from './make-finding';
import { inside } from './phrase';
import { TOUCH } from './placement';
import { ruleQuantity, ruleValue, sourceOf, type ResolvedRules } from './rule-sets';
import { above, put } from './worked-values';

/** What carries a pallet, seen across the rack. Lengths in mm. */
export interface BearingPallet {
  readonly placementId: string;
  readonly name: string;
  /** False for goods that stand without a pallet, on a base of their own. */
  readonly pallet: boolean;
  /** From front to rear. */
  readonly depth: number;
  readonly towardsFront: number;
  /** Which way its bottom boards or runners run as it stands; "full" = closed underside, "none" = feet only. */
  readonly boards: 'front-to-rear' | 'along-the-run' | 'full' | 'none';
}

export interface PalletBearingInput {
  readonly place: Place;
  readonly level: string;
  readonly goods: readonly BearingPallet[];
  /** Outside to outside of the frame, the deeper of the bay's two, mm; null = not known. */
  readonly frameDepth: number | null;
  /** Width of one beam, front to rear, mm; null = not known. */
  readonly beamWidth: number | null;
  readonly missing: readonly Missing[];
  readonly deck: 'none' | 'support-bars' | 'mesh' | 'panels';
  readonly rules: ResolvedRules;
}

/** One finding for each that does not bear surely; else one for the one that bears least. */
export function palletBearing(input: PalletBearingInput): readonly Finding[] {
  const { place, level, goods, frameDepth, beamWidth, missing, deck } = input;
  const within = (says: () => Text): readonly Finding[] => [finding({ check: 'pallet-bearing', place, verdict: 'within', says })];
  if (goods.length === 0) return within(() => say`No goods stand on ${inside(level)}.`);
  if (deck !== 'none')
    return within(() =>
      deck === 'support-bars'
        ? say`Support bars carry everything on ${inside(level)} from front to rear, however its boards run.`
        : say`A deck carries everything on ${inside(level)}; its panels are judged by themselves.`,
    );
  const turned = goods.filter(({ boards }) => boards === 'along-the-run' || boards === 'none').map((one) => unsupported(input, one));
  const spanning = goods.filter(({ boards }) => boards === 'front-to-rear' || boards === 'full');
  if (frameDepth === null || beamWidth === null)
    return spanning.length === 0 ? turned : [...turned, notAssessable('pallet-bearing', place, distinctMissing(missing))];
  const judged = spanning.map((one) => judge(input, one, frameDepth, beamWidth));
  const failing = [...turned, ...judged.filter(({ verdict }) => verdict !== 'within')];
  if (failing.length > 0) return failing;
  return judged.reduce<readonly Finding[]>(
    (least, one) => (least[0] === undefined || (one.allowed?.value ?? 0) < (least[0].allowed?.value ?? 0) ? [one] : least),
    [],
  );
}

function unsupported({ place }: PalletBearingInput, goods: BearingPallet): Finding {
  return finding({
    check: 'pallet-bearing',
    place: { ...place, placementId: goods.placementId },
    verdict: 'over',
    says: () =>
      goods.boards === 'none'
        ? say`The pallet of ${goods.name} stands on feet, which beams alone do not carry. Fit a deck or support bars under it.`
        : say`The pallet of ${goods.name} is turned so that its bottom boards run along the beams and do not reach from one to the other. Turn it, or fit support bars or a deck under it.`,
    notes: () => [
      say`The blocks must carry on the beams, not the boards in bending (UK storage-equipment trade association Q&A, August 2019 and May 2022).`,
    ],
  });
}

interface Bearing {
  /** Bearing on the beam as it stands, and when it is put away off its mark, mm. */
  readonly stated: number;
  readonly worst: number;
  readonly beam: 'front' | 'rear';
}

function judge({ place, rules, level }: PalletBearingInput, goods: BearingPallet, frameDepth: number, beamWidth: number): Finding {
  const tolerance = rules.value.placementTolerance;
  const least = leastBearing(goods, frameDepth, beamWidth, tolerance);
  // Overhang beyond the end block leaves the board between the blocks on the beam; a base of its own has no blocks.
  const nominal = (goods.depth - frameDepth) / 2;
  const out = nominal + Math.abs(goods.towardsFront);
  const block = rules.value.blockLength;
  const blocks = goods.pallet && goods.boards === 'front-to-rear' && block > 0;
  const offBlock = blocks && out >= block - TOUCH;
  const partBlock = blocks && !offBlock && out + beamWidth > block + TOUCH;
  const side = goods.towardsFront >= 0 ? 'front' : 'rear';
  const verdict: Verdict =
    offBlock || least.stated < beamWidth - TOUCH || least.worst <= TOUCH
      ? 'over'
      : partBlock || least.worst < beamWidth - TOUCH
        ? 'close'
        : 'within';
  const who = goods.pallet ? `The pallet of ${goods.name}` : goods.name;
  return finding({
    check: 'pallet-bearing',
    place: { ...place, placementId: goods.placementId, beam: least.beam },
    verdict,
    demand: lengthOf(beamWidth),
    allowed: lengthOf(least.worst),
    says: () => {
      if (least.stated <= TOUCH)
        return say`${who} does not reach the ${least.beam} beam. Use a shallower frame or a deeper pallet, move it, or fit support bars or a deck.`;
      if (least.stated < beamWidth - TOUCH)
        return say`${who} bears on only ${lengthOf(least.stated)} of the ${lengthOf(beamWidth)} of the ${least.beam} beam. Move it so that it bears on both beams fully, or fit support bars or a deck.`;
      if (offBlock)
        return say`${who} stands ${lengthOf(out)} past the ${side} face, so that its end blocks of ${lengthOf(block)} miss the beam and boards would carry in bending. Use a deeper frame, or fit support bars or a deck.`;
      if (least.worst <= TOUCH)
        return say`${who} bears on both beams, but put away ${lengthOf(tolerance)} off its mark it would leave the ${least.beam} beam. Use a shallower frame or a deeper pallet, or fit support bars or a deck.`;
      if (partBlock)
        return say`${who} stands ${lengthOf(out)} past the ${side} face: its end blocks of ${lengthOf(block)} bear on part of the beam only. Move it, or fit support bars.`;
      if (verdict === 'close')
        return say`${who} bears on both beams fully. Put away ${lengthOf(tolerance)} off its mark it keeps ${lengthOf(least.worst)} of the ${lengthOf(beamWidth)} of the ${least.beam} beam.`;
      return say`${who} bears on both beams of ${inside(level)} fully, and still does ${lengthOf(tolerance)} off its mark.`;
    },
    worked: () => worked(goods, frameDepth, beamWidth, least, nominal, rules),
    notes: () => [
      say`Placement tolerance: ${sourceOf(rules, 'placementTolerance')}.`,
      ...(blocks
        ? [
            say`End blocks are taken as ${ruleQuantity(rules, 'blockLength')} long (${sourceOf(rules, 'blockLength')}); broken ones void this check.`,
          ]
        : []),
    ],
  });
}

/** The beam on which less of the underside lies when put away off its mark; the rear one where alike. */
function leastBearing({ depth, towardsFront }: BearingPallet, frameDepth: number, beamWidth: number, tolerance: number): Bearing {
  const nominal = (depth - frameDepth) / 2;
  const on = (overhang: number) => Math.min(beamWidth, Math.max(0, beamWidth + overhang));
  const front: Bearing = { beam: 'front', stated: on(nominal + towardsFront), worst: on(nominal + towardsFront - tolerance) };
  const rear: Bearing = { beam: 'rear', stated: on(nominal - towardsFront), worst: on(nominal - towardsFront - tolerance) };
  if (front.worst !== rear.worst) return front.worst < rear.worst ? front : rear;
  return front.stated < rear.stated ? front : rear;
}

function worked(
  goods: BearingPallet,
  frameDepth: number,
  beamWidth: number,
  least: Bearing,
  nominal: number,
  rules: ResolvedRules,
): readonly WorkedStep[] {
  const sign = least.beam === 'front' ? '+' : '−';
  const beyond = nominal + (least.beam === 'front' ? goods.towardsFront : -goods.towardsFront) - rules.value.placementTolerance;
  return [
    {
      what: 'Overhang when centred',
      formula: '(p − D) / 2',
      values: [
        put('p', 'depth of the pallet', lengthOf(goods.depth), 'goods'),
        put('D', 'depth of the frame, outside to outside', lengthOf(frameDepth), 'frame type'),
      ],
      result: { symbol: 'o_mid', quantity: lengthOf(nominal) },
      source: 'geometry',
    },
    {
      what: `Overhang at the ${least.beam} beam, put away off its mark`,
      formula: `o_mid ${sign} t − t_most`,
      values: [
        above('o_mid', 'overhang when centred', lengthOf(nominal)),
        put('t', 'how far it stands towards the front', lengthOf(goods.towardsFront), 'where it stands'),
        ruleValue(rules, 'placementTolerance', 't_most'),
      ],
      result: { symbol: 'o', quantity: lengthOf(beyond) },
      source: sourceOf(rules, 'placementTolerance'),
    },
    ...(beyond < 0 && beyond > -beamWidth
      ? [
          {
            what: `Bearing left on the ${least.beam} beam`,
            formula: 'b + o',
            values: [
              put('b', 'width of the beam', lengthOf(beamWidth), 'beam type'),
              above('o', 'overhang, here short of the face', lengthOf(beyond)),
            ],
            result: { symbol: 'a', quantity: lengthOf(least.worst) },
            source: 'geometry',
          },
        ]
      : []),
  ];
}
