/** A level copied whole and pasted into one bay or several: bays of levels at 1500, 3000 and 4500 mm, two crates on the lowest level of the first. */
import { expect, test } from 'vitest';
import { editLevel, removeEntry, removePlacements } from '../../src-core/site/edits';
import type { Bay } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import { copyGoods } from '../../src-renderer/editing/goods-edits';
import { copyLevelHere, pasteLevelHere, pasteLevelInto } from '../../src-renderer/editing/level-clipboard';
import type { OpenSite } from '../../src-renderer/state/open-site.svelte';
import { duplicateLevelHere, fillLike, swapLevelHere } from '../../src-renderer/editing/rack-edits';
import { openedSite } from './opened';
import { smallSite } from './sites';

const bays = (open: OpenSite): readonly Bay[] => open.site.runs[0]?.bays ?? [];
/** Height and number of unit loads of each level. */
const levels = (open: OpenSite, bay: number) => bays(open)[bay]?.levels.map((level) => [level.heightMm, level.placements.length]);
const chooseBay = (open: OpenSite, bay: number) => open.select({ bayId: bays(open)[bay]?.id ?? null });

test('a level goes into another bay with its goods, takes the place of the one at its height, and comes off by one undo', () => {
  const open = openedSite();
  const before = writeSite(open.site);
  copyLevelHere(open);
  expect(open.said).toBe('Level 1 of bay A1 copied with 2 unit loads. Choose another bay and paste it there.');
  chooseBay(open, 2);
  pasteLevelHere(open);
  expect(levels(open, 2)).toEqual([
    [1500, 2],
    [3000, 0],
    [4500, 0],
  ]);
  expect(open.said).toMatch(
    /^Level pasted into bay A3 at 1.500.mm\. It took the place of 1 level without goods\. Undo brings that back\. Level: .+\. Bay: .+\.$/,
  );
  expect(open.level).toBe(bays(open)[2]?.levels[0]);
  expect(open.undoName).toBe('Paste a level into bay A3');
  open.undo();
  expect(writeSite(open.site)).toBe(before);
});

test('into several bays it is one step, and what gives way is counted with its goods and records', () => {
  const open = openedSite();
  copyLevelHere(open);
  const upper = bays(open)[1]?.levels[1]?.id ?? '';
  open.edit('Sag', (site) =>
    editLevel(site, upper, { sags: [{ beam: 'front', loadedMm: 6, unloadedMm: null, sidewaysMm: null, found: '2026-11-30' }] }),
  );
  const steps = open.steps;
  expect(pasteLevelInto(open, bays(open).slice(1), 3000)).toBeNull();
  expect(open.steps).toBe(steps + 1);
  expect([levels(open, 1), levels(open, 2)]).toEqual(
    [1, 2].map(() => [
      [1500, 0],
      [3000, 2],
      [4500, 0],
    ]),
  );
  expect(open.said).toMatch(
    /^Level pasted into 2 bays at 3.000.mm\. It took the place of 2 levels without goods and 1 record of damage or sag\./,
  );
  const ids = bays(open).flatMap((bay) => bay.levels.flatMap((level) => [level.id, ...level.placements.map(({ id }) => id)]));
  expect(new Set(ids).size).toBe(ids.length);
});

test('where no level stands at that height none gives way', () => {
  const open = openedSite();
  copyLevelHere(open);
  expect(pasteLevelInto(open, bays(open).slice(0, 1), 2200)).toBeNull();
  expect(levels(open, 0)?.map(([height]) => height)).toEqual([1500, 2200, 3000, 4500]);
  expect(open.said).not.toContain('took the place');
});

test('a level is never pasted over itself: it says so, and nothing changes', () => {
  const open = openedSite();
  const before = open.site;
  copyLevelHere(open);
  pasteLevelHere(open);
  expect(open.said).toMatch(/^The copied level itself stands there, at 1.500.mm\. Choose another bay, or paste it at another height\.$/);
  expect(open.site).toBe(before);
  // Among several bays the one where it stands is left as it is.
  expect(pasteLevelInto(open, bays(open))).toBeNull();
  expect(bays(open)[0]).toBe(before.runs[0]?.bays[0]);
  expect(open.undoName).toBe('Paste a level into 2 bays');
});

test('nothing copied, no bay chosen, and a copy whose goods left the library are each said', () => {
  const open = openedSite();
  expect(pasteLevelInto(open, bays(open))).toBe('No level is copied yet. Choose a level without choosing goods, and copy it first.');
  copyLevelHere(open);
  expect(pasteLevelInto(open, [])).toBe('No bay is chosen. Choose the bays that the level goes into.');
  open.edit('Take all off', (site) => removeEntry(removePlacements(site, ['p1', 'p2']), 'unitLoads', 'crate'));
  const before = open.site;
  chooseBay(open, 1);
  pasteLevelHere(open);
  expect(open.said).toBe(
    'The copied level cannot be pasted any more: goods on it left the libraries since. Undo that, or copy a level again.',
  );
  expect(open.site).toBe(before);
  open.undo();
  pasteLevelHere(open);
  expect(levels(open, 1)?.[0]).toEqual([1500, 2]);
});

test('the copy stays as it was copied, whatever becomes of the level; goods that are copied after it come first', () => {
  const open = openedSite();
  copyLevelHere(open);
  open.edit('Take off', (site) => removePlacements(site, ['p1']));
  chooseBay(open, 1);
  pasteLevelHere(open);
  expect(levels(open, 1)?.[0]).toEqual([1500, 2]);
  open.select({ placementIds: ['p2'] });
  copyGoods(open);
  expect(open.copiedLevel).toBeNull();
});

test('a level is duplicated on top with its goods, and chosen', () => {
  const open = openedSite();
  duplicateLevelHere(open);
  expect(levels(open, 0)?.at(-1)).toEqual([6000, 2]);
  expect(open.level?.heightMm).toBe(6000);
  expect(open.said).toBe('Level 4 added to bay A1.');
});

test('two levels change places with their goods; the highest has none above it', () => {
  const open = openedSite();
  const [low, middle] = bays(open)[0]?.levels ?? [];
  swapLevelHere(open, 1);
  expect(
    bays(open)[0]
      ?.levels.slice(0, 2)
      .map(({ id, heightMm }) => [id, heightMm]),
  ).toEqual([
    [middle?.id, 1500],
    [low?.id, 3000],
  ]);
  // What was chosen stays chosen, at its new height.
  expect(open.level?.id).toBe(low?.id);
  expect(open.said).toMatch(/^Levels 1 and 2 of bay A1 swapped, each with its beams and goods\./);
  swapLevelHere(open, 1);
  swapLevelHere(open, 1);
  expect(open.said).toBe('This is the highest level of the bay.');
  open.undo();
  open.undo();
  expect(writeSite(open.site)).toBe(writeSite(smallSite()));
});

test('levels without goods are given to bays that are picked one by one', () => {
  const open = openedSite();
  swapLevelHere(open, 1);
  fillLike(open, bays(open).slice(2), 'levels');
  expect(levels(open, 2)).toEqual(levels(open, 0)?.map(([height]) => [height, 0]));
  expect(open.undoName).toBe('Give 1 bay the levels of bay A1');
});
