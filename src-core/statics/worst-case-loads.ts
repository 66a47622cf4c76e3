/** Unit loads on one beam that may each stand a little off their marks. Units and signs as in beam.ts. */
import type { Beam } from './beam';
import type { BeamLoad } from './load';

/** One unit load on one beam, as stated. */
export interface LooseLoad {
  /** N on this beam as stated, x in mm from the unit load's own left edge, within its width. */
  readonly load: BeamLoad;
  readonly width: number;
  /** Its left edge as stated, mm from the left support. */
  readonly at: number;
  /** What its weight on this beam may be multiplied by, 0 or more. */
  readonly factor: number;
}

export interface LooseBeam extends Beam {
  /** Between these no unit load may leave, mm from the left support: the uprights, or the beam's ends. */
  readonly from: number;
  readonly to: number;
  /** Each unit load lands within ± this of its mark, mm. */
  readonly tolerance: number;
}

/** The beam's load in an arrangement, with every weight by its factor. */
export function arrangedLoad(loads: readonly LooseLoad[], shifts: readonly number[], span: number): BeamLoad {
  const inside = (x: number) => Math.min(Math.max(x, 0), span);
  return {
    lines: loads.flatMap(({ load, at, factor }, i) => {
      const edge = at + (shifts[i] as number);
      return load.lines
        .map(({ from, to, wFrom, wTo }) => ({
          from: inside(edge + from),
          to: inside(edge + to),
          wFrom: wFrom * factor,
          wTo: wTo * factor,
        }))
        .filter(({ from, to }) => from < to);
    }),
    points: loads.flatMap(({ load, at, factor }, i) =>
      load.points.map((point) => ({ at: inside(at + (shifts[i] as number) + point.at), force: point.force * factor })),
    ),
  };
}

// A unit load that stands past a bound as stated may stay there, but go no further.
export const leastPlace = ({ from, tolerance }: LooseBeam, { at }: LooseLoad): number => Math.min(Math.max(at - tolerance, from), at);
export const mostPlace = ({ to, tolerance }: LooseBeam, { at, width }: LooseLoad): number =>
  Math.max(Math.min(at + tolerance, to - width), at);

/** @throws RangeError if a tolerance, bound or factor cannot be */
export function checkLoose({ tolerance, from, to, span }: LooseBeam, loads: readonly LooseLoad[]): void {
  if (!(tolerance >= 0 && tolerance < Infinity)) throw new RangeError(`placement tolerance must be 0 mm or more, got ${tolerance}`);
  if (!(from >= 0 && from <= to && to <= span))
    throw new RangeError(`unit loads must keep to a part of the beam from 0 to ${span} mm, got ${from} to ${to}`);
  for (const { factor } of loads)
    if (!(factor >= 0 && factor < Infinity)) throw new RangeError(`factor of a unit load must be 0 or more, got ${factor}`);
}
