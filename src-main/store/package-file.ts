/**
 * The file of a package: a ZIP whose parts are stored as they are, with the listing first.
 *
 * A ZIP, so that an auditor can open it with what every system has, look at the photos and compute the
 * checksums without this program. Stored and not compressed, because photos do not get smaller, and so
 * that no part can be larger than the file it came in: there is nothing to unpack that could swell. One
 * JSON document with the photos in base64 would be a third larger, would have to fit into one string,
 * and could be looked at with nothing but this program.
 *
 * The file's own directory is trusted for nothing: names come from a fixed list, the sizes must add up to
 * the file's, and every part must have the size and checksum that the listing gives it.
 */
import { unzipSync, zipSync, type Zippable } from 'fflate';
import { readListing, writeListing, type Listing } from '../../src-core/package/listing';
import { LISTING_BYTES, MOST_PARTS, PACKAGE_BYTES } from '../../src-core/package/package';
import { LISTING_NAME, partNamed, partWords } from '../../src-core/package/parts';
import { sentences, sha256 } from './checked-site';
import { HostError } from '../trouble';

export type Parts = ReadonlyMap<string, Uint8Array>;

export interface OpenedPackage {
  readonly listing: Listing;
  readonly parts: Parts;
}

const NOT_TAKEN = 'The package was not brought in';
const TAKE_ANOTHER = 'Nothing of it was taken. Take another copy of the file, or have it exported again.';

/** Sizes of a ZIP's own records round a part that has neither comment nor extra field, bytes. */
const ROUND_A_PART = 30 + 46;
const AT_THE_END = 22;

/** @param about what the listing says besides the parts */
export function writePackage(parts: Parts, about: Omit<Listing, 'parts'>): Uint8Array {
  const bytes = [...parts.values()].reduce((sum, part) => sum + part.length, 0);
  if (bytes > PACKAGE_BYTES - LISTING_BYTES || parts.size > MOST_PARTS) throw new HostError('too-large', tooLarge(bytes));
  const listed = [...parts].map(([name, part]) => ({ name, bytes: part.length, sha256: sha256(part) }));
  const listing = new TextEncoder().encode(writeListing({ ...about, parts: listed }, sha256));
  const files: Zippable = { [LISTING_NAME]: listing, ...Object.fromEntries(parts) };
  return zipSync(files, { level: 0, mtime: about.madeAt });
}

/**
 * The parts of a package, each as it was when the package was made.
 * @throws HostError that names every part that is damaged, missing or does not belong there
 */
export function readPackage(file: Uint8Array): OpenedPackage {
  if (file.length > PACKAGE_BYTES) throw new HostError('too-large', tooLarge(file.length));
  const found = unpacked(file);
  const listingBytes = found.get(LISTING_NAME);
  if (listingBytes === undefined) throw refused('it has no listing, so it was not exported by Tallybeam or is damaged.');
  const reading = readListing(textOf(listingBytes) ?? '', sha256);
  if (!reading.ok) {
    const newer = reading.problems.some(({ path }) => path === 'version');
    throw new HostError(
      newer ? 'newer-version' : 'altered',
      `${NOT_TAKEN}. Its listing: ${sentences(reading.problems, 3)}\n${TAKE_ANOTHER}`,
    );
  }
  const { listing } = reading;
  const problems: string[] = [];
  for (const { name, bytes, sha256: expected } of listing.parts) {
    const part = found.get(name);
    if (part === undefined) problems.push(`${wordsOf(name)}: is missing`);
    else if (part.length !== bytes) problems.push(`${wordsOf(name)}: ${part.length} bytes in place of ${bytes}`);
    else if (sha256(part) !== expected) problems.push(`${wordsOf(name)}: checksum differs`);
  }
  const known = new Set([LISTING_NAME, ...listing.parts.map(({ name }) => name)]);
  for (const name of found.keys()) if (!known.has(name)) problems.push(`${wordsOf(name)}: is not in the listing`);
  if (problems.length > 0) throw damaged(problems);
  return { listing, parts: new Map(listing.parts.map(({ name }) => [name, found.get(name) ?? new Uint8Array()])) };
}

/** @param problems each names its part: "visit …: checksum differs" */
export function damaged(problems: readonly string[]): HostError {
  const lines = problems.slice(0, 20).map((problem) => `– ${problem}`);
  if (problems.length > lines.length) lines.push(`– and ${problems.length - lines.length} more`);
  return new HostError('altered', `${NOT_TAKEN}, because it was changed or damaged:\n${lines.join('\n')}\n${TAKE_ANOTHER}`);
}

/** The bytes as text; null if they are no UTF-8. */
export function textOf(bytes: Uint8Array): string | null {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return null;
  }
}

const refused = (why: string): HostError => new HostError('altered', `${NOT_TAKEN}: ${why} ${TAKE_ANOTHER}`);

const wordsOf = (name: string): string => {
  const part = partNamed(name);
  return part === null ? name : partWords(part);
};

const tooLarge = (bytes: number): string =>
  `A package holds at most ${PACKAGE_BYTES / 1024 / 1024} MiB, and this would be ${Math.ceil(bytes / 1024 / 1024)} MiB. ` +
  'Export it without the photos, and hand their folder over apart.';

/** Every part by its name, from the fixed list only; sizes are looked at before anything is taken out. */
function unpacked(file: Uint8Array): Map<string, Uint8Array> {
  const sizes = new Map<string, number>();
  const plain = new Set<string>();
  let total = AT_THE_END;
  if (file.length < AT_THE_END) throw refused('it breaks off.');
  try {
    const files = unzipSync(file, {
      filter: ({ name, size, originalSize, compression }) => {
        if (name !== LISTING_NAME && partNamed(name) === null) throw refused('it holds something that no package holds.');
        if (compression !== 0 || size !== originalSize)
          throw refused('it was packed anew by another program. Take the file as it was exported.');
        const lower = name.toLowerCase();
        if (plain.size === plain.add(lower).size) throw refused(`it holds ${wordsOf(name)} twice.`);
        total += size + 2 * name.length + ROUND_A_PART;
        if (total > file.length || (name === LISTING_NAME && size > LISTING_BYTES)) throw refused('its parts are larger than the whole.');
        sizes.set(name, size);
        return true;
      },
    });
    const found = new Map(Object.entries(files));
    for (const [name, size] of sizes) if (found.get(name)?.length !== size) throw refused(`${wordsOf(name)} breaks off.`);
    if (total !== file.length) throw refused('it holds more than its parts.');
    return found;
  } catch (error) {
    if (error instanceof HostError) throw error;
    throw refused('it breaks off or is damaged.');
  }
}
