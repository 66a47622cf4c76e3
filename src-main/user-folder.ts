/** Where the system keeps a user's program data; the same place in the window and without it. */
import { homedir } from 'node:os';
import { join } from 'node:path';

const NAME = 'Tallybeam';

/** @param env the environment; `TALLYBEAM_FOLDER` names another place */
export function userFolder(
  env: NodeJS.ProcessEnv = process.env,
  platform: NodeJS.Platform = process.platform,
  home: string = homedir(),
): string {
  const named = env['TALLYBEAM_FOLDER'];
  if (named) return named;
  if (platform === 'win32') return join(env['APPDATA'] || join(home, 'AppData', 'Roaming'), NAME);
  if (platform === 'darwin') return join(home, 'Library', 'Application Support', NAME);
  return join(env['XDG_CONFIG_HOME'] || join(home, '.config'), NAME);
}
