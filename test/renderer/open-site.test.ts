import fc from 'fast-check';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { auditRun } from '../../src-core/audit/audit';
import type { RunAudit } from '../../src-core/audit/types';
import { editBay, editEntry, editRun } from '../../src-core/site/edits';
import type { BayPlan } from '../../src-core/site/new-site';
import type { Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import type { WorkerLike } from '../../src-renderer/audit-link';
import type { FromWorker } from '../../src-renderer/audit-protocol';
import { keepTemplate } from '../../src-renderer/bay-templates';
import { deleteGoods, duplicateGoods, mirrorGoods, putGoods, spaceEvenly } from '../../src-renderer/goods-edits';
import { changeBay, changeLevel, nudge } from '../../src-renderer/goods-moves';
import { copyLevelHere, pasteLevelHere, pasteLevelInto } from '../../src-renderer/level-clipboard';
import { firstBay } from '../../src-renderer/first-sizes';
import { OpenSite } from '../../src-renderer/open-site.svelte';
import { placementPlace, targetOf, type Target } from '../../src-renderer/places';
import {
  addBayAfter,
  addBays,
  addLevelOnTop,
  copyRun,
  duplicateBayHere,
  duplicateLevelHere,
  fillLike,
  layOutRun,
  removeBayHere,
  removeLevelHere,
  removeRunFrom,
  shiftBay,
  shiftLevelHere,
  shiftRun,
  swapLevelHere,
} from '../../src-renderer/rack-edits';
import { applyChange } from '../../src-renderer/site-change';
import { MemoryHost } from './memory-host';
import { smallSite } from './sites';

let opened: OpenSite[] = [];

/** A worker that keeps the site by the changes it is sent, cloned as on their way to a thread, and writes it; it audits nothing. */
function writingWorker(): WorkerLike {
  let site: Site | null = null;
  const worker: WorkerLike = {
    onmessage: null,
    onerror: null,
    terminate: () => undefined,
    postMessage: (message) => {
      if (message.kind === 'change') site = applyChange(site, structuredClone(message.change));
      else worker.onmessage?.({ data: { kind: 'written', ask: message.ask, body: site && writeSite(site) } } as MessageEvent<FromWorker>);
    },
  };
  return worker;
}

async function openSite(
  site: Site = smallSite(),
  makeWorker: (() => WorkerLike) | null = null,
): Promise<{ open: OpenSite; host: MemoryHost }> {
  const host = new MemoryHost();
  const { revision, savedAt } = await host.saveSite({ id: site.id, body: writeSite(site), baseRevision: null });
  const open = new OpenSite({ host, id: site.id, site, revision, savedAt, makeWorker, today: () => '2026-12-01' });
  opened.push(open);
  return { open, host };
}

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  for (const open of opened) open.close();
  opened = [];
  vi.useRealTimers();
});

const levelId = (open: OpenSite, bay: number, level: number): string => open.site.runs[0]?.bays[bay]?.levels[level]?.id ?? '';
const choose = (open: OpenSite, bay: number, level: number) => open.select({ levelId: levelId(open, bay, level) });

/** Edits as a person makes them, on whatever stands there; each picks its place from the numbers given. */
const EDITS: readonly ((open: OpenSite, a: number, b: number) => void)[] = [
  (open, a) => {
    choose(open, a % 3, a % 4);
    const unitLoad = open.site.unitLoads[0];
    if (unitLoad) putGoods(open, unitLoad, false);
  },
  (open, a, b) => selectSome(open, a) && nudge(open, (b % 200) - 100),
  (open, a, b) => selectSome(open, a) && changeLevel(open, b % 2 === 0 ? 1 : -1),
  (open, a, b) => selectSome(open, a) && changeBay(open, b % 2 === 0 ? 1 : -1),
  (open, a) => selectSome(open, a) && mirrorGoods(open),
  (open, a) => selectSome(open, a) && duplicateGoods(open),
  (open, a) => selectSome(open, a) && deleteGoods(open),
  (open) => spaceEvenly(open),
  (open) => void (open.pushing = !open.pushing),
  (open) => addBayAfter(open),
  (open) => duplicateBayHere(open),
  (open) => removeBayHere(open),
  (open) => addLevelOnTop(open),
  (open) => removeLevelHere(open),
  (open, _, b) => {
    const bayId = open.bay?.id;
    if (bayId !== undefined) open.edit('Change clear entry', (site) => editBay(site, bayId, { clearEntryMm: 2000 + (b % 2000) }));
  },
  (open, _, b) => void open.edit('Change mass', (site) => editEntry(site, 'unitLoads', 'crate', { goodsKg: b })),
  // Levels: copied, pasted, duplicated, swapped, moved.
  (open, a, b) => {
    choose(open, a % 3, b % 3);
    copyLevelHere(open);
    choose(open, b % 3, a % 3);
    pasteLevelHere(open);
  },
  (open, _, b) => void pasteLevelInto(open, open.run?.bays ?? [], 500 + (b % 5000)),
  (open) => duplicateLevelHere(open),
  (open, _, b) => swapLevelHere(open, b % 2 === 0 ? 1 : -1),
  (open, _, b) => shiftLevelHere(open, b % 2 === 0 ? 1 : -1),
  (open, a) => fillLike(open, open.run?.bays.slice(a % 4) ?? [], a % 2 === 0 ? 'levels' : 'levels and goods'),
  // Templates: kept, changed, laid out by.
  (open, a, b) => void (open.bay && keepTemplate(open, open.bay, `Template ${b}`, a % 2 === 0 ? 'with goods' : 'without goods')),
  (open, _, b) => {
    if (open.bay && open.site.bayTemplates.length === 0) keepTemplate(open, open.bay, 'First', 'with goods');
    const id = open.site.bayTemplates.at(-1)?.id;
    if (id !== undefined) open.edit('Change template', (site) => editEntry(site, 'bayTemplates', id, { clearEntryMm: 1000 + b }));
  },
  (open, a, b) => open.run && addBays(open, open.run, planHere(open), { after: a % open.run.bays.length, count: 1 + (b % 3) }),
  (open, _, b) => layOutRun(open, { name: `R${b}`, bays: 1 + (b % 4), plan: planHere(open), floorId: null, loadedBy: 'unknown' }, null),
  // Runs and bays: duplicated, changing places, taken out.
  (open) => open.run && copyRun(open, open.run),
  (open, _, b) => open.run && shiftRun(open, open.run, b % 2 === 0 ? 1 : -1),
  (open, _, b) => open.run && open.bay && shiftBay(open, open.run, open.bay, b % 2 === 0 ? 1 : -1),
  (open) => open.run && removeRunFrom(open, open.run),
];

/** The newest template, or what a first bay is laid out by. */
const planHere = (open: OpenSite): BayPlan => open.site.bayTemplates.at(-1) ?? firstBay('metric');

/** Beginnings of the names of steps that the random sequences are to have made, each of them at least once. */
const STEPS = [
  ...[
    'Put Crate',
    'Move Crate',
    'Turn Crate',
    'Duplicate 1 unit load',
    'Take off Crate',
    'Space',
    'Add bay',
    'Duplicate bay',
    'Delete bay',
    'Add a level',
  ],
  ...['Delete level', 'Change clear entry', 'Change mass', 'Paste a level', 'Duplicate level', 'Swap levels', 'Move level', 'Give'],
  ...['Keep bay', 'Change template', 'Add 2 bays', 'Lay out run', 'Duplicate run', 'Move run', 'Move bay', 'Delete run'],
];

/** What is promised, with as many turns of the clock as it takes. */
async function inTime<T>(promise: Promise<T>): Promise<T> {
  let pending = true;
  void promise.finally(() => (pending = false));
  while (pending) await vi.advanceTimersByTimeAsync(1);
  return promise;
}

function selectSome(open: OpenSite, a: number): boolean {
  const all = open.site.runs.flatMap((run) => run.bays.flatMap((bay) => [...bay.onFloor, ...bay.levels.flatMap((one) => one.placements)]));
  const chosen = all[a % Math.max(1, all.length)];
  if (chosen) open.select({ placementIds: [chosen.id] });
  return chosen !== undefined;
}

test('1,000 random sequences: undo-all gives the first file, redo-all the last, and the saved mark is right at every point', async () => {
  const action = fc.oneof(
    { weight: 6, arbitrary: fc.record({ edit: fc.nat(EDITS.length - 1), a: fc.nat(50), b: fc.nat(5000) }) },
    { weight: 1, arbitrary: fc.constantFrom('undo' as const, 'redo' as const, 'save' as const) },
  );
  const made = new Set<string>();
  await fc.assert(
    fc.asyncProperty(fc.array(action, { maxLength: 20 }), async (actions) => {
      const { open, host } = await openSite(smallSite(), writingWorker);
      const first = writeSite(open.site);
      const onDisk = () => host.kept.get(open.id)?.body;
      for (const one of actions) {
        if (one === 'undo') open.undo();
        else if (one === 'redo') open.redo();
        else if (one === 'save') expect(await inTime(open.save())).toBe(true);
        else {
          // Time between edits, so that none is taken into the one before it.
          vi.advanceTimersByTime(2000);
          EDITS[one.edit]?.(open, one.a, one.b);
          if (open.undoName !== null) made.add(open.undoName);
        }
        if (open.saved === 'saved') expect(writeSite(open.site)).toBe(onDisk());
        else if (writeSite(open.site) === onDisk()) expect(onDiskByAnotherWay(open)).toBe(true);
      }
      const last = writeSite(open.site);
      const steps = open.steps;
      while (open.canUndo) open.undo();
      expect(writeSite(open.site)).toBe(first);
      for (let i = 0; i < steps; i++) open.redo();
      expect(writeSite(open.site)).toBe(last);
      open.close();
    }),
    { numRuns: 1000 },
  );
  expect(STEPS.filter((name) => ![...made].some((one) => one.startsWith(name)))).toEqual([]);
}, 120_000);

/** Edits that lead back to the same content, like turning goods twice, are still edits since the save. */
const onDiskByAnotherWay = (open: OpenSite): boolean => open.saved === 'unsaved' && (open.canUndo || open.canRedo);

test('600 edits are all kept: the first file comes back exactly', async () => {
  const { open } = await openSite(smallSite(), writingWorker);
  const first = writeSite(open.site);
  for (let i = 0; i < 600; i++) {
    vi.advanceTimersByTime(2000);
    open.move('p1', { levelId: levelId(open, 0, 1 + (i % 2)), atMm: i });
  }
  expect(open.steps).toBe(600);
  for (let i = 0; i < 600; i++) open.undo();
  expect(open.canUndo).toBe(false);
  expect(writeSite(open.site)).toBe(first);
  expect(open.saved).toBe('saved');
});

test('nudges in a row are one step, and undo goes back to where the goods stood', async () => {
  const { open } = await openSite();
  open.select({ placementIds: ['p1'] });
  for (let i = 0; i < 7; i++) nudge(open, 10);
  expect(placementPlace(open.site, 'p1')?.placement.atMm).toBe(145);
  expect(open.steps).toBe(1);
  open.undo();
  expect(placementPlace(open.site, 'p1')?.placement.atMm).toBe(75);
  expect(open.saved).toBe('saved');
});

test('a nudge after a save starts a step of its own, so that undo comes back to what is on disk', async () => {
  const { open } = await openSite();
  open.select({ placementIds: ['p1'] });
  nudge(open, 10);
  await open.save();
  nudge(open, 10);
  expect(open.saved).toBe('unsaved');
  open.undo();
  expect(open.saved).toBe('saved');
});

test('the same target by trying, keys, putting down and the one command gives the same file, byte for byte', async () => {
  const ways: readonly ((open: OpenSite, target: Target) => void)[] = [
    (open, target) => open.move('p2', target),
    (open, target) => {
      open.tryMove('p2', { ...target, atMm: target.atMm + 333 });
      open.tryMove('p2', target);
      open.keepTrial();
    },
    (open, target) => {
      open.pickUp('p2');
      open.tryMove('p2', target);
      open.putDown();
    },
    (open, target) => {
      open.select({ placementIds: ['p2'] });
      changeLevel(open, 1);
      const here = placementPlace(open.site, 'p2')?.placement.atMm ?? 0;
      nudge(open, target.atMm - here);
    },
    (open, target) => {
      open.select({ placementIds: ['p2'] });
      open.pickUp('p2');
      changeLevel(open, 1);
      nudge(open, target.atMm - (placementPlace(open.site, 'p2')?.placement.atMm ?? 0));
      open.putDown();
    },
  ];
  const files = [];
  for (const way of ways) {
    const { open } = await openSite();
    way(open, { levelId: levelId(open, 0, 1), atMm: 612 });
    files.push(writeSite(open.site));
  }
  expect(new Set(files).size).toBe(1);
  expect(files[0]).toContain('"atMm":612');
});

test('a move that is tried and taken back leaves no step, no journal entry and the site as it was', async () => {
  const { open, host } = await openSite();
  const before = open.site;
  open.pickUp('p1');
  changeLevel(open, 1);
  nudge(open, 100);
  expect(open.site).not.toBe(before);
  open.putBack();
  await vi.advanceTimersByTimeAsync(3000);
  expect(open.site).toBe(before);
  expect(open.canUndo).toBe(false);
  expect(open.carried).toBeNull();
  expect(host.calls).not.toContain('appendJournal');
});

test('what the core refuses changes nothing and is answered with its sentence', async () => {
  const { open } = await openSite();
  const before = open.site;
  const bayId = open.bay?.id ?? '';
  const refused = open.edit('Change clear entry', (site) => editBay(site, bayId, { clearEntryMm: -5 }));
  expect(refused).toMatch(/clearEntryMm/);
  expect(open.site).toBe(before);
  expect(open.canUndo).toBe(false);
  expect(open.said).toBe(refused);
});

test('a move says the goods, the place and what it did to the level', async () => {
  const { open } = await openSite();
  open.move('p1', { levelId: levelId(open, 1, 2), atMm: 300 });
  expect(open.said).toMatch(/^Crate moved to bay A2, level 3, 300\smm from the left upright\. Level: .+\. Bay: .+\.$/);
});

test('a unit load keeps its depth position when it is moved along', async () => {
  const { open } = await openSite();
  const place = placementPlace(open.site, 'p1');
  if (place === null) throw new Error('p1 is not there');
  open.move('p1', { ...targetOf(place), towardsFrontMm: 40 });
  open.move('p1', { levelId: levelId(open, 0, 1), atMm: 100 });
  expect(placementPlace(open.site, 'p1')?.placement.towardsFrontMm).toBe(40);
});

test('selection follows what is there: a bay that is deleted gives way to one that stands, and undo brings it back', async () => {
  const { open } = await openSite();
  const second = open.site.runs[0]?.bays[1];
  open.select({ bayId: second?.id ?? null });
  removeBayHere(open);
  expect(open.bay).not.toBeNull();
  expect(open.bay?.id).not.toBe(second?.id);
  open.undo();
  expect(open.selection.bayId).toBe(second?.id);
});

test('a finding’s field opens its form: goods, level, bay, frame, library entry, each by kind and id', async () => {
  const { open } = await openSite();
  const frameId = open.site.runs[0]?.frames[2]?.id ?? '';
  for (const [field, kind, id] of [
    ['unitLoad:crate:goodsKg', 'unitLoad', 'crate'],
    [`level:${levelId(open, 1, 2)}:locks`, 'level', levelId(open, 1, 2)],
    [`frame:${frameId}:typeId`, 'frame', frameId],
    ['notice:notice:bayKg', 'notice', 'notice'],
  ] as const) {
    open.openField(field);
    expect(open.task).toEqual({ kind, id, field });
    expect(open.asked).toEqual(open.task);
  }
});

test('every run has findings, and an edit of one bay leaves the findings of the others as they are', async () => {
  const { open } = await openSite(smallSite(6));
  const before = open.runAudit?.bays ?? [];
  expect(before).toHaveLength(6);
  open.move('p1', { levelId: levelId(open, 0, 1), atMm: 500 });
  const after = open.runAudit?.bays ?? [];
  expect(after[0]).not.toBe(before[0]);
  expect(after.every((bay) => bay.verdict.length > 0)).toBe(true);
  // The neighbour shares a frame; whoever stands further away is not looked at again.
  after.slice(2).forEach((bay, i) => expect(bay).toBe(before[i + 2]));
});

test('the chosen bay has its calculations at once, a trial move included; the others have their sentences', async () => {
  const { open } = await openSite(smallSite(), writingWorker);
  const steps = () => open.levelAudit?.findings.reduce((sum, finding) => sum + finding.worked.length, 0) ?? 0;
  const total = () => open.levelAudit?.totalKg;
  expect(steps()).toBeGreaterThan(5);
  expect(total()).toBe(800);
  open.tryMove('p1', { levelId: levelId(open, 0, 1), atMm: 75 });
  expect(total()).toBe(400);
  open.dropTrial();
  expect(total()).toBe(800);
  const audited = await openSite();
  const [own, other] = audited.open.runAudit?.bays ?? [];
  const worked = (bay: typeof own) => bay?.levels.flatMap((one) => one.findings.flatMap((finding) => finding.worked)).length;
  expect(worked(own)).toBeGreaterThan(5);
  expect(other?.levels[0]?.findings.length).toBeGreaterThan(5);
  expect(worked(other)).toBe(0);
  const { site, run, findings } = audited.open;
  expect(worked(findings.wholeBay(site, run?.id ?? '', other?.bayId ?? '') ?? undefined)).toBeGreaterThan(5);
});

test('light findings say the same verdicts as whole ones, for every bay and frame', async () => {
  const { open } = await openSite(smallSite(5));
  const light = open.audits.get(open.run?.id ?? '');
  const whole = auditRun(open.site, open.run?.id ?? '', open.today());
  const said = (audit: RunAudit | undefined) =>
    audit?.bays.map((bay) => [
      bay.verdict,
      bay.totalKg,
      ...bay.levels.map((one) => [one.verdict, one.totalKg, ...one.findings.map((f) => [f.check, f.verdict, f.utilisation])]),
    ]);
  expect(said(light)).toEqual(said(whole));
  expect(light?.frames.map((frame) => [frame.verdict, frame.storeys])).toEqual(whole.frames.map((frame) => [frame.verdict, frame.storeys]));
  expect(light?.verdict).toBe(whole.verdict);
});

test('switching the view between unit systems is no edit and changes nothing in the file', async () => {
  const { open } = await openSite();
  const before = writeSite(open.site);
  for (let i = 0; i < 9; i++) open.switchUnits();
  expect(open.reading.units).toBe('us');
  expect(open.saved).toBe('saved');
  expect(writeSite(open.site)).toBe(before);
});

test('goods put on one after the other stand from the left, each with the gap asked for, until there is no place', async () => {
  const { open } = await openSite();
  const crate = open.site.unitLoads[0];
  const run = open.run?.id ?? '';
  if (!crate) throw new Error('no unit load');
  open.edit('Trucks', (site) => editRun(site, run, { loadedBy: 'class-400' }));
  choose(open, 1, 0);
  expect([0, 1, 2].map(() => putGoods(open, crate, false))).toEqual([null, null, null]);
  // 3 × 800 and 4 gaps of 75 fill 2 700 mm (facts F-55).
  expect(open.level?.placements.map((one) => one.atMm)).toEqual([75, 950, 1825]);
  expect(putGoods(open, crate, false)).toMatch(
    /^There is no free place 800\smm wide on bay A2, level 1: the widest gap there is 75\smm, 725\smm too little\./,
  );
  expect(open.level?.placements).toHaveLength(3);
});
