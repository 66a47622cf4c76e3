import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import Store from 'electron-store';
import { expect, test } from 'vitest';
import { Settings } from '../../src-main/settings';
import { userFolder } from '../../src-main/user-folder';
import { openConf, temporaryFolder } from './machine';

const NOW = () => new Date('2026-12-01T08:00:00.000Z');
const settingsIn = (folder: string) => new Settings(folder, openConf, NOW);

test('the window and the browser keep the same settings file', () => {
  const folder = temporaryFolder();
  const inWindow = new Settings(folder, (cwd, name) => new Store({ cwd, name, clearInvalidConfig: false }), NOW);
  inWindow.savePreferences({ person: 'A. Planner', theme: 'dark' });
  expect(readdirSync(folder)).toEqual(['settings.json']);
  expect(settingsIn(folder).preferences()).toMatchObject({ person: 'A. Planner', theme: 'dark', textScale: 100 });
  settingsIn(folder).savePreferences({ textScale: 125 });
  expect(inWindow.preferences()).toMatchObject({ person: 'A. Planner', textScale: 125 });
});

test.each(['{"theme":"da', '', 'null', '[]', '"dark"', '\0\0\0'])(
  'an invalid settings file (%j) is set aside, the defaults are used, and the user is told',
  (text) => {
    const folder = temporaryFolder();
    writeFileSync(join(folder, 'settings.json'), text);
    const settings = settingsIn(folder);
    expect(settings.preferences()).toEqual({ theme: 'system', textScale: 100, recentSiteIds: [], person: '', locale: 'und' });
    expect(settings.notices).toEqual([
      `The settings file was invalid. It was set aside as settings-set-aside-20261201T080000000Z.json in ${folder}, and the preferences are at their defaults.`,
    ]);
    expect(readFileSync(join(folder, 'settings-set-aside-20261201T080000000Z.json'), 'utf8')).toBe(text);
    settings.savePreferences({ theme: 'light' });
    expect(settingsIn(folder).notices).toEqual([]);
    expect(settingsIn(folder).preferences().theme).toBe('light');
  },
);

test('one that becomes invalid while the program runs is set aside as well', () => {
  const folder = temporaryFolder();
  const settings = settingsIn(folder);
  settings.savePreferences({ person: 'A. Planner' });
  writeFileSync(join(folder, 'settings.json'), '{"person":');
  expect(settings.savePreferences({ theme: 'dark' })).toMatchObject({ theme: 'dark', person: '' });
  expect(settings.notices).toHaveLength(1);
  expect(readFileSync(join(folder, 'settings-set-aside-20261201T080000000Z.json'), 'utf8')).toBe('{"person":');
});

test('a preference of the wrong kind in the file is at its default, the others are kept', () => {
  const folder = temporaryFolder();
  writeFileSync(
    join(folder, 'settings.json'),
    JSON.stringify({ theme: 7, textScale: 'big', recentSiteIds: ['a', '../b'], person: 'A. Planner', locale: 'x' }),
  );
  expect(settingsIn(folder).preferences()).toEqual({
    theme: 'system',
    textScale: 100,
    recentSiteIds: [],
    person: 'A. Planner',
    locale: 'und',
  });
  expect(settingsIn(folder).notices).toEqual([]);
});

test('settings that cannot be written are told, and the program goes on', () => {
  const settings = new Settings(temporaryFolder(), () => ({
    get: () => undefined,
    set: () => {
      throw Object.assign(new Error('full'), { code: 'ENOSPC' });
    },
  }));
  expect(() => settings.savePreferences({ theme: 'dark' })).toThrow(
    'The preferences were not saved, because there is no room left for it (ENOSPC)',
  );
  expect(settings.preferences().theme).toBe('system');
});

test.each<[NodeJS.Platform, NodeJS.ProcessEnv, string]>([
  ['linux', {}, join('/home/a', '.config', 'Tallybeam')],
  ['linux', { XDG_CONFIG_HOME: '/conf' }, join('/conf', 'Tallybeam')],
  ['darwin', {}, join('/home/a', 'Library', 'Application Support', 'Tallybeam')],
  ['win32', { APPDATA: 'R:' }, join('R:', 'Tallybeam')],
  ['win32', {}, join('/home/a', 'AppData', 'Roaming', 'Tallybeam')],
  ['linux', { TALLYBEAM_FOLDER: '/elsewhere' }, '/elsewhere'],
])('on %s with %j the user’s folder is %s', (platform, env, expected) => {
  expect(userFolder(env, platform, '/home/a')).toBe(expected);
});
