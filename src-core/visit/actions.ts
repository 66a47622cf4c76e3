/**
 * What is to be done about what was found, with its day: from the damages recorded in the site and from
 * the visits. Who closed what, and what an engineer allows meanwhile, comes from the follow-up.
 *
 * Source: facts M-28 and F-83 to F-90. "Both bays of the frame" is common practice.
 */
import type { SiteAudit } from '../audit/types';
import type { DamageClass } from '../checks/damage-class';
import type { Text } from '../checks/finding';
import { daysBetween } from '../units/dates';
import type { Id, Site } from '../site/site';
import { visitActions } from './bay-actions';
import { beamActions } from './beam-actions';
import { closingOf, type Closing, type FollowUp, type Reduction } from './follow-up';
import { damageActions } from './frame-actions';
import type { Visit } from './visit';

/** In order of urgency. */
export const ACTION_KINDS = [
  /** Empty the levels now, bar them, and do not use them again before the repair. */
  'unload',
  /** Take the beams of the level out of use. */
  'out-of-use',
  'replace-lock',
  /** Do not reload the levels once they are emptied, and have it repaired by the day. */
  'do-not-reload',
  /** Straighten an upright that is out of plumb. */
  're-plumb',
  /** No notice, or one that does not describe the bay: nothing here is rated. */
  'notice',
  'put-right',
  /** Record and measure again at the next inspection. */
  'watch',
] as const;
export type ActionKind = (typeof ACTION_KINDS)[number];

export interface LevelRef {
  readonly runId: Id;
  readonly bayId: Id;
  readonly levelId: Id;
}

export interface Action {
  /** The same as long as it is the same finding; a finding that comes back after it was closed is a new one. */
  readonly id: string;
  readonly kind: ActionKind;
  /** Of damage; null for everything else. */
  readonly class: DamageClass | null;
  readonly says: Text;
  readonly runId: Id;
  /** The frame that it is about; null where it is about a bay. */
  readonly frameId: Id | null;
  readonly bayIds: readonly Id[];
  /** Levels to unload, or not to reload. */
  readonly levels: readonly LevelRef[];
  /** ISO date; empty where it is not known. */
  readonly found: string;
  /** Last day for it; null where it is to be done at once, or where no day is set. */
  readonly due: string | null;
}

export interface OpenAction extends Action {
  /** Days since it was found; null where that day is not known. */
  readonly age: number | null;
  /** Days that the due day is past; 0 or less while it is not. Null without a due day. */
  readonly overdue: number | null;
  readonly closed: Closing | null;
  /** What an engineer allows meanwhile, and whether that still holds. */
  readonly reductions: readonly { readonly reduction: Reduction; readonly holds: boolean }[];
}

/** What must be done at once, without any day of grace. */
export const isUrgent = ({ kind }: Action): boolean => kind === 'unload' || kind === 'out-of-use' || kind === 'replace-lock';

export interface ActionInput {
  readonly site: Site;
  /** Of the same site: sags and plumb readings are judged by what it knows of the racks. */
  readonly audit: SiteAudit;
  readonly visits: readonly Visit[];
  readonly followUp: FollowUp;
  /** ISO date. */
  readonly today: string;
}

/**
 * Every action, open and closed: the most urgent first, of these the oldest. Only finished bays of
 * visits count; what is seen at an unfinished one is not yet said.
 */
export function actionsOf(input: ActionInput): readonly OpenAction[] {
  const { followUp, today } = input;
  const byVisits = visitActions(input);
  const actions = [...damageActions(input), ...beamActions(input, byVisits.sagsSince), ...byVisits.actions];
  return actions
    .map((action): OpenAction => ({
      ...action,
      age: action.found === '' ? null : daysBetween(action.found, today),
      overdue: action.due === null ? null : daysBetween(action.due, today),
      closed: closingOf(followUp, action.id),
      reductions: followUp.reductions
        .filter(({ frameId }) => frameId === action.frameId)
        .map((reduction) => ({ reduction, holds: daysBetween(today, reduction.until) >= 0 })),
    }))
    .sort((a, b) => ACTION_KINDS.indexOf(a.kind) - ACTION_KINDS.indexOf(b.kind) || (b.age ?? Infinity) - (a.age ?? Infinity));
}

export const stillOpen = (actions: readonly OpenAction[]): readonly OpenAction[] => actions.filter(({ closed }) => closed === null);
