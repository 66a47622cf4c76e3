/**
 * A visit: what was seen at the rack, of one bay or a round of many, kept in a file of its own beside
 * the site. Nothing here is judged; classes and actions are found from it.
 *
 * Plain readonly data, every key always present. Lengths in mm; `null` means "not measured". Bays,
 * frames and levels are named by the site's ids. Dates are ISO days, empty where none was given yet.
 */
import type { Id } from '../site/site';

/** What is looked at in every bay, in the order in which one walks past it. */
export const CHECKLIST = ['locks', 'anchors', 'notices', 'protectors', 'pallets', 'decks', 'plumb', 'floor'] as const;
export type ChecklistItem = (typeof CHECKLIST)[number];

/** "yes" = as it must be. What was not looked at is neither yes nor no. */
export type Seen = 'yes' | 'no' | 'not-looked-at';

/** What makes the round necessary: its own rhythm, the yearly inspection, or something that happened. */
export const VISIT_KINDS = ['weekly', 'yearly', 'event'] as const;
export type VisitKind = (typeof VISIT_KINDS)[number];

export interface Visit {
  readonly id: Id;
  readonly siteId: Id;
  readonly name: string;
  readonly kind: VisitKind;
  /** Who walks the round. */
  readonly person: string;
  readonly started: string;
  readonly signed: SignOff | null;
  /** In the order of the walk. */
  readonly bays: readonly BayVisit[];
}

export interface SignOff {
  readonly person: string;
  /** What the person is, in their own words: "person responsible for storage equipment". */
  readonly role: string;
  readonly date: string;
}

export interface BayVisit {
  readonly runId: Id;
  readonly bayId: Id;
  /** Finished by whoever looked; an unfinished one is resumed. */
  readonly finished: boolean;
  readonly person: string;
  readonly date: string;
  readonly checklist: Readonly<Record<ChecklistItem, Seen>>;
  readonly missingLocks: readonly MissingLock[];
  readonly notice: NoticeSeen;
  readonly damages: readonly SeenDamage[];
  readonly sags: readonly SagReading[];
  readonly plumb: readonly PlumbSeen[];
  readonly photos: readonly Photo[];
  readonly notes: string;
  /** What finishing put into the site; null before that, and where an earlier program finished it, which carried no beams. */
  readonly carried: Carried | null;
}

/** What a bay's visit put into the site, as it was when it did. */
export interface Carried {
  /** Those that the site did not know before. */
  readonly damages: readonly SeenDamage[];
  readonly sags: readonly SagReading[];
}

export interface MissingLock {
  readonly levelId: Id;
  readonly beam: 'front' | 'rear';
  readonly end: 'left' | 'right';
}

/** The load notice at the bay, and the rack measured against it. */
export interface NoticeSeen {
  readonly there: Seen;
  /** The right one for this bay, and legible. */
  readonly matches: Seen;
  /** Floor to the top of the first beam, the greatest gap from beam to beam, and how many levels there are. */
  readonly firstBeamMm: number | null;
  readonly greatestGapMm: number | null;
  readonly levels: number | null;
  /** All beams of the type that the notice is for. */
  readonly beams: Seen;
  readonly note: string;
}

export const FRAME_MEMBERS = ['upright-front', 'upright-rear', 'bracing', 'base-plate'] as const;
export const BEAM_MEMBERS = ['beam', 'connector'] as const;
export type FrameMember = (typeof FRAME_MEMBERS)[number];
export type BeamMember = (typeof BEAM_MEMBERS)[number];

interface DamageSeen {
  readonly id: Id;
  /** Dent, buckle, tear, split or cracked weld: never judged by millimetres. */
  readonly torn: boolean;
  readonly note: string;
  /** The day on which it was first found; its clock runs from there. */
  readonly found: string;
}

/** A frame member's bow over the gauge length, along the beams and in the plane of the frame. */
export interface FrameDamage extends DamageSeen {
  readonly on: 'frame';
  readonly frameId: Id;
  readonly member: FrameMember;
  readonly alongMm: number | null;
  readonly acrossMm: number | null;
  readonly gaugeMm: number;
}

/** A beam's or connector's damage that is no sag: sag is measured as `SagReading`. */
export interface BeamDamage extends DamageSeen {
  readonly on: 'beam';
  readonly levelId: Id;
  readonly beam: 'front' | 'rear';
  readonly member: BeamMember;
}

export type SeenDamage = FrameDamage | BeamDamage;

/** One beam's sag at mid-span below the line through its ends; unloaded it is the permanent set. */
export interface SagReading {
  readonly levelId: Id;
  readonly beam: 'front' | 'rear';
  readonly loadedMm: number | null;
  readonly unloadedMm: number | null;
  /** Permanent set sideways, unloaded. */
  readonly sidewaysMm: number | null;
}

export interface PlumbSeen {
  readonly frameId: Id;
  /** Offset at `heightMm`, along the run and across it. */
  readonly alongMm: number;
  readonly acrossMm: number;
  readonly heightMm: number;
  readonly loaded: boolean;
}

export interface Photo {
  readonly id: Id;
  /** Name under which the file is kept with the site. */
  readonly file: string;
  /** Its name where it came from, and that file's time as ISO text; empty where it has none. */
  readonly original: string;
  readonly taken: string;
  readonly note: string;
}

const UNSEEN: Readonly<Record<ChecklistItem, Seen>> = {
  locks: 'not-looked-at',
  anchors: 'not-looked-at',
  notices: 'not-looked-at',
  protectors: 'not-looked-at',
  pallets: 'not-looked-at',
  decks: 'not-looked-at',
  plumb: 'not-looked-at',
  floor: 'not-looked-at',
};

/** A bay before anybody has looked at it. */
export const unseenBay = (runId: Id, bayId: Id): BayVisit => ({
  runId,
  bayId,
  finished: false,
  person: '',
  date: '',
  checklist: UNSEEN,
  missingLocks: [],
  notice: {
    there: 'not-looked-at',
    matches: 'not-looked-at',
    firstBeamMm: null,
    greatestGapMm: null,
    levels: null,
    beams: 'not-looked-at',
    note: '',
  },
  damages: [],
  sags: [],
  plumb: [],
  photos: [],
  notes: '',
  carried: null,
});

export interface VisitStart {
  readonly id: Id;
  readonly siteId: Id;
  readonly name: string;
  readonly kind: VisitKind;
  readonly person: string;
  readonly started: string;
  readonly bays: readonly { readonly runId: Id; readonly bayId: Id }[];
}

export const startVisit = ({ bays, ...start }: VisitStart): Visit => ({
  ...start,
  signed: null,
  bays: bays.map(({ runId, bayId }) => unseenBay(runId, bayId)),
});
