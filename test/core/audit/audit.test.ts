import fc from 'fast-check';
import { expect, test } from 'vitest';
import { auditBay, auditRun, auditSite } from '../../../src-core/audit/audit';
import { createAuditCache } from '../../../src-core/audit/cache';
import { compareVerdicts } from '../../../src-core/checks/finding';
import type { Bay, Run, Site } from '../../../src-core/site/site';
import { goods, level, rack, stand } from './rack';

const TODAY = '2026-06-01';

/** A site of two runs of six bays, standing back to back. */
function depot(): Site {
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
    frames: Array.from({ length: 7 }, (_, i) => ({ ...frame, id: `${name}-frame-${i}`, name: `${name}${i}` })),
    bays: Array.from({ length: 6 }, (_, i) => ({
      ...bay,
      id: `${name}-bay-${i}`,
      name: `${name}${i}`,
      levels: [level([stand('a', 75), stand('b', 1825)]), level([stand('b', 950)], { heightMm: 3000 })],
    })),
  });
  return { ...one, runs: [made('A', 'B'), made('B', 'A')] };
}

const withBay = (site: Site, run: number, bay: number, change: (bay: Bay) => Bay): Site => ({
  ...site,
  runs: site.runs.map((one, r) => (r === run ? { ...one, bays: one.bays.map((two, b) => (b === bay ? change(two) : two)) } : one)),
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

test('auditing the same site again makes nothing anew', () => {
  const site = depot();
  const cache = createAuditCache();
  const before = auditSite(site, TODAY, cache);
  const after = auditSite(site, TODAY, cache);
  expect(after.runs.flatMap(({ bays }) => bays).every((bay, i) => bay === before.runs.flatMap(({ bays }) => bays)[i])).toBe(true);
});

const edits = fc.array(
  fc.record({
    kind: fc.constantFrom('move', 'heavier', 'empty', 'notice', 'flags', 'frame', 'drop', 'rules', 'day'),
    run: fc.integer({ min: 0, max: 1 }),
    bay: fc.integer({ min: 0, max: 5 }),
    by: fc.integer({ min: 1, max: 600 }),
  }),
  { minLength: 1, maxLength: 6 },
);

test('after any series of edits the remembered audit is the one made anew', () => {
  fc.assert(
    fc.property(edits, (series) => {
      const cache = createAuditCache();
      let site = depot();
      let today = TODAY;
      auditSite(site, today, cache);
      for (const { kind, run, bay, by } of series) {
        const old = site;
        if (kind === 'move') site = withBay(old, run, bay, (one) => moved(one, by));
        else if (kind === 'empty')
          site = withBay(old, run, bay, (one) => ({ ...one, levels: one.levels.map((two) => ({ ...two, placements: [] })) }));
        else if (kind === 'drop') site = withBay(old, run, bay, (one) => ({ ...one, levels: one.levels.slice(1) }));
        else if (kind === 'heavier')
          site = { ...old, unitLoads: old.unitLoads.map((one) => ({ ...one, goodsKg: (one.goodsKg ?? 0) + by })) };
        else if (kind === 'notice') site = { ...old, notices: old.notices.map((one) => ({ ...one, levelKg: [2000 + by] })) };
        else if (kind === 'flags') site = { ...old, seismic: old.seismic === 'no' ? 'yes' : 'no' };
        else if (kind === 'rules') site = { ...old, rules: { ...old.rules, fullComplement: !old.rules.fullComplement } };
        else if (kind === 'day') today = `2026-07-${String((by % 28) + 1).padStart(2, '0')}`;
        else
          site = {
            ...old,
            runs: old.runs.map((one, r) =>
              r === run
                ? {
                    ...one,
                    frames: one.frames.map((two, f) => (f === bay ? { ...two, anchored: 'no', heightMm: two.heightMm + by } : two)),
                  }
                : one,
            ),
          };
        expect(auditSite(site, today, cache)).toEqual(auditSite(site, today));
      }
    }),
    { numRuns: 60 },
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
