/** Whole racks through the audit, in the style of test/reference/scenarios.md: each one's arithmetic stands beside it. */
import { expect, test } from 'vitest';
import type { Rules, Run, Site, UnitLoad } from '../../../src-core/site/site';
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
import { auditedRun, bayOf, findingOf, frameOf } from './audited';
import { central, S5_TABLE } from './s5';

const LB = 0.45359237;
const INCH = 25.4;
const changed = (site: Site, rules: Partial<Rules>): Site => ({ ...site, rules: { ...site.rules, ...rules } });

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
  const pairs = [0, 1, 2].map((i) => findingOf(frameOf(auditedRun(site, 'A'), i), 'back-to-back-legs'));
  const kilos = pairs.map(({ demand }) => (demand?.value ?? NaN) / STANDARD_GRAVITY);
  for (const [i, kg] of [536.5 + 786.5, 1043 + 1293, 536.5 + 536.5].entries()) expect(kilos[i]).toBeCloseTo(kg, 9);
  // 2 336 kg weigh 22 908 N of 25 000 N: 0.916, close.
  expect(pairs[1]?.utilisation?.toFixed(3)).toBe('0.916');
  expect(pairs.map(({ verdict }) => verdict)).toEqual(['within', 'close', 'within']);
  for (const one of pairs) expectWorked(one);
  // From aisle B the same pairs the other way round.
  const back = [0, 1, 2].map((i) => findingOf(frameOf(auditedRun(site, 'B'), i), 'back-to-back-legs').demand?.value ?? NaN);
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
  const found = findingOf(frameOf(auditedRun(wider, 'A'), 2), 'back-to-back-legs');
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
  const level = bayOf(auditedRun(site)).levels[0];
  expect(findingOf(level, 'unit-load').demand?.value).toBeCloseTo(988, 9);
  expect(findingOf(level, 'overhang').notes.map(plain).join(' ')).toContain('reach past their pallet by 85 mm on each side along the run');
  expect(findingOf(level, 'overhang').verdict).toBe('within');
  // The pallet makes their rims no matter of the beams.
  expect(findingOf(level, 'goods-form').verdict).toBe('within');
  // 75 | 1 170 | 75 | 1 170 | 210: within, though between the pallets themselves there are 245 mm.
  expect(findingOf(level, 'clearance-along').allowed?.value).toBe(75);
  expect(findingOf(level, 'clearance-along').verdict).toBe('within');
  expect(findingOf(level, 'clearance-along').notes.map(plain)[0]).toContain('need a clear entry of 2565 mm');
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
  const audited = auditedRun(site);
  const storey = findingOf(frameOf(audited, 0), 'frame-storey');
  expect((storey.demand?.value ?? NaN) / LB).toBeCloseTo(2174, 6);
  expect(storey.utilisation).toBeCloseTo(0.2174, 9);
  const leg = findingOf(frameOf(audited, 0), 'leg-load');
  expect(leg.demand?.value.toFixed(1)).toBe('4835.2');
  expect(leg.utilisation).toBeCloseTo(1087 / 20_000, 9);
  const height = findingOf(frameOf(audited, 0), 'height-to-depth');
  expect(height.demand?.value.toFixed(2)).toBe('7.14');
  expect(height.verdict).toBe('close');
  const along = findingOf(bayOf(audited).levels[0], 'clearance-along');
  expect(along.verdict).toBe('within');
  expect(along.notes.map(plain).join(' ')).toContain('United States rule set; common practice, customary in the United States');
  const out = findingOf(bayOf(audited).levels[0], 'overhang');
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
  const found = findingOf(
    bayOf(auditedRun(makeSite({ unitLoads: [light, heavy], runs: [makeRun([makeBay(levels)], { id: 'run' })] }))),
    'heavy-low',
  );
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
  const known = findingOf(bayOf(auditedRun(site(true))).levels[0], 'clearance-above');
  // 3 000 − 120 − 12.43 − 1 500 − 1 000
  expect(known.allowed?.value.toFixed(2)).toBe('367.57');
  expect(known.notes.map(plain)[0]).toContain('computed from the goods on it');
  const limit = findingOf(bayOf(auditedRun(site(false))).levels[0], 'clearance-above');
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
  const audited = auditedRun(site);
  // 1 500 − 120 − 0 − 1 320 = 60 of 75 mm (an empty beam of unknown section is still taken at its limit, 13.5 mm)
  const above = findingOf(bayOf(audited), 'clearance-above');
  expect(above.allowed?.value).toBeCloseTo(1500 - 120 - 13.5 - 1320, 9);
  expect(above.verdict).toBe('over');
  expect(findingOf(bayOf(audited), 'clearance-along').verdict).toBe('over');
  expect(findingOf(frameOf(audited, 0), 'frame-storey').verdict).toBe('within');
});

test('round goods lying on the floor must be chocked too', () => {
  const pipe = makeUnitLoad({ id: 'pipe', name: 'Pipe', contact: 'lying-round', chocked: 'no' });
  const site = makeSite({ unitLoads: [pipe], runs: [makeRun([makeBay([], { onFloor: [makePlacement('pipe', 100)] })], { id: 'run' })] });
  expect(findingOf(bayOf(auditedRun(site)), 'goods-form').verdict).toBe('over');
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
  const found = findingOf(bayOf(auditedRun(site(false))).levels[0], 'pallet-bearing');
  expect(found.verdict).toBe('over');
  expect(plain(found.says)).toContain('is turned so that its bottom boards run along the beams');
  expect(findingOf(bayOf(auditedRun(site(true))).levels[0], 'pallet-bearing').verdict).toBe('within');
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
  const audited = auditedRun(changed(base, { set }));
  const along = findingOf(bayOf(audited).levels[0], 'clearance-along');
  expect(along.demand?.value.toFixed(1)).toBe(Number(between).toFixed(1));
  expect(along.notes.map(plain).join(' ')).toContain(`${title} rule set`);
  const upright = findingOf(frameOf(audited, 0), 'plumb');
  expect(plain(upright.says)).toContain(`the height over ${divisor}`);
  expect(upright.notes.map(plain).join(' ')).toContain(`${title} rule set`);
  // One value changed is marked as changed, and its reason printed.
  const other = auditedRun(changed(base, { set, changed: [{ key: 'plumbLoadedDivisor', value: 200, reason: 'owner’s survey rule' }] }));
  const marked = findingOf(frameOf(other, 0), 'plumb');
  expect(plain(marked.says)).toContain('the height over 200');
  expect(marked.notes.map(plain).join(' ')).toContain(`changed from the ${title} rule set: owner’s survey rule`);
});
