/**
 * Usual plan sizes and masses of pallets, to start from. Sizes: ISO 6780 as listed by secondary
 * texts; EUR sizes EN 13698-1 as restated. Masses are common practice, taken at the heavy end; boards
 * of the EUR pallet are from memory of EN 13698-1, to be confirmed. Each entry's source says so.
 */
import type { Pallet } from '../../src-core/site/site';

type Standard = Omit<Pallet, 'id'>;

const usual = (detail: string): Pallet['source'] => ({ kind: 'estimated', detail, person: '', date: '' });

/** Where the runners are not known none are stated, and checks that need them say so. */
const plain = (name: string, lengthMm: number, widthMm: number, massKg: number, detail: string): Standard => ({
  name,
  lengthMm,
  widthMm,
  heightMm: 144,
  massKg,
  boards: 'along-length',
  runners: [],
  ratedKg: null,
  source: usual(detail),
});

export const STANDARD_PALLETS: readonly Standard[] = [
  {
    ...plain(
      'EUR flat pallet 1200 × 800',
      1200,
      800,
      25,
      'size EN 13698-1 (secondary); mass common practice, damp; boards from memory, to be confirmed',
    ),
    runners: [
      { centreMm: 50, widthMm: 100 },
      { centreMm: 400, widthMm: 145 },
      { centreMm: 750, widthMm: 100 },
    ],
  },
  plain('Flat pallet 1200 × 1000', 1200, 1000, 32, 'size ISO 6780 (secondary); mass 22 to 32 kg, common practice'),
  plain('Flat pallet 48 × 40 in', 1219, 1016, 23, 'size ISO 6780 (secondary); mass 33 to 50 lb, common practice'),
  plain('Flat pallet 1165 × 1165', 1165, 1165, 45, 'size ISO 6780 in some lists; mass 35 to 45 kg, common practice'),
  plain('Half pallet 800 × 600', 800, 600, 10, 'size and mass 8 to 10 kg, common practice'),
  plain('Plastic pallet 1200 × 800', 1200, 800, 20, 'mass 6 to 20 kg, common practice; rated differently in a rack and on the floor'),
];
