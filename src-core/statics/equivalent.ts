/** Uniform loads that would do the same to a beam as its own load does. */
import type { BeamAnswer } from './beam';

/** Totals over the full span of one beam with pinned ends, N. */
export interface EquivalentLoads {
  readonly total: number;
  readonly bending: number;
  readonly endShear: number;
  readonly deflection: number;
}

/**
 * By bending 8M/L, by end shear 2R with R the greater reaction (any load over a support included), by
 * deflection 384·EI·δ/(5L³); the total is the resultant itself.
 * For a beam with held ends these are still the loads on a pinned beam; what a uniform load does to the
 * held beam is the caller's to divide by.
 * @param rigidity EI that the answer was solved with, N·mm²; for pinned ends it cancels
 * Accuracy: as the answer's. Source: peak effects matched with those of a uniform load, wL²/8 and 5wL⁴/384EI.
 * @example 4 kN at the middle → bending 8 kN, since PL/4 = WL/8; end shear 4 kN; deflection 6.4 kN
 */
export function equivalentLoads(answer: BeamAnswer, rigidity: number): EquivalentLoads {
  const { span, resultant, sagging, reactionLeft, reactionRight, deflection } = answer;
  return {
    total: resultant,
    bending: (8 * sagging.moment) / span,
    endShear: 2 * Math.max(reactionLeft, reactionRight),
    deflection: ((384 / 5) * (rigidity * deflection.sag)) / span / span / span,
  };
}
