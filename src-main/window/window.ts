/** The one window, locked down. No other place makes windows. */
import { BrowserWindow, screen, type BrowserWindowConstructorOptions, type WebPreferences } from 'electron';
import type { Settings } from '../settings';
import { placeOnScreen, SMALLEST, type WindowPlace } from './window-place';

/** The page is treated as if it were hostile: it runs in the sandbox, without Node, apart from the preload. */
export const LOCKS = Object.freeze({
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
  // The spelling checker would fetch its word lists from the network.
  spellcheck: false,
} satisfies WebPreferences);

const KEPT = 'window';

const windowOptions = ({ maximized: _, ...bounds }: WindowPlace, preload: string): BrowserWindowConstructorOptions => ({
  ...bounds,
  minWidth: SMALLEST.width,
  minHeight: SMALLEST.height,
  title: 'Tallybeam',
  show: false,
  webPreferences: { ...LOCKS, preload },
});

/** Makes the window, which shows itself once the page has something to show. */
export function makeWindow(preload: string, settings: Settings): BrowserWindow {
  const main = screen.getPrimaryDisplay();
  const others = screen.getAllDisplays().filter(({ id }) => id !== main.id);
  const place = placeOnScreen(
    settings.get(KEPT),
    [main, ...others].map(({ workArea }) => workArea),
  );
  const window = new BrowserWindow(windowOptions(place, preload));
  window.once('ready-to-show', () => {
    if (place.maximized) window.maximize();
    window.show();
  });
  window.on('close', () => {
    try {
      settings.set({ [KEPT]: { ...window.getNormalBounds(), maximized: window.isMaximized() } satisfies WindowPlace });
    } catch {
      // The place of a window is not worth keeping it open for.
    }
  });
  return window;
}

/** Brings the window to the front, wherever it is. */
export function showAgain(window: BrowserWindow): void {
  if (window.isMinimized()) window.restore();
  window.show();
  window.focus();
}
