/** What an officer typed, took out by mistake or undid in a visit is still there, or said to be missing. */
import { afterAll, expect, test } from 'vitest';
import { closeBrowser, openDemo } from './program';
import { choice, command, eventually, field, type, withProgram } from './steps';

afterAll(closeBrowser);

test('half a plumb reading, a damage taken out and a finished bay undone are not lost', { timeout: 180_000 }, () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await command(page, 'Visits');
    await type(field(page, 'Visited by'), 'S. Officer');
    await page.getByRole('button', { name: 'Begin the visit' }).click();
    await page.getByRole('heading', { name: 'Bay A1', exact: true }).waitFor();

    // Half a reading waits while another bay is looked at, is told where the bay is finished, and belongs to this bay alone.
    const plumb = () => page.locator('details').filter({ hasText: 'Plumb' });
    await plumb().locator('summary').click();
    await type(field(plumb(), 'Offset along the run'), '12');
    await page.getByText('Not whole yet, and so no part of the visit: Plumb reading of frame A0|A1').waitFor();
    await page.keyboard.press('Alt+PageDown');
    await page.getByRole('heading', { name: 'Bay A2', exact: true }).waitFor();
    expect(await page.getByText('Not whole yet').count()).toBe(0);
    await page.keyboard.press('Alt+PageUp');
    await page.getByRole('heading', { name: 'Bay A1', exact: true }).waitFor();
    await eventually(() => field(plumb(), 'Offset along the run').inputValue()).toBe('12');
    await type(field(plumb(), 'Offset across the run'), '0');
    await plumb().getByText('1 reading').waitFor();
    expect(await page.getByText('Not whole yet').count()).toBe(0);

    // A damage taken out by mistake comes back as it was measured.
    await page.getByRole('button', { name: 'Record damage' }).click();
    await type(field(page, 'Bow along the run'), '11');
    await type(field(page, 'Bow in the frame’s plane'), '0');
    await page.getByRole('button', { name: 'Take this out' }).click();
    await page.getByText('None seen.').waitFor();
    await page.keyboard.press('Enter');
    await eventually(() => field(page, 'Bow along the run').inputValue()).toBe('11');
    const part = choice(page, 'Damaged part').locator('option:checked');
    expect(await part.textContent()).toBe('Front upright of the left frame, A0|A1');

    // Undone in the site, the damage would ask for nothing any more: that is said, and mended.
    await page.getByRole('button', { name: /^All the rest is in order/ }).click();
    await page.getByRole('button', { name: 'Finish this bay and go on' }).click();
    await page.getByRole('heading', { name: 'Bay A2', exact: true }).waitFor();
    const lost = page.getByText('The site no longer has 1 damage that this visit found');
    expect(await lost.count()).toBe(0);
    await page.getByRole('button', { name: 'Undo', exact: true }).click();
    await lost.waitFor();
    await page.getByRole('button', { name: 'Put it into the site again' }).click();
    await lost.waitFor({ state: 'detached' });
    await page.getByRole('button', { name: '← All visits' }).click();
    await page.getByRole('row', { name: /Front upright of frame A0\|A1/ }).waitFor();
  }),
);
