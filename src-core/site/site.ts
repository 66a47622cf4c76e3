/**
 * The site as it is kept in its file: runs of bays, upright frames shared by neighbours, and the
 * libraries of goods, notices and ratings they refer to.
 *
 * Plain readonly data. Lengths in mm and masses in kg, said in the names, because these names are
 * also the file's. `null` means "not known": a check that needs it answers "not assessable".
 * Every key is always present. Ids are unique in the whole site.
 *
 * Left and right are as seen from the aisle, standing in front of the bay; front is the aisle side.
 */
import type { LoadedBy } from '../checks/clearance-rules';
import type { CheckName } from '../checks/finding';
import type { RuleKey, RuleSetName } from '../checks/rule-sets';
import type { BearingShape, DepthShape } from '../goods/shapes';
import type { UnitSystem } from '../units/quantity';

export type Id = string;
export type Answer = 'yes' | 'no' | 'unknown';

/** Where a stated number came from. `kind: 'unknown'` is an honest answer and is printed as one. */
export interface Source {
  readonly kind: 'notice' | 'maker' | 'drawing' | 'engineer' | 'weighed' | 'measured' | 'declared' | 'wms' | 'estimated' | 'unknown';
  /** Document, label or scale, in the user's words; may be empty. */
  readonly detail: string;
  readonly person: string;
  /** ISO date (YYYY-MM-DD), or empty where none was given. */
  readonly date: string;
}

export interface Site {
  readonly id: Id;
  readonly name: string;
  readonly notes: string;
  /** Units on screen and paper; stored values are always mm and kg. */
  readonly units: UnitSystem;
  readonly rules: Rules;
  /** Earthquake region, outdoor or wind-exposed: no calculation here, an engineer is asked for. */
  readonly seismic: Answer;
  readonly outdoors: Answer;
  readonly pallets: readonly Pallet[];
  readonly unitLoads: readonly UnitLoad[];
  readonly notices: readonly LoadNotice[];
  readonly beamTypes: readonly BeamType[];
  readonly frameTypes: readonly FrameType[];
  readonly floors: readonly Floor[];
  readonly bayTemplates: readonly BayTemplate[];
  readonly runs: readonly Run[];
}

/** The rule set of the site and every way in which the site departs from it. */
export interface Rules {
  readonly set: RuleSetName;
  /** Values changed from the rule set, each with its reason. */
  readonly changed: readonly { readonly key: RuleKey; readonly value: number; readonly reason: string }[];
  readonly leftOut: readonly { readonly check: CheckName; readonly reason: string }[];
  /** Judge a designed full complement by total and unit load (method: equal, evenly spaced). */
  readonly fullComplement: boolean;
  readonly frameTable: 'next-taller-row' | 'interpolate';
  /** Two amber damages on one frame count as red. */
  readonly twoAmbersMakeRed: boolean;
  /** What the beam span is taken to be: the clear entry, or upright centre to upright centre. */
  readonly span: 'clear-entry' | 'centre-to-centre';
}

// ---------------------------------------------------------------- goods

export interface Pallet {
  readonly id: Id;
  readonly name: string;
  /** Plan size and height. `lengthMm` is the longer side by custom, not by rule. */
  readonly lengthMm: number;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly massKg: number | null;
  /** Which way the bottom boards or runners run; 'full' = closed underside; 'none' = feet only. */
  readonly boards: 'along-length' | 'along-width' | 'full' | 'none';
  /** Lines of boards or runners, across the direction in which they run; positions from one edge. */
  readonly runners: readonly { readonly centreMm: number; readonly widthMm: number }[];
  readonly ratedKg: number | null;
  readonly source: Source;
}

export type { BearingShape, DepthShape, Slope, SteppedColumn } from '../goods/shapes';

export interface UnitLoad {
  readonly id: Id;
  readonly name: string;
  /** Along the beam, across the rack, and total height with pallet. The real outline, overhang included. */
  readonly widthMm: number;
  readonly depthMm: number;
  readonly heightMm: number;
  /** Goods without pallet; null = not known. A shape given by densities or intensities finds it. */
  readonly goodsKg: number | null;
  /** The mass may be this many per cent more than stated. */
  readonly massUncertaintyPercent: number;
  readonly massSource: Source;
  readonly palletId: Id | null;
  /** Pallet side that faces the aisle. */
  readonly palletFace: 'width' | 'length';
  readonly bearing: BearingShape;
  readonly across: DepthShape;
  /** What touches the deck or beams; rims, wheels and small feet are outside a deck's rating. */
  readonly contact: 'flat' | 'rims' | 'wheels' | 'feet' | 'lying-round';
  /** Cradled or chocked, for goods that can roll. */
  readonly chocked: Answer;
  /** Lean of the stack, offset at the top in mm, to the right positive before it is mirrored. */
  readonly leanMm: number;
}

// ---------------------------------------------------------------- ratings

/** The maker's load notice as read. Ratings are for load evenly spread over the pair of beams. */
export interface LoadNotice {
  readonly id: Id;
  readonly name: string;
  readonly maker: string;
  readonly issued: string;
  /** Rating of a pair of beams at each level from the lowest up; the last entry serves all levels above it. Empty = none stated. */
  readonly levelKg: readonly (number | null)[];
  /** Number of unit loads a level is made for; null = not stated. */
  readonly unitLoadsPerLevel: number | null;
  readonly unitLoadKg: number | null;
  readonly bayKg: number | null;
  /** One rating of the frame for the bay as it stands on the notice, where there is no table. */
  readonly frameKg: number | null;
  readonly firstBeamMm: number | null;
  readonly greatestGapMm: number | null;
  readonly levels: number | null;
  /** Beam type that the notice was issued for, by its library id. */
  readonly beamTypeId: Id | null;
  readonly source: Source;
}

export interface BeamType {
  readonly id: Id;
  readonly name: string;
  readonly maker: string;
  readonly heightMm: number;
  readonly widthMm: number;
  /** Mass of one beam per metre, and of its two end connectors together; null = not known. */
  readonly massKgPerM: number | null;
  readonly connectorsKg: number | null;
  /** Maker's rating of a pair by span. */
  readonly ratings: readonly { readonly spanMm: number; readonly pairKg: number }[];
  /** Maker's value for one beam end or connector, as the mass it may carry; null = not stated. */
  readonly endKg: number | null;
  /** Section data of one beam; all optional. */
  readonly secondMomentMm4: number | null;
  readonly sectionModulusMm3: number | null;
  readonly elasticModulusNPerMm2: number | null;
  readonly designStressNPerMm2: number | null;
  /** Rotational stiffness of one beam-end connector; null = not known (pinned, with the range beside it). */
  readonly connectorNmmPerRad: number | null;
  readonly source: Source;
}

export interface FrameType {
  readonly id: Id;
  readonly name: string;
  readonly maker: string;
  /** Outside to outside of the uprights, across the rack. */
  readonly depthMm: number;
  /** Width of one upright along the run. */
  readonly uprightWidthMm: number;
  readonly massKg: number | null;
  /**
   * Which unsupported height the maker's table is read at: the greatest of the whole frame, for all its
   * storeys, or each storey's own.
   */
  readonly tableBy: 'greatest-height' | 'storey-height';
  /** Rated mass of one frame by unsupported height; empty = no table. */
  readonly table: readonly { readonly heightMm: number; readonly ratedKg: number }[];
  readonly plateWidthMm: number | null;
  readonly plateDepthMm: number | null;
  /** From hole to hole up the uprights: beams stand at whole multiples of it; null = not known. */
  readonly holePitchMm: number | null;
  readonly source: Source;
}

/** The floor as its owner states it. Nothing here is calculated by the program. */
export interface Floor {
  readonly id: Id;
  readonly name: string;
  readonly kind: 'ground-slab' | 'suspended' | 'unknown';
  readonly legN: number | null;
  readonly pressureNPerMm2: number | null;
  /** Limit for two legs standing back to back. */
  readonly legPairN: number | null;
  readonly areaNPerMm2: number | null;
  readonly thicknessMm: number | null;
  readonly source: Source;
}

/** A bay to lay out more by, kept under a name. Of what is seen at the rack (locks, damage, plumb) it says nothing. */
export interface BayTemplate {
  readonly id: Id;
  readonly name: string;
  readonly clearEntryMm: number;
  readonly noticeId: Id | null;
  readonly frameTypeId: Id | null;
  readonly frameHeightMm: number;
  /** From the lowest up. */
  readonly levels: readonly TemplateLevel[];
  readonly onFloor: readonly TemplateGoods[];
}

export type TemplateLevel = Pick<Level, 'heightMm' | 'beamTypeId' | 'deck'> & { readonly placements: readonly TemplateGoods[] };
export type TemplateGoods = Omit<Placement, 'id'>;

// ---------------------------------------------------------------- the rack

/** A row of bays. `frames` has one more entry than `bays`: frame i stands left of bay i. */
export interface Run {
  readonly id: Id;
  readonly name: string;
  readonly floorId: Id | null;
  /** What puts the goods away: the class of truck decides the clearances. */
  readonly loadedBy: LoadedBy;
  /** Deep goods stored two behind one another. */
  readonly twoDeep: Answer;
  /** The run behind this one, its back to this one's; null = stands alone. The gap is free, from frame to frame. */
  readonly backToBack: { readonly runId: Id; readonly gapMm: number; readonly rowSpacers: Answer } | null;
  readonly frames: readonly Frame[];
  readonly bays: readonly Bay[];
}

export interface Frame {
  readonly id: Id;
  readonly name: string;
  readonly typeId: Id | null;
  readonly heightMm: number;
  readonly anchored: Answer;
  /** Tied overhead or otherwise restrained, for tall narrow runs. */
  readonly restrained: Answer;
  readonly plumb: PlumbReading | null;
  readonly damages: readonly Damage[];
}

export interface PlumbReading {
  /** Offset at `heightMm`, along the run and across it. */
  readonly alongMm: number;
  readonly acrossMm: number;
  readonly heightMm: number;
  readonly loaded: boolean;
}

export interface Damage {
  readonly id: Id;
  readonly member: 'upright-front' | 'upright-rear' | 'bracing' | 'base-plate';
  /** Bow over the gauge length, along the beams and in the plane of the frame; null = not measured. */
  readonly alongMm: number | null;
  readonly acrossMm: number | null;
  readonly gaugeMm: number;
  /** Dent, buckle, tear, split or cracked weld: never judged by millimetres. */
  readonly torn: boolean;
  readonly note: string;
  readonly found: string;
}

export interface Bay {
  readonly id: Id;
  readonly name: string;
  /** Free width between the uprights. */
  readonly clearEntryMm: number;
  readonly noticeId: Id | null;
  readonly levels: readonly Level[];
  /** Goods on the floor under the first beam: drawn and checked for clearance, carried by no beam. */
  readonly onFloor: readonly Placement[];
}

/** A beam level; `levels` of a bay run from the lowest up. */
export interface Level {
  readonly id: Id;
  /** Floor to the top of the beam. */
  readonly heightMm: number;
  readonly beamTypeId: Id | null;
  readonly locks: Answer;
  readonly deck: Deck;
  /** Damage of its beams and their connectors that is no sag. */
  readonly beamDamages: readonly BeamDamage[];
  /** The latest sag reading of each beam, at most one a beam. */
  readonly sags: readonly BeamSag[];
  readonly placements: readonly Placement[];
}

export interface BeamDamage {
  readonly id: Id;
  readonly beam: 'front' | 'rear';
  readonly member: 'beam' | 'connector';
  /** Dent, buckle, tear, split or cracked weld. */
  readonly torn: boolean;
  readonly note: string;
  /** ISO date, or empty where it is not known. */
  readonly found: string;
}

/** One beam's sag at mid-span below the line through its ends; unloaded it is the permanent set. Null = not measured. */
export interface BeamSag {
  readonly beam: 'front' | 'rear';
  readonly loadedMm: number | null;
  readonly unloadedMm: number | null;
  /** Permanent set sideways, unloaded. */
  readonly sidewaysMm: number | null;
  /** ISO date, or empty where it is not known. */
  readonly found: string;
}

export type Deck =
  | { readonly kind: 'none' }
  | { readonly kind: 'support-bars'; readonly massKg: number | null }
  | {
      readonly kind: 'mesh' | 'panels';
      /** Number of equal panels side by side along the beam. */
      readonly count: number;
      /** Rated evenly spread mass of one panel; null = share of the level's rating. */
      readonly panelKg: number | null;
      readonly massKg: number | null;
      readonly source: Source;
    };

/** One unit load on a level. */
export interface Placement {
  readonly id: Id;
  readonly unitLoadId: Id;
  /** Left upright's face to the unit load's left edge. */
  readonly atMm: number;
  /** Turned left for right. */
  readonly mirrored: boolean;
  /** Middle of the unit load in front of the middle of the pair of beams (towards the aisle). */
  readonly towardsFrontMm: number;
}
