/**
 * Every check over a bay, a run or a whole site. This is the only place that joins the site with its
 * checks. Checks that the site leaves out are not run and are listed with their reasons.
 */
import { worstVerdict, type Finding, type Place } from '../checks/finding';
import type { Bay, Frame, Id, Run, Site } from '../site/site';
import { bayFindings, runFindings } from './bay-checks';
import { bayContentsFindings } from './bay';
import { counterpart, mirrored } from './behind';
import { createAuditCache, type AuditCache } from './cache';
import { contextOf, type BayWork, type FrameWork, type SiteContext } from './context';
import { frameAudit } from './frame';
import { goodsWork } from './goods';
import { levelFindings } from './geometry';
import { auditLevel } from './level';
import { bayContents } from './level-work';
import { sourceWords } from './source-words';
import type { BayAudit, FrameAudit, LevelAudit, RunAudit, SiteAudit } from './types';
import { governingOf, verdictOfFindings } from './verdict';

/**
 * @param today ISO date, for clocks such as that of amber damage
 * @param cache keeps parts for the next audit of the edited site; without one everything is made anew
 * @throws RangeError if the site has no such run
 */
export function auditRun(site: Site, runId: Id, today: string, cache: AuditCache = createAuditCache()): RunAudit {
  const steps = auditRunInSteps(site, runId, today, cache);
  for (;;) {
    const { done, value } = steps.next();
    if (done) return value;
  }
}

/**
 * The same bay by bay: what is done after each step gets the bay, and may do the rest later or never.
 * @throws RangeError if the site has no such run
 */
export function* auditRunInSteps(site: Site, runId: Id, today: string, cache: AuditCache): Generator<BayAudit, RunAudit> {
  const audit = runAuditor(site, runId, today, cache);
  const { run } = audit;
  const bays: BayAudit[] = [];
  for (let index = 0; index < run.bays.length; index++) {
    const bay = audit.bay(index);
    bays.push(bay);
    yield bay;
  }
  const frames = run.frames.map((_, index) => audit.frame(index));
  const findings = runFindings(audit.context, { run, place: { runId }, frames });
  return {
    runId,
    verdict: worstVerdict([...bays, ...findings.filter(({ counts }) => counts)].map(({ verdict }) => verdict)),
    bays,
    frames,
    findings,
    notChecked: site.rules.leftOut,
  };
}

/**
 * One bay with its levels and its two frames, and nothing else of its run but the neighbours they need.
 * @throws RangeError if the site has no such run or bay
 */
export function auditBay(site: Site, runId: Id, bayId: Id, today: string, cache: AuditCache = createAuditCache()): BayAudit {
  const audit = runAuditor(site, runId, today, cache);
  const index = audit.run.bays.findIndex(({ id }) => id === bayId);
  if (index < 0) throw new RangeError(`no bay "${bayId}" in run "${runId}"`);
  return audit.bay(index);
}

/**
 * One frame, and nothing else of its run but the bays at its sides.
 * @throws RangeError if the site has no such run or frame
 */
export function auditFrame(site: Site, runId: Id, frameId: Id, today: string, cache: AuditCache = createAuditCache()): FrameAudit {
  const audit = runAuditor(site, runId, today, cache);
  const index = audit.run.frames.findIndex(({ id }) => id === frameId);
  if (index < 0) throw new RangeError(`no frame "${frameId}" in run "${runId}"`);
  return audit.frame(index);
}

/** A site without runs has nothing that could be within. */
export function auditSite(site: Site, today: string, cache: AuditCache = createAuditCache()): SiteAudit {
  const runs = site.runs.map(({ id }) => auditRun(site, id, today, cache));
  return { verdict: worstVerdict(runs.map(({ verdict }) => verdict)), runs };
}

interface RunAuditor {
  readonly context: SiteContext;
  readonly run: Run;
  readonly frameWork: (index: number) => FrameWork;
  readonly frame: (index: number) => FrameAudit;
  readonly bay: (index: number) => BayAudit;
}

function runAuditor(site: Site, runId: Id, today: string, cache: AuditCache): RunAuditor {
  const context = cache.remember('context', site, [today], () => contextOf(site, today));
  const run = context.runs.get(runId);
  if (run === undefined) throw new RangeError(`no run "${runId}" in the site`);
  const behind = run.backToBack === null ? null : (context.runs.get(run.backToBack.runId) ?? null);
  const libraries = [site.pallets, site.unitLoads, site.notices, site.beamTypes, site.frameTypes, site.rules, runId];
  const around = [
    ...libraries,
    site.floors,
    site.seismic,
    site.outdoors,
    today,
    run.name,
    run.floorId,
    run.loadedBy,
    run.twoDeep,
    behind?.name,
    // Not the tie itself, which is another value in every copy of the run.
    run.backToBack?.runId,
    run.backToBack?.gapMm,
    run.backToBack?.rowSpacers,
  ];
  // One value that stands for all of them, as every bay and frame asks.
  const surroundings = cache.remember(`surroundings of ${runId}`, site.unitLoads, around, () => ({}));
  // Asked once: a bay far off may break the mirror image of the two runs.
  const exact = behind !== null && mirrored(run, behind);
  /** What stands behind bay `index`, or behind all of them where it is not known which. */
  const behindBay = (index: number): readonly unknown[] => {
    if (behind === null) return [];
    const j = counterpart(index, behind.bays.length);
    return exact ? [behind.bays[j], behind.frames[j], behind.frames[j + 1]] : [behind.bays, behind.frames];
  };
  /** What stands behind frame `index`: its counterpart and both bays there, which reach to the next frames. */
  const behindFrame = (index: number): readonly unknown[] => {
    if (behind === null) return [];
    const j = counterpart(index, behind.frames.length);
    const { bays, frames } = behind;
    return exact ? [bays[j - 1], bays[j], frames[j - 1], frames[j], frames[j + 1]] : [bays, frames];
  };

  const goodsOf = (id: Id) => {
    const unitLoad = context.unitLoads.get(id);
    if (unitLoad === undefined) throw new RangeError(`no unit load "${id}" in the site`);
    return cache.remember('goods', unitLoad, [site.pallets], () => goodsWork(context, id));
  };

  const work = (index: number): BayWork => {
    const [bay, left, right] = bayAt(run, index);
    const typeOf = (typeId: Id | null) => (typeId === null ? null : (context.frameTypes.get(typeId) ?? null));
    const frameTypes = [typeOf(left.typeId), typeOf(right.typeId)] as const;
    const place: Place = { runId, bayId: bay.id };
    const contents = cache.remember('contents', bay, [left, right, ...libraries], () =>
      bayContents(
        context,
        place,
        bay,
        [
          { frame: left, type: frameTypes[0] },
          { frame: right, type: frameTypes[1] },
        ],
        goodsOf,
      ),
    );
    const notice = bay.noticeId === null ? null : (context.notices.get(bay.noticeId) ?? null);
    const noticeFrom =
      notice === null ? '' : cache.remember('notice', notice, [], () => `load notice ${notice.name}; ${sourceWords(notice.source)}`);
    return { run, bay, index, place, notice, noticeFrom, frames: [left, right], frameTypes, ...contents };
  };

  const frameAt = (index: number): Frame => {
    const one = run.frames[index];
    if (one === undefined) throw new RangeError(`run "${runId}" has no frame ${index}`);
    return one;
  };

  const frameWork = (index: number): FrameWork => {
    const one = frameAt(index);
    return {
      run,
      frame: one,
      index,
      place: { runId, frameId: one.id },
      type: one.typeId === null ? null : (context.frameTypes.get(one.typeId) ?? null),
      left: index > 0 ? work(index - 1) : null,
      right: index < run.bays.length ? work(index) : null,
      behind: () => {
        if (behind === null) return [];
        const other = runAuditor(site, behind.id, today, cache);
        return exact ? [other.frameWork(counterpart(index, behind.frames.length))] : behind.frames.map((_, i) => other.frameWork(i));
      },
    };
  };

  /** Each frame is asked for by the bays at both its sides and by the run. */
  const made: FrameAudit[] = [];
  const frame = (index: number): FrameAudit => (made[index] ??= frameAudited(index));

  const frameAudited = (index: number): FrameAudit => {
    const one = frameAt(index);
    const { bays, frames } = run;
    const from = [bays[index - 1], bays[index], frames[index - 1], frames[index + 1], ...behindFrame(index), surroundings];
    return cache.remember('frame', one, from, () => frameAudit(context, frameWork(index)));
  };

  const bay = (index: number): BayAudit => {
    const [one, left, right] = bayAt(run, index);
    const own = cache.remember('bay', one, [left, right, ...behindBay(index), surroundings], () => ownAudit(context, work(index)));
    const frames = [frame(index), frame(index + 1)];
    return cache.remember('whole bay', one, [own, ...frames], () => withFrames(one, own, frames));
  };
  return { context, run, frameWork, frame, bay };
}

function bayAt(run: Run, index: number): readonly [Bay, Run['frames'][number], Run['frames'][number]] {
  const bay = run.bays[index];
  const left = run.frames[index];
  const right = run.frames[index + 1];
  if (bay === undefined || left === undefined || right === undefined)
    throw new RangeError(
      `run "${run.id}" has ${run.bays.length} bays and ${run.frames.length} frames; bay ${index} needs a frame on each side`,
    );
  return [bay, left, right];
}

interface OwnAudit {
  readonly levels: readonly LevelAudit[];
  readonly findings: readonly Finding[];
}

/** A bay's levels and the bay itself, without its frames. */
function ownAudit(context: SiteContext, work: BayWork): OwnAudit {
  return {
    levels: work.levels.map((level) => auditLevel(context, work, level, levelFindings(context, work, level))),
    findings: [...bayContentsFindings(context, work), ...bayFindings(context, work)],
  };
}

function withFrames(bay: Bay, { levels, findings }: OwnAudit, frames: readonly FrameAudit[]): BayAudit {
  const all = [...findingsOfBay({ levels, findings }), ...frames.flatMap(({ findings: own }) => own)];
  const total = levels.reduce<number | null>((sum, { totalKg }) => (sum === null || totalKg === null ? null : sum + totalKg), 0);
  return {
    bayId: bay.id,
    // From the findings, not the parts' verdicts: a part whose checks are all left out says nothing.
    verdict: verdictOfFindings(all),
    governing: governingOf(all),
    totalKg: total,
    levels,
    findings,
  };
}

const findingsOfBay = ({ levels, findings }: OwnAudit): readonly Finding[] => [...findings, ...levels.flatMap(({ findings: own }) => own)];
