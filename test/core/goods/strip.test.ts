import fc from 'fast-check';
import { expect, test } from 'vitest';
import { centreTowardsFront } from '../../../src-core/goods/across';
import type { DepthShape } from '../../../src-core/goods/shapes';
import { acrossStrip } from '../../../src-core/goods/strip';
import { reduce } from '../../../src-core/statics/reduction';

const shape = (depth: number): fc.Arbitrary<DepthShape> =>
  fc.oneof(
    fc.constant<DepthShape>({ kind: 'even' }),
    fc.record({ kind: fc.constant('sloped' as const), rearOverFront: fc.double({ min: 0, max: 20, noNaN: true }) }),
    fc.record({
      kind: fc.constant('centre' as const),
      towardsFrontMm: fc.double({ min: -depth / 2, max: depth / 2, noNaN: true }),
    }),
    fc
      .array(fc.record({ part: fc.integer({ min: 1, max: 9 }), massKg: fc.integer({ min: 1, max: 500 }) }), { minLength: 1, maxLength: 5 })
      .map((parts): DepthShape => {
        const whole = parts.reduce((sum, { part }) => sum + part, 0);
        return { kind: 'stepped', columns: parts.map(({ part, massKg }) => ({ depthMm: (part / whole) * depth, massKg })) };
      }),
  );

test('a strip carries 1 N, inside the goods, with its centre where the shape has it', () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 200, max: 2000 }).chain((depth) => fc.tuple(fc.constant(depth), shape(depth))),
      ([depth, across]) => {
        const strip = acrossStrip(depth, across);
        const { resultant, centroid } = reduce(strip);
        expect(resultant).toBeCloseTo(1, 9);
        // x runs from the rear edge to the front one
        expect((centroid ?? NaN) - depth / 2).toBeCloseTo(centreTowardsFront(depth, across), 6);
        for (const { from, to, wFrom, wTo } of strip.lines) {
          expect(from).toBeGreaterThanOrEqual(0);
          expect(to).toBeLessThanOrEqual(depth);
          expect(Math.min(wFrom, wTo)).toBeGreaterThanOrEqual(0);
        }
      },
    ),
    { numRuns: 500 },
  );
});

test('a centre at a sixth of the depth leaves nothing at the far edge', () => {
  // middle third of an eccentrically loaded base: any text on foundations
  expect(acrossStrip(1200, { kind: 'centre', towardsFrontMm: 200 }).lines).toEqual([{ from: 0, to: 1200, wFrom: 0, wTo: 2 / 1200 }]);
});

test('a centre at the very edge is a point there, and one beyond it is refused', () => {
  expect(acrossStrip(1000, { kind: 'centre', towardsFrontMm: -500 }).points).toEqual([{ at: 0, force: 1 }]);
  expect(() => acrossStrip(1000, { kind: 'centre', towardsFrontMm: 501 })).toThrow('501');
  expect(() => acrossStrip(0, { kind: 'even' })).toThrow('0');
});
