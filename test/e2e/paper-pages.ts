/**
 * What a reader would find wrong with a paper's pages: text off the sheet, over the foot or over other
 * text; heads and rows that stand alone; tables that go on without their head; pages with next to nothing.
 */
import type { Page } from 'playwright-core';
import { pdfImages, pdfPages, pdfSheets, squeezed, type PdfSheet, type PdfWord } from './poppler';

const MM = 72 / 25.4;
/** As the page rules of the paper have them. */
const MARGIN = { top: 16 * MM, side: 14 * MM, bottom: 38 * MM };
/** A printer's own margin: nothing may stand in it. */
const UNPRINTABLE = 4 * MM;
/** Boxes of words reach a little past their ink. */
const SLACK = 1.5;
/** A page that follows others holds at least so many lines, or it is waste. */
const FEWEST_LINES = 4;

/** Everything that is wrong with the pages of a paper that stands on the page and was printed to a PDF. */
export async function pageFaults(page: Page, path: string): Promise<string[]> {
  const pictured = new Set(pdfImages(path).map((image) => image.page));
  return [...sheetFaults(pdfSheets(path), pictured), ...breakFaults(await partsOf(page), pdfPages(path))].slice(0, 10);
}

const isFoot = (word: PdfWord, sheet: PdfSheet): boolean => (word.top + word.bottom) / 2 > sheet.height - MARGIN.bottom;
const isHead = (word: PdfWord): boolean => (word.top + word.bottom) / 2 < MARGIN.top;

/** @param pictured pages with photos, 1 for the first: they may hold little text */
function sheetFaults(sheets: readonly PdfSheet[], pictured: ReadonlySet<number> = new Set()): string[] {
  return sheets.flatMap((sheet, i) => {
    const body = sheet.words.filter((word) => !isFoot(word, sheet) && !isHead(word));
    const faults = [...offSheet(sheet), ...overOneAnother(sheet.words)];
    if (sheets.length > 1 && !pictured.has(i + 1) && linesOf(body) < FEWEST_LINES) faults.push(`only ${linesOf(body)} lines`);
    return faults.map((fault) => `page ${i + 1}: ${fault}`);
  });
}

function offSheet(sheet: PdfSheet): string[] {
  const { width, height, words } = sheet;
  return words.flatMap((word) => {
    const foot = isFoot(word, sheet);
    const out =
      word.left < MARGIN.side - SLACK ||
      word.right > width - MARGIN.side + SLACK ||
      word.top < UNPRINTABLE ||
      word.bottom > (foot ? height - UNPRINTABLE : height - MARGIN.bottom + 2 * SLACK);
    return out ? [`"${word.text}" reaches past its margin, at ${place(word)}`] : [];
  });
}

/** A font's box is taller than its letters: so much of it above and below is free, or holds but an accent. */
const FREE = 0.22;
const inked = (word: PdfWord): PdfWord => {
  const free = (word.bottom - word.top) * FREE;
  return { ...word, top: word.top + free, bottom: word.bottom - free };
};

/** Pairs of words of which one covers a quarter of the other or more. */
function overOneAnother(words: readonly PdfWord[]): string[] {
  const faults: string[] = [];
  const sorted = words.map(inked).toSorted((a, b) => a.top - b.top);
  sorted.forEach((one, i) => {
    for (let j = i + 1; j < sorted.length; j++) {
      const other = sorted[j];
      if (other === undefined || other.top > one.bottom) break;
      const across = Math.min(one.right, other.right) - Math.max(one.left, other.left);
      const down = Math.min(one.bottom, other.bottom) - other.top;
      const smaller = Math.min(area(one), area(other));
      if (across > 0 && down > 0 && smaller > 0 && (across * down) / smaller > 1 / 4)
        faults.push(`"${one.text}" and "${other.text}" stand over one another, at ${place(one)}`);
    }
  });
  return faults;
}

const area = ({ left, right, top, bottom }: PdfWord): number => (right - left) * (bottom - top);
const place = ({ left, top }: PdfWord): string => `${Math.round(left)}, ${Math.round(top)} pt`;

function linesOf(words: readonly PdfWord[]): number {
  let lines = 0;
  let bottom = -Infinity;
  for (const word of words.toSorted((a, b) => a.top - b.top))
    if (word.top > bottom - 2 * SLACK) {
      lines += 1;
      bottom = word.bottom;
    }
  return lines;
}

/** What a paper is made of, in its order: headings, and tables with their head and rows. */
type Part =
  | { readonly kind: 'heading'; readonly text: string }
  | { readonly kind: 'table'; readonly caption: string; readonly head: string; readonly rows: readonly string[] };

/** Read off the page on which the paper is laid out; texts without their spaces. */
async function partsOf(page: Page): Promise<readonly Part[]> {
  const parts = await page.evaluate(() =>
    [...document.querySelectorAll('.paper h2, .paper h3, .paper table')].map((element) =>
      element instanceof HTMLTableElement
        ? {
            kind: 'table' as const,
            caption: element.caption?.textContent ?? '',
            head: element.tHead?.textContent ?? '',
            rows: [...(element.tBodies[0]?.rows ?? [])].map((row) => row.textContent ?? ''),
          }
        : { kind: 'heading' as const, text: element.textContent ?? '' },
    ),
  );
  return parts.map((part) =>
    part.kind === 'heading'
      ? { kind: part.kind, text: squeezed(part.text) }
      : { kind: part.kind, caption: squeezed(part.caption), head: squeezed(part.head), rows: part.rows.map(squeezed) },
  );
}

/**
 * Follows the paper's parts through the text of its pages.
 * @param pages text of each page, as `pdfPages` gives it
 */
function breakFaults(parts: readonly Part[], pages: readonly string[]): string[] {
  const faults: string[] = [];
  const texts = pages.map((text) => bodyOf(squeezed(text)));
  let at = { page: 0, index: 0 };
  /** The next place at which the text stands whole. */
  const find = (text: string): boolean => {
    for (let page = at.page; page < texts.length; page++) {
      const index = texts[page]?.indexOf(text, page === at.page ? at.index : 0) ?? -1;
      if (index >= 0) {
        at = { page, index: index + text.length };
        return true;
      }
    }
    faults.push(`"${text.slice(0, 60)}" stands whole on no page after page ${at.page + 1}`);
    return false;
  };
  const alone = (what: string, text: string) => {
    if (find(text) && texts[at.page]?.length === at.index) faults.push(`page ${at.page + 1} ends with ${what} "${text.slice(0, 60)}"`);
  };
  for (const part of parts) {
    if (part.kind === 'heading') {
      alone('the heading', part.text);
      continue;
    }
    const { caption, head, rows } = part;
    alone('the caption', caption);
    alone('the head', head);
    const counts = new Map<number, number>();
    for (const row of rows) {
      const before = at.page;
      if (!find(row)) break;
      counts.set(at.page, (counts.get(at.page) ?? 0) + 1);
      if (at.page !== before && texts[at.page]?.startsWith(head) === false)
        faults.push(`page ${at.page + 1} does not begin with the head of "${caption}"`);
    }
    const first = Math.min(...counts.keys());
    const last = Math.max(...counts.keys());
    for (const [page, count] of counts)
      if (rows.length > 1 && count < 2 && (page === first || page === last))
        faults.push(`one row of "${caption}" stands alone on page ${page + 1}`);
  }
  return faults;
}

/** The foot's last words: a PDF holds the text of head and foot before that of the page. */
const FOOT_ENDS = 'Achangetotherackmakesthispapervoid.';

function bodyOf(text: string): string {
  const end = text.indexOf(FOOT_ENDS);
  return end < 0 ? text : text.slice(end + FOOT_ENDS.length);
}
