/** Moving what is selected by steps: along the level, to the level above or below, between bays. */
import { formatQuantity } from '../src-core/units/format';
import { lengthOf } from '../src-core/units/quantity';
import { movePlacement } from '../src-core/site/edits';
import type { Id, Level } from '../src-core/site/site';
import type { OpenSite } from './open-site.svelte';
import { placementPlace, targetOf, type PlacementPlace, type Target } from './places';

/** Along the level; what is carried only tries the place. Several go together, as one step of undo. */
export function nudge(open: OpenSite, byMm: number): void {
  const places = chosen(open);
  const first = places[0];
  if (first === undefined) return;
  if (open.carried !== null) return tryAt(open, first, { ...targetOf(first), atMm: first.placement.atMm + byMm });
  if (places.length === 1) {
    open.move(first.placement.id, { ...targetOf(first), atMm: first.placement.atMm + byMm }, `nudge ${first.placement.id}`);
    return;
  }
  const ids = places.map((place) => place.placement.id);
  const refused = open.edit(
    `Move ${ids.length} unit loads`,
    (site) =>
      open.roomFor(
        places.reduce(
          (next, place) => movePlacement(next, place.placement.id, { ...targetOf(place), atMm: place.placement.atMm + byMm }),
          site,
        ),
        ids,
      ),
    `nudge ${ids.join(' ')}`,
  );
  if (refused !== null) return;
  open.select({ placementIds: ids });
  open.sayDone(
    `${ids.length} unit loads moved ${byMm > 0 ? 'right' : 'left'} by ${formatQuantity(lengthOf(Math.abs(byMm)), open.reading)}.`,
  );
}

/** To the next level up (+1) or down (−1), at the same place along it; below the lowest is the floor. */
export function changeLevel(open: OpenSite, by: 1 | -1): void {
  const place = chosen(open)[0];
  if (place === undefined) return;
  const next = nextLevel(place, by);
  if (next === undefined) {
    open.say(by > 0 ? 'This is the highest level of the bay.' : 'This is the floor of the bay.');
    return;
  }
  const { atMm, towardsFrontMm } = place.placement;
  const target: Target = next ? { levelId: next.id, atMm, towardsFrontMm } : { levelId: null, bayId: place.bay.id, atMm, towardsFrontMm };
  if (open.carried !== null) tryAt(open, place, target);
  else open.move(place.placement.id, target);
}

/** To the same level of the neighbouring bay, where it has one. */
export function changeBay(open: OpenSite, by: 1 | -1): void {
  const place = chosen(open)[0];
  if (place === undefined) return;
  const bay = place.run.bays[place.index + by];
  if (bay === undefined) {
    open.say(by > 0 ? 'This is the last bay of the run.' : 'This is the first bay of the run.');
    return;
  }
  const { atMm, towardsFrontMm } = place.placement;
  const level = place.level === null ? undefined : (bay.levels[place.bay.levels.indexOf(place.level)] ?? bay.levels.at(-1));
  const target: Target = level ? { levelId: level.id, atMm, towardsFrontMm } : { levelId: null, bayId: bay.id, atMm, towardsFrontMm };
  if (open.carried !== null) tryAt(open, place, target);
  else open.move(place.placement.id, target);
}

/** Undefined where there is none; null for the floor. */
function nextLevel({ bay, level }: PlacementPlace, by: 1 | -1): Level | null | undefined {
  const index = level === null ? -1 : bay.levels.indexOf(level);
  if (index + by === -1) return null;
  return bay.levels[index + by];
}

function tryAt(open: OpenSite, place: PlacementPlace, target: Target): void {
  open.tryMove(place.placement.id, target);
  const there = placementPlace(open.site, place.placement.id);
  if (there === null) return;
  // The drawing follows what is carried, into another bay as well.
  open.select({ bayId: there.bay.id, levelId: there.level?.id ?? null });
  const number = there.level === null ? 'floor' : `level ${there.bay.levels.indexOf(there.level) + 1}`;
  open.sayDone(`Bay ${there.bay.name}, ${number}, ${formatQuantity(lengthOf(there.placement.atMm), open.reading)}.`);
}

/** The carried unit load, else what is selected, where each stands now. */
function chosen(open: OpenSite): readonly PlacementPlace[] {
  const ids: readonly Id[] = open.carried === null ? open.selection.placementIds : [open.carried];
  return ids.flatMap((id) => placementPlace(open.site, id) ?? []);
}
