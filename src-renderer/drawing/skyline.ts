/**
 * The load skyline: a unit load's intensity as shapes standing on the beam, in px.
 * Heights are in proportion to the intensity (N/mm), at one rate for all that is compared.
 */
import type { BeamLoad, LineLoad } from '../../src-core/statics/load';
import type { BayDrawn, GoodsDrawn } from './bay-model';
import type { Point } from './outline';

export interface Skyline {
  /** One polygon a stretch under load. */
  readonly areas: readonly (readonly Point[])[];
  /** Point loads, each as an arrow's foot and height. */
  readonly arrows: readonly { readonly x: number; readonly height: number }[];
}

/** A point load is drawn as high as if it were spread over this length, mm. */
const POINT_SPREAD = 150;

const along = (line: LineLoad, x: number): number => line.wFrom + ((line.wTo - line.wFrom) * (x - line.from)) / (line.to - line.from);

/** Pieces that add where they lie over one another, as pieces side by side from left to right. */
export function summed(lines: readonly LineLoad[]): readonly LineLoad[] {
  const breaks = [...new Set(lines.flatMap((line) => [line.from, line.to]))].sort((a, b) => a - b);
  return breaks.slice(1).flatMap((to, i): LineLoad[] => {
    const from = breaks[i] ?? to;
    const over = lines.filter((line) => line.from <= from && line.to >= to);
    if (over.length === 0) return [];
    const sum = (x: number) => over.reduce((total, line) => total + along(line, x), 0);
    return [{ from, to, wFrom: sum(from), wTo: sum(to) }];
  });
}

/** Greatest intensity of a load, N/mm, a point load taken as spread. */
export function peakIntensity(load: BeamLoad | null): number {
  if (load === null) return 0;
  const points = load.points.map((point) => point.force / POINT_SPREAD);
  return Math.max(0, ...summed(load.lines).flatMap((line) => [line.wFrom, line.wTo]), ...points);
}

/** Greatest intensity in a bay, for a common rate of its skylines. */
export function peakOfBay(bay: BayDrawn): number {
  return Math.max(0, ...bay.levels.flatMap((level) => level.goods.map((goods) => peakIntensity(goods.weighed.pieces))));
}

export interface SkylinePlace {
  /** px of a position in mm from the left upright's face. */
  readonly x: (mm: number) => number;
  /** px of the beam's top. */
  readonly base: number;
  /** px per N/mm. */
  readonly rate: number;
}

/** The skyline of one unit load where it stands; empty where its load is not known. */
export function skylineOf(goods: GoodsDrawn, { x, base, rate }: SkylinePlace): Skyline {
  const load = goods.weighed.pieces;
  if (load === null) return { areas: [], arrows: [] };
  const { at, mirrored } = goods;
  const place = (local: number) => x(at + (mirrored ? goods.unitLoad.widthMm - local : local));
  const areas: Point[][] = [];
  let end = NaN;
  for (const line of summed(load.lines)) {
    const top = [
      { x: place(line.from), y: base - line.wFrom * rate },
      { x: place(line.to), y: base - line.wTo * rate },
    ];
    const area = areas.at(-1);
    // Its last point is the foot of the stretch so far; a stretch that goes on moves it along.
    if (area && line.from === end) area.splice(-1, 1, ...top, { x: place(line.to), y: base });
    else areas.push([{ x: place(line.from), y: base }, ...top, { x: place(line.to), y: base }]);
    end = line.to;
  }
  const arrows = load.points.map((point) => ({ x: place(point.at), height: (point.force / POINT_SPREAD) * rate }));
  return { areas, arrows };
}
