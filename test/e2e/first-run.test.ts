/** The first minutes with the program: an empty list, the demo, a site of one's own. */
import { afterAll, expect, test } from 'vitest';
import { FOOTER_CAUTIONS } from '../../src-core/words/cautions';
import { closeBrowser, openDemo } from './program';
import { checked, command, eventually, withProgram } from './steps';

afterAll(closeBrowser);

const CAUTIONS = FOOTER_CAUTIONS.join(' ');

test('a fresh folder shows an empty list that says how to begin', () =>
  withProgram(async ({ page, sitesFolder, siteFiles }) => {
    await page.getByRole('heading', { name: 'Nothing here yet' }).waitFor();
    const text = await page.locator('main').innerText();
    expect(text).toContain('name a site, lay out a run of bays with the ratings on its load notice, and put goods on a level');
    expect(text).toContain(sitesFolder);
    expect(await page.getByRole('contentinfo').innerText()).toBe(CAUTIONS);
    expect((await siteFiles()).size).toBe(0);
  }));

test('the demo opens from the list with a verdict on every bay, and a reload finds it in the list', () =>
  withProgram(async ({ page, siteFiles }) => {
    await openDemo(page);
    await checked(page);
    const bays = page.locator('[data-bay]');
    expect(await bays.count()).toBe(5);
    await eventually(async () =>
      (await bays.evaluateAll((tabs) => tabs.map((tab) => tab.getAttribute('aria-label') ?? ''))).filter((name) =>
        /, (Within|Close|Over|Not assessable|Not possible)$/.test(name),
      ),
    ).toHaveLength(5);
    // In words on the bay and on its level, not in colour alone.
    expect(await page.locator('section[aria-label="Bay A1"] header').innerText()).toMatch(/Within/);
    expect([...(await siteFiles()).keys()]).toHaveLength(1);

    await page.reload();
    const entry = page.getByRole('button', { name: 'Halverwick depot (demo)', exact: true });
    await entry.waitFor();
    expect(await page.locator('main li').innerText()).toMatch(/14 bays/);
    await entry.click();
    await page.locator('[data-bay]').first().waitFor();
    await checked(page);
    expect(
      await page
        .getByText(/^All changes saved/)
        .first()
        .isVisible(),
    ).toBe(true);
  }));

test('the cautions stand under every screen', () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    const screens = [
      'Run elevation with frame loads',
      'Layout of runs and bays',
      'Libraries: goods, notices, ratings',
      'Rules',
      'Earlier states',
      'Help, cautions and about',
    ];
    const foot = page.getByRole('contentinfo');
    expect(await foot.innerText()).toBe(CAUTIONS);
    for (const screen of screens) {
      await command(page, screen);
      await page.getByRole('button', { name: '← Back to the bay' }).waitFor();
      expect(await foot.innerText(), screen).toBe(CAUTIONS);
      expect(await foot.isVisible(), screen).toBe(true);
    }
    await page.getByRole('button', { name: '← Back to the bay' }).click();
    await page.locator('[data-bay]').first().waitFor();
    // On the bay itself they are in sight without scrolling.
    const box = await foot.boundingBox();
    expect(box && box.y + box.height).toBeLessThanOrEqual(900);
  }));

test('a new site is made by typing its name, is on disk at once, and asks for its first run', () =>
  withProgram(async ({ page, siteFiles }) => {
    await page.getByRole('button', { name: 'Make site' }).click();
    const name = page.getByLabel('Name of a new site');
    expect(await name.getAttribute('aria-invalid')).toBe('true');
    const error = await name.getAttribute('aria-describedby');
    expect(await page.locator(`#${error}`).innerText()).toBe('The site has no name. Type the name of the depot or building.');
    expect((await siteFiles()).size).toBe(0);

    await name.fill('Quayside store');
    await name.press('Enter');
    await page.getByRole('heading', { name: 'Quayside store has no racks yet' }).waitFor();
    expect(await page.getByRole('button', { name: 'Lay out a run…' }).isVisible()).toBe(true);
    const files = [...(await siteFiles()).values()];
    expect(files).toHaveLength(1);
    expect((JSON.parse(files[0] ?? '') as { site: { name: string } }).site.name).toBe('Quayside store');

    await page.reload();
    await page.getByRole('button', { name: 'Quayside store', exact: true }).click();
    await page.getByRole('heading', { name: 'Quayside store has no racks yet' }).waitFor();
  }));
