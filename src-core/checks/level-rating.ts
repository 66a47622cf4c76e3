/** The rating of a level's pair of beams: what the notice states for it, and what the maker's table gives at its span. */
import { lengthOf, massOf } from '../units/quantity';
import { say, type Missing, type Text } from './finding';

export interface LevelRatingInput {
  /** "level 2". */
  readonly level: string;
  /** 0 for the lowest beam level. */
  readonly index: number;
  /** Length of the beam as tables list it: the clear entry, mm. */
  readonly beamLength: number;
  readonly notice: {
    readonly id: string;
    /** From the lowest level up; the last entry serves all levels above it. */
    readonly levelKg: readonly (number | null)[];
    readonly from: string;
  } | null;
  readonly beamType: {
    readonly id: string;
    readonly name: string;
    readonly ratings: readonly { readonly spanMm: number; readonly pairKg: number }[];
    readonly from: string;
  } | null;
  /** What to fill in where neither notice nor beam type is named. */
  readonly nothingNamed: () => Missing;
}

export interface LevelRating {
  /** Evenly spread mass that the pair may carry, kg; null = not known. */
  readonly kg: number | null;
  /** "the notice", "the maker's table"; opens or stands in a sentence. */
  readonly by: string;
  readonly from: string;
  readonly notes: readonly Text[];
  readonly missing: readonly Missing[];
}

/**
 * The lower of the two where both are stated. A table is read at the beam's length or its next longer
 * row, never between rows and never beyond its last.
 */
export function levelRating(input: LevelRatingInput): LevelRating {
  const byNotice = noticeRating(input);
  const byTable = tableRating(input);
  if (byNotice !== null && byTable !== null) {
    const [lower, higher] = byTable.kg < byNotice.kg ? [byTable, byNotice] : [byNotice, byTable];
    const notes =
      lower.kg === higher.kg
        ? []
        : [say`The lower of two ratings is used: ${massOf(lower.kg)} by ${lower.by}, ${massOf(higher.kg)} by ${higher.by}.`];
    return { ...lower, notes: [...lower.notes, ...notes], missing: [] };
  }
  const only = byNotice ?? byTable;
  if (only !== null) return { ...only, missing: [] };
  return { kg: null, by: '', from: '', notes: [], missing: [whatIsMissing(input)] };
}

interface Found {
  readonly kg: number;
  readonly by: string;
  readonly from: string;
  readonly notes: readonly Text[];
}

function noticeRating({ notice, index }: LevelRatingInput): Found | null {
  if (notice === null) return null;
  const kg = notice.levelKg[Math.min(index, notice.levelKg.length - 1)] ?? null;
  return kg === null ? null : { kg, by: 'the notice', from: notice.from, notes: [] };
}

function tableRating({ beamType, beamLength }: LevelRatingInput): Found | null {
  if (beamType === null) return null;
  let row: { readonly spanMm: number; readonly pairKg: number } | null = null;
  for (const one of beamType.ratings) {
    if (one.spanMm < beamLength) continue;
    // Of rows for one length the lowest rating holds.
    if (row === null || one.spanMm < row.spanMm || (one.spanMm === row.spanMm && one.pairKg < row.pairKg)) row = one;
  }
  if (row === null) return null;
  const longer = row.spanMm > beamLength;
  const span = row.spanMm;
  return {
    kg: row.pairKg,
    by: 'the maker’s table',
    from: beamType.from,
    notes: longer ? [say`The table has no row for ${lengthOf(beamLength)}: its next longer one, ${lengthOf(span)}, is used.`] : [],
  };
}

function whatIsMissing({ notice, beamType, level, nothingNamed }: LevelRatingInput): Missing {
  const input = `rated capacity of ${level}`;
  if (notice !== null)
    return {
      input,
      how: 'Read it from the load notice at the rack, or ask the maker for it in writing.',
      field: `notice:${notice.id}:levelKg`,
    };
  if (beamType === null) return nothingNamed();
  const how =
    beamType.ratings.length === 0
      ? `Ask the maker of ${beamType.name} for the rating of a pair at this span.`
      : `The table of ${beamType.name} ends before the length of this beam, and no rating is taken from beyond a table. Ask the maker for one.`;
  return { input, how, field: `beamType:${beamType.id}:ratings` };
}
