/** Before the end-to-end tests: a Chromium to drive and the program, built as it is shipped. */
import { createBuilder } from 'vite';
import { chromiumPath } from './chromium';

export async function setup(): Promise<void> {
  process.env['CHROMIUM_PATH'] = chromiumPath();
  const builder = await createBuilder({ configFile: new URL('../../vite.config.ts', import.meta.url).pathname, logLevel: 'error' });
  await builder.buildApp();
}
