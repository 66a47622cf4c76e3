import { expect, test } from 'vitest';
import { firstBay } from '../../src-renderer/editing/first-sizes';
import { entryText } from '../../src-core/units/format';

/** The sizes of the proposed bay as its fields show them. */
const shown = (units: 'metric' | 'us', locale: string) => {
  const { clearEntryMm, frameHeightMm, levels } = firstBay(units);
  return [clearEntryMm, ...levels.map(({ heightMm }) => heightMm), frameHeightMm].map((mm) => entryText(mm, 'length', { units, locale }));
};

test('a first bay is proposed in round millimetres or in round inches, its frames reaching past the topmost beam', () => {
  expect(shown('metric', 'en-GB')).toEqual(['2700', '1500', '3000', '4500', '4800']);
  expect(shown('us', 'en-US')).toEqual(['96', '60', '120', '180', '192']);
});
