/** Does the upright frame carry both its bays, storey by storey, on the worse of its two posts. */
import { lengthOf, massOf } from '../units/quantity';
import { say, verdictOf, type Finding, type Missing, type Place, type Text } from './finding';
import { notHeldAsRated, storeyRatings, type FrameRatingInput, type StoreyRating } from './frame-rating';
import { endFrontKg, endRearKg, storeysOf, type FrameLevel, type Storey } from './frame-loads';
import { storeyWorked } from './frame-worked';
import { distinctMissing, finding, notAssessable, utilisationOf } from './make-finding';
import { opening } from './phrase';
import { sourceOf, type ResolvedRules } from './rule-sets';

export interface FrameStoreyInput extends FrameRatingInput {
  readonly place: Place;
  /** What hangs on it; parts that are not known are left out and named in `missing`. */
  readonly levels: readonly FrameLevel[];
  /** Of the frame itself, kg; 0 where it is not known, and then named in `missing`. */
  readonly massKg: number;
  readonly massFrom: string;
  /** mm. */
  readonly height: number;
  readonly missing: readonly Missing[];
  /** Goods that cannot stand as they were entered load the frame in no known way. */
  readonly impossible: boolean;
  readonly rules: ResolvedRules;
}

/** A storey with what it carries and may carry. */
export interface JudgedStorey extends Storey {
  readonly rating: StoreyRating;
  /** Twice the worse post: a rating takes it that both share alike. */
  readonly demandKg: number;
  /** Null without a rating. */
  readonly utilisation: number | null;
}

export interface FrameStoreyAnswer {
  readonly finding: Finding;
  readonly storeys: readonly JudgedStorey[];
  /** The greatest of its storeys; null as soon as one is not known. */
  readonly utilisation: number | null;
}

/**
 * Source: facts M-12, M-13 and M-15. Real reactions, not half of each bay's total; the rating at the
 * greatest unsupported height of the frame, or each storey's own where the maker's table says so.
 */
export function frameStorey(input: FrameStoreyInput): FrameStoreyAnswer {
  const { place, frame, levels, massKg, height, bays, rules, impossible } = input;
  const storeys = storeysOf(levels, massKg, height);
  const ratings = storeyRatings(input, storeys);
  const judged = storeys.map((storey, i): JudgedStorey => {
    const rating = ratings[i] as StoreyRating;
    const demandKg = 2 * Math.max(storey.frontKg, storey.rearKg);
    return { ...storey, rating, demandKg, utilisation: rating.kg === null ? null : utilisationOf(demandKg, rating.kg) };
  });
  const answer = (one: Finding, utilisation: number | null = null): FrameStoreyAnswer => ({ finding: one, storeys: judged, utilisation });

  const top = levels.at(-1);
  if (top !== undefined && top.highest > height + 1e-6)
    return answer(
      finding({
        check: 'frame-storey',
        place,
        verdict: 'not-possible',
        says: () =>
          say`Beams hang on ${frame} at ${lengthOf(top.highest)}, and it is only ${lengthOf(height)} high. Correct one of the two.`,
      }),
    );
  if (impossible)
    return answer(
      finding({
        check: 'frame-storey',
        place,
        verdict: 'not-possible',
        says: () => say`Not worked out: goods beside ${frame} cannot stand as they were entered.`,
      }),
    );
  const missing = distinctMissing([...input.missing, ...notHeldAsRated(bays, levels), ...ratings.flatMap((rating) => rating.missing)]);
  const governing = judged.reduce<JudgedStorey | null>(
    (most, one) => (most === null || (one.utilisation ?? -1) > (most.utilisation ?? -1) ? one : most),
    null,
  );
  if (governing === null) {
    if (missing.length > 0) return answer(notAssessable('frame-storey', place, missing));
    return answer(finding({ check: 'frame-storey', place, verdict: 'within', says: () => say`No beams hang on ${frame}.` }), 0);
  }
  const says = () => sentence(input, governing, missing.length > 0);
  const worked = () => storeyWorked(input, governing);
  const notes = () => notesOf(input, governing);
  const use = governing.utilisation;
  if (missing.length > 0 && (use === null || verdictOf(use, 1) !== 'over'))
    return answer(
      notAssessable('frame-storey', place, missing, {
        demand: massOf(governing.demandKg),
        says: () =>
          say`${says()} Whether that is allowed cannot be told: not known is ${missing.map(({ input: what }) => what).join('; ')}.`,
        notes,
      }),
    );
  const { closeAbove, interpolatedWarn } = rules.value;
  const utilisation = use ?? 0;
  return answer(
    finding({
      check: 'frame-storey',
      place: post(place, governing),
      verdict: verdictOf(utilisation, governing.rating.interpolated ? Math.min(closeAbove, interpolatedWarn) : closeAbove),
      utilisation,
      demand: massOf(governing.demandKg),
      allowed: massOf(governing.rating.kg ?? 0),
      missing,
      says,
      worked,
      notes,
    }),
    missing.length > 0 ? null : utilisation,
  );
}

const even = ({ frontKg, rearKg }: Storey): boolean => Math.abs(frontKg - rearKg) <= 1e-9 * Math.max(frontKg, rearKg);
const worsePost = ({ frontKg, rearKg }: Storey): 'front' | 'rear' => (rearKg > frontKg ? 'rear' : 'front');
const post = (place: Place, storey: Storey): Place => (even(storey) ? place : { ...place, post: worsePost(storey) });

function sentence({ frame }: FrameStoreyInput, storey: JudgedStorey, partly: boolean): Text {
  const { from, to, frontKg, rearKg, demandKg, rating, utilisation } = storey;
  const where = from === 0 ? say`at its foot` : say`from ${lengthOf(from)} to ${lengthOf(to)}`;
  const least = partly ? 'at least ' : '';
  const carries = even(storey)
    ? say`${opening(frame)} carries ${least}${massOf(frontKg + rearKg)} ${where}.`
    : say`${opening(frame)} carries ${least}${massOf(frontKg + rearKg)} ${where}, ${massOf(Math.max(frontKg, rearKg))} of it on its ${worsePost(storey)} post: as much as ${massOf(demandKg)} shared alike.`;
  if (rating.kg === null) return carries;
  const allows = say`${carries} ${opening(rating.by)} allows ${massOf(rating.kg)}.`;
  return utilisation !== null && verdictOf(utilisation, 1) === 'over'
    ? say`${allows} Take load off the levels of both its bays, or lower the beams to the maker’s arrangement.`
    : allows;
}

function notesOf(input: FrameStoreyInput, governing: JudgedStorey): readonly Text[] {
  const { levels, massKg, table, rules } = input;
  const { rating, utilisation, from } = governing;
  const notes: Text[] = [...rating.notes];
  if (rating.kg !== null && utilisation !== null && verdictOf(utilisation, 1) === 'over' && from === 0) {
    const ends = levels.flatMap((level) => level.ends);
    const own = massKg + ends.reduce((sum, end) => sum + endFrontKg(end) + endRearKg(end) - end.goodsFrontKg - end.goodsRearKg, 0);
    const left = Math.max(0, rating.kg - own);
    notes.push(
      say`Beams, decks and frame taken off, ${massOf(left)} is left for the goods at this frame: ${massOf(left / levels.length)} a level, halves of both bays together.`,
    );
  }
  if (table !== null && table.rows.length > 0)
    notes.push(
      table.by === 'greatest-height'
        ? say`The table is read at the greatest unsupported height of the frame, floor to first beam or beam to beam, to the tops of the beams.`
        : say`The table is read at each storey’s own unsupported height, as its maker says, to the tops of the beams.`,
    );
  notes.push(
    say`Beams of neighbouring bays count as one level within ${lengthOf(rules.value.levelMatch)} (${sourceOf(rules, 'levelMatch')}).`,
    say`Frame ratings are for load along the posts, on an undamaged, plumb and anchored frame; a splice or a thinner upper part may govern.`,
  );
  return notes;
}
