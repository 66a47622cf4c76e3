/**
 * A stand-in for Electron: it records what it is asked for and fires what a test tells it to. Tests
 * of the sources get it in place of `electron`; the built program gets it through a module hook.
 */
import { EventEmitter } from 'node:events';
import { tmpdir } from 'node:os';

type Handler = (...args: never[]) => unknown;
type Denial = (...args: unknown[]) => unknown;

export class StandInEvent {
  prevented = false;
  preventDefault = (): void => {
    this.prevented = true;
  };
}

/** Everything recorded, and what the user answers in dialogs. */
export const standIn = {
  isFirst: true,
  ready: false,
  schemes: [] as unknown[],
  windows: [] as BrowserWindow[],
  handlers: new Map<string, Handler>(),
  protocols: new Map<string, (request: Request) => Response | Promise<Response>>(),
  menus: [] as unknown[],
  exposed: new Map<string, Record<string, unknown>>(),
  dialogs: [] as { readonly kind: string; readonly options: unknown }[],
  answers: { save: { canceled: true, filePath: '' }, open: { canceled: true, filePaths: [] as string[] }, message: 0 },
  pdf: Buffer.from('%PDF-1.7 a page'),
  screens: [{ id: 1, workArea: { x: 0, y: 0, width: 1920, height: 1040 } }],
  sandboxed: false,
  quits: 0,
  exits: [] as number[],
  /** Answers what the preload sends. */
  invoke: async (_channel: string, ..._sent: unknown[]): Promise<unknown> => {
    throw new Error('no main process is connected');
  },
  becomeReady: (): void => undefined,
};

class App extends EventEmitter {
  readonly isPackaged = false;
  readonly paths = new Map<string, string>();
  readonly #ready = new Promise<void>((resolve) => {
    standIn.becomeReady = () => {
      standIn.ready = true;
      resolve();
    };
  });
  setPath = (name: string, path: string) => void this.paths.set(name, path);
  getPath = (name: string) => this.paths.get(name) ?? tmpdir();
  getVersion = () => '0.0.0';
  whenReady = () => this.#ready;
  requestSingleInstanceLock = () => standIn.isFirst;
  enableSandbox = () => {
    if (standIn.ready) throw new Error('the sandbox has to be enabled before ready');
    standIn.sandboxed = true;
  };
  quit = () => {
    const event = new StandInEvent();
    this.emit('will-quit', event);
    if (!event.prevented) standIn.quits += 1;
  };
  exit = (code = 0) => void standIn.exits.push(code);
}
export const app = new App();

class IpcMain extends EventEmitter {
  handle = (channel: string, handler: Handler) => {
    if (standIn.handlers.has(channel)) throw new Error(`Attempted to register a second handler for '${channel}'`);
    standIn.handlers.set(channel, handler);
  };
}
export const ipcMain = new IpcMain();

export interface StandInFrame {
  url: string;
  parent: StandInFrame | null;
  detached: boolean;
  frameTreeNodeId: number;
}

export class WebContents extends EventEmitter {
  readonly mainFrame: StandInFrame = { url: 'about:blank', parent: null, detached: false, frameTreeNodeId: 1 };
  windowOpenHandler: Denial | null = null;
  readonly printed: unknown[] = [];
  reloads = 0;
  setWindowOpenHandler = (handler: Denial) => void (this.windowOpenHandler = handler);
  printToPDF = async (options: unknown) => {
    this.printed.push(options);
    return standIn.pdf;
  };
  reload = () => {
    this.reloads += 1;
    this.emit('did-navigate');
  };
}

export class BrowserWindow extends EventEmitter {
  static getAllWindows = () => standIn.windows;
  readonly webContents = new WebContents();
  readonly did: string[] = [];
  bounds = { x: 10, y: 20, width: 1000, height: 700 };
  maximized = false;
  minimized = false;
  destroyed = false;
  readonly options: Record<string, unknown>;
  constructor(options: Record<string, unknown>) {
    super();
    this.options = options;
    standIn.windows.push(this);
    app.emit('web-contents-created', new StandInEvent(), this.webContents);
  }
  loadURL = async (address: string) => {
    this.did.push(`load ${address}`);
    this.webContents.mainFrame.url = address;
    this.webContents.emit('did-navigate');
    this.emit('ready-to-show');
  };
  close = () => {
    this.did.push('close');
    this.emit('close');
  };
  getNormalBounds = () => this.bounds;
  isMaximized = () => this.maximized;
  isMinimized = () => this.minimized;
  isDestroyed = () => this.destroyed;
  maximize = () => void this.did.push('maximize');
  restore = () => void this.did.push('restore');
  show = () => void this.did.push('show');
  focus = () => void this.did.push('focus');
}

export class Session extends EventEmitter {
  permissionRequest: Denial | null = null;
  permissionCheck: Denial | null = null;
  devicePermission: Denial | null = null;
  displayMedia: Denial | null = null;
  beforeRequest: ((details: { url: string }, answer: (what: { cancel: boolean }) => void) => void) | null = null;
  setPermissionRequestHandler = (handler: Denial) => void (this.permissionRequest = handler);
  setPermissionCheckHandler = (handler: Denial) => void (this.permissionCheck = handler);
  setDevicePermissionHandler = (handler: Denial) => void (this.devicePermission = handler);
  setDisplayMediaRequestHandler = (handler: Denial) => void (this.displayMedia = handler);
  webRequest = { onBeforeRequest: (handler: NonNullable<Session['beforeRequest']>) => void (this.beforeRequest = handler) };
}
export const session = { defaultSession: new Session() };

export const protocol = {
  registerSchemesAsPrivileged: (schemes: unknown[]) => {
    if (standIn.ready) throw new Error('protocol.registerSchemesAsPrivileged should be called before app is ready');
    standIn.schemes.push(...schemes);
  },
  handle: (scheme: string, handler: (request: Request) => Response | Promise<Response>) => void standIn.protocols.set(scheme, handler),
};

export const Menu = {
  buildFromTemplate: (template: unknown) => template,
  setApplicationMenu: (menu: unknown) => void standIn.menus.push(menu),
};

const asked = <T>(kind: string, options: unknown, answer: T): T => {
  standIn.dialogs.push({ kind, options });
  return answer;
};
export const dialog = {
  showSaveDialog: async (_window: unknown, options: unknown) => asked('save', options, standIn.answers.save),
  showOpenDialog: async (_window: unknown, options: unknown) => asked('open', options, standIn.answers.open),
  showMessageBoxSync: (_window: unknown, options: unknown) => asked('message', options, standIn.answers.message),
  showErrorBox: (title: string, words: string) => asked('error', { title, words }, undefined),
};

export const screen = {
  getPrimaryDisplay: () => standIn.screens[0],
  getAllDisplays: () => standIn.screens,
};

export const contextBridge = {
  exposeInMainWorld: (name: string, what: Record<string, unknown>) => void standIn.exposed.set(name, what),
};
export const ipcRenderer = {
  // What crosses is copied, as Electron does; functions and the like cannot.
  invoke: async (channel: string, ...sent: unknown[]) => structuredClone(await standIn.invoke(channel, ...structuredClone(sent))),
};
export const shell = {};

export default {
  app,
  ipcMain,
  BrowserWindow,
  session,
  protocol,
  Menu,
  dialog,
  screen,
  contextBridge,
  ipcRenderer,
  shell,
};
