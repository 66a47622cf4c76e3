/**
 * The real window, sandbox and PDF, where Electron can run: with its program file, a display and
 * without root. Everything else about the window is tested without it, in test/main/electron.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { _electron as electron } from 'playwright-core';
import { expect, test } from 'vitest';
import { HOST_METHODS } from '../../src-core/host-wire';
import { findElectron, windowHindrance } from '../../src-main/window/electron-program';

const top = resolve(import.meta.dirname, '../..');
const hindrance = windowHindrance(process.platform, process.env, process.getuid?.() === 0);
// Tests fetch nothing.
const found = await findElectron({ limit: 0, env: { ...process.env, ELECTRON_SKIP_BINARY_DOWNLOAD: '1' } });
const why = hindrance ?? (found.ok ? null : found.why);
if (why !== null) console.log(`The real window was NOT tested here, because ${why}.`);

test.skipIf(why !== null)('the real window opens the page in its sandbox, with Host and nothing else', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'electron-smoke-'));
  const env = { ...(process.env as Record<string, string>), TALLYBEAM_FOLDER: join(folder, 'own'), TALLYBEAM_SITES: join(folder, 'sites') };
  const program = await electron.launch({ executablePath: found.ok ? found.path : '', args: [top], env });
  try {
    const page = await program.firstWindow();
    await page.getByRole('heading').first().waitFor();
    expect(page.url()).toBe('app://tallybeam/index.html');
    expect((await page.evaluate(() => Object.keys(window.tallybeam ?? {}))).sort()).toEqual([...HOST_METHODS].sort());
    expect(await page.evaluate(() => [typeof globalThis.process, typeof (globalThis as { require?: unknown }).require])).toEqual([
      'undefined',
      'undefined',
    ]);

    const id = await page.evaluate(() => window.tallybeam?.addDemoSite());
    expect(await page.evaluate((site) => window.tallybeam?.readSite(site ?? '').then(({ recovered }) => recovered), id)).toBeNull();
    const refused = await page.evaluate(() => window.tallybeam?.readSite('nowhere').catch((failure: unknown) => failure));
    expect(refused).toMatchObject({ code: 'not-found' });

    expect(await page.evaluate(() => window.open('https://example.com') === null)).toBe(true);
    expect(await page.evaluate(() => fetch('https://example.com').then(String, () => 'refused'))).toBe('refused');
    expect(await page.evaluate(() => navigator.permissions.query({ name: 'geolocation' }).then(({ state }) => state))).toBe('denied');
    await page.evaluate(() => void (location.href = 'https://example.com'));
    expect(page.url()).toBe('app://tallybeam/index.html');

    const pdf = await program.evaluate(async ({ BrowserWindow }) => {
      const [window] = BrowserWindow.getAllWindows();
      const bytes = await window?.webContents.printToPDF({
        preferCSSPageSize: true,
        generateTaggedPDF: true,
        generateDocumentOutline: true,
      });
      return bytes?.toString('latin1') ?? '';
    });
    expect(pdf).toMatch(/^%PDF-/);
    expect(pdf).toContain('/StructTreeRoot');
  } finally {
    await program.close();
    rmSync(folder, { recursive: true, force: true });
  }
});
