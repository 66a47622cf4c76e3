/**
 * The level check (front and rear beam, twelve results each) against the bare pass over its pieces, 1,001
 * stations and 40 beam elements with a dense solver, all in one run on the same levels. Medians of processor time; read the ratios.
 */
import { goodsIntensity, type GoodsOnBeam } from '../../src-core/goods/bearing-shape';
import { pairLoads, type StandingGoods } from '../../src-core/goods/pair';
import { solveBeam, type Beam } from '../../src-core/statics/beam';
import { equivalentLoads } from '../../src-core/statics/equivalent';
import { packProfile } from '../../src-core/statics/profile';
import { RESULT, scratchFor, type PlacedProfiles } from '../../src-core/statics/pinned-layout';
import { solvePinnedPair } from '../../src-core/statics/pinned-pair';
import type { BeamLoad } from '../../src-core/statics/load';
import { barePass, denseElements, flat, stationSolver, noResults, type FlatLoad, type Results } from './baselines';

const SHAPES: readonly GoodsOnBeam['bearing'][] = [
  { kind: 'even' },
  {
    kind: 'stepped',
    columns: [
      { widthMm: 300, massKg: 300 },
      { widthMm: 200, massKg: 120 },
      { widthMm: 300, massKg: 210 },
    ],
  },
  { kind: 'sloped', slope: { by: 'ratio', rightOverLeft: 2.5 } },
  {
    kind: 'bearers',
    bearers: [50, 400, 750].map((centreMm) => ({ centreMm, widthMm: 100, share: null })),
  },
  {
    kind: 'profile',
    points: [
      { xMm: 0, heightMm: 300 },
      { xMm: 250, heightMm: 900 },
      { xMm: 600, heightMm: 700 },
      { xMm: 800, heightMm: 200 },
    ],
    densityKgPerM3: null,
  },
];

const WIDTH = 800;
/** As many different levels as a run of a site has, so that no branch is learnt by heart. */
const LEVELS = 64;

interface Level {
  readonly span: number;
  readonly front: BeamLoad;
  readonly rear: BeamLoad;
  readonly flat: readonly [FlatLoad, FlatLoad];
  readonly start: number;
  readonly end: number;
}

/** Levels of this many unit loads, shapes, masses, places and shares all different, from a settled sequence. */
function levelsOf(count: number): { levels: Level[]; placed: PlacedProfiles } {
  let state = 12345;
  const random = (): number => (state = (state * 1103515245 + 12345) % 2147483648) / 2147483648;
  const levels: Level[] = [];
  const packed: number[] = [];
  const profile: number[] = [];
  const at: number[] = [];
  const share: number[] = [];
  for (let n = 0; n < LEVELS; n++) {
    const start = at.length;
    const gap = 60 + 40 * random();
    const goods: StandingGoods[] = Array.from({ length: count }, (_, i) => {
      const laid = goodsIntensity({
        widthMm: WIDTH,
        goodsKg: 200 + 800 * random(),
        bearing: SHAPES[(n + i) % SHAPES.length] as GoodsOnBeam['bearing'],
      });
      if (!laid.ok) throw new Error(laid.message);
      const one = {
        id: `${i}`,
        load: laid.pieces,
        widthMm: WIDTH,
        at: gap + i * (WIDTH + gap),
        mirrored: false,
        frontShare: 0.4 + 0.2 * random(),
      };
      profile.push(packed.length);
      packed.push(...packProfile(laid.pieces, WIDTH));
      at.push(one.at);
      share.push(one.frontShare);
      return one;
    });
    const { front, rear } = pairLoads(goods);
    levels.push({ span: gap + count * (WIDTH + gap), front, rear, flat: [flat(front), flat(rear)], start, end: at.length });
  }
  return {
    levels,
    placed: {
      profiles: Float64Array.from(packed),
      profile: Int32Array.from(profile),
      at: Float64Array.from(at),
      share: Float64Array.from(share),
    },
  };
}

/** Processor time used so far, ms: what other programs on the machine take does not count. */
function processorTime(): number {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1000;
}

/** Times of one level in µs, taken in turns with the others so that all have the same machine. */
function timedInTurns(levels: readonly Level[], checks: readonly ((level: Level) => void)[], rounds = 15): number[] {
  const run = (check: (level: Level) => void, times: number): number => {
    const begun = processorTime();
    for (let i = 0; i < times; i++) for (const level of levels) check(level);
    return processorTime() - begun;
  };
  const times = checks.map((check) => {
    let count = 1;
    while (run(check, count) < 25) count *= 2;
    return count;
  });
  const rows = Array.from({ length: rounds }, () =>
    checks.map((check, i) => (run(check, times[i] as number) * 1000) / ((times[i] as number) * levels.length)),
  );
  return checks.map((_, i) => median(rows.map((row) => row[i] as number)));
}

function median(values: readonly number[]): number {
  return [...values].sort((x, y) => x - y)[values.length >> 1] as number;
}

const pinned = (span: number): Beam => ({ span, rigidity: 1, left: { kind: 'pinned' }, right: { kind: 'pinned' } });

/** What one number of unit loads gave, as times of the level check. */
interface Ratios {
  readonly count: number;
  readonly bare: number;
  readonly stations: number;
  readonly dense: number;
  readonly general: number;
  readonly exact: number;
}

function ratiosOf(count: number): Ratios {
  let sink = 0;
  const { levels, placed } = levelsOf(count);
  const scratch = new Float64Array(scratchFor(count));
  const out = new Float64Array(2 * RESULT.size);
  const stations = stationSolver(1001);
  const results = noResults();
  const inTheMiddle = { ...placed, share: placed.share.map(() => 0.5) };

  let exact = 0;
  let byStations = 0;
  let byElements = 0;
  for (const level of levels) {
    if (!solvePinnedPair(level.span, placed, level.start, level.end, scratch, out)) throw new Error('unit loads overlap');
    [level.front, level.rear].forEach((load, side) => {
      const answer = solveBeam(pinned(level.span), load);
      const even = equivalentLoads(answer, 1);
      const o = side * RESULT.size;
      const off = (index: number, value: number) => Math.abs((out[o + index] as number) / value - 1);
      exact = Math.max(
        exact,
        off(RESULT.resultant, answer.resultant),
        off(RESULT.centroid, answer.centroid ?? NaN),
        off(RESULT.reactionLeft, answer.reactionLeft),
        off(RESULT.reactionRight, answer.reactionRight),
        off(RESULT.shear, answer.shear.force),
        off(RESULT.moment, answer.sagging.moment),
        off(RESULT.momentAt, answer.sagging.from),
        off(RESULT.deflectionEI, answer.deflection.sag),
        off(RESULT.deflectionAt, answer.deflection.at),
        off(RESULT.bending, even.bending),
        off(RESULT.endShear, even.endShear),
        off(RESULT.deflection, even.deflection),
      );
      const worse = (value: Results): number =>
        Math.max(Math.abs(value.moment / answer.sagging.moment - 1), Math.abs(value.deflectionEI / answer.deflection.sag - 1));
      stations(flat(load), level.span, results);
      byStations = Math.max(byStations, worse(results));
      denseElements(flat(load), level.span, 40, results);
      byElements = Math.max(byElements, worse(results));
    });
  }

  const [check, middle, bare, spread, dense, general] = timedInTurns(levels, [
    (level) => {
      solvePinnedPair(level.span, placed, level.start, level.end, scratch, out);
      sink += out[RESULT.bending] as number;
    },
    (level) => {
      solvePinnedPair(level.span, inTheMiddle, level.start, level.end, scratch, out);
      sink += out[RESULT.bending] as number;
    },
    (level) => {
      sink += barePass(level.flat[0]) + barePass(level.flat[1]);
    },
    (level) => {
      for (const load of level.flat) {
        stations(load, level.span, results);
        sink += results.moment;
      }
    },
    (level) => {
      for (const load of level.flat) {
        denseElements(load, level.span, 40, results);
        sink += results.moment;
      }
    },
    (level) => {
      for (const load of [level.front, level.rear]) sink += equivalentLoads(solveBeam(pinned(level.span), load), 1).bending;
    },
  ]) as [number, number, number, number, number, number];
  if (!Number.isFinite(sink)) throw new Error('a result is not a number');
  console.log(
    [
      String(count).padEnd(12),
      `${(middle / check).toFixed(2)}`.padEnd(16),
      `${(bare / check).toFixed(2)}`.padEnd(11),
      `${(spread / check).toFixed(0)}`.padEnd(16),
      `${(dense / check).toFixed(0)}`.padEnd(21),
      `${(general / check).toFixed(1)}`.padEnd(11),
      `${exact.toExponential(1)}; stations ${byStations.toExponential(1)}, elements ${byElements.toExponential(1)}`,
    ].join(' '),
  );
  return { count, bare: check / bare, stations: spread / check, dense: dense / check, general: general / check, exact };
}

/** @returns the claims, each as a line with its goal */
export function levelBench(): readonly string[] {
  console.log('Level check: front and rear beam, twelve results each. Times of it that each other way takes, on the same levels');
  console.log(
    'unit loads   all in middle   bare pass   1,001 stations   40 elements, dense   solveBeam   worst differences from solveBeam',
  );
  const all = [3, 12, 40].map(ratiosOf);
  const row = (pick: (one: Ratios) => number, digits = 0) => all.map((one) => pick(one).toFixed(digits)).join(' / ');
  return [
    `Level check against 1,001 stations, 3 / 12 / 40 unit loads: ${row(({ stations }) => stations)} times as fast (goal 100 / 80 / 40)`,
    `Level check against 40 elements with a dense solver: ${row(({ dense }) => dense)} times as fast (goal 5,000)`,
    `Level check against the bare pass over its pieces: ${row(({ bare }) => bare, 1)} times its work (goal at most 6)`,
    `Level check against the program’s general solver: differs by at most ${Math.max(...all.map(({ exact }) => exact)).toExponential(1)} (goal 1e-12)`,
  ];
}
