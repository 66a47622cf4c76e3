/** Serves until the program is stopped; shared by `npm run serve` and by `npm start` where there is no window. */
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { resolve } from 'node:path';
import { parseArgs } from 'node:util';
import { startServe, type Serving } from './serve-app';
import { userFolder } from './user-folder';

interface Wishes {
  readonly port: number;
  readonly sites: string | null;
  readonly quiet: boolean;
}

const USAGE = 'Usage: npm run serve -- [--port NUMBER] [--sites FOLDER] [--quiet]';

/** @throws Error whose message says what is wrong and how to write it */
export function readWishes(given: readonly string[], env: NodeJS.ProcessEnv = process.env): Wishes {
  const { values } = parseArgs({
    args: [...given],
    options: { port: { type: 'string' }, sites: { type: 'string' }, quiet: { type: 'boolean' } },
  });
  const port = values.port ?? env['TALLYBEAM_PORT'] ?? '0';
  if (!/^\d{1,5}$/.test(port) || Number(port) > 65_535)
    throw new Error(`--port must be a number from 0 (any free one) to 65535, got "${port}".`);
  const sites = values.sites ?? env['TALLYBEAM_SITES'] ?? '';
  return { port: Number(port), sites: sites === '' ? null : resolve(sites), quiet: values.quiet ?? false };
}

/** The page as it was built, beside this program. */
const rendererFolder = (): string => fileURLToPath(new URL('../renderer', import.meta.url));

export async function serveUntilStopped(given: readonly string[], say: (words: string) => void = console.log): Promise<void> {
  let wishes: Wishes;
  try {
    wishes = readWishes(given);
  } catch (error) {
    console.error(`${error instanceof Error ? error.message : String(error)}\n${USAGE}`);
    process.exitCode = 2;
    return;
  }
  let serving: Serving;
  try {
    serving = await startServe({ sitesFolder: wishes.sites, ownFolder: userFolder(), rendererFolder: rendererFolder(), port: wishes.port });
  } catch (error) {
    const taken = (error as NodeJS.ErrnoException).code === 'EADDRINUSE';
    const detail = error instanceof Error ? error.message : String(error);
    console.error(
      taken
        ? `Port ${wishes.port} is taken. Choose another with --port, or leave it out for any free one.`
        : `Tallybeam could not start: ${detail}`,
    );
    process.exitCode = 1;
    return;
  }
  if (wishes.quiet) say(serving.address);
  else {
    say(`Tallybeam is at ${serving.address}`);
    say(`Open that address in a browser on this machine; whoever has it can use the program. Sites are in ${serving.sitesFolder}.`);
    say('Stop with Ctrl+C. Unsaved changes stay in the journal and are offered the next time.');
  }
  await Promise.race([once(process, 'SIGINT'), once(process, 'SIGTERM')]);
  await serving.close();
}
