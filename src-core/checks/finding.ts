/**
 * What a check may say: a verdict, its figures, the sentence, and the worked calculation, all as
 * plain data that can be cloned to a worker and printed in any unit system.
 */
import type { Quantity } from '../units/quantity';
import type { Text } from '../units/text';

/** In order of weight: later is worse. "Not assessable" ranks with "over": it never passes. */
export const VERDICTS = ['within', 'close', 'over', 'not-assessable', 'not-possible'] as const;
export type Verdict = (typeof VERDICTS)[number];

/** Every check by name. The order is the order of the worked record. */
export const CHECKS = [
  // the goods and where they stand
  'placement',
  'tipping',
  'unit-load',
  'positions',
  'pallet-bearing',
  'overhang',
  'goods-form',
  // the beams of a level
  'level-total',
  'beam-bending',
  'beam-end-shear',
  'beam-deflection',
  'full-complement',
  'section-stress',
  'section-deflection',
  'beam-sag',
  // decks and shelves
  'deck-panel',
  'area-load',
  // geometry
  'clearance-along',
  'clearance-above',
  'clearance-across',
  // the bay
  'bay-total',
  'notice-match',
  'heavy-low',
  'site-flags',
  // frames and floor
  'frame-storey',
  'frame-imbalance',
  'leg-load',
  'plate-pressure',
  'back-to-back-legs',
  'floor-area',
  'height-to-depth',
  'anchor-pull',
  'plumb',
  'damage',
] as const;
export type CheckName = (typeof CHECKS)[number];

export type BeamSide = 'front' | 'rear';
type BeamEndSide = 'left' | 'right';

/** Where a finding belongs, by the ids of the site model. `runId` is always there. */
export interface Place {
  readonly runId: string;
  readonly bayId?: string;
  readonly levelId?: string;
  readonly placementId?: string;
  readonly frameId?: string;
  readonly beam?: BeamSide;
  readonly end?: BeamEndSide;
  readonly post?: BeamSide;
}

export { say, type Text } from '../units/text';

/** One number put into a formula, and where it came from. */
export interface WorkedValue {
  readonly symbol: string;
  readonly is: string;
  readonly quantity: Quantity;
  /** Where the number came from: "load notice LN-4, read 3 May 2026", "step 2", "goods list". */
  readonly from: string;
}

/** One line of a worked calculation. */
export interface WorkedStep {
  readonly what: string;
  readonly formula: string;
  readonly values: readonly WorkedValue[];
  readonly result: { readonly symbol: string; readonly quantity: Quantity };
  /** The rule or standard the step follows. */
  readonly source: string;
}

/** An input that a check needs and does not have: what it is, and how to get it. */
export interface Missing {
  /** Name of the input in the trade's words: "rated capacity of beam level 2". */
  readonly input: string;
  /** How to get it, as an instruction. */
  readonly how: string;
  /** Field of the site model to fill, as `kind:id:field`, for a button that leads there. */
  readonly field: string;
}

export interface Finding {
  readonly check: CheckName;
  readonly place: Place;
  readonly verdict: Verdict;
  /** Demand ÷ allowed; null where the check has no ratio or could not be made. */
  readonly utilisation: number | null;
  readonly demand: Quantity | null;
  readonly allowed: Quantity | null;
  readonly says: Text;
  readonly missing: readonly Missing[];
  readonly worked: readonly WorkedStep[];
  /** What else a reader must know: ranges, assumptions, cautions of this check. */
  readonly notes: readonly Text[];
  /** False for information that is shown but does not count in the verdict. */
  readonly counts: boolean;
}

const RANK: Record<Verdict, number> = { within: 0, close: 1, over: 2, 'not-assessable': 2, 'not-possible': 3 };

/** Negative if `a` is the lighter verdict; "over" and "not assessable" rank alike. */
export const compareVerdicts = (a: Verdict, b: Verdict): number => RANK[a] - RANK[b];

/**
 * The verdict of several: the worst one. Of "over" and "not assessable", which rank alike, "over"
 * is given, because it asks for action now. Nothing checked is "not assessable", never "within".
 */
export function worstVerdict(verdicts: Iterable<Verdict>): Verdict {
  let worst: Verdict | null = null;
  for (const verdict of verdicts) {
    if (worst === null || RANK[verdict] > RANK[worst] || (verdict === 'over' && worst === 'not-assessable')) worst = verdict;
  }
  return worst ?? 'not-assessable';
}

/** A load exactly at its rating is within; this is the rounding of the computation, not a margin. */
const ROUNDING = 1e-12;

/**
 * Verdict of a utilisation: over above 1, close above `closeAbove`, else within.
 * @throws RangeError if the utilisation is not a number at or above 0
 */
export function verdictOf(utilisation: number, closeAbove: number): Verdict {
  if (!(utilisation >= 0)) throw new RangeError(`utilisation must be 0 or more, got ${utilisation}`);
  if (utilisation > 1 + ROUNDING) return 'over';
  return utilisation > closeAbove + ROUNDING ? 'close' : 'within';
}
