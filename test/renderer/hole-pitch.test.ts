import { afterEach, expect, test } from 'vitest';
import { moveLevel } from '../../src-core/site/edits';
import { OpenSite } from '../../src-renderer/open-site.svelte';
import { shiftLevelHere } from '../../src-renderer/rack-edits';
import { MemoryHost } from './memory-host';
import { smallSite } from './sites';

let opened: OpenSite | null = null;
afterEach(() => opened?.close());

/** Levels at 1500, 3000 and 4500 mm; the level of this number is chosen. */
function openSite(number: number): OpenSite {
  const site = smallSite();
  const open = new OpenSite({ host: new MemoryHost(), id: site.id, site, revision: null, savedAt: null, today: () => '2026-12-01' });
  opened = open;
  open.select({ levelId: open.bay?.levels[number - 1]?.id ?? null });
  return open;
}

const heights = (open: OpenSite) => open.bay?.levels.map((level) => level.heightMm);
const put = (open: OpenSite, heightMm: number) => open.edit('Put', (site) => moveLevel(site, open.level?.id ?? '', heightMm));

test('a level goes up and down by one hole of 50 mm', () => {
  const open = openSite(2);
  shiftLevelHere(open, 1);
  expect(heights(open)).toEqual([1500, 3050, 4500]);
  expect(open.said).toMatch(/^Level 2 of bay A1 now at 3.050.mm/);
  shiftLevelHere(open, -1);
  shiftLevelHere(open, -1);
  expect(heights(open)).toEqual([1500, 2950, 4500]);
});

test('a level between two holes comes onto the pitch', () => {
  const open = openSite(2);
  put(open, 3012);
  shiftLevelHere(open, 1);
  expect(heights(open)).toEqual([1500, 3050, 4500]);
  put(open, 3012);
  shiftLevelHere(open, -1);
  expect(heights(open)).toEqual([1500, 2950, 4500]);
});

test('a level stops below the one above it, above the one below it, and above the floor', () => {
  const open = openSite(2);
  put(open, 4450);
  shiftLevelHere(open, 1);
  expect(heights(open)).toEqual([1500, 4450, 4500]);
  expect(open.said).toBe('The level above is in the way.');
  put(open, 1550);
  shiftLevelHere(open, -1);
  expect(heights(open)).toEqual([1500, 1550, 4500]);
  expect(open.said).toBe('The level below is in the way.');
  const lowest = openSite(1);
  put(lowest, 50);
  shiftLevelHere(lowest, -1);
  expect(heights(lowest)).toEqual([50, 3000, 4500]);
  expect(lowest.said).toBe('This level is as low as it goes.');
});
