/**
 * The load skyline: a unit load's intensity as shapes standing on the beam, in px.
 * Heights are in proportion to the intensity (N/mm), at one rate for all that is compared.
 */
import { pairLoads } from '../../src-core/goods/pair';
import type { BeamLoad, LineLoad } from '../../src-core/statics/load';
import { cutIntoPieces } from '../../src-core/statics/pieces';
import { weightOf } from '../../src-core/units/quantity';
import type { BayDrawn, GoodsDrawn } from './bay-model';
import type { Point } from './outline';
import { clamp } from './scale';

export interface Skyline {
  /** One polygon a stretch under load. */
  readonly areas: readonly (readonly Point[])[];
  /** Point loads, each as an arrow's foot and height. */
  readonly arrows: readonly { readonly x: number; readonly height: number }[];
  /** Middles of the stretches that are cut off, to be marked as such. */
  readonly cuts: readonly number[];
}

/** A point load is drawn as high as if it were spread over this length, mm. */
const POINT_SPREAD = 150;

/** Straight pieces cut where they begin and end, side by side from left to right; what lies over one another adds. */
export function summed(lines: readonly LineLoad[]): readonly LineLoad[] {
  const end = Math.max(0, ...lines.map((line) => line.to));
  if (end === 0) return [];
  const { count, x, wFrom, wTo } = cutIntoPieces({ lines, points: [] }, end);
  const pieces = Array.from({ length: count }, (_, i) => ({ from: x[i] ?? 0, to: x[i + 1] ?? 0, wFrom: wFrom[i] ?? 0, wTo: wTo[i] ?? 0 }));
  return pieces.filter((line) => line.wFrom + line.wTo > 0);
}

/** A unit load's load as it stands, turned left for right where it is mirrored; x from its left edge. */
const asStanding = (load: BeamLoad, widthMm: number, mirrored: boolean): BeamLoad =>
  pairLoads([{ id: '', load, widthMm, at: 0, mirrored, frontShare: 0.5 }]).whole;

/** Every unit load of the library stands in many places, and none of them changes it. */
const peaks = new WeakMap<BeamLoad, number>();

/** Greatest intensity of a load, N/mm, a point load taken as spread. */
export function peakIntensity(load: BeamLoad | null): number {
  if (load === null) return 0;
  const peak = peaks.get(load) ?? peakOf(load);
  peaks.set(load, peak);
  return peak;
}

function peakOf(load: BeamLoad): number {
  const points = load.points.map((point) => point.force / POINT_SPREAD);
  return Math.max(0, ...summed(load.lines).flatMap((line) => [line.wFrom, line.wTo]), ...points);
}

/** Share of a level's room that goods of the greatest mean intensity fill, at least and at most; peaks rise above it. */
const FILLED = { least: 0.36, most: 0.6 };
/** Share of the room at which a peak is cut off, so that narrow feet do not flatten all the rest. */
export const CUT = 0.94;

const meanIntensity = (goods: GoodsDrawn): number => weightOf(goods.weighed.grossKg ?? 0) / goods.unitLoad.widthMm;

/** What of a bay the rate of its skylines goes by: its lowest level's room in mm, greatest mean and peak intensity in N/mm. */
interface Greatest {
  readonly room: number;
  readonly mean: number;
  readonly peak: number;
}
/** A drawn bay is never changed, and most bays of a run stay the same from edit to edit. */
const greatest = new WeakMap<BayDrawn, Greatest>();

function greatestOf(bay: BayDrawn): Greatest {
  const known = greatest.get(bay);
  if (known !== undefined) return known;
  const beams = bay.levels.filter((level) => level.levelId !== null);
  const goods = beams.flatMap((level) => level.goods);
  const found = {
    room: Math.min(...beams.map((level) => level.room)),
    mean: Math.max(0, ...goods.map(meanIntensity)),
    peak: Math.max(0, ...goods.map((one) => peakIntensity(one.weighed.pieces))),
  };
  greatest.set(bay, found);
  return found;
}

/**
 * px per N/mm for the skylines of these bays, one rate for all so that they compare: as high as the
 * lowest level's room allows.
 * @param scale px per mm of the drawing
 */
export function skylineRate(bays: readonly BayDrawn[], scale: number): number {
  let [room, mean, peak] = [Infinity, 0, 0];
  for (const bay of bays) {
    const own = greatestOf(bay);
    room = Math.min(room, own.room);
    mean = Math.max(mean, own.mean);
    peak = Math.max(peak, own.peak);
  }
  if (!Number.isFinite(room) || peak === 0) return 0;
  return room * scale * clamp(CUT / peak, FILLED.least / mean, FILLED.most / mean);
}

export interface SkylinePlace {
  /** px of a position in mm from the left upright's face. */
  readonly x: (mm: number) => number;
  /** px of the beam's top. */
  readonly base: number;
  /** px per N/mm. */
  readonly rate: number;
  /** px above the beam at which peaks are cut off. */
  readonly cut: number;
}

/** The skyline of one unit load where it stands; empty where its load is not known. */
export function skylineOf(goods: GoodsDrawn, { x, base, rate, cut }: SkylinePlace): Skyline {
  const { pieces } = goods.weighed;
  if (pieces === null) return { areas: [], arrows: [], cuts: [] };
  const load = asStanding(pieces, goods.unitLoad.widthMm, goods.mirrored);
  const place = (local: number) => x(goods.at + local);
  const top = (w: number) => base - Math.min(cut, w * rate);
  const areas: Point[][] = [];
  const cuts: number[] = [];
  let end = NaN;
  for (const line of summed(load.lines)) {
    const from = place(line.from);
    const to = place(line.to);
    const edge = [
      { x: from, y: top(line.wFrom) },
      { x: to, y: top(line.wTo) },
    ];
    if (Math.max(line.wFrom, line.wTo) * rate > cut + 0.01) cuts.push((from + to) / 2);
    const area = areas.at(-1);
    // Its last point is the foot of the stretch so far; a stretch that goes on moves it along.
    if (area && line.from === end) area.splice(-1, 1, ...edge, { x: to, y: base });
    else areas.push([{ x: from, y: base }, ...edge, { x: to, y: base }]);
    end = line.to;
  }
  const arrows = load.points.map((point) => ({ x: place(point.at), height: Math.min(cut, (point.force / POINT_SPREAD) * rate) }));
  return { areas, arrows, cuts };
}
