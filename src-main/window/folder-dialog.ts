import { dialog, type BrowserWindow } from 'electron';

/** Lets the user choose the folder that holds the sites; null where they keep the present one. */
export async function askForSitesFolder(window: BrowserWindow, present: string): Promise<string | null> {
  const { canceled, filePaths } = await dialog.showOpenDialog(window, {
    title: 'Sites folder',
    message: 'Choose the folder that holds your sites',
    buttonLabel: 'Use this folder',
    defaultPath: present,
    properties: ['openDirectory', 'createDirectory'],
  });
  return canceled ? null : (filePaths[0] ?? null);
}
