/**
 * Room on a level for goods that nobody has named yet: its widest free stretch, and a plain even load
 * that fills it.
 */
import type { CheckName } from '../checks/finding';
import { clearanceKeys } from '../checks/clearance-rules';
import { resolveRules } from '../checks/rule-sets';
import { findEntry, findLevel } from '../site/lookup';
import { freeGaps, type Stretch } from '../site/placing';
import type { Id, Placement, Site, UnitLoad } from '../site/site';

export interface FreeStretch {
  /** From what stands beside it, or the uprights, mm from the left upright's face. */
  readonly gap: Stretch;
  /** What the clearances leave of it. */
  readonly usable: Stretch;
  readonly at: 'left' | 'right' | 'middle' | 'whole';
}

/** No id of a site looks like this one. */
export const EVEN_LOAD = ' even load';

/** Of a load of which only the mass is asked: whatever it will be, it has a form of its own. */
const NOT_ASKED: readonly CheckName[] = ['unit-load', 'positions', 'overhang', 'clearance-across'];

/**
 * The widest stretch of a level on which nothing stands; null where there is none that is any wider than
 * its clearances.
 * @throws RangeError if the site has no such level
 */
export function widestFree(site: Site, levelId: Id): FreeStretch | null {
  const { run, bay, level } = findLevel(site, levelId);
  const entry = bay.clearEntryMm;
  const standing = level.placements.map(({ atMm, unitLoadId }) => ({ at: atMm, width: findEntry(site, 'unitLoads', unitLoadId).widthMm }));
  const rules = resolveRules(site.rules).value;
  const keys = clearanceKeys(run.loadedBy, level.heightMm);
  let widest: FreeStretch | null = null;
  for (const gap of freeGaps(entry, standing)) {
    const [left, right] = [gap.from <= 0, gap.to >= entry];
    const needed = (upright: boolean) => (keys === null ? 0 : rules[upright ? keys.upright : keys.loads]);
    const usable = { from: gap.from + needed(left), to: gap.to - needed(right) };
    if (!(usable.to > usable.from) || (widest !== null && gap.to - gap.from <= widest.gap.to - widest.gap.from)) continue;
    widest = { gap, usable, at: left && right ? 'whole' : left ? 'left' : right ? 'right' : 'middle' };
  }
  return widest;
}

/** The site with an even load, named `EVEN_LOAD`, from end to end of a stretch; for its room, not to be kept. */
export function withEvenLoad(site: Site, levelId: Id, { from, to }: Stretch): Site {
  const { run, bay, level, index } = findLevel(site, levelId);
  const types = run.frames.slice(index, index + 2).map(({ typeId }) => site.frameTypes.find(({ id }) => id === typeId));
  const load: UnitLoad = {
    id: EVEN_LOAD,
    name: 'An even load',
    widthMm: to - from,
    // Deep enough to bear on both beams wherever it lies.
    depthMm: Math.max(...types.map((type) => type?.depthMm ?? 0), 1) + 2 * resolveRules(site.rules).value.placementTolerance,
    heightMm: 1,
    goodsKg: null,
    massUncertaintyPercent: 0,
    massSource: { kind: 'unknown', detail: '', person: '', date: '' },
    palletId: null,
    palletFace: 'width',
    bearing: { kind: 'even' },
    across: { kind: 'even' },
    contact: 'flat',
    chocked: 'unknown',
    leanMm: 0,
  };
  const placement: Placement = { id: EVEN_LOAD, unitLoadId: EVEN_LOAD, atMm: from, mirrored: false, towardsFrontMm: 0 };
  const levels = bay.levels.map((one) => (one === level ? { ...one, placements: [...one.placements, placement] } : one));
  const bays = run.bays.map((one) => (one === bay ? { ...bay, levels } : one));
  const leftOut = NOT_ASKED.map((check) => ({ check, reason: 'of an even load only the mass is asked' }));
  return {
    ...site,
    unitLoads: [...site.unitLoads, load],
    rules: { ...site.rules, leftOut: [...site.rules.leftOut, ...leftOut] },
    runs: site.runs.map((one) => (one === run ? { ...run, bays } : one)),
  };
}
