import { expect, test } from 'vitest';
import { addEntry } from '../../src-core/site/edits';
import { STANDARD_PALLETS } from '../../src-renderer/forms/standard-pallets';
import { EMPTY } from './sites';

const sizes = (name: string) => STANDARD_PALLETS.filter((one) => one.name.includes(name)).map((one) => [one.lengthMm, one.widthMm]);

test('every plan size of ISO 6780 is offered, and those of the EUR and the half pallet', () => {
  // facts.md F-96 (two secondary lists of ISO 6780), F-97 (EN 13698-1 restated), F-103 and F-105 (common practice, no source).
  const listed = [
    [1200, 800],
    [1200, 1000],
    [1219, 1016],
    [1165, 1165],
    [1140, 1140],
    [1100, 1100],
    [1067, 1067],
    [800, 600],
  ];
  for (const size of listed) expect(STANDARD_PALLETS.map((one) => [one.lengthMm, one.widthMm])).toContainEqual(size);
  expect(sizes('EUR')).toEqual([[1200, 800]]);
});

test('usual masses stand at the heavy end, and where none is usual none is stated', () => {
  // F-98, F-101, F-102 (33 to 50 lb; block type to 70 lb), F-103, F-104, F-105: common practice, no source.
  expect(Object.fromEntries(STANDARD_PALLETS.map((one) => [one.name, one.massKg]))).toEqual({
    'EUR flat pallet 1200 × 800': 25,
    'Flat pallet 1200 × 1000': 32,
    'Flat pallet 48 × 40 in': 23,
    'Block pallet 48 × 40 in': 32,
    'Flat pallet 1165 × 1165': 45,
    'Flat pallet 1140 × 1140': null,
    'Flat pallet 1100 × 1100': null,
    'Flat pallet 1067 × 1067': null,
    'Half pallet 800 × 600': 10,
    'Plastic pallet 1200 × 800': 20,
  });
});

test('each says where it is from, states no rating, and can stand in a site', () => {
  for (const [index, pallet] of STANDARD_PALLETS.entries()) {
    expect(pallet.source.kind).toBe('estimated');
    expect(pallet.source.detail).toMatch(/secondary|common practice/);
    expect(pallet.ratedKg).toBeNull();
    expect(addEntry(EMPTY, 'pallets', { ...pallet, id: `p${index}` }).pallets).toHaveLength(1);
  }
});
