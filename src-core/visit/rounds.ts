/**
 * When each bay is due again, and what is to be done today. Today is an argument.
 *
 * Source: facts F-92 and F-93: a recorded visit weekly or by risk assessment, an expert's inspection at
 * most 12 months apart.
 */
import type { Bay, Id, Run, Site } from '../site/site';
import { addDays, addMonths, daysBetween } from '../units/dates';
import { isUrgent, stillOpen, type OpenAction } from './actions';
import type { FollowUp } from './follow-up';
import type { Visit } from './visit';

export interface BayDue {
  readonly runId: Id;
  readonly bayId: Id;
  /** Last finished visit and inspection of the bay; null where there was none. */
  readonly visited: string | null;
  readonly inspected: string | null;
  /** Due days; null where there was none before, which makes it due now. */
  readonly nextVisit: string | null;
  readonly nextInspection: string | null;
}

/** A bay counts as visited on the day it was finished; a yearly inspection is a visit too, but not the reverse. */
export function duesOf(site: Site, visits: readonly Visit[], { rhythm }: FollowUp): readonly BayDue[] {
  const visited = new Map<Id, string>();
  const inspected = new Map<Id, string>();
  const later = (map: Map<Id, string>, bayId: Id, day: string) => {
    if (day > (map.get(bayId) ?? '')) map.set(bayId, day);
  };
  for (const { kind, bays } of visits)
    for (const { bayId, finished, date } of bays) {
      if (!finished) continue;
      later(visited, bayId, date);
      if (kind === 'yearly') later(inspected, bayId, date);
    }
  return site.runs.flatMap((run) =>
    run.bays.map(({ id }) => {
      const visit = visited.get(id) ?? null;
      const inspection = inspected.get(id) ?? null;
      return {
        runId: run.id,
        bayId: id,
        visited: visit,
        inspected: inspection,
        nextVisit: visit === null ? null : addDays(visit, rhythm.visitDays),
        nextInspection: inspection === null ? null : addMonths(inspection, rhythm.inspectionMonths),
      };
    }),
  );
}

/** Something that the day brings: the most pressing first. */
export type TodayItem =
  | { readonly kind: 'action'; readonly action: OpenAction; readonly daysLate: number | null }
  | { readonly kind: 'resume'; readonly visit: Visit; readonly unfinished: number; readonly daysLate: number }
  | {
      readonly kind: 'visit' | 'inspection';
      readonly run: Run;
      readonly bays: readonly Bay[];
      /** Of the bay that is latest; null where one was never seen. */
      readonly daysLate: number | null;
    };

/**
 * Urgent actions, then what is due or overdue, then visits to resume, then rounds to walk. What is due
 * later is left out; so is what has no day and can wait.
 */
export function todayList(
  site: Site,
  visits: readonly Visit[],
  followUp: FollowUp,
  actions: readonly OpenAction[],
  today: string,
): readonly TodayItem[] {
  const open = stillOpen(actions);
  const urgent = open.filter(isUrgent);
  const due = open.filter((action) => !isUrgent(action) && action.overdue !== null && action.overdue >= 0);
  const dues = duesOf(site, visits, followUp);
  return [
    ...[...urgent, ...due].map((action): TodayItem => ({ kind: 'action', action, daysLate: action.overdue })),
    ...visits
      .filter(({ signed }) => signed === null)
      .map((visit): TodayItem => ({
        kind: 'resume',
        visit,
        unfinished: visit.bays.filter(({ finished }) => !finished).length,
        daysLate: visit.started === '' ? 0 : daysBetween(visit.started, today),
      })),
    ...walks(site, 'inspection', dues, today),
    ...walks(site, 'visit', dues, today),
  ];
}

/** Bays of one run that are due, as one walk. */
function walks(site: Site, kind: 'visit' | 'inspection', dues: readonly BayDue[], today: string): readonly TodayItem[] {
  const late = new Map<Id, number | null>();
  for (const one of dues) {
    const next = kind === 'visit' ? one.nextVisit : one.nextInspection;
    if (next === null) late.set(one.bayId, null);
    else if (daysBetween(next, today) >= 0) late.set(one.bayId, daysBetween(next, today));
  }
  return site.runs.flatMap((run): readonly TodayItem[] => {
    const bays = run.bays.filter(({ id }) => late.has(id));
    if (bays.length === 0) return [];
    const days = bays.map(({ id }) => late.get(id) ?? null);
    const known = days.filter((day) => day !== null);
    return [{ kind, run, bays, daysLate: known.length < days.length ? null : Math.max(...known) }];
  });
}
