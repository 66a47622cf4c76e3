/**
 * Bringing what was seen elsewhere into a site that is here: what becomes of each visit and of the
 * follow-up. Nothing that is here is lost, and nothing that is brought in.
 */
import { closingOf, type FollowUp } from '../visit/follow-up';
import type { Id } from '../site/site';
import { LIMITS } from '../site/limits';
import type { Visit } from '../visit/visit';
import type { IfVisitDiffers } from './package';

export type VisitStep =
  | { readonly kind: 'here'; readonly visit: Visit }
  | { readonly kind: 'add'; readonly visit: Visit }
  /** Takes the place of the one here, which is put aside. */
  | { readonly kind: 'replace'; readonly visit: Visit }
  /** Stands beside the one here, under an id and a name of its own. */
  | { readonly kind: 'beside'; readonly visit: Visit; readonly of: Id };

/**
 * @param ours written visits that are here, by id
 * @param theirs the visits that are brought in
 * @param write as a visit is written
 * @param copyId the ids to try, one after the other, for a visit that is kept beside the one here; the
 *   same ones for the same visit, so that what is brought in twice is kept once
 */
export function joinVisits(
  ours: ReadonlyMap<Id, string>,
  theirs: readonly Visit[],
  choice: IfVisitDiffers,
  write: (visit: Visit) => string,
  copyId: (visit: Visit, attempt: number) => Id,
): readonly VisitStep[] {
  return theirs.map((visit): VisitStep => {
    const here = ours.get(visit.id);
    if (here === undefined) return { kind: 'add', visit };
    if (here === write(visit)) return { kind: 'here', visit };
    if (choice === 'take-theirs') return { kind: 'replace', visit };
    for (let attempt = 0; ; attempt++) {
      const copy = { ...visit, id: copyId(visit, attempt), name: broughtIn(visit.name) };
      const there = ours.get(copy.id);
      if (there === undefined) return { kind: 'beside', visit: copy, of: visit.id };
      if (there === write(copy)) return { kind: 'here', visit: copy };
    }
  });
}

const ADDED = ' (brought in)';
/** A letter of two code units is not cut in half. */
const broughtIn = (name: string): string => `${name.slice(0, LIMITS.nameLength - ADDED.length).replace(/[\ud800-\udbff]$/, '')}${ADDED}`;

/** A visit with photos that had to be kept under other names. */
export const withPhotoNames = (visit: Visit, names: ReadonlyMap<string, string>): Visit =>
  visit.bays.some(({ photos }) => photos.some(({ file }) => names.has(file)))
    ? {
        ...visit,
        bays: visit.bays.map((bay) => ({
          ...bay,
          photos: bay.photos.map((photo) => ({ ...photo, file: names.get(photo.file) ?? photo.file })),
        })),
      }
    : visit;

export interface JoinedFollowUp {
  readonly book: FollowUp;
  /** What of theirs is not in it, in words; empty where nothing is left out. */
  readonly leftOut: readonly string[];
}

/** Closed actions and reduced loads of both; where the two say different things of one, ours stays and that is told. */
export function joinFollowUps(ours: FollowUp, theirs: FollowUp): JoinedFollowUp {
  const leftOut: string[] = [];
  const closings = theirs.closings.filter((closing) => {
    const here = closingOf(ours, closing.actionId);
    if (here !== null && !same(here, closing))
      leftOut.push(`an action was closed in both, here by ${here.person} and there by ${closing.person}`);
    return here === null;
  });
  const reductions = theirs.reductions.filter((reduction) => {
    const here = ours.reductions.find(({ id }) => id === reduction.id);
    if (here !== undefined && !same(here, reduction)) leftOut.push(`the reduced load by ${reduction.engineer} reads otherwise here`);
    return here === undefined;
  });
  if (!same(ours.rhythm, theirs.rhythm)) leftOut.push('another rhythm of visits');
  if (theirs.responsible !== '' && ours.responsible !== '' && ours.responsible !== theirs.responsible)
    leftOut.push(`${theirs.responsible} as the person responsible`);
  const responsible = ours.responsible === '' ? theirs.responsible : ours.responsible;
  const book = { ...ours, responsible, closings: [...ours.closings, ...closings], reductions: [...ours.reductions, ...reductions] };
  return { book, leftOut };
}

/** Both come from the same strict reading, so their keys stand in one order once written. */
function same<T extends object>(one: T, other: T): boolean {
  const keys = Object.keys(one) as (keyof T)[];
  return keys.length === Object.keys(other).length && keys.every((key) => one[key] === other[key]);
}
