/** The one scale at which all bays of a run stand in the strip. */
import type { BayDrawn } from './bay-model';

/** px: the strip is at most this high, and a usual bay about this wide. */
const TALLEST = 92;
const WIDEST = 92;

export interface StripScale {
  /** px per mm. */
  readonly rate: number;
  /** px per N/mm. */
  readonly skyline: number;
  readonly height: number;
}

export function stripScale(bays: readonly BayDrawn[], peak: number): StripScale {
  const highest = Math.max(1, ...bays.map((bay) => bay.height));
  const widest = Math.max(1, ...bays.map((bay) => bay.entry));
  const rate = Math.min(TALLEST / highest, WIDEST / widest);
  const rooms = bays.flatMap((bay) => bay.levels.filter((level) => level.levelId !== null).map((level) => level.room));
  const room = Math.min(...rooms);
  return { rate, skyline: peak > 0 && Number.isFinite(room) ? (0.8 * room * rate) / peak : 0, height: Math.ceil(highest * rate) + 2 };
}
