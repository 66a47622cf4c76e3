/** The goods of one level as the core lays them on its beams, for showing the load in its parts. */
import { contextOf, type LevelWork } from '../../src-core/audit/context';
import { bayContents, type BayFrame } from '../../src-core/audit/level-work';
import type { Bay, Level, Run, Site } from '../../src-core/site/site';

export function levelWorkOf(site: Site, run: Run, bay: Bay, level: Level): LevelWork | null {
  const context = contextOf(site, '');
  const index = run.bays.indexOf(bay);
  const frame = (at: number): BayFrame | null => {
    const found = run.frames[at];
    return found ? { frame: found, type: context.frameTypes.get(found.typeId ?? '') ?? null } : null;
  };
  const [left, right] = [frame(index), frame(index + 1)];
  if (left === null || right === null) return null;
  const { levels } = bayContents(context, { runId: run.id, bayId: bay.id }, bay, [left, right]);
  return levels.find((work) => work.level.id === level.id) ?? null;
}
