/** A paper's words, as a reader of its text would find them. */
import type { Block, Cell, Paper } from '../../../src-core/paper/paper';
import { formatQuantity, formatText, type Reading } from '../../../src-core/units/format';
import { VERDICT_WORDS } from '../../../src-core/words/verdict-words';
import { DAMAGE_CLASS_WORDS } from '../../../src-core/words/visit-words';

export const METRIC: Reading = { units: 'metric', locale: 'en-GB' };
export const US: Reading = { units: 'us', locale: 'en-US' };

/** Spaces of every width are one space. */
const plainSpaces = (text: string) => text.replace(/[\u00a0\u2009\u202f]/g, ' ');

export function cellWords(cell: Cell, reading: Reading): string {
  if ('verdict' in cell) return VERDICT_WORDS[cell.verdict].word;
  if ('damage' in cell) return DAMAGE_CLASS_WORDS[cell.damage].word;
  return plainSpaces(formatText(cell, reading));
}

export function blockWords(block: Block, reading: Reading): string[] {
  switch (block.kind) {
    case 'heading':
      return [block.text];
    case 'paragraph':
      return [plainSpaces(formatText(block.text, reading))];
    case 'list':
      return block.items.map((item) => plainSpaces(formatText(item, reading)));
    case 'facts':
      return block.facts.map(({ label, value }) => `${label}: ${cellWords(value, reading)}`);
    case 'table':
      return [
        block.caption,
        block.columns.map(({ title }) => title).join(' | '),
        ...block.rows.map((row) => row.map((cell) => cellWords(cell, reading)).join(' | ')),
      ];
    case 'drawing':
      return [block.says];
    case 'photos':
      return block.photos.map(({ file, says }) => `${file}: ${plainSpaces(says)}`);
    case 'worked':
      return block.steps.flatMap((step) => [
        `${step.what}: ${step.formula} = ${plainSpaces(formatQuantity(step.result.quantity, reading))}`,
        ...step.values.map((value) => `${value.symbol} = ${plainSpaces(formatQuantity(value.quantity, reading))} (${value.from})`),
      ]);
    case 'sign-off':
      return block.lines.map(({ role, signed }) => `${role}: ${signed?.person ?? ''}`);
    case 'cautions':
    case 'new-page':
      return [];
  }
}

export const wordsOf = (paper: Paper, reading: Reading = METRIC): string[] => paper.blocks.flatMap((block) => blockWords(block, reading));

/** Rows of the table with this caption. */
export function rowsOf(paper: Paper, caption: string, reading: Reading = METRIC): string[] {
  const found = paper.blocks.find((block) => block.kind === 'table' && block.caption === caption);
  if (found?.kind !== 'table') throw new Error(`no table "${caption}"; there is ${tables(paper)}`);
  return found.rows.map((row) => row.map((cell) => cellWords(cell, reading)).join(' | '));
}

const tables = (paper: Paper) => paper.blocks.flatMap((block) => (block.kind === 'table' ? [block.caption] : [])).join('; ');
