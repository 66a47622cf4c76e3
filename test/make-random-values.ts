/** Random values and shapes of goods as a site may hold them, for whole random sites. */
import * as fc from 'fast-check';
import type { Answer, BearingShape, DepthShape, Slope, Source, SteppedColumn } from '../src-core/site/site';

const half = (least: number, most: number): fc.Arbitrary<number> =>
  fc.integer({ min: Math.ceil(least * 2), max: Math.floor(most * 2) }).map((n) => n / 2);
/** Mostly round numbers as people write them, some with every digit. */
export const numberIn = (least: number, most: number): fc.Arbitrary<number> =>
  fc.oneof(
    { weight: 3, arbitrary: half(least, most) },
    { weight: 1, arbitrary: fc.double({ min: least, max: most, noNaN: true }).map((x) => x || 0) },
  );
export const length = numberIn(1, 4000);
export const mass = numberIn(0, 3000);
export const rating = numberIn(1, 9000);
export const orNull = <T>(value: fc.Arbitrary<T>): fc.Arbitrary<T | null> => fc.option(value, { nil: null });
export const answer = fc.constantFrom<Answer>('yes', 'no', 'unknown');
export const name = fc
  .oneof(
    fc.string({ maxLength: 20, unit: 'binary' }),
    fc.constantFrom('Ä 1', '鋼材', '“quoted”', '\\ back \u2028 line', '<b>&amp;', 'constructor'),
  )
  .map((text) => (text.trim() === '' ? 'Name' : text));
export const date = fc.constantFrom('', '2024-02-29', '2026-12-01', '1999-01-31');
export const source: fc.Arbitrary<Source> = fc.record({
  kind: fc.constantFrom('notice', 'maker', 'drawing', 'engineer', 'weighed', 'measured', 'declared', 'wms', 'estimated', 'unknown'),
  detail: fc.string({ maxLength: 12 }),
  person: fc.string({ maxLength: 12 }),
  date,
});

const share = orNull(numberIn(0, 5));
const column: fc.Arbitrary<SteppedColumn> = fc.oneof(
  fc.record({ widthMm: length, massKg: mass }),
  fc.record({ widthMm: length, heightMm: length, densityKgPerM3: numberIn(1, 8000) }),
);
const slope: fc.Arbitrary<Slope> = fc.oneof(
  fc.record({ by: fc.constant('intensities' as const), leftKgPerM: mass, rightKgPerM: mass }),
  fc.record({ by: fc.constant('heights' as const), leftMm: numberIn(0, 3000), rightMm: numberIn(0, 3000) }),
  fc.record({ by: fc.constant('ratio' as const), rightOverLeft: numberIn(0, 20) }),
  fc.record({
    by: fc.constant('end-and-slope' as const),
    end: fc.constantFrom('left' as const, 'right' as const),
    endKgPerM: mass,
    changeKgPerM2: numberIn(-500, 500),
  }),
);
export const several = <T>(item: fc.Arbitrary<T>, minLength = 1): fc.Arbitrary<T[]> => fc.array(item, { minLength, maxLength: 4 });

/** Any bearing shape that the reader takes; whether it fits a width is another matter. */
export const arbitraryBearing: fc.Arbitrary<BearingShape> = fc.oneof(
  fc.constant({ kind: 'even' as const }),
  fc.record({ kind: fc.constant('stepped' as const), columns: several(column) }),
  fc.record({ kind: fc.constant('sloped' as const), slope }),
  fc.record({
    kind: fc.constant('profile' as const),
    points: several(fc.record({ xMm: numberIn(0, 3000), heightMm: numberIn(0, 3000) }), 2).map((points) =>
      points.toSorted((a, b) => a.xMm - b.xMm),
    ),
    densityKgPerM3: orNull(numberIn(1, 8000)),
  }),
  fc.record({
    kind: fc.constant('bearers' as const),
    bearers: several(fc.record({ centreMm: numberIn(0, 3000), widthMm: length, share })),
  }),
  fc.record({ kind: fc.constant('feet' as const), feet: several(fc.record({ xMm: numberIn(0, 3000), share })) }),
);
export const across: fc.Arbitrary<DepthShape> = fc.oneof(
  fc.constant({ kind: 'even' as const }),
  fc.record({ kind: fc.constant('stepped' as const), columns: several(fc.record({ depthMm: length, massKg: mass })) }),
  fc.record({ kind: fc.constant('sloped' as const), rearOverFront: numberIn(0, 20) }),
  fc.record({ kind: fc.constant('centre' as const), towardsFrontMm: numberIn(-600, 600) }),
);
