/** What holds for every beam, on 14 000 random ones; the integrator they are held against is test/core/quadrature.ts. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { solveBeam, type BeamAnswer, type BeamEnd } from '../../../src-core/statics/beam';
import { curvesOf } from '../../../src-core/statics/curves';
import { equivalentLoads } from '../../../src-core/statics/equivalent';
import type { BeamLoad } from '../../../src-core/statics/load';
import { deflectionIn, momentIn, shearIn } from '../../../src-core/statics/segment';
import { reduce } from '../../../src-core/statics/reduction';
import { expectClose } from '../../close';
import { byQuadrature } from '../quadrature';
import { anyBeam, loaded, pinnedBeam, twiceLoaded } from '../random-beam';

const check = <T extends readonly unknown[]>(property: fc.IPropertyWithHooks<T>, numRuns = 2000): void => fc.assert(property, { numRuns });

/** Shear, moment and deflection at x from the segment that holds it. */
function at(answer: BeamAnswer, x: number): { shear: number; moment: number; deflection: number } {
  const segment = answer.segments.findLast(({ from }) => from <= x) ?? expect.fail('no segment');
  const s = x - segment.from;
  return { shear: shearIn(segment, s), moment: momentIn(segment, s), deflection: deflectionIn(segment, s, answer.rigidity) };
}

/** Sizes that errors are measured by: force, moment, and the deflection of the same load held by pins. */
function scales(answer: BeamAnswer): { force: number; moment: number; deflection: number } {
  const force = answer.resultant;
  return { force, moment: (force * answer.span) / 8, deflection: (force * answer.span ** 3) / (384 * answer.rigidity) };
}

test('equilibrium: reactions add up to the load, and turn about the left support as it does', () => {
  check(
    fc.property(loaded(anyBeam), ({ beam, load }) => {
      const answer = solveBeam(beam, load);
      const { resultant, centroid } = reduce(load);
      expectClose(answer.resultant, resultant, 1e-12);
      if (resultant > 0) expectClose(answer.centroid, centroid ?? NaN, 1e-12, beam.span);
      expectClose(answer.reactionLeft + answer.reactionRight, resultant, 1e-12);
      const turning = answer.reactionRight * beam.span + answer.endMomentRight - answer.endMomentLeft;
      expectClose(turning, resultant * (centroid ?? 0), 1e-12, resultant * beam.span);
      expect(Math.min(answer.reactionLeft, answer.reactionRight)).toBeGreaterThanOrEqual(0);
      expect(Math.max(answer.endMomentLeft, answer.endMomentRight)).toBeLessThanOrEqual(0);
    }),
  );
});

test('superposition: two loads together do what they do apart, at every place', () => {
  check(
    fc.property(twiceLoaded(anyBeam), fc.double({ min: 0, max: 1, noNaN: true }), ({ beam, one, other }, part) => {
      const both = solveBeam(beam, { lines: [...one.lines, ...other.lines], points: [...one.points, ...other.points] });
      const a = solveBeam(beam, one);
      const b = solveBeam(beam, other);
      const { force, moment, deflection } = scales(both);
      expectClose(both.reactionLeft, a.reactionLeft + b.reactionLeft, 1e-13, force);
      expectClose(both.endMomentLeft, a.endMomentLeft + b.endMomentLeft, 1e-13, moment);
      expectClose(both.endMomentRight, a.endMomentRight + b.endMomentRight, 1e-13, moment);
      const x = part * beam.span;
      expectClose(at(both, x).moment, at(a, x).moment + at(b, x).moment, 1e-12, moment);
      expectClose(at(both, x).deflection, at(a, x).deflection + at(b, x).deflection, 1e-12, deflection);
    }),
  );
});

const mirror = (load: BeamLoad, span: number): BeamLoad => ({
  lines: load.lines.map(({ from, to, wFrom, wTo }) => ({ from: span - to, to: span - from, wFrom: wTo, wTo: wFrom })),
  points: load.points.map(({ at: x, force }) => ({ at: span - x, force })),
});

test('mirror image: the beam turned left for right answers turned left for right', () => {
  const whole = loaded(anyBeam).filter(({ beam, load }) => {
    // Only loads whose mirror image has no rounding of its own, such as a strip that would vanish.
    const back = mirror(mirror(load, beam.span), beam.span);
    return back.lines.every(({ from, to }, i) => from === load.lines[i]?.from && to === load.lines[i]?.to && from < to);
  });
  check(
    fc.property(whole, ({ beam, load }) => {
      const answer = solveBeam(beam, load);
      const turned = solveBeam({ ...beam, left: beam.right, right: beam.left }, mirror(load, beam.span));
      const { force, moment, deflection } = scales(answer);
      expectClose(turned.reactionLeft, answer.reactionRight, 1e-13, force);
      expectClose(turned.endMomentLeft, answer.endMomentRight, 1e-13, moment);
      expectClose(turned.sagging.moment, answer.sagging.moment, 1e-13, moment);
      expectClose(turned.hogging.moment, answer.hogging.moment, 1e-13, moment);
      expectClose(turned.shear.force, answer.shear.force, 1e-13, force);
      expectClose(turned.deflection.sag, answer.deflection.sag, 1e-13, deflection);
      // Where it bends most is the same place or stretch: the moment there is the greatest one.
      expectClose(at(answer, Math.min(Math.max(beam.span - turned.sagging.to, 0), beam.span)).moment, answer.sagging.moment, 1e-12, moment);
    }),
  );
});

test('the order in which loads are given changes nothing, to the last bit', () => {
  const shuffled = loaded(anyBeam).chain(({ beam, load }) =>
    fc.record({
      beam: fc.constant(beam),
      load: fc.constant(load),
      lines: fc.shuffledSubarray([...load.lines], { minLength: load.lines.length }),
      points: fc.shuffledSubarray([...load.points], { minLength: load.points.length }),
    }),
  );
  check(
    fc.property(shuffled, ({ beam, load, lines, points }) => {
      expect(solveBeam(beam, { lines, points })).toEqual(solveBeam(beam, load));
    }),
    1500,
  );
});

test('reactions, end moments, shear, moment and deflection agree with the independent integrator', () => {
  const place = fc.double({ min: 0.001, max: 0.999, noNaN: true });
  check(
    fc.property(loaded(anyBeam), place, ({ beam, load }, part) => {
      const answer = solveBeam(beam, load);
      const other = byQuadrature(beam, load);
      const { force, moment, deflection } = scales(answer);
      expectClose(answer.resultant, other.resultant, 1e-12, force, 'resultant');
      if (answer.centroid !== null)
        expectClose(answer.centroid * answer.resultant, other.firstMoment, 1e-12, force * beam.span, 'centroid');
      expectClose(answer.reactionLeft, other.reactionLeft, 1e-12, force, 'left reaction');
      expectClose(answer.reactionRight, other.reactionRight, 1e-12, force, 'right reaction');
      expectClose(answer.endMomentLeft, other.endMomentLeft, 1e-12, moment, 'left end moment');
      expectClose(answer.endMomentRight, other.endMomentRight, 1e-12, moment, 'right end moment');
      const x = part * beam.span;
      if (load.points.every((point) => point.at !== x)) expectClose(at(answer, x).shear, other.shear(x), 1e-12, force, 'shear');
      expectClose(at(answer, x).moment, other.moment(x), 1e-12, moment, 'moment');
      expectClose(at(answer, x).deflection, other.deflection(x), 1e-12, deflection, 'deflection');
    }),
  );
});

test('the extremes are what the independent integrator finds at their places, and greater than at any other', () => {
  const places = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 6, maxLength: 6 });
  check(
    fc.property(loaded(anyBeam), places, ({ beam, load }, parts) => {
      const answer = solveBeam(beam, load);
      const other = byQuadrature(beam, load);
      const { force, moment, deflection } = scales(answer);
      const { sagging, hogging } = answer;
      for (const x of [sagging.from, (sagging.from + sagging.to) / 2, sagging.to])
        expectClose(Math.max(other.moment(x), 0), sagging.moment, 1e-12, moment, `moment at ${x}`);
      expectClose(other.deflection(answer.deflection.at), answer.deflection.sag, 1e-12, deflection, 'sag');
      expectClose(Math.min(answer.endMomentLeft, answer.endMomentRight), hogging.moment, 0, 1, 'hogging');
      const near = (x: number, step: number): number[] => [x - step, x + step].filter((one) => one > 0 && one < beam.span);
      const others = [
        ...parts.map((part) => part * beam.span),
        ...near(sagging.from, beam.span * 1e-4),
        ...near(answer.deflection.at, beam.span * 1e-4),
      ];
      for (const x of others) {
        expect(other.moment(x)).toBeLessThanOrEqual(sagging.moment + 1e-12 * moment);
        expect(other.moment(x)).toBeGreaterThanOrEqual(hogging.moment - 1e-12 * moment);
        expect(other.deflection(x)).toBeLessThanOrEqual(answer.deflection.sag + 1e-12 * deflection);
        if (x > 0 && x < beam.span) expect(Math.abs(other.shear(x))).toBeLessThanOrEqual(answer.shear.force + 1e-12 * force);
      }
    }),
    1500,
  );
});

test('half-rating rule: one load of P anywhere is at most 2P by bending and end shear, 1.6P by deflection', () => {
  // A single unit load of any shape. Source: statics, computed with a general script (the trade's shape factors).
  check(
    fc.property(loaded(pinnedBeam), ({ beam, load }) => {
      const even = equivalentLoads(solveBeam(beam, load), beam.rigidity);
      expect(even.bending).toBeLessThanOrEqual(2 * even.total * (1 + 1e-12));
      expect(even.endShear).toBeLessThanOrEqual(2 * even.total * (1 + 1e-12));
      expect(even.deflection).toBeLessThanOrEqual(1.6 * even.total * (1 + 1e-12));
    }),
  );
});

/** Every number anywhere in a value. */
function numbersIn(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : [];
}

test('any input is either refused with a RangeError or answered in finite numbers', () => {
  const any = fc.oneof(
    { weight: 3, arbitrary: fc.double({ min: 0, max: 3000 }) },
    { weight: 1, arbitrary: fc.double() },
    { weight: 1, arbitrary: fc.constantFrom(0, 5e-324, 1e-300, 1e-9, 1e9, 1e200, 1e308, 1500, 3000) },
  );
  const end: fc.Arbitrary<BeamEnd> = fc.oneof(
    fc.constantFrom<BeamEnd>({ kind: 'pinned' }, { kind: 'fixed' }),
    any.map((stiffness): BeamEnd => ({ kind: 'sprung', stiffness })),
  );
  const beam = fc.record({ span: fc.oneof(any, fc.constant(3000)), rigidity: fc.oneof(any, fc.constant(2e11)), left: end, right: end });
  const load = fc.record({
    lines: fc.array(fc.record({ from: any, to: any, wFrom: any, wTo: any }), { maxLength: 3 }),
    points: fc.array(fc.record({ at: any, force: any }), { maxLength: 2 }),
  });
  let answered = 0;
  check(
    fc.property(beam, load, (given, on) => {
      let answer: BeamAnswer;
      try {
        answer = solveBeam(given, on);
      } catch (error) {
        expect(error).toBeInstanceOf(RangeError);
        return;
      }
      answered++;
      expect(numbersIn(answer).filter((value) => !Number.isFinite(value))).toEqual([]);
      expect(numbersIn(equivalentLoads(answer, answer.rigidity)).filter(Number.isNaN)).toEqual([]);
      expect(numbersIn(curvesOf(answer, 2)).filter(Number.isNaN)).toEqual([]);
    }),
    6000,
  );
  expect(answered).toBeGreaterThan(300);
});
