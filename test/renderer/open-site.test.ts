import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { auditRun } from '../../src-core/audit/audit';
import type { RunAudit } from '../../src-core/audit/types';
import { editBay, editRun } from '../../src-core/site/edits';
import { writeSite } from '../../src-core/site/write';
import { putGoods } from '../../src-renderer/editing/goods-edits';
import { changeLevel, nudge } from '../../src-renderer/editing/goods-moves';
import type { OpenSite } from '../../src-renderer/state/open-site.svelte';
import { placementPlace, targetOf, type Target } from '../../src-renderer/editing/places';
import { removeBayHere } from '../../src-renderer/editing/rack-edits';
import { savedSite } from './opened';
import { smallSite } from './sites';
import { writingWorker } from './writing-worker';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

const levelId = (open: OpenSite, bay: number, level: number): string => open.site.runs[0]?.bays[bay]?.levels[level]?.id ?? '';
const choose = (open: OpenSite, bay: number, level: number) => open.select({ levelId: levelId(open, bay, level) });

test('nudges in a row are one step, and undo goes back to where the goods stood', async () => {
  const { open } = await savedSite();
  open.select({ placementIds: ['p1'] });
  for (let i = 0; i < 7; i++) nudge(open, 10);
  expect(placementPlace(open.site, 'p1')?.placement.atMm).toBe(145);
  expect(open.steps).toBe(1);
  open.undo();
  expect(placementPlace(open.site, 'p1')?.placement.atMm).toBe(75);
  expect(open.saved).toBe('saved');
});

test('a nudge after a save starts a step of its own, so that undo comes back to what is on disk', async () => {
  const { open } = await savedSite();
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
    const { open } = await savedSite();
    way(open, { levelId: levelId(open, 0, 1), atMm: 612 });
    files.push(writeSite(open.site));
  }
  expect(new Set(files).size).toBe(1);
  expect(files[0]).toContain('"atMm":612');
});

test('a move that is tried and taken back leaves no step, no journal entry and the site as it was', async () => {
  const { open, host } = await savedSite();
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
  const { open } = await savedSite();
  const before = open.site;
  const bayId = open.bay?.id ?? '';
  const refused = open.edit('Change clear entry', (site) => editBay(site, bayId, { clearEntryMm: -5 }));
  expect(refused).toMatch(/clearEntryMm/);
  expect(open.site).toBe(before);
  expect(open.canUndo).toBe(false);
  expect(open.said).toBe(refused);
});

test('a move says the goods, the place and what it did to the level', async () => {
  const { open } = await savedSite();
  open.move('p1', { levelId: levelId(open, 1, 2), atMm: 300 });
  expect(open.said).toMatch(/^Crate moved to bay A2, level 3, 300\smm from the left upright\. Level: .+\. Bay: .+\.$/);
});

test('a unit load keeps its depth position when it is moved along', async () => {
  const { open } = await savedSite();
  const place = placementPlace(open.site, 'p1');
  if (place === null) throw new Error('p1 is not there');
  open.move('p1', { ...targetOf(place), towardsFrontMm: 40 });
  open.move('p1', { levelId: levelId(open, 0, 1), atMm: 100 });
  expect(placementPlace(open.site, 'p1')?.placement.towardsFrontMm).toBe(40);
});

test('selection follows what is there: a bay that is deleted gives way to one that stands, and undo brings it back', async () => {
  const { open } = await savedSite();
  const second = open.site.runs[0]?.bays[1];
  open.select({ bayId: second?.id ?? null });
  removeBayHere(open);
  expect(open.bay).not.toBeNull();
  expect(open.bay?.id).not.toBe(second?.id);
  open.undo();
  expect(open.selection.bayId).toBe(second?.id);
});

test('a finding’s field opens its form: goods, level, bay, frame, library entry, each by kind and id', async () => {
  const { open } = await savedSite();
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
  const { open } = await savedSite(smallSite(6));
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
  const { open } = await savedSite(smallSite(), writingWorker);
  const steps = () => open.levelAudit?.findings.reduce((sum, finding) => sum + finding.worked.length, 0) ?? 0;
  const total = () => open.levelAudit?.totalKg;
  expect(steps()).toBeGreaterThan(5);
  expect(total()).toBe(800);
  open.tryMove('p1', { levelId: levelId(open, 0, 1), atMm: 75 });
  expect(total()).toBe(400);
  open.dropTrial();
  expect(total()).toBe(800);
  const audited = await savedSite();
  const [own, other] = audited.open.runAudit?.bays ?? [];
  const worked = (bay: typeof own) => bay?.levels.flatMap((one) => one.findings.flatMap((finding) => finding.worked)).length;
  expect(worked(own)).toBeGreaterThan(5);
  expect(other?.levels[0]?.findings.length).toBeGreaterThan(5);
  expect(worked(other)).toBe(0);
  const { site, run, findings } = audited.open;
  expect(worked(findings.wholeBay(site, run?.id ?? '', other?.bayId ?? '') ?? undefined)).toBeGreaterThan(5);
});

test('light findings say the same verdicts as whole ones, for every bay and frame', async () => {
  const { open } = await savedSite(smallSite(5));
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
  const { open } = await savedSite();
  const before = writeSite(open.site);
  for (let i = 0; i < 9; i++) open.switchUnits();
  expect(open.reading.units).toBe('us');
  expect(open.saved).toBe('saved');
  expect(writeSite(open.site)).toBe(before);
});

test('goods put on one after the other stand from the left, each with the gap asked for, until there is no place', async () => {
  const { open } = await savedSite();
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
