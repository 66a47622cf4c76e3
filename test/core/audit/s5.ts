/** Goods and frame table of scenario S5, which other racks take as well. */
import { makeUnitLoad } from '../../make';

export const central = makeUnitLoad({ id: 'load', name: 'Load', widthMm: 2000, goodsKg: 2000 });
export const S5_TABLE = [
  [1000, 11_800],
  [1250, 10_900],
  [1500, 9800],
  [1750, 8700],
  [2000, 7600],
  [2250, 6600],
].map(([heightMm = 0, ratedKg = 0]) => ({ heightMm, ratedKg }));
