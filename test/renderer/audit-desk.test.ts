import fc from 'fast-check';
import { expect, test } from 'vitest';
import { auditRun } from '../../src-core/audit/audit';
import { createAuditCache } from '../../src-core/audit/cache';
import type { RunAudit } from '../../src-core/audit/types';
import { editBay, editEntry, movePlacement, removeBay } from '../../src-core/site/edits';
import type { Id, Site } from '../../src-core/site/site';
import { AuditLink } from '../../src-renderer/auditing/audit-link';
import { lightRun } from '../../src-renderer/auditing/light-audit';
import { depotOf } from '../bench/large-site';
import { CloningWorker } from './cloning-worker';

const TODAY = '2026-12-01';

function linked() {
  const worker = new CloningWorker();
  const shown = new Map<Id, RunAudit>();
  const heard: string[] = [];
  const link = new AuditLink(
    () => worker,
    () => TODAY,
    {
      audited: (audit) => {
        heard.push(audit.runId);
        shown.set(audit.runId, audit);
      },
      done: () => heard.push('done'),
      trouble: (runId, message) => heard.push(`${runId}: ${message}`),
    },
    createAuditCache(),
  );
  const update = async (site: Site) => {
    await worker.workedOff(() => link.update(site));
    worker.deliver();
  };
  return { worker, link, shown, heard, update };
}

const moveTo = (site: Site, placementId: Id, levelId: Id, atMm: number) => movePlacement(site, placementId, { levelId, atMm });
const made = (site: Site): readonly RunAudit[] => site.runs.map(({ id }) => lightRun(auditRun(site, id, TODAY)));

test('whatever is edited, the findings shown are those of the site made anew', async () => {
  const edit = fc.oneof(
    fc.record({
      kind: fc.constant('move' as const),
      bay: fc.integer({ min: 1, max: 4 }),
      to: fc.integer({ min: 1, max: 4 }),
      at: fc.nat(1500),
    }),
    fc.record({ kind: fc.constant('widen' as const), bay: fc.integer({ min: 1, max: 4 }), by: fc.integer({ min: 1, max: 400 }) }),
    fc.record({ kind: fc.constant('heavier' as const), by: fc.integer({ min: 1, max: 900 }) }),
    fc.record({ kind: fc.constant('take out' as const), bay: fc.integer({ min: 1, max: 4 }) }),
  );
  const edited = (site: Site, one: typeof edit extends fc.Arbitrary<infer T> ? T : never): Site => {
    const there = (bay: number) => site.runs[0]?.bays.some(({ id }) => id === `R1-${bay}`) ?? false;
    if (one.kind === 'heavier') return editEntry(site, 'unitLoads', 'goods-0', { goodsKg: 300 + one.by });
    if (!there(one.bay)) return site;
    if (one.kind === 'widen') return editBay(site, `R1-${one.bay}`, { clearEntryMm: 2700 + one.by });
    if (one.kind === 'take out') return site.runs[0]?.bays.length === 1 ? site : removeBay(site, `R1-${one.bay}`);
    return moveTo(site, 'R2-1-l1-g1', one.to > 2 ? `R2-${one.to}-l2` : `R3-${one.to}-l4`, one.at);
  };
  await fc.assert(
    fc.asyncProperty(fc.array(edit, { maxLength: 6 }), async (edits) => {
      let site = depotOf({ runs: 4, bays: 4, paired: true });
      const { shown, update } = linked();
      await update(site);
      for (const one of edits) {
        const next = edited(site, one);
        if (next === site) continue;
        site = next;
        await update(site);
        expect(JSON.stringify(site.runs.map(({ id }) => shown.get(id)))).toBe(JSON.stringify(made(site)));
      }
    }),
    { numRuns: 12 },
  );
});

test.each([
  [100, 2, 5],
  [1000, 2, 50],
])('of %i placements, one that is moved sends its bay to the worker and brings back what it touches', async (_, runs, bays) => {
  let site = depotOf({ runs, bays, paired: true });
  const { worker, update } = linked();
  await update(site);
  worker.forget();
  site = moveTo(site, 'R1-3-l2-g1', 'R1-3-l2', 200);
  await update(site);
  const sent = worker.toWorker.flatMap((message) => (message.kind === 'change' ? message.change.runs : []));
  expect(sent.flatMap((run) => run.bays.changed.map(({ id }) => id))).toEqual(['R1-3']);
  expect(sent.flatMap((run) => run.frames.changed)).toEqual([]);
  const back = worker.fromWorker.flatMap((message) => (message.kind === 'audit' ? [message.change] : []));
  // The bays beside it share its frames, and so do those behind it share the floor under both legs.
  const behind = bays - 2;
  expect(back.flatMap((run) => run.bays.changed.map(({ bayId }) => bayId))).toEqual([
    ...['R1-2', 'R1-3', 'R1-4'],
    ...[behind - 1, behind, behind + 1].map((bay) => `R2-${bay}`),
  ]);
  expect(back.flatMap((run) => run.frames.changed.map(({ frameId }) => frameId))).toEqual([
    ...['R1-f3', 'R1-f4'],
    ...[behind, behind + 1].map((frame) => `R2-f${frame}`),
  ]);
});

test('a long run comes in parts of a few bays, and is shown once it is whole', async () => {
  const site = depotOf({ runs: 1, bays: 60, paired: false });
  const { worker, shown, heard, update } = linked();
  await update(site);
  const parts = worker.fromWorker.flatMap((message) => (message.kind === 'audit' ? [message.change] : []));
  expect(parts.length).toBeGreaterThan(1);
  for (const { bays, frames } of parts) expect(Math.max(bays.changed.length, frames.changed.length)).toBeLessThanOrEqual(12);
  expect(heard).toEqual(['R1', 'done']);
  expect(JSON.stringify(shown.get('R1'))).toBe(JSON.stringify(made(site)[0]));
});

test('findings that an edit has overtaken on their way are not shown', async () => {
  const site = depotOf({ runs: 1, bays: 2, paired: false });
  const { worker, link, shown, heard } = linked();
  await worker.workedOff(() => link.update(site));
  const first = worker.underWay();
  const next = moveTo(site, 'R1-1-l1-g1', 'R1-2-l1', 800);
  await worker.workedOff(() => link.update(next));
  worker.deliver(first);
  expect(heard).toEqual([]);
  worker.deliver();
  expect(heard).toEqual(['R1', 'done']);
  expect(JSON.stringify(shown.get('R1'))).toBe(JSON.stringify(made(next)[0]));
});

test('an edit made while a long run is being checked is answered before the rest of the site', async () => {
  const site = depotOf({ runs: 8, bays: 4, paired: false });
  const { worker, link, heard } = linked();
  await worker.workedOff(() => {
    link.update(site);
    link.update(moveTo(site, 'R6-1-l1-g1', 'R6-1-l1', 300));
  });
  worker.deliver();
  // The run that was begun first may be done by then.
  expect(heard.filter((id) => id !== 'R1')[0]).toBe('R6');
  expect(heard.toSorted()).toEqual(['R1', 'R2', 'R3', 'R4', 'R5', 'R6', 'R7', 'R8', 'done']);
});
