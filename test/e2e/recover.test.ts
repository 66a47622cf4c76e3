/** The program is killed in the middle of editing; two windows work on one site: nothing is lost, nothing overwritten silently. */
import { mkdtemp, readdir, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeEach, expect, test } from 'vitest';
import { kill, killAll, serve } from './own-process';
import { closeBrowser, openBrowser, openDemo } from './program';
import { checked, command, eventually, goods, goToBay, plain, save, selectGoods, withProgram } from './steps';

const PALLET = 'a4-l3-g1';
const NAME = 'Halverwick depot (demo)';

let folder = '';
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'tallybeam-kill-'));
});
afterEach(async () => {
  killAll();
  await rm(folder, { recursive: true, force: true });
});
afterAll(closeBrowser);

/** A window of its own on the program at this address. */
async function windowAt(address: string): Promise<Page> {
  const context = await (await openBrowser()).newContext({ viewport: { width: 1440, height: 900 }, locale: 'en-GB' });
  const page = await context.newPage();
  page.setDefaultTimeout(30_000);
  await page.goto(address);
  return page;
}

async function textsIn(part: string, ending: string): Promise<string> {
  const names = await readdir(join(folder, 'sites', part)).catch(() => []);
  const wanted = names.filter((name) => name.endsWith(ending)).sort();
  return (await Promise.all(wanted.map((name) => readFile(join(folder, 'sites', part, name), 'utf8')))).join('\n');
}
const siteText = () => textsIn('', '.tallybeam.json');
const journalText = () => textsIn('journal', '.journal');

/** Opens the demo, saves one edit, makes two more that reach the journal, and kills the program while the next is made. */
async function killedWhileEditing(): Promise<{ readonly page: Page; readonly saved: string }> {
  const { child, address } = await serve(folder);
  const page = await windowAt(address);
  await openDemo(page);
  await goToBay(page, 'A4');
  await selectGoods(page, PALLET);
  await page.getByRole('button', { name: 'Turn left for right' }).click();
  await save(page);
  const saved = await siteText();
  await goods(page, PALLET).press('Alt+ArrowRight');
  await page.getByRole('button', { name: 'Turn left for right' }).click();
  // Edits are in the journal within two seconds; the last one of these is what is looked for.
  await eventually(journalText).toContain('Turn Soap powder in cartons left for right');
  const last = goods(page, PALLET).press('Alt+ArrowRight');
  await kill(child);
  await last;
  expect(await siteText()).toBe(saved);
  return { page, saved };
}

test('edits that were not saved when the program was killed are offered back, and taken up they are the edited site', async () => {
  const { page: orphan, saved } = await killedWhileEditing();
  // The page that stayed open says that it is not saved, and why.
  await orphan.keyboard.press('Control+S');
  await orphan.getByText('The program cannot be reached').first().waitFor();
  expect(
    await orphan
      .getByText(/^Not saved/)
      .first()
      .isVisible(),
  ).toBe(true);
  await orphan.context().close();

  const { address } = await serve(folder);
  const page = await windowAt(address);
  await page.getByRole('button', { name: NAME, exact: true }).click();
  const offer = page.getByRole('dialog', { name: 'Changes from before were not saved' });
  await offer.waitFor();
  // Edits made within half a second share one line.
  const listed = (await offer.locator('li').allInnerTexts()).join('; ');
  expect(listed).toMatch(/^Move Soap powder in cartons; Turn Soap powder in cartons left for right/);
  // Nothing is taken over unasked.
  expect(await siteText()).toBe(saved);
  await offer.getByRole('button', { name: 'Take them up' }).click();
  await page.getByText('Changes not saved yet').waitFor();
  await goToBay(page, 'A4');
  expect(plain((await goods(page, PALLET).getAttribute('aria-label')) ?? '')).toMatch(/(175|275) mm from the left upright/);

  const before = siteIn(saved);
  await save(page);
  const after = siteIn(await siteText());
  const moved = placementIn(after, PALLET);
  // At most the edit of the last moment is lost.
  expect([175, 275]).toContain(moved['atMm']);
  expect(moved['mirrored']).toBe(false);
  const [was, is] = [JSON.stringify(before), JSON.stringify(after)];
  expect(is.replace(JSON.stringify(moved), '')).toBe(was.replace(JSON.stringify(placementIn(before, PALLET)), ''));

  // Undo takes the recovered changes back, and once saved there is nothing left to offer.
  await page.getByRole('button', { name: 'Undo', exact: true }).click();
  await eventually(() =>
    goods(page, PALLET)
      .getAttribute('aria-label')
      .then((text) => plain(text ?? '')),
  ).toMatch(/, 75 mm from/);
  await save(page);
  expect(siteIn(await siteText())).toEqual(before);
  await page.context().close();
});

test('recovered edits that are left out stay out', async () => {
  const { page: orphan, saved } = await killedWhileEditing();
  await orphan.context().close();
  const { address } = await serve(folder);
  const page = await windowAt(address);
  await page.getByRole('button', { name: NAME, exact: true }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Leave them out' }).click();
  await checked(page);
  expect(await page.getByText(/^All changes saved/).isVisible()).toBe(true);
  await eventually(journalText).not.toContain('Turn Soap powder');
  expect(await siteText()).toBe(saved);
  await command(page, 'All sites');
  await page.getByRole('button', { name: NAME, exact: true }).click();
  await page.locator('[data-bay]').first().waitFor();
  expect(await page.getByRole('dialog').count()).toBe(0);
  await page.context().close();
});

test('changes that another page has not saved are told as that page’s, and stay its own', async () => {
  await withProgram(async ({ page: first, serving, sitesFolder, siteFiles }) => {
    await openDemo(first);
    await goToBay(first, 'A4');
    await selectGoods(first, PALLET);
    await goods(first, PALLET).press('ArrowRight');
    await eventually(async () => (await readdir(join(sitesFolder, 'journal')).catch(() => [])).length).toBe(1);
    const second = await first.context().newPage();
    second.setDefaultTimeout(30_000);
    await second.goto(serving.address);
    await second.getByRole('button', { name: NAME, exact: true }).click();
    const question = second.getByRole('dialog', { name: 'Another page has changes that are not saved' });
    expect(await question.innerText()).toContain('If that page is still open, go on there');
    await second.keyboard.press('Escape');
    await question.waitFor({ state: 'detached' });
    await save(first);
    const [saved = ''] = (await siteFiles()).values();
    expect(placementIn(siteIn(saved), PALLET)).toMatchObject({ atMm: 85 });
  });
});

interface AnyPart {
  readonly [key: string]: unknown;
}
const siteIn = (text: string): unknown => (JSON.parse(text) as { site: unknown }).site;

/** The placement of this id, wherever it stands in the site. */
function placementIn(part: unknown, id: string): AnyPart {
  const found = search(part, id);
  if (found === null) throw new Error(`there is no ${id} in the site`);
  return found;
}
function search(part: unknown, id: string): AnyPart | null {
  if (typeof part !== 'object' || part === null) return null;
  const here = part as AnyPart;
  if (here['id'] === id) return here;
  for (const child of Object.values(here)) {
    const found = search(child, id);
    if (found !== null) return found;
  }
  return null;
}

/** Two windows on the demo: the first has moved the pallet to 85 mm and saved, the second has turned it and tries to. */
const twoWindows = (use: (second: Page, first: Page, saved: string, files: () => Promise<ReadonlyMap<string, string>>) => Promise<void>) =>
  withProgram(async ({ page: first, serving, siteFiles, complaints }) => {
    await openDemo(first);
    await goToBay(first, 'A4');
    const second = await first.context().newPage();
    second.setDefaultTimeout(30_000);
    second.on('pageerror', (error) => complaints.push(`error in the second window: ${error.message}`));
    await second.goto(serving.address);
    await second.getByRole('button', { name: NAME, exact: true }).click();
    await second.locator('[data-bay]').first().waitFor();
    await goToBay(second, 'A4');

    await selectGoods(first, PALLET);
    await goods(first, PALLET).press('ArrowRight');
    await save(first);
    const [saved = ''] = (await siteFiles()).values();
    expect(placementIn(siteIn(saved), PALLET)).toMatchObject({ atMm: 85, mirrored: false });

    await selectGoods(second, PALLET);
    await second.getByRole('button', { name: 'Turn left for right' }).click();
    await second.keyboard.press('Control+S');
    await second.getByText('Not saved: changed elsewhere').waitFor();
    expect([...(await siteFiles()).values()]).toEqual([saved]);
    await second.getByRole('dialog', { name: `${NAME} was changed elsewhere` }).waitFor();
    await use(second, first, saved, siteFiles);
  });

test('a save over a state that another window saved is asked about, and can become a copy', () =>
  twoWindows(async (second, _first, saved, files) => {
    await second.getByRole('button', { name: 'Save mine as a copy' }).click();
    await second.getByRole('heading', { name: `${NAME} (copy)` }).waitFor();
    await second
      .getByText(/^All changes saved/)
      .first()
      .waitFor();
    const texts = [...(await files()).values()];
    expect(texts).toHaveLength(2);
    expect(texts).toContain(saved);
    const copy = texts.find((text) => text !== saved) ?? '';
    expect(placementIn(siteIn(copy), PALLET)).toMatchObject({ atMm: 75, mirrored: true });
  }));

test('a save over another window’s state is made when asked for, and that state stays among the earlier ones', () =>
  twoWindows(async (second, first, saved, files) => {
    await second.getByRole('button', { name: 'Put mine in its place' }).click();
    await second
      .getByText(/^All changes saved/)
      .first()
      .waitFor();
    const texts = [...(await files()).values()];
    expect(texts).toHaveLength(1);
    expect(placementIn(siteIn(texts[0] ?? ''), PALLET)).toMatchObject({ atMm: 75, mirrored: true });
    expect(texts[0]).not.toBe(saved);
    await command(second, 'Earlier states');
    await second.locator('.history li button').first().click();
    await second.locator('.history .changes li').first().waitFor();
    expect(await second.locator('.history .changes').innerText()).not.toContain('Nothing has changed');

    // The first window is asked in its turn.
    await goods(first, PALLET).press('ArrowRight');
    await first.keyboard.press('Control+S');
    await first.getByText('Not saved: changed elsewhere').waitFor();
    expect([...(await files()).values()]).toEqual(texts);
  }));

test('the other window’s state can be opened in place of one’s own', () =>
  twoWindows(async (second, _first, saved, files) => {
    await second.getByRole('button', { name: 'Open the other, drop mine' }).click();
    await second.getByRole('dialog').waitFor({ state: 'detached' });
    await second.locator('[data-bay]').first().waitFor();
    await goToBay(second, 'A4');
    await eventually(async () => plain((await goods(second, PALLET).getAttribute('aria-label')) ?? '')).toMatch(/, 85 mm from/);
    expect(await second.getByText(/^All changes saved/).isVisible()).toBe(true);
    expect([...(await files()).values()]).toEqual([saved]);
  }));
