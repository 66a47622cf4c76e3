/** From a file's bytes to a site, through every check: size, text, checksum, form, version, content. */
import { createHash } from 'node:crypto';
import { readSiteFile, readUnchecked, SITE_FILE_BYTES, type FileFault, type SiteFileReading } from '../../src-core/site/envelope';
import type { Problem } from '../../src-core/site/fields';
import { keyFaults } from '../../src-core/site/json-keys';
import { readSite } from '../../src-core/site/read';
import type { Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import type { HostErrorCode } from '../../src-core/host';
import { HostError } from '../trouble';

export const sha256 = (content: string | Uint8Array): string => createHash('sha256').update(content).digest('hex');

/** Changes whenever a byte of the file does. */
export const revisionOf = (bytes: Uint8Array): string => sha256(bytes);

interface CheckedSite {
  readonly site: Site;
  readonly text: string;
  readonly savedAt: string;
}

export type CheckedReading =
  ({ readonly ok: true } & CheckedSite) | { readonly ok: false; readonly code: HostErrorCode; readonly problems: readonly Problem[] };

const CODES: Readonly<Record<FileFault, HostErrorCode>> = {
  'too-large': 'too-large',
  'not-a-site-file': 'unreadable',
  'newer-version': 'newer-version',
  altered: 'altered',
  faulty: 'unreadable',
};

/** The site in a file's bytes; every problem with its place where it cannot be taken. */
export function checkBytes(bytes: Uint8Array): CheckedReading {
  if (bytes.length > SITE_FILE_BYTES) return { ok: false, code: 'too-large', problems: [{ path: '', message: tooLarge(bytes.length) }] };
  let text: string;
  try {
    text = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    const message = 'Holds bytes that are no UTF-8 text: it was damaged. Take an earlier state of the site or a copy of the file.';
    return { ok: false, code: 'altered', problems: [{ path: '', message }] };
  }
  return checkText(text, readSiteFile(text, sha256));
}

/** The same for text that came from elsewhere; `unchecked` passes over layout and checksum. */
export const checkImport = (text: string, unchecked: boolean): CheckedReading =>
  checkText(text, unchecked ? readUnchecked(text) : readSiteFile(text, sha256));

function checkText(text: string, file: SiteFileReading): CheckedReading {
  if (!file.ok) return { ok: false, code: CODES[file.fault], problems: file.problems };
  const reading = readSite(file.site);
  if (!reading.ok) {
    const problems = reading.problems.map(({ path, message }) => ({ path: path === '' ? 'site' : `site.${path}`, message }));
    return { ok: false, code: 'unreadable', problems };
  }
  return { ok: true, site: reading.site, text, savedAt: file.facts.savedAt };
}

/**
 * The site in a body that the page sends to be saved, and the text to write.
 * @throws HostError that lists what is wrong with it
 */
export function checkBody(body: string): { readonly site: Site; readonly body: string } {
  if (body.length > SITE_FILE_BYTES) throw new HostError('too-large', `Not saved: the site ${tooLarge(body.length).toLowerCase()}`);
  let json: unknown;
  try {
    json = JSON.parse(body);
  } catch (error) {
    throw new HostError('bad-request', `Not saved: what was sent is no JSON (${error instanceof Error ? error.message : String(error)}).`);
  }
  const reading = readSite(json);
  if (!reading.ok) throw new HostError('bad-request', `Not saved, because the site is not right. ${sentences(reading.problems)}`);
  const written = writeSite(reading.site);
  const twice = written === body ? [] : keyFaults(body);
  if (twice.length > 0) throw new HostError('bad-request', `Not saved, because the site is not right. ${sentences(twice)}`);
  return { site: reading.site, body: written };
}

const tooLarge = (bytes: number): string =>
  `Is ${Math.ceil(bytes / 1024 / 1024)} MiB large, and no site file is larger than ${SITE_FILE_BYTES / 1024 / 1024} MiB.`;

/** The first few problems as sentences, with their places. */
export function sentences(problems: readonly Problem[], most = 20): string {
  const lines = problems.slice(0, most).map(({ path, message }) => (path === '' ? ofTheFile(message) : `${path}: ${message}`));
  if (problems.length > most) lines.push(`And ${problems.length - most} more.`);
  return lines.join('\n');
}

/** "The file is empty." rather than "The file: Is empty." */
const ofTheFile = (message: string): string =>
  /^(Is|Breaks) /.test(message) ? `The file ${message.charAt(0).toLowerCase()}${message.slice(1)}` : `The file: ${message}`;

export const misnamed = (name: string, id: string): string =>
  `${name} holds the site with the id ${id}, so it is a copy made outside the program. Import it to have it as a site of its own.`;
