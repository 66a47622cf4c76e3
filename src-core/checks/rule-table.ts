/**
 * Every number that a rule set fixes, each with its origin. One entry a number: add a key here and it
 * can be used by a check, changed by a site and printed with its source.
 *
 * Values are in the core's unit of their kind (`UNIT_OF`). An entry gives one value for each rule set,
 * because rule sets are not mixed; where a set states nothing of its own, its origin says so.
 */
import { KG_PER_POUND, MM_PER_INCH, STANDARD_GRAVITY, type QuantityKind } from '../units/quantity';

/** How far an origin can be trusted. */
export type Mark = 'source' | 'common practice' | 'from memory, to be confirmed';

export interface RuleDefault {
  readonly value: number;
  readonly mark: Mark;
  /** Where the number stands, or what is known of it. */
  readonly text: string;
}

export interface Rule {
  /** What the number is, in trade words, without its unit. */
  readonly label: string;
  readonly kind: QuantityKind;
  readonly least: number;
  readonly most: number;
  readonly european: RuleDefault;
  readonly 'united-states': RuleDefault;
  readonly australian: RuleDefault;
}

const source = (value: number, text: string): RuleDefault => ({ value, mark: 'source', text });
const practice = (value: number, text = 'no single document is claimed'): RuleDefault => ({ value, mark: 'common practice', text });
const memory = (value: number, text: string): RuleDefault => ({ value, mark: 'from memory, to be confirmed', text });

type Sets = Pick<Rule, 'european' | 'united-states' | 'australian'>;
const sets = (european: RuleDefault, unitedStates: RuleDefault, australian: RuleDefault): Sets => ({
  european,
  'united-states': unitedStates,
  australian,
});
const alike = (value: RuleDefault): Sets => sets(value, value, value);

const inches = (count: number) => count * MM_PER_INCH;
const poundsForce = (count: number) => count * KG_PER_POUND * STANDARD_GRAVITY;

const EN_15620 = 'EN 15620:2008 §5.4.2, class 400; compare EN 15620:2021';
const EN_15620_300 = 'EN 15620:2008 §6.4, class 300; compare EN 15620:2021';
const US_CUSTOM = 'customary in the United States';
const SOUTHERN = 'South African rack users’ training note (secondary); not an Australian document';
const STRAIGHTEDGE = 'FEM 10.2.04 and EN 15635 as restated by straightedge instructions (secondary)';
const AS_DAMAGE = 'AS 4084, damage limits as inspectors use them';
const US_DAMAGE = 'ANSI MH16.1 as restated (secondary): unload on any visible damage';
const NOT_STATED = 'this rule set states nothing of its own';

export const RULES = {
  // ---------------------------------------------------------------- verdicts and beams
  closeAbove: { label: 'Close begins above a utilisation of', kind: 'ratio', least: 0, most: 1, ...alike(practice(0.9)) },
  deflectionDivisor: {
    label: 'Beam deflection limit: span divided by',
    kind: 'ratio',
    least: 50,
    most: 2000,
    ...sets(
      source(200, 'UK storage-equipment trade association Q&A on loaded beam deflection; EN 15620:2008 §5.3.2 has the clause'),
      source(180, 'ANSI MH16.1 as restated in the same Q&A and in US texts (secondary)'),
      source(180, 'inspection body’s note on AS 4084:2023 (secondary)'),
    ),
  },
  likelyFixity: { label: 'Likely fixity of beam ends, 0 pinned to 1 fixed', kind: 'ratio', least: 0, most: 0.99, ...alike(practice(0.4)) },
  frontShareWarn: {
    label: 'Share on the front or rear beam that is pointed out',
    kind: 'ratio',
    least: 0.5,
    most: 1,
    ...alike(practice(0.55)),
  },
  fullComplementMass: {
    label: 'Full complement: greatest difference of one unit load from their mean mass',
    kind: 'percent',
    least: 0,
    most: 50,
    ...alike(practice(5)),
  },
  fullComplementSpacing: {
    label: 'Full complement: greatest distance of a unit load from its evenly spaced place',
    kind: 'length',
    least: 0,
    most: 500,
    ...alike(practice(25)),
  },
  fullComplementFactor: {
    label: 'Full complement: greatest equivalent load over the total',
    kind: 'ratio',
    least: 1,
    most: 2,
    ...alike(practice(1.1, 'evenly spaced standard pallets come out 2 to 6 % above an even load by statics')),
  },
  placementTolerance: { label: 'Placement tolerance of trucks without aids', kind: 'length', least: 0, most: 500, ...alike(practice(50)) },

  // ---------------------------------------------------------------- goods, pallets and decks
  overhangMost: {
    label: 'Greatest overhang of a pallet past the beam, front and rear',
    kind: 'length',
    least: 0,
    most: 500,
    ...sets(
      source(50, 'UK storage-equipment trade association Q&A, February 2012 and August 2019'),
      source(inches(3), 'US Rack Manufacturers Institute article on pallet sizes, 30 December 2019: 2 to 3 in each side'),
      practice(50, NOT_STATED),
    ),
  },
  blockLength: {
    label: 'Length of a pallet’s end block, front to rear',
    kind: 'length',
    least: 0,
    most: 1000,
    ...sets(
      memory(145, 'EN 13698-1, blocks of 145 mm'),
      practice(inches(5.5), 'block pallets; stringers run through'),
      practice(145, NOT_STATED),
    ),
  },
  deckFootprint: {
    label: 'Share of a deck panel below which a base counts as concentrated',
    kind: 'ratio',
    least: 0,
    most: 1,
    ...alike(practice(1 / 3)),
  },
  leanMost: {
    label: 'Greatest lean of a stack, of its height',
    kind: 'percent',
    least: 0,
    most: 20,
    ...sets(source(2, 'German safety publisher on DGUV Information 208-061 (secondary)'), practice(2, NOT_STATED), practice(2, NOT_STATED)),
  },

  // ---------------------------------------------------------------- clearances, by height of the beam level
  clearanceUprightTo3m: clearance('Load to upright, levels up to 3 m', memory(75, EN_15620), inches(3), 75),
  clearanceUprightTo6m: clearance('Load to upright, levels above 3 m up to 6 m', memory(75, EN_15620), inches(3), 75),
  clearanceUprightTo9m: clearance('Load to upright, levels above 6 m up to 9 m', memory(75, EN_15620), inches(3), 75),
  clearanceUprightTo13m: clearance('Load to upright, levels above 9 m up to 13 m', memory(100, EN_15620), inches(3), 75),
  clearanceLoadsTo3m: clearance('Load to load, levels up to 3 m', memory(75, EN_15620), inches(4), 100),
  clearanceLoadsTo6m: clearance('Load to load, levels above 3 m up to 6 m', memory(75, EN_15620), inches(4), 100),
  clearanceLoadsTo9m: clearance('Load to load, levels above 6 m up to 9 m', memory(75, EN_15620), inches(4), 100),
  clearanceLoadsTo13m: clearance('Load to load, levels above 9 m up to 13 m', memory(100, EN_15620), inches(4), 100),
  clearanceAboveTo3m: clearance('Above the load, levels up to 3 m', memory(75, EN_15620), inches(4), 100),
  clearanceAboveTo6m: clearance('Above the load, levels above 3 m up to 6 m', memory(100, EN_15620), inches(4), 100),
  clearanceAboveTo9m: clearance('Above the load, levels above 6 m up to 9 m', memory(125, EN_15620), inches(4), 125),
  clearanceAboveTo13m: clearance('Above the load, levels above 9 m up to 13 m', memory(150, EN_15620), inches(4), 125),
  clearanceUprightTo15m: clearance('Load to upright, levels above 13 m up to 15 m', memory(100, EN_15620_300), inches(3), 75),
  clearanceLoadsTo15m: clearance('Load to load, levels above 13 m up to 15 m', memory(100, EN_15620_300), inches(4), 100),
  clearanceAboveTo15m: clearance('Above the load, levels above 13 m up to 15 m', memory(175, EN_15620_300), inches(4), 125),
  clearanceUprightRising: clearance('Load to upright, driver rising with the load', memory(75, EN_15620_300), inches(3), 75),
  clearanceLoadsRising: clearance('Load to load, driver rising with the load', memory(75, EN_15620_300), inches(4), 100),
  clearanceAboveRising: clearance('Above the load, driver rising with the load', memory(75, EN_15620_300), inches(4), 100),
  clearanceBackToBack: {
    label: 'Clearance between loads standing back to back',
    kind: 'length',
    least: 0,
    most: 1000,
    ...sets(
      memory(100, 'EN 15620:2008 §5.4.3'),
      memory(inches(6), 'NFPA 13: flue space of nominally 6 in; the local fire code governs'),
      practice(100, NOT_STATED),
    ),
  },
  pushThroughGap: {
    label: 'Gap between back-to-back loads below which a push-through stop is needed',
    kind: 'length',
    least: 0,
    most: 1000,
    ...sets(source(100, 'German trade page on DGUV 108-007 §4.2.3 (secondary)'), practice(100, NOT_STATED), practice(100, NOT_STATED)),
  },

  // ---------------------------------------------------------------- frames, base and stability
  levelMatch: {
    label: 'Beams of neighbouring bays count as one level within',
    kind: 'length',
    least: 0,
    most: 500,
    ...alike(practice(50, 'about one step of the uprights’ holes')),
  },
  interpolatedWarn: {
    label: 'Close begins above, for an interpolated frame rating',
    kind: 'ratio',
    least: 0,
    most: 1,
    ...alike(practice(0.95)),
  },
  imbalance: {
    label: 'Imbalance of the two bays at a frame that is pointed out',
    kind: 'percent',
    least: 0,
    most: 100,
    ...alike(practice(50)),
  },
  imbalanceUtilisation: {
    label: 'Frame utilisation above which imbalance is pointed out',
    kind: 'ratio',
    least: 0,
    most: 1,
    ...alike(practice(0.8)),
  },
  slabPairSpacing: {
    label: 'Legs count as a pair when nearer than this many slab thicknesses',
    kind: 'ratio',
    least: 0,
    most: 10,
    ...alike(practice(3, 'about 2 to 3 slab thicknesses; the safe end is taken')),
  },
  heightToDepthAnchored: {
    label: 'Height to depth up to which normal anchoring is enough',
    kind: 'ratio',
    least: 1,
    most: 20,
    ...sets(
      practice(6, 'as the UK trade association’s 1994 low-rise shelving code'),
      source(6, 'US Rack Manufacturers Institute article of 16 August 2018 on ANSI MH16.1'),
      practice(6, NOT_STATED),
    ),
  },
  heightToDepthTied: {
    label: 'Height to depth above which a tie is needed',
    kind: 'ratio',
    least: 1,
    most: 20,
    ...sets(
      practice(8, NOT_STATED),
      source(8, 'US Rack Manufacturers Institute article of 16 August 2018 on ANSI MH16.1'),
      practice(8, NOT_STATED),
    ),
  },
  anchorPullForce: {
    label: 'Sideways force at the top beam level, for the indicative anchor pull',
    kind: 'force',
    least: 0,
    most: 20_000,
    ...sets(
      practice(poundsForce(350), NOT_STATED + '; 350 lbf as an indication'),
      source(poundsForce(350), '350 lbf: US Rack Manufacturers Institute article of 16 August 2018 on ANSI MH16.1'),
      practice(poundsForce(350), NOT_STATED + '; 350 lbf as an indication'),
    ),
  },
  topHeavy: {
    label: 'Centre of mass above that of the same goods stored heavy-low that is pointed out',
    kind: 'percent',
    least: 0,
    most: 100,
    ...alike(practice(10)),
  },

  // ---------------------------------------------------------------- plumb, straightness, damage and set
  plumbUnloadedDivisor: {
    label: 'Out of plumb, unloaded: height divided by',
    kind: 'ratio',
    least: 50,
    most: 2000,
    ...sets(
      source(350, 'EN 15620:2008 §5.2 Table 2, class 400, as erected (extract)'),
      practice(240, 'this rule set states a loaded limit only; the same is taken'),
      source(500, 'AS 4084 grade 1 table as restated (secondary)'),
    ),
  },
  plumbLoadedDivisor: {
    label: 'Out of plumb, loaded: height divided by',
    kind: 'ratio',
    least: 50,
    most: 2000,
    ...sets(
      source(300, 'UK rack inspection reference note citing a trade guideline (secondary)'),
      source(240, 'ANSI MH16.1 and CSA A344 as restated in trade texts (secondary): ½ in per 10 ft'),
      practice(500, 'this rule set’s unloaded limit, as the safe side'),
    ),
  },
  damageUprightAlong: damage('Upright bent in the direction of the beams, per metre', 5),
  damageUprightAcross: damage('Upright bent in the plane of the frame bracing, per metre', 3),
  damageBracing: damage('Bracing bent, per metre', 10),
  damageRedFactor: {
    label: 'Damage is red above this many times the limit',
    kind: 'ratio',
    least: 1,
    most: 5,
    ...sets(
      source(2, 'UK storage-equipment trade association on green, amber and red risk; EN 15635 restated (secondary)'),
      practice(2, 'without effect while the limits are 0: any damage is red'),
      memory(2, AS_DAMAGE),
    ),
  },
  amberWeeks: {
    label: 'Amber damage counts as red after this many weeks',
    kind: 'count',
    least: 0,
    most: 52,
    ...sets(
      source(4, 'UK storage-equipment trade association Q&A, July 2022'),
      practice(4, 'without effect while the limits are 0: any damage is red'),
      memory(4, AS_DAMAGE),
    ),
  },
  setVertical: permanentSet('Permanent vertical set of a beam, of the deflection limit', 20),
  setHorizontal: permanentSet('Permanent horizontal set of a beam, of the deflection limit', 40),
} as const satisfies Readonly<Record<string, Rule>>;

function clearance(label: string, european: RuleDefault, unitedStatesMm: number, australianMm: number): Rule {
  return {
    label: `Clearance: ${label.toLowerCase()}`,
    kind: 'length',
    least: 0,
    most: 1000,
    ...sets(european, practice(unitedStatesMm, US_CUSTOM), source(australianMm, SOUTHERN)),
  };
}

/** No millimetres are allowed in the United States set: it asks to unload on any visible damage. */
function damage(label: string, limitMm: number): Rule {
  return {
    label,
    kind: 'length',
    least: 0,
    most: 50,
    ...sets(source(limitMm, STRAIGHTEDGE), source(0, US_DAMAGE), memory(limitMm, AS_DAMAGE)),
  };
}

function permanentSet(label: string, percent: number): Rule {
  return {
    label,
    kind: 'percent',
    least: 0,
    most: 100,
    ...sets(memory(percent, 'EN 15635 §9.7'), practice(percent, NOT_STATED), practice(percent, NOT_STATED)),
  };
}
