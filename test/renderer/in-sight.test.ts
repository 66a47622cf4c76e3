import { expect, test } from 'vitest';
import { between, edgesOf, InSight } from '../../src-renderer/drawing/in-sight.svelte';
import { buttonWidth } from '../../src-renderer/drawing/strip-scale';
import { inChunks } from '../../src-renderer/in-chunks';
import { bayOf } from './make-bay';

test('edges of things side by side: the left one of each, and the right one of the last', () => {
  expect(edgesOf([10, 20, 30])).toEqual([0, 10, 30, 60]);
  expect(edgesOf([])).toEqual([0]);
});

test('what lies between two places is what overlaps them, and what is always drawn comes in its order', () => {
  const edges = edgesOf(Array.from({ length: 1000 }, () => 10));
  expect(between(edges, 95, 121)).toEqual([9, 10, 11, 12]);
  // A thing that only touches the place with its edge is not in it.
  expect(between(edges, 100, 120)).toEqual([10, 11]);
  expect(between(edges, 100, 120, [3, 10, 999, -1, 1000])).toEqual([3, 10, 11, 999]);
  expect(between(edges, -50, 5)).toEqual([0]);
  expect(between(edges, 9990, 20_000)).toEqual([999]);
  expect(between(edges, 10_000, 20_000)).toEqual([]);
  expect(between(edgesOf([]), 0, 100, [0])).toEqual([]);
});

test('of a thousand bays a few windows’ worth are drawn, round the place that is in sight first', () => {
  const edges = edgesOf(Array.from({ length: 1000 }, () => 60));
  const first = new InSight().drawn(edges);
  expect(first[0]).toBe(0);
  expect(first.length).toBeLessThan(100);
  const far = new InSight(60 * 800).drawn(edges);
  expect(far.length).toBeLessThan(100);
  expect(far).toContain(780);
  expect(far).toContain(820);
  expect(far).not.toContain(0);
});

test('a bay’s button is as wide as its drawing or its name needs, and never narrower than a target', () => {
  const bay = bayOf();
  // 2 900 mm at 0.03 px a mm is 87 px, with 0.3 rem at each side.
  expect(buttonWidth(bay, 0.03, 16)).toBeCloseTo(87 + 9.6, 9);
  expect(buttonWidth(bay, 0.001, 16)).toBe(52);
  const long = { ...bay, name: 'Cold store, aisle 14, bay 120' };
  expect(buttonWidth(long, 0.001, 16)).toBeGreaterThan(buttonWidth({ ...bay, name: 'Bay 120' }, 0.001, 16));
  expect(buttonWidth(long, 0.001, 32)).toBeCloseTo(2 * buttonWidth(long, 0.001, 16), 9);
});

test('chunks hold every entry once, in order', () => {
  expect(inChunks([1, 2, 3, 4, 5], 2)).toEqual([[1, 2], [3, 4], [5]]);
  expect(inChunks([], 2)).toEqual([]);
});
