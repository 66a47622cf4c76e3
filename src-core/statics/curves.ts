import { stateAt, type BeamAnswer } from './beam';
import { shearRoots } from './roots';

/** One place of a beam's diagrams: mm, N/mm, N, N·mm, mm. */
export interface CurvePoint {
  readonly x: number;
  readonly intensity: number;
  readonly shear: number;
  readonly moment: number;
  readonly deflection: number;
}

/**
 * Points for drawing the four diagrams. Every breakpoint, the place of the greatest moment and of the
 * greatest deflection are among them; where intensity or shear jumps, two points stand at one x.
 * @param pointsPerSegment how many steps each piece is drawn in, 1 or more; values are exact at each point
 */
export function curvesOf(answer: BeamAnswer, pointsPerSegment = 16): readonly CurvePoint[] {
  if (!(pointsPerSegment >= 1)) throw new RangeError(`a piece must be drawn in 1 or more steps, got ${pointsPerSegment}`);
  return answer.segments.flatMap((segment) => {
    const h = segment.to - segment.from;
    const steps = Array.from({ length: pointsPerSegment + 1 }, (_, i) => (i === pointsPerSegment ? h : (h * i) / pointsPerSegment));
    const sag = answer.deflection.at - segment.from;
    const places = [...steps, ...shearRoots(segment.shear, segment.intensity, segment.slope, h), ...(sag > 0 && sag < h ? [sag] : [])];
    return [...new Set(places)]
      .sort((a, b) => a - b)
      .map((s) => {
        const { intensity, shear, moment, deflectionEI } = stateAt(segment, s);
        const x = s === h ? segment.to : segment.from + s;
        return { x, intensity, shear, moment, deflection: deflectionEI / answer.rigidity };
      });
  });
}
