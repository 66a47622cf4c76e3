/**
 * What becomes of findings after the visit: who closed what and how, what an engineer allows in the
 * meantime, and in which rhythm the bays are visited. Kept beside the site in a file of its own.
 */
import { say, type Text } from '../checks/finding';
import { date, number, text } from '../site/fields';
import { ownId } from '../site/ids';
import { LIMITS } from '../site/limits';
import { list, record } from '../site/records';
import { aName, someText } from '../site/schema-goods';
import type { Id } from '../site/site';
import { dateWords } from '../units/dates';
import { namedId, readDocument, writeDocument, type DocumentKind, type DocumentReading } from './read-document';

export interface FollowUp {
  readonly siteId: Id;
  /** Appointed to answer for the racks; may be empty. */
  readonly responsible: string;
  readonly rhythm: Rhythm;
  readonly closings: readonly Closing[];
  readonly reductions: readonly Reduction[];
}

/** Source: facts F-92 and F-93, weekly or by risk assessment, and at most 12 months (HSG76, EN 15635, secondary). */
export interface Rhythm {
  readonly visitDays: number;
  readonly inspectionMonths: number;
  /** Why it differs from 7 days and 12 months; empty where it does not. */
  readonly reason: string;
}

export const USUAL_RHYTHM: Rhythm = { visitDays: 7, inspectionMonths: 12, reason: '' };

/** An action that was done. */
export interface Closing {
  readonly actionId: string;
  readonly date: string;
  readonly person: string;
  /** "Upright section replaced with the maker's part, order 4711". */
  readonly how: string;
}

/** A reduced load as an engineer stated it. Never calculated, and at an end with its day. */
export interface Reduction {
  readonly id: Id;
  readonly frameId: Id;
  /** The engineer's words, with the loads. */
  readonly says: string;
  readonly engineer: string;
  /** Last day on which it holds. */
  readonly until: string;
  readonly recordedBy: string;
  readonly recordedOn: string;
}

export const newFollowUp = (siteId: Id): FollowUp => ({ siteId, responsible: '', rhythm: USUAL_RHYTHM, closings: [], reductions: [] });

/** @throws RangeError if the action is closed already, or if it does not say who, when and how */
export function closeAction(book: FollowUp, closing: Closing): FollowUp {
  const before = closingOf(book, closing.actionId);
  if (before) throw new RangeError(`action "${closing.actionId}" was closed on ${before.date} by ${before.person}`);
  for (const key of ['date', 'person', 'how'] as const)
    if (closing[key].trim() === '') throw new RangeError(`closing action "${closing.actionId}" needs its ${key}`);
  return { ...book, closings: [...book.closings, closing] };
}

export const closingOf = (book: FollowUp, actionId: string): Closing | null =>
  book.closings.find((one) => one.actionId === actionId) ?? null;

/**
 * A finding that the site itself has, under the id of its action. What stands there is open, whatever was
 * said of it before: where it was closed and stands again, or still, it is a new action, and says so.
 * @param id of the action when it was never closed
 */
export function standing({ closings }: FollowUp, id: string): { readonly id: string; readonly says: readonly Text[] } {
  const before = closings.filter(({ actionId }) => actionId === id || actionId.startsWith(`${id}@`));
  const last = before.at(-1);
  if (last === undefined) return { id, says: [] };
  return {
    id: `${id}@${before.length + 1}`,
    says: [say`${last.person} said on ${dateWords(last.date)} that this was done (${last.how}), and it stands in the site all the same.`],
  };
}

/** @throws RangeError if it does not say what is allowed, by whom and until when */
export function recordReduction(book: FollowUp, reduction: Reduction): FollowUp {
  for (const key of ['says', 'engineer', 'until'] as const)
    if (reduction[key].trim() === '') throw new RangeError(`a reduced load is taken down only with its ${key}`);
  return { ...book, reductions: [...book.reductions.filter(({ id }) => id !== reduction.id), reduction] };
}

/** @throws RangeError if the rhythm is not at least a day and a month, or changed without a reason */
export function setRhythm(book: FollowUp, rhythm: Rhythm): FollowUp {
  const { visitDays, inspectionMonths, reason } = rhythm;
  if (!(Number.isInteger(visitDays) && visitDays >= 1 && Number.isInteger(inspectionMonths) && inspectionMonths >= 1))
    throw new RangeError(`a rhythm is in whole days and months from 1, got ${visitDays} and ${inspectionMonths}`);
  const usual = visitDays === USUAL_RHYTHM.visitDays && inspectionMonths === USUAL_RHYTHM.inspectionMonths;
  if (!usual && reason.trim() === '')
    throw new RangeError('another rhythm than 7 days and 12 months needs its reason, such as a risk assessment');
  return { ...book, rhythm };
}

export const setResponsible = (book: FollowUp, responsible: string): FollowUp => ({ ...book, responsible });

// ---------------------------------------------------------------- the file

const VERSION = 1;
const MOST = 100_000;

const kind: DocumentKind<FollowUp> = {
  noun: 'follow-up file',
  version: VERSION,
  field: record('follow-up file', {
    version: number({ least: VERSION, most: VERSION, whole: true }),
    siteId: namedId('site'),
    responsible: text(LIMITS.nameLength),
    rhythm: record<Rhythm>('rhythm', {
      visitDays: number({ unit: 'days', least: 1, most: 366, whole: true }),
      inspectionMonths: number({ unit: 'months', least: 1, most: 120, whole: true }),
      reason: someText,
    }),
    closings: list(
      'closed actions',
      record<Closing>('closed action', { actionId: text(LIMITS.nameLength, { visible: true }), date, person: aName, how: someText }),
      MOST,
    ),
    reductions: list(
      'reduced loads',
      record<Reduction>('reduced load', {
        id: ownId(),
        frameId: namedId('frame'),
        says: someText,
        engineer: aName,
        until: date,
        recordedBy: text(LIMITS.nameLength),
        recordedOn: date,
      }),
      MOST,
    ),
  }),
};

export const readFollowUp = (json: unknown): DocumentReading<FollowUp> => readDocument(kind, json);

/** @throws RangeError if it holds what `readFollowUp` would refuse in a single value, quoting it */
export const writeFollowUp = (book: FollowUp): string => writeDocument(kind, book);
