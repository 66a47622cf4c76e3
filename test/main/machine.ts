/** A machine over a temporary folder, without Electron. */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach } from 'vitest';
import Conf from 'conf';
import { readDemo } from '../../src-main/demo';
import { Machine, type MachineOptions } from '../../src-main/local-host';
import { Settings, type OpenSettingsFile } from '../../src-main/settings';

const folders: string[] = [];
afterEach(() => folders.splice(0).forEach((folder) => rmSync(folder, { recursive: true, force: true })));

export function temporaryFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), 'machine-'));
  folders.push(folder);
  return folder;
}

export const openConf: OpenSettingsFile = (cwd, configName) => new Conf({ cwd, configName, clearInvalidConfig: false });

export async function startMachine(top: string, more: Partial<MachineOptions> = {}) {
  const ownFolder = join(top, 'own');
  const sites = join(top, 'sites');
  const machine = await Machine.start({
    ownFolder,
    sitesFolder: sites,
    settings: new Settings(ownFolder, openConf),
    version: '0.1.0',
    carrier: 'browser',
    demo: readDemo,
    ...more,
  });
  return { machine, sites, ownFolder, writeFile: (name: string, text: string) => writeFileSync(join(sites, name), text) };
}
