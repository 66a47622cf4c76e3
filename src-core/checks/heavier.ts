/**
 * Masses that may be more than stated: the verdict is by what is stated; where that is within and the same
 * goods as heavy as they may be are over, it is close. Source: facts M-23, common practice.
 */
import { ratioOf, type Quantity } from '../units/quantity';
import { say, verdictOf, type Text, type Verdict } from './finding';
import { utilisationOf, type compared } from './make-finding';

export interface Heavier {
  readonly verdict: Verdict;
  /** Goes after the finding's own sentence; empty where the verdict stays. */
  readonly why: () => Text;
  readonly notes: () => readonly Text[];
}

/**
 * @param heavier the demand with all masses as great as they may be
 */
export function mayBeHeavier(stated: ReturnType<typeof compared>, heavier: Quantity, closeAbove: number): Heavier {
  const { demand, allowed, verdict } = stated;
  const used = utilisationOf(heavier.value, allowed.value);
  const changes = verdict === 'within' && verdictOf(used, closeAbove) === 'over';
  return {
    verdict: changes ? 'close' : verdict,
    why: () => (changes ? say` As heavy as it may be it would come to ${heavier}, so it is close.` : say``),
    notes: () =>
      heavier.value > demand.value
        ? [say`Worst case: as heavy as it may be it would come to ${heavier} (utilisation ${ratioOf(used)}).`]
        : [],
  };
}
