/**
 * Does the rack stand as its load notice describes it. A rating holds for the rack on its notice only, so
 * that any departure makes the bay not assessable until it is put right or the notice is renewed.
 *
 * Source: facts M-31, common practice; "any mismatch is not assessable".
 */
import { countOf, lengthOf } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type Text } from './finding';
import { distinctMissing, finding, notAssessable } from './make-finding';

type Answer = 'yes' | 'no' | 'unknown';

/** A beam level as it stands. */
export interface StandingLevel {
  /** "level 2". */
  readonly name: string;
  /** Floor to the top of the beams, mm. */
  readonly height: number;
  /** Name of the beam type; null = not known. */
  readonly beamType: { readonly id: string; readonly name: string } | null;
  readonly locks: Answer;
  readonly unitLoads: number;
  /** Prefix of its fields: `level:id:`. */
  readonly field: string;
}

/** What the notice says; null = not stated. Lengths in mm. */
export interface NoticeAsRead {
  /** "load notice LN-4, …". */
  readonly from: string;
  readonly firstBeam: number | null;
  readonly greatestGap: number | null;
  readonly levels: number | null;
  readonly unitLoadsPerLevel: number | null;
  readonly beamType: { readonly id: string; readonly name: string } | null;
  /** Prefix of its fields: `notice:id:`. */
  readonly field: string;
}

export interface NoticeMatchInput {
  readonly place: Place;
  readonly bay: string;
  readonly levels: readonly StandingLevel[];
  readonly notice: NoticeAsRead | null;
  readonly noticeMissing: Missing;
}

/** One way in which the rack departs from its notice: what was found, and what to do. */
interface Departure {
  readonly says: Text;
  readonly missing: Missing;
}

const SAME = 1e-6;
const READ = 'Read it from the load notice or the drawing, or ask the maker.';

export function noticeMatch(input: NoticeMatchInput): Finding {
  const { place, bay, levels, notice, noticeMissing } = input;
  const check = 'notice-match';
  if (notice === null) return notAssessable(check, place, [noticeMissing]);
  if (levels.length === 0) return finding({ check, place, verdict: 'within', says: () => say`${bay} has no beam levels.` });
  const unstated = unknownOf(notice, levels);
  const departures = departuresOf(notice, levels);
  if (departures.length === 0 && unstated.length === 0)
    return finding({
      check,
      place,
      verdict: 'within',
      says: () => say`${bay} stands as its notice describes it: first beam, gaps, levels, beam type, unit loads and locks.`,
      notes: () => [say`Compared with ${notice.from}. Heights are read to the tops of the beams.`],
    });
  return notAssessable(check, place, distinctMissing([...departures.map(({ missing }) => missing), ...unstated]), {
    says: () => {
      const departs = departures.reduce<Text>(
        (all, one) => say`${all} ${one.says}`,
        say`${bay} does not stand as its notice describes it.`,
      );
      const unknown = unstated.map((one) => one.input).join('; ');
      if (departures.length === 0) return say`Whether ${bay} stands as its notice describes it cannot be told. Not known: ${unknown}.`;
      return unstated.length === 0 ? departs : say`${departs} Not known: ${unknown}.`;
    },
    notes: () => [say`Compared with ${notice.from}. Heights are read to the tops of the beams.`],
  });
}

function unknownOf(notice: NoticeAsRead, levels: readonly StandingLevel[]): readonly Missing[] {
  const of = (input: string, field: string): Missing => ({
    input: `${input} on the load notice`,
    how: READ,
    field: `${notice.field}${field}`,
  });
  return [
    ...(notice.firstBeam === null ? [of('first beam height', 'firstBeamMm')] : []),
    ...(notice.greatestGap === null && levels.length > 1 ? [of('greatest gap between beams', 'greatestGapMm')] : []),
    ...(notice.levels === null ? [of('number of beam levels', 'levels')] : []),
    ...(notice.unitLoadsPerLevel === null ? [of('number of unit loads a level is made for', 'unitLoadsPerLevel')] : []),
    ...(notice.beamType === null ? [of('beam type', 'beamTypeId')] : []),
    ...levels.flatMap((level) => [
      ...(level.beamType === null
        ? [
            {
              input: `beam type of ${level.name}`,
              how: 'Read the maker’s mark on the beam, measure its section, and choose the type.',
              field: `${level.field}beamTypeId`,
            },
          ]
        : []),
      ...(level.locks === 'unknown'
        ? [{ input: `locks of ${level.name}`, how: 'Look at all four beam ends for their locks.', field: `${level.field}locks` }]
        : []),
    ]),
  ];
}

function departuresOf(notice: NoticeAsRead, levels: readonly StandingLevel[]): readonly Departure[] {
  const found: Departure[] = [];
  const renew = 'Put it back, or have the maker confirm it in writing and renew the notice.';
  const [first] = levels;
  if (first !== undefined && notice.firstBeam !== null && first.height > notice.firstBeam + SAME)
    found.push({
      says: say`Its first beam stands at ${lengthOf(first.height)}, and the notice shows ${lengthOf(notice.firstBeam)}: lower it, or have the notice renewed.`,
      missing: { input: 'a load notice for the first beam as it stands', how: renew, field: `${first.field}heightMm` },
    });
  levels.forEach((level, i) => {
    const below = levels[i - 1];
    if (below !== undefined && notice.greatestGap !== null && level.height - below.height > notice.greatestGap + SAME)
      found.push({
        says: say`From ${below.name} to ${level.name} there are ${lengthOf(level.height - below.height)}, and the notice shows ${lengthOf(notice.greatestGap)} at most: lower ${level.name}, or have the notice renewed.`,
        missing: { input: `a load notice for the gap under ${level.name}`, how: renew, field: `${level.field}heightMm` },
      });
    if (level.beamType !== null && notice.beamType !== null && level.beamType.id !== notice.beamType.id)
      found.push({
        says: say`The beams of ${level.name} are ${level.beamType.name}, and the notice is for ${notice.beamType.name}: fit those, or have the notice renewed.`,
        missing: { input: `a load notice for the beams of ${level.name}`, how: renew, field: `${level.field}beamTypeId` },
      });
    if (level.locks === 'no')
      found.push({
        says: say`Locks are missing on ${level.name}, so that its beams can be lifted out: fit them at once, and load nothing there before.`,
        missing: {
          input: `locks of ${level.name}`,
          how: 'Fit every lock at once, and load nothing there before.',
          field: `${level.field}locks`,
        },
      });
    if (notice.unitLoadsPerLevel !== null && level.unitLoads > notice.unitLoadsPerLevel)
      found.push({
        says: say`${level.unitLoads} unit loads stand on ${level.name}, and the notice is for ${countOf(notice.unitLoadsPerLevel)}: take some away.`,
        missing: {
          input: `a load notice for ${level.unitLoads} unit loads on ${level.name}`,
          how: 'Take some away, or have the maker confirm it in writing and renew the notice.',
          field: `${notice.field}unitLoadsPerLevel`,
        },
      });
  });
  if (notice.levels !== null && levels.length !== notice.levels)
    found.push({
      says: say`It has ${levels.length} beam levels, and the notice shows ${notice.levels}: ${levels.length > notice.levels ? 'take the added ones out' : 'put the missing ones back'}, or have the notice renewed.`,
      missing: { input: 'a load notice for this number of beam levels', how: renew, field: `${notice.field}levels` },
    });
  return found;
}
