/**
 * What an upright frame may carry as it stands: by its maker's table, or by the one number that the load
 * notices of its bays give for the rack they describe; and what keeps either from holding.
 */
import { massOf } from '../units/quantity';
import { say, type Missing, type Text, type WorkedStep } from './finding';
import type { FrameLevel, Storey } from './frame-loads';
import { frameTableRating, type FrameTableAnswer, type FrameTableChoice, type FrameTableRow } from './frame-table';

/** What a bay's load notice says of the frame beside it; lengths in mm. */
interface FrameNotice {
  /** "load notice LN-4, …". */
  readonly from: string;
  readonly frameKg: number | null;
  readonly firstBeam: number | null;
  readonly greatestGap: number | null;
  /** Prefix of its fields: `notice:id:`. */
  readonly field: string;
}

/** A bay that stands at the frame. */
export interface FrameBay {
  /** "bay A1". */
  readonly name: string;
  readonly side: 'left' | 'right';
  /** Floor to its first beams and greatest gap between its beams, mm; null without levels, or with one. */
  readonly firstBeam: number | null;
  readonly greatestGap: number | null;
  readonly notice: FrameNotice | null;
  /** Prefix of its fields: `bay:id:`. */
  readonly field: string;
  /** Field of its first level's height. */
  readonly firstBeamField: string;
}

export interface FrameRatingInput {
  /** "frame A-F2". */
  readonly frame: string;
  readonly bays: readonly FrameBay[];
  readonly table: {
    readonly rows: readonly FrameTableRow[];
    /** Read at the greatest unsupported height of the frame, or at each storey's own. */
    readonly by: 'greatest-height' | 'storey-height';
    readonly from: string;
    readonly field: string;
  } | null;
  readonly choice: FrameTableChoice;
}

export interface StoreyRating {
  /** Null where there is none. */
  readonly kg: number | null;
  readonly interpolated: boolean;
  /** "the maker's table", "the notice of bay A1". */
  readonly by: string;
  readonly notes: readonly Text[];
  readonly steps: readonly WorkedStep[];
  readonly missing: readonly Missing[];
}

const SAME = 1e-6;

/** Symbol of the rating in worked calculations. */
export const RATED = 'm_rated';

/** The rating for each storey, in their order. */
export function storeyRatings(input: FrameRatingInput, storeys: readonly Storey[]): readonly StoreyRating[] {
  const { table } = input;
  if (table === null || table.rows.length === 0) {
    const one = byNotices(input);
    return storeys.map(() => one);
  }
  const greatest = Math.max(...storeys.map(({ height }) => height));
  const read = new Map<number, StoreyRating>();
  return storeys.map(({ height }) => {
    const at = table.by === 'greatest-height' ? greatest : height;
    const known = read.get(at) ?? lowerOf(input, byTable(input, table, frameTableRating(table.rows, at, input.choice)));
    read.set(at, known);
    return known;
  });
}

/** A notice that states less than the table holds: of two published ratings the lower one. */
function lowerOf({ bays }: FrameRatingInput, rated: StoreyRating): StoreyRating {
  const tableKg = rated.kg;
  if (tableKg === null) return rated;
  const lowest = lowestNotice(bays);
  if (lowest === null || lowest.kg >= tableKg) return rated;
  const note = say`The lower of two ratings is used: ${massOf(lowest.kg)} by the notice of ${lowest.bay.name}, ${massOf(tableKg)} by the maker’s table.`;
  return { ...rated, ...ofNotice(lowest), notes: [...rated.notes, note], interpolated: false };
}

interface Stated {
  readonly kg: number;
  readonly bay: FrameBay;
  readonly notice: FrameNotice;
}

function lowestNotice(bays: readonly FrameBay[]): Stated | null {
  let lowest: Stated | null = null;
  for (const bay of bays) {
    const { notice } = bay;
    if (notice !== null && notice.frameKg !== null && (lowest === null || notice.frameKg < lowest.kg))
      lowest = { kg: notice.frameKg, bay, notice };
  }
  return lowest;
}

const ofNotice = ({ kg, bay, notice }: Stated): Pick<StoreyRating, 'kg' | 'by' | 'steps'> => ({
  kg,
  by: `the notice of ${bay.name}`,
  steps: [noticeStep(kg, notice.from)],
});

function byTable({ frame }: FrameRatingInput, table: NonNullable<FrameRatingInput['table']>, answer: FrameTableAnswer): StoreyRating {
  if (answer.ok)
    return {
      kg: answer.kg,
      interpolated: answer.interpolated,
      by: 'the maker’s table',
      notes: answer.notes,
      steps: answer.steps(RATED, table.from),
      missing: [],
    };
  const how =
    answer.reason === 'beyond'
      ? 'Its table ends before this unsupported height, and no rating is taken from beyond a table. Lower the beams, or ask the maker for a rating of this arrangement.'
      : 'Its table contradicts itself. Correct it from the maker’s sheet.';
  return {
    kg: null,
    interpolated: false,
    by: 'the maker’s table',
    notes: [answer.says],
    steps: [],
    missing: [{ input: `rating of ${frame} at its unsupported height`, how, field: table.field }],
  };
}

/** The lower of the numbers on the two bays' notices, each valid only for the rack that its notice shows. */
function byNotices({ frame, bays, table }: FrameRatingInput): StoreyRating {
  const missing = bays.flatMap((bay): readonly Missing[] => {
    const { notice } = bay;
    const input = `rating of ${frame}`;
    if (notice === null) {
      const how = `Enter the table of its frame type, or the load notice of ${bay.name} with the frame’s rating.`;
      return [{ input, how, field: table === null ? `${bay.field}noticeId` : table.field }];
    }
    const how = `Enter the table of its frame type, or the frame’s rating from the load notice of ${bay.name}.`;
    return [...(notice.frameKg === null ? [{ input, how, field: `${notice.field}frameKg` }] : []), ...shownBy(bay, notice)];
  });
  const lowest = lowestNotice(bays);
  const rated = lowest === null ? { kg: null, by: 'the notice', steps: [] } : ofNotice(lowest);
  return { ...rated, interpolated: false, notes: [], missing };
}

const noticeStep = (kg: number, from: string): WorkedStep => ({
  what: 'Rating of the frame, for the bay as it stands on its notice',
  formula: 'm_notice',
  values: [{ symbol: 'm_notice', is: 'rated mass of one frame', quantity: { value: kg, kind: 'mass' }, from }],
  result: { symbol: RATED, quantity: { value: kg, kind: 'mass' } },
  source: 'load notice',
});

/** A number for the bay as it stands on the notice holds only where the notice shows how it stands. */
function shownBy(bay: FrameBay, notice: FrameNotice): readonly Missing[] {
  const missing: Missing[] = [];
  const how = 'Read it from the load notice: its rating of the frame holds for the bay as it stands there.';
  if (notice.firstBeam === null && bay.firstBeam !== null)
    missing.push({ input: `first beam height on the notice of ${bay.name}`, how, field: `${notice.field}firstBeamMm` });
  if (bay.greatestGap === null) return missing;
  if (notice.greatestGap === null)
    missing.push({ input: `greatest gap between beams on the notice of ${bay.name}`, how, field: `${notice.field}greatestGapMm` });
  else if (bay.greatestGap > notice.greatestGap + SAME)
    missing.push({
      input: `rating of the frame for the gaps between the beams of ${bay.name}`,
      how: 'A gap is greater than its notice shows. Lower the upper beam, or ask the maker for a new notice.',
      field: `${bay.field}levels`,
    });
  return missing;
}

/** What keeps any rating from holding: a beam that the neighbour lacks, and a first beam above its notice. */
export function notHeldAsRated(bays: readonly FrameBay[], levels: readonly FrameLevel[]): readonly Missing[] {
  const missing: Missing[] = [];
  for (const bay of bays) {
    const { notice, firstBeam } = bay;
    if (notice !== null && notice.firstBeam !== null && firstBeam !== null && firstBeam > notice.firstBeam + SAME)
      missing.push({
        input: `rating of the frame for the first beam of ${bay.name}`,
        how: 'It stands higher than its load notice shows. Lower it, or ask the maker for a new notice in writing.',
        field: bay.firstBeamField,
      });
  }
  if (bays.length < 2) return missing;
  for (const level of levels) {
    const [end] = level.ends;
    if (level.ends.length > 1 || end === undefined) continue;
    const other = bays.find(({ side }) => side !== end.side);
    if (other !== undefined)
      missing.push({
        input: `beams of ${other.name} beside ${end.name}`,
        how: 'The frame is held from one side only there, and its rating does not cover that. Fit the beams, or ask the maker for a rating of this arrangement in writing.',
        field: `${other.field}levels`,
      });
  }
  return missing;
}
