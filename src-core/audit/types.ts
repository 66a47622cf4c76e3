/** What an audit gives: findings by level, bay, frame and run, each with the verdict that they make together. */
import type { CheckName, Finding, Verdict } from '../checks/finding';
import type { Id } from '../site/site';
import type { BeamAnswer, BeamEnd } from '../statics/beam';
import type { BeamLoad } from '../statics/load';

/** What the goods of a level do to its beams. Forces in N on one beam; `whole` is the pair together. */
export interface LevelEffects {
  readonly front: BeamAnswer;
  readonly rear: BeamAnswer;
  readonly whole: BeamAnswer;
  /** The intensity diagrams under which they were found, x from the left support. */
  readonly loads: { readonly front: BeamLoad; readonly rear: BeamLoad; readonly whole: BeamLoad };
  /** EI of one beam in N·mm². Where it is not known deflections are only relative. */
  readonly rigidity: number;
  readonly rigidityKnown: boolean;
  /** Both ends of both beams: sprung where the connector's stiffness and EI are known, else pinned. */
  readonly end: BeamEnd;
}

export interface LevelAudit {
  readonly levelId: Id;
  readonly verdict: Verdict;
  /** The finding that decides the verdict: the worst, and of equals the most used. */
  readonly governing: Finding | null;
  /** Goods and pallets on the level; null as soon as one mass is not known. */
  readonly totalKg: number | null;
  /** Between the supports, mm; null where it needs a frame type that is not known. */
  readonly span: number | null;
  readonly effects: LevelEffects | null;
  /** Rating of the pair that was used, kg. */
  readonly ratedKg: number | null;
  readonly findings: readonly Finding[];
}

export interface BayAudit {
  readonly bayId: Id;
  /** Of the bay's own findings, its levels' and its two frames' together. */
  readonly verdict: Verdict;
  readonly governing: Finding | null;
  /** Everything on the bay's beam levels; goods on the floor are carried by no beam. */
  readonly totalKg: number | null;
  readonly levels: readonly LevelAudit[];
  /** Findings of the bay itself. */
  readonly findings: readonly Finding[];
}

export interface FrameAudit {
  readonly frameId: Id;
  readonly verdict: Verdict;
  readonly governing: Finding | null;
  /** From the floor up. Masses in kg carried by the frame in that storey; null where one is not known. */
  readonly storeys: readonly {
    readonly fromMm: number;
    readonly toMm: number;
    readonly frontKg: number | null;
    readonly rearKg: number | null;
    readonly totalKg: number | null;
    readonly ratedKg: number | null;
  }[];
  /** Force of each leg on the floor, N. */
  readonly legFrontN: number | null;
  readonly legRearN: number | null;
  readonly findings: readonly Finding[];
}

export interface NotChecked {
  readonly check: CheckName;
  readonly reason: string;
}

export interface RunAudit {
  readonly runId: Id;
  readonly verdict: Verdict;
  readonly bays: readonly BayAudit[];
  readonly frames: readonly FrameAudit[];
  /** Findings of the run itself. */
  readonly findings: readonly Finding[];
  /** Checks that the site leaves out, each with its reason. */
  readonly notChecked: readonly NotChecked[];
}

export interface SiteAudit {
  readonly verdict: Verdict;
  readonly runs: readonly RunAudit[];
}
