import { expect, test } from 'vitest';
import { withEvenLoad, widestFree } from '../../../src-core/audit/free-room';
import type { RoomLeft } from '../../../src-core/audit/room-left';
import { finding } from '../../../src-core/checks/make-finding';
import type { Site } from '../../../src-core/site/site';
import { formatText, type Reading } from '../../../src-core/units/format';
import { say, type Text } from '../../../src-core/units/text';
import { atLeast, atMost, roomForEven, roomForGoods, roomForPlaced, stopOf } from '../../../src-core/words/room-words';
import { makeBay, makeLevel, makeRun, makeSite, makeUnitLoad } from '../../make';

const METRIC: Reading = { units: 'metric', locale: 'en-GB' };
const US: Reading = { units: 'us', locale: 'en-US' };
const words = (texts: readonly Text[], reading: Reading): string =>
  texts
    .map((text) => formatText(text, reading))
    .join(' ')
    .replaceAll(/[\u00a0\u202f]/g, ' ');

const flour = makeUnitLoad({ id: 'flour', widthMm: 800 });
const run = makeRun([makeBay([makeLevel([[flour, 75]], { id: 'level' })], { id: 'bay' })], { id: 'run' });
const site: Site = makeSite({ unitLoads: [flour], runs: [run] });
const asked = (units: Reading['units'], more: { ownKg?: number; palletKg?: number } = {}) => ({
  site,
  units,
  ownKg: more.ownKg ?? null,
  palletKg: more.palletKg ?? 0,
});
const stop = finding({ check: 'beam-bending', place: { runId: 'run', levelId: 'level' }, verdict: 'over', says: () => say`Too much.` });
const roomOf = (mostKg: number, more: Partial<RoomLeft & { kind: 'room' }> = {}): RoomLeft & { kind: 'room' } => ({
  kind: 'room',
  mostKg,
  stop,
  asComplement: false,
  notBetween: null,
  ...more,
});

test('room for goods is said with its mass, its place and what stops it, in both unit systems', () => {
  expect(words(roomForGoods(roomOf(640), 1900, 0, asked('metric')), METRIC)).toBe(
    'Room for up to 640 kg of this shape at 1 900 mm; beam bending stops it. Above 90 % of a rating it counts as close.',
  );
  // 640 kg / 0.45359237 = 1 410.96 lb and 1 900 mm / 25.4 = 74.8 in, exact factors
  expect(words(roomForGoods(roomOf(640), 1900, 0, asked('us')), US)).toBe(
    'Room for up to 1,410 lb of this shape at 74.8 in; beam bending stops it. Above 90 % of a rating it counts as close.',
  );
  expect(words(roomForGoods(roomOf(640), 1900, 0, asked('metric', { palletKg: 25 })), METRIC)).toContain(
    'at 1 900 mm, pallet included; beam',
  );
});

test('figures are rounded to the safe side, but what is whole stays whole', () => {
  expect(atMost(1499.9, 'metric').value).toBe(1499);
  expect(atMost(2499.999_999_999_9, 'metric').value).toBe(2500);
  expect(atMost(9.99, 'metric').value).toBeCloseTo(9.9, 12);
  expect(atLeast(120.1, 'metric').value).toBe(121);
  expect(atLeast(120.000_000_000_01, 'metric').value).toBe(120);
  expect(words([say`${atMost(1000, 'us')} ${atLeast(1000, 'us')}`], US)).toBe('2,204 lb 2,205 lb');
});

test('goods that are too heavy are told by how much, so that both figures add up to their mass', () => {
  expect(words(roomForPlaced(roomOf(480.7), asked('metric', { ownKg: 600 })), METRIC)).toBe(
    'Over by 120 kg here: at most 480 kg of this shape; beam bending stops it.',
  );
  expect(words(roomForGoods(roomOf(480.7), 75, 0, asked('metric', { ownKg: 600 })), METRIC)).toContain(
    'These goods weigh 600 kg, 120 kg too much.',
  );
  expect(words(roomForPlaced(roomOf(600), asked('metric', { ownKg: 600 })), METRIC)).toBe(
    'Up to 600 kg of this shape may stand here; beam bending stops it. Above 90 % of a rating it counts as close.',
  );
  expect(words(roomForPlaced(roomOf(600), asked('metric')), METRIC)).toContain('At most 600 kg of this shape');
});

test('goods that are met are counted as often as they find a place', () => {
  const said = (count: number) => words(roomForGoods(roomOf(640), 75, count, asked('metric', { ownKg: 385 })), METRIC);
  expect(said(1)).toContain('These goods weigh 385 kg and may be put here.');
  expect(said(3)).toContain('Of these goods, 385 kg each, 3 may be put here.');
  expect(said(0)).not.toContain('may be put');
});

test('a full complement is named with the masses that would be neither', () => {
  const room = roomOf(833.3, { asComplement: true, notBetween: { aboveKg: 745.6, belowKg: 769.2 } });
  const said = words(roomForGoods(room, 1825, 1, asked('metric', { ownKg: 760 })), METRIC);
  expect(said).toContain('Above 745 kg and below 770 kg it would be neither that nor within by the even loads.');
  expect(said).toContain('These goods weigh 760 kg, which would not do.');
  expect(words(roomForGoods(room, 1825, 1, asked('metric', { ownKg: 800 })), METRIC)).not.toContain('would not do');
  expect(words(roomForPlaced(room, asked('metric', { ownKg: 760 })), METRIC)).toContain('These goods weigh 760 kg, which would not do.');
});

test('where there is no room it is said why', () => {
  const none = { kind: 'none', already: true, because: stop } as const;
  expect(words(roomForGoods(none, 0, 0, asked('metric')), METRIC)).toBe('Nothing may be added here: beam bending is over already.');
  expect(words(roomForGoods({ ...none, already: false }, 0, 0, asked('metric', { palletKg: 25 })), METRIC)).toBe(
    'Nothing may be added here, not even the empty pallet of 25 kg. Too much.',
  );
  expect(words(roomForPlaced({ kind: 'no-fit', because: [stop] }, asked('metric')), METRIC)).toContain(
    'does not fit here, whatever it weighs. Too',
  );
  expect(words(roomForGoods({ kind: 'unlimited' }, 0, 0, asked('metric')), METRIC)).toContain('left out');
});

test('what is not known is named, the first three of many', () => {
  const missing = ['a', 'b', 'c', 'd', 'e'].map((input) => ({ input, how: '', field: input }));
  const said = (count: number) =>
    words(roomForGoods({ kind: 'not-assessable', missing: missing.slice(0, count), because: [] }, 0, 0, asked('metric')), METRIC);
  expect(said(2)).toContain('not assessable. Not known: a and b.');
  expect(said(5)).toContain('Not known: a, b, c and 2 more.');
});

test('frames and the goods of the level below are named as what stops it', () => {
  const [frame] = run.frames;
  const at = (check: typeof stop.check, place: object) =>
    stopOf(finding({ check, place: { runId: 'run', ...place }, verdict: 'over', says: () => say`` }), site);
  expect(at('frame-storey', { frameId: frame?.id })).toBe('upright frame A-F1');
  expect(at('leg-load', { frameId: frame?.id })).toBe('leg load at frame A-F1');
  expect(at('clearance-above', { levelId: 'level' })).toBe('clearance above the goods of level 1');
  expect(at('bay-total', { bayId: 'bay' })).toBe('the rated bay load');
});

test('the widest free stretch is named by where it lies, less its clearances for the load on it', () => {
  // 2 700 mm clear, 800 mm of goods at 75 mm, 75 mm to uprights and between goods (facts F-62)
  const free = widestFree(site, 'level');
  expect(free).toEqual({ gap: { from: 875, to: 2700 }, usable: { from: 950, to: 2625 }, at: 'right' });
  if (free === null) return;
  expect(words(roomForEven(roomOf(720.5), free, asked('metric')), METRIC)).toBe(
    'Free: 1 825 mm at the right; up to 720 kg evenly spread there. Beam bending stops it. Above 90 % of a rating it counts as close.',
  );
  const even = withEvenLoad(site, 'level', free.usable);
  expect(even.runs[0]?.bays[0]?.levels[0]?.placements).toHaveLength(2);
  expect(site.runs[0]?.bays[0]?.levels[0]?.placements).toHaveLength(1);
});

test('an empty level is free from upright to upright, a full one not at all', () => {
  const one = (goods: Parameters<typeof makeLevel>[0]) =>
    makeSite({ unitLoads: [flour], runs: [makeRun([makeBay([makeLevel(goods, { id: 'level' })])])] });
  expect(widestFree(one([]), 'level')).toMatchObject({ gap: { from: 0, to: 2700 }, at: 'whole' });
  const full = [75, 950, 1825].map((at) => [flour, at] as const);
  expect(widestFree(one(full), 'level')).toBeNull();
});
