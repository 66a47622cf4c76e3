/** The screens of visits, papers and records for everybody: assistive technology, light and dark, narrow windows, large text. */
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { resumeBay } from '../../src-core/visit/edits';
import { carryIntoSite } from '../../src-core/visit/carry';
import { writeVisit } from '../../src-core/visit/read-visit';
import { BesideStore } from '../../src-main/store/beside-store';
import { foldersIn } from '../../src-main/store/file-names';
import { nodeFs } from '../../src-main/store/fs-port';
import { SiteStore } from '../../src-main/store/site-store';
import { s10Site, s10Visit } from '../core/visit/make-s10';
import { lostText } from './lost-text';
import { axeFindings, closeBrowser } from './program';
import { choice, command, eventually, withProgram } from './steps';

afterAll(closeBrowser);

/** On a folder with scenario S10, its bay taken up again. */
async function withS10(use: (page: Page) => Promise<void>, options: Parameters<typeof withProgram>[1] = {}): Promise<void> {
  const folder = await mkdtemp(join(tmpdir(), 'tallybeam-access-'));
  try {
    await new SiteStore({ fs: nodeFs, folder, program: '0.1.0' }).add(carryIntoSite(s10Site(), s10Visit(), 'A-bay-2'));
    const body = writeVisit(resumeBay(s10Visit(), 'A-bay-2'));
    await new BesideStore(nodeFs, foldersIn(folder)).saveVisit({ siteId: 'site', visitId: 'v-s10', body, baseRevision: null });
    await withProgram(
      async ({ page }) => {
        await page
          .getByRole('button', { name: /^Test depot/ })
          .first()
          .click();
        await page.locator('[data-bay]').first().waitFor();
        await use(page);
      },
      options,
      folder,
    );
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

/** What the look finds on each of the screens, in the order of a user's day. */
async function walk(page: Page, look: () => Promise<readonly string[]>): Promise<readonly string[]> {
  const faults: string[] = [];
  const visit = async (name: string) => {
    for (const fault of await look()) faults.push(`${name}: ${fault}`);
  };
  await command(page, 'Visits');
  await page.getByRole('button', { name: 'Resume' }).waitFor();
  await visit('visits');
  await page
    .getByRole('button', { name: /^Done…/ })
    .first()
    .click();
  await visit('an action to close');
  await page.getByRole('button', { name: 'Reduced load…' }).first().click();
  await visit('a reduced load');
  await page.getByRole('button', { name: 'Resume' }).click();
  await page.getByRole('heading', { name: 'Bay A2', exact: true }).waitFor();
  await page.locator('details').evaluateAll((all) => all.forEach((one) => one.toggleAttribute('open', true)));
  await visit('bay of a visit');
  await page.getByRole('button', { name: 'Finish this bay and go on' }).click();
  await page.getByRole('textbox', { name: 'Signed by' }).fill('S. Officer');
  await visit('visit to sign');
  await page.getByRole('button', { name: 'Sign and keep as a record' }).click();
  await page.getByText('This visit is signed').waitFor();
  await visit('signed visit');
  await command(page, 'Records');
  await page.getByRole('button', { name: /^1 Visit/ }).click();
  await page.getByRole('heading', { name: 'Record 1' }).waitFor();
  await visit('record');
  await command(page, 'Paper: print');
  for (const paper of ['Bay sheet', 'Worked calculation', 'Draft load notice']) {
    await choice(page, 'Paper').selectOption({ label: paper });
    await page.getByRole('article', { name: new RegExp(`^${paper},`) }).waitFor();
    await visit(`paper: ${paper}`);
  }
  return faults;
}

test('axe finds nothing on the screens of visits, records and papers, in light and in dark', { timeout: 240_000 }, () =>
  withS10(async (page) => {
    const faults = await walk(page, async () => {
      const light = await axeFindings(page);
      await page.emulateMedia({ colorScheme: 'dark' });
      const dark = await axeFindings(page, ['color-contrast']);
      await page.emulateMedia({ colorScheme: 'light' });
      return [...light, ...dark.map((fault) => `in dark: ${fault}`)];
    });
    expect(faults).toEqual([]);
  }),
);

test('at 640 px nothing is lost on the screens of visits, records and papers', { timeout: 240_000 }, () =>
  withS10(async (page) => expect(await walk(page, () => lostText(page))).toEqual([]), { viewport: { width: 640, height: 900 } }),
);

test('at twice the text size nothing is lost on the screens of visits, records and papers', { timeout: 240_000 }, () =>
  withS10(async (page) => {
    await page.keyboard.press('Control+,');
    await choice(page.getByRole('dialog'), 'Text size').selectOption({ label: '200 %' });
    await eventually(() => page.evaluate(() => getComputedStyle(document.documentElement).fontSize)).toBe('32px');
    await page.keyboard.press('Escape');
    expect(await walk(page, () => lostText(page))).toEqual([]);
  }),
);
