/** Bay templates: kept from a bay, laid out by, told in words. */
import { expect, test } from 'vitest';
import { editEntry, editFrame, editLevel } from '../../src-core/site/edits';
import { planOfBay } from '../../src-core/site/new-site';
import type { Bay, BayTemplate, Run } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import { firstTemplate, goodsWords, keepTemplate, planFacts, templateNameFor } from '../../src-renderer/editing/bay-templates';
import { addLibraryItem } from '../../src-renderer/forms/library-items';
import type { OpenSite } from '../../src-renderer/state/open-site.svelte';
import { addBayAfter, addBays, copyBay, layOutRun, shiftBay, shiftRun } from '../../src-renderer/editing/rack-edits';
import { usedBy } from '../../src-renderer/editing/used-by';
import { openedSite } from './opened';

function runOf(open: OpenSite, index = 0): Run {
  const run = open.site.runs[index];
  if (run === undefined) throw new Error(`no run ${index}`);
  return run;
}
function bayOf(open: OpenSite, index = 0): Bay {
  const bay = runOf(open).bays[index];
  if (bay === undefined) throw new Error(`no bay ${index}`);
  return bay;
}
function template(open: OpenSite, name = 'Plums'): BayTemplate {
  const found = open.site.bayTemplates.find((one) => one.name === name);
  if (found === undefined) throw new Error(`no template ${name}`);
  return found;
}
const plain = (text: string) => text.replaceAll(/[\u00a0\u202f]/g, ' ');
const names = (run: Run) => run.bays.map(({ name }) => name).join(' ');

test('a bay is kept as a template with its goods and the frame to its right, and undo takes the template away', () => {
  const open = openedSite();
  open.edit('Frame', (site) => editFrame(site, runOf(open).frames[1]?.id ?? '', { heightMm: 6300 }));
  const before = writeSite(open.site);
  expect(keepTemplate(open, bayOf(open), 'Plums', 'with goods')).toBeNull();
  expect(open.said).toBe('Bay template Plums kept with 2 unit loads. New runs and bays can be laid out by it.');
  expect(template(open)).toMatchObject({ clearEntryMm: 2700, noticeId: 'notice', frameHeightMm: 6300, onFloor: [] });
  expect(template(open).levels.map((level) => [level.heightMm, level.placements.map(({ atMm }) => atMm)])).toEqual([
    [1500, [75, 950]],
    [3000, []],
    [4500, []],
  ]);
  open.undo();
  expect(writeSite(open.site)).toBe(before);
  keepTemplate(open, bayOf(open), 'Bare', 'without goods');
  expect(open.said).toContain('Bay template Bare kept, without goods.');
  expect(template(open, 'Bare').levels.flatMap(({ placements }) => placements)).toEqual([]);
});

test('the name that is proposed is one that no other template has', () => {
  const open = openedSite();
  const proposed = [0, 1, 2].map(() => {
    const name = templateNameFor(open.site, bayOf(open));
    keepTemplate(open, bayOf(open), name, 'without goods');
    return name;
  });
  expect(proposed).toEqual(['Like bay A1', 'Like bay A1, no. 2', 'Like bay A1, no. 3']);
});

test('a run by a template has its goods in every bay, and says how many', () => {
  const open = openedSite();
  keepTemplate(open, bayOf(open), 'Plums', 'with goods');
  expect(layOutRun(open, { name: 'B', bays: 4, plan: template(open), floorId: null, loadedBy: 'class-400' }, null)).toBeNull();
  expect(open.said).toBe('Run B laid out: 4 bays of 3 levels, each with 2 unit loads.');
  const run = runOf(open, 1);
  expect(run.loadedBy).toBe('class-400');
  expect(names(run)).toBe('B1 B2 B3 B4');
  expect(run.bays.map((bay) => bay.levels.map((level) => level.placements.map(({ atMm }) => atMm)))).toEqual(
    run.bays.map(() => [[75, 950], [], []]),
  );
  expect(run.bays[0]?.levels.every(({ locks }) => locks === 'unknown')).toBe(true);
});

test('bays by a template go in to the right of the chosen one as one step, with names that nobody has', () => {
  const open = openedSite();
  keepTemplate(open, bayOf(open), 'Plums', 'with goods');
  const before = writeSite(open.site);
  expect(addBays(open, runOf(open), template(open), { after: 0, count: 2 })).toBeNull();
  expect(names(runOf(open))).toBe('A1 A4 A5 A2 A3');
  expect(runOf(open).frames.map(({ name }) => name)).toEqual(['A0|A1', 'A1|A2', 'A4|A5', 'A5|A2', 'A2|A3', 'A3|A4']);
  expect(open.said).toBe('2 bays, A4 to A5, added to run A.');
  expect(open.bay?.name).toBe('A4');
  expect(open.undoName).toBe('Add 2 bays');
  open.undo();
  expect(writeSite(open.site)).toBe(before);
});

test('a bay added like another is empty, and what has to be seen at the rack is not known of it', () => {
  const open = openedSite();
  open.edit('Locks', (site) => editLevel(site, bayOf(open).levels[0]?.id ?? '', { locks: 'yes' }));
  addBayAfter(open);
  expect(bayOf(open, 1)).toMatchObject({ name: 'A4', noticeId: 'notice', clearEntryMm: 2700 });
  expect(bayOf(open, 1).levels.map(({ locks, placements }) => [locks, placements.length])).toEqual([
    ['unknown', 0],
    ['unknown', 0],
    ['unknown', 0],
  ]);
});

test('a duplicate of a bay stands to its right with its goods and is chosen', () => {
  const open = openedSite();
  copyBay(open, runOf(open), bayOf(open));
  expect(names(runOf(open))).toBe('A1 A4 A2 A3');
  expect(runOf(open).frames.map(({ name }) => name)).toEqual(['A0|A1', 'A1|A2', 'A4|A2', 'A2|A3', 'A3|A4']);
  expect(open.bay).toBe(bayOf(open, 1));
  expect(open.bay?.levels[0]?.placements).toHaveLength(2);
  expect(open.said).toBe('Bay A1 duplicated as bay A4.');
});

test('a bay at the end of its run closes with a frame named after the one that would be next', () => {
  const open = openedSite();
  addBays(open, runOf(open), planOfBay(open.site, bayOf(open).id, 'without goods'), { after: 2, count: 2 });
  expect(runOf(open).frames.map(({ name }) => name)).toEqual(['A0|A1', 'A1|A2', 'A2|A3', 'A3|A4', 'A4|A5', 'A5|A6']);
});

test('changing a template touches no bay that was laid out by it, and what it uses names it', () => {
  const open = openedSite();
  keepTemplate(open, bayOf(open), 'Plums', 'with goods');
  layOutRun(open, { name: 'B', bays: 2, plan: template(open), floorId: null, loadedBy: 'unknown' }, null);
  const { runs } = open.site;
  open.edit('Change', (site) => editEntry(site, 'bayTemplates', template(open).id, { clearEntryMm: 1800 }));
  expect(open.site.runs).toBe(runs);
  expect(usedBy(open.site, 'bayTemplates', template(open).id)).toEqual([]);
  for (const [library, id] of [
    ['notices', 'notice'],
    ['unitLoads', 'crate'],
  ] as const)
    expect(usedBy(open.site, library, id)).toContain('bay template Plums');
});

test('goods that do not fit a template are for the audit of the bays to judge: it is stored and laid out as it stands', () => {
  const open = openedSite();
  keepTemplate(open, bayOf(open), 'Plums', 'with goods');
  expect(open.edit('Narrow', (site) => editEntry(site, 'bayTemplates', template(open).id, { clearEntryMm: 1200 }))).toBeNull();
  layOutRun(open, { name: 'B', bays: 1, plan: template(open), floorId: null, loadedBy: 'unknown' }, null);
  expect(open.bayAudit?.verdict).toBe('not-possible');
});

test('the template last kept or laid out by is offered first, else the newest', () => {
  const open = openedSite();
  expect(firstTemplate(open)).toBeNull();
  const plain = addLibraryItem(open, 'bayTemplate');
  expect(firstTemplate(open)).toBe(plain);
  keepTemplate(open, bayOf(open), 'Plums', 'with goods');
  expect(firstTemplate(open)).toBe(template(open).id);
  addLibraryItem(open, 'bayTemplate');
  expect(firstTemplate(open)).toBe(template(open).id);
  open.undo();
  open.undo();
  expect(firstTemplate(open)).toBe(plain);
});

test('a template is told in words, and its goods by what they are and where they stand', () => {
  const open = openedSite();
  keepTemplate(open, bayOf(open), 'Plums', 'with goods');
  const { site, reading } = open;
  expect(planFacts(template(open), site, reading).map(plain)).toEqual([
    '2 700 mm clear',
    '3 levels at 1 500 mm, 3 000 mm and 4 500 mm',
    'rated by Notice 1',
    'frames of unknown type, 4 800 mm high',
    '2 unit loads',
  ]);
  const stand = { unitLoadId: 'crate', atMm: 75, mirrored: false, towardsFrontMm: 0 };
  const words = goodsWords(
    [stand, { ...stand, atMm: 950 }, { ...stand, atMm: 1825, mirrored: true }, { ...stand, atMm: 2700, towardsFrontMm: -40 }],
    site,
    reading,
  );
  expect(plain(words)).toBe(
    '2 × Crate at 75 mm and 950 mm · Crate at 1 825 mm, turned left for right · Crate at 2 700 mm, 40 mm towards the rear',
  );
  expect(goodsWords([], site, reading)).toBe('');
});

test('bays and runs say when they stand at an end, and change nothing', () => {
  const open = openedSite();
  const before = open.site;
  shiftBay(open, runOf(open), bayOf(open), -1);
  expect(open.said).toBe('No bay of run A stands further left.');
  shiftRun(open, runOf(open), 1);
  expect(open.said).toBe('Run A is the last of the site.');
  expect(open.site).toBe(before);
});
