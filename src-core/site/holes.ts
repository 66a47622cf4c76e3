/** The holes of the uprights, at which beams stand. Heights in mm from the floor to the top of the beam. */
import type { UnitSystem } from '../units/quantity';
import type { FrameType, Run, Site } from './site';

/**
 * Where the holes are not known, by the site's units: the commonest pitch, mm. Pitches are 50 or 75 mm,
 * in the United States 2 in, some 3 or 4 in (facts F-60; common practice, no source).
 */
const USUAL_PITCH: Readonly<Record<UnitSystem, number>> = { metric: 50, us: 50.8 };
/** Nearer than this a beam stands at the hole: heights are measured to a millimetre at best. */
const AT_HOLE = 0.5;
/** Multiples of a pitch in inches are not exact in mm. */
const DECIMALS = 4;

export interface Holes {
  /** From hole to hole, mm. */
  readonly pitch: number;
  /** 'frames' where both frames of the bay have it; else the usual pitch is taken, and why. */
  readonly from: 'frames' | 'not known' | 'frames differ';
}

/** The pitch by which beams of a bay step: that of its frames, where it is known of both and the same. */
export function holesOf(site: Site, run: Run, bayIndex: number): Holes {
  const usual = USUAL_PITCH[site.units];
  const [left = null, right = null] = run.frames
    .slice(bayIndex, bayIndex + 2)
    .map(({ typeId }) => site.frameTypes.find((type: FrameType) => type.id === typeId)?.holePitchMm ?? null);
  if (left === null || right === null) return { pitch: usual, from: 'not known' };
  return left === right ? { pitch: left, from: 'frames' } : { pitch: usual, from: 'frames differ' };
}

const atHole = (number: number, pitch: number): number => Number((number * pitch).toFixed(DECIMALS));

const positive = (pitch: number): void => {
  if (!(pitch > 0)) throw new RangeError(`hole pitch must be above 0 mm, got ${pitch}`);
};

/**
 * The next hole above (+1) or below (−1) a height; of a beam off the holes the nearest that way.
 * @example nextHole(1512, 50, 1) → 1550; nextHole(1512, 50, -1) → 1500
 */
export function nextHole(height: number, pitch: number, by: 1 | -1): number {
  positive(pitch);
  const nearest = Math.round(height / pitch);
  if (Math.abs(height - nearest * pitch) <= AT_HOLE) return atHole(nearest + by, pitch);
  return atHole(by > 0 ? Math.ceil(height / pitch) : Math.floor(height / pitch), pitch);
}

/** The holes below and above a height that is off them; null where the beam stands at one. */
export function holesBeside(height: number, pitch: number): readonly [below: number, above: number] | null {
  positive(pitch);
  if (Math.abs(height - Math.round(height / pitch) * pitch) <= AT_HOLE) return null;
  return [nextHole(height, pitch, -1), nextHole(height, pitch, 1)];
}
