/** The figures of a bay's check as a record keeps them: verdicts and numbers, without sentences and worked lines. */
import type { BayAudit, FrameAudit } from '../audit/types';
import type { CheckName, Finding, Verdict } from '../checks/finding';
import type { Id } from '../site/site';

interface CheckFigure {
  readonly check: CheckName;
  readonly verdict: Verdict;
  readonly counts: boolean;
  readonly utilisation: number | null;
  readonly demand: Finding['demand'];
  readonly allowed: Finding['allowed'];
}

export interface CheckFigures {
  readonly verdict: Verdict;
  readonly totalKg: number | null;
  readonly levels: readonly {
    readonly levelId: Id;
    readonly verdict: Verdict;
    readonly totalKg: number | null;
    readonly ratedKg: number | null;
    readonly findings: readonly CheckFigure[];
  }[];
  readonly frames: readonly { readonly frameId: Id; readonly verdict: Verdict; readonly findings: readonly CheckFigure[] }[];
  readonly findings: readonly CheckFigure[];
}

export const checkFigures = (bay: BayAudit, frames: readonly FrameAudit[]): CheckFigures => ({
  verdict: bay.verdict,
  totalKg: bay.totalKg,
  levels: bay.levels.map(({ levelId, verdict, totalKg, ratedKg, findings }) => ({
    levelId,
    verdict,
    totalKg,
    ratedKg,
    findings: findings.map(figure),
  })),
  frames: frames.map(({ frameId, verdict, findings }) => ({ frameId, verdict, findings: findings.map(figure) })),
  findings: bay.findings.map(figure),
});

const figure = ({ check, verdict, counts, utilisation, demand, allowed }: Finding): CheckFigure => ({
  check,
  verdict,
  counts,
  utilisation,
  demand,
  allowed,
});
