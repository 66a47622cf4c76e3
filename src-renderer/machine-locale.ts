/** How the machine's user writes numbers and dates, where nothing else was chosen in the preferences. */
import { MACHINE_LOCALE, type Preferences } from '../src-core/host';
import { isLocale } from '../src-core/units/format';

/** The first language of the user whose numbers are known; British English where the machine says none. */
export const machineLocale = (languages: readonly string[] = machineLanguages()): string => languages.find(isLocale) ?? 'en-GB';

const machineLanguages = (): readonly string[] =>
  typeof navigator === 'undefined' || !Array.isArray(navigator.languages) ? [] : navigator.languages;

/** Preferences with a locale that numbers can be written by. */
export const withLocale = (preferences: Preferences): Preferences =>
  preferences.locale === MACHINE_LOCALE ? { ...preferences, locale: machineLocale() } : preferences;
