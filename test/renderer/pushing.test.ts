import { expect, test } from 'vitest';
import { addEntry, placeGoods } from '../../src-core/site/edits';
import { COMMANDS } from '../../src-renderer/commands';
import { copyGoods, duplicateGoods, pasteGoods, putGoods } from '../../src-renderer/editing/goods-edits';
import { freshItem } from '../../src-renderer/forms/library-items';
import { changeBay, changeLevel, nudge } from '../../src-renderer/editing/goods-moves';
import type { OpenSite } from '../../src-renderer/state/open-site.svelte';
import { shellOn } from './opened';

/** Two crates 800 mm wide stand at 75 and 950 mm on the lowest level of an entry of 2700 mm; trucks are not known, so gaps are 75 mm. */
async function openSite(pushing: boolean): Promise<OpenSite> {
  const { shell, open } = await shellOn();
  if (pushing) COMMANDS.find((one) => one.id === 'push-apart')?.run({ shell, open });
  return open;
}

const places = (open: OpenSite, level = 0) =>
  Object.fromEntries((open.site.runs[0]?.bays[0]?.levels[level]?.placements ?? []).map((one) => [one.id, one.atMm]));
const levelId = (open: OpenSite, level: number) => open.site.runs[0]?.bays[0]?.levels[level]?.id ?? '';
const verdict = (open: OpenSite) => open.levelAudit?.verdict;

/** Every way of putting goods down onto others: p1 onto p2, which stands at 950 mm. */
const MOVES: Readonly<Record<string, (open: OpenSite) => unknown>> = {
  'the move command': (open) => open.move('p1', { levelId: levelId(open, 0), atMm: 500 }),
  'a drag': (open) => {
    open.tryMove('p1', { levelId: levelId(open, 0), atMm: 500 });
    open.keepTrial();
  },
  keys: (open) => {
    open.select({ placementIds: ['p1'] });
    for (let i = 0; i < 5; i++) nudge(open, 100);
  },
  'picking up and putting down': (open) => {
    open.select({ placementIds: ['p1'] });
    open.pickUp('p1');
    open.tryMove('p1', { levelId: levelId(open, 0), atMm: 500 });
    open.putDown();
  },
};

test.each(Object.entries(MOVES))('put down onto others by %s, goods are refused, with the millimetres in the way', async (_, move) => {
  const open = await openSite(false);
  move(open);
  expect(places(open)['p2']).toBe(950);
  expect(verdict(open)).not.toBe('not-possible');
  expect(open.refusedMove).toMatch(/^Crate would stand \d+\smm in Crate on bay A1, level 1\. Nothing was moved\./);
  expect(open.said).toBe(open.refusedMove);
});

test.each(Object.entries(MOVES))('put down onto others by %s, neighbours are pushed apart where that is chosen', async (_, move) => {
  const open = await openSite(true);
  move(open);
  expect(verdict(open)).not.toBe('not-possible');
  // By keys p2 gives way step by step and stops at the upright: 2700 − 75 − 800; p1 may not pass 950 then.
  const { p1 = 0, p2 = 0 } = places(open);
  expect(p1).toBeGreaterThan(75);
  expect(p2 - p1).toBeGreaterThanOrEqual(875);
  expect(open.refusedMove).toBeNull();
});

test('goods that stand in each other already come apart by steps, but never go deeper', async () => {
  const open = await openSite(false);
  const widen = (site: OpenSite['site']) => ({ ...site, unitLoads: site.unitLoads.map((one) => ({ ...one, widthMm: 1000 })) });
  open.edit('Widen', widen);
  // 75 + 1000 lies 125 mm over 950.
  open.select({ placementIds: ['p2'] });
  nudge(open, 100);
  expect(places(open)).toEqual({ p1: 75, p2: 1050 });
  nudge(open, -10);
  expect(places(open)).toEqual({ p1: 75, p2: 1050 });
  expect(open.refusedMove).toMatch(/would stand 35\smm in Crate/);
  nudge(open, 100);
  expect(places(open)).toEqual({ p1: 75, p2: 1150 });
});

test('pushed apart, neighbours keep the gap of 75 mm, in one step of undo', async () => {
  const open = await openSite(true);
  const before = open.site;
  open.move('p1', { levelId: levelId(open, 0), atMm: 500 });
  // 500 + 800 + 75.
  expect(places(open)).toEqual({ p1: 500, p2: 1375 });
  expect(verdict(open)).not.toBe('not-possible');
  open.undo();
  expect(open.site).toBe(before);
});

test('a move tried, then put down, ends as the move itself', async () => {
  const moved = await openSite(true);
  moved.move('p2', { levelId: levelId(moved, 0), atMm: 20 });
  const wanted = places(moved);
  moved.close();
  const tried = await openSite(true);
  tried.tryMove('p2', { levelId: levelId(tried, 0), atMm: 20 });
  expect(places(tried)).toEqual(wanted);
  tried.keepTrial();
  expect(places(tried)).toEqual(wanted);
});

test('keys and changing level push apart as well', async () => {
  const open = await openSite(true);
  open.select({ placementIds: ['p1'] });
  nudge(open, 100);
  expect(places(open)).toEqual({ p1: 175, p2: 1050 });
  open.move('p2', { levelId: levelId(open, 1), atMm: 300 });
  open.select({ placementIds: ['p1'] });
  changeLevel(open, 1);
  // p1 keeps to 175; p2, to its right, stands at 175 + 800 + 75.
  expect(places(open, 1)).toEqual({ p1: 175, p2: 1050 });
});

test('where the goods do not fit beside each other the move is refused with the millimetres that are missing', async () => {
  const open = await openSite(true);
  open.edit('Widen', (site) => ({ ...site, unitLoads: site.unitLoads.map((one) => ({ ...one, widthMm: 1400 })) }));
  open.move('p2', { levelId: levelId(open, 1), atMm: 0 });
  const before = open.site;
  open.select({ placementIds: ['p1'] });
  open.pickUp('p1');
  // 2 × 1400 − 2700.
  expect(open.move('p1', { levelId: levelId(open, 1), atMm: 100 })).toMatch(
    /^There is no room for Crate on bay A1, level 2, even with its neighbours pushed together: 100\smm are missing\./,
  );
  expect(open.site).toBe(before);
  open.viewUnits = 'us';
  // 100 ÷ 25.4 = 3.937 in.
  expect(open.move('p1', { levelId: levelId(open, 1), atMm: 100 })).toMatch(/3\.94\sin are missing/);
});

const full = (open: OpenSite) => {
  // Three more of 700 mm: what is free is 2700 − 2 × 800 = 1100, in pieces of 75, 75 and 950 mm.
  const slab = { ...freshItem('unitLoad', 'slab', 'Slab'), widthMm: 700, depthMm: 1200, heightMm: 900, goodsKg: 100 };
  open.edit('Add slab', (site) => addEntry(site, 'unitLoads', slab));
  return slab;
};

test('goods put on from the library go to a free place; where none is, neighbours make room or it is said how much is missing', async () => {
  for (const pushing of [false, true]) {
    const open = await openSite(pushing);
    const slab = full(open);
    open.select({ levelId: levelId(open, 0) });
    open.move('p2', { levelId: levelId(open, 0), atMm: 1400 });
    open.select({ levelId: levelId(open, 0), placementIds: [] });
    // Gaps now: 75, 525 (875 to 1400) and 500 (2200 to 2700) mm.
    const refused = putGoods(open, slab, false);
    if (!pushing) {
      expect(refused).toMatch(
        /^There is no free place 700\smm wide on bay A1, level 1: the widest gap there is 525\smm, 175\smm too little\. Its goods would make room if neighbours were pushed apart\. There is a free place on bay A1, level 2\.$/,
      );
      expect(places(open)).toEqual({ p1: 75, p2: 1400 });
    } else {
      expect(refused).toBeNull();
      const stand = Object.values(places(open)).toSorted((a, b) => a - b);
      // 2 × 800 + 700 and four gaps of 75 fill 2600 of 2700 mm.
      expect(stand).toHaveLength(3);
      expect(verdict(open)).not.toBe('not-possible');
      const again = putGoods(open, slab, false);
      expect(again).toMatch(/300\smm are missing/);
      expect(Object.values(places(open))).toHaveLength(3);
    }
    open.close();
  }
});

test('pasted and duplicated goods push apart too; what finds no room is said and stays copied', async () => {
  const open = await openSite(true);
  open.select({ placementIds: ['p1', 'p2'] });
  copyGoods(open);
  open.select({ levelId: levelId(open, 1) });
  open.edit('One in the middle', (site) => placeGoods(site, { id: 'm', unitLoadId: 'crate' }, { levelId: levelId(open, 1), atMm: 950 }));
  pasteGoods(open);
  // Three crates and four gaps of 75 fill the level.
  expect(Object.values(places(open, 1)).toSorted((a, b) => a - b)).toEqual([75, 950, 1825]);
  const before = open.site;
  pasteGoods(open);
  expect(open.site).toBe(before);
  expect(open.refusedMove).toMatch(/500\smm are missing/);
  expect(open.copied).toHaveLength(2);
  open.select({ placementIds: ['p1'] });
  duplicateGoods(open);
  duplicateGoods(open);
  expect(Object.keys(places(open))).toHaveLength(3);
  expect(open.refusedMove).toMatch(/500\smm are missing/);
});

test('of several pasted those that fit are put on, the others are said', async () => {
  const open = await openSite(false);
  open.select({ placementIds: ['p1', 'p2'] });
  copyGoods(open);
  open.select({ levelId: levelId(open, 0), placementIds: [] });
  pasteGoods(open);
  expect(places(open)).toMatchObject({ p1: 75, p2: 950 });
  expect(Object.keys(places(open))).toHaveLength(3);
  expect(open.refusedMove).toMatch(/^1 unit load of 2 found no place\. There is no free place 800\smm wide/);
  open.undo();
  expect(Object.keys(places(open))).toHaveLength(2);
});

test('several go to another level and to another bay together, in one step of undo', async () => {
  const open = await openSite(false);
  const before = open.site;
  open.select({ placementIds: ['p1', 'p2'] });
  changeLevel(open, 1);
  expect(places(open, 1)).toEqual({ p1: 75, p2: 950 });
  expect(open.selection.placementIds).toEqual(['p1', 'p2']);
  expect(open.said).toMatch(/^2 unit loads moved up one level\./);
  changeBay(open, 1);
  expect(open.bay?.levels[1]?.placements.map((one) => one.id)).toEqual(['p1', 'p2']);
  open.undo();
  open.undo();
  expect(open.site).toBe(before);
});

test('several dragged together end as several moved together, and are refused together', async () => {
  const open = await openSite(false);
  const up = (atMm: number, placementId: string) => ({ placementId, target: { levelId: levelId(open, 1), atMm } });
  open.tryMoves([up(175, 'p1'), up(1050, 'p2')]);
  expect(places(open, 1)).toEqual({ p1: 175, p2: 1050 });
  expect(open.canUndo).toBe(false);
  open.keepTrial();
  expect(places(open, 1)).toEqual({ p1: 175, p2: 1050 });
  expect(open.steps).toBe(1);
  expect(open.selection.placementIds).toEqual(['p1', 'p2']);
  open.undo();
  const before = open.site;
  open.tryMoves([up(175, 'p1'), up(900, 'p2')]);
  open.keepTrial();
  expect(open.site).toBe(before);
  expect(open.refusedMove).toMatch(/would stand 75\smm in Crate/);
});
