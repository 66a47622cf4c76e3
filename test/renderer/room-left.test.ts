import { afterEach, expect, test, vi } from 'vitest';
import { formatText } from '../../src-core/units/format';
import { inSlices, roomSaid, type RoomQuestion } from '../../src-renderer/editing/room-left';
import { completeSite, TODAY } from '../core/audit/complete-site';
import type { Site } from '../../src-core/site/site';

afterEach(() => vi.useRealTimers());

const putting = { pushing: false, reading: { units: 'metric', locale: 'en-GB' }, roomFor: (site: Site) => site } as const;

function said(question: RoomQuestion, site: Site): string {
  const steps = roomSaid(question, site, TODAY);
  for (;;) {
    const { done, value } = steps.next();
    if (done)
      return value('metric')
        .map((text) => formatText(text, putting.reading))
        .join(' ')
        .replaceAll(/[\u00a0\u202f]/g, ' ');
  }
}

const site = completeSite();
const unitLoad = (id: string) => {
  const found = site.unitLoads.find((one) => one.id === id);
  if (found === undefined) throw new Error(id);
  return found;
};
/** Flour lies at 150 and a reel at 1 600 on the lower level of bay A1; between them are 650 mm, on the upper one as well. */
const lower = { bayId: 'A1', levelId: 'A1-lower', putting } as const;

test('goods that find no place are told how many millimetres are missing', () => {
  expect(said({ of: 'goods', unitLoad: unitLoad('flour'), ...lower }, site)).toContain(
    'There is no free place 800 mm wide on bay A1, level 1: the widest gap there is 650 mm, 150 mm too little.',
  );
});

test('goods that find a place are told what they may weigh at it, and nothing is put on', () => {
  const narrow = { ...unitLoad('flour'), id: 'narrow', widthMm: 400, palletId: null };
  const answer = said({ of: 'goods', unitLoad: narrow, ...lower }, site);
  expect(answer).toMatch(/^Room for up to \d+ kg of this shape at 1 025 mm; .+ stops it\. /);
  expect(site.unitLoads.some(({ id }) => id === 'narrow')).toBe(false);
});

test('goods are counted as often as they find a place and everything is met', () => {
  // Free with gaps of 75 mm are 500 mm between flour and reel, for two of 150 mm, and 150 mm beside the right upright
  const thin = { ...unitLoad('crate'), id: 'thin', widthMm: 150, goodsKg: 20 };
  const pushed = { of: 'goods', unitLoad: thin, bayId: 'A1', levelId: 'A1-lower', putting } as const;
  // The notice is made for three unit loads a level, of which two stand there
  expect(said(pushed, site)).toContain('These goods weigh 20 kg and may be put here.');
  const many = { ...site, notices: site.notices.map((one) => ({ ...one, unitLoadsPerLevel: 9 })) };
  expect(said(pushed, many)).toContain('Of these goods, 20 kg each, 3 may be put here.');
});

test('goods that stand there are told what they may weigh where they are', () => {
  const placementId = site.runs[0]?.bays[0]?.levels[0]?.placements[0]?.id ?? '';
  // The notice allows unit loads of 900 kg, and panels of 600 kg come before it
  expect(said({ of: 'placed', placementId }, site)).toMatch(/^Up to \d+ kg of this shape may stand here; .+ stops it\. /);
  expect(said({ of: 'placed', placementId: 'gone' }, site)).toBe('');
});

test('a level with no goods in mind tells its free stretch', () => {
  expect(said({ of: 'even', levelId: 'A1-lower' }, site)).toMatch(
    /^Free: 650 mm between the goods; up to \d+ kg evenly spread there\. .+ stops it\. /,
  );
});

test('a level that is full says that nothing is free along it', () => {
  const wide = { ...site, unitLoads: site.unitLoads.map((one) => ({ ...one, widthMm: one.id === 'flour' ? 1400 : 1000 })) };
  expect(said({ of: 'even', levelId: 'A1-lower' }, wide)).toBe('Nothing is free along this level.');
});

test('work rests first, goes on in slices, and is dropped when it is out of date', () => {
  vi.useFakeTimers();
  let steps = 0;
  const answers: string[] = [];
  function* slow(): Generator<undefined, string> {
    for (; steps < 50; steps += 1) {
      vi.setSystemTime(Date.now() + 3);
      yield;
    }
    return 'done';
  }
  vi.spyOn(performance, 'now').mockImplementation(() => Date.now());
  const drop = inSlices(slow, (answer) => answers.push(answer), 200);
  vi.advanceTimersByTime(199);
  expect(steps).toBe(0);
  vi.advanceTimersByTime(2);
  expect(steps).toBeGreaterThan(0);
  expect(steps).toBeLessThan(10);
  drop();
  vi.advanceTimersByTime(10_000);
  expect(answers).toEqual([]);
  inSlices(slow, (answer) => answers.push(answer), 0);
  vi.advanceTimersByTime(10_000);
  expect(answers).toEqual(['done']);
  vi.restoreAllMocks();
});
