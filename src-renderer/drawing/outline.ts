/**
 * The outline of a unit load as it is drawn: goods on their pallet, seen from the aisle.
 *
 * Lengths in mm; x to the right from the unit load's left edge, y upwards from the beam. A stepped
 * or sloped shape that is stated by masses or intensities has no heights of its own: its heaviest
 * part is drawn as high as the unit load, the others in proportion. Drawing only: no check reads it.
 */
import type { BearingShape, Pallet, Slope, UnitLoad } from '../../src-core/site/site';

export interface Point {
  readonly x: number;
  readonly y: number;
}
export type Polygon = readonly Point[];

export interface Outline {
  readonly goods: readonly Polygon[];
  readonly pallet: readonly Polygon[];
  readonly width: number;
  readonly height: number;
}

/** Height at which bearers and feet are drawn, mm; the site does not state one. */
const BEARER_HEIGHT = 90;
/** Width at which a foot is drawn, mm. */
const FOOT_WIDTH = 60;

const box = (left: number, right: number, bottom: number, top: number): Polygon => [
  { x: left, y: bottom },
  { x: right, y: bottom },
  { x: right, y: top },
  { x: left, y: top },
];

/** Heights at the left and right end of a sloping pile whose higher end is `height` high. */
function slopeHeights(slope: Slope, width: number, height: number): readonly [number, number] {
  if (slope.by === 'heights') return [slope.leftMm, slope.rightMm];
  const [left, right] = slopeEnds(slope, width);
  const highest = Math.max(left, right);
  return highest > 0 ? [(height * left) / highest, (height * right) / highest] : [height, height];
}

function slopeEnds(slope: Exclude<Slope, { by: 'heights' }>, width: number): readonly [number, number] {
  if (slope.by === 'intensities') return [slope.leftKgPerM, slope.rightKgPerM];
  if (slope.by === 'ratio') return [1, Math.max(0, slope.rightOverLeft)];
  const other = Math.max(0, slope.endKgPerM + (slope.changeKgPerM2 * width) / 1000);
  return slope.end === 'left' ? [slope.endKgPerM, other] : [other, slope.endKgPerM];
}

function goodsPolygons(shape: BearingShape, width: number, height: number): readonly Polygon[] {
  switch (shape.kind) {
    case 'even':
      return [box(0, width, 0, height)];
    case 'stepped': {
      const intensities = shape.columns.map((column) => ('massKg' in column ? column.massKg / column.widthMm : 0));
      const most = Math.max(...intensities, 0);
      let left = 0;
      return shape.columns.map((column, i) => {
        const right = left + column.widthMm;
        const share = most > 0 ? (intensities[i] ?? 0) / most : 1;
        const polygon = box(left, right, 0, 'massKg' in column ? height * share : column.heightMm);
        left = right;
        return polygon;
      });
    }
    case 'sloped': {
      const [left, right] = slopeHeights(shape.slope, width, height);
      const corners = [
        { x: 0, y: 0 },
        { x: width, y: 0 },
        { x: width, y: right },
        { x: 0, y: left },
      ];
      return [corners];
    }
    case 'profile':
      return [[{ x: 0, y: 0 }, { x: width, y: 0 }, ...shape.points.toReversed().map((point) => ({ x: point.xMm, y: point.heightMm }))]];
    case 'bearers': {
      const foot = Math.min(BEARER_HEIGHT, height / 3);
      const bearers = shape.bearers.map((b) => box(b.centreMm - b.widthMm / 2, b.centreMm + b.widthMm / 2, 0, foot));
      return [...bearers, box(0, width, foot, height)];
    }
    case 'feet': {
      const foot = Math.min(BEARER_HEIGHT, height / 3);
      const feet = shape.feet.map(({ xMm }) => [
        { x: xMm, y: 0 },
        { x: Math.min(width, xMm + FOOT_WIDTH / 2), y: foot },
        { x: Math.max(0, xMm - FOOT_WIDTH / 2), y: foot },
      ]);
      return [...feet, box(0, width, foot, height)];
    }
  }
}

/** Deck board on blocks or runners as they are seen from the aisle, in the middle of the unit load. */
function palletPolygons(pallet: Pallet, face: UnitLoad['palletFace'], width: number): readonly Polygon[] {
  const along = face === 'length' ? pallet.lengthMm : pallet.widthMm;
  const left = (width - along) / 2;
  const deck = box(left, left + along, pallet.heightMm * 0.7, pallet.heightMm);
  const runnersSeenOnEnd = pallet.boards === (face === 'length' ? 'along-width' : 'along-length');
  if (!runnersSeenOnEnd || pallet.runners.length === 0) return [deck, box(left, left + along, 0, pallet.heightMm * 0.7)];
  const runners = pallet.runners.map(({ centreMm, widthMm }) => {
    const centre = left + centreMm;
    return box(centre - widthMm / 2, centre + widthMm / 2, 0, pallet.heightMm * 0.7);
  });
  return [deck, ...runners];
}

const moved = (polygon: Polygon, change: (point: Point) => Point): Polygon => polygon.map(change);

/** Outline of a unit load, standing on y = 0 with its left edge at x = 0. */
export function outlineOf(unitLoad: UnitLoad, pallet: Pallet | null, mirrored: boolean): Outline {
  const { widthMm: width, heightMm, leanMm } = unitLoad;
  const palletHeight = pallet?.heightMm ?? 0;
  const height = Math.max(heightMm - palletHeight, 1);
  const turn = (point: Point): Point => (mirrored ? { x: width - point.x, y: point.y } : point);
  const goods = goodsPolygons(unitLoad.bearing, width, height).map((polygon) =>
    moved(polygon, ({ x, y }) => turn({ x: x + (leanMm * y) / height, y: y + palletHeight })),
  );
  const underneath = pallet ? palletPolygons(pallet, unitLoad.palletFace, width).map((polygon) => moved(polygon, turn)) : [];
  const top = Math.max(heightMm, ...goods.flat().map((point) => point.y));
  return { goods, pallet: underneath, width, height: top };
}
