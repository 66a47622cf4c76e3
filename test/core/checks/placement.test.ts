import { expect, test } from 'vitest';
import { placement, type Outline } from '../../../src-core/checks/placement';
import { plain } from '../plain';

const goods = (placementId: string, from: number, to: number, rear = -600, front = 600): Outline => ({
  placementId,
  name: `Pallet ${placementId}`,
  from,
  to,
  rear,
  front,
});
const check = (...all: Outline[]) => placement({ place: { runId: 'r' }, level: 'Level 1', clearEntry: 2700, goods: all });

test('three 800 wide pallets with 75 mm gaps stand clear in 2 700 mm', () => {
  // 3 × 800 + 4 × 75 = 2 700 (UK storage-equipment trade association Q&A, December 2014)
  expect(check(goods('a', 75, 875), goods('b', 950, 1750), goods('c', 1825, 2625)).map(({ verdict }) => verdict)).toEqual(['within']);
});

test('goods that touch each other and both uprights are still apart', () => {
  expect(check(goods('a', 0, 1350), goods('b', 1350, 2700))[0]?.verdict).toBe('within');
});

test.each([
  ['left', goods('a', -20, 780), 'Pallet a reaches 20 mm past the left end of level 1. Move it to the right.'],
  ['right', goods('a', 1950, 2750), 'Pallet a reaches 50 mm past the right end of level 1. Move it to the left.'],
])('goods off the %s end are not possible and the sentence says how far', (_, one, sentence) => {
  const [found] = check(one);
  expect(found?.verdict).toBe('not-possible');
  expect(found?.place.placementId).toBe('a');
  expect(found && plain(found.says)).toBe(sentence);
});

test('goods in each other are not possible, whichever was entered first', () => {
  for (const pair of [
    [goods('a', 0, 800), goods('b', 700, 1500)],
    [goods('b', 700, 1500), goods('a', 0, 800)],
  ]) {
    const found = check(...pair);
    expect(found).toHaveLength(1);
    expect(found[0]?.verdict).toBe('not-possible');
    expect(found[0]?.place.placementId).toBe('b');
    expect(found[0] && plain(found[0].says)).toBe('Pallet a and Pallet b stand in each other by 100 mm. Move one of them.');
  }
});

test('goods behind one another on the same stretch do not overlap', () => {
  expect(check(goods('a', 0, 800, 0, 600), goods('b', 0, 800, -600, 0))[0]?.verdict).toBe('within');
  expect(check(goods('a', 0, 800, 0, 600), goods('b', 0, 800, -600, 10))[0]?.verdict).toBe('not-possible');
});

test('a wide unit load overlaps every one under it', () => {
  expect(check(goods('a', 0, 2700), goods('b', 100, 300), goods('c', 2000, 2200))).toHaveLength(2);
});
