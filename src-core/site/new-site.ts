/** A site to start from, and runs laid out from a bay template. */
import { copyOfFrame, copyOfLevel, type NewId } from './copies';
import { findBay } from './lookup';
import type { Bay, Frame, Id, Level, Run, Site } from './site';

/**
 * An empty site by the European rule set, with every check asked for. What is not known stays so
 * until it is stated: earthquake region and outdoors are "unknown".
 */
export const newSite = (id: Id, name: string): Site => ({
  id,
  name,
  notes: '',
  units: 'metric',
  rules: {
    set: 'european',
    changed: [],
    leftOut: [],
    fullComplement: true,
    frameTable: 'next-taller-row',
    twoAmbersMakeRed: true,
    span: 'clear-entry',
  },
  seismic: 'unknown',
  outdoors: 'unknown',
  pallets: [],
  unitLoads: [],
  notices: [],
  beamTypes: [],
  frameTypes: [],
  floors: [],
  runs: [],
});

/** What the bays of a new run have in common. Goods stay where they are. */
export interface BayTemplate {
  readonly clearEntryMm: number;
  readonly noticeId: Id | null;
  readonly levels: readonly Omit<Level, 'id' | 'placements'>[];
  readonly frame: Omit<Frame, 'id' | 'name'>;
}

/** Any bay of the site serves as a template, with the frame on its right. */
export function bayTemplate(site: Site, bayId: Id): BayTemplate {
  const { run, bay, index } = findBay(site, bayId);
  const { id: _id, name: _name, ...frame } = copyOfFrame(run.frames[index + 1] as Frame, '', () => '');
  const levels = bay.levels.map(({ id: _, placements: __, ...level }) => level);
  return { clearEntryMm: bay.clearEntryMm, noticeId: bay.noticeId, levels, frame };
}

/** A template of equal beam levels from a few numbers; everything that is not stated is not known. */
export function evenTemplate(plan: {
  readonly clearEntryMm: number;
  readonly levels: number;
  readonly firstBeamMm: number;
  readonly pitchMm: number;
  readonly noticeId: Id | null;
  readonly beamTypeId: Id | null;
  readonly frameTypeId: Id | null;
}): BayTemplate {
  const { clearEntryMm, noticeId, beamTypeId } = plan;
  const heights = Array.from({ length: plan.levels }, (_, i) => plan.firstBeamMm + i * plan.pitchMm);
  const levels = heights.map((heightMm) => ({ heightMm, beamTypeId, locks: 'unknown' as const, deck: { kind: 'none' as const } }));
  // Frames reach past the topmost beam, in steps of 100 mm; their real height can be entered.
  const heightMm = Math.ceil(((heights.at(-1) ?? 0) + 300) / 100) * 100;
  const frame = { typeId: plan.frameTypeId, heightMm, anchored: 'unknown', restrained: 'unknown', plumb: null, damages: [] } as const;
  return { clearEntryMm, noticeId, levels, frame };
}

/** A run of `count` bays by a template, named "A1", "A2" … after it, its frames by the bays at their sides. */
export function runByTemplate(
  template: BayTemplate,
  { name, count, floorId, newId }: { readonly name: string; readonly count: number; readonly floorId: Id | null; readonly newId: NewId },
): Run {
  if (!(Number.isInteger(count) && count >= 0)) throw new RangeError(`A run has a whole number of bays, not ${count}.`);
  const bays = Array.from({ length: count }, (_, i): Bay => ({
    id: newId(),
    name: `${name}${i + 1}`,
    clearEntryMm: template.clearEntryMm,
    noticeId: template.noticeId,
    levels: template.levels.map((level) => copyOfLevel({ ...level, id: '', placements: [] }, newId)),
    onFloor: [],
  }));
  const frames = Array.from({ length: count + 1 }, (_, i): Frame => ({
    ...template.frame,
    id: newId(),
    name: `${name}${i}|${name}${i + 1}`,
  }));
  return { id: newId(), name, floorId, loadedBy: 'unknown', twoDeep: 'unknown', backToBack: null, frames, bays };
}
