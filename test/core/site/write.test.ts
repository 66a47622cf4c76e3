import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Site } from '../../../src-core/site/site';
import { writeSite } from '../../../src-core/site/write';
import { makeBay, makeLevel, makePlacement, makeRun, makeSite, makeUnitLoad } from '../../make';
import { arbitrarySite } from '../../make-random';

/** The same data with every object's keys in the opposite order. */
function turned<T>(value: T): T {
  if (Array.isArray(value)) return value.map(turned) as T;
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value)
      .toReversed()
      .map(([key, content]) => [key, turned<unknown>(content)]),
  ) as T;
}

test('equal sites give equal bytes, in whatever order their keys were put together', () => {
  fc.assert(
    fc.property(arbitrarySite(), (site) => {
      expect(writeSite(turned(site))).toBe(writeSite(site));
    }),
    { numRuns: 200 },
  );
});

test('keys stand in the order of the model, without spaces', () => {
  const site = turned(makeSite({ id: 's', name: 'A b' }));
  expect(writeSite(site)).toMatch(/^\{"id":"s","name":"A b","notes":"","units":"metric","rules":\{"set":"european",/);
  expect(Object.keys(JSON.parse(writeSite(site)) as Site)).toEqual(Object.keys(makeSite()));
});

const withPlacement = (atMm: number): Site => {
  const goods = makeUnitLoad({ id: 'g' });
  const level = makeLevel([], { id: 'l', placements: [makePlacement('g', atMm, { id: 'p', towardsFrontMm: -0 })] });
  return makeSite({ id: 's', unitLoads: [goods], runs: [makeRun([makeBay([level], { id: 'b' })], { id: 'r' })] });
};

test('minus zero is written as zero', () => {
  expect(writeSite(withPlacement(-0))).toContain('"atMm":0,"mirrored":false,"towardsFrontMm":0}');
});

test('every digit of a number survives', () => {
  for (const x of [0.1 + 0.2, 1 / 3, 5e-324, 99_999.999_999_999_99, 1e-7]) {
    const text = writeSite(withPlacement(x));
    expect(Number(/"atMm":([^,]+)/.exec(text)?.[1])).toBe(x);
  }
});

test.each([Number.NaN, Number.POSITIVE_INFINITY, 1e9])('%d is refused, because it could not be read back', (x) => {
  expect(() => writeSite(withPlacement(x))).toThrow(new RegExp(`cannot write ${x}`));
});

test('a key that the model does not have is refused, not dropped', () => {
  const site = { ...makeSite(), colour: 'blue' } as Site;
  expect(() => writeSite(site)).toThrow(RangeError);
});
