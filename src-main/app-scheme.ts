/** The page's own scheme in the window: `app://tallybeam/`, answered from the built page and nothing else. */
import { PAGE_HEADERS } from './csp';
import { pageFileAt, type PageFile } from './page-files';

export const APP_SCHEME = 'app';
export const APP_HOST = 'tallybeam';
export const APP_ADDRESS = `${APP_SCHEME}://${APP_HOST}/`;

/** Whether an address is one of the page's own; parsed, never compared by its beginning. */
export function isOwnAddress(address: string): boolean {
  try {
    const { protocol, host, username, password, port } = new URL(address);
    return protocol === `${APP_SCHEME}:` && host === APP_HOST && username === '' && password === '' && port === '';
  } catch {
    return false;
  }
}

/** The answer to any request under the scheme; a file of the list, or a refusal. */
export function answerAppRequest(files: ReadonlyMap<string, PageFile>, request: Pick<Request, 'url' | 'method'>): Response {
  if (!isOwnAddress(request.url)) return refuse(404);
  if (request.method !== 'GET') return refuse(405);
  const { pathname } = new URL(request.url);
  // No file of the page has a name that has to be written with any of these.
  if (/[%\\\0]|\/\/|\.\./.test(pathname)) return refuse(400);
  const file = pageFileAt(files, pathname);
  if (file === null) return refuse(404);
  return new Response(file.bytes, { status: 200, headers: { ...PAGE_HEADERS, 'content-type': file.type } });
}

const refuse = (status: number): Response =>
  new Response('', { status, headers: { ...PAGE_HEADERS, 'content-type': 'text/plain; charset=utf-8' } });
