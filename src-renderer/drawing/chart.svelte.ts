/**
 * A chart.js chart on a canvas: made when the canvas appears, fed when its curves or the theme
 * change, destroyed when it goes. The plot fills the canvas between two insets, so that pixels on it
 * and on the drawing above are the same x.
 */
import type { Attachment } from 'svelte/attachments';
import type { Drawn, drawnOn } from './line-chart';
import type { Point } from './outline';
import { pageInks } from './theme.svelte';

export type CurveLook = 'front' | 'rear' | 'limit' | 'exceeded limit' | 'ghost';

export interface Curve {
  readonly look: CurveLook;
  readonly points: readonly Point[];
  /** Filled down to the zero line. */
  readonly filled: boolean;
}

export interface Plot {
  readonly curves: readonly Curve[];
  readonly span: number;
  readonly least: number;
  readonly most: number;
  /** Positive values drawn downwards, as a beam sags. */
  readonly downwards: boolean;
  /** Pixels left free at the left and right of the plot, the same for everything on the x axis. */
  readonly inset: number;
}

/** Null until it is read, which is begun as soon as a diagram may be wanted. */
let drawOn: typeof drawnOn | null = null;
const reading = import('./line-chart').then(
  ({ drawnOn }) => (drawOn = drawnOn),
  // Without its curve a diagram still has its figures and its table.
  () => null,
);

/** `<canvas {@attach chartOf(() => plot)}>`; the function is read again whenever what it reads changes. */
export function chartOf(plot: () => Plot): Attachment<HTMLCanvasElement> {
  return (canvas) => {
    let ready = $state.raw(drawOn);
    let chart: Drawn | null = null;
    void reading.then((read) => (ready = read));
    $effect(() => {
      const [now, inks] = [plot(), pageInks()];
      if (chart === null) chart = ready?.(canvas, now, inks) ?? null;
      else chart.draw(now, inks);
    });
    return () => chart?.destroy();
  };
}
