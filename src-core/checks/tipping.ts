/** Does each unit load's centre of mass lie between the two beams, or would it tip off. */
import { lengthOf, quantity, ratioOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type WorkedStep } from './finding';
import { finding, notAssessable } from './make-finding';
import type { ResolvedRules } from './rule-sets';

export interface TippingGoods {
  readonly placementId: string;
  readonly name: string;
  /** Centre of mass in front of the middle of the pair, mm. */
  readonly centre: number;
  /** Null where the distance of the beams is needed and not known. */
  readonly frontShare: number | null;
}

export interface TippingInput {
  readonly place: Place;
  readonly goods: readonly TippingGoods[];
  /** Between the middles of the beams, mm. */
  readonly beamDistance: number | null;
  readonly beamDistanceFrom: string;
  /** What to enter where the distance is needed and not known. */
  readonly missing: readonly Missing[];
  readonly rules: ResolvedRules;
}

/** Shares this near 0 or 1 are the rounding of the computation. */
const ROUNDING = 1e-12;

/** One finding for each unit load that tips or cannot be judged; else one for the most uneven. */
export function tipping(input: TippingInput): readonly Finding[] {
  const { place, goods, beamDistance, missing, rules } = input;
  const found: Finding[] = [];
  let uneven: TippingGoods | null = null;
  for (const one of goods) {
    const share = one.frontShare;
    const at = { ...place, placementId: one.placementId };
    if (share === null) {
      found.push(notAssessable('tipping', at, missing));
    } else if (share < -ROUNDING || share > 1 + ROUNDING) {
      const beam = share > 1 ? 'front' : 'rear';
      const past = Math.abs(one.centre) - (beamDistance ?? 0) / 2;
      found.push(
        finding({
          check: 'tipping',
          place: { ...at, beam },
          verdict: 'not-possible',
          says: () =>
            say`${one.name} would tip: its centre of mass lies ${lengthOf(past)} beyond the middle of the ${beam} beam. Move it ${beam === 'front' ? 'to the rear' : 'to the front'}.`,
          worked: () => worked(one, input),
        }),
      );
    } else if (uneven === null || unevenness(one) > unevenness(uneven)) {
      uneven = one;
    }
  }
  if (found.length > 0) return found;
  const most = uneven;
  if (most === null) return [finding({ check: 'tipping', place, verdict: 'within', says: () => say`No goods stand here.` })];
  const share = most.frontShare ?? 0.5;
  const beam = share >= 0.5 ? 'front' : 'rear';
  const percent = quantity('percent', 100 * Math.max(share, 1 - share));
  return [
    finding({
      check: 'tipping',
      place,
      verdict: 'within',
      says: () =>
        unevenness(most) < ROUNDING
          ? say`Every unit load stands evenly on the front and rear beams.`
          : say`Every centre of mass lies between the beams. The most uneven, ${most.name}, puts ${percent} of its mass on the ${beam} beam.`,
      worked: () => (beamDistance === null ? [] : worked(most, input)),
      notes: () =>
        Math.max(share, 1 - share) > rules.value.frontShareWarn
          ? [
              say`More than ${quantity('percent', 100 * rules.value.frontShareWarn)} on one beam: ratings of beams and frames take it that both share alike. The ${beam} beam is judged with what it really carries.`,
            ]
          : [],
    }),
  ];
}

const unevenness = (goods: TippingGoods): number => Math.abs((goods.frontShare ?? 0.5) - 0.5);

function worked(goods: TippingGoods, { beamDistance, beamDistanceFrom }: TippingInput): readonly WorkedStep[] {
  if (beamDistance === null) return [];
  return [
    {
      what: `Share of ${goods.name} on the front beam`,
      formula: '1/2 + e / d',
      values: [
        {
          symbol: 'e',
          is: 'centre of mass in front of the middle of the pair',
          quantity: lengthOf(goods.centre),
          from: 'goods and where they stand',
        },
        { symbol: 'd', is: 'distance between the middles of the beams', quantity: lengthOf(beamDistance), from: beamDistanceFrom },
      ],
      result: { symbol: 's', quantity: ratioOf(0.5 + goods.centre / beamDistance) },
      source: 'statics: moments about the rear beam',
    },
  ];
}
