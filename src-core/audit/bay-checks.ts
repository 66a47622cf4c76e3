/** The bay's checks as a rack: goods on its floor, its notice, the order of its goods, open flags and its floor. */
import type { Finding, Missing } from '../checks/finding';
import { floorArea, runOnFloor } from '../checks/floor-area';
import { goodsForm } from '../checks/goods-form';
import { heavyLow, type StackedGoods } from '../checks/heavy-low';
import { distinctMissing } from '../checks/make-finding';
import { noticeMatch } from '../checks/notice-match';
import { siteFlags, type RatedPart } from '../checks/site-flags';
import type { BeamType, FrameType, LoadNotice } from '../site/site';
import { asked, type BayWork, type RunWork, type SiteContext } from './context';
import { floorStated } from './frame-floor';
import { clearanceFindings, formed } from './geometry';
import { levelName, noticeMissing, weighed } from './level';
import { beamMass, deckMass, frameDepths, frameMass, originKnown, type PartMass } from './parts';

export function bayFindings(context: SiteContext, work: BayWork): readonly Finding[] {
  return [
    ...floorGoods(context, work),
    ...(asked(context, 'notice-match') ? [matchFinding(context, work)] : []),
    ...(asked(context, 'heavy-low') ? [heavyFinding(context, work)] : []),
    ...(asked(context, 'site-flags') ? flagFindings(context, work) : []),
    ...(asked(context, 'floor-area') ? [areaFinding(context, work)] : []),
  ];
}

/** Goods on the floor are carried by no beam, but need their clearances and must not roll or lean. */
function floorGoods(context: SiteContext, work: BayWork): readonly Finding[] {
  const { place, bay, onFloor, levels } = work;
  if (onFloor.length === 0) return [];
  const level = `The floor of bay ${bay.name}`;
  return [
    ...(asked(context, 'goods-form') ? goodsForm({ place, level, goods: onFloor.map(formed), deck: 'floor', rules: context.rules }) : []),
    ...clearanceFindings(context, work, { place, level, height: 0, goods: onFloor, above: levels[0] ?? null }),
  ];
}

function matchFinding(context: SiteContext, work: BayWork): Finding {
  const { place, bay, levels, notice, noticeFrom } = work;
  const typeOf = (id: string | null) => {
    const type = id === null ? undefined : context.beamTypes.get(id);
    return type === undefined ? null : { id: type.id, name: type.name };
  };
  return noticeMatch({
    place,
    bay: `Bay ${bay.name}`,
    levels: levels.map(({ level, index, goods }) => ({
      name: levelName(index).toLowerCase(),
      height: level.heightMm,
      beamType: typeOf(level.beamTypeId),
      locks: level.locks,
      unitLoads: goods.length,
      field: `level:${level.id}:`,
    })),
    notice:
      notice === null
        ? null
        : {
            from: noticeFrom,
            firstBeam: notice.firstBeamMm,
            greatestGap: notice.greatestGapMm,
            levels: notice.levels,
            unitLoadsPerLevel: notice.unitLoadsPerLevel,
            beamType: typeOf(notice.beamTypeId),
            field: `notice:${notice.id}:`,
          },
    noticeMissing: noticeMissing(work),
  });
}

function heavyFinding(context: SiteContext, { place, bay, levels }: BayWork): Finding {
  const nameOf = (index: number) => levelName(index).toLowerCase();
  return heavyLow({
    place,
    bay: `bay ${bay.name}`,
    goods: levels.flatMap(({ level, index, goods }) =>
      goods.map((one): StackedGoods => ({
        ...weighed(one),
        foot: level.heightMm,
        height: one.goods.unitLoad.heightMm,
        level: nameOf(index),
      })),
    ),
    levels: levels.map(({ index }) => nameOf(index)),
    rules: context.rules,
  });
}

function flagFindings(context: SiteContext, { place, bay, run, notice, frames, frameTypes, levels }: BayWork): readonly Finding[] {
  const { site } = context;
  const beamTypes = new Set(levels.flatMap(({ beamType }) => beamType ?? []));
  const types = new Set(frameTypes.flatMap((type) => type ?? []));
  return siteFlags({
    place,
    bay: `bay ${bay.name}`,
    seismic: site.seismic,
    outdoors: site.outdoors,
    siteField: `site:${site.id}:`,
    twoDeep: run.twoDeep,
    runField: `run:${run.id}:`,
    frames: frames.map(({ id, name, anchored }) => ({ name: `frame ${name}`, anchored, field: `frame:${id}:` })),
    parts: [...(notice === null ? [] : [noticePart(notice)]), ...[...beamTypes].map(beamPart), ...[...types].map(framePart)],
  });
}

const noticePart = (notice: LoadNotice): RatedPart => ({
  name: `load notice ${notice.name}`,
  maker: notice.maker,
  sourceKnown: originKnown(notice),
  field: `notice:${notice.id}:`,
});

/** Without a rating of its own there is no number whose origin matters. */
const beamPart = (type: BeamType): RatedPart => ({
  name: `beam type ${type.name}`,
  maker: type.maker,
  sourceKnown: originKnown(type) || (type.ratings.length === 0 && type.endKg === null && type.designStressNPerMm2 === null),
  field: `beamType:${type.id}:`,
});

const framePart = (type: FrameType): RatedPart => ({
  name: `frame type ${type.name}`,
  maker: type.maker,
  sourceKnown: originKnown(type) || type.table.length === 0,
  field: `frameType:${type.id}:`,
});

function areaFinding(context: SiteContext, work: BayWork): Finding {
  const { place, bay, run, frameTypes } = work;
  const floor = run.floorId === null ? null : (context.floors.get(run.floorId) ?? null);
  const limit = floorStated(run, floor, 'areaNPerMm2', 'load allowed by area');
  const { shallower, missing: depthMissing } = frameDepths(work);
  const [left, right] = frameTypes;
  const mass = everythingIn(work);
  return floorArea({
    place,
    bay: `bay ${bay.name}`,
    kind: floor?.kind ?? null,
    kindMissing:
      floor === null
        ? (limit.missing[0] as Missing)
        : {
            input: `kind of floor ${floor.name}`,
            how: 'Ask whether it lies on the ground or is suspended, with rooms or air under it.',
            field: `floor:${floor.id}:kind`,
          },
    massKg: mass.missing.length > 0 ? null : mass.kg,
    missing: [...mass.missing, ...depthMissing],
    width: left === null || right === null ? null : bay.clearEntryMm + (left.uprightWidthMm + right.uprightWidthMm) / 2,
    depth: shallower,
    limit,
    rules: context.rules,
  });
}

/** Goods on levels and floor, beams, decks and half of each frame. */
function everythingIn(work: BayWork): PartMass {
  const { levels, onFloor, frames, frameTypes } = work;
  const parts: readonly PartMass[] = [
    ...levels.flatMap((level) => [beamMass(work, level), beamMass(work, level), deckMass(work, level)]),
    ...frames.map((frame, i) => frameMass(frame, frameTypes[i] ?? null)).map(({ kg, missing }) => ({ kg: kg / 2, missing })),
    ...[...levels.flatMap(({ goods }) => goods), ...onFloor].map(({ goods }) => ({ kg: goods.grossKg ?? 0, missing: goods.missing })),
  ];
  return { kg: parts.reduce((sum, { kg }) => sum + kg, 0), missing: distinctMissing(parts.flatMap(({ missing }) => missing)) };
}

/** What concerns a run as a whole. */
export function runFindings(context: SiteContext, { run, place, frames }: RunWork): readonly Finding[] {
  const floor = run.floorId === null ? null : (context.floors.get(run.floorId) ?? null);
  if (!asked(context, 'floor-area') || floor?.kind !== 'suspended') return [];
  const types = run.frames.map(({ typeId }) => (typeId === null ? null : (context.frameTypes.get(typeId) ?? null)));
  let legs = 0;
  let length = run.bays.reduce((sum, { clearEntryMm }) => sum + clearEntryMm, 0);
  let depth = Infinity;
  for (const [i, { legFrontN, legRearN }] of frames.entries()) {
    const type = types[i] ?? null;
    if (type === null || legFrontN === null || legRearN === null) return [];
    legs += legFrontN + legRearN;
    length += type.uprightWidthMm;
    depth = Math.min(depth, type.depthMm);
  }
  const limit = floorStated(run, floor, 'areaNPerMm2', 'load allowed by area');
  return [runOnFloor({ place, run: `run ${run.name}`, legs, length, depth, limit })];
}
