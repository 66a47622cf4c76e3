/** Does a beam sag no further than allowed, loaded and unloaded: the judgement of its reading as a finding. */
import { say, type Finding, type Place } from './finding';
import { finding, notAssessable } from './make-finding';
import { joined, listed } from './phrase';
import { judgeSag, type SagInput } from './sag';

export interface BeamSagInput {
  /** With the beam. */
  readonly place: Place;
  readonly sag: SagInput;
}

/**
 * One finding for a beam that was read: over where sag or permanent set is beyond its limit, not assessable
 * as long as one of the three was not read, never better than its worst reading.
 * @throws RangeError if a reading is negative
 */
export function beamSag({ place, sag }: BeamSagInput): Finding {
  const judged = judgeSag(sag);
  const texts = { worked: () => judged.worked, notes: () => judged.notes };
  if (judged.verdict === 'not-assessable')
    return notAssessable('beam-sag', place, judged.missing, {
      ...texts,
      says: () => joined([...judged.says, say`Not known: ${listed(judged.missing.map(({ input }) => input))}.`]),
    });
  const { decides } = judged;
  return finding({
    check: 'beam-sag',
    place,
    verdict: judged.verdict,
    ...(decides === null ? {} : { demand: decides.measured, allowed: decides.limit, utilisation: decides.ratio }),
    missing: judged.missing,
    says: () => joined(judged.says),
    ...texts,
  });
}
