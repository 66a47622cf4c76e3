import { expect, test } from 'vitest';
import { pathOf, pathThrough } from '../../src-renderer/drawing/path';
import { axisMarks, roundStep, scaleOf } from '../../src-renderer/drawing/scale';

test('a scale meets both its ends and inverts', () => {
  const scale = scaleOf(0, 2700, 40, 580);
  expect([scale(0), scale(1350), scale(2700)]).toEqual([40, 310, 580]);
  expect(scale.invert(310)).toBe(1350);
});

test.each([
  [0.3, 0.5],
  [1, 1],
  [1.1, 2],
  [2.1, 2.5],
  [270, 500],
  [0.021, 0.025],
])('the round step at or above %d is %d', (least, step) => {
  expect(roundStep(least)).toBeCloseTo(step, 12);
});

test('marks run from 0 in round steps and end at the end', () => {
  expect(axisMarks(2700, 9)).toEqual([0, 500, 1000, 1500, 2000, 2700]);
  expect(axisMarks(2700, 6)).toEqual([0, 500, 1000, 1500, 2000, 2700]);
  expect(axisMarks(1000, 10)).toEqual([0, 100, 200, 300, 400, 500, 600, 700, 800, 900, 1000]);
  expect(axisMarks(0, 5)).toEqual([0]);
});

test('paths are plain moves and lines, closed on request', () => {
  const points = [
    { x: 0, y: 1 },
    { x: 2.345, y: 3 },
  ];
  expect(pathThrough(points)).toBe('M0 1L2.35 3');
  expect(pathOf([points, points])).toBe('M0 1L2.35 3ZM0 1L2.35 3Z');
  expect(pathThrough([])).toBe('');
});
