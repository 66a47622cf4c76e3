/** The program in its own window: one instance, one window, one page. */
import { fileURLToPath } from 'node:url';
import type { BrowserWindow } from 'electron';
import { app, dialog, ipcMain, Menu, protocol, session } from 'electron';
import Store from 'electron-store';
import type { About } from '../src-core/host';
import { answerAppRequest, APP_SCHEME } from './app-scheme';
import { readDemo } from './demo';
import { carryOverIpc } from './ipc';
import { Machine, type PageHost, type WindowParts } from './local-host';
import { lockContents, lockSession } from './lock-down';
import { menuTemplate } from './menu';
import { readPageFiles } from './page-files';
import { savePdf } from './paper';
import { Settings } from './settings';
import { userFolder } from './user-folder';
import { VERSION } from './version';
import { openWindow } from './window';

const NAME = 'Tallybeam';
const beside = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

export async function runDesktop(): Promise<void> {
  // The same folder as without a window, so that both find the same settings.
  app.setPath('userData', userFolder());
  if (!app.requestSingleInstanceLock()) return app.quit();
  app.enableSandbox();
  protocol.registerSchemesAsPrivileged([{ scheme: APP_SCHEME, privileges: { standard: true, secure: true, supportFetchAPI: true } }]);
  app.on('web-contents-created', (_event, contents) => lockContents(contents));
  app.on('window-all-closed', () => app.quit());
  await app.whenReady();
  try {
    await start();
  } catch (error) {
    dialog.showErrorBox(`${NAME} could not start`, error instanceof Error ? error.message : String(error));
    app.exit(1);
  }
}

async function start(): Promise<void> {
  const files = readPageFiles(beside('../renderer'));
  lockSession(session.defaultSession);
  protocol.handle(APP_SCHEME, (request) => answerAppRequest(files, request));
  const settings = new Settings(userFolder(), (cwd, name) => new Store({ cwd, name, clearInvalidConfig: false }));
  const machine = await Machine.start({
    ownFolder: userFolder(),
    sitesFolder: null,
    settings,
    version: VERSION,
    carrier: 'window',
    demo: readDemo,
  });

  let window: BrowserWindow | null = null;
  let page: PageHost | null = null;
  const parts: WindowParts = {
    savePdf: async (name) => (window === null ? { saved: false } : savePdf(window, name)),
    chooseSitesFolder: () => chooseSitesFolder(machine, window, () => host().about()),
  };
  const host = (): PageHost => (page ??= machine.page(parts));
  carryOverIpc(ipcMain, () => window?.webContents ?? null, host);

  const show = (): void => {
    window = openWindow(settings, beside('../preload/preload.cjs'), NAME);
    // Each load of the page edits into a journal of its own.
    window.webContents.on('did-navigate', () => {
      page?.close();
      page = null;
    });
    window.on('closed', () => {
      window = null;
    });
  };
  Menu.setApplicationMenu(Menu.buildFromTemplate(menuTemplate(process.platform, NAME)));
  // What a second start was given is untrusted, and is not looked at.
  app.on('second-instance', () => {
    if (window?.isMinimized() === true) window.restore();
    window?.focus();
  });
  app.on('activate', () => {
    if (window === null) show();
  });
  show();
}

async function chooseSitesFolder(machine: Machine, window: BrowserWindow | null, about: () => Promise<About>): Promise<About> {
  if (window === null) return about();
  const { canceled, filePaths } = await dialog.showOpenDialog(window, {
    title: 'Choose the sites folder',
    defaultPath: machine.sitesFolder,
    properties: ['openDirectory', 'createDirectory'],
  });
  const [folder] = filePaths;
  if (!canceled && folder !== undefined) await machine.useFolder(folder);
  return about();
}
