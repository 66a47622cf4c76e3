/** The program as a user has it: the built page in Chromium over the loopback host, on a folder of its own. */
import { readFileSync } from 'node:fs';
import { mkdtemp, readFile, readdir, rm } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { chromium, type Browser, type BrowserContextOptions, type Page } from 'playwright-core';
import { startServe, type Serving } from '../../src-main/serve-app';
import { CHROMIUM_ARGS } from './chromium';

const AXE = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

/** Saves of the end-to-end tests all bear this time, so that files can be compared byte for byte. */
export const NOW = new Date('2026-05-04T08:00:00.000Z');

export interface Program {
  readonly page: Page;
  readonly sitesFolder: string;
  readonly serving: Serving;
  /** What the page complained of: script errors, console errors, breaches of the content security policy, requests to elsewhere. */
  readonly complaints: string[];
  /** Text of each site file in the folder by name. */
  siteFiles(): Promise<ReadonlyMap<string, string>>;
  close(): Promise<void>;
}

let browser: Browser | null = null;

export async function openBrowser(): Promise<Browser> {
  const executablePath = process.env['CHROMIUM_PATH'];
  if (executablePath === undefined)
    throw new Error('CHROMIUM_PATH is not set: run the end-to-end tests through vitest, whose setup sets it');
  browser ??= await chromium.launch({ executablePath, args: CHROMIUM_ARGS });
  return browser;
}

export async function closeBrowser(): Promise<void> {
  await browser?.close();
  browser = null;
}

export async function startProgram(options: BrowserContextOptions = {}, folder?: string): Promise<Program> {
  const sitesFolder = folder ?? (await mkdtemp(join(tmpdir(), 'tallybeam-e2e-')));
  const serving = await startServe({
    sitesFolder,
    rendererFolder: resolve(import.meta.dirname, '../../dist/renderer'),
    port: 0,
    now: () => NOW,
  });
  const context = await (
    await openBrowser()
  ).newContext({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce', locale: 'en-GB', ...options });
  const page = await context.newPage();
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(`error: ${error.message}`));
  page.on('console', (message) => {
    if (message.type() === 'error' || message.text().includes('Content Security Policy')) complaints.push(`console: ${message.text()}`);
  });
  page.on('request', (request) => {
    const { protocol, host } = new URL(request.url());
    if (protocol.startsWith('http') && host !== `127.0.0.1:${serving.port}`) complaints.push(`request to ${request.url()}`);
  });
  await page.goto(serving.address);
  return {
    page,
    sitesFolder,
    serving,
    complaints,
    siteFiles: () => siteFiles(sitesFolder),
    close: async () => {
      await context.close();
      await serving.close();
      if (folder === undefined) await rm(sitesFolder, { recursive: true, force: true });
    },
  };
}

async function siteFiles(folder: string): Promise<ReadonlyMap<string, string>> {
  const names = (await readdir(folder)).filter((name) => name.endsWith('.tallybeam.json')).sort();
  return new Map(await Promise.all(names.map(async (name) => [name, await readFile(join(folder, name), 'utf8')] as const)));
}

/** Opens the demo depot from the list of sites and waits for its first verdicts. */
export async function openDemo(page: Page): Promise<void> {
  await page.getByRole('button', { name: /demo/i }).first().click();
  await page.locator('[data-bay]').first().waitFor();
  await page.getByRole('heading', { name: 'Findings' }).waitFor();
}

/**
 * What axe finds on the page as it is, one line a finding.
 * @param rules ids of the only rules to run; all of them if left out
 * @param within selector of the part to look at; the whole page if left out
 */
export async function axeFindings(page: Page, rules: readonly string[] = [], within = 'html'): Promise<string[]> {
  if (!(await page.evaluate(() => 'axe' in globalThis))) await page.evaluate(AXE);
  return page.evaluate(
    async ([part, only]) => {
      const { axe } = globalThis as unknown as {
        axe: {
          run(
            part: string,
            options: object,
          ): Promise<{ violations: { id: string; help: string; nodes: { target: unknown[]; failureSummary: string }[] }[] }>;
        };
      };
      const { violations } = await axe.run(part, { resultTypes: ['violations'], ...(only.length === 0 ? {} : { runOnly: only }) });
      return violations.flatMap(({ id, help, nodes }) =>
        nodes.map((node) => `${id}: ${help} at ${String(node.target[0])} ${node.failureSummary}`),
      );
    },
    [within, rules] as const,
  );
}
