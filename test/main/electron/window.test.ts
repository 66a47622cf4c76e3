import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import Conf from 'conf';
import type { BrowserWindow as ElectronWindow } from 'electron';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { holdForJournal } from '../../../src-main/window/leaving';
import { menuTemplate } from '../../../src-main/window/menu';
import { Settings } from '../../../src-main/settings';
import { LOCKS, makeWindow, showAgain } from '../../../src-main/window/window';
import { placeOnScreen } from '../../../src-main/window/window-place';
import { BrowserWindow, standIn, StandInEvent } from '../electron-stand-in';

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'window-'));
});
afterEach(() => {
  rmSync(folder, { recursive: true });
  standIn.windows.length = 0;
  standIn.dialogs.length = 0;
  standIn.answers.message = 0;
});
const settingsIn = (cwd: string) => new Settings(cwd, (at, configName) => new Conf({ cwd: at, configName, clearInvalidConfig: false }));
const asStandIn = (window: unknown): BrowserWindow => window as BrowserWindow;

describe('the one window', () => {
  test('is made with exactly these locks', () => {
    const window = asStandIn(makeWindow('/built/preload.cjs', settingsIn(folder)));
    expect(window.options['webPreferences']).toEqual({
      sandbox: true,
      contextIsolation: true,
      nodeIntegration: false,
      nodeIntegrationInWorker: false,
      nodeIntegrationInSubFrames: false,
      webSecurity: true,
      allowRunningInsecureContent: false,
      experimentalFeatures: false,
      webviewTag: false,
      navigateOnDragDrop: false,
      spellcheck: false,
      preload: '/built/preload.cjs',
    });
    expect(Object.isFrozen(LOCKS)).toBe(true);
    expect(Object.keys(window.options).sort()).toEqual(['height', 'minHeight', 'minWidth', 'show', 'title', 'webPreferences', 'width']);
    expect(standIn.windows).toHaveLength(1);
  });

  test('shows itself only once there is something to show', () => {
    const window = asStandIn(makeWindow('/built/preload.cjs', settingsIn(folder)));
    expect([window.options['show'], window.did]).toEqual([false, []]);
    window.emit('ready-to-show');
    expect(window.did).toEqual(['show']);
  });

  test('comes back where it stood, and maximised if it was', () => {
    const first = asStandIn(makeWindow('/built/preload.cjs', settingsIn(folder)));
    first.bounds = { x: 200, y: 100, width: 1100, height: 760 };
    first.maximized = true;
    first.close();
    const second = asStandIn(makeWindow('/built/preload.cjs', settingsIn(folder)));
    expect(second.options).toMatchObject({ x: 200, y: 100, width: 1100, height: 760 });
    second.emit('ready-to-show');
    expect(second.did).toEqual(['maximize', 'show']);
  });

  test('closes even where its place cannot be kept', () => {
    const settings = settingsIn(folder);
    const window = asStandIn(makeWindow('/built/preload.cjs', settings));
    vi.spyOn(settings, 'set').mockImplementation(() => {
      throw new Error('the disk is full');
    });
    expect(() => window.close()).not.toThrow();
  });

  test('a second start brings it to the front', () => {
    const window = new BrowserWindow({});
    window.minimized = true;
    showAgain(window as unknown as ElectronWindow);
    expect(window.did).toEqual(['restore', 'show', 'focus']);
  });
});

const SCREEN = { x: 0, y: 0, width: 1920, height: 1040 };
const LEFT = { x: -1280, y: 100, width: 1280, height: 984 };
const usual = { width: 1280, height: 860, maximized: false };

describe('the place of the window', () => {
  test.each([
    ['nothing was kept', undefined, [SCREEN], usual],
    ['null was kept', null, [SCREEN], usual],
    ['text was kept', 'left', [SCREEN], usual],
    ['a list was kept', [1, 2], [SCREEN], usual],
    ['numbers were kept as text', { x: '1', y: '2', width: '900', height: '700' }, [SCREEN], usual],
    ['sizes are no whole numbers', { x: 1, y: 2, width: 900.5, height: Infinity }, [SCREEN], { ...usual, x: 1, y: 2 }],
    [
      'it is on the screen',
      { x: 100, y: 50, width: 900, height: 700 },
      [SCREEN],
      { x: 100, y: 50, width: 900, height: 700, maximized: false },
    ],
    [
      'it is on the second screen',
      { x: -1200, y: 120, width: 900, height: 700 },
      [SCREEN, LEFT],
      { x: -1200, y: 120, width: 900, height: 700, maximized: false },
    ],
    ['the second screen is gone', { x: -1200, y: 120, width: 900, height: 700 }, [SCREEN], { width: 900, height: 700, maximized: false }],
    [
      'its title bar is above the screen',
      { x: 100, y: -30, width: 900, height: 700 },
      [SCREEN],
      { width: 900, height: 700, maximized: false },
    ],
    [
      'its title bar is below the screen',
      { x: 100, y: 1030, width: 900, height: 700 },
      [SCREEN],
      { width: 900, height: 700, maximized: false },
    ],
    [
      'too little of it is on the screen',
      { x: 1810, y: 50, width: 900, height: 700 },
      [SCREEN],
      { width: 900, height: 700, maximized: false },
    ],
    [
      'enough of it is on the screen',
      { x: 1800, y: 50, width: 900, height: 700 },
      [SCREEN],
      { x: 1800, y: 50, width: 900, height: 700, maximized: false },
    ],
    [
      'it is larger than the screen',
      { x: 0, y: 0, width: 4000, height: 3000 },
      [SCREEN],
      { x: 0, y: 0, width: 1920, height: 1040, maximized: false },
    ],
    ['it is too small to work in', { x: 0, y: 0, width: 1, height: -5 }, [SCREEN], { width: 640, height: 400, maximized: false }],
    [
      'it was maximised',
      { x: 5, y: 5, width: 900, height: 700, maximized: true },
      [SCREEN],
      { x: 5, y: 5, width: 900, height: 700, maximized: true },
    ],
    ['no screen is known', undefined, [], usual],
  ] as const)('%s', (_name, kept, screens, place) => {
    expect(placeOnScreen(kept, screens)).toEqual(place);
  });
});

describe('closing before the last edits are in the journal', () => {
  beforeEach(() => void vi.useFakeTimers());
  afterEach(() => void vi.useRealTimers());

  const held = () => {
    const window = new BrowserWindow({});
    holdForJournal(window as unknown as ElectronWindow, 2000);
    const tryToClose = (): boolean => {
      const event = new StandInEvent();
      window.webContents.emit('will-prevent-unload', event);
      return event.prevented;
    };
    return { window, tryToClose };
  };

  test('waits for the journal, then closes by itself and asks nothing', () => {
    const { window, tryToClose } = held();
    expect(tryToClose()).toBe(false);
    expect(window.did).toEqual([]);
    vi.advanceTimersByTime(2000);
    expect(window.did).toEqual(['close']);
    expect(standIn.dialogs).toEqual([]);
  });

  test('asks where the journal still has not got them; staying is what happens if nothing is chosen', () => {
    const { tryToClose } = held();
    tryToClose();
    vi.advanceTimersByTime(2000);
    expect(tryToClose()).toBe(false);
    expect(standIn.dialogs).toMatchObject([
      { kind: 'message', options: { buttons: ['Stay', 'Close and lose them'], defaultId: 0, cancelId: 0 } },
    ]);
    standIn.answers.message = 1;
    expect(tryToClose()).toBe(true);
  });

  test('a later close gets its own time', () => {
    const { tryToClose } = held();
    tryToClose();
    vi.advanceTimersByTime(10_000);
    tryToClose();
    expect(standIn.dialogs).toEqual([]);
  });

  test('a window that is gone by then is left alone', () => {
    const { window, tryToClose } = held();
    tryToClose();
    window.destroyed = true;
    vi.advanceTimersByTime(2000);
    expect(window.did).toEqual([]);
  });
});

describe('the menu', () => {
  interface Item {
    readonly role?: string;
    readonly label?: string;
    readonly type?: string;
    readonly accelerator?: string;
    readonly submenu?: readonly Item[];
  }
  const flat = (items: readonly Item[]): Item[] => items.flatMap((item) => [item, ...flat(item.submenu ?? [])]);

  test.each(['linux', 'win32', 'darwin'] as const)('on %s is made of roles, none twice, with no keys of its own', (platform) => {
    const items = flat(menuTemplate(platform, false) as Item[]);
    const roles = items.flatMap(({ role }) => (role === undefined ? [] : [role]));
    expect(new Set(roles).size).toBe(roles.length);
    expect(items.filter(({ accelerator }) => accelerator !== undefined)).toEqual([]);
    for (const item of items) expect(item.role !== undefined || item.type === 'separator' || item.submenu !== undefined).toBe(true);
    for (const role of ['toggleDevTools', 'reload', 'forceReload']) expect(roles).not.toContain(role);
    expect(roles).toEqual(expect.arrayContaining(platform === 'darwin' ? ['appMenu', 'editMenu', 'windowMenu'] : ['quit', 'close']));
  });

  test('has the developer tools only while the program is developed', () => {
    expect(flat(menuTemplate('linux', true) as Item[]).map(({ role }) => role)).toContain('toggleDevTools');
  });
});
