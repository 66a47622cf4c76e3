/**
 * What the checks of an audit are given of the site: libraries by id, the rules in force, and each
 * bay with its goods resolved and its beams solved, once, for every check to read.
 *
 * Checks join in through four functions, which `audit.ts` calls and which leave out what is not asked:
 *   geometry.ts    levelFindings(context, bay, level) → Finding[]
 *   bay-checks.ts  bayFindings(context, bay) → Finding[], runFindings(context, run) → Finding[]
 *   frame.ts       frameAudit(context, frame) → FrameAudit
 */
import type { CheckName, Missing, Place } from '../checks/finding';
import { resolveRules, type ResolvedRules } from '../checks/rule-sets';
import type { Bay, BeamType, Floor, Frame, FrameType, Id, Level, LoadNotice, Pallet, Placement, Run, Site, UnitLoad } from '../site/site';
import type { BeamLoad } from '../statics/load';
import type { FrameAudit, LevelEffects } from './types';

export interface SiteContext {
  readonly site: Site;
  /** ISO date of the audit, for clocks such as that of amber damage. */
  readonly today: string;
  readonly rules: ResolvedRules;
  readonly leftOut: ReadonlyMap<CheckName, string>;
  readonly pallets: ReadonlyMap<Id, Pallet>;
  readonly unitLoads: ReadonlyMap<Id, UnitLoad>;
  readonly notices: ReadonlyMap<Id, LoadNotice>;
  readonly beamTypes: ReadonlyMap<Id, BeamType>;
  readonly frameTypes: ReadonlyMap<Id, FrameType>;
  readonly floors: ReadonlyMap<Id, Floor>;
  readonly runs: ReadonlyMap<Id, Run>;
}

/** A unit load with its pallet, weighed and laid out along the beam. */
export interface GoodsWork {
  readonly unitLoad: UnitLoad;
  readonly pallet: Pallet | null;
  readonly goodsKg: number | null;
  readonly palletKg: number | null;
  readonly grossKg: number | null;
  /** Where the mass came from, in words. */
  readonly from: string;
  /** N, x in mm from the unit load's own left edge; null where a mass is not known or the shape cannot be. */
  readonly pieces: BeamLoad | null;
  /** Centre of mass of goods and pallet in front of the unit load's own middle, mm. */
  readonly centreTowardsFrontMm: number;
  /** What must be entered or mended before `grossKg` and `pieces` are known. */
  readonly missing: readonly Missing[];
}

export interface StandingLoad {
  readonly placement: Placement;
  readonly goods: GoodsWork;
  /** Outline along the bay, mm from the left upright's face. */
  readonly fromMm: number;
  readonly toMm: number;
  /** Outline across the rack, mm in front of the middle of the pair of beams; `rearMm < frontMm`. */
  readonly rearMm: number;
  readonly frontMm: number;
  /** Centre of mass in front of the middle of the pair, mm. */
  readonly centreMm: number;
  /** Share carried by the front beam; null where the distance of the beams is needed and not known. */
  readonly frontShare: number | null;
}

export interface LevelWork {
  readonly level: Level;
  /** 0 for the lowest beam level. */
  readonly index: number;
  readonly place: Place;
  readonly beamType: BeamType | null;
  readonly goods: readonly StandingLoad[];
  /** Between the supports, mm; null where it needs a frame type that is not known. */
  readonly span: number | null;
  /** From the left support to the left upright's face, mm; null where the span is. */
  readonly offset: number | null;
  /** Between the middles of the two beams, mm; null where the frame type is not known. */
  readonly beamDistance: number | null;
  readonly totalKg: number | null;
  /** Null where goods, masses or shares are not known, or the goods cannot stand so. */
  readonly effects: LevelEffects | null;
  /** What must be known for `effects`; empty where they are there or the goods cannot stand so. */
  readonly missing: readonly Missing[];
}

export interface BayWork {
  readonly run: Run;
  readonly bay: Bay;
  /** Place in the run; frame `index` stands to its left and frame `index + 1` to its right. */
  readonly index: number;
  readonly place: Place;
  readonly notice: LoadNotice | null;
  /** The notice and where it came from, in words. */
  readonly noticeFrom: string;
  readonly frames: readonly [left: Frame, right: Frame];
  readonly frameTypes: readonly [left: FrameType | null, right: FrameType | null];
  readonly levels: readonly LevelWork[];
  /** Goods on the floor: geometry only. */
  readonly onFloor: readonly StandingLoad[];
}

export interface FrameWork {
  readonly run: Run;
  readonly frame: Frame;
  readonly index: number;
  readonly place: Place;
  readonly type: FrameType | null;
  /** Bay to the left of the frame and bay to its right; null at the ends of the run. */
  readonly left: BayWork | null;
  readonly right: BayWork | null;
  /**
   * Frames of the run behind that stand against this one: its counterpart, or all of them where the two
   * runs do not mirror each other; none where no run is behind.
   */
  readonly behind: () => readonly FrameWork[];
}

export interface RunWork {
  readonly run: Run;
  readonly place: Place;
  readonly frames: readonly FrameAudit[];
}

export function contextOf(site: Site, today: string): SiteContext {
  const byId = <T extends { readonly id: Id }>(all: readonly T[]) => new Map(all.map((one) => [one.id, one]));
  return {
    site,
    today,
    rules: resolveRules(site.rules),
    leftOut: new Map(site.rules.leftOut.map(({ check, reason }) => [check, reason])),
    pallets: byId(site.pallets),
    unitLoads: byId(site.unitLoads),
    notices: byId(site.notices),
    beamTypes: byId(site.beamTypes),
    frameTypes: byId(site.frameTypes),
    floors: byId(site.floors),
    runs: byId(site.runs),
  };
}

/** Whether the site asks for this check; one left out is not run and stands in the audit's `notChecked`. */
export const asked = (context: SiteContext, check: CheckName): boolean => !context.leftOut.has(check);
