import fc from 'fast-check';
import { expect, test } from 'vitest';
import { auditRun } from '../../../src-core/audit/audit';
import type { BearingShape, DepthShape } from '../../../src-core/goods/shapes';
import type { UnitLoad } from '../../../src-core/site/site';
import { expectWorked } from '../worked';
import { goods, level, pallet, rack, stand, type Rack } from './rack';

const WIDTH = 800;

const bearing: fc.Arbitrary<BearingShape> = fc.oneof(
  fc.constant<BearingShape>({ kind: 'even' }),
  fc
    .tuple(fc.integer({ min: 100, max: 700 }), fc.integer({ min: 0, max: 500 }), fc.integer({ min: 1, max: 500 }))
    .map(([width, a, b]): BearingShape => ({
      kind: 'stepped',
      columns: [
        { widthMm: width, massKg: a },
        { widthMm: WIDTH - width, massKg: b },
      ],
    })),
  fc
    .double({ min: 0, max: 5, noNaN: true })
    .map((rightOverLeft): BearingShape => ({ kind: 'sloped', slope: { by: 'ratio', rightOverLeft } })),
  fc
    .tuple(
      fc.integer({ min: 0, max: 900 }),
      fc.integer({ min: 1, max: 900 }),
      fc.integer({ min: 0, max: 900 }),
      fc.integer({ min: 1, max: 799 }),
    )
    .map(([a, b, c, x]): BearingShape => ({
      kind: 'profile',
      densityKgPerM3: null,
      points: [
        { xMm: 0, heightMm: a },
        { xMm: x, heightMm: b },
        { xMm: WIDTH, heightMm: c },
      ],
    })),
  fc.constantFrom(0.25, 1 / 3, 0.1).map((share): BearingShape => ({
    kind: 'bearers',
    bearers: [50, 400, 750].map((centreMm, i) => ({ centreMm, widthMm: 80, share: i === 1 ? 1 - 2 * share : share })),
  })),
  fc.integer({ min: 0, max: WIDTH }).map((xMm): BearingShape => ({ kind: 'feet', feet: [{ xMm, share: 1 }] })),
);

const across: fc.Arbitrary<DepthShape> = fc.oneof(
  fc.constant<DepthShape>({ kind: 'even' }),
  fc.double({ min: 0, max: 4, noNaN: true }).map((rearOverFront): DepthShape => ({ kind: 'sloped', rearOverFront })),
  fc.integer({ min: -300, max: 300 }).map((towardsFrontMm): DepthShape => ({ kind: 'centre', towardsFrontMm })),
);

const load = fc.record({
  goodsKg: fc.integer({ min: 0, max: 2000 }),
  bearing,
  across,
  palletId: fc.constantFrom('p', null),
  atMm: fc.integer({ min: 0, max: 1900 }),
  towardsFrontMm: fc.integer({ min: -200, max: 200 }),
  mirrored: fc.boolean(),
});

const anyRack = fc.record({
  loads: fc.array(load, { minLength: 1, maxLength: 4 }),
  stiffness: fc.constantFrom(null, 0, 20e6, 100e6, 5e9),
  endKg: fc.constantFrom(null, 700),
  span: fc.constantFrom('clear-entry', 'centre-to-centre'),
  set: fc.constantFrom('european', 'united-states', 'australian'),
  ratedKg: fc.integer({ min: 500, max: 5000 }),
});

const rackOf = ({ loads, stiffness, endKg, span, set, ratedKg }: typeof anyRack extends fc.Arbitrary<infer T> ? T : never): Rack => ({
  pallets: [pallet('p')],
  unitLoads: loads.map(({ goodsKg, bearing: shape, across: depth, palletId }, i): UnitLoad =>
    goods(`g${i}`, { widthMm: WIDTH, goodsKg, bearing: shape, across: depth, palletId }),
  ),
  levels: [level(loads.map(({ atMm, towardsFrontMm, mirrored }, i) => stand(`g${i}`, atMm, { towardsFrontMm, mirrored })))],
  notice: { levelKg: [ratedKg], unitLoadKg: 1000 },
  beam: {
    endKg,
    connectorNmmPerRad: stiffness,
    secondMomentMm4: 927_016,
    sectionModulusMm3: 15_450,
    elasticModulusNPerMm2: 210_000,
    designStressNPerMm2: 235,
  },
  rules: { span, set },
});

test('on any level every worked calculation can be followed and no figure is NaN', () => {
  fc.assert(
    fc.property(anyRack, (given) => {
      const found = auditRun(rack(rackOf(given)), 'run', '2026-06-01').bays[0]?.levels[0];
      for (const finding of found?.findings ?? []) {
        if (finding.worked.length > 0) expectWorked(finding);
        // A figure that is NaN, in a sentence, a value or a result, would be null in JSON.
        const figures = [...finding.says, ...finding.notes.flat(), finding.demand, finding.allowed].filter(
          (part) => typeof part === 'object',
        );
        for (const figure of figures) if (figure !== null) expect(Number.isNaN(figure.value)).toBe(false);
        expect(Number.isNaN(finding.utilisation ?? 0)).toBe(false);
      }
    }),
    { numRuns: 300 },
  );
});

test('front and rear beams carry the whole between them, whatever stands there', () => {
  fc.assert(
    fc.property(anyRack, (given) => {
      const effects = auditRun(rack(rackOf(given)), 'run', '2026-06-01').bays[0]?.levels[0]?.effects;
      if (!effects) return;
      const { front, rear, whole } = effects;
      for (const part of ['resultant', 'reactionLeft', 'reactionRight'] as const)
        expect(Math.abs(front[part] + rear[part] - whole[part])).toBeLessThanOrEqual(1e-9 * (whole.resultant + 1));
    }),
    { numRuns: 1000 },
  );
});

test('half-rating rule: one central unit load of at most half the rating is never over', () => {
  // Domain facts sheet 2.11, consequence 2: EUL ≤ 2P by moment and by shear, ≤ 1.6P by deflection
  fc.assert(
    fc.property(
      bearing,
      fc.integer({ min: 0, max: 1900 }),
      fc.integer({ min: 1, max: 1250 }),
      fc.boolean(),
      (shape, atMm, goodsKg, mirrored) => {
        const found = auditRun(
          rack({
            unitLoads: [goods('a', { goodsKg, bearing: shape })],
            levels: [level([stand('a', atMm, { mirrored })])],
            notice: { levelKg: [2500], unitLoadKg: 2000 },
          }),
          'run',
          '2026-06-01',
        ).bays[0]?.levels[0];
        for (const one of found?.findings ?? []) expect(one.verdict, one.check).not.toBe('over');
      },
    ),
    { numRuns: 2000 },
  );
});
