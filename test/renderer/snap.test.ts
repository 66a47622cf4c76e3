import { expect, test } from 'vitest';
import { catchingPlaces, overlaps, snap } from '../../src-renderer/drawing/snap';

// 2 700 mm entry for three 800 mm pallets and four gaps of 75 mm: 3 × 800 + 4 × 75 = 2 700.
const empty = { entry: 2700, gaps: { upright: 75, loads: 75 }, width: 800, others: [] };

test('an empty level catches at both uprights and in the middle of the beam', () => {
  expect(catchingPlaces(empty)).toEqual([
    { at: 75, by: 'left upright' },
    { at: 950, by: 'middle of the beam' },
    { at: 1825, by: 'right upright' },
  ]);
});

test('beside a neighbour it catches a gap away, and never over it', () => {
  const places = catchingPlaces({ ...empty, others: [{ at: 75, width: 800 }] });
  // 75 + 800 + 75 = 950 is the middle of the beam as well; the two are one place.
  expect(places.map((place) => place.at)).toEqual([950, 1825]);
});

test('a full level has no place to catch', () => {
  const others = [75, 950, 1825].map((at) => ({ at, width: 800 }));
  expect(catchingPlaces({ ...empty, others })).toEqual([]);
});

test('within reach it catches, out of reach it stands on a whole 10 mm', () => {
  expect(snap(90, empty, 30)).toEqual({ at: 75, by: 'left upright' });
  expect(snap(333, empty, 30)).toEqual({ at: 330, by: 'step' });
});

test('it never leaves the opening, and a load wider than it stands at the left upright', () => {
  expect(snap(-400, empty, 30).at).toBe(0);
  expect(snap(9000, empty, 30).at).toBe(1900);
  expect(snap(500, { ...empty, width: 3000 }, 30).at).toBe(0);
});

test('touching unit loads do not overlap', () => {
  expect(overlaps({ at: 0, width: 800 }, { at: 800, width: 800 })).toBe(false);
  expect(overlaps({ at: 0, width: 800 }, { at: 790, width: 800 })).toBe(true);
});

test('a gap of 3 in is kept as it is and never taken short', () => {
  const inches = { ...empty, gaps: { upright: 76.2, loads: 76.25 }, others: [{ at: 77, width: 800 }] };
  const places = catchingPlaces(inches).map((place) => place.at);
  // 77 + 800 + 76.25 = 953.25 up to 953.3; 2 700 − 76.2 − 800 = 1 823.8.
  expect(places).toEqual([953.3, 1823.8]);
});

test('two loads of 42 in with gaps of 4 in fill an entry of 96 in', () => {
  // 2 × 42 + 3 × 4 = 96 in, 1066.8, 101.6 and 2438.4 mm.
  const tight = { entry: 2438.4, gaps: { upright: 101.6, loads: 101.6 }, width: 1066.8, others: [{ at: 101.6, width: 1066.8 }] };
  expect(catchingPlaces(tight).map((place) => place.at)).toEqual([1270]);
});
