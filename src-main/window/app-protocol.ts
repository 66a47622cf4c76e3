/** The page under `app://tallybeam/`, from the fixed list of its built files; `file:` is never used. */
import type { CustomScheme } from 'electron';
import { PAGE_HEADERS } from '../csp';
import { pageFileAt, type PageFile } from '../page-files';

const SCHEME = 'app';
const HOST = 'tallybeam';
export const PAGE_ADDRESS = `${SCHEME}://${HOST}/index.html`;

/** Has to be registered before Electron is ready. */
export const APP_SCHEME: CustomScheme = { scheme: SCHEME, privileges: { standard: true, secure: true, supportFetchAPI: true } };

/** Whether an address is of our own page. Compared part by part: to Node, `app:` addresses have no origin. */
export function isOwnAddress(address: string): boolean {
  if (!URL.canParse(address)) return false;
  const { protocol, host, username, password } = new URL(address);
  return protocol === `${SCHEME}:` && host === HOST && username === '' && password === '';
}

/** Whether an address is of a file that our own page made, such as a site that it hands over to be saved elsewhere. */
export const isOwnBlob = (address: string): boolean => address.startsWith('blob:') && isOwnAddress(address.slice('blob:'.length));

/** What the build names its files with; a path with anything else was made to get somewhere else. */
const PLAIN_PATH = /^(\/|(\/[\w-][\w.-]*)+)$/;

/** Answers every request under the scheme; the disk is not touched. */
export function answerPageRequest(files: ReadonlyMap<string, PageFile>, request: Pick<Request, 'method' | 'url'>): Response {
  const refuse = (status: number, words: string) =>
    new Response(words, { status, headers: { ...PAGE_HEADERS, 'content-type': 'text/plain; charset=utf-8' } });
  if (!isOwnAddress(request.url)) return refuse(404, 'There is nothing at this address.');
  if (request.method !== 'GET' && request.method !== 'HEAD') return refuse(405, 'Files of the page are read by GET.');
  const path = new URL(request.url).pathname || '/';
  if (!PLAIN_PATH.test(path)) return refuse(400, 'This is no path of a file of the page.');
  const file = pageFileAt(files, path);
  if (file === null) return refuse(404, 'There is no such file of the page.');
  return new Response(request.method === 'HEAD' ? null : file.bytes, { headers: { ...PAGE_HEADERS, 'content-type': file.type } });
}
