/** What a user does again and again, and how long a test waits for the page. */
import type { BrowserContextOptions, Locator, Page } from 'playwright-core';
import { expect } from 'vitest';
import { startProgram, type Program } from './program';

/** Longest wait for anything on the page, ms: the machine may be slow and busy. */
const PATIENCE = 30_000;

/**
 * Runs the program on a fresh folder (or the one named), and holds it to its promises: no script
 * errors, no breach of the content security policy, no request to anywhere else.
 */
export async function withProgram(
  use: (program: Program) => Promise<void>,
  options: BrowserContextOptions = {},
  folder?: string,
): Promise<void> {
  const program = await startProgram(options, folder);
  program.page.setDefaultTimeout(PATIENCE);
  try {
    await use(program);
    expect(program.complaints).toEqual([]);
  } finally {
    await program.close();
  }
}

/** Waits until what is asked for gives the value; retried, as the page comes to it in its own time. */
export const eventually = <T>(ask: () => T | Promise<T>, message = '') => expect.poll(ask, { timeout: PATIENCE, interval: 50, message });

/** Findings of the newest state stand on the page. */
export const checked = (page: Page): Promise<void> => page.locator('section[aria-label="Findings"][aria-busy="false"]').waitFor();

/** Chooses a bay by its name, in whichever run it stands. */
export async function goToBay(page: Page, name: string): Promise<void> {
  await page.keyboard.press('Control+F');
  const dialog = page.getByRole('dialog', { name: 'Find' });
  await dialog.getByRole('searchbox').fill(name);
  await dialog
    .getByRole('button', { name: new RegExp(`^(Bay )?${name}\\b`) })
    .first()
    .click();
  await page.getByRole('heading', { name: `Bay ${name}`, exact: true }).waitFor();
  await checked(page);
}

/** Chooses a level of the bay by its number, 0 for the floor. */
export async function goToLevel(page: Page, number: number): Promise<void> {
  await page.locator(`[data-level="${number}"]`).click({ position: { x: 4, y: 4 } });
  await page.locator(`[data-level="${number}"][aria-current="true"]`).waitFor();
  await checked(page);
}

export const goods = (page: Page, placementId: string): Locator => page.locator(`[data-placement="${placementId}"]`);

/** Goods chosen by a click: the placement form comes up. */
export async function selectGoods(page: Page, placementId: string): Promise<void> {
  await goods(page, placementId).click();
  await page.locator(`[data-placement="${placementId}"][aria-pressed="true"]`).waitFor();
}

/** Saves by the key and waits for the word that says so. */
export async function save(page: Page): Promise<void> {
  await page.keyboard.press('Control+S');
  await page
    .getByText(/^All changes saved/)
    .first()
    .waitFor();
}

/** Text with its narrow and unbreaking spaces as ordinary ones. */
export const plain = (text: string): string => text.replaceAll(/[\u00a0\u202f]/g, ' ');

/** A field to type in, by the beginning of its label. */
export const field = (within: Page | Locator, label: string): Locator =>
  within.getByRole('textbox', { name: new RegExp(`^${label}`) }).first();

/** A list to choose from, by the beginning of its label. */
export const choice = (within: Page | Locator, label: string): Locator =>
  within.getByRole('combobox', { name: new RegExp(`^${label}`) }).first();

/** Types a value into a field as a user does, and leaves the field. */
export async function type(field: Locator, text: string): Promise<void> {
  await field.fill(text);
  await field.press('Tab');
}

/** A command by its words, through the list of all commands. */
export async function command(page: Page, name: string): Promise<void> {
  await page.keyboard.press('Control+K');
  const dialog = page.getByRole('dialog', { name: 'All commands' });
  await dialog.getByRole('searchbox').fill(name);
  await dialog
    .getByRole('button', { name: new RegExp(`^${name.replaceAll(/[.()…]/g, '.')}`) })
    .first()
    .click();
  await dialog.waitFor({ state: 'detached' });
}
