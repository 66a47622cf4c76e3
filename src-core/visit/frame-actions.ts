/** What damaged and leaning frames ask for: the bays on both sides, and those tied to them from behind. */
import { countsAsTied } from '../checks/damage';
import { classOfDamage, MEMBER_WORDS, type DamageJudged } from '../checks/damage-class';
import { say, type Text } from '../checks/finding';
import { joined, listed, opening } from '../checks/phrase';
import { resolveRules, type ResolvedRules } from '../checks/rule-sets';
import { baysBehind } from '../site/behind';
import type { Bay, Damage, Frame, Id, Run, Site } from '../site/site';
import { dateWords } from '../units/dates';
import type { Action, ActionInput, LevelRef } from './actions';
import { standing, type FollowUp } from './follow-up';

interface FrameAt {
  readonly site: Site;
  readonly run: Run;
  readonly frame: Frame;
  readonly index: number;
}

export function damageActions({ site, audit, followUp, today }: ActionInput): readonly Action[] {
  const rules = resolveRules(site.rules);
  return site.runs.flatMap((run) => {
    const found = audit.runs.find(({ runId }) => runId === run.id);
    return run.frames.flatMap((frame, index) => {
      const at = { site, run, frame, index };
      const leans = found?.frames[index]?.findings.some(({ check, verdict }) => check === 'plumb' && verdict === 'over') ?? false;
      return [...ofDamages(at, rules, today), ...(leans ? [ofPlumb(at)] : [])].map((action) => stillThere(followUp, action));
    });
  });
}

function ofDamages(at: FrameAt, rules: ResolvedRules, today: string): readonly Action[] {
  const { site, frame } = at;
  const judged = frame.damages.map((damage) => ({ damage, judged: classOfDamage(damage, rules, today) }));
  const actions = judged.map(({ damage, judged: one }) => ofDamage(at, damage, one));
  const ambers = judged.flatMap(({ damage, judged: one }) =>
    one.class === 'amber' ? one.bends.filter((bend) => bend.class === 'amber').map(() => damage) : [],
  );
  const red = judged.some(({ judged: one }) => one.class === 'red');
  if (!site.rules.twoAmbersMakeRed || ambers.length < 2 || red) return actions;
  const days = ambers.map(({ found }) => found).filter((day) => day !== '');
  return [
    {
      ...base(at, `two-ambers:${frame.id}`, days.toSorted().at(-1) ?? ''),
      kind: 'unload',
      class: 'red',
      says: say`${ambers.length} amber bends on frame ${frame.name}, which this site counts as red. ${unload(at)}`,
      due: null,
    },
    ...actions,
  ];
}

function ofDamage(at: FrameAt, damage: Damage, judged: DamageJudged): Action {
  const { frame } = at;
  const part = say`${opening(MEMBER_WORDS[damage.member])} of frame ${frame.name}`;
  const action = base(at, `damage:${damage.id}`, damage.found);
  switch (judged.class) {
    case 'green':
      return {
        ...action,
        kind: 'watch',
        class: 'green',
        says: say`${part}: record it, and measure it again at the next inspection.`,
        due: null,
        levels: [],
      };
    case 'amber':
      return {
        ...action,
        kind: 'do-not-reload',
        class: 'amber',
        says:
          judged.lastAmberDay === null
            ? say`${part}: do not reload what is emptied at ${bayNames(at)}, and have it repaired. The day it was found is not known, so its clock cannot run.`
            : say`${part}: do not reload what is emptied at ${bayNames(at)}, and have it repaired by ${dateWords(judged.lastAmberDay)}; after that day it counts as red.`,
        due: judged.lastAmberDay,
      };
    case 'red':
      return {
        ...action,
        kind: 'unload',
        class: 'red',
        says:
          judged.because === 'too-long-amber'
            ? say`${part}, amber since ${dateWords(damage.found)} and so red. ${unload(at)}`
            : judged.because === 'torn'
              ? say`${part}, dented or torn. ${unload(at)}`
              : judged.because === 'any-damage'
                ? say`${part} is damaged, and this rule set asks to unload on any visible damage. ${unload(at)}`
                : say`${part}. ${unload(at)}`,
        due: judged.lastAmberDay,
      };
    case 'unclassed':
      return {
        ...action,
        kind: 'unload',
        class: 'unclassed',
        says: say`${part} is damaged and cannot be classed yet: treat it as red until it is. ${unload(at)}`,
        due: null,
      };
  }
}

/** Two ambers go by themselves with one of the two, and are never closed. */
export function stillThere(book: FollowUp, action: Action): Action {
  const { id, says } = standing(book, action.id);
  return says.length === 0 ? action : { ...action, id, says: joined([action.says, ...says]) };
}

const ofPlumb = (at: FrameAt): Action => ({
  ...base(at, `plumb:${at.frame.id}`, ''),
  kind: 're-plumb',
  class: null,
  says:
    at.site.rules.set === 'united-states'
      ? say`Out of plumb: frame ${at.frame.name}. Unload ${bayNames(at)} and have the frame plumbed before it is loaded again.`
      : say`Out of plumb: frame ${at.frame.name}. Have a competent person judge it; do not reload what is emptied at ${bayNames(at)} until then.`,
  due: null,
});

function base(at: FrameAt, id: string, found: string): Omit<Action, 'kind' | 'class' | 'says' | 'due'> {
  const bays = baysAtFrame(at);
  return {
    id,
    runId: at.run.id,
    frameId: at.frame.id,
    bayIds: bays.map(({ bay }) => bay.id),
    levels: bays.flatMap(({ runId, bay }) => levelsOf(runId, bay)),
    found,
  };
}

export const levelsOf = (runId: Id, bay: Bay): readonly LevelRef[] => bay.levels.map(({ id }) => ({ runId, bayId: bay.id, levelId: id }));

/** Both bays of the frame, and those at it from behind where the runs are tied back to back. */
function baysAtFrame({ site, run, index }: FrameAt): readonly { readonly runId: Id; readonly bay: Bay }[] {
  const own = [run.bays[index - 1], run.bays[index]].flatMap((bay) => (bay === undefined ? [] : [{ runId: run.id, bay }]));
  return [...own, ...baysBehind(site, run, index)];
}

function unload(at: FrameAt): Text {
  const { site, run } = at;
  const now = say`Unload every level of ${bayNames(at)} at once, bar them from reloading, and have the part replaced by the maker’s own.`;
  if (run.backToBack?.rowSpacers !== 'unknown') return now;
  const behind = site.runs.find(({ id }) => id === run.backToBack?.runId);
  return behind === undefined ? now : say`${now} ${countsAsTied(`run ${behind.name}`)}`;
}

function bayNames(at: FrameAt): string {
  const names = baysAtFrame(at).map(({ bay }) => `bay ${bay.name}`);
  return names.length === 0 ? 'the frame' : listed(names);
}
