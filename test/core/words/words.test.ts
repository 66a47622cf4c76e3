import { expect, test } from 'vitest';
import { CHECKS, VERDICTS } from '../../../src-core/checks/finding';
import { CAUTIONS, FOOTER_CAUTIONS } from '../../../src-core/words/cautions';
import { CHECK_WORDS } from '../../../src-core/words/check-names';
import { VERDICT_WORDS } from '../../../src-core/words/verdict-words';

test('every check has its own name and one question', () => {
  expect(Object.keys(CHECK_WORDS).sort()).toEqual([...CHECKS].sort());
  const words = Object.values(CHECK_WORDS);
  expect(new Set(words.map(({ name }) => name)).size).toBe(words.length);
  for (const { name, asks } of words) {
    expect(name).toMatch(/^[A-Z][a-z ]+$/);
    expect(asks).toMatch(/^[A-Z].*\?$/);
  }
});

test('the five verdicts have five words, and "not assessable" says that it is no pass', () => {
  expect(VERDICTS.map((verdict) => VERDICT_WORDS[verdict].word)).toEqual(['Within', 'Close', 'Over', 'Not assessable', 'Not possible']);
  expect(VERDICT_WORDS['not-assessable'].means).toContain('not a pass');
});

test('all eighteen cautions of the domain facts sheet are there, each a full sentence', () => {
  expect(CAUTIONS).toHaveLength(18);
  for (const { says } of CAUTIONS) expect(says).toMatch(/^[A-Z].*\.$/);
  for (const subject of [
    /maker/,
    /not assessable/,
    /[Ll]aw/,
    /competent person/,
    /beam/,
    /plumb/,
    /earthquake|Earthquake/,
    /rims/,
    /[Uu]nload first/,
  ])
    expect(CAUTIONS.some(({ says }) => subject.test(says))).toBe(true);
});

test('the short cautions say what decides, what is not covered and to unload first', () => {
  const text = FOOTER_CAUTIONS.join(' ');
  for (const part of [
    'rates nothing',
    'maker',
    'competent person',
    'earthquake',
    'wind',
    'impact',
    'fatigue',
    'anchors',
    'slab',
    'unload first',
  ])
    expect(text).toContain(part);
});
