/** Copies of bays, levels and goods with ids of their own. `newId` gives a fresh id at each call. */
import type { Bay, Frame, Id, Level, Placement, TemplateGoods } from './site';

export type NewId = () => Id;

export const copyOfGoods = (goods: readonly TemplateGoods[], newId: NewId): readonly Placement[] =>
  goods.map((placement) => ({ ...placement, id: newId() }));

/** A level of the same make. Locks, damage and sag that were seen at the one say nothing of the other. */
export const copyOfLevel = (level: Level, newId: NewId): Level => ({
  ...level,
  id: newId(),
  locks: 'unknown',
  beamDamages: [],
  sags: [],
  placements: copyOfGoods(level.placements, newId),
});

export const copyOfBay = (bay: Bay, name: string, newId: NewId): Bay => ({
  ...bay,
  id: newId(),
  name,
  levels: bay.levels.map((level) => copyOfLevel(level, newId)),
  onFloor: copyOfGoods(bay.onFloor, newId),
});

/** A frame of the same make. What was seen on the one says nothing of the other. */
export const copyOfFrame = (frame: Frame, name: string, newId: NewId): Frame => ({
  ...frame,
  id: newId(),
  name,
  anchored: 'unknown',
  restrained: 'unknown',
  plumb: null,
  damages: [],
});
