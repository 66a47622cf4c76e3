/**
 * The file round a site: one JSON document on one line,
 *
 * `{"format":"tallybeam-site","version":2,"program":"0.1.0","savedAt":"…Z","checksum":"sha256-<64 hex>","site":{…}}`
 *
 * The checksum covers the whole text, with its own 64 digits taken as zeros, so every changed byte
 * is noticed. What the site inside must look like is `read.ts`'s subject.
 */
import { isRecord, quote, type Problem } from './fields';
import { keyFaults } from './json-keys';
import { SITE_VERSION, STEPS } from './migrations';

const SITE_FILE_FORMAT = 'tallybeam-site';
export const SITE_FILE_VERSION = SITE_VERSION;
/** Three times the file of a site of 10 000 bays with six levels each; more is no site file. */
export const SITE_FILE_BYTES = 64 * 1024 * 1024;

/** SHA-256 of the text's UTF-8 bytes, as 64 lower-case hexadecimal digits. */
export type Hash = (text: string) => string;

/** One step raises a site by one version, from the key's; it may change the JSON it is given. */
export interface Migrations {
  readonly current: number;
  readonly steps: Readonly<Record<number, (site: unknown) => unknown>>;
}
const MIGRATIONS: Migrations = { current: SITE_FILE_VERSION, steps: STEPS };

export interface SiteFileFacts {
  /** Version of the program that wrote the file. */
  readonly program: string;
  readonly savedAt: string;
}

/** Why a file was refused; `altered` is one that was well-formed but is not as it was saved. */
export type FileFault = 'too-large' | 'not-a-site-file' | 'newer-version' | 'altered' | 'faulty';

export type SiteFileReading =
  | { readonly ok: true; readonly facts: SiteFileFacts; readonly version: number; readonly site: unknown }
  | { readonly ok: false; readonly fault: FileFault; readonly problems: readonly Problem[] };

const ZEROS = '0'.repeat(64);
const KEYS = ['format', 'version', 'program', 'savedAt', 'checksum', 'site'];
const PROGRAM = /^\d+\.\d+\.\d+[\w.+-]{0,40}$/;
const SAVED_AT = /^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$/;

/** The text up to the checksum's digits. */
const headOf = (version: number, { program, savedAt }: SiteFileFacts): string =>
  `${JSON.stringify({ format: SITE_FILE_FORMAT, version, program, savedAt }).slice(0, -1)},"checksum":"sha256-`;

/**
 * The whole text of a site's file.
 * @param body the site as JSON in its canonical form, as `writeSite` gives it
 * @throws RangeError if program or time is not of the form that is read back
 */
export function writeSiteFile(body: string, facts: SiteFileFacts, hash: Hash, version: number = SITE_FILE_VERSION): string {
  if (!PROGRAM.test(facts.program)) throw new RangeError(`program version must be like 1.2.3, got ${quote(facts.program)}`);
  if (!SAVED_AT.test(facts.savedAt)) throw new RangeError(`time must be like 2026-12-01T08:30:00.000Z, got ${quote(facts.savedAt)}`);
  const head = headOf(version, facts);
  const tail = `","site":${body}}`;
  return head + hash(head + ZEROS + tail) + tail;
}

/** The site in a file's text, raised to the present version, if the text is whole and as it was saved. */
export function readSiteFile(text: string, hash: Hash, migrations: Migrations = MIGRATIONS): SiteFileReading {
  const opened = openText(text, migrations);
  if (!opened.ok) return opened;
  const { version, facts, checksum, json } = opened;
  const head = headOf(version, facts);
  const whole = text.startsWith(head + checksum) && hash(head + ZEROS + text.slice(head.length + ZEROS.length)) === checksum;
  if (!whole) return refuse('altered', 'checksum', ALTERED);
  // Also holds where someone computed a new checksum: no key twice, no number or space in another form.
  if (!sameText(json, text)) return faulty(keyFaults(text), 'Is not in the one form in which the program writes files. Import it instead.');
  return raise(opened, migrations);
}

/**
 * The same without the checksum, for a file that was edited by hand and is imported knowingly: layout
 * and checksum are free, everything else is as strict.
 */
export function readUnchecked(text: string, migrations: Migrations = MIGRATIONS): SiteFileReading {
  const opened = openText(text, migrations);
  if (!opened.ok) return opened;
  const faults = keyFaults(text);
  return faults.length > 0 ? faulty(faults, '') : raise(opened, migrations);
}

const ALTERED =
  'Does not match the file: it was changed outside the program or damaged since it was saved. ' +
  'Take an earlier state of the site or a copy of the file. If you changed it yourself, import it as unchecked and look it over.';

interface Opened {
  readonly ok: true;
  readonly version: number;
  readonly facts: SiteFileFacts;
  readonly checksum: string;
  readonly site: unknown;
  readonly json: unknown;
}
type Refused = Extract<SiteFileReading, { ok: false }>;

const refuse = (fault: FileFault, path: string, message: string): Refused => ({ ok: false, fault, problems: [{ path, message }] });

const faulty = (problems: readonly Problem[], otherwise: string): Refused =>
  problems.length > 0 ? { ok: false, fault: 'faulty', problems } : refuse('faulty', '', otherwise);

function openText(text: string, { current }: Migrations): Opened | Refused {
  if (text.length > SITE_FILE_BYTES)
    return refuse(
      'too-large',
      '',
      `Is larger than ${SITE_FILE_BYTES / 1024 / 1024} MiB, more than any site file. Check that it is the right file.`,
    );
  if (text.trim() === '') return refuse('not-a-site-file', '', 'Is empty. Take an earlier state of the site or a copy of the file.');
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    const began = text.startsWith(`{"format":"${SITE_FILE_FORMAT}"`);
    const detail = error instanceof SyntaxError ? ` (${error.message})` : '';
    if (began) return refuse('altered', '', `Breaks off or is damaged${detail}. Take an earlier state of the site or a copy of the file.`);
    return refuse('not-a-site-file', '', `Is no site file: it is not JSON${detail}. Choose a file that ends in .tallybeam.json.`);
  }
  if (!isRecord(json) || json['format'] !== SITE_FILE_FORMAT) {
    const found = isRecord(json) && json['format'] !== undefined ? `its format is ${quote(json['format'])}` : 'it names no format';
    return refuse('not-a-site-file', 'format', `Must be "${SITE_FILE_FORMAT}", but ${found}. Choose a file that was saved by Tallybeam.`);
  }
  const { version, program, savedAt, checksum, site } = json;
  if (typeof version !== 'number' || !Number.isInteger(version) || version < 1)
    return refuse('faulty', 'version', `Must be a whole number from 1 to ${current}, but is ${quote(version)}.`);
  if (version > current) {
    const by = typeof program === 'string' && PROGRAM.test(program) ? ` It was written by Tallybeam ${program}.` : '';
    const message = `The file is of version ${version}; this program reads versions up to ${current}.${by} Open it with that or a newer program.`;
    return refuse('newer-version', 'version', message);
  }
  const problems: Problem[] = [];
  for (const key of Object.keys(json)) {
    if (!KEYS.includes(key)) problems.push({ path: key, message: `No site file has the key ${quote(key)}. Remove it.` });
  }
  if (typeof program !== 'string' || !PROGRAM.test(program))
    problems.push({ path: 'program', message: `Must be a program version such as "0.1.0", but is ${quote(program)}.` });
  if (typeof savedAt !== 'string' || !SAVED_AT.test(savedAt) || Number.isNaN(Date.parse(savedAt)))
    problems.push({ path: 'savedAt', message: `Must be a time such as "2026-12-01T08:30:00.000Z", but is ${quote(savedAt)}.` });
  const digits = typeof checksum === 'string' ? /^sha256-([0-9a-f]{64})$/.exec(checksum)?.[1] : undefined;
  if (digits === undefined)
    problems.push({ path: 'checksum', message: `Must be "sha256-" and 64 hexadecimal digits, but is ${quote(checksum)}.` });
  if (site === undefined) problems.push({ path: 'site', message: 'Is missing. Take an earlier state of the site or a copy of the file.' });
  if (problems.length > 0) return { ok: false, fault: 'faulty', problems };
  return { ok: true, version, facts: { program: String(program), savedAt: String(savedAt) }, checksum: digits ?? '', site, json };
}

function sameText(json: unknown, text: string): boolean {
  try {
    return JSON.stringify(json) === text;
  } catch {
    // Nested deeper than the writer can follow: no site is.
    return false;
  }
}

function raise({ version, facts, site }: Opened, { current, steps }: Migrations): SiteFileReading {
  let raised = site;
  for (let from = version; from < current; from++) {
    const step = steps[from];
    if (step === undefined) return refuse('faulty', 'version', `Version ${from} cannot be raised to ${from + 1} by this program.`);
    try {
      raised = step(raised);
    } catch (error) {
      const detail = error instanceof Error ? error.message : String(error);
      return refuse('faulty', 'site', `Cannot be raised from version ${from} to ${from + 1}: ${detail}. The file was left as it is.`);
    }
  }
  return { ok: true, facts, version, site: raised };
}
