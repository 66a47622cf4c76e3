/** A round handed from one machine to another and back: exported, brought in, resumed, joined; by mouse and by keys. */
import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { unzipSync } from 'fflate';
import { afterAll, afterEach, expect, test } from 'vitest';
import { startVisit } from '../../src-core/visit/visit';
import { attachPhoto } from '../../src-core/visit/edits';
import { readVisit, writeVisit } from '../../src-core/visit/read-visit';
import { BesideStore } from '../../src-main/store/beside-store';
import { foldersIn } from '../../src-main/store/file-names';
import { nodeFs } from '../../src-main/store/fs-port';
import { RecordStore } from '../../src-main/store/record-store';
import { SiteStore } from '../../src-main/store/site-store';
import { siteOf } from '../core/visit/make-run';
import { recordOf } from '../main/make-package';
import { axeFindings, closeBrowser } from './program';
import { command, eventually, plain, withProgram } from './steps';

const folders: string[] = [];
const newFolder = async (): Promise<string> => {
  const folder = await mkdtemp(join(tmpdir(), 'tallybeam-packages-'));
  folders.push(folder);
  return folder;
};
afterEach(async () => {
  for (const folder of folders.splice(0)) await rm(folder, { recursive: true, force: true });
});
afterAll(closeBrowser);

/** One pixel. */
const PNG = 'iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAYAAAAfFcSJAAAADUlEQVR42mNk+M9QDwADhgGAWjR9awAAAABJRU5ErkJggg==';

/** A sites folder with a round of two bays that nobody has walked yet, a photo and two records. */
async function office(): Promise<string> {
  const folder = await newFolder();
  await new SiteStore({ fs: nodeFs, folder, program: '0.1.0' }).add(siteOf({ bays: 2 }));
  const beside = new BesideStore(nodeFs, foldersIn(folder));
  const { file } = await beside.addPhoto({ siteId: 'site', photoId: 'p1', base64: PNG });
  const bays = ['A-bay-1', 'A-bay-2'].map((bayId) => ({ runId: 'run-A', bayId }));
  const round = startVisit({ id: 'v1', siteId: 'site', name: 'Week 18', kind: 'weekly', person: 'R. Walker', started: '2026-05-04', bays });
  const visit = attachPhoto(round, 'A-bay-1', { id: 'p1', file, original: 'IMG 1.png', taken: '', note: '' });
  await beside.saveVisit({ siteId: 'site', visitId: 'v1', body: writeVisit(visit), baseRevision: null });
  const records = new RecordStore({ fs: nodeFs, beside, program: '0.1.0', now: () => new Date() });
  for (const n of [1, 2]) await records.append(recordOf(n, 'site'));
  return folder;
}

const said = (page: Page) => page.locator('p[role="status"][aria-live="polite"]').first();

async function saved(page: Page, press: () => Promise<void>): Promise<Buffer> {
  const download = page.waitForEvent('download');
  await press();
  const file = await download;
  expect(file.suggestedFilename()).toBe('Test-depot.tallybeam.zip');
  return readFile(await file.path());
}

const bringIn = (page: Page, buffer: Buffer, name = 'round.tallybeam.zip') =>
  page.getByLabel('Site file to bring in').setInputFiles({ name, mimeType: 'application/zip', buffer });

async function openSite(page: Page): Promise<void> {
  await page
    .getByRole('button', { name: /^Test depot/ })
    .first()
    .click();
  await page.locator('[data-bay]').first().waitFor();
}

/** What was done is said, and put away by its button. */
async function done(page: Page): Promise<string> {
  const dialog = page.getByRole('dialog', { name: 'Brought in' });
  const words = plain(await dialog.innerText());
  await dialog.getByRole('button', { name: 'Go on' }).press('Enter');
  await page.getByRole('heading', { name: 'Visits' }).waitFor();
  return words;
}

async function notesOf(folder: string): Promise<readonly string[]> {
  const reading = readVisit(JSON.parse(await readFile(join(folder, 'beside/site/visits/v1.json'), 'utf8')));
  return reading.ok ? reading.document.bays.map(({ notes }) => notes) : [];
}

test('a round that was begun at the office is resumed on the laptop and comes back', { timeout: 180_000 }, async () => {
  const [atOffice, onLaptop] = [await office(), await newFolder()];
  let begun: Buffer = Buffer.alloc(0);
  let walked: Buffer = Buffer.alloc(0);

  await withProgram(
    async ({ page }) => {
      await openSite(page);
      begun = await saved(page, () => command(page, 'Export with visits and records'));
      await eventually(() => said(page).textContent()).toMatch(/^Exported 1 visit, 1 photo and 2 records, /);
    },
    {},
    atOffice,
  );
  // Whoever has no Tallybeam opens it as any ZIP.
  expect(Object.keys(unzipSync(begun))).toEqual([
    'listing.json',
    'site.tallybeam.json',
    'visits/v1.json',
    'photos/p1.png',
    'records/chain.jsonl',
    'records/000001.json',
    'records/000002.json',
  ]);

  await withProgram(
    async ({ page }) => {
      await bringIn(page, begun, 'as-it-came.json');
      expect(await done(page)).toContain('2 records are added.');
      await eventually(() => said(page).textContent()).toContain('Brought in. Test depot is brought in as a site of its own.');
      await page.getByText('2 of 2 bays left').waitFor();
      await page.getByRole('button', { name: 'Week 18' }).click();
      const notes = page.getByRole('textbox', { name: /^Notes/ }).first();
      await notes.fill('Seen on the laptop');
      await notes.press('Tab');
      await eventually(() => notesOf(onLaptop)).toEqual(['Seen on the laptop', '']);
      await command(page, 'Records');
      await page.getByText('All 2 are as they were written.').waitFor();
      // By the mouse, and by the button of the screen.
      walked = await saved(page, () => page.getByRole('button', { name: 'Export with visits and records…' }).click());
    },
    {},
    onLaptop,
  );

  await withProgram(
    async ({ page, siteFiles }) => {
      await page
        .getByRole('button', { name: /^Test depot/ })
        .first()
        .waitFor();
      const spoilt = Buffer.from(walked);
      const at = spoilt.indexOf('Seen on the laptop');
      spoilt[at] = (spoilt[at] ?? 0) ^ 1;
      await bringIn(page, spoilt);
      await eventually(() => page.getByRole('alert').textContent()).toContain('– visit v1: checksum differs\nNothing of it was taken.');

      await bringIn(page, walked);
      const dialog = page.getByRole('dialog', { name: 'Test depot is here already' });
      await dialog.waitFor();
      const words = plain(await dialog.innerText());
      expect(words).toContain('with 1 visit, 1 photo and 2 records');
      expect(words).toContain('2 records are here already, verified and the same.');
      expect(words).toContain('In another state here: Week 18');
      expect(await axeFindings(page, [], 'dialog')).toEqual([]);
      expect(await notesOf(atOffice)).toEqual(['', '']);

      // By keys alone: the other answer of the two, then the button that does it.
      await page.keyboard.press('ArrowDown');
      expect(await dialog.getByRole('radio', { name: /^Take the one from the file/ }).isChecked()).toBe(true);
      await page.keyboard.press('Tab');
      await page.keyboard.press('Enter');
      expect(await done(page)).toContain('2 records are here already, verified and the same.');
      await eventually(() => said(page).textContent()).toContain('“Week 18” takes the place of its state here, which is put aside.');
      expect(await notesOf(atOffice)).toEqual(['Seen on the laptop', '']);
      expect((await siteFiles()).size).toBe(1);
    },
    {},
    atOffice,
  );
});

test('records made both here and there stand as two lists, each verified', { timeout: 120_000 }, async () => {
  const [here, there] = [await office(), await newFolder()];
  let file: Buffer = Buffer.alloc(0);
  const append = async (folder: string, n: string) => {
    const beside = new BesideStore(nodeFs, foldersIn(folder));
    await new RecordStore({ fs: nodeFs, beside, program: '0.1.0', now: () => new Date() }).append(recordOf(n, 'site'));
  };
  await withProgram(
    async ({ page }) => {
      await openSite(page);
      file = await saved(page, () => command(page, 'Export with visits and records'));
    },
    {},
    here,
  );
  await append(here, 'here');
  await withProgram(
    async ({ page }) => {
      await bringIn(page, file);
      await done(page);
      await append(there, 'there');
      file = await saved(page, () => command(page, 'Export with visits and records'));
    },
    {},
    there,
  );
  await withProgram(
    async ({ page }) => {
      await page.setViewportSize({ width: 640, height: 400 });
      await bringIn(page, file);
      const dialog = page.getByRole('dialog', { name: 'Test depot is here already' });
      await dialog.waitFor();
      expect(await dialog.innerText()).toContain('Records were made both here and there since record 2');
      expect(await page.evaluate(() => document.documentElement.scrollWidth <= window.innerWidth)).toBe(true);
      await dialog.getByRole('button', { name: 'Bring visits and records in' }).click();
      await done(page);
      await page.setViewportSize({ width: 1440, height: 900 });
      await command(page, 'Records');
      await page.getByText('All 3 are as they were written.').waitFor();
      const elsewhere = page.getByRole('region', { name: 'Records made elsewhere' });
      expect(await elsewhere.innerText()).toContain('Made elsewhere, after record 2');
      await elsewhere.getByRole('button', { name: /Check there/ }).waitFor();
      expect(await elsewhere.getByRole('button').count()).toBe(1);
      expect(await axeFindings(page, [], '.records')).toEqual([]);
    },
    {},
    here,
  );
});
