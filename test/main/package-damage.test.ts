/** Packages that were changed, damaged, cut off or made to do harm: refused, with the part that is wrong. */
import { readdirSync } from 'node:fs';
import { unzipSync, zipSync, type Zippable } from 'fflate';
import { describe, expect, test } from 'vitest';
import type { HostFailure } from '../../src-core/host';
import { readListing, writeListing } from '../../src-core/package/listing';
import { sha256 } from '../../src-main/store/checked-site';
import { readPackage, writePackage } from '../../src-main/store/package-file';
import { drawn } from '../storage/make';
import { failure, flipped, machineWith, packageOf, PHOTO, send } from './make-package';

/** The package with its parts changed and its listing made right again, as a forger would. */
function forged(file: Uint8Array, change: (parts: Record<string, Uint8Array>) => void): Uint8Array {
  const { 'listing.json': listingBytes = new Uint8Array(), ...parts } = unzipSync(file);
  const reading = readListing(new TextDecoder().decode(listingBytes), sha256);
  if (!reading.ok) throw new Error('the listing cannot be read');
  change(parts);
  const listed = Object.entries(parts).map(([name, bytes]) => ({ name, bytes: bytes.length, sha256: sha256(bytes) }));
  return zipped({ 'listing.json': text(writeListing({ ...reading.listing, parts: listed }, sha256)), ...parts });
}

const zipped = (parts: Zippable, level: 0 | 9 = 0): Uint8Array => zipSync(parts, { level });
const text = (content: string): Uint8Array => new TextEncoder().encode(content);

describe('damage', () => {
  test('one changed byte is noticed and its part named, whichever it is', async () => {
    const { host } = await machineWith();
    const file = await packageOf(host);
    const parts = unzipSync(file);
    const expected: Readonly<Record<string, string>> = {
      'site.tallybeam.json': 'the site: checksum differs',
      'follow-up.json': 'the follow-up: checksum differs',
      'visits/v1.json': 'visit v1: checksum differs',
      'photos/p1.jpg': 'photo p1.jpg: checksum differs',
      'records/000002.json': 'record 2: checksum differs',
      'records/chain.jsonl': 'the list of records: checksum differs',
    };
    for (const [name, words] of Object.entries(expected)) {
      const part = parts[name] ?? new Uint8Array();
      const at = file.indexOf(Buffer.from(part)) + (part.length >> 1);
      expect(await failure(send(host, flipped(file, at))), name).toMatchObject({
        code: 'altered',
        message: expect.stringContaining(words) as string,
      });
    }
  });

  test('a record that was altered is named, even where the listing was made right again', async () => {
    const { host } = await machineWith();
    const file = await packageOf(host);
    const edit = (name: string) => (parts: Record<string, Uint8Array>) => {
      const part = parts[name] ?? new Uint8Array();
      parts[name] = flipped(part, part.length - 6);
    };
    for (const [name, words] of [
      ['records/000002.json', /record 2: Record 2 had its contents altered/],
      ['records/chain.jsonl', /record 2: Record 2 was altered after it was written/],
    ] as const)
      expect((await failure(send(host, forged(file, edit(name))))).message, name).toMatch(words);
    const without = forged(file, (parts) => delete parts['records/000001.json']);
    expect((await failure(send(host, without))).message).toMatch(/record 1: Record 1 has lost its contents/);
  });

  test.each([
    ['a visit of another site', 'visits/v1.json', '"siteId":"s"', '"siteId":"t"', /visit v1: it says/],
    ['a visit that is not right', 'visits/v1.json', '"weekly"', '"monthly"', /visit v1: kind:/],
    ['a key that stands twice', 'visits/v1.json', '"name":', '"name":"other","name":', /visit v1: name: The key "name" stands twice/],
    ['a follow-up that is not right', 'follow-up.json', '"visitDays":7', '"visitDays":-7', /the follow-up: rhythm\.visitDays/],
    ['a site that is not right', 'site.tallybeam.json', 'Test depot', 'Best depot', /the site: .*Does not match/],
  ])('%s is refused, though the listing agrees', async (_, name, from, to, words) => {
    const { host } = await machineWith();
    const file = forged(await packageOf(host), (parts) => {
      parts[name] = text(new TextDecoder().decode(parts[name]).replace(from, to));
    });
    expect((await failure(send(host, file))).message).toMatch(words);
  });

  test('500 random changes of one byte are refused with a message, or change nothing of what is read', async () => {
    const { host } = await machineWith();
    const file = await packageOf(host);
    const expected = await send(host, file);
    const random = drawn(4711);
    let refused = 0;
    const harmless: number[] = [];
    for (let n = 0; n < 500; n++) {
      const at = Math.floor(random() * file.length);
      const spoilt = flipped(file, at, 1 << Math.floor(random() * 8));
      try {
        expect(await send(host, spoilt)).toEqual(expected);
        expect(readPackage(spoilt)).toEqual(readPackage(file));
        harmless.push(at);
      } catch (error) {
        const { code, message } = error as HostFailure;
        expect(['altered', 'newer-version'], message).toContain(code);
        expect(message).toMatch(/^The package was not brought in[^]*\.$/);
        refused++;
      }
    }
    console.log(`changed bytes: ${refused} packages refused, ${harmless.length} with everything as it was`);
    expect(refused + harmless.length).toBe(500);
    expect(refused).toBeGreaterThan(400);
    expect((await host.listRecords('s')).altered).toBeNull();
    expect(await host.listVisits('s')).toHaveLength(1);
    expect(await host.listSites()).toHaveLength(1);
  });

  test('a package that breaks off anywhere is refused', async () => {
    const { host } = await machineWith();
    const file = await packageOf(host);
    for (let size = 0; size < file.length; size += 97)
      expect((await failure(send(host, file.subarray(0, size)))).code, `${size} bytes`).toBe('altered');
  });
});

describe('what a package may not hold', () => {
  const hostile = async (change: (parts: Record<string, Uint8Array>) => Zippable, level: 0 | 9 = 0) => {
    const { host, sites } = await machineWith();
    const before = readdirSync(sites).toSorted();
    const answer = await failure(send(host, zipped(change(unzipSync(await packageOf(host))), level)));
    expect(readdirSync(sites).toSorted()).toEqual(before);
    return answer;
  };

  test.each([
    '../evil.json',
    '/etc/cron.d/evil',
    'visits/../../evil.json',
    'visits\\evil.json',
    'photos/evil.html',
    'beside/s/x',
    '__proto__x',
  ])('a part named %j', async (name) => {
    expect((await hostile((parts) => ({ ...parts, [name]: text('evil') }))).message).toContain('holds something that no package holds');
  });

  test('a part that the listing does not name', async () => {
    expect((await hostile((parts) => ({ ...parts, 'visits/more.json': text('{}') }))).message).toContain(
      'visit more: is not in the listing',
    );
  });

  test('compressed parts, however large they would become', async () => {
    const zeros = new Uint8Array(50 * 1024 * 1024);
    expect((await hostile((parts) => ({ ...parts, 'photos/bomb.jpg': zeros }), 9)).message).toContain('packed anew by another program');
  });

  test('no listing', async () => {
    expect((await hostile(({ 'listing.json': _, ...parts }) => parts)).message).toContain('has no listing');
  });

  test('names that no system of the other users could keep', async () => {
    const { host } = await machineWith();
    const file = forged(await packageOf(host), (parts) => (parts['photos/con.jpg'] = PHOTO));
    expect((await failure(send(host, file))).message).toContain('photo con.jpg: its id names no file on some systems');
  });

  test('sizes that claim more than the file, or hide something between the parts', async () => {
    const { host } = await machineWith();
    const file = await packageOf(host);
    const directory = file.lastIndexOf(Buffer.from([0x50, 0x4b, 1, 2]));
    const larger = Buffer.from(file);
    larger.writeUInt32LE(0x7fffffff, directory + 20);
    larger.writeUInt32LE(0x7fffffff, directory + 24);
    expect((await failure(send(host, larger))).message).toContain('larger than the whole');
    expect((await failure(send(host, Buffer.concat([Buffer.from('hidden'), file])))).code).toBe('altered');
    expect((await failure(send(host, Buffer.concat([file, Buffer.from('hidden')])))).code).toBe('altered');
  });

  test('what is no picture, under the name of one', async () => {
    const { host } = await machineWith();
    const file = forged(await packageOf(host), (parts) => (parts['photos/p2.png'] = text('<script>')));
    expect((await failure(send(host, file))).message).toContain('photo p2.png: it is not the kind of picture');
  });
});

test('what would not fit into one package is told before it is put together', () => {
  // The same photo many times: nothing of that size is made.
  const photo = new Uint8Array(20 * 1024 * 1024);
  const parts = new Map(Array.from({ length: 26 }, (_, i) => [`photos/p${i}.jpg`, photo]));
  expect(() => writePackage(parts, { program: '0.1.0', madeAt: '2026-12-01T08:00:00.000Z', siteId: 's', siteName: 'Depot' })).toThrow(
    /at most 512 MiB, and this would be 520 MiB\. Export it without the photos/,
  );
});
