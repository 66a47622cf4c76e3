/**
 * Bay scenarios, invented, to every printed digit. Source of every figure: statics, computed with a general
 * script. Masses stand for the pair of beams; moments in kg·m are N·mm ÷ (9.80665 · 1 000).
 */
import { describe, expect, test } from 'vitest';
import { goodsIntensity, type GoodsOnBeam } from '../../../src-core/goods/bearing-shape';
import { pairLoads } from '../../../src-core/goods/pair';
import { solveBeam, type BeamAnswer, type BeamEnd } from '../../../src-core/statics/beam';
import { equivalentLoads } from '../../../src-core/statics/equivalent';
import type { BeamLoad } from '../../../src-core/statics/load';
import { massWeighing } from '../../../src-core/units/quantity';

const PINNED: BeamEnd = { kind: 'pinned' };
/** EI of one beam, N·mm². */
const EI = 195e9;

function piecesOf(goods: GoodsOnBeam): BeamLoad {
  const laid = goodsIntensity(goods);
  return laid.ok ? laid.pieces : expect.fail(laid.message);
}

/** Unit loads of one width and mass on the pair of beams, from their left edges. */
function level(width: number, massKg: number, starts: readonly number[], bearing: GoodsOnBeam['bearing'] = { kind: 'even' }): BeamLoad {
  const load = piecesOf({ widthMm: width, goodsKg: massKg, bearing });
  return pairLoads(starts.map((at, i) => ({ id: String(i), load, widthMm: width, at, mirrored: false, frontShare: 0.5 }))).whole;
}

const pinned = (span: number, load: BeamLoad): BeamAnswer => solveBeam({ span, rigidity: 2 * EI, left: PINNED, right: PINNED }, load);
const kgM = (moment: number): number => massWeighing(moment) / 1000;

/** Equivalent uniform masses on the pair, kg. */
function even(answer: BeamAnswer): { M: number; V: number; D: number; W: number } {
  const { bending, endShear, deflection, total } = equivalentLoads(answer, answer.rigidity);
  return { M: massWeighing(bending), V: massWeighing(endShear), D: massWeighing(deflection), W: massWeighing(total) };
}

describe('three pallets of 800 kg on a 2.70 m level rated 2 500 kg', () => {
  const starts = [75, 950, 1825];
  const answer = pinned(2700, level(800, 800, starts));
  test('total, resultant and reactions', () => {
    expect(even(answer).W.toFixed(0)).toBe('2400');
    expect((even(answer).W / 2500).toFixed(3)).toBe('0.960');
    expect(((answer.centroid ?? 0) / 1000).toFixed(3)).toBe('1.350');
    expect([massWeighing(answer.reactionLeft).toFixed(0), massWeighing(answer.reactionRight).toFixed(0)]).toEqual(['1200', '1200']);
  });
  test('bending 840.0 kg·m, as 2 488.9 kg evenly spread (0.996); end shear 2 400; deflection 2 483.8 (0.994)', () => {
    const { M, V, D } = even(answer);
    expect(kgM(answer.sagging.moment).toFixed(1)).toBe('840.0');
    expect([M.toFixed(1), (M / 2500).toFixed(3)]).toEqual(['2488.9', '0.996']);
    expect(V.toFixed(0)).toBe('2400');
    expect([D.toFixed(1), (D / 2500).toFixed(3)]).toEqual(['2483.8', '0.994']);
    expect((M / 2400).toFixed(3)).toBe('1.037');
  });
  test.each([
    ['¼–½–¼', [0.25, 0.5, 0.25], '850.0', '2518.5', '1.007'],
    ['⅓ each', [1 / 3, 1 / 3, 1 / 3], '826.67', '2449.4', '0.980'],
  ] as const)('on runners, %s', (_, shares, moment, evenM, use) => {
    const feet = [50, 400, 750].map((xMm, i) => ({ xMm, share: shares[i] as number }));
    const onRunners = pinned(2700, level(800, 800, starts, { kind: 'feet', feet }));
    const { M } = even(onRunners);
    expect(kgM(onRunners.sagging.moment).toFixed(moment.split('.')[1]?.length)).toBe(moment);
    expect([M.toFixed(1), (M / 2500).toFixed(3)]).toEqual([evenM, use]);
  });
});

describe('one machine of 1 600 kg on a 2.70 m level rated 2 000 kg', () => {
  test('centred: 0.80 by total, 1.304 by bending, 1.200 by deflection', () => {
    const answer = pinned(2700, level(1000, 1600, [850]));
    const { W, M, V, D } = even(answer);
    expect((W / 2000).toFixed(2)).toBe('0.80');
    expect([answer.reactionLeft, answer.reactionRight].map((R) => massWeighing(R).toFixed(0))).toEqual(['800', '800']);
    expect(kgM(answer.sagging.moment).toFixed(0)).toBe('880');
    expect([M.toFixed(1), (M / 2000).toFixed(3)]).toEqual(['2607.4', '1.304']);
    expect([D.toFixed(1), (D / 2000).toFixed(3)]).toEqual(['2400.7', '1.200']);
    expect(V.toFixed(0)).toBe('1600');
  });
  test('as a true point: 3 200 kg by bending', () => {
    expect(even(pinned(2700, level(1000, 1600, [850], { kind: 'feet', feet: [{ xMm: 500, share: 1 }] }))).M.toFixed(0)).toBe('3200');
  });
  test('hard left: within by bending and deflection, 1.259 by end shear', () => {
    const answer = pinned(2700, level(1000, 1600, [75]));
    const { M, V, D } = even(answer);
    expect(((answer.centroid ?? 0) / 1000).toFixed(3)).toBe('0.575');
    expect([answer.reactionLeft, answer.reactionRight].map((R) => massWeighing(R).toFixed(1))).toEqual(['1259.3', '340.7']);
    expect(kgM(answer.sagging.moment).toFixed(2)).toBe('589.99');
    expect((answer.sagging.from / 1000).toFixed(3)).toBe('0.862');
    expect([M.toFixed(1), (M / 2000).toFixed(3)]).toEqual(['1748.1', '0.874']);
    expect([D.toFixed(1), (D / 2000).toFixed(3)]).toEqual(['1482.2', '0.741']);
    expect([V.toFixed(1), (V / 2000).toFixed(3)]).toEqual(['2518.5', '1.259']);
  });
  test.each([
    [20, '0.122', '2635'],
    [50, '0.257', '2673'],
    [100, '0.409', '2726'],
  ])('connectors of %d kN·m/rad: fixity %s, by sagging %s kg', (k, fixity, evenM) => {
    const end: BeamEnd = { kind: 'sprung', stiffness: k * 1e6 };
    const half = pairLoads([
      {
        id: 'machine',
        load: piecesOf({ widthMm: 1000, goodsKg: 1600, bearing: { kind: 'even' } }),
        widthMm: 1000,
        at: 850,
        mirrored: false,
        frontShare: 0.5,
      },
    ]).front;
    const beam = { span: 2700, rigidity: EI, left: end, right: end };
    const evenly = solveBeam(beam, { lines: [{ from: 0, to: 2700, wFrom: 1, wTo: 1 }], points: [] });
    const sameSagging = (2 * evenly.resultant * solveBeam(beam, half).sagging.moment) / evenly.sagging.moment;
    expect((1 / (1 + (2 * EI) / (k * 1e6 * 2700))).toFixed(3)).toBe(fixity);
    expect(massWeighing(sameSagging).toFixed(0)).toBe(evenM);
  });
});

describe('a sloping pile on a 2.40 m shelf rated 1 200 kg', () => {
  test('250 to 650 kg/m', () => {
    const load = piecesOf({
      widthMm: 2400,
      goodsKg: null,
      bearing: { kind: 'sloped', slope: { by: 'intensities', leftKgPerM: 250, rightKgPerM: 650 } },
    });
    const answer = pinned(2400, load);
    const { W, M, V, D } = even(answer);
    expect([W.toFixed(0), (W / 1200).toFixed(3)]).toEqual(['1080', '0.900']);
    expect(((answer.centroid ?? 0) / 1000).toFixed(4)).toBe('1.3778');
    expect([answer.reactionLeft, answer.reactionRight].map((R) => massWeighing(R).toFixed(1))).toEqual(['460.0', '620.0']);
    expect((answer.sagging.from / 1000).toFixed(4)).toBe('1.2875');
    expect(kgM(answer.sagging.moment).toFixed(2)).toBe('325.76');
    expect([M.toFixed(1), (M / 1200).toFixed(3)]).toEqual(['1085.9', '0.905']);
    expect([D.toFixed(1), (D / 1200).toFixed(3)]).toEqual(['1080.4', '0.900']);
    expect([V.toFixed(1), (V / 1200).toFixed(3)]).toEqual(['1240.0', '1.033']);
  });
  test('the same weight in three steps of 0.8 m: 300, 600, 450 kg/m', () => {
    const columns = [300, 600, 450].map((kgPerM) => ({ widthMm: 800, massKg: kgPerM * 0.8 }));
    const answer = pinned(2400, piecesOf({ widthMm: 2400, goodsKg: null, bearing: { kind: 'stepped', columns } }));
    const { M, V, D } = even(answer);
    expect(((answer.centroid ?? 0) / 1000).toFixed(4)).toBe('1.2889');
    expect([answer.reactionLeft, answer.reactionRight].map((R) => massWeighing(R).toFixed(0))).toEqual(['500', '580']);
    expect(kgM(answer.sagging.moment).toFixed(2)).toBe('360.33');
    expect((answer.sagging.from / 1000).toFixed(4)).toBe('1.2333');
    expect([M.toFixed(1), (M / 1200).toFixed(3)]).toEqual(['1201.1', '1.001']);
    expect([V.toFixed(1), (V / 1200).toFixed(3)]).toEqual(['1160.0', '0.967']);
    expect([D.toFixed(1), (D / 1200).toFixed(3)]).toEqual(['1173.4', '0.978']);
  });
});

describe('a long-span shelf of 1.80 m rated 400 kg with a motor of 130 kg and 120 kg of boxes', () => {
  test('beams: 358.3 kg by bending (0.896), 325.2 by deflection (0.813)', () => {
    const boxes = { id: 'boxes', load: piecesOf({ widthMm: 1800, goodsKg: 120, bearing: { kind: 'even' } }), widthMm: 1800, at: 0 };
    // Centred on one of the panels, that at the middle of the span as far as the beams go.
    const motor = { id: 'motor', load: piecesOf({ widthMm: 300, goodsKg: 130, bearing: { kind: 'even' } }), widthMm: 300, at: 750 };
    const { whole } = pairLoads([boxes, motor].map((one) => ({ ...one, mirrored: false, frontShare: 0.5 })));
    const { W, M, D } = even(pinned(1800, whole));
    expect([W.toFixed(0), (W / 400).toFixed(3)]).toEqual(['250', '0.625']);
    expect([M.toFixed(1), (M / 400).toFixed(3)]).toEqual(['358.3', '0.896']);
    expect([D.toFixed(1), (D / 400).toFixed(3)]).toEqual(['325.2', '0.813']);
  });
  test('a panel of 600 mm under a strip of 300 mm at its middle: factor 1.5, 195.0 kg, 2.925; over two panels 97.5 kg, 1.462', () => {
    const panelKg = 400 / 6;
    expect(panelKg.toFixed(1)).toBe('66.7');
    const strip = (kg: number) => even(pinned(600, level(300, kg, [150]))).M;
    expect((130 / panelKg).toFixed(2)).toBe('1.95');
    expect([(strip(130) / 130).toFixed(1), strip(130).toFixed(1), (strip(130) / panelKg).toFixed(3)]).toEqual(['1.5', '195.0', '2.925']);
    // 1.4625, printed rounded to even.
    expect(strip(65).toFixed(1)).toBe('97.5');
    expect(Math.abs(strip(65) / panelKg - 1.462)).toBeLessThanOrEqual(0.0005 + 1e-12);
  });
});

describe('the bay without a notice: three pallets of 620 kg on beams 120 × 50 × 1.5', () => {
  const I = (50 * 120 ** 3 - 47 * 117 ** 3) / 12;
  // E = 210 000 N/mm²: EN 1993-1-1, 3.2.6.
  const rigidity = 210000 * I;
  const one = pairLoads(
    [75, 950, 1825].map((at, i) => ({
      id: String(i),
      load: piecesOf({ widthMm: 800, goodsKg: 620, bearing: { kind: 'even' } }),
      widthMm: 800,
      at,
      mirrored: false,
      frontShare: 0.5,
    })),
  ).front;
  const sagWith = (end: BeamEnd): number => solveBeam({ span: 2700, rigidity, left: end, right: end }, one).deflection.sag;

  test('section and equivalent load', () => {
    expect(I.toFixed(0)).toBe('927016');
    expect((rigidity / 1e9).toFixed(2)).toBe('194.67');
    const D = even(solveBeam({ span: 2700, rigidity, left: PINNED, right: PINNED }, one)).D;
    expect([(2 * D).toFixed(1), D.toFixed(1)]).toEqual(['1924.9', '962.5']);
  });
  test('pinned: sag 12.43 mm; 13 mm measured imply 1 945.9 kg, 1.046 times what is declared', () => {
    expect(sagWith(PINNED).toFixed(2)).toBe('12.43');
    expect((1860 * (13 / sagWith(PINNED))).toFixed(1)).toBe('1945.9');
    expect((13 / sagWith(PINNED)).toFixed(3)).toBe('1.046');
  });
  test.each([
    [20, '11.21', '1.159'],
    [50, '9.86', '1.318'],
    [100, '8.35', '1.557'],
  ])('connectors of %d kN·m/rad: sag %s mm, ratio %s', (k, sag, ratio) => {
    const found = sagWith({ kind: 'sprung', stiffness: k * 1e6 });
    expect([found.toFixed(2), (13 / found).toFixed(3)]).toEqual([sag, ratio]);
  });
});
