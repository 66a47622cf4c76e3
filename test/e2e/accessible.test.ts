/** Every screen for everybody: assistive technology, light and dark, narrow windows, large text, forced colours. */
import type { Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { lostText } from './lost-text';
import { axeFindings, closeBrowser, openDemo } from './program';
import { walkBay, walkDialogs, walkList, walkScreens } from './screens';
import { checked, choice, eventually, goToBay, goToLevel, withProgram } from './steps';

afterAll(closeBrowser);

/** Each of these walks through some fifty screens. */
const LONG = 600_000;

/** Looks at every screen in turn and gathers what is wrong, so that one run tells all of it. */
async function walkAll(page: Page, look: (part?: string) => Promise<readonly string[]>): Promise<readonly string[]> {
  const faults: string[] = [];
  const visit = async (name: string, part?: string) => {
    for (const fault of await look(part)) faults.push(`${name}: ${fault}`);
  };
  await walkList(page, visit);
  await walkBay(page, visit);
  await walkDialogs(page, visit);
  await walkScreens(page, visit);
  return faults;
}

async function largeText(page: Page): Promise<void> {
  // Preferences stand inside a site; they hold for the list as well.
  await openDemo(page);
  await page.keyboard.press('Control+,');
  await choice(page.getByRole('dialog'), 'Text size').selectOption({ label: '200 %' });
  await eventually(() => page.evaluate(() => getComputedStyle(document.documentElement).fontSize)).toBe('32px');
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: 'Halverwick depot (demo)' }).click();
  await page.getByRole('button', { name: 'Remove Halverwick depot (demo)…' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Remove', exact: true }).click();
  await page.getByRole('heading', { name: 'Nothing here yet' }).waitFor();
}

test(
  'axe finds nothing on any screen, in light and in dark',
  () =>
    withProgram(async ({ page }) => {
      const faults = await walkAll(page, async (part) => {
        const light = await axeFindings(page, [], part);
        // Only colours differ in the dark.
        await page.emulateMedia({ colorScheme: 'dark' });
        const dark = await axeFindings(page, ['color-contrast'], part);
        await page.emulateMedia({ colorScheme: 'light' });
        return [...light, ...dark.map((fault) => `in dark: ${fault}`)];
      });
      expect(faults).toEqual([]);
    }),
  LONG,
);

test('the search for lost text finds what is cut off, outside the window, under other text or too long for its field', () =>
  withProgram(async ({ page }) => {
    await page.goto('about:blank');
    await page.setContent(`
      <p style="width: 20px; overflow: hidden; white-space: nowrap">cut off here</p>
      <p style="position: absolute; left: -200px; top: 60px">outside here</p>
      <p style="position: absolute; left: 20px; top: 100px">under here</p>
      <p style="position: absolute; left: 24px; top: 104px">over it</p>
      <input inputmode="decimal" style="width: 20px" value="123456789">
      <div style="width: 100px; overflow: auto; white-space: nowrap">what can be scrolled to is not lost, however long it is</div>`);
    expect(await lostText(page)).toEqual([
      '"cut off here" is cut off by <p class="">',
      expect.stringContaining('"outside here" stands outside the window'),
      expect.stringContaining('"under here" and "over it" overlap'),
      'the number "123456789" does not fit its field ""',
    ]);
  }));

test(
  'at 640 px nothing is lost on any screen',
  () =>
    withProgram(async ({ page }) => expect(await walkAll(page, () => lostText(page))).toEqual([]), {
      viewport: { width: 640, height: 900 },
    }),
  LONG,
);

for (const width of [1280, 640])
  test(
    `at text of 200 % and ${width} px nothing is lost on any screen`,
    () =>
      withProgram(
        async ({ page }) => {
          await largeText(page);
          expect(await walkAll(page, () => lostText(page))).toEqual([]);
        },
        { viewport: { width, height: 800 } },
      ),
    LONG,
  );

for (const [width, height] of [
  [1280, 800],
  [640, 900],
] as const)
  test(`at text of 200 % and ${width} px the cautions never hide what has the focus`, () =>
    withProgram(
      async ({ page }) => {
        await largeText(page);
        await openDemo(page);
        await page.getByRole('button', { name: 'Frames…' }).click();
        await page.locator('[data-form] input').first().focus();
        for (let stop = 0; stop < 25; stop += 1) {
          await page.keyboard.press('Tab');
          const hidden = await page.evaluate(() => {
            const { activeElement } = document;
            const foot = document.querySelector('footer');
            if (activeElement === null || foot === null || foot.contains(activeElement)) return null;
            const [focus, cautions] = [activeElement.getBoundingClientRect(), foot.getBoundingClientRect()];
            const seen = focus.bottom <= cautions.top + 1 || focus.top >= cautions.bottom - 1;
            return seen ? null : `${activeElement.outerHTML.slice(0, 120)} at ${focus.bottom}, cautions from ${cautions.top}`;
          });
          expect(hidden).toBeNull();
        }
        // They leave most of the window to the work.
        const room = await page.evaluate(() => {
          const foot = document.querySelector('footer');
          const box = foot?.getBoundingClientRect();
          return box && getComputedStyle(foot as Element).position === 'sticky' ? box.height / innerHeight : 0;
        });
        expect(room).toBeLessThan(0.25);
      },
      { viewport: { width, height } },
    ));

test('with forced colours every verdict is still a word', () =>
  withProgram(
    async ({ page }) => {
      await openDemo(page);
      await checked(page);
      const words: string[] = [];
      for (const [bay, level] of [
        ['A1', 1],
        ['A2', 2],
        ['B4', 3],
        ['C2', 3],
      ] as const) {
        await goToBay(page, bay);
        await goToLevel(page, level);
        for (const part of [`section[aria-label="Level ${level}"] header .verdict`, `[data-level="${level}"] .verdict`]) {
          const verdict = page.locator(part).first();
          expect(await verdict.isVisible()).toBe(true);
          words.push((await verdict.innerText()).replaceAll(/[^A-Za-z ]/g, '').trim());
        }
        const { colour, ground } = await page.locator(`section[aria-label="Level ${level}"] header .verdict`).evaluate((element) => ({
          colour: getComputedStyle(element).color,
          ground: getComputedStyle(document.documentElement).backgroundColor,
        }));
        expect(colour).not.toBe(ground);
      }
      const [within, , over, , , , unknown] = words;
      expect([within, over, unknown]).toEqual(['Within', 'Over', 'Not assessable']);
      expect(words.filter((_, i) => i % 2 === 1)).toEqual(words.filter((_, i) => i % 2 === 0));
    },
    { forcedColors: 'active' },
  ));
