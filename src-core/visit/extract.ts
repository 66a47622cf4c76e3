/**
 * The part of a site that a record is about, frozen with it: the bays, what their frames carry beside
 * them, and the library entries that they use. It is a site in its own right and can be opened as one.
 */
import type { Bay, Frame, Id, Level, Placement, Run, Site } from '../site/site';

/**
 * The bays with their neighbours on shared frames. A run keeps only a stretch that reaches from its
 * first to its last wanted bay and their neighbours, since frames stand between bays.
 * @throws RangeError if the site has none of the bays
 */
export function extractOf(site: Site, bayIds: readonly Id[]): Site {
  const wanted = new Set(bayIds);
  const runs = site.runs.flatMap((run) => stretchOf(run, wanted) ?? []);
  if (runs.length === 0) throw new RangeError(`the site has none of the bays ${JSON.stringify(bayIds)}`);
  const there = new Set(runs.map(({ id }) => id));
  const used = usedBy(runs, site);
  const kept = <T extends { readonly id: Id }>(all: readonly T[]): readonly T[] => all.filter(({ id }) => used.has(id));
  return {
    ...site,
    pallets: kept(site.pallets),
    unitLoads: kept(site.unitLoads),
    notices: kept(site.notices),
    beamTypes: kept(site.beamTypes),
    frameTypes: kept(site.frameTypes),
    floors: kept(site.floors),
    bayTemplates: [],
    // A run behind that is not in the extract cannot be named by it.
    runs: runs.map((run) => (run.backToBack !== null && !there.has(run.backToBack.runId) ? { ...run, backToBack: null } : run)),
  };
}

function stretchOf(run: Run, wanted: ReadonlySet<Id>): Run | null {
  const at = run.bays.flatMap(({ id }, index) => (wanted.has(id) ? [index] : []));
  const first = at[0];
  const last = at.at(-1);
  if (first === undefined || last === undefined) return null;
  const from = Math.max(first - 1, 0);
  const to = Math.min(last + 1, run.bays.length - 1);
  return { ...run, bays: run.bays.slice(from, to + 1), frames: run.frames.slice(from, to + 2) };
}

function usedBy(runs: readonly Run[], site: Site): ReadonlySet<Id> {
  const used = new Set<Id>();
  const use = (id: Id | null): void => void (id !== null && used.add(id));
  const usePlaced = (all: readonly Placement[]): void => all.forEach(({ unitLoadId }) => use(unitLoadId));
  const useLevel = ({ beamTypeId, placements }: Level): void => {
    use(beamTypeId);
    usePlaced(placements);
  };
  const useBay = ({ noticeId, levels, onFloor }: Bay): void => {
    use(noticeId);
    levels.forEach(useLevel);
    usePlaced(onFloor);
  };
  const useFrame = ({ typeId }: Frame): void => use(typeId);
  for (const run of runs) {
    use(run.floorId);
    run.bays.forEach(useBay);
    run.frames.forEach(useFrame);
  }
  for (const { id, palletId } of site.unitLoads) if (used.has(id)) use(palletId);
  for (const { id, beamTypeId } of site.notices) if (used.has(id)) use(beamTypeId);
  return used;
}
