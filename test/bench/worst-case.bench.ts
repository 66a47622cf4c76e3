/**
 * The worst case of one beam, effect by effect, against the stated case of the same beam with all its
 * results, in one run on the same rows of unit loads. Medians of processor time; read the ratios.
 */
import { goodsIntensity, type GoodsOnBeam } from '../../src-core/goods/bearing-shape';
import { solveBeam } from '../../src-core/statics/beam';
import { worstMoment, worstReaction, worstSag } from '../../src-core/statics/worst-case';
import { arrangedLoad, type LooseBeam, type LooseLoad } from '../../src-core/statics/worst-case-loads';

const SHAPES: readonly GoodsOnBeam['bearing'][] = [
  { kind: 'even' },
  { kind: 'sloped', slope: { by: 'ratio', rightOverLeft: 2.5 } },
  { kind: 'bearers', bearers: [50, 400, 750].map((centreMm) => ({ centreMm, widthMm: 100, share: null })) },
];
const WIDTH = 800;
/** As many different rows as a run of a site has, so that no branch is learnt by heart. */
const ROWS = 64;

interface Row {
  readonly beam: LooseBeam;
  readonly loads: readonly LooseLoad[];
}

/** @param even all goods spread evenly, as most are; else every shape */
function rowsOf(count: number, even: boolean): readonly Row[] {
  let state = 4321;
  const random = (): number => (state = (state * 1103515245 + 12345) % 2147483648) / 2147483648;
  return Array.from({ length: ROWS }, (_, n) => {
    const gap = 60 + 60 * random();
    const span = gap + count * (WIDTH + gap);
    const loads = Array.from({ length: count }, (__, i) => {
      const bearing = even ? { kind: 'even' as const } : (SHAPES[(n + i) % SHAPES.length] as GoodsOnBeam['bearing']);
      const laid = goodsIntensity({ widthMm: WIDTH, goodsKg: 200 + 800 * random(), bearing });
      if (!laid.ok) throw new Error(laid.message);
      return { load: laid.pieces, width: WIDTH, at: gap + i * (WIDTH + gap), factor: 1 + random() / 20 };
    });
    const pinned = { kind: 'pinned' } as const;
    return { beam: { span, rigidity: 1, left: pinned, right: pinned, from: 0, to: span, tolerance: 50 }, loads };
  });
}

function timed(rows: readonly Row[], checks: readonly ((row: Row) => number)[]): readonly number[] {
  const processorTime = (): number => {
    const { user, system } = process.cpuUsage();
    return (user + system) / 1000;
  };
  let sink = 0;
  const run = (check: (row: Row) => number, times: number): number => {
    const begun = processorTime();
    for (let i = 0; i < times; i++) for (const row of rows) sink += check(row);
    return processorTime() - begun;
  };
  const times = checks.map((check) => {
    let count = 1;
    while (run(check, count) < 25) count *= 2;
    return count;
  });
  const all = Array.from({ length: 15 }, () => checks.map((check, i) => run(check, times[i] as number) / (times[i] as number)));
  if (!Number.isFinite(sink)) throw new Error('a result is not finite');
  return checks.map((_, i) => all.map((one) => one[i] as number).sort((a, b) => a - b)[all.length >> 1] as number);
}

export function worstCaseBench(): readonly string[] {
  const claims: string[] = [];
  for (const [count, even] of [
    [3, true],
    [3, false],
    [12, false],
  ] as const) {
    const rows = rowsOf(count, even);
    const stated = ({ beam, loads }: Row): number =>
      solveBeam(
        beam,
        arrangedLoad(
          loads,
          loads.map(() => 0),
          beam.span,
        ),
      ).sagging.moment;
    const [base, moment, reactions, sag] = timed(rows, [
      stated,
      ({ beam, loads }) => worstMoment(beam, loads).moment,
      ({ beam, loads }) => worstReaction(beam, loads, 'left').force + worstReaction(beam, loads, 'right').force,
      ({ beam, loads }) => worstSag(beam, loads).sag,
    ]) as [number, number, number, number];
    const by = (one: number) => `${(one / base).toFixed(2)}×`;
    claims.push(
      `worst case against the stated case, ${count} ${even ? 'even' : 'unlike'} unit loads: moment ${by(moment)}, both reactions ${by(reactions)}, deflection ${by(sag)} (goal of moment and reactions together 1.5×)`,
    );
  }
  return claims;
}
