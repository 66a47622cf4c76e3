/** Whether there can be a window here, and where Electron's own program file is, without ever waiting for long. */
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';

export type Found = { readonly ok: true; readonly path: string } | { readonly ok: false; readonly why: string };

/** Why no window can be shown here, as a clause; null if nothing speaks against it. */
export function windowHindrance(platform: NodeJS.Platform, env: NodeJS.ProcessEnv, isRoot: boolean): string | null {
  if (platform !== 'linux') return null;
  if (!env['DISPLAY'] && !env['WAYLAND_DISPLAY']) return 'there is no display here';
  if (isRoot) return 'Electron’s sandbox does not run as root, and the program does not run without it';
  return null;
}

export interface Search {
  /** Longest wait for the program file to be fetched, ms. */
  readonly limit: number;
  readonly env: NodeJS.ProcessEnv;
  /** The folder of Electron's package; null if it is not installed. */
  readonly folder?: string | null;
}

/** Finds the program file, and fetches it where it is not there yet. */
export async function findElectron({ limit, env, folder = packageFolder() }: Search): Promise<Found> {
  const missing = (why: string): Found => ({ ok: false, why });
  const there = programIn(folder, env);
  if (there !== null) return { ok: true, path: there };
  if (folder === null) return missing('Electron is not installed; "npm ci" installs it');
  if (isSet(env['ELECTRON_SKIP_BINARY_DOWNLOAD']))
    return missing('Electron’s program file is not there and ELECTRON_SKIP_BINARY_DOWNLOAD forbids to fetch it');
  console.log(`Electron’s program file is fetched, once; this is given up after ${Math.round(limit / 1000)} seconds.`);
  const trouble = await fetchProgram(join(folder, 'install.js'), limit, env);
  const fetched = programIn(folder, env);
  return fetched === null ? missing(trouble ?? 'Electron’s program file could not be fetched') : { ok: true, path: fetched };
}

const isSet = (value: string | undefined): boolean => value !== undefined && !['', '0', 'false'].includes(value);

function packageFolder(): string | null {
  try {
    return dirname(createRequire(import.meta.url).resolve('electron/package.json'));
  } catch {
    return null;
  }
}

/** Where the program file is below its folder. */
export const programName = (platform: NodeJS.Platform): string =>
  platform === 'darwin' ? 'Electron.app/Contents/MacOS/Electron' : platform === 'win32' ? 'electron.exe' : 'electron';

function programIn(folder: string | null, env: NodeJS.ProcessEnv): string | null {
  const override = env['ELECTRON_OVERRIDE_DIST_PATH'];
  // Its package writes the path down once all of the program is there.
  const isComplete = override || (folder !== null && existsSync(join(folder, 'path.txt')));
  if (!isComplete) return null;
  const path = join(override || join(folder ?? '', 'dist'), programName(process.platform));
  return existsSync(path) ? path : null;
}

/** @returns why it failed, as a clause; null if it says that it did not */
async function fetchProgram(script: string, limit: number, env: NodeJS.ProcessEnv): Promise<string | null> {
  const child = spawn(process.execPath, [script], { stdio: ['ignore', 'ignore', 'pipe'], env });
  let err = '';
  child.stderr.on('data', (piece: Buffer) => (err += piece.toString()));
  let late = false;
  const stop = () => child.kill('SIGKILL');
  const timer = setTimeout(() => {
    late = true;
    stop();
  }, limit);
  process.once('exit', stop);
  const [code] = (await once(child, 'exit')) as [number | null];
  process.off('exit', stop);
  clearTimeout(timer);
  if (code === 0) return null;
  if (late) return `Electron’s program file could not be fetched within ${Math.round(limit / 1000)} seconds`;
  const reason = /(?:^|[^\w])\w*Error: ?([^\n]+)/.exec(err)?.[1] ?? 'it gave no reason';
  return `Electron’s program file could not be fetched (${reason})`;
}
