/** Where things are in a site, as the page asks for it: null where the id is not there (any more). */
import type { PlaceTarget } from '../../src-core/site/edits';
import type { BayPlace, LevelPlace, PlacementPlace as CorePlacementPlace } from '../../src-core/site/lookup';
import type { Bay, Frame, Id, Level, Run, Site, UnitLoad } from '../../src-core/site/site';

export type Target = PlaceTarget;

export type { BayPlace, LevelPlace };

export interface PlacementPlace extends CorePlacementPlace {
  readonly unitLoad: UnitLoad;
}

/** The place a unit load stands at, as a target that can be changed a little. */
export function targetOf(place: PlacementPlace): Target {
  const { atMm, towardsFrontMm } = place.placement;
  return place.level ? { levelId: place.level.id, atMm, towardsFrontMm } : { levelId: null, bayId: place.bay.id, atMm, towardsFrontMm };
}

export function bayPlace(site: Site, bayId: Id | null): BayPlace | null {
  for (const run of site.runs) {
    const index = run.bays.findIndex((bay) => bay.id === bayId);
    const bay = run.bays[index];
    if (bay !== undefined) return { run, bay, index };
  }
  return null;
}

export function levelPlace(site: Site, levelId: Id | null): LevelPlace | null {
  for (const run of site.runs) {
    for (const [index, bay] of run.bays.entries()) {
      const levelIndex = bay.levels.findIndex((level) => level.id === levelId);
      const level = bay.levels[levelIndex];
      if (level !== undefined) return { run, bay, index, level, levelIndex };
    }
  }
  return null;
}

export function placementPlace(site: Site, placementId: Id | null): PlacementPlace | null {
  for (const run of site.runs) {
    for (const [index, bay] of run.bays.entries()) {
      for (const level of [...bay.levels, null]) {
        const placement = (level?.placements ?? bay.onFloor).find((one) => one.id === placementId);
        const unitLoad = placement && site.unitLoads.find((one) => one.id === placement.unitLoadId);
        if (placement !== undefined && unitLoad !== undefined) return { run, bay, index, level, placement, unitLoad };
      }
    }
  }
  return null;
}

export function framePlace(site: Site, frameId: Id | null): { readonly run: Run; readonly frame: Frame; readonly index: number } | null {
  for (const run of site.runs) {
    const index = run.frames.findIndex((frame) => frame.id === frameId);
    const frame = run.frames[index];
    if (frame !== undefined) return { run, frame, index };
  }
  return null;
}

export function frameOfDamage(site: Site, damageId: Id): ReturnType<typeof framePlace> {
  const damaged = site.runs.flatMap((run) => run.frames).find((frame) => frame.damages.some((one) => one.id === damageId));
  return framePlace(site, damaged?.id ?? null);
}

export function besideChosenBay(run: Run | null, bay: Bay | null, frame: Frame): boolean {
  if (run === null || bay === null) return false;
  const index = run.frames.indexOf(frame);
  return run.bays[index] === bay || run.bays[index - 1] === bay;
}

/** "Bay C3, level 2" as a person would say it. */
export function nameOfPlace(bay: Bay, level: Level | null): string {
  const number = level === null ? -1 : bay.levels.indexOf(level);
  return `bay ${bay.name}, ${level === null ? 'floor' : `level ${number + 1}`}`;
}

/** Runs of one site in order, then bays: for walking with keys. */
export const allBays = (site: Site): readonly BayPlace[] => site.runs.flatMap((run) => run.bays.map((bay, index) => ({ run, bay, index })));
