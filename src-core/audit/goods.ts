/** Resolves the site's unit loads: weighed with their pallets, laid out along the beam and across it. */
import type { Missing } from '../checks/finding';
import { centreTowardsFront } from '../goods/across';
import { goodsIntensity } from '../goods/bearing-shape';
import type { Id, Pallet, UnitLoad } from '../site/site';
import type { BeamLoad } from '../statics/load';
import { weightOf } from '../units/quantity';
import type { GoodsWork, SiteContext } from './context';

/** @throws RangeError if the site has no such unit load or pallet, which a read site always has */
export function goodsWork(context: SiteContext, unitLoadId: Id): GoodsWork {
  const unitLoad = context.unitLoads.get(unitLoadId);
  if (unitLoad === undefined) throw new RangeError(`no unit load "${unitLoadId}" in the site`);
  const pallet = unitLoad.palletId === null ? null : context.pallets.get(unitLoad.palletId);
  if (pallet === undefined) throw new RangeError(`no pallet "${unitLoad.palletId}" in the site`);

  const palletKg = pallet === null ? 0 : pallet.massKg;
  const bears = unitLoad.bearing.kind === 'bearers' || unitLoad.bearing.kind === 'feet';
  // What stands on bearers or feet brings its pallet down through them too.
  const laid = goodsIntensity({
    widthMm: unitLoad.widthMm,
    goodsKg: bears && unitLoad.goodsKg !== null ? unitLoad.goodsKg + (palletKg ?? 0) : unitLoad.goodsKg,
    bearing: unitLoad.bearing,
  });
  const missing: Missing[] = [];
  if (pallet !== null && palletKg === null)
    missing.push({
      input: `mass of pallet ${pallet.name}`,
      how: 'Weigh an empty one, damp as it is used.',
      field: `pallet:${pallet.id}:massKg`,
    });
  if (!laid.ok) {
    if (unitLoad.goodsKg === null) missing.push(massMissing(unitLoad));
    else missing.push({ input: `bearing shape of ${unitLoad.name}`, how: laid.message, field: `unit-load:${unitLoad.id}:bearing` });
    return { ...unknownGoods(unitLoad, pallet, palletKg), missing };
  }
  const goodsKg = bears ? laid.massKg - (palletKg ?? 0) : laid.massKg;
  if (palletKg === null) return { ...unknownGoods(unitLoad, pallet, palletKg), goodsKg, missing };
  const grossKg = goodsKg + palletKg;
  const goodsCentre = centreTowardsFront(unitLoad.depthMm, unitLoad.across);
  return {
    unitLoad,
    pallet,
    goodsKg,
    palletKg,
    grossKg,
    pieces: bears || palletKg === 0 ? laid.pieces : withPallet(laid.pieces, palletKg, unitLoad.widthMm),
    centreTowardsFrontMm: grossKg > 0 ? (goodsCentre * goodsKg) / grossKg : 0,
    missing,
  };
}

const unknownGoods = (unitLoad: UnitLoad, pallet: Pallet | null, palletKg: number | null): GoodsWork => ({
  unitLoad,
  pallet,
  goodsKg: null,
  palletKg,
  grossKg: null,
  pieces: null,
  // The goods alone are further off the middle than together with a pallet: the safe side.
  centreTowardsFrontMm: centreTowardsFront(unitLoad.depthMm, unitLoad.across),
  missing: [],
});

const massMissing = (unitLoad: UnitLoad): Missing => ({
  input: `mass of ${unitLoad.name}`,
  how: 'Weigh it with its pallet, or take its gross mass from the delivery papers. An unknown mass is never taken as zero.',
  field: `unit-load:${unitLoad.id}:goodsKg`,
});

/** A pallet's own mass lies evenly under its goods. */
function withPallet(pieces: BeamLoad, palletKg: number, width: number): BeamLoad {
  const w = weightOf(palletKg) / width;
  return { lines: [...pieces.lines, { from: 0, to: width, wFrom: w, wTo: w }], points: pieces.points };
}
