/** The one scale at which all bays of a run stand in the strip. */
import type { BayDrawn } from './bay-model';
import { skylineRate } from './skyline';

/** px: the strip is at most this high, and a usual bay about this wide. */
const TALLEST = 108;
const WIDEST = 92;

export interface StripScale {
  /** px per mm. */
  readonly rate: number;
  /** px per N/mm. */
  readonly skyline: number;
  readonly height: number;
}

export function stripScale(bays: readonly BayDrawn[]): StripScale {
  const highest = Math.max(1, ...bays.map((bay) => bay.height));
  const widest = Math.max(1, ...bays.map((bay) => bay.entry));
  const rate = Math.min(TALLEST / highest, WIDEST / widest);
  return { rate, skyline: skylineRate(bays, rate), height: Math.ceil(highest * rate) + 2 };
}
