import { expect, test } from 'vitest';
import { findLevel } from '../../../src-core/site/lookup';
import { captureLevel, mostOnLevel } from '../../../src-core/visit/capture';
import { siteOf } from './make-run';

let count = 0;
const newId = () => `new-${(count += 1)}`;
const on = (site: ReturnType<typeof siteOf>) => findLevel(site, 'A1-level-1').level.placements.map(({ atMm }) => atMm);

// 2 700 mm clear, unit loads of 800 mm: 3 · 800 + 4 · 75 = 2 700.
test('three of 800 mm stand 75 mm apart in 2 700 mm, in place of what stood there', () => {
  expect(on(captureLevel(siteOf(), 'A1-level-1', 'g', 3, newId))).toEqual([75, 950, 1825]);
  // (2 700 − 1 600) / 3 = 366.7
  expect(on(captureLevel(siteOf(), 'A1-level-1', 'g', 2, newId))).toEqual([367, 1533]);
  expect(on(captureLevel(siteOf(), 'A1-level-1', 'g', 0, newId))).toEqual([]);
});

test('no more than have room', () => {
  expect(mostOnLevel(siteOf(), 'A1-level-1', 'g')).toBe(3);
  expect(() => captureLevel(siteOf(), 'A1-level-1', 'g', 4, newId)).toThrow('4 unit loads of 800 mm');
});
