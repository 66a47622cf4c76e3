/** Straight scales and the round figures at which an axis is marked. */

export interface Scale {
  (value: number): number;
  readonly invert: (pixel: number) => number;
}

/** Straight line through (fromValue, fromPixel) and (toValue, toPixel). */
export function scaleOf(fromValue: number, toValue: number, fromPixel: number, toPixel: number): Scale {
  const rate = (toPixel - fromPixel) / (toValue - fromValue);
  const scale = (value: number) => fromPixel + (value - fromValue) * rate;
  return Object.assign(scale, { invert: (pixel: number) => fromValue + (pixel - fromPixel) / rate });
}

/** The next 1, 2, 2.5 or 5 times a power of ten at or above `least`; `least` > 0. */
export function roundStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least));
  // The tolerance keeps 3 × 0.1 from being taken as above 0.3.
  for (const step of [1, 2, 2.5, 5]) if (power * step >= least * (1 - 1e-9)) return power * step;
  return power * 10;
}

/**
 * Marks of an axis from 0 to `end`: round steps, at most `most` of them, and `end` itself. A round
 * mark closer to the end than half a step gives way to it.
 */
export function axisMarks(end: number, most: number): readonly number[] {
  if (!(end > 0)) return [0];
  const step = roundStep(end / Math.max(1, most));
  const marks: number[] = [];
  for (let i = 0; i * step < end - step / 2; i += 1) marks.push(i * step);
  return [...marks, end];
}

/** Lengths in a chain: a limit below `least` gives `least`. */
export const clamp = (value: number, least: number, most: number): number => Math.max(least, Math.min(most, value));
