import { expect, test } from 'vitest';
import { moveLevel } from '../../src-core/site/edits';
import { freshItem } from '../../src-renderer/forms/library-items';
import type { OpenSite } from '../../src-renderer/state/open-site.svelte';
import { shiftLevelHere } from '../../src-renderer/editing/rack-edits';
import { openedSite } from './opened';

/** Levels at 1500, 3000 and 4500 mm; the level of this number is chosen. */
function openSite(number: number): OpenSite {
  const open = openedSite();
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

test('in a site of pounds and inches a level goes by a hole of 2 in where the holes are not known', () => {
  const open = openSite(2);
  open.edit('Units', (site) => ({ ...site, units: 'us' }));
  put(open, 3048);
  shiftLevelHere(open, 1);
  // 3048 mm = 120 in; 122 in = 3098.8 mm.
  expect(heights(open)).toEqual([1500, 3098.8, 4500]);
});

test('a level between two holes comes onto the pitch', () => {
  const open = openSite(2);
  put(open, 3012);
  shiftLevelHere(open, 1);
  expect(heights(open)).toEqual([1500, 3050, 4500]);
  put(open, 3012);
  shiftLevelHere(open, -1);
  expect(heights(open)).toEqual([1500, 3000, 4500]);
});

test('a level goes by the pitch of its bay’s frames where both have it, and by 50 mm where they differ', () => {
  const open = openSite(2);
  const withPitch = (pitches: readonly (number | null)[]) =>
    open.edit('Frames', (site) => {
      const types = pitches.map((holePitchMm, i) => ({ ...freshItem('frameType', `t${i}`, `Type ${i}`), holePitchMm }));
      const [run] = site.runs;
      if (run === undefined) return site;
      const frames = run.frames.map((frame, i) => ({ ...frame, typeId: `t${i % 2}` }));
      return { ...site, frameTypes: types, runs: [{ ...run, frames }] };
    });
  withPitch([75, 75]);
  shiftLevelHere(open, 1);
  // 3000 = 40 × 75.
  expect(heights(open)).toEqual([1500, 3075, 4500]);
  withPitch([50.8, 50.8]);
  put(open, 3048);
  shiftLevelHere(open, -1);
  // 3048 mm = 120 in = 60 holes of 2 in; 59 × 50.8 = 2997.2.
  expect(heights(open)).toEqual([1500, 2997.2, 4500]);
  withPitch([50, 75]);
  put(open, 3000);
  shiftLevelHere(open, 1);
  expect(heights(open)).toEqual([1500, 3050, 4500]);
  withPitch([75, null]);
  shiftLevelHere(open, 1);
  expect(heights(open)).toEqual([1500, 3100, 4500]);
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
