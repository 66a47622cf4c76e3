/** Resolves the site's unit loads: weighed with their pallets, laid out along the beam and across it. */
import type { Missing } from '../checks/finding';
import { acrossProblem, centreTowardsFront } from '../goods/across';
import { goodsIntensity } from '../goods/bearing-shape';
import type { Id, UnitLoad } from '../site/site';
import type { BeamLoad } from '../statics/load';
import { weightOf } from '../units/quantity';
import type { GoodsWork, SiteContext } from './context';
import { sourceWords } from './source-words';

/** @throws RangeError if the site has no such unit load or pallet, which a read site always has */
export function goodsWork(context: Pick<SiteContext, 'unitLoads' | 'pallets'>, unitLoadId: Id): GoodsWork {
  const unitLoad = context.unitLoads.get(unitLoadId);
  if (unitLoad === undefined) throw new RangeError(`no unit load "${unitLoadId}" in the site`);
  const pallet = unitLoad.palletId === null ? null : context.pallets.get(unitLoad.palletId);
  if (pallet === undefined) throw new RangeError(`no pallet "${unitLoad.palletId}" in the site`);

  const palletKg = pallet === null ? 0 : pallet.massKg;
  const bears = unitLoad.bearing.kind === 'bearers' || unitLoad.bearing.kind === 'feet';
  // What stands on bearers or feet brings its pallet down through them too.
  const laid = goodsIntensity({
    widthMm: unitLoad.widthMm,
    depthMm: unitLoad.depthMm,
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
  const acrossFault = acrossProblem(unitLoad.depthMm, unitLoad.across);
  if (acrossFault !== null)
    missing.push({ input: `depth shape of ${unitLoad.name}`, how: acrossFault, field: `unitLoad:${unitLoad.id}:across` });
  const goodsCentre = acrossFault === null ? centreTowardsFront(unitLoad.depthMm, unitLoad.across) : 0;
  const own = sourceWords(unitLoad.massSource);
  const from = pallet === null ? own : `${own}; with pallet ${pallet.name}`;
  const unknown = {
    unitLoad,
    pallet,
    goodsKg: null,
    palletKg,
    grossKg: null,
    from,
    pieces: null,
    centreTowardsFrontMm: goodsCentre,
    missing,
  };
  if (!laid.ok) {
    if (laid.problem === 'mass-missing') missing.push(massMissing(unitLoad));
    else missing.push({ input: `bearing shape of ${unitLoad.name}`, how: laid.message, field: `unitLoad:${unitLoad.id}:bearing` });
    // The goods alone lie further off the middle than together with a pallet: the safe side.
    return unknown;
  }
  const goodsKg = bears ? laid.massKg - (palletKg ?? 0) : laid.massKg;
  if (palletKg === null || acrossFault !== null) return { ...unknown, goodsKg };
  const grossKg = goodsKg + palletKg;
  return {
    unitLoad,
    pallet,
    goodsKg,
    palletKg,
    grossKg,
    from,
    pieces: bears || palletKg === 0 ? laid.pieces : withPallet(laid.pieces, palletKg, unitLoad.widthMm),
    centreTowardsFrontMm: grossKg > 0 ? (goodsCentre * goodsKg) / grossKg : 0,
    missing,
  };
}

const massMissing = (unitLoad: UnitLoad): Missing => ({
  input: `mass of ${unitLoad.name}`,
  how: 'Weigh it with its pallet, or take its gross mass from the delivery papers. An unknown mass is never taken as zero.',
  field: `unitLoad:${unitLoad.id}:goodsKg`,
});

/** A pallet's own mass lies evenly under its goods. */
function withPallet(pieces: BeamLoad, palletKg: number, width: number): BeamLoad {
  const w = weightOf(palletKg) / width;
  return { lines: [...pieces.lines, { from: 0, to: width, wFrom: w, wTo: w }], points: pieces.points };
}
