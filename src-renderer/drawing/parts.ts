/**
 * The load of a level shown whole or in its parts, each with its own resultant. A diagram or its
 * resultants are drawn, never both as loads: the resultant stands for the diagram, not beside it.
 */
import type { StandingLoad } from '../../src-core/audit/context';
import { pairLoads } from '../../src-core/goods/pair';
import { partsOf as reduceInParts, reduce, type Reduction } from '../../src-core/statics/reduction';
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

/** One unit load's load on what is shown. */
export interface Stretch {
  readonly id: string;
  readonly name: string;
  /** Its left edge, mm from the left support. */
  readonly at: number;
  /** x from its left edge. */
  readonly load: BeamLoad;
}

/** The goods' loads on what is shown; "both" beams give the pair. */
export function stretchesOf(goods: readonly StandingLoad[], view: BeamView, supportToFace: number): readonly Stretch[] {
  return goods.flatMap(({ placement, goods: work, fromMm, frontShare }): Stretch[] => {
    if (work.pieces === null || frontShare === null) return [];
    const { name, widthMm: width } = work.unitLoad;
    const one = { id: placement.id, load: work.pieces, widthMm: width, at: 0, mirrored: placement.mirrored, frontShare };
    const { whole, front, rear } = pairLoads([one]);
    return [{ id: placement.id, name, at: supportToFace + fromMm, load: { pair: whole, both: whole, front, rear }[view] }];
  });
}

function areaOf({ from, to, wFrom, wTo }: LineLoad, at: number, base = 0): readonly Point[] {
  const [low, left, right] = [base, base + wFrom, base + wTo].map(massWeighing) as [number, number, number];
  const corners = [
    { x: at + from, y: low },
    { x: at + from, y: left },
    { x: at + to, y: right },
    { x: at + to, y: low },
  ];
  // A triangle has one corner twice.
  return corners.filter((corner, i) => i === 0 || corner.x !== corners[i - 1]?.x || corner.y !== corners[i - 1]?.y);
}

const topOf = ({ at, load }: Stretch): readonly Point[] => summed(load.lines).flatMap((line) => areaOf(line, at));

function part(key: string, label: string, { resultant, centroid }: Reduction, at: number, area: readonly Point[]): Part[] {
  return centroid === null ? [] : [{ key, label, massKg: massWeighing(resultant), at: at + centroid, area }];
}

const shifted = ({ at, load }: Stretch): BeamLoad => ({
  lines: load.lines.map((line) => ({ ...line, from: at + line.from, to: at + line.to })),
  points: load.points.map((point) => ({ ...point, at: at + point.at })),
});

/** A triangle stands on the rectangle of its piece, where there is one. */
function piecesOf(stretch: Stretch): readonly Part[] {
  const { id, name, at, load } = stretch;
  const lines = summed(load.lines).flatMap((line, i) =>
    reduceInParts({ lines: [line], points: [] }).flatMap((piece) => {
      const base = piece.shape === 'triangle' ? Math.min(line.wFrom, line.wTo) : 0;
      return part(`${id} ${i} ${piece.shape}`, `${name}, ${piece.shape}`, piece, at, areaOf(piece, at, base));
    }),
  );
  const points = reduceInParts({ lines: [], points: load.points });
  return [...lines, ...points.flatMap((point, i) => part(`${id} point ${i}`, `${name}, foot`, point, at, []))];
}

export function partsOf(stretches: readonly Stretch[], division: Division): readonly Part[] {
  if (division === 'pieces') return stretches.flatMap(piecesOf);
  if (division === 'unit loads') {
    return stretches.flatMap((stretch) => part(stretch.id, stretch.name, reduce(stretch.load), stretch.at, topOf(stretch)));
  }
  const loads = stretches.map(shifted);
  const whole = { lines: loads.flatMap(({ lines }) => lines), points: loads.flatMap(({ points }) => points) };
  return part('whole', 'All goods', reduce(whole), 0, stretches.flatMap(topOf));
}

/** Feet and other point loads, for the arrows that stand for them in the intensity diagram. */
export function pointsOf(stretches: readonly Stretch[]): readonly { readonly at: number; readonly massKg: number }[] {
  return stretches.flatMap(({ at, load }) => load.points.map((point) => ({ at: at + point.at, massKg: massWeighing(point.force) })));
}
