/** Levels and runs of a test's racks, audited, and what a test looks for in them. */
import { auditRun } from '../../../src-core/audit/audit';
import type { BayAudit, FrameAudit, LevelAudit, RunAudit } from '../../../src-core/audit/types';
import type { CheckName, Finding } from '../../../src-core/checks/finding';
import type { Site } from '../../../src-core/site/site';
import { rack, type Rack } from './rack';

/** The lowest level of the rack's one bay. */
export function auditedLevel(change: Rack): LevelAudit {
  const found = auditedRun(rack(change)).bays[0]?.levels[0];
  if (found === undefined) throw new Error('no level audited');
  return found;
}

/** @throws if the check was not made there */
export function findingOf(audited: { readonly findings: readonly Finding[] } | undefined, check: CheckName): Finding {
  const found = audited?.findings.find((one) => one.check === check);
  if (found === undefined) throw new Error(`${check} not made`);
  return found;
}

/** A run of the site, audited on one day of all these tests. */
export const auditedRun = (site: Site, runId = 'run'): RunAudit => auditRun(site, runId, '2026-06-01');

export const frameOf = (audited: RunAudit, index: number): FrameAudit => {
  const found = audited.frames[index];
  if (found === undefined) throw new Error(`no frame ${index}`);
  return found;
};
export const bayOf = (audited: RunAudit, index = 0): BayAudit => {
  const found = audited.bays[index];
  if (found === undefined) throw new Error(`no bay ${index}`);
  return found;
};
