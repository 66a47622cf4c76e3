import { describe, expect, test } from 'vitest';
import { goodsIntensity, type GoodsOnBeam, type GoodsProblem } from '../../../src-core/goods/bearing-shape';
import { reduce } from '../../../src-core/statics/reduction';
import { expectClose } from '../../close';

// Standard gravity 9.80665 m/s², exact: NIST SP 811, Appendix B.
const G = 9.80665;

function laid(goods: GoodsOnBeam) {
  const answer = goodsIntensity(goods);
  if (!answer.ok) throw new Error(answer.message);
  return answer;
}

function wrong(goods: GoodsOnBeam): { problem: GoodsProblem; message: string } {
  const answer = goodsIntensity(goods);
  if (answer.ok) throw new Error('accepted');
  return answer;
}

const base = { widthMm: 800, depthMm: 1200, goodsKg: 400 };

describe('each shape integrates to the goods’ weight and has its centre where statics puts it', () => {
  // Centres: centroid tables of any statics text (rectangle, triangle, trapezoid).
  const shapes: [string, GoodsOnBeam['bearing'], number][] = [
    ['even', { kind: 'even' }, 400],
    [
      'stepped',
      {
        kind: 'stepped',
        columns: [
          { widthMm: 200, massKg: 300 },
          { widthMm: 600, massKg: 100 },
        ],
      },
      (300 * 100 + 100 * 500) / 400,
    ],
    ['sloped by ratio', { kind: 'sloped', slope: { by: 'ratio', rightOverLeft: 3 } }, (800 * 7) / 12],
    ['a triangle', { kind: 'sloped', slope: { by: 'heights', leftMm: 0, rightMm: 500 } }, (800 * 2) / 3],
    [
      'profile with a peak at 200',
      {
        kind: 'profile',
        points: [
          { xMm: 0, heightMm: 0 },
          { xMm: 200, heightMm: 900 },
          { xMm: 800, heightMm: 0 },
        ],
        densityKgPerM3: null,
      },
      (800 + 200) / 3,
    ],
    [
      'on bearers with shares',
      {
        kind: 'bearers',
        bearers: [
          { centreMm: 50, widthMm: 100, share: 0.25 },
          { centreMm: 400, widthMm: 150, share: 0.5 },
          { centreMm: 750, widthMm: 100, share: 0.25 },
        ],
      },
      400,
    ],
    [
      'on feet with shares',
      {
        kind: 'feet',
        feet: [
          { xMm: 100, share: 0.7 },
          { xMm: 700, share: 0.3 },
        ],
      },
      280,
    ],
  ];
  test.each(shapes)('%s', (_, bearing, centre) => {
    const { pieces, massKg } = laid({ ...base, bearing });
    const { resultant, centroid } = reduce(pieces);
    expect(massKg).toBe(400);
    expectClose(resultant, 400 * G, 1e-14);
    expectClose(centroid, centre, 1e-14);
  });
});

describe('densities and intensities find the mass', () => {
  test('columns of 400 × 1 000 × 1 200 mm at 500 and 250 kg/m³ weigh 240 and 120 kg (volume times density)', () => {
    const { massKg, foundKg, pieces } = laid({
      ...base,
      goodsKg: null,
      bearing: {
        kind: 'stepped',
        columns: [
          { widthMm: 400, heightMm: 1000, densityKgPerM3: 500 },
          { widthMm: 400, heightMm: 1000, densityKgPerM3: 250 },
        ],
      },
    });
    expectClose(massKg, 360, 1e-14);
    expectClose(foundKg, 360, 1e-14);
    expectClose(pieces.lines[0]?.wFrom ?? null, (240 * G) / 400, 1e-14);
  });

  test('a profile’s area times depth times density is its mass: a triangle of 800 × 600 over 1 200 mm at 1 000 kg/m³ is 288 kg', () => {
    const bearing = {
      kind: 'profile',
      points: [
        { xMm: 0, heightMm: 0 },
        { xMm: 800, heightMm: 600 },
      ],
      densityKgPerM3: 1000,
    } as const;
    expectClose(laid({ ...base, goodsKg: null, bearing }).massKg, 288, 1e-14);
  });

  test('250 to 650 kg/m over 2 400 mm is 1 080 kg (trapezoid; statics, scenario of the sloping pile)', () => {
    const bearing = { kind: 'sloped', slope: { by: 'intensities', leftKgPerM: 250, rightKgPerM: 650 } } as const;
    const { massKg, pieces } = laid({ widthMm: 2400, goodsKg: null, bearing });
    expectClose(massKg, 1080, 1e-14);
    expectClose(reduce(pieces).centroid, ((2400 / 3) * (250 + 2 * 650)) / 900, 1e-14);
  });

  test('an end intensity and its change per m say the same slope from either end', () => {
    const left = laid({
      widthMm: 2000,
      goodsKg: null,
      bearing: { kind: 'sloped', slope: { by: 'end-and-slope', end: 'left', endKgPerM: 100, changeKgPerM2: 50 } },
    });
    const right = laid({
      widthMm: 2000,
      goodsKg: null,
      bearing: { kind: 'sloped', slope: { by: 'end-and-slope', end: 'right', endKgPerM: 200, changeKgPerM2: -50 } },
    });
    expectClose(left.massKg, 300, 1e-14);
    expect(right.pieces.lines[0]?.wTo).toBeCloseTo(0.2 * G, 12);
    expect(right.pieces.lines[0]?.wFrom).toBeCloseTo(0.1 * G, 12);
  });

  test('with a mass given too, the mass scales the shape and the found total is told beside it', () => {
    const bearing = { kind: 'sloped', slope: { by: 'intensities', leftKgPerM: 250, rightKgPerM: 650 } } as const;
    const { massKg, foundKg, pieces } = laid({ widthMm: 2400, goodsKg: 540, bearing });
    expect(massKg).toBe(540);
    expectClose(foundKg, 1080, 1e-14);
    expectClose(reduce(pieces).resultant, 540 * G, 1e-14);
    expectClose((pieces.lines[0]?.wTo ?? 0) / (pieces.lines[0]?.wFrom ?? 0), 650 / 250, 1e-14);
  });
});

describe('bearers and feet without shares share the goods by statics', () => {
  const shares = (at: readonly number[], widthMm = 800) => {
    const bearing = { kind: 'feet', feet: at.map((xMm) => ({ xMm, share: null })) } as const;
    return laid({ widthMm, goodsKg: 1, bearing }).pieces.points.map(({ force }) => force / G);
  };
  // Moments about one support; simple spans with overhangs (statics, by hand).
  test.each([
    [[100, 700], 800, [1 / 2, 1 / 2]],
    [[0, 600], 800, [1 / 3, 2 / 3]],
    [[0, 400, 800], 800, [1 / 4, 1 / 2, 1 / 4]],
    [[100, 400, 800], 1000, [4 / 15, 17 / 60, 9 / 20]],
    [[700, 100], 800, [1 / 2, 1 / 2]],
  ])('%j under %d mm', (at, width, expected) => {
    shares(at, width).forEach((share, i) => expectClose(share, expected[i] as number, 1e-14));
  });

  test('the shares act together at the goods’ middle, however many supports and wherever', () => {
    const at = [60, 210, 300, 555, 790];
    const forces = shares(at, 900);
    expectClose(
      forces.reduce((sum, force) => sum + force, 0),
      1,
      1e-14,
    );
    expectClose(
      forces.reduce((sum, force, i) => sum + force * (at[i] as number), 0),
      450,
      1e-14,
    );
  });

  test('one bearer in the middle carries all', () => {
    const { pieces } = laid({ ...base, bearing: { kind: 'bearers', bearers: [{ centreMm: 400, widthMm: 100, share: null }] } });
    expectClose(pieces.lines[0]?.wFrom ?? null, (400 * G) / 100, 1e-14);
  });
});

describe('each bad shape gets its own message, which says how to mend it', () => {
  const stepped = (...columns: { widthMm: number; massKg: number }[]) => ({ ...base, bearing: { kind: 'stepped', columns } as const });
  const profile = (...points: [number, number][]) => ({
    ...base,
    bearing: { kind: 'profile', points: points.map(([xMm, heightMm]) => ({ xMm, heightMm })), densityKgPerM3: null } as const,
  });
  const bearers = (...list: [number, number, number | null][]) => ({
    ...base,
    bearing: { kind: 'bearers', bearers: list.map(([centreMm, widthMm, share]) => ({ centreMm, widthMm, share })) } as const,
  });
  const feet = (...list: [number, number | null][]) => ({
    ...base,
    bearing: { kind: 'feet', feet: list.map(([xMm, share]) => ({ xMm, share })) } as const,
  });
  const even = { kind: 'even' } as const;
  const cases: [string, GoodsOnBeam, GoodsProblem, RegExp][] = [
    ['no width', { ...base, widthMm: 0, bearing: even }, 'width', /wider than 0 mm; their width is 0/],
    ['a width that is no number', { ...base, widthMm: NaN, bearing: even }, 'width', /wider than 0 mm/],
    ['a mass below zero', { ...base, goodsKg: -5, bearing: even }, 'mass-negative', /0 kg or more; it is -5 kg/],
    ['no mass', { ...base, goodsKg: null, bearing: even }, 'mass-missing', /not known. Weigh them/],
    ['no mass on bearers', { ...bearers([400, 100, 1]), goodsKg: null }, 'mass-missing', /not known/],
    ['no column', stepped(), 'columns', /no column/],
    ['columns that leave a gap', stepped({ widthMm: 700, massKg: 1 }), 'columns', /700 mm wide together, the goods 800 mm/],
    ['a column without width', stepped({ widthMm: 0, massKg: 1 }), 'columns', /Column 1 must be wider/],
    ['a column below zero', stepped({ widthMm: 800, massKg: -1 }), 'columns', /Column 1 must hold 0 kg or more/],
    ['columns all empty', stepped({ widthMm: 800, massKg: 0 }), 'empty-shape', /holds no goods/],
    [
      'a density without depth',
      { widthMm: 800, goodsKg: null, bearing: { kind: 'stepped', columns: [{ widthMm: 800, heightMm: 10, densityKgPerM3: 5 }] } },
      'density',
      /needs the depth/,
    ],
    [
      'a density of zero',
      { ...base, bearing: { kind: 'stepped', columns: [{ widthMm: 800, heightMm: 10, densityKgPerM3: 0 }] } },
      'density',
      /column 1 must be above 0/,
    ],
    [
      'a slope below zero',
      { ...base, bearing: { kind: 'sloped', slope: { by: 'end-and-slope', end: 'left', endKgPerM: 100, changeKgPerM2: -500 } } },
      'slope',
      /right end of the slope falls below zero. It comes to -300 kg\/m/,
    ],
    [
      'a slope that is no number',
      { ...base, bearing: { kind: 'sloped', slope: { by: 'heights', leftMm: NaN, rightMm: 3 } } },
      'slope',
      /left end of the slope is not a number/,
    ],
    ['a flat slope', { ...base, bearing: { kind: 'sloped', slope: { by: 'heights', leftMm: 0, rightMm: 0 } } }, 'empty-shape', /no goods/],
    ['an outline of one point', profile([0, 5]), 'profile', /at least two points/],
    ['an outline that starts late', profile([10, 5], [800, 5]), 'profile', /must run from 0 to 800 mm; it runs from 10/],
    ['an outline that ends early', profile([0, 5], [700, 5]), 'profile', /to 700 mm/],
    ['an outline that runs back', profile([0, 5], [500, 5], [400, 5], [800, 5]), 'profile', /Point 3 .* stands left of/],
    ['an outline below zero', profile([0, 5], [800, -5]), 'profile', /Point 2 .* 0 mm high or more; it is -5/],
    ['a flat outline', profile([0, 0], [800, 0]), 'empty-shape', /no goods/],
    ['no bearer', bearers(), 'bearers', /no bearer/],
    ['a bearer off the goods', bearers([30, 100, null], [700, 100, null]), 'bearers', /Bearer 1 reaches from -20 to 80 mm/],
    ['a bearer without width', bearers([400, 0, null]), 'bearers', /Bearer 1 must be wider/],
    ['shares that do not add up', bearers([100, 100, 0.5], [700, 100, 0.4]), 'shares', /add up to 0.9, not to 1/],
    ['a share below zero', bearers([100, 100, -0.5], [700, 100, 1.5]), 'shares', /share of bearer 1 must be 0 or more; it is -0.5/],
    ['some shares given, some not', bearers([100, 100, 0.5], [700, 100, null]), 'shares', /Give every bearer its share, or none/],
    ['bearers on one side of the middle', bearers([100, 100, null], [300, 100, null]), 'shares', /tip or lift off one of the bearers/],
    ['an outer overhang that lifts the goods', feet([300, null], [310, null], [500, null]), 'shares', /tip or lift off one of the feet/],
    ['one bearer off the middle', bearers([100, 100, null]), 'shares', /only bearer does not stand under their middle/],
    ['bearers at one place', bearers([400, 100, null], [400, 50, null]), 'shares', /stand at one place/],
    ['no foot', feet(), 'feet', /no foot/],
    ['a foot outside', feet([0, null], [900, null]), 'feet', /Foot 2 stands at 900 mm, beyond the goods/],
  ];
  test.each(cases)('%s', (_, goods, problem, message) => {
    const said = wrong(goods);
    expect(said.problem).toBe(problem);
    expect(said.message).toMatch(message);
  });
});
