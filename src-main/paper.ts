/** Saving the page as PDF: laid out by the page's own print rules, tagged, with an outline. */
import { dialog, type BrowserWindow } from 'electron';
import { nodeFs } from './fs-port';
import { telling } from './trouble';
import { renameOver, writeBeside } from './whole-file';

export async function savePdf(window: BrowserWindow, name: string): Promise<{ readonly saved: boolean }> {
  const { canceled, filePath } = await dialog.showSaveDialog(window, {
    title: 'Save as PDF',
    defaultPath: `${fileName(name)}.pdf`,
    filters: [{ name: 'PDF', extensions: ['pdf'] }],
  });
  if (canceled || !filePath) return { saved: false };
  const bytes = await window.webContents.printToPDF({
    preferCSSPageSize: true,
    printBackground: true,
    generateTaggedPDF: true,
    generateDocumentOutline: true,
  });
  return telling('The PDF was not saved', async () => {
    await renameOver(nodeFs, await writeBeside(nodeFs, filePath, bytes), filePath);
    return { saved: true };
  });
}

/** What is left of a name when no system could take it for a path. */
const fileName = (name: string): string =>
  name
    .replace(/[^\p{L}\p{N} ._-]+/gu, ' ')
    .replace(/^[ .]+|[ .]+$/g, '')
    .slice(0, 100) || 'Tallybeam';
