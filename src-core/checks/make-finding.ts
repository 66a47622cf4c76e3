/** The one place where findings are put together, so that every check fills in every part alike. */
import type { Quantity } from '../units/quantity';
import {
  say,
  verdictOf,
  type CheckName,
  type Finding,
  type Missing,
  type Place,
  type Text,
  type Verdict,
  type WorkedStep,
} from './finding';
import { listed } from './phrase';

interface FindingParts {
  readonly check: CheckName;
  readonly place: Place;
  readonly verdict: Verdict;
  readonly utilisation?: number;
  readonly demand?: Quantity;
  readonly allowed?: Quantity;
  readonly missing?: readonly Missing[];
  readonly counts?: boolean;
  readonly says: () => Text;
  readonly worked?: () => readonly WorkedStep[];
  readonly notes?: () => readonly Text[];
}

/** Where a finding keeps what writes its texts; hidden, so that a finding reads and clones as plain data. */
const WRITERS = Symbol('writers');
type Writers = Pick<FindingParts, 'says' | 'worked' | 'notes'>;

// One getter for all findings: with one of its own, each finding would weigh four times as much.
const written = (part: keyof Writers): PropertyDescriptor => ({
  enumerable: true,
  get(this: { readonly [WRITERS]: Writers }) {
    return this[WRITERS][part]?.() ?? [];
  },
});
const TEXTS = { says: written('says'), worked: written('worked'), notes: written('notes') };

/**
 * A finding whose sentence, worked calculation and notes are written when they are read: the audit of
 * a large site makes a hundred thousand findings and shows a few. To a reader it is plain data, and it
 * clones and serialises as such.
 */
export function finding(parts: FindingParts): Finding {
  const made = {
    check: parts.check,
    place: parts.place,
    verdict: parts.verdict,
    utilisation: parts.utilisation ?? null,
    demand: parts.demand ?? null,
    allowed: parts.allowed ?? null,
    missing: parts.missing ?? NONE,
    counts: parts.counts ?? true,
  };
  Object.defineProperty(made, WRITERS, { value: parts satisfies Writers });
  return Object.defineProperties(made as Finding, TEXTS);
}

const NONE: readonly Missing[] = [];

/** The finding of a check that lacks inputs: names each, and never passes. */
export const notAssessable = (
  check: CheckName,
  place: Place,
  missing: readonly Missing[],
  extra: Partial<Pick<FindingParts, 'counts' | 'demand' | 'says' | 'worked' | 'notes'>> = {},
): Finding =>
  finding({
    check,
    place,
    verdict: 'not-assessable',
    missing,
    says: () => say`Not known: ${listed(missing.map(({ input }) => input))}.`,
    ...extra,
  });

/**
 * Demand over what is allowed. Nothing allowed is used without end as soon as anything is demanded.
 */
export const utilisationOf = (demand: number, allowed: number): number => (allowed > 0 ? demand / allowed : demand > 0 ? Infinity : 0);

/** The parts of a finding that compares a demand with what is allowed, both in the core's unit of `kind`. */
export function compared(demand: Quantity, allowed: Quantity, closeAbove: number) {
  const utilisation = utilisationOf(demand.value, allowed.value);
  return { demand, allowed, utilisation, verdict: verdictOf(utilisation, closeAbove) };
}

/** Missing inputs without repetition. */
export function distinctMissing(missing: readonly Missing[]): readonly Missing[] {
  const seen = new Set<string>();
  return missing.filter(({ field }) => !seen.has(field) && seen.add(field));
}
