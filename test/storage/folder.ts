/** A temporary sites folder for each test, and the stores over it. */
import { mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach } from 'vitest';
import type { FsPort } from '../../src-main/store/fs-port';
import { nodeFs } from '../../src-main/store/fs-port';
import { SiteStore } from '../../src-main/store/site-store';

const made: string[] = [];
afterEach(() => made.splice(0).forEach((folder) => rmSync(folder, { recursive: true, force: true })));

export function newFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), 'sites-'));
  made.push(folder);
  return folder;
}

/** A clock that goes on by one second each time it is asked. */
export function clock(start = '2026-12-01T08:00:00.000Z'): () => Date {
  let time = Date.parse(start);
  return () => new Date((time += 1000));
}

export const storeIn = (folder: string, fs: FsPort = nodeFs, now = clock()): SiteStore =>
  new SiteStore({ fs, folder, program: '0.1.0', now });

/** Every file below the folder with its content, by its path. */
export function contentOf(folder: string): Record<string, string> {
  const files = readdirSync(folder, { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile());
  return Object.fromEntries(
    files
      .map((entry) => join(entry.parentPath, entry.name))
      .sort()
      .map((path) => [path.slice(folder.length + 1), readFileSync(path, 'utf8')]),
  );
}

export const siteText = (folder: string, id = 's'): string => readFileSync(join(folder, `${id}.tallybeam.json`), 'utf8');
