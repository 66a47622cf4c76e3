/** The room left at a place as a person would say it. Figures are rounded to the safe side. */
import type { RoomLeft } from '../audit/room-left';
import type { FreeStretch } from '../audit/free-room';
import type { CheckName, Finding } from '../checks/finding';
import { inside, listed, opening } from '../checks/phrase';
import { resolveRules } from '../checks/rule-sets';
import { findFrame, findLevel } from '../site/lookup';
import type { Site } from '../site/site';
import { KG_PER_POUND, lengthOf, massOf, quantity, type Quantity, type UnitSystem } from '../units/quantity';
import { say, type Text } from '../units/text';
import { CHECK_WORDS } from './check-names';

/** What is asked about, and for whom it is said. */
export interface RoomAsked {
  readonly site: Site;
  readonly units: UnitSystem;
  /** Mass of the goods that are meant, pallet included, kg; null where it is not known or none are meant. */
  readonly ownKg: number | null;
  /** Mass of their pallet, kg; 0 without one. */
  readonly palletKg: number;
}

/**
 * For goods that may be put at a place, mm from the left upright's face.
 * @param count how many of them, with their own mass, find a place one after another with everything met
 */
export function roomForGoods(room: RoomLeft, atMm: number, count: number, asked: RoomAsked): readonly Text[] {
  if (room.kind !== 'room') return noRoom(room, asked, 'Nothing may be added here');
  const most = atMost(room.mostKg, asked.units);
  const pallet = asked.palletKg > 0 ? ', pallet included' : '';
  return [
    say`Room for up to ${most} of this shape at ${lengthOf(atMm)}${pallet}; ${stopOf(room.stop, asked.site)} stops it.`,
    ...ownMass(room, count, asked),
    ...complement(room, asked),
    closeFrom(asked),
  ];
}

/** Up to the rating is within; what is near it has a word of its own. */
function closeFrom({ site }: RoomAsked): Text {
  const percent = quantity('percent', 100 * resolveRules(site.rules).value.closeAbove);
  return say`Above ${percent} of a rating it counts as close.`;
}

/** For goods that stand at their place. */
export function roomForPlaced(room: RoomLeft, asked: RoomAsked): readonly Text[] {
  if (room.kind !== 'room') return noRoom(room, asked, 'No goods may stand here');
  const { ownKg, units, site } = asked;
  const most = atMost(room.mostKg, units);
  const stop = stopOf(room.stop, site);
  if (ownKg === null) return [say`At most ${most} of this shape may stand here; ${stop} stops it.`, ...complement(room, asked)];
  if (ownKg > room.mostKg * ROUNDED)
    return [
      say`Over by ${atLeast(ownKg - most.value, units)} here: at most ${most} of this shape; ${stop} stops it.`,
      ...complement(room, asked),
    ];
  const unfit = between(room, ownKg) ? [wouldNotDo(ownKg)] : [];
  return [say`Up to ${most} of this shape may stand here; ${stop} stops it.`, ...unfit, ...complement(room, asked), closeFrom(asked)];
}

/** For a level whose goods leave no more than their clearances. */
export const NOTHING_FREE: Text = say`Nothing is free along this level.`;

/** For a free stretch of a level and a plain even load on all of it. */
export function roomForEven(room: RoomLeft, free: FreeStretch, asked: RoomAsked): readonly Text[] {
  const stretch = say`Free: ${lengthOf(free.gap.to - free.gap.from)} ${FREE_AT[free.at]}`;
  if (room.kind !== 'room') return [say`${stretch}.`, ...noRoom(room, asked, 'Nothing may be added there')];
  const { units, site } = asked;
  return [
    say`${stretch}; up to ${atMost(room.mostKg, units)} evenly spread there. ${opening(stopOf(room.stop, site))} stops it.`,
    closeFrom(asked),
  ];
}

const FREE_AT: Readonly<Record<FreeStretch['at'], string>> = {
  left: 'at the left',
  right: 'at the right',
  middle: 'between the goods',
  whole: 'from upright to upright',
};

/** More than double numbers lose, and less than anyone weighs. */
const ROUNDED = 1 + 1e-9;

const unitOf = (kg: number, units: UnitSystem): number => (units === 'us' ? KG_PER_POUND : 1) * (kg < 10 ? 0.1 : 1);

/** In whole kilograms or pounds, never more than it is; tenths below ten kilograms. */
export function atMost(kg: number, units: UnitSystem): Quantity {
  const unit = unitOf(kg, units);
  return massOf(Math.floor((kg * ROUNDED) / unit) * unit);
}

/** The same, never less than it is. */
export function atLeast(kg: number, units: UnitSystem): Quantity {
  const unit = unitOf(kg, units);
  return massOf(Math.ceil(kg / ROUNDED / unit) * unit);
}

/** What the goods that are meant make of it. */
function ownMass(room: RoomLeft & { kind: 'room' }, count: number, { ownKg, units }: RoomAsked): readonly Text[] {
  if (ownKg === null) return [];
  const most = atMost(room.mostKg, units).value;
  if (ownKg > room.mostKg * ROUNDED) return [say`These goods weigh ${massOf(ownKg)}, ${atLeast(ownKg - most, units)} too much.`];
  if (between(room, ownKg)) return [wouldNotDo(ownKg)];
  if (count > 1) return [say`Of these goods, ${massOf(ownKg)} each, ${count} may be put here.`];
  return count === 1 ? [say`These goods weigh ${massOf(ownKg)} and may be put here.`] : [];
}

const wouldNotDo = (ownKg: number): Text => say`These goods weigh ${massOf(ownKg)}, which would not do.`;

const between = ({ notBetween }: RoomLeft & { kind: 'room' }, kg: number): boolean =>
  notBetween !== null && kg > notBetween.aboveKg * ROUNDED && kg * ROUNDED < notBetween.belowKg;

function complement({ asComplement, notBetween }: RoomLeft & { kind: 'room' }, { units }: RoomAsked): readonly Text[] {
  if (!asComplement) return [];
  const last = say`The level then holds the designed full complement of its notice.`;
  return notBetween === null
    ? [last]
    : [
        say`${last} Above ${atMost(notBetween.aboveKg, units)} and below ${atLeast(notBetween.belowKg, units)} it would be neither that nor within by the even loads.`,
      ];
}

function noRoom(room: Exclude<RoomLeft, { kind: 'room' }>, { palletKg, site }: RoomAsked, nothing: string): readonly Text[] {
  switch (room.kind) {
    case 'none':
      // The finding stands beside it with its figures.
      if (room.already) return [say`${nothing}: ${stopOf(room.because, site)} is over already.`];
      return [say`${nothing}${palletKg > 0 ? say`, not even the empty pallet of ${massOf(palletKg)}` : ''}. ${room.because.says}`];
    case 'no-fit':
      return [say`This does not fit here, whatever it weighs. ${room.because[0]?.says ?? ''}`];
    case 'not-assessable':
      return [say`How much more may stand here is not assessable. Not known: ${unknown(room.missing.map(({ input }) => input))}.`];
    case 'unlimited':
      return [say`The checks that would limit the mass here are left out, so there is no figure for it.`];
  }
}

/** The first few; the findings name them all. */
function unknown(inputs: readonly string[]): string {
  return inputs.length <= MOST_NAMED ? listed(inputs) : `${inputs.slice(0, MOST_NAMED).join(', ')} and ${inputs.length - MOST_NAMED} more`;
}
const MOST_NAMED = 3;

/** What would be used up; other checks go by their names. */
const STOPS: Readonly<Partial<Record<CheckName, string>>> = {
  'unit-load': 'the unit load limit',
  'level-total': 'the level’s rating',
  'beam-end-shear': 'the load on a beam end',
  'section-deflection': 'the beams’ sag',
  'pallet-bearing': 'the load under its pallets’ runners',
  'deck-panel': 'a deck panel',
  'bay-total': 'the rated bay load',
};

/** "beam bending", "upright frame A1|A2", "leg load at frame A1|A2", "clearance above the goods of level 1". */
export function stopOf({ check, place }: Finding, site: Site): string {
  const name = STOPS[check] ?? inside(CHECK_WORDS[check].name);
  if (check === 'clearance-above' && place.levelId !== undefined)
    return `${name} the goods of level ${findLevel(site, place.levelId).levelIndex + 1}`;
  if (place.frameId === undefined) return name;
  const { frame } = findFrame(site, place.frameId);
  return check === 'frame-storey' ? `upright frame ${frame.name}` : `${name} at frame ${frame.name}`;
}
