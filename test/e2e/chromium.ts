/**
 * Finds a Chromium to drive, and gets one where this machine lets us: Debian's package as root, else
 * Playwright's own. Says exactly what is missing where neither can be had.
 */
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { chromium } from 'playwright-core';

const INSTALLED = [
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
  '/usr/bin/google-chrome-stable',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
];

/** @returns null where none is found; nothing is fetched */
export function installedChromium(): string | null {
  const named = process.env['CHROMIUM_PATH'];
  if (named !== undefined) {
    if (!existsSync(named)) throw new Error(`CHROMIUM_PATH names ${named}, where there is no file`);
    return named;
  }
  const own = chromium.executablePath();
  return [...INSTALLED, own].find((path) => path !== '' && existsSync(path)) ?? null;
}

function run(command: string, args: readonly string[]): boolean {
  console.log(`getting Chromium: ${command} ${args.join(' ')}`);
  const result = spawnSync(command, args, {
    stdio: ['ignore', 'ignore', 'inherit'],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  });
  return result.status === 0;
}

/** @throws Error that names the command to run where no Chromium can be found or fetched */
export function chromiumPath(): string {
  const found = installedChromium();
  if (found !== null) return found;
  if (process.platform === 'linux' && process.getuid?.() === 0 && existsSync('/usr/bin/apt-get')) {
    if (run('apt-get', ['update', '-q']) && run('apt-get', ['install', '-y', '-q', 'chromium'])) {
      const debian = installedChromium();
      if (debian !== null) return debian;
    }
  }
  const cli = join(dirname(createRequire(import.meta.url).resolve('playwright-core/package.json')), 'cli.js');
  if (run(process.execPath, [cli, 'install', 'chromium'])) {
    const playwright = installedChromium();
    if (playwright !== null) return playwright;
  }
  throw new Error(
    'The end-to-end tests need Chromium and none was found or could be fetched. ' +
      'On Debian or Ubuntu run "apt-get install chromium"; elsewhere install Chrome or Chromium and set CHROMIUM_PATH to its program file.',
  );
}

/** Quiet, offline, and able to run as root in a container. */
export const CHROMIUM_ARGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
