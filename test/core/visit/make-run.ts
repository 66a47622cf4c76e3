/** A run of bays with goods, for visits, records and paper; ids are names that can be read. */
import { addEntry, addRun } from '../../../src-core/site/edits';
import { evenPlan, newSite, runByPlan } from '../../../src-core/site/new-site';
import type { Placement, Run, Site } from '../../../src-core/site/site';
import { BEAM, FRAME, goods, NOTICE } from '../audit/rack';

export interface RunPlan {
  readonly name?: string;
  readonly bays?: number;
  readonly levels?: number;
}

const pallets = (levelId: string): readonly Placement[] =>
  [75, 950, 1825].map((atMm, i) => ({ id: `${levelId}-goods-${i + 1}`, unitLoadId: 'g', atMm, mirrored: false, towardsFrontMm: 0 }));

let count = 0;

/** Ids as "A-bay-2", "A-frame-1", "A2-level-1", counted from 1; three pallets on every level. */
function runOf({ name = 'A', bays = 3, levels = 2 }: RunPlan): Run {
  const template = evenPlan({
    clearEntryMm: 2700,
    levels,
    firstBeamMm: 1500,
    pitchMm: 1500,
    noticeId: 'notice',
    beamTypeId: 'beam',
    frameTypeId: 'frame',
  });
  const run = runByPlan(template, { name, count: bays, floorId: null, newId: () => `made-${(count += 1)}` });
  return {
    ...run,
    id: `run-${name}`,
    frames: run.frames.map((frame, i) => ({ ...frame, id: `${name}-frame-${i + 1}`, name: `${name}-F${i + 1}`, anchored: 'yes' })),
    bays: run.bays.map((bay, i) => ({
      ...bay,
      id: `${name}-bay-${i + 1}`,
      levels: bay.levels.map((level, k) => {
        const id = `${name}${i + 1}-level-${k + 1}`;
        return { ...level, id, locks: 'yes', placements: pallets(id) };
      }),
    })),
  };
}

/** A site with one run; every level carries three pallets of 620 kg. */
export function siteOf(plan: RunPlan = {}): Site {
  let site = newSite('site', 'Test depot');
  site = addEntry(site, 'beamTypes', BEAM);
  site = addEntry(site, 'frameTypes', FRAME);
  site = addEntry(site, 'notices', NOTICE);
  site = addEntry(site, 'unitLoads', goods('g', { name: 'Tiles', goodsKg: 620 }));
  return withRun(site, plan);
}

/** One more run, loaded alike. */
export const withRun = (site: Site, plan: RunPlan): Site => addRun(site, runOf(plan));
