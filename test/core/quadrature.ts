/**
 * An independent integrator for beams: nothing here is shared with the core, and nothing is in closed
 * form but the answer of a pinned beam to one point load (its influence functions, AISC Manual Table 3-23
 * case 8). The load is taken by five-point Gauss-Legendre quadrature between all breakpoints.
 */
import type { Beam, BeamEnd } from '../../src-core/statics/beam';
import type { BeamLoad } from '../../src-core/statics/load';

/** Abramowitz & Stegun, Table 25.4, n = 5; exact for polynomials up to the ninth degree. */
const NODES = [-0.906179845938664, -0.5384693101056831, 0, 0.5384693101056831, 0.906179845938664];
const WEIGHTS = [0.23692688505618908, 0.47862867049936647, 0.5688888888888889, 0.47862867049936647, 0.23692688505618908];

/** Effects at x, and the end reactions and moments; N, mm, hogging end moments negative. */
export interface Quadrature {
  readonly resultant: number;
  readonly firstMoment: number;
  readonly reactionLeft: number;
  readonly reactionRight: number;
  readonly endMomentLeft: number;
  readonly endMomentRight: number;
  shear(x: number): number;
  moment(x: number): number;
  deflection(x: number): number;
}

export function byQuadrature(beam: Beam, load: BeamLoad): Quadrature {
  const { span: L, rigidity: EI } = beam;
  const breakpoints = [...new Set([0, L, ...load.lines.flatMap(({ from, to }) => [from, to])])].sort((a, b) => a - b);

  /** ∫ influence(a) · w(a) da plus the points, cut at x where the influence has its kink. */
  const effect = (influence: (a: number) => number, x = 0): number => {
    let sum = 0;
    const cuts = x > 0 && x < L ? [...breakpoints, x].sort((a, b) => a - b) : breakpoints;
    for (const { from, to, wFrom, wTo } of load.lines)
      for (let i = 1; i < cuts.length; i++) {
        const low = Math.max(cuts[i - 1] as number, from);
        const high = Math.min(cuts[i] as number, to);
        if (!(low < high)) continue;
        const half = (high - low) / 2;
        NODES.forEach((node, k) => {
          const a = low + half * (1 + node);
          const share = (a - from) / (to - from);
          sum += half * (WEIGHTS[k] as number) * (wFrom + (wTo - wFrom) * share) * influence(a);
        });
      }
    for (const { at, force } of load.points) sum += force * influence(at);
    return sum;
  };

  const resultant = effect(() => 1);
  const firstMoment = effect((a) => a);
  const simpleLeft = effect((a) => (L - a) / L);
  const simpleRight = effect((a) => a / L);
  const slopeLeft = effect((a) => (a * (L - a) * (2 * L - a)) / (6 * L * EI));
  const slopeRight = effect((a) => (a * (L - a) * (L + a)) / (6 * L * EI));
  const [mA, mB] = endMoments(beam, slopeLeft, slopeRight);

  return {
    resultant,
    firstMoment,
    reactionLeft: simpleLeft + (mA - mB) / L,
    reactionRight: simpleRight + (mB - mA) / L,
    endMomentLeft: -mA,
    endMomentRight: -mB,
    shear: (x) => effect((a) => (a < x ? -a / L : (L - a) / L), x) + (mA - mB) / L,
    moment: (x) => effect((a) => (a < x ? (a * (L - x)) / L : (x * (L - a)) / L), x) - (mA * (L - x)) / L - (mB * x) / L,
    deflection: (x) =>
      effect((a) => {
        // The load's distance from the far support, on the side of it where x lies (Maxwell).
        const b = a < x ? a : L - a;
        const s = a < x ? L - x : x;
        return (b * s * (L * L - b * b - s * s)) / (6 * L * EI);
      }, x) -
      (mA * x * (L - x) * (2 * L - x) + mB * x * (L - x) * (L + x)) / (6 * L * EI),
  };
}

/** The hogging moments at which beam and spring turn alike, by Cramer's rule on the two equations. */
function endMoments({ span: L, rigidity: EI, left, right }: Beam, slopeLeft: number, slopeRight: number): [number, number] {
  const stiffness = (end: BeamEnd): number => (end.kind === 'pinned' ? 0 : end.kind === 'fixed' ? Infinity : end.stiffness);
  const kA = stiffness(left);
  const kB = stiffness(right);
  // slope − m·L/3EI − m'·L/6EI = m/k, each row multiplied so that both k = 0 and k = ∞ stay finite.
  const row = (k: number): [scale: number, own: number] => (k === 0 ? [0, 1] : [1, L / (3 * EI) + (k === Infinity ? 0 : 1 / k)]);
  const [scaleA, a] = row(kA);
  const [scaleB, d] = row(kB);
  const cross = L / (6 * EI);
  const [b, c] = [scaleA * cross, scaleB * cross];
  const [p, q] = [scaleA * slopeLeft, scaleB * slopeRight];
  const det = a * d - b * c;
  return [(p * d - b * q) / det, (a * q - c * p) / det];
}
