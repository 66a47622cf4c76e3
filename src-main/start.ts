/**
 * npm start [-- --browser] [-- --port N --sites FOLDER]: the program in its window, or, where there
 * can be none or none is wanted, the same page for a browser on this machine.
 */
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { findElectron, windowHindrance } from './window/electron-program';
import { serveUntilStopped } from './serve-command';

/** Longest wait for Electron's program file, ms. */
const FETCH_LIMIT = 60_000;
/** A window that fails sooner than this never came up, ms. */
const CAME_UP = 10_000;
/** The top of the program; its package.json names what Electron is to run. */
const TOP = fileURLToPath(new URL('../..', import.meta.url));

const given = process.argv.slice(2);
const forBrowser = given.filter((one) => one !== '--browser');
const why = forBrowser.length < given.length ? 'a browser was asked for' : await openWindow();
if (why !== null) {
  console.log(`No window, because ${why}. The same program is served to a browser instead.`);
  await serveUntilStopped(forBrowser);
}

/** @returns why there is no window, as a clause; null once the window has been closed */
async function openWindow(): Promise<string | null> {
  const hindrance = windowHindrance(process.platform, process.env, process.getuid?.() === 0);
  if (hindrance !== null) return hindrance;
  const [option] = forBrowser;
  if (option !== undefined) return `${option} is for a browser`;
  const found = await findElectron({ limit: FETCH_LIMIT, env: process.env });
  if (!found.ok) return found.why;
  return runWindow(found.path);
}

async function runWindow(program: string): Promise<string | null> {
  // Set by some editors' terminals, it would make Electron run as plain Node.
  const { ELECTRON_RUN_AS_NODE: _, ...env } = process.env;
  const began = performance.now();
  const window = spawn(program, [TOP], { stdio: 'inherit', env });
  let stopped = false;
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
    process.on(signal, () => {
      stopped = true;
      // Ctrl+C reaches the window by itself.
      if (signal !== 'SIGINT') window.kill(signal);
    });
  }
  try {
    const [code, signal] = (await once(window, 'exit')) as [number | null, string | null];
    if (!stopped && code !== 0 && performance.now() - began < CAME_UP)
      return `Electron ended before a window came up (${signal ?? `exit code ${code}`})`;
    process.exitCode = code ?? 1;
    return null;
  } catch (error) {
    return `Electron cannot be started (${error instanceof Error ? error.message : String(error)})`;
  }
}
