/**
 * The load of a level shown whole or in its parts, each with its own resultant. A diagram or its
 * resultants are drawn, never both as loads: the resultant stands for the diagram, not beside it.
 */
import type { StandingLoad } from '../../src-core/audit/context';
import { reduce } from '../../src-core/statics/reduction';
import type { BeamLoad, LineLoad } from '../../src-core/statics/load';
import { massWeighing } from '../../src-core/units/quantity';
import type { BeamView } from './diagram';
import type { Point } from './outline';
import { summed } from './skyline';

export type Division = 'whole' | 'unit loads' | 'pieces';

export interface Part {
  readonly key: string;
  readonly label: string;
  readonly massKg: number;
  /** Where its resultant acts, mm from the left support. */
  readonly at: number;
  /** Its diagram, in kg/mm over mm; empty for a point load. */
  readonly area: readonly Point[];
}

export interface Stretch {
  readonly id: string;
  readonly name: string;
  readonly load: BeamLoad;
}

/** The goods' loads on what is shown, x from the left support; "both" beams give the pair. */
export function stretchesOf(goods: readonly StandingLoad[], view: BeamView, supportToFace: number): readonly Stretch[] {
  return goods.flatMap(({ placement, goods: work, fromMm, toMm, frontShare }): Stretch[] => {
    const { pieces } = work;
    if (pieces === null) return [];
    const share = view === 'front' ? (frontShare ?? 0.5) : view === 'rear' ? 1 - (frontShare ?? 0.5) : 1;
    const place = (x: number) => supportToFace + (placement.mirrored ? toMm - x : fromMm + x);
    const lines = pieces.lines.map((line) =>
      placement.mirrored
        ? { from: place(line.to), to: place(line.from), wFrom: line.wTo * share, wTo: line.wFrom * share }
        : { from: place(line.from), to: place(line.to), wFrom: line.wFrom * share, wTo: line.wTo * share },
    );
    const points = pieces.points.map((point) => ({ at: place(point.at), force: point.force * share }));
    return [{ id: placement.id, name: work.unitLoad.name, load: { lines, points } }];
  });
}

/** A straight piece as the rectangle under it and the triangle on top; either may be missing. */
function rectangleAndTriangle({
  from,
  to,
  wFrom,
  wTo,
}: LineLoad): readonly { readonly name: string; readonly line: LineLoad; readonly base: number }[] {
  const low = Math.min(wFrom, wTo);
  const rectangle = { name: 'rectangle', line: { from, to, wFrom: low, wTo: low }, base: 0 };
  const triangle = { name: 'triangle', line: { from, to, wFrom: wFrom - low, wTo: wTo - low }, base: low };
  return [...(low > 0 ? [rectangle] : []), ...(wFrom !== wTo ? [triangle] : [])];
}

function areaOf({ from, to, wFrom, wTo }: LineLoad, base: number): readonly Point[] {
  const kg = massWeighing;
  const corners = [
    { x: from, y: kg(base) },
    { x: from, y: kg(base + wFrom) },
    { x: to, y: kg(base + wTo) },
    { x: to, y: kg(base) },
  ];
  // A triangle has one corner twice.
  return corners.filter((corner, i) => i === 0 || corner.x !== corners[i - 1]?.x || corner.y !== corners[i - 1]?.y);
}

function part(key: string, label: string, load: BeamLoad, area: readonly Point[]): Part[] {
  const { resultant, centroid } = reduce(load);
  return centroid === null ? [] : [{ key, label, massKg: massWeighing(resultant), at: centroid, area }];
}

const topOf = (lines: readonly LineLoad[]): readonly Point[] => summed(lines).flatMap((line) => areaOf(line, 0));

export function partsOf(stretches: readonly Stretch[], division: Division): readonly Part[] {
  if (division === 'whole') {
    const load = { lines: stretches.flatMap(({ load }) => load.lines), points: stretches.flatMap(({ load }) => load.points) };
    return part('whole', 'All goods', load, topOf(load.lines));
  }
  if (division === 'unit loads') return stretches.flatMap(({ id, name, load }) => part(id, name, load, topOf(load.lines)));
  return stretches.flatMap(({ id, name, load }) => [
    ...summed(load.lines).flatMap((line, i) =>
      rectangleAndTriangle(line).flatMap((piece) =>
        part(`${id} ${i} ${piece.name}`, `${name}, ${piece.name}`, { lines: [piece.line], points: [] }, areaOf(piece.line, piece.base)),
      ),
    ),
    ...load.points.flatMap((point, i) => part(`${id} point ${i}`, `${name}, foot`, { lines: [], points: [point] }, [])),
  ]);
}
