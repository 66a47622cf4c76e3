/** One file of every version ever released: it opens, is saved and opened again, and says the same, for ever. */
import { copyFileSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { SITE_FILE_VERSION } from '../../src-core/site/envelope';
import { writeSite } from '../../src-core/site/write';
import { checkBytes } from '../../src-main/store/checked-site';
import { goldenFindings, type GoldenFinding } from '../fixtures/golden';
import { newFolder, storeIn } from './folder';

const folder = join(import.meta.dirname, '../fixtures');
const versions = readdirSync(folder).flatMap((name) => /^site-v(\d+)\.tallybeam\.json$/.exec(name)?.[1] ?? []);

test('there is one of every version', () => {
  expect(versions.map(Number).sort((a, b) => a - b)).toEqual(Array.from({ length: SITE_FILE_VERSION }, (_, i) => i + 1));
});

describe.each(versions)('the file of version %s', (version) => {
  const path = join(folder, `site-v${version}.tallybeam.json`);

  function opened() {
    const reading = checkBytes(readFileSync(path));
    if (!reading.ok) throw new Error(JSON.stringify(reading.problems, null, 2));
    return reading.site;
  }

  test('opens', () => {
    expect(opened().runs.length).toBeGreaterThan(0);
  });

  // Recorded when the version was new: whether the figures are right is tested elsewhere, here that they stay.
  test('has the findings it had when it was new', () => {
    const before = JSON.parse(readFileSync(path.replace('.tallybeam.json', '.findings.json'), 'utf8')) as readonly GoldenFinding[];
    const now = goldenFindings(opened());
    const words = ({ at, check, verdict }: GoldenFinding) => `${at}: ${check}: ${verdict}`;
    expect(now.map(words)).toEqual(before.map(words));
    for (const [i, { utilisation }] of now.entries()) {
      const expected = before[i]?.utilisation ?? null;
      if (typeof expected !== 'number') expect(utilisation).toBe(expected);
      else expect(Math.abs(Number(utilisation) - expected)).toBeLessThanOrEqual(1e-9 * Math.max(1, expected));
    }
  });

  test('is saved and opened again as the same site', async () => {
    const site = opened();
    const sites = newFolder();
    copyFileSync(path, join(sites, `${site.id}.tallybeam.json`));
    const store = storeIn(sites);
    const { revision } = await store.read(site.id);
    await store.save({ id: site.id, body: writeSite(site), baseRevision: revision });
    expect((await store.read(site.id)).site).toEqual(site);
    const [kept] = await store.generations(site.id);
    expect(await store.readGeneration(site.id, kept?.id ?? '')).toBe(readFileSync(path, 'utf8'));
  });
});
