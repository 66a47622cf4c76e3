/** Where things are in a site. Each throws RangeError quoting the id if it is not there: a caller's mistake. */
import type { Bay, Frame, Id, Level, Placement, Run, Site } from './site';

export interface BayPlace {
  readonly run: Run;
  readonly bay: Bay;
  /** Place in the run; frame `index` stands to its left, frame `index + 1` to its right. */
  readonly index: number;
}

export interface LevelPlace extends BayPlace {
  readonly level: Level;
  /** 0 for the lowest. */
  readonly levelIndex: number;
}

export interface PlacementPlace extends BayPlace {
  /** Null where the goods stand on the floor of the bay. */
  readonly level: Level | null;
  readonly placement: Placement;
}

export interface FramePlace {
  readonly run: Run;
  readonly frame: Frame;
  readonly index: number;
}

const missing = (noun: string, id: Id): never => {
  throw new RangeError(`there is no ${noun} with the id ${JSON.stringify(id)} in this site`);
};

export const findRun = (site: Site, runId: Id): Run => site.runs.find(({ id }) => id === runId) ?? missing('run', runId);

export function findBay(site: Site, bayId: Id): BayPlace {
  for (const run of site.runs) {
    const index = run.bays.findIndex(({ id }) => id === bayId);
    const bay = run.bays[index];
    if (bay) return { run, bay, index };
  }
  return missing('bay', bayId);
}

export function findLevel(site: Site, levelId: Id): LevelPlace {
  for (const run of site.runs) {
    for (let index = 0; index < run.bays.length; index++) {
      const bay = run.bays[index] as Bay;
      const levelIndex = bay.levels.findIndex(({ id }) => id === levelId);
      const level = bay.levels[levelIndex];
      if (level) return { run, bay, index, level, levelIndex };
    }
  }
  return missing('level', levelId);
}

export function findPlacement(site: Site, placementId: Id): PlacementPlace {
  const isIt = ({ id }: Placement) => id === placementId;
  for (const run of site.runs) {
    for (let index = 0; index < run.bays.length; index++) {
      const bay = run.bays[index] as Bay;
      for (const level of bay.levels) {
        const placement = level.placements.find(isIt);
        if (placement) return { run, bay, index, level, placement };
      }
      const placement = bay.onFloor.find(isIt);
      if (placement) return { run, bay, index, level: null, placement };
    }
  }
  return missing('placement', placementId);
}

export function findFrame(site: Site, frameId: Id): FramePlace {
  for (const run of site.runs) {
    const index = run.frames.findIndex(({ id }) => id === frameId);
    const frame = run.frames[index];
    if (frame) return { run, frame, index };
  }
  return missing('frame', frameId);
}

/** The libraries of a site, by their key in it. */
export const LIBRARIES = ['pallets', 'unitLoads', 'notices', 'beamTypes', 'frameTypes', 'floors', 'bayTemplates'] as const;
export type Library = (typeof LIBRARIES)[number];
export type LibraryEntry<K extends Library> = Site[K][number];

export const ENTRY_NOUNS: Readonly<Record<Library, string>> = {
  pallets: 'pallet',
  unitLoads: 'unit load',
  notices: 'load notice',
  beamTypes: 'beam type',
  frameTypes: 'frame type',
  floors: 'floor',
  bayTemplates: 'bay template',
};

export function findEntry<K extends Library>(site: Site, library: K, id: Id): LibraryEntry<K> {
  const entries: readonly LibraryEntry<K>[] = site[library];
  return entries.find((entry) => entry.id === id) ?? missing(ENTRY_NOUNS[library], id);
}

/** Every id in the site, in the order of its file. */
export function everyId(site: Site): readonly Id[] {
  const ids: Id[] = [site.id];
  const add = (entries: readonly { readonly id: Id }[]) => {
    for (const { id } of entries) ids.push(id);
  };
  for (const library of LIBRARIES) add(site[library]);
  for (const run of site.runs) {
    ids.push(run.id);
    for (const frame of run.frames) {
      ids.push(frame.id);
      add(frame.damages);
    }
    for (const bay of run.bays) {
      ids.push(bay.id);
      for (const level of bay.levels) {
        ids.push(level.id);
        add(level.beamDamages);
        add(level.placements);
      }
      add(bay.onFloor);
    }
  }
  return ids;
}
