/** Makes papers from the open site and what is kept beside it, checked anew for just what they are about. */
import { auditRun } from '../../src-core/audit/audit';
import type { SiteAudit } from '../../src-core/audit/types';
import { worstVerdict } from '../../src-core/checks/finding';
import { baySheet, workedCalculation } from '../../src-core/paper/bay-papers';
import { changeSheet } from '../../src-core/paper/change-sheet';
import type { PaperInput } from '../../src-core/paper/context';
import { draftNotice } from '../../src-core/paper/notice-draft';
import { offLoadSheet } from '../../src-core/paper/off-load-sheet';
import type { Paper, PaperKind } from '../../src-core/paper/paper';
import { siteRegister } from '../../src-core/paper/site-register';
import { visitReport } from '../../src-core/paper/visit-report';
import type { Id, Site } from '../../src-core/site/site';
import { actionsOf } from '../../src-core/visit/actions';
import type { Visit } from '../../src-core/visit/visit';
import { checksumOf, type Rounds } from '../state/rounds.svelte';

export interface PaperWish {
  readonly kind: PaperKind;
  readonly bayId: Id | null;
  readonly levelId: Id | null;
  readonly visitId: Id | null;
  /** The site before the change, for a change sheet. */
  readonly before: Site | null;
}

/** What a paper needs of the site that it is not about: nothing but what the page knows already. */
async function inputFor(rounds: Rounds, runIds: readonly Id[], program: string, person: string): Promise<PaperInput> {
  const { site, today } = rounds.open;
  const known = new Map(rounds.audit.runs.map((run) => [run.runId, run]));
  const runs = site.runs.map(({ id }) => (runIds.includes(id) ? undefined : known.get(id)) ?? auditRun(site, id, today()));
  const audit: SiteAudit = { verdict: worstVerdict(runs.map(({ verdict }) => verdict)), runs };
  return { site, audit, checksum: await checksumOf(site), program, today: today(), person };
}

/** The paper, or a sentence that says what is missing for it. */
export async function makePaper(rounds: Rounds, wish: PaperWish, program: string, person: string): Promise<Paper | string> {
  const { open, visits, followUp } = rounds;
  const { site } = open;
  const visit = visits.find(({ id }) => id === wish.visitId) ?? null;
  const run = site.runs.find(({ bays }) => bays.some(({ id }) => id === wish.bayId));
  if (wish.kind === 'visit-report')
    return visit === null ? 'There is no visit yet. Begin one under Visits.' : visitReportOf(rounds, visit, program, person);
  if (wish.kind === 'off-load-list' || wish.kind === 'site-register') {
    const input = await inputFor(rounds, wish.kind === 'off-load-list' ? [] : site.runs.map(({ id }) => id), program, person);
    const actions = actionsIn(rounds, input);
    return wish.kind === 'site-register' ? siteRegister(input, visits, followUp, actions) : offLoadSheet(input, actions);
  }
  if (run === undefined || wish.bayId === null) return 'Choose a bay first.';
  const input = await inputFor(rounds, [run.id], program, person);
  switch (wish.kind) {
    case 'bay-sheet':
      return baySheet(input, wish.bayId, actionsIn(rounds, input));
    case 'worked-calculation':
      return workedCalculation(input, wish.bayId, wish.levelId);
    case 'draft-notice':
      return draftNotice(input, wish.bayId, followUp.responsible);
    case 'change-sheet': {
      const { before, bayId } = wish;
      if (before === null) return 'Choose the state before the change.';
      if (!before.runs.some(({ bays }) => bays.some(({ id }) => id === bayId)))
        return 'The bay was not there yet in the state before the change.';
      return changeSheet(input, before, bayId);
    }
  }
}

const actionsIn = ({ visits, followUp }: Rounds, { site, audit, today }: PaperInput) => actionsOf({ site, audit, visits, followUp, today });

export async function visitReportOf(rounds: Rounds, visit: Visit, program: string, person: string): Promise<Paper> {
  const runIds = [...new Set(visit.bays.map(({ runId }) => runId))];
  const input = await inputFor(rounds, runIds, program, person);
  return visitReport(input, visit, actionsIn(rounds, input));
}
