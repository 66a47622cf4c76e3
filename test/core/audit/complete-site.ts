/** A site in which every check has every input it needs, and each is within or close. */
import type { Bay, Frame, Run, Site, Source } from '../../../src-core/site/site';
import {
  makeBay,
  makeBeamType,
  makeFloor,
  makeFrame,
  makeFrameType,
  makeLevel,
  makeNotice,
  makePallet,
  makeRun,
  makeSite,
  makeUnitLoad,
} from '../../make';

const MAKER: Source = { kind: 'maker', detail: 'data sheet', person: 'A. Tester', date: '2026-05-04' };

const pallet = makePallet({ id: 'pallet', source: MAKER });
const flour = makeUnitLoad({ id: 'flour', name: 'Flour', goodsKg: 400, palletId: 'pallet', heightMm: 1000 });
const bags = makeUnitLoad({ id: 'bags', name: 'Bags', goodsKg: 300, palletId: 'pallet', heightMm: 1000 });
const reel = makeUnitLoad({
  id: 'reel',
  name: 'Reel',
  goodsKg: 350,
  palletId: 'pallet',
  heightMm: 1000,
  contact: 'lying-round',
  chocked: 'yes',
});
const crate = makeUnitLoad({ id: 'crate', name: 'Crate', goodsKg: 200, heightMm: 900 });

const beam = makeBeamType({
  id: 'beam',
  endKg: 900,
  secondMomentMm4: 927_016,
  sectionModulusMm3: 15_450,
  elasticModulusNPerMm2: 210_000,
  designStressNPerMm2: 235,
  connectorNmmPerRad: null,
  source: MAKER,
});
const frameType = makeFrameType({
  id: 'frame-type',
  plateWidthMm: 120,
  plateDepthMm: 120,
  holePitchMm: 50,
  table: [
    { heightMm: 1500, ratedKg: 12_000 },
    { heightMm: 3000, ratedKg: 8000 },
    { heightMm: 6000, ratedKg: 6000 },
  ],
  source: MAKER,
});
const floor = makeFloor({
  id: 'floor',
  kind: 'suspended',
  legN: 30_000,
  pressureNPerMm2: 3,
  legPairN: 60_000,
  areaNPerMm2: 0.02,
  thicknessMm: 200,
  source: { ...MAKER, kind: 'engineer' },
});
const notice = makeNotice({
  id: 'notice',
  levelKg: [2400, 2400],
  unitLoadsPerLevel: 3,
  unitLoadKg: 900,
  bayKg: 4800,
  frameKg: 6000,
  firstBeamMm: 1500,
  greatestGapMm: 5500,
  levels: 2,
  beamTypeId: 'beam',
});

/** Two levels, the lower one decked with four panels, the upper one open; a crate on the floor. */
function bay(name: string): Bay {
  const lower = makeLevel(
    [
      [flour, 150],
      [reel, 1600],
    ],
    {
      id: `${name}-lower`,
      heightMm: 1500,
      beamTypeId: 'beam',
      deck: { kind: 'panels', count: 4, panelKg: 600, massKg: 40, source: MAKER },
      sags: [{ beam: 'front', loadedMm: 6, unloadedMm: 1, sidewaysMm: 0, found: '2026-05-20' }],
    },
  );
  const upper = makeLevel(
    [
      [bags, 150],
      [bags, 1600],
    ],
    { id: `${name}-upper`, heightMm: 7000, beamTypeId: 'beam' },
  );
  return makeBay([lower, upper], { id: name, name, noticeId: 'notice', onFloor: makeLevel([[crate, 900]]).placements });
}

const frame = (id: string): Frame =>
  makeFrame({
    id,
    name: id,
    typeId: 'frame-type',
    heightMm: 8000,
    restrained: 'yes',
    plumb: { alongMm: 3, acrossMm: 2, heightMm: 7000, loaded: true },
    damages: [
      { id: `${id}-bend`, member: 'upright-front', alongMm: 3, acrossMm: 1, gaugeMm: 1000, torn: false, note: '', found: '2026-05-20' },
    ],
  });

const run = (name: string, behind: string): Run =>
  makeRun([bay(`${name}1`), bay(`${name}2`)], {
    id: `run-${name}`,
    name,
    floorId: 'floor',
    frames: [frame(`${name}-F1`), frame(`${name}-F2`), frame(`${name}-F3`)],
    backToBack: { runId: `run-${behind}`, gapMm: 300, rowSpacers: 'no' },
  });

export const TODAY = '2026-06-01';

/** Two runs of two bays back to back. */
export const completeSite = (): Site =>
  makeSite({
    id: 'site',
    pallets: [pallet],
    unitLoads: [flour, bags, reel, crate],
    notices: [notice],
    beamTypes: [beam],
    frameTypes: [frameType],
    floors: [floor],
    runs: [run('A', 'B'), run('B', 'A')],
  });
