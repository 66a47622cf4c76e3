/** Without any colour each verdict can still be told: by the shape of its mark, and by its word beside it. */
import type { Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { VERDICTS, type Verdict } from '../../src-core/checks/finding';
import { VERDICT_WORDS } from '../../src-core/words/verdict-words';
import { closeBrowser, openDemo } from './program';
import { checked, command, withProgram } from './steps';

afterAll(closeBrowser);

/** Two marks are told apart where at least this share of the ink of the two lies in one of them only. */
const LEAST_DIFFERENCE = 0.15;
/** Width of the smallest mark on the page, px: 1.25 rem. */
const SMALLEST = 20;
/** Where a mark is laid to be looked at, with some paper round it, px. */
const SPOT = { x: 10, y: 10, width: SMALLEST + 4, height: SMALLEST };

/** Ink of each pixel, from 0 on the paper to 1 where this mark is strongest: the shape without its shade. */
type Ink = readonly number[];

/** All marks are laid on one spot, one after the other, so that pixels compare with pixels. */
async function inkOf(page: Page, verdict: Verdict): Promise<Ink> {
  await page.evaluate(
    ({ mark, width, spot }) => {
      const shown = document.querySelector(`svg.mark.${mark}`);
      if (shown === null) throw new Error(`no mark ${mark} on the page`);
      const sheet = document.createElement('div');
      sheet.id = 'spot';
      sheet.style.cssText = `position: fixed; inset: 0; z-index: 9; padding: ${spot.y + 2}px 0 0 ${spot.x + 2}px; background: var(--sheet)`;
      const copy = shown.cloneNode(true) as SVGElement;
      copy.style.cssText = `display: block; width: ${width}px`;
      sheet.append(copy);
      document.body.append(sheet);
    },
    { mark: verdict, width: SMALLEST, spot: SPOT },
  );
  const picture = (await page.screenshot({ clip: SPOT })).toString('base64');
  await page.evaluate(() => document.querySelector('#spot')?.remove());
  const pixels = await pixelsOf(page, picture);
  for (const [red, green, blue] of pixels) expect(red === green && green === blue, 'the page is drawn without colour').toBe(true);
  const paper = pixels[0]?.[0] ?? 0;
  const contrast = pixels.map(([grey]) => Math.abs(grey - paper));
  const strongest = Math.max(...contrast);
  expect(strongest, `${verdict} is seen on the paper`).toBeGreaterThan(60);
  return contrast.map((one) => one / strongest);
}

/** Pixels of a picture, decoded by the browser on a page of its own. */
async function pixelsOf(page: Page, picture: string): Promise<[number, number, number][]> {
  const decoder = await page.context().newPage();
  try {
    return await decoder.evaluate(async (png) => {
      const image = new Image();
      image.src = `data:image/png;base64,${png}`;
      await image.decode();
      const canvas = document.createElement('canvas');
      [canvas.width, canvas.height] = [image.width, image.height];
      const drawing = canvas.getContext('2d');
      if (drawing === null) throw new Error('no canvas to decode the picture on');
      drawing.drawImage(image, 0, 0);
      const { data } = drawing.getImageData(0, 0, image.width, image.height);
      return Array.from({ length: data.length / 4 }, (_, i): [number, number, number] => [
        data[4 * i] ?? 0,
        data[4 * i + 1] ?? 0,
        data[4 * i + 2] ?? 0,
      ]);
    }, picture);
  } finally {
    await decoder.close();
  }
}

/** Share of the ink of two marks that lies in one of them only: 0 for the same shape, 1 where nothing is shared. */
function difference(a: Ink, b: Ink): number {
  const sum = (by: (one: number, other: number) => number) => a.reduce((total, one, i) => total + by(one, b[i] ?? 0), 0);
  return sum((one, other) => Math.abs(one - other)) / sum(Math.max);
}

const withoutColour = (page: Page) => page.evaluate(() => void (document.documentElement.style.filter = 'grayscale(1)'));

for (const colorScheme of ['light', 'dark'] as const)
  test(`on ${colorScheme} paper each of the five marks has a shape of its own, at the smallest size there is`, () =>
    withProgram(
      async ({ page }) => {
        await openDemo(page);
        await command(page, 'Help, cautions and about');
        await page.getByRole('button', { name: '← Back to the bay' }).waitFor();
        await withoutColour(page);
        const inks = new Map<Verdict, Ink>();
        for (const verdict of VERDICTS) inks.set(verdict, await inkOf(page, verdict));
        for (const [verdict, ink] of inks) {
          // The measure itself: a mark drawn once more is the same.
          expect(difference(ink, await inkOf(page, verdict)), verdict).toBe(0);
          for (const [other, otherInk] of inks)
            if (other !== verdict) expect(difference(ink, otherInk), `${verdict} and ${other}`).toBeGreaterThan(LEAST_DIFFERENCE);
        }
      },
      { colorScheme },
    ));

/** Marks in sight, each with the words of what it belongs to: seen beside it, else said as the name of the mark or of its button. */
const marksOnPage = (page: Page): Promise<{ verdict: string; words: string }[]> =>
  page.locator('svg.mark').evaluateAll((marks) =>
    marks
      .filter((mark) => mark.checkVisibility())
      .map((mark) => {
        const owner = mark.closest('button, .verdict, .head, dt, .name');
        const named = mark.closest('[aria-label]');
        return {
          verdict: mark.classList[1] ?? '',
          words: [owner?.textContent, named?.getAttribute('aria-label')].join(' ').replaceAll(/\s+/g, ' ').toLowerCase(),
        };
      }),
  );

test('each mark stands with its word', () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await checked(page);
    const seen = new Set<string>();
    for (const screen of ['Bay', 'Run elevation with frame loads', 'Help, cautions and about']) {
      if (screen !== 'Bay') await command(page, screen);
      await page.locator('svg.mark').first().waitFor();
      for (const { verdict, words } of await marksOnPage(page)) {
        // A mark that only informs bears no verdict of its own.
        if (verdict === 'muted') continue;
        expect(words, screen).toContain(VERDICT_WORDS[verdict as Verdict].word.toLowerCase());
        seen.add(verdict);
      }
    }
    expect([...seen].toSorted()).toEqual([...VERDICTS].toSorted());
  }));
