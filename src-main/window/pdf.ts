/** Saves the page, as it is set out for print, as a PDF where the user wants it. */
import { dirname, join } from 'node:path';
import { app, dialog, type BrowserWindow, type PrintToPDFOptions } from 'electron';
import { nodeFs, type FsPort } from '../store/fs-port';
import { HostError, troubleOf } from '../trouble';
import { renameOver, writeBeside } from '../store/whole-file';

/** The page's own print rules say the paper; headings and tables stay readable to assistive technology. */
const PDF_OPTIONS: Readonly<PrintToPDFOptions> = Object.freeze({
  preferCSSPageSize: true,
  printBackground: true,
  generateTaggedPDF: true,
  generateDocumentOutline: true,
});

/** @returns whether a file was written: false where the user thought better of it */
export async function savePdf(window: BrowserWindow, name: string, fs: FsPort = nodeFs): Promise<{ readonly saved: boolean }> {
  const { canceled, filePath } = await dialog.showSaveDialog(window, {
    title: 'Save as PDF',
    defaultPath: join(app.getPath('documents'), `${asFileName(name)}.pdf`),
    filters: [{ name: 'PDF', extensions: ['pdf'] }],
    properties: ['createDirectory', 'showOverwriteConfirmation'],
  });
  if (canceled || filePath === '') return { saved: false };
  const bytes = await window.webContents.printToPDF(PDF_OPTIONS);
  try {
    await renameOver(fs, await writeBeside(fs, filePath, bytes), filePath);
    await fs.syncFolder(dirname(filePath));
  } catch (error) {
    const { code } = troubleOf(error, '');
    const system = (error as NodeJS.ErrnoException).code ?? (error instanceof Error ? error.message : String(error));
    throw new HostError(
      code,
      `The PDF was not saved in ${dirname(filePath)} (${system}). Choose another folder, or close the PDF if another program shows it, then try again.`,
      error,
    );
  }
  return { saved: true };
}

/** A name that every system takes for a file. */
export function asFileName(name: string): string {
  const plain = name
    .replace(/[<>:"/\\|?*\p{Cc}]+/gu, ' ')
    .replace(/\s+/g, ' ')
    .trim()
    .slice(0, 100)
    .replace(/^[. ]+|[. ]+$/g, '');
  // Windows keeps these for devices.
  if (/^(con|prn|aux|nul|com\d|lpt\d)(\.|$)/i.test(plain)) return `Tallybeam ${plain}`;
  return plain === '' ? 'Tallybeam' : plain;
}
