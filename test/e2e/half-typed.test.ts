/** What is typed by half is kept, finished or asked about, and the focus never falls to the page's body. */
import type { Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { closeBrowser, openDemo } from './program';
import { checked, choice, command, eventually, field, goods, goToBay, goToLevel, plain, selectGoods, type, withProgram } from './steps';

afterAll(closeBrowser);

const inDemo = (use: (page: Page) => Promise<void>) =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await use(page);
  });

const focused = (page: Page): Promise<string> =>
  page.evaluate(() => {
    const { activeElement } = document;
    return activeElement instanceof HTMLElement
      ? (activeElement.dataset['placement'] ?? activeElement.getAttribute('aria-label') ?? activeElement.innerText ?? activeElement.tagName)
      : 'nothing';
  });
const onBody = (page: Page): Promise<boolean> => page.evaluate(() => document.activeElement === document.body);

async function openFrameTypes(page: Page): Promise<void> {
  await page.keyboard.press('Control+L');
  await page.getByRole('navigation', { name: 'Libraries' }).getByRole('button', { name: 'Frame types' }).click();
}

test('a row of a table filled by half is there again when the form is opened again, and counts once it is whole', () =>
  inDemo(async (page) => {
    await openFrameTypes(page);
    const rows = await page.getByRole('button', { name: /^Take out height/ }).count();
    await page.getByRole('button', { name: 'Add height' }).click();
    await type(field(page, `Height ${rows + 1}: Unsupported height`), '2400');
    // The second cell is typed, but never left: another library comes up by a key.
    await field(page, `Height ${rows + 1}: Rated`).fill('7100');
    await page
      .getByRole('navigation', { name: 'Libraries' })
      .getByRole('button', { name: 'Floors' })
      .evaluate((one) => (one as HTMLElement).click());
    await page.getByRole('heading', { name: 'Floors' }).waitFor();

    await openFrameTypes(page);
    expect(await field(page, `Height ${rows + 1}: Unsupported height`).inputValue()).toBe('2400');
    const rated = field(page, `Height ${rows + 1}: Rated`);
    if ((await rated.inputValue()) === '7100') await rated.press('Enter');
    await page.getByRole('button', { name: `Take out height ${rows + 1}` }).waitFor();
    // Taken out again, the focus goes to the row before it.
    await page.getByRole('button', { name: `Take out height ${rows + 1}` }).click();
    await eventually(() => focused(page)).toBe(`Take out height ${rows}`);
  }));

test('a plumb survey filled by half is kept with its frame, and leaving the site asks about it', () =>
  inDemo(async (page) => {
    await page.getByRole('button', { name: 'Frames…' }).click();
    const take = page.getByRole('button', { name: 'Take the survey out' });
    if ((await take.count()) > 0) await take.first().click();
    await type(field(page, 'Offset along the run'), '7');
    await page.keyboard.press('PageDown');
    await page.getByRole('button', { name: 'Bay…', exact: true }).click();
    await page.getByRole('button', { name: 'All sites' }).or(page.locator('header button.name')).first().click();
    const dialog = page.getByRole('dialog');
    await eventually(() => dialog.innerText()).toContain('Typed and not taken over yet, so it would be lost: Plumb survey');
    await dialog.getByRole('button', { name: 'Stay' }).click();
    await goToBay(page, 'A1');
    await page.getByRole('button', { name: 'Frames…' }).click();
    expect(await field(page, 'Offset along the run').inputValue()).toBe('7');
  }));

test('new goods typed by half are kept, and Enter at a name puts nothing on', () =>
  inDemo(async (page) => {
    await goToBay(page, 'A5');
    await goToLevel(page, 3);
    const before = await page.locator('[data-placement]').count();
    await page.keyboard.press('Control+G');
    await choice(page, 'Goods$').selectOption({ label: 'new goods…' });
    const form = page.locator('form.add');
    await field(form, 'Name').fill('Cork floor');
    await field(form, 'Name').press('Enter');
    await eventually(() => page.evaluate(() => (document.activeElement as HTMLInputElement).labels?.[0]?.textContent)).toMatch(
      /^Width along/,
    );
    await type(field(form, 'Width along the beam'), '800');
    await field(form, 'Width along the beam').press('Enter');
    await eventually(() => form.getByRole('alert').innerText()).toBe('Depth is not typed yet. Nothing was put on.');
    await form.getByRole('button', { name: 'Done' }).click();
    expect(await page.locator('[data-placement]').count()).toBe(before);

    await page.keyboard.press('Control+G');
    expect(await field(form, 'Name').inputValue()).toBe('Cork floor');
    expect(await field(form, 'Width along the beam').inputValue()).toBe('800');
    await type(field(form, 'Depth'), '1200');
    await type(field(form, 'Height with pallet'), '900');
    await field(form, 'Height with pallet').press('Enter');
    await eventually(() => page.locator('[data-placement]').count()).toBe(before + 1);
    await eventually(async () => plain(await page.getByRole('status').last().innerText())).toMatch(/^Cork floor put on bay A5, level 3\./);
    // Its mass is not known, so nothing passes.
    await checked(page);
    expect(await page.locator('section[aria-label="Level 3"] header').innerText()).toMatch(/Not assessable/);
  }));

test('what is typed as the view is switched is taken in the units it was typed in', () =>
  inDemo(async (page) => {
    await goToBay(page, 'A4');
    await selectGoods(page, 'a4-l3-g1');
    const at = field(page, 'From the left upright');
    await at.fill('127');
    await page.keyboard.press('Control+U');
    // 127 mm = 5 in.
    await eventually(() => field(page, 'From the left upright').inputValue()).toBe('5');
    await page.keyboard.press('Control+U');
    await eventually(() => field(page, 'From the left upright').inputValue()).toBe('127');
  }));

test('after goods, a level, a bay and a run are taken out the focus is on what is left beside them', () =>
  inDemo(async (page) => {
    await goToBay(page, 'A4');
    await goToLevel(page, 3);
    await selectGoods(page, 'a4-l3-g1');
    await page.getByRole('button', { name: 'Take off' }).click();
    await eventually(() => focused(page)).toBe('a4-l3-g2');
    await page.keyboard.press('Delete');
    await goods(page, 'a4-l3-g2').waitFor({ state: 'detached' });
    await eventually(() => page.evaluate(() => (document.activeElement as HTMLElement | null)?.dataset['level'])).toBe('3');

    await command(page, 'Delete this level');
    await eventually(() => page.evaluate(() => (document.activeElement as HTMLElement | null)?.dataset['level'])).toBe('2');
    await command(page, 'Delete this bay');
    await eventually(() => focused(page)).toMatch(/^Bay A5/);

    await command(page, 'Layout of runs and bays');
    await page.getByRole('button', { name: 'Delete bay A2' }).click();
    await eventually(() => focused(page)).toBe('Delete bay A3');
    for (const left of [2, 1, 0]) {
      await page.getByRole('button', { name: 'Delete run' }).first().click();
      await eventually(() => page.getByRole('button', { name: 'Delete run' }).count()).toBe(left);
      await eventually(() => focused(page)).toBe(left > 0 ? 'Delete run' : 'New run of bays…');
      expect(await onBody(page)).toBe(false);
    }
  }));
