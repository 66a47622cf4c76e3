import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Bay, Run, Site } from '../../src-core/site/site';
import { applyChange, changeOf, runsTouched } from '../../src-renderer/state/site-change';
import { smallSite } from './sites';

const firstRun = (site: Site): Run => {
  const run = site.runs[0];
  if (run === undefined) throw new Error('no run');
  return run;
};
const withRun = (site: Site, change: (run: Run) => Run, index = 0): Site => ({
  ...site,
  runs: site.runs.map((run, i) => (i === index ? change(run) : run)),
});
const renamed = (bay: Bay, name: string): Bay => ({ ...bay, name });

/** Random edits of every kind that crosses: entries changed, put in, taken out, turned round. */
const edit = fc.oneof(
  fc.record({ kind: fc.constant('name' as const), text: fc.string() }),
  fc.record({ kind: fc.constant('bay' as const), at: fc.nat(4), text: fc.string() }),
  fc.record({ kind: fc.constant('take out' as const), at: fc.nat(4) }),
  fc.record({ kind: fc.constant('turn round' as const) }),
  fc.record({ kind: fc.constant('put in' as const), text: fc.string({ minLength: 1 }) }),
  fc.record({ kind: fc.constant('second run' as const) }),
);
type Edit = typeof edit extends fc.Arbitrary<infer T> ? T : never;

function edited(site: Site, one: Edit): Site {
  switch (one.kind) {
    case 'name':
      return { ...site, name: one.text };
    case 'bay':
      return withRun(site, (run) => ({ ...run, bays: run.bays.map((bay, i) => (i === one.at ? renamed(bay, one.text) : bay)) }));
    case 'take out':
      return withRun(site, (run) => ({ ...run, bays: run.bays.filter((_, i) => i !== one.at) }));
    case 'turn round':
      return withRun(site, (run) => ({ ...run, bays: run.bays.toReversed(), frames: run.frames.toReversed() }));
    case 'put in': {
      const bay = firstRun(smallSite()).bays[0] as Bay;
      return withRun(site, (run) => ({ ...run, bays: [...run.bays, { ...bay, id: `${run.bays.length}-${one.text}` }] }));
    }
    case 'second run':
      return { ...site, runs: [...site.runs, { ...firstRun(smallSite()), id: `run-${site.runs.length}` }] };
  }
}

test('a site rebuilt from its changes, cloned on the way, equals the site after every edit', () => {
  fc.assert(
    fc.property(fc.array(edit, { maxLength: 30 }), (edits) => {
      let here: Site = smallSite();
      let there = applyChange(null, structuredClone(changeOf(null, here)));
      for (const one of edits) {
        const next = edited(here, one);
        there = applyChange(there, structuredClone(changeOf(here, next)));
        here = next;
        expect(there).toEqual(here);
      }
    }),
    { numRuns: 300 },
  );
});

test('bays that an edit does not touch keep their identity on the other side, and do not cross', () => {
  const before = smallSite(40);
  const after = withRun(before, (run) => ({ ...run, bays: run.bays.map((bay, i) => (i === 7 ? renamed(bay, 'X') : bay)) }));
  const change = changeOf(before, after);
  expect(change.rest).toEqual({});
  expect(change.runs.flatMap(({ bays }) => bays.changed).map((bay) => bay.name)).toEqual(['X']);
  expect(change.runs.flatMap(({ frames }) => frames.changed)).toEqual([]);
  const there = applyChange(null, structuredClone(changeOf(null, before)));
  const next = applyChange(there, structuredClone(change));
  firstRun(next).bays.forEach((bay, i) => {
    if (i === 7) expect(bay).not.toBe(firstRun(there).bays[i]);
    else expect(bay).toBe(firstRun(there).bays[i]);
  });
  expect(next.unitLoads).toBe(there.unitLoads);
});

test('an edit of one run touches it and the run that stands behind it, and no other', () => {
  const run = firstRun(smallSite());
  const runs: Run[] = ['a', 'b', 'c'].map((id) => ({ ...run, id, name: id }));
  const [a, b, c] = runs as [Run, Run, Run];
  const site: Site = { ...smallSite(), runs: [a, { ...b, backToBack: { runId: 'a', gapMm: 200, rowSpacers: 'yes' } }, c] };
  const change = (index: number) => withRun(site, (one) => ({ ...one, name: 'new' }), index);
  expect(runsTouched(site, change(0))).toEqual(['a', 'b']);
  expect(runsTouched(site, change(1))).toEqual(['a', 'b']);
  expect(runsTouched(site, change(2))).toEqual(['c']);
  expect(runsTouched(site, { ...site, rules: { ...site.rules } })).toEqual(['a', 'b', 'c']);
  expect(runsTouched(null, site)).toEqual(['a', 'b', 'c']);
});
