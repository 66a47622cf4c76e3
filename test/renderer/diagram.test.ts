import { describe, expect, test } from 'vitest';
import type { LevelEffects } from '../../src-core/audit/types';
import { solveBeam } from '../../src-core/statics/beam';
import { STANDARD_GRAVITY as g } from '../../src-core/units/quantity';
import { resolveRules } from '../../src-core/checks/rule-sets';
import { levelWorkOf } from '../../src-renderer/drawing/level-work';
import { worstBending } from '../../src-renderer/drawing/worst-bending';
import { goods, level, rack, stand } from '../core/audit/rack';
import { alike, beamsShown, diagramOf, worstPeak, type BeamView } from '../../src-renderer/drawing/diagram';

const span = 2700;
const rigidity = 2e11;
const end = { kind: 'pinned' } as const;
const even = (massKg: number) => {
  const w = (massKg * g) / span;
  return { lines: [{ from: 0, to: span, wFrom: w, wTo: w }], points: [] };
};
/** A pair under evenly spread masses of these kg on its front and rear beam. */
function effectsOf(frontKg: number, rearKg: number): LevelEffects {
  const loads = { front: even(frontKg), rear: even(rearKg), whole: even(frontKg + rearKg) };
  const solve = (load: ReturnType<typeof even>, beams: number) =>
    solveBeam({ span, rigidity: rigidity * beams, left: end, right: end }, load);
  return {
    front: solve(loads.front, 1),
    rear: solve(loads.rear, 1),
    whole: solve(loads.whole, 2),
    loads,
    rigidity,
    rigidityKnown: true,
    end,
  };
}
const wishes = (effects: LevelEffects, view: BeamView, ratedKg: number | null = 2000) => ({
  effects,
  view,
  ratedKg,
  judged: new Set(['shear', 'bending', 'deflection'] as const),
  sagLimit: span / 200,
});

describe('a pair under 1 200 kg in front and 800 kg at the rear, rated 2 000 kg', () => {
  const effects = effectsOf(1200, 800);

  test('bends its front beam by WL/8, beyond half the rating, which bends it by 1 000 × 2.7/8 kg·m', () => {
    const bending = diagramOf('bending', wishes(effects, 'both'));
    const worst = worstPeak(bending);
    expect(worst?.beam).toBe('front');
    expect(worst?.value).toBeCloseTo((1200 * span) / 8, 6);
    expect(bending.limits[0]?.value).toBeCloseTo((1000 * span) / 8, 6);
    expect(bending.limits[0]?.exceeded).toBe(true);
  });

  test('as a pair it is exactly at its rating, which is not beyond it', () => {
    const bending = diagramOf('bending', wishes(effects, 'pair'));
    expect(worstPeak(bending)?.value).toBeCloseTo((2000 * span) / 8, 6);
    expect(bending.limits[0]?.exceeded).toBe(false);
  });

  test('sags as a pair by the mean of its beams, 5WL³/384EI', () => {
    const sag = (kg: number) => (5 * kg * g * span ** 3) / (384 * rigidity);
    expect(worstPeak(diagramOf('deflection', wishes(effects, 'pair')))?.value).toBeCloseTo(sag(1000), 9);
    expect(worstPeak(diagramOf('deflection', wishes(effects, 'front')))?.value).toBeCloseTo(sag(1200), 9);
  });

  test('brings half of each load to each support, and the limit of shear stands at the supports only', () => {
    const shear = diagramOf('shear', wishes(effects, 'front'));
    expect(Math.abs(worstPeak(shear)?.value ?? 0)).toBeCloseTo(600, 6);
    const limits = shear.plot.curves.filter((curve) => curve.look === 'exceeded limit');
    expect(limits.map((curve) => curve.points.map((point) => Math.round(point.y)))).toEqual([
      [500, 500],
      [-500, -500],
    ]);
    for (const { points } of limits) expect(Math.abs((points[1]?.x ?? 0) - (points[0]?.x ?? 0))).toBeLessThan(span / 4);
  });

  test('shows front and rear told apart, the rear line over the front fill', () => {
    expect(alike(effects)).toBe(false);
    expect(beamsShown(effects, 'both').map(({ beam }) => beam)).toEqual(['front', 'rear']);
    const looks = diagramOf('bending', wishes(effects, 'both')).plot.curves.map((curve) => curve.look);
    expect(looks.indexOf('rear')).toBeLessThan(looks.indexOf('front'));
  });
});

test('beams that share alike are alike', () => {
  expect(alike(effectsOf(1000, 1000))).toBe(true);
});

test('without a rating there is no limit, and without EI no span limit and no figure of deflection', () => {
  const effects = { ...effectsOf(500, 500), rigidityKnown: false };
  expect(diagramOf('bending', wishes(effects, 'pair', null)).limits).toEqual([]);
  const deflection = diagramOf('deflection', wishes(effects, 'pair'));
  expect(deflection.limits.map((limit) => limit.kind)).toEqual(['even load']);
  expect(deflection.measured).toBe(false);
});

test('every curve and limit lies inside the plot, with room for the figure at the peak', () => {
  const effects = effectsOf(1200, 800);
  for (const name of ['intensity', 'shear', 'bending', 'deflection'] as const) {
    const { plot } = diagramOf(name, wishes(effects, 'both'));
    const values = plot.curves.flatMap((curve) => curve.points.map((point) => point.y));
    expect(plot.most).toBeGreaterThan(Math.max(...values));
    expect(plot.least).toBeLessThan(Math.min(0, ...values));
  }
});

test('an empty level has flat diagrams that can still be drawn', () => {
  const none = { lines: [], points: [] };
  const answer = solveBeam({ span, rigidity, left: end, right: end }, none);
  const effects = {
    front: answer,
    rear: answer,
    whole: answer,
    loads: { front: none, rear: none, whole: none },
    rigidity,
    rigidityKnown: true,
    end,
  };
  for (const name of ['intensity', 'shear', 'bending', 'deflection'] as const) {
    const { plot } = diagramOf(name, wishes(effects, 'pair'));
    expect(plot.most).toBeGreaterThan(plot.least);
    for (const point of plot.curves.flatMap((curve) => curve.points)) expect(Number.isFinite(point.y)).toBe(true);
    expect(worstPeak(diagramOf(name, wishes(effects, 'pair')))).toBeNull();
  }
});

test('the greatest shear is marked on its own side of the line: a load at the right end pulls it down there', () => {
  const load = { lines: [], points: [{ at: 2000, force: 1000 * g }] };
  const answer = solveBeam({ span, rigidity, left: end, right: end }, load);
  const effects = {
    front: answer,
    rear: answer,
    whole: answer,
    loads: { front: load, rear: load, whole: load },
    rigidity,
    rigidityKnown: true,
    end,
  };
  const peak = worstPeak(diagramOf('shear', wishes(effects, 'front')));
  // R = 1 000 × 2 000/2 700
  expect(peak?.value).toBeCloseTo((-1000 * 2000) / 2700, 6);
  expect(peak?.from).toBeGreaterThanOrEqual(2000);
});

test('a full complement beyond the rated even load is told so, but not marked as over', () => {
  const asked = { ...wishes(effectsOf(1200, 800), 'front'), judged: new Set<never>() };
  const bending = diagramOf('bending', asked);
  expect(bending.limits[0]).toMatchObject({ exceeded: true, judged: false });
  expect(bending.plot.curves.map((curve) => curve.look)).not.toContain('exceeded limit');
});

test('the worst case is drawn with the bending alone, and its peak is told apart', () => {
  const effects = effectsOf(1000, 1000);
  const worstCase = { beam: 'pair', answer: effectsOf(1100, 1100).whole } as const;
  const bending = diagramOf('bending', { ...wishes(effects, 'pair'), worstCase });
  expect(bending.plot.curves.map(({ look }) => look)).toEqual(['ghost', 'limit', 'front']);
  expect(bending.worstCase?.value).toBeCloseTo((2200 * span) / 8, 6);
  expect(worstPeak(bending)?.value).toBeCloseTo((2000 * span) / 8, 6);
  expect(bending.plot.most).toBeGreaterThan((2200 * span) / 8);
  expect(diagramOf('shear', { ...wishes(effects, 'pair'), worstCase }).worstCase).toBeNull();
});

describe('the beams in the worst case of a level', () => {
  // 800 kg in the middle, 800 wide: M = W/2·(L/4 − b/8) on one beam as stated; with the share 1/2 + 50/1 050 and 2 % more in the worst case.
  const site = rack({ unitLoads: [goods('a', { massUncertaintyPercent: 2 })], levels: [level([stand('a', 950)])] });
  const run = site.runs[0] ?? expect.fail();
  const bay = run.bays[0] ?? expect.fail();
  const work = levelWorkOf(site, run, bay, bay.levels[0] ?? expect.fail()) ?? expect.fail();
  const rules = resolveRules(site.rules);
  const whole = 800 * g * 1.02 * (2700 / 4 - 800 / 8);

  test('one beam takes all of the tolerance across, both together none of it', () => {
    expect(worstBending(rules, bay, work, 'front')?.answer.sagging.moment).toBeCloseTo(whole * (0.5 + 50 / 1050), 3);
    expect(worstBending(rules, bay, work, 'rear')?.answer.sagging.moment).toBeCloseTo(whole * (0.5 + 50 / 1050), 3);
    expect(worstBending(rules, bay, work, 'pair')?.answer.sagging.moment).toBeCloseTo(whole, 3);
  });

  test('is not drawn where nothing may be otherwise than stated', () => {
    const sure = resolveRules({ ...site.rules, changed: [{ key: 'placementTolerance', value: 0, reason: '' }] });
    const known = rack({ unitLoads: [goods('a')], levels: [level([stand('a', 950)])] });
    const same = levelWorkOf(known, run, bay, bay.levels[0] ?? expect.fail()) ?? expect.fail();
    expect(worstBending(sure, bay, same, 'pair')).toBeNull();
  });
});
