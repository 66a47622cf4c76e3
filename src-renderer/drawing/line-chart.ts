/** Curves on a canvas by chart.js, in a file of its own: it is read when the first diagram is drawn, not at the start. */
import {
  Chart,
  Filler,
  LinearScale,
  LineController,
  LineElement,
  PointElement,
  type ChartConfiguration,
  type ChartDataset,
} from 'chart.js';
import type { Curve, CurveLook, Plot } from './chart.svelte';
import type { Inks } from './theme.svelte';

Chart.register(LineController, LineElement, PointElement, LinearScale, Filler);

/** Dash patterns tell the beams apart without colour. */
const DASHES: Record<CurveLook, number[]> = { front: [], rear: [9, 4], limit: [3, 3], 'exceeded limit': [3, 3], ghost: [2, 4] };

const LINE_WIDTH: Record<CurveLook, number> = { front: 1.75, rear: 1.75, limit: 1.25, 'exceeded limit': 1.5, ghost: 1 };

/** The axis is drawn once for all diagrams; unseen figures would be measured all the same. */
const NO_TICKS = { display: false, count: 2, sampleSize: 1 };

function lineColour(look: CurveLook, inks: Inks): string {
  if (look === 'limit' || look === 'ghost') return inks.soft;
  return look === 'exceeded limit' ? inks.over : inks.load;
}

const datasetOf = (curve: Curve, inks: Inks): ChartDataset<'line', { x: number; y: number }[]> => ({
  // chart.js keeps notes on the arrays it is given, so it gets its own.
  data: curve.points.map(({ x, y }) => ({ x, y })),
  borderColor: lineColour(curve.look, inks),
  borderWidth: LINE_WIDTH[curve.look],
  borderDash: DASHES[curve.look],
  borderJoinStyle: 'round',
  pointRadius: 0,
  pointHitRadius: 0,
  tension: 0,
  fill: curve.filled ? 'origin' : false,
  backgroundColor: inks.loadFill,
});

function configOf(plot: Plot, inks: Inks): ChartConfiguration<'line', { x: number; y: number }[]> {
  return {
    type: 'line',
    data: { datasets: plot.curves.map((curve) => datasetOf(curve, inks)) },
    options: {
      animation: false,
      parsing: false,
      normalized: true,
      responsive: true,
      maintainAspectRatio: false,
      events: [],
      layout: { autoPadding: false, padding: { left: plot.inset, right: plot.inset, top: 0, bottom: 0 } },
      plugins: { legend: { display: false }, tooltip: { enabled: false } },
      scales: {
        x: { type: 'linear', display: false, min: 0, max: plot.span, ticks: NO_TICKS },
        y: { type: 'linear', display: false, min: plot.least, max: plot.most, reverse: plot.downwards, ticks: NO_TICKS },
      },
    },
  };
}

export interface Drawn {
  readonly draw: (plot: Plot, inks: Inks) => void;
  readonly destroy: () => void;
}

export function drawnOn(canvas: HTMLCanvasElement, plot: Plot, inks: Inks): Drawn {
  const chart = new Chart(canvas, configOf(plot, inks));
  return {
    draw: (next, nextInks) => {
      const { data, options } = configOf(next, nextInks);
      chart.data = data;
      if (options) chart.options = options;
      chart.update('none');
    },
    destroy: () => chart.destroy(),
  };
}
