/** Depots of any size in which every bay is alike, so that one edit costs the same work wherever size does not matter. */
import type { Run, Site } from '../../src-core/site/site';
import {
  makeBay,
  makeBeamType,
  makeFloor,
  makeFrame,
  makeFrameType,
  makeLevel,
  makeNotice,
  makePallet,
  makePlacement,
  makeRun,
  makeSite,
  makeUnitLoad,
} from '../make';

export interface Depot {
  readonly runs: number;
  readonly bays: number;
  /** Runs stand in pairs back to back. */
  readonly paired: boolean;
}

const LEVELS = 5;
const PLACES = [75, 1450];

export const placementsOf = ({ runs, bays }: Depot): number => runs * bays * LEVELS * PLACES.length;

const TYPES = {
  pallets: [makePallet({ id: 'pallet' })],
  unitLoads: Array.from({ length: 40 }, (_, i) =>
    makeUnitLoad({ id: `goods-${i}`, name: `Goods ${i}`, goodsKg: 300 + 10 * i, palletId: 'pallet', heightMm: 1000 }),
  ),
  notices: [makeNotice({ id: 'notice', frameKg: 14_000, bayKg: 12_000, firstBeamMm: 1500, greatestGapMm: 1500 })],
  beamTypes: [
    makeBeamType({
      id: 'beam',
      secondMomentMm4: 927_016,
      sectionModulusMm3: 15_450,
      elasticModulusNPerMm2: 210_000,
      designStressNPerMm2: 235,
    }),
  ],
  frameTypes: [
    makeFrameType({
      id: 'frame',
      plateWidthMm: 120,
      plateDepthMm: 120,
      holePitchMm: 50,
      table: [
        { heightMm: 1500, ratedKg: 12_000 },
        { heightMm: 3000, ratedKg: 8000 },
      ],
    }),
  ],
  floors: [makeFloor({ id: 'floor', legN: 40_000, pressureNPerMm2: 4, legPairN: 60_000, areaNPerMm2: 0.05, thicknessMm: 200 })],
} satisfies Partial<Site>;

function runOf(index: number, { bays, paired }: Depot): Run {
  const name = `R${index + 1}`;
  return makeRun(
    Array.from({ length: bays }, (_, b) =>
      makeBay(
        Array.from({ length: LEVELS }, (_, l) =>
          makeLevel([], {
            id: `${name}-${b + 1}-l${l + 1}`,
            heightMm: 1500 * (l + 1),
            beamTypeId: 'beam',
            placements: PLACES.map((at, p) =>
              makePlacement(`goods-${(7 * index + b + 3 * l + p) % 40}`, at, { id: `${name}-${b + 1}-l${l + 1}-g${p + 1}` }),
            ),
          }),
        ),
        { id: `${name}-${b + 1}`, name: `${name}-${b + 1}`, noticeId: 'notice' },
      ),
    ),
    {
      id: name,
      name,
      floorId: 'floor',
      backToBack: paired ? { runId: `R${(index ^ 1) + 1}`, gapMm: 250, rowSpacers: 'yes' } : null,
      frames: Array.from({ length: bays + 1 }, (_, f) =>
        makeFrame({ id: `${name}-f${f + 1}`, name: `${name}-F${f + 1}`, typeId: 'frame', heightMm: 9000 }),
      ),
    },
  );
}

export const depotOf = (depot: Depot): Site =>
  makeSite({ id: 'depot', name: 'Large depot', ...TYPES, runs: Array.from({ length: depot.runs }, (_, i) => runOf(i, depot)) });
