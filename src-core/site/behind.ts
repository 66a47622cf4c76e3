/**
 * What stands behind a frame in the run that is tied back to back. Each run is seen from its own
 * aisle, so left and right change sides from one to the other.
 */
import type { Bay, FrameType, Id, Run, Site } from './site';

/** Where an upright's width is not known. Near that of common uprights, and small against a bay. */
const NOMINAL_UPRIGHT = 100;
/** Frames tied by row spacers stand directly behind each other, within this many mm. */
const BEHIND = 200;

/** Whether a run behind is tied to this one by row spacers. Spacers not known count as there. */
export const perhapsTied = ({ backToBack }: Run): boolean => backToBack !== null && backToBack.rowSpacers !== 'no';

/**
 * The bays behind a frame: those at the frame tied to it, or the one that stands there. Where the two
 * runs are not equally long it is not known at which end they are flush; then what could stand behind
 * in either case is given, because whoever unloads had better unload too much.
 *
 * Empty where nothing is tied, as `perhapsTied` has it.
 * @throws RangeError if the run has no such frame
 */
export function baysBehind(site: Site, run: Run, frameIndex: number): readonly { readonly runId: Id; readonly bay: Bay }[] {
  if (run.backToBack === null || !perhapsTied(run)) return [];
  const { runId } = run.backToBack;
  const behind = site.runs.find(({ id }) => id === runId);
  if (behind === undefined) return [];
  const own = framePlaces(site, run);
  const at = own[frameIndex];
  if (at === undefined) throw new RangeError(`run "${run.id}" has no frame ${frameIndex}`);
  const other = framePlaces(site, behind);
  const ownLength = own.at(-1) ?? 0;
  const otherLength = other.at(-1) ?? 0;
  const found = new Set<Bay>();
  for (const flush of new Set([ownLength, otherLength])) {
    const mirrored = other.map((place) => flush - place);
    for (const bay of baysThere(behind, mirrored, at)) found.add(bay);
  }
  return behind.bays.filter((bay) => found.has(bay)).map((bay) => ({ runId, bay }));
}

/** Middle of each frame from the middle of the first, mm. */
function framePlaces(site: Site, run: Run): readonly number[] {
  const types = new Map<Id, FrameType>(site.frameTypes.map((type) => [type.id, type]));
  const widths = run.frames.map(({ typeId }) => types.get(typeId ?? '')?.uprightWidthMm ?? NOMINAL_UPRIGHT);
  const places = [0];
  run.bays.forEach((bay, i) => {
    places.push((places[i] ?? 0) + bay.clearEntryMm + ((widths[i] ?? 0) + (widths[i + 1] ?? 0)) / 2);
  });
  return places;
}

/** @param places of the frames, falling from frame to frame, because the run is seen from behind */
function baysThere(run: Run, places: readonly number[], at: number): readonly Bay[] {
  const frame = places.findIndex((place) => Math.abs(place - at) <= BEHIND);
  if (frame >= 0) return [run.bays[frame - 1], run.bays[frame]].filter((bay) => bay !== undefined);
  return run.bays.filter((_, i) => (places[i] ?? 0) > at && (places[i + 1] ?? 0) < at);
}
