/** What cannot be taken gets its own words, at its own field, and changes nothing on disk. */
import { createHash } from 'node:crypto';
import { readdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Locator, Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { SITE_FILE_VERSION, writeSiteFile } from '../../src-core/site/envelope';
import { closeBrowser, openDemo, type Program } from './program';
import { checked, eventually, field, goToBay, plain, selectGoods, type, withProgram } from './steps';

afterAll(closeBrowser);

/** Digest of every file under the folder, but for settings, which are no site's. */
async function digests(folder: string): Promise<Readonly<Record<string, string>>> {
  const entries = await readdir(folder, { recursive: true, withFileTypes: true });
  const paths = entries.filter((entry) => entry.isFile()).map((entry) => join(entry.parentPath, entry.name));
  const sites = paths.filter((path) => !path.startsWith(join(folder, 'own'))).sort();
  return Object.fromEntries(
    await Promise.all(
      sites.map(
        async (path) =>
          [
            path,
            createHash('sha256')
              .update(await readFile(path))
              .digest('hex'),
          ] as const,
      ),
    ),
  );
}

/** The demo with a pallet of soap on level 3 of bay A4 selected; what lies in the folder stays as it is to the end. */
const inDemo = (use: (page: Page) => Promise<void>) =>
  withProgram(async ({ page, sitesFolder }) => {
    await openDemo(page);
    await goToBay(page, 'A4');
    await selectGoods(page, 'a4-l3-g1');
    const before = await digests(sitesFolder);
    expect(Object.keys(before)).toHaveLength(1);
    await use(page);
    expect(await digests(sitesFolder)).toEqual(before);
  });

/** The words that the field itself is described by; null where it is not marked as wrong. */
async function complaintOf(box: Locator): Promise<string | null> {
  if ((await box.getAttribute('aria-invalid')) !== 'true') return null;
  const ids = (await box.getAttribute('aria-describedby'))?.split(' ') ?? [];
  const errors = ids.filter((id) => id.endsWith('-error'));
  return plain((await Promise.all(errors.map((id) => box.page().locator(`[id="${id}"]`).innerText()))).join(' '));
}

/** Types what cannot be taken: the field says why and keeps the text, and nothing counts as changed. */
async function refused(box: Locator, text: string, says: string): Promise<void> {
  await type(box, text);
  await eventually(() => complaintOf(box)).toBe(says);
  expect(await box.inputValue()).toBe(text);
  expect(
    await box
      .page()
      .getByText(/^All changes saved/)
      .isVisible(),
  ).toBe(true);
}

async function openGoods(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Edit these goods…' }).click();
  await field(page, 'Mass without pallet').waitFor();
}

test('a negative mass is refused at its field', () =>
  inDemo(async (page) => {
    await openGoods(page);
    const mass = field(page, 'Mass without pallet');
    await refused(mass, '-5', 'Mass without pallet must be at least 0 kg, not −5 kg. Check the number and its sign.');
    // Escape gives back what stood there.
    await mass.press('Escape');
    expect(await mass.inputValue()).toBe('360');
    expect(await complaintOf(mass)).toBeNull();
  }));

test('a mass where a length belongs, and a length where a mass belongs, are refused with the units that are wanted', () =>
  inDemo(async (page) => {
    await refused(
      field(page, 'From the left upright'),
      '950 kg',
      '“950 kg” is a mass, but a length is wanted here. Type the number alone or with mm, cm, m, in or ft.',
    );
    await field(page, 'From the left upright').press('Escape');
    await openGoods(page);
    await refused(
      field(page, 'Mass without pallet'),
      '1200 mm',
      '“1200 mm” is a length, but a mass is wanted here. Type the number alone or with kg, g, t, lb, oz, short ton or long ton.',
    );
  }));

test('what is no number, has an exponent, two numbers or an uncertain ton is refused, each in its own words', () =>
  inDemo(async (page) => {
    await openGoods(page);
    const mass = field(page, 'Mass without pallet');
    await refused(mass, 'heavy', '“heavy” does not begin with a number. Type a number, alone for kg or with its unit.');
    await refused(mass, '1e3', '“1e3” is written with an exponent. Write the number out in full.');
    await refused(mass, '500 kg 20 kg', '“500 kg 20 kg” holds more than one number. Type one number with one unit.');
    await refused(
      mass,
      '2 tons',
      '“2 tons” may be tonnes (1000 kg), short tons (2000 lb) or long tons (2240 lb). Type t, short ton or long ton.',
    );
    await refused(field(page, 'Width along the beam'), '', 'Width along the beam is empty. Type a number, in mm or with its unit.');
  }));

test('a clear entry and a span of zero are refused', () =>
  inDemo(async (page) => {
    await page.getByRole('button', { name: 'Bay…', exact: true }).click();
    const entry = field(page, 'Clear entry between uprights');
    await refused(entry, '0', 'Clear entry between uprights must be more than 0 mm, not 0 mm. Check the number and its sign.');
    await refused(entry, '-2700', 'Clear entry between uprights must be more than 0 mm, not −2 700 mm. Check the number and its sign.');
    await entry.press('Escape');

    await page.keyboard.press('Control+L');
    await page.getByRole('navigation', { name: 'Libraries' }).getByRole('button', { name: 'Beam types' }).click();
    await refused(field(page, 'Span 1: Span'), '0', 'Span 1: Span must be more than 0 mm, not 0 mm. Check the number and its sign.');
  }));

test('an unknown mass makes level and bay not assessable, names the goods and leads to their field', () =>
  withUnsaved(async (page) => {
    await openGoods(page);
    const mass = field(page, 'Mass without pallet');
    await type(mass, '');
    await checked(page);
    expect(await complaintOf(mass)).toBeNull();
    expect(await mass.getAttribute('placeholder')).toBe('not known');
    await eventually(() => page.locator('section[aria-label="Level 3"] header').innerText()).toMatch(/Not assessable/);
    expect(await page.locator('section[aria-label="Bay A4"] header').innerText()).toMatch(/Not assessable/);
    const toFind = page.getByRole('region', { name: 'To find out' });
    await eventually(() => toFind.innerText()).toMatch(/mass of .*Soap powder in cartons/i);
    await page.getByRole('button', { name: 'Close', exact: true }).first().click();
    await toFind
      .getByRole('button', { name: /^Enter it\s*:.*mass/ })
      .first()
      .click();
    await eventually(() => page.evaluate(() => (document.activeElement as HTMLElement | null)?.dataset['field'])).toBe(
      'unitLoad:soap:goodsKg',
    );
  }));

const findings = async (page: Page): Promise<string> => plain(await page.locator('section[aria-label="Findings: Level 3"]').innerText());

/** An edit that can be made but cannot stand: a verdict, nothing refused, and nothing on disk until it is saved. */
const withUnsaved = (use: (page: Page) => Promise<void>) =>
  withProgram(async ({ page, siteFiles }: Program) => {
    await openDemo(page);
    await goToBay(page, 'A4');
    await selectGoods(page, 'a4-l3-g1');
    const before = await siteFiles();
    await use(page);
    expect(await page.getByText('Changes not saved yet').isVisible()).toBe(true);
    expect(await siteFiles()).toEqual(before);
  });

async function notPossible(page: Page, says: string): Promise<void> {
  await checked(page);
  await eventually(() => findings(page)).toContain(says);
  expect(await page.locator('section[aria-label="Level 3"] header').innerText()).toMatch(/Not possible/);
  expect(await page.locator('section[aria-label="Bay A4"] header').innerText()).toMatch(/Not possible/);
}

test('goods that reach off the beam are not possible, at either end', () =>
  withUnsaved(async (page) => {
    const at = field(page, 'From the left upright');
    await type(at, '-40');
    await notPossible(page, 'Soap powder in cartons reaches 40 mm past the left end of level 3. Move it to the right.');
    await selectGoods(page, 'a4-l3-g2');
    await type(at, '2000');
    await notPossible(page, 'Soap powder in cartons reaches 100 mm past the right end of level 3. Move it to the left.');
    expect(await page.locator('section[aria-label="Level 3"]').innerText()).toContain('goods on this level cannot stand');
  }));

test('a place in other goods is refused with the millimetres in the way; goods made wider than their place are not possible', () =>
  withUnsaved(async (page) => {
    const at = field(page, 'From the left upright');
    await refused(
      at,
      '1500',
      'Soap powder in cartons would stand 475 mm in Soap powder in cartons on bay A4, level 3. Nothing was moved. Choose a free place, or have neighbours pushed apart.',
    );
    await at.press('Escape');
    await page.getByRole('button', { name: 'Edit these goods…' }).click();
    await type(field(page, 'Width along the beam'), '1800');
    await notPossible(page, 'Soap powder in cartons and Soap powder in cartons stand in each other by 50 mm. Move one of them.');
  }));

test('goods whose centre of mass lies beyond a beam would tip and are not possible', () =>
  withUnsaved(async (page) => {
    await type(field(page, 'Towards the front'), '900');
    await notPossible(page, 'Soap powder in cartons would tip: its centre of mass lies');
    expect(await findings(page)).toMatch(/beyond the middle of the front beam\. Move it to the rear\./);
  }));

const sha256 = (text: string): string => createHash('sha256').update(text).digest('hex');
const FACTS = { program: '0.1.0', savedAt: '2026-05-04T08:00:00.000Z' };

/** Brings in a text as a file and reads the dialog that refuses it; the folder stays as it was. */
const bringIn = (text: (demo: string) => string, use: (dialog: Locator, page: Page) => Promise<void>) =>
  withProgram(async ({ page, sitesFolder, siteFiles }) => {
    await openDemo(page);
    await checked(page);
    const [demo = ''] = (await siteFiles()).values();
    await page.getByRole('button', { name: 'Halverwick depot (demo)' }).click();
    const chooser = page.getByLabel('Site file to bring in');
    await chooser.waitFor({ state: 'attached' });
    const before = await digests(sitesFolder);
    await chooser.setInputFiles({ name: 'depot.json', mimeType: 'application/json', buffer: Buffer.from(text(demo)) });
    const dialog = page.getByRole('dialog');
    await dialog.waitFor();
    await use(dialog, page);
    expect(await digests(sitesFolder)).toEqual(before);
    expect(await page.locator('main li').count()).toBe(1);
  });

const wrongWith = (text: (demo: string) => string, says: RegExp) =>
  bringIn(text, async (dialog) => {
    expect(await dialog.getByRole('heading').innerText()).toBe('depot.json cannot be opened');
    expect(await dialog.innerText()).toContain('The file was left as it is.');
    expect(await dialog.locator('ol').innerText()).toMatch(says);
  });

test('a file that is not JSON is refused as no site file', () =>
  wrongWith(() => 'Bay;Level;Mass\nA1;1;500\n', /^Is no site file: it is not JSON .*Choose a file that ends in \.tallybeam\.json\.$/));

test('a file that breaks off is refused as damaged', () =>
  wrongWith((demo) => demo.slice(0, 20_000), /^Breaks off or is damaged .*Take an earlier state of the site or a copy of the file\.$/));

test('a file of a newer version is refused by its version', () =>
  wrongWith(
    (demo) => {
      const { site } = JSON.parse(demo) as { site: unknown };
      return writeSiteFile(JSON.stringify(site), FACTS, sha256, SITE_FILE_VERSION + 1);
    },
    new RegExp(`version ${SITE_FILE_VERSION + 1}\\b`),
  ));

test('a file with a mass below zero in it is refused with the place of the fault', () =>
  wrongWith((demo) => demo.replace('"goodsKg":360', '"goodsKg":-360'), /unitLoads\[1\]\.goodsKg.*-360/));

test('a file that does not match its checksum is brought in only knowingly', () =>
  bringIn(
    (demo) => demo.replace('"goodsKg":360', '"goodsKg":160'),
    async (dialog, page) => {
      expect(await dialog.getByRole('heading').innerText()).toBe('depot.json is not as it was saved');
      expect(await dialog.innerText()).toContain('Its checksum does not match: it was changed outside the program, or damaged on the way.');
      await dialog.getByRole('button', { name: 'Leave it' }).click();
      await page.getByRole('heading', { name: 'Sites' }).waitFor();
    },
  ));
