/** Everything that stands on a run's beams, and the rack itself, comes down through its legs: no more and no less. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { auditRun, auditSite } from '../../../src-core/audit/audit';
import type { Bay, Deck, Level, Run, Site, UnitLoad } from '../../../src-core/site/site';
import { STANDARD_GRAVITY } from '../../../src-core/units/quantity';
import { makeBay, makeBeamType, makeFrameType, makeLevel, makePallet, makePlacement, makeRun, makeSite, makeUnitLoad } from '../../make';
import { completeSite, TODAY } from './complete-site';

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true, noDefaultInfinity: true });
/** Nothing, or a gram and more: below the smallest normal number no sum is accurate. */
const kg = (max: number) => fc.oneof({ weight: 1, arbitrary: fc.constant(0) }, { weight: 9, arbitrary: between(0.001, max) });

const pallet = (massKg: number) => makePallet({ id: 'pallet', massKg });

const unitLoad = (id: string): fc.Arbitrary<UnitLoad> =>
  fc
    .record({
      widthMm: between(200, 1200),
      goodsKg: kg(3000),
      palletId: fc.constantFrom('pallet', null),
      across: fc.oneof(
        fc.constant({ kind: 'even' as const }),
        fc.record({ kind: fc.constant('sloped' as const), rearOverFront: between(0, 5) }),
        fc.record({ kind: fc.constant('centre' as const), towardsFrontMm: between(-200, 200) }),
      ),
      shape: fc.constantFrom('even', 'sloped', 'feet', 'bearers', 'profile'),
      part: between(0.05, 0.95),
    })
    .map(({ shape, part, widthMm, ...rest }) =>
      makeUnitLoad({
        id,
        widthMm,
        ...rest,
        bearing:
          shape === 'sloped'
            ? { kind: 'sloped', slope: { by: 'ratio', rightOverLeft: 1 / part } }
            : shape === 'feet'
              ? {
                  kind: 'feet',
                  feet: [
                    { xMm: 0, share: part },
                    { xMm: widthMm * part, share: 1 - part },
                  ],
                }
              : shape === 'bearers'
                ? {
                    kind: 'bearers',
                    bearers: [
                      { centreMm: 50, widthMm: 100, share: null },
                      { centreMm: widthMm - 50, widthMm: 100, share: null },
                    ],
                  }
                : shape === 'profile'
                  ? {
                      kind: 'profile',
                      points: [
                        { xMm: 0, heightMm: 100 },
                        { xMm: widthMm * part, heightMm: 900 },
                        { xMm: widthMm, heightMm: 0 },
                      ],
                      densityKgPerM3: null,
                    }
                  : { kind: 'even' },
      }),
    );

const deck: fc.Arbitrary<Deck> = fc.oneof(
  fc.constant<Deck>({ kind: 'none' }),
  kg(60).map((massKg): Deck => ({ kind: 'support-bars', massKg })),
  kg(120).map((massKg): Deck => ({
    kind: 'mesh',
    count: 3,
    panelKg: null,
    massKg,
    source: { kind: 'maker', detail: '', person: '', date: '' },
  })),
);

const LOADS = ['g0', 'g1', 'g2', 'g3'];

const level = (index: number, clearEntry: number, step: number, unitLoads: readonly UnitLoad[]): fc.Arbitrary<Level> =>
  fc
    .record({
      deck,
      goods: fc.array(fc.record({ which: fc.nat(3), at: between(0, 1), mirrored: fc.boolean(), towardsFrontMm: between(-150, 150) }), {
        maxLength: 4,
      }),
    })
    .map(({ goods, ...rest }) =>
      makeLevel([], {
        heightMm: step * (index + 1),
        beamTypeId: index % 2 === 0 ? 'beam-a' : 'beam-b',
        ...rest,
        placements: goods.map(({ which, at, mirrored, towardsFrontMm }) => {
          const one = unitLoads[which] as UnitLoad;
          return makePlacement(one.id, at * Math.max(0, clearEntry - one.widthMm), { mirrored, towardsFrontMm });
        }),
      }),
    );

/** Bays of unlike widths, levels and loads either side of each frame, some with goods on the floor. */
const bay = (unitLoads: readonly UnitLoad[]): fc.Arbitrary<Bay> =>
  fc
    .record({ clearEntryMm: between(1300, 3900), count: fc.integer({ min: 0, max: 5 }), step: between(700, 2400), onFloor: fc.boolean() })
    .chain(({ clearEntryMm, count, step, onFloor }) =>
      fc
        .tuple(...Array.from({ length: count }, (_, i) => level(i, clearEntryMm, step, unitLoads)))
        .map((levels) => makeBay(levels, { clearEntryMm, onFloor: onFloor ? [makePlacement('g0', 0)] : [] })),
    );

const site: fc.Arbitrary<Site> = fc
  .record({
    unitLoads: fc.tuple(...LOADS.map(unitLoad)),
    palletKg: kg(60),
    massKgPerM: kg(12),
    connectorsKg: kg(6),
    frameKg: kg(200),
    span: fc.constantFrom('clear-entry' as const, 'centre-to-centre' as const),
    connector: fc.option(between(0, 5e8)),
  })
  .chain(({ unitLoads, palletKg, massKgPerM, connectorsKg, frameKg, span, connector }) =>
    fc.array(fc.array(bay(unitLoads), { minLength: 1, maxLength: 5 }), { minLength: 1, maxLength: 2 }).map((runs): Site => {
      const section = { secondMomentMm4: 927_016, elasticModulusNPerMm2: 210_000, connectorNmmPerRad: connector };
      const base = makeSite();
      return {
        ...base,
        rules: { ...base.rules, span },
        pallets: [pallet(palletKg)],
        unitLoads,
        beamTypes: [
          makeBeamType({ id: 'beam-a', massKgPerM, connectorsKg, ...section }),
          makeBeamType({ id: 'beam-b', massKgPerM: massKgPerM / 2, connectorsKg: 0 }),
        ],
        frameTypes: [makeFrameType({ id: 'frame-type', massKg: frameKg })],
        runs: runs.map((bays) => makeRun(bays, {}, { typeId: 'frame-type', heightMm: 15_000 })),
      };
    }),
  );

/** What stands on the legs of a run, kg, added up from the site alone. */
function massOf(on: Site, run: Run): number {
  const grossOf = (id: string) => {
    const load = on.unitLoads.find((one) => one.id === id);
    return (load?.goodsKg ?? NaN) + (load?.palletId === null ? 0 : (on.pallets[0]?.massKg ?? NaN));
  };
  let total = 0;
  for (const { clearEntryMm, levels } of run.bays)
    for (const one of levels) {
      const type = on.beamTypes.find(({ id }) => id === one.beamTypeId);
      total += 2 * (((type?.massKgPerM ?? NaN) * clearEntryMm) / 1000 + (type?.connectorsKg ?? NaN));
      if (one.deck.kind !== 'none') total += one.deck.massKg ?? NaN;
      for (const { unitLoadId } of one.placements) total += grossOf(unitLoadId);
    }
  for (const { typeId } of run.frames) total += on.frameTypes.find(({ id }) => id === typeId)?.massKg ?? NaN;
  return total;
}

const legsOf = (on: Site, run: Run): readonly number[] =>
  auditRun(on, run.id, TODAY).frames.flatMap(({ legFrontN, legRearN }) => [legFrontN ?? NaN, legRearN ?? NaN]);

test('the sum of all base reactions equals the sum of all masses times g, to 1e-12', () => {
  let worst = 0;
  fc.assert(
    fc.property(site, (any) => {
      for (const run of any.runs) {
        const weight = massOf(any, run) * STANDARD_GRAVITY;
        const legs = legsOf(any, run);
        for (const force of legs) expect(force).toBeGreaterThanOrEqual(0);
        const sum = legs.reduce((total, force) => total + force, 0);
        const error = weight === 0 ? Math.abs(sum) : Math.abs(sum - weight) / weight;
        worst = Math.max(worst, error);
        expect(error).toBeLessThanOrEqual(1e-12);
      }
    }),
    { numRuns: 300 },
  );
  expect(worst).toBeLessThanOrEqual(1e-12);
});

test('goods on the floor load no leg', () => {
  const base = completeSite();
  const [first] = base.runs;
  if (first === undefined) throw new Error('no run');
  const bare: Site = { ...base, runs: base.runs.map((run) => ({ ...run, bays: run.bays.map((one) => ({ ...one, onFloor: [] })) })) };
  expect(legsOf(bare, first)).toEqual(legsOf(base, first));
});

test('storeys carry more the lower they are, and the lowest carries what the legs do', () => {
  fc.assert(
    fc.property(site, (any) => {
      for (const { frames } of auditSite(any, TODAY).runs)
        for (const { storeys, legFrontN, legRearN } of frames) {
          storeys.forEach((storey, i) => {
            const below = storeys[i - 1];
            if (below !== undefined) expect(below.totalKg ?? NaN).toBeGreaterThanOrEqual((storey.totalKg ?? NaN) * (1 - 1e-12));
          });
          const [foot] = storeys;
          if (foot !== undefined) expect((foot.totalKg ?? NaN) * STANDARD_GRAVITY).toBeCloseTo((legFrontN ?? NaN) + (legRearN ?? NaN), 6);
        }
    }),
    { numRuns: 60 },
  );
});
