/**
 * The listing of a package: whose site it is, who made it and when, and every part with its size and
 * checksum. The listing carries its own checksum, with its own 64 digits taken as zeros, so that every
 * changed byte of a package that matters is noticed and its part named. It proves that nothing was changed
 * by accident or in passing; it does not prove who made the package.
 */
import { choice, number, report, text, type Problem, type Reader } from '../site/fields';
import type { Hash } from '../site/envelope';
import { LIMITS } from '../site/limits';
import { list, record } from '../site/records';
import { aName } from '../site/schema-goods';
import { namedId, readDocument, writeDocument, type DocumentKind } from '../visit/read-document';
import { MOST_PARTS, PACKAGE_BYTES } from './package';
import { partNamed } from './parts';

/** Version of the package's form; a newer one is refused by its number. */
export const PACKAGE_VERSION = 1;
const FORMAT = 'tallybeam-package';

export interface ListedPart {
  readonly name: string;
  readonly bytes: number;
  /** SHA-256 of the part's bytes, as 64 lower-case hexadecimal digits. */
  readonly sha256: string;
}

export interface Listing {
  /** Version of the program that made the package. */
  readonly program: string;
  /** ISO time, UTC. */
  readonly madeAt: string;
  readonly siteId: string;
  readonly siteName: string;
  readonly parts: readonly ListedPart[];
}

type Written = Listing & { readonly format: typeof FORMAT; readonly checksum: string };

export type ListingReading =
  { readonly ok: true; readonly listing: Listing } | { readonly ok: false; readonly problems: readonly Problem[] };

const ZEROS = '0'.repeat(64);
const aHash = text(64);

const kind: DocumentKind<Written> = {
  noun: 'package',
  version: PACKAGE_VERSION,
  field: record(
    'package',
    {
      format: choice([FORMAT]),
      version: number({ least: PACKAGE_VERSION, most: PACKAGE_VERSION, whole: true }),
      program: text(LIMITS.idLength, { visible: true }),
      madeAt: text(LIMITS.idLength, { visible: true }),
      siteId: namedId('site'),
      siteName: aName,
      parts: list(
        'parts',
        record<ListedPart>('part', {
          name: text(LIMITS.nameLength, { visible: true }),
          bytes: number({ least: 0, most: PACKAGE_BYTES, whole: true }),
          sha256: aHash,
        }),
        MOST_PARTS,
      ),
      checksum: aHash,
    },
    eachPartOnce,
  ),
};

/** Two names that differ in capitals only are one file on some systems. */
function eachPartOnce({ parts }: Readonly<Record<string, unknown>>, reader: Reader): void {
  if (!Array.isArray(parts)) return;
  const once = new Set<string>();
  parts.forEach((part: unknown, i) => {
    const { name } = (part ?? {}) as { name?: unknown };
    if (typeof name !== 'string') return;
    if (partNamed(name) === null)
      report(reader, 'Names nothing that a package holds. Take the file as it was exported.', 'parts', i, 'name');
    const plain = name.toLowerCase();
    if (once.size === once.add(plain).size) report(reader, 'Stands twice. Take the file as it was exported.', 'parts', i, 'name');
  });
}

/** @throws RangeError if it holds what `readListing` would refuse in a single value, quoting it */
export function writeListing(listing: Listing, hash: Hash): string {
  const written = (checksum: string): string => writeDocument<Written>(kind, { format: FORMAT, ...listing, checksum });
  return written(hash(written(ZEROS)));
}

/** The listing, if its text is as it was written. */
export function readListing(written: string, hash: Hash): ListingReading {
  const refused = (message: string): ListingReading => ({ ok: false, problems: [{ path: '', message }] });
  let json: unknown;
  try {
    json = JSON.parse(written);
  } catch {
    return refused('Breaks off or is damaged. Take another copy of the file.');
  }
  const reading = readDocument(kind, json);
  if (!reading.ok) return reading;
  const { format: _, checksum: __, ...listing } = reading.document;
  if (writeListing(listing, hash) !== written)
    return refused('Its checksum differs: it was changed or damaged after it was made. Take another copy of the file.');
  return { ok: true, listing };
}
