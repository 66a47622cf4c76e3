/**
 * Usual plan sizes and masses of pallets, to start from. Sizes: ISO 6780 as listed by two secondary
 * texts; EUR sizes EN 13698-1 as restated. Masses are common practice without a source, taken at the
 * heavy end; a size for which none is usual states none. Boards of the EUR pallet are from memory of
 * EN 13698-1, to be confirmed. Each entry's source says so.
 */
import type { Pallet } from '../../src-core/site/site';

type Standard = Omit<Pallet, 'id'>;

const SIZE = 'size ISO 6780 (two secondary lists)';
const HEIGHT = 'height taken as that of the EUR pallet';
const NO_MASS = 'no usual mass: weigh one';

/** Where the runners are not known none are stated, and checks that need them say so. */
const plain = (name: string, [lengthMm, widthMm]: readonly [number, number], massKg: number | null, detail: string): Standard => ({
  name,
  lengthMm,
  widthMm,
  heightMm: 144,
  massKg,
  boards: 'along-length',
  runners: [],
  ratedKg: null,
  source: { kind: 'estimated', detail, person: '', date: '' },
});

export const STANDARD_PALLETS: readonly Standard[] = [
  {
    ...plain(
      'EUR flat pallet 1200 × 800',
      [1200, 800],
      25,
      'size EN 13698-1 (secondary); mass 20 to 25 kg from dry to damp, 25 common practice; boards from memory of EN 13698-1, to be confirmed',
    ),
    runners: [
      { centreMm: 50, widthMm: 100 },
      { centreMm: 400, widthMm: 145 },
      { centreMm: 750, widthMm: 100 },
    ],
  },
  plain('Flat pallet 1200 × 1000', [1200, 1000], 32, `${SIZE}; mass 22 to 32 kg, common practice; ${HEIGHT}`),
  plain('Flat pallet 48 × 40 in', [1219, 1016], 23, `${SIZE}; mass 33 to 50 lb, common practice; ${HEIGHT}`),
  plain('Block pallet 48 × 40 in', [1219, 1016], 32, `${SIZE}; mass to 70 lb, common practice; ${HEIGHT}`),
  plain('Flat pallet 1165 × 1165', [1165, 1165], 45, `size ISO 6780 in some lists; mass 35 to 45 kg, common practice; ${HEIGHT}`),
  plain('Flat pallet 1140 × 1140', [1140, 1140], null, `${SIZE}; ${NO_MASS}; ${HEIGHT}`),
  plain('Flat pallet 1100 × 1100', [1100, 1100], null, `${SIZE}; ${NO_MASS}; ${HEIGHT}`),
  plain('Flat pallet 1067 × 1067', [1067, 1067], null, `${SIZE}; ${NO_MASS}; ${HEIGHT}`),
  plain('Half pallet 800 × 600', [800, 600], 10, `size and mass 8 to 10 kg, common practice; ${HEIGHT}`),
  plain(
    'Plastic pallet 1200 × 800',
    [1200, 800],
    20,
    `size and mass 6 to 20 kg, common practice; rated differently in a rack and on the floor; ${HEIGHT}`,
  ),
];
