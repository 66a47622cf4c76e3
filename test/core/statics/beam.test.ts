import { describe, expect, test } from 'vitest';
import { solveBeam, type Beam } from '../../../src-core/statics/beam';
import { curvesOf } from '../../../src-core/statics/curves';
import { equivalentLoads } from '../../../src-core/statics/equivalent';
import { NO_LOAD, type BeamLoad } from '../../../src-core/statics/load';
import { expectClose } from '../../close';

const beam: Beam = { span: 2400, rigidity: 2e11, left: { kind: 'pinned' }, right: { kind: 'pinned' } };
const line = (from: number, to: number, wFrom: number, wTo = wFrom): BeamLoad => ({ lines: [{ from, to, wFrom, wTo }], points: [] });
const point = (at: number, force: number): BeamLoad => ({ lines: [], points: [{ at, force }] });

test('4 kN at the middle of a pinned 2.4 m beam: reactions 2 kN, moment PL/4, and 8 kN evenly spread bend it alike', () => {
  const answer = solveBeam(beam, point(1200, 4000));
  expect([answer.reactionLeft, answer.reactionRight, answer.sagging.moment]).toEqual([2000, 2000, 2_400_000]);
  const even = equivalentLoads(answer, beam.rigidity);
  expect([even.total, even.bending, even.endShear]).toEqual([4000, 8000, 4000]);
  expectClose(even.deflection, 6400, 1e-14);
});

test('no load: nothing anywhere, no centroid, and a moment of zero all along', () => {
  const answer = solveBeam({ ...beam, left: { kind: 'fixed' } }, NO_LOAD);
  expect(answer).toMatchObject({
    resultant: 0,
    centroid: null,
    reactionLeft: 0,
    reactionRight: 0,
    endMomentLeft: 0,
    endMomentRight: 0,
    shear: { force: 0 },
    sagging: { moment: 0, from: 0, to: 2400 },
    hogging: { moment: 0, at: null },
    deflection: { sag: 0 },
  });
  expect(Object.values(equivalentLoads(answer, beam.rigidity))).toEqual([0, 0, 0, 0]);
});

test('a load over a support goes into that reaction and not through the beam', () => {
  const load = line(600, 1800, 2);
  const alone = solveBeam(beam, load);
  const both = solveBeam(beam, {
    ...load,
    points: [
      { at: 0, force: 900 },
      { at: 2400, force: 50 },
    ],
  });
  expect(both).toMatchObject({ sagging: alone.sagging, shear: alone.shear, deflection: alone.deflection });
  expect(both.reactionLeft).toBe(alone.reactionLeft + 900);
  expect(both.reactionRight).toBe(alone.reactionRight + 50);
  expect(both.resultant).toBe(2400 + 950);
});

test('a rounding past the end of the beam is at the end; more is refused', () => {
  expect(solveBeam(beam, line(1600, 1600 + 800 + 1e-12, 1)).resultant).toBeCloseTo(800, 9);
  expect(solveBeam(beam, point(2400 + 2e-12, 100)).reactionRight).toBe(100);
  expect(() => solveBeam(beam, line(1600, 2400.001, 1))).toThrow(RangeError);
});

describe('what cannot be is refused, quoting the value', () => {
  const bad: [string, Partial<Beam>, BeamLoad, RegExp][] = [
    ['a span of zero', { span: 0 }, NO_LOAD, /span must be above 0 mm, got 0/],
    ['a span below zero', { span: -1 }, NO_LOAD, /got -1/],
    ['a span that is no number', { span: NaN }, NO_LOAD, /got NaN/],
    ['an endless span', { span: Infinity }, NO_LOAD, /got Infinity/],
    ['no rigidity', { rigidity: 0 }, NO_LOAD, /rigidity EI must be above 0 N·mm², got 0/],
    ['a rigidity that is no number', { rigidity: NaN }, NO_LOAD, /got NaN/],
    ['a stiffness below zero', { left: { kind: 'sprung', stiffness: -5 } }, NO_LOAD, /stiffness of a beam end .* got -5/],
    ['a stiffness that is no number', { right: { kind: 'sprung', stiffness: NaN } }, NO_LOAD, /got NaN/],
    ['a line that runs back', {}, line(900, 300, 1), /from left to right, got from 900 to 300/],
    ['a line without length', {}, line(900, 900, 1), /from left to right/],
    ['a line past the left end', {}, line(-10, 300, 1), /from -10 to 300 mm reaches past the beam, which is from 0 to 2400/],
    ['a line past the right end', {}, line(2000, 2500, 1), /from 2000 to 2500 mm reaches past/],
    ['a place that is no number', {}, line(NaN, 300, 1), /got from NaN/],
    ['an intensity below zero', {}, line(0, 300, 1, -2), /intensity must be 0 N\/mm or more, got -2/],
    ['an intensity that is no number', {}, line(0, 300, NaN, 1), /got NaN/],
    ['an endless intensity', {}, line(0, 300, Infinity, 1), /got Infinity/],
    ['a point off the beam', {}, point(2500, 1), /point load at 2500 mm stands past the beam/],
    ['a point nowhere', {}, point(NaN, 1), /point load at NaN/],
    ['a point below zero', {}, point(500, -1), /point load must be 0 N or more, got -1/],
    ['a load beyond numbers', {}, point(500, 1e308), /beyond what can be computed/],
  ];
  test.each(bad)('%s', (_, part, load, message) => {
    const solve = () => solveBeam({ ...beam, ...part }, load);
    expect(solve).toThrow(RangeError);
    expect(solve).toThrow(message);
  });
});

test('a stiffness of 0 is pinned and one of Infinity is fixed, to the last digit', () => {
  const load = line(200, 1900, 1, 4);
  const held = (kind: 'pinned' | 'fixed', stiffness: number) => [
    solveBeam({ ...beam, left: { kind }, right: { kind: 'sprung', stiffness: 5e7 } }, load),
    solveBeam({ ...beam, left: { kind: 'sprung', stiffness }, right: { kind: 'sprung', stiffness: 5e7 } }, load),
  ];
  for (const [named, sprung] of [held('pinned', 0), held('fixed', Infinity)]) expect(sprung).toEqual(named);
});

test('with pinned and fixed ends the rigidity changes the sag alone', () => {
  const load = line(200, 1900, 1, 4);
  const soft = solveBeam({ ...beam, left: { kind: 'fixed' } }, load);
  const stiff = solveBeam({ ...beam, left: { kind: 'fixed' }, rigidity: beam.rigidity * 8 }, load);
  expect(stiff).toMatchObject({ reactionLeft: soft.reactionLeft, sagging: soft.sagging, hogging: soft.hogging });
  expectClose(stiff.deflection.sag, soft.deflection.sag / 8, 1e-14);
});

test('curves start and end at the supports, stand upright at jumps and hold every extreme', () => {
  const answer = solveBeam(
    { ...beam, left: { kind: 'sprung', stiffness: 4e7 } },
    { ...line(300, 1100, 1, 5), points: [{ at: 1700, force: 2500 }] },
  );
  const curves = curvesOf(answer);
  const first = curves[0];
  const last = curves.at(-1);
  expect([first?.x, last?.x]).toEqual([0, 2400]);
  expectClose(first?.shear ?? null, answer.reactionLeft, 1e-15);
  expectClose(last?.shear ?? null, -answer.reactionRight, 1e-13);
  expectClose(first?.moment ?? null, answer.endMomentLeft, 1e-15);
  expectClose(last?.moment ?? null, 0, 1e-13, answer.sagging.moment);
  expectClose(last?.deflection ?? null, 0, 1e-13, answer.deflection.sag);
  const jump = curves.filter(({ x }) => x === 1700).map(({ shear }) => shear);
  expect(jump).toHaveLength(2);
  expectClose((jump[0] ?? 0) - (jump[1] ?? 0), 2500, 1e-12);
  expect(curves.filter(({ x }) => x === 300).map(({ intensity }) => intensity)).toEqual([0, 1]);
  const at = (x: number) => curves.find((one) => one.x === x);
  expectClose(at(answer.sagging.from)?.moment ?? null, answer.sagging.moment, 1e-14);
  expectClose(at(answer.deflection.at)?.deflection ?? null, answer.deflection.sag, 1e-14);
  expect(curves.every((one, i) => i === 0 || one.x >= (curves[i - 1]?.x ?? 0))).toBe(true);
});
