/**
 * Ten thousand damaged or forged site files. Damage must be noticed whatever it is; a forged file
 * with a fitting checksum must be refused, or mean exactly what it says and be written back the same.
 */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { SITE_FILE_VERSION } from '../../src-core/site/envelope';
import { isRecord } from '../../src-core/site/fields';
import { writeSite } from '../../src-core/site/write';
import { checkBytes, checkImport, sha256 } from '../../src-main/store/checked-site';
import { drawn } from './make';

const original = readFileSync(join(import.meta.dirname, `../fixtures/site-v${SITE_FILE_VERSION}.tallybeam.json`));
const text = original.toString('utf8');
const draw = drawn(4);
const below = (most: number) => Math.floor(draw() * most);
const pick = <T>(list: readonly T[]): T => list[below(list.length)] as T;

/** The same file with a checksum that fits its text. */
const forged = (changed: string): string => {
  const zeroed = changed.replace(/("checksum":"sha256-)[0-9a-f]{64}/, `$1${'0'.repeat(64)}`);
  return zeroed.replace('0'.repeat(64), sha256(zeroed));
};

const DAMAGE: Readonly<Record<string, () => Uint8Array>> = {
  'one bit flipped': () => {
    const bytes = Uint8Array.from(original);
    const at = below(bytes.length);
    bytes[at] = (bytes[at] ?? 0) ^ (1 << below(8));
    return bytes;
  },
  'cut off': () => original.subarray(0, below(original.length)),
  'a stretch of zeros': () => {
    const bytes = Uint8Array.from(original);
    const at = below(bytes.length);
    bytes.fill(0, at, at + 1 + below(4096));
    return bytes;
  },
  'a stretch twice': () => {
    const from = below(original.length);
    const to = from + 1 + below(500);
    return Buffer.concat([original.subarray(0, to), original.subarray(from)]);
  },
  'a stretch gone': () => {
    const from = below(original.length - 1);
    return Buffer.concat([original.subarray(0, from), original.subarray(from + 1 + below(500))]);
  },
  'two stretches exchanged': () => {
    const [a = 0, b = 0, c = 0] = [below(text.length), below(text.length), below(text.length)].sort((one, two) => one - two);
    const exchanged = text.slice(0, a) + text.slice(b, c) + text.slice(a, b) + text.slice(c);
    return Buffer.from(exchanged === text ? `${text} ` : exchanged);
  },
  'something behind the end': () => Buffer.from(text + pick([' ', '\n', '}', '0', '{}', '\0'])),
  'nesting without end': () => {
    const at = below(text.length);
    return Buffer.from(text.slice(0, at) + pick(['[', '{"a":', '[{"a":[']).repeat(20_000) + text.slice(at));
  },
};

/** Every place in the site: its parent and key. */
function places(value: unknown, found: { parent: Record<string, unknown>; key: string }[] = []) {
  if (typeof value !== 'object' || value === null) return found;
  const parent = value as Record<string, unknown>;
  for (const key of Object.keys(parent)) {
    found.push({ parent, key });
    places(parent[key], found);
  }
  return found;
}
const VALUES: readonly unknown[] = [
  null,
  true,
  false,
  0,
  -1,
  1e308,
  -1e308,
  5e-324,
  0.1 + 0.2,
  '',
  'x',
  '\0',
  '__proto__',
  [],
  {},
  [[]],
  [null],
  { a: 1 },
  '9'.repeat(300),
];
const OWN = (key: string, value: unknown) => `${JSON.stringify(key)}:${JSON.stringify(value)}`;

const site = (): unknown => (JSON.parse(text) as { site: unknown }).site;
const withSite = (changed: unknown): string => `${text.slice(0, text.indexOf('"site":') + 7)}${JSON.stringify(changed)}}`;

const FORGERIES: Readonly<Record<string, () => string>> = {
  'a value of another kind': () => {
    const changed = site();
    const { parent, key } = pick(places(changed));
    parent[key] = pick(VALUES);
    return withSite(changed);
  },
  'a key gone': () => {
    const changed = site();
    const { parent, key } = pick(places(changed).filter((place) => !Array.isArray(place.parent)));
    delete parent[key];
    return withSite(changed);
  },
  'a key too many': () => {
    const at = pick([...text.slice(text.indexOf('"site":')).matchAll(/\{"/g)]).index + text.indexOf('"site":') + 1;
    return `${text.slice(0, at)}${OWN(pick(['__proto__', 'constructor', 'toString', 'colour', '']), pick(VALUES))},${text.slice(at)}`;
  },
  'a key twice': () => {
    const match = pick([...text.matchAll(/"(\w+)":(-?\d+|"[^"\\]*"|null|true|false)/g)]);
    return `${text.slice(0, match.index)}${OWN(match[1] ?? '', pick(VALUES))},${text.slice(match.index)}`;
  },
  'two values exchanged': () => {
    const changed = site();
    const all = places(changed);
    const [a, b] = [pick(all), pick(all)];
    try {
      [a.parent[a.key], b.parent[b.key]] = [b.parent[b.key], a.parent[a.key]];
      return withSite(changed);
    } catch {
      // One was within the other.
      return withSite(null);
    }
  },
  'two ids exchanged': () => {
    const changed = site();
    const ids = places(changed).filter(({ key }) => key === 'id' || key.endsWith('Id'));
    const [a, b] = [pick(ids), pick(ids)];
    [a.parent[a.key], b.parent[b.key]] = [b.parent[b.key], a.parent[a.key]];
    return withSite(changed);
  },
  'an entry twice': () => {
    const changed = site();
    const lists = places(changed).flatMap(({ parent, key }) =>
      Array.isArray(parent[key]) && parent[key].length > 0 ? [parent[key] as unknown[]] : [],
    );
    const list = pick(lists);
    list.push(structuredClone(pick(list)));
    return withSite(changed);
  },
  'keys in another order': () => {
    const changed = site();
    const objects = places(changed).filter(({ parent, key }) => isRecord(parent[key]) && Object.keys(parent[key]).length > 1);
    const { parent, key } = pick(objects);
    parent[key] = Object.fromEntries(Object.entries(parent[key] as object).reverse());
    return withSite(changed);
  },
  'a number written in another way': () => {
    const match = pick([...text.matchAll(/:(\d+)(?=[,}])/g)]);
    const digits = match[1] ?? '';
    const at = match.index + 1;
    const form = pick([
      `${digits}.0`,
      `${digits}e0`,
      `-${digits}`,
      `1e308`,
      `1e999`,
      `0x${digits}`,
      `0${digits}`,
      `${digits}${'0'.repeat(400)}`,
    ]);
    return text.slice(0, at) + form + text.slice(at + digits.length);
  },
  'nesting without end': () => withSite(null).replace('null', '['.repeat(10_000) + ']'.repeat(10_000)),
};

/** Forgeries whose checksum is sure to fit, so that only their content can be refused. */
const FITTING = ['a value of another kind', 'a key gone', 'two ids exchanged', 'an entry twice'];

/** Longest time one file took, ms. */
let slowest = 0;
function timed<T>(read: () => T): T {
  const began = performance.now();
  const reading = read();
  slowest = Math.max(slowest, performance.now() - began);
  return reading;
}

test('the file that is damaged is read when it is not', () => {
  expect(checkBytes(original)).toMatchObject({ ok: true, text });
});

test.each(Object.keys(DAMAGE))('750 files with %s: every one is refused with what is wrong', (kind) => {
  for (let i = 0; i < 750; i++) {
    const reading = timed(() => checkBytes(DAMAGE[kind]?.() ?? original));
    expect(reading.ok).toBe(false);
    if (!reading.ok) for (const { message } of reading.problems) expect(message.length).toBeGreaterThan(10);
  }
});

test.each(Object.keys(FORGERIES))('400 files with %s and a fitting checksum: refused, or taken exactly as they say', (kind) => {
  let taken = 0;
  for (let i = 0; i < 400; i++) {
    const changed = forged(FORGERIES[kind]?.() ?? text);
    const reading = timed(() => checkBytes(Buffer.from(changed)));
    if (!reading.ok) {
      if (FITTING.includes(kind)) expect(reading.code).toBe('unreadable');
      expect(reading.problems.length).toBeGreaterThan(0);
      continue;
    }
    taken++;
    // Nothing was repaired, dropped or guessed: the site says what the file says, in any order of keys.
    expect(JSON.parse(writeSite(reading.site))).toEqual((JSON.parse(changed) as { site: unknown }).site);
  }
  if (['a key gone', 'a key too many', 'a key twice', 'an entry twice', 'nesting without end'].includes(kind))
    expect(taken).toBeLessThan(80);
});

test('as files imported unchecked, the same hold: a key twice or one too many is never passed over', () => {
  for (let i = 0; i < 400; i++) {
    const changed = FORGERIES[pick(['a key twice', 'a key too many'])]?.() ?? '';
    expect(timed(() => checkImport(changed, true)).ok).toBe(false);
  }
});

test('no file took longer than two seconds', () => {
  console.log(`damaged and forged files: ${750 * 8 + 400 * 10 + 400}, the slowest read in ${slowest.toFixed(0)} ms`);
  expect(slowest).toBeGreaterThan(0);
  expect(slowest).toBeLessThan(2000);
});
