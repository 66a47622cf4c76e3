/** What in a site depends on a library entry: the places that a change of it touches. */
import type { Id, Placement, Site } from '../src-core/site/site';

export type LibraryKind = 'unitLoad' | 'pallet' | 'notice' | 'beamType' | 'frameType' | 'floor';

/** Names of what refers to the entry, in the order of the site: "bay A1, level 2", "unit load Flour". */
export function usedBy(site: Site, kind: LibraryKind, id: Id): readonly string[] {
  const found: string[] = [];
  if (kind === 'pallet') for (const one of site.unitLoads) if (one.palletId === id) found.push(one.name);
  if (kind === 'beamType') for (const one of site.notices) if (one.beamTypeId === id) found.push(`load notice ${one.name}`);
  const loads = kind === 'pallet' ? new Set(site.unitLoads.filter((one) => one.palletId === id).map((one) => one.id)) : new Set([id]);
  const holds = (placements: readonly Placement[]) =>
    (kind === 'unitLoad' || kind === 'pallet') && placements.some((one) => loads.has(one.unitLoadId));
  for (const run of site.runs) {
    if (kind === 'floor' && run.floorId === id) found.push(`run ${run.name}`);
    if (kind === 'frameType') for (const frame of run.frames) if (frame.typeId === id) found.push(`frame ${frame.name} of run ${run.name}`);
    for (const bay of run.bays) {
      if (kind === 'notice' && bay.noticeId === id) found.push(`bay ${bay.name}`);
      if (holds(bay.onFloor)) found.push(`bay ${bay.name}, floor`);
      for (const [i, level] of bay.levels.entries()) {
        if ((kind === 'beamType' && level.beamTypeId === id) || holds(level.placements)) found.push(`bay ${bay.name}, level ${i + 1}`);
      }
    }
  }
  return found;
}
