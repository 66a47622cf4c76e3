/** Where a unit load would stand if it were let go at a point of the bay's drawing. */
import type { Id } from '../../src-core/site/site';
import type { BayDrawn, GoodsDrawn, LevelDrawn } from './bay-model';
import { bandOf, levelAt, type BayScale } from './bay-scale';
import type { Gaps } from './gaps';
import { catchingPlaces, snap, type Opening, type Place } from './snap';

/** How near a catching place pulls, px. */
const REACH = 9;
/** Places to drop on are pressed like buttons: their middles stand at least this far apart, px. */
const APART = 26;

export interface Drop {
  readonly level: LevelDrawn;
  readonly place: Place;
}

export interface Carrying {
  readonly bay: BayDrawn;
  readonly scale: BayScale;
  /** Gaps asked for at a level, by its height. */
  readonly gapsAt: (height: number) => Gaps;
  readonly placementId: Id;
  /** Others that are moved along with it, and so are no neighbours. */
  readonly along?: readonly Id[];
  readonly width: number;
  /** Its outline across the rack, which it keeps. */
  readonly rear: number;
  readonly front: number;
}

const openingOf = ({ bay, gapsAt, placementId, along = [], width, rear, front }: Carrying, level: LevelDrawn): Opening => ({
  entry: bay.entry,
  gaps: gapsAt(level.height),
  width,
  // What stands wholly in front of or behind it is no neighbour along the level.
  others: level.goods
    .filter((goods) => goods.placementId !== placementId && !along.includes(goods.placementId) && goods.rear < front && goods.front > rear)
    .map((goods) => ({ at: goods.at, width: goods.unitLoad.widthMm })),
});

/** `px` is where the left edge would be, `py` the pointer; `freely` keeps it from catching. */
export function dropAt(carrying: Carrying, px: number, py: number, freely = false): Drop | null {
  const level = levelAt(carrying.bay, carrying.scale, py);
  if (level === null) return null;
  const reach = freely ? 0 : REACH / carrying.scale.rate;
  return { level, place: snap(carrying.scale.mmAt(px), openingOf(carrying, level), reach) };
}

export interface DropTarget extends Drop {
  /** Middle of the unit load if it stood there, and the beam's top, px. */
  readonly x: number;
  readonly y: number;
}

/** The places of every level to click on; of two that stand too close the left one is kept. */
export function dropTargets(carrying: Carrying): readonly DropTarget[] {
  const { bay, scale, width } = carrying;
  return bay.levels.flatMap((level) => {
    let last = -Infinity;
    return catchingPlaces(openingOf(carrying, level)).flatMap((place): DropTarget[] => {
      const x = scale.x(place.at + width / 2);
      if (x - last < APART) return [];
      last = x;
      return [{ level, place, x, y: Math.min(scale.y(level.height), bandOf(level, scale).bottom) }];
    });
  });
}

export const findGoods = (bay: BayDrawn, placementId: Id | null): GoodsDrawn | null =>
  bay.levels.flatMap((level) => level.goods).find((goods) => goods.placementId === placementId) ?? null;
