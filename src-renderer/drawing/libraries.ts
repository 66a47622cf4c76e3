/** The parts of a site's libraries that are drawn, by id; the same object as long as the site keeps its libraries. */
import type { BeamType, FrameType, Id, Pallet, Site, UnitLoad } from '../../src-core/site/site';
import { weigh, type Weighed } from './weigh';

export interface DrawnUnitLoad extends Weighed {
  readonly unitLoad: UnitLoad;
  readonly pallet: Pallet | null;
}

export interface Libraries {
  readonly unitLoads: ReadonlyMap<Id, DrawnUnitLoad>;
  readonly beamTypes: ReadonlyMap<Id, BeamType>;
  readonly frameTypes: ReadonlyMap<Id, FrameType>;
}

function gather({ unitLoads, pallets, beamTypes, frameTypes }: Site): Libraries {
  const byId = <T extends { readonly id: Id }>(all: readonly T[]) => new Map(all.map((one) => [one.id, one]));
  const palletOf = byId(pallets);
  return {
    unitLoads: new Map(
      unitLoads.map((unitLoad) => {
        const pallet = palletOf.get(unitLoad.palletId ?? '') ?? null;
        return [unitLoad.id, { unitLoad, pallet, ...weigh(unitLoad, pallet) }];
      }),
    ),
    beamTypes: byId(beamTypes),
    frameTypes: byId(frameTypes),
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
