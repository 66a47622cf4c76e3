/**
 * From an empty program to a saved run of 10 bays by 5 levels with goods and a load notice, by keys
 * alone and by the mouse alone; the run is filled like its first bay, or laid out by a template kept
 * from a bay. One action is a key or chord, a click, a drag, or one filled field.
 */
import type { Locator, Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { closeBrowser, type Program } from './program';
import { checked, eventually, field, withProgram } from './steps';

afterAll(closeBrowser);

/** Fewer than this many actions, by either way. */
const MOST_ACTIONS = 60;

/** Numbers invented for this test. */
const RUN = { bays: 10, levels: 5, levelKg: 2400, unitLoadsPerLevel: 3 };
const GOODS = { name: 'Tinned plums', widthMm: 800, depthMm: 1200, heightMm: 1150, goodsKg: 620 };

/** Counts what a person does; text typed into the field that has the focus is one action, however long. */
class Hands {
  /** Keys and clicks. */
  strokes = 0;
  filled = 0;

  constructor(private readonly page: Page) {}

  get actions(): number {
    return this.strokes + this.filled;
  }

  async press(chord: string, times = 1): Promise<void> {
    for (let n = 0; n < times; n += 1) {
      this.strokes += 1;
      await this.page.keyboard.press(chord);
    }
  }

  /** Fills the field that the keys have brought the focus to, whose text Tab has selected. */
  async type(label: RegExp, text: string): Promise<void> {
    await eventually(() => this.page.evaluate(focusedLabel)).toMatch(label);
    this.filled += 1;
    await this.page.keyboard.insertText(text);
  }

  async click(target: Locator, position?: { x: number; y: number }): Promise<void> {
    this.strokes += 1;
    await target.click(position ? { position } : {});
  }

  async fill(target: Locator, text: string): Promise<void> {
    this.filled += 1;
    await target.fill(text);
  }
}

function focusedLabel(): string {
  const { activeElement } = document;
  return activeElement instanceof HTMLInputElement ? (activeElement.labels?.[0]?.textContent ?? '') : (activeElement?.tagName ?? '');
}

/** What the page itself saw of keys and of pointers, so that neither way borrows from the other. */
async function watchDevices(page: Page): Promise<() => Promise<{ keys: number; pointers: number }>> {
  await page.evaluate(() => {
    const seen = { keys: 0, pointers: 0 };
    Object.assign(globalThis, { seen });
    document.addEventListener('keydown', ({ key }) => void (['Control', 'Shift', 'Alt'].includes(key) || (seen.keys += 1)), true);
    document.addEventListener('pointerdown', () => void (seen.pointers += 1), true);
  });
  return () => page.evaluate(() => (globalThis as unknown as { seen: { keys: number; pointers: number } }).seen);
}

/** A site with one run, whose first bay has goods on every level. */
async function firstBayByKeys(page: Page, hands: Hands, bays: number): Promise<void> {
  await hands.press('Tab');
  await hands.type(/^Name of a new site/, 'Quayside store');
  await hands.press('Enter');
  await page.getByRole('heading', { name: 'Quayside store has no racks yet' }).waitFor();

  await hands.press('Control+K');
  await hands.type(/^Command/, 'new run');
  await hands.press('Enter');
  await page.getByRole('dialog', { name: 'New run of bays' }).waitFor();
  await hands.press('Tab');
  await hands.type(/^Number of bays/, String(bays));
  await hands.press('Tab', 2);
  await hands.type(/^Beam levels/, String(RUN.levels));
  await hands.press('Tab', 4);
  await hands.type(/^Rating of each level/, String(RUN.levelKg));
  await hands.press('Tab');
  await hands.type(/^Unit loads per level/, String(RUN.unitLoadsPerLevel));
  await hands.press('Enter');
  await page.locator('[data-bay]').first().waitFor();

  await hands.press('Control+G');
  await eventually(() => page.evaluate(focusedLabel)).toBe('SELECT');
  await hands.press('Tab');
  await hands.type(/^Name/, GOODS.name);
  // Enter takes the name and goes on; it puts nothing on yet.
  await hands.press('Enter');
  await hands.type(/^Width along the beam/, String(GOODS.widthMm));
  await hands.press('Tab');
  await hands.type(/^Depth/, String(GOODS.depthMm));
  await hands.press('Tab');
  await hands.type(/^Height with pallet/, String(GOODS.heightMm));
  await hands.press('Tab');
  await hands.type(/^Mass without pallet/, String(GOODS.goodsKg));
  await hands.press('Enter');
  await page.locator('[data-placement]').first().waitFor();
  // Copied from the lowest level to each above it.
  await hands.press('Control+C');
  for (let level = 2; level <= RUN.levels; level += 1) {
    await hands.press('Control+ArrowUp');
    await page.locator(`[data-level="${level}"][aria-current="true"]`).waitFor();
    await hands.press('Control+V');
    await eventually(() => page.locator('[data-placement]').count()).toBe(level);
  }
}

async function byKeysAlone(page: Page, hands: Hands): Promise<void> {
  await firstBayByKeys(page, hands, RUN.bays);
  await hands.press('Control+K');
  await hands.type(/^Command/, 'give other bays');
  await hands.press('Enter');
  await page.getByRole('dialog', { name: /^Give other bays/ }).waitFor();
  await hands.press('Tab', 2);
  await hands.press('Enter');
  await page.getByRole('dialog').waitFor({ state: 'detached' });
  await hands.press('Control+S');
}

async function byKeysAndTemplate(page: Page, hands: Hands): Promise<void> {
  await firstBayByKeys(page, hands, 1);
  await hands.press('Control+Shift+S');
  await page.getByRole('dialog', { name: 'Keep bay A1 as a template' }).waitFor();
  await hands.press('Enter');
  await page.getByRole('dialog').waitFor({ state: 'detached' });

  await hands.press('Control+K');
  await hands.type(/^Command/, 'new run');
  await hands.press('Enter');
  await page.getByRole('dialog', { name: 'New run of bays' }).waitFor();
  await hands.press('Tab');
  await hands.type(/^Number of bays/, String(RUN.bays));
  await hands.press('Enter');
  await page.getByRole('dialog').waitFor({ state: 'detached' });
  await hands.press('Control+S');
}

const button = (page: Page, name: string) => page.getByRole('button', { name, exact: true }).first();

async function firstBayByMouse(page: Page, hands: Hands, bays: number): Promise<void> {
  await hands.fill(page.getByLabel('Name of a new site'), 'Quayside store');
  await hands.click(button(page, 'Make site'));
  await hands.click(button(page, 'Lay out a run…'));
  const run = page.getByRole('dialog', { name: 'New run of bays' });
  await hands.fill(field(run, 'Number of bays'), String(bays));
  await hands.fill(field(run, 'Beam levels'), String(RUN.levels));
  await hands.fill(field(run, 'Rating of each level'), String(RUN.levelKg));
  await hands.fill(field(run, 'Unit loads per level'), String(RUN.unitLoadsPerLevel));
  await hands.click(button(page, 'Lay out the run'));

  await hands.click(button(page, 'Add goods…'));
  const form = page.locator('[data-form]').first();
  await hands.fill(field(form, 'Name'), GOODS.name);
  await hands.fill(field(form, 'Width along the beam'), String(GOODS.widthMm));
  await hands.fill(field(form, 'Depth'), String(GOODS.depthMm));
  await hands.fill(field(form, 'Height with pallet'), String(GOODS.heightMm));
  await hands.fill(field(form, 'Mass without pallet'), String(GOODS.goodsKg));
  await hands.click(button(page, 'Put on this level'));
  for (let level = 2; level <= RUN.levels; level += 1) {
    await hands.click(page.locator(`[data-level="${level}"]`), { x: 4, y: 4 });
    await page.locator(`[data-level="${level}"][aria-current="true"]`).waitFor();
    await hands.click(button(page, 'Put on this level'));
    await eventually(() => page.locator('[data-placement]').count()).toBe(level);
  }
}

async function byMouseAlone(page: Page, hands: Hands): Promise<void> {
  await firstBayByMouse(page, hands, RUN.bays);
  await hands.click(button(page, 'Menu'));
  await hands.click(button(page, 'Give other bays this bay’s goods or levels…'));
  await hands.click(button(page, 'Fill'));
  await page.getByRole('dialog').waitFor({ state: 'detached' });
  await hands.click(button(page, 'Save'));
}

async function byMouseAndTemplate(page: Page, hands: Hands): Promise<void> {
  await firstBayByMouse(page, hands, 1);
  await hands.click(button(page, 'Bay…'));
  await hands.click(button(page, 'Keep this bay as a template…'));
  await hands.click(button(page, 'Keep it'));
  await page.getByRole('dialog').waitFor({ state: 'detached' });
  await hands.click(button(page, 'Menu'));
  await hands.click(button(page, 'New run of bays…'));
  await hands.fill(field(page.getByRole('dialog', { name: 'New run of bays' }), 'Number of bays'), String(RUN.bays));
  await hands.click(button(page, 'Lay out the run'));
  await page.getByRole('dialog').waitFor({ state: 'detached' });
  await hands.click(button(page, 'Save'));
}

interface SavedFile {
  readonly site: {
    readonly name: string;
    readonly unitLoads: readonly { id: string; name: string; goodsKg: number }[];
    readonly notices: readonly { id: string; levelKg: readonly number[]; unitLoadsPerLevel: number }[];
    readonly runs: readonly {
      readonly bays: readonly {
        readonly noticeId: string | null;
        readonly levels: readonly { readonly placements: readonly { readonly unitLoadId: string }[] }[];
      }[];
    }[];
  };
}

/** @param runs how many bays each run has; the last is the one of ten */
async function expectSaved(
  page: Page,
  siteFiles: () => Promise<ReadonlyMap<string, string>>,
  runs: readonly number[] = [RUN.bays],
): Promise<void> {
  await page
    .getByText(/^All changes saved/)
    .first()
    .waitFor();
  const files = [...(await siteFiles()).values()];
  expect(files).toHaveLength(1);
  const { site } = JSON.parse(files[0] ?? '') as SavedFile;
  expect(site.name).toBe('Quayside store');
  expect(site.unitLoads).toMatchObject([GOODS]);
  expect(site.notices).toMatchObject([{ levelKg: [RUN.levelKg], unitLoadsPerLevel: RUN.unitLoadsPerLevel }]);
  expect(site.runs.map((run) => run.bays.length)).toEqual(runs);
  for (const bay of site.runs.flatMap((run) => run.bays)) {
    expect(bay.noticeId).toBe(site.notices[0]?.id);
    expect(bay.levels).toHaveLength(RUN.levels);
    for (const level of bay.levels) expect(level.placements.map((one) => one.unitLoadId)).toEqual([site.unitLoads[0]?.id]);
  }
  await checked(page);
}

/** From the empty program to the saved file; gives the number of actions. */
async function capture(
  { page, siteFiles }: Program,
  by: 'keys' | 'mouse',
  way: (page: Page, hands: Hands) => Promise<void>,
  runs: readonly number[] = [RUN.bays],
): Promise<number> {
  await page.getByRole('heading', { name: 'Nothing here yet' }).waitFor();
  const devices = await watchDevices(page);
  const hands = new Hands(page);
  await way(page, hands);
  await expectSaved(page, siteFiles, runs);
  // By the mouse, text goes into a filled field at once; no key moves, chooses or presses anything.
  expect(await devices()).toEqual(by === 'keys' ? { keys: hands.strokes, pointers: 0 } : { keys: 0, pointers: hands.strokes });
  return hands.actions;
}

test('by keys alone, in fewer than 60 actions', () =>
  withProgram(async (program) => {
    expect(await capture(program, 'keys', byKeysAlone)).toBeLessThan(MOST_ACTIONS);
  }));

test('by the mouse alone, in fewer than 60 actions', () =>
  withProgram(async (program) => {
    expect(await capture(program, 'mouse', byMouseAlone)).toBeLessThan(MOST_ACTIONS);
  }));

test('by keys alone from a template that is kept on the way, in fewer than 60 actions', () =>
  withProgram(async (program) => {
    expect(await capture(program, 'keys', byKeysAndTemplate, [1, RUN.bays])).toBeLessThan(MOST_ACTIONS);
  }));

test('by the mouse alone from a template that is kept on the way, in fewer than 60 actions', () =>
  withProgram(async (program) => {
    expect(await capture(program, 'mouse', byMouseAndTemplate, [1, RUN.bays])).toBeLessThan(MOST_ACTIONS);
  }));
