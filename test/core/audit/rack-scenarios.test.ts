/**
 * Whole racks through the audit: scenarios S5, S7 and S10 of test/reference/scenarios.md (invented; every figure
 * checked there by a script), and S1 on runners.
 */
import { expect, test } from 'vitest';
import type { Bay, Rules, Run, Site } from '../../../src-core/site/site';
import { makeBay, makeBeamType, makeFrameType, makeLevel, makeNotice, makePallet, makeRun, makeSite, makeUnitLoad } from '../../make';
import { plain } from '../plain';
import { expectWorked } from '../worked';
import { auditedRun, bayOf, findingOf, frameOf } from './audited';
import { central, S5_TABLE } from './s5';

const TODAY = '2026-06-01';
const changed = (site: Site, rules: Partial<Rules>): Site => ({ ...site, rules: { ...site.rules, ...rules } });

// ---------------------------------------------------------------- S5: the beam that was moved

/** A run of three bays of 2.7 m, four levels, every level 2 000 kg central; beams of 13 kg, frames of 60 kg. */
function s5(firstBeam: number, rules: Partial<Rules> = {}): Site {
  const heights = [0, 1500, 3000, 4500].map((above) => firstBeam + above);
  const one = (name: string): Bay =>
    makeBay(
      heights.map((heightMm) => makeLevel([[central, 350]], { heightMm, beamTypeId: 'beam' })),
      { id: name, name },
    );
  return changed(
    makeSite({
      unitLoads: [central],
      // 4 kg/m over 2.7 m and 2.2 kg of connectors: 13 kg
      beamTypes: [makeBeamType({ id: 'beam', massKgPerM: 4, connectorsKg: 2.2 })],
      frameTypes: [makeFrameType({ id: 'type', massKg: 60, table: S5_TABLE })],
      runs: [makeRun([one('A1'), one('A2'), one('A3')], { id: 'run' }, { typeId: 'type', heightMm: 8000 })],
    }),
    rules,
  );
}

test('S5: inner frames carry 8 164 kg, end frames 4 112 kg; 0.833 with the first beam at 1 500 mm', () => {
  const { frames } = auditedRun(s5(1500));
  const loads = frames.map(({ storeys }) => storeys[0]?.totalKg ?? NaN);
  for (const [i, kg] of [4112, 8164, 8164, 4112].entries()) expect(loads[i]).toBeCloseTo(kg, 9);
  const found = findingOf(frames[1], 'frame-storey');
  expect(found.utilisation?.toFixed(3)).toBe('0.833');
  expect(found.verdict).toBe('within');
  expectWorked(found);
});

test.each([
  ['next-taller-row', '1.074', '1859'],
  ['interpolate', '1.015', '1969'],
] as const)('S5: raised to 1 900 mm it fails by %s: %s, and %s kg a level would pass', (frameTable, used, kg) => {
  const found = findingOf(frameOf(auditedRun(s5(1900, { frameTable })), 1), 'frame-storey');
  expect(found.utilisation?.toFixed(3)).toBe(used);
  expect(found.verdict).toBe('over');
  expect(found.notes.map(plain).join(' ')).toContain(`${kg} kg a level`);
  expect(found.notes.map(plain).join(' ')).toContain(frameTable === 'interpolate' ? 'Interpolated' : 'next taller one, 2000 mm, is used');
  expectWorked(found);
});

test('S5: raised to 2 400 mm there is no rating, and the bays at the frame are not assessable', () => {
  const audited = auditedRun(s5(2400));
  const found = findingOf(frameOf(audited, 1), 'frame-storey');
  expect([found.verdict, found.utilisation, found.allowed]).toEqual(['not-assessable', null, null]);
  expect(audited.bays.map(({ verdict }) => verdict)).toEqual(['not-assessable', 'not-assessable', 'not-assessable']);
});

test('S5: the lowest beams of one bay taken out: its frames are held from one side only', () => {
  const site = s5(1500);
  const run = site.runs[0] as Run;
  const bays = run.bays.map((one, i) => (i === 1 ? { ...one, levels: one.levels.slice(1) } : one));
  const audited = auditedRun({ ...site, runs: [{ ...run, bays }] });
  for (const i of [1, 2]) {
    const found = findingOf(frameOf(audited, i), 'frame-storey');
    expect(found.verdict).toBe('not-assessable');
    expect(found.missing.map(({ field }) => field)).toEqual(['bay:A2:levels']);
  }
  expect(findingOf(frameOf(audited, 0), 'frame-storey').verdict).toBe('within');
});

test('beams that hang above the top of a frame are not possible, and so is what would follow from them', () => {
  const site = s5(1500);
  const [run] = site.runs as [Run];
  const low: Site = { ...site, runs: [{ ...run, frames: run.frames.map((one) => ({ ...one, heightMm: 5900 })) }] };
  const found = frameOf(auditedRun(low), 1);
  expect(findingOf(found, 'frame-storey').verdict).toBe('not-possible');
  expect(bayOf(auditedRun(low)).verdict).toBe('not-possible');
});

// ---------------------------------------------------------------- S7: long-span shelf with a motor

const archive = makeUnitLoad({ id: 'boxes', name: 'Archive boxes', widthMm: 1800, depthMm: 600, heightMm: 300, goodsKg: 120 });
const motor = makeUnitLoad({ id: 'motor', name: 'Motor', widthMm: 300, depthMm: 300, heightMm: 400, goodsKg: 130 });

function s7(atMm: number): Site {
  const shelf = makeLevel([[motor, atMm]], {
    heightMm: 800,
    beamTypeId: 'beam',
    deck: { kind: 'panels', count: 6, panelKg: null, massKg: 20, source: { kind: 'maker', detail: '', person: '', date: '' } },
  });
  return makeSite({
    unitLoads: [archive, motor],
    notices: [makeNotice({ id: 'notice', levelKg: [400] })],
    beamTypes: [makeBeamType({ id: 'beam', widthMm: 40 })],
    frameTypes: [makeFrameType({ id: 'type', depthMm: 600, uprightWidthMm: 50 })],
    runs: [
      makeRun(
        [makeBay([shelf], { clearEntryMm: 1800, noticeId: 'notice' })],
        { id: 'run', loadedBy: 'by-hand' },
        { typeId: 'type', heightMm: 2000 },
      ),
    ],
  });
}

test.each([
  [900, 1, '195.0', '2.925'],
  [750, 2, '97.5', '1.462'],
])('S7: a motor at %d mm: %d panel(s) with an even load of %s kg, %s', (atMm, panels, even, used) => {
  const level = bayOf(auditedRun(s7(atMm))).levels[0];
  const found = level?.findings.filter(({ check }) => check === 'deck-panel') ?? [];
  expect(found.map(({ demand, utilisation, verdict }) => [demand?.value.toFixed(1), utilisation?.toFixed(3), verdict])).toEqual(
    Array.from({ length: panels }, () => [even, used, 'over']),
  );
  expect(found[0]?.allowed?.value.toFixed(1)).toBe('66.7');
  expect(level?.verdict).toBe('over');
  for (const one of found) expectWorked(one);
});

test('S7: 1 444 kg/m² under the motor against 370 kg/m²', () => {
  const found = findingOf(bayOf(auditedRun(s7(900))).levels[0], 'area-load');
  expect(((found.allowed?.value ?? NaN) * 1e6).toFixed(0)).toBe('370');
  expect(plain(found.says)).toContain('Motor presses with 0.00144444 kg/mm²');
  expectWorked(found);
});

// ---------------------------------------------------------------- S10: the safety officer's bay

test('S10: bends of 1.6, 1.33 and 1.2 times their limits: two ambers make the frame red, both bays are unloaded; no rating, no pass', () => {
  const load = makeUnitLoad({ id: 'load', goodsKg: 620 });
  const level = (locks: 'yes' | 'no') =>
    makeLevel(
      [
        [load, 75],
        [load, 950],
        [load, 1825],
      ],
      { beamTypeId: 'beam', locks },
    );
  const run = makeRun(
    [makeBay([level('no')], { id: 'A1', name: 'A1' }), makeBay([level('yes')], { id: 'A2', name: 'A2' })],
    { id: 'run' },
    { typeId: 'type' },
  );
  const damages = [
    { id: 'd1', member: 'upright-front', alongMm: 8, acrossMm: 4, gaugeMm: 1000, torn: false, note: '', found: TODAY },
    { id: 'd2', member: 'bracing', alongMm: 12, acrossMm: 0, gaugeMm: 1000, torn: false, note: '', found: TODAY },
  ] as const;
  const frames = run.frames.map((one, i) => (i === 1 ? { ...one, damages } : one));
  const site = makeSite({
    unitLoads: [load],
    beamTypes: [makeBeamType({ id: 'beam' })],
    frameTypes: [makeFrameType({ id: 'type' })],
    runs: [{ ...run, frames }],
  });
  const audited = auditedRun(site);
  const found = frameOf(audited, 1).findings.filter(({ check }) => check === 'damage');
  expect(found.map(({ utilisation, verdict }) => [utilisation?.toFixed(2), verdict])).toEqual([
    ['1.60', 'close'],
    ['1.20', 'close'],
    [undefined, 'over'],
  ]);
  expect(
    found[0]?.worked.filter(({ result }) => result.quantity.kind === 'ratio').map(({ result }) => result.quantity.value.toFixed(2)),
  ).toEqual(['1.60', '1.33']);
  expect(plain(found[2]?.says ?? [])).toContain('Unload every level of bay A1 and bay A2 at once');
  // Both bays at the frame are held up, and without a notice neither has a rating.
  for (const one of audited.bays) {
    expect(one.verdict).toBe('over');
    expect(findingOf(one.levels[0], 'level-total').verdict).toBe('not-assessable');
    expect(findingOf(one, 'notice-match').verdict).toBe('not-assessable');
  }
});

// ---------------------------------------------------------------- S1 on runners

test('S1: on the lines of EUR pallets 2 518.5 kg (1.007), for information while it is the designed full complement', () => {
  const pallet = makePallet({ id: 'pallet', massKg: 0 });
  const load = makeUnitLoad({ id: 'load', goodsKg: 800, palletId: 'pallet' });
  const site = (loads: number) =>
    makeSite({
      pallets: [pallet],
      unitLoads: [load],
      notices: [makeNotice({ id: 'notice', levelKg: [2500], unitLoadKg: 833, unitLoadsPerLevel: 3 })],
      beamTypes: [makeBeamType({ id: 'beam' })],
      frameTypes: [makeFrameType({ id: 'type' })],
      runs: [
        makeRun(
          [
            makeBay(
              [
                makeLevel(
                  [75, 950, 1825].slice(0, loads).map((at) => [load, at] as const),
                  { beamTypeId: 'beam' },
                ),
              ],
              { noticeId: 'notice' },
            ),
          ],
          { id: 'run' },
          { typeId: 'type' },
        ),
      ],
    });
  const [full] = bayOf(auditedRun(site(3))).levels[0]?.findings.filter(({ check }) => check === 'pallet-bearing') ?? [];
  expect(full?.demand?.value.toFixed(1)).toBe('2518.5');
  expect(full?.utilisation?.toFixed(3)).toBe('1.007');
  expect(full?.counts).toBe(false);
  // ⅓ each gives M = 826.67 and 2 449.4 by bending (scenario S1)
  expect(full?.notes.map(plain)[0]).toContain('the other way it counts as 2449.38 kg');
  if (full) expectWorked(full);
  // With one taken away it counts.
  const [two] = bayOf(auditedRun(site(2))).levels[0]?.findings.filter(({ check }) => check === 'pallet-bearing') ?? [];
  expect(two?.counts).toBe(true);
  if (two) expectWorked(two);
});
