/** Templates kept from bays, and levels copied across bays, in Chromium: by keys, by the mouse, told in words. */
import type { Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { closeBrowser, openDemo, type Program } from './program';
import { checked, choice, command, eventually, field, goToBay, goToLevel, plain, save, type, withProgram } from './steps';

afterAll(closeBrowser);

interface SavedSite {
  readonly bayTemplates: readonly { readonly name: string; readonly clearEntryMm: number }[];
  readonly runs: readonly {
    readonly name: string;
    readonly bays: readonly {
      readonly name: string;
      readonly clearEntryMm: number;
      readonly levels: readonly {
        readonly heightMm: number;
        readonly placements: readonly { readonly unitLoadId: string; readonly atMm: number }[];
      }[];
    }[];
  }[];
}

async function saved({ page, siteFiles }: Program): Promise<SavedSite> {
  await save(page);
  const [text = ''] = [...(await siteFiles()).values()];
  return (JSON.parse(text) as { site: SavedSite }).site;
}

const said = async (page: Page) => plain((await page.getByRole('status').first().textContent()) ?? '');
const says = (page: Page) => eventually(() => said(page));
/** What stands in a bay, without the ids that every copy has of its own. */
const standing = (site: SavedSite, name: string) =>
  site.runs
    .flatMap((run) => run.bays)
    .find((bay) => bay.name === name)
    ?.levels.map((level) => [level.heightMm, ...level.placements.map(({ unitLoadId, atMm }) => `${unitLoadId} ${atMm}`)]);

test('a bay is kept, changed in the library and laid out by; bays that were laid out before stay as they are', () =>
  withProgram(async (program) => {
    const { page } = program;
    await openDemo(page);
    await goToBay(page, 'A1');
    await page.keyboard.press('Control+Shift+S');
    const dialog = page.getByRole('dialog');
    expect(await field(dialog, 'Name of the template').inputValue()).toBe('Like bay A1');
    await field(dialog, 'Name of the template').fill('Flour bay');
    await page.keyboard.press('Enter');
    await says(page).toMatch(/^Bay template Flour bay kept with \d+ unit loads\. New runs and bays can be laid out by it\.$/);

    await command(page, 'New run of bays');
    await field(dialog, 'Name').fill('F');
    await field(dialog, 'Number of bays').fill('2');
    expect(await choice(dialog, 'Laid out by').locator('option:checked').innerText()).toBe('Flour bay (template)');
    await page.keyboard.press('Enter');
    await says(page).toMatch(/^Run F laid out: 2 bays of 3 levels, each with \d+ unit loads\.$/);
    await checked(page);

    await command(page, 'Bay templates');
    await page.getByRole('button', { name: 'Flour bay', exact: true }).click();
    const entry = page.getByRole('region', { name: 'Flour bay' });
    expect(plain(await entry.innerText())).toMatch(/\d × .+ at 75 mm/);
    await type(field(entry, 'Clear entry'), '2200');
    await says(page).toMatch(/^Flour bay: clear entry changed\. Bays that were laid out by it stay as they are\./);
    const site = await saved(program);
    expect(site.bayTemplates).toMatchObject([{ name: 'Three pallet levels' }, { name: 'Flour bay', clearEntryMm: 2200 }]);
    expect(site.runs.at(-1)?.bays.map((bay) => [bay.name, bay.clearEntryMm])).toEqual([
      ['F1', 2700],
      ['F2', 2700],
    ]);
    expect(standing(site, 'F2')).toEqual(standing(site, 'A1'));
    // One undo takes the change back, one the run, one the template.
    for (const name of ['Undo: Change clear entry of Flour bay', 'Undo: Lay out run F', 'Undo: Keep bay A1 as template Flour bay']) {
      expect(await page.getByRole('button', { name: 'Undo', exact: true }).getAttribute('title')).toBe(name);
      await page.getByRole('button', { name: 'Undo', exact: true }).click();
    }
    const before = await saved(program);
    expect([before.bayTemplates, before.runs].map((named) => named.map(({ name }) => name))).toEqual([
      ['Three pallet levels'],
      ['A', 'B', 'C'],
    ]);
  }));

test('what a template alone uses cannot be deleted, and the template is named', () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await command(page, 'Libraries: goods, notices, ratings');
    await page.getByRole('navigation', { name: 'Libraries' }).getByRole('button', { name: 'Load notices' }).click();
    await page.getByRole('button', { name: 'Add load notice' }).click();
    await type(field(page, 'Name or number'), 'Spare notice');
    const remove = page.getByRole('button', { name: 'Delete', exact: true });
    expect(await remove.isEnabled()).toBe(true);

    await command(page, 'Bay templates');
    await page.getByRole('button', { name: 'Add bay template' }).click();
    await type(field(page, 'Name'), 'Wide bay');
    await choice(page, 'Load notice').selectOption({ label: 'Spare notice' });
    await page.getByRole('navigation', { name: 'Libraries' }).getByRole('button', { name: 'Load notices' }).click();
    await page.getByRole('button', { name: 'Spare notice', exact: true }).click();
    expect(await remove.isDisabled()).toBe(true);
    expect(await page.getByText('In use, so it cannot be deleted').innerText()).toBe(
      'In use, so it cannot be deleted: bay template Wide bay.',
    );
  }));

test('a level goes from bay to bay by keys alone, and into ticked bays at another height', () =>
  withProgram(async (program) => {
    const { page } = program;
    await openDemo(page);
    await goToBay(page, 'A1');
    await goToLevel(page, 1);
    await page.keyboard.press('Control+C');
    await says(page).toMatch(/^Level 1 of bay A1 copied with \d unit loads?\. Choose another bay and paste it there\.$/);
    await page.keyboard.press('PageDown');
    await page.keyboard.press('Control+V');
    await says(page).toMatch(
      /^Level pasted into bay A2 at 1 500 mm\. It took the place of 1 level with \d unit loads?.*\. Undo brings that back\./,
    );

    await page.keyboard.press('Control+Shift+V');
    const dialog = page.getByRole('dialog', { name: 'Paste the copied level into bays' });
    await type(field(dialog, 'Floor to top of beam'), '6000');
    await page.keyboard.press('End');
    await page.keyboard.press('Tab');
    await page.keyboard.press('Tab');
    // One stop of Tab for all boxes; arrows walk them, Space ticks.
    await page.keyboard.press('Space');
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('Space');
    expect(plain(await dialog.innerText())).toContain('2 bays. One undo takes it all back.');
    await page.keyboard.press('Tab');
    await page.keyboard.press('Tab');
    await page.keyboard.press('Tab');
    await page.keyboard.press('Enter');
    await says(page).toMatch(/^Level pasted into 2 bays at 6 000 mm\./);
    const site = await saved(program);
    expect(standing(site, 'A2')?.[0]).toEqual(standing(site, 'A1')?.[0]);
    for (const name of ['A1', 'A3']) expect(standing(site, name)?.at(-1)).toEqual([6000, ...(standing(site, 'A1')?.[0]?.slice(1) ?? [])]);
  }));

test('bays, runs and levels are renamed, moved and deleted by keys and by the mouse, and undo brings all of it back', () =>
  withProgram(async (program) => {
    const { page } = program;
    await openDemo(page);
    await goToBay(page, 'A2');
    await goToLevel(page, 1);
    const names = () => page.locator('[data-bay]').allInnerTexts();
    const before = await names();
    // By keys.
    await page.keyboard.press('Control+Shift+ArrowLeft');
    await says(page).toBe('Bay A2 moved left. The frames stay where they stand.');
    await eventually(async () => (await names())[0]).toContain('A2');
    await page.keyboard.press('Control+Shift+ArrowUp');
    await says(page).toMatch(/^Levels 1 and 2 of bay A2 swapped, each with its beams and goods\./);
    await command(page, 'Delete this level');
    await says(page).toMatch(/^Level 2 of bay A2 deleted with its goods\. Undo brings it back\./);
    await command(page, 'Move this run down in the site');
    await says(page).toBe('Run A moved down.');
    await command(page, 'Delete this run');
    await says(page).toMatch(/^Run A with 5 bays deleted\. Undo brings it back\./);
    for (let i = 0; i < 5; i += 1) await page.keyboard.press('Control+Z');
    await goToBay(page, 'A2');
    expect(await names()).toEqual(before);

    // By the mouse.
    await command(page, 'Layout of runs and bays');
    const run = page.getByRole('region', { name: 'Run A', exact: true });
    await type(field(run, 'Run'), 'North');
    await page.getByRole('region', { name: 'Run North' }).getByRole('button', { name: 'Move bay A2 left' }).click();
    await type(page.getByLabel('Name of bay A3', { exact: true }), 'Corner');
    await page.getByRole('button', { name: 'Delete bay A1' }).click();
    await page.getByRole('region', { name: 'Run North' }).getByRole('button', { name: 'Add bays…' }).click();
    await field(page.getByRole('dialog'), 'Number of bays').fill('3');
    await page.getByRole('dialog').getByRole('button', { name: 'Add', exact: true }).click();
    const site = await saved(program);
    expect(site.runs.map((one) => one.name)).toEqual(['North', 'B', 'C']);
    expect(site.runs[0]?.bays.map((bay) => bay.name)).toEqual(['A2', 'Corner', 'A4', 'A5', 'A6', 'A7', 'A8']);
  }));
