/** Whole random sites that the strict reader takes, for property tests. */
import * as fc from 'fast-check';
import { LOADED_BY } from '../src-core/checks/clearance-rules';
import { CHECKS } from '../src-core/checks/finding';
import { RULE_KEYS } from '../src-core/checks/rule-sets';
import { RULES } from '../src-core/checks/rule-table';
import type {
  Bay,
  BayTemplate,
  BeamDamage,
  BeamSag,
  BeamType,
  Damage,
  Deck,
  Floor,
  Frame,
  FrameType,
  Id,
  Level,
  LoadNotice,
  Pallet,
  Placement,
  Run,
  Site,
  TemplateGoods,
  UnitLoad,
} from '../src-core/site/site';
import {
  across,
  answer,
  arbitraryBearing,
  date,
  length,
  mass,
  name,
  numberIn,
  orNull,
  rating,
  several,
  source,
} from './make-random-values';

const deck: fc.Arbitrary<Deck> = fc.oneof(
  fc.constant({ kind: 'none' as const }),
  fc.record({ kind: fc.constant('support-bars' as const), massKg: orNull(mass) }),
  fc.record({
    kind: fc.constantFrom('mesh' as const, 'panels' as const),
    count: fc.integer({ min: 1, max: 8 }),
    panelKg: orNull(rating),
    massKg: orNull(mass),
    source,
  }),
);
const beam = fc.constantFrom('front' as const, 'rear' as const);
const beamDamage: fc.Arbitrary<Omit<BeamDamage, 'id'>> = fc.record({
  beam,
  member: fc.constantFrom('beam' as const, 'connector' as const),
  torn: fc.boolean(),
  note: fc.string({ maxLength: 10 }),
  found: fc.constantFrom('', '2026-05-01'),
});
const sags: fc.Arbitrary<readonly BeamSag[]> = fc.uniqueArray(
  fc.record({
    beam,
    loadedMm: orNull(numberIn(0, 60)),
    unloadedMm: orNull(numberIn(0, 20)),
    sidewaysMm: orNull(numberIn(0, 20)),
    found: fc.constantFrom('', '2026-05-01'),
  }),
  { maxLength: 2, selector: ({ beam: which }) => which },
);

const damage: fc.Arbitrary<Omit<Damage, 'id'>> = fc.record({
  member: fc.constantFrom('upright-front', 'upright-rear', 'bracing', 'base-plate'),
  alongMm: orNull(numberIn(0, 30)),
  acrossMm: orNull(numberIn(0, 30)),
  gaugeMm: length,
  torn: fc.boolean(),
  note: fc.string({ maxLength: 10 }),
  found: date,
});

/** Rows in ascending order of `key`, no two alike. */
const ordered = <T, K extends keyof T>(rows: readonly T[], key: K): readonly T[] =>
  rows.toSorted((a, b) => Number(a[key]) - Number(b[key])).filter((row, i, all) => i === 0 || row[key] !== all[i - 1]?.[key]);

/**
 * Any site that the reader takes: shapes, sources, shared frames, runs back to back, goods off the
 * beam and over each other. Ids are numbered, so that they are unique.
 */
export function arbitrarySite(): fc.Arbitrary<Site> {
  return fc.gen().map((draw) => {
    let count = 0;
    const nextId = (prefix: string): Id => `${prefix}${++count}`;
    const any = <T>(value: fc.Arbitrary<T>): T => draw(() => value);
    const times = <T>(most: number, make: () => T, least = 0): T[] =>
      Array.from({ length: any(fc.integer({ min: least, max: most })) }, make);
    const oneOf = (entries: readonly { readonly id: Id }[]): Id | null => any(fc.constantFrom(null, ...entries.map(({ id }) => id)));

    const pallets = times(2, (): Pallet => ({
      id: nextId('p'),
      ...any(
        fc.record({
          name,
          lengthMm: length,
          widthMm: length,
          heightMm: length,
          massKg: orNull(mass),
          boards: fc.constantFrom('along-length', 'along-width', 'full', 'none'),
          runners: several(fc.record({ centreMm: numberIn(0, 1200), widthMm: length }), 0),
          ratedKg: orNull(rating),
          source,
        }),
      ),
    }));
    const unitLoads = times(
      4,
      (): UnitLoad => {
        const palletId = oneOf(pallets);
        return {
          id: nextId('u'),
          palletId,
          ...any(
            fc.record({
              name,
              widthMm: length,
              depthMm: length,
              heightMm: length,
              goodsKg: orNull(mass),
              massUncertaintyPercent: numberIn(0, 100),
              massSource: source,
              palletFace: fc.constantFrom('width' as const, 'length' as const),
              bearing: arbitraryBearing,
              across,
              contact: fc.constantFrom('flat' as const, 'rims' as const, 'wheels' as const, 'feet' as const, 'lying-round' as const),
              chocked: answer,
              leanMm: numberIn(-50, 50),
            }),
          ),
        };
      },
      1,
    );
    const beamTypes = times(2, (): BeamType => ({
      id: nextId('b'),
      ...any(
        fc.record({
          name,
          maker: name,
          heightMm: length,
          widthMm: length,
          massKgPerM: orNull(mass),
          connectorsKg: orNull(mass),
          ratings: several(fc.record({ spanMm: length, pairKg: rating }), 0).map((rows) => ordered(rows, 'spanMm')),
          endKg: orNull(rating),
          secondMomentMm4: orNull(numberIn(1, 1e7)),
          sectionModulusMm3: orNull(numberIn(1, 1e5)),
          elasticModulusNPerMm2: orNull(numberIn(1, 300_000)),
          designStressNPerMm2: orNull(numberIn(1, 500)),
          connectorNmmPerRad: orNull(numberIn(0, 1e8)),
          source,
        }),
      ),
    }));
    const notices = times(2, (): LoadNotice => ({
      id: nextId('n'),
      beamTypeId: oneOf(beamTypes),
      ...any(
        fc.record({
          name,
          maker: name,
          issued: fc.string({ maxLength: 10 }),
          levelKg: several(orNull(rating), 0),
          unitLoadsPerLevel: orNull(fc.integer({ min: 1, max: 5 })),
          unitLoadKg: orNull(rating),
          bayKg: orNull(rating),
          frameKg: orNull(rating),
          firstBeamMm: orNull(length),
          greatestGapMm: orNull(length),
          levels: orNull(fc.integer({ min: 1, max: 6 })),
          source,
        }),
      ),
    }));
    const frameTypes = times(2, (): FrameType => ({
      id: nextId('t'),
      ...any(
        fc.record({
          name,
          maker: name,
          depthMm: length,
          uprightWidthMm: length,
          massKg: orNull(mass),
          tableBy: fc.constantFrom('greatest-height' as const, 'storey-height' as const),
          table: several(fc.record({ heightMm: length, ratedKg: rating }), 0).map((rows) => ordered(rows, 'heightMm')),
          plateWidthMm: orNull(length),
          plateDepthMm: orNull(length),
          holePitchMm: orNull(length),
          source,
        }),
      ),
    }));
    const floors = times(1, (): Floor => ({
      id: nextId('g'),
      ...any(
        fc.record({
          name,
          kind: fc.constantFrom('ground-slab', 'suspended', 'unknown'),
          legN: orNull(numberIn(1, 1e5)),
          pressureNPerMm2: orNull(numberIn(1, 30)),
          legPairN: orNull(numberIn(1, 1e5)),
          areaNPerMm2: orNull(numberIn(1, 30)),
          thicknessMm: orNull(length),
          source,
        }),
      ),
    }));

    const placements = (most: number) =>
      times(most, (): Placement => ({
        id: nextId('x'),
        unitLoadId: any(fc.constantFrom(...unitLoads.map(({ id }) => id))),
        ...any(fc.record({ atMm: numberIn(-500, 4000), mirrored: fc.boolean(), towardsFrontMm: numberIn(-400, 400) })),
      }));
    const levels = () => {
      let heightMm = 0;
      return times(3, (): Level => {
        heightMm += any(numberIn(1, 2500));
        return {
          id: nextId('l'),
          heightMm,
          beamTypeId: oneOf(beamTypes),
          locks: any(answer),
          deck: any(deck),
          beamDamages: times(1, () => ({ id: nextId('e'), ...any(beamDamage) })),
          sags: any(sags),
          placements: placements(3),
        };
      });
    };
    const bay = (): Bay => ({
      id: nextId('y'),
      name: any(name),
      clearEntryMm: any(numberIn(500, 4000)),
      noticeId: oneOf(notices),
      levels: levels(),
      onFloor: placements(1),
    });
    const frame = (): Frame => ({
      id: nextId('f'),
      name: any(name),
      typeId: oneOf(frameTypes),
      ...any(
        fc.record({
          heightMm: length,
          anchored: answer,
          restrained: answer,
          plumb: orNull(fc.record({ alongMm: numberIn(-50, 50), acrossMm: numberIn(-50, 50), heightMm: length, loaded: fc.boolean() })),
        }),
      ),
      damages: times(1, () => ({ id: nextId('d'), ...any(damage) })),
    });
    const bayTemplates = times(1, (): BayTemplate => {
      const withoutId = ({ id: _, ...rest }: Placement): TemplateGoods => rest;
      return {
        id: nextId('t'),
        name: any(name),
        clearEntryMm: any(numberIn(500, 4000)),
        noticeId: oneOf(notices),
        frameTypeId: oneOf(frameTypes),
        frameHeightMm: any(length),
        levels: levels().map(({ heightMm, beamTypeId, deck: its, placements: goods }) => ({
          heightMm,
          beamTypeId,
          deck: its,
          placements: goods.map(withoutId),
        })),
        onFloor: placements(1).map(withoutId),
      };
    });
    const runs = times(3, (): Run => {
      const bays = times(3, bay);
      return {
        id: nextId('r'),
        name: any(name),
        floorId: oneOf(floors),
        loadedBy: any(fc.constantFrom(...LOADED_BY)),
        twoDeep: any(answer),
        backToBack: null,
        frames: Array.from({ length: bays.length + 1 }, frame),
        bays,
      };
    });
    const [first, second, ...others] = runs;
    const tied = first && second && any(fc.boolean());
    const tie = any(fc.record({ gapMm: numberIn(0, 400), rowSpacers: answer }));

    return {
      id: nextId('s'),
      ...any(
        fc.record({
          name,
          notes: fc.string({ maxLength: 30 }),
          units: fc.constantFrom('metric' as const, 'us' as const),
          rules: fc.record({
            set: fc.constantFrom('european' as const, 'united-states' as const, 'australian' as const),
            changed: fc
              .uniqueArray(fc.constantFrom(...RULE_KEYS), { maxLength: 3 })
              .chain((keys) =>
                fc.tuple(
                  ...keys.map((key) =>
                    fc.record({ key: fc.constant(key), value: numberIn(RULES[key].least, RULES[key].most), reason: name }),
                  ),
                ),
              ),
            leftOut: fc
              .uniqueArray(fc.constantFrom(...CHECKS), { maxLength: 3 })
              .chain((checks) => fc.tuple(...checks.map((check) => fc.record({ check: fc.constant(check), reason: name })))),
            fullComplement: fc.boolean(),
            frameTable: fc.constantFrom('next-taller-row' as const, 'interpolate' as const),
            twoAmbersMakeRed: fc.boolean(),
            span: fc.constantFrom('clear-entry' as const, 'centre-to-centre' as const),
          }),
          seismic: answer,
          outdoors: answer,
        }),
      ),
      pallets,
      unitLoads,
      notices,
      beamTypes,
      frameTypes,
      floors,
      bayTemplates,
      runs: tied
        ? [{ ...first, backToBack: { runId: second.id, ...tie } }, { ...second, backToBack: { runId: first.id, ...tie } }, ...others]
        : runs,
    };
  });
}
