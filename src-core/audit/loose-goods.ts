/** A level's goods off their marks and heavier than stated, for the worst case of its beams. */
import { loosePair, type LoosePair } from '../checks/loose-pair';
import { mirrored } from '../goods/pair';
import type { BayWork, LevelWork, SiteContext } from './context';
import type { LevelEffects } from './types';

/**
 * Null where nothing may be otherwise than stated: no placement tolerance and no mass that may be more.
 * @param span between the supports, mm
 */
export function looseGoods(
  { rules }: Pick<SiteContext, 'rules'>,
  { bay }: Pick<BayWork, 'bay'>,
  { goods, offset, beamDistance }: LevelWork,
  { rigidity, end }: LevelEffects,
  span: number,
  fixity: number,
): LoosePair | null {
  const tolerance = rules.value.placementTolerance;
  if (offset === null || goods.length === 0) return null;
  if (tolerance === 0 && goods.every((one) => one.goods.unitLoad.massUncertaintyPercent === 0)) return null;
  return loosePair({
    goods: goods.map(({ placement, goods: { pieces, unitLoad }, frontShare }) => ({
      load: pieces === null ? { lines: [], points: [] } : placement.mirrored ? mirrored(pieces, unitLoad.widthMm) : pieces,
      width: unitLoad.widthMm,
      at: offset + placement.atMm,
      frontShare: frontShare ?? 0.5,
      percent: unitLoad.massUncertaintyPercent,
    })),
    span,
    rigidity,
    end,
    fixity,
    from: offset,
    to: Math.min(offset + bay.clearEntryMm, span),
    tolerance,
    beamDistance,
  });
}
