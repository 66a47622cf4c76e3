/**
 * The greatest mass at which a set of checks is still met, found by secants on each check.
 *
 * With all else unchanged every check's utilisation is the greatest of functions linear in one unit
 * load's mass, so it is convex and the masses that are met reach from nothing up to one limit. A line
 * through two masses meets a straight check's limit exactly, and a curved one's after a few steps. What
 * is no such function (a check that comes in at a certain mass) is caught by the bracket round the limit.
 */

/** Every check at one mass. */
export interface Trial {
  readonly kg: number;
  /** Whether all are met. */
  readonly met: boolean;
  /** By check: how far beyond its limit, as a share of it; 0 at the limit, below while there is room. Checks without figures have none. */
  readonly beyond: ReadonlyMap<string, number>;
}

export interface Limit<T extends Trial> {
  /** The greatest mass that is met. */
  readonly met: T;
  /** A mass just above it that is not. */
  readonly missed: T;
}

/** Relative to the mass; the checks themselves round at 1e-12. */
const RESOLUTION = 1e-12;
/** A mass that is to be missed lies this far above the limit, or where a check is that far beyond its own. */
const CLEAR_OF_ROUNDING = { kg: 1e-9, beyond: 1e-11 };

/**
 * @param attempt makes the checks at a mass
 * @param start a trial that is met
 * @param first mass to try next, kg, above `start`
 * @param most mass beyond which nothing is tried, kg
 * @returns null where even `most` is met; pauses after every trial, so that the work can be spread or dropped
 * Accuracy: 1e-12 of the mass, or of the check that limits it where that is more.
 * @example a straight check takes three trials and one that proves that just above is too much
 */
export function* greatestMass<T extends Trial>(
  attempt: (kg: number) => T,
  start: T,
  first: number,
  most: number,
): Generator<undefined, Limit<T> | null> {
  let met = start;
  let missed: T | null = null;
  let older: Trial = start;
  let kg = Math.min(first, most);
  let proof = 1;
  let slow = 0;
  for (;;) {
    const newer = attempt(kg);
    yield;
    const width: number = missed === null ? Infinity : missed.kg - met.kg;
    if (newer.met) met = newer;
    else missed = newer;
    if (missed === null && met.kg >= most) return null;
    if (missed !== null && missed.kg - met.kg <= RESOLUTION * missed.kg) return { met, missed };

    const root = nearestRoot(older, newer);
    const slope = root?.slope ?? 0;
    older = newer;
    const step = proof * Math.max(CLEAR_OF_ROUNDING.kg * met.kg, slope > 0 ? CLEAR_OF_ROUNDING.beyond / slope : 0);
    if (newer.met && root !== null && root.kg - met.kg <= RESOLUTION * met.kg) {
      // Here is the limit, if just above is too much.
      if (missed !== null && missed.kg - met.kg <= step) return { met, missed };
      const above = attempt(Math.min(met.kg + step, most));
      yield;
      if (!above.met) return { met, missed: above };
      met = above;
      if (met.kg >= most) return null;
      proof *= 16;
    }
    slow = missed !== null && missed.kg - met.kg > width / 2 ? slow + 1 : 0;
    kg = next(met, missed, root?.kg ?? null, most, slow >= 3);
    if (slow >= 3) slow = 0;
  }
}

/** The least mass at which a check's line through two trials meets its limit. */
function nearestRoot(older: Trial, newer: Trial): { readonly kg: number; readonly slope: number } | null {
  let nearest: { readonly kg: number; readonly slope: number } | null = null;
  for (const [check, beyond] of newer.beyond) {
    const before = older.beyond.get(check);
    if (before === undefined) continue;
    const slope = (beyond - before) / (newer.kg - older.kg);
    if (!(slope > 0 && slope < Infinity)) continue;
    const kg = newer.kg - beyond / slope;
    if (nearest === null || kg < nearest.kg) nearest = { kg, slope };
  }
  return nearest;
}

/** Where to try next: at the root if it lies between what is met and what is not, else half-way, or further up. */
function next(met: Trial, missed: Trial | null, root: number | null, most: number, halve: boolean): number {
  const upper = missed?.kg ?? most;
  if (!halve && root !== null && root > met.kg && root < upper) return root;
  return missed === null ? Math.min(most, 2 * met.kg + 1) : met.kg + (upper - met.kg) / 2;
}
