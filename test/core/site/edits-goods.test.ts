import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import {
  editPlacement,
  evenlySpace,
  mirrorPlacement,
  movePlacement,
  placeGoods,
  removePlacement,
  removePlacements,
} from '../../../src-core/site/edits';
import { everyId, findBay, findLevel, findPlacement } from '../../../src-core/site/lookup';
import { readSite } from '../../../src-core/site/read';
import type { Site } from '../../../src-core/site/site';
import { writeSite } from '../../../src-core/site/write';
import { makeBay, makeLevel, makePlacement, makeRun, makeSite, makeUnitLoad } from '../../make';
import { arbitrarySite } from '../../make-random';

const goods = makeUnitLoad({ id: 'goods' });
const wide = makeUnitLoad({ id: 'wide', widthMm: 1200 });
const level = (id: string, heightMm: number, at: readonly number[]) =>
  makeLevel([], { id, heightMm, placements: at.map((atMm, i) => makePlacement('goods', atMm, { id: `${id}-${i}`, towardsFrontMm: 20 })) });
const site: Site = makeSite({
  id: 'site',
  unitLoads: [goods, wide],
  runs: [
    makeRun(
      [
        makeBay([level('l1', 1500, [75, 950, 1825]), level('l2', 3000, [950])], { id: 'one' }),
        makeBay([level('l3', 1500, [])], { id: 'two' }),
      ],
      { id: 'run' },
    ),
  ],
});

const order = (given: Site, levelId: string) => findLevel(given, levelId).level.placements.map(({ id }) => id);

test('goods are put on a level in their order from the left', () => {
  const after = placeGoods(site, { id: 'new', unitLoadId: 'wide' }, { levelId: 'l1', atMm: 900 });
  expect(order(after, 'l1')).toEqual(['l1-0', 'new', 'l1-1', 'l1-2']);
  expect(findPlacement(after, 'new').placement).toEqual({ id: 'new', unitLoadId: 'wide', atMm: 900, mirrored: false, towardsFrontMm: 0 });
});

test('goods on the floor of a bay are on no level', () => {
  const after = placeGoods(
    site,
    { id: 'new', unitLoadId: 'wide', mirrored: true },
    { levelId: null, bayId: 'two', atMm: 10, towardsFrontMm: -30 },
  );
  expect(findBay(after, 'two').bay.onFloor).toEqual([{ id: 'new', unitLoadId: 'wide', atMm: 10, mirrored: true, towardsFrontMm: -30 }]);
  expect(findPlacement(after, 'new').level).toBeNull();
});

test('a move keeps depth and side unless the target says otherwise', () => {
  const moved = movePlacement(mirrorPlacement(site, 'l1-1'), 'l1-1', { levelId: 'l3', atMm: 100 });
  expect(findPlacement(moved, 'l1-1')).toMatchObject({ bay: { id: 'two' }, placement: { atMm: 100, mirrored: true, towardsFrontMm: 20 } });
  expect(findPlacement(movePlacement(site, 'l1-1', { levelId: 'l3', atMm: 0, towardsFrontMm: 5 }), 'l1-1').placement.towardsFrontMm).toBe(
    5,
  );
});

test('the same move ends in the same bytes, by whichever way it went', () => {
  const straight = movePlacement(site, 'l1-1', { levelId: 'l2', atMm: 1800 });
  const bySteps = [
    { levelId: 'l1', atMm: 1000 } as const,
    { levelId: 'l3', atMm: 1000 } as const,
    { levelId: null, bayId: 'two', atMm: 1000 } as const,
    { levelId: 'l2', atMm: 940 } as const,
    { levelId: 'l2', atMm: 1800 } as const,
  ].reduce((next, target) => movePlacement(next, 'l1-1', target), site);
  expect(writeSite(bySteps)).toBe(writeSite(straight));
});

test('a move to where it stands changes nothing', () => {
  expect(movePlacement(site, 'l1-1', { levelId: 'l1', atMm: 950 })).toBe(site);
  expect(editPlacement(site, 'l1-1', { towardsFrontMm: 20 })).toBe(site);
});

test('a move touches the two bays on its way and no other', () => {
  const after = movePlacement(site, 'l1-1', { levelId: 'l2', atMm: 0 });
  expect(findBay(after, 'two').bay).toBe(findBay(site, 'two').bay);
  expect(after.unitLoads).toBe(site.unitLoads);
});

test('goods off the end of a level are taken: that is for the audit to find', () => {
  expect(findPlacement(movePlacement(site, 'l1-1', { levelId: 'l1', atMm: -400 }), 'l1-1').placement.atMm).toBe(-400);
});

test('taken off means gone', () => {
  expect(order(removePlacement(site, 'l1-1'), 'l1')).toEqual(['l1-0', 'l1-2']);
  expect(order(removePlacements(site, ['l1-0', 'l1-2']), 'l1')).toEqual(['l1-1']);
});

test('turned twice is as before', () => {
  expect(mirrorPlacement(mirrorPlacement(site, 'l1-1'), 'l1-1')).toEqual(site);
});

test('three 800 mm unit loads in 2 700 mm stand with gaps of 75 mm', () => {
  // 3 × 800 + 4 × 75 = 2 700: facts.md F-55, UK trade association Q&A of December 2014.
  const crowded = ['l1-0', 'l1-1', 'l1-2'].reduce((next, id, i) => editPlacement(next, id, { atMm: 700 + i }), site);
  expect(findLevel(evenlySpace(crowded, 'l1'), 'l1').level.placements.map(({ atMm }) => atMm)).toEqual([75, 950, 1825]);
  expect(evenlySpace(site, 'l1')).toBe(site);
});

test('goods wider than the clear entry cannot be spaced', () => {
  const four = placeGoods(site, { id: 'new', unitLoadId: 'wide' }, { levelId: 'l1', atMm: 900 });
  expect(() => evenlySpace(four, 'l1')).toThrow(
    'The goods of this level are 3600 mm wide together, more than the clear entry of 2700 mm. Take one off first.',
  );
});

test.each<[string, () => Site, string]>([
  [
    'a unit load that is not there',
    () => placeGoods(site, { id: 'n', unitLoadId: 'gone' }, { levelId: 'l1', atMm: 0 }),
    'There is no unit load with the id "gone"',
  ],
  [
    'an id that is used already',
    () => placeGoods(site, { id: 'l2-0', unitLoadId: 'goods' }, { levelId: 'l1', atMm: 0 }),
    'The id "l2-0" is used already',
  ],
  ['a level that is not there', () => movePlacement(site, 'l1-1', { levelId: 'gone', atMm: 0 }), 'there is no level with the id "gone"'],
  [
    'a placement that is not there',
    () => movePlacement(site, 'gone', { levelId: 'l1', atMm: 0 }),
    'there is no placement with the id "gone"',
  ],
  ['a place that is no number', () => movePlacement(site, 'l1-1', { levelId: 'l1', atMm: Number.NaN }), 'atMm: Must be a number of mm'],
  ['a place at infinity', () => movePlacement(site, 'l1-1', { levelId: 'l1', atMm: Infinity }), 'but is Infinity'],
])('%s is refused and quoted', (_, edit, says) => {
  expect(edit).toThrow(RangeError);
  expect(edit).toThrow(says);
});

test('after any moves on any site every unit load is still there, and the site reads', () => {
  fc.assert(
    fc.property(
      arbitrarySite(),
      fc.array(fc.tuple(fc.nat(), fc.nat(), fc.integer({ min: -500, max: 4000 }), fc.nat(3)), { maxLength: 12 }),
      (before, moves) => {
        const bays = before.runs.flatMap((run) => run.bays);
        const levels = bays.flatMap((bay) => bay.levels);
        const placed = bays.flatMap((bay) => [...bay.levels.flatMap((one) => one.placements), ...bay.onFloor]);
        fc.pre(placed.length > 0);
        const after = moves.reduce((next, [which, where, atMm, what]) => {
          const id = placed[which % placed.length]?.id ?? '';
          const target = levels[where % Math.max(1, levels.length)];
          const bayId = bays[where % bays.length]?.id ?? '';
          if (what === 0) return mirrorPlacement(next, id);
          if (what === 1 || !target) return movePlacement(next, id, { levelId: null, bayId, atMm });
          return movePlacement(next, id, { levelId: target.id, atMm });
        }, before);
        expect(readSite(JSON.parse(writeSite(after)))).toEqual({ ok: true, site: after });
        expect(everyId(after).toSorted()).toEqual(everyId(before).toSorted());
      },
    ),
    { numRuns: 200 },
  );
});
