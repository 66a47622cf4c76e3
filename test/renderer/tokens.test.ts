import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';

const css = readFileSync(new URL('../../src-renderer/tokens.css', import.meta.url), 'utf8');

type Theme = 'light' | 'dark';

/** Colour of a token in a theme, following var() as the page does. */
function colour(token: string, theme: Theme): string {
  const pair = new RegExp(`--${token}: light-dark\\((#[0-9a-f]{6}), (#[0-9a-f]{6})\\);`).exec(css);
  if (pair?.[1] && pair[2]) return theme === 'light' ? pair[1] : pair[2];
  const other = new RegExp(`--${token}: var\\(--([a-z-]+)\\);`).exec(css);
  if (other?.[1]) return colour(other[1], theme);
  throw new Error(`tokens.css has no colour --${token}`);
}

// WCAG 2.2, definitions of relative luminance and contrast ratio.
function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((i) => {
    const c = parseInt(hex.slice(i, i + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [light = 0, dark = 0] = [luminance(a), luminance(b)].sort((p, q) => q - p);
  return (light + 0.05) / (dark + 0.05);
}

const GROUNDS = ['sheet', 'card', 'hover', 'selected'];
const VERDICTS = ['within', 'close', 'over', 'not-assessable', 'not-possible'];
const DAMAGE = ['damage-green', 'damage-amber', 'damage-red'];
const TEXTS = ['ink', 'soft', 'load', 'link', ...VERDICTS, ...DAMAGE];
const LINES = ['edge', 'focus', 'steel', 'beam', 'goods-line', 'load', ...VERDICTS];

test('the contrast of black on white is 21, and of equal colours 1 (WCAG 2.2)', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 10);
  expect(contrast('#4b4fc4', '#4b4fc4')).toBe(1);
});

describe.each<Theme>(['light', 'dark'])('in the %s theme', (theme) => {
  test.each(TEXTS)('%s reads as text on every ground (4.5:1)', (token) => {
    for (const ground of GROUNDS) expect(contrast(colour(token, theme), colour(ground, theme)), ground).toBeGreaterThanOrEqual(4.5);
  });

  test.each(LINES)('%s is seen as a line or mark on every ground (3:1)', (token) => {
    for (const ground of GROUNDS) expect(contrast(colour(token, theme), colour(ground, theme)), ground).toBeGreaterThanOrEqual(3);
  });

  test('text and lines stand out from the load fill, where figures are written over it', () => {
    for (const token of ['ink', 'soft', 'load']) {
      expect(contrast(colour(token, theme), colour('load-fill', theme)), token).toBeGreaterThanOrEqual(4.5);
    }
    for (const token of ['steel', 'over', 'close']) {
      expect(contrast(colour(token, theme), colour('load-fill', theme)), token).toBeGreaterThanOrEqual(3);
    }
  });

  test('main buttons read in rest and when pointed at', () => {
    expect(contrast(colour('sheet', theme), colour('ink', theme))).toBeGreaterThanOrEqual(4.5);
    expect(contrast(colour('card', theme), colour('load', theme))).toBeGreaterThanOrEqual(4.5);
  });
});

/** Colours written out: anything in a style sheet or style block, and quoted ones in code. */
function writtenColours(path: string, text: string): string[] {
  const styles = path.endsWith('.css') ? text : [...text.matchAll(/<style[^]*?<\/style>/g)].join('\n');
  const inStyles = styles.match(/#[0-9a-f]{3,8}\b|\b(?:rgb|hsl|lab|lch|oklab|oklch)a?\(/gi) ?? [];
  const inCode = text.match(/['"`](?:#[0-9a-f]{3,8}|(?:rgb|hsl)a?\([^'"`]*)['"`]/gi) ?? [];
  return [...inStyles, ...inCode].map((found) => `${path}: ${found}`);
}

test('a colour written out is found in style blocks and in code', () => {
  expect(writtenColours('a.svelte', '<style>p { color: #abc }</style>')).toHaveLength(1);
  expect(writtenColours('a.ts', "const red = '#ff0000';")).toHaveLength(1);
  expect(writtenColours('a.svelte.ts', 'this.#add(1)')).toHaveLength(0);
});

test('every colour of the page is a token: no other style sheet or component writes one', () => {
  const root = import.meta.glob<string>('../../src-renderer/*.{svelte,css,ts}', { query: '?raw', import: 'default', eager: true });
  const folders = import.meta.glob<string>('../../src-renderer/*/*.{svelte,css,ts}', { query: '?raw', import: 'default', eager: true });
  const all = Object.entries({ ...root, ...folders });
  expect(all.length).toBeGreaterThan(1);
  expect(all.filter(([path]) => !path.endsWith('/tokens.css')).flatMap(([path, text]) => writtenColours(path, text))).toEqual([]);
});
