/** How the goods of a level stand: their clearances, their overhang, how their pallets bear, and their form. */
import { clearanceAbove, type BeamAbove } from '../checks/clearance-above';
import { clearanceAcross, type BackOfGoods } from '../checks/clearance-across';
import { clearanceAlong, type Handling, type LeaningOutline } from '../checks/clearance-along';
import type { Finding } from '../checks/finding';
import { goodsForm, type FormedGoods } from '../checks/goods-form';
import { overhang, type AcrossBeams } from '../checks/overhang';
import { palletBearing, type BearingPallet } from '../checks/pallet-bearing';
import { inside } from '../checks/phrase';
import { goodsBehind, pastFrame } from './behind';
import { asked, type BayWork, type LevelWork, type SiteContext, type StandingLoad } from './context';
import { deckFindings } from './decks';
import { levelName, outline } from './level';
import { frameDepths } from './parts';

/** Every check of how goods stand on a level, and of the deck under them. */
export function levelFindings(context: SiteContext, bay: BayWork, work: LevelWork): readonly Finding[] {
  const { level, place, goods, index } = work;
  const name = levelName(index);
  return [
    ...(asked(context, 'pallet-bearing') ? bearingFindings(context, bay, work) : []),
    ...(asked(context, 'overhang') ? overhangFindings(context, bay, work) : []),
    ...(asked(context, 'goods-form')
      ? goodsForm({ place, level: name, goods: goods.map(formed), deck: level.deck.kind, rules: context.rules })
      : []),
    ...deckFindings(context, bay, work),
    ...clearanceFindings(context, bay, {
      place,
      level: name,
      height: level.heightMm,
      goods,
      above: bay.levels[index + 1] ?? null,
    }),
  ];
}

/** Goods on a level or on the floor, as their clearances see them. */
export interface StandingRow {
  readonly place: LevelWork['place'];
  readonly level: string;
  readonly height: number;
  readonly goods: readonly StandingLoad[];
  readonly above: LevelWork | null;
}

export function clearanceFindings(context: SiteContext, bay: BayWork, row: StandingRow): readonly Finding[] {
  const { place, level, height, goods, above } = row;
  const { rules } = context;
  const handling = handlingOf(bay);
  return [
    ...(asked(context, 'clearance-along')
      ? clearanceAlong({ place, level, height, clearEntry: bay.bay.clearEntryMm, goods: goods.map(leaning), handling, rules })
      : []),
    ...(asked(context, 'clearance-above')
      ? clearanceAbove({
          place,
          level,
          height,
          goods: goods.map(({ placement, goods: { unitLoad } }) => ({
            placementId: placement.id,
            name: unitLoad.name,
            height: unitLoad.heightMm,
          })),
          beam: above === null ? null : beamAbove(context, bay, above),
          handling,
          rules,
        })
      : []),
    ...(asked(context, 'clearance-across') ? [acrossFinding(context, bay, row, handling)] : []),
  ];
}

const handlingOf = ({ run }: BayWork): Handling => ({
  loadedBy: run.loadedBy,
  missing: {
    input: `what puts goods away in run ${run.name}`,
    how: 'State the class of truck, or that goods are put away by hand: clearances go by it.',
    field: `run:${run.id}:loadedBy`,
  },
});

const leaning = (one: StandingLoad): LeaningOutline => ({
  ...outline(one),
  lean: one.placement.mirrored ? -one.goods.unitLoad.leanMm : one.goods.unitLoad.leanMm,
});

/** The beam above as it hangs: by its own goods where its EI is known, else as far as it may. */
function beamAbove(context: SiteContext, bay: BayWork, { level, index, beamType, effects, span }: LevelWork): BeamAbove {
  const { deflectionDivisor } = context.rules.value;
  const name = inside(levelName(index));
  const computed = effects !== null && effects.rigidityKnown;
  return {
    level: name,
    top: level.heightMm,
    beamHeight: beamType?.heightMm ?? null,
    missing:
      beamType === null
        ? [
            {
              input: `beam type of ${name} of bay ${bay.bay.name}`,
              how: 'Choose the beam type, or add one with the height of the beam.',
              field: `level:${level.id}:beamTypeId`,
            },
          ]
        : [],
    sag: computed
      ? Math.max(effects.front.deflection.sag, effects.rear.deflection.sag)
      : (span ?? bay.bay.clearEntryMm) / deflectionDivisor,
    sagFrom: computed
      ? 'computed from the goods on it'
      : `the most it may, its span over ${deflectionDivisor}, because its section or its goods are not known`,
  };
}

function acrossFinding(context: SiteContext, bay: BayWork, { place, level, height, goods }: StandingRow, handling: Handling): Finding {
  const behind = goodsBehind(context, bay);
  const { shallower, missing } = frameDepths(bay);
  return clearanceAcross({
    place,
    level,
    goods: goods.map(({ placement, goods: { unitLoad }, fromMm, toMm }): BackOfGoods => ({
      placementId: placement.id,
      name: unitLoad.name,
      bottom: height,
      top: height + unitLoad.heightMm,
      from: fromMm,
      to: toMm,
      past: pastFrame(unitLoad.depthMm, placement.towardsFrontMm, shallower ?? Infinity, unitLoad.leanMm),
    })),
    behind: behind === null ? null : { run: behind.run.name, gap: behind.gap, goods: behind.goods },
    handling,
    missing: behind === null ? [] : [...missing, ...behind.missing],
    rules: context.rules,
  });
}

export const formed = ({ placement, goods: { unitLoad, pallet } }: StandingLoad): FormedGoods => ({
  placementId: placement.id,
  name: unitLoad.name,
  height: unitLoad.heightMm,
  lean: unitLoad.leanMm,
  contact: unitLoad.contact,
  chocked: unitLoad.chocked,
  missing: {
    input: `whether ${unitLoad.name} is chocked`,
    how: 'Look whether it lies in a cradle or is chocked on both sides, and answer.',
    field: `unitLoad:${unitLoad.id}:chocked`,
  },
  onPallet: pallet !== null,
});

/** A pallet's sides as it stands, mm: along the run and across it. */
export function palletSides({ goods: { unitLoad, pallet } }: StandingLoad): { readonly along: number; readonly across: number } | null {
  if (pallet === null) return null;
  return unitLoad.palletFace === 'width'
    ? { along: pallet.widthMm, across: pallet.lengthMm }
    : { along: pallet.lengthMm, across: pallet.widthMm };
}

/** Which way a pallet's bottom boards or runners run as it stands. */
export function boardsOf({ goods: { unitLoad, pallet } }: StandingLoad): BearingPallet['boards'] {
  if (pallet === null || pallet.boards === 'full') return 'full';
  if (pallet.boards === 'none') return 'none';
  const across = unitLoad.palletFace === 'width' ? 'along-length' : 'along-width';
  return pallet.boards === across ? 'front-to-rear' : 'along-the-run';
}

function bearingFindings(context: SiteContext, bay: BayWork, work: LevelWork): readonly Finding[] {
  const { place, goods, index, level, beamType } = work;
  const { deeper, missing } = frameDepths(bay);
  return palletBearing({
    place,
    level: levelName(index),
    goods: goods.map((one): BearingPallet => ({
      placementId: one.placement.id,
      name: one.goods.unitLoad.name,
      pallet: one.goods.pallet !== null,
      depth: palletSides(one)?.across ?? one.goods.unitLoad.depthMm,
      towardsFront: one.placement.towardsFrontMm,
      boards: boardsOf(one),
    })),
    frameDepth: deeper,
    beamWidth: beamType?.widthMm ?? null,
    missing: [
      ...missing,
      ...(beamType === null
        ? [
            {
              input: `beam type of ${inside(levelName(index))}`,
              how: 'Choose the beam type, or add one with the width of the beam.',
              field: `level:${level.id}:beamTypeId`,
            },
          ]
        : []),
    ],
    deck: level.deck.kind,
    rules: context.rules,
  });
}

function overhangFindings(context: SiteContext, bay: BayWork, { place, goods, index, level }: LevelWork): readonly Finding[] {
  const { shallower, missing } = frameDepths(bay);
  return overhang({
    place,
    level: levelName(index),
    goods: goods.map((one): AcrossBeams => {
      const { unitLoad } = one.goods;
      const sides = palletSides(one);
      return {
        placementId: one.placement.id,
        name: unitLoad.name,
        what: sides === null ? 'goods' : 'pallet',
        depth: sides?.across ?? unitLoad.depthMm,
        towardsFront: one.placement.towardsFrontMm,
        pastPallet:
          sides === null
            ? { along: 0, across: 0 }
            : { along: (unitLoad.widthMm - sides.along) / 2, across: (unitLoad.depthMm - sides.across) / 2 },
      };
    }),
    frameDepth: shallower,
    missing,
    carried: level.deck.kind !== 'none',
    rules: context.rules,
  });
}
