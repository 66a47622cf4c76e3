/**
 * The four diagrams of a level as they are drawn: which curves, which limits, the worst place, and
 * what each says in words. Forces are shown as the masses that weigh them, as people state loads.
 */
import type { LevelEffects } from '../../src-core/audit/types';
import { solveBeam, type BeamAnswer } from '../../src-core/statics/beam';
import { curvesOf, type CurvePoint } from '../../src-core/statics/curves';
import { massWeighing, quantity, weightOf, type Quantity } from '../../src-core/units/quantity';
import type { Curve, Plot } from './chart.svelte';
import type { Point } from './outline';

/** Which beams are shown: the pair together, both apart, or one. */
export type BeamView = 'pair' | 'both' | 'front' | 'rear';
export type BeamName = 'pair' | 'front' | 'rear';
export const DIAGRAMS = ['intensity', 'shear', 'bending', 'deflection'] as const;
export type DiagramName = (typeof DIAGRAMS)[number];

export interface BeamShown {
  readonly beam: BeamName;
  readonly answer: BeamAnswer;
}

/** A greatest value and where it is; `from` and `to` differ on a plateau. */
export interface Peak {
  readonly beam: BeamName;
  readonly value: number;
  readonly from: number;
  readonly to: number;
}

export interface Limit {
  readonly kind: 'even load' | 'span limit';
  readonly value: number;
  readonly exceeded: boolean;
  /** Whether the verdict is made by it; a designed full complement is judged by its total instead. */
  readonly judged: boolean;
}

export interface Diagram {
  readonly name: DiagramName;
  readonly plot: Omit<Plot, 'inset'>;
  readonly peaks: readonly Peak[];
  readonly limits: readonly Limit[];
  /** The greatest value in the worst case of placement and mass; null where it is not drawn. */
  readonly worstCase: Peak | null;
  /** False where only the shape is known: deflection without the beam's EI. */
  readonly measured: boolean;
}

/** What the notice's evenly spread load does to the drawn beam. */
export interface EvenLoad {
  readonly shear: number;
  readonly bending: number;
  readonly deflection: number;
}

/** Room left in a diagram beyond its greatest value, as a share of it, for the figure at the peak. */
const HEADROOM = 0.42;
const FOOTROOM = 0.06;

/** Front and rear beam do the same work, within the rounding of the computation. */
export function alike({ front, rear }: LevelEffects): boolean {
  const same = (a: number, b: number) => Math.abs(a - b) <= 1e-9 * Math.max(Math.abs(a), Math.abs(b), 1e-9);
  return (
    same(front.resultant, rear.resultant) && same(front.reactionLeft, rear.reactionLeft) && same(front.sagging.moment, rear.sagging.moment)
  );
}

export function beamsShown(effects: LevelEffects, view: BeamView): readonly BeamShown[] {
  const front: BeamShown = { beam: 'front', answer: effects.front };
  const rear: BeamShown = { beam: 'rear', answer: effects.rear };
  if (view === 'both') return [front, rear];
  if (view === 'front') return [front];
  if (view === 'rear') return [rear];
  return [{ beam: 'pair', answer: effects.whole }];
}

/** Value of one diagram at a point of a beam, in the unit in which it is shown. */
const READ: Record<DiagramName, (point: CurvePoint) => number> = {
  intensity: (point) => massWeighing(point.intensity),
  shear: (point) => massWeighing(point.shear),
  bending: (point) => massWeighing(point.moment),
  deflection: (point) => point.deflection,
};

const KIND = { intensity: 'lineMass', shear: 'mass', bending: 'massMoment', deflection: 'length' } as const;

export const valueOf = (name: DiagramName, value: number): Quantity => quantity(KIND[name], value);

function curvePoints(shown: BeamShown, name: DiagramName): readonly Point[] {
  return curvesOf(shown.answer).map((point) => ({ x: point.x, y: READ[name](point) }));
}

function peakOf({ beam, answer }: BeamShown, name: DiagramName, points: readonly Point[]): Peak | null {
  switch (name) {
    case 'intensity': {
      const top = points.reduce((most, point) => (point.y > most.y ? point : most), { x: 0, y: -Infinity });
      return points.length > 0 ? { beam, value: top.y, from: top.x, to: top.x } : null;
    }
    case 'shear': {
      // With its sign, as it is drawn; it is greatest beside a support or a jump, where the curve has a point.
      const most = points.reduce((worst, point) => (Math.abs(point.y) > Math.abs(worst.y) ? point : worst), { x: 0, y: 0 });
      return { beam, value: most.y, from: most.x, to: most.x };
    }
    case 'bending': {
      const { sagging, hogging } = answer;
      const hogs = -hogging.moment > sagging.moment && hogging.at !== null;
      if (hogs && hogging.at !== null) return { beam, value: massWeighing(hogging.moment), from: hogging.at, to: hogging.at };
      return { beam, value: massWeighing(sagging.moment), from: sagging.from, to: sagging.to };
    }
    case 'deflection':
      return { beam, value: answer.deflection.sag, from: answer.deflection.at, to: answer.deflection.at };
  }
}

/** The rated mass evenly spread over the pair, on what is drawn: one beam carries half of it. */
function evenLoad(effects: LevelEffects, ratedKg: number, view: BeamView): EvenLoad {
  const { span } = effects.front;
  const beams = view === 'pair' ? 2 : 1;
  const w = weightOf(ratedKg) / 2 / span;
  const load = { lines: [{ from: 0, to: span, wFrom: w, wTo: w }], points: [] };
  const one = solveBeam({ span, rigidity: effects.rigidity, left: effects.end, right: effects.end }, load);
  return {
    shear: massWeighing(one.reactionLeft) * beams,
    bending: massWeighing(one.sagging.moment) * beams,
    deflection: one.deflection.sag,
  };
}

export interface DiagramWishes {
  readonly effects: LevelEffects;
  readonly view: BeamView;
  /** Rating of the pair, kg; null = none. */
  readonly ratedKg: number | null;
  /** Diagrams whose comparison with the rated even load counts in the verdict. */
  readonly judged: ReadonlySet<DiagramName>;
  /** Deflection limit of the rule set, mm; null = not shown. */
  readonly sagLimit: number | null;
  /** A beam in the worst case of placement and mass, drawn with the bending; none = not drawn. */
  readonly worstCase?: BeamShown | null;
}

function limitsOf(name: DiagramName, wishes: DiagramWishes, peaks: readonly Peak[]): readonly Limit[] {
  const most = Math.max(0, ...peaks.map((peak) => Math.abs(peak.value)));
  const limit = (kind: Limit['kind'], value: number): Limit => ({
    kind,
    value,
    exceeded: most > value * (1 + 1e-12),
    judged: kind === 'span limit' || wishes.judged.has(name),
  });
  const limits: Limit[] = [];
  if (name !== 'intensity' && wishes.ratedKg !== null)
    limits.push(limit('even load', evenLoad(wishes.effects, wishes.ratedKg, wishes.view)[name]));
  if (name === 'deflection' && wishes.effects.rigidityKnown && wishes.sagLimit !== null) limits.push(limit('span limit', wishes.sagLimit));
  return limits;
}

/** Share of the span over which the limit of shear is drawn from each support. */
export const SHEAR_LIMIT_REACH = 0.14;

/** Where along the span a limit is drawn: shear is limited at the supports only. */
function limitCurves(name: DiagramName, limit: Limit, span: number): readonly Curve[] {
  const look = limit.exceeded && limit.judged ? 'exceeded limit' : 'limit';
  const stretch = (from: number, to: number, y: number): Curve => ({
    look,
    filled: false,
    points: [
      { x: from, y },
      { x: to, y },
    ],
  });
  if (name !== 'shear') return [stretch(0, span, limit.value)];
  const reach = span * SHEAR_LIMIT_REACH;
  return [stretch(0, reach, limit.value), stretch(span - reach, span, -limit.value)];
}

export function diagramOf(name: DiagramName, wishes: DiagramWishes): Diagram {
  const { span } = wishes.effects.front;
  const shown = beamsShown(wishes.effects, wishes.view);
  const lines = shown.map((beam) => ({ beam, points: curvePoints(beam, name) }));
  const peaks = lines.flatMap(({ beam, points }) => peakOf(beam, name, points) ?? []);
  const limits = limitsOf(name, wishes, peaks);
  const beamCurves = lines.map(({ beam, points }): Curve => ({
    look: beam.beam === 'rear' ? 'rear' : 'front',
    points,
    filled: beam.beam !== 'rear' || lines.length === 1,
  }));
  const shaken = name === 'bending' ? (wishes.worstCase ?? null) : null;
  const shakenPoints = shaken === null ? [] : curvePoints(shaken, name);
  // Drawn from the last to the first: fills lie under every line.
  const curves = [
    ...(shaken === null ? [] : [{ look: 'ghost', points: shakenPoints, filled: false } as const]),
    ...limits.flatMap((limit) => limitCurves(name, limit, span)),
    ...beamCurves.toSorted((a, b) => Number(a.filled) - Number(b.filled)),
  ];
  const values = [0, ...curves.flatMap((curve) => curve.points.map((point) => point.y))];
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const extent = Math.max(high - low, 1e-9);
  return {
    name,
    plot: {
      curves,
      span,
      least: low - extent * FOOTROOM,
      most: high + extent * HEADROOM,
      downwards: name === 'deflection',
    },
    peaks,
    limits,
    worstCase: shaken && peakOf(shaken, name, shakenPoints),
    measured: name !== 'deflection' || wishes.effects.rigidityKnown,
  };
}

/** The peak that decides: the greatest in size; null where there is no load. */
export function worstPeak(diagram: Diagram): Peak | null {
  const worst = diagram.peaks.toSorted((a, b) => Math.abs(b.value) - Math.abs(a.value))[0];
  return worst !== undefined && worst.value !== 0 ? worst : null;
}
