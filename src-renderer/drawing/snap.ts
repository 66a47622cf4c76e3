/**
 * Where a unit load catches as it is moved along a beam level. Lengths in mm; positions are those
 * of its left edge from the left upright's face, as a placement keeps them.
 */

import { TOUCH } from '../../src-core/checks/placement';
import type { Gaps } from './gaps';

export interface Standing {
  readonly at: number;
  readonly width: number;
}

export interface Opening {
  /** Free width between the uprights. */
  readonly entry: number;
  /** Gaps asked for, to uprights and to neighbours. */
  readonly gaps: Gaps;
  /** Width of the unit load that is moved. */
  readonly width: number;
  /** The other unit loads of the level. */
  readonly others: readonly Standing[];
}

export type Catch = 'left upright' | 'right upright' | 'neighbour' | 'middle of the beam' | 'step';

export interface Place {
  readonly at: number;
  readonly by: Catch;
}

/** Free places keep to whole steps; finer ones are typed. */
const STEP = 10;
/** Two places nearer than this are one place, mm. */
const SAME = 1;

/** Whether two stretches lie over one another; those that touch do not. */
export const overlaps = (a: Standing, b: Standing): boolean => a.at < b.at + b.width - TOUCH && b.at < a.at + a.width - TOUCH;

// Tenths of a millimetre, in which an inch is whole; rounded so that a gap is never taken short.
const NOISE = 1e-6;
const tenthUp = (mm: number): number => Math.ceil(mm * 10 - NOISE) / 10;
const tenthDown = (mm: number): number => Math.floor(mm * 10 + NOISE) / 10;

/** The places where the unit load keeps its gaps, from left to right. */
export function catchingPlaces({ entry, gaps, width, others }: Opening): readonly Place[] {
  const wanted: Place[] = [
    { at: tenthUp(gaps.upright), by: 'left upright' },
    { at: tenthDown(entry - gaps.upright - width), by: 'right upright' },
    { at: tenthDown((entry - width) / 2), by: 'middle of the beam' },
    ...others.flatMap((other): Place[] => [
      { at: tenthDown(other.at - gaps.loads - width), by: 'neighbour' },
      { at: tenthUp(other.at + other.width + gaps.loads), by: 'neighbour' },
    ]),
  ];
  const keepsGaps = (at: number) =>
    at >= gaps.upright - TOUCH &&
    at + width <= entry - gaps.upright + TOUCH &&
    !others.some((other) => overlaps({ at: at - gaps.loads, width: width + 2 * gaps.loads }, other));
  const free = wanted.filter(({ at }) => keepsGaps(at));
  const ordered = free.toSorted((a, b) => a.at - b.at);
  return ordered.filter((place, i) => i === 0 || place.at - (ordered[i - 1]?.at ?? -Infinity) > SAME);
}

/** The catching place within `reach` of `at`, else `at` on a whole step and kept between the uprights. */
export function snap(at: number, opening: Opening, reach: number): Place {
  let nearest: Place | null = null;
  for (const place of catchingPlaces(opening)) {
    if (Math.abs(place.at - at) <= reach && (!nearest || Math.abs(place.at - at) < Math.abs(nearest.at - at))) nearest = place;
  }
  if (nearest) return nearest;
  const last = Math.max(0, opening.entry - opening.width);
  return { at: Math.max(0, Math.min(last, Math.round(at / STEP) * STEP)), by: 'step' };
}
