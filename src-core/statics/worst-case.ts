/**
 * The worst that a beam's unit loads can do to it when each may stand a little off its mark and weigh a
 * little more than stated: the greatest moment, end reactions and deflection, each with the arrangement
 * that causes it. Weights all take their factor, because every effect grows with every weight.
 *
 * Units and signs as in beam.ts. Source: influence lines, any text on structural analysis.
 */
import { solveBeam, type Beam } from './beam';
import { arrangedLoad, checkLoose, leastPlace, mostPlace, type LooseBeam, type LooseLoad } from './worst-case-loads';
import { greatestMomentApart } from './worst-case-moment';
import { rowOf, type Row } from './worst-case-row';
import { searchWorst, type Searched } from './worst-case-search';

/** An arrangement: how far each unit load stands to the right of its mark, mm, in the order they were given. */
export interface Arrangement {
  readonly shifts: readonly number[];
  /** Where its effect is greatest, mm; for a reaction the support's place. */
  readonly at: number;
  /**
   * False where unit loads overlap in it that are apart as stated: the bound between neighbours was left
   * out, which is on the safe side.
   */
  readonly apart: boolean;
  /** Proven the worst of all arrangements, or the worst that a search came to. */
  readonly how: 'exact' | 'searched';
}

export interface WorstMoment extends Arrangement {
  readonly moment: number;
}

export interface WorstReaction extends Arrangement {
  readonly force: number;
  readonly end: 'left' | 'right';
}

export interface WorstSag extends Arrangement {
  readonly sag: number;
}

/**
 * The greatest sagging moment over all sections and all arrangements. On pinned ends, for unit loads that
 * stand clear of one another as stated, it is exact and no two overlap in it. Where they overlap as stated
 * (one behind the other) the bound between them is left out, and it is searched for as with sprung and
 * fixed ends, whose influence lines have more than one peak for a wide unit load.
 * @throws RangeError as `solveBeam`, or if a tolerance or factor is negative or not a number
 * @example 4 kN at 1 000 of a 3 000 mm beam, ± 50 mm → at 1 050: 4·1.05·1.95/3 = 2.73 kN·m, stated 2.667
 */
export function worstMoment(beam: LooseBeam, loads: readonly LooseLoad[]): WorstMoment {
  checkLoose(beam, loads);
  const row = isPinned(beam) ? rowOf(beam, loads) : null;
  if (row !== null) {
    const { moment, at, places } = greatestMomentApart(beam.span, row);
    return { moment, at, shifts: shiftsOf(row, places, loads), apart: true, how: 'exact' };
  }
  const { value, ...found } = searchWorst(beam, loads, 'moment');
  return { moment: value, ...arrangementOf(loads, found) };
}

/**
 * The greatest reaction: every unit load as far towards that support as it may stand. With held ends both
 * must be alike: then too the reaction's influence line falls all the way from its support.
 */
export function worstReaction(beam: LooseBeam, loads: readonly LooseLoad[], end: 'left' | 'right'): WorstReaction {
  checkLoose(beam, loads);
  const row = rowOf(beam, loads);
  const at = end === 'left' ? 0 : beam.span;
  const places = row === null ? [] : end === 'left' ? row.least : row.most;
  const shifts =
    row === null
      ? loads.map((one) => (end === 'left' ? leastPlace(beam, one) : mostPlace(beam, one)) - one.at)
      : shiftsOf(row, places, loads);
  const found = (force: number): WorstReaction => ({ force, end, shifts, at, apart: true, how: 'exact' });
  if (row === null || !isPinned(beam)) {
    const { reactionLeft, reactionRight } = solveBeam(beam, arrangedLoad(loads, shifts, beam.span));
    return found(end === 'left' ? reactionLeft : reactionRight);
  }
  let turning = 0;
  for (let i = 0; i < places.length; i++) {
    const x = (places[i] as number) + (row.ahead[i] as number) + (row.centre[i] as number);
    turning += (row.weight[i] as number) * (end === 'left' ? beam.span - x : x);
  }
  return found(turning / beam.span);
}

/**
 * The greatest deflection, by the influence line of the deflection at a section; the section and the
 * arrangement are bettered in turn until neither betters the other. The bound between neighbours is left
 * out; `apart` says whether that mattered. Accuracy: about 1e-12 of itself.
 */
export function worstSag(beam: LooseBeam, loads: readonly LooseLoad[]): WorstSag {
  checkLoose(beam, loads);
  const { value, ...found } = searchWorst(beam, loads, 'sag');
  return { sag: value, ...arrangementOf(loads, found) };
}

const isPinned = ({ left, right }: Beam): boolean => left.kind === 'pinned' && right.kind === 'pinned';

/** Places in a row are kept as those of the unit loads pushed together; back to shifts in the given order. */
function shiftsOf(row: Row, places: readonly number[], loads: readonly LooseLoad[]): readonly number[] {
  const shifts = new Array<number>(loads.length).fill(0);
  row.order.forEach((given, i) => {
    shifts[given] = (places[i] as number) - (row.stated[i] as number);
  });
  return shifts;
}

function arrangementOf(loads: readonly LooseLoad[], { at, shifts }: Omit<Searched, 'value'>): Arrangement {
  const by = (shifted: boolean) =>
    loads
      .map(({ at: stated, width }, i) => ({ from: stated + (shifted ? (shifts[i] as number) : 0), width }))
      .sort((a, b) => a.from - b.from);
  const overlap = (standing: ReturnType<typeof by>): number =>
    standing.reduce((sum, one, i) => {
      const before = standing[i - 1];
      return before === undefined ? sum : sum + Math.max(before.from + before.width - one.from - OVERLAP_ROUNDING, 0);
    }, 0);
  return { at, shifts, apart: overlap(by(true)) <= overlap(by(false)), how: 'searched' };
}

/** mm. */
const OVERLAP_ROUNDING = 1e-6;
