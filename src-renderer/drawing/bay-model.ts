/**
 * A bay as it is drawn: uprights, beams, and goods with their outline, each at its place in mm.
 * x runs from the left upright's inner face to the right, y upwards from the floor.
 */
import { TOUCH } from '../../src-core/checks/placement';
import type { Bay, Id, Level, Placement, Run, UnitLoad } from '../../src-core/site/site';
import type { DrawnUnitLoad, Libraries } from './libraries';
import { outlineOf, type Outline } from './outline';
import { overlaps, type Standing } from './snap';
import type { Weighed } from './weigh';

/** Sizes at which members are drawn whose type is not known, mm. */
const DRAWN_UPRIGHT = 100;
const DRAWN_BEAM = 110;
/** Room drawn above the topmost beam where nothing taller stands there, mm. */
const DRAWN_HEADROOM = 1000;

export interface GoodsDrawn {
  readonly placementId: Id;
  readonly name: string;
  readonly unitLoad: UnitLoad;
  /** Left edge from the left upright's face. */
  readonly at: number;
  readonly mirrored: boolean;
  /** Outline across the rack, mm in front of the middle of the pair of beams. */
  readonly rear: number;
  readonly front: number;
  readonly outline: Outline;
  readonly weighed: Weighed;
  readonly trouble: 'overlap' | 'off the end' | null;
}

export interface LevelDrawn {
  /** Null for the floor. */
  readonly levelId: Id | null;
  /** 0 for the floor, 1 for the lowest beam level. */
  readonly number: number;
  /** Top of the beam above the floor. */
  readonly height: number;
  readonly beamHeight: number;
  /** Free height above, up to the next beam's underside or the top of the drawing. */
  readonly room: number;
  readonly goods: readonly GoodsDrawn[];
}

export interface BayDrawn {
  readonly bayId: Id;
  readonly name: string;
  readonly entry: number;
  readonly leftUpright: Upright;
  readonly rightUpright: Upright;
  /** Top of everything drawn. */
  readonly height: number;
  /** The floor first, then the beam levels from the lowest up. */
  readonly levels: readonly LevelDrawn[];
}

export interface Upright {
  readonly frameId: Id;
  readonly width: number;
  readonly height: number;
}

type Stand = Standing & Pick<GoodsDrawn, 'rear' | 'front'>;

/** Whether goods stand in one another, along the bay and across the rack; one behind the other they do not. */
const standIn = (a: Stand, b: Stand): boolean => overlaps(a, b) && Math.min(a.front, b.front) - Math.max(a.rear, b.rear) > TOUCH;

/** The same goods stand in many places: their outline is found once for each way round. */
const outlines = new WeakMap<DrawnUnitLoad, { plain?: Outline; mirrored?: Outline }>();

function outlineFor(drawn: DrawnUnitLoad, mirrored: boolean): Outline {
  const known = outlines.get(drawn) ?? {};
  outlines.set(drawn, known);
  return (known[mirrored ? 'mirrored' : 'plain'] ??= outlineOf(drawn.unitLoad, drawn.pallet, mirrored));
}

function goodsDrawn(placements: readonly Placement[], entry: number, { unitLoads }: Libraries): readonly GoodsDrawn[] {
  const standing = placements.map((placement) => {
    const drawn = unitLoads.get(placement.unitLoadId);
    const half = (drawn?.unitLoad.depthMm ?? 0) / 2;
    const { atMm: at, towardsFrontMm } = placement;
    return { placement, drawn, at, width: drawn?.unitLoad.widthMm ?? 0, rear: towardsFrontMm - half, front: towardsFrontMm + half };
  });
  return standing.flatMap((one, i): GoodsDrawn[] => {
    const { placement, drawn, at, width, rear, front } = one;
    if (drawn === undefined) return [];
    const { unitLoad, grossKg, pieces } = drawn;
    const offTheEnd = at < -TOUCH || at + width > entry + TOUCH;
    const overlapping = standing.some((other, j) => i !== j && standIn(one, other));
    return [
      {
        placementId: placement.id,
        name: unitLoad.name,
        unitLoad,
        at,
        mirrored: placement.mirrored,
        rear,
        front,
        outline: outlineFor(drawn, placement.mirrored),
        weighed: { grossKg, pieces },
        trouble: overlapping ? 'overlap' : offTheEnd ? 'off the end' : null,
      },
    ];
  });
}

const tallest = (goods: readonly GoodsDrawn[]): number => Math.max(0, ...goods.map((one) => one.outline.height));

function upright(run: Run, index: number, { frameTypes }: Libraries): Upright {
  const frame = run.frames[index];
  if (frame === undefined) throw new RangeError(`run ${run.id} has no frame ${index}`);
  const type = frameTypes.get(frame.typeId ?? '');
  return { frameId: frame.id, width: type?.uprightWidthMm ?? DRAWN_UPRIGHT, height: frame.heightMm };
}

const beamHeight = (level: Level, { beamTypes }: Libraries): number => beamTypes.get(level.beamTypeId ?? '')?.heightMm ?? DRAWN_BEAM;

interface Kept {
  readonly from: readonly unknown[];
  readonly drawn: BayDrawn;
}
/** Sites are immutable: a bay is drawn anew only when it, one of its frames or the libraries are other values. */
const kept = new WeakMap<Bay, Kept>();

/** A bay of the run as it is drawn; the same object as long as nothing that is drawn of it changed. */
export function bayDrawn(run: Run, bay: Bay, libraries: Libraries, index = run.bays.indexOf(bay)): BayDrawn {
  const from = [libraries, run.frames[index], run.frames[index + 1]];
  const before = kept.get(bay);
  if (before !== undefined && before.from.every((one, i) => one === from[i])) return before.drawn;
  const drawn = draw(run, bay, index, libraries);
  kept.set(bay, { from, drawn });
  return drawn;
}

function draw(run: Run, bay: Bay, index: number, libraries: Libraries): BayDrawn {
  const leftUpright = upright(run, index, libraries);
  const rightUpright = upright(run, index + 1, libraries);
  const rows = [
    { level: null, height: 0, beam: 0, goods: goodsDrawn(bay.onFloor, bay.clearEntryMm, libraries) },
    ...bay.levels.map((level) => ({
      level,
      height: level.heightMm,
      beam: beamHeight(level, libraries),
      goods: goodsDrawn(level.placements, bay.clearEntryMm, libraries),
    })),
  ];
  // Room for any of its goods on top, so that the drawing keeps its size while they are moved about.
  const top = (rows.at(-1)?.height ?? 0) + Math.max(tallest(rows.flatMap((row) => row.goods)), DRAWN_HEADROOM);
  const height = Math.max(top, leftUpright.height, rightUpright.height);
  const levels = rows.map((row, i): LevelDrawn => {
    const above = rows[i + 1];
    const ceiling = above ? above.height - above.beam : height;
    return {
      levelId: row.level?.id ?? null,
      number: i,
      height: row.height,
      beamHeight: row.beam,
      room: Math.max(0, ceiling - row.height),
      goods: row.goods,
    };
  });
  return { bayId: bay.id, name: bay.name, entry: bay.clearEntryMm, leftUpright, rightUpright, height, levels };
}
