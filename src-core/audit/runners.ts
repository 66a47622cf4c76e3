/** A level's goods brought down through the lines of their pallets: solved again for both spreads. */
import type { Finding } from '../checks/finding';
import type { PairInput } from '../checks/pair';
import { runners, runnerShares, type OnLines, type Spread } from '../checks/runners';
import { pairLoads, type StandingGoods } from '../goods/pair';
import { solveBeam } from '../statics/beam';
import type { BeamLoad } from '../statics/load';
import { reduce } from '../statics/reduction';
import { weightOf } from '../units/quantity';
import type { LevelWork, StandingLoad } from './context';
import { boardsOf, palletSides } from './geometry';
import type { LevelEffects } from './types';

/**
 * Null where no pallet of the level has lines of runners that reach from front to rear under even goods.
 * @param stated the beams under the goods as they are stated
 * @param pairOf the same for other effects of the same goods
 * @param counts false where the level is judged as a designed full complement
 */
export function runnersFinding(
  work: LevelWork,
  stated: PairInput,
  pairOf: (effects: LevelEffects) => PairInput,
  counts: boolean,
): Finding | null {
  const { effects, offset } = work;
  if (effects === null || offset === null || !work.goods.some(hasLines)) return null;
  const onRunners = (spread: Spread): PairInput => {
    const goods = work.goods.map((one) => standing(one, offset, stated.span, spread));
    const loads = pairLoads(goods);
    const beam = { span: stated.span, rigidity: effects.rigidity, left: effects.end, right: effects.end };
    const front = solveBeam(beam, loads.front);
    const rear = effects.rear === effects.front ? front : solveBeam(beam, loads.rear);
    const pair = pairOf({ ...effects, loads, front, rear });
    return { ...pair, goods: () => pair.goods().map((one, i) => ({ ...one, centre: centreOf(goods[i], one.centre) })) };
  };
  return runners({
    stated,
    onLines: work.goods.filter(hasLines).map(lined),
    onRunners: () => ({ flexible: onRunners('flexible'), rigid: onRunners('rigid') }),
    counts,
  });
}

const hasLines = (one: StandingLoad): boolean =>
  one.goods.pallet !== null &&
  one.goods.pallet.runners.length > 0 &&
  one.goods.unitLoad.bearing.kind === 'even' &&
  boardsOf(one) === 'front-to-rear';

/** Lines that stand the same from both edges carry even goods at their middle. */
function lined(one: StandingLoad): OnLines {
  const { unitLoad, pallet, grossKg } = one.goods;
  const along = palletSides(one)?.along ?? unitLoad.widthMm;
  const centres = (pallet?.runners ?? []).map(({ centreMm }) => centreMm).sort((a, b) => a - b);
  const last = centres.length - 1;
  return {
    massKg: grossKg ?? 0,
    width: unitLoad.widthMm,
    frontShare: one.frontShare ?? 0.5,
    centred: centres.every((centre, i) => Math.abs(centre + (centres[last - i] as number) - along) < 1e-6),
  };
}

function standing(one: StandingLoad, offset: number, span: number, spread: Spread): StandingGoods {
  const { unitLoad, pieces } = one.goods;
  return {
    id: one.placement.id,
    load: hasLines(one) ? onLines(one, spread) : (pieces ?? { lines: [], points: [] }),
    widthMm: unitLoad.widthMm,
    at: offset + Math.min(Math.max(one.placement.atMm, 0), span - unitLoad.widthMm),
    mirrored: one.placement.mirrored,
    frontShare: one.frontShare ?? 0.5,
  };
}

/** The whole unit load as points on its pallet's lines; the pallet stands in the middle of the goods. */
function onLines(one: StandingLoad, spread: Spread): BeamLoad {
  const { unitLoad, pallet, grossKg } = one.goods;
  const edge = (unitLoad.widthMm - (palletSides(one)?.along ?? unitLoad.widthMm)) / 2;
  const lines = pallet?.runners ?? [];
  const shares = runnerShares(lines.length, spread);
  const sorted = [...lines].sort((a, b) => a.centreMm - b.centreMm);
  return {
    lines: [],
    points: sorted.map(({ centreMm }, i) => ({
      at: Math.min(Math.max(edge + centreMm, 0), unitLoad.widthMm),
      force: weightOf(grossKg ?? 0) * (shares[i] as number),
    })),
  };
}

/** Centre of mass from the left support, mm. */
function centreOf(goods: StandingGoods | undefined, otherwise: number): number {
  if (goods === undefined) return otherwise;
  const { centroid } = reduce(goods.load);
  if (centroid === null) return otherwise;
  return goods.at + (goods.mirrored ? goods.widthMm - centroid : centroid);
}
