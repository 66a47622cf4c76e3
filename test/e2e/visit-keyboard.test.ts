/** A round of ten bays walked by keyboard alone; the program is killed in the middle and nothing is lost. */
import { mkdtemp, readFile, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, afterEach, expect, test } from 'vitest';
import { readVisit } from '../../src-core/visit/read-visit';
import type { Visit } from '../../src-core/visit/visit';
import { nodeFs } from '../../src-main/store/fs-port';
import { SiteStore } from '../../src-main/store/site-store';
import { siteOf } from '../core/visit/make-run';
import { kill, killAll, serve } from './own-process';
import { closeBrowser, openBrowser } from './program';
import { eventually } from './steps';

let folder = '';

afterEach(async () => {
  killAll();
  await rm(folder, { recursive: true, force: true });
});
afterAll(closeBrowser);

interface Window {
  readonly page: Page;
  readonly strangers: readonly string[];
}

async function windowAt(address: string): Promise<Window> {
  const context = await (await openBrowser()).newContext({ viewport: { width: 1366, height: 768 }, locale: 'en-GB' });
  const page = await context.newPage();
  const strangers: string[] = [];
  page.on('request', (request) => {
    if (request.url().startsWith('http') && new URL(request.url()).origin !== new URL(address).origin) strangers.push(request.url());
  });
  page.setDefaultTimeout(20_000);
  await page.goto(address);
  return { page, strangers };
}

/** What has the focus, as assistive technology names it: its role in short, and its words. */
const focused = (page: Page): Promise<string> =>
  page.evaluate(() => {
    const element = document.activeElement;
    if (!(element instanceof HTMLElement)) return '';
    const labels =
      element instanceof HTMLInputElement || element instanceof HTMLSelectElement || element instanceof HTMLTextAreaElement
        ? element.labels
        : null;
    const group = element.closest('fieldset')?.querySelector('legend')?.textContent ?? '';
    const words = element.getAttribute('aria-label') ?? labels?.[0]?.textContent ?? element.textContent ?? '';
    return `${element instanceof HTMLInputElement && element.type === 'radio' ? `${group} / ` : ''}${words}`.replace(/\s+/g, ' ').trim();
  });

/** Tab, or Shift+Tab, until what has the focus begins with these words. Only keys are pressed. */
async function tabTo(page: Page, words: RegExp, key: 'Tab' | 'Shift+Tab' = 'Tab', most = 150): Promise<void> {
  const seen: string[] = [];
  for (let i = 0; i < most; i++) {
    const now = await focused(page);
    if (words.test(now)) return;
    seen.push(now);
    await page.keyboard.press(key);
  }
  throw new Error(`${words} does not take the focus; ${seen.slice(-30).join(' → ')}`);
}

async function press(page: Page, words: RegExp, key: 'Tab' | 'Shift+Tab' = 'Tab'): Promise<void> {
  await tabTo(page, words, key);
  await page.keyboard.press('Enter');
}

async function openVisits(page: Page, unsaved: boolean): Promise<void> {
  await page.getByRole('button', { name: /^Test depot/ }).waitFor();
  await press(page, /^Test depot/);
  await page.locator('[data-bay]').first().waitFor();
  if (unsaved) {
    await page.getByRole('dialog').waitFor();
    await press(page, /^Take them up/);
  }
  await page.keyboard.press('Control+K');
  await page.keyboard.type('Visits');
  await eventually(() => focused(page)).not.toBe('');
  await press(page, /^Visits: rounds/);
}

const heading = (page: Page, name: string) => eventually(() => focused(page)).toMatch(new RegExp(`^Bay ${name}\\b`));

async function visitOnDisk(): Promise<Visit> {
  const at = join(folder, 'sites/beside/site/visits');
  const [name = ''] = (await readdir(at)).filter((one) => one.endsWith('.json'));
  const reading = readVisit(JSON.parse(await readFile(join(at, name), 'utf8')));
  if (!reading.ok) throw new Error(JSON.stringify(reading.problems));
  return reading.document;
}

/** Everything in order, and on to the next bay. */
async function finishInOrder(page: Page): Promise<void> {
  await press(page, /^All the rest is in order/);
  await press(page, /^Finish this bay and go on/);
}

test('ten bays by keyboard alone, the program killed in the middle: nothing is lost', { timeout: 300_000 }, async () => {
  folder = await mkdtemp(join(tmpdir(), 'tallybeam-round-'));
  const sites = join(folder, 'sites');
  await nodeFs.makeFolder(sites);
  await new SiteStore({ fs: nodeFs, folder: sites, program: '0.1.0' }).add(siteOf({ bays: 10 }));

  const first = await serve(folder);
  const { page, strangers } = await windowAt(first.address);
  await openVisits(page, false);
  await press(page, /^Begin the visit/);
  await heading(page, 'A1');
  for (const name of ['A2', 'A3', 'A4']) {
    // What is answered in bay A2 goes into the site when the bay is finished.
    if (name === 'A3') {
      await tabTo(page, /^Floor anchors/);
      await page.keyboard.press('ArrowLeft');
    }
    await finishInOrder(page);
    await heading(page, name);
  }
  // Bay A4: one answer by arrow keys, a bend, a note. Then the program dies while nobody saves anything.
  await tabTo(page, /^Beam locks/);
  await page.keyboard.press('ArrowLeft');
  expect(await focused(page)).toMatch(/\/ No$/);
  await press(page, /^Record damage/);
  await tabTo(page, /^Bow along the run/);
  await page.keyboard.type('8');
  await page.keyboard.press('Tab');
  await page.keyboard.type('2');
  await tabTo(page, /^Notes/);
  await page.keyboard.type('Aisle blocked until nine');
  await eventually(async () => (await visitOnDisk()).bays[3]?.notes).toBe('Aisle blocked until nine');
  await kill(first.child);
  await page.context().close();

  const second = await serve(folder);
  const after = await windowAt(second.address);
  await openVisits(after.page, true);
  await press(after.page, /^Resume/);
  await eventually(() => after.page.getByRole('heading', { name: 'Bay A4', exact: true }).count()).toBe(1);
  const resumed = await visitOnDisk();
  expect(resumed.bays.map(({ finished }) => finished)).toEqual([true, true, true, ...Array<boolean>(7).fill(false)]);
  expect(resumed.bays[3]).toMatchObject({
    checklist: { locks: 'no' },
    notes: 'Aisle blocked until nine',
    damages: [{ alongMm: 8, acrossMm: 2 }],
  });
  expect(await after.page.getByLabel('Notes').inputValue()).toBe('Aisle blocked until nine');

  await finishInOrder(after.page);
  for (const name of ['A5', 'A6', 'A7', 'A8', 'A9', 'A10']) {
    await heading(after.page, name);
    await finishInOrder(after.page);
  }
  await tabTo(after.page, /^Signed by/);
  await after.page.keyboard.type('R. Walker');
  await press(after.page, /^Sign and keep as a record/);
  await eventually(async () => (await visitOnDisk()).signed?.person).toBe('R. Walker');
  await eventually(() => readFile(join(sites, 'beside/site/records/head.json'), 'utf8').catch(() => '')).toContain('"number":1');
  const signed = await visitOnDisk();
  expect(signed.bays.every(({ finished }) => finished)).toBe(true);
  expect(signed.bays[1]?.checklist.anchors).toBe('no');
  // Finishing bay A2 told the site of its anchors; signing saved that.
  expect(await readFile(join(sites, 'site.tallybeam.json'), 'utf8')).toContain('"anchored":"no"');
  expect(signed.bays[3]).toMatchObject({ notes: 'Aisle blocked until nine', damages: [{ alongMm: 8, acrossMm: 2 }] });
  expect([...strangers, ...after.strangers]).toEqual([]);
});
