/** Findings in order of weight, and by where they belong. */
import type { BayAudit, FrameAudit, LevelAudit, RunAudit } from '../../src-core/audit/types';
import { compareFindings } from '../../src-core/audit/verdict';
import type { CheckName, Finding, Missing } from '../../src-core/checks/finding';
import type { Id, Run } from '../../src-core/site/site';
import { CHECK_WORDS } from '../../src-core/words/check-names';

/** Heaviest first. */
export const byWeight = (findings: readonly Finding[]): readonly Finding[] => findings.toSorted(compareFindings);

/** Checks of goods that are made for the floor of a bay as for a level; there no level names them. */
const ALSO_ON_FLOOR: ReadonlySet<CheckName> = new Set([
  'placement',
  'goods-form',
  'overhang',
  'clearance-along',
  'clearance-above',
  'clearance-across',
]);

/** Name of the finding: its check, and the member it was made on. */
export function titleOf({ check, place }: Finding): string {
  const onFloor = place.bayId !== undefined && place.levelId === undefined && place.frameId === undefined && ALSO_ON_FLOOR.has(check);
  const where = [
    place.beam && `${place.beam} beam`,
    place.end && `${place.end} end`,
    place.post && `${place.post} post`,
    onFloor ? 'on the floor' : undefined,
  ].filter((part) => part !== undefined);
  const name = CHECK_WORDS[check].name;
  return where.length > 0 ? `${name}, ${where.join(', ')}` : name;
}

/** Tells findings of one audit apart, for keyed lists that keep what was opened open. */
export function keyOf({ check, place }: Finding, index: number): string {
  return [check, place.levelId, place.placementId, place.frameId, place.bayId, place.beam, place.end, place.post, index].join('|');
}

export interface FindingGroup {
  readonly heading: string;
  readonly findings: readonly Finding[];
  /** The same findings with their calculations, where `findings` have none. Asked for only where they are written out. */
  readonly whole?: () => readonly Finding[];
}

export interface Audits {
  readonly run: RunAudit | null;
  readonly bay: BayAudit | null;
  readonly level: LevelAudit | null;
  readonly frames: readonly (FrameAudit | null)[];
  readonly frameName: (frameId: Id) => string;
}

/** What stands beside the drawing: the chosen level first, then its bay, its two frames, and the run. */
export function groupsOf({ run, bay, level, frames, frameName }: Audits, levelName: string): readonly FindingGroup[] {
  const groups = [
    { heading: levelName, findings: level?.findings ?? [] },
    { heading: 'This bay', findings: bay?.findings ?? [] },
    ...frames.flatMap((frame) => (frame ? [{ heading: `Frame ${frameName(frame.frameId)}`, findings: frame.findings }] : [])),
    { heading: 'The run', findings: run?.findings ?? [] },
  ];
  return groups.filter((group) => group.findings.length > 0).map((group) => ({ ...group, findings: byWeight(group.findings) }));
}

/** Frames and bays of the run with every calculation; null where the audit of one broke down. */
export interface Whole {
  readonly frame: (frameId: Id) => FrameAudit | null;
  readonly bay: (bayId: Id) => BayAudit | null;
}

/** Beside the run's elevation: the chosen frame, every other frame that is not within, what bays and run say of themselves. */
export function runGroups(run: Run, audit: RunAudit, chosenFrameId: Id | null, whole: Whole): readonly FindingGroup[] {
  const nameOf = new Map(run.frames.map(({ id, name }) => [id, name]));
  const frames = audit.frames
    .filter((frame) => frame.frameId === chosenFrameId || (chosenFrameId === null && frame.verdict !== 'within'))
    .map(({ frameId, findings }) => ({
      heading: `Frame ${nameOf.get(frameId) ?? ''}`,
      findings,
      whole: () => byWeight(whole.frame(frameId)?.findings ?? findings),
    }));
  const index = run.frames.findIndex(({ id }) => id === chosenFrameId);
  const beside = chosenFrameId === null ? run.bays : run.bays.slice(Math.max(0, index - 1), index + 1);
  const told = ({ verdict }: Finding) => chosenFrameId !== null || verdict !== 'within';
  const audits = new Map(audit.bays.map((bay) => [bay.bayId, bay]));
  const bays = beside.map(({ id, name }) => {
    const findings = audits.get(id)?.findings.filter(told) ?? [];
    return { heading: `Bay ${name}`, findings, whole: () => byWeight(whole.bay(id)?.findings.filter(told) ?? findings) };
  });
  const own = { heading: 'The run', findings: byWeight(audit.findings) };
  return [...frames, own, ...bays].filter((group) => group.findings.length > 0);
}

/** What is missing, each input once, in the order in which findings ask for it, with the checks that wait for it. */
export function missingOf(groups: readonly FindingGroup[]): readonly (Missing & { readonly checks: readonly string[] })[] {
  const byField = new Map<string, Missing & { checks: string[] }>();
  for (const { check, missing } of groups.flatMap((group) => group.findings)) {
    for (const one of missing) {
      const known = byField.get(one.field) ?? { ...one, checks: [] };
      const name = CHECK_WORDS[check].name;
      if (!known.checks.includes(name)) known.checks.push(name);
      byField.set(one.field, known);
    }
  }
  return [...byField.values()];
}
