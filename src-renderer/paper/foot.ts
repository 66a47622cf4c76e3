/** The foot that stands on every page, as lines, and as the text of a CSS string. */
import type { Foot, Paper } from '../../src-core/paper/paper';
import { dateWords } from '../../src-core/units/dates';
import { parts } from './long-words';

/** Enough of the checksum to tell two sites apart at a glance; the whole of it stands in the paper. */
const CHECKSUM_DIGITS = 16;

/** Names may be as long as a line; in head and foot they leave room for the rest. */
const NAME_LETTERS = 90;
const HEAD_LETTERS = 120;

const short = (name: string, letters = NAME_LETTERS): string => (name.length > letters ? `${name.slice(0, letters - 1)}…` : name);

/** "made on 4 May 2026 by R. Walker". */
export const madeWords = ({ date, person }: Foot): string =>
  `made on ${dateWords(date)}${person.trim() === '' ? ', by whom is not stated' : ` by ${short(person)}`}`;

/** The line at the top of every page. */
export const headLine = ({ title, about }: Pick<Paper, 'title' | 'about'>): string => short(`${title}: ${about}`, HEAD_LETTERS);

/** @param keptAs which record the paper is kept in, null where it is in none */
export const footLines = (foot: Foot, keptAs: string | null = null): readonly string[] => [
  `${short(foot.site)} · site checksum ${foot.checksum.slice(0, CHECKSUM_DIGITS)} · Tallybeam ${foot.program} · ${madeWords(foot)}${keptAs === null ? '' : ` · ${keptAs}`}`,
  `Rule set: ${foot.ruleSet} · Beam span: ${foot.span}`,
  `Ratings: ${foot.ratings}`,
  `Not checked: ${foot.notChecked}`,
  `${foot.cautions.join(' ')} A change to the rack makes this paper void.`,
];

/** A space of no width, at which a line may break: in the margin of a page no other rule breaks a word. */
const BREAK = '\u200b';

/** Lines as one CSS string, for `content` in the margin of a page. */
export const cssText = (lines: readonly string[]): string => `"${lines.map((line) => escaped(parts(line).join(BREAK))).join('\\a ')}"`;

const escaped = (line: string): string => line.replace(/[\r\n\f\0]+/g, ' ').replace(/["\\]/g, (sign) => `\\${sign}`);
