/**
 * Frozen records: what was checked, seen or printed, kept so that no later change goes unnoticed.
 *
 * Each record carries the hash of its contents and of the record before it. Whoever alters one must
 * alter every later one, and the last hash stands on paper that has been handed out. The chain proves
 * that nothing was altered after the fact; it does not prove who wrote it.
 */
import { choice, isRecord, number, text, type Field } from '../site/fields';
import { LIMITS } from '../site/limits';
import { list, record } from '../site/records';
import { aName } from '../site/schema-goods';
import type { Id } from '../site/site';
import { namedId, readDocument } from './read-document';

/** SHA-256 of the text's UTF-8 bytes, as 64 lower-case hexadecimal digits. */
export type Hash = (text: string) => string;

export const RECORD_KINDS = ['check', 'visit', 'paper'] as const;
export type RecordKind = (typeof RECORD_KINDS)[number];

/** A record before it is sealed. */
export interface RecordDraft {
  readonly kind: RecordKind;
  /** "Visit “Week 23, aisle 4”". */
  readonly title: string;
  /** ISO time, UTC. */
  readonly at: string;
  readonly person: string;
  /** Version of the program that made the figures. */
  readonly program: string;
  readonly siteId: Id;
  readonly siteName: string;
  /** Hash of the whole site as it stood. */
  readonly siteChecksum: string;
  readonly ruleSet: string;
  /** Bays that it is about. */
  readonly bayIds: readonly Id[];
}

export interface FrozenRecord extends RecordDraft {
  /** 1 for the first of a site. */
  readonly number: number;
  /** Hash of the contents' text: inputs and figures as JSON. */
  readonly contentsHash: string;
  /** Hash of the record before; empty for the first. */
  readonly previous: string;
  /** Hash of everything above. */
  readonly hash: string;
}

export const RECORD_VERSION = 1;

const aHash: Field<string> = text(64);
const recordField = record<FrozenRecord & { readonly version: number }>('record', {
  version: number({ least: RECORD_VERSION, most: RECORD_VERSION, whole: true }),
  number: number({ least: 1, most: Number.MAX_SAFE_INTEGER, whole: true }),
  kind: choice(RECORD_KINDS),
  title: text(LIMITS.detailLength, { visible: true }),
  at: text(LIMITS.idLength, { visible: true }),
  person: text(LIMITS.nameLength),
  program: text(LIMITS.idLength, { visible: true }),
  siteId: namedId('site'),
  siteName: aName,
  siteChecksum: aHash,
  ruleSet: text(LIMITS.nameLength),
  bayIds: list('bays', namedId('bay'), LIMITS.baysInRun),
  contentsHash: aHash,
  previous: aHash,
  hash: aHash,
});
const kind = { noun: 'record', version: RECORD_VERSION, field: recordField };

/**
 * The record that follows `last`, or the first of a site.
 * @throws RangeError if the draft holds what could not be read back, quoting it
 */
export function sealRecord(draft: RecordDraft, contents: string, last: FrozenRecord | null, hash: Hash): FrozenRecord {
  const open = { ...draft, number: (last?.number ?? 0) + 1, contentsHash: hash(contents), previous: last?.hash ?? '', hash: '' };
  return { ...open, hash: hash(writeRecord(open)) };
}

/** One line of the records' file, in its one form. */
export const writeRecord = (one: FrozenRecord): string => JSON.stringify(recordField.canonical({ version: RECORD_VERSION, ...one }));

/** Whether the records are as they were written, and if not, the first that is not. */
export type ChainVerdict =
  | { readonly whole: true; readonly records: readonly FrozenRecord[] }
  | {
      readonly whole: false;
      /** Those before the first altered one. */
      readonly records: readonly FrozenRecord[];
      /** Number of the first altered record. */
      readonly altered: number;
      readonly message: string;
    };

/** How far the records had come when the last one was acknowledged, kept apart from them. */
export interface ChainHead {
  readonly number: number;
  readonly hash: string;
}

/**
 * Reads and verifies the records' file, one record a line.
 * @param contentsHash hash of a record's contents as they are now, null where they are gone; null to verify the chain alone
 * @param head the acknowledged end, without which records cut off at the end go unnoticed
 */
export function verifyChain(
  lines: readonly string[],
  hash: Hash,
  contentsHash: ((number: number) => string | null) | null = null,
  head: ChainHead | 'damaged' | null = null,
): ChainVerdict {
  const records: FrozenRecord[] = [];
  const stop = (altered: number, message: string): ChainVerdict => ({
    whole: false,
    records: records.slice(0, altered - 1),
    altered,
    message: `Record ${altered} ${message} Nothing from it on can be relied on. Take the records’ files from a copy, or keep both.`,
  });
  for (const [index, line] of lines.entries()) {
    const number = index + 1;
    const one = readLine(line);
    if (one === null) return stop(number, 'is damaged: it cannot be read.');
    if (one.number !== number) return stop(number, `is missing or out of its place: number ${one.number} stands there.`);
    // Its own hash holds, so what it names as the record before it is what was there: that one is the altered one.
    const own = writeRecord(one) === line && hash(writeRecord({ ...one, hash: '' })) === one.hash;
    if (!own) return stop(number, 'was altered after it was written.');
    const last = records.at(-1);
    if (one.previous !== (last?.hash ?? '')) return stop(Math.max(number - 1, 1), 'was replaced after the next one was written.');
    const contents = contentsHash === null ? one.contentsHash : contentsHash(number);
    if (contents === null) return stop(number, 'has lost its contents: their file is gone.');
    if (contents !== one.contentsHash) return stop(number, 'had its contents altered after it was written.');
    records.push(one);
  }
  if (head === 'damaged') return { whole: false, records, altered: records.length + 1, message: HEAD_DAMAGED };
  // A program that ended between record and head leaves the head one behind.
  const there = head === null ? undefined : records[head.number - 1];
  if (head !== null && head.number > records.length) return stop(records.length + 1, 'is missing: it was written and is no longer there.');
  if (head !== null && there !== undefined && there.hash !== head.hash) return stop(head.number, 'was replaced after it was written.');
  return { whole: true, records };
}

const HEAD_DAMAGED =
  'The note of how many records there are is damaged, so records may be missing at the end. Take head.json from a copy; where the last record shown is the last one kept, remove head.json.';

function readLine(line: string): FrozenRecord | null {
  let json: unknown;
  try {
    json = JSON.parse(line);
  } catch {
    return null;
  }
  if (!isRecord(json)) return null;
  const reading = readDocument<FrozenRecord>(kind, json);
  return reading.ok ? reading.document : null;
}
