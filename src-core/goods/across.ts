/** Where the goods' mass lies across the rack, and how the pair of beams shares it. */
import type { DepthShape } from './shapes';

/** Sums of widths as people type them agree to a hundredth of a millimetre. */
export const FITS_MM = 0.01;

/** Why a depth shape cannot be, as a sentence; null if it can. */
export function acrossProblem(depthMm: number, across: DepthShape): string | null {
  switch (across.kind) {
    case 'even':
      return null;
    case 'sloped':
      return across.rearOverFront >= 0
        ? null
        : `The rear may not weigh less than nothing: ${across.rearOverFront} times the front. Give 0 or more.`;
    case 'centre':
      return Math.abs(across.towardsFrontMm) <= depthMm / 2
        ? null
        : `The centre of mass, ${Math.abs(across.towardsFrontMm)} mm off the middle, lies outside the goods, which are ${depthMm} mm deep. Measure it again.`;
    case 'stepped': {
      const { columns } = across;
      if (columns.length === 0) return 'There is no column across the depth. Add at least one, from front to rear.';
      if (columns.some(({ depthMm: depth }) => !(depth > 0))) return 'Each column across must be deeper than 0 mm.';
      if (columns.some(({ massKg }) => !(massKg >= 0))) return 'Each column across must weigh 0 kg or more.';
      const depth = columns.reduce((sum, column) => sum + column.depthMm, 0);
      if (Math.abs(depth - depthMm) > FITS_MM)
        return `The columns across are ${depth} mm deep together, the goods ${depthMm} mm. Make the columns fill the depth.`;
      return columns.some(({ massKg }) => massKg > 0) ? null : 'All columns across weigh 0 kg. Give at least one its mass.';
    }
  }
}

/**
 * Centre of the goods' mass in front of their middle.
 * @returns mm, towards the aisle positive
 * @throws RangeError with `acrossProblem`'s sentence if the shape cannot be
 * Source: first moment over area, statics.
 * @example sloped from full at the front to nothing at the rear, 1 200 deep → 200, since the centre lies at a third
 */
export function centreTowardsFront(depthMm: number, across: DepthShape): number {
  const problem = acrossProblem(depthMm, across);
  if (problem !== null) throw new RangeError(problem);
  switch (across.kind) {
    case 'even':
      return 0;
    case 'centre':
      return across.towardsFrontMm;
    case 'sloped': {
      const ratio = across.rearOverFront;
      return depthMm / 2 - (depthMm * (1 + 2 * ratio)) / (3 * (1 + ratio));
    }
    case 'stepped': {
      let edge = 0;
      let mass = 0;
      let moment = 0;
      for (const column of across.columns) {
        mass += column.massKg;
        moment += column.massKg * (edge + column.depthMm / 2);
        edge += column.depthMm;
      }
      return depthMm / 2 - moment / mass;
    }
  }
}

/**
 * Share of a unit load that the front beam carries.
 * @param towardsFrontMm centre of mass in front of the middle of the pair
 * @param beamDistanceMm between the middles of the two beams
 * @returns 1/2 + e/d; below 0 or above 1 the goods would tip off
 * @throws RangeError if the distance is not above 0
 */
export function frontShare(towardsFrontMm: number, beamDistanceMm: number): number {
  if (!(beamDistanceMm > 0)) throw new RangeError(`the beams must stand more than 0 mm apart, got ${beamDistanceMm}`);
  return 0.5 + towardsFrontMm / beamDistanceMm;
}
