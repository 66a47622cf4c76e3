/** Everything that changes a site, in any order, and undone and done again. */
import fc from 'fast-check';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { editBay, editEntry } from '../../src-core/site/edits';
import type { BayPlan } from '../../src-core/site/new-site';
import { writeSite } from '../../src-core/site/write';
import { keepTemplate } from '../../src-renderer/editing/bay-templates';
import { deleteGoods, duplicateGoods, mirrorGoods, putGoods, spaceEvenly } from '../../src-renderer/editing/goods-edits';
import { changeBay, changeLevel, nudge } from '../../src-renderer/editing/goods-moves';
import { copyLevelHere, pasteLevelHere, pasteLevelInto } from '../../src-renderer/editing/level-clipboard';
import { firstBay } from '../../src-renderer/editing/first-sizes';
import type { OpenSite } from '../../src-renderer/state/open-site.svelte';
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
} from '../../src-renderer/editing/rack-edits';
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
      const { open, host } = await savedSite(smallSite(), writingWorker);
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
  const { open } = await savedSite(smallSite(), writingWorker);
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
