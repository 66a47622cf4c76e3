import fc from 'fast-check';
import { expect, test } from 'vitest';
import { areaLoad } from '../../../src-core/checks/area-load';
import { deckPanel, type DeckPanelInput, type OnDeck } from '../../../src-core/checks/deck-panel';
import type { LevelRating } from '../../../src-core/checks/level-rating';
import { resolveRules } from '../../../src-core/checks/rule-sets';
import { weightOf } from '../../../src-core/units/quantity';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const rules = resolveRules({ set: 'european', changed: [] });
const place = { runId: 'r', levelId: 'l' };
const rated = (kg: number | null): LevelRating => ({
  kg,
  by: 'the notice',
  from: 'load notice LN-1',
  notes: [],
  missing: kg === null ? [{ input: 'rated capacity of level 1', how: 'Read it.', field: 'notice:n:levelKg' }] : [],
});

/** Even goods on a base, x and y of its left and rear edge from the shelf's own. */
const box = (name: string, massKg: number, x: number, width: number, y: number, depth: number, shelfDepth: number): OnDeck => {
  const w = weightOf(massKg) / width;
  return {
    placementId: name,
    name,
    along: { lines: [{ from: x, to: x + width, wFrom: w, wTo: w }], points: [] },
    across: { lines: [{ from: 0, to: depth, wFrom: 1 / depth, wTo: 1 / depth }], points: [] },
    from: x,
    to: x + width,
    rear: y - shelfDepth / 2,
    front: y + depth - shelfDepth / 2,
    missing: [],
  };
};

/** Scenario S7: shelf 1.80 × 0.60 m, rating 400 kg, six panels of 300 × 600. */
const s7 = (goods: readonly OnDeck[], part: Partial<DeckPanelInput> = {}) =>
  deckPanel({
    place,
    level: 'Level 1',
    panels: { count: 6, ratedKg: null, from: '' },
    rated: rated(400),
    clearEntry: 1800,
    depth: 600,
    depthMissing: [],
    goods,
    rules,
    ...part,
  });
const boxes = box('Boxes', 120, 0, 1800, 0, 600, 600);
const motorOn = (x: number) => box('Motor', 130, x, 300, 150, 300, 600);

test('S7: a motor of 130 kg on one panel: 1.95 by weight, 2.925 by bending', () => {
  // Share 400/6 = 66.7; 130·(2 − 300/600) = 195.0; 195/66.7 = 2.925; 130/66.7 = 1.95 (scenario S7)
  const [found, ...others] = s7([motorOn(900)]);
  expect(others).toEqual([]);
  expect(found?.allowed?.value.toFixed(1)).toBe('66.7');
  expect(found?.demand?.value.toFixed(1)).toBe('195.0');
  expect(found?.utilisation?.toFixed(3)).toBe('2.925');
  expect((130 / (found?.allowed?.value ?? NaN)).toFixed(2)).toBe('1.95');
  expect(found?.verdict).toBe('over');
  expect(plain(found?.says ?? [])).toContain('panel 4 of 6 from the left carries 130 kg, which bends it as 195 kg evenly spread would');
  if (found) expectWorked(found);
});

test('S7: across two panels 65 kg each, 97.5 and 1.462', () => {
  const found = s7([motorOn(750)]);
  expect(found.map(({ demand, utilisation }) => [demand?.value.toFixed(1), utilisation?.toFixed(3)])).toEqual([
    ['97.5', '1.462'],
    ['97.5', '1.462'],
  ]);
});

test('S7: the boxes alone are within: 20 kg a panel', () => {
  const [found] = s7([boxes]);
  expect(found?.demand?.value).toBeCloseTo(20, 9);
  expect(found?.verdict).toBe('within');
  if (found) expectWorked(found);
});

test('a board over three panels brings the motor to 43.3 kg a panel, which with the boxes is close', () => {
  // 130/3 = 43.33 over 900 × 600: even on the span, so by bending the same; with 20 kg of boxes 63.33 of 66.67 = 0.95
  const [found] = s7([boxes, box('Motor on a board', 130, 450, 900, 0, 600, 600)]);
  expect(found?.demand?.value).toBeCloseTo(20 + 130 / 3, 9);
  expect(found?.verdict).toBe('close');
});

test('a panel’s own rating takes the place of its share', () => {
  const [found] = s7([motorOn(900)], { panels: { count: 6, ratedKg: 250, from: 'maker' }, rated: rated(null) });
  expect(found?.utilisation).toBeCloseTo(195 / 250, 9);
  expect(found?.verdict).toBe('within');
  if (found) expectWorked(found);
});

test('a base that covers less than a third of the panel is outside the deck’s rating', () => {
  // 300 × 190 of 300 × 600 = 0.317
  const [found] = s7([box('Foot', 10, 900, 300, 205, 190, 600)]);
  expect(found?.verdict).toBe('close');
  expect(plain(found?.says ?? [])).toContain('outside a deck’s rating');
  expect(s7([box('Base', 10, 900, 300, 200, 200, 600)])[0]?.verdict).toBe('within');
});

test('for any centred strip the bending of a panel is W·(2 − b/span)', () => {
  // facts M-08
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 600 }), fc.integer({ min: 1, max: 500 }), (b, kg) => {
      const [found] = s7([box('Strip', kg, 900, 300, (600 - b) / 2, b, 600)], { panels: { count: 6, ratedKg: 1e6, from: 'maker' } });
      expect(found?.demand?.value).toBeCloseTo(kg * (2 - b / 600), 6);
    }),
  );
});

test('panels share goods by where these stand, and together they carry all of it', () => {
  fc.assert(
    fc.property(fc.integer({ min: 0, max: 1000 }), fc.integer({ min: 1, max: 800 }), fc.integer({ min: 1, max: 12 }), (x, width, count) => {
      const found = s7([box('Goods', 100, x, width, 0, 600, 600)], { panels: { count, ratedKg: 1e-9, from: 'maker' } });
      expect(found.reduce((sum, { demand }) => sum + (demand?.value ?? 0), 0)).toBeCloseTo(100, 9);
    }),
  );
});

test('goods deeper than the frame load the panel with what lies on it, and count with all their mass', () => {
  // 1 200 deep on 1 100: mass on the panel 100, by bending 100·1 100/1 200
  const [found] = s7([box('Pallet', 100, 0, 1800, -50, 1200, 1100)], { depth: 1100, panels: { count: 1, ratedKg: 1000, from: 'maker' } });
  expect(found?.demand?.value).toBeCloseTo(100, 9);
  expect(found?.notes.map(plain)[0]).toContain('by bending 91.6667 kg');
  if (found) expectWorked(found);
});

test('without a rating, a depth or a mass the panels are not assessable', () => {
  expect(s7([motorOn(0)], { rated: rated(null) })[0]?.missing.map(({ field }) => field)).toEqual(['notice:n:levelKg']);
  const depth = { input: 'type of frame F1', how: 'Choose it.', field: 'frame:f1:typeId' };
  expect(s7([motorOn(0)], { depth: null, depthMissing: [depth] })[0]?.missing).toEqual([depth]);
  const mass = { input: 'mass of Motor', how: 'Weigh it.', field: 'unitLoad:m:goodsKg' };
  expect(s7([{ ...motorOn(0), along: null, missing: [mass] }])[0]?.missing).toEqual([mass]);
});

const shelf = (massKg: number | null, width: number, depth: number, kg: number | null = 400) =>
  areaLoad({
    place,
    level: 'Level 1',
    width: 1800,
    depth: 600,
    depthMissing: [],
    goods: [
      { placementId: 'b', name: 'Boxes', massKg: 120, from: 'counted', width: 1800, depth: 600, missing: [] },
      {
        placementId: 'm',
        name: 'Motor',
        massKg,
        from: 'weighed',
        width,
        depth,
        missing: [{ input: 'mass of Motor', how: 'Weigh it.', field: 'unitLoad:m:goodsKg' }],
      },
    ],
    rated: rated(kg),
    rules,
  });

test('S7: 0.625 by area, with 1 444 kg/m² under the motor against 370', () => {
  // 250/400; 130/0.09 = 1 444; 400/1.08 = 370 (scenario S7)
  const found = shelf(130, 300, 300);
  expect(found.utilisation).toBeCloseTo(0.625, 12);
  const perM2 = (kgPerMm2: number | undefined) => ((kgPerMm2 ?? NaN) * 1e6).toFixed(0);
  expect(perM2(found.allowed?.value)).toBe('370');
  expect(perM2(found.worked.find(({ result }) => result.symbol === 'q_h')?.result.quantity.value)).toBe('1444');
  expect(found.verdict).toBe('close');
  expect(found.place.placementId).toBe('m');
  expectWorked(found);
});

test('spread wide enough the motor is within by area; unknown mass or rating is not assessable', () => {
  expect(shelf(130, 900, 600).verdict).toBe('within');
  expect(shelf(null, 300, 300).missing.map(({ field }) => field)).toEqual(['unitLoad:m:goodsKg']);
  expect(shelf(130, 300, 300, null).missing.map(({ field }) => field)).toEqual(['notice:n:levelKg']);
  expect(shelf(400, 900, 600).verdict).toBe('over');
});
