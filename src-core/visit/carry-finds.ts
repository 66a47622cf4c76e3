/** Damages and sag readings of a visit, put to the frames and levels of the site. */
import type { BeamDamage, BeamSag, Damage, Frame, Id, Level, Site } from '../site/site';
import { differences } from './differences';
import type { BayVisit, Carried, SagReading, SeenDamage } from './visit';

export interface Finds {
  readonly damages: readonly SeenDamage[];
  /** What the same visit carried before. */
  readonly was: Carried | null;
  /** Ids of the site's frames and levels. */
  readonly places: ReadonlySet<Id>;
}

/** Ids of every damage that the site has. */
export const damagesBefore = (site: Site): ReadonlySet<Id> =>
  new Set(
    site.runs.flatMap(({ frames, bays }) => [
      ...frames.flatMap(({ damages }) => damages.map(({ id }) => id)),
      ...bays.flatMap(({ levels }) => levels.flatMap(({ beamDamages }) => beamDamages.map(({ id }) => id))),
    ]),
  );

/** Whether it is the same find, measured alike; ids of damages belong to it. */
export const sameFind = <T extends SeenDamage | SagReading>(one: T, other: T): boolean =>
  ('id' in one ? one.id : '') === ('id' in other ? other.id : '') && differences(one, other).length === 0;

/** The frame or level that it is at. */
export const placeOf = (damage: SeenDamage): Id => (damage.on === 'frame' ? damage.frameId : damage.levelId);

/** Stays where it is, unless the visit has it somewhere else by now, or took it out after it had brought it. */
function stays(id: Id, at: Id, { damages, was, places }: Finds): boolean {
  const now = damages.find((one) => one.id === id);
  if (now !== undefined) return placeOf(now) === at || !places.has(placeOf(now));
  return !(was?.damages.some((one) => one.id === id) ?? false);
}

/** The same list where nothing changes. */
function placed<T extends { readonly id: Id }>(before: readonly T[], at: Id, finds: Finds, own: readonly T[]): readonly T[] {
  const kept = before.filter(({ id }) => stays(id, at, finds)).map((one) => own.find(({ id }) => id === one.id) ?? one);
  const after = [...kept, ...own.filter(({ id }) => !before.some((one) => one.id === id))];
  const same =
    after.length === before.length && after.every((one, i) => one.id === before[i]?.id && differences(one, before[i]).length === 0);
  return same ? before : after;
}

export function withFrameDamages({ id, damages }: Frame, finds: Finds): readonly Damage[] {
  const own = finds.damages.flatMap((damage): Damage[] => {
    if (damage.on !== 'frame' || damage.frameId !== id) return [];
    const { on: _, frameId: __, ...rest } = damage;
    return [rest];
  });
  return placed(damages, id, finds, own);
}

export function withBeamDamages({ id, beamDamages }: Level, finds: Finds): readonly BeamDamage[] {
  const own = finds.damages.flatMap((damage): BeamDamage[] => {
    if (damage.on !== 'beam' || damage.levelId !== id) return [];
    const { on: _, levelId: __, ...rest } = damage;
    return [rest];
  });
  return placed(beamDamages, id, finds, own);
}

const MEASURES = ['loadedMm', 'unloadedMm', 'sidewaysMm'] as const;
type Measure = (typeof MEASURES)[number];

/**
 * One reading a beam: what was measured now replaces what was measured before, and what was not measured
 * now stays, because a permanent set does not go by being left out. A reading later than the visit stays
 * whole. The same list where nothing changes.
 */
export function carrySags({ id, sags }: Level, seen: BayVisit): readonly BeamSag[] {
  const after = (['front', 'rear'] as const).reduce((all, beam) => carrySag(all, id, beam, seen), sags);
  return differences(sags, after).length === 0 ? sags : after;
}

function carrySag(
  sags: readonly BeamSag[],
  levelId: Id,
  beam: 'front' | 'rear',
  { sags: read, carried, date }: BayVisit,
): readonly BeamSag[] {
  const ofBeam = (one: SagReading) => one.levelId === levelId && one.beam === beam;
  const reading = read.find(ofBeam);
  const was = carried?.sags.find(ofBeam);
  const before = sags.find((one) => one.beam === beam);
  if ((reading === undefined && was === undefined) || (before !== undefined && before.found > date)) return sags;
  /** Of this visit; else of an earlier one; but not of this visit before it was taken up again. */
  const measured = (key: Measure): number | null => {
    if (reading !== undefined && reading[key] !== null) return reading[key];
    const earlier = before?.[key] ?? null;
    return earlier !== null && earlier === was?.[key] ? null : earlier;
  };
  const others = sags.filter((one) => one.beam !== beam);
  if (MEASURES.every((key) => measured(key) === null)) return others;
  const merged: BeamSag = {
    beam,
    loadedMm: measured('loadedMm'),
    unloadedMm: measured('unloadedMm'),
    sidewaysMm: measured('sidewaysMm'),
    found: reading === undefined ? (before?.found ?? date) : date,
  };
  return before === undefined ? [...sags, merged] : sags.map((one) => (one.beam === beam ? merged : one));
}
