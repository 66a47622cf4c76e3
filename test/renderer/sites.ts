/** Small sites for the page's tests. */
import { freshItem } from '../../src-renderer/forms/library-items';
import { evenPlan, newSite, runByPlan } from '../../src-core/site/new-site';
import type { Site } from '../../src-core/site/site';

/** Ids in order, so that two builds are equal: "x1", "x2" … */
export function countingIds(prefix = 'x'): () => string {
  let last = 0;
  return () => `${prefix}${++last}`;
}

export const EMPTY: Site = newSite('site', 'Harbour shed');

/** One run "A" of bays of three levels; goods stand on the lowest level of the first bay. */
export function smallSite(bays = 3): Site {
  const newId = countingIds();
  const crate = { ...freshItem('unitLoad', 'crate', 'Crate'), widthMm: 800, depthMm: 1200, heightMm: 900, goodsKg: 400 };
  const notice = { ...freshItem('notice', 'notice', 'Notice 1'), levelKg: [2000] };
  const template = evenPlan({
    clearEntryMm: 2700,
    levels: 3,
    firstBeamMm: 1500,
    pitchMm: 1500,
    noticeId: notice.id,
    beamTypeId: null,
    frameTypeId: null,
  });
  const run = runByPlan(template, { name: 'A', count: bays, floorId: null, newId });
  const [first, ...others] = run.bays;
  const [lowest, ...upper] = first?.levels ?? [];
  if (first === undefined || lowest === undefined) throw new Error('the run has no bay or level');
  const standing = (id: string, atMm: number) => ({ id, unitLoadId: crate.id, atMm, mirrored: false, towardsFrontMm: 0 });
  const filled = { ...lowest, placements: [standing('p1', 75), standing('p2', 950)] };
  return {
    ...EMPTY,
    unitLoads: [crate],
    notices: [notice],
    runs: [{ ...run, bays: [{ ...first, levels: [filled, ...upper] }, ...others] }],
  };
}
