/** What is found at a beam makes its bay over, on the screen of the rack as in the visit, until it is put right. */
import type { Locator, Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { lostText } from './lost-text';
import { axeFindings, closeBrowser, openDemo } from './program';
import { checked, choice, command, eventually, field, goToBay, goToLevel, plain, type, withProgram } from './steps';

afterAll(closeBrowser);

const verdict = async (page: Page): Promise<string> => {
  await checked(page);
  return plain(
    await page
      .locator('h1, h2')
      .filter({ hasText: /^Bay A1/ })
      .first()
      .locator('xpath=..')
      .innerText(),
  );
};
const findings = async (page: Page): Promise<string> => plain(await page.locator('section[aria-label="Findings"]').innerText());
const openActions = (page: Page) => page.getByRole('region', { name: 'Open at this bay' });

/** Puts the focus there and presses Enter, as who has no mouse does. */
async function enter(one: Locator): Promise<void> {
  await one.focus();
  await one.press('Enter');
}

test('a visit that finds a dented beam makes the bay over, and replacing the beam brings it back', { timeout: 180_000 }, () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await goToBay(page, 'A1');
    await eventually(() => verdict(page)).toContain('Within');

    await command(page, 'Visits');
    await choice(page, 'Bays').selectOption({ label: 'bay A1 only' });
    await type(field(page, 'Visited by'), 'R. Walker');
    await page.getByRole('button', { name: 'Begin the visit' }).click();
    await page.getByRole('heading', { name: 'Bay A1', exact: true }).waitFor();
    await page.getByRole('button', { name: 'Record damage' }).click();
    await choice(page, 'Damaged part').selectOption({ label: 'Beam, level 1, front' });
    await page.getByRole('button', { name: 'Finish this bay and go on' }).click();
    await page.getByRole('button', { name: 'Sign and keep as a record' }).waitFor();

    await goToBay(page, 'A1');
    await eventually(() => verdict(page)).toContain('Over');
    expect(await findings(page)).toContain('The front beam of level 1 of bay A1 has a dent');
    // Told once beside the verdict, not by the visit and by the site.
    expect(await openActions(page).getByRole('listitem').count()).toBe(1);

    await command(page, 'Visits');
    await page.getByRole('button', { name: '← All visits' }).click();
    await page
      .getByRole('button', { name: /^Done… The front beam of level 1/ })
      .first()
      .click();
    await type(field(page, 'Done by'), 'F. Fitter');
    await type(field(page, 'How'), 'Beam replaced, order 4711');
    await page.getByRole('button', { name: 'Beam replaced: take the damage off the level' }).click();
    await goToBay(page, 'A1');
    await eventually(() => verdict(page)).toContain('Within');
    expect(await openActions(page).count()).toBe(0);
    expect(await page.getByRole('button', { name: 'Undo', exact: true }).getAttribute('title')).toBe('Undo: Damaged beam replaced');
  }),
);

test('a bay that is taken up again takes back what it wrongly put into the site', { timeout: 180_000 }, () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await command(page, 'Visits');
    await choice(page, 'Bays').selectOption({ label: 'bay A1 only' });
    await type(field(page, 'Visited by'), 'R. Walker');
    await page.getByRole('button', { name: 'Begin the visit' }).click();
    await page.getByText('Sag of beams').click();
    const unloaded = field(page, 'Unloaded sag of level 3, rear beam');
    await type(unloaded, '1000000');
    await page.getByText(/Unloaded sag of level 3, rear beam must be at most/).waitFor();
    await type(unloaded, '9');
    await page.getByRole('button', { name: 'Finish this bay and go on' }).click();
    await goToBay(page, 'A1');
    await eventually(() => verdict(page)).toContain('Over');

    await command(page, 'Visits');
    await page.getByRole('button', { name: 'Take this bay up again' }).click();
    await type(unloaded, '');
    await page.getByRole('button', { name: 'Finish this bay and go on' }).click();
    await goToBay(page, 'A1');
    await eventually(() => verdict(page)).toContain('Within');
  }),
);

/** Who and how, and the button that takes it off. */
async function putRight(page: Page, button: string): Promise<void> {
  await type(field(page, 'Done by'), 'F. Fitter');
  await type(field(page, 'How'), 'Beam replaced, order 4711');
  await enter(page.getByRole('button', { name: button }));
}

test('damage and sag are entered, corrected, undone and taken off in the form of the level, by keyboard', { timeout: 180_000 }, () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await goToBay(page, 'A1');
    await goToLevel(page, 2);
    await command(page, 'Level: height, beams, damage');
    const record = page.getByRole('button', { name: 'Record damage of a beam' });
    await enter(record);
    await eventually(() => verdict(page)).toContain('Over');
    const part = choice(page, 'Damaged part');
    await part.focus();
    await part.press('ArrowDown');
    await eventually(() => findings(page)).toContain('The rear beam of level 2 of bay A1 has a dent');
    await type(field(page, 'Note'), 'truck tine');
    const found = page.getByLabel('Found on');
    await found.fill('');
    await found.press('Enter');
    await eventually(() => findings(page)).toContain('(truck tine)');
    await eventually(() => findings(page)).toContain('The day on which it was found is not known.');
    expect(await page.getByRole('button', { name: 'Undo', exact: true }).getAttribute('title')).toBe(
      'Undo: Change damage of level 2 of bay A1',
    );
    await enter(page.getByRole('button', { name: 'Replaced or repaired: take it off…' }));
    // What leaves the rack says who did it and how, wherever it is taken off.
    expect(await field(page, 'Done by').evaluate((one) => one === document.activeElement)).toBe(true);
    await enter(page.getByRole('button', { name: 'Beam replaced: take the damage off the level' }));
    await page.getByText('Say who did it, when, and how').waitFor();
    await putRight(page, 'Beam replaced: take the damage off the level');
    await eventually(() => verdict(page)).toContain('Within');
    expect(await record.evaluate((one) => one === document.activeElement)).toBe(true);

    const front = page.getByRole('group', { name: 'Front beam' });
    await type(field(front, 'Sag, loaded'), '5');
    await eventually(() => verdict(page)).toContain('Not assessable');
    await enter(record);
    await eventually(() => verdict(page)).toContain('Over');
    expect(await axeFindings(page, [], 'aside')).toEqual([]);
    expect(await lostText(page)).toEqual([]);
    await enter(page.getByRole('button', { name: 'Replaced or repaired: take it off…' }));
    await putRight(page, 'Beam replaced: take the damage off the level');
    await type(field(front, 'Set, down'), '0');
    await type(field(front, 'Set, sideways'), '0');
    await eventually(() => verdict(page)).toContain('Within');
    // 2 700 mm: 13.5 mm allowed, 20 % of it 2.7 mm (facts F-01 and F-88).
    await type(field(front, 'Set, down'), '2.8');
    await eventually(() => verdict(page)).toContain('Over');
    expect(await findings(page)).toContain('take both beams out');
    expect(await field(front, 'Sag, loaded').getAttribute('data-field')).toBe('level:a1-l2:sags.front.loadedMm');
    await enter(page.getByRole('button', { name: 'Undo', exact: true }));
    await eventually(() => verdict(page)).toContain('Within');
    await enter(page.getByRole('button', { name: 'Redo', exact: true }));
    await eventually(() => verdict(page)).toContain('Over');
    await enter(front.getByRole('button', { name: 'Replaced: take the reading off…' }));
    await putRight(page, 'Both beams replaced: take their readings off the level');
    await eventually(() => verdict(page)).toContain('Within');
    // What cannot be is refused where it was typed.
    await type(field(front, 'Sag, loaded'), '-1');
    await front.getByText(/Sag, loaded must be/).waitFor();
  }),
);
