/** A site to start from, and runs laid out from a bay's plan. */
import { copyOfGoods, type NewId } from './copies';
import { findBay } from './lookup';
import type { Bay, BayTemplate, Frame, Id, Level, Placement, Run, Site, TemplateGoods } from './site';

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
  bayTemplates: [],
  runs: [],
});

/** What the bays of a new run have in common: a bay template without its name. */
export type BayPlan = Omit<BayTemplate, 'id' | 'name'>;

/** Any bay of the site serves as a plan, with the frame on its right; with its goods or without. */
export function planOfBay(site: Site, bayId: Id, goods: 'with goods' | 'without goods'): BayPlan {
  const { run, bay, index } = findBay(site, bayId);
  const { typeId, heightMm } = run.frames[index + 1] as Frame;
  const standing = (placements: readonly Placement[]): readonly TemplateGoods[] =>
    goods === 'with goods' ? placements.map(({ id: _, ...placement }) => placement) : [];
  return {
    clearEntryMm: bay.clearEntryMm,
    noticeId: bay.noticeId,
    frameTypeId: typeId,
    frameHeightMm: heightMm,
    levels: bay.levels.map(({ heightMm, beamTypeId, deck, placements }) => ({
      heightMm,
      beamTypeId,
      deck,
      placements: standing(placements),
    })),
    onFloor: standing(bay.onFloor),
  };
}

/** A plan of equal beam levels from a few numbers; everything that is not stated is not known. */
export function evenPlan(plan: {
  readonly clearEntryMm: number;
  readonly levels: number;
  readonly firstBeamMm: number;
  readonly pitchMm: number;
  /** Heights of frames go in such steps; 100 mm where it is left out. */
  readonly frameStepMm?: number;
  readonly noticeId: Id | null;
  readonly beamTypeId: Id | null;
  readonly frameTypeId: Id | null;
}): BayPlan {
  const { clearEntryMm, noticeId, beamTypeId, frameTypeId, frameStepMm = 100 } = plan;
  const heights = Array.from({ length: plan.levels }, (_, i) => plan.firstBeamMm + i * plan.pitchMm);
  return {
    clearEntryMm,
    noticeId,
    frameTypeId,
    // Frames reach three steps past the topmost beam or more; their real height can be entered.
    frameHeightMm: inSteps((heights.at(-1) ?? 0) + 3 * frameStepMm, frameStepMm),
    levels: heights.map((heightMm) => ({ heightMm, beamTypeId, deck: { kind: 'none' }, placements: [] })),
    onFloor: [],
  };
}

/** The next whole step from here up; steps in inches are no whole millimetres, so that a quotient is whole but for its last digits. */
const inSteps = (height: number, step: number): number => Number((Math.ceil(height / step - 1e-9) * step).toFixed(4));

/** A bay by a plan. What has to be seen at the rack is not known. */
export const bayByPlan = (plan: BayPlan, name: string, newId: NewId): Bay => ({
  id: newId(),
  name,
  clearEntryMm: plan.clearEntryMm,
  noticeId: plan.noticeId,
  levels: plan.levels.map(({ heightMm, beamTypeId, deck, placements }): Level => ({
    id: newId(),
    heightMm,
    beamTypeId,
    locks: 'unknown',
    deck,
    beamDamages: [],
    sags: [],
    placements: copyOfGoods(placements, newId),
  })),
  onFloor: copyOfGoods(plan.onFloor, newId),
});

export const frameByPlan = (plan: BayPlan, name: string, newId: NewId): Frame => ({
  id: newId(),
  name,
  typeId: plan.frameTypeId,
  heightMm: plan.frameHeightMm,
  anchored: 'unknown',
  restrained: 'unknown',
  plumb: null,
  damages: [],
});

/** A run of `count` bays by a plan, named "A1", "A2" … after it, its frames by the bays at their sides. */
export function runByPlan(
  plan: BayPlan,
  { name, count, floorId, newId }: { readonly name: string; readonly count: number; readonly floorId: Id | null; readonly newId: NewId },
): Run {
  if (!(Number.isInteger(count) && count >= 0)) throw new RangeError(`A run has a whole number of bays, not ${count}.`);
  const bays = Array.from({ length: count }, (_, i) => bayByPlan(plan, `${name}${i + 1}`, newId));
  const frames = Array.from({ length: count + 1 }, (_, i) => frameByPlan(plan, `${name}${i}|${name}${i + 1}`, newId));
  return { id: newId(), name, floorId, loadedBy: 'unknown', twoDeep: 'unknown', backToBack: null, frames, bays };
}
