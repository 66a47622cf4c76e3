/**
 * Sites and their parts to test with. Everything has a plain default; a test states only what it is
 * about. Whole random sites come from make-random.ts.
 */
import type {
  Bay,
  BeamType,
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
  Source,
  UnitLoad,
} from '../src-core/site/site';

export const UNKNOWN_SOURCE: Source = { kind: 'unknown', detail: '', person: '', date: '' };

let made = 0;
/** A fresh id for tests that do not care which. */
const anId = (prefix = 'x'): Id => `${prefix}-${++made}`;

export const makePallet = (part: Partial<Pallet> = {}): Pallet => ({
  id: anId('pallet'),
  name: 'Pallet 1200 × 800',
  lengthMm: 1200,
  widthMm: 800,
  heightMm: 144,
  massKg: 25,
  boards: 'along-length',
  runners: [
    { centreMm: 50, widthMm: 100 },
    { centreMm: 400, widthMm: 145 },
    { centreMm: 750, widthMm: 100 },
  ],
  ratedKg: 1500,
  source: UNKNOWN_SOURCE,
  ...part,
});

/** Goods of 800 × 1200 mm and 800 kg, evenly spread, without a pallet. */
export const makeUnitLoad = (part: Partial<UnitLoad> = {}): UnitLoad => ({
  id: anId('goods'),
  name: 'Bagged flour',
  widthMm: 800,
  depthMm: 1200,
  heightMm: 1200,
  goodsKg: 800,
  massUncertaintyPercent: 0,
  massSource: { kind: 'weighed', detail: 'floor scale', person: 'A. Tester', date: '2026-05-04' },
  palletId: null,
  palletFace: 'width',
  bearing: { kind: 'even' },
  across: { kind: 'even' },
  contact: 'flat',
  chocked: 'no',
  leanMm: 0,
  ...part,
});

/** A notice for three unit loads of 833 kg on 2 500 kg a level. */
export const makeNotice = (part: Partial<LoadNotice> = {}): LoadNotice => ({
  id: anId('notice'),
  name: 'LN-1',
  maker: 'Invented Storage Works',
  issued: '2021-03-01',
  levelKg: [2500],
  unitLoadsPerLevel: null,
  unitLoadKg: null,
  bayKg: null,
  frameKg: null,
  firstBeamMm: null,
  greatestGapMm: null,
  levels: null,
  beamTypeId: null,
  source: { kind: 'notice', detail: 'LN-1', person: 'A. Tester', date: '2026-05-04' },
  ...part,
});

export const makeBeamType = (part: Partial<BeamType> = {}): BeamType => ({
  id: anId('beam'),
  name: 'Box 120 × 50',
  maker: 'Invented Storage Works',
  heightMm: 120,
  widthMm: 50,
  massKgPerM: 4.3,
  connectorsKg: 2.5,
  ratings: [],
  endKg: null,
  secondMomentMm4: null,
  sectionModulusMm3: null,
  elasticModulusNPerMm2: null,
  designStressNPerMm2: null,
  connectorNmmPerRad: null,
  source: UNKNOWN_SOURCE,
  ...part,
});

export const makeFrameType = (part: Partial<FrameType> = {}): FrameType => ({
  id: anId('frame-type'),
  name: 'Frame 1100 deep',
  maker: 'Invented Storage Works',
  depthMm: 1100,
  uprightWidthMm: 100,
  massKg: 60,
  tableBy: 'greatest-height',
  table: [],
  plateWidthMm: null,
  plateDepthMm: null,
  holePitchMm: null,
  source: UNKNOWN_SOURCE,
  ...part,
});

export const makeFloor = (part: Partial<Floor> = {}): Floor => ({
  id: anId('floor'),
  name: 'Hall slab',
  kind: 'ground-slab',
  legN: null,
  pressureNPerMm2: null,
  legPairN: null,
  areaNPerMm2: null,
  thicknessMm: null,
  source: UNKNOWN_SOURCE,
  ...part,
});

export const makePlacement = (unitLoadId: Id, atMm: number, part: Partial<Placement> = {}): Placement => ({
  id: anId('place'),
  unitLoadId,
  atMm,
  mirrored: false,
  towardsFrontMm: 0,
  ...part,
});

/** A level 1 500 mm up with the goods given as [unit load, position] pairs. */
export const makeLevel = (goods: readonly (readonly [UnitLoad, number])[] = [], part: Partial<Level> = {}): Level => ({
  id: anId('level'),
  heightMm: 1500,
  beamTypeId: null,
  locks: 'yes',
  deck: { kind: 'none' },
  beamDamages: [],
  sags: [],
  placements: goods.map(([unitLoad, atMm]) => makePlacement(unitLoad.id, atMm)),
  ...part,
});

export const makeBay = (levels: readonly Level[] = [], part: Partial<Bay> = {}): Bay => ({
  id: anId('bay'),
  name: 'A1',
  clearEntryMm: 2700,
  noticeId: null,
  levels,
  onFloor: [],
  ...part,
});

export const makeFrame = (part: Partial<Frame> = {}): Frame => ({
  id: anId('frame'),
  name: 'F',
  typeId: null,
  heightMm: 6000,
  anchored: 'yes',
  restrained: 'no',
  plumb: null,
  damages: [],
  ...part,
});

/** A run of these bays with one more frame, each made from `frame`. */
export const makeRun = (bays: readonly Bay[] = [], part: Partial<Run> = {}, frame: Partial<Frame> = {}): Run => ({
  id: anId('run'),
  name: 'A',
  floorId: null,
  loadedBy: 'class-400',
  twoDeep: 'no',
  backToBack: null,
  frames: Array.from({ length: bays.length + 1 }, (_, i) => makeFrame({ name: `A-F${i + 1}`, ...frame })),
  bays,
  ...part,
});

export const makeSite = (part: Partial<Site> = {}): Site => ({
  id: anId('site'),
  name: 'Test depot',
  notes: '',
  units: 'metric',
  rules: {
    set: 'european',
    changed: [],
    leftOut: [],
    fullComplement: true,
    frameTable: 'next-taller-row',
    twoAmbersMakeRed: true,
    span: 'clear-entry',
  },
  seismic: 'no',
  outdoors: 'no',
  pallets: [],
  unitLoads: [],
  notices: [],
  beamTypes: [],
  frameTypes: [],
  floors: [],
  bayTemplates: [],
  runs: [],
  ...part,
});
