/** Where the bays and frames of a run fall in its elevation: one scale, frames shared by neighbours. */
import type { Run } from '../../src-core/site/site';
import type { BayDrawn } from './bay-model';
import type { Libraries } from './libraries';
import { bayDrawn, type Upright } from './bay-model';

export interface RunDrawn {
  readonly bays: readonly BayDrawn[];
  readonly frames: readonly Upright[];
}

export function runDrawn(run: Run, libraries: Libraries): RunDrawn {
  const bays = run.bays.map((bay, index) => bayDrawn(run, bay, libraries, index));
  const last = bays.at(-1);
  return { bays, frames: [...bays.map((bay) => bay.leftUpright), ...(last ? [last.rightUpright] : [])] };
}

export interface RunSheet {
  /** px that are there across, and the most that may be taken upwards. */
  readonly width: number;
  readonly tallest: number;
  /** px that a usual bay must have for the figures at its frames. */
  readonly leastPitch: number;
  /** Free edge left and right of the outer frames, px. */
  readonly edge: number;
  readonly top: number;
}

export interface RunScale {
  readonly rate: number;
  readonly width: number;
  /** px of the floor. */
  readonly floor: number;
  readonly y: (mm: number) => number;
  /** px of each frame's left and right side. */
  readonly frames: readonly { readonly left: number; readonly right: number }[];
}

/** The whole run in the width where its figures have room so, else as wide as they need. */
export function runScale({ bays, frames }: RunDrawn, { width, tallest, leastPitch, edge, top }: RunSheet): RunScale {
  let [highest, narrowest] = [1, Infinity];
  for (const bay of bays) {
    highest = Math.max(highest, bay.height);
    narrowest = Math.min(narrowest, bay.entry + bay.leftUpright.width);
  }
  const across = [...bays.map((bay) => bay.entry), ...frames.map((frame) => frame.width)].reduce((sum, mm) => sum + mm, 0);
  const fits = Math.min(tallest / highest, (width - 2 * edge) / Math.max(1, across));
  const rate = Math.max(fits, Number.isFinite(narrowest) ? leastPitch / narrowest : 0);
  const floor = top + highest * rate;
  let left = edge;
  const sides = frames.map((frame, i) => {
    const side = { left, right: left + frame.width * rate };
    left = side.right + (bays[i]?.entry ?? 0) * rate;
    return side;
  });
  return { rate, width: (sides.at(-1)?.right ?? edge) + edge, floor, y: (mm) => floor - mm * rate, frames: sides };
}
