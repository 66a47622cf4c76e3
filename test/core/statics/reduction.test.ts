/** Centroids: tables of Beer & Johnston, Hibbeler and Meriam (as remembered), verified with SymPy by integration. */
import { describe, expect, test } from 'vitest';
import { partsOf, reduce } from '../../../src-core/statics/reduction';
import { expectClose } from '../../close';

const line = (from: number, to: number, wFrom: number, wTo: number) => ({ lines: [{ from, to, wFrom, wTo }], points: [] });
const b = 730;
const h = 4.7;

test('a right triangle, zero at its start: bh/2 at 2b/3', () => {
  const { resultant, centroid } = reduce(line(0, b, 0, h));
  expectClose(resultant, (b * h) / 2, 1e-15);
  expectClose(centroid, (2 * b) / 3, 1e-15);
});

test('a trapezoid from p to q: b(p + q)/2 at b(p + 2q)/(3(p + q))', () => {
  const [p, q] = [2.3, 5.9];
  const { resultant, centroid } = reduce(line(0, b, p, q));
  expectClose(resultant, (b * (p + q)) / 2, 1e-15);
  expectClose(centroid, (b * (p + 2 * q)) / (3 * (p + q)), 1e-15);
});

test('a triangle with its apex above a: bh/2 at (a + b)/3', () => {
  const a = 210;
  const load = { lines: [...line(0, a, 0, h).lines, ...line(a, b, h, 0).lines], points: [] };
  const { resultant, centroid } = reduce(load);
  expectClose(resultant, (b * h) / 2, 1e-15);
  expectClose(centroid, (a + b) / 3, 1e-15);
});

test('a line load from a to b, w to q: (b − a)(w + q)/2 at (w(2a + b) + q(a + 2b))/(3(w + q))', () => {
  const [from, to, w, q] = [180, 910, 1.3, 4.1];
  const { resultant, centroid } = reduce(line(from, to, w, q));
  expectClose(resultant, ((to - from) * (w + q)) / 2, 1e-15);
  expectClose(centroid, (w * (2 * from + to) + q * (from + 2 * to)) / (3 * (w + q)), 1e-15);
});

describe('curved shapes are approached by chords', () => {
  const chords = (shape: (u: number) => number, count = 2000) => ({
    lines: Array.from({ length: count }, (_, i) => ({
      from: (b * i) / count,
      to: (b * (i + 1)) / count,
      wFrom: h * shape(i / count),
      wTo: h * shape((i + 1) / count),
    })),
    points: [],
  });
  test.each([
    ['parabolic spandrel', (u: number) => u ** 2, (b * h) / 3, (3 * b) / 4],
    ['half parabola, vertex at 0', (u: number) => 1 - u ** 2, (2 * b * h) / 3, (3 * b) / 8],
    ['full parabola', (u: number) => 4 * u * (1 - u), (2 * b * h) / 3, b / 2],
    ['cubic spandrel', (u: number) => u ** 3, (b * h) / 4, (4 * b) / 5],
  ] as const)('%s', (_, shape, area, centre) => {
    const { resultant, centroid } = reduce(chords(shape));
    expectClose(resultant, area, 1e-6);
    expectClose(centroid, centre, 1e-6);
  });
});

test('points and lines add; no load has no place', () => {
  const { resultant, centroid } = reduce({ ...line(100, 300, 2, 2), points: [{ at: 800, force: 100 }] });
  expect(resultant).toBe(500);
  expect(centroid).toBe((400 * 200 + 100 * 800) / 500);
  expect(reduce({ lines: [], points: [] })).toEqual({ resultant: 0, centroid: null });
  expect(reduce(line(0, 5, 0, 0)).centroid).toBeNull();
});

test('a diagram that is symmetric has its resultant on the axis of symmetry', () => {
  const load = { lines: [...line(200, 500, 0, 3).lines, ...line(500, 700, 3, 3).lines, ...line(700, 1000, 3, 0).lines], points: [] };
  expect(reduce(load).centroid).toBe(600);
});

test('a trapezoid in its parts: rectangle and triangle, each with its own resultant, the same together', () => {
  const load = { ...line(100, 700, 2, 5), points: [{ at: 50, force: 30 }] };
  const parts = partsOf(load);
  expect(parts.map(({ shape, resultant, centroid }) => [shape, resultant, centroid])).toEqual([
    ['rectangle', 1200, 400],
    ['triangle', 900, 500],
    ['point', 30, 50],
  ]);
  const whole = reduce(load);
  expectClose(
    parts.reduce((sum, { resultant }) => sum + resultant, 0),
    whole.resultant,
    1e-15,
  );
  expect(partsOf(line(100, 700, 5, 2)).map(({ centroid }) => centroid)).toEqual([400, 300]);
  expect(partsOf(line(0, 9, 4, 4)).map(({ shape }) => shape)).toEqual(['rectangle']);
  expect(partsOf(line(0, 9, 0, 4)).map(({ shape }) => shape)).toEqual(['triangle']);
  expect(partsOf(line(0, 9, 0, 0))).toEqual([]);
});
