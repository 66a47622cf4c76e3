/**
 * Preferences, the sites folder and the window's place, in one small settings file kept by
 * electron-store or, without Electron, by the library beneath it. Both write the same file.
 *
 * An invalid file is set aside, not cleared: the defaults are used and the user is told.
 */
import { existsSync, mkdirSync, readFileSync, renameSync } from 'node:fs';
import { join } from 'node:path';
import { MACHINE_LOCALE, type Preferences } from '../src-core/host';
import { argumentFault, isPreference } from '../src-core/host-wire';
import { stampOf } from './store/file-names';
import { HostError, troubleOf } from './trouble';

export interface SettingsFile {
  get(key: string): unknown;
  set(values: Readonly<Record<string, unknown>>): void;
}
/** Opens `NAME.json` in the folder; may throw where it is invalid. */
export type OpenSettingsFile = (folder: string, name: string) => SettingsFile;

const NAME = 'settings';

const DEFAULT_PREFERENCES: Preferences = { theme: 'system', textScale: 100, recentSiteIds: [], person: '', locale: MACHINE_LOCALE };
const KEYS = Object.keys(DEFAULT_PREFERENCES) as readonly (keyof Preferences)[];

export class Settings {
  readonly #folder: string;
  readonly #open: OpenSettingsFile;
  readonly #now: () => Date;
  readonly #notices: string[] = [];
  #file: SettingsFile;

  constructor(folder: string, open: OpenSettingsFile, now: () => Date = () => new Date()) {
    this.#folder = folder;
    this.#open = open;
    this.#now = now;
    mkdirSync(folder, { recursive: true });
    this.#setAsideInvalid();
    this.#file = open(folder, NAME);
  }

  /** What the user must be told about the settings file. */
  get notices(): readonly string[] {
    return this.#notices;
  }

  get(key: string): unknown {
    try {
      return this.#file.get(key);
    } catch {
      // It became invalid while the program ran.
      this.#setAsideInvalid();
      this.#file = this.#open(this.#folder, NAME);
      return this.#file.get(key);
    }
  }

  set(values: Readonly<Record<string, unknown>>): void {
    try {
      this.get('theme');
      this.#file.set(values);
    } catch (error) {
      throw troubleOf(error, 'The preferences were not saved');
    }
  }

  /** A preference that is missing or cannot be is at its default. */
  preferences(): Preferences {
    const given = KEYS.map((key) => [key, this.get(key)] as const);
    return { ...DEFAULT_PREFERENCES, ...Object.fromEntries(given.filter(([key, value]) => isPreference(key, value))) };
  }

  savePreferences(change: Partial<Preferences>): Preferences {
    if (argumentFault('savePreferences', [change]) !== null)
      throw new HostError('bad-request', 'The preferences were not saved: one of them cannot be so.');
    this.set(change);
    return this.preferences();
  }

  #setAsideInvalid(): void {
    const path = join(this.#folder, `${NAME}.json`);
    if (!existsSync(path) || isJsonObject(path)) return;
    const aside = `${NAME}-set-aside-${stampOf(this.#now().toISOString())}.json`;
    try {
      renameSync(path, join(this.#folder, aside));
    } catch (error) {
      throw troubleOf(error, `The settings file ${path} is invalid and could not be set aside`);
    }
    this.#notices.push(
      `The settings file was invalid. It was set aside as ${aside} in ${this.#folder}, and the preferences are at their defaults.`,
    );
  }
}

function isJsonObject(path: string): boolean {
  try {
    const json: unknown = JSON.parse(readFileSync(path, 'utf8'));
    return typeof json === 'object' && json !== null && !Array.isArray(json);
  } catch {
    return false;
  }
}
