/**
 * No check is skipped in silence: on a site in which everything is known each check is made and none is
 * held up; with any one input gone, the check that needs it and the bay are not assessable, and say what
 * is missing and how to get it.
 */
import { expect, test } from 'vitest';
import { auditRun } from '../../../src-core/audit/audit';
import { CHECKS, type CheckName, type Finding } from '../../../src-core/checks/finding';
import { readSite } from '../../../src-core/site/read';
import type { Site } from '../../../src-core/site/site';
import { completeSite, TODAY } from './complete-site';

type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json };
type Path = readonly (string | number)[];

/** Bay A1 with its levels and its two frames. */
function judged(site: Site): { readonly verdict: string; readonly findings: readonly Finding[] } {
  const { bays, frames } = auditRun(site, 'run-A', TODAY);
  const [bay] = bays;
  if (bay === undefined) throw new Error('no bay audited');
  return {
    verdict: bay.verdict,
    findings: [
      ...bay.levels.flatMap(({ findings }) => findings),
      ...bay.findings,
      ...frames.slice(0, 2).flatMap(({ findings }) => findings),
    ],
  };
}

test('the site is one that a file may hold', () => {
  expect(readSite(JSON.parse(JSON.stringify(completeSite())))).toMatchObject({ ok: true });
});

test('with everything known every check is made and none is held up', () => {
  const { verdict, findings } = judged(completeSite());
  expect(new Set(findings.map(({ check }) => check))).toEqual(new Set(CHECKS));
  for (const one of findings) expect(one.verdict, one.check).toBe('within');
  expect(verdict).toBe('within');
});

/**
 * What can be unknown: a value that the file may also state as null, an answer or kind that may be
 * "unknown" (but no free text), and a maker that may be left empty.
 */
function unknowable(site: Site): readonly { readonly path: Path; readonly gone: null | 'unknown' | '' }[] {
  const found: { path: Path; gone: null | 'unknown' | '' }[] = [];
  const mayBe = (path: Path, value: Json) => readSite(withValue(site, path, value)).ok;
  const visit = (value: Json, path: Path) => {
    if (path.length === 0) {
      // The site itself is never unknown.
    } else if (value !== null && mayBe(path, null)) found.push({ path, gone: null });
    else if (typeof value === 'string' && value !== 'unknown' && mayBe(path, 'unknown') && !mayBe(path, 'anything-else'))
      found.push({ path, gone: 'unknown' });
    else if (path.at(-1) === 'maker') found.push({ path, gone: '' });
    if (Array.isArray(value)) value.forEach((one: Json, i) => visit(one, [...path, i]));
    else if (typeof value === 'object' && value !== null) for (const [key, one] of Object.entries(value)) visit(one, [...path, key]);
  };
  visit(JSON.parse(JSON.stringify(site)) as Json, []);
  return found;
}

function withValue(site: Site, path: Path, value: Json): unknown {
  const copy = JSON.parse(JSON.stringify(site)) as Record<string | number, unknown>;
  let at = copy;
  for (const step of path.slice(0, -1)) at = at[step] as Record<string | number, unknown>;
  const last = path.at(-1);
  if (last !== undefined) at[last] = value;
  return copy;
}

const FRAME_LOADS: readonly CheckName[] = ['frame-storey', 'leg-load', 'plate-pressure', 'back-to-back-legs'];
const BEAM_CHECKS: readonly CheckName[] = ['beam-bending', 'beam-end-shear', 'beam-deflection', 'section-stress', 'section-deflection'];
const MASSES: readonly CheckName[] = [
  'unit-load',
  'level-total',
  ...BEAM_CHECKS,
  'deck-panel',
  'area-load',
  'bay-total',
  'heavy-low',
  'frame-imbalance',
  'floor-area',
  ...FRAME_LOADS,
];
const GEOMETRY_OF_FRAMES: readonly CheckName[] = ['overhang', 'pallet-bearing', 'clearance-across', 'deck-panel', 'area-load'];

/** Each input that can be unknown, with the checks that need it; by the last parts of its path. */
const NEEDED: readonly (readonly [path: RegExp, checks: readonly CheckName[]])[] = [
  [/^seismic$|^outdoors$/, ['site-flags']],
  [/^pallets\.0\.massKg$/, MASSES],
  // Flour and reel stand on the decked level; bags on the open one.
  [/^unitLoads\.[02]\.goodsKg$/, MASSES],
  [/^unitLoads\.1\.goodsKg$/, MASSES.filter((check) => check !== 'deck-panel' && check !== 'area-load')],
  [/^unitLoads\.3\.goodsKg$/, ['floor-area']],
  [/^unitLoads\.2\.chocked$/, ['goods-form']],
  [/^notices\.0\.maker$/, ['site-flags']],
  [/^notices\.0\.source\.kind$/, ['site-flags']],
  [/^notices\.0\.levelKg\.0$/, ['level-total', 'beam-bending', 'beam-deflection', 'area-load', 'pallet-bearing']],
  [/^notices\.0\.levelKg\.1$/, ['level-total', 'beam-bending', 'beam-deflection', 'pallet-bearing']],
  [/^notices\.0\.unitLoadKg$/, ['unit-load']],
  [/^notices\.0\.unitLoadsPerLevel$/, ['positions', 'notice-match']],
  [/^notices\.0\.bayKg$/, ['bay-total']],
  [/^notices\.0\.(firstBeamMm|greatestGapMm|levels|beamTypeId)$/, ['notice-match']],
  [/^beamTypes\.0\.maker$|^beamTypes\.0\.source\.kind$/, ['site-flags']],
  [/^beamTypes\.0\.(massKgPerM|connectorsKg)$/, [...FRAME_LOADS, 'floor-area', 'anchor-pull']],
  [/^beamTypes\.0\.(secondMomentMm4|elasticModulusNPerMm2)$/, ['section-deflection']],
  [/^beamTypes\.0\.(sectionModulusMm3|designStressNPerMm2)$/, ['section-stress']],
  [/^frameTypes\.0\.maker$|^frameTypes\.0\.source\.kind$/, ['site-flags']],
  [/^frameTypes\.0\.massKg$/, [...FRAME_LOADS, 'floor-area', 'anchor-pull']],
  [/^frameTypes\.0\.plate(Width|Depth)Mm$/, ['plate-pressure']],
  [/^floors\.0\.kind$/, ['floor-area']],
  [/^floors\.0\.legN$/, ['leg-load']],
  [/^floors\.0\.pressureNPerMm2$/, ['plate-pressure']],
  [/^floors\.0\.(legPairN|thicknessMm)$/, ['back-to-back-legs']],
  [/^floors\.0\.areaNPerMm2$/, ['floor-area']],
  [/^runs\.0\.floorId$/, ['leg-load', 'plate-pressure', 'back-to-back-legs', 'floor-area']],
  [/^runs\.0\.loadedBy$/, ['clearance-along', 'clearance-above', 'clearance-across']],
  [/^runs\.0\.twoDeep$/, ['site-flags']],
  [/^runs\.0\.frames\.[01]\.typeId$/, [...GEOMETRY_OF_FRAMES, ...FRAME_LOADS, 'height-to-depth', 'floor-area', 'anchor-pull']],
  [/^runs\.0\.frames\.[01]\.anchored$/, ['height-to-depth', 'site-flags']],
  [/^runs\.0\.frames\.[01]\.restrained$/, ['height-to-depth']],
  [/^runs\.0\.frames\.[01]\.plumb$/, ['plumb']],
  [/^runs\.0\.frames\.[01]\.damages\.0\.(alongMm|acrossMm)$/, ['damage']],
  [/^runs\.0\.bays\.0\.noticeId$/, ['unit-load', 'positions', 'level-total', 'beam-bending', 'bay-total', 'notice-match', 'area-load']],
  [/^runs\.0\.bays\.0\.levels\.0\.beamTypeId$/, ['notice-match', 'clearance-above', ...FRAME_LOADS, 'floor-area']],
  [/^runs\.0\.bays\.0\.levels\.1\.beamTypeId$/, ['notice-match', 'pallet-bearing', 'clearance-above', ...FRAME_LOADS, 'floor-area']],
  [/^runs\.0\.bays\.0\.levels\.\d\.locks$/, ['notice-match']],
  [/^runs\.0\.bays\.0\.levels\.0\.sags\.0\.(loadedMm|unloadedMm|sidewaysMm)$/, ['beam-sag']],
  [/^runs\.0\.bays\.0\.levels\.0\.deck\.massKg$/, [...FRAME_LOADS, 'floor-area', 'anchor-pull']],
  // The next bay shares a frame.
  [/^runs\.0\.bays\.1\.levels\.\d\.beamTypeId$/, FRAME_LOADS],
  [/^runs\.0\.bays\.1\.levels\.0\.deck\.massKg$/, FRAME_LOADS],
  // The run behind: its legs and the depth of its frames.
  [/^runs\.1\.frames\.[12]\.typeId$/, ['back-to-back-legs', 'clearance-across']],
  [/^runs\.1\.bays\.[01]\.levels\.\d\.beamTypeId$/, ['back-to-back-legs']],
  [/^runs\.1\.bays\.[01]\.levels\.0\.deck\.massKg$/, ['back-to-back-legs']],
];

/** Inputs without which nothing in bay A1 is held up, and why. */
const NOT_NEEDED: readonly (readonly [path: RegExp, why: string])[] = [
  [/^pallets\.0\.ratedKg$/, 'no check compares a pallet with its own rating'],
  [/^frameTypes\.0\.holePitchMm$/, 'beams are set at the holes that there are; the pitch only guides where a beam is put'],
  [/^pallets\.0\.source\.kind$|massSource\.kind$|^floors\.0\.source\.kind$|deck\.source\.kind$/, 'an origin that is printed'],
  [/^unitLoads\.\d\.palletId$/, 'null means that there is no pallet'],
  [/^unitLoads\.[013]\.chocked$/, 'they stand flat'],
  [/^notices\.0\.frameKg$/, 'the frame type has a table'],
  [/^beamTypes\.0\.endKg$/, 'the notice proves a quarter of its rating at each beam end'],
  [/deck\.panelKg$/, 'the level’s rating is shared among the panels'],
  [/^runs\.0\.frames\.2\./, 'the frame beyond the next bay'],
  [/^runs\.0\.bays\.1\.noticeId$/, 'the next bay’s notice; the shared frame has a table'],
  [/^runs\.0\.bays\.1\.levels\.\d\.locks$/, 'the next bay’s locks'],
  [/^runs\.1\.(floorId|twoDeep|loadedBy)$/, 'the run behind'],
  [/^runs\.1\.frames\.\d\.(anchored|restrained|plumb|damages)/, 'the run behind'],
  [/^runs\.1\.frames\.0\.typeId$/, 'the frame behind that does not stand at this bay'],
  [/^runs\.1\.bays\.\d\.(noticeId|levels\.\d\.locks)$/, 'the run behind'],
  [/^runs\.(0\.bays\.1|1\.bays\.\d)\.levels\.0\.sags\.0\./, 'beams of other bays'],
];

const all = unknowable(completeSite());
const nameOf = (path: Path) => path.join('.');
const needing = (path: Path) => NEEDED.find(([pattern]) => pattern.test(nameOf(path)));
const excused = (path: Path) => NOT_NEEDED.some(([pattern]) => pattern.test(nameOf(path)));

test('every input that can be unknown is either needed by a named check or excused by name', () => {
  expect(all.length).toBeGreaterThan(80);
  expect(all.filter(({ path }) => needing(path) === undefined && !excused(path)).map(({ path }) => nameOf(path))).toEqual([]);
});

test('every check has an input here without which it is not assessable, or needs none that could be unknown', () => {
  const covered = new Set(NEEDED.flatMap(([, checks]) => checks));
  // Standing room and tipping of central goods need lengths only; a full complement informs.
  expect(CHECKS.filter((check) => !covered.has(check))).toEqual(['placement', 'tipping', 'full-complement']);
});

test.each(all.filter(({ path }) => needing(path) !== undefined).map(({ path, gone }) => [nameOf(path), gone, path] as const))(
  'without %s (%s) its checks and the bay are not assessable',
  (_, gone, path) => {
    const read = readSite(withValue(completeSite(), path, gone));
    if (!read.ok) throw new Error('not a site');
    const { verdict, findings } = judged(read.site);
    expect(verdict).toBe('not-assessable');
    for (const check of needing(path)?.[1] ?? []) {
      const held = findings.filter((one) => one.check === check && one.verdict === 'not-assessable');
      expect(held.length, check).toBeGreaterThan(0);
      for (const one of held) {
        expect(one.utilisation).toBeNull();
        expect(one.missing.length, check).toBeGreaterThan(0);
        for (const { input, how, field } of one.missing) {
          expect(input.length).toBeGreaterThan(3);
          expect(how).toMatch(/^[A-Z].{15,}[.]$/);
          expect(field).toMatch(/^[a-zA-Z]+:[A-Za-z0-9-]+:[A-Za-z0-9.]+$/);
        }
      }
    }
    // Nothing that was within becomes worse in another way, and nothing disappears.
    expect(new Set(findings.map((one) => one.check))).toEqual(new Set(CHECKS));
  },
);

test('a field of what is missing names the thing that lacks it', () => {
  const last = (path: Path) => String(path.at(-1));
  for (const { path, gone } of all.filter((one) => needing(one.path) !== undefined)) {
    const read = readSite(withValue(completeSite(), path, gone));
    if (!read.ok) throw new Error('not a site');
    const fields = judged(read.site).findings.flatMap(({ missing }) => missing.map(({ field }) => field.split(':')[2] ?? ''));
    const name = path.includes('levelKg')
      ? 'levelKg'
      : path.includes('deck')
        ? 'deck.massKg'
        : path.includes('sags')
          ? `sags.front.${last(path)}`
          : last(path) === 'kind' && path.includes('source')
            ? 'source'
            : last(path);
    expect(fields, nameOf(path)).toContain(name);
  }
});

test('inputs that are excused hold nothing up', () => {
  for (const { path, gone } of all.filter((one) => needing(one.path) === undefined)) {
    const read = readSite(withValue(completeSite(), path, gone));
    if (!read.ok) throw new Error('not a site');
    expect(['within', 'close'], nameOf(path)).toContain(judged(read.site).verdict);
  }
});

test('a check that is left out is not made, is listed with its reason and holds nothing up', () => {
  const site = completeSite();
  for (const check of CHECKS) {
    const reason = 'the owner states it otherwise';
    const without: Site = { ...site, rules: { ...site.rules, leftOut: [{ check, reason }] } };
    const audit = auditRun(without, 'run-A', TODAY);
    expect(audit.notChecked).toEqual([{ check, reason }]);
    const found = judged(without);
    expect(found.findings.filter((one) => one.check === check)).toEqual([]);
    expect(found.verdict, check).toBe('within');
  }
});
