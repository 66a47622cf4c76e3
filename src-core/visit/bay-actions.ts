/**
 * What the visits of a bay ask for, one after the other: a finding stays until a later visit looks at
 * the same thing and finds it in order. What a visit did not look at it does not settle.
 *
 * What was carried into the site is told from there: damages and sags are told here only where an earlier
 * program finished the bay, which carried no beams.
 */
import type { LevelAudit } from '../audit/types';
import { damagedPart, unloadForBeam } from '../checks/beam-damage';
import { say, type Text } from '../checks/finding';
import { joined, opening } from '../checks/phrase';
import type { Bay, Id, Run } from '../site/site';
import type { Action, ActionInput, ActionKind, LevelRef } from './actions';
import { closingOf } from './follow-up';
import { levelsOf } from './frame-actions';
import { noticeDiffers } from './notice-seen';
import { judgeSagOfLevel } from './sag-of-level';
import type { BayVisit, BeamDamage, ChecklistItem, SagReading } from './visit';

/** A finding of a visit, before it is known since when. */
interface Found {
  readonly kind: ActionKind;
  readonly says: Text;
  readonly levels: readonly LevelRef[];
  /** It went into the site, which speaks of it from then on. */
  readonly carried?: boolean;
}

/** The visit that first found it, of those that found it without a break. */
export interface Since {
  readonly visitId: string;
  readonly date: string;
}

export interface ToldByVisits {
  readonly actions: readonly Action[];
  /** Since when each sag that the site speaks of has been found, by `sagKey`. */
  readonly sagsSince: ReadonlyMap<string, Since>;
}

export function visitActions(input: ActionInput): ToldByVisits {
  const sagsSince = new Map<string, Since>();
  const seen = new Map<Id, { readonly visitId: Id; readonly bay: BayVisit }[]>();
  for (const { id: visitId, bays } of input.visits.toSorted((a, b) => (a.started < b.started ? -1 : a.started > b.started ? 1 : 0)))
    for (const bay of bays)
      if (bay.finished) {
        const earlier = seen.get(bay.bayId);
        if (earlier === undefined) seen.set(bay.bayId, [{ visitId, bay }]);
        else earlier.push({ visitId, bay });
      }
  const actions = input.site.runs.flatMap((run) =>
    run.bays.flatMap((bay) => bayActions(input, run, bay, seen.get(bay.id) ?? [], sagsSince)),
  );
  return { actions, sagsSince };
}

function bayActions(
  input: ActionInput,
  run: Run,
  bay: Bay,
  visits: readonly { readonly visitId: Id; readonly bay: BayVisit }[],
  sagsSince: Map<string, Since>,
): readonly Action[] {
  const open = new Map<string, { found: Found; since: Since }>();
  for (const { visitId, bay: seen } of visits) {
    const now = { visitId, date: seen.date };
    const found = foundAt(input, run, bay, seen);
    for (const key of open.keys()) if (!found.has(key) && settles(seen, key)) open.delete(key);
    for (const [key, one] of found) {
      const before = open.get(key);
      const closed = before && closingOf(input.followUp, idOf(key, before.since));
      open.set(key, { found: one, since: before && !closed ? before.since : now });
    }
  }
  for (const [key, { found, since }] of open) {
    const closed = closingOf(input.followUp, idOf(key, since)) !== null;
    if (closed || (!found.carried && !knownBySite(bay, key))) continue;
    if (key.startsWith('sag:')) sagsSince.set(key, since);
    open.delete(key);
  }
  return Array.from(
    open,
    ([
      key,
      {
        found: { kind, says, levels },
        since,
      },
    ]) => ({
      kind,
      says,
      levels,
      id: idOf(key, since),
      class: null,
      runId: run.id,
      frameId: null,
      bayIds: [bay.id],
      found: since.date,
      due: null,
    }),
  );
}

const idOf = (key: string, since: Since): string => `${key}@${since.visitId}`;

const itemKey = (bay: BayVisit, item: ChecklistItem) => `${item}:${bay.bayId}`;
const lockKey = (levelId: string, beam: string, end: string) => `lock:${levelId}:${beam}:${end}`;
export const sagKey = ({ levelId, beam }: Pick<SagReading, 'levelId' | 'beam'>) => `sag:${levelId}:${beam}`;

/** Whether the site has the damage, or a reading of the beam, whoever put it there. */
function knownBySite({ levels }: Bay, key: string): boolean {
  const [what, about, beam] = key.split(':');
  if (what === 'beam') return levels.some(({ beamDamages }) => beamDamages.some(({ id }) => id === about));
  return what === 'sag' && levels.some(({ id, sags }) => id === about && sags.some((one) => one.beam === beam));
}

/** Whether the visit has looked at the same thing again, so that what an earlier one found no longer stands. */
function settles(seen: BayVisit, key: string): boolean {
  const { checklist, notice } = seen;
  const [what = ''] = key.split(':');
  if (what === 'lock') return checklist.locks !== 'not-looked-at';
  if (what === 'sag') return seen.sags.some((reading) => sagKey(reading) === key);
  if (what === 'beam') return false;
  if (what === 'notice') return [checklist.notices, notice.there, notice.matches].some((answer) => answer !== 'not-looked-at');
  return what in checklist && checklist[what as ChecklistItem] !== 'not-looked-at';
}

function foundAt(input: ActionInput, run: Run, bay: Bay, seen: BayVisit): ReadonlyMap<string, Found> {
  const found = new Map<string, Found>();
  const level = (levelId: string): LevelRef => ({ runId: run.id, bayId: bay.id, levelId });
  const nameOf = (levelId: string) => `level ${bay.levels.findIndex(({ id }) => id === levelId) + 1}`;
  for (const { levelId, beam, end } of seen.missingLocks)
    found.set(lockKey(levelId, beam, end), {
      kind: 'replace-lock',
      says: say`The lock at the ${end} end of the ${beam} beam of ${nameOf(levelId)} of bay ${bay.name} is missing. Replace it at once; nothing may be put on the level until then.`,
      levels: [level(levelId)],
    });
  for (const [item, words] of Object.entries(PUT_RIGHT) as [ChecklistItem, (bay: Bay) => Text][]) {
    if (seen.checklist[item] !== 'no') continue;
    // Each missing lock speaks for itself; only where none is named does the question as a whole.
    if (item === 'locks' && seen.missingLocks.length > 0) continue;
    if (item === 'notices') continue;
    found.set(itemKey(seen, item), {
      kind: item === 'locks' ? 'replace-lock' : 'put-right',
      says: words(bay),
      levels: item === 'locks' ? levelsOf(run.id, bay) : [],
    });
  }
  const notice = input.site.notices.find(({ id }) => id === bay.noticeId) ?? null;
  const differs = noticeDiffers(notice, bay, seen.notice);
  if (differs.length > 0 || seen.checklist.notices === 'no')
    found.set(`notice:${bay.id}`, {
      kind: 'notice',
      says: say`${differs.length > 0 ? joined(differs) : say`The load notice of bay ${bay.name} is not as it must be.`} No rating holds here until the supplier confirms one in writing.`,
      levels: [],
    });
  const carried = seen.carried !== null;
  for (const damage of seen.damages)
    if (damage.on === 'beam')
      found.set(`beam:${damage.id}`, {
        ...beamDamage(damage, `${nameOf(damage.levelId)} of bay ${bay.name}`, level(damage.levelId)),
        carried,
      });
  const audits =
    seen.sags.length === 0
      ? []
      : (input.audit.runs.find(({ runId }) => runId === run.id)?.bays.find(({ bayId }) => bayId === bay.id)?.levels ?? []);
  for (const reading of seen.sags) {
    const audit = audits.find(({ levelId }) => levelId === reading.levelId);
    const one = audit && sagFound(input, audit, reading, level(reading.levelId));
    if (one) found.set(sagKey(reading), { ...one, carried });
  }
  return found;
}

const beamDamage = (damage: BeamDamage, of: string, level: LevelRef): Found => ({
  kind: 'unload',
  says: say`${opening(damagedPart(damage, of))} is damaged${damage.note === '' ? '' : ` (${damage.note})`}. No millimetres excuse a damaged beam. ${unloadForBeam(of)}`,
  levels: [level],
});

function sagFound(input: ActionInput, audit: LevelAudit, reading: SagReading, level: LevelRef): Found | null {
  const judged = judgeSagOfLevel(input.site, audit, reading);
  if (judged === null || judged.verdict !== 'over') return null;
  return { kind: judged.outOfUse ? 'out-of-use' : 'unload', says: joined(judged.says), levels: [level] };
}

const PUT_RIGHT: Readonly<Record<ChecklistItem, (bay: Bay) => Text>> = {
  locks: (bay) =>
    say`Locks are missing in bay ${bay.name}; which ones was not taken down. Replace them at once; nothing may be put on its levels until then.`,
  anchors: (bay) => say`Anchors are missing or loose at bay ${bay.name}. Ratings take anchored frames for granted: have them put right.`,
  notices: (bay) => say`The load notice of bay ${bay.name} is not as it must be.`,
  protectors: (bay) => say`Upright protectors are missing or damaged at bay ${bay.name}. Have them put right.`,
  pallets: (bay) => say`Pallets in bay ${bay.name} are damaged or stand badly. Take them down and repack them.`,
  decks: (bay) =>
    say`Decks or support bars of bay ${bay.name} are damaged, loose or missing. Put nothing on them until they are put right.`,
  plumb: (bay) => say`Bay ${bay.name} does not look plumb. Measure its frames.`,
  floor: (bay) => say`The floor at bay ${bay.name} is damaged or has settled. Have a competent person look at it.`,
};
