/** What stands left of a section of a beam, as worked calculations put it into their formulas. */
import type { BeamLoad } from '../statics/load';

export interface LeftOf {
  /** N. */
  readonly force: number;
  /** Distance from the section back to where that force acts, mm; 0 where there is no force. */
  readonly arm: number;
  /** Cube root of the mean cube of that distance, mm, as deflections need it. */
  readonly cubeArm: number;
}

// Three Gauss points are exact up to the fifth power; intensity times the cubed distance is the fourth.
const GAUSS = [
  [-Math.sqrt(0.6), 5 / 18],
  [0, 8 / 18],
  [Math.sqrt(0.6), 5 / 18],
] as const;

/** @param x mm from the left support */
export function leftOf(load: BeamLoad, x: number): LeftOf {
  let force = 0;
  let moment = 0;
  let cube = 0;
  const add = (w: number, distance: number) => {
    force += w;
    moment += w * distance;
    cube += w * distance ** 3;
  };
  for (const { from, to, wFrom, wTo } of load.lines) {
    if (from >= x) continue;
    const end = Math.min(to, x);
    const length = end - from;
    for (const [place, weight] of GAUSS) {
      const u = from + (length * (1 + place)) / 2;
      add(weight * length * (wFrom + ((wTo - wFrom) * (u - from)) / (to - from)), x - u);
    }
  }
  for (const point of load.points) if (point.at < x) add(point.force, x - point.at);
  return force === 0 ? { force, arm: 0, cubeArm: 0 } : { force, arm: moment / force, cubeArm: Math.cbrt(cube / force) };
}
