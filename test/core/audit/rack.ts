/** Racks for audit tests: one run with one bay of every part known, to be changed one part at a time. */
import type {
  Bay,
  BeamType,
  FrameType,
  Level,
  LoadNotice,
  Pallet,
  Placement,
  Rules,
  Site,
  Source,
  UnitLoad,
} from '../../../src-core/site/site';

export const SOURCE: Source = { kind: 'declared', detail: '', person: '', date: '' };

export const goods = (id: string, change: Partial<UnitLoad> = {}): UnitLoad => ({
  id,
  name: `Goods ${id}`,
  widthMm: 800,
  depthMm: 1200,
  heightMm: 1000,
  goodsKg: 800,
  massUncertaintyPercent: 0,
  massSource: SOURCE,
  palletId: null,
  palletFace: 'width',
  bearing: { kind: 'even' },
  across: { kind: 'even' },
  contact: 'flat',
  chocked: 'unknown',
  leanMm: 0,
  ...change,
});

export const pallet = (id: string, change: Partial<Pallet> = {}): Pallet => ({
  id,
  name: `Pallet ${id}`,
  lengthMm: 1200,
  widthMm: 800,
  heightMm: 144,
  massKg: 25,
  boards: 'along-length',
  runners: [],
  ratedKg: null,
  source: SOURCE,
  ...change,
});

export const NOTICE: LoadNotice = {
  id: 'notice',
  name: 'LN-1',
  maker: '',
  issued: '2024-02-01',
  levelKg: [2500],
  unitLoadsPerLevel: 3,
  unitLoadKg: 833,
  bayKg: 10_000,
  frameKg: 10_000,
  firstBeamMm: 1500,
  greatestGapMm: 1500,
  levels: 1,
  beamTypeId: 'beam',
  source: { kind: 'notice', detail: '', person: 'A. Reader', date: '2024-05-03' },
};

export const BEAM: BeamType = {
  id: 'beam',
  name: 'B 120',
  maker: '',
  heightMm: 120,
  widthMm: 50,
  massKgPerM: 4,
  connectorsKg: 2,
  ratings: [],
  endKg: null,
  secondMomentMm4: null,
  sectionModulusMm3: null,
  elasticModulusNPerMm2: null,
  designStressNPerMm2: null,
  connectorNmmPerRad: null,
  source: SOURCE,
};

export const FRAME: FrameType = {
  id: 'frame',
  name: 'F 100',
  maker: '',
  depthMm: 1100,
  uprightWidthMm: 100,
  massKg: 60,
  tableBy: 'greatest-height',
  table: [],
  plateWidthMm: 120,
  plateDepthMm: 120,
  holePitchMm: null,
  source: SOURCE,
};

let count = 0;
export const stand = (unitLoadId: string, atMm: number, change: Partial<Placement> = {}): Placement => ({
  id: `p${(count += 1)}`,
  unitLoadId,
  atMm,
  mirrored: false,
  towardsFrontMm: 0,
  ...change,
});

export const level = (placements: readonly Placement[], change: Partial<Level> = {}): Level => ({
  id: `level-${(count += 1)}`,
  heightMm: 1500,
  beamTypeId: 'beam',
  locks: 'yes',
  deck: { kind: 'none' },
  beamDamages: [],
  sags: [],
  placements,
  ...change,
});

export const RULES: Rules = {
  set: 'european',
  changed: [],
  leftOut: [],
  fullComplement: true,
  frameTable: 'next-taller-row',
  twoAmbersMakeRed: true,
  span: 'clear-entry',
};

export interface Rack {
  readonly unitLoads: readonly UnitLoad[];
  readonly levels: readonly Level[];
  readonly pallets?: readonly Pallet[];
  readonly notice?: Partial<LoadNotice> | null;
  readonly beam?: Partial<BeamType>;
  readonly frame?: Partial<FrameType> | null;
  readonly bay?: Partial<Bay>;
  readonly rules?: Partial<Rules>;
}

/** A site of one bay, 2 700 mm clear, between two frames of one type. */
export function rack({ unitLoads, levels, pallets = [], notice = {}, beam = {}, frame = {}, bay = {}, rules = {} }: Rack): Site {
  const upright = (id: string) =>
    ({
      id,
      name: id,
      typeId: frame === null ? null : 'frame',
      heightMm: 3000,
      anchored: 'yes',
      restrained: 'no',
      plumb: { alongMm: 1, acrossMm: 1, heightMm: 3000, loaded: true },
      damages: [],
    }) as const;
  return {
    id: 'site',
    name: 'Test depot',
    notes: '',
    units: 'metric',
    rules: { ...RULES, ...rules },
    seismic: 'no',
    outdoors: 'no',
    pallets,
    unitLoads,
    notices: notice === null ? [] : [{ ...NOTICE, ...notice }],
    beamTypes: [{ ...BEAM, ...beam }],
    frameTypes: frame === null ? [] : [{ ...FRAME, ...frame }],
    floors: [],
    bayTemplates: [],
    runs: [
      {
        id: 'run',
        name: 'A',
        floorId: null,
        loadedBy: 'by-hand',
        twoDeep: 'no',
        backToBack: null,
        frames: [upright('left'), upright('right')],
        bays: [{ id: 'bay', name: 'A1', clearEntryMm: 2700, noticeId: notice === null ? null : 'notice', levels, onFloor: [], ...bay }],
      },
    ],
  };
}

export const SECTION = { secondMomentMm4: 927_016, sectionModulusMm3: 15_450, elasticModulusNPerMm2: 210_000, designStressNPerMm2: 235 };

/** Two unlike unit loads on pallets, one off the middle, on a level with everything known. */
export const KNOWN: Rack = {
  pallets: [pallet('p')],
  unitLoads: [
    goods('a', { goodsKg: 500, palletId: 'p' }),
    goods('b', { goodsKg: 300, palletId: 'p', across: { kind: 'sloped', rearOverFront: 0.5 } }),
  ],
  levels: [
    level([stand('a', 100), stand('b', 1200, { towardsFrontMm: 40, mirrored: true })], { deck: { kind: 'support-bars', massKg: 12 } }),
  ],
  notice: { levelKg: [2500], unitLoadKg: 900, unitLoadsPerLevel: 3 },
  beam: { ...SECTION, ratings: [{ spanMm: 2700, pairKg: 2400 }] },
};
