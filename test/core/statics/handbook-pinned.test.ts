/**
 * The simply supported beams of test/reference/handbook.md, each row coded here as it is printed.
 * Published homes as remembered: AISC Steel Construction Manual Table 3-23, Roark's Formulas for Stress
 * and Strain Table 8.1, fixed-end-moment tables (Hibbeler), slope-deflection with Monforton and Wu's fixity
 * factor (1963); each result verified with SymPy by exact integration of EI·δ'''' = w.
 */
import { describe, expect, test } from 'vitest';
import { equivalentLoads } from '../../../src-core/statics/equivalent';
import { expectClose } from '../../close';
import { at, check, EI, L, line, P, point, printed, simple, w } from './handbook';

const { sqrt } = Math;

describe('simply supported', () => {
  test('1: uniform load', () => {
    const answer = simple([line(0, L, w)]);
    check(answer, { R1: (w * L) / 2, R2: (w * L) / 2, M: (w * L ** 2) / 8, x: L / 2, d: (5 * w * L ** 4) / (384 * EI), xd: L / 2 });
    expectClose(at(answer, 0).rotation, (w * L ** 3) / (24 * EI), 1e-13);
  });

  test('2: load rising uniformly to one end', () => {
    const W = (w * L) / 2;
    const answer = simple([line(0, L, 0, w)]);
    check(answer, { R1: W / 3, R2: (2 * W) / 3, M: (2 * W * L) / (9 * sqrt(3)), x: L / sqrt(3), xd: L * sqrt(1 - sqrt(8 / 15)) });
    printed(answer.sagging.moment / (W * L), 0.12830005982, 12);
    printed((answer.deflection.sag * EI) / (W * L ** 3), 0.0130443684638, 13);
    printed(answer.deflection.at / L, 0.519329622359, 12);
  });

  test('3: load rising uniformly to the centre', () => {
    const W = (w * L) / 2;
    check(simple([line(0, L / 2, 0, w), line(L / 2, L, w, 0)]), {
      R1: W / 2,
      M: (W * L) / 6,
      x: L / 2,
      d: (W * L ** 3) / (60 * EI),
      xd: L / 2,
    });
  });

  test('4: valley, full at both ends and nothing at the centre', () => {
    const W = (w * L) / 2;
    // The shear has a double root at mid-span, so its place is known only to the root of the rounding.
    const answer = simple([line(0, L / 2, w, 0), line(L / 2, L, 0, w)]);
    check(answer, { R1: W / 2, M: (w * L ** 2) / 24, d: (3 * w * L ** 4) / (640 * EI), xd: L / 2 });
    expectClose(answer.sagging.from, L / 2, 1e-7);
  });

  test('5: uniform over an inner length', () => {
    const [a, b] = [410, 1130];
    const c = L - a - b;
    const R1 = (w * b * (2 * c + b)) / (2 * L);
    check(simple([line(a, a + b, w)]), { R1, R2: (w * b * (2 * a + b)) / (2 * L), M: R1 * (a + R1 / (2 * w)), x: a + R1 / w });
  });

  test('6: uniform from the left end over a', () => {
    const a = 870;
    const answer = simple([line(0, a, w)]);
    const R1 = (w * a * (2 * L - a)) / (2 * L);
    check(answer, { R1, M: R1 ** 2 / (2 * w), x: R1 / w });
    for (const x of [100, 500, 870])
      expectClose(
        at(answer, x).deflection,
        (w * x * (a ** 2 * (2 * L - a) ** 2 - 2 * a * x ** 2 * (2 * L - a) + L * x ** 3)) / (24 * EI * L),
        1e-13,
      );
    for (const x of [900, 1500, 2600])
      expectClose(at(answer, x).deflection, (w * a ** 2 * (L - x) * (4 * x * L - 2 * x ** 2 - a ** 2)) / (24 * EI * L), 1e-13);
  });

  test('7: two uniform loads at the ends', () => {
    const [a, c, w2] = [700, 900, 2.1];
    check(simple([line(0, a, w), line(L - c, L, w2)]), {
      R1: (w * a * (2 * L - a) + w2 * c ** 2) / (2 * L),
      R2: (w2 * c * (2 * L - c) + w * a ** 2) / (2 * L),
    });
  });

  test('8: uniform over the middle length', () => {
    const b = 1010;
    check(simple([line((L - b) / 2, (L + b) / 2, w)]), {
      M: (w * b * (2 * L - b)) / 8,
      x: L / 2,
      d: (w * b * (8 * L ** 3 - 4 * L * b ** 2 + b ** 3)) / (384 * EI),
      xd: L / 2,
    });
  });

  test('9: point load at the centre', () => {
    const answer = simple([], [point(L / 2)]);
    check(answer, { R1: P / 2, M: (P * L) / 4, x: L / 2, d: (P * L ** 3) / (48 * EI), xd: L / 2 });
    expectClose(at(answer, 0).rotation, (P * L ** 2) / (16 * EI), 1e-13);
  });

  test('10: point load at a > b', () => {
    const a = 1810;
    const b = L - a;
    const answer = simple([], [point(a)]);
    check(answer, {
      R1: (P * b) / L,
      M: (P * a * b) / L,
      x: a,
      d: (P * a * b * (a + 2 * b) * sqrt(3 * a * (a + 2 * b))) / (27 * EI * L),
      xd: sqrt((a * (a + 2 * b)) / 3),
    });
    expectClose(at(answer, a).deflection, (P * a ** 2 * b ** 2) / (3 * EI * L), 1e-13);
    expectClose(at(answer, 0).rotation, (P * a * b * (L + b)) / (6 * EI * L), 1e-13);
    expectClose(-at(answer, L).rotation, (P * a * b * (L + a)) / (6 * EI * L), 1e-13);
  });

  test('11: two equal point loads at a from each end', () => {
    const a = 640;
    const answer = simple([], [point(a), point(L - a)]);
    check(answer, { M: P * a, x: a, d: (P * a * (3 * L ** 2 - 4 * a ** 2)) / (24 * EI), xd: L / 2 });
    expect(answer.sagging.to).toBe(L - a);
  });

  test('12: two equal point loads, a from the left and b from the right', () => {
    for (const [a, b] of [
      [900, 500],
      [500, 900],
    ] as const) {
      const R1 = (P * (L - a + b)) / L;
      const R2 = (P * (L - b + a)) / L;
      check(simple([], [point(a), point(L - b)]), { R1, R2, M: a > b ? R1 * a : R2 * b, x: a > b ? a : L - b });
    }
  });

  test('13: two unequal point loads', () => {
    const [a, b] = [800, 1000];
    for (const [P1, P2] of [
      [3000, 2000],
      [1000, 4000],
    ] as const) {
      const R1 = (P1 * (L - a) + P2 * b) / L;
      const R2 = (P1 * a + P2 * (L - b)) / L;
      check(simple([], [point(a, P1), point(L - b, P2)]), { R1, R2, M: R1 < P1 ? R1 * a : R2 * b, x: R1 < P1 ? a : L - b });
    }
    const level = simple([], [point(800, 3000), point(L - 1200, 2000)]);
    expect(level.sagging).toMatchObject({ from: 800, to: L - 1200 });
  });

  test('14: trapezoid', () => {
    const [w1, w2] = [1.7, 5.3];
    const answer = simple([line(0, L, w1, w2)]);
    check(answer, { R1: (L * (2 * w1 + w2)) / 6, R2: (L * (w1 + 2 * w2)) / 6 });
    expectClose(at(answer, L / 2).deflection, (5 * (w1 + w2) * L ** 4) / (768 * EI), 1e-13);
  });

  test('15: symmetric trapezoid', () => {
    const a = 550;
    check(simple([line(0, a, 0, w), line(a, L - a, w), line(L - a, L, w, 0)]), {
      R1: (w * (L - a)) / 2,
      M: (w * (3 * L ** 2 - 4 * a ** 2)) / 24,
      x: L / 2,
      d: (w * (5 * L ** 2 - 4 * a ** 2) ** 2) / (1920 * EI),
      xd: L / 2,
    });
  });

  test('16: triangle with its peak at a ≤ b', () => {
    const a = 990;
    const b = L - a;
    const answer = simple([line(0, a, 0, w), line(a, L, w, 0)]);
    const fromRight = sqrt((b * (L + a)) / 3);
    check(answer, { R1: (w * (L + b)) / 6, R2: (w * (L + a)) / 6, M: ((w * (L + a)) / 9) * fromRight, x: L - fromRight });
    expectClose(answer.centroid, (L + a) / 3, 1e-14);
  });
});

test('30: a cantilever, as the half of a symmetric beam: held at mid-span, with the reaction at its tip', () => {
  const a = L / 2;
  // Moment at the root R·a less wa²/2 or wa²/6; sag at mid-span R·a³/3EI less wa⁴/8EI or wa⁴/30EI.
  const uniform = simple([line(0, L, w)]);
  expectClose(uniform.sagging.moment, w * a * a - (w * a ** 2) / 2, 1e-13);
  expectClose(uniform.deflection.sag, (w * a * a ** 3) / (3 * EI) - (w * a ** 4) / (8 * EI), 1e-13);
  const triangle = simple([line(0, a, 0, w), line(a, L, w, 0)]);
  expectClose(triangle.sagging.moment, ((w * a) / 2) * a - (w * a ** 2) / 6, 1e-13);
  expectClose(triangle.deflection.sag, (((w * a) / 2) * a ** 3) / (3 * EI) - (w * a ** 4) / (30 * EI), 1e-13);
});

test('equivalent uniform loads: for a central P they are 2P, P and 8P/5; for a triangle 1.0264…W, 4W/3 and 1.0018…W', () => {
  const central = equivalentLoads(simple([], [point(L / 2)]), EI);
  expectClose(central.bending, 2 * P, 1e-13);
  expectClose(central.endShear, P, 1e-13);
  expectClose(central.deflection, (8 * P) / 5, 1e-13);
  expectClose(central.total, P, 1e-15);
  const W = (w * L) / 2;
  const triangle = equivalentLoads(simple([line(0, L, 0, w)]), EI);
  printed(triangle.bending / W, 1.02640047856, 11);
  expectClose(triangle.endShear, (4 * W) / 3, 1e-13);
  printed(triangle.deflection / W, 1.00180749802, 11);
});
