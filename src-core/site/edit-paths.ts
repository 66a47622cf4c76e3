/**
 * Changing one part deep in a site. What is not on the way to it keeps its identity, so that only
 * the bays that changed are looked at again; a change that changes nothing gives the same site back.
 */
import { requirePart } from './check-part';
import { findBay, findFrame, findLevel, findRun, type BayPlace } from './lookup';
import type { Bay, Frame, Id, Level, Run, Site } from './site';

/** The list with one entry replaced; itself where the entry is the same. */
export function replaced<T>(entries: readonly T[], before: T, after: T): readonly T[] {
  return before === after ? entries : entries.map((entry) => (entry === before ? after : entry));
}

/** The entry with a part of its keys changed; itself where nothing changes. */
export function changed<T extends object>(entry: T, part: Partial<T>): T {
  const differs = (Object.keys(part) as (keyof T)[]).some((key) => entry[key] !== part[key]);
  return differs ? { ...entry, ...part } : entry;
}

export function moved<T>(entries: readonly T[], from: number, to: number): readonly T[] {
  if (!(Number.isInteger(to) && to >= 0 && to < entries.length))
    throw new RangeError(`There is no place ${to + 1} among ${entries.length}. Choose one from 1 to ${entries.length}.`);
  const rest = entries.toSpliced(from, 1);
  return from === to ? entries : rest.toSpliced(to, 0, entries[from] as T);
}

export const withRuns = (site: Site, runs: readonly Run[]): Site => (runs === site.runs ? site : { ...site, runs });

/** Puts a changed run in the place of its former state, unchecked. */
export const withRun = (site: Site, before: Run, after: Run): Site => withRuns(site, replaced(site.runs, before, after));

/** @throws RangeError if the changed run could not stand in the site */
export function changeRun(site: Site, runId: Id, change: (run: Run) => Run): Site {
  const before = findRun(site, runId);
  const after = change(before);
  return after === before ? site : withRun(site, before, requirePart(site, 'run', after, before));
}

/** Puts a changed bay in the place of its former state, unchecked. */
export const withBay = (site: Site, { run, bay }: BayPlace, after: Bay): Site =>
  after === bay ? site : withRun(site, run, { ...run, bays: replaced(run.bays, bay, after) });

/** @throws RangeError if the changed bay could not stand in the site */
export function changeBay(site: Site, bayId: Id, change: (bay: Bay) => Bay): Site {
  const place = findBay(site, bayId);
  const after = change(place.bay);
  return after === place.bay ? site : withBay(site, place, requirePart(site, 'bay', after, place.bay));
}

/** @throws RangeError if the bay with the changed level could not stand in the site */
export function changeLevel(site: Site, levelId: Id, change: (level: Level) => Level): Site {
  const { bay } = findLevel(site, levelId);
  return changeBay(site, bay.id, (one) => {
    const level = one.levels.find(({ id }) => id === levelId) as Level;
    const after = change(level);
    return after === level ? one : { ...one, levels: inOrder(replaced(one.levels, level, after)) };
  });
}

/** @throws RangeError if the changed frame could not stand in the site */
export function changeFrame(site: Site, frameId: Id, change: (frame: Frame) => Frame): Site {
  const { run, frame } = findFrame(site, frameId);
  const after = change(frame);
  if (after === frame) return site;
  requirePart(site, 'frame', after, frame);
  return withRun(site, run, { ...run, frames: replaced(run.frames, frame, after) });
}

/** Levels from the lowest up; the same list where they stand so already. */
export function inOrder(levels: readonly Level[]): readonly Level[] {
  const ordered = levels.toSorted((a, b) => a.heightMm - b.heightMm);
  return ordered.every((level, i) => level === levels[i]) ? levels : ordered;
}

export function refuseNewId(id: Id, part: { readonly id?: Id }): void {
  if (part.id !== undefined && part.id !== id)
    throw new RangeError(`The id ${JSON.stringify(id)} stays as it is and cannot become ${JSON.stringify(part.id)}.`);
}
