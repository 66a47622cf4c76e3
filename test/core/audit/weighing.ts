/** Goods of any mass in place of a placement's own, and whether everything about them is within; audited whole, from outside. */
import { auditRun } from '../../../src-core/audit/audit';
import { verdictOfFindings } from '../../../src-core/audit/verdict';
import type { Bay, Id, Level, Placement, Run, Site, UnitLoad } from '../../../src-core/site/site';

export const withLevels = (site: Site, change: (one: Level) => Level): Site => ({
  ...site,
  runs: site.runs.map((run) => ({ ...run, bays: run.bays.map((bay) => ({ ...bay, levels: bay.levels.map(change) })) })),
});

const holds =
  (placementId: Id) =>
  ({ placements }: Level): boolean =>
    placements.some(({ id }) => id === placementId);

/** The same site with this placement's goods as an entry of their own that weighs so much, pallet included. */
export function weighing(site: Site, placementId: Id, grossKg: number): Site {
  const levels = site.runs.flatMap(({ bays }) => bays.flatMap((bay) => bay.levels));
  const placement = levels.flatMap(({ placements }) => placements).find(({ id }) => id === placementId);
  const shape = site.unitLoads.find(({ id }) => id === placement?.unitLoadId);
  if (shape === undefined) throw new Error(`no placement ${placementId}`);
  const palletKg = site.pallets.find(({ id }) => id === shape.palletId)?.massKg ?? 0;
  const own: UnitLoad = { ...shape, id: 'own', goodsKg: grossKg - palletKg };
  const swap = (one: Placement): Placement => (one.id === placementId ? { ...one, unitLoadId: 'own' } : one);
  return withLevels({ ...site, unitLoads: [...site.unitLoads, own] }, (one) => ({ ...one, placements: one.placements.map(swap) }));
}

/** Level, bay, both frames and the room of the goods under these beams. */
export function passes(site: Site, placementId: Id, today: string): boolean {
  const run = site.runs.find(({ bays }) => bays.some(({ levels }) => levels.some(holds(placementId)))) as Run;
  const audit = auditRun(site, run.id, today);
  const index = run.bays.findIndex(({ levels }) => levels.some(holds(placementId)));
  const bay = audit.bays[index];
  const at = (run.bays[index] as Bay).levels.findIndex(holds(placementId));
  const under = bay?.levels[at - 1]?.findings.filter(({ check }) => check === 'clearance-above') ?? [];
  const frames = audit.frames.slice(index, index + 2).flatMap(({ findings }) => findings);
  const verdict = verdictOfFindings([...(bay?.levels[at]?.findings ?? []), ...under, ...(bay?.findings ?? []), ...frames]);
  return verdict === 'within' || verdict === 'close';
}
