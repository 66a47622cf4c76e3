import { expect, test } from 'vitest';
import { baysBehind } from '../../../src-core/site/behind';
import { editBay, editRun } from '../../../src-core/site/edits';
import type { Answer, Site } from '../../../src-core/site/site';
import { siteOf, withRun } from '../visit/make-run';

/** Run A before run B, seen from opposite aisles, 2 700 mm bays throughout. */
function tied(baysOfB: number, rowSpacers: Answer = 'yes'): Site {
  const site = withRun(siteOf({ bays: 3 }), { name: 'B', bays: baysOfB });
  return editRun(site, 'run-A', { backToBack: { runId: 'run-B', gapMm: 200, rowSpacers } });
}

function behind(site: Site, frame: number): string[] {
  const run = site.runs[0];
  if (run === undefined) throw new Error('no run');
  return baysBehind(site, run, frame).map(({ bay }) => bay.name);
}

test('runs of one length: left of one is right of the other', () => {
  const site = tied(3);
  expect(behind(site, 0)).toEqual(['B3']);
  expect(behind(site, 1)).toEqual(['B2', 'B3']);
  expect(behind(site, 2)).toEqual(['B1', 'B2']);
  expect(behind(site, 3)).toEqual(['B1']);
});

test('a shorter run behind may be flush at either end: both cases are named', () => {
  const site = tied(2);
  // Flush at A's left end B2 and B1 stand behind A1 and A2; flush at its right end behind A2 and A3.
  expect(behind(site, 0)).toEqual(['B2']);
  expect(behind(site, 1)).toEqual(['B1', 'B2']);
  expect(behind(site, 2)).toEqual(['B1', 'B2']);
  expect(behind(site, 3)).toEqual(['B1']);
});

test('where no frame stands behind, the bay there is named', () => {
  const site = editBay(tied(3), 'B-bay-3', { clearEntryMm: 2000 });
  // B3 is now 2 100 mm from frame to frame: behind A's frame 1, at 2 800 mm, stands B2, and in the other case a frame does.
  expect(behind(site, 1)).toEqual(['B2', 'B3']);
});

test('without a run behind, or without row spacers, nothing is tied; not known counts as tied', () => {
  expect(behind(siteOf({ bays: 3 }), 1)).toEqual([]);
  expect(behind(tied(3, 'no'), 1)).toEqual([]);
  expect(behind(tied(3, 'unknown'), 1)).toEqual(['B2', 'B3']);
});

test('a frame that the run does not have is the caller’s mistake', () => {
  expect(() => behind(tied(3), 4)).toThrow('frame 4');
});
