import { expect, test } from 'vitest';
import {
  addEntry,
  changeRule,
  editBay,
  editEntry,
  editFrame,
  editSite,
  moveLevel,
  removePlacement,
  removeRun,
} from '../../../src-core/site/edits';
import { readSite } from '../../../src-core/site/read';
import { compareRecords, contentsText, readContents, voidBy } from '../../../src-core/visit/contents';
import { differences } from '../../../src-core/visit/differences';
import { extractOf } from '../../../src-core/visit/extract';
import { goods } from '../audit/rack';
import { siteOf, withRun } from './make-run';

const site = withRun(siteOf({ bays: 6 }), { name: 'B', bays: 2 });

test('an extract is a site of its own: the bay, its neighbours and what they use', () => {
  const more = addEntry(site, 'unitLoads', goods('unused'));
  const part = extractOf(more, ['A-bay-4']);
  expect(part.runs.map(({ name, bays, frames }) => [name, bays.map(({ id }) => id), frames.map(({ id }) => id)])).toEqual([
    ['A', ['A-bay-3', 'A-bay-4', 'A-bay-5'], ['A-frame-3', 'A-frame-4', 'A-frame-5', 'A-frame-6']],
  ]);
  expect(part.unitLoads.map(({ id }) => id)).toEqual(['g']);
  expect(part.beamTypes.map(({ id }) => id)).toEqual(['beam']);
  expect(readSite(part)).toMatchObject({ ok: true });
  expect(() => extractOf(site, ['nowhere'])).toThrow('nowhere');
});

const record = (of = site) => readContents(contentsText(of, ['A-bay-4'], { verdict: 'within', totalKg: 1860 }));

test('contents come back from their text as they were', () => {
  expect(record()).toEqual({
    site: extractOf(site, ['A-bay-4']),
    bayIds: ['A-bay-4'],
    figures: { verdict: 'within', totalKg: 1860 },
    paper: null,
  });
  expect(() => readContents('{"site":{}}')).toThrow(RangeError);
});

test('a record holds while nothing of its part of the rack changes', () => {
  expect(voidBy(record(), site)).toEqual([]);
  expect(voidBy(record(), editSite(site, { name: 'Another name', notes: 'x', units: 'us' }))).toEqual([]);
  expect(voidBy(record(), moveLevel(site, 'B1-level-1', 1600))).toEqual([]);
  expect(voidBy(record(), editBay(site, 'A-bay-1', { clearEntryMm: 2600 }))).toEqual([]);
});

test.each([
  ['a moved beam', moveLevel(site, 'A4-level-1', 1600), 'run A · bay A4 · level 1 · height'],
  ['a neighbour’s moved beam', moveLevel(site, 'A5-level-2', 3100), 'run A · bay A5 · level 2 · height'],
  ['a damaged frame', editFrame(site, 'A-frame-4', { anchored: 'no' }), 'run A · frame A-F4 · anchored'],
  ['another rating', editEntry(site, 'notices', 'notice', { bayKg: 9000 }), 'load notice LN-1 · bay'],
  ['goods taken off', removePlacement(site, 'A4-level-1-goods-2'), 'run A · bay A4 · level 1 · placement 2'],
  ['a changed rule', changeRule(site, 'closeAbove', 0.8, 'house rule'), 'rules · changed 1'],
])('%s makes a record void and says where', (_, after, where) => {
  const changes = voidBy(record(), after);
  expect(changes.map((one) => one.where)).toContain(where);
});

test('moved goods leave a report on the rack standing, and void a check of its loads', () => {
  const after = removePlacement(site, 'A4-level-1-goods-2');
  expect(voidBy(record(), after)).toHaveLength(1);
  expect(voidBy(record(), after, { goods: false })).toEqual([]);
  expect(voidBy(record(), moveLevel(after, 'A4-level-1', 1600), { goods: false })).toHaveLength(1);
});

test('a bay that is gone makes its record void', () => {
  expect(voidBy(record(), removeRun(site, 'run-A'))).toEqual([{ where: 'every bay of this record', before: 'there', after: null }]);
});

test('two records compare place by place, lengths and masses as quantities', () => {
  const later = readContents(contentsText(moveLevel(site, 'A4-level-1', 1900), ['A-bay-4'], { verdict: 'over', totalKg: 2000 }));
  expect(compareRecords(record(), later)).toEqual({
    inputs: [
      { where: 'run A · bay A4 · level 1 · height', before: { kind: 'length', value: 1500 }, after: { kind: 'length', value: 1900 } },
    ],
    figures: [
      { where: 'verdict', before: 'within', after: 'over' },
      { where: 'total', before: { kind: 'mass', value: 1860 }, after: { kind: 'mass', value: 2000 } },
    ],
  });
});

test.each([
  [{ a: 1 }, { a: 1 }, []],
  [{ a: null }, { a: 0 }, [{ where: 'a', before: 'not known', after: '0' }]],
  [{ clearEntryMm: 1 }, {}, [{ where: 'clear entry', before: { kind: 'length', value: 1 }, after: null }]],
  [{ bays: [{ id: 'x', name: 'N' }] }, { bays: [] }, [{ where: 'bay N', before: 'there', after: null }]],
  [{ bays: [] }, { bays: [{ id: 'x', name: '' }] }, [{ where: 'bay 1', before: null, after: 'there' }]],
  [{ feet: [{ xMm: 1 }] }, { feet: [{ xMm: 1 }, { xMm: 2 }] }, [{ where: 'foot 2', before: null, after: 'there' }]],
  [{ torn: true }, { torn: false }, [{ where: 'torn', before: 'yes', after: 'no' }]],
  [{ note: '' }, { note: 'bent' }, [{ where: 'note', before: 'nothing', after: 'bent' }]],
])('differences of %j and %j', (before, after, expected) => expect(differences(before, after)).toEqual(expected));
