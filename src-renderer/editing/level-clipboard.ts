/** A level copied with all that stands on it, and pasted into one bay or several. */
import { pasteLevel } from '../../src-core/site/edits';
import type { Bay, Level, Site } from '../../src-core/site/site';
import { formatQuantity } from '../../src-core/units/format';
import { lengthOf } from '../../src-core/units/quantity';
import { newId } from './ids';
import type { OpenSite } from '../state/open-site.svelte';
import { bayPlace } from './places';
import { refusal, type Refused } from '../state/refusal';
import { countOf } from '../say';

const withGoods = (count: number): string => (count === 0 ? 'without goods' : `with ${countOf(count, 'unit load')}`);

export function copyLevelHere(open: OpenSite): void {
  const { bay, level } = open;
  if (bay === null || level === null) return;
  open.copiedLevel = level;
  const number = bay.levels.indexOf(level) + 1;
  open.say(`Level ${number} of bay ${bay.name} copied ${withGoods(level.placements.length)}. Choose another bay and paste it there.`);
}

/** Levels that stand where the copied one would go, and give way to it. */
export interface Replaced {
  readonly levels: number;
  readonly unitLoads: number;
  /** Damages and sag readings recorded on them. */
  readonly records: number;
}

export function replacedBy(bays: readonly Bay[], heightMm: number): Replaced {
  const levels = bays.flatMap((bay) => standingAt(bay, heightMm) ?? []);
  return {
    levels: levels.length,
    unitLoads: levels.reduce((sum, level) => sum + level.placements.length, 0),
    records: levels.reduce((sum, level) => sum + level.beamDamages.length + level.sags.length, 0),
  };
}

/** "2 levels with 3 unit loads and 1 record of damage or sag"; empty where nothing gives way. */
export function replacedWords({ levels, unitLoads, records }: Replaced): string {
  if (levels === 0) return '';
  const seen = records === 0 ? '' : ` and ${countOf(records, 'record of damage or sag', 'records of damage or sag')}`;
  return `${countOf(levels, 'level')} ${withGoods(unitLoads)}${seen}`;
}

/** Bays that the copied level can go into at this height: not where it stands itself. */
export const pasteTargets = (copied: Level | null, bays: readonly Bay[], heightMm: number): readonly Bay[] =>
  bays.filter((bay) => copied !== null && standingAt(bay, heightMm)?.id !== copied.id);

const standingAt = (bay: Bay, heightMm: number): Level | undefined => bay.levels.find((level) => level.heightMm === heightMm);

/**
 * Pastes the copied level into bays at its own height or another; a level that stands there gives way.
 * @returns why it could not be done, as a sentence; null if it was
 */
export function pasteLevelInto(open: OpenSite, bays: readonly Bay[], height?: number): Refused | null {
  const copied = open.copiedLevel;
  const heightMm = height ?? copied?.heightMm ?? 0;
  const targets = pasteTargets(copied, bays, heightMm);
  const at = formatQuantity(lengthOf(heightMm), open.reading);
  const trouble =
    copied === null
      ? 'No level is copied yet. Choose a level without choosing goods, and copy it first.'
      : bays.length === 0
        ? 'No bay is chosen. Choose the bays that the level goes into.'
        : targets.length === 0
          ? `The copied level itself stands there, at ${at}. Choose another bay, or paste it at another height.`
          : whatIsGone(open.site, copied);
  if (copied === null || trouble !== null) return tell(open, trouble ?? '');
  const replaced = replacedWords(replacedBy(targets, heightMm));
  const [only] = targets.length === 1 ? targets : [];
  const where = only ? `bay ${only.name}` : countOf(targets.length, 'bay');
  const refused = open.edit(`Paste a level into ${where}`, (site) =>
    targets.reduce((next, bay) => pasteLevel(next, bay.id, { ...copied, heightMm }, newId), site),
  );
  if (refused !== null) return refused;
  // What gave way may have been chosen; the level now there takes its place.
  const here = bayPlace(open.site, only?.id ?? open.selection.bayId)?.bay;
  const pasted = here && targets.some((bay) => bay.id === here.id) ? standingAt(here, heightMm) : undefined;
  if (pasted) open.select({ levelId: pasted.id });
  open.sayDone(`Level pasted into ${where} at ${at}.${replaced === '' ? '' : ` It took the place of ${replaced}. Undo brings that back.`}`);
  return null;
}

export function pasteLevelHere(open: OpenSite): void {
  if (open.bay !== null) pasteLevelInto(open, [open.bay]);
}

function tell(open: OpenSite, sentence: string): Refused {
  open.say(sentence);
  return refusal(sentence);
}

/** Beam types and goods may have been taken out of the libraries since the level was copied. */
function whatIsGone(site: Site, { beamTypeId, placements }: Level): string | null {
  const loads = new Set(site.unitLoads.map(({ id }) => id));
  const gone = [
    ...(beamTypeId !== null && !site.beamTypes.some(({ id }) => id === beamTypeId) ? ['its beam type'] : []),
    ...(placements.some(({ unitLoadId }) => !loads.has(unitLoadId)) ? ['goods on it'] : []),
  ];
  if (gone.length === 0) return null;
  return `The copied level cannot be pasted any more: ${gone.join(' and ')} left the libraries since. Undo that, or copy a level again.`;
}
