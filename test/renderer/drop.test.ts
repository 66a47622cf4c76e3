import { expect, test } from 'vitest';
import { bayScale } from '../../src-renderer/drawing/bay-scale';
import { dropAt, dropTargets, findGoods, type Carrying } from '../../src-renderer/drawing/drop';
import { bayOf, goods } from './make-bay';

const bay = bayOf([[], [goods('a', 75), goods('b', 950)], []]);
const scale = bayScale(bay, { width: 390, tallest: 800, left: 50, right: 50, top: 10, bottom: 5 });
const carrying: Carrying = { bay, scale, gapsAt: () => ({ upright: 75, loads: 75 }), placementId: 'a', width: 800, rear: -600, front: 600 };

test('let go over another level it lands there, caught by the upright', () => {
  const drop = dropAt(carrying, scale.x(60), scale.y(3200));
  expect([drop?.level.levelId, drop?.place]).toEqual(['level 2', { at: 75, by: 'left upright' }]);
});

test('it catches beside its neighbour, but is no neighbour of itself', () => {
  expect(dropAt(carrying, scale.x(1800), scale.y(1600))?.place).toEqual({ at: 1825, by: 'right upright' });
  expect(dropAt(carrying, scale.x(70), scale.y(1600))?.place.at).toBe(75);
});

test('freely it keeps to whole 10 mm and is not caught', () => {
  expect(dropAt(carrying, scale.x(93), scale.y(3200), true)?.place).toEqual({ at: 90, by: 'step' });
});

test('over the floor it lands on the floor', () => {
  expect(dropAt(carrying, scale.x(500), scale.y(100))?.level.levelId).toBeNull();
});

test('targets to click on stand on every level with room, at least 24 px apart', () => {
  const targets = dropTargets(carrying);
  expect(new Set(targets.map((target) => target.level.number))).toEqual(new Set([0, 1, 2]));
  for (const a of targets) {
    for (const b of targets) {
      if (a !== b && a.level === b.level) expect(Math.abs(a.x - b.x)).toBeGreaterThanOrEqual(24);
    }
  }
});

test('every target is a place where the goods stand clear of the others', () => {
  for (const { level, place } of dropTargets(carrying)) {
    const others = level.goods.filter((one) => one.placementId !== 'a');
    for (const other of others) expect(place.at + 800 <= other.at || place.at >= other.at + 800).toBe(true);
    expect(place.at).toBeGreaterThanOrEqual(0);
    expect(place.at + 800).toBeLessThanOrEqual(2700);
  }
});

test('goods are found by their id, and none for none', () => {
  expect(findGoods(bay, 'b')?.at).toBe(950);
  expect(findGoods(bay, null)).toBeNull();
});

test('goods of half the depth catch past one that stands behind them', () => {
  const behind = bayOf([[], [{ ...goods('rear half', 950), rear: -600, front: 0 }], []]);
  const before = { ...carrying, bay: behind, rear: 0, front: 600 };
  expect(dropAt(before, scale.x(955), scale.y(1600))?.place).toEqual({ at: 950, by: 'middle of the beam' });
});
