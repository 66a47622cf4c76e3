/** Goods put on, turned, changed, taken off and brought back; what the page says of it as it happens. */
import type { Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { closeBrowser, openDemo } from './program';
import { checked, choice, eventually, field, goods, goToBay, goToLevel, plain, save, selectGoods, type, withProgram } from './steps';

afterAll(closeBrowser);

const inLevel = (name: string, number: number, use: (page: Page) => Promise<void>) =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await goToBay(page, name);
    await goToLevel(page, number);
    await use(page);
  });

const level = async (page: Page): Promise<string> => plain(await page.locator('section[aria-label^="Level "]').first().innerText());
const preview = async (page: Page): Promise<string> => plain(await page.locator('form.add figure').innerText());
const labels = async (page: Page): Promise<string[]> =>
  (await page.locator('[data-placement]').evaluateAll((all) => all.map((one) => one.getAttribute('aria-label') ?? ''))).map(plain);

/**
 * Each shape with 400 kg on a width of 800 mm, what is typed besides, and what the preview says.
 * Figures by hand: mass over width; a trapezoid 1 : 2 has its centre at L/3 · (1 + 2·2)/(1 + 2) and its
 * greatest intensity at 4/3 of the mean; masses over the widths of columns and bearers.
 */
const SHAPES: readonly {
  readonly shape: string;
  readonly typed: Readonly<Record<string, string>>;
  readonly says: string;
  readonly areas: number;
  readonly arrows: number;
}[] = [
  {
    shape: 'even over its width',
    typed: {},
    says: '400 kg in all; up to 500 kg/m; centre of mass 400 mm from the left edge.',
    areas: 1,
    arrows: 0,
  },
  {
    shape: 'stepped, in columns',
    typed: { 'Column 1: Mass': '300', 'Column 2: Mass': '100' },
    says: '400 kg in all; up to 750 kg/m; centre of mass 300 mm from the left edge.',
    areas: 2,
    arrows: 0,
  },
  {
    shape: 'sloped',
    typed: { 'Right over left': '2' },
    says: '400 kg in all; up to 667 kg/m; centre of mass 444 mm from the left edge.',
    areas: 1,
    arrows: 0,
  },
  {
    shape: 'profile of the pile',
    typed: { 'Point 1: Height': '1 m', 'Point 2: Height': '50 cm' },
    says: '400 kg in all; up to 667 kg/m; centre of mass 356 mm from the left edge.',
    areas: 1,
    arrows: 0,
  },
  {
    shape: 'on bearers',
    typed: { 'Bearer 1: Share': '0.25', 'Bearer 2: Share': '0.75' },
    says: '400 kg in all; up to 3 000 kg/m; centre of mass 575 mm from the left edge.',
    areas: 2,
    arrows: 0,
  },
  {
    shape: 'on feet',
    typed: { 'Foot 2: From the left edge': '700' },
    says: '400 kg in all; up to 215 kg on one foot; centre of mass 400 mm from the left edge.',
    areas: 0,
    arrows: 2,
  },
];

test('goods of each bearing shape are previewed as they are typed and stand on the level with their mass', () =>
  inLevel('A5', 3, async (page) => {
    for (const { shape, typed, says, areas, arrows } of SHAPES) {
      await page.getByRole('button', { name: 'Add goods…' }).click();
      await choice(page, 'Goods$').selectOption({ label: 'new goods…' });
      const form = page.locator('form.add');
      await type(field(form, 'Name'), `Goods ${shape}`);
      await type(field(form, 'Width along the beam'), '800');
      await type(field(form, 'Depth'), '1200');
      await type(field(form, 'Height with pallet'), '1200');
      await eventually(() => preview(page)).toContain('Shape only: the mass is not known yet.');
      await type(field(form, 'Mass without pallet'), '400');
      await choice(form, 'Stands on the beams').selectOption({ label: shape });
      for (const [label, text] of Object.entries(typed)) await type(field(form, label), text);
      await eventually(() => preview(page), shape).toBe(says);
      expect(await form.locator('figure path.area').count(), shape).toBe(areas);
      expect(await form.locator('figure path.arrow').count(), shape).toBe(arrows);

      await form.getByRole('button', { name: 'Put on this level' }).click();
      await eventually(() => labels(page)).toContain(`Goods ${shape}, 400 kg, 75 mm from the left upright`);
      await checked(page);
      expect(await level(page), shape).toContain('carries 400 kg');
      expect(await level(page), shape).toContain('resultant 400 kg at');
      await page.getByRole('button', { name: 'Done' }).click();
      await page.getByRole('button', { name: 'Take off' }).click();
      await eventually(async () => (await labels(page)).some((one) => one.startsWith(`Goods ${shape}`))).toBe(false);
    }
  }));

test('goods turned left for right press on the other end of the beams', () =>
  inLevel('C1', 1, async (page) => {
    const reactions = async () =>
      (await page.locator('section[aria-label="Level 1"] svg text:not(.note)').allTextContents())
        .map(plain)
        .filter((text) => /^[\d. ]+ kg$/.test(text))
        .slice(0, 2);
    await checked(page);
    const before = await reactions();
    expect(before).toHaveLength(2);
    expect(before[0]).not.toBe(before[1]);
    await selectGoods(page, 'c1-l1-g1');
    await goods(page, 'c1-l1-g1').press('m');
    await eventually(reactions).toEqual(before.toReversed());
    expect(await page.getByRole('button', { name: 'Turn left for right' }).getAttribute('aria-pressed')).toBe('true');
  }));

test('numbers are edited in place, and verdict, totals and saved state follow', () =>
  inLevel('A4', 1, async (page) => {
    const state = page.locator('header .saved');
    expect(await state.innerText()).toMatch(/^All changes saved/);
    expect(await level(page)).toMatch(/^Level 1\s+Within/);
    await selectGoods(page, 'a4-l1-g1');
    await page.getByRole('button', { name: 'Edit these goods…' }).click();
    // Three pallets of tomatoes on the level, 25 kg of pallet each.
    await type(field(page, 'Mass without pallet'), '1.1 t');
    await eventually(() => level(page)).toContain('carries 3 375 kg');
    await checked(page);
    await eventually(() => level(page)).toMatch(/^Level 1\s+Over/);
    expect(await field(page, 'Mass without pallet').inputValue()).toBe('1100');
    expect(await state.innerText()).toBe('Changes not saved yet');
    expect(await page.title()).toMatch(/^• /);

    await page.getByRole('button', { name: 'Undo', exact: true }).click();
    await eventually(() => level(page)).toContain('carries 2 310 kg');
    await checked(page);
    await eventually(() => level(page)).toMatch(/^Level 1\s+Within/);
    expect(await state.innerText()).toMatch(/^All changes saved/);
    await page.getByRole('button', { name: 'Redo', exact: true }).click();
    await eventually(() => level(page)).toContain('carries 3 375 kg');
    await save(page);
    expect(await state.innerText()).toMatch(/^All changes saved/);
    // Undo goes back past a save, and says that this is not what lies on disk.
    await page.getByRole('button', { name: 'Undo', exact: true }).click();
    await eventually(() => state.innerText()).toBe('Changes not saved yet');
  }));

test('goods taken off by key come back by undo, and go again by redo', () =>
  inLevel('A4', 3, async (page) => {
    await selectGoods(page, 'a4-l3-g2');
    await goods(page, 'a4-l3-g2').press('Delete');
    await goods(page, 'a4-l3-g2').waitFor({ state: 'detached' });
    await eventually(() => page.getByRole('status').last().innerText()).toContain('Soap powder in cartons taken off. Undo puts it back.');
    await page.keyboard.press('Control+Z');
    await goods(page, 'a4-l3-g2').waitFor();
    expect(await labels(page)).toContain('Soap powder in cartons, 385 kg, 1 825 mm from the left upright');
    await page.keyboard.press('Control+Shift+Z');
    await goods(page, 'a4-l3-g2').waitFor({ state: 'detached' });
  }));

test('front and rear beam of a front-heavy level are shown apart', () =>
  inLevel('B2', 2, async (page) => {
    expect(await page.getByLabel('Front and rear').isChecked()).toBe(true);
    const shown = await level(page);
    const kg = (name: string) => Number(new RegExp(`${name} ([\\d.]+) kg\\n`).exec(shown)?.[1]);
    // The shares of the transformer's ends add up to half its 1 500 kg at each support.
    expect(kg('front') + kg('rear')).toBeCloseTo(750, 0);
    expect(kg('front')).toBeGreaterThan(2 * kg('rear'));
    await page.getByText('Rear', { exact: true }).first().click();
    await eventually(() => level(page)).not.toContain('front 587');
    // A level with its mass in the middle shows the pair.
    await goToLevel(page, 1);
    expect(await level(page)).not.toMatch(/\nfront \d/);
  }));

test('a finding opens to its formula, the numbers put in with where each is from, and the source', () =>
  inLevel('B2', 2, async (page) => {
    const row = page.locator('section[aria-label="Findings: Level 2"] li', { hasText: 'Beam bending, front beam' }).first();
    expect(plain(await row.innerText())).toContain(
      'it bends the front beam as 3 481 kg evenly spread on the pair would. The notice allows 2 600 kg.',
    );
    await row.locator('summary', { hasText: 'Worked calculation' }).click();
    const steps = row.locator('.worked ol > li');
    await steps.first().waitFor();
    expect(await steps.count()).toBeGreaterThan(1);
    for (const step of await steps.all()) {
      expect(plain(await step.locator('.formula').innerText())).toMatch(/^\S.* = .+ = [\d−]/);
      expect((await step.locator('.source').innerText()).trim()).not.toBe('');
      for (const row of await step.locator('tbody tr').all()) expect(plain(await row.locator('td').last().innerText())).toMatch(/\S, \S/);
    }
    // The stated case, and after it the worst within the tolerances.
    const results = (await steps.allInnerTexts()).map(plain);
    expect(results.filter((text) => /= 1\.34\b/.test(text))).toHaveLength(1);
  }));
