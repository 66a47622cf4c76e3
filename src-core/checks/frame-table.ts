/**
 * The maker's rating of one upright frame, from a table by unsupported height.
 *
 * Between rows the next taller row holds, or a straight line where the site chooses that: capacity that
 * falls with the square of the height lies 4 to 6 % below such a line. Beyond the last row there is no
 * rating. Below the first row the first one holds, which is the safe side.
 */
import { lengthOf, massOf, type Quantity } from '../units/quantity';
import { say, type Text, type WorkedStep } from './finding';
import { put } from './worked-values';

export interface FrameTableRow {
  readonly heightMm: number;
  readonly ratedKg: number;
}

export type FrameTableChoice = 'next-taller-row' | 'interpolate';

export type FrameTableAnswer =
  | {
      readonly ok: true;
      readonly kg: number;
      /** How it was read, for print; empty on an exact row. */
      readonly notes: readonly Text[];
      readonly interpolated: boolean;
      /** The line of the table or the interpolation. */
      readonly steps: (symbol: string, from: string) => readonly WorkedStep[];
    }
  | { readonly ok: false; readonly reason: 'empty' | 'beyond' | 'contradictory'; readonly says: Text };

/** Heights of beams and of rows that agree to this are the same, mm. */
const SAME = 1e-6;

/**
 * @param rows in any order; of rows for one height the lowest rating holds
 * @param height greatest unsupported height, mm
 * @throws RangeError if a row or the height is not above 0
 * @example rows 1 750: 8 700 and 2 000: 7 600 at 1 900 → 7 600 by the next taller row, 8 040 interpolated
 */
export function frameTableRating(rows: readonly FrameTableRow[], height: number, choice: FrameTableChoice): FrameTableAnswer {
  if (!(height > 0 && height < Infinity)) throw new RangeError(`unsupported height must be above 0 mm, got ${height}`);
  const table = inOrder(rows);
  const last = table.at(-1);
  if (last === undefined) return { ok: false, reason: 'empty', says: say`The frame has no table of ratings.` };
  for (const [i, row] of table.entries()) {
    const shorter = table[i - 1];
    if (shorter !== undefined && row.ratedKg > shorter.ratedKg)
      return {
        ok: false,
        reason: 'contradictory',
        says: say`The table contradicts itself: it rates ${massOf(row.ratedKg)} at ${lengthOf(row.heightMm)} and only ${massOf(shorter.ratedKg)} at the lesser height of ${lengthOf(shorter.heightMm)}. Correct it from the maker’s sheet.`,
      };
  }
  const next = table.find((row) => row.heightMm >= height - SAME);
  if (next === undefined)
    return {
      ok: false,
      reason: 'beyond',
      says: say`The table ends at ${lengthOf(last.heightMm)}. It gives no rating for an unsupported height of ${lengthOf(height)}, and none is taken from beyond a table.`,
    };
  const before = table[table.indexOf(next) - 1];
  if (next.heightMm <= height + SAME) return exactly(next, []);
  if (before === undefined)
    return exactly(next, [say`${lengthOf(height)} is below the table’s first row: that row, ${lengthOf(next.heightMm)}, is used.`]);
  if (choice === 'next-taller-row')
    return exactly(next, [say`The table has no row for ${lengthOf(height)}: its next taller one, ${lengthOf(next.heightMm)}, is used.`]);
  return between(before, next, height);
}

/** From the least height up, each height once with its lowest rating. */
function inOrder(rows: readonly FrameTableRow[]): readonly FrameTableRow[] {
  for (const { heightMm, ratedKg } of rows)
    if (!(heightMm > 0 && heightMm < Infinity && ratedKg > 0 && ratedKg < Infinity))
      throw new RangeError(`a row of the frame table must be above 0 mm and 0 kg, got ${heightMm} mm and ${ratedKg} kg`);
  const lowest = new Map<number, number>();
  for (const { heightMm, ratedKg } of rows) lowest.set(heightMm, Math.min(ratedKg, lowest.get(heightMm) ?? Infinity));
  return [...lowest].map(([heightMm, ratedKg]) => ({ heightMm, ratedKg })).sort((a, b) => a.heightMm - b.heightMm);
}

function exactly({ heightMm, ratedKg }: FrameTableRow, notes: readonly Text[]): FrameTableAnswer {
  return {
    ok: true,
    kg: ratedKg,
    notes,
    interpolated: false,
    steps: (symbol, from) => [
      {
        what: 'Rating of the frame, row of its table',
        formula: 'm_row',
        values: [put('m_row', `row of ${Number(heightMm.toFixed(3))} mm`, massOf(ratedKg), from)],
        result: { symbol, quantity: massOf(ratedKg) },
        source: 'maker’s table',
      },
    ],
  };
}

function between(shorter: FrameTableRow, taller: FrameTableRow, height: number): FrameTableAnswer {
  const part = (height - shorter.heightMm) / (taller.heightMm - shorter.heightMm);
  const kg = shorter.ratedKg - (shorter.ratedKg - taller.ratedKg) * part;
  return {
    ok: true,
    kg,
    interpolated: true,
    notes: [
      say`Interpolated between the rows of ${lengthOf(shorter.heightMm)} and ${lengthOf(taller.heightMm)}, as this site chooses. A straight line overstates by 4 to 6 % where capacity falls with the square of the height; the next taller row gives ${massOf(taller.ratedKg)}.`,
    ],
    steps: (symbol, from) => {
      const row = (name: string, is: string, amount: Quantity) => put(name, is, amount, from);
      return [
        {
          what: 'Rating of the frame, interpolated between two rows of its table',
          formula: 'm_a − (m_a − m_b) · (h − h_a) / (h_b − h_a)',
          values: [
            row('m_a', 'rating of the shorter row', massOf(shorter.ratedKg)),
            row('m_b', 'rating of the taller row', massOf(taller.ratedKg)),
            row('h_a', 'height of the shorter row', lengthOf(shorter.heightMm)),
            row('h_b', 'height of the taller row', lengthOf(taller.heightMm)),
            put('h', 'unsupported height', lengthOf(height), 'beam levels of the bays at the frame'),
          ],
          result: { symbol, quantity: massOf(kg) },
          source: 'maker’s table; straight line between rows by the site’s choice',
        },
      ];
    },
  };
}
