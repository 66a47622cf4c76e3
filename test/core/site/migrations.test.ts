import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { raiseSite, SITE_VERSION } from '../../../src-core/site/migrations';
import { readSite } from '../../../src-core/site/read';
import { writeSite } from '../../../src-core/site/write';

const first = JSON.parse(readFileSync(join(import.meta.dirname, '../../fixtures/site-v1.tallybeam.json'), 'utf8')) as { site: unknown };

const keysOf = (value: unknown): ReadonlySet<string> => {
  if (typeof value !== 'object' || value === null) return new Set();
  return new Set(Object.entries(value).flatMap(([key, part]) => [Array.isArray(value) ? '' : key, ...keysOf(part)]));
};

test('a site of version 1 is read once it is raised, and keeps everything it said', () => {
  const before = structuredClone(first.site);
  const raised = raiseSite(first.site, 1);
  expect(readSite(first.site)).toMatchObject({ ok: false });
  const reading = readSite(raised);
  expect(reading).toMatchObject({ ok: true });
  expect(first.site).toEqual(before);
  if (!reading.ok) return;
  // Taking out what came new leaves the old text, key for key.
  const old = JSON.stringify(JSON.parse(writeSite(reading.site)), (key, value: unknown) =>
    ['bayTemplates', 'holePitchMm', 'beamDamages', 'sags'].includes(key) ? undefined : value,
  );
  expect(old).toBe(JSON.stringify(first.site));
  expect([...keysOf(raised)].filter((key) => !keysOf(first.site).has(key)).sort()).toEqual([
    'bayTemplates',
    'beamDamages',
    'holePitchMm',
    'sags',
  ]);
});

test('what an older site does not say is not known afterwards', () => {
  const reading = readSite(raiseSite(first.site, 1));
  if (!reading.ok) throw new Error(JSON.stringify(reading.problems));
  expect(reading.site.bayTemplates).toEqual([]);
  expect(reading.site.frameTypes.map(({ holePitchMm }) => holePitchMm)).toEqual(reading.site.frameTypes.map(() => null));
});

test.each([null, 3, 'site', [], {}, { runs: 3 }, { runs: [null, { bays: [{ levels: [4] }] }] }, { frameTypes: ['x'] }])(
  'raising %j throws nothing and repairs nothing',
  (site) => {
    expect(readSite(raiseSite(site, 1))).toMatchObject({ ok: false });
  },
);

test('a site of the present version stays as it is', () => {
  expect(raiseSite(first.site, SITE_VERSION)).toBe(first.site);
});
