/**
 * The front and the rear beam of a level, pinned, in one go and without making objects: what a level check
 * needs of `solveBeam`, for whole sites at once. Unit loads must stand apart from one another.
 *
 * Each unit load counts by its kept moments (profile.ts); the sums and formulas are those of sections.ts.
 * Shear and rotation both fall from left to right, so only the one or two unit loads in which they pass
 * zero are opened (pinned-peaks.ts).
 */
import { BEAM, GOODS, RESULT, type PlacedProfiles } from './pinned-layout';
import { peakDeflection, peakMoment } from './pinned-peaks';
import { PROFILE } from './profile';

/** Parts of the span by which unit loads may overlap or reach past an end: rounding of their places. */
const PLACE_ROUNDING = 1e-13;

/**
 * Solves the unit loads `start` … `end − 1` on two pinned beams of one span.
 * @param scratch at least `scratchFor(end − start)` numbers, overwritten
 * @param out receives 2 · RESULT.size numbers: front, then rear
 * @returns false, with nothing written, where unit loads overlap, stand out of order or reach past an
 *   end, or there is none: that load is for `solveBeam` to answer or refuse
 * Accuracy: as `solveBeam`, to about 1e-14 of each greatest value.
 */
export function solvePinnedPair(
  span: number,
  goods: PlacedProfiles,
  start: number,
  end: number,
  scratch: Float64Array,
  out: Float64Array,
): boolean {
  const count = end - start;
  if (count < 1 || !sumFromLeft(span, goods, start, count, scratch)) return false;
  sumFromRight(count, scratch);
  solveOne(span, goods.profiles, count, scratch, GOODS.front, out, 0);
  if (allInTheMiddle(goods.share, start, end)) for (let i = 0; i < RESULT.size; i++) out[RESULT.size + i] = out[i] as number;
  else solveOne(span, goods.profiles, count, scratch, GOODS.rear, out, RESULT.size);
  return true;
}

/** Goods in the middle of the pair, as most are, load its two beams alike. */
function allInTheMiddle(share: Float64Array, start: number, end: number): boolean {
  for (let i = start; i < end; i++) if (share[i] !== 0.5) return false;
  return true;
}

/**
 * Places each unit load's kept moments on the span and sums them for both beams, from left to right.
 * @returns false if the unit loads do not stand one after another on the span
 */
function sumFromLeft(
  span: number,
  { profiles, profile, at, share }: PlacedProfiles,
  start: number,
  count: number,
  scratch: Float64Array,
): boolean {
  const slack = span * PLACE_ROUNDING;
  let edge = -slack;
  let frontA = 0;
  let frontA3 = 0;
  let rearA = 0;
  let rearA3 = 0;
  let k = 0;
  for (let i = start; i < start + count; i++, k += GOODS.size) {
    const p = profile[i] as number;
    const a = at[i] as number;
    const to = a + (profiles[p] as number);
    if (!(a >= edge && to <= span + slack)) return false;
    edge = to - slack;
    const b = span - to;
    const front = share[i] as number;
    const rear = 1 - front;
    const weight = profiles[p + PROFILE.weight] as number;
    const m1 = profiles[p + PROFILE.fromLeft] as number;
    const m2 = profiles[p + PROFILE.fromLeft + 1] as number;
    const m3 = profiles[p + PROFILE.fromLeft + 2] as number;
    const n1 = profiles[p + PROFILE.fromRight] as number;
    const n2 = profiles[p + PROFILE.fromRight + 1] as number;
    const n3 = profiles[p + PROFILE.fromRight + 2] as number;
    scratch[k + GOODS.from] = a;
    scratch[k + GOODS.to] = to;
    scratch[k + GOODS.profile] = p;
    scratch[k + GOODS.ownB] = b * weight + n1;
    scratch[k + GOODS.ownB3] = b * (b * (b * weight + 3 * n1) + 3 * n2) + n3;
    scratch[k + GOODS.front + BEAM.part] = front;
    scratch[k + GOODS.front + BEAM.a] = frontA;
    scratch[k + GOODS.front + BEAM.a3] = frontA3;
    scratch[k + GOODS.rear + BEAM.part] = rear;
    scratch[k + GOODS.rear + BEAM.a] = rearA;
    scratch[k + GOODS.rear + BEAM.a3] = rearA3;
    const ownA = a * weight + m1;
    const ownA3 = a * (a * (a * weight + 3 * m1) + 3 * m2) + m3;
    frontA += front * ownA;
    frontA3 += front * ownA3;
    rearA += rear * ownA;
    rearA3 += rear * ownA3;
  }
  scratch[k + GOODS.front + BEAM.a] = frontA;
  scratch[k + GOODS.front + BEAM.a3] = frontA3;
  scratch[k + GOODS.rear + BEAM.a] = rearA;
  scratch[k + GOODS.rear + BEAM.a3] = rearA3;
  return true;
}

function sumFromRight(count: number, scratch: Float64Array): void {
  let frontB = 0;
  let frontB3 = 0;
  let rearB = 0;
  let rearB3 = 0;
  for (let k = GOODS.size * count; ; k -= GOODS.size) {
    scratch[k + GOODS.front + BEAM.b] = frontB;
    scratch[k + GOODS.front + BEAM.b3] = frontB3;
    scratch[k + GOODS.rear + BEAM.b] = rearB;
    scratch[k + GOODS.rear + BEAM.b3] = rearB3;
    if (k === 0) return;
    const before = k - GOODS.size;
    const front = scratch[before + GOODS.front + BEAM.part] as number;
    const rear = scratch[before + GOODS.rear + BEAM.part] as number;
    const ownB = scratch[before + GOODS.ownB] as number;
    const ownB3 = scratch[before + GOODS.ownB3] as number;
    frontB += front * ownB;
    frontB3 += front * ownB3;
    rearB += rear * ownB;
    rearB3 += rear * ownB3;
  }
}

/** One beam, whose numbers stand at `beam` within each unit load's; its results go to `out` from `o` on. */
function solveOne(
  span: number,
  profiles: Float64Array,
  count: number,
  scratch: Float64Array,
  beam: number,
  out: Float64Array,
  o: number,
): void {
  const end = GOODS.size * count;
  const a = scratch[end + beam + BEAM.a] as number;
  const b = scratch[beam + BEAM.b] as number;
  if (a + b === 0) {
    out.fill(0, o, o + RESULT.size);
    out[o + RESULT.centroid] = NaN;
    return;
  }
  const perSpan = 1 / span;
  const left = b * perSpan;
  const right = a * perSpan;
  // Every bit of load is as far from both supports together as the span.
  out[o] = left + right;
  out[o + RESULT.centroid] = a / (left + right);
  out[o + RESULT.reactionLeft] = left;
  out[o + RESULT.reactionRight] = right;
  out[o + RESULT.endShear] = 2 * Math.max(left, right);
  out[o + RESULT.shear] = Math.max(left - overLeft(span, profiles, scratch, beam), right - overRight(span, profiles, scratch, beam, end));
  peakMoment(span, profiles, count, scratch, beam, out, o);
  peakDeflection(span, profiles, count, scratch, beam, out, o);
  out[o + RESULT.bending] = 8 * (out[o + RESULT.moment] as number) * perSpan;
  out[o + RESULT.deflection] = (384 / 5) * (out[o + RESULT.deflectionEI] as number) * perSpan * perSpan * perSpan;
}

/** What of the first unit load stands as a point exactly over the left support. */
function overLeft(span: number, profiles: Float64Array, scratch: Float64Array, beam: number): number {
  if ((scratch[GOODS.from] as number) > span * PLACE_ROUNDING) return 0;
  return (scratch[beam + BEAM.part] as number) * (profiles[(scratch[GOODS.profile] as number) + PROFILE.pointLeft] as number);
}

/** What of the last unit load, the one before `end` in the scratch, stands as a point exactly over the right support. */
function overRight(span: number, profiles: Float64Array, scratch: Float64Array, beam: number, end: number): number {
  const last = end - GOODS.size;
  if ((scratch[last + GOODS.to] as number) < span - span * PLACE_ROUNDING) return 0;
  return (
    (scratch[last + beam + BEAM.part] as number) * (profiles[(scratch[last + GOODS.profile] as number) + PROFILE.pointRight] as number)
  );
}
