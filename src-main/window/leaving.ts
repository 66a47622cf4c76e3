/**
 * Closing while the last edits are still on their way to the journal. The page holds the window for
 * as long as they are; Electron would leave it open without a word.
 */
import { dialog, type BrowserWindow } from 'electron';

/** The journal has an edit within two seconds, or says that it cannot be written. */
const ON_ITS_WAY = 2000;
const STAY = 0;

/** Closes once the journal has them; asks only where it cannot be written. */
export function holdForJournal(window: BrowserWindow, wait = ON_ITS_WAY): void {
  let waited = false;
  window.webContents.on('will-prevent-unload', (event) => {
    if (!waited) {
      waited = true;
      setTimeout(() => {
        if (!window.isDestroyed()) window.close();
        // Asked at once only by this second try; a later close gets its own time.
        setTimeout(() => (waited = false), wait);
      }, wait);
      return;
    }
    const answer = dialog.showMessageBoxSync(window, {
      type: 'warning',
      message: 'The last changes could not be kept',
      detail: 'They are not saved, and the journal could not be written either. Stay, save a copy to another folder, then close.',
      buttons: ['Stay', 'Close and lose them'],
      defaultId: STAY,
      cancelId: STAY,
      noLink: true,
    });
    // Here, preventing the event lets the page go.
    if (answer !== STAY) event.preventDefault();
  });
}
