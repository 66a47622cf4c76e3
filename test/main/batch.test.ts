/** The batch command as a person calls it: the real script, on real files. */
import { execFile } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterAll, expect, test, vi } from 'vitest';
import { writeSiteFile } from '../../src-core/site/envelope';
import type { Level, Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import { CHECKS } from '../../src-core/checks/finding';
import { goods, level, rack, stand, type Rack } from '../core/audit/rack';

// Every test starts the program anew.
vi.setConfig({ testTimeout: 60_000 });

const top = resolve(import.meta.dirname, '../..');
const folder = mkdtempSync(join(tmpdir(), 'batch-'));
afterAll(() => rmSync(folder, { recursive: true }));

const hash = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex');
const FACTS = { program: '0.1.0', savedAt: '2026-06-01T08:00:00.000Z' };

let count = 0;
/** Writes a file into the test's folder and gives its name. */
function file(content: string | Buffer, name = `site-${(count += 1)}.tallybeam.json`): string {
  writeFileSync(join(folder, name), content);
  return name;
}
const siteFile = (site: Site, version?: number) => file(writeSiteFile(writeSite(site), FACTS, hash, version));

interface Run {
  readonly exit: number;
  readonly out: string;
  readonly err: string;
}

/** Runs the command in the test's folder. */
const check = (...args: string[]): Promise<Run> =>
  new Promise((done) => {
    execFile(join(top, 'node_modules/.bin/tsx'), [join(top, 'src-main/batch.ts'), ...args], { cwd: folder }, (error, out, err) =>
      done({ exit: error === null ? 0 : Number(error.code), out: plainSpaces(out), err: plainSpaces(err) }),
    );
  });
/** Figures are set with narrow and unbreakable spaces. */
const plainSpaces = (text: string) => text.replace(/[\u00a0\u2009\u202f]/g, ' ');

const state = () =>
  readdirSync(folder).map((name) => [name, statSync(join(folder, name)).mtimeMs, hash(readFileSync(join(folder, name), 'latin1'))]);

// The checks of beams and goods alone, so that each test says one thing.
const LEVEL_CHECKS = [
  'placement',
  'tipping',
  'unit-load',
  'positions',
  'level-total',
  'beam-bending',
  'beam-end-shear',
  'beam-deflection',
  'full-complement',
];
const levelsOnly = CHECKS.filter((one) => !LEVEL_CHECKS.includes(one)).map((one) => ({ check: one, reason: 'Not part of this test.' }));
const site = (change: Partial<Rack> & Pick<Rack, 'levels'>): Site =>
  rack({
    unitLoads: [goods('a', { name: 'Tiles' }), goods('b', { name: 'Press' })],
    ...change,
    rules: { leftOut: levelsOnly, ...change.rules },
  });

const fits = site({ levels: [level([stand('a', 75), stand('a', 950)], { id: 'low' })], notice: { levelKg: [3000], unitLoadKg: 1000 } });

/** The file's text with one part of its site replaced, and a checksum that fits. */
function altered(from: Site, old: string, by: string): string {
  const body = writeSite(from);
  if (!body.includes(old)) throw new Error(`"${old}" is not in the site`);
  return writeSiteFile(body.replace(old, by), FACTS, hash);
}

test('a site within its ratings ends with 0 and prints every bay and level with its utilisations', async () => {
  const { exit, out, err } = await check(siteFile(fits));
  expect(err).toBe('');
  expect(exit).toBe(0);
  expect(out).toMatch(/^A A1 +1 +1 600 kg +3 000 kg +0\.533 .* Within$/m);
  expect(out).toMatch(/^A A1 +bay .* Within$/m);
  expect(out).toContain('European rule set');
  expect(out).toContain('Not checked: Upright frame. Not part of this test.');
  expect(out).toContain('The maker’s rated capacities and the local code decide');
});

test('close ends with 0, over with 1, and several files with the worst', async () => {
  const three = [stand('a', 75), stand('a', 950), stand('a', 1825)];
  const close = siteFile(site({ levels: [level(three)] }));
  const over = siteFile(site({ levels: [level([stand('a', 950)])], notice: { levelKg: [1000] } }));
  expect((await check(close)).exit).toBe(0);
  const both = await check(close, over);
  expect(both.exit).toBe(1);
  expect(both.out).toContain('but it bends each beam as');
  expect(both.out).toContain('(0.996)');
  expect((await check(over, 'nowhere.json', close)).exit).toBe(2);
});

test('a bay whose beam was found damaged, or bent for good, is over and ends with 1', async () => {
  const asked = { leftOut: levelsOnly.filter(({ check: name }) => name !== 'damage' && name !== 'beam-sag') };
  const found = (part: Partial<Level>) =>
    siteFile(
      site({
        levels: [level([stand('a', 75), stand('a', 950)], { id: 'low', ...part })],
        notice: { levelKg: [3000], unitLoadKg: 1000 },
        rules: asked,
      }),
    );
  expect((await check(found({}))).exit).toBe(0);
  const dented = await check(
    found({ beamDamages: [{ id: 'dent', beam: 'front', member: 'beam', torn: true, note: '', found: '2026-05-20' }] }),
  );
  expect(dented.exit).toBe(1);
  expect(dented.out).toMatch(/^A A1 +bay .* Over$/m);
  expect(dented.out).toContain('The front beam of level 1 of bay A1 has a dent');
  // 2 700 mm: 20 % of span/200 is 2.7 mm (facts F-01 and F-88).
  const set = (unloadedMm: number) => found({ sags: [{ beam: 'rear', loadedMm: 5, unloadedMm, sidewaysMm: 0, found: '2026-05-20' }] });
  expect((await check(set(2.7))).exit).toBe(0);
  const bent = await check(set(2.8));
  expect(bent.exit).toBe(1);
  expect(bent.out).toContain('take both beams out');
});

test('as JSON: the same verdicts, utilisations at full precision, all cautions', async () => {
  const { exit, out } = await check('--json', siteFile(site({ levels: [level([stand('a', 75), stand('a', 950), stand('a', 1825)])] })));
  expect(exit).toBe(0);
  const { files, cautions, checkedOn } = JSON.parse(out);
  expect(cautions).toHaveLength(18);
  expect(checkedOn).toMatch(/^\d{4}-\d\d-\d\d$/);
  expect(files[0]).toMatchObject({ read: true, site: 'Test depot', ruleSet: 'european', verdict: 'close' });
  const one = files[0].bays[0].levels[0];
  expect(one).toMatchObject({ level: 1, totalKg: 2400, ratedKg: 2500, verdict: 'close', fullComplement: true });
  // scenario S1 of test/reference/scenarios.md
  expect(one.utilisation.total).toBeCloseTo(0.96, 12);
  expect(one.utilisation.bending).toBeCloseTo(2488.8889 / 2500, 7);
  expect(one.utilisation.endShear).toBeCloseTo(0.96, 12);
  expect(one.utilisation.deflection).toBeCloseTo(2483.8 / 2500, 4);
  expect(files[0].bays[0]).toMatchObject({ run: 'A', bay: 'A1', verdict: 'close' });
});

test('a US site prints pounds', async () => {
  const { out } = await check(siteFile({ ...fits, units: 'us', rules: { ...fits.rules, set: 'united-states' } }));
  // 1 600 kg = 3 527.4 lb
  expect(out).toMatch(/3.527 lb/);
  expect(out).toContain('United States rule set');
});

// ---------------------------------------------------------------- what is not possible or not known

test.each<[string, Site, RegExp]>([
  [
    'goods off the level',
    site({ levels: [level([stand('a', 2000)])] }),
    /Tiles reaches 100 mm past the right end of level 1\. Move it to the left\./,
  ],
  ['goods in each other', site({ levels: [level([stand('a', 0), stand('b', 700)])] }), /Tiles and Press stand in each other by 100 mm/],
  [
    'goods that tip',
    site({ levels: [level([stand('a', 0, { towardsFrontMm: 600 })])] }),
    /Tiles would tip: its centre of mass lies 75(\.0)? mm beyond the middle of the front beam/,
  ],
  [
    'an unknown mass',
    site({ unitLoads: [goods('a', { name: 'Tiles', goodsKg: null })], levels: [level([stand('a', 0)])] }),
    /mass of Tiles\. .*Weigh it with its pallet/,
  ],
  [
    'an unknown rating',
    site({ levels: [level([stand('a', 0)])], notice: { levelKg: [null] } }),
    /What it may carry is not known\. Read it from the load notice/,
  ],
])('%s ends with 1 and its own message', async (_, made, message) => {
  const { exit, out } = await check(siteFile(made));
  expect(exit).toBe(1);
  expect(out).toMatch(message);
});

// ---------------------------------------------------------------- what cannot be read

test.each<[string, () => string, RegExp]>([
  ['a negative mass', () => altered(fits, '"goodsKg":800', '"goodsKg":-800'), /site\.unitLoads\[0\]\.goodsKg: .*-800/],
  ['a mass left out', () => altered(fits, '"goodsKg":800,', ''), /site\.unitLoads\[0\].*goodsKg/],
  [
    'a mass as text in another unit',
    () => altered(fits, '"goodsKg":800', '"goodsKg":"1764 lb"'),
    /site\.unitLoads\[0\]\.goodsKg: .*1764 lb/,
  ],
  ['an unknown unit system', () => altered(fits, '"units":"metric"', '"units":"stones"'), /site\.units: .*stones/],
  ['a span of zero', () => altered(fits, '"clearEntryMm":2700', '"clearEntryMm":0'), /site\.runs\[0\]\.bays\[0\]\.clearEntryMm: .*0/],
  ['a reference to nothing', () => altered(fits, '"unitLoadId":"a"', '"unitLoadId":"zz"'), /unitLoadId: .*zz/],
  [
    'a newer file',
    () => writeSiteFile(writeSite(fits), { ...FACTS, program: '9.4.0' }, hash, 7),
    /version: .*version 7.*Tallybeam 9\.4\.0/,
  ],
  [
    'a changed byte',
    () => writeSiteFile(writeSite(fits), FACTS, hash).replace('Test depot', 'Best depot'),
    /checksum: .*changed outside the program/,
  ],
  ['a file that breaks off', () => writeSiteFile(writeSite(fits), FACTS, hash).slice(0, 900), /Breaks off or is damaged/],
  ['another JSON file', () => '{"name":"x"}', /it names no format/],
  ['a site without its envelope', () => writeSite(fits), /it names no format/],
  ['no JSON at all', () => 'Bay;Level;kg', /is not JSON/],
  ['an empty file', () => '', /Is empty/],
])('%s ends with 2 and says what, where and how to mend it', async (_, content, message) => {
  const name = file(content());
  const { exit, out, err } = await check(name);
  expect(exit).toBe(2);
  expect(err).toMatch(message);
  expect(err).toContain(name);
  expect(err).toMatch(/\.\s*$/);
  expect(out).not.toContain('Verdict');
});

test('a file that is not there, a folder and bytes that are no text each have their own message', async () => {
  mkdirSync(join(folder, 'sub'));
  const binary = file(Buffer.from([0xff, 0xfe, 0x00, 0x9c]), 'binary.json');
  const { exit, err } = await check('nowhere.json', 'sub', binary);
  expect(exit).toBe(2);
  expect(err).toContain('nowhere.json: There is no such file. Check its name and folder.');
  expect(err).toContain('sub: Is a folder. Name the site files in it.');
  expect(err).toContain('binary.json: Is not text in UTF-8.');
  rmSync(join(folder, 'sub'), { recursive: true });
});

test('as JSON a file that cannot be read stands beside the others with its problems', async () => {
  const bad = file(altered(fits, '"goodsKg":800', '"goodsKg":-800'));
  const { exit, out, err } = await check('--json', bad, siteFile(fits));
  expect(exit).toBe(2);
  expect(err).toBe('');
  const { files } = JSON.parse(out);
  expect(files[0]).toMatchObject({ file: bad, read: false, problems: [{ path: 'site.unitLoads[0].goodsKg' }] });
  expect(files[1]).toMatchObject({ read: true, verdict: 'within' });
});

test('a file edited by hand says everything that is wrong at once, and is checked on request', async () => {
  const twice = file(writeSiteFile(writeSite(fits), FACTS, hash).replace('"goodsKg":800', '"goodsKg":-1'));
  const { err } = await check(twice);
  expect(err).toContain('changed outside the program');
  expect(err).toContain('goodsKg');
  const lighter = file(writeSiteFile(writeSite(fits), FACTS, hash).replace('"goodsKg":800', '"goodsKg":700'));
  expect((await check(lighter)).err).toContain('add --unchecked');
  const unchecked = await check(lighter, '--unchecked');
  expect(unchecked.exit).toBe(0);
  expect(unchecked.out).toMatch(/1.?400 kg/);
});

test('a wrong command says how to call it and ends with 2', async () => {
  const none = await check();
  expect(none.exit).toBe(2);
  expect(none.err).toContain('No site file is named.');
  expect(none.err).toContain('npm run check-sites');
  const option = await check('--jsn', 'a.json');
  expect(option.exit).toBe(2);
  expect(option.err).toContain('There is no option --jsn.');
  const help = await check('--help');
  expect(help.exit).toBe(0);
  expect(help.out).toContain('--unchecked');
});

test('nothing on disk changes, whatever is checked', async () => {
  const good = siteFile(fits);
  const bad = file('{');
  const before = state();
  await check(good, bad, '--json');
  await check(good, bad, '--unchecked');
  expect(state()).toEqual(before);
});

test('it runs as the npm script that the manual names', async () => {
  const good = siteFile(fits);
  const run = await new Promise<Run>((done) => {
    execFile('npm', ['run', '--silent', 'check-sites', '--', join(folder, good)], { cwd: top }, (error, out, err) =>
      done({ exit: error === null ? 0 : Number(error.code), out, err }),
    );
  });
  expect(run.err).toBe('');
  expect(run.exit).toBe(0);
  expect(run.out).toContain('Test depot: Within');
});
