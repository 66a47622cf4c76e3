/** Random beams and levels for property tests; sizes as they occur, and some far outside. */
import fc from 'fast-check';
import type { Beam, BeamEnd } from '../../src-core/statics/beam';
import type { BeamLoad, LineLoad, PointLoad } from '../../src-core/statics/load';

export interface Loaded {
  readonly beam: Beam;
  readonly load: BeamLoad;
}

/** Any double, but for those so near to a limit that they have lost their digits (5e-324) or differ from it by rounding. */
const double = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true }).map((x) => (x - min < 1e-9 * (max - min) ? min : max - x < 1e-9 * (max - min) ? max : x));

/** A share from 0 to 1, the ends and round decimals often among them. */
const share: fc.Arbitrary<number> = fc.oneof(
  { weight: 4, arbitrary: double(0, 1) },
  { weight: 4, arbitrary: fc.integer({ min: 0, max: 1000 }).map((part) => part / 1000) },
  { weight: 1, arbitrary: fc.constantFrom(0, 1, 0.5, 0.25, 1 / 3) },
);

const intensity: fc.Arbitrary<number> = fc.oneof(
  { weight: 4, arbitrary: double(0, 20) },
  { weight: 2, arbitrary: fc.integer({ min: 0, max: 20 }) },
  { weight: 1, arbitrary: fc.constantFrom(0, 1e-9, 300) },
);

const lineOn = (span: number): fc.Arbitrary<LineLoad> =>
  fc
    .record({ a: share, b: share, wFrom: intensity, wTo: fc.oneof(intensity, fc.constant(null)) })
    .filter(({ a, b }) => a * span !== b * span)
    .map(({ a, b, wFrom, wTo }) => ({ from: Math.min(a, b) * span, to: Math.max(a, b) * span, wFrom, wTo: wTo ?? wFrom }));

const pointOn = (span: number): fc.Arbitrary<PointLoad> =>
  fc.record({
    at: share.map((part) => part * span),
    force: fc.oneof(double(0, 20000), fc.integer({ min: 0, max: 20000 })),
  });

const loadOn = (span: number): fc.Arbitrary<BeamLoad> =>
  fc.record({ lines: fc.array(lineOn(span), { maxLength: 7 }), points: fc.array(pointOn(span), { maxLength: 5 }) });

const end: fc.Arbitrary<BeamEnd> = fc.oneof(
  { weight: 3, arbitrary: fc.constant<BeamEnd>({ kind: 'pinned' }) },
  { weight: 1, arbitrary: fc.constant<BeamEnd>({ kind: 'fixed' }) },
  // Stiffness of connectors, from next to nothing to next to fixed.
  {
    weight: 3,
    arbitrary: double(4, 13).map<BeamEnd>((power) => ({ kind: 'sprung', stiffness: 10 ** power })),
  },
  { weight: 1, arbitrary: fc.constantFrom<BeamEnd>({ kind: 'sprung', stiffness: 0 }, { kind: 'sprung', stiffness: Infinity }) },
);

const span: fc.Arbitrary<number> = fc.oneof(
  { weight: 5, arbitrary: fc.integer({ min: 600, max: 4200 }) },
  { weight: 2, arbitrary: double(600, 4200) },
  { weight: 1, arbitrary: double(0.01, 60000) },
);

const beamOf = (ends: fc.Arbitrary<BeamEnd>): fc.Arbitrary<Beam> =>
  fc.record({ span, rigidity: double(10, 12.5).map((power) => 10 ** power), left: ends, right: ends });

export const anyBeam: fc.Arbitrary<Beam> = beamOf(end);
export const pinnedBeam: fc.Arbitrary<Beam> = beamOf(fc.constant<BeamEnd>({ kind: 'pinned' }));

/** A beam with its load. */
export const loaded = (beams: fc.Arbitrary<Beam>): fc.Arbitrary<Loaded> =>
  beams.chain((beam) => loadOn(beam.span).map((load) => ({ beam, load })));

/** A beam with two loads. */
export const twiceLoaded = (beams: fc.Arbitrary<Beam>): fc.Arbitrary<{ beam: Beam; one: BeamLoad; other: BeamLoad }> =>
  beams.chain((beam) => fc.record({ beam: fc.constant(beam), one: loadOn(beam.span), other: loadOn(beam.span) }));
