/** One move made in four ways leaves one and the same site file; so does taking it back. */
import type { Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { closeBrowser, openDemo } from './program';
import { checked, eventually, goods, goToBay, goToLevel, save, selectGoods, withProgram } from './steps';

afterAll(closeBrowser);

/** A pallet on level 2 of bay A4, 75 mm from the left upright, and its target: the free place on level 3. */
const PALLET = 'a4-l2-g1';
const TARGET = 'Put down on level 3, 950 mm from the left upright';

interface FileOfSite {
  readonly savedAt: string;
  readonly site: {
    readonly runs: readonly {
      readonly bays: readonly { readonly levels: readonly { readonly id: string; placements: readonly Placed[] }[] }[];
    }[];
  };
}
interface Placed {
  readonly id: string;
  readonly atMm: number;
}

async function onlyFile(files: Promise<ReadonlyMap<string, string>>): Promise<string> {
  const texts = [...(await files).values()];
  expect(texts).toHaveLength(1);
  return texts[0] ?? '';
}

/** The demo as it was added, and as it is after one move and a save. */
async function moveAndSave(move: (page: Page) => Promise<void>): Promise<{ before: string; after: string }> {
  const texts = { before: '', after: '' };
  await withProgram(async ({ page, siteFiles }) => {
    await openDemo(page);
    await checked(page);
    texts.before = await onlyFile(siteFiles());
    await move(page);
    await eventually(() => page.locator('[data-level="3"]').getAttribute('aria-current')).toBe('true');
    await eventually(() => goods(page, PALLET).getAttribute('aria-label')).toMatch(/950\smm from the left upright/);
    expect(await page.getByText('Changes not saved yet').isVisible()).toBe(true);
    await save(page);
    texts.after = await onlyFile(siteFiles());
  });
  return texts;
}

async function byDragging(page: Page): Promise<void> {
  await goToBay(page, 'A4');
  const from = await goods(page, PALLET).boundingBox();
  // Between two pallets of the level above: the middle of the free place there.
  const left = await goods(page, 'a4-l3-g1').boundingBox();
  const right = await goods(page, 'a4-l3-g2').boundingBox();
  if (!from || !left || !right) throw new Error('the pallets are not in the drawing');
  await page.mouse.move(from.x + from.width / 2, from.y + from.height / 2);
  await page.mouse.down();
  await page.mouse.move(from.x + from.width / 2 + 20, from.y, { steps: 3 });
  await page.mouse.move((left.x + left.width + right.x) / 2, left.y + left.height / 2, { steps: 8 });
  await page.mouse.up();
}

async function byKeysAlone(page: Page): Promise<void> {
  const { keyboard } = page;
  // From the page as it stands after opening: no pointer from here on.
  for (let bay = 1; bay < 4; bay += 1) await keyboard.press('PageDown');
  await page.getByRole('heading', { name: 'Bay A4' }).waitFor();
  while ((await page.locator('[data-level="2"]').getAttribute('aria-current')) !== 'true') await keyboard.press('Control+ArrowUp');
  const focused = () => page.evaluate(() => (document.activeElement as HTMLElement | null)?.dataset['placement'] ?? null);
  for (let stops = 0; (await focused()) !== PALLET; stops += 1) {
    expect(stops, 'the goods of the chosen level are reached by Tab').toBeLessThan(60);
    await keyboard.press('Tab');
  }
  await keyboard.press('Enter');
  await page.getByText(/^Carrying Bagged flour/).waitFor();
  await keyboard.press('ArrowUp');
  // 75 mm to 950 mm: eight times 100, seven times 10, five times 1.
  for (let step = 0; step < 8; step += 1) await keyboard.press('Alt+ArrowRight');
  for (let step = 0; step < 7; step += 1) await keyboard.press('ArrowRight');
  for (let step = 0; step < 5; step += 1) await keyboard.press('Shift+ArrowRight');
  await keyboard.press('Enter');
}

async function byClicks(page: Page): Promise<void> {
  await goToBay(page, 'A4');
  await selectGoods(page, PALLET);
  await goods(page, PALLET).click();
  await page.getByRole('button', { name: new RegExp(TARGET.replaceAll(' ', '\\s')) }).click();
}

async function byMenu(page: Page): Promise<void> {
  await goToBay(page, 'A4');
  await selectGoods(page, PALLET);
  await page.getByRole('button', { name: 'Move to…' }).first().click();
  const dialog = page.getByRole('dialog', { name: 'Move Bagged flour to' });
  await dialog.getByLabel('Level').selectOption({ label: 'level 3' });
  await dialog.getByLabel('From the left upright').fill('950');
  await dialog.getByRole('button', { name: 'Move', exact: true }).click();
}

test('a pallet moved by drag, by keys, by clicks and by the menu leaves the same file, byte for byte', async () => {
  const dragged = await moveAndSave(byDragging);
  const keyed = await moveAndSave(byKeysAlone);
  const clicked = await moveAndSave(byClicks);
  const chosen = await moveAndSave(byMenu);
  expect(keyed.before).toBe(dragged.before);
  expect(dragged.after).not.toBe(dragged.before);
  expect(keyed.after).toBe(dragged.after);
  expect(clicked.after).toBe(dragged.after);
  expect(chosen.after).toBe(dragged.after);

  // And nothing but that one unit load is different from what was there before.
  const before = (JSON.parse(dragged.before) as FileOfSite).site;
  const levels = before.runs.flatMap((run) => run.bays.flatMap((bay) => bay.levels));
  const from = levels.find((level) => level.id === 'a4-l2');
  const to = levels.find((level) => level.id === 'a4-l3');
  const moved = from?.placements.find((one) => one.id === PALLET);
  if (!from || !to || !moved) throw new Error('the demo has changed: bay A4 is not as this test knows it');
  from.placements = from.placements.filter((one) => one !== moved);
  to.placements = [...to.placements, { ...moved, atMm: 950 }].toSorted((a, b) => a.atMm - b.atMm);
  expect((JSON.parse(dragged.after) as FileOfSite).site).toEqual(before);
});

/** Both pallets of level 3 in bay A4 to the same places on level 3 of the bay A5 beside it, which is empty. */
const PAIR = ['a4-l3-g1', 'a4-l3-g2'] as const;

async function selectPair(page: Page): Promise<void> {
  await goToBay(page, 'A4');
  await goToLevel(page, 3);
  await selectGoods(page, PAIR[0]);
  await goods(page, PAIR[1]).click({ modifiers: ['Shift'] });
  await page.getByRole('heading', { name: '2 unit loads' }).waitFor();
}

const PAIR_MOVES: Readonly<Record<string, (page: Page) => Promise<void>>> = {
  keys: async (page) => {
    await goods(page, PAIR[1]).press('Shift+PageDown');
  },
  menu: async (page) => {
    await page.getByRole('button', { name: 'Move to…' }).click();
    const dialog = page.getByRole('dialog', { name: 'Move 2 unit loads to' });
    const bays = await dialog.getByLabel('Bay').locator('option').allInnerTexts();
    await dialog.getByLabel('Bay').selectOption({ label: bays.find((name) => name.endsWith('A5')) ?? '' });
    await dialog.getByRole('button', { name: 'Move', exact: true }).click();
  },
  drag: async (page) => {
    const box = await goods(page, PAIR[0]).boundingBox();
    const tab = await page.getByRole('tab', { name: /^Bay A5/ }).boundingBox();
    if (!box || !tab) throw new Error('pallet or bay is not in sight');
    const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
    await page.mouse.move(x, y);
    await page.mouse.down();
    await page.mouse.move(x + 20, y, { steps: 3 });
    // Held over the bay in the strip, it comes up.
    await page.mouse.move(tab.x + tab.width / 2, tab.y + tab.height / 2, { steps: 5 });
    await page.getByRole('heading', { name: 'Bay A5' }).waitFor();
    const level = await page.locator('[data-level="3"]').boundingBox();
    if (!level) throw new Error('the level is not in sight');
    await page.mouse.move(x, level.y + level.height - 20, { steps: 6 });
    await page.mouse.up();
  },
};

test('two pallets moved to the bay beside by drag, by keys and by the menu leave the same file, byte for byte', async () => {
  const texts: string[] = [];
  for (const move of Object.values(PAIR_MOVES)) {
    await withProgram(async ({ page, siteFiles }) => {
      await openDemo(page);
      await checked(page);
      await selectPair(page);
      await move(page);
      await page.getByRole('heading', { name: 'Bay A5' }).waitFor();
      await eventually(() => goods(page, PAIR[1]).getAttribute('aria-label')).toMatch(/1\s825\smm from the left upright/);
      await save(page);
      texts.push(await onlyFile(siteFiles()));
    });
  }
  expect(texts).toHaveLength(3);
  expect(new Set(texts).size).toBe(1);
});

test('a move taken back and saved leaves the file as it was', () =>
  withProgram(async ({ page, siteFiles }) => {
    await openDemo(page);
    await checked(page);
    const before = await onlyFile(siteFiles());
    await byClicks(page);
    await save(page);
    expect(await onlyFile(siteFiles())).not.toBe(before);
    await page.getByRole('button', { name: 'Undo', exact: true }).click();
    await page.getByText('Changes not saved yet').waitFor();
    await goods(page, PALLET).waitFor();
    await save(page);
    // The clock of these tests stands still, so even the time in the file is the same.
    expect(await onlyFile(siteFiles())).toBe(before);
  }));

test('Escape takes back a drag and what is carried, and nothing counts as changed', () =>
  withProgram(async ({ page, siteFiles }) => {
    await openDemo(page);
    await goToBay(page, 'A4');
    const before = await onlyFile(siteFiles());
    const place = await goods(page, PALLET).getAttribute('aria-label');
    const box = await goods(page, PALLET).boundingBox();
    if (!box) throw new Error('the pallet is not in the drawing');
    await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width / 2 + 60, box.y - 60, { steps: 5 });
    await eventually(() => goods(page, PALLET).getAttribute('aria-label')).not.toBe(place);
    await page.keyboard.press('Escape');
    await eventually(() => goods(page, PALLET).getAttribute('aria-label')).toBe(place);
    await page.mouse.up();

    await goToLevel(page, 2);
    await selectGoods(page, PALLET);
    await goods(page, PALLET).press('Enter');
    await page.getByText(/^Carrying/).waitFor();
    await page.keyboard.press('ArrowUp');
    await eventually(() => page.locator('[data-level="3"]').getAttribute('aria-current')).toBe('true');
    await page.keyboard.press('Escape');
    await eventually(() => goods(page, PALLET).getAttribute('aria-label')).toBe(place);
    expect(await page.getByText(/^All changes saved/).isVisible()).toBe(true);
    expect(await page.getByRole('button', { name: 'Undo', exact: true }).isDisabled()).toBe(true);
    expect(await onlyFile(siteFiles())).toBe(before);
  }));
