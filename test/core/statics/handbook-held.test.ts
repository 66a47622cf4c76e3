/**
 * The beams with held ends of test/reference/handbook.md, each row coded here as it is printed.
 * Published homes as remembered: AISC Steel Construction Manual Table 3-23, Roark's Formulas for Stress
 * and Strain Table 8.1, fixed-end-moment tables (Hibbeler), slope-deflection with Monforton and Wu's fixity
 * factor (1963); each result verified with SymPy by exact integration of EI·δ'''' = w.
 */
import { describe, expect, test } from 'vitest';
import type { LineLoad, PointLoad } from '../../../src-core/statics/load';
import { expectClose } from '../../close';
import { at, check, EI, FIXED, L, line, P, PINNED, point, printed, solve, sprung, w } from './handbook';

const { sqrt } = Math;

describe('propped: left pinned, right fixed', () => {
  const propped = (lines: LineLoad[], points: PointLoad[] = []) => solve(PINNED, FIXED, lines, points);

  test('17: uniform load', () => {
    const answer = propped([line(0, L, w)]);
    const xd = (L * (1 + sqrt(33))) / 16;
    check(answer, {
      R1: (3 * w * L) / 8,
      R2: (5 * w * L) / 8,
      M1: 0,
      M2: -(w * L ** 2) / 8,
      M: (9 * w * L ** 2) / 128,
      x: (3 * L) / 8,
      xd,
    });
    printed((w * L ** 4) / (EI * answer.deflection.sag), 184.633964, 6);
    printed(answer.deflection.at / L, 0.4215351654, 10);
    expect(answer.hogging.at).toBe(L);
  });

  test('18: point load at the centre', () => {
    check(propped([], [point(L / 2)]), {
      R1: (5 * P) / 16,
      M2: (-3 * P * L) / 16,
      M: (5 * P * L) / 32,
      x: L / 2,
      d: (P * L ** 3) / (48 * sqrt(5) * EI),
      xd: L / sqrt(5),
    });
  });

  test('19: point load at a, either side of (√2 − 1)L', () => {
    for (const a of [0.3 * L, 0.6 * L]) {
      const b = L - a;
      const near = a < (sqrt(2) - 1) * L;
      check(propped([], [point(a)]), {
        R1: (P * b ** 2 * (a + 2 * L)) / (2 * L ** 3),
        M2: (-P * a * b * (a + L)) / (2 * L ** 2),
        d: near
          ? (P * a * (L ** 2 - a ** 2) ** 3) / (3 * EI * (3 * L ** 2 - a ** 2) ** 2)
          : ((P * a * b ** 2) / (6 * EI)) * sqrt(a / (2 * L + a)),
        xd: near ? (L * (L ** 2 + a ** 2)) / (3 * L ** 2 - a ** 2) : L * sqrt(a / (2 * L + a)),
      });
    }
  });

  test('20: triangle, zero at the pinned end', () => {
    check(propped([line(0, L, 0, w)]), {
      R1: (w * L) / 10,
      M2: -(w * L ** 2) / 15,
      M: (w * L ** 2) / (15 * sqrt(5)),
      x: L / sqrt(5),
      d: (2 * w * L ** 4) / (375 * sqrt(5) * EI),
      xd: L / sqrt(5),
    });
  });

  test('21: triangle, zero at the fixed end', () => {
    const answer = propped([line(0, L, w, 0)]);
    check(answer, { R1: (11 * w * L) / 40, M2: (-7 * w * L ** 2) / 120, x: (1 - (3 * sqrt(5)) / 10) * L });
    printed(answer.sagging.moment / (w * L ** 2), 0.0422897256542, 13);
    printed((answer.deflection.sag * EI) / (w * L ** 4), 0.00304812306348, 14);
    printed(answer.deflection.at / L, 0.4024624078, 10);
  });
});

describe('fixed at both ends', () => {
  const fixed = (lines: LineLoad[], points: PointLoad[] = []) => solve(FIXED, FIXED, lines, points);

  test('22: uniform load', () => {
    const end = -(w * L ** 2) / 12;
    check(fixed([line(0, L, w)]), { M1: end, M2: end, M: (w * L ** 2) / 24, x: L / 2, d: (w * L ** 4) / (384 * EI), xd: L / 2 });
  });

  test('23: point load at the centre', () => {
    check(fixed([], [point(L / 2)]), {
      M1: (-P * L) / 8,
      M2: (-P * L) / 8,
      M: (P * L) / 8,
      x: L / 2,
      d: (P * L ** 3) / (192 * EI),
      xd: L / 2,
    });
  });

  test('24: point load at a > b', () => {
    const a = 1890;
    const b = L - a;
    const answer = fixed([], [point(a)]);
    check(answer, {
      M1: (-P * a * b ** 2) / L ** 2,
      M2: (-P * a ** 2 * b) / L ** 2,
      M: (2 * P * a ** 2 * b ** 2) / L ** 3,
      x: a,
      R1: (P * b ** 2 * (3 * a + b)) / L ** 3,
      d: (2 * P * a ** 3 * b ** 2) / (3 * EI * (3 * a + b) ** 2),
      xd: (2 * a * L) / (3 * a + b),
    });
    expectClose(at(answer, a).deflection, (P * a ** 3 * b ** 3) / (3 * EI * L ** 3), 1e-13);
  });

  test('25: triangle, zero at the left', () => {
    const answer = fixed([line(0, L, 0, w)]);
    check(answer, { M1: -(w * L ** 2) / 30, M2: -(w * L ** 2) / 20, R1: (3 * w * L) / 20, R2: (7 * w * L) / 20, x: sqrt(0.3) * L });
    printed(answer.sagging.moment / (w * L ** 2), 0.0214389224172, 13);
    printed((answer.deflection.sag * EI) / (w * L ** 4), 0.00130853785531, 14);
    printed(answer.deflection.at / L, 0.5246950766, 10);
  });

  test('26: triangle with its peak at the centre', () => {
    const end = (-5 * w * L ** 2) / 96;
    check(fixed([line(0, L / 2, 0, w), line(L / 2, L, w, 0)]), {
      M1: end,
      M2: end,
      M: (w * L ** 2) / 32,
      d: (7 * w * L ** 4) / (3840 * EI),
    });
  });

  test('27: uniform from the left end over a', () => {
    for (const a of [640, L / 2])
      check(fixed([line(0, a, w)]), {
        M1: (-w * a ** 2 * (6 * L ** 2 - 8 * a * L + 3 * a ** 2)) / (12 * L ** 2),
        M2: (-w * a ** 3 * (4 * L - 3 * a)) / (12 * L ** 2),
      });
    check(fixed([line(0, L / 2, w)]), { M1: (-11 * w * L ** 2) / 192, M2: (-5 * w * L ** 2) / 192 });
  });

  test('28: uniform over the middle length', () => {
    const b = 770;
    const end = (-w * b * (3 * L ** 2 - b ** 2)) / (24 * L);
    check(fixed([line((L - b) / 2, (L + b) / 2, w)]), { M1: end, M2: end });
  });

  test('29: trapezoid', () => {
    const [w1, w2] = [1.1, 6.7];
    check(fixed([line(0, L, w1, w2)]), { M1: (-(L ** 2) * (3 * w1 + 2 * w2)) / 60, M2: (-(L ** 2) * (2 * w1 + 3 * w2)) / 60 });
  });
});

describe('sprung ends', () => {
  test('31: equal springs, uniform load', () => {
    for (const k of [1e6, 5e7, 3e9]) {
      const end = -((w * L ** 2) / 12) / (1 + (2 * EI) / (k * L));
      check(solve(sprung(k), sprung(k), [line(0, L, w)]), {
        M1: end,
        M2: end,
        M: ((w * L ** 2) / 8) * (1 - (2 * k * L) / (6 * EI + 3 * k * L)),
        d: ((5 * w * L ** 4) / (384 * EI)) * (1 - (4 * k * L) / (5 * k * L + 10 * EI)),
      });
    }
  });

  test('32: equal springs, point load at the centre', () => {
    const k = 7e7;
    const end = -((P * L) / 8) / (1 + (2 * EI) / (k * L));
    check(solve(sprung(k), sprung(k), [], [point(L / 2)]), {
      M1: end,
      M2: end,
      M: (P * L) / 4 + end,
      d: (P * L ** 3) / (48 * EI) + (end * L ** 2) / (8 * EI),
    });
  });

  test('33: unequal springs, uniform load and any load by its fixed-end moments', () => {
    const [kA, kB] = [3e7, 4e8];
    const gA = 1 / (1 + (3 * EI) / (kA * L));
    const gB = 1 / (1 + (3 * EI) / (kB * L));
    const even = (w * L ** 2) / 12;
    check(solve(sprung(kA), sprung(kB), [line(0, L, w)]), {
      M1: (-even * 3 * gA * (2 - gB)) / (4 - gA * gB),
      M2: (-even * 3 * gB * (2 - gA)) / (4 - gA * gB),
    });
    for (const [w1, w2] of [
      [1.3, 4.9],
      [6.1, 0],
    ] as const) {
      const FA = (L ** 2 * (3 * w1 + 2 * w2)) / 60;
      const FB = (L ** 2 * (2 * w1 + 3 * w2)) / 60;
      const mA = (gA * (4 * FA + 2 * FB - gB * (FA + 2 * FB))) / (4 - gA * gB);
      const mB = (gB * (4 * FB + 2 * FA - gA * (FB + 2 * FA))) / (4 - gA * gB);
      check(solve(sprung(kA), sprung(kB), [line(0, L, w1, w2)]), { M1: -mA, M2: -mB, R1: (L * (2 * w1 + w2)) / 6 + (mA - mB) / L });
    }
  });
});
