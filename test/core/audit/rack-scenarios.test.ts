/**
 * Whole racks through the audit: scenarios S5, S7 and S10 of the domain scenarios (invented; every figure
 * checked there by a script), S1 on runners, and scenarios of our own in the same style, whose arithmetic
 * stands beside them.
 */
import { expect, test } from 'vitest';
import { auditRun } from '../../../src-core/audit/audit';
import type { BayAudit, FrameAudit, RunAudit } from '../../../src-core/audit/types';
import type { CheckName, Finding } from '../../../src-core/checks/finding';
import type { Bay, Rules, Run, Site, UnitLoad } from '../../../src-core/site/site';
import { STANDARD_GRAVITY } from '../../../src-core/units/quantity';
import {
  makeBay,
  makeBeamType,
  makeFloor,
  makeFrameType,
  makeLevel,
  makeNotice,
  makePallet,
  makePlacement,
  makeRun,
  makeSite,
  makeUnitLoad,
} from '../../make';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const TODAY = '2026-06-01';
const LB = 0.45359237;
const INCH = 25.4;

const audit = (site: Site, runId = 'run'): RunAudit => auditRun(site, runId, TODAY);

function of(audited: { readonly findings: readonly Finding[] } | undefined, check: CheckName): Finding {
  const found = audited?.findings.find((one) => one.check === check);
  if (found === undefined) throw new Error(`${check} not made`);
  return found;
}
const frame = (audited: RunAudit, index: number): FrameAudit => {
  const found = audited.frames[index];
  if (found === undefined) throw new Error(`no frame ${index}`);
  return found;
};
const bay = (audited: RunAudit, index = 0): BayAudit => {
  const found = audited.bays[index];
  if (found === undefined) throw new Error(`no bay ${index}`);
  return found;
};
const changed = (site: Site, rules: Partial<Rules>): Site => ({ ...site, rules: { ...site.rules, ...rules } });

// ---------------------------------------------------------------- S5: the beam that was moved

const central = makeUnitLoad({ id: 'load', name: 'Load', widthMm: 2000, goodsKg: 2000 });
const S5_TABLE = [
  [1000, 11_800],
  [1250, 10_900],
  [1500, 9800],
  [1750, 8700],
  [2000, 7600],
  [2250, 6600],
].map(([heightMm = 0, ratedKg = 0]) => ({ heightMm, ratedKg }));

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
  const { frames } = audit(s5(1500));
  const loads = frames.map(({ storeys }) => storeys[0]?.totalKg ?? NaN);
  for (const [i, kg] of [4112, 8164, 8164, 4112].entries()) expect(loads[i]).toBeCloseTo(kg, 9);
  const found = of(frames[1], 'frame-storey');
  expect(found.utilisation?.toFixed(3)).toBe('0.833');
  expect(found.verdict).toBe('within');
  expectWorked(found);
});

test.each([
  ['next-taller-row', '1.074', '1859'],
  ['interpolate', '1.015', '1969'],
] as const)('S5: raised to 1 900 mm it fails by %s: %s, and %s kg a level would pass', (frameTable, used, kg) => {
  const found = of(frame(audit(s5(1900, { frameTable })), 1), 'frame-storey');
  expect(found.utilisation?.toFixed(3)).toBe(used);
  expect(found.verdict).toBe('over');
  expect(found.notes.map(plain).join(' ')).toContain(`${kg} kg a level`);
  expect(found.notes.map(plain).join(' ')).toContain(frameTable === 'interpolate' ? 'Interpolated' : 'next taller one, 2000 mm, is used');
  expectWorked(found);
});

test('S5: raised to 2 400 mm there is no rating, and the bays at the frame are not assessable', () => {
  const audited = audit(s5(2400));
  const found = of(frame(audited, 1), 'frame-storey');
  expect([found.verdict, found.utilisation, found.allowed]).toEqual(['not-assessable', null, null]);
  expect(audited.bays.map(({ verdict }) => verdict)).toEqual(['not-assessable', 'not-assessable', 'not-assessable']);
});

test('S5: the lowest beams of one bay taken out: its frames are held from one side only', () => {
  const site = s5(1500);
  const run = site.runs[0] as Run;
  const bays = run.bays.map((one, i) => (i === 1 ? { ...one, levels: one.levels.slice(1) } : one));
  const audited = audit({ ...site, runs: [{ ...run, bays }] });
  for (const i of [1, 2]) {
    const found = of(frame(audited, i), 'frame-storey');
    expect(found.verdict).toBe('not-assessable');
    expect(found.missing.map(({ field }) => field)).toEqual(['bay:A2:levels']);
  }
  expect(of(frame(audited, 0), 'frame-storey').verdict).toBe('within');
});

test('beams that hang above the top of a frame are not possible, and so is what would follow from them', () => {
  const site = s5(1500);
  const [run] = site.runs as [Run];
  const low: Site = { ...site, runs: [{ ...run, frames: run.frames.map((one) => ({ ...one, heightMm: 5900 })) }] };
  const found = frame(audit(low), 1);
  expect(of(found, 'frame-storey').verdict).toBe('not-possible');
  expect(bay(audit(low)).verdict).toBe('not-possible');
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
  const level = bay(audit(s7(atMm))).levels[0];
  const found = level?.findings.filter(({ check }) => check === 'deck-panel') ?? [];
  expect(found.map(({ demand, utilisation, verdict }) => [demand?.value.toFixed(1), utilisation?.toFixed(3), verdict])).toEqual(
    Array.from({ length: panels }, () => [even, used, 'over']),
  );
  expect(found[0]?.allowed?.value.toFixed(1)).toBe('66.7');
  expect(level?.verdict).toBe('over');
  for (const one of found) expectWorked(one);
});

test('S7: 1 444 kg/m² under the motor against 370 kg/m²', () => {
  const found = of(bay(audit(s7(900))).levels[0], 'area-load');
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
  const audited = audit(site);
  const found = frame(audited, 1).findings.filter(({ check }) => check === 'damage');
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
    expect(of(one.levels[0], 'level-total').verdict).toBe('not-assessable');
    expect(of(one, 'notice-match').verdict).toBe('not-assessable');
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
  const [full] = bay(audit(site(3))).levels[0]?.findings.filter(({ check }) => check === 'pallet-bearing') ?? [];
  expect(full?.demand?.value.toFixed(1)).toBe('2518.5');
  expect(full?.utilisation?.toFixed(3)).toBe('1.007');
  expect(full?.counts).toBe(false);
  // ⅓ each gives M = 826.67 and 2 449.4 by bending (scenario S1)
  expect(full?.notes.map(plain)[0]).toContain('the other way it counts as 2449.38 kg');
  if (full) expectWorked(full);
  // With one taken away it counts.
  const [two] = bay(audit(site(2))).levels[0]?.findings.filter(({ check }) => check === 'pallet-bearing') ?? [];
  expect(two?.counts).toBe(true);
  if (two) expectWorked(two);
});

// ---------------------------------------------------------------- own: back-to-back legs

/** Two runs of two bays, one level of 2 000 kg each bay; the last bay behind carries 3 000 kg. */
function backToBack(): Site {
  const heavy = makeUnitLoad({ id: 'heavy', name: 'Heavy', widthMm: 2000, goodsKg: 3000 });
  const one = (name: string, load: UnitLoad) =>
    makeBay([makeLevel([[load, 350]], { heightMm: 1500, beamTypeId: 'beam' })], { id: name, name });
  const run = (id: string, behind: string, loads: readonly UnitLoad[]) =>
    makeRun(
      loads.map((load, i) => one(`${id}${i + 1}`, load)),
      { id, name: id, floorId: 'floor', backToBack: { runId: behind, gapMm: 250, rowSpacers: 'yes' } },
      { typeId: 'type', heightMm: 3000 },
    );
  return makeSite({
    unitLoads: [central, heavy],
    beamTypes: [makeBeamType({ id: 'beam', massKgPerM: 4, connectorsKg: 2.2 })],
    frameTypes: [makeFrameType({ id: 'type', massKg: 60, table: S5_TABLE })],
    floors: [makeFloor({ id: 'floor', legN: 40_000, legPairN: 25_000, thicknessMm: 150 })],
    runs: [run('A', 'B', [central, central]), run('B', 'A', [central, heavy])],
  });
}

test('two runs back to back: each frame’s rear leg pairs with its mirror image behind', () => {
  // End frame, light bay: rear leg (2 000/4 + 13/2) + 60/2 = 536.5 kg; heavy bay: 3 000/4 + 6.5 + 30 = 786.5 kg.
  // Inner frame of A: 2·506.5 + 30 = 1 043 kg; of B: 506.5 + 756.5 + 30 = 1 293 kg.
  // Seen from aisle A the run behind is mirrored: A's frames 1, 2, 3 stand against B's 3, 2, 1.
  const site = backToBack();
  const pairs = [0, 1, 2].map((i) => of(frame(audit(site, 'A'), i), 'back-to-back-legs'));
  const kilos = pairs.map(({ demand }) => (demand?.value ?? NaN) / STANDARD_GRAVITY);
  for (const [i, kg] of [536.5 + 786.5, 1043 + 1293, 536.5 + 536.5].entries()) expect(kilos[i]).toBeCloseTo(kg, 9);
  // 2 336 kg weigh 22 908 N of 25 000 N: 0.916, close.
  expect(pairs[1]?.utilisation?.toFixed(3)).toBe('0.916');
  expect(pairs.map(({ verdict }) => verdict)).toEqual(['within', 'close', 'within']);
  for (const one of pairs) expectWorked(one);
  // From aisle B the same pairs the other way round.
  const back = [0, 1, 2].map((i) => of(frame(audit(site, 'B'), i), 'back-to-back-legs').demand?.value ?? NaN);
  expect(back.map((force) => force / STANDARD_GRAVITY)).toEqual([
    expect.closeTo(1073, 9),
    expect.closeTo(2336, 9),
    expect.closeTo(1323, 9),
  ]);
});

test('where the runs do not mirror each other the heaviest leg behind is taken', () => {
  const site = backToBack();
  const [a, b] = site.runs as [Run, Run];
  const wider: Site = { ...site, runs: [a, { ...b, bays: b.bays.map((one, i) => (i === 0 ? { ...one, clearEntryMm: 2800 } : one)) }] };
  const found = of(frame(audit(wider, 'A'), 2), 'back-to-back-legs');
  // 536.5 here. Behind, the load that was central is 1 350 of 2 800 from its left end: its right end carries
  // 2 000·1 350/2 800/2 = 482.14, half a beam 6.7; the heavy bay 750 + 6.5; half the frame 30.
  expect((found.demand?.value ?? NaN) / STANDARD_GRAVITY).toBeCloseTo(536.5 + (1000 * 1350) / 2800 + 6.7 + 756.5 + 30, 9);
});

// ---------------------------------------------------------------- own: drums on a pallet

test('four 200 L drums on a 1 200 × 1 000 pallet: 85 mm past it, and their real outline decides the gaps', () => {
  // Drums Ø 585 (F-127): outline 1 170 square; pallet 1 000 along the run, 1 200 across. Gross 4·240 + 28 = 988 kg.
  const pallet = makePallet({ id: 'pallet', lengthMm: 1200, widthMm: 1000, massKg: 28, runners: [] });
  const drums = makeUnitLoad({
    id: 'drums',
    name: 'Drums',
    widthMm: 1170,
    depthMm: 1170,
    heightMm: 1024,
    goodsKg: 960,
    palletId: 'pallet',
    contact: 'rims',
  });
  const site = makeSite({
    pallets: [pallet],
    unitLoads: [drums],
    notices: [makeNotice({ id: 'notice', levelKg: [2500], unitLoadKg: 1000 })],
    beamTypes: [makeBeamType({ id: 'beam' })],
    frameTypes: [makeFrameType({ id: 'type' })],
    runs: [
      makeRun(
        [
          makeBay(
            [
              makeLevel(
                [
                  [drums, 75],
                  [drums, 1320],
                ],
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
  const level = bay(audit(site)).levels[0];
  expect(of(level, 'unit-load').demand?.value).toBeCloseTo(988, 9);
  expect(of(level, 'overhang').notes.map(plain).join(' ')).toContain('reach past their pallet by 85 mm on each side along the run');
  expect(of(level, 'overhang').verdict).toBe('within');
  // The pallet makes their rims no matter of the beams.
  expect(of(level, 'goods-form').verdict).toBe('within');
  // 75 | 1 170 | 75 | 1 170 | 210: within, though between the pallets themselves there are 245 mm.
  expect(of(level, 'clearance-along').allowed?.value).toBe(75);
  expect(of(level, 'clearance-along').verdict).toBe('within');
  expect(of(level, 'clearance-along').notes.map(plain)[0]).toContain('need a clear entry of 2565 mm');
});

// ---------------------------------------------------------------- own: a bay in pounds and inches

test('a United States bay: two 2 000 lb loads on a 96 in level, 42 in deep, 300 in high', () => {
  // Loads 42 in wide with gaps of 3, 6 and 3 in: 3 + 42 + 6 + 42 + 3 = 96. Customary 3 in and 4 in are met (F-70).
  // Each frame carries half of 4 000 lb and of two beams of 24 lb, and itself, 150 lb:
  // 2 000 + 24 + 150 = 2 174 lb of 10 000 lb = 0.2174. Leg: 1 087 lb = 4 835.2 N of 20 kip.
  // Height to depth 300/42 = 7.14: close, above 6 to 1.
  const load = makeUnitLoad({ id: 'load', name: 'Load', widthMm: 42 * INCH, depthMm: 48 * INCH, heightMm: 48 * INCH, goodsKg: 2000 * LB });
  const site = changed(
    makeSite({
      units: 'us',
      unitLoads: [load],
      notices: [makeNotice({ id: 'notice', levelKg: [5000 * LB], unitLoadKg: 2500 * LB })],
      beamTypes: [makeBeamType({ id: 'beam', widthMm: 2 * INCH, massKgPerM: (24 * LB) / ((96 * INCH) / 1000), connectorsKg: 0 })],
      frameTypes: [
        makeFrameType({ id: 'type', depthMm: 42 * INCH, massKg: 150 * LB, table: [{ heightMm: 300 * INCH, ratedKg: 10_000 * LB }] }),
      ],
      floors: [makeFloor({ id: 'floor', legN: 20_000 * LB * STANDARD_GRAVITY })],
      runs: [
        makeRun(
          [
            makeBay(
              [
                makeLevel(
                  [
                    [load, 3 * INCH],
                    [load, 51 * INCH],
                  ],
                  { heightMm: 300 * INCH, beamTypeId: 'beam' },
                ),
              ],
              { clearEntryMm: 96 * INCH, noticeId: 'notice' },
            ),
          ],
          { id: 'run', floorId: 'floor' },
          { typeId: 'type', heightMm: 310 * INCH },
        ),
      ],
    }),
    { set: 'united-states' },
  );
  const audited = audit(site);
  const storey = of(frame(audited, 0), 'frame-storey');
  expect((storey.demand?.value ?? NaN) / LB).toBeCloseTo(2174, 6);
  expect(storey.utilisation).toBeCloseTo(0.2174, 9);
  const leg = of(frame(audited, 0), 'leg-load');
  expect(leg.demand?.value.toFixed(1)).toBe('4835.2');
  expect(leg.utilisation).toBeCloseTo(1087 / 20_000, 9);
  const height = of(frame(audited, 0), 'height-to-depth');
  expect(height.demand?.value.toFixed(2)).toBe('7.14');
  expect(height.verdict).toBe('close');
  const along = of(bay(audited).levels[0], 'clearance-along');
  expect(along.verdict).toBe('within');
  expect(along.notes.map(plain).join(' ')).toContain('United States rule set; common practice, customary in the United States');
  const out = of(bay(audited).levels[0], 'overhang');
  expect((out.demand?.value ?? NaN) / INCH).toBeCloseTo(3, 9);
  expect(out.verdict).toBe('within');
});

// ---------------------------------------------------------------- own: heavy goods low, and the beam above

test('the heaviest pallet on top: centre of mass 24 % above the best order, close', () => {
  // Levels at 1 500, 3 000, 4 500; goods 1 000 high. As it stands (500·2 000 + 500·3 500 + 1 000·5 000)/2 000 = 3 875;
  // heaviest low (1 000·2 000 + 500·3 500 + 500·5 000)/2 000 = 3 125; 3 875/3 125 = 1.24.
  const [light, heavy] = [500, 1000].map((goodsKg) =>
    makeUnitLoad({ id: `g${goodsKg}`, name: `${goodsKg} kg`, goodsKg, heightMm: 1000 }),
  ) as [UnitLoad, UnitLoad];
  const levels = [light, light, heavy].map((load, i) => makeLevel([[load, 950]], { heightMm: 1500 * (i + 1) }));
  const found = of(bay(audit(makeSite({ unitLoads: [light, heavy], runs: [makeRun([makeBay(levels)], { id: 'run' })] }))), 'heavy-low');
  expect(found.demand?.value).toBeCloseTo(3875, 9);
  expect(found.verdict).toBe('close');
  expect(plain(found.says)).toContain('24 % above the best order');
  expectWorked(found);
});

test('the beam above is taken as it sags: computed where its section is known, else its limit', () => {
  // 1 860 kg on three pallets sag a 120 × 50 × 1.5 box 12.43 mm (scenario S10); L/200 of 2 700 is 13.5 mm.
  const load = makeUnitLoad({ id: 'load', goodsKg: 620, heightMm: 1000 });
  const row = [75, 950, 1825].map((at) => [load, at] as const);
  const site = (section: boolean) =>
    makeSite({
      unitLoads: [load],
      beamTypes: [makeBeamType({ id: 'beam', ...(section ? { secondMomentMm4: 927_016, elasticModulusNPerMm2: 210_000 } : {}) })],
      frameTypes: [makeFrameType({ id: 'type' })],
      runs: [
        makeRun(
          [makeBay([makeLevel(row, { heightMm: 1500, beamTypeId: 'beam' }), makeLevel(row, { heightMm: 3000, beamTypeId: 'beam' })])],
          { id: 'run' },
          { typeId: 'type' },
        ),
      ],
    });
  const known = of(bay(audit(site(true))).levels[0], 'clearance-above');
  // 3 000 − 120 − 12.43 − 1 500 − 1 000
  expect(known.allowed?.value.toFixed(2)).toBe('367.57');
  expect(known.notes.map(plain)[0]).toContain('computed from the goods on it');
  const limit = of(bay(audit(site(false))).levels[0], 'clearance-above');
  expect(limit.allowed?.value).toBeCloseTo(3000 - 120 - 13.5 - 1500 - 1000, 9);
  expect(limit.notes.map(plain)[0]).toContain('its span over 200');
});

test('goods on the floor need their clearances and load no frame', () => {
  const crate = makeUnitLoad({ id: 'crate', name: 'Crate', widthMm: 1200, heightMm: 1320, goodsKg: null });
  const site = makeSite({
    unitLoads: [crate],
    beamTypes: [makeBeamType({ id: 'beam' })],
    frameTypes: [makeFrameType({ id: 'type', table: S5_TABLE })],
    runs: [
      makeRun(
        [makeBay([makeLevel([], { beamTypeId: 'beam' })], { onFloor: [makePlacement('crate', 50)] })],
        { id: 'run' },
        { typeId: 'type' },
      ),
    ],
  });
  const audited = audit(site);
  // 1 500 − 120 − 0 − 1 320 = 60 of 75 mm (an empty beam of unknown section is still taken at its limit, 13.5 mm)
  const above = of(bay(audited), 'clearance-above');
  expect(above.allowed?.value).toBeCloseTo(1500 - 120 - 13.5 - 1320, 9);
  expect(above.verdict).toBe('over');
  expect(of(bay(audited), 'clearance-along').verdict).toBe('over');
  expect(of(frame(audited, 0), 'frame-storey').verdict).toBe('within');
});

test('round goods lying on the floor must be chocked too', () => {
  const pipe = makeUnitLoad({ id: 'pipe', name: 'Pipe', contact: 'lying-round', chocked: 'no' });
  const site = makeSite({ unitLoads: [pipe], runs: [makeRun([makeBay([], { onFloor: [makePlacement('pipe', 100)] })], { id: 'run' })] });
  expect(of(bay(audit(site)), 'goods-form').verdict).toBe('over');
});

// ---------------------------------------------------------------- own: pallets turned, bars and decks

test('a EUR pallet turned, 1 200 mm to the aisle, is over on beams alone and carried by support bars', () => {
  const pallet = makePallet({ id: 'pallet' });
  const turned = makeUnitLoad({
    id: 'load',
    name: 'Turned',
    widthMm: 1200,
    depthMm: 800,
    goodsKg: 300,
    palletId: 'pallet',
    palletFace: 'length',
  });
  const site = (bars: boolean) =>
    makeSite({
      pallets: [pallet],
      unitLoads: [turned],
      beamTypes: [makeBeamType({ id: 'beam' })],
      frameTypes: [makeFrameType({ id: 'type' })],
      runs: [
        makeRun(
          [
            makeBay([
              makeLevel([[turned, 100]], { beamTypeId: 'beam', deck: bars ? { kind: 'support-bars', massKg: 15 } : { kind: 'none' } }),
            ]),
          ],
          { id: 'run' },
          { typeId: 'type' },
        ),
      ],
    });
  const found = of(bay(audit(site(false))).levels[0], 'pallet-bearing');
  expect(found.verdict).toBe('over');
  expect(plain(found.says)).toContain('is turned so that its bottom boards run along the beams');
  expect(of(bay(audit(site(true))).levels[0], 'pallet-bearing').verdict).toBe('within');
});

// ---------------------------------------------------------------- rule sets

test.each<[Rules['set'], string, string, string]>([
  // deflection F-01 to F-03, clearance between loads F-62, F-70, F-69, plumb loaded F-38, F-39 and the safe side
  ['european', 'European', '75', '300'],
  ['united-states', 'United States', '101.6', '240'],
  ['australian', 'Australian', '100', '500'],
])('the %s set gives its own limits and is named on every result', (set, title, between, divisor) => {
  const load = makeUnitLoad({ id: 'load', goodsKg: 100, widthMm: 800 });
  const run = makeRun(
    [
      makeBay([
        makeLevel(
          [
            [load, 200],
            [load, 1050],
          ],
          { beamTypeId: 'beam' },
        ),
      ]),
    ],
    { id: 'run' },
    { typeId: 'type', plumb: { alongMm: 5, acrossMm: 0, heightMm: 1200, loaded: true } },
  );
  const base = makeSite({
    unitLoads: [load],
    beamTypes: [makeBeamType({ id: 'beam' })],
    frameTypes: [makeFrameType({ id: 'type' })],
    runs: [run],
  });
  const audited = audit(changed(base, { set }));
  const along = of(bay(audited).levels[0], 'clearance-along');
  expect(along.demand?.value.toFixed(1)).toBe(Number(between).toFixed(1));
  expect(along.notes.map(plain).join(' ')).toContain(`${title} rule set`);
  const upright = of(frame(audited, 0), 'plumb');
  expect(plain(upright.says)).toContain(`the height over ${divisor}`);
  expect(upright.notes.map(plain).join(' ')).toContain(`${title} rule set`);
  // One value changed is marked as changed, and its reason printed.
  const other = audit(changed(base, { set, changed: [{ key: 'plumbLoadedDivisor', value: 200, reason: 'owner’s survey rule' }] }));
  const marked = of(frame(other, 0), 'plumb');
  expect(plain(marked.says)).toContain('the height over 200');
  expect(marked.notes.map(plain).join(' ')).toContain(`changed from the ${title} rule set: owner’s survey rule`);
});
