import { expect, test } from 'vitest';
import { acrossProblem, centreTowardsFront, frontShare } from '../../../src-core/goods/across';
import { pairLoads, type StandingGoods } from '../../../src-core/goods/pair';
import { reduce } from '../../../src-core/statics/reduction';
import { expectClose } from '../../close';

// First moment over area; lever rule 1/2 + e/d: any statics text.
test.each([
  ['even', { kind: 'even' }, 0],
  ['a triangle falling to the rear', { kind: 'sloped', rearOverFront: 0 }, 1200 / 2 - 1200 / 3],
  ['a trapezoid 1 : 3 towards the rear', { kind: 'sloped', rearOverFront: 3 }, 1200 / 2 - (1200 * 7) / 12],
  [
    'two columns',
    {
      kind: 'stepped',
      columns: [
        { depthMm: 400, massKg: 300 },
        { depthMm: 800, massKg: 100 },
      ],
    },
    600 - (300 * 200 + 100 * 800) / 400,
  ],
  ['a stated centre', { kind: 'centre', towardsFrontMm: -35 }, -35],
] as const)('centre of goods across, %s', (_, shape, expected) => {
  expectClose(centreTowardsFront(1200, shape), expected, 1e-14, 1200);
});

test('goods 90 mm in front of the middle of beams 900 mm apart put 60 % on the front beam', () => {
  expectClose(frontShare(90, 900), 0.6, 1e-15);
  expect(frontShare(500, 900)).toBeGreaterThan(1);
  expect(() => frontShare(1, 0)).toThrow(/more than 0 mm apart, got 0/);
});

test.each([
  [{ kind: 'sloped', rearOverFront: -1 }, /may not weigh less than nothing/],
  [{ kind: 'centre', towardsFrontMm: 700 }, /lies outside the goods/],
  [{ kind: 'stepped', columns: [] }, /no column across/],
  [{ kind: 'stepped', columns: [{ depthMm: 1000, massKg: 1 }] }, /1000 mm deep together, the goods 1200 mm/],
  [{ kind: 'stepped', columns: [{ depthMm: 1200, massKg: 0 }] }, /All columns across weigh 0 kg/],
  [{ kind: 'stepped', columns: [{ depthMm: 1200, massKg: -2 }] }, /0 kg or more/],
] as const)('a depth shape that cannot be says why: %j', (shape, message) => {
  expect(acrossProblem(1200, shape)).toMatch(message);
  expect(() => centreTowardsFront(1200, shape)).toThrow(message);
});

const uneven: StandingGoods = {
  id: 'a',
  load: {
    lines: [
      { from: 0, to: 300, wFrom: 2, wTo: 5 },
      { from: 300, to: 800, wFrom: 1, wTo: 1 },
    ],
    points: [{ at: 100, force: 50 }],
  },
  widthMm: 800,
  at: 400,
  mirrored: false,
  frontShare: 0.6,
};

test('front and rear loads add up to the whole, each by its share', () => {
  const { whole, front, rear } = pairLoads([uneven, { ...uneven, id: 'b', at: 1300, frontShare: 0.5 }]);
  const total = reduce(whole).resultant;
  expectClose(total, 2 * (1050 + 500 + 50), 1e-14);
  expectClose(reduce(front).resultant, 1600 * 0.6 + 1600 * 0.5, 1e-14);
  expectClose(reduce(front).resultant + reduce(rear).resultant, total, 1e-14);
});

test('turned left for right, goods keep their place and every piece is its own mirror image', () => {
  const { whole } = pairLoads([{ ...uneven, mirrored: true }]);
  expect(whole).toEqual({
    lines: [
      { from: 900, to: 1200, wFrom: 5, wTo: 2 },
      { from: 400, to: 900, wFrom: 1, wTo: 1 },
    ],
    points: [{ at: 1100, force: 50 }],
  });
});

test('goods that would tip off the pair are refused by name, a rounding past the beam is not', () => {
  expect(() => pairLoads([{ ...uneven, frontShare: 1.2 }])).toThrow(/unit load "a" would tip off: .* 1.2/);
  expect(() => pairLoads([{ ...uneven, frontShare: NaN }])).toThrow(RangeError);
  expect(reduce(pairLoads([{ ...uneven, frontShare: 1 + 1e-15 }]).rear).resultant).toBe(0);
});
