/**
 * The built page as a fixed list, read once at the start. A request names an entry of the list or
 * nothing: no path that is asked for ever reaches the disk.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { extname, join, relative, sep } from 'node:path';

export interface PageFile {
  readonly bytes: Uint8Array<ArrayBuffer>;
  readonly type: string;
}

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.woff2': 'font/woff2',
  '.txt': 'text/plain; charset=utf-8',
};

/**
 * Every file below the folder by its path in the address; `/` is index.html.
 * @throws Error that says what to do where the page has not been built
 */
export function readPageFiles(folder: string): ReadonlyMap<string, PageFile> {
  const files = new Map<string, PageFile>();
  for (const entry of listing(folder)) {
    // Links could lead out of the folder; a build has none.
    const type = TYPES[extname(entry.name)];
    if (!entry.isFile() || type === undefined) continue;
    const path = join(entry.parentPath, entry.name);
    files.set(`/${relative(folder, path).split(sep).join('/')}`, { bytes: new Uint8Array(readFileSync(path)), type });
  }
  const index = files.get('/index.html');
  if (index === undefined) throw new Error(`The page is not in ${folder}. Build it with "npm run build".`);
  return files.set('/', index);
}

function listing(folder: string) {
  try {
    return readdirSync(folder, { recursive: true, withFileTypes: true });
  } catch {
    return [];
  }
}

/** The file that a request's address names, as it stands in the request; null if there is none. */
export function pageFileAt(files: ReadonlyMap<string, PageFile>, address: string): PageFile | null {
  const path = address.split(/[?#]/, 1)[0] ?? '';
  return files.get(path) ?? null;
}
