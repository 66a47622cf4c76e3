import { expect, test } from 'vitest';
import { fixityOf } from '../../../src-core/checks/pair';
import type { BeamLoad } from '../../../src-core/statics/load';
import { weightOf } from '../../../src-core/units/quantity';
import { boxSecondMoment, impliedLoad } from '../../../src-core/checks/implied-load';

// Bay scenario S10 of the domain facts, whose arithmetic was checked by a script apart from this program:
// 2.7 m, three 620 kg pallets of 800 mm at 75 mm gaps, box 120 × 50 × 1.5, E = 210 000 N/mm², elastic sag 13 mm.
const span = 2700;
const rigidity = 210_000 * boxSecondMoment(120, 50, 1.5);
const pallet = weightOf(620) / 2 / 800;
const onOneBeam: BeamLoad = {
  lines: [75, 950, 1825].map((from) => ({ from, to: from + 800, wFrom: pallet, wTo: pallet })),
  points: [],
};
const s10 = { elastic: 13, span, rigidity, declared: { load: onOneBeam, kg: 1860 } };

test('S10: the box section has I = 927 016 mm⁴ and EI = 194.67 kN·m²', () => {
  expect(boxSecondMoment(120, 50, 1.5)).toBeCloseTo(927_016, 0);
  expect(rigidity / 1e9).toBeCloseTo(194.67, 2);
});

test('S10: with pinned ends the declared load sags 12.43 mm, so 13 mm stand for 1 945.9 kg, 1.046 times declared', () => {
  const { declared, evenKg } = impliedLoad(s10, 0);
  expect(declared?.sag).toBeCloseTo(12.43, 2);
  expect(declared?.kg).toBeCloseTo(1945.9, 1);
  expect(declared?.ratio).toBeCloseTo(1.046, 3);
  // By deflection the declared load counts as 1 924.9 kg evenly spread; times the ratio.
  expect(evenKg / (declared?.ratio ?? 0)).toBeCloseTo(1924.9, 1);
});

// k in kN·m/rad, sag in mm and ratio as S10 prints them.
test.each([
  [20, 11.21, 1.159],
  [50, 9.86, 1.318],
  [100, 8.35, 1.557],
])('S10: with connectors of %i kN·m/rad it sags %f mm, a ratio of %f', (k, sag, ratio) => {
  const { declared } = impliedLoad(s10, fixityOf(k * 1e6, rigidity, span));
  expect(declared?.sag).toBeCloseTo(sag, 2);
  expect(declared?.ratio).toBeCloseTo(ratio, 3);
});

// Oracle of facts 2.11: a central point load sags as 1.6 times itself evenly spread.
test('a point load at mid-span counts 1.6 times evenly spread', () => {
  const load: BeamLoad = { lines: [], points: [{ at: 1350, force: weightOf(500) }] };
  const { declared, evenKg } = impliedLoad({ elastic: 5, span, rigidity, declared: { load, kg: 1000 } }, 0);
  expect(evenKg / ((declared?.ratio ?? 0) * 1000)).toBeCloseTo(1.6, 6);
});

test('stiffer ends never imply a smaller load', () => {
  let last = 0;
  for (let fixity = 0; fixity < 0.95; fixity += 0.05) {
    const { declared, evenKg } = impliedLoad(s10, fixity);
    expect(declared?.ratio).toBeGreaterThan(last);
    // An almost even load: both ways of asking agree within the few per cent that it is not even.
    expect(evenKg / (declared?.kg ?? 0)).toBeCloseTo(1.035, 1);
    last = declared?.ratio ?? Infinity;
  }
});

test('without a declared load, or with nothing declared, only the even load is implied', () => {
  expect(impliedLoad({ ...s10, declared: null }, 0)).toMatchObject({ declared: null });
  const nothing = { load: { lines: [], points: [] }, kg: 0 };
  const { declared, evenKg } = impliedLoad({ ...s10, declared: nothing }, 0.4);
  expect(declared).toBeNull();
  expect(evenKg).toBeGreaterThan(0);
});
