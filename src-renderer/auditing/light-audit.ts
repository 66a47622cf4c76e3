/**
 * Findings without what is read only on demand: the worked calculations and the beams' own answers.
 * A large site's findings are then small enough to cross from the worker and to be kept.
 */
import type { BayAudit, FrameAudit, LevelAudit, RunAudit } from '../../src-core/audit/types';
import type { Finding } from '../../src-core/checks/finding';

/** Bays and frames only: with an entry for every finding of a large site, clearing memory took longer than checking. */
const lightened = new WeakMap<object, object>();

/** The same light part for the same part, so that what did not change is still told by identity. */
function once<T extends object>(part: T, make: (part: T) => T): T {
  const known = lightened.get(part);
  if (known !== undefined) return known as T;
  const made = make(part);
  lightened.set(part, made);
  return made;
}

/**
 * Part by part: a copy of all would write the calculation only to drop it, and that is most of the work.
 * The notes of levels work out every worst case, and the chosen level is audited whole where it is shown.
 */
function lightFinding(finding: Finding): Finding {
  const { check, place, verdict, utilisation, demand, allowed, says, missing, counts } = finding;
  const notes = place.levelId === undefined ? finding.notes : [];
  return { check, place, verdict, utilisation, demand, allowed, says, missing, counts, notes, worked: [] };
}

/** Makes each finding light once, as the governing one stands among the others as well. */
function lightener(): (finding: Finding) => Finding {
  const made = new Map<Finding, Finding>();
  return (finding) => {
    const known = made.get(finding) ?? lightFinding(finding);
    made.set(finding, known);
    return known;
  };
}

const lightLevel = (level: LevelAudit, light: (finding: Finding) => Finding): LevelAudit => ({
  ...level,
  governing: level.governing && light(level.governing),
  effects: null,
  findings: level.findings.map(light),
});

export const lightBay = (bay: BayAudit): BayAudit =>
  once(bay, () => {
    const light = lightener();
    return {
      ...bay,
      governing: bay.governing && light(bay.governing),
      levels: bay.levels.map((level) => lightLevel(level, light)),
      findings: bay.findings.map(light),
    };
  });

const lightFrame = (frame: FrameAudit): FrameAudit =>
  once(frame, () => {
    const light = lightener();
    return { ...frame, governing: frame.governing && light(frame.governing), findings: frame.findings.map(light) };
  });

/** The run's own findings are few and keep their calculations. */
export const lightRun = (run: RunAudit): RunAudit => ({ ...run, bays: run.bays.map(lightBay), frames: run.frames.map(lightFrame) });
