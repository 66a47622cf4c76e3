/** The demo depot shows what it is said to show: each case is asserted on its audit. */
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { auditSite } from '../../../src-core/audit/audit';
import { CHECKS, type Finding, type Verdict } from '../../../src-core/checks/finding';
import { readSiteFile } from '../../../src-core/site/envelope';
import { findBay, findEntry } from '../../../src-core/site/lookup';
import { readSite } from '../../../src-core/site/read';
import { demoSite } from '../../fixtures/demo-site';

const site = demoSite();
const audit = auditSite(site, '2026-12-01');
const bays = new Map(audit.runs.flatMap((run) => run.bays).map((bay) => [bay.bayId, bay]));
const levels = new Map([...bays.values()].flatMap((bay) => bay.levels).map((level) => [level.levelId, level]));

const bayOf = (id: string) => bays.get(id) ?? expect.fail(`no bay ${id}`);
const levelOf = (id: string) => levels.get(id) ?? expect.fail(`no level ${id}`);
const findingOf = (levelId: string, check: Finding['check']) =>
  levelOf(levelId).findings.find((finding) => finding.check === check) ?? expect.fail(`no ${check} on ${levelId}`);

test('the file that ships is this site, whole and readable', () => {
  const text = readFileSync(join(import.meta.dirname, '../../../assets/demo.tallybeam.json'), 'utf8');
  const file = readSiteFile(text, (whole) => createHash('sha256').update(whole).digest('hex'));
  expect(file.ok).toBe(true);
  if (file.ok) expect(readSite(file.site)).toEqual({ ok: true, site });
});

test('it has three runs and a dozen bays, none of whose checks is left out', () => {
  expect(site.runs.length).toBeGreaterThanOrEqual(3);
  expect(bays.size).toBeGreaterThanOrEqual(12);
  expect(site.rules.leftOut).toEqual([]);
});

test('goods of every bearing shape stand in it', () => {
  const standing = site.runs.flatMap((run) => run.bays.flatMap((bay) => bay.levels.flatMap((level) => level.placements)));
  const kinds = new Set(standing.map(({ unitLoadId }) => findEntry(site, 'unitLoads', unitLoadId).bearing.kind));
  expect([...kinds].toSorted()).toEqual(['bearers', 'even', 'feet', 'profile', 'sloped', 'stepped']);
});

test.each<[string, string, Verdict, Finding['check']]>([
  ['less than its rating in all, over by bending', 'a2-l2', 'over', 'beam-bending'],
  ['a full complement that is close', 'a3-l1', 'close', 'full-complement'],
  ['no rating', 'a5-l2', 'not-assessable', 'level-total'],
  ['front-heavy, over on the front beam', 'b2-l2', 'over', 'beam-bending'],
  ['two pallets in one place', 'b4-l3', 'not-possible', 'placement'],
  ['a slope, over at its heavy end', 'c1-l1', 'over', 'beam-end-shear'],
  ['goods that nobody weighed', 'c2-l3', 'not-assessable', 'unit-load'],
])('a level with %s', (_, levelId, verdict, check) => {
  expect(levelOf(levelId)).toMatchObject({ verdict, governing: { check } });
});

test('the level that is over by bending is under its rating by total', () => {
  expect(findingOf('a2-l2', 'level-total').verdict).toBe('within');
  expect(findingOf('a2-l2', 'beam-bending').utilisation).toBeGreaterThan(1);
});

test('both full complements bend the beams more than an even load, and are judged by total', () => {
  for (const levelId of ['a3-l1', 'a4-l1']) {
    const bending = findingOf(levelId, 'beam-bending');
    const total = findingOf(levelId, 'level-total');
    expect(bending.counts).toBe(false);
    // 28/27 = 1.037: three 800 mm pallets with gaps of 75 mm in 2 700 mm, facts.md 2.11.
    expect((bending.utilisation ?? 0) / (total.utilisation ?? 1)).toBeCloseTo(28 / 27, 9);
  }
});

test('the front-heavy level is within by total', () => {
  expect(findingOf('b2-l2', 'level-total').utilisation).toBeLessThan(1);
  const effects = levelOf('b2-l2').effects ?? expect.fail('no effects');
  expect(effects.front.resultant).toBeGreaterThan(1.5 * effects.rear.resultant);
});

test('the clean bay is within in every check of its levels, itself and both its frames', () => {
  const { run, index } = findBay(site, 'a1');
  const frames = audit.runs.find(({ runId }) => runId === run.id)?.frames.slice(index, index + 2) ?? [];
  const bay = bayOf('a1');
  const findings = [...bay.findings, ...bay.levels.flatMap((level) => level.findings), ...frames.flatMap((frame) => frame.findings)];
  expect(bay.verdict).toBe('within');
  // Nothing is left out, so every check there is has been made on it.
  expect(CHECKS.filter((check) => !findings.some((finding) => finding.check === check))).toEqual([]);
  expect(findings.filter(({ verdict }) => verdict !== 'within').map(({ check, place }) => ({ check, place }))).toEqual([]);
});

test('between them the bays show every verdict', () => {
  expect(new Set([...bays.values()].map(({ verdict }) => verdict))).toEqual(
    new Set<Verdict>(['within', 'close', 'over', 'not-assessable', 'not-possible']),
  );
});
