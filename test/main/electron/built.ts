/** The main process and the preload as they are shipped, built into a folder of their own. */
import { mkdirSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build, createBuilder } from 'vite';

const top = resolve(import.meta.dirname, '../../..');

/** Builds with the program's own settings; the page is one line, which is all that is looked at here. */
export async function buildInto(folder: string): Promise<void> {
  const builder = await createBuilder({
    configFile: join(top, 'vite.config.ts'),
    logLevel: 'silent',
    environments: {
      main: { build: { outDir: join(folder, 'dist', 'main') } },
      preload: { build: { outDir: join(folder, 'dist', 'preload') } },
    },
  });
  const { main, preload } = builder.environments;
  if (main === undefined || preload === undefined) throw new Error('vite.config.ts: an environment is missing');
  await builder.build(main);
  await builder.build(preload);
  mkdirSync(join(folder, 'dist', 'renderer'));
  writeFileSync(join(folder, 'dist', 'renderer', 'index.html'), '<!doctype html><title>the page</title>');
  writeFileSync(join(folder, 'package.json'), '{ "type": "module" }');
  await build({
    configFile: false,
    logLevel: 'silent',
    build: {
      ssr: true,
      outDir: join(folder, 'stand-in'),
      rollupOptions: { input: join(top, 'test/main/electron-stand-in.ts'), output: { entryFileNames: 'electron.mjs' } },
    },
  });
  writeFileSync(join(folder, 'run-main.mjs'), runMain(folder));
}

/** A program that runs the built main process and preload on the stand-in, uses them as a page would, and tells what came of it. */
function runMain(folder: string): string {
  const standIn = pathToFileURL(join(folder, 'stand-in', 'electron.mjs')).href;
  const hook = `export const resolve = (name, context, next) =>
    name === 'electron' ? { url: ${JSON.stringify(standIn)}, shortCircuit: true } : next(name, context);`;
  return `
import { readFileSync } from 'node:fs';
import { register } from 'node:module';
import { createContext, runInContext } from 'node:vm';
register('data:text/javascript,' + encodeURIComponent(${JSON.stringify(hook)}));
const electron = await import('electron');
const { standIn, app, ipcMain, session } = electron;
const until = async (done) => {
  for (let i = 0; i < 500 && !done(); i += 1) await new Promise((resolve) => setTimeout(resolve, 10));
  if (!done()) throw new Error('waited in vain for ' + done);
};

standIn.isFirst = process.env.SECOND !== '1';
await import('./dist/main/main.js');
if (!standIn.isFirst) {
  console.log(JSON.stringify({ quits: standIn.quits, schemes: standIn.schemes.length, windows: standIn.windows.length }));
  process.exit(0);
}
const beforeReady = { schemes: standIn.schemes, sandboxed: standIn.sandboxed, windows: standIn.windows.length };
standIn.becomeReady();
await until(() => standIn.exits.length > 0 || standIn.windows[0]?.did.some((what) => what.startsWith('load')));
if (standIn.exits.length > 0) {
  console.log(JSON.stringify({ exits: standIn.exits, dialogs: standIn.dialogs }));
  process.exit(0);
}
const [window] = standIn.windows;
const own = { sender: window.webContents, senderFrame: window.webContents.mainFrame };
standIn.invoke = (channel, ...sent) => standIn.handlers.get(channel)(own, ...sent);

const preload = readFileSync(window.options.webPreferences.preload, 'utf8');
const require = (name) => {
  if (name !== 'electron') throw new Error('required ' + name);
  return electron.default;
};
runInContext(preload, createContext({ require, exports: {}, module: { exports: {} } }));
const host = standIn.exposed.get('tallybeam');

const id = await host.addDemoSite();
const site = await host.readSite(id);
const body = JSON.stringify(JSON.parse(site.text).body ?? JSON.parse(site.text).site);
const missing = await host.readSite('nowhere').catch((failure) => failure);
const saving = host.saveSite({ id, body, baseRevision: site.revision });
app.quit();
const quitsWhileSaving = standIn.quits;
const saved = await saving.then(() => true, (failure) => failure);
await until(() => standIn.quits > 0);
const page = await standIn.protocols.get('app')(new Request('app://tallybeam/index.html'));
const stranger = await standIn.handlers.get('host:listSites')({ sender: window.webContents, senderFrame: null }, []);
app.emit('second-instance', {}, ['tallybeam', '--inspect', '/etc/passwd'], '/');
const download = { prevented: false, preventDefault() { this.prevented = true; } };
session.defaultSession.emit('will-download', download, { getURL: () => 'https://example.com/x' });
window.webContents.emit('render-process-gone', {}, { reason: 'crashed' });
console.log(JSON.stringify({
  beforeReady, page: await page.text(), policy: page.headers.get('content-security-policy'), about: await host.about(),
  sites: (await host.listSites()).map(({ problem }) => problem), missing, stranger, saved, quitsWhileSaving, quits: standIn.quits,
  window: window.options, did: window.did, userData: app.getPath('userData'), reloads: window.webContents.reloads,
  dialogs: standIn.dialogs.map(({ kind }) => kind), download: download.prevented, permission: session.defaultSession.permissionCheck(),
  openHandler: window.webContents.windowOpenHandler({ url: 'https://example.com' }), storeChannel: ipcMain.listenerCount('electron-store-get-data'),
  channels: [...standIn.handlers.keys()], menus: standIn.menus.length, exposed: [...standIn.exposed.keys()], methods: Object.keys(host),
}));
process.exit(0);
`;
}
