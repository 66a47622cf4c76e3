/** Load per area of a decked level: all its goods, and the heaviest of them on its own footprint. */
import { lengthOf, massOf, quantity } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type WorkedStep } from './finding';
import type { LevelRating } from './level-rating';
import { compared, distinctMissing, finding, notAssessable } from './make-finding';
import { inside } from './phrase';
import type { ResolvedRules } from './rule-sets';
import { above, put } from './worked-values';

export interface AreaGoods {
  readonly placementId: string;
  readonly name: string;
  readonly massKg: number | null;
  readonly from: string;
  /** Footprint, mm. */
  readonly width: number;
  readonly depth: number;
  readonly missing: readonly Missing[];
}

export interface AreaLoadInput {
  readonly place: Place;
  readonly level: string;
  /** Of the shelf: between the uprights, and the depth of the frame; null = not known. */
  readonly width: number;
  readonly depth: number | null;
  readonly depthMissing: readonly Missing[];
  readonly goods: readonly AreaGoods[];
  readonly rated: LevelRating;
  readonly rules: ResolvedRules;
}

/**
 * The level's mass over its area against its rating over the same area. Goods that press harder on their
 * own footprint than the level may on the whole make it close, not over: whether the deck bears them is
 * judged panel by panel.
 * Source: facts M-09, common practice.
 */
export function areaLoad(input: AreaLoadInput): Finding {
  const { place, level, goods, width, depth, depthMissing, rated, rules } = input;
  const within = (says: () => Finding['says']): Finding => finding({ check: 'area-load', place, verdict: 'within', says });
  if (goods.length === 0) return within(() => say`No goods stand on ${inside(level)}.`);
  const missing = distinctMissing([
    ...goods.flatMap((one) => (one.massKg === null ? one.missing : [])),
    ...(depth === null ? depthMissing : []),
    ...(rated.kg === null ? rated.missing : []),
  ]);
  if (missing.length > 0 || depth === null || rated.kg === null) return notAssessable('area-load', place, missing);
  const ratedKg = rated.kg;
  const area = width * depth;
  const total = goods.reduce((sum, { massKg }) => sum + (massKg ?? 0), 0);
  const heaviest = goods.reduce((most, one) => (pressure(one) > pressure(most) ? one : most));
  const allowed = quantity('areaMass', ratedKg / area);
  const mean = quantity('areaMass', total / area);
  const local = quantity('areaMass', pressure(heaviest));
  const result = compared(mean, allowed, rules.value.closeAbove);
  const dense = local.value > allowed.value * (1 + 1e-12);
  return finding({
    check: 'area-load',
    place: dense ? { ...place, placementId: heaviest.placementId } : place,
    ...result,
    verdict: dense && result.verdict === 'within' ? 'close' : result.verdict,
    says: () => {
      const all = say`${level} carries ${mean} over its area; its rating comes to ${allowed}.`;
      return dense
        ? say`${all} ${heaviest.name} presses with ${local} on its own footprint: spread it with a board, and see that its panels carry it.`
        : say`${all} The heaviest on its own footprint, ${heaviest.name}, presses with ${local}.`;
    },
    worked: () => worked(input, total, ratedKg, depth, heaviest),
    notes: () => [
      say`By area alone; each panel is judged by itself. The area is taken from upright to upright and over the depth of the frame.`,
    ],
  });
}

const pressure = ({ massKg, width, depth }: AreaGoods): number => (massKg ?? 0) / (width * depth);

function worked(
  { goods, width, rated }: AreaLoadInput,
  total: number,
  ratedKg: number,
  depth: number,
  heaviest: AreaGoods,
): readonly WorkedStep[] {
  const size = [
    put('w', 'free width between the uprights', lengthOf(width), 'bay'),
    put('d', 'depth of the frame', lengthOf(depth), 'frame type'),
  ];
  return [
    {
      what: 'Mass on the level',
      formula: goods.map((_, i) => `m${i + 1}`).join(' + '),
      values: goods.map((one, i) => put(`m${i + 1}`, `mass of ${one.name}`, massOf(one.massKg ?? 0), one.from)),
      result: { symbol: 'm', quantity: massOf(total) },
      source: 'goods on the level',
    },
    {
      what: 'Mass over the area of the level',
      formula: 'm / (w · d)',
      values: [above('m', 'mass on the level', massOf(total)), ...size],
      result: { symbol: 'q', quantity: quantity('areaMass', total / (width * depth)) },
      source: 'common practice, no source',
    },
    {
      what: `${heaviest.name} on its own footprint`,
      formula: 'm_h / (w_h · d_h)',
      values: [
        put('m_h', 'its mass', massOf(heaviest.massKg ?? 0), heaviest.from),
        put('w_h', 'its width', lengthOf(heaviest.width), 'goods'),
        put('d_h', 'its depth', lengthOf(heaviest.depth), 'goods'),
      ],
      result: { symbol: 'q_h', quantity: quantity('areaMass', pressure(heaviest)) },
      source: 'common practice, no source',
    },
    {
      what: 'Rating over the area of the level',
      formula: 'm_rated / (w · d)',
      values: [put('m_rated', 'rating of the level', massOf(ratedKg), rated.from), ...size],
      result: { symbol: 'q_rated', quantity: quantity('areaMass', ratedKg / (width * depth)) },
      source: 'common practice, no source',
    },
    {
      what: 'Utilisation',
      formula: 'q / q_rated',
      values: [
        put('q', 'mass over the area', quantity('areaMass', total / (width * depth)), 'lines above'),
        above('q_rated', 'rating over the area', quantity('areaMass', ratedKg / (width * depth))),
      ],
      result: { symbol: 'u', quantity: { value: total / ratedKg, kind: 'ratio' } },
      source: rated.by,
    },
  ];
}
