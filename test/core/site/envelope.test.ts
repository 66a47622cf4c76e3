import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readSiteFile, readUnchecked, SITE_FILE_BYTES, writeSiteFile, type Migrations } from '../../../src-core/site/envelope';

const hash = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex');
const facts = { program: '0.1.0', savedAt: '2026-12-01T08:30:00.000Z' };
const body = '{"id":"s","name":"Depot é","numbers":[1,2.5],"deep":{"a":null}}';
const file = writeSiteFile(body, facts, hash);

/** The file with a valid checksum round any text for a site, whatever it is. */
const withChecksum = (text: string) =>
  text.replace(/sha256-[0-9a-f]{64}/, `sha256-${hash(text.replace(/(sha256-)[0-9a-f]{64}/, `$1${'0'.repeat(64)}`))}`);
const messages = (reading: ReturnType<typeof readSiteFile>) =>
  reading.ok ? [] : reading.problems.map(({ path, message }) => `${path}: ${message}`);
const fault = (reading: ReturnType<typeof readSiteFile>) => (reading.ok ? 'none' : reading.fault);

describe('a written file', () => {
  test('has its keys in order, on one line, and a checksum over the text with zeros for its digits', () => {
    expect(file).toMatch(
      /^\{"format":"tallybeam-site","version":2,"program":"0\.1\.0","savedAt":"2026-12-01T08:30:00\.000Z","checksum":"sha256-[0-9a-f]{64}","site":\{.*\}\}$/,
    );
    const digits = /sha256-([0-9a-f]{64})/.exec(file)?.[1] ?? '';
    expect(digits).toBe(hash(file.replace(digits, '0'.repeat(64))));
  });

  test('is read back with the same site, version, program and time', () => {
    expect(readSiteFile(file, hash)).toEqual({ ok: true, version: 2, facts, site: JSON.parse(body) });
  });

  test('cannot carry a time or program version that would not be read back', () => {
    expect(() => writeSiteFile(body, { ...facts, savedAt: 'yesterday' }, hash)).toThrow('"yesterday"');
    expect(() => writeSiteFile(body, { ...facts, program: 'x' }, hash)).toThrow('"x"');
  });
});

describe('a changed file is refused', () => {
  test('whichever single letter is changed, added or left out', () => {
    for (let at = 0; at < file.length; at++) {
      for (const text of [
        file.slice(0, at) + (file[at] === '1' ? '2' : '1') + file.slice(at + 1),
        file.slice(0, at) + file.slice(at + 1),
        `${file.slice(0, at)} ${file.slice(at)}`,
      ]) {
        expect(readSiteFile(text, hash).ok, text).toBe(false);
      }
    }
  });

  test('wherever it breaks off', () => {
    for (let at = 0; at < file.length; at++) expect(readSiteFile(file.slice(0, at), hash).ok).toBe(false);
  });

  test('with a message that says what to do', () => {
    const reading = readSiteFile(file.replace('Depot', 'Depod'), hash);
    expect(fault(reading)).toBe('altered');
    expect(messages(reading).join()).toMatch(/^checksum: Does not match the file: .*earlier state.*import it as unchecked/);
  });

  test.each([
    ['a key twice in the site', file.replace('"name":', '"name":"Other","name":'), 'site.name: The key "name" stands twice'],
    ['a key twice in the file', file.replace('"site":', '"site":{},"site":'), 'site: The key "site" stands twice'],
    ['a space', file.replace('"numbers":', '"numbers": '), ': Is not in the one form'],
    ['a number in another form', file.replace('2.5', '2.50'), ': Is not in the one form'],
    ['an escape that is not needed', file.replace('Depot', '\\u0044epot'), ': Is not in the one form'],
    ['nesting far deeper than a site', file.replace('null', '['.repeat(5000) + ']'.repeat(5000)), ': Is nested deeper than any site'],
  ])('even with a new checksum where it has %s', (_, text, says) => {
    const reading = readSiteFile(withChecksum(text), hash);
    expect(fault(reading)).toBe('faulty');
    expect(messages(reading).join()).toContain(says);
  });
});

describe('what is no site file is named', () => {
  test.each([
    ['', 'not-a-site-file', ': Is empty'],
    ['weight;level\n800;2', 'not-a-site-file', ': Is no site file: it is not JSON'],
    ['[]', 'not-a-site-file', 'format: Must be "tallybeam-site", but it names no format'],
    ['{"format":"goods-list","version":1}', 'not-a-site-file', 'its format is "goods-list"'],
    [file.slice(0, 200), 'altered', ': Breaks off or is damaged'],
    ['{"format":"tallybeam-site","version":"1"}', 'faulty', 'version: Must be a whole number from 1 to 2, but is "1"'],
    ['{"format":"tallybeam-site","version":0}', 'faulty', 'version: Must be a whole number'],
    ['{"format":"tallybeam-site","version":1}', 'faulty', 'site: Is missing'],
    [file.replace('"site":', '"colour":1,"site":'), 'faulty', 'colour: No site file has the key "colour"'],
    [file.replace('0.1.0', 'unknown'), 'faulty', 'program: Must be a program version'],
    [file.replace('2026-12-01', '2026-13-41'), 'faulty', 'savedAt: Must be a time'],
    [file.replace('sha256-', 'md5-'), 'faulty', 'checksum: Must be "sha256-" and 64'],
  ])('%j', (text, kind, says) => {
    const reading = readSiteFile(text, hash);
    expect(fault(reading)).toBe(kind);
    expect(messages(reading).join('\n')).toContain(says);
  });

  test('a newer file is refused by its version and the program that wrote it', () => {
    const reading = readSiteFile(writeSiteFile(body, { ...facts, program: '7.2.0' }, hash, 9), hash);
    expect(fault(reading)).toBe('newer-version');
    expect(messages(reading).join()).toContain('version 9; this program reads versions up to 2. It was written by Tallybeam 7.2.0.');
    expect(fault(readUnchecked('{"format":"tallybeam-site","version":9}'))).toBe('newer-version');
  });

  test('a file beyond the size limit is refused before it is parsed', () => {
    expect(fault(readSiteFile('x'.repeat(SITE_FILE_BYTES + 1), hash))).toBe('too-large');
  });
});

describe('read as unchecked', () => {
  test('a file edited by hand gives its site, whatever its layout and checksum', () => {
    const edited = JSON.stringify(JSON.parse(file.replace('Depot', 'Hall')), null, 2);
    expect(readUnchecked(edited)).toMatchObject({ ok: true, site: { name: 'Hall é' } });
  });

  test.each([
    ['{"a":{"b":[1,{"c":1,"c":2}]}}', 'site.a.b[1].c: The key "c" stands twice. Remove one of the two.'],
    ['{"a":1,"\\u0061":2}', 'site.a: The key "a" stands twice. Remove one of the two.'],
    ['{"__proto__":1,"__proto__":2}', 'site["__proto__"]: The key "__proto__" stands twice. Remove one of the two.'],
  ])('a key that stands twice is still found: %s', (site, says) => {
    expect(messages(readUnchecked(writeSiteFile(site, facts, hash)))).toEqual([says]);
  });

  test('keys alike in different objects, and text that looks like keys, are no fault', () => {
    const site = '[{"a":1},{"a":{"a":"\\"a\\":{"}},"a","a"]';
    expect(readUnchecked(writeSiteFile(site, facts, hash))).toMatchObject({ ok: true, site: JSON.parse(site) });
  });

  test('any JSON is read back as it is', () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 6 }), (value) => {
        const text = JSON.stringify(value);
        const site: unknown = JSON.parse(text);
        const written = writeSiteFile(text, facts, hash);
        expect(readUnchecked(written)).toEqual({ ok: true, version: 2, facts, site });
        // Minus zero and the like are written in another form than they are read in.
        expect(readSiteFile(written, hash).ok).toBe(JSON.stringify(site) === text);
      }),
      { numRuns: 500 },
    );
  });
});

describe('files of earlier versions', () => {
  // Made-up steps: there is only one version yet.
  const migrations: Migrations = {
    current: 3,
    steps: {
      1: (site) => ({ ...(site as object), second: [] }),
      2: (site) => ({ ...(site as object), third: (site as { second: [] }).second.length }),
    },
  };
  const old = (version: number) => writeSiteFile('{"id":"s"}', facts, hash, version);

  test('are raised one version at a time', () => {
    expect(readSiteFile(old(1), hash, migrations)).toEqual({ ok: true, version: 1, facts, site: { id: 's', second: [], third: 0 } });
    expect(readUnchecked(old(1), migrations)).toMatchObject({ ok: true, site: { third: 0 } });
  });

  test('of the present version are left as they are', () => {
    expect(readSiteFile(old(3), hash, migrations)).toEqual({ ok: true, version: 3, facts, site: { id: 's' } });
  });

  test('are refused where a step fails or is missing', () => {
    expect(messages(readSiteFile(old(2), hash, migrations)).join()).toContain('Cannot be raised from version 2 to 3');
    expect(messages(readSiteFile(old(1), hash, { current: 2, steps: {} })).join()).toContain('Version 1 cannot be raised to 2');
  });
});
