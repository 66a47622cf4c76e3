import fc from 'fast-check';
import { expect, test } from 'vitest';
import { goodsIntensity, type GoodsOnBeam } from '../../../src-core/goods/bearing-shape';
import { pairLoads } from '../../../src-core/goods/pair';
import { reduce } from '../../../src-core/statics/reduction';
import { expectClose } from '../../close';

const G = 9.80665;
const width = fc.double({ min: 100, max: 2600, noNaN: true });
const positive = fc.double({ min: 0.01, max: 2000, noNaN: true });
const cuts = fc.array(fc.integer({ min: 1, max: 99 }), { minLength: 1, maxLength: 6 });

/** Places that split 0…1, from parts of any size. */
const places = (parts: readonly number[]): number[] => {
  const whole = parts.reduce((sum, part) => sum + part, 0);
  let edge = 0;
  return parts.map((part) => (edge += part) / whole);
};

const bearing = (w: number): fc.Arbitrary<GoodsOnBeam['bearing']> =>
  fc.oneof(
    fc.constant({ kind: 'even' } as const),
    fc.tuple(cuts, fc.array(positive, { minLength: 6, maxLength: 6 })).map(([parts, masses]) => {
      const ends = places(parts);
      const columns = ends.map((end, i) => ({ widthMm: (end - (ends[i - 1] ?? 0)) * w, massKg: masses[i] as number }));
      return { kind: 'stepped', columns } as const;
    }),
    positive.map((rightOverLeft) => ({ kind: 'sloped', slope: { by: 'ratio', rightOverLeft } }) as const),
    fc.tuple(cuts, fc.array(positive, { minLength: 7, maxLength: 7 })).map(([parts, heights]) => {
      const points = [0, ...places(parts)].map((x, i) => ({ xMm: x * w, heightMm: heights[i] as number }));
      return { kind: 'profile', points, densityKgPerM3: null } as const;
    }),
    cuts.map((parts) => {
      const feet = [0, ...places(parts)].map((x) => ({ xMm: x * w, share: null }));
      return { kind: 'feet', feet } as const;
    }),
  );

const goods = width.chain((widthMm) => fc.record({ widthMm: fc.constant(widthMm), goodsKg: positive, bearing: bearing(widthMm) }));

test('whatever the shape, the pieces integrate to the mass, lie on the goods and press down', () => {
  fc.assert(
    fc.property(goods, (one) => {
      const laid = goodsIntensity(one);
      if (!laid.ok) throw new Error(laid.message);
      expectClose(reduce(laid.pieces).resultant, one.goodsKg * G, 1e-12);
      for (const { from, to, wFrom, wTo } of laid.pieces.lines) {
        expect(from).toBeGreaterThanOrEqual(0);
        expect(to).toBeLessThanOrEqual(one.widthMm);
        expect(Math.min(wFrom, wTo)).toBeGreaterThanOrEqual(0);
      }
      for (const { at, force } of laid.pieces.points) {
        expect(at >= 0 && at <= one.widthMm).toBe(true);
        expect(force).toBeGreaterThanOrEqual(0);
      }
    }),
    { numRuns: 2000 },
  );
});

test('turned left for right, goods weigh the same and their centre is the mirror image', () => {
  fc.assert(
    fc.property(goods, fc.double({ min: 0, max: 3000, noNaN: true }), (one, at) => {
      const laid = goodsIntensity(one);
      if (!laid.ok) throw new Error(laid.message);
      const standing = { id: 'a', load: laid.pieces, widthMm: one.widthMm, at, frontShare: 0.5 };
      const straight = reduce(pairLoads([{ ...standing, mirrored: false }]).whole);
      const turned = reduce(pairLoads([{ ...standing, mirrored: true }]).whole);
      expectClose(turned.resultant, straight.resultant, 1e-11);
      expectClose((turned.centroid ?? NaN) - at, one.widthMm - ((straight.centroid ?? NaN) - at), 1e-11, one.widthMm + at);
    }),
    { numRuns: 1000 },
  );
});
