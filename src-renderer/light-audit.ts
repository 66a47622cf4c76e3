/**
 * Findings without what is read only on demand: the worked calculations and the beams' own answers.
 * A large site's findings are then small enough to cross from the worker and to be kept.
 */
import type { BayAudit, FrameAudit, LevelAudit, RunAudit } from '../src-core/audit/types';
import type { Finding } from '../src-core/checks/finding';

const lightened = new WeakMap<object, object>();

/** The same light part for the same part, so that what did not change is still told by identity. */
function once<T extends object>(part: T, make: (part: T) => T): T {
  const known = lightened.get(part);
  if (known !== undefined) return known as T;
  const made = make(part);
  lightened.set(part, made);
  return made;
}

/** Part by part: a copy of all would write the calculation only to drop it, and that is most of the work. */
const lightFinding = (finding: Finding): Finding =>
  once(finding, ({ check, place, verdict, utilisation, demand, allowed, says, missing, notes, counts }) => ({
    ...{ check, place, verdict, utilisation, demand, allowed, says, missing, notes, counts },
    worked: [],
  }));

const lightFindings = (findings: readonly Finding[]): readonly Finding[] => findings.map(lightFinding);

const lightGoverning = (governing: Finding | null): Finding | null => governing && lightFinding(governing);

const lightLevel = (level: LevelAudit): LevelAudit =>
  once(level, () => ({
    ...level,
    governing: lightGoverning(level.governing),
    effects: null,
    findings: lightFindings(level.findings),
  }));

export const lightBay = (bay: BayAudit): BayAudit =>
  once(bay, () => ({
    ...bay,
    governing: lightGoverning(bay.governing),
    levels: bay.levels.map(lightLevel),
    findings: lightFindings(bay.findings),
  }));

const lightFrame = (frame: FrameAudit): FrameAudit =>
  once(frame, () => ({ ...frame, governing: lightGoverning(frame.governing), findings: lightFindings(frame.findings) }));

/** The run's own findings are few and keep their calculations. */
export const lightRun = (run: RunAudit): RunAudit => ({ ...run, bays: run.bays.map(lightBay), frames: run.frames.map(lightFrame) });
