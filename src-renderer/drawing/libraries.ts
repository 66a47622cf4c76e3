/** The parts of a site's libraries that are drawn, by id; the same object as long as the site keeps its libraries. */
import { contextOf } from '../../src-core/audit/context';
import { goodsWork } from '../../src-core/audit/goods';
import type { BeamType, FrameType, Id, Pallet, Site, UnitLoad } from '../../src-core/site/site';
import type { BeamLoad } from '../../src-core/statics/load';

/** What the core found a unit load to weigh, and how it presses on the beam. */
export interface Weighed {
  readonly grossKg: number | null;
  /** N, x in mm from the unit load's own left edge; null where it is not known. */
  readonly pieces: BeamLoad | null;
}

export interface DrawnUnitLoad extends Weighed {
  readonly unitLoad: UnitLoad;
  readonly pallet: Pallet | null;
}

export interface Libraries {
  readonly unitLoads: ReadonlyMap<Id, DrawnUnitLoad>;
  readonly beamTypes: ReadonlyMap<Id, BeamType>;
  readonly frameTypes: ReadonlyMap<Id, FrameType>;
}

function gather(site: Site): Libraries {
  // What unit loads weigh does not depend on the day.
  const context = contextOf(site, '');
  return {
    unitLoads: new Map(site.unitLoads.map(({ id }) => [id, goodsWork(context, id)])),
    beamTypes: context.beamTypes,
    frameTypes: context.frameTypes,
  };
}

const DRAWN = ['unitLoads', 'pallets', 'beamTypes', 'frameTypes'] as const;
let last: { readonly site: Site; readonly libraries: Libraries } | null = null;

/** Moving goods leaves the libraries as they are, so most edits find them gathered already. */
export function librariesOf(site: Site): Libraries {
  const kept = last;
  if (kept !== null && DRAWN.every((key) => kept.site[key] === site[key])) return kept.libraries;
  last = { site, libraries: gather(site) };
  return last.libraries;
}
