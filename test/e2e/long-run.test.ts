import { createHash } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Locator } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { writeSiteFile } from '../../src-core/site/envelope';
import { writeSite } from '../../src-core/site/write';
import { depotOf } from '../bench/large-site';
import { closeBrowser, startProgram, type Program } from './program';
import { command } from './steps';

/** One run of a thousand bays with ten goods each. */
const BAYS = 1000;
/** So many bays are written at a time at most; the window shows about twenty. */
const WRITTEN = 120;

/** A busy machine may take its time. */
const PATIENT = { timeout: 60_000 };

let folder: string;
let program: Program;

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'tallybeam-long-'));
  const body = writeSite(depotOf({ runs: 1, bays: BAYS, paired: false }));
  const hash = (text: string) => createHash('sha256').update(text).digest('hex');
  await writeFile(
    join(folder, 'depot.tallybeam.json'),
    writeSiteFile(body, { program: '0.1.0', savedAt: '2026-05-04T08:00:00.000Z' }, hash),
  );
  program = await startProgram({}, folder);
  await program.page.getByRole('button', { name: 'Large depot', exact: true }).click();
  await program.page.locator('section[aria-label="Findings"][aria-busy="false"]').waitFor();
});

afterAll(async () => {
  await program.close();
  await closeBrowser();
  await rm(folder, { recursive: true, force: true });
});

const tab = (bay: number): Locator => program.page.locator(`[data-bay="R1-${bay}"]`);
const tabs = (): Locator => program.page.locator('[data-bay]');
const strip = (): Locator => program.page.getByRole('tablist');

/** Whether the bay is chosen, has its verdict, tells its place, and lies in the window. */
async function isChosen(bay: number): Promise<void> {
  await program.page.locator(`[data-bay="R1-${bay}"][aria-selected="true"]`).waitFor();
  expect(await tab(bay).getAttribute('aria-posinset')).toBe(String(bay));
  expect(await tab(bay).getAttribute('aria-setsize')).toBe(String(BAYS));
  await expect.poll(() => tab(bay).getAttribute('aria-label'), PATIENT).not.toContain('not checked');
  await expect
    .poll(async () => {
      const box = await tab(bay).boundingBox();
      return box !== null && box.x >= 0 && box.x + box.width <= 1440;
    }, PATIENT)
    .toBe(true);
  expect(await tabs().count()).toBeLessThan(WRITTEN);
}

test('of a run of a thousand bays few are written, and each tells its place in the run', async () => {
  await isChosen(1);
  const places = await tabs().evaluateAll((all) => all.map((one) => Number(one.getAttribute('aria-posinset'))));
  expect(places).toEqual(places.toSorted((a, b) => a - b));
});

test('keys walk the strip to its end and back, and the focus goes along', async () => {
  const { page } = program;
  await tab(1).focus();
  await page.keyboard.press('End');
  await isChosen(BAYS);
  await page.keyboard.press('ArrowLeft');
  await isChosen(BAYS - 1);
  await expect.poll(() => page.evaluate(() => (document.activeElement as HTMLElement).dataset['bay']), PATIENT).toBe(`R1-${BAYS - 1}`);
  await page.keyboard.press('Home');
  await isChosen(1);
  for (let i = 0; i < 40; i += 1) await page.keyboard.press('ArrowRight');
  await isChosen(41);
  await expect.poll(() => page.evaluate(() => (document.activeElement as HTMLElement).dataset['bay']), PATIENT).toBe('R1-41');
});

test('scrolled by hand the strip shows the bays that are there, and a click chooses one', async () => {
  const { page } = program;
  await strip().evaluate((one) => (one.scrollLeft = one.scrollWidth / 2));
  await tab(BAYS / 2).waitFor();
  await tab(BAYS / 2).click();
  await isChosen(BAYS / 2);
  // The chosen bay stays when it is scrolled out of sight.
  await strip().evaluate((one) => (one.scrollLeft = 0));
  await tab(1).waitFor();
  expect(await page.locator('[aria-selected="true"][data-bay]').getAttribute('data-bay')).toBe(`R1-${BAYS / 2}`);
});

test('a bay that is found by its name is chosen and brought into sight', async () => {
  const { page } = program;
  await page.keyboard.press('Control+F');
  await page
    .getByRole('dialog')
    .getByRole('combobox')
    .or(page.getByRole('dialog').getByRole('textbox'))
    .or(page.getByRole('dialog').getByRole('searchbox'))
    .first()
    .fill('R1-412');
  await page.keyboard.press('Enter');
  await isChosen(412);
});

test('the elevation of the run shows where one was, and frames further on as one goes there', async () => {
  const { page } = program;
  await command(page, 'Run elevation');
  const frames = page.locator('section[aria-label="Run R1"] li');
  await frames.filter({ hasText: 'R1-F412' }).waitFor();
  expect(await frames.count()).toBeLessThan(WRITTEN);
  expect(await frames.first().getAttribute('aria-setsize')).toBe(String(BAYS + 1));
  await page.getByRole('group', { name: 'Elevation of run R1' }).evaluate((one) => (one.scrollLeft = one.scrollWidth));
  const last = frames.filter({ hasText: `R1-F${BAYS + 1}` });
  await last.getByRole('button').click();
  expect(await last.getByRole('button').getAttribute('aria-pressed')).toBe('true');
  await page.getByRole('button', { name: '← Back to the bay' }).click();
});

test('the layout writes its rows as they come near, and keeps what is typed in them', async () => {
  const { page } = program;
  await command(page, 'Layout of runs and bays');
  const names = page.getByRole('textbox', { name: /^Name of bay/ });
  await names.first().waitFor();
  expect(await names.count()).toBeLessThan(WRITTEN);
  const far = page.getByRole('textbox', { name: 'Name of bay R1-300' });
  await expect
    .poll(async () => {
      await names.last().scrollIntoViewIfNeeded();
      return far.count();
    }, PATIENT)
    .toBe(1);
  await far.fill('Cold 300');
  await far.blur();
  await page.getByRole('textbox', { name: 'Name of bay Cold 300' }).waitFor();
  await page.getByRole('button', { name: 'Go to bay Cold 300', exact: true }).click();
  await isChosen(300);
  expect(program.complaints).toEqual([]);
});
