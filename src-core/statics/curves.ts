/** Intensity, shear, moment and deflection along a solved beam, as points to draw. */
import type { BeamAnswer } from './beam';
import { deflectionIn, intensityIn, momentIn, shearIn } from './segment';

/** x in mm from the left support; N/mm, N, N·mm, mm; signs as in beam.ts. */
export interface CurvePoint {
  readonly x: number;
  readonly intensity: number;
  readonly shear: number;
  readonly moment: number;
  readonly deflection: number;
}

/**
 * Points in ascending x. Every breakpoint and every extreme is among them; at a breakpoint there are two
 * at one x, the state just left and just right of it, so that jumps stand upright. Point loads show as
 * jumps of the shear, not in the intensity. The supports' reactions are the first and the last value.
 * @param pointsPerSegment evenly spaced ones inside each segment, besides its two ends
 */
export function curvesOf(answer: BeamAnswer, pointsPerSegment = 24): readonly CurvePoint[] {
  const { span, segments, sagging, deflection, rigidity } = answer;
  const extremes = [sagging.from, sagging.to, deflection.at];
  const points: CurvePoint[] = [];
  segments.forEach((segment, index) => {
    const { from, length } = segment;
    // `from + length` may differ from the next segment's start in the last digit.
    const end = segments[index + 1]?.from ?? span;
    const places = [0, length];
    for (let i = 1; i <= pointsPerSegment; i++) places.push((length * i) / (pointsPerSegment + 1));
    for (const x of extremes) if (x > from && x < end) places.push(x - from);
    places.sort((a, b) => a - b);
    let before = -1;
    for (const s of places) {
      if (s === before) continue;
      before = s;
      points.push({
        x: s === length ? end : from + s,
        intensity: intensityIn(segment, s),
        shear: shearIn(segment, s),
        moment: momentIn(segment, s),
        deflection: deflectionIn(segment, s, rigidity),
      });
    }
  });
  return points;
}
