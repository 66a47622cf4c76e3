/**
 * A level's two beams under their goods, and the evenly spread load on the pair that would do the same
 * to the worse of them. This is what a notice's rating is compared with.
 */
import type { BeamAnswer } from '../statics/beam';
import { equivalentLoads } from '../statics/equivalent';
import type { BeamLoad } from '../statics/load';
import { massWeighing } from '../units/quantity';
import type { BeamSide, Place } from './finding';
import type { LevelRating } from './level-rating';
import type { LoosePair } from './loose-pair';
import type { ResolvedRules } from './rule-sets';

/** Evenly spread masses on the pair, kg, one for each effect on one beam and its own load. */
export type EvenMasses = Readonly<Record<Effect | 'total', number>>;

export interface LoadedBeam {
  readonly load: BeamLoad;
  readonly answer: BeamAnswer;
  readonly even: EvenMasses;
}

/** A unit load as the worked calculation names it. */
interface PairGoods {
  readonly name: string;
  readonly massKg: number;
  readonly from: string;
  readonly frontShare: number;
  /** Centre of mass from the left support, mm. */
  readonly centre: number;
}

export interface PairInput {
  readonly place: Place;
  /** "Level 2". */
  readonly level: string;
  /** Between the supports, mm, and what it is taken to be. */
  readonly span: number;
  readonly spanFrom: string;
  /** Asked for by worked calculations alone. */
  readonly goods: () => readonly PairGoods[];
  readonly totalKg: number;
  readonly front: LoadedBeam;
  readonly rear: LoadedBeam;
  /** EI of one beam, N·mm²; any value where it is not known. */
  readonly rigidity: number;
  readonly rigidityKnown: boolean;
  /** Fixity of both ends of both beams as solved: 0 pinned, towards 1 fixed. */
  readonly fixity: number;
  readonly fixityFrom: string;
  /** The same beams with the likely fixity of their ends; null where the real one is known. */
  readonly stiffer: (() => { readonly front: EvenMasses; readonly rear: EvenMasses }) | null;
  /** The same goods off their marks and heavier; null where neither may be. */
  readonly loose: LoosePair | null;
  readonly rated: LevelRating;
  readonly rules: ResolvedRules;
}

export type Effect = 'bending' | 'endShear' | 'deflection';

/** Fixity of a beam's ends from their connectors' stiffness k: 1 / (1 + 2EI/kL), both ends alike. */
export const fixityOf = (stiffness: number, rigidity: number, span: number): number =>
  stiffness > 0 ? 1 / (1 + (2 * rigidity) / (stiffness * span)) : 0;

/** Stiffness in N·mm/rad that gives this fixity, below 1. */
export const stiffnessFor = (fixity: number, rigidity: number, span: number): number => (2 * rigidity * fixity) / (span * (1 - fixity));

/**
 * How much less an even load bends (by sagging) and sags a beam whose ends have this fixity than a
 * pinned one. Source: slope-deflection, M = wL²/8 − f·wL²/12 and δ = 5wL⁴/384EI·(1 − 4f/5).
 */
export const evenBendingFactor = (fixity: number): number => 1 - (2 * fixity) / 3;
export const evenDeflectionFactor = (fixity: number): number => 1 - (4 * fixity) / 5;

/**
 * The even load on the pair, kg, that does to a beam what this one's load does: both with the same
 * ends, and with each beam taking half.
 */
export function evenMasses(answer: BeamAnswer, rigidity: number, fixity: number): EvenMasses {
  const one = equivalentLoads(answer, rigidity);
  return {
    total: massWeighing(2 * one.total),
    bending: massWeighing(2 * one.bending) / evenBendingFactor(fixity),
    endShear: massWeighing(2 * one.endShear),
    deflection: massWeighing(2 * one.deflection) / evenDeflectionFactor(fixity),
  };
}

/** One beam of the pair. */
export interface OneBeam {
  readonly side: BeamSide;
  readonly beam: LoadedBeam;
}

/** The beam on which an effect is greater, and the even mass on the pair that it stands for. */
export interface WorseBeam extends OneBeam {
  readonly kg: number;
  /** The other beam's, kg. */
  readonly otherKg: number;
}

/** The beam on which the effect is greater; the front one where they are alike. */
export function worseBeam(input: Pick<PairInput, 'front' | 'rear'>, effect: Effect | 'total'): WorseBeam {
  const { front, rear } = input;
  const frontKg = front.even[effect];
  const rearKg = rear.even[effect];
  return rearKg > frontKg
    ? { side: 'rear', beam: rear, kg: rearKg, otherKg: frontKg }
    : { side: 'front', beam: front, kg: frontKg, otherKg: rearKg };
}

/** Whether front and rear carry alike, so that neither needs to be named. */
export const alike = ({ front, rear }: PairInput): boolean => front.answer === rear.answer;

/** How a rating or a load names the pair's worse beam. */
export const nameOf = (input: PairInput, side: BeamSide): string => (alike(input) ? 'each beam' : `the ${side} beam`);
