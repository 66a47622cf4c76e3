/** How much more a place takes, worked out in slices while the page is idle. */
import { EVEN_LOAD, widestFree, withEvenLoad } from '../../src-core/audit/free-room';
import { roomLeftInSteps } from '../../src-core/audit/room-left';
import { isMet } from '../../src-core/audit/trial-load';
import type { Id, Site, UnitLoad } from '../../src-core/site/site';
import type { Text } from '../../src-core/units/text';
import { NOTHING_FREE, roomForEven, roomForGoods, roomForPlaced, type RoomAsked } from '../../src-core/words/room-words';
import { weigh } from '../drawing/weigh';
import { putOn, standOf, type PuttingOn } from './finding-room';
import { placementPlace } from './places';

/** Goods about to be put on, goods that stand there, or no goods in particular. */
export type RoomQuestion =
  | { readonly of: 'goods'; readonly unitLoad: UnitLoad; readonly bayId: Id; readonly levelId: Id | null; readonly putting: PuttingOn }
  | { readonly of: 'placed'; readonly placementId: Id }
  | { readonly of: 'even'; readonly levelId: Id };

/** Sentences; none where there is nothing to say. */
export type RoomSaid = readonly Text[];

/** Stands for goods that are not put on. */
const TRIAL = 'room-left-trial';

/** Audit by audit; @returns what can be said, in the units of whoever reads */
export function* roomSaid(
  question: RoomQuestion,
  site: Site,
  today: string,
): Generator<undefined, (units: RoomAsked['units']) => RoomSaid> {
  switch (question.of) {
    case 'goods':
      return yield* forGoods(question, site, today);
    case 'placed': {
      const place = placementPlace(site, question.placementId);
      if (place === null) return () => [];
      const room = yield* roomLeftInSteps(site, question.placementId, today);
      if (room.kind === 'unlimited' && place.level === null) return () => [];
      const asked = askedOf(site, place.unitLoad);
      return (units) => roomForPlaced(room, { ...asked, units });
    }
    case 'even': {
      const free = widestFree(site, question.levelId);
      if (free === null) return () => [NOTHING_FREE];
      const trial = withEvenLoad(site, question.levelId, free.usable);
      const room = yield* roomLeftInSteps(trial, EVEN_LOAD, today);
      return (units) => roomForEven(room, free, { site: trial, units, ownKg: null, palletKg: 0 });
    }
  }
}

/** Where the goods would be put, neighbours pushed apart if that is wanted, and what they may weigh there. */
function* forGoods(
  { unitLoad, bayId, levelId, putting }: RoomQuestion & { of: 'goods' },
  site: Site,
  today: string,
): Generator<undefined, (units: RoomAsked['units']) => RoomSaid> {
  const stand = standOf(site, bayId, levelId);
  if (stand === null) return () => [];
  const stocked = site.unitLoads.some(({ id }) => id === unitLoad.id) ? site : { ...site, unitLoads: [...site.unitLoads, unitLoad] };
  const putOnto = (onto: Site, id: Id): Site => {
    const now = standOf(onto, bayId, levelId) ?? stand;
    return putOn(onto, now, { id, unitLoadId: unitLoad.id, atMm: null, mirrored: false, towardsFrontMm: 0 }, putting);
  };
  let trial: Site;
  try {
    trial = putOnto(stocked, TRIAL);
  } catch (error) {
    // No place is free: the sentence says how much is missing, and where there is room.
    if (!(error instanceof RangeError)) throw error;
    const { message } = error;
    return () => [[message]];
  }
  const room = yield* roomLeftInSteps(trial, TRIAL, today);
  if (room.kind === 'unlimited' && levelId === null) return () => [];
  const at = placementPlace(trial, TRIAL)?.placement.atMm ?? 0;
  const asked = askedOf(trial, unitLoad);
  const count = room.kind === 'room' && asked.ownKg !== null ? yield* howMany(trial, putOnto, today) : 0;
  return (units) => roomForGoods(room, at, count, { ...asked, units });
}

/** One is put on already; others follow it until one finds no place or would not be met. */
function* howMany(trial: Site, putOnto: (site: Site, id: Id) => Site, today: string): Generator<undefined, number> {
  let site = trial;
  for (let count = 0; ; count += 1) {
    if (!isMet(site, idOf(count), today) || count === MOST_COUNTED) return count;
    yield;
    try {
      site = putOnto(site, idOf(count + 1));
    } catch (error) {
      if (!(error instanceof RangeError)) throw error;
      return count + 1;
    }
  }
}
/** More than stand on any pallet level. */
const MOST_COUNTED = 12;
const idOf = (index: number): Id => (index === 0 ? TRIAL : `${TRIAL}-${index}`);

function askedOf(site: Site, unitLoad: UnitLoad): Omit<RoomAsked, 'units'> {
  const pallet = site.pallets.find(({ id }) => id === unitLoad.palletId) ?? null;
  return { site, ownKg: weigh(unitLoad, pallet).grossKg, palletKg: pallet?.massKg ?? 0 };
}

/** Nothing is worked out before what it depends on has been left alone for so long, ms. */
const REST = 200;
/** Work goes on for this long before the page gets a turn, ms. */
const SLICE = 8;

/**
 * Runs steps in slices, after a rest.
 * @returns drops what is not done yet
 */
export function inSlices<T>(make: () => Generator<undefined, T>, done: (value: T) => void, rest = REST): () => void {
  let steps: Generator<undefined, T> | null = null;
  const slice = () => {
    const until = performance.now() + SLICE;
    steps ??= make();
    do {
      const next = steps.next();
      if (next.done) return done(next.value);
    } while (performance.now() < until);
    timer = setTimeout(slice, 0);
  };
  let timer = setTimeout(slice, rest);
  return () => clearTimeout(timer);
}
