/** Room left at a place, as it is read beside the drawing: the figure is right to the last kilogram that is shown. */
import type { Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import { placeGoods } from '../../src-core/site/edits';
import type { Site } from '../../src-core/site/site';
import { passes, weighing } from '../core/audit/weighing';
import { demoSite } from '../fixtures/demo-site';
import { axeFindings, closeBrowser, openDemo } from './program';
import { choice, eventually, goToBay, goToLevel, plain, selectGoods, withProgram } from './steps';

afterAll(closeBrowser);

const room = async (page: Page): Promise<string> => plain(await page.locator('aside .room').innerText());

/** The figure in a sentence, in kg; thousands stand apart. */
const figure = (text: string, before: string): number => {
  const found = new RegExp(`${before}([\\d ]+) kg`).exec(text);
  return Number((found?.[1] ?? '').replaceAll(' ', ''));
};

const today = new Date().toISOString().slice(0, 10);

function expectMost(site: Site, placementId: string, kg: number): void {
  expect(kg).toBeGreaterThan(100);
  expect(passes(weighing(site, placementId, kg), placementId, today), `${kg} kg`).toBe(true);
  expect(passes(weighing(site, placementId, kg + 1), placementId, today), `${kg + 1} kg`).toBe(false);
}

test('goods about to be put on are told what they may weigh where they will stand', () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await goToBay(page, 'A4');
    await goToLevel(page, 3);
    await eventually(() => room(page)).toMatch(/^Free: 950 mm between the goods; up to [\d ]+ kg evenly spread there\. .+ stops it\. /);

    await page.getByRole('button', { name: 'Add goods…' }).first().click();
    await choice(page.locator('aside'), 'Goods').selectOption({ label: 'Soap powder in cartons' });
    await eventually(() => room(page)).toMatch(/^Room for up to [\d ]+ kg of this shape at 950 mm, pallet included; .+ stops it\. /);
    expect(await room(page)).toContain('These goods weigh 385 kg and may be put here. Above 90 % of a rating it counts as close.');
    const kg = figure(await room(page), 'up to ');
    const put = placeGoods(demoSite(), { id: 'trial', unitLoadId: 'soap' }, { levelId: 'a4-l3', atMm: 950 });
    expectMost(put, 'trial', kg);
    expect(await page.locator('aside .room').getAttribute('aria-live')).toBe('polite');
    expect(await axeFindings(page, [])).toEqual([]);

    // The same figure in pounds, rounded down from the same limit.
    await page.keyboard.press('Control+U');
    await eventually(() => room(page)).toMatch(/^Room for up to [\d,]+ lb of this shape at 37\.4 in, pallet included/);
    const pounds = Number((/([\d,]+) lb/.exec(await room(page))?.[1] ?? '').replaceAll(',', ''));
    expect(pounds).toBeGreaterThanOrEqual(Math.floor(kg / 0.45359237));
    expect(pounds).toBeLessThanOrEqual(Math.floor((kg + 1) / 0.45359237));
  }));

test('goods that are over are told how much must come off', () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await goToBay(page, 'A2');
    await goToLevel(page, 2);
    await eventually(() => room(page)).toContain('Nothing may be added there: beam bending is over already.');
    await selectGoods(page, 'a2-l2-g1');
    await eventually(() => room(page)).toMatch(/^Over by [\d ]+ kg here: at most [\d ]+ kg of this shape; beam bending stops it\.$/);
    const text = await room(page);
    // 1 750 kg with its skid, as the demo depot states them
    expect(figure(text, 'Over by ') + figure(text, 'at most ')).toBe(1750);
    expectMost(demoSite(), 'a2-l2-g1', figure(text, 'at most '));
    expect(await axeFindings(page, [])).toEqual([]);
  }));

test('a level without a rating names what is not known instead of a figure', () =>
  withProgram(async ({ page }) => {
    await openDemo(page);
    await goToBay(page, 'A5');
    await goToLevel(page, 2);
    await selectGoods(page, 'a5-l2-g1');
    await eventually(() => room(page)).toMatch(/not assessable\. Not known: rated capacity of level 2/);
    expect(await room(page)).not.toMatch(/ kg/);
  }));
