/** Prepares a bay for its checks: goods where they stand, and each level's two beams solved under them. */
import type { Missing, Place } from '../checks/finding';
import { distinctMissing } from '../checks/make-finding';
import { TOUCH } from '../checks/placement';
import { frontShare } from '../goods/across';
import { pairLoads } from '../goods/pair';
import type { Bay, BeamType, Frame, FrameType, Id, Level, Placement } from '../site/site';
import { solveBeam, type BeamAnswer, type BeamEnd } from '../statics/beam';
import type { BeamLoad } from '../statics/load';
import type { GoodsWork, LevelWork, SiteContext, StandingLoad } from './context';
import { goodsWork } from './goods';
import type { LevelEffects } from './types';

/** Any rigidity gives the same forces on pinned beams; this one is near that of a common box beam. */
const NOMINAL_RIGIDITY = 2e11;

export interface BayFrame {
  readonly frame: Frame;
  readonly type: FrameType | null;
}

/** Symmetric goods come out of their sums this near the middle, and stay inside the ends this nearly. */
const ROUNDING_MM = 1e-9;

/** What a bay's levels stand in and between. */
interface Surroundings {
  readonly context: SiteContext;
  readonly place: Place;
  readonly clearEntry: number;
  readonly frames: readonly [left: BayFrame, right: BayFrame];
  readonly goodsOf: (unitLoadId: Id) => GoodsWork;
}

/** The bay's levels from the lowest up, and what stands on its floor. */
export interface BayContents {
  readonly levels: readonly LevelWork[];
  readonly onFloor: readonly StandingLoad[];
}

/**
 * @param goodsOf gives the site's unit loads, resolved
 */
export function bayContents(
  context: SiteContext,
  place: Place,
  bay: Bay,
  frames: readonly [BayFrame, BayFrame],
  goodsOf: (unitLoadId: Id) => GoodsWork = (id) => goodsWork(context, id),
): BayContents {
  const around = { context, place, clearEntry: bay.clearEntryMm, frames, goodsOf };
  return {
    levels: bay.levels.map((level, index) => levelWork(around, level, index)),
    onFloor: bay.onFloor.map((one) => standing(goodsOf(one.unitLoadId), one, beamDistance(frames, null))),
  };
}

function levelWork(around: Surroundings, level: Level, index: number): LevelWork {
  const { context, frames, clearEntry } = around;
  const beamType = level.beamTypeId === null ? null : (context.beamTypes.get(level.beamTypeId) ?? null);
  const distance = beamDistance(frames, beamType);
  const goods = level.placements.map((one) => standing(around.goodsOf(one.unitLoadId), one, distance));
  const supports = supportsOf(context, frames, clearEntry);
  const needsDistance = goods.some(({ frontShare: share }) => share === null);
  const missing = distinctMissing([
    ...goods.flatMap((one) => one.goods.missing),
    ...(needsDistance || supports === null ? frameTypesMissing(frames) : []),
  ]);
  const total = goods.reduce<number | null>((sum, { goods: { grossKg } }) => (sum === null || grossKg === null ? null : sum + grossKg), 0);
  const canStand = goods.every((one) => one.fromMm >= -TOUCH && one.toMm <= clearEntry + TOUCH && !tips(one));
  return {
    level,
    index,
    place: { ...around.place, levelId: level.id },
    beamType,
    goods,
    span: supports?.span ?? null,
    offset: supports?.offset ?? null,
    beamDistance: distance,
    totalKg: total,
    effects: missing.length === 0 && canStand && supports !== null ? effectsOf(goods, supports, beamType) : null,
    missing,
  };
}

const tips = ({ frontShare: share }: StandingLoad): boolean => share !== null && (share < -1e-12 || share > 1 + 1e-12);

/**
 * A unit load where it stands. Goods whose centre of mass is in the middle share alike whatever the
 * distance of the beams.
 */
function standing(goods: GoodsWork, placement: Placement, distance: number | null): StandingLoad {
  const { widthMm, depthMm } = goods.unitLoad;
  const centreMm = placement.towardsFrontMm + goods.centreTowardsFrontMm;
  return {
    placement,
    goods,
    fromMm: placement.atMm,
    toMm: placement.atMm + widthMm,
    rearMm: placement.towardsFrontMm - depthMm / 2,
    frontMm: placement.towardsFrontMm + depthMm / 2,
    centreMm,
    frontShare: Math.abs(centreMm) < ROUNDING_MM ? 0.5 : distance === null ? null : frontShare(centreMm, distance),
  };
}

/**
 * Between the middles of the two beams: the frame's depth, outside to outside, less the width of one
 * beam, whose halves lie inside each face. Without a beam type the depth itself. Of two unlike frames
 * the shallower one decides, which makes shares more uneven.
 */
function beamDistance(frames: readonly [BayFrame, BayFrame], beamType: BeamType | null): number | null {
  const depths = frames.flatMap(({ type }) => (type === null ? [] : [type.depthMm]));
  if (depths.length === 0) return null;
  const depth = Math.min(...depths);
  const distance = depth - (beamType?.widthMm ?? 0);
  return distance > 0 ? distance : depth;
}

/** Span between the supports and where the left upright's face lies in it, mm. */
function supportsOf(
  context: SiteContext,
  [left, right]: readonly [BayFrame, BayFrame],
  clearEntry: number,
): { span: number; offset: number } | null {
  if (context.site.rules.span === 'clear-entry') return { span: clearEntry, offset: 0 };
  if (left.type === null || right.type === null) return null;
  return { span: clearEntry + (left.type.uprightWidthMm + right.type.uprightWidthMm) / 2, offset: left.type.uprightWidthMm / 2 };
}

/** Every frame of the bay without a type, each to be filled in. */
export const frameTypesMissing = (frames: readonly BayFrame[]): readonly Missing[] =>
  frames.flatMap(({ frame, type }) =>
    type !== null
      ? []
      : [
          {
            input: `type of frame ${frame.name}`,
            how: 'Choose the frame type, or measure the frame’s depth and upright width and add a type with them.',
            field: `frame:${frame.id}:typeId`,
          },
        ],
  );

function effectsOf(
  goods: readonly StandingLoad[],
  { span, offset }: { span: number; offset: number },
  beamType: BeamType | null,
): LevelEffects {
  const standingGoods = goods.flatMap(({ placement, goods: { pieces, unitLoad }, frontShare: share }) =>
    pieces === null || share === null
      ? []
      : [
          {
            id: placement.id,
            load: pieces,
            widthMm: unitLoad.widthMm,
            at: offset + placement.atMm,
            mirrored: placement.mirrored,
            frontShare: share,
          },
        ],
  );
  const superposed = pairLoads(standingGoods);
  const loads = {
    whole: between(superposed.whole, span),
    front: between(superposed.front, span),
    rear: between(superposed.rear, span),
  };
  const known = rigidityOf(beamType);
  const rigidity = known ?? NOMINAL_RIGIDITY;
  const stiffness = known === null ? null : (beamType?.connectorNmmPerRad ?? null);
  /** One beam, or the two of the pair side by side. */
  const solve = (load: BeamLoad, beams: number): BeamAnswer => {
    const end = endOf(stiffness, beams);
    return solveBeam({ span, rigidity: rigidity * beams, left: end, right: end }, load);
  };
  const alike = goods.every(({ frontShare: share }) => share === 0.5);
  const front = solve(loads.front, 1);
  let whole: BeamAnswer | null = null;
  return {
    front,
    rear: alike ? front : solve(loads.rear, 1),
    // Only drawings ask for it.
    get whole() {
      return (whole ??= solve(loads.whole, 2));
    },
    loads,
    rigidity,
    rigidityKnown: known !== null,
    end: endOf(stiffness, 1),
  };
}

/** Goods that fill the level exactly may reach past its ends by their rounding, which no beam can carry. */
function between(load: BeamLoad, span: number): BeamLoad {
  const clamp = (x: number) => Math.min(Math.max(x, 0), span);
  if (load.lines.every(({ from, to }) => from >= 0 && to <= span) && load.points.every(({ at }) => at >= 0 && at <= span)) return load;
  return {
    lines: load.lines.map((line) => ({ ...line, from: clamp(line.from), to: clamp(line.to) })).filter(({ from, to }) => from < to),
    points: load.points.map((point) => ({ ...point, at: clamp(point.at) })),
  };
}

const endOf = (stiffness: number | null, beams: number): BeamEnd =>
  stiffness === null ? { kind: 'pinned' } : { kind: 'sprung', stiffness: stiffness * beams };

/** EI of one beam, N·mm²; null where I or E is not known. */
const rigidityOf = (beamType: BeamType | null): number | null =>
  beamType === null || beamType.secondMomentMm4 === null || beamType.elasticModulusNPerMm2 === null
    ? null
    : beamType.secondMomentMm4 * beamType.elasticModulusNPerMm2;
