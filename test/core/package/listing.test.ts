import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { readListing, writeListing, type Listing } from '../../../src-core/package/listing';
import { nameOfPart, partNamed } from '../../../src-core/package/parts';

const hash = (text: string) => createHash('sha256').update(text).digest('hex');
const listing: Listing = {
  program: '0.1.0',
  madeAt: '2026-12-01T08:00:00.000Z',
  siteId: 's1',
  siteName: 'Dépôt',
  parts: [
    { name: 'site.tallybeam.json', bytes: 12, sha256: 'ab'.repeat(32) },
    { name: 'visits/v1.json', bytes: 34, sha256: 'cd'.repeat(32) },
  ],
};
const written = writeListing(listing, hash);

test('a listing comes back as it was written', () => {
  expect(readListing(written, hash)).toEqual({ ok: true, listing });
});

test('no letter of a listing can be changed unnoticed', () => {
  for (let at = 0; at < written.length; at++) {
    const other = written[at] === 'a' ? 'b' : 'a';
    expect(readListing(written.slice(0, at) + other + written.slice(at + 1), hash).ok, `at ${at}`).toBe(false);
  }
});

test('its checksum is the SHA-256 of its own text with zeros for the digits, so that anybody can compute it', () => {
  const digits = /"checksum":"([0-9a-f]{64})"\}$/.exec(written)?.[1] ?? '';
  expect(hash(written.replace(digits, '0'.repeat(64)))).toBe(digits);
});

test('a newer form is refused by its number', () => {
  const newer = readListing(written.replace('"version":1', '"version":2'), hash);
  expect(newer).toMatchObject({ ok: false, problems: [{ path: 'version', message: expect.stringContaining('newer program') as string }] });
});

test.each(['visits/../v1.json', '/etc/passwd', 'visits/v1.exe', 'other/v1.json', 'constructor', 'VISITS/V1.json'])(
  '%j is no part',
  (name) => {
    const forged = writeListing({ ...listing, parts: [{ name, bytes: 1, sha256: 'ab'.repeat(32) }] }, hash);
    expect(readListing(forged, hash)).toMatchObject({ ok: false, problems: [{ path: 'parts[0].name' }] });
  },
);

test('two parts whose names differ in capitals only are refused', () => {
  const [part] = listing.parts;
  if (part === undefined) throw new Error('no part');
  const forged = writeListing({ ...listing, parts: ['visits/a.json', 'visits/A.json'].map((name) => ({ ...part, name })) }, hash);
  expect(readListing(forged, hash)).toMatchObject({ ok: false, problems: [{ path: 'parts[1].name' }] });
});

describe('names of parts', () => {
  test.each([
    'site.tallybeam.json',
    'follow-up.json',
    'visits/3f-2_A.json',
    'photos/p1.jpg',
    'photos/p1.webp',
    'records/chain.jsonl',
    'records/000012.json',
    'records-2/chain.jsonl',
    'records-99/000001.json',
  ])('%s is one, and is written back the same', (name) => {
    const part = partNamed(name);
    expect(part).not.toBeNull();
    expect(part && nameOfPart(part)).toBe(name);
  });

  test.each([
    '',
    'listing.json',
    'visits/',
    'visits/.json',
    'visits/a/b.json',
    'visits\\a.json',
    'visits/..json',
    'visits/__proto__.json',
    'photos/p1.jpg.exe',
    'photos/../p1.jpg',
    'records/000000.json',
    'records/0000001.json',
    'records-1/chain.jsonl',
    'records-100/chain.jsonl',
    'records/head.json',
    './site.tallybeam.json',
    'visits/a.json\0',
  ])('%j is none', (name) => {
    expect(partNamed(name)).toBeNull();
  });
});
