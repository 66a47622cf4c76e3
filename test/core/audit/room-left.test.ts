import { expect, test } from 'vitest';
import { roomLeft, type RoomLeft } from '../../../src-core/audit/room-left';
import { fullComplementRange } from '../../../src-core/checks/full-complement';
import type { CheckName, Finding } from '../../../src-core/checks/finding';
import type { BearingShape } from '../../../src-core/goods/shapes';
import type { Bay, Floor, Id, Run, Site, Source, UnitLoad } from '../../../src-core/site/site';
import { formatText } from '../../../src-core/units/format';
import { expectClose } from '../../close';
import { goods, level, pallet, rack, stand, type Rack } from './rack';
import { passes, weighing, withLevels } from './weighing';

const TODAY = '2026-06-01';
const MAKER: Source = { kind: 'maker', detail: 'data sheet', person: 'A. Tester', date: '2026-05-04' };
const FLOOR: Floor = {
  id: 'floor',
  name: 'Hall slab',
  kind: 'suspended',
  legN: 1e6,
  pressureNPerMm2: 1e3,
  legPairN: 1e6,
  areaNPerMm2: 10,
  thicknessMm: 200,
  source: { ...MAKER, kind: 'engineer' },
};
/** Ratings so high that only what a test lowers can stop anything; the level is rated 2 500 kg over 2 700 mm. */
const HIGH = {
  unitLoadsPerLevel: 9,
  unitLoadKg: 1e5,
  bayKg: 1e5,
  frameKg: 1e5,
  firstBeamMm: 3000,
  greatestGapMm: 3000,
  levels: 1,
  maker: 'Works',
};

function known(change: Rack, more: Partial<Site> = {}): Site {
  const site = rack({
    ...change,
    notice: { ...HIGH, levels: change.levels.length, ...change.notice, source: { ...MAKER, kind: 'notice' } },
    beam: { source: MAKER, maker: 'Works', ...change.beam },
    frame: { table: [{ heightMm: 6000, ratedKg: 1e5 }], source: MAKER, maker: 'Works', ...change.frame },
  });
  const runs = site.runs.map((run): Run => ({ ...run, floorId: 'floor' }));
  return { ...site, floors: [FLOOR], runs, ...more };
}

const room = (site: Site, placementId: Id): RoomLeft => roomLeft(site, placementId, TODAY);
const plain = (found: Finding): string => formatText(found.says, { units: 'metric', locale: 'en-GB' }).replaceAll(/[\u00a0\u202f]/g, ' ');

/** @param stops one of them; where several are met at once any may be named */
function expectRoom(site: Site, placementId: Id, kg: number, ...stops: CheckName[]): RoomLeft & { kind: 'room' } {
  const found = room(site, placementId);
  if (found.kind !== 'room') return expect.fail(`${found.kind}: ${'because' in found ? [found.because].flat().map(plain).join(' ') : ''}`);
  expectClose(found.mostKg, kg, 1e-11);
  expect(stops).toContain(found.stop.check);
  return found;
}

/** One unit load of unknown mass on an otherwise empty level: its own mass is nobody's business here. */
const alone = (change: Partial<UnitLoad>, atMm: number, more: Partial<Rack> = {}): [Site, Id] => {
  const placed = stand('g', atMm);
  return [known({ unitLoads: [goods('g', { goodsKg: null, ...change })], levels: [level([placed])], ...more }), placed.id];
};
const point = (xMm: number): BearingShape => ({ kind: 'feet', feet: [{ xMm, share: 1 }] });

test('an even load from end to end may weigh what the pair is rated for', () => {
  expectRoom(...alone({ widthMm: 2700 }, 0), 2500, 'level-total', 'beam-bending', 'beam-end-shear', 'beam-deflection');
});

test('a point load at mid-span may weigh half the rating, by bending', () => {
  // PL/4 = WL/8, method §5
  expectRoom(...alone({ bearing: point(400) }, 950), 1250, 'beam-bending');
});

test('a point load at a quarter of the span may weigh two thirds of the rating', () => {
  // M = 3PL/16 = WL/8 and R = 3P/4 = W/2, by statics
  expectRoom(...alone({ bearing: point(400) }, 275), 2500 / 1.5, 'beam-bending', 'beam-end-shear');
});

test('an even load in the middle may weigh the rating over 2 − b/L, by bending', () => {
  // Common practice, statics of a centred strip: W · (2 − b/L)
  expectRoom(...alone({}, 950), 2500 / (2 - 800 / 2700), 'beam-bending');
});

test('an even load beside 500 kg of its like bends by the square of what statics gives', () => {
  // Over the first 1 000 of 2 700 mm lie 500 kg, over the next m. The right reaction R = (500 · 500 + m · 1 500) / 2 700 = c + k·m
  // meets V = 0 under m, M = 700 R + R² · 1 000 / (2m), and 8M/L = 2 500 is a quadratic in m. The ends are rated by themselves.
  const [a, b] = [stand('a', 0), stand('b', 1000)];
  const site = known({
    unitLoads: [goods('a', { widthMm: 1000, goodsKg: 500 }), goods('b', { widthMm: 1000, goodsKg: 1 })],
    levels: [level([a, b])],
    beam: { endKg: 1e5 },
  });
  const [c, k] = [250_000 / 2700, 1500 / 2700];
  const [square, linear, constant] = [700 * k + 500 * k * k, 700 * c + 1000 * c * k - (2500 * 2700) / 8, 500 * c * c];
  expectRoom(site, b.id, (-linear + Math.sqrt(linear ** 2 - 4 * square * constant)) / (2 * square), 'beam-bending');
});

test('goods towards the front load the front beam alone', () => {
  // Share 1/2 + e/d with d = 1 100 − 50 and e = 105 is 0.6: twice 0.6 m against the rating, and by bending 1.7037 times that
  const placed = stand('g', 950, { towardsFrontMm: 105 });
  const site = known({ unitLoads: [goods('g', { depthMm: 1400 })], levels: [level([placed])] });
  expectRoom(site, placed.id, 2500 / (2 * 0.6 * (2 - 800 / 2700)), 'beam-bending');
});

test('a pallet is part of the mass and lies evenly under goods that do not', () => {
  // Goods as a point in the middle of 800 mm and a pallet of 25 kg even: 2 (m − 25) + 25 · (2 − 800 / 2 700) = 2 500
  const placed = stand('g', 950);
  const columns = [399.5, 1, 399.5].map((widthMm, i) => ({ widthMm, massKg: i === 1 ? 1 : 0 }));
  const site = known({
    pallets: [pallet('p', { massKg: 25 })],
    unitLoads: [goods('g', { palletId: 'p', bearing: { kind: 'stepped', columns } })],
    levels: [level([placed])],
  });
  const strip = 2 - 1 / 2700;
  expectRoom(site, placed.id, 25 + (2500 - 25 * (2 - 800 / 2700)) / strip, 'beam-bending');
});

test('a frame stops it where its rating is used up first, its own mass and the beams counted', () => {
  // Half the goods on each frame, 12.8 kg a beam (4 kg/m · 2.7 m + 2 kg), 60 kg of frame: m/2 + 12.8 + 60 = 700
  const found = expectRoom(...alone({}, 950, { frame: { table: [{ heightMm: 6000, ratedKg: 700 }] } }), 2 * (700 - 72.8), 'frame-storey');
  expect(['left', 'right']).toContain(found.stop.place.frameId);
});

test('a shared frame stops it by what both bays put on it', () => {
  // The bay beside puts 1 000 kg, half of it on the shared frame: m/2 + 500 + 2 · 12.8 + 60 = 1 000
  const placed = stand('g', 950);
  const site = known({
    unitLoads: [goods('g'), goods('beside', { goodsKg: 1000 })],
    levels: [level([placed])],
    frame: { table: [{ heightMm: 6000, ratedKg: 1000 }] },
  });
  const [run] = site.runs as [Run];
  const [bay] = run.bays as [Bay];
  const other = { ...bay, id: 'bay2', name: 'A2', levels: [level([stand('beside', 950)])] };
  const last = { ...(run.frames[1] as Run['frames'][number]), id: 'last', name: 'last' };
  const found = expectRoom(
    { ...site, runs: [{ ...run, bays: [bay, other], frames: [...run.frames, last] }] },
    placed.id,
    2 * (1000 - 500 - 25.6 - 60),
    'frame-storey',
  );
  expect(found.stop.place.frameId).toBe('right');
});

test('the rated bay load stops it with what stands on the other levels', () => {
  const placed = stand('g', 950);
  const site = known({
    unitLoads: [goods('g'), goods('above', { goodsKg: 900 })],
    levels: [level([placed]), level([stand('above', 950)], { heightMm: 3000 })],
    notice: { bayKg: 2000 },
  });
  expectRoom({ ...site, runs: tall(site) }, placed.id, 1100, 'bay-total');
});
const tall = ({ runs }: Site): readonly Run[] =>
  runs.map((run) => ({ ...run, frames: run.frames.map((frame) => ({ ...frame, heightMm: 6000, restrained: 'yes' as const })) }));

test('the unit load limit of the notice stops it, pallet included', () => {
  expectRoom(...alone({}, 950, { notice: { unitLoadKg: 833 } }), 833, 'unit-load');
});

test('the floor stops it by a leg', () => {
  // Half the goods, a beam of 12.8 kg at each frame's two posts and half of 60 kg: m/4 + 6.4 + 30 on a leg of 2 000 N
  const [site, id] = alone({}, 950);
  expectRoom({ ...site, floors: [{ ...FLOOR, legN: 2000 }] }, id, 4 * (2000 / 9.80665 - 36.4), 'leg-load');
});

test('a deck panel stops it with its own rating', () => {
  // Two panels of 1 350 mm; 800 mm evenly on the first, over the whole depth of 1 100 mm
  const placed = stand('g', 100);
  const deck = { kind: 'panels', count: 2, panelKg: 300, massKg: 40, source: MAKER } as const;
  expectRoom(known({ unitLoads: [goods('g', { depthMm: 1100 })], levels: [level([placed], { deck })] }), placed.id, 300, 'deck-panel');
});

test('goods on the level below stop it where these beams would sag into their clearance', () => {
  // By hand nothing but fitting is asked: the beam at 3 000 is 120 high and 1 372 above the goods of 1 500 + 1 372;
  // 8 mm are left. 384·EI·δ / (5 L³) of the pair, deflection's equivalent, by statics for an even load from end to end.
  const placed = stand('g', 0);
  const section = { secondMomentMm4: 927_016, elasticModulusNPerMm2: 210_000, sectionModulusMm3: 1e6, designStressNPerMm2: 1e4 };
  const site = known({
    unitLoads: [goods('g', { widthMm: 2700 }), goods('under', { goodsKg: 10, heightMm: 1372 })],
    levels: [level([stand('under', 950)]), level([placed], { heightMm: 3000 })],
    beam: section,
  });
  const most = (2 * 384 * 927_016 * 210_000 * 8) / (5 * 2700 ** 3) / 9.80665;
  const found = expectRoom({ ...site, runs: tall(site) }, placed.id, most * (1 + 1e-6 / 8), 'clearance-above');
  expect(plain(found.stop)).toContain('Goods under');
});

test('an unknown mass beside it leaves it not assessable and is named', () => {
  const placed = stand('g', 100);
  const site = known({
    unitLoads: [goods('g'), goods('mystery', { goodsKg: null })],
    levels: [level([placed, stand('mystery', 1500)])],
  });
  const found = room(site, placed.id);
  expect(found).toMatchObject({ kind: 'not-assessable', missing: [{ input: 'mass of Goods mystery', field: 'unitLoad:mystery:goodsKg' }] });
});

test('an unknown rating, and a pallet of unknown mass, leave it not assessable and are named', () => {
  const unrated = room(...alone({}, 950, { notice: { levelKg: [null] } }));
  expect(unrated.kind === 'not-assessable' && unrated.missing.map(({ input }) => input)).toContain('rated capacity of level 1');
  const placed = stand('g', 950);
  const heavy = known({ pallets: [pallet('p', { massKg: null })], unitLoads: [goods('g', { palletId: 'p' })], levels: [level([placed])] });
  const found = room(heavy, placed.id);
  expect(found.kind === 'not-assessable' && found.missing.map(({ field }) => field)).toEqual(['pallet:p:massKg']);
});

test('what is missing of the goods themselves is asked for under their own name', () => {
  const [site, id] = alone({ contact: 'lying-round', chocked: 'unknown' }, 950);
  const deck = { kind: 'panels', count: 1, panelKg: 5000, massKg: 40, source: MAKER } as const;
  const found = room(
    withLevels(site, (one) => ({ ...one, deck })),
    id,
  );
  expect(found.kind === 'not-assessable' && found.missing.map(({ field }) => field)).toEqual(['unitLoad:g:chocked']);
});
test('goods that stand in others or past the end do not fit, and it is said by how much', () => {
  const [a, b] = [stand('a', 100), stand('a', 850)];
  const overlapping = room(known({ unitLoads: [goods('a')], levels: [level([a, b])] }), b.id);
  expect(overlapping.kind === 'no-fit' && plain(overlapping.because[0] as Finding)).toContain('stand in each other by 50 mm');
  const past = room(...alone({}, 2000));
  expect(past.kind === 'no-fit' && plain(past.because[0] as Finding)).toContain('reaches 100 mm past the right end');
});

test('too small a gap for a truck does not fit, and both figures are said', () => {
  const [site, id] = alone({}, 20);
  const found = room({ ...site, runs: site.runs.map((run) => ({ ...run, loadedBy: 'class-400' })) }, id);
  expect(found.kind === 'no-fit' && plain(found.because[0] as Finding)).toContain('there is 20 mm, and 75 mm is needed');
});

test('on a level that is over already there is no room, and the check that is over is named', () => {
  const placed = stand('g', 100);
  const site = known({
    unitLoads: [goods('g'), goods('heavy', { goodsKg: 3000 })],
    levels: [level([placed, stand('heavy', 1500)])],
  });
  expect(room(site, placed.id)).toMatchObject({ kind: 'none', already: true, because: { verdict: 'over' } });
});

test('in a bay that is exactly full there is no room for anything', () => {
  const placed = stand('g', 2400);
  const full = known({
    unitLoads: [goods('g', { widthMm: 300 }), goods('full', { widthMm: 2400, goodsKg: 2500 })],
    levels: [level([stand('full', 0), placed])],
    notice: { levelKg: [3000], bayKg: 2500 },
  });
  expect(room(full, placed.id)).toMatchObject({ kind: 'none', already: false, because: { check: 'bay-total' } });
});

test('red damage of a frame leaves no room in either of its bays', () => {
  const [site, id] = alone({}, 950);
  const torn = {
    id: 'd',
    member: 'upright-front',
    alongMm: null,
    acrossMm: null,
    gaugeMm: 1000,
    torn: true,
    note: '',
    found: TODAY,
  } as const;
  const runs = site.runs.map((run) => ({ ...run, frames: run.frames.map((one, i) => (i === 0 ? { ...one, damages: [torn] } : one)) }));
  expect(room({ ...site, runs }, id)).toMatchObject({
    kind: 'none',
    already: true,
    because: { check: 'damage', place: { frameId: 'left' } },
  });
});

test('with every check of mass left out there is no limit, and none is invented', () => {
  const [site, id] = alone({}, 950);
  const checks: CheckName[] = [
    'unit-load',
    'level-total',
    'beam-bending',
    'beam-end-shear',
    'beam-deflection',
    'bay-total',
    'frame-storey',
  ];
  const floor: CheckName[] = ['leg-load', 'plate-pressure', 'floor-area'];
  const leftOut = [...checks, ...floor].map((check) => ({ check, reason: 'a test' }));
  expect(room({ ...site, rules: { ...site.rules, leftOut } }, id)).toEqual({ kind: 'unlimited' });
});

// ------------------------------------------------------------ designed full complement

/** Two of 800 kg stand on a level made for three and rated 2 500 kg; the third place is free. */
const threeOf = (masses: readonly [number, number], ratedKg = 2500): [Site, Id] => {
  const third = stand('g', 1825);
  const site = known({
    unitLoads: [goods('g'), goods('a', { goodsKg: masses[0] }), goods('b', { goodsKg: masses[1] })],
    levels: [level([stand('a', 75), stand('b', 950), third])],
    notice: { unitLoadsPerLevel: 3, levelKg: [ratedKg] },
  });
  return [site, third.id];
};

test('the last of a designed full complement may weigh its part of the rating', () => {
  const found = expectRoom(...threeOf([800, 800]), 2500 / 3, 'beam-bending', 'beam-deflection');
  expect(found.asComplement).toBe(true);
  // By the even loads alone it may weigh less, and between the two limits it is neither.
  const [site, id] = threeOf([800, 800]);
  const even = room({ ...site, rules: { ...site.rules, fullComplement: false } }, id);
  expect(even.kind === 'room' && even.mostKg).toBeLessThan(2500 / 3);
});

test('masses that would make neither an even load within the rating nor a full complement are told apart', () => {
  // Others of 830 kg: near equal from 0.95 · 1 660 / 2.05 = 769.27 kg on, up to 2 500 / 3
  const found = expectRoom(...threeOf([830, 830]), 2500 / 3, 'beam-bending', 'beam-deflection');
  const [site, id] = threeOf([830, 830]);
  const even = room({ ...site, rules: { ...site.rules, fullComplement: false } }, id);
  if (even.kind !== 'room' || found.notBetween === null) return expect.fail('no gap');
  expectClose(found.notBetween.aboveKg, even.mostKg, 1e-11);
  expectClose(found.notBetween.belowKg, (0.95 * 1660) / 2.05, 1e-11);
  for (const [kg, over] of [
    [found.notBetween.aboveKg * (1 - 1e-9), false],
    [found.notBetween.aboveKg * (1 + 1e-9), true],
    [found.notBetween.belowKg * (1 - 1e-9), true],
    [found.notBetween.belowKg * (1 + 1e-9), false],
  ] as const)
    expect(passes(weighing(site, id, kg), id, TODAY), `${kg} kg`).toBe(!over);
});

test('range of near equal masses: by the mean, by each of the others, and by the part of the rating', () => {
  // |mᵢ − mean| ≤ 5 % of the mean, solved by hand for the one that is free
  expect(fullComplementRange([800, 800], 2500, 5)).toEqual({ fromKg: (0.95 * 1600) / 2.05, toKg: 2500 / 3 });
  expect(fullComplementRange([], 2500, 5)).toEqual({ fromKg: 0, toKg: 2500 });
  expect(fullComplementRange([700, 900], 5000, 5)).toBeNull();
  expect(fullComplementRange([900, 900], 2500, 5)).toBeNull();
  const range = fullComplementRange([100, 110], 1e6, 5);
  expectClose(range?.fromKg ?? null, (3 * 110) / 1.05 - 210, 1e-12);
  expectClose(range?.toKg ?? null, (3 * 100) / 0.95 - 210, 1e-12);
});
