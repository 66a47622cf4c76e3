/**
 * Reads PDFs with Poppler's tools, as an auditor's reader would. Gets them where this machine lets us,
 * and says exactly what is missing where it does not.
 */
import { execFileSync, spawnSync } from 'node:child_process';

let ready = false;

function needTools(): void {
  if (ready) return;
  const there = () => ['pdftotext', 'pdfinfo', 'pdfimages'].every((tool) => spawnSync(tool, ['-v']).error === undefined);
  if (!there() && process.platform === 'linux' && process.getuid?.() === 0) {
    get('apt-get', 'update', '-q');
    get('apt-get', 'install', '-y', '-q', 'poppler-utils');
  }
  if (!there())
    throw new Error('The tests of printed papers need Poppler’s pdftotext, pdfinfo and pdfimages: install the package "poppler-utils".');
  ready = true;
}

const get = (command: string, ...args: readonly string[]) =>
  spawnSync(command, args, { env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }, stdio: ['ignore', 'ignore', 'inherit'] });

function run(tool: string, ...args: readonly string[]): string {
  needTools();
  return execFileSync(tool, args, { encoding: 'utf8', maxBuffer: 256 * 1024 * 1024 });
}

export interface PdfFacts {
  readonly pages: number;
  readonly tagged: boolean;
  /** Width and height of each page in points. */
  readonly sizes: readonly (readonly [width: number, height: number])[];
  readonly title: string;
}

export function pdfFacts(path: string): PdfFacts {
  const text = run('pdfinfo', '-f', '1', '-l', '100000', path);
  const of = (key: string) => new RegExp(`^${key}:\\s+(.*)$`, 'm').exec(text)?.[1] ?? '';
  return {
    pages: Number(of('Pages')),
    tagged: of('Tagged') === 'yes',
    sizes: [...text.matchAll(/^Page\s+\d+ size:\s+([\d.]+) x ([\d.]+)/gm)].map(
      ([, width, height]) => [Number(width), Number(height)] as const,
    ),
    title: of('Title'),
  };
}

/** Text of each page in the order in which it was set. */
export const pdfPages = (path: string): readonly string[] => run('pdftotext', '-raw', path, '-').split('\f').slice(0, -1);

/** A word as it is set on its page: its box in points, from the page's top left corner. */
export interface PdfWord {
  readonly text: string;
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

export interface PdfSheet {
  readonly width: number;
  readonly height: number;
  readonly words: readonly PdfWord[];
}

const PAGE = /<page width="([\d.]+)" height="([\d.]+)">([\s\S]*?)<\/page>/g;
const WORD = /<word xMin="(-?[\d.]+)" yMin="(-?[\d.]+)" xMax="(-?[\d.]+)" yMax="(-?[\d.]+)">([^<]*)<\/word>/g;

/** Every word with its place, page by page. */
export const pdfSheets = (path: string): readonly PdfSheet[] =>
  Array.from(run('pdftotext', '-bbox', path, '-').matchAll(PAGE), ([, width, height, words = '']) => ({
    width: Number(width),
    height: Number(height),
    words: Array.from(words.matchAll(WORD), ([, left, top, right, bottom, text = '']) => ({
      text,
      left: Number(left),
      top: Number(top),
      right: Number(right),
      bottom: Number(bottom),
    })),
  }));

/** The document's structure as assistive technology reads it. */
export const pdfStructure = (path: string): string => run('pdfinfo', '-struct', path);

export interface PdfImage {
  /** 1 for the first. */
  readonly page: number;
  readonly width: number;
  readonly height: number;
  readonly perInch: number;
}

/** Pictures made of pixels: page, width, height and resolution of each. */
export function pdfImages(path: string): readonly PdfImage[] {
  return run('pdfimages', '-list', path)
    .split('\n')
    .slice(2)
    .filter((line) => line.trim() !== '')
    .map((line) => {
      const parts = line.trim().split(/\s+/);
      return { page: Number(parts[0]), width: Number(parts[3]), height: Number(parts[4]), perInch: Number(parts[12]) };
    });
}

/** Without spaces and line ends, which a reader puts where the lines of a cell happen to break. */
export const squeezed = (text: string): string => text.replace(/[\s\u00a0\u2009\u200b\u202f\u00ad]+/g, '');
