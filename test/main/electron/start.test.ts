import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { findElectron, programName, windowHindrance } from '../../../src-main/window/electron-program';

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'start-'));
  vi.spyOn(console, 'log').mockImplementation(() => undefined);
});
afterEach(() => {
  vi.restoreAllMocks();
  rmSync(folder, { recursive: true });
});

test.each([
  ['linux', {}, false, 'there is no display here'],
  ['linux', { DISPLAY: '' }, false, 'there is no display here'],
  ['linux', {}, true, 'there is no display here'],
  ['linux', { DISPLAY: ':0' }, false, null],
  ['linux', { WAYLAND_DISPLAY: 'wayland-0' }, false, null],
  ['linux', { DISPLAY: ':0' }, true, 'Electron’s sandbox does not run as root, and the program does not run without it'],
  ['darwin', {}, false, null],
  ['darwin', {}, true, null],
  ['win32', {}, false, null],
] as const)('on %s with %j, root %s: %s', (platform, env, isRoot, why) => {
  expect(windowHindrance(platform, env, isRoot)).toBe(why);
});

describe('Electron’s program file', () => {
  /** Electron's package with a fetcher that does what the text says. */
  const fetcher = (text: string) => writeFileSync(join(folder, 'install.js'), text);
  const putThere = `
    const fs = require('node:fs');
    const path = require('node:path').join(__dirname, 'dist', ${JSON.stringify(programName(process.platform))});
    fs.mkdirSync(require('node:path').dirname(path), { recursive: true });
    fs.writeFileSync(path, '');
    fs.writeFileSync(__dirname + '/path.txt', '');`;
  const programBelow = (place: string): string => {
    const path = join(place, programName(process.platform));
    mkdirSync(dirname(path), { recursive: true });
    writeFileSync(path, '');
    return path;
  };
  const find = (env: NodeJS.ProcessEnv = {}, limit = 20_000) => findElectron({ limit, env: { PATH: process.env['PATH'], ...env }, folder });

  test('is taken where it is there, and nothing is fetched', async () => {
    fetcher('require("node:fs").writeFileSync(__dirname + "/fetched", "")');
    const path = programBelow(join(folder, 'dist'));
    writeFileSync(join(folder, 'path.txt'), '');
    expect(await find()).toEqual({ ok: true, path });
    expect(existsSync(join(folder, 'fetched'))).toBe(false);
  });

  test('is fetched where it is not there', async () => {
    fetcher(putThere);
    expect(await find()).toEqual({ ok: true, path: join(folder, 'dist', programName(process.platform)) });
  });

  test('of which only a part has arrived is fetched again', async () => {
    fetcher(putThere);
    programBelow(join(folder, 'dist'));
    expect(await find({ ELECTRON_SKIP_BINARY_DOWNLOAD: '1' })).toMatchObject({ ok: false });
    expect(await find()).toMatchObject({ ok: true });
    expect(existsSync(join(folder, 'path.txt'))).toBe(true);
  });

  test('is taken from the folder that the user names', async () => {
    const named = join(folder, 'named');
    const path = programBelow(named);
    expect(await find({ ELECTRON_OVERRIDE_DIST_PATH: named })).toEqual({ ok: true, path });
  });

  test('is not fetched where the user forbids it', async () => {
    fetcher(putThere);
    expect(await find({ ELECTRON_SKIP_BINARY_DOWNLOAD: '1' })).toEqual({
      ok: false,
      why: 'Electron’s program file is not there and ELECTRON_SKIP_BINARY_DOWNLOAD forbids to fetch it',
    });
    expect(existsSync(join(folder, 'dist'))).toBe(false);
    expect(await find({ ELECTRON_SKIP_BINARY_DOWNLOAD: '0' })).toMatchObject({ ok: true });
  });

  test('that cannot be fetched is told with the reason', async () => {
    fetcher('console.error("RequestError: getaddrinfo ENOTFOUND example.invalid\\n    at x"); process.exit(1);');
    expect(await find()).toEqual({
      ok: false,
      why: 'Electron’s program file could not be fetched (getaddrinfo ENOTFOUND example.invalid)',
    });
  });

  test('a fetch that never ends is given up, and its process is gone', async () => {
    fetcher(`require('node:fs').writeFileSync(__dirname + '/pid', String(process.pid)); setInterval(() => {}, 1000);`);
    const began = performance.now();
    expect(await find({}, 1000)).toEqual({ ok: false, why: 'Electron’s program file could not be fetched within 1 seconds' });
    expect(performance.now() - began).toBeLessThan(10_000);
    const pid = Number(readFileSync(join(folder, 'pid'), 'utf8'));
    expect(() => process.kill(pid, 0)).toThrow('ESRCH');
  });

  test('a fetch that says it went well but left nothing is told', async () => {
    fetcher('');
    expect(await find()).toEqual({ ok: false, why: 'Electron’s program file could not be fetched' });
  });

  test('without the package there is nothing to fetch', async () => {
    expect(await findElectron({ limit: 1000, env: {}, folder: null })).toMatchObject({ ok: false });
  });
});
