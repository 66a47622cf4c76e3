/** What is asked at a bay, and how damage, actions and records are called. */
import type { DamageClass } from '../checks/damage-class';
import type { ActionKind } from '../visit/actions';
import type { RecordKind } from '../visit/records';
import type { BeamMember, ChecklistItem, FrameMember, Seen, VisitKind } from '../visit/visit';

export interface QuestionWords {
  readonly name: string;
  /** Answered "yes" where all is as it must be. */
  readonly asks: string;
}

export const CHECKLIST_WORDS: Readonly<Record<ChecklistItem, QuestionWords>> = {
  locks: { name: 'Beam locks', asks: 'Is every beam end connector held by its lock?' },
  anchors: { name: 'Floor anchors', asks: 'Is every base plate anchored to the floor, no anchor loose or missing?' },
  notices: { name: 'Load notice', asks: 'Is the load notice there, legible and the one for this bay?' },
  protectors: { name: 'Upright protectors', asks: 'Are the upright protectors there and sound?' },
  pallets: { name: 'Pallets and goods', asks: 'Are pallets whole and goods stable, standing where they should?' },
  decks: { name: 'Decks and support bars', asks: 'Are decks and support bars whole and in place?' },
  plumb: { name: 'Plumb', asks: 'Do the uprights look plumb and straight?' },
  floor: { name: 'Floor', asks: 'Is the floor sound and level under the base plates?' },
};

export const SEEN_WORDS: Readonly<Record<Seen, string>> = { yes: 'Yes', no: 'No', 'not-looked-at': 'Not looked at' };

export const VISIT_KIND_WORDS: Readonly<Record<VisitKind, { readonly name: string; readonly means: string }>> = {
  weekly: { name: 'Regular visit', means: 'The recorded visit in the site’s own rhythm, weekly unless a risk assessment says otherwise.' },
  yearly: { name: 'Expert’s inspection', means: 'By a technically competent person, at most 12 months after the last one.' },
  event: { name: 'Visit after an event', means: 'After an impact, an earthquake, a flood, a move or a change of the rack.' },
};

export const FRAME_MEMBER_WORDS: Readonly<Record<FrameMember, string>> = {
  'upright-front': 'Front upright',
  'upright-rear': 'Rear upright',
  bracing: 'Bracing',
  'base-plate': 'Base plate',
};

export const BEAM_MEMBER_WORDS: Readonly<Record<BeamMember, string>> = { beam: 'Beam', connector: 'Beam end connector' };

/** The classes of the inspection standard. "Not classed" is treated as red. */
export const DAMAGE_CLASS_WORDS: Readonly<Record<DamageClass, { readonly word: string; readonly means: string }>> = {
  green: { word: 'Green', means: 'Within the limit: record it and measure it again.' },
  amber: { word: 'Amber', means: 'Beyond the limit: do not reload what is emptied, and have it repaired before its day.' },
  red: { word: 'Red', means: 'Unload at once and keep it empty until it is repaired with the maker’s parts.' },
  unclassed: { word: 'Not classed', means: 'Something is not known: treat it as red until it is.' },
};

export const ACTION_WORDS: Readonly<Record<ActionKind, string>> = {
  unload: 'Unload at once',
  'out-of-use': 'Take out of use',
  'replace-lock': 'Replace lock at once',
  'do-not-reload': 'Do not reload',
  're-plumb': 'Plumb',
  notice: 'Load notice',
  'put-right': 'Put right',
  watch: 'Watch',
};

export const RECORD_WORDS: Readonly<Record<RecordKind, string>> = { check: 'Check', visit: 'Visit', paper: 'Paper' };
