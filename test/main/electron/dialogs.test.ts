import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { BrowserWindow as ElectronWindow } from 'electron';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { askForSitesFolder } from '../../../src-main/window/folder-dialog';
import { nodeFs, type FsPort } from '../../../src-main/store/fs-port';
import { asFileName, savePdf } from '../../../src-main/window/pdf';
import { BrowserWindow, standIn } from '../electron-stand-in';

let folder = '';
let window: BrowserWindow;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'pdf-'));
  window = new BrowserWindow({});
  standIn.dialogs.length = 0;
});
afterEach(() => {
  rmSync(folder, { recursive: true });
  standIn.answers.save = { canceled: true, filePath: '' };
  standIn.answers.open = { canceled: true, filePaths: [] };
});
const save = (name: string, fs: FsPort = nodeFs) => savePdf(window as unknown as ElectronWindow, name, fs);

test('the PDF is the page as its print rules set it, tagged and with an outline, where the user wants it', async () => {
  const filePath = join(folder, 'Bay A1.pdf');
  standIn.answers.save = { canceled: false, filePath };
  expect(await save('Bay A1')).toEqual({ saved: true });
  expect(window.webContents.printed).toEqual([
    { preferCSSPageSize: true, printBackground: true, generateTaggedPDF: true, generateDocumentOutline: true },
  ]);
  expect(readFileSync(filePath)).toEqual(standIn.pdf);
  expect(readdirSync(folder)).toEqual(['Bay A1.pdf']);
});

test('nothing is printed or written where the user thinks better of it', async () => {
  expect(await save('Bay A1')).toEqual({ saved: false });
  expect(window.webContents.printed).toEqual([]);
  expect(readdirSync(folder)).toEqual([]);
});

test('a PDF that cannot be written says where and how to mend it, and leaves the old one as it was', async () => {
  const filePath = join(folder, 'Bay A1.pdf');
  writeFileSync(filePath, 'the old one');
  standIn.answers.save = { canceled: false, filePath };
  const full: FsPort = {
    ...nodeFs,
    create: async (path) => ({
      ...(await nodeFs.create(path)),
      write: async () => {
        throw Object.assign(new Error('no space left on device'), { code: 'ENOSPC' });
      },
    }),
  };
  await expect(save('Bay A1', full)).rejects.toMatchObject({
    name: 'HostError',
    code: 'disk-full',
    message: `The PDF was not saved in ${folder} (ENOSPC). Choose another folder, or close the PDF if another program shows it, then try again.`,
  });
  expect(readFileSync(filePath, 'utf8')).toBe('the old one');
  expect(readdirSync(folder)).toEqual(['Bay A1.pdf']);
});

test('a folder that is gone since it was chosen is told', async () => {
  standIn.answers.save = { canceled: false, filePath: join(folder, 'gone', 'Bay.pdf') };
  await expect(save('Bay')).rejects.toMatchObject({ code: 'folder-gone' });
});

test.each([
  ['Bay A1', 'Bay A1'],
  ['Depot: hall 2/3', 'Depot hall 2 3'],
  ['../../etc/passwd', 'etc passwd'],
  ['C:\\Windows\\x', 'C Windows x'],
  ['a\0b\nc', 'a b c'],
  ['...', 'Tallybeam'],
  ['', 'Tallybeam'],
  ['con', 'Tallybeam con'],
  ['LPT1.old', 'Tallybeam LPT1.old'],
  ['Lager Süd – Halle „B“', 'Lager Süd – Halle „B“'],
  ['name. ', 'name'],
  ['x'.repeat(300), 'x'.repeat(100)],
])('"%s" is proposed as the file "%s"', (name, file) => {
  expect(asFileName(name)).toBe(file);
});

test('the sites folder is the one the user chose, or stays', async () => {
  const ask = () => askForSitesFolder(window as unknown as ElectronWindow, folder);
  expect(await ask()).toBeNull();
  standIn.answers.open = { canceled: false, filePaths: [] };
  expect(await ask()).toBeNull();
  standIn.answers.open = { canceled: false, filePaths: [join(folder, 'sites')] };
  expect(await ask()).toBe(join(folder, 'sites'));
  expect(standIn.dialogs.at(-1)).toMatchObject({ options: { defaultPath: folder, properties: ['openDirectory', 'createDirectory'] } });
});
