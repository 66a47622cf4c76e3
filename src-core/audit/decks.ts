/** Decks and shelves of a level: each panel under its part of the goods, and the level by area. */
import { areaLoad, type AreaGoods } from '../checks/area-load';
import { deckPanel, type OnDeck } from '../checks/deck-panel';
import { say, type Finding } from '../checks/finding';
import { finding } from '../checks/make-finding';
import { pairLoads, type StandingGoods } from '../goods/pair';
import { acrossStrip } from '../goods/strip';
import { NO_LOAD, type BeamLoad } from '../statics/load';
import { asked, type BayWork, type LevelWork, type SiteContext, type StandingLoad } from './context';
import { levelName, ratingOf, weighed } from './level';
import { frameDepths } from './parts';
import { sourceWords } from './source-words';

export function deckFindings(context: SiteContext, bay: BayWork, work: LevelWork): readonly Finding[] {
  const { level, place, goods, index } = work;
  const { deck } = level;
  const { rules } = context;
  const name = levelName(index);
  if (deck.kind !== 'mesh' && deck.kind !== 'panels') return undecked(context, work);
  const found: Finding[] = [];
  const rated = ratingOf(bay, work);
  const { deeper, missing } = frameDepths(bay);
  if (asked(context, 'deck-panel'))
    found.push(
      ...deckPanel({
        place,
        level: name,
        panels: { count: deck.count, ratedKg: deck.panelKg, from: sourceWords(deck.source) },
        rated,
        clearEntry: bay.bay.clearEntryMm,
        depth: deeper,
        depthMissing: missing,
        goods: goods.map(onDeck),
        rules,
      }),
    );
  if (asked(context, 'area-load'))
    found.push(
      areaLoad({
        place,
        level: name,
        width: bay.bay.clearEntryMm,
        depth: deeper,
        depthMissing: missing,
        goods: goods.map((one): AreaGoods => {
          const { placementId, name: called, massKg, from, missing: lacking } = weighed(one);
          const { widthMm: width, depthMm: depth } = one.goods.unitLoad;
          return { placementId, name: called, massKg, from, width, depth, missing: lacking };
        }),
        rated,
        rules,
      }),
    );
  return found;
}

function undecked(context: SiteContext, { place, index }: LevelWork): readonly Finding[] {
  const within = (check: 'deck-panel' | 'area-load'): Finding =>
    finding({ check, place, verdict: 'within', says: () => say`${levelName(index)} has no deck or shelf panels.` });
  return (['deck-panel', 'area-load'] as const).filter((check) => asked(context, check)).map(within);
}

function onDeck(one: StandingLoad): OnDeck {
  const { goods, placement, fromMm, toMm, rearMm, frontMm } = one;
  return {
    placementId: placement.id,
    name: goods.unitLoad.name,
    along: goods.pieces === null ? null : pairLoads([standing(one, goods.pieces)]).whole,
    across: across(one),
    from: fromMm,
    to: toMm,
    rear: rearMm,
    front: frontMm,
    missing: goods.missing,
  };
}

const standing = ({ placement, goods: { unitLoad }, fromMm }: StandingLoad, load: BeamLoad): StandingGoods => ({
  id: placement.id,
  load,
  widthMm: unitLoad.widthMm,
  at: fromMm,
  mirrored: placement.mirrored,
  frontShare: 0.5,
});

/** Goods by their depth shape and the pallet evenly, together 1 N. */
function across({ goods: { unitLoad, goodsKg, palletKg, grossKg, missing } }: StandingLoad): BeamLoad {
  if (missing.length > 0 || goodsKg === null || palletKg === null || grossKg === null || !(grossKg > 0)) return NO_LOAD;
  const goods = acrossStrip(unitLoad.depthMm, unitLoad.across);
  if (palletKg === 0) return goods;
  const part = goodsKg / grossKg;
  const w = (1 - part) / unitLoad.depthMm;
  return {
    lines: [
      ...goods.lines.map((line) => ({ ...line, wFrom: line.wFrom * part, wTo: line.wTo * part })),
      { from: 0, to: unitLoad.depthMm, wFrom: w, wTo: w },
    ],
    points: goods.points.map((point) => ({ ...point, force: point.force * part })),
  };
}
