/** The desktop program: one instance, one window, the page under its own scheme. */
import { mkdirSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { app, BrowserWindow, dialog, ipcMain, Menu, protocol, session } from 'electron';
import Store from 'electron-store';
import { answerPageRequest, APP_SCHEME, PAGE_ADDRESS } from './window/app-protocol';
import { readDemo } from './demo';
import { askForSitesFolder } from './window/folder-dialog';
import { carryHost, type Carrier } from './window/ipc';
import { holdForJournal } from './window/leaving';
import { Machine, type PageHost } from './local-host';
import { lockContents, lockSession } from './window/lock-down';
import { menuTemplate } from './window/menu';
import { readPageFiles } from './page-files';
import { savePdf } from './window/pdf';
import { Settings } from './settings';
import { userFolder } from './user-folder';
import { VERSION } from './version';
import { makeWindow, showAgain } from './window/window';

/** The folder of the build; this program is in `main` below it. */
const BUILT = resolve(import.meta.dirname, '..');
/** Longest wait for calls that are still being answered when the program ends, ms. */
const LAST_CALLS = 10_000;

async function start(ownFolder: string): Promise<void> {
  const files = readPageFiles(join(BUILT, 'renderer'));
  const settings = new Settings(ownFolder, (cwd, name) => new Store({ cwd, name, clearInvalidConfig: false }));
  // A channel that electron-store opens for pages that use it themselves; ours does not.
  ipcMain.removeAllListeners('electron-store-get-data');
  const named = process.env['TALLYBEAM_SITES'] ?? '';
  const machine = await Machine.start({
    ownFolder,
    sitesFolder: named === '' ? null : resolve(named),
    settings,
    version: VERSION,
    carrier: 'window',
    demo: readDemo,
  });

  lockSession(session.defaultSession);
  protocol.handle(APP_SCHEME.scheme, (request) => answerPageRequest(files, request));
  Menu.setApplicationMenu(Menu.buildFromTemplate(menuTemplate(process.platform, !app.isPackaged)));

  const window = makeWindow(join(BUILT, 'preload', 'preload.cjs'), settings);
  let page: PageHost | null = null;
  const host = (): PageHost => (page ??= openPage(machine, window));
  const closePage = (): void => {
    page?.close();
    page = null;
  };
  const carrier = carryHost(window.webContents, host);
  // Each load of the page edits into a journal of its own.
  window.webContents.on('did-navigate', closePage);
  window.webContents.on('render-process-gone', (_event, { reason }) => {
    if (reason === 'clean-exit') return;
    if (wantsPageAgain(window, reason)) window.webContents.reload();
    else app.quit();
  });
  holdForJournal(window);
  finishCalls(carrier, closePage);
  await window.loadURL(PAGE_ADDRESS);
}

function openPage(machine: Machine, window: BrowserWindow): PageHost {
  const host = machine.page({
    savePdf: (name) => savePdf(window, name),
    chooseSitesFolder: async () => {
      const folder = await askForSitesFolder(window, machine.sitesFolder);
      if (folder !== null) await machine.useFolder(folder);
      return host.about();
    },
  });
  return host;
}

function wantsPageAgain(window: BrowserWindow, reason: string): boolean {
  const answer = dialog.showMessageBoxSync(window, {
    type: 'error',
    message: 'The page stopped working',
    detail: `The system says: ${reason}. Unsaved changes are in the journal and are offered when the site is opened again.`,
    buttons: ['Open the page again', 'Quit'],
    defaultId: 0,
    cancelId: 1,
    noLink: true,
  });
  return answer === 0;
}

/** A save that is under way when the program is told to end is finished first. */
function finishCalls(carrier: Carrier, close: () => void): void {
  let finished = false;
  app.on('will-quit', (event) => {
    if (finished) return;
    event.preventDefault();
    const limit = new Promise<void>((done) => setTimeout(done, LAST_CALLS).unref());
    void Promise.race([carrier.settled(), limit]).then(() => {
      finished = true;
      close();
      app.quit();
    });
  });
}

function cannotStart(error: unknown): void {
  dialog.showErrorBox('Tallybeam could not start', error instanceof Error ? error.message : String(error));
  app.exit(1);
}

function run(): void {
  const ownFolder = userFolder();
  const windowFolder = join(ownFolder, 'window');
  mkdirSync(windowFolder, { recursive: true });
  app.setPath('userData', ownFolder);
  app.setPath('sessionData', windowFolder);
  if (!app.requestSingleInstanceLock()) return app.quit();
  app.enableSandbox();
  protocol.registerSchemesAsPrivileged([APP_SCHEME]);
  app.on('web-contents-created', (_event, contents) => lockContents(contents));
  app.on('second-instance', () => BrowserWindow.getAllWindows().forEach(showAgain));
  app.on('window-all-closed', () => app.quit());
  // Not awaited: Electron gets ready only after this module has run to its end.
  app
    .whenReady()
    .then(() => start(ownFolder))
    .catch(cannotStart);
}

try {
  run();
} catch (error) {
  cannotStart(error);
}
