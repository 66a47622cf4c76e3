/** Everything that the page could be made to ask for and never needs is denied here, whoever asks. */
import type { Session, WebContents } from 'electron';
import { isOwnAddress, isOwnBlob } from './app-protocol';

/** Electron grants what no handler denies. */
export function lockSession(session: Session): void {
  session.setPermissionRequestHandler((_contents, _permission, answer) => answer(false));
  session.setPermissionCheckHandler(() => false);
  session.setDevicePermissionHandler(() => false);
  session.setDisplayMediaRequestHandler((_request, answer) => answer(null));
  session.webRequest.onBeforeRequest((details, answer) => answer({ cancel: !mayBeLoaded(details.url) }));
  session.on('will-download', (event, item) => {
    if (!isOwnBlob(item.getURL())) event.preventDefault();
  });
}

/** No network: the page's own files, what it makes itself, and the developer tools of a build that has them. */
const mayBeLoaded = (address: string): boolean =>
  isOwnAddress(address) || isOwnBlob(address) || address.startsWith('data:') || address.startsWith('devtools://');

/** The page is one document: nothing leads out of it, nothing opens beside it. */
export function lockContents(contents: WebContents): void {
  contents.setWindowOpenHandler(() => ({ action: 'deny' }));
  contents.on('will-navigate', (event) => event.preventDefault());
  contents.on('will-frame-navigate', (event) => event.preventDefault());
  contents.on('will-redirect', (event) => event.preventDefault());
  contents.on('will-attach-webview', (event) => event.preventDefault());
}
