/** Every paper says of a damaged and a bent beam what the audit says. */
import { expect, test } from 'vitest';
import { auditSite } from '../../../src-core/audit/audit';
import { baySheet, workedCalculation } from '../../../src-core/paper/bay-papers';
import type { PaperInput } from '../../../src-core/paper/context';
import { offLoadSheet } from '../../../src-core/paper/off-load-sheet';
import { siteRegister } from '../../../src-core/paper/site-register';
import { visitReport } from '../../../src-core/paper/visit-report';
import type { Site } from '../../../src-core/site/site';
import { actionsOf } from '../../../src-core/visit/actions';
import { finishInto } from '../../../src-core/visit/carry';
import { recordDamage, recordSag } from '../../../src-core/visit/edits';
import { newFollowUp } from '../../../src-core/visit/follow-up';
import { startVisit } from '../../../src-core/visit/visit';
import { siteOf } from '../visit/make-run';
import { rowsOf, wordsOf } from './words';

const DAY = '2026-06-02';
const BAY = 'A-bay-2';

let begun = startVisit({
  id: 'v1',
  siteId: 'site',
  name: 'Week 23',
  kind: 'weekly',
  person: 'R. W.',
  started: DAY,
  bays: [{ runId: 'run-A', bayId: BAY }],
});
begun = recordDamage(begun, BAY, {
  id: 'dent',
  on: 'beam',
  levelId: 'A2-level-1',
  beam: 'front',
  member: 'connector',
  torn: true,
  note: 'hook bent',
  found: DAY,
});
begun = recordSag(begun, BAY, { levelId: 'A2-level-2', beam: 'rear', loadedMm: 10, unloadedMm: 4, sidewaysMm: 0 });
const { site, visit } = finishInto(siteOf(), begun, {
  bayId: BAY,
  person: 'R. W.',
  date: DAY,
  followUp: newFollowUp('site'),
  newId: () => 'new',
});

const inputOf = (of: Site): PaperInput => ({
  site: of,
  audit: auditSite(of, DAY),
  checksum: '0123456789abcdef'.repeat(4),
  program: '0.1.0',
  today: DAY,
  person: 'S. Officer',
});
const input = inputOf(site);
const actions = actionsOf({ site, audit: input.audit, visits: [visit], followUp: newFollowUp('site'), today: DAY });

const DENT = 'A connector of the front beam of level 1 of bay A2 (hook bent) has a dent, buckle, tear, split or cracked weld';
// 4 mm of the 13.5 mm allowed (span/200) is 29.6 %, above 20 %: facts F-01 and F-88.
const SET = 'the rear beam of level 2 of bay A2 stays bent down by 4 mm, 29.6 % of the allowed sag; more than 20 % takes it out of use.';

test('the bay sheet: over, with both findings, and each action once', () => {
  const sheet = baySheet(input, BAY, actions);
  const words = wordsOf(sheet).join('\n');
  expect(words).toContain('Verdict: Over');
  expect(rowsOf(sheet, 'Beam levels of bay A2, from the top down').map((row) => row.split(' | ').at(-1))).toEqual(['Over', 'Over']);
  expect(rowsOf(sheet, 'Open actions, the most urgent first').map((row) => row.split(' | ')[1])).toEqual([
    'Unload at once',
    'Take out of use',
  ]);
  for (const part of [DENT, SET]) expect(words).toContain(part);
});

test('the worked calculation follows the set to its limit', () => {
  const words = wordsOf(workedCalculation(input, BAY, 'A2-level-2')).join('\n');
  expect(words).toContain('Measured sag');
  expect(words).toContain('Permanent set down, of the allowed sag');
  expect(words).toContain('EN 15635 §9.7; to be confirmed');
});

test('off-load list and visit report name both levels once, with the same words', () => {
  for (const paper of [offLoadSheet(input, actions), visitReport(input, visit, actions)]) {
    const words = wordsOf(paper).join('\n');
    for (const part of [DENT, SET]) expect(words.split(part).length, part).toBeGreaterThan(1);
    expect(rowsOf(paper, 'Locations to unload or not to reload').map((row) => row.split(' | ').slice(1, 4))).toEqual([
      ['A2', '1', 'Unload, and bar it'],
      ['A2', '2', 'Unload, and bar it'],
    ]);
  }
});

test('the register shows the bay over and red, decided by what was found, and its neighbours as before', () => {
  const register = siteRegister(input, [visit], newFollowUp('site'), actions);
  const rows = rowsOf(register, 'Bays of run A').map((row) => row.split(' | '));
  const unhurt = rowsOf(siteRegister(inputOf(siteOf()), [], newFollowUp('site'), []), 'Bays of run A').map((row) => row.split(' | '));
  expect([rows[1]?.[1], rows[1]?.[7], rows[1]?.[8]]).toEqual(['Over', 'Red', '2']);
  expect(['Damage', 'Measured sag']).toContain(rows[1]?.[2]);
  expect(rows[0]).toEqual(unhurt[0]);
});
