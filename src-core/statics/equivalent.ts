import type { BeamAnswer } from './beam';

/** Evenly spread loads, in N over the whole span of one pinned beam, that do the same to it. */
export interface EquivalentLoads {
  readonly total: number;
  readonly bending: number;
  readonly endShear: number;
  readonly deflection: number;
}

/**
 * The uniform load that bends, shears and sags a beam as this load does: 8 M/L, 2 R and
 * 384 EI δ / (5 L³). Meant for pinned ends; EI cancels, so any rigidity used in the solution serves.
 * End shear counts a load that stands over a support, since the connector carries it too.
 * @returns N over the span
 * @throws RangeError if the rigidity is not above 0
 * Source: peak values of the uniform load on a pinned beam matched (WL/8, W/2, 5WL³/384EI).
 * @example 4 kN at the middle of a pinned 2.4 m beam → bending 8 kN, since PL/4 = WL/8
 */
export function equivalentLoads(answer: BeamAnswer, rigidity: number = answer.rigidity): EquivalentLoads {
  if (!(rigidity > 0)) throw new RangeError(`a beam's rigidity must be above 0 N·mm², got ${rigidity}`);
  const { span } = answer;
  return {
    total: answer.resultant,
    bending: (8 * answer.sagging.moment) / span,
    endShear: 2 * Math.max(answer.reactionLeft, answer.reactionRight),
    deflection: (384 * rigidity * answer.deflection.sag) / (5 * span ** 3),
  };
}
