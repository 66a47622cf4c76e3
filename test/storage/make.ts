/** Sites to store: each carries a number, so that a test can tell which state came back. */
import { newSite } from '../../src-core/site/new-site';
import type { Pallet, Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';

const pallet = (i: number): Pallet => ({
  id: `pallet-${i}`,
  name: `Pallet ${i}`,
  lengthMm: 1200,
  widthMm: 800,
  heightMm: 144,
  massKg: 20 + (i % 10),
  boards: 'along-length',
  runners: [{ centreMm: 50, widthMm: 100 }],
  ratedKg: null,
  source: { kind: 'unknown', detail: '', person: '', date: '' },
});

/** Site number `n`, a third of a kilobyte for each pallet. */
export const numbered = (id: string, n: number, pallets = 3): Site => ({
  ...newSite(id, 'Test depot'),
  notes: `state ${n}.`,
  pallets: Array.from({ length: pallets }, (_, i) => pallet(i)),
});

export const bodyOf = (id: string, n: number, pallets = 3): string => writeSite(numbered(id, n, pallets));

/** The number of the state in a site's text; -1 where there is none. */
export const numberIn = (text: string): number => Number(/"notes":"state (\d+)\."/.exec(text)?.[1] ?? -1);

/** Deterministic numbers from 0 to 1, for tests that draw cases. */
export function drawn(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
}
