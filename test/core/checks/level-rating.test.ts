import { expect, test } from 'vitest';
import { levelRating, type LevelRatingInput } from '../../../src-core/checks/level-rating';
import { plain } from '../plain';

const nothingNamed = { input: 'rated capacity of level 2', how: 'Enter a notice.', field: 'bay:b:noticeId' };
const notice = (...levelKg: (number | null)[]): LevelRatingInput['notice'] => ({ id: 'n', levelKg, from: 'load notice LN-1' });
const table = (...rows: [number, number][]): LevelRatingInput['beamType'] => ({
  id: 't',
  name: 'B 120',
  ratings: rows.map(([spanMm, pairKg]) => ({ spanMm, pairKg })),
  from: 'table of B 120',
});
const rating = (change: Partial<LevelRatingInput>) =>
  levelRating({ level: 'level 2', index: 1, beamLength: 2700, notice: null, beamType: null, nothingNamed: () => nothingNamed, ...change });

test('the notice states each level from the lowest up, and its last entry serves all above', () => {
  expect(rating({ notice: notice(2000, 1800, 1500) }).kg).toBe(1800);
  expect(rating({ notice: notice(2000, 1800, 1500), index: 7 }).kg).toBe(1500);
  expect(rating({ notice: notice(2000), index: 1 }).kg).toBe(2000);
});

test('the maker’s table is read at the beam’s own length, whatever its order', () => {
  expect(rating({ beamType: table([3600, 1400], [2700, 2200], [1800, 3000]) }).kg).toBe(2200);
});

test('between two rows the next longer one is taken and said so', () => {
  const found = rating({ beamType: table([1800, 3000], [3600, 1400], [3300, 1700]) });
  expect(found.kg).toBe(1700);
  expect(found.notes.map(plain)).toEqual(['The table has no row for 2700 mm: its next longer one, 3300 mm, is used.']);
});

test('beyond the last row there is no rating', () => {
  const found = rating({ beamType: table([1800, 3000]) });
  expect(found.kg).toBeNull();
  expect(found.missing).toEqual([
    {
      input: 'rated capacity of level 2',
      how: 'The table of B 120 ends before the length of this beam, and no rating is taken from beyond a table. Ask the maker for one.',
      field: 'beamType:t:ratings',
    },
  ]);
});

test('of two rows for one length the lower rating holds', () => {
  expect(rating({ beamType: table([2700, 2200], [2700, 2000]) }).kg).toBe(2000);
});

test.each([
  [2000, 2200, 2000, 'the notice', 'The lower of two ratings is used: 2000 kg by the notice, 2200 kg by the maker’s table.'],
  [2400, 2200, 2200, 'the maker’s table', 'The lower of two ratings is used: 2200 kg by the maker’s table, 2400 kg by the notice.'],
])('of a notice of %d kg and a table of %d kg the lower is used', (stated, tabled, kg, by, note) => {
  const found = rating({ notice: notice(stated), beamType: table([2700, tabled]) });
  expect(found).toMatchObject({ kg, by, missing: [] });
  expect(found.notes.map(plain)).toEqual([note]);
});

test('a notice that does not state the level leaves the maker’s table', () => {
  expect(rating({ notice: notice(2000, null), beamType: table([2700, 2200]) })).toMatchObject({ kg: 2200, by: 'the maker’s table' });
});

test.each<[string, Partial<LevelRatingInput>, string]>([
  ['a notice without this level', { notice: notice(2000, null) }, 'notice:n:levelKg'],
  ['a notice without levels', { notice: notice() }, 'notice:n:levelKg'],
  ['a beam type without a table', { beamType: table() }, 'beamType:t:ratings'],
  ['neither', {}, 'bay:b:noticeId'],
])('%s gives no rating and names the field to fill', (_, change, field) => {
  const found = rating(change);
  expect(found.kg).toBeNull();
  expect(found.missing.map((one) => one.field)).toEqual([field]);
});
