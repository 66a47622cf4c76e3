/**
 * What the level check is measured against: the least that any check must do (read every piece once), and
 * the two numerical ways in which beams are commonly solved. Written for the bench, none of it in the program.
 */
import type { BeamLoad } from '../../src-core/statics/load';

/** One beam's load as parallel arrays. */
export interface FlatLoad {
  readonly count: number;
  readonly from: Float64Array;
  readonly to: Float64Array;
  readonly wFrom: Float64Array;
  readonly wTo: Float64Array;
}

export function flat({ lines }: BeamLoad): FlatLoad {
  return {
    count: lines.length,
    from: Float64Array.from(lines, ({ from }) => from),
    to: Float64Array.from(lines, ({ to }) => to),
    wFrom: Float64Array.from(lines, ({ wFrom }) => wFrom),
    wTo: Float64Array.from(lines, ({ wTo }) => wTo),
  };
}

/** The bare pass: weight and first moment of every piece, nothing else. */
export function barePass({ count, from, to, wFrom, wTo }: FlatLoad): number {
  let weight = 0;
  let moment = 0;
  for (let i = 0; i < count; i++) {
    const x = from[i] as number;
    const h = (to[i] as number) - x;
    const w0 = wFrom[i] as number;
    const w1 = wTo[i] as number;
    weight += (h * (w0 + w1)) / 2;
    moment += (h * (w0 * (3 * x + h) + w1 * (3 * x + 2 * h))) / 6;
  }
  return weight + moment;
}

/** What every way of solving gives: the twelve results of a level check for one beam. */
export interface Results {
  resultant: number;
  centroid: number;
  reactionLeft: number;
  reactionRight: number;
  shear: number;
  moment: number;
  momentAt: number;
  deflectionEI: number;
  deflectionAt: number;
  bending: number;
  endShear: number;
  deflection: number;
}

export const noResults = (): Results => ({
  resultant: 0,
  centroid: 0,
  reactionLeft: 0,
  reactionRight: 0,
  shear: 0,
  moment: 0,
  momentAt: 0,
  deflectionEI: 0,
  deflectionAt: 0,
  bending: 0,
  endShear: 0,
  deflection: 0,
});

function addEquivalents(out: Results, span: number): void {
  out.bending = (8 * out.moment) / span;
  out.endShear = 2 * Math.max(out.reactionLeft, out.reactionRight);
  out.deflection = (384 * out.deflectionEI) / (5 * span ** 3);
}

/** Makes a solver by evenly spaced stations that gets each piece's mass right, with its arrays kept. */
export function stationSolver(stations: number): (load: FlatLoad, span: number, out: Results) => void {
  const force = new Float64Array(stations);
  const shears = new Float64Array(stations);
  const moments = new Float64Array(stations);
  const sags = new Float64Array(stations);
  return ({ count, from, to, wFrom, wTo }, span, out) => {
    const step = span / (stations - 1);
    force.fill(0);
    for (let i = 0; i < count; i++) {
      const x0 = from[i] as number;
      const x1 = to[i] as number;
      const slope = ((wTo[i] as number) - (wFrom[i] as number)) / (x1 - x0);
      for (let cell = Math.floor(x0 / step); cell * step < x1 && cell < stations - 1; cell++) {
        const low = Math.max(x0, cell * step);
        const high = Math.min(x1, (cell + 1) * step);
        const wLow = (wFrom[i] as number) + slope * (low - x0);
        const wHigh = (wFrom[i] as number) + slope * (high - x0);
        const weight = ((high - low) * (wLow + wHigh)) / 2;
        if (!(weight > 0)) continue;
        const centre = low + ((high - low) * (wLow + 2 * wHigh)) / (3 * (wLow + wHigh));
        const right = centre / step - cell;
        force[cell] = (force[cell] as number) + weight * (1 - right);
        force[cell + 1] = (force[cell + 1] as number) + weight * right;
      }
    }
    let weight = 0;
    let turning = 0;
    for (let i = 0; i < stations; i++) {
      weight += force[i] as number;
      turning += (force[i] as number) * i * step;
    }
    out.resultant = weight;
    out.centroid = turning / weight;
    out.reactionRight = turning / span;
    out.reactionLeft = weight - out.reactionRight;
    let shear = out.reactionLeft - (force[0] as number);
    shears[0] = shear;
    moments[0] = 0;
    for (let i = 1; i < stations; i++) {
      moments[i] = (moments[i - 1] as number) + shear * step;
      shear -= force[i] as number;
      shears[i] = shear;
    }
    let slope = 0;
    for (let i = 1; i < stations - 1; i++) slope += ((moments[i] as number) * (stations - 1 - i)) / (stations - 1);
    let turn = slope * step;
    sags[0] = 0;
    for (let i = 1; i < stations; i++) {
      sags[i] = (sags[i - 1] as number) + turn * step;
      turn -= (moments[i] as number) * step;
    }
    out.shear = 0;
    out.moment = 0;
    out.deflectionEI = 0;
    for (let i = 0; i < stations; i++) {
      out.shear = Math.max(out.shear, Math.abs(shears[i] as number));
      if ((moments[i] as number) > out.moment) {
        out.moment = moments[i] as number;
        out.momentAt = i * step;
      }
      if ((sags[i] as number) > out.deflectionEI) {
        out.deflectionEI = sags[i] as number;
        out.deflectionAt = i * step;
      }
    }
    addEquivalents(out, span);
  };
}

/**
 * The textbook beam-element way with a general solver: the whole stiffness matrix as rows of numbers, and
 * elimination with row exchanges. Loads as equal end forces and moments of each element under its own share.
 */
export function denseElements({ count, from, to, wFrom, wTo }: FlatLoad, span: number, elements: number, out: Results): void {
  const h = span / elements;
  const size = 2 * (elements + 1);
  const matrix = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  const right = new Array<number>(size).fill(0);
  const k = [12 / h ** 3, 6 / h ** 2, 4 / h, 2 / h] as const;
  const own = [
    [k[0], k[1], -k[0], k[1]],
    [k[1], k[2], -k[1], k[3]],
    [-k[0], -k[1], k[0], -k[1]],
    [k[1], k[3], -k[1], k[2]],
  ];
  for (let e = 0; e < elements; e++) {
    for (let r = 0; r < 4; r++) {
      const row = matrix[2 * e + r] as number[];
      for (let c = 0; c < 4; c++) row[2 * e + c] = (row[2 * e + c] as number) + ((own[r] as number[])[c] as number);
    }
    let w = 0;
    for (let i = 0; i < count; i++) {
      const low = Math.max(from[i] as number, e * h);
      const high = Math.min(to[i] as number, (e + 1) * h);
      if (!(low < high)) continue;
      const at = ((low + high) / 2 - (from[i] as number)) / ((to[i] as number) - (from[i] as number));
      w += ((high - low) / h) * ((wFrom[i] as number) + at * ((wTo[i] as number) - (wFrom[i] as number)));
    }
    const add = (index: number, value: number): void => {
      right[index] = (right[index] as number) + value;
    };
    add(2 * e, (w * h) / 2);
    add(2 * e + 1, (w * h * h) / 12);
    add(2 * e + 2, (w * h) / 2);
    add(2 * e + 3, (-w * h * h) / 12);
  }
  const free = Array.from({ length: size }, (_, i) => i).filter((i) => i !== 0 && i !== size - 2);
  const reduced = free.map((r) => free.map((c) => (matrix[r] as number[])[c] as number));
  const solved = eliminate(
    reduced,
    free.map((r) => right[r] as number),
  );
  const all = new Array<number>(size).fill(0);
  free.forEach((i, at) => (all[i] = solved[at] as number));
  const reaction = (row: number): number =>
    (matrix[row] as number[]).reduce((sum, k, c) => sum + k * (all[c] as number), 0) - (right[row] as number);
  out.reactionLeft = -reaction(0);
  out.reactionRight = -reaction(size - 2);
  out.resultant = out.reactionLeft + out.reactionRight;
  out.centroid = (out.reactionRight * span) / out.resultant;
  out.shear = Math.max(out.reactionLeft, out.reactionRight);
  out.deflectionEI = 0;
  out.moment = 0;
  for (let e = 0; e <= elements; e++) {
    const sag = all[2 * e] as number;
    if (sag > out.deflectionEI) {
      out.deflectionEI = sag;
      out.deflectionAt = e * h;
    }
    if (e === elements) break;
    const [v0, t0, v1, t1] = all.slice(2 * e, 2 * e + 4) as [number, number, number, number];
    const m = Math.abs(k[1] * v0 + k[2] * t0 - k[1] * v1 + k[3] * t1);
    if (m > out.moment) {
      out.moment = m;
      out.momentAt = e * h;
    }
  }
  addEquivalents(out, span);
}

function eliminate(matrix: number[][], right: number[]): number[] {
  const n = right.length;
  for (let c = 0; c < n; c++) {
    let pivot = c;
    for (let r = c + 1; r < n; r++)
      if (Math.abs((matrix[r] as number[])[c] as number) > Math.abs((matrix[pivot] as number[])[c] as number)) pivot = r;
    [matrix[c], matrix[pivot]] = [matrix[pivot] as number[], matrix[c] as number[]];
    [right[c], right[pivot]] = [right[pivot] as number, right[c] as number];
    const top = matrix[c] as number[];
    for (let r = c + 1; r < n; r++) {
      const row = matrix[r] as number[];
      const factor = (row[c] as number) / (top[c] as number);
      for (let j = c; j < n; j++) row[j] = (row[j] as number) - factor * (top[j] as number);
      right[r] = (right[r] as number) - factor * (right[c] as number);
    }
  }
  const x = new Array<number>(n).fill(0);
  for (let r = n - 1; r >= 0; r--) {
    let sum = right[r] as number;
    for (let c = r + 1; c < n; c++) sum -= ((matrix[r] as number[])[c] as number) * (x[c] as number);
    x[r] = sum / ((matrix[r] as number[])[r] as number);
  }
  return x;
}
