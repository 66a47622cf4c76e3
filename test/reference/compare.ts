/** Compares the core's answer to a reference case with what the case expects, quantity by quantity. */
import { solveBeam, type BeamAnswer } from '../../src-core/statics/beam';
import { equivalentLoads, type EquivalentLoads } from '../../src-core/statics/equivalent';
import type { ReferenceCase, Tolerances } from './read-cases';

export interface Comparison {
  readonly quantity: string;
  readonly got: number | null;
  readonly expected: number | null;
  /** As parts of the quantity's scale (resultant, resultant × span / 8, deflection or span). */
  readonly error: number;
  readonly allowed: number;
}

export interface CaseResult {
  readonly id: string;
  readonly comparisons: readonly Comparison[];
  /** Expected quantities that this runner does not know. */
  readonly unknown: readonly string[];
  /** Why the core refused the case, if it did. */
  readonly refused: string | null;
}

interface Solved {
  readonly answer: BeamAnswer;
  readonly even: EquivalentLoads;
}
type Kind = keyof Tolerances;

const QUANTITIES: Record<string, [Kind, (solved: Solved) => number | null]> = {
  resultant_N: ['forces', ({ answer }) => answer.resultant],
  centroid_mm: ['places', ({ answer }) => answer.centroid],
  reactionLeft_N: ['forces', ({ answer }) => answer.reactionLeft],
  reactionRight_N: ['forces', ({ answer }) => answer.reactionRight],
  maxReaction_N: ['forces', ({ answer }) => Math.max(answer.reactionLeft, answer.reactionRight)],
  endMomentLeft_Nmm: ['moments', ({ answer }) => answer.endMomentLeft],
  endMomentRight_Nmm: ['moments', ({ answer }) => answer.endMomentRight],
  maxSagging_Nmm: ['moments', ({ answer }) => answer.sagging.moment],
  maxHogging_Nmm: ['moments', ({ answer }) => answer.hogging.moment],
  atHogging_mm: ['places', ({ answer }) => answer.hogging.at],
  maxShear_N: ['forces', ({ answer }) => answer.shear.force],
  maxDeflection_mm: ['deflections', ({ answer }) => answer.deflection.sag],
  atDeflection_mm: ['places', ({ answer }) => answer.deflection.at],
  eudlMoment_N: ['forces', ({ even }) => even.bending],
  eudlShear_N: ['forces', ({ even }) => even.endShear],
  eudlDeflection_N: ['forces', ({ even }) => even.deflection],
  eudlShearInSpan_N: ['forces', ({ answer }) => 2 * answer.shear.force],
};

export function compareCase(one: ReferenceCase, tolerances: Tolerances): CaseResult {
  const { id, beam, load, expect } = one;
  let solved: Solved;
  try {
    const answer = solveBeam(beam, load);
    solved = { answer, even: equivalentLoads(answer, beam.rigidity) };
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return { id, comparisons: [], unknown: [], refused: error.message };
  }
  const number = (key: string): number => (typeof expect[key] === 'number' ? expect[key] : 0);
  const resultant = number('resultant_N');
  const scales: Record<Kind, number> = {
    forces: resultant,
    moments: (resultant * beam.span) / 8,
    deflections: number('maxDeflection_mm'),
    places: beam.span,
  };
  const comparisons: Comparison[] = [];
  const unknown: string[] = [];
  const compare = (quantity: string, kind: Kind, got: number | null, expected: number | null, allowed = tolerances[kind]) => {
    comparisons.push({ quantity, got, expected, error: errorOf(got, expected, scales[kind]), allowed });
  };
  for (const [key, expected] of Object.entries(expect)) {
    const known = QUANTITIES[key];
    if (key === 'atSagging_mm' || key === 'atSaggingRange') continue;
    // A place of null stands for "nowhere in particular": there is nothing to compare.
    if (known !== undefined && expected === null && key !== 'centroid_mm') continue;
    if (known === undefined || !(typeof expected === 'number' || expected === null)) unknown.push(key);
    else compare(key, known[0], known[1](solved), expected);
  }
  const range = expectedRange(expect);
  if (range !== null) {
    const loose = one.loosePlaces ?? tolerances.places;
    const { from, to } = solved.answer.sagging;
    if (range[0] === range[1]) compare('atSagging_mm', 'places', farther(from, to, range[0]), range[0], loose);
    else {
      compare('atSaggingRange from', 'places', from, range[0], loose);
      compare('atSaggingRange to', 'places', to, range[1], loose);
    }
  }
  return { id, comparisons, unknown, refused: null };
}

function expectedRange(expect: ReferenceCase['expect']): readonly [number, number] | null {
  const range = expect['atSaggingRange'];
  if (Array.isArray(range) && typeof range[0] === 'number' && typeof range[1] === 'number') return [range[0], range[1]];
  const at = expect['atSagging_mm'];
  return typeof at === 'number' ? [at, at] : null;
}

const farther = (from: number, to: number, place: number): number => (Math.abs(from - place) > Math.abs(to - place) ? from : to);

function errorOf(got: number | null, expected: number | null, scale: number): number {
  if (got === expected) return 0;
  if (got === null || expected === null) return Infinity;
  const error = Math.abs(got - expected);
  // Where the scale is zero, so is what is expected: anything else is wrong.
  return scale > 0 ? error / scale : error === 0 ? 0 : Infinity;
}

export const isWithin = ({ error, allowed }: Comparison): boolean => error <= allowed;
