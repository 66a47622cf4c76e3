/** Which of a rule set's clearances hold: by what puts the goods away, and by the height of the level. */
import type { RuleKey } from './rule-sets';

/**
 * What puts goods away: counterbalanced and reach trucks (class 400), trucks of very narrow aisles with
 * the driver rising (300A) or staying below (300B), or people by hand.
 */
export const LOADED_BY = ['class-400', 'class-300a', 'class-300b', 'by-hand', 'unknown'] as const;
export type LoadedBy = (typeof LOADED_BY)[number];

export interface ClearanceKeys {
  readonly upright: RuleKey;
  readonly loads: RuleKey;
  readonly above: RuleKey;
}

const UP_TO: readonly { readonly height: number; readonly keys: ClearanceKeys }[] = [
  { height: 3000, keys: { upright: 'clearanceUprightTo3m', loads: 'clearanceLoadsTo3m', above: 'clearanceAboveTo3m' } },
  { height: 6000, keys: { upright: 'clearanceUprightTo6m', loads: 'clearanceLoadsTo6m', above: 'clearanceAboveTo6m' } },
  { height: 9000, keys: { upright: 'clearanceUprightTo9m', loads: 'clearanceLoadsTo9m', above: 'clearanceAboveTo9m' } },
  { height: 13_000, keys: { upright: 'clearanceUprightTo13m', loads: 'clearanceLoadsTo13m', above: 'clearanceAboveTo13m' } },
  { height: 15_000, keys: { upright: 'clearanceUprightTo15m', loads: 'clearanceLoadsTo15m', above: 'clearanceAboveTo15m' } },
];
const RISING: ClearanceKeys = { upright: 'clearanceUprightRising', loads: 'clearanceLoadsRising', above: 'clearanceAboveRising' };

/** Highest level that each class states clearances for, mm. */
export const GREATEST_HEIGHT: Readonly<Record<'class-400' | 'class-300a' | 'class-300b', number>> = {
  'class-400': 13_000,
  'class-300a': 9000,
  'class-300b': 15_000,
};

export const LOADED_BY_WORDS: Readonly<Record<LoadedBy, string>> = {
  'class-400': 'class 400, counterbalanced or reach truck',
  'class-300a': 'class 300A, very narrow aisle, driver rising with the load',
  'class-300b': 'class 300B, very narrow aisle, driver staying below',
  'by-hand': 'by hand',
  unknown: 'not known',
};

/**
 * The clearances for goods on a level.
 * @param height floor to the top of the beams on which the goods stand, mm; 0 for goods on the floor
 * @returns null where the class states none at that height, and for goods put away by hand
 * Source: facts F-62 to F-67, which give a value for each class and height of the beam level.
 */
export function clearanceKeys(loadedBy: LoadedBy, height: number): ClearanceKeys | null {
  if (loadedBy === 'by-hand' || loadedBy === 'unknown' || height > GREATEST_HEIGHT[loadedBy]) return null;
  if (loadedBy === 'class-300a') return RISING;
  return UP_TO.find((band) => height <= band.height)?.keys ?? null;
}
