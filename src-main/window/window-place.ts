/** Where the window stood when it was closed, put back so that it can be seen and taken hold of. */
import type { Rectangle } from 'electron';

export interface WindowPlace {
  readonly width: number;
  readonly height: number;
  /** Both left out: in the middle of the screen. */
  readonly x?: number;
  readonly y?: number;
  readonly maximized: boolean;
}

export const SMALLEST = { width: 640, height: 400 };
const USUAL = { width: 1280, height: 860 };

/** Part of the title bar that has to be on a screen for the window to be moved by it, DIP. */
const GRIP = { width: 120, height: 24 };

/**
 * @param kept what the settings file holds, which may be anything
 * @param screens their work areas, the main one first
 */
export function placeOnScreen(kept: unknown, screens: readonly Rectangle[]): WindowPlace {
  const { width, height, x, y, maximized } = (typeof kept === 'object' && kept !== null ? kept : {}) as Record<string, unknown>;
  const isMaximized = maximized === true;
  const wanted = isWhole(width) && isWhole(height) ? { width, height } : USUAL;
  if (isWhole(x) && isWhole(y)) {
    const screen = screens.find((area) => canBeHeld({ x, y, ...wanted }, area));
    if (screen) return { x, y, ...within(wanted, screen), maximized: isMaximized };
  }
  return { ...within(wanted, screens[0] ?? USUAL), maximized: isMaximized };
}

const isWhole = (value: unknown): value is number => Number.isSafeInteger(value);

function canBeHeld(window: Rectangle, screen: Rectangle): boolean {
  const wide = Math.min(window.x + window.width, screen.x + screen.width) - Math.max(window.x, screen.x);
  return wide >= GRIP.width && window.y >= screen.y && window.y + GRIP.height <= screen.y + screen.height;
}

const within = (wanted: { width: number; height: number }, screen: { width: number; height: number }) => ({
  width: Math.max(SMALLEST.width, Math.min(wanted.width, screen.width)),
  height: Math.max(SMALLEST.height, Math.min(wanted.height, screen.height)),
});
