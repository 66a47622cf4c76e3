/** The intensity that goods bring on the beam by the way they stand, scaled to their mass. */
import type { BeamLoad, LineLoad } from '../statics/load';
import { STANDARD_GRAVITY } from '../units/quantity';
import { FITS_MM } from './across';
import { bearersOf, feetOf } from './bearers';
import type { BearingShape, Slope, SteppedColumn } from './shapes';

export interface GoodsOnBeam {
  readonly widthMm: number;
  /** Across the rack; only shapes given by densities need it. */
  readonly depthMm?: number;
  /** Mass to which the shape is scaled; null = the shape's own figures must give it. */
  readonly goodsKg: number | null;
  readonly bearing: BearingShape;
}

export type GoodsProblem =
  'width' | 'mass-negative' | 'mass-missing' | 'columns' | 'slope' | 'profile' | 'density' | 'empty-shape' | 'bearers' | 'feet' | 'shares';

export type GoodsLaid =
  | {
      readonly ok: true;
      /** N, x in mm from the goods' left edge. */
      readonly pieces: BeamLoad;
      readonly massKg: number;
      /** What the shape's own masses, densities or intensities add up to; null where it has none. */
      readonly foundKg: number | null;
    }
  | { readonly ok: false; readonly problem: GoodsProblem; readonly message: string };

const wrong = (problem: GoodsProblem, message: string) => ({ ok: false, problem, message }) as const;

/** A shape before it is scaled: intensities in kg per mm if `absolute`, else only in proportion. */
interface Outline {
  readonly ok: true;
  readonly lines: readonly LineLoad[];
  readonly absolute: boolean;
}
type Shaped = Outline | ReturnType<typeof wrong>;

const KG_PER_MM = 1e-3;
const KG_PER_MM3 = 1e-9;

/**
 * Lays goods out along the beam. Pieces always integrate to `massKg`: a given mass scales the shape, and
 * what the shape's own figures come to is told beside it as `foundKg`. Stretches without load are left out.
 * @returns pieces in N and N/mm, or what is wrong with the shape, where, and how to mend it
 * Source: statics; masses weigh 9.80665 N a kg.
 * @example 800 kg even over 800 mm → one piece of 9.80665 N/mm
 */
export function goodsIntensity(goods: GoodsOnBeam): GoodsLaid {
  const { widthMm: width, goodsKg, bearing } = goods;
  if (!(width > 0 && width < Infinity)) return wrong('width', `The goods must be wider than 0 mm; their width is ${width} mm.`);
  if (goodsKg !== null && !(goodsKg >= 0 && goodsKg < Infinity))
    return wrong('mass-negative', `The mass of the goods must be 0 kg or more; it is ${goodsKg} kg.`);
  if (bearing.kind === 'bearers' || bearing.kind === 'feet') {
    const found = bearing.kind === 'bearers' ? bearersOf(bearing.bearers, width) : feetOf(bearing.feet, width);
    if (!found.ok) return found;
    if (goodsKg === null) return MASS_MISSING;
    const weight = goodsKg * STANDARD_GRAVITY;
    const lines = found.load.lines.map((line) => ({ ...line, wFrom: line.wFrom * weight, wTo: line.wTo * weight }));
    return {
      ok: true,
      pieces: { lines, points: found.load.points.map(({ at, force }) => ({ at, force: force * weight })) },
      massKg: goodsKg,
      foundKg: null,
    };
  }
  const depth = goods.depthMm !== undefined && goods.depthMm > 0 ? goods.depthMm : null;
  const shape = outlineOf(bearing, width, depth);
  if (!shape.ok) return shape;
  const area = shape.lines.reduce((sum, { from, to, wFrom, wTo }) => sum + ((to - from) * (wFrom + wTo)) / 2, 0);
  if (!(area > 0))
    return wrong('empty-shape', 'The shape is flat: it holds no goods anywhere. Give at least one place a height or a mass.');
  if (!(area < Infinity)) return wrong('empty-shape', 'The figures of the shape are too great to add up. Check their units.');
  const foundKg = shape.absolute ? area : null;
  const massKg = goodsKg ?? foundKg;
  if (massKg === null) return MASS_MISSING;
  const scale = (massKg / area) * STANDARD_GRAVITY;
  const lines = shape.lines
    .filter(({ wFrom, wTo }) => wFrom > 0 || wTo > 0)
    .map(({ from, to, wFrom, wTo }) => ({ from, to, wFrom: wFrom * scale, wTo: wTo * scale }));
  return { ok: true, pieces: { lines, points: [] }, massKg, foundKg };
}

const MASS_MISSING = wrong(
  'mass-missing',
  'The mass of the goods is not known. Weigh them, or give a density or intensities that find it.',
);

function outlineOf(bearing: Exclude<BearingShape, { kind: 'bearers' | 'feet' }>, width: number, depth: number | null): Shaped {
  switch (bearing.kind) {
    case 'even':
      return { ok: true, lines: [{ from: 0, to: width, wFrom: 1, wTo: 1 }], absolute: false };
    case 'stepped':
      return stepped(bearing.columns, width, depth);
    case 'sloped':
      return sloped(bearing.slope, width);
    case 'profile':
      return profile(bearing.points, bearing.densityKgPerM3, width, depth);
  }
}

function stepped(columns: readonly SteppedColumn[], width: number, depth: number | null): Shaped {
  if (columns.length === 0) return wrong('columns', 'There is no column. Add at least one, from left to right.');
  const total = columns.reduce((sum, { widthMm }) => sum + widthMm, 0);
  const lines: LineLoad[] = [];
  let edge = 0;
  for (const [i, column] of columns.entries()) {
    if (!(column.widthMm > 0)) return wrong('columns', `Column ${i + 1} must be wider than 0 mm; it is ${column.widthMm} mm wide.`);
    let kg: number;
    if ('massKg' in column) kg = column.massKg;
    else if (depth === null)
      return wrong('density', 'A density needs the depth of the goods. Enter their depth, or give each column its mass.');
    else if (!(column.densityKgPerM3 > 0))
      return wrong('density', `The density of column ${i + 1} must be above 0 kg/m³; it is ${column.densityKgPerM3}.`);
    else kg = column.widthMm * column.heightMm * depth * column.densityKgPerM3 * KG_PER_MM3;
    if (!(kg >= 0 && kg < Infinity)) return wrong('columns', `Column ${i + 1} must hold 0 kg or more; it comes to ${kg} kg.`);
    // The last column ends where the goods end, so that the rounding of the sum leaves no gap.
    const to = i === columns.length - 1 ? width : edge + column.widthMm;
    const w = kg / (to - edge);
    if (to > edge) lines.push({ from: edge, to, wFrom: w, wTo: w });
    edge = to;
  }
  if (Math.abs(total - width) > FITS_MM)
    return wrong('columns', `The columns are ${total} mm wide together, the goods ${width} mm. Make the columns fill the width.`);
  return { ok: true, lines, absolute: true };
}

function sloped(slope: Slope, width: number): Shaped {
  let left: number;
  let right: number;
  let absolute = false;
  switch (slope.by) {
    case 'intensities':
      left = slope.leftKgPerM * KG_PER_MM;
      right = slope.rightKgPerM * KG_PER_MM;
      absolute = true;
      break;
    case 'heights':
      left = slope.leftMm;
      right = slope.rightMm;
      break;
    case 'ratio':
      left = 1;
      right = slope.rightOverLeft;
      break;
    case 'end-and-slope': {
      const here = slope.endKgPerM * KG_PER_MM;
      const there = here + slope.changeKgPerM2 * KG_PER_MM * KG_PER_MM * width;
      [left, right] = slope.end === 'left' ? [here, there] : [there, here];
      absolute = true;
    }
  }
  if (!(left >= 0 && left < Infinity)) return badSlope('left', left, absolute);
  if (!(right >= 0 && right < Infinity)) return badSlope('right', right, absolute);
  return { ok: true, lines: [{ from: 0, to: width, wFrom: left, wTo: right }], absolute };
}

/** @param value kg per mm if `absolute` */
function badSlope(end: 'left' | 'right', value: number, absolute: boolean): Shaped {
  if (!Number.isFinite(value)) return wrong('slope', `The ${end} end of the slope is not a number. Enter its figures again.`);
  const shown = absolute ? ` It comes to ${Number((value / KG_PER_MM).toPrecision(6))} kg/m.` : '';
  return wrong('slope', `The ${end} end of the slope falls below zero.${shown} Raise that end, or make the slope gentler.`);
}

function profile(
  points: readonly { xMm: number; heightMm: number }[],
  density: number | null,
  width: number,
  depth: number | null,
): Shaped {
  const first = points[0];
  const last = points.at(-1);
  if (first === undefined || last === undefined || points.length < 2)
    return wrong('profile', 'An outline needs at least two points: one at the left edge and one at the right.');
  if (Math.abs(first.xMm) > FITS_MM || Math.abs(last.xMm - width) > FITS_MM)
    return wrong('profile', `The outline must run from 0 to ${width} mm; it runs from ${first.xMm} to ${last.xMm} mm.`);
  if (density !== null && !(density > 0)) return wrong('density', `The density must be above 0 kg/m³; it is ${density}.`);
  if (density !== null && depth === null)
    return wrong('density', 'A density needs the depth of the goods. Enter their depth, or their mass.');
  const scale = density === null ? 1 : density * (depth ?? 0) * KG_PER_MM3;
  const lines: LineLoad[] = [];
  for (const [i, point] of points.entries()) {
    if (!(point.heightMm >= 0 && point.heightMm < Infinity))
      return wrong('profile', `Point ${i + 1} of the outline must be 0 mm high or more; it is ${point.heightMm} mm.`);
    const before = points[i - 1];
    if (before === undefined) continue;
    if (!(point.xMm >= before.xMm))
      return wrong(
        'profile',
        `Point ${i + 1} of the outline stands left of the point before it (${point.xMm} after ${before.xMm} mm). List points from left to right.`,
      );
    // Two points at one place are a step in the outline.
    const from = i === 1 ? 0 : before.xMm;
    const to = i === points.length - 1 ? width : point.xMm;
    if (to > from) lines.push({ from, to, wFrom: before.heightMm * scale, wTo: point.heightMm * scale });
  }
  return { ok: true, lines, absolute: density !== null };
}
