import { expect, test } from 'vitest';
import { auditSite } from '../../../src-core/audit/audit';
import { baySheet, workedCalculation } from '../../../src-core/paper/bay-papers';
import type { PaperInput } from '../../../src-core/paper/context';
import { changeSheet } from '../../../src-core/paper/change-sheet';
import { draftNotice, noticeItems } from '../../../src-core/paper/notice-draft';
import { offLoadSheet } from '../../../src-core/paper/off-load-sheet';
import { table, type Paper } from '../../../src-core/paper/paper';
import { siteRegister } from '../../../src-core/paper/site-register';
import { visitReport } from '../../../src-core/paper/visit-report';
import { addEntry, changeRule, editEntry, editFrame, editLevel, editRun, leaveOut, moveLevel } from '../../../src-core/site/edits';
import type { Floor, Site } from '../../../src-core/site/site';
import { actionsOf } from '../../../src-core/visit/actions';
import { carryIntoSite } from '../../../src-core/visit/carry';
import { attachPhoto, finishBay, note, sign } from '../../../src-core/visit/edits';
import { closeAction, newFollowUp, recordReduction, setResponsible } from '../../../src-core/visit/follow-up';
import { startVisit, type Visit } from '../../../src-core/visit/visit';
import { SOURCE } from '../audit/rack';
import { siteOf } from '../visit/make-run';
import { s10Site, s10Visit, S10_DAY } from '../visit/make-s10';
import { rowsOf, US, wordsOf } from './words';

const inputOf = (site: Site, today = S10_DAY): PaperInput => ({
  site,
  audit: auditSite(site, today),
  checksum: '0123456789abcdef'.repeat(4),
  program: '0.1.0',
  today,
  person: 'S. Officer',
});

const actionsFor = ({ site, audit, today }: PaperInput, visits: readonly Visit[], followUp = newFollowUp('site')) =>
  actionsOf({ site, audit, visits, followUp, today });

const s10 = inputOf(carryIntoSite(s10Site(), s10Visit(), 'A-bay-2'));
const s10Report = visitReport(s10, s10Visit(), actionsFor(s10, [s10Visit()]));

// Figures of scenario S10, printed to three significant figures without losing whole digits.
test('the report of S10 has every figure of the bay', () => {
  expect(rowsOf(s10Report, 'Bow measured over the gauge length, each direction against its own limit')).toEqual([
    'A2 | Front upright, frame A-F2 | 8 mm | 4 mm | 1 000 mm | 1.6 along, 1.33 across | Amber | 2 June 2026 | 30 June 2026',
    'A2 | Bracing, frame A-F2 | 12 mm | 0 mm | 1 000 mm | 1.2 along, 0 across | Amber | 2 June 2026 | 30 June 2026',
  ]);
  expect(rowsOf(s10Report, 'Measured at mid-span from a line through the beam’s ends')).toEqual([
    'A2 | Level 1, front | 17 mm | 4 mm | not read | 13.5 mm | 29.6 % | Over',
  ]);
  const words = wordsOf(s10Report).join('\n');
  for (const figure of ['195 kN·m²', '12.4 mm', '1 946 kg', '1.05 times', '1 860 kg', 'No load notice is fixed to bay A2'])
    expect(words).toContain(figure);
});

test('the report of S10 says what to do, and empties both bays at the frame', () => {
  expect(rowsOf(s10Report, 'Open actions, the most urgent first').map((row) => row.split(' | ').slice(0, 3).join(' | '))).toEqual([
    '1 | Unload at once | Red',
    '2 | Take out of use | –',
    '3 | Replace lock at once | –',
    '4 | Do not reload | Amber',
    '5 | Do not reload | Amber',
    '6 | Load notice | –',
  ]);
  expect(rowsOf(s10Report, 'Locations to unload or not to reload')).toEqual([
    'A | A1 | 1 | Unload, and bar it | 3 × Tiles | 1 860 kg | 1, 4, 5 | ',
    'A | A2 | 1 | Unload, and bar it | 3 × Tiles | 1 860 kg | 1, 2, 3, 4, 5 | ',
  ]);
});

test('the report shows who signed, notes, photos and what is not finished', () => {
  const bays = [1, 2].map((n) => ({ runId: 'run-A', bayId: `A-bay-${n}` }));
  let visit = startVisit({ id: 'v', siteId: 'site', name: 'Week 23', kind: 'weekly', person: 'R. W.', started: S10_DAY, bays });
  visit = attachPhoto(note(visit, 'A-bay-1', 'Aisle blocked.'), 'A-bay-1', {
    id: 'p',
    file: 'p.jpg',
    original: 'IMG 7.JPG',
    taken: '2026-06-02T09:00:00',
    note: 'front left',
  });
  visit = finishBay(visit, 'A-bay-1', { person: 'R. W.', date: S10_DAY });
  const input = inputOf(siteOf());
  const open = wordsOf(visitReport(input, visit, [])).join('\n');
  expect(open).toContain('1 bay will still be looked at');
  expect(open).toContain('Signed: not yet');
  expect(open).toContain('Bay A1: Aisle blocked.');
  expect(open).toContain('p.jpg: Bay A1: front left (IMG 7.JPG, 2 June 2026)');
  const signed = sign(finishBay(visit, 'A-bay-2', { person: 'R. W.', date: S10_DAY }), {
    person: 'R. W.',
    role: 'shift lead',
    date: S10_DAY,
  });
  const words = wordsOf(visitReport(input, signed, []));
  expect(words).toContain('Signed: R. W., 2 June 2026');
  expect(words).toContain('Visited by, shift lead: R. W.');
});

test('a bay sheet shows verdict, levels, goods, frames and what is missing', () => {
  const sheet = baySheet(s10, 'A-bay-2', []);
  // A set of 4 mm is 29.6 % of the 13.5 mm allowed (span/200), and 20 % takes a beam out of use: 0.296 / 0.2 = 1.48.
  expect(rowsOf(sheet, 'Beam levels of bay A2, from the top down')).toEqual([
    'Level 1 | 1 500 mm | Box 120 × 50 × 1.5 | missing | 1 860 kg | not known | 1.48 | Over',
  ]);
  expect(rowsOf(sheet, 'Goods, from the left upright’s face')).toHaveLength(3);
  expect(rowsOf(sheet, 'To be found out').join('\n')).toContain('load notice of bay A2');
  expect(rowsOf(sheet, 'What is not simply within').join('\n')).toContain('Level 1, Tiles (2nd from the left) | Unit load');
  expect(wordsOf(sheet).filter((line) => line.startsWith('Upright frame A-F2'))).toEqual(['Upright frame A-F2, between bays A1 and A2']);
  expect(() => baySheet(s10, 'nowhere', [])).toThrow('nowhere');
});

test('a bay sheet says first what is open at the bay, whatever its verdict', () => {
  const actions = actionsFor(s10, [s10Visit()]);
  expect(rowsOf(baySheet(s10, 'A-bay-2', actions), 'Open actions, the most urgent first')).toHaveLength(6);
  // Of the neighbour only what is about the frame between them.
  expect(rowsOf(baySheet(s10, 'A-bay-1', actions), 'Open actions, the most urgent first')).toHaveLength(3);
  expect(wordsOf(baySheet(s10, 'A-bay-3', actions))).not.toContain('What to do');
});

test('the same sheet reads in pounds and inches', () => {
  // 1 500 mm = 59.06 in and 1 860 kg = 4 100.6 lb, by the exact factors 25.4 mm and 0.45359237 kg.
  expect(rowsOf(baySheet(s10, 'A-bay-2', []), 'Beam levels of bay A2, from the top down', US)).toEqual([
    'Level 1 | 59.1 in | Box 120 × 50 × 1.5 | missing | 4,101 lb | not known | 1.48 | Over',
  ]);
});

test('a worked calculation holds every step of every check, of the bay or of one level', () => {
  const input = inputOf(siteOf());
  const all = workedCalculation(input, 'A-bay-2');
  const one = workedCalculation(input, 'A-bay-2', 'A2-level-1');
  const steps = (paper: Paper) => paper.blocks.flatMap((block) => (block.kind === 'worked' ? block.steps : []));
  const bay = input.audit.runs[0]?.bays[1];
  const inLevels = bay?.levels.flatMap(({ findings }) => findings.flatMap(({ worked }) => worked)) ?? [];
  expect(steps(all).length).toBeGreaterThanOrEqual(inLevels.length);
  for (const step of inLevels) expect(steps(all)).toContainEqual(step);
  expect(steps(one)).toEqual(bay?.levels[0]?.findings.flatMap(({ worked }) => worked));
  expect(one.about).toBe('Level 1 of bay A2, run A'.replace('A2, run A', 'a2, run a'));
  expect(() => workedCalculation(input, 'A-bay-2', 'nowhere')).toThrow('nowhere');
});

test('the off-load list numbers its actions and says what an engineer allows', () => {
  let book = recordReduction(newFollowUp('site'), {
    id: 'r',
    frameId: 'A-frame-2',
    says: '400 kg a pair',
    engineer: 'E. Ngineer',
    until: '2026-06-20',
    recordedBy: '',
    recordedOn: S10_DAY,
  });
  const notice = actionsFor(s10, [s10Visit()]).find(({ kind }) => kind === 'notice');
  book = closeAction(book, { actionId: notice?.id ?? '', date: S10_DAY, person: 'F. Fitter', how: 'Notice put up' });
  const sheet = offLoadSheet(s10, actionsFor(s10, [s10Visit()], book));
  expect(wordsOf(sheet)).toContain('To unload at once: 2 levels');
  // Whoever empties the rack reads first where.
  expect(sheet.blocks.find(({ kind }) => kind === 'table')).toMatchObject({ caption: 'Locations to unload or not to reload' });
  expect(rowsOf(sheet, 'Open actions, the most urgent first')[0]).toContain(
    'Reduced load by E. Ngineer, until 20 June 2026: 400 kg a pair',
  );
  expect(rowsOf(sheet, 'Done')).toEqual([expect.stringContaining('F. Fitter | 2 June 2026 | Notice put up')]);
});

test('the register has a row for each of 200 bays, with rating source, damage and due days', () => {
  const site = editFrame(siteOf({ bays: 200 }), 'A-frame-1', {
    damages: [{ id: 'd', member: 'bracing', alongMm: 12, acrossMm: 0, gaugeMm: 1000, torn: false, note: '', found: S10_DAY }],
  });
  const visit = finishBay(
    startVisit({
      id: 'v',
      siteId: 'site',
      name: 'w',
      kind: 'weekly',
      person: '',
      started: S10_DAY,
      bays: [{ runId: 'run-A', bayId: 'A-bay-2' }],
    }),
    'A-bay-2',
    { person: 'R. W.', date: S10_DAY },
  );
  const rows = rowsOf(siteRegister(inputOf(site), [visit], newFollowUp('site'), actionsFor(inputOf(site), [visit])), 'Bays of run A');
  expect(rows).toHaveLength(200);
  expect(rows[0]).toContain('| Amber | 1 | never | due | never');
  expect(rows[1]).toContain('LN-1 (read from the load notice, 3 May 2024, A. Reader)');
  expect(rows[1]).toContain('| – | 0 | 2 June 2026 | 9 June 2026 | never');
});

test('a draft notice repeats what was entered, and lists what is missing and how to get it', () => {
  const site = editEntry(siteOf(), 'notices', 'notice', { maker: 'Steelworks', levelKg: [2500, 2000], bayKg: null });
  const stated = new Map(noticeItems(site, 'A-bay-1', '').map(({ item, says }) => [item, says]));
  expect(stated.get('Greatest load of the bay')).toBeNull();
  expect(stated.get('Report damage to')).toBeNull();
  const paper = draftNotice(inputOf(site), 'A-bay-1', '');
  const words = wordsOf(paper);
  expect(words).toContain('Greatest load of a level, evenly spread on the pair of beams | level 1: 2 500 kg; level 2: 2 000 kg');
  expect(words).toContain('Missing: 2 of 13');
  expect(words.join('\n')).toContain('rates nothing');
  expect(wordsOf(draftNotice(inputOf(siteOf()), 'A-bay-1', 'P. Responsible')).join('\n')).toContain('Missing: 1 of 13');
});

test('a suspended floor’s limit belongs on the notice', () => {
  const floor: Floor = {
    id: 'floor',
    name: 'Mezzanine',
    kind: 'suspended',
    legN: null,
    pressureNPerMm2: null,
    legPairN: null,
    areaNPerMm2: null,
    thicknessMm: null,
    source: SOURCE,
  };
  const site = editRun(addEntry(siteOf(), 'floors', floor), 'run-A', { floorId: 'floor' });
  expect(noticeItems(site, 'A-bay-1', 'x').find(({ item }) => item === 'Floor limit')).toMatchObject({ says: null });
  expect(noticeItems(siteOf(), 'A-bay-1', 'x').some(({ item }) => item === 'Floor limit')).toBe(false);
});

test('every paper carries site, checksum, program, rule set, span, rating sources, what is not checked, and cautions', () => {
  let site = changeRule(s10.site, 'closeAbove', 0.8, 'house rule');
  site = leaveOut(site, 'heavy-low', 'pickers’ reach');
  const input = inputOf(site);
  const visit = s10Visit();
  const actions = actionsFor(input, [visit]);
  const papers = [
    baySheet(input, 'A-bay-1', []),
    workedCalculation(input, 'A-bay-1'),
    visitReport(input, visit, actions),
    offLoadSheet(input, actions),
    siteRegister(input, [visit], newFollowUp('site'), actions),
    draftNotice(input, 'A-bay-1', ''),
    changeSheet(input, siteOf({ bays: 3, levels: 1 }), 'A-bay-1'),
  ];
  for (const paper of papers) {
    expect(paper.foot, paper.kind).toMatchObject({
      site: 'Test depot',
      checksum: input.checksum,
      program: '0.1.0',
      ruleSet: 'European, 1 value changed by this site',
      span: 'clear entry between uprights',
      notChecked: 'Heavy goods low',
    });
    expect(paper.foot.ratings, paper.kind).toContain('frame type F 100 (declared)');
    expect(paper.foot.cautions.length).toBeGreaterThan(0);
    expect(
      paper.blocks.filter(({ kind }) => kind === 'cautions'),
      paper.kind,
    ).toHaveLength(1);
    expect(paper.blocks.at(-1)?.kind, paper.kind).toBe('sign-off');
    expect(wordsOf(paper), paper.kind).toContain('“Close” begins: above 0.8 used');
    expect(rowsOf(paper, 'Checks left out by this site')).toEqual(['Heavy goods low | pickers’ reach']);
    expect(rowsOf(paper, 'Rules changed by this site')).toEqual([expect.stringContaining('house rule')]);
    // Plain data: a record keeps it as it is.
    expect(JSON.parse(JSON.stringify(paper))).toEqual(paper);
  }
});

test('a change sheet sets before and after side by side, with what has to be done', () => {
  const before = siteOf();
  const sheet = changeSheet(inputOf(moveLevel(before, 'A2-level-1', 1900)), before, 'A-bay-2');
  expect(rowsOf(sheet, 'As it stands, from the top down')).toEqual([
    'Level 2 | 3 000 mm | B 120 | 1 860 kg',
    'Level 1 | 1 500 mm | B 120 | 1 860 kg',
  ]);
  expect(rowsOf(sheet, 'As planned, from the top down')[1]).toBe('Level 1 | 1 900 mm | B 120 | 1 860 kg');
  const figures = rowsOf(sheet, 'Figures that change');
  expect(figures).toContain('Bay | first beam height | 1 500 mm | 1 900 mm');
  expect(figures).toContain('Level 1 | height of level 1 | 1 500 mm | 1 900 mm');
  const words = wordsOf(sheet).join('\n');
  expect(words).toContain('Have the maker or supplier confirm the change in writing');
  expect(words).toContain('Empty every level of bay A2');
  expect(wordsOf(changeSheet(inputOf(before), before, 'A-bay-2'))).toContain('Nothing differs.');
});

test('many ratings are counted in the foot and listed in the paper', () => {
  let site = siteOf({ bays: 12 });
  for (let n = 1; n <= 12; n++) {
    const notice = { ...(site.notices[0] ?? expect.fail()), id: `n${n}`, name: `LN-${n}` };
    site = addEntry(site, 'notices', notice);
    site = {
      ...site,
      runs: site.runs.map((run) => ({ ...run, bays: run.bays.map((bay, i) => (i === n - 1 ? { ...bay, noticeId: `n${n}` } : bay)) })),
    };
  }
  const paper = siteRegister(inputOf(site), [], setResponsible(newFollowUp('site'), 'P. Responsible'), []);
  expect(paper.foot.ratings.length).toBeLessThanOrEqual(260);
  expect(paper.foot.ratings).toMatch(/ and \d+ more, listed in this paper$/);
  expect(rowsOf(paper, 'Where the ratings come from')).toHaveLength(14);
});

test('a rating whose source is longer than the foot is cut there, and stands whole in the paper', () => {
  const detail = 'letter of the maker with its annexes, '.repeat(20).trim();
  const site = editEntry(siteOf(), 'frameTypes', 'frame', { source: { kind: 'maker', detail, person: '', date: '' } });
  const sheet = baySheet(inputOf(site), 'A-bay-2', []);
  expect(sheet.foot.ratings.length).toBeLessThanOrEqual(260 + 150);
  expect(sheet.foot.ratings).toContain('…');
  expect(rowsOf(sheet, 'Where the ratings come from').join('\n')).toContain(detail);
});

test('a worked calculation tells what was compared without one in a table, and draws no level on which nothing stands', () => {
  const site = siteOf();
  const first = site.runs[0]?.bays[1]?.levels[0]?.id ?? '';
  const input = inputOf(editLevel(site, first, { placements: [] }));
  const paper = workedCalculation(input, 'A-bay-2', first);
  expect(paper.blocks.some(({ kind }) => kind === 'drawing')).toBe(false);
  const level = input.audit.runs[0]?.bays[1]?.levels[0];
  const compared = level?.findings.filter(({ worked }) => worked.length === 0) ?? [];
  expect(compared.length).toBeGreaterThan(0);
  expect(rowsOf(paper, 'Compared without a calculation')).toHaveLength(compared.length);
});

test('a row that does not fit its table is the author’s mistake', () => {
  expect(() => table('T', ['a', 'b'], [[['only one']]])).toThrow('2 columns, got a row of 1');
});
