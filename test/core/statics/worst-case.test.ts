/**
 * The worst arrangement of unit loads under placement tolerance: closed forms by hand, SciPy, and a
 * straightforward search that shares nothing with the core.
 */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { solveBeam, type BeamEnd } from '../../../src-core/statics/beam';
import type { BeamLoad } from '../../../src-core/statics/load';
import { worstMoment, worstReaction, worstSag } from '../../../src-core/statics/worst-case';
import { arrangedLoad, type LooseLoad } from '../../../src-core/statics/worst-case-loads';
import { expectClose } from '../../close';
import { EI, even, loose, looseBeam } from '../loose';

const FIXED: BeamEnd = { kind: 'fixed' };
/** A unit load so narrow that it stands on one point, at `x`. */
const point = (x: number, force: number, factor = 1): LooseLoad => loose({ lines: [], points: [{ at: 0, force }] }, 1e-9, x, factor);

describe('closed forms by hand', () => {
  test('a point load goes towards the middle as far as it may: P·a·b/L at the new place', () => {
    const { moment, at, shifts, how } = worstMoment(looseBeam(3000, 50), [point(1000, 4000)]);
    expectClose(moment, (4000 * 1050 * 1950) / 3000);
    expectClose(at, 1050);
    expectClose(shifts[0] ?? NaN, 50);
    expect(how).toBe('exact');
  });

  test('it goes to the middle and no further: P·L/4', () => {
    const { moment, shifts } = worstMoment(looseBeam(3000, 200), [point(1400, 4000)]);
    expectClose(moment, (4000 * 3000) / 4);
    expectClose(shifts[0] ?? NaN, 100, 1e-9);
  });

  test('an even load in the middle is at its worst as stated: W·(L/4 − b/8)', () => {
    const { moment, shifts } = worstMoment(looseBeam(2700, 50), [loose(even(800, 6000), 800, 950)]);
    expectClose(moment, 6000 * (2700 / 4 - 800 / 8));
    expectClose(shifts[0] ?? NaN, 0, 1e-6, 1);
  });

  test('an even load off the middle: W·c·(L − c)/L·(1 − b/2L) with its centre as near the middle as it may', () => {
    const { moment } = worstMoment(looseBeam(2700, 50), [loose(even(800, 6000), 800, 600)]);
    expectClose(moment, ((6000 * 1050 * 1650) / 2700) * (1 - 800 / 5400));
  });

  test('weights by their factor: everything 2 % more is 2 % worse', () => {
    const { moment } = worstMoment(looseBeam(3000, 50), [point(1000, 4000, 1.02)]);
    expectClose(moment, (1.02 * 4000 * 1050 * 1950) / 3000);
  });

  test('a reaction is greatest with all towards it, but not past the upright: W·(L − c)/L', () => {
    const beam = looseBeam(2700, 50);
    const loads = [loose(even(800, 6000), 800, 20), loose(even(800, 3000), 800, 1000)];
    const left = worstReaction(beam, loads, 'left');
    expectClose(left.force, (6000 * (2700 - 400) + 3000 * (2700 - 1350)) / 2700);
    expect(left.shifts.map((shift) => Math.round(shift))).toEqual([-20, -50]);
    const right = worstReaction(beam, loads, 'right');
    expectClose(right.force, (6000 * 470 + 3000 * 1450) / 2700);
  });

  test('the sag of a point load: P·b·(L² − b²)^1.5 / (9·√3·L·EI) at the new place, P·L³/48EI in the middle', () => {
    const b = 1050;
    expectClose(
      worstSag(looseBeam(3000, 50), [point(1000, 4000)]).sag,
      (4000 * b * (3000 ** 2 - b ** 2) ** 1.5) / (9 * Math.sqrt(3) * 3000 * EI),
    );
    expectClose(worstSag(looseBeam(3000, 200), [point(1400, 4000)]).sag, (4000 * 3000 ** 3) / (48 * EI));
  });

  test('a unit load on two feet: the heavy one and the resultant as far from the middle', () => {
    // The rule for a moving train of loads: the resultant and the wheel are as far from mid-span on either side.
    const feet: BeamLoad = {
      lines: [],
      points: [
        { at: 0, force: 1000 },
        { at: 600, force: 2000 },
      ],
    };
    const { moment, at } = worstMoment(looseBeam(3000, 500), [loose(feet, 600, 1200)]);
    // The resultant is 200 left of the heavy foot: that one stands at 1600, the light one at 1000, R_left = 1600 N.
    expectClose(moment, 1600 * 1600 - 1000 * 600);
    expectClose(at, 1600);
  });

  test('a neighbour that is touched comes along: two touching even loads between the uprights', () => {
    // Nothing is free to move at all.
    const loads = [loose(even(1000, 3000), 1000, 0), loose(even(1000, 6000), 1000, 1000)];
    const { moment, shifts } = worstMoment(looseBeam(2000, 50), loads);
    // R_right = (3000·500 + 6000·1500)/2000 = 5250 N at 6 N/mm: zero shear 875 mm from the right end.
    expectClose(moment, 5250 ** 2 / 12);
    expect(shifts.map((shift) => Math.abs(shift))).toEqual([0, 0]);
  });
});

test('SciPy: three unit loads that touch in the worst arrangement', () => {
  // scipy 1.17.1, minimize(SLSQP) from 150 random starts over section and shifts, with the no-overlap constraints.
  const line = (from: number, to: number, wFrom: number, wTo: number) => ({ from, to, wFrom, wTo });
  const loads = [
    loose({ lines: [line(0, 800, 2, 6)], points: [] }, 800, 60),
    loose({ lines: [line(0, 100, 8, 8), line(360, 460, 8, 8), line(720, 820, 8, 8)], points: [] }, 820, 940),
    loose(
      {
        lines: [],
        points: [
          { at: 100, force: 1500 },
          { at: 700, force: 900 },
        ],
      },
      800,
      1800,
    ),
  ];
  const { moment, at, shifts, apart } = worstMoment(looseBeam(2700, 60), loads);
  expectClose(moment, 3025727.678707512, 1e-12);
  expectClose(at, 1315.86420633, 1e-6);
  [60, -20, -60].forEach((shift, i) => expectClose(shifts[i] ?? NaN, shift, 1e-6));
  expect(apart).toBe(true);
});

// ---------------------------------------------------------------- against a straightforward search

interface Stood {
  readonly at: number;
  readonly width: number;
  readonly feet: readonly (readonly [u: number, force: number])[];
}

/** Unit loads on feet, one behind the other with gaps of 0 to 160 mm. */
const row: fc.Arbitrary<readonly Stood[]> = fc
  .array(
    fc.record({
      gap: fc.constantFrom(0, 10, 40, 75, 100, 160),
      width: fc.integer({ min: 300, max: 900 }),
      feet: fc.array(fc.tuple(fc.integer({ min: 0, max: 100 }), fc.integer({ min: 0, max: 4000 })), { minLength: 1, maxLength: 12 }),
    }),
    { minLength: 1, maxLength: 3 },
  )
  .map((all) => {
    let edge = 0;
    return all.map(({ gap, width, feet }) => {
      const at = edge + gap;
      edge = at + width;
      return { at, width, feet: feet.map(([part, force]) => [(part * width) / 100, force] as const) };
    });
  });

const asLoose = (standing: readonly Stood[]): readonly LooseLoad[] =>
  standing.map(({ at, width, feet }) => loose({ lines: [], points: feet.map(([u, force]) => ({ at: u, force })) }, width, at));

/** The influence line's sum at every foot, where alone a moment of point loads can be greatest. */
function plainMoment(span: number, standing: readonly Stood[], shifts: readonly number[]): number {
  const all = standing.flatMap(({ at, feet }, i) => feet.map(([u, force]) => [at + u + (shifts[i] as number), force] as const));
  return Math.max(
    0,
    ...all.map(([x]) => all.reduce((sum, [a, force]) => sum + (force * Math.min(a * (span - x), x * (span - a))) / span, 0)),
  );
}

function stands(span: number, standing: readonly Stood[], shifts: readonly number[]): boolean {
  return standing.every(({ at, width }, i) => {
    const from = at + (shifts[i] as number);
    const next = standing[i + 1];
    const end = next === undefined ? span : next.at + (shifts[i + 1] as number);
    return from >= 0 && from + width <= end + 1e-9;
  });
}

/** Every arrangement on a grid, then finer and finer around the best. */
function bySearch(span: number, tolerance: number, standing: readonly Stood[], effect: (shifts: readonly number[]) => number): number {
  let best = { value: effect(standing.map(() => 0)), shifts: standing.map(() => 0) };
  let reach = tolerance;
  for (let pass = 0; pass < 12; pass++) {
    const around = best.shifts;
    const try1 = (shifts: readonly number[], i: number): void => {
      if (i === standing.length) {
        if (!stands(span, standing, shifts)) return;
        const value = effect(shifts);
        if (value > best.value) best = { value, shifts: [...shifts] };
        return;
      }
      for (let k = -5; k <= 5; k++) {
        const shift = (around[i] as number) + (reach * k) / 5;
        if (Math.abs(shift) <= tolerance + 1e-12) try1([...shifts, shift], i + 1);
      }
    };
    try1([], 0);
    reach /= 2.2;
  }
  return best.value;
}

test('no arrangement on a fine grid bends the beam more, and the best of them comes near', () => {
  fc.assert(
    fc.property(row, fc.constantFrom(20, 50, 120), (standing, tolerance) => {
      const span = 3200;
      const { moment, shifts } = worstMoment(looseBeam(span, tolerance), asLoose(standing));
      const found = bySearch(span, tolerance, standing, (shift) => plainMoment(span, standing, shift));
      expect(found).toBeLessThanOrEqual(moment * (1 + 1e-12) + 1e-6);
      // The search may stop beside the best; the arrangement given must stand and do what is said of it.
      expect(stands(span, standing, shifts)).toBe(true);
      expectClose(plainMoment(span, standing, shifts), moment, 1e-11, Math.max(moment, 1));
      expect(found).toBeGreaterThanOrEqual(moment * 0.999 - 1e-6);
    }),
    { numRuns: 60 },
  );
});

/** Sag at x under point loads, by the handbook's bending line of a pinned beam (AISC Manual Table 3-23, case 8). */
const plainSag = (span: number, standing: readonly Stood[], shifts: readonly number[], x: number): number =>
  standing.reduce(
    (sum, { at, feet }, i) =>
      feet.reduce((all, [u, force]) => {
        const a = at + u + (shifts[i] as number);
        const [far, d] = x <= a ? [span - a, x] : [a, span - x];
        return all + (force * far * d * (span ** 2 - far ** 2 - d ** 2)) / (6 * EI * span);
      }, sum),
    0,
  );

test('no arrangement and no section of a fine grid sags more', () => {
  fc.assert(
    fc.property(row, fc.constantFrom(20, 120), (standing, tolerance) => {
      const span = 3200;
      const { sag, at, shifts } = worstSag(looseBeam(span, tolerance), asLoose(standing));
      const sections = Array.from({ length: 41 }, (_, i) => span * (0.42 + (0.16 * i) / 40));
      const found = bySearch(span, tolerance, standing, (shift) => Math.max(...sections.map((x) => plainSag(span, standing, shift, x))));
      expect(found).toBeLessThanOrEqual(sag * (1 + 1e-12));
      expectClose(plainSag(span, standing, shifts, at), sag, 1e-11, Math.max(sag, 1e-6));
    }),
    { numRuns: 12 },
  );
});

test('held ends: no arrangement on a grid does more than the search comes to', () => {
  const beam = looseBeam(2700, 60, { kind: 'sprung', stiffness: 9e7 });
  const loads = [loose(even(800, 5000), 800, 60), loose(even(600, 7000), 600, 1000), loose(even(800, 3000), 800, 1800)];
  for (const held of [beam, looseBeam(2700, 60, FIXED)]) {
    const moment = worstMoment(held, loads);
    const sag = worstSag(held, loads);
    expect(moment.how).toBe('searched');
    let bends = 0;
    let sags = 0;
    for (let a = -60; a <= 60; a += 20)
      for (let b = -60; b <= 60; b += 5)
        for (let c = -60; c <= 60; c += 20) {
          const answer = solveBeam(held, arrangedLoad(loads, [a, b, c], 2700));
          bends = Math.max(bends, answer.sagging.moment);
          sags = Math.max(sags, answer.deflection.sag);
        }
    expect(bends).toBeLessThanOrEqual(moment.moment * (1 + 1e-12));
    expect(sags).toBeLessThanOrEqual(sag.sag * (1 + 1e-12));
    expectClose(moment.moment, bends, 2e-3);
    expectClose(sag.sag, sags, 2e-3);
  }
});

test('unit loads that overlap as stated, one behind the other: the bound between them is left out', () => {
  const beam = looseBeam(2000, 50);
  const loads = [loose(even(600, 3000), 600, 300), loose(even(600, 3000), 600, 500), point(1500, 2000)];
  const { moment, how, shifts } = worstMoment(beam, loads);
  expect(how).toBe('searched');
  let most = 0;
  for (let a = -50; a <= 50; a += 5)
    for (let b = -50; b <= 50; b += 5)
      for (let c = -50; c <= 50; c += 25) most = Math.max(most, solveBeam(beam, arrangedLoad(loads, [a, b, c], 2000)).sagging.moment);
  expect(most).toBeLessThanOrEqual(moment * (1 + 1e-12));
  expectClose(moment, most, 1e-3);
  expectClose(solveBeam(beam, arrangedLoad(loads, shifts, 2000)).sagging.moment, moment);
});

test('what cannot be is refused', () => {
  expect(() => worstMoment(looseBeam(2000, -1), [])).toThrow('placement tolerance must be 0 mm or more, got -1');
  expect(() => worstSag({ ...looseBeam(2000, 1), to: 2001 }, [])).toThrow('from 0 to 2000 mm');
  expect(() => worstMoment(looseBeam(2000, 1), [point(1, 1, NaN)])).toThrow('factor of a unit load');
  expect(worstMoment(looseBeam(2000, 50), [])).toMatchObject({ moment: 0, shifts: [] });
  expect(worstSag(looseBeam(2000, 50), [])).toMatchObject({ sag: 0, shifts: [] });
});
