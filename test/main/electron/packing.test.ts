/** What is packed, and which doors are shut in it: electron-builder run on a made-up Electron, offline. */
import { execFile } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { dirname, join, resolve } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { buildInto } from './built';

const top = resolve(import.meta.dirname, '../../..');
const builder = createRequire(import.meta.url).resolve('electron-builder/package.json');
const ofBuilder = createRequire(builder);

interface Config {
  readonly electronFuses: Readonly<Record<string, boolean>>;
  readonly [key: string]: unknown;
}
const { getConfig, validateConfiguration } = ofBuilder('app-builder-lib/out/util/config/config') as {
  getConfig(folder: string, file: null, options: null): Promise<Config>;
  validateConfiguration(config: Config, log: unknown): Promise<void>;
};
const { DebugLogger } = ofBuilder('builder-util') as { DebugLogger: new (enabled: boolean) => unknown };

/** What precedes the fuses in Electron's program file, from the documentation of its fuses. */
const SENTINEL = 'dL7pKGdnNz796PbbjQWNKmHXBZaB9tsX';
/** Version 1, eight fuses, as Electron ships them. */
const AS_SHIPPED = '\x01\x0810110001';

const folder = mkdtempSync(join(tmpdir(), 'packing-'));
const unpacked = join(folder, 'release', 'linux-unpacked');
beforeAll(async () => {
  await buildInto(folder);
  for (const name of ['package.json', 'LICENSE', 'electron-builder.yml', 'assets'])
    cpSync(join(top, name), join(folder, name), { recursive: true });
  symlinkSync(join(top, 'node_modules'), join(folder, 'node_modules'), 'junction');
  const electron = join(folder, 'electron');
  mkdirSync(electron);
  writeFileSync(join(electron, 'electron'), `a program${SENTINEL}${AS_SHIPPED}its end`, { mode: 0o755 });
  writeFileSync(join(electron, 'LICENSE'), '');
  const pack = [join(dirname(builder), 'cli.js'), '--linux', '--x64', '--dir', `-c.electronDist=${electron}`];
  await promisify(execFile)(process.execPath, pack, { cwd: folder });
}, 120_000);
afterAll(() => rmSync(folder, { recursive: true, force: true }));

test('the packer takes its settings, and would not take wrong ones', async () => {
  const config = await getConfig(top, null, null);
  await validateConfiguration(config, new DebugLogger(false));
  await expect(validateConfiguration({ ...config, fuses: {} }, new DebugLogger(false))).rejects.toThrow('unknown property');
  expect(config).toMatchObject({
    appId: 'org.tallybeam.app',
    asar: true,
    publish: null,
    linux: { target: ['AppImage', 'deb'] },
    win: { target: 'nsis' },
    mac: { target: 'dmg' },
  });
  expect(config['fileAssociations']).toBeUndefined();
});

test('every fuse that lets others in is off, and only the packed program is run', async () => {
  expect((await getConfig(top, null, null)).electronFuses).toEqual({
    runAsNode: false,
    enableNodeOptionsEnvironmentVariable: false,
    enableNodeCliInspectArguments: false,
    enableCookieEncryption: true,
    enableEmbeddedAsarIntegrityValidation: true,
    onlyLoadAppFromAsar: true,
    loadBrowserProcessSpecificV8Snapshot: false,
    grantFileProtocolExtraPrivileges: false,
  });
  // In the order of Electron's fuses: as Node, cookies, NODE_OPTIONS, inspect, integrity, only asar, snapshot, file scheme.
  expect(readFileSync(join(unpacked, 'tallybeam'), 'latin1')).toBe(`a program${SENTINEL}\x01\x0801001100its end`);
});

test('packed are the program, the preload, the page and the licence, and no package', () => {
  const { listPackage } = ofBuilder(ofBuilder.resolve('@electron/asar', { paths: [dirname(ofBuilder.resolve('app-builder-lib'))] })) as {
    listPackage(path: string): string[];
  };
  const packed = listPackage(join(unpacked, 'resources', 'app.asar')).map((path) => path.replaceAll('\\', '/'));
  const shared = packed.filter((path) => path.startsWith('/dist/main/shared-'));
  expect(packed.filter((path) => !shared.includes(path))).toEqual([
    '/LICENSE',
    '/dist',
    '/dist/main',
    '/dist/main/main.js',
    '/dist/preload',
    '/dist/preload/preload.cjs',
    '/dist/renderer',
    '/dist/renderer/index.html',
    '/package.json',
  ]);
  expect(readdirSync(join(unpacked, 'resources'))).toEqual(['app.asar']);
});
