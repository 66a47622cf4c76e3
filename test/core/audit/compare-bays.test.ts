import { expect, test } from 'vitest';
import { bayState, compareBays } from '../../../src-core/audit/compare-bays';
import type { Site } from '../../../src-core/site/site';
import { plain } from '../plain';
import { completeSite, TODAY } from './complete-site';

const state = (site: Site) => bayState(site, 'run-A', 'A1', TODAY);

/** Bay A1 of the complete site with its levels changed. */
function withLevels(change: (heightMm: number, index: number) => number): Site {
  const site = completeSite();
  return {
    ...site,
    runs: site.runs.map((run) => ({
      ...run,
      bays: run.bays.map((bay) =>
        bay.id === 'A1' ? { ...bay, levels: bay.levels.map((level, i) => ({ ...level, heightMm: change(level.heightMm, i) })) } : bay,
      ),
    })),
  };
}

test('a bay compared with itself has no change and asks for nothing', () => {
  expect(compareBays(state(completeSite()), state(completeSite()))).toEqual({ figures: [], verdicts: [], steps: [] });
});

test('a first beam raised from 1 500 to 1 600 mm: elevation, frames and clearances change, and the notice no longer holds', () => {
  const { figures, verdicts, steps } = compareBays(state(completeSite()), state(withLevels((height, i) => (i === 0 ? 1600 : height))));
  const elevation = figures.filter(({ check }) => check === null).map(({ what, before, after }) => [what, before?.value, after?.value]);
  expect(elevation).toEqual(
    expect.arrayContaining([
      ['first beam height', 1500, 1600],
      ['greatest gap between beams', 5500, 5400],
      ['height of level 1', 1500, 1600],
    ]),
  );
  // The opening over the crate on the floor grows by the same 100 mm, that over level 1 shrinks by it.
  const room = figures.filter(({ check, what }) => check === 'clearance-above' && what === 'allowed');
  expect(room.map(({ before, after }) => (after?.value ?? NaN) - (before?.value ?? NaN))).toEqual([
    expect.closeTo(-100, 9),
    expect.closeTo(100, 9),
  ]);
  const worse = verdicts.filter((one) => one.worse).map(({ check, before, after }) => [check, before, after]);
  expect(worse).toEqual(expect.arrayContaining([['notice-match', 'within', 'not-assessable']]));
  // The neighbour's beams stay: the shared frame is held at 1 500 from one side and at 1 600 from the other.
  expect(worse).toEqual(expect.arrayContaining([['frame-storey', 'within', 'not-assessable']]));
  expect(steps.map(plain)).toEqual([
    expect.stringContaining('Have the maker or supplier confirm the change in writing'),
    expect.stringContaining('Empty every level of bay A1'),
    expect.stringContaining('renew the load notice'),
  ]);
});

test('a raised upper beam empties only the levels from it upwards', () => {
  const { steps, figures } = compareBays(state(completeSite()), state(withLevels((height, i) => (i === 1 ? 6900 : height))));
  expect(plain(steps[1] ?? [])).toBe('Empty level 2 of bay A1 and every level above it before any beam is moved.');
  expect(figures.some(({ what, before, after }) => what === 'height of level 2' && before?.value === 7000 && after?.value === 6900)).toBe(
    true,
  );
});

test('a level taken out is told by its height, its mass and the checks that are gone', () => {
  const site = completeSite();
  const without: Site = {
    ...site,
    runs: site.runs.map((run) => ({
      ...run,
      bays: run.bays.map((bay) => (bay.id === 'A1' ? { ...bay, levels: bay.levels.slice(0, 1) } : bay)),
    })),
  };
  const { figures, verdicts } = compareBays(state(site), state(without));
  const gone = figures.filter(({ place }) => place.levelId === 'A1-upper');
  expect(gone.find(({ what }) => what === 'mass on the level')).toMatchObject({ before: { value: 650 }, after: null });
  expect(gone.find(({ what }) => what === 'height of level 2')).toMatchObject({ before: { value: 7000 }, after: null });
  expect(verdicts.filter(({ place, after }) => place.levelId === 'A1-upper' && after === null).length).toBeGreaterThan(10);
  expect(figures.find(({ what, place }) => what === 'number of beam levels' && place.bayId === 'A1')).toMatchObject({
    before: { value: 2 },
    after: { value: 1 },
  });
});

test('goods alone change figures without asking for the maker', () => {
  const site = completeSite();
  const heavier: Site = { ...site, unitLoads: site.unitLoads.map((one) => (one.id === 'bags' ? { ...one, goodsKg: 310 } : one)) };
  const { figures, steps } = compareBays(state(site), state(heavier));
  expect(steps).toEqual([]);
  // Two unit loads, 10 kg more each: the level, the bay, and half of that and of the neighbour's on the frames.
  const delta = (what: string) => {
    const found = figures.find((one) => one.what === what);
    return (found?.after?.value ?? NaN) - (found?.before?.value ?? NaN);
  };
  expect(delta('mass on the level')).toBeCloseTo(20, 9);
  expect(delta('mass on the bay’s levels')).toBeCloseTo(20, 9);
  expect(figures.every(({ before, after }) => before?.value !== after?.value)).toBe(true);
});

test('a bay that is not there is refused by its id', () => {
  expect(() => bayState(completeSite(), 'run-A', 'nowhere', TODAY)).toThrow('nowhere');
});
