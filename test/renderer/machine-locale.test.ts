import { expect, test } from 'vitest';
import { machineLocale, withLocale } from '../../src-renderer/machine-locale';

const PREFERENCES = { theme: 'system', textScale: 100, recentSiteIds: [], person: '', locale: 'und' } as const;

test('numbers are written as in the first language of the machine’s user whose numbers are known', () => {
  expect(machineLocale(['de-AT', 'en-US'])).toBe('de-AT');
  expect(machineLocale(['xx-klingon-0', 'fr-CA'])).toBe('fr-CA');
  expect(machineLocale([])).toBe('en-GB');
});

test('a locale that was chosen stands, whatever the machine says', () => {
  expect(withLocale({ ...PREFERENCES, locale: 'fr-FR' }).locale).toBe('fr-FR');
  expect(withLocale(PREFERENCES).locale).not.toBe('und');
});
