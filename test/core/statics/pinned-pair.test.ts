import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { pairLoads, type StandingGoods } from '../../../src-core/goods/pair';
import { solveBeam } from '../../../src-core/statics/beam';
import { equivalentLoads } from '../../../src-core/statics/equivalent';
import type { BeamLoad } from '../../../src-core/statics/load';
import { RESULT, scratchFor, type PlacedProfiles } from '../../../src-core/statics/pinned-layout';
import { solvePinnedPair } from '../../../src-core/statics/pinned-pair';
import { packProfile } from '../../../src-core/statics/profile';
import { momentIn } from '../../../src-core/statics/segment';
import { expectClose } from '../../close';

interface Standing {
  readonly load: BeamLoad;
  readonly width: number;
  readonly at: number;
  readonly share: number;
}

function placed(goods: readonly Standing[]): PlacedProfiles {
  const packed = goods.map(({ load, width }) => packProfile(load, width));
  let next = 0;
  const starts = packed.map(({ length }) => (next += length) - length);
  const profiles = new Float64Array(next);
  packed.forEach((one, i) => profiles.set(one, starts[i]));
  return {
    profiles,
    profile: Int32Array.from(starts),
    at: Float64Array.from(goods, ({ at }) => at),
    share: Float64Array.from(goods, ({ share }) => share),
  };
}

/** Results of both beams, or null where the fast way leaves the level to the general one. */
function solve(span: number, goods: readonly Standing[]): [front: Float64Array, rear: Float64Array] | null {
  const out = new Float64Array(2 * RESULT.size);
  const solved = solvePinnedPair(span, placed(goods), 0, goods.length, new Float64Array(scratchFor(goods.length)), out);
  return solved ? [out.subarray(0, RESULT.size), out.subarray(RESULT.size)] : null;
}

function compare(span: number, goods: readonly Standing[]): void {
  const fast = solve(span, goods) ?? expect.fail('left to the general way');
  const standing: StandingGoods[] = goods.map(({ load, width, at, share }, i) => ({
    id: String(i),
    load,
    widthMm: width,
    at,
    mirrored: false,
    frontShare: share,
  }));
  const { front, rear } = pairLoads(standing);
  [front, rear].forEach((load, side) => {
    const got = fast[side] as Float64Array;
    const answer = solveBeam({ span, rigidity: 1, left: { kind: 'pinned' }, right: { kind: 'pinned' } }, load);
    const even = equivalentLoads(answer, 1);
    const W = answer.resultant;
    const close = (index: number, value: number, scale: number) =>
      expectClose(got[index] as number, value, 1e-12, scale, `result ${index}`);
    if (answer.centroid === null) expect(got[RESULT.centroid]).toBeNaN();
    else close(RESULT.centroid, answer.centroid, span);
    close(RESULT.resultant, W, W);
    close(RESULT.reactionLeft, answer.reactionLeft, W);
    close(RESULT.reactionRight, answer.reactionRight, W);
    close(RESULT.shear, answer.shear.force, W);
    close(RESULT.moment, answer.sagging.moment, (W * span) / 8);
    close(RESULT.deflectionEI, answer.deflection.sag, answer.deflection.sag);
    close(RESULT.deflectionAt, answer.deflection.at, span);
    close(RESULT.bending, even.bending, W);
    close(RESULT.endShear, even.endShear, W);
    close(RESULT.deflection, even.deflection, W);
    // Where the moment is all but level its place may differ; the moment there may not.
    const at = got[RESULT.momentAt] as number;
    const segment = answer.segments.findLast(({ from }) => from <= at) ?? expect.fail('place off the beam');
    expectClose(momentIn(segment, at - segment.from), answer.sagging.moment, 1e-12, (W * span) / 8, 'moment at its place');
  });
}

const part = fc.integer({ min: 0, max: 1000 }).map((thousandth) => thousandth / 1000);
const weight = fc.double({ min: 0.01, max: 20, noNaN: true });

/** Pieces anywhere within a unit load of 1 mm, overlapping or not, and points, often at its edges. */
const shape: fc.Arbitrary<BeamLoad> = fc.record({
  lines: fc
    .array(fc.record({ a: part, b: part, wFrom: weight, wTo: fc.oneof(weight, fc.constant(0)) }), { maxLength: 4 })
    .map((lines) =>
      lines.filter(({ a, b }) => a !== b).map(({ a, b, wFrom, wTo }) => ({ from: Math.min(a, b), to: Math.max(a, b), wFrom, wTo })),
    ),
  points: fc.array(fc.record({ at: part, force: weight.map((w) => 200 * w) }), { maxLength: 2 }),
});

const scaled = ({ lines, points }: BeamLoad, width: number): BeamLoad => ({
  lines: lines.map((line) => ({ ...line, from: line.from * width, to: line.to * width })),
  points: points.map((point) => ({ ...point, at: point.at * width })),
});

/** Unit loads side by side, touching where a gap is 0, the outer ones often at the supports. */
const level = fc
  .record({
    span: fc.integer({ min: 600, max: 12000 }),
    goods: fc.array(fc.record({ shape, width: fc.integer({ min: 1, max: 9 }), gap: fc.integer({ min: 0, max: 3 }), share: part }), {
      minLength: 1,
      maxLength: 9,
    }),
    lastGap: fc.integer({ min: 0, max: 3 }),
    inTheMiddle: fc.boolean(),
  })
  .map(({ span, goods, lastGap, inTheMiddle }) => {
    const parts = goods.reduce((sum, { width, gap }) => sum + width + gap, lastGap);
    let edge = 0;
    const standing = goods.map(({ shape: one, width, gap, share }, i): Standing => {
      const at = ((edge + gap) * span) / parts;
      edge += gap + width;
      const to = i === goods.length - 1 && lastGap === 0 ? span : (edge * span) / parts;
      return { load: scaled(one, to - at), width: to - at, at, share: inTheMiddle ? 0.5 : share };
    });
    return { span, goods: standing };
  });

test('the fast way agrees with solveBeam to 1e-12 on 3 000 random levels', () => {
  fc.assert(
    fc.property(level, ({ span, goods }) => compare(span, goods)),
    { numRuns: 3000 },
  );
});

const even = (width: number, at: number, share = 0.5): Standing => ({
  load: { lines: [{ from: 0, to: width, wFrom: 2, wTo: 2 }], points: [] },
  width,
  at,
  share,
});

test('one unit load at mid-span by hand: M = wb(2L − b)/8 and δ = wb(8L³ − 4Lb² + b³)/384EI (AISC Manual Table 3-23, special case of 4)', () => {
  const [front] = solve(2700, [even(800, 950, 1)]) ?? expect.fail();
  const [L, b] = [2700, 800];
  expectClose(front[RESULT.moment] ?? null, (2 * b * (2 * L - b)) / 8, 1e-14);
  expectClose(front[RESULT.momentAt] ?? null, L / 2, 1e-14);
  expectClose(front[RESULT.deflectionEI] ?? null, (2 * b * (8 * L ** 3 - 4 * L * b ** 2 + b ** 3)) / 384, 1e-14);
  expectClose(front[RESULT.deflectionAt] ?? null, L / 2, 1e-14);
});

test('a beam with no share carries nothing', () => {
  const [front, rear] = solve(2700, [even(800, 75, 1), even(800, 950, 1)]) ?? expect.fail();
  expect(front[RESULT.resultant]).toBeGreaterThan(0);
  expect([...rear].map((value) => value || 0)).toEqual(new Array(RESULT.size).fill(0));
  expect(rear[RESULT.centroid]).toBeNaN();
});

test('feet exactly over the supports load the reactions and not the beam', () => {
  const feet: BeamLoad = {
    lines: [],
    points: [
      { at: 0, force: 700 },
      { at: 2700, force: 300 },
    ],
  };
  const [front] = solve(2700, [{ load: feet, width: 2700, at: 0, share: 1 }]) ?? expect.fail();
  expect([front[RESULT.reactionLeft], front[RESULT.reactionRight], front[RESULT.moment]]).toEqual([700, 300, 0]);
  expectClose(front[RESULT.shear] ?? null, 0, 1e-15, 1000);
});

describe('what the fast way leaves to solveBeam', () => {
  test.each([
    ['overlapping unit loads', [even(800, 75), even(800, 800)]],
    ['unit loads out of order', [even(800, 950), even(800, 75)]],
    ['a unit load past the left end', [even(800, -1)]],
    ['a unit load past the right end', [even(800, 1901)]],
    ['a place that is no number', [even(800, NaN)]],
    ['an empty level', []],
  ])('%s', (_, goods) => {
    expect(solve(2700, goods)).toBeNull();
  });
});
