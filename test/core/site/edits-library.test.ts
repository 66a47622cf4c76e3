import { expect, test } from 'vitest';
import {
  addEntry,
  askFor,
  changeRule,
  editEntry,
  editRules,
  editSite,
  leaveOut,
  removeEntry,
  resetRule,
  usesOf,
} from '../../../src-core/site/edits';
import { problemsIn } from '../../../src-core/site/check-part';
import { planOfBay } from '../../../src-core/site/new-site';
import { findEntry, type Library } from '../../../src-core/site/lookup';
import type { Site } from '../../../src-core/site/site';
import {
  makeBay,
  makeBeamType,
  makeFloor,
  makeFrame,
  makeFrameType,
  makeLevel,
  makeNotice,
  makePallet,
  makePlacement,
  makeRun,
  makeSite,
  makeUnitLoad,
} from '../../make';

const site: Site = makeSite({
  id: 'site',
  pallets: [makePallet({ id: 'pallet' }), makePallet({ id: 'spare-pallet' })],
  unitLoads: [makeUnitLoad({ id: 'goods', palletId: 'pallet' }), makeUnitLoad({ id: 'other' })],
  notices: [makeNotice({ id: 'notice', beamTypeId: 'beam' })],
  beamTypes: [makeBeamType({ id: 'beam' })],
  frameTypes: [makeFrameType({ id: 'upright' })],
  floors: [makeFloor({ id: 'floor' })],
  runs: [
    makeRun(
      [
        makeBay(
          [
            makeLevel([], {
              id: 'low',
              beamTypeId: 'beam',
              placements: [makePlacement('goods', 0, { id: 'g1' }), makePlacement('goods', 900, { id: 'g2' })],
            }),
            makeLevel([], { id: 'high', heightMm: 3000, placements: [makePlacement('other', 0, { id: 'g3' })] }),
          ],
          { id: 'bay', noticeId: 'notice', onFloor: [makePlacement('goods', 0, { id: 'g4' })] },
        ),
      ],
      {
        id: 'run',
        floorId: 'floor',
        frames: [makeFrame({ id: 'left', typeId: 'upright' }), makeFrame({ id: 'right', typeId: 'upright' })],
      },
    ),
  ],
});

test.each<[Library, string, readonly string[]]>([
  ['pallets', 'pallet', ['unit load goods', 'level low', 'floor of a bay bay']],
  ['pallets', 'spare-pallet', []],
  ['unitLoads', 'goods', ['level low', 'floor of a bay bay']],
  ['unitLoads', 'other', ['level high']],
  ['notices', 'notice', ['bay bay']],
  ['beamTypes', 'beam', ['load notice notice', 'level low']],
  ['frameTypes', 'upright', ['frame left', 'frame right']],
  ['floors', 'floor', ['run run']],
])('a change of %s %s touches just what depends on it', (library, id, touched) => {
  expect(usesOf(site, library, id).map((use) => `${use.kind} ${use.id}`)).toEqual(touched);
});

test('what is in use cannot be removed, what is not can', () => {
  expect(() => removeEntry(site, 'unitLoads', 'goods')).toThrow('The unit load "Bagged flour" is used in 2 places. Change them first.');
  expect(() => removeEntry(site, 'floors', 'floor')).toThrow('is used in one place');
  expect(removeEntry(site, 'pallets', 'spare-pallet').pallets.map(({ id }) => id)).toEqual(['pallet']);
  expect(() => removeEntry(site, 'pallets', 'gone')).toThrow('there is no pallet with the id "gone"');
});

/** The site with its bay kept as a template and taken out, so that the template alone uses the libraries. */
const kept: Site = addEntry({ ...site, runs: [] }, 'bayTemplates', {
  id: 'plan',
  name: 'Long bay',
  ...planOfBay(site, 'bay', 'with goods'),
});

test.each<[Library, string]>([
  ['unitLoads', 'goods'],
  ['unitLoads', 'other'],
  ['notices', 'notice'],
  ['beamTypes', 'beam'],
  ['frameTypes', 'upright'],
])('%s %s cannot be removed while a bay template uses it, and can when the template is gone', (library, id) => {
  expect(usesOf(kept, library, id).filter((use) => use.kind === 'bay template')).toEqual([
    { kind: 'bay template', id: 'plan', runId: null, bayId: null },
  ]);
  expect(() => removeEntry(kept, library, id)).toThrow('is used in');
  const without = removeEntry(kept, 'bayTemplates', 'plan');
  expect(usesOf(without, library, id).filter((use) => use.kind === 'bay template')).toEqual([]);
});

test('a template changes by itself: bays that were laid out by it stay the same objects, and nothing uses it', () => {
  const both: Site = { ...kept, runs: site.runs };
  const after = editEntry(both, 'bayTemplates', 'plan', {
    clearEntryMm: 2200,
    levels: findEntry(both, 'bayTemplates', 'plan').levels.toReversed(),
  });
  expect(after.runs).toBe(both.runs);
  expect(findEntry(after, 'bayTemplates', 'plan').levels.map(({ heightMm }) => heightMm)).toEqual([1500, 3000]);
  expect(usesOf(after, 'bayTemplates', 'plan')).toEqual([]);
  expect(() => editEntry(both, 'bayTemplates', 'plan', { noticeId: 'gone' })).toThrow('There is no load notice with the id "gone"');
});

test('an entry is changed in place and the racks keep their identity', () => {
  const after = editEntry(site, 'unitLoads', 'goods', { goodsKg: 900 });
  expect(findEntry(after, 'unitLoads', 'goods').goodsKg).toBe(900);
  expect(after.runs).toBe(site.runs);
  expect(after.unitLoads[1]).toBe(site.unitLoads[1]);
  expect(editEntry(site, 'unitLoads', 'goods', { goodsKg: 800 })).toBe(site);
});

test('rows of a frame table and of ratings are put in order', () => {
  const rows = [2000, 1500].map((heightMm) => ({ heightMm, ratedKg: 10_000 - heightMm }));
  expect(
    findEntry(editEntry(site, 'frameTypes', 'upright', { table: rows }), 'frameTypes', 'upright').table.map((row) => row.heightMm),
  ).toEqual([1500, 2000]);
  const ratings = [3300, 2700].map((spanMm) => ({ spanMm, pairKg: 2000 }));
  const added = addEntry(site, 'beamTypes', makeBeamType({ id: 'new', ratings }));
  expect(findEntry(added, 'beamTypes', 'new').ratings.map((row) => row.spanMm)).toEqual([2700, 3300]);
});

test.each<[string, () => Site, string]>([
  [
    'two rows at one height',
    () => editEntry(site, 'frameTypes', 'upright', { table: [1, 1].map((heightMm) => ({ heightMm, ratedKg: 1 })) }),
    'but two have 1',
  ],
  ['a negative mass', () => editEntry(site, 'unitLoads', 'goods', { goodsKg: -1 }), 'goodsKg: Must be a number of kg from 0'],
  [
    'a pallet that is not there',
    () => editEntry(site, 'unitLoads', 'goods', { palletId: 'gone' }),
    'There is no pallet with the id "gone"',
  ],
  ['an id that is used already', () => addEntry(site, 'pallets', makePallet({ id: 'goods' })), 'The id "goods" is used already'],
  ['an entry that is not there', () => editEntry(site, 'notices', 'gone', {}), 'there is no load notice with the id "gone"'],
  ['a rule beyond its bounds', () => changeRule(site, 'deflectionDivisor', 3, 'why not'), 'This rule may be from 50 to 2000, but is 3'],
  ['a check left out without a reason', () => leaveOut(site, 'plumb', ''), 'leftOut[0].reason: Must be text'],
  ['a site without a name', () => editSite(site, { name: '' }), 'name: Must be text'],
])('%s is refused and quoted', (_, edit, says) => {
  expect(edit).toThrow(RangeError);
  expect(edit).toThrow(says);
});

test('a rule is changed with its reason, changed again, and goes back', () => {
  const once = changeRule(site, 'deflectionDivisor', 250, 'maker’s drawing');
  const twice = changeRule(once, 'deflectionDivisor', 300, 'maker’s letter');
  expect(twice.rules.changed).toEqual([{ key: 'deflectionDivisor', value: 300, reason: 'maker’s letter' }]);
  expect(resetRule(twice, 'deflectionDivisor')).toEqual(site);
});

test('a check is left out with its reason and asked for again', () => {
  const without = leaveOut(leaveOut(site, 'plumb', 'no survey yet'), 'anchor-pull', 'information only');
  expect(without.rules.leftOut.map(({ check }) => check)).toEqual(['plumb', 'anchor-pull']);
  expect(askFor(askFor(without, 'plumb'), 'anchor-pull')).toEqual(site);
});

test('switches of the rules and conditions of the site change alone', () => {
  expect(editRules(site, { fullComplement: false }).rules).toEqual({ ...site.rules, fullComplement: false });
  expect(editSite(site, { units: 'us', outdoors: 'yes' })).toEqual({ ...site, units: 'us', outdoors: 'yes' });
  expect(editSite(site, { units: 'metric' })).toBe(site);
});

test('a form can ask what a part’s problems are before it is taken', () => {
  expect(problemsIn('unitLoad', makeUnitLoad())).toEqual([]);
  expect(problemsIn('unitLoad', makeUnitLoad({ bearing: { kind: 'stepped', columns: [] } })).map(({ path }) => path)).toEqual([
    'bearing.columns',
  ]);
});
