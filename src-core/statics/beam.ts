/**
 * One straight beam on two supports: reactions, shear, bending moment, rotation and deflection,
 * exact for loads that run straight between breakpoints.
 *
 * The core's sign convention, written once: x in mm from the left support; loads and deflections
 * down positive; reactions up positive; shear is the sum of the upward forces left of the section;
 * sagging moments positive, hogging negative; rotation is the slope of the deflection.
 *
 * Between sorted breakpoints the intensity is straight, so shear is quadratic, moment cubic,
 * rotation quartic and deflection quintic. Each piece is held in its own local coordinate and the
 * state is carried from piece to piece: powers of the global x would lose digits.
 */
import { checkLoad } from './check-load';
import type { BeamLoad } from './load';
import { bracketedRoot, shearRoots } from './roots';

export type BeamEnd =
  | { readonly kind: 'pinned' }
  | { readonly kind: 'fixed' }
  | { readonly kind: 'sprung'; /** N·mm/rad, 0 or more */ readonly stiffness: number };

export interface Beam {
  /** Between supports, mm. */
  readonly span: number;
  /** EI in N·mm². With pinned or fixed ends the forces do not depend on it. */
  readonly rigidity: number;
  readonly left: BeamEnd;
  readonly right: BeamEnd;
}

/** One piece between breakpoints; s = x − from. */
export interface Segment {
  readonly from: number;
  readonly to: number;
  /** Intensity at `from`, N/mm, and its change per mm. */
  readonly intensity: number;
  readonly slope: number;
  /** State just right of `from`: N, N·mm, EI·rad = N·mm², EI·mm = N·mm³. */
  readonly shear: number;
  readonly moment: number;
  readonly rotationEI: number;
  readonly deflectionEI: number;
}

export interface BeamAnswer {
  readonly span: number;
  readonly rigidity: number;
  readonly resultant: number;
  readonly centroid: number | null;
  readonly reactionLeft: number;
  readonly reactionRight: number;
  readonly endMomentLeft: number;
  readonly endMomentRight: number;
  readonly shear: { readonly force: number; readonly at: number };
  readonly sagging: { readonly moment: number; readonly from: number; readonly to: number };
  readonly hogging: { readonly moment: number; readonly at: number | null };
  readonly deflection: { readonly sag: number; readonly at: number };
  readonly segments: readonly Segment[];
}

/** Nodes and weights of three-point Gauss on 0…1: exact to the fifth power, and here it meets the fourth. */
const GAUSS: readonly (readonly [number, number])[] = [
  [(1 - Math.sqrt(0.6)) / 2, 5 / 18],
  [0.5, 8 / 18],
  [(1 + Math.sqrt(0.6)) / 2, 5 / 18],
];

/** What the loads do to the pinned beam by their influence functions: sums of positive terms only. */
function sums(load: BeamLoad, L: number) {
  let resultant = 0;
  let moment = 0;
  let pinnedLeft = 0;
  let rotationLeft = 0;
  let rotationRight = 0;
  let overLeft = 0;
  let overRight = 0;
  let noise = 0;
  const influence = (x: number, force: number) => {
    pinnedLeft += (force * (L - x)) / L;
    rotationLeft += (force * x * (L - x) * (2 * L - x)) / (6 * L);
    rotationRight += (force * x * (L - x) * (L + x)) / (6 * L);
  };
  for (const { at, force } of load.points) {
    resultant += force;
    moment += force * at;
    noise += 2 * force;
    if (at === 0) overLeft += force;
    else if (at === L) overRight += force;
    else influence(at, force);
  }
  for (const { from, to, wFrom, wTo } of load.lines) {
    const h = to - from;
    const force = ((wFrom + wTo) / 2) * h;
    resultant += force;
    moment += (h * (wFrom * (2 * from + to) + wTo * (from + 2 * to))) / 6;
    // The rounding of `from` and `to` themselves, as force.
    noise += 2 * force + Math.max(wFrom, wTo) * to;
    for (const [t, weight] of GAUSS) influence(from + h * t, h * weight * (wFrom + (wTo - wFrom) * t));
  }
  return { resultant, moment, pinnedLeft, rotationLeft, rotationRight, overLeft, overRight, noise: noise * 2 ** -51 };
}

/** End moments (0 or more, hogging) by compatibility: end slopes equal the springs' rotations M/k. */
function endMoments(beam: Beam, rotationLeft: number, rotationRight: number): readonly [number, number] {
  const { span: L, rigidity: EI } = beam;
  // EI/k of each end: 0 is fixed; null is pinned, which carries no moment.
  const softness = (end: BeamEnd): number | null => {
    if (end.kind === 'pinned' || (end.kind === 'sprung' && end.stiffness === 0)) return null;
    return end.kind === 'fixed' ? 0 : EI / end.stiffness;
  };
  const a = softness(beam.left);
  const b = softness(beam.right);
  if (a === null && b === null) return [0, 0];
  if (a === null) return [0, rotationRight / (L / 3 + (b ?? 0))];
  if (b === null) return [rotationLeft / (L / 3 + a), 0];
  const left = L / 3 + a;
  const right = L / 3 + b;
  const determinant = left * right - (L * L) / 36;
  return [(rotationLeft * right - (rotationRight * L) / 6) / determinant, (rotationRight * left - (rotationLeft * L) / 6) / determinant];
}

const momentAt = (g: Segment, s: number) => g.moment + s * (g.shear - s * (g.intensity / 2 + (g.slope * s) / 6));
const rotationAt = (g: Segment, s: number) =>
  g.rotationEI - s * (g.moment + s * (g.shear / 2 - s * (g.intensity / 6 + (g.slope * s) / 24)));
const deflectionAt = (g: Segment, s: number) =>
  g.deflectionEI + s * (g.rotationEI - s * (g.moment / 2 + s * (g.shear / 6 - s * (g.intensity / 24 + (g.slope * s) / 120))));
const shearAt = (g: Segment, s: number) => g.shear - s * (g.intensity + (g.slope * s) / 2);

/** State of a piece at s mm from its start: intensity N/mm, shear N, moment N·mm, rotation·EI, deflection·EI. */
export const stateAt = (g: Segment, s: number) => ({
  intensity: g.intensity + g.slope * s,
  shear: shearAt(g, s),
  moment: momentAt(g, s),
  rotationEI: rotationAt(g, s),
  deflectionEI: deflectionAt(g, s),
});

function segmentsOf(load: BeamLoad, L: number, shear0: number, moment0: number, rotation0: number): Segment[] {
  const inner = load.points.filter(({ at }) => at > 0 && at < L);
  const places = [...new Set([0, L, ...inner.map(({ at }) => at), ...load.lines.flatMap(({ from, to }) => [from, to])])].sort(
    (a, b) => a - b,
  );
  const jumps = new Map<number, number>();
  for (const { at, force } of inner) jumps.set(at, (jumps.get(at) ?? 0) + force);
  const segments: Segment[] = [];
  // The shear is a difference of large sums: its rounding is carried along (Neumaier's sum).
  let shear = shear0;
  let lost = 0;
  const drop = (force: number) => {
    const next = shear - force;
    lost += Math.abs(shear) >= Math.abs(force) ? shear - next - force : -force - next + shear;
    shear = next;
  };
  let moment = moment0;
  let rotationEI = rotation0;
  let deflectionEI = 0;
  for (let i = 0; i + 1 < places.length; i++) {
    const from = places[i] as number;
    const to = places[i + 1] as number;
    const h = to - from;
    drop(jumps.get(from) ?? 0);
    let start = 0;
    let end = 0;
    for (const line of load.lines) {
      if (line.from > from || line.to < to) continue;
      const rise = (line.wTo - line.wFrom) / (line.to - line.from);
      start += line.from === from ? line.wFrom : line.wFrom + rise * (from - line.from);
      end += line.to === to ? line.wTo : line.wFrom + rise * (to - line.from);
    }
    const segment: Segment = {
      from,
      to,
      intensity: start,
      slope: (end - start) / h,
      shear: shear + lost,
      moment,
      rotationEI,
      deflectionEI,
    };
    segments.push(segment);
    moment = momentAt(segment, h);
    deflectionEI = deflectionAt(segment, h);
    rotationEI = rotationAt(segment, h);
    drop(((start + end) / 2) * h);
  }
  return segments;
}

/** Where the moment is largest. Loads act down, so the moment is concave and its top is one place or one range. */
function largestSagging(segments: readonly Segment[], noise: number): BeamAnswer['sagging'] {
  let best = { moment: 0, from: 0, to: segments.at(-1)?.to ?? 0 };
  let found = false;
  const offer = (moment: number, from: number, to: number) => {
    if (moment > best.moment || (!found && moment >= 0)) {
      best = { moment, from, to };
      found = true;
    }
  };
  for (const g of segments) {
    const h = g.to - g.from;
    if (g.intensity === 0 && g.slope === 0 && Math.abs(g.shear) <= noise) return plateau(segments, noise);
    offer(g.moment, g.from, g.from);
    offer(momentAt(g, h), g.to, g.to);
    for (const s of shearRoots(g.shear, g.intensity, g.slope, h)) offer(momentAt(g, s), g.from + s, g.from + s);
  }
  return best;
}

/** The moment is level where no load stands and no shear is left; neighbouring level pieces are one range. */
function plateau(segments: readonly Segment[], noise: number): BeamAnswer['sagging'] {
  const level = segments.filter((g) => g.intensity === 0 && g.slope === 0 && Math.abs(g.shear) <= noise);
  const first = level[0] as Segment;
  const last = level.at(-1) as Segment;
  return { moment: Math.max(0, first.moment), from: first.from, to: last.to };
}

/** Largest deflection: at a root of the rotation; the rotation is monotone between the roots of the moment. */
function largestDeflection(segments: readonly Segment[], EI: number): BeamAnswer['deflection'] {
  let best = { sag: 0, at: 0 };
  for (const g of segments) {
    const h = g.to - g.from;
    const turns = [0, ...shearRoots(g.shear, g.intensity, g.slope, h), h];
    const stops = [0];
    for (let i = 0; i + 1 < turns.length; i++) {
      const a = turns[i] as number;
      const b = turns[i + 1] as number;
      if (momentAt(g, a) * momentAt(g, b) < 0)
        stops.push(
          bracketedRoot(
            (s) => momentAt(g, s),
            (s) => shearAt(g, s),
            a,
            b,
          ),
        );
      stops.push(b);
    }
    for (let i = 0; i + 1 < stops.length; i++) {
      const a = stops[i] as number;
      const b = stops[i + 1] as number;
      const before = rotationAt(g, a);
      const after = rotationAt(g, b);
      if (!(before >= 0 && after <= 0) || before === after) continue;
      const s = bracketedRoot(
        (x) => rotationAt(g, x),
        (x) => -momentAt(g, x),
        a,
        b,
      );
      const sag = deflectionAt(g, s) / EI;
      if (sag > best.sag) best = { sag, at: g.from + s };
    }
  }
  return best;
}

function largestShear(segments: readonly Segment[]): BeamAnswer['shear'] {
  let best = { force: 0, at: 0 };
  for (const g of segments) {
    const end = Math.abs(shearAt(g, g.to - g.from));
    if (Math.abs(g.shear) > best.force) best = { force: Math.abs(g.shear), at: g.from };
    if (end > best.force) best = { force: end, at: g.to };
  }
  return best;
}

/**
 * Solves one beam.
 * A point load exactly over a support goes into that support's reaction and not through the beam.
 * @throws RangeError quoting the value, for a span or rigidity not above 0, a negative stiffness, or a load no beam can carry
 * Accuracy: exact for straight-line intensities but for rounding, about 1e-14 of the largest value.
 * Source: statics of straight slender beams; semi-rigid ends by compatibility of end slopes.
 * @example uniform 4 N/mm over a pinned 2 700 mm → moment 3 645 000 N·mm at 1 350, since wL²/8
 */
export function solveBeam(beam: Beam, load: BeamLoad): BeamAnswer {
  const { span: L, rigidity: EI } = beam;
  if (!(L > 0 && L < Infinity)) throw new RangeError(`a beam's span must be above 0 mm, got ${L}`);
  if (!(EI > 0 && EI < Infinity)) throw new RangeError(`a beam's rigidity must be above 0 N·mm², got ${EI}`);
  for (const end of [beam.left, beam.right])
    if (end.kind === 'sprung' && !(end.stiffness >= 0))
      throw new RangeError(`a connector's stiffness must be 0 N·mm/rad or more, got ${end.stiffness}`);
  checkLoad(load, L);
  const total = sums(load, L);
  const through = total.resultant - total.overLeft - total.overRight;
  const [hogLeft, hogRight] = endMoments(beam, total.rotationLeft, total.rotationRight);
  const shear0 = total.pinnedLeft + (hogLeft - hogRight) / L;
  const rotation0 = total.rotationLeft - (hogLeft * L) / 3 - (hogRight * L) / 6;
  // A fixed end does not turn; what the subtraction leaves there is rounding.
  const segments = segmentsOf(load, L, shear0, -hogLeft, beam.left.kind === 'fixed' ? 0 : rotation0);
  const hogging = Math.max(hogLeft, hogRight, 0);
  return {
    span: L,
    rigidity: EI,
    resultant: total.resultant,
    centroid: total.resultant > 0 ? total.moment / total.resultant : null,
    reactionLeft: shear0 + total.overLeft,
    reactionRight: through - shear0 + total.overRight,
    endMomentLeft: 0 - hogLeft,
    endMomentRight: 0 - hogRight,
    shear: largestShear(segments),
    sagging: largestSagging(segments, total.noise),
    hogging: { moment: 0 - hogging, at: hogging === 0 ? null : hogLeft >= hogRight ? 0 : L },
    deflection: largestDeflection(segments, EI),
    segments,
  };
}
