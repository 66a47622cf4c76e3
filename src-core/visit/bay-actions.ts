/**
 * What the visits of a bay ask for, one after the other: a finding stays until a later visit looks at
 * the same thing and finds it in order. What a visit did not look at it does not settle.
 */
import type { LevelAudit } from '../audit/types';
import { say, type Text } from '../checks/finding';
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
}

interface Since {
  readonly visitId: string;
  readonly date: string;
}

export function visitActions(input: ActionInput): readonly Action[] {
  const seen = new Map<Id, { readonly visitId: Id; readonly bay: BayVisit }[]>();
  for (const { id: visitId, bays } of input.visits.toSorted((a, b) => (a.started < b.started ? -1 : a.started > b.started ? 1 : 0)))
    for (const bay of bays)
      if (bay.finished) {
        const earlier = seen.get(bay.bayId);
        if (earlier === undefined) seen.set(bay.bayId, [{ visitId, bay }]);
        else earlier.push({ visitId, bay });
      }
  return input.site.runs.flatMap((run) => run.bays.flatMap((bay) => bayActions(input, run, bay, seen.get(bay.id) ?? [])));
}

function bayActions(
  input: ActionInput,
  run: Run,
  bay: Bay,
  visits: readonly { readonly visitId: Id; readonly bay: BayVisit }[],
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
  return Array.from(open, ([key, { found, since }]) => ({
    ...found,
    id: idOf(key, since),
    class: null,
    runId: run.id,
    frameId: null,
    bayIds: [bay.id],
    found: since.date,
    due: null,
  }));
}

const idOf = (key: string, since: Since): string => `${key}@${since.visitId}`;

const itemKey = (bay: BayVisit, item: ChecklistItem) => `${item}:${bay.bayId}`;
const lockKey = (levelId: string, beam: string, end: string) => `lock:${levelId}:${beam}:${end}`;
const sagKey = ({ levelId, beam }: SagReading) => `sag:${levelId}:${beam}`;

/** Whether the visit has looked at the same thing again, so that what an earlier one found no longer stands. */
function settles(seen: BayVisit, key: string): boolean {
  const { checklist, notice } = seen;
  const [what = ''] = key.split(':');
  if (what === 'lock') return checklist.locks !== 'not-looked-at';
  if (what === 'sag') return seen.sags.some((reading) => sagKey(reading) === key);
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
  for (const damage of seen.damages) if (damage.on === 'beam') found.set(`beam:${damage.id}`, beamDamage(damage, bay, level, nameOf));
  const audits =
    seen.sags.length === 0
      ? []
      : (input.audit.runs.find(({ runId }) => runId === run.id)?.bays.find(({ bayId }) => bayId === bay.id)?.levels ?? []);
  for (const reading of seen.sags) {
    const audit = audits.find(({ levelId }) => levelId === reading.levelId);
    const one = audit && sagFound(input, audit, reading, level);
    if (one) found.set(sagKey(reading), one);
  }
  return found;
}

function beamDamage(damage: BeamDamage, bay: Bay, level: (id: string) => LevelRef, nameOf: (id: string) => string): Found {
  const part = damage.member === 'beam' ? `${damage.beam} beam` : `connector of the ${damage.beam} beam`;
  return {
    kind: 'unload',
    says: say`The ${part} of ${nameOf(damage.levelId)} of bay ${bay.name} is damaged${damage.note === '' ? '' : ` (${damage.note})`}. No millimetres excuse a damaged beam: unload the level at once and have the beam replaced by the maker’s own.`,
    levels: [level(damage.levelId)],
  };
}

function sagFound(input: ActionInput, audit: LevelAudit, reading: SagReading, level: (id: string) => LevelRef): Found | null {
  const judged = judgeSagOfLevel(input.site, audit, reading);
  if (judged === null || judged.verdict !== 'over') return null;
  return {
    kind: judged.outOfUse ? 'out-of-use' : 'unload',
    says: judged.outOfUse ? say`${joined(judged.says)} Unload the level, and take both beams out.` : joined(judged.says),
    levels: [level(reading.levelId)],
  };
}

const joined = (texts: readonly Text[]): Text => texts.flatMap((text, i) => (i === 0 ? [...text] : [' ', ...text]));

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
