/**
 * A document before it is drawn: plain data, in no unit system yet. The page lays it out; a record keeps
 * it as it is.
 */
import type { DamageClass } from '../checks/damage-class';
import type { Verdict, WorkedStep } from '../checks/finding';
import type { Id } from '../site/site';
import { dateWords } from '../units/dates';
import { lengthOf, massOf } from '../units/quantity';
import type { Text } from '../units/text';
import type { SignOff } from '../visit/visit';

export const PAPER_KINDS = [
  'bay-sheet',
  'worked-calculation',
  'visit-report',
  'off-load-list',
  'change-sheet',
  'site-register',
  'draft-notice',
] as const;
export type PaperKind = (typeof PAPER_KINDS)[number];

export interface Paper {
  readonly kind: PaperKind;
  readonly title: string;
  /** What it is about: "Bay A4, run A". */
  readonly about: string;
  readonly blocks: readonly Block[];
  readonly foot: Foot;
  /** Wide tables stand better on a page turned on its side. */
  readonly wide: boolean;
}

/** Stands on every page, beside "page x of y". */
export interface Foot {
  readonly site: string;
  /** SHA-256 of the site as it stood, hexadecimal. */
  readonly checksum: string;
  /** Version of the program. */
  readonly program: string;
  /** ISO day on which the paper was made, and by whom; the name may be empty. */
  readonly date: string;
  readonly person: string;
  readonly ruleSet: string;
  readonly span: string;
  /** Where the ratings come from that the paper rests on; shortened where there are many. */
  readonly ratings: string;
  readonly notChecked: string;
  readonly cautions: readonly string[];
}

/** A cell of a table: a sentence or figure, or a mark of its own. */
export type Cell = Text | { readonly verdict: Verdict } | { readonly damage: DamageClass };

export interface Column {
  readonly title: string;
  /** Figures stand to the right, under each other. */
  readonly figures: boolean;
}

export interface Fact {
  readonly label: string;
  readonly value: Cell;
}

export type Block =
  /** Depth 2 opens a part of the paper, 3 a piece of that part. */
  | { readonly kind: 'heading'; readonly depth: 2 | 3; readonly text: string }
  | { readonly kind: 'paragraph'; readonly text: Text; readonly small: boolean }
  | { readonly kind: 'list'; readonly items: readonly Text[] }
  | { readonly kind: 'facts'; readonly facts: readonly Fact[] }
  /** The first cell of a row is its head. */
  | { readonly kind: 'table'; readonly caption: string; readonly columns: readonly Column[]; readonly rows: readonly (readonly Cell[])[] }
  /** Drawn by the page from the site; `says` tells in words what it shows. */
  | {
      readonly kind: 'drawing';
      readonly drawing: 'bay' | 'run' | 'level';
      readonly runId: Id;
      readonly bayId: Id | null;
      readonly levelId: Id | null;
      readonly says: string;
    }
  /** Files kept with the site. */
  | { readonly kind: 'photos'; readonly photos: readonly { readonly file: string; readonly says: string }[] }
  | { readonly kind: 'worked'; readonly steps: readonly WorkedStep[] }
  | { readonly kind: 'cautions' }
  /** Room to sign, or the signature that was given. */
  | { readonly kind: 'sign-off'; readonly lines: readonly { readonly role: string; readonly signed: SignOff | null }[] }
  | { readonly kind: 'new-page' };

export const heading = (text: string): Block => ({ kind: 'heading', depth: 2, text });
export const subheading = (text: string): Block => ({ kind: 'heading', depth: 3, text });
export const paragraph = (text: Text): Block => ({ kind: 'paragraph', text, small: false });
export const remark = (text: Text): Block => ({ kind: 'paragraph', text, small: true });
export const facts = (all: readonly Fact[]): Block => ({ kind: 'facts', facts: all });
export const fact = (label: string, value: Cell): Fact => ({ label, value });

/** A list, or nothing where there is nothing to list. */
export const list = (items: readonly Text[]): readonly Block[] => (items.length === 0 ? [] : [{ kind: 'list', items }]);

/**
 * @param columns titles; one that starts with "#" heads a column of figures
 */
export function table(caption: string, columns: readonly string[], rows: readonly (readonly Cell[])[]): Block {
  const uneven = rows.find((row) => row.length !== columns.length);
  if (uneven !== undefined) throw new RangeError(`table "${caption}" has ${columns.length} columns, got a row of ${uneven.length}`);
  return {
    kind: 'table',
    caption,
    columns: columns.map((title) => ({ title: title.replace(/^#/, ''), figures: title.startsWith('#') })),
    rows,
  };
}

/** A cell that says that nothing is there. */
export const NONE: Text = ['–'];

/** Words that stay on one line. */
export const unbroken = (words: string): string => words.replaceAll(' ', '\u00a0');

const NOT_KNOWN: Text = [unbroken('not known')];

/** A mass or length in a cell; what is not known says so. */
export const kgCell = (kg: number | null | undefined): Text => (kg === null || kg === undefined ? NOT_KNOWN : [massOf(kg)]);
export const mmCell = (mm: number | null | undefined): Text => (mm === null || mm === undefined ? NOT_KNOWN : [lengthOf(mm)]);

/** "4 May 2026", or that the day is not known. */
export const dayCell = (date: string): Text => (date === '' ? NOT_KNOWN : [unbroken(dateWords(date))]);
