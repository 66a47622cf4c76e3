import { expect, test } from 'vitest';
import { resolveRules } from '../../../src-core/checks/rule-sets';
import { tipping, type TippingGoods } from '../../../src-core/checks/tipping';
import { plain } from '../plain';
import { expectWorked } from '../worked';

const missing = [{ input: 'type of frame A', how: 'Choose it.', field: 'frame:a:typeId' }];
const check = (beamDistance: number | null, ...goods: TippingGoods[]) =>
  tipping({
    place: { runId: 'r' },
    goods,
    beamDistance,
    beamDistanceFrom: 'frame depth',
    missing,
    rules: resolveRules({ set: 'european', changed: [] }),
  });
const at = (centre: number, frontShare: number | null): TippingGoods => ({ placementId: 'p', name: 'Press', centre, frontShare });

test('a centre of mass 100 mm in front of the middle of beams 1 000 mm apart puts 60 % on the front one', () => {
  // 1/2 + 100/1000 = 0.6, moments about the rear beam
  const [found] = check(1000, at(100, 0.6));
  expect(found?.verdict).toBe('within');
  expect(found && plain(found.says)).toContain('60 % of its mass on the front beam');
  expect(found?.notes).toHaveLength(1);
  if (found) expectWorked(found);
});

test('a share of 55 % is not yet pointed out', () => {
  expect(check(1000, at(50, 0.55))[0]?.notes).toEqual([]);
});

test.each([
  [600, 1.1, 'front', 'Press would tip: its centre of mass lies 100 mm beyond the middle of the front beam. Move it to the rear.'],
  [-520, -0.02, 'rear', 'Press would tip: its centre of mass lies 20 mm beyond the middle of the rear beam. Move it to the front.'],
])('a centre of mass at %d mm tips', (centre, share, beam, sentence) => {
  const [found] = check(1000, at(centre, share));
  expect(found?.verdict).toBe('not-possible');
  expect(found?.place.beam).toBe(beam);
  expect(found && plain(found.says)).toBe(sentence);
});

test('goods balanced exactly over one beam do not tip', () => {
  expect(check(1000, at(500, 1))[0]?.verdict).toBe('within');
});

test('an eccentric load without a frame type is not assessable and names the frame', () => {
  const [found] = check(null, at(100, null));
  expect(found?.verdict).toBe('not-assessable');
  expect(found?.missing).toEqual(missing);
});
