/**
 * The window's menu, by roles. What belongs to the site stands in the page's own menu with its keys:
 * those of the edit roles here act in text fields only, and the page sees every key first.
 */
import type { MenuItemConstructorOptions } from 'electron';

const SEPARATOR: MenuItemConstructorOptions = { type: 'separator' };

/** A Mac shows its edit keys nowhere but in the menu, and without it they do not work in text fields. */
const MAC_ONLY: readonly MenuItemConstructorOptions[] = [{ role: 'appMenu' }, { role: 'editMenu' }];

/** @param developing adds the developer tools, which a packed program does not have */
export function menuTemplate(platform: NodeJS.Platform, developing: boolean): MenuItemConstructorOptions[] {
  const mac = platform === 'darwin';
  return [
    ...(mac ? MAC_ONLY : [{ label: '&Program', submenu: [{ role: 'about' as const }, SEPARATOR, { role: 'quit' as const }] }]),
    {
      label: '&View',
      submenu: [
        { role: 'resetZoom' },
        { role: 'zoomIn' },
        { role: 'zoomOut' },
        SEPARATOR,
        { role: 'togglefullscreen' },
        ...(developing ? [SEPARATOR, { role: 'toggleDevTools' as const }] : []),
      ],
    },
    mac ? { role: 'windowMenu' } : { label: '&Window', submenu: [{ role: 'minimize' }, { role: 'close' }] },
  ];
}
