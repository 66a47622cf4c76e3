import { expect, test } from 'vitest';
import { bandOf, bayScale, levelAt } from '../../src-renderer/drawing/bay-scale';
import { runScale } from '../../src-renderer/drawing/run-scale';
import { stripScale } from '../../src-renderer/drawing/strip-scale';
import { bayOf } from './make-bay';

const sheet = { width: 390, tallest: 800, left: 50, right: 50, top: 10, bottom: 5 };

test('one scale holds both ways, and the bay fills the width or the height, whichever is less', () => {
  // 2 900 mm in 290 px
  const wide = bayScale(bayOf(), sheet);
  expect(wide.rate).toBeCloseTo(0.1, 12);
  expect(wide.x(1000) - wide.x(0)).toBeCloseTo(wide.y(0) - wide.y(1000), 9);
  expect(wide.width).toBeCloseTo(390, 9);
  expect(bayScale(bayOf(), { ...sheet, tallest: 200 }).rate).toBeCloseTo(0.05, 12);
});

test('a position in px leads back to its millimetre', () => {
  const scale = bayScale(bayOf(), sheet);
  expect(scale.mmAt(scale.x(1234))).toBeCloseTo(1234, 9);
  expect(scale.x(-100)).toBeCloseTo(50, 9);
});

test('a height belongs to the level whose band holds it, beyond the drawing to the nearest', () => {
  const bay = bayOf();
  const scale = bayScale(bay, sheet);
  expect(levelAt(bay, scale, scale.y(700))?.number).toBe(0);
  expect(levelAt(bay, scale, scale.y(1450))?.number).toBe(1);
  expect(levelAt(bay, scale, scale.y(2800))?.number).toBe(1);
  expect(levelAt(bay, scale, scale.y(9000))?.number).toBe(2);
  expect(levelAt(bay, scale, scale.y(-500))?.number).toBe(0);
});

test('bands of neighbouring levels meet and do not overlap', () => {
  const bay = bayOf();
  const scale = bayScale(bay, sheet);
  const bands = bay.levels.map((level) => bandOf(level, scale));
  expect(bands[1]?.bottom).toBeCloseTo(bands[0]?.top ?? NaN, 9);
  expect(bands[2]?.bottom).toBeCloseTo(bands[1]?.top ?? NaN, 9);
});

test('in the run neighbours share a frame and keep one scale', () => {
  const bays = [bayOf(), bayOf()];
  const frames = [0, 1, 2].map((i) => ({ frameId: `f${i}`, width: 100, height: 4000 }));
  const scale = runScale({ bays, frames }, { width: 2000, tallest: 400, leastPitch: 100, edge: 20, top: 0 });
  // 400 px for 4 000 mm: a bay of 2 700 mm is 270 px, a frame of 100 mm is 10 px.
  expect(scale.frames).toEqual([
    { left: 20, right: 30 },
    { left: 300, right: 310 },
    { left: 580, right: 590 },
  ]);
  expect(scale.width).toBe(610);
});

test('the strip shows every bay of a run at one scale, no higher than its limit', () => {
  const scale = stripScale([bayOf(), { ...bayOf(), height: 8000 }]);
  expect(8000 * scale.rate).toBeLessThanOrEqual(108 + 1e-9);
  expect(stripScale([]).skyline).toBe(0);
});

test('a run fits the width as long as its figures have room, else it is as wide as they need', () => {
  const bays = [bayOf(), bayOf()];
  const frames = [0, 1, 2].map((i) => ({ frameId: `f${i}`, width: 100, height: 4000 }));
  const sheet = { width: 320, tallest: 400, leastPitch: 100, edge: 20, top: 0 };
  expect(runScale({ bays, frames }, sheet).width).toBeCloseTo(320, 9);
  // 2 800 mm from frame to frame in 200 px
  expect(runScale({ bays, frames }, { ...sheet, leastPitch: 200 }).rate).toBeCloseTo(1 / 14, 12);
});
