/** What was done about what was found: every closed action, in words, although what it was about has left the site. */
import { damagedPart } from '../checks/beam-damage';
import { MEMBER_WORDS } from '../checks/damage-class';
import { say, type Text } from '../checks/finding';
import { opening } from '../checks/phrase';
import type { Id, Site } from '../site/site';
import type { OpenAction } from './actions';
import type { Closing, FollowUp } from './follow-up';
import type { SeenDamage, Visit } from './visit';

export interface Done {
  readonly closing: Closing;
  readonly what: Text;
}

/**
 * The latest first. A damage that was repaired is named from the visits that saw it; where none did, because
 * it was entered at the rack's own form, it is only called a damage.
 * @param actions of the same site, open and closed
 */
export function doneList(site: Site, visits: readonly Visit[], { closings }: FollowUp, actions: readonly OpenAction[]): readonly Done[] {
  const told = new Map(actions.flatMap((action) => (action.closed === null ? [] : [[action.id, action.says] as const])));
  const seen = new Map(visits.flatMap(({ bays }) => bays.flatMap(({ damages }) => damages.map((damage) => [damage.id, damage] as const))));
  const names = namesOf(site);
  return closings
    .map((closing): Done => ({ closing, what: told.get(closing.actionId) ?? whatOf(closing.actionId, seen, names) }))
    .toSorted((a, b) => (a.closing.date < b.closing.date ? 1 : a.closing.date > b.closing.date ? -1 : 0));
}

const namesOf = ({ runs }: Site): ReadonlyMap<Id, string> =>
  new Map(
    runs.flatMap(({ frames, bays }) => [
      ...frames.map(({ id, name }): [Id, string] => [id, `frame ${name}`]),
      ...bays.flatMap((bay): [Id, string][] => [
        [bay.id, `bay ${bay.name}`],
        ...bay.levels.map(({ id }, i): [Id, string] => [id, `level ${i + 1} of bay ${bay.name}`]),
      ]),
    ]),
  );

function whatOf(actionId: string, seen: ReadonlyMap<Id, SeenDamage>, names: ReadonlyMap<Id, string>): Text {
  const [what = '', about = '', beam = ''] = actionId.split(/[:@]/);
  const name = (id: Id) => names.get(id) ?? 'a place that is no longer in the site';
  const damage = seen.get(about);
  if (damage?.on === 'frame') return say`Damage: ${MEMBER_WORDS[damage.member]} of ${name(damage.frameId)}.`;
  if (damage?.on === 'beam') return say`Damage: ${damagedPart(damage, name(damage.levelId))}.`;
  if (what === 'damage') return say`Damage of a frame.`;
  if (what === 'beam-damage') return say`Damage of a beam.`;
  if (what === 'sag') return say`Sag: the ${beam} beam of ${name(about)}.`;
  if (what === 'lock') return say`Missing lock: the ${beam} beam of ${name(about)}.`;
  if (what === 'plumb' && (names.get(about) ?? '').startsWith('frame')) return say`Out of plumb: ${name(about)}.`;
  return say`${opening(what)}: ${name(about)}.`;
}
