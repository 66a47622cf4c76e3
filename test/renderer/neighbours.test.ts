/** What is chosen and has the focus after something was taken out, in the small site: three bays, crates p1 and p2 on the lowest level of the first. */
import { expect, test } from 'vitest';
import { removeBay } from '../../src-core/site/edits';
import { deleteGoods } from '../../src-renderer/editing/goods-edits';
import type { OpenSite } from '../../src-renderer/state/open-site.svelte';
import { copyRun, removeBayHere, removeLevelHere, removeRunFrom } from '../../src-renderer/editing/rack-edits';
import { openedSite } from './opened';

const bays = (open: OpenSite) => open.site.runs[0]?.bays ?? [];

test('after goods are taken off the next on the level is chosen, then the level; undo chooses what came back', () => {
  const open = openedSite();
  open.select({ placementIds: ['p1'] });
  deleteGoods(open);
  expect(open.selection.placementIds).toEqual(['p2']);
  expect(open.goingOn).toEqual({ on: 'placement', id: 'p2' });
  deleteGoods(open);
  expect(open.selection.placementIds).toEqual([]);
  expect(open.level?.id).toBe(bays(open)[0]?.levels[0]?.id);
  expect(open.goingOn?.on).toBe('level');
  open.undo();
  expect(open.selection.placementIds).toEqual(['p2']);
});

test('of several taken off none is chosen again; the one left of them is, where none stands to the right', () => {
  const open = openedSite();
  open.select({ placementIds: ['p2'] });
  deleteGoods(open);
  expect(open.selection.placementIds).toEqual(['p1']);
  open.undo();
  open.select({ placementIds: ['p1', 'p2'] });
  deleteGoods(open);
  expect(open.goingOn?.on).toBe('level');
});

test('after a level is deleted the one below it is chosen, below the lowest the one above, and last the floor', () => {
  const open = openedSite();
  const [lowest, middle, top] = bays(open)[0]?.levels.map(({ id }) => id) ?? [];
  open.select({ levelId: top ?? '' });
  removeLevelHere(open);
  expect(open.level?.id).toBe(middle);
  open.select({ levelId: lowest ?? '' });
  removeLevelHere(open);
  expect(open.level?.id).toBe(middle);
  removeLevelHere(open);
  expect(open.level).toBeNull();
  expect(open.bay?.id).toBe(bays(open)[0]?.id);
  open.undo();
  expect(open.level?.id).toBe(middle);
});

test('after a bay is deleted the one that takes its place is chosen, at the end of the run the one before it', () => {
  const open = openedSite();
  const [first, second, third] = bays(open).map(({ id }) => id);
  open.select({ bayId: second ?? '' });
  removeBayHere(open);
  expect(open.bay?.id).toBe(third);
  removeBayHere(open);
  expect(open.bay?.id).toBe(first);
  expect(open.goingOn).toEqual({ on: 'bay', id: first });
  removeBayHere(open);
  expect(open.goingOn?.on).toBe('run');
  expect(open.run?.bays).toEqual([]);
});

test('after a run is deleted the next one is chosen, and where it was the only one nothing is left to choose', () => {
  const open = openedSite();
  const [a] = open.site.runs;
  if (a === undefined) throw new Error('there is no run');
  copyRun(open, a);
  const [, b] = open.site.runs;
  if (b === undefined) throw new Error('there is no copy');
  removeRunFrom(open, a);
  expect(open.run?.id).toBe(b.id);
  expect(open.goingOn).toEqual({ on: 'run', id: b.id });
  removeRunFrom(open, b);
  expect(open.run).toBeNull();
  expect(open.goingOn).toEqual({ on: 'nothing', id: '' });
});

test('what was taken out otherwise leaves the selection on what still stands', () => {
  const open = openedSite();
  const second = bays(open)[1]?.id ?? '';
  open.select({ bayId: second });
  open.edit('Remove', (site) => removeBay(site, second));
  expect(open.bay).not.toBeNull();
});
