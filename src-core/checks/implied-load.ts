/**
 * What a measured sag says of the load: the elastic part compared with what the declared load would
 * give, from pinned beam ends to ends of a likely fixity.
 *
 * A pinned beam sags most, so pinned ends give the smallest load that explains the sag: a measured sag
 * never proves that a load is small.
 */
import { evenDeflectionFactor, stiffnessFor } from './pair';
import { solveBeam } from '../statics/beam';
import type { BeamLoad } from '../statics/load';
import { deflectionIn } from '../statics/segment';
import { massWeighing } from '../units/quantity';

/** Second moment of a rectangular hollow section with sharp corners, mm⁴; bending about the axis across its height. */
export const boxSecondMoment = (height: number, width: number, wall: number): number =>
  (width * height ** 3 - (width - 2 * wall) * (height - 2 * wall) ** 3) / 12;

/** One end of the range: the beam with ends of this fixity. */
export interface ImpliedLoad {
  /** 0 pinned, towards 1 fixed. */
  readonly fixity: number;
  /** Evenly spread mass on the pair that gives the elastic sag, kg. */
  readonly evenKg: number;
  /** Against the declared load, where that is known. */
  readonly declared: {
    /** Sag at mid-span under the declared load, mm, and the end moments that go with it, N·mm. */
    readonly sag: number;
    readonly endMoments: number;
    /** Elastic sag over that sag. */
    readonly ratio: number;
    /** Declared mass times the ratio, kg. */
    readonly kg: number;
  } | null;
}

export interface ImpliedInput {
  readonly elastic: number;
  readonly span: number;
  /** EI of one beam, N·mm². */
  readonly rigidity: number;
  /** The declared load on this beam, and the declared mass of the level; null where not known, or nothing. */
  readonly declared: { readonly load: BeamLoad; readonly kg: number } | null;
}

/**
 * @param fixity of both ends, 0 to below 1
 * Accuracy: exact for the beam as given. Source: 5WL³/384EI · (1 − 4f/5) for the even load; facts M-25
 * is common practice: the declared load is scaled by measured over calculated sag.
 */
export function impliedLoad({ elastic, span, rigidity, declared }: ImpliedInput, fixity: number): ImpliedLoad {
  const pinnedEven = ((384 / 5) * elastic * rigidity) / span / span / span;
  const evenKg = massWeighing(2 * pinnedEven) / evenDeflectionFactor(fixity);
  if (declared === null) return { fixity, evenKg, declared: null };
  const { sag, endMoments } = sagUnder(declared.load, span, rigidity, fixity);
  // Nothing on the beam explains no sag at all.
  if (!(sag > 0)) return { fixity, evenKg, declared: null };
  const ratio = elastic / sag;
  return { fixity, evenKg, declared: { sag, endMoments, ratio, kg: declared.kg * ratio } };
}

/** Sag at mid-span, where a string line measures it, mm, and the sum of the end moments, N·mm. */
function sagUnder(load: BeamLoad, span: number, rigidity: number, fixity: number): { sag: number; endMoments: number } {
  const end = fixity > 0 ? ({ kind: 'sprung', stiffness: stiffnessFor(fixity, rigidity, span) } as const) : ({ kind: 'pinned' } as const);
  const { segments, endMomentLeft, endMomentRight } = solveBeam({ span, rigidity, left: end, right: end }, load);
  const middle = segments.find(({ from, length }) => from + length >= span / 2);
  return {
    sag: middle === undefined ? 0 : deflectionIn(middle, span / 2 - middle.from, rigidity),
    endMoments: endMomentLeft + endMomentRight,
  };
}
