/** The lines that stand on every page of a paper, and where long words may break. */
import { expect, test } from 'vitest';
import type { Foot } from '../../src-core/paper/paper';
import { cssText, footLines, headLine } from '../../src-renderer/paper/foot';
import { parts } from '../../src-renderer/paper/long-words';
import { usualSheet } from '../../src-renderer/paper/sheets';

const FOOT: Foot = {
  site: 'Test depot',
  checksum: '0123456789abcdef'.repeat(4),
  program: '0.1.0',
  date: '2026-05-04',
  person: 'R. Walker',
  ruleSet: 'European',
  span: 'clear entry between uprights',
  ratings: 'load notice LN-1 (read from the load notice)',
  notChecked: 'No check is left out.',
  cautions: ['When in doubt, unload first.'],
};

test('the foot says of what, by which program, when, by whom, and that a change makes it void', () => {
  const lines = footLines(FOOT);
  expect(lines[0]).toBe('Test depot · site checksum 0123456789abcdef · Tallybeam 0.1.0 · made on 4 May 2026 by R. Walker');
  expect(lines.at(-1)).toBe('When in doubt, unload first. A change to the rack makes this paper void.');
  expect(footLines({ ...FOOT, person: ' ' })[0]).toContain('made on 4 May 2026, by whom is not stated');
  expect(footLines(FOOT, 'record 3, hash 0f3c')[0]).toMatch(/ · record 3, hash 0f3c$/);
});

test('names of any length leave room for the rest of head and foot', () => {
  const name = 'W'.repeat(200);
  const [first = ''] = footLines({ ...FOOT, site: name, person: name });
  expect(first.length).toBeLessThan(320);
  expect(first).toContain('site checksum 0123456789abcdef');
  expect(headLine({ title: 'Bay sheet', about: name }).length).toBe(120);
});

test('a word of more than 18 letters may go on in the next line, every other word stays whole', () => {
  expect(parts('Level 2, 30\u00a0November\u00a02026, beam-end-connectors')).toEqual([
    'Level 2, 30\u00a0November\u00a02026, beam-end-connectors',
  ]);
  expect(parts('a Donaudampfschifffahrt b')).toEqual(['a ', 'Donaudam', 'pfschiff', 'fahrt', ' b']);
  // Letters outside the basic plane are not torn in two.
  expect(parts('😀'.repeat(20))).toEqual(['😀'.repeat(8), '😀'.repeat(8), '😀'.repeat(4)]);
  expect(parts('')).toEqual([]);
});

test('quotes, backslashes and line ends do not leave the CSS string', () => {
  expect(cssText(['a "b" \\ c', 'd\ne'])).toBe('"a \\"b\\" \\\\ c\\a d e"');
});

test('pounds are printed on Letter', () => {
  expect([usualSheet('metric'), usualSheet('us')]).toEqual(['a4', 'letter']);
});
