/** The foot that stands on every page, as lines, and as the text of a CSS string. */
import type { Foot } from '../../src-core/paper/paper';
import { dateWords } from '../../src-core/units/dates';

/** Enough of the checksum to tell two sites apart at a glance; the whole of it stands in the paper. */
const CHECKSUM_DIGITS = 16;

export const footLines = (foot: Foot): readonly string[] => [
  `${foot.site} · site checksum ${foot.checksum.slice(0, CHECKSUM_DIGITS)} · Tallybeam ${foot.program} · ${dateWords(foot.date)}`,
  `Rule set: ${foot.ruleSet} · Beam span: ${foot.span}`,
  `Ratings: ${foot.ratings}`,
  `Not checked: ${foot.notChecked}`,
  foot.cautions.join(' '),
];

/** Lines as one CSS string, for `content` in the margin of a page. */
export const cssText = (lines: readonly string[]): string =>
  `"${lines.map((line) => line.replace(/[\r\n\f\0]+/g, ' ').replace(/["\\]/g, (sign) => `\\${sign}`)).join('\\a ')}"`;
