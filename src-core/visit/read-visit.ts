/**
 * A visit's file: strict reading, every problem with its place, and one canonical form in writing.
 *
 * Bays, frames and levels are only named by id here. The site may have changed since the visit, and
 * a visit outlives what it saw: what the site no longer has is left out where it is shown.
 */
import { choice, date, flag, isRecord, nullable, number, quote, report, text, type Field, type Reader } from '../site/fields';
import { ownId } from '../site/ids';
import { LIMITS } from '../site/limits';
import { list, record, variant } from '../site/records';
import { aLength, aLengthOrZero, aName, aPosition, someText } from '../site/schema-goods';
import { namedId, readDocument, writeDocument, type DocumentKind, type DocumentReading } from './read-document';
import {
  BEAM_MEMBERS,
  FRAME_MEMBERS,
  VISIT_KINDS,
  type BayVisit,
  type BeamDamage,
  type Carried,
  type ChecklistItem,
  type FrameDamage,
  type MissingLock,
  type NoticeSeen,
  type Photo,
  type PlumbSeen,
  type SagReading,
  type Seen,
  type SeenDamage,
  type SignOff,
  type Visit,
} from './visit';

const aPerson = text(LIMITS.nameLength);
const measured = nullable(aLengthOrZero, 'where it was not measured');
const seen = choice<Seen>(['yes', 'no', 'not-looked-at']);
const beam = choice(['front', 'rear'] as const);

const checklist = record<Readonly<Record<ChecklistItem, Seen>>>('checklist', {
  locks: seen,
  anchors: seen,
  notices: seen,
  protectors: seen,
  pallets: seen,
  decks: seen,
  plumb: seen,
  floor: seen,
});

const damageOf = (id: Field<string>) =>
  variant<SeenDamage, 'on'>('damage', 'on', {
    frame: record<FrameDamage>('damage of a frame', {
      id,
      on: choice(['frame']),
      frameId: namedId('frame'),
      member: choice(FRAME_MEMBERS),
      alongMm: measured,
      acrossMm: measured,
      gaugeMm: aLength,
      torn: flag,
      note: someText,
      found: date,
    }),
    beam: record<BeamDamage>('damage of a beam', {
      id,
      on: choice(['beam']),
      levelId: namedId('level'),
      beam,
      member: choice(BEAM_MEMBERS),
      torn: flag,
      note: someText,
      found: date,
    }),
  });

const notice = record<NoticeSeen>('notice as seen', {
  there: seen,
  matches: seen,
  firstBeamMm: measured,
  greatestGapMm: measured,
  levels: nullable(number({ least: 0, most: LIMITS.levelsInBay, whole: true }), 'where they were not counted'),
  beams: seen,
  note: someText,
});

const sag = record<SagReading>('sag reading', {
  levelId: namedId('level'),
  beam,
  loadedMm: measured,
  unloadedMm: measured,
  sidewaysMm: measured,
});

const plumb = record<PlumbSeen>('plumb reading', {
  frameId: namedId('frame'),
  alongMm: aPosition,
  acrossMm: aPosition,
  heightMm: aLength,
  loaded: flag,
});

const photo = record<Photo>('photo', {
  id: ownId(),
  file: aName,
  original: text(LIMITS.nameLength),
  taken: text(LIMITS.idLength),
  note: someText,
});

/** By their ids the damages are those of the visit, or were. */
const carried = record<Carried>('what was put into the site', {
  damages: list('damages', damageOf(namedId('damage')), LIMITS.damagesOnFrame),
  sags: list('sag readings', sag, LIMITS.levelsInBay * 2),
});

const bay = record<BayVisit>('bay of a visit', {
  runId: namedId('run'),
  bayId: namedId('bay'),
  finished: flag,
  person: aPerson,
  date,
  checklist,
  missingLocks: list(
    'missing locks',
    record<MissingLock>('missing lock', { levelId: namedId('level'), beam, end: choice(['left', 'right']) }),
    LIMITS.levelsInBay * 4,
  ),
  notice,
  damages: list('damages', damageOf(ownId()), LIMITS.damagesOnFrame),
  sags: list('sag readings', sag, LIMITS.levelsInBay * 2),
  plumb: list('plumb readings', plumb, 2),
  photos: list('photos', photo, LIMITS.rows),
  notes: text(LIMITS.notesLength),
  carried: nullable(carried, 'where nothing was put into the site yet'),
});

/** Version of the file; a newer one is refused by its number. */
export const VISIT_VERSION = 2;

const kind: DocumentKind<Visit> = {
  noun: 'visit',
  version: VISIT_VERSION,
  steps: { 1: withCarried },
  field: record(
    'visit',
    {
      version: number({ least: VISIT_VERSION, most: VISIT_VERSION, whole: true }),
      id: ownId(),
      siteId: namedId('site'),
      name: aName,
      kind: choice(VISIT_KINDS),
      person: aPerson,
      started: date,
      signed: nullable(record<SignOff>('signature', { person: aName, role: aPerson, date }), 'where it is not signed yet'),
      bays: list('bays', bay, LIMITS.baysInRun),
    },
    eachBayOnce,
  ),
};

export const readVisit = (json: unknown): DocumentReading<Visit> => readDocument(kind, json);

/** @throws RangeError if the visit holds what `readVisit` would refuse in a single value, quoting it */
export const writeVisit = (visit: Visit): string => writeDocument(kind, visit);

/** Version 1 did not say what was put into the site, and beams never were. */
function withCarried(json: Readonly<Record<string, unknown>>): unknown {
  const bays = Array.isArray(json.bays) ? json.bays.map((one: unknown) => (isRecord(one) ? { ...one, carried: null } : one)) : json.bays;
  return { ...json, version: 2, bays };
}

function eachBayOnce({ bays }: Readonly<Record<string, unknown>>, reader: Reader): void {
  if (!Array.isArray(bays)) return;
  const ids = bays.map((one: unknown) => (isRecord(one) ? one.bayId : undefined));
  ids.forEach((id, i) => {
    if (typeof id === 'string' && ids.indexOf(id) < i)
      report(reader, `The bay ${quote(id)} stands twice in this visit. Keep one of them.`, 'bays', i, 'bayId');
  });
}
