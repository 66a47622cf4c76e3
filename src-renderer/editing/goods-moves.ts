/** Moving what is selected by steps: along the level, to the level above or below, between bays. */
import { opening } from '../../src-core/checks/phrase';
import type { Id, Level } from '../../src-core/site/site';
import { formatQuantity } from '../../src-core/units/format';
import { lengthOf } from '../../src-core/units/quantity';
import type { OpenSite } from '../state/open-site.svelte';
import { nameOfPlace, placementPlace, targetOf, type PlacementPlace, type Target } from './places';
import { countOf } from '../say';

/** Along the level; what is carried only tries the place. */
export function nudge(open: OpenSite, byMm: number): void {
  const places = chosen(open);
  const to = (place: PlacementPlace): Target => ({ ...targetOf(place), atMm: place.placement.atMm + byMm });
  const by = formatQuantity(lengthOf(Math.abs(byMm)), open.reading);
  shift(open, places, to, {
    merge: `nudge ${places.map(({ placement }) => placement.id).join(' ')}`,
    says: `moved ${byMm > 0 ? 'right' : 'left'} by ${by}.`,
  });
}

/** To the next level up (+1) or down (−1), at the same place along it; below the lowest is the floor. */
export function changeLevel(open: OpenSite, by: 1 | -1): void {
  const places = chosen(open);
  const next = new Map(places.map((place) => [place, nextLevel(place, by)]));
  if ([...next.values()].includes(undefined)) {
    open.say(by > 0 ? 'This is the highest level of the bay.' : 'This is the floor of the bay.');
    return;
  }
  shift(open, places, (place) => placeOn(place, place.bay.id, next.get(place) ?? null), {
    says: `moved ${by > 0 ? 'up' : 'down'} one level.`,
  });
}

/** To the same level of the neighbouring bay, where it has one. */
export function changeBay(open: OpenSite, by: 1 | -1): void {
  const places = chosen(open);
  if (places.some(({ run, index }) => run.bays[index + by] === undefined)) {
    open.say(by > 0 ? 'This is the last bay of the run.' : 'This is the first bay of the run.');
    return;
  }
  const to = (place: PlacementPlace): Target => {
    const bay = place.run.bays[place.index + by] ?? place.bay;
    const level = place.level === null ? null : (bay.levels[place.bay.levels.indexOf(place.level)] ?? bay.levels.at(-1) ?? null);
    return placeOn(place, bay.id, level);
  };
  shift(open, places, to, { says: `moved one bay to the ${by > 0 ? 'right' : 'left'}.` });
}

interface Shift {
  readonly merge?: string;
  /** What is said of several. */
  readonly says: string;
}

/** One alone by the command that dragging and the menu use; several go together, as one step of undo. */
function shift(open: OpenSite, places: readonly PlacementPlace[], to: (place: PlacementPlace) => Target, { merge, says }: Shift): void {
  const [first] = places;
  if (first === undefined) return;
  if (open.carried !== null) return tryAt(open, first, to(first));
  if (places.length === 1) {
    open.move(first.placement.id, to(first), merge);
    return;
  }
  const moves = places.map((place) => ({ placementId: place.placement.id, target: to(place) }));
  if (open.moveAll(moves, merge) === null) open.sayDone(`${countOf(places.length, 'unit load')} ${says}`);
}

const placeOn = ({ placement: { atMm, towardsFrontMm } }: PlacementPlace, bayId: Id, level: Level | null): Target =>
  level ? { levelId: level.id, atMm, towardsFrontMm } : { levelId: null, bayId, atMm, towardsFrontMm };

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
  const where = nameOfPlace(there.bay, there.level);
  open.sayDone(`${opening(where)}, ${formatQuantity(lengthOf(there.placement.atMm), open.reading)}.`);
}

/** The carried unit load, else what is selected, where each stands now. */
function chosen(open: OpenSite): readonly PlacementPlace[] {
  const ids: readonly Id[] = open.carried === null ? open.selection.placementIds : [open.carried];
  return ids.flatMap((id) => placementPlace(open.site, id) ?? []);
}
