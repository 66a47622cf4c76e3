import fc from 'fast-check';
import { expect, test } from 'vitest';
import { auditBay, auditRun, auditSite } from '../../../src-core/audit/audit';
import { createAuditCache } from '../../../src-core/audit/cache';
import type { SiteAudit } from '../../../src-core/audit/types';
import { CHECKS, compareVerdicts } from '../../../src-core/checks/finding';
import { movePlacement } from '../../../src-core/site/edits';
import type { Bay, Damage, Floor, Frame, Run, Site } from '../../../src-core/site/site';
import { goods, level, rack, SOURCE, stand } from './rack';

const TODAY = '2026-06-01';
const SAG = { beam: 'front', loadedMm: 6, unloadedMm: 1, sidewaysMm: 0, found: TODAY } as const;

/** A site of two runs of so many bays, standing back to back on one floor. */
function depot(bays = 6): Site {
  const one = rack({ unitLoads: [goods('a', { goodsKg: 400 }), goods('b', { goodsKg: 650 })], levels: [] });
  const run = one.runs[0];
  const bay = run?.bays[0];
  const frame = run?.frames[0];
  if (run === undefined || bay === undefined || frame === undefined) throw new Error('no bay');
  const made = (name: string, behind: string): Run => ({
    ...run,
    id: name,
    name,
    backToBack: { runId: behind, gapMm: 200, rowSpacers: 'yes' },
    frames: Array.from({ length: bays + 1 }, (_, i) => ({ ...frame, id: `${name}-frame-${i}`, name: `${name}${i}` })),
    bays: Array.from({ length: bays }, (_, i) => ({
      ...bay,
      id: `${name}-bay-${i}`,
      name: `${name}${i}`,
      levels: [level([stand('a', 75), stand('b', 1825)], { sags: [SAG] }), level([stand('b', 950)], { heightMm: 3000 })],
    })),
  });
  const floor: Floor = {
    id: 'floor',
    name: 'Hall floor',
    kind: 'ground-slab',
    legN: 40_000,
    pressureNPerMm2: 4,
    legPairN: 60_000,
    areaNPerMm2: 0.05,
    thicknessMm: 200,
    source: SOURCE,
  };
  return { ...one, floors: [floor], runs: [made('A', 'B'), made('B', 'A')] };
}

const withRun = (site: Site, run: number, change: (run: Run) => Run): Site => ({
  ...site,
  runs: site.runs.map((one, r) => (r === run ? change(one) : one)),
});
const withBay = (site: Site, run: number, bay: number, change: (bay: Bay) => Bay): Site =>
  withRun(site, run, (one) => ({ ...one, bays: one.bays.map((two, b) => (b === bay ? change(two) : two)) }));
const withFrame = (site: Site, run: number, frame: number, change: (frame: Frame) => Frame): Site =>
  withRun(site, run, (one) => ({ ...one, frames: one.frames.map((two, f) => (f === frame ? change(two) : two)) }));

const bent = (by: number): Damage => ({
  id: `damage-${by}`,
  member: 'upright-front',
  alongMm: by / 100,
  acrossMm: 0,
  gaugeMm: 1000,
  torn: false,
  note: '',
  found: TODAY,
});

const moved = (bay: Bay, by: number): Bay => ({
  ...bay,
  levels: bay.levels.map((one, i) =>
    i === 0 ? { ...one, placements: one.placements.map((two, k) => (k === 0 ? { ...two, atMm: two.atMm + by } : two)) } : one,
  ),
});

test('one bay alone is audited as in its run', () => {
  const site = depot();
  const run = auditRun(site, 'A', TODAY);
  expect(auditBay(site, 'A', 'A-bay-3', TODAY)).toEqual(run.bays[3]);
});

test('a bay is as bad as the worst finding of its levels, its own and its two frames', () => {
  const run = auditRun(depot(), 'A', TODAY);
  run.bays.forEach((bay, i) => {
    const parts = [bay, ...bay.levels, ...run.frames.slice(i, i + 2)];
    const counting = parts.flatMap(({ findings }) => findings).filter(({ counts }) => counts);
    for (const { verdict } of counting) expect(compareVerdicts(bay.verdict, verdict)).toBeGreaterThanOrEqual(0);
    expect(counting.some(({ verdict }) => compareVerdicts(bay.verdict, verdict) === 0)).toBe(true);
  });
});

test('checks left out are listed with their reasons on every run', () => {
  const site = depot();
  const leftOut = [{ check: 'unit-load', reason: 'Boxes only.' }] as const;
  const audit = auditSite({ ...site, rules: { ...site.rules, leftOut } }, TODAY);
  for (const run of audit.runs) expect(run.notChecked).toEqual(leftOut);
});

test('every check asked for is made or left out by name: none is silently skipped', () => {
  const site = depot();
  const run = auditRun(site, 'A', TODAY);
  const made = new Set(
    [
      ...run.bays.flatMap((bay) => [...bay.findings, ...bay.levels.flatMap(({ findings }) => findings)]),
      ...run.frames.flatMap(({ findings }) => findings),
      ...run.findings,
    ].map(({ check }) => check),
  );
  expect([...made].sort()).toEqual([...CHECKS].sort());
});

test('an edit leaves the audits of untouched bays as they are, and renews its own, its neighbours’ and its frames’', () => {
  const site = depot();
  const cache = createAuditCache();
  const before = auditRun(site, 'A', TODAY, cache);
  const after = auditRun(
    withBay(site, 0, 2, (bay) => moved(bay, 100)),
    'A',
    TODAY,
    cache,
  );
  expect(after.bays.map((bay, i) => bay === before.bays[i])).toEqual([true, false, false, false, true, true]);
  expect(after.frames.map((frame, i) => frame === before.frames[i])).toEqual([true, true, false, false, true, true, true]);
});

/** Bays whose levels, and frames which, were looked at again from one audit to the next. */
function rechecked(before: SiteAudit, after: SiteAudit): { readonly bays: readonly string[]; readonly frames: readonly string[] } {
  const levels = new Set(before.runs.flatMap(({ bays }) => bays.map((bay) => bay.levels)));
  const frames = new Set(before.runs.flatMap((run) => run.frames));
  return {
    bays: after.runs.flatMap((run) => run.bays.filter((bay) => !levels.has(bay.levels)).map(({ bayId }) => bayId)),
    frames: after.runs.flatMap((run) => run.frames.filter((frame) => !frames.has(frame)).map(({ frameId }) => frameId)),
  };
}

test.each([6, 60])(
  'of two runs of %i bays back to back, moving goods rechecks their bay and its mirror image, and the frames at both',
  (bays) => {
    const site = depot(bays);
    const cache = createAuditCache();
    const before = auditSite(site, TODAY, cache);
    const after = auditSite(
      withBay(site, 0, 2, (bay) => moved(bay, 100)),
      TODAY,
      cache,
    );
    expect(rechecked(before, after)).toEqual({
      bays: ['A-bay-2', `B-bay-${bays - 3}`],
      frames: ['A-frame-2', 'A-frame-3', `B-frame-${bays - 3}`, `B-frame-${bays - 2}`],
    });
  },
);

test('in a run that stands alone, moving goods from one bay to another rechecks these two and the frames at them', () => {
  const site = withRun(
    withRun(depot(40), 0, (run) => ({ ...run, backToBack: null })),
    1,
    (run) => ({ ...run, backToBack: null }),
  );
  const cache = createAuditCache();
  const before = auditSite(site, TODAY, cache);
  const [one] = site.runs[0]?.bays[10]?.levels[0]?.placements ?? [];
  const target = site.runs[1]?.bays[20]?.levels[1];
  if (one === undefined || target === undefined) throw new Error('no goods');
  const after = auditSite(movePlacement(site, one.id, { levelId: target.id, atMm: 75 }), TODAY, cache);
  expect(rechecked(before, after)).toEqual({
    bays: ['A-bay-10', 'B-bay-20'],
    frames: ['A-frame-10', 'A-frame-11', 'B-frame-20', 'B-frame-21'],
  });
});

test('auditing the same site again makes nothing anew', () => {
  const site = depot();
  const cache = createAuditCache();
  const before = auditSite(site, TODAY, cache);
  const after = auditSite(site, TODAY, cache);
  expect(after.runs.flatMap(({ bays }) => bays).every((bay, i) => bay === before.runs.flatMap(({ bays }) => bays)[i])).toBe(true);
});

type Edit = (site: Site, run: number, place: number, by: number) => Site;

const EDITS: Readonly<Record<string, Edit>> = {
  move: (site, run, bay, by) => withBay(site, run, bay, (one) => moved(one, by)),
  empty: (site, run, bay) => withBay(site, run, bay, (one) => ({ ...one, levels: one.levels.map((two) => ({ ...two, placements: [] })) })),
  drop: (site, run, bay) => withBay(site, run, bay, (one) => ({ ...one, levels: one.levels.slice(1) })),
  widen: (site, run, bay, by) => withBay(site, run, bay, (one) => ({ ...one, clearEntryMm: one.clearEntryMm + by })),
  raise: (site, run, bay, by) =>
    withBay(site, run, bay, (one) => ({ ...one, levels: one.levels.map((two) => ({ ...two, heightMm: two.heightMm + by })) })),
  anchors: (site, run, frame, by) => withFrame(site, run, frame, (one) => ({ ...one, anchored: 'no', heightMm: one.heightMm + by })),
  damage: (site, run, frame, by) => withFrame(site, run, frame, (one) => ({ ...one, damages: [...one.damages, bent(by)] })),
  'take out': (site, run, bay) =>
    withRun(site, run, (one) =>
      one.bays.length < 2 || bay >= one.bays.length
        ? one
        : { ...one, bays: one.bays.filter((_, i) => i !== bay), frames: one.frames.slice(0, one.bays.length) },
    ),
  'turn round': (site, run) => withRun(site, run, (one) => ({ ...one, bays: one.bays.toReversed(), frames: one.frames.toReversed() })),
  rename: (site, run, _, by) => withRun(site, run, (one) => ({ ...one, name: `${one.name}${by}` })),
  truck: (site, run) => withRun(site, run, (one) => ({ ...one, loadedBy: one.loadedBy === 'class-400' ? 'class-300b' : 'class-400' })),
  floor: (site, run) => withRun(site, run, (one) => ({ ...one, floorId: one.floorId === null ? 'floor' : null })),
  spacers: (site, run, _, by) =>
    withRun(site, run, (one) => ({ ...one, backToBack: one.backToBack && { ...one.backToBack, gapMm: by, rowSpacers: 'no' } })),
  heavier: (site, _run, _place, by) => ({
    ...site,
    unitLoads: site.unitLoads.map((one) => ({ ...one, goodsKg: (one.goodsKg ?? 0) + by })),
  }),
  notice: (site, _run, _place, by) => ({ ...site, notices: site.notices.map((one) => ({ ...one, levelKg: [2000 + by] })) }),
  flags: (site) => ({ ...site, seismic: site.seismic === 'no' ? 'yes' : 'no' }),
  rules: (site) => ({ ...site, rules: { ...site.rules, fullComplement: !site.rules.fullComplement } }),
};

const edits = fc.array(
  fc.record({
    kind: fc.constantFrom(...Object.keys(EDITS)),
    run: fc.integer({ min: 0, max: 1 }),
    place: fc.integer({ min: 0, max: 2 }),
    by: fc.integer({ min: 1, max: 600 }),
    nextDay: fc.boolean(),
  }),
  { minLength: 1, maxLength: 6 },
);

/** What an audit says, without the calculations behind it, which come from the same figures. */
const said = ({ verdict, runs }: SiteAudit): string =>
  JSON.stringify([
    verdict,
    runs.map((run) => {
      const parts = [run, ...run.frames, ...run.bays, ...run.bays.flatMap(({ levels }) => levels)];
      return parts.map((part) => [
        part.verdict,
        part.findings.map(({ check, place, verdict: own, utilisation, missing, says }) => [check, place, own, utilisation, missing, says]),
      ]);
    }),
  ]);

test('after any series of edits the remembered audit is the one made anew', () => {
  fc.assert(
    fc.property(edits, (series) => {
      const cache = createAuditCache();
      let site = depot(3);
      let today = TODAY;
      auditSite(site, today, cache);
      for (const { kind, run, place, by, nextDay } of series) {
        site = EDITS[kind]?.(site, run, place, by) ?? site;
        if (nextDay && by % 4 === 0) today = `2026-07-${String(1 + (by % 28)).padStart(2, '0')}`;
        expect(said(auditSite(site, today, cache)) === said(auditSite(site, today)), `after ${kind} at ${run}/${place}`).toBe(true);
      }
    }),
    { numRuns: 40 },
  );
});

test.each([
  ['run', () => auditRun(depot(), 'Z', TODAY), /no run "Z"/],
  ['bay', () => auditBay(depot(), 'A', 'Z', TODAY), /no bay "Z" in run "A"/],
])('an unknown %s is refused by its id', (_, call, message) => {
  expect(call).toThrow(message);
});

test('a site without runs is not within', () => {
  expect(auditSite({ ...depot(), runs: [] }, TODAY).verdict).toBe('not-assessable');
});
