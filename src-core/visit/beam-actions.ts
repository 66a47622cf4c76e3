/** What damaged, bent and sagging beams ask for, as the site has them: their level, and both beams where one is set. */
import type { LevelAudit } from '../audit/types';
import { damagedPart, whyRed, unloadForBeam } from '../checks/beam-damage';
import { say } from '../checks/finding';
import { joined, opening } from '../checks/phrase';
import type { Bay, BeamDamage, BeamSag, Level, Run } from '../site/site';
import type { Action, ActionInput } from './actions';
import { sagKey, type Since } from './bay-actions';
import { stillThere } from './frame-actions';
import { judgeSagOfLevel } from './sag-of-level';

interface LevelAt {
  readonly run: Run;
  readonly bay: Bay;
  readonly level: Level;
  /** 0 for the lowest. */
  readonly index: number;
}

/**
 * @param sagsSince since when the visits have found a sag that the site has
 */
export function beamActions(input: ActionInput, sagsSince: ReadonlyMap<string, Since>): readonly Action[] {
  return input.site.runs.flatMap((run) =>
    run.bays.flatMap((bay) =>
      bay.levels.flatMap((level, index): readonly Action[] => {
        if (level.beamDamages.length === 0 && level.sags.length === 0) return [];
        const at = { run, bay, level, index };
        return [
          ...level.beamDamages.map((damage) => ofDamage(input, at, damage)),
          ...level.sags.flatMap((reading) => ofSag(input, at, reading, sagsSince)),
        ].map((action) => stillThere(input.followUp, action));
      }),
    ),
  );
}

const base = ({ run, bay, level }: LevelAt): Pick<Action, 'runId' | 'frameId' | 'bayIds' | 'levels' | 'due'> => ({
  runId: run.id,
  frameId: null,
  bayIds: [bay.id],
  levels: [{ runId: run.id, bayId: bay.id, levelId: level.id }],
  due: null,
});

const levelName = ({ bay, index }: LevelAt): string => `level ${index + 1} of bay ${bay.name}`;

function ofDamage({ site }: ActionInput, at: LevelAt, damage: BeamDamage): Action {
  const of = levelName(at);
  const note = damage.note.trim() === '' ? '' : ` (${damage.note.trim()})`;
  return {
    ...base(at),
    id: `beam-damage:${damage.id}`,
    kind: 'unload',
    class: 'red',
    says: say`${opening(damagedPart(damage, of))}${note} ${whyRed(damage, site.rules.set)} ${unloadForBeam(of)}`,
    found: damage.found,
  };
}

/** In the words of the audit, which knows the load as well; judged by the site alone where the audit is not asked. */
function ofSag(input: ActionInput, at: LevelAt, reading: BeamSag, sagsSince: ReadonlyMap<string, Since>): readonly Action[] {
  const audit = levelAudit(input, at);
  const finding = audit?.findings.find(({ check, place }) => check === 'beam-sag' && place.beam === reading.beam);
  const judged = audit === null ? null : judgeSagOfLevel(input.site, audit, { ...reading, levelId: at.level.id });
  if ((finding?.verdict ?? judged?.verdict) !== 'over') return [];
  const key = sagKey({ levelId: at.level.id, beam: reading.beam });
  const since = sagsSince.get(key);
  // Told apart from a reading that was closed: what is read anew is a finding of its own.
  const read = `${reading.found}:${[reading.loadedMm, reading.unloadedMm, reading.sidewaysMm].map((mm) => mm ?? '').join(':')}`;
  return [
    {
      ...base(at),
      id: `${key}@${since?.visitId ?? read}`,
      kind: judged?.outOfUse ? 'out-of-use' : 'unload',
      class: null,
      says: finding?.says ?? joined(judged?.says ?? []),
      found: since?.date ?? reading.found,
    },
  ];
}

const levelAudit = ({ audit }: ActionInput, { run, bay, level }: LevelAt): LevelAudit | null =>
  audit.runs
    .find(({ runId }) => runId === run.id)
    ?.bays.find(({ bayId }) => bayId === bay.id)
    ?.levels.find(({ levelId }) => levelId === level.id) ?? null;
