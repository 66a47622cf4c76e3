import { expect, test } from 'vitest';
import { noticeMatch, type NoticeAsRead, type StandingLevel } from '../../../src-core/checks/notice-match';
import { siteFlags, type SiteFlagsInput } from '../../../src-core/checks/site-flags';
import { plain } from '../plain';

const place = { runId: 'r', bayId: 'b' };
const type = { id: 'beam', name: 'B 120' };
const level = (number: number, height: number, part: Partial<StandingLevel> = {}): StandingLevel => ({
  name: `level ${number}`,
  height,
  beamType: type,
  locks: 'yes',
  unitLoads: 3,
  field: `level:l${number}:`,
  ...part,
});
const NOTICE: NoticeAsRead = {
  from: 'load notice LN-1',
  firstBeam: 1500,
  greatestGap: 1500,
  levels: 2,
  unitLoadsPerLevel: 3,
  beamType: type,
  field: 'notice:n:',
};
const noticeMissing = { input: 'load notice of bay A1', how: 'Read it.', field: 'bay:b:noticeId' };
const match = (levels: readonly StandingLevel[], notice: Partial<NoticeAsRead> | null = {}) =>
  noticeMatch({ place, bay: 'Bay A1', levels, notice: notice === null ? null : { ...NOTICE, ...notice }, noticeMissing });

test('a bay that stands as on its notice is within, lower beams and narrower gaps too', () => {
  expect(match([level(1, 1500), level(2, 3000)]).verdict).toBe('within');
  expect(match([level(1, 1400), level(2, 2800)]).verdict).toBe('within');
});

test.each<[string, readonly StandingLevel[], string, string]>([
  [
    'a first beam too high',
    [level(1, 1600), level(2, 3000)],
    'level:l1:heightMm',
    'Its first beam stands at 1600 mm, and the notice shows 1500 mm',
  ],
  ['a gap too wide', [level(1, 1400), level(2, 3000)], 'level:l2:heightMm', 'From level 1 to level 2 there are 1600 mm'],
  [
    'another beam',
    [level(1, 1500), level(2, 3000, { beamType: { id: 'other', name: 'B 100' } })],
    'level:l2:beamTypeId',
    'are B 100, and the notice is for B 120',
  ],
  ['a missing lock', [level(1, 1500, { locks: 'no' }), level(2, 3000)], 'level:l1:locks', 'Locks are missing on level 1'],
  [
    'too many unit loads',
    [level(1, 1500, { unitLoads: 4 }), level(2, 3000)],
    'notice:n:unitLoadsPerLevel',
    '4 unit loads stand on level 1',
  ],
  [
    'a level more',
    [level(1, 1000), level(2, 2000), level(3, 3000)],
    'notice:n:levels',
    'It has 3 beam levels, and the notice shows 2: take the added ones out',
  ],
  ['a level less', [level(1, 1500)], 'notice:n:levels', 'put the missing ones back'],
])('%s is not assessable and says what to do', (_, levels, field, words) => {
  const found = match(levels);
  expect(found.verdict).toBe('not-assessable');
  expect(found.missing.map((one) => one.field)).toEqual([field]);
  expect(found.missing[0]?.how.length).toBeGreaterThan(20);
  expect(plain(found.says)).toContain(words);
});

test.each<[string, Partial<NoticeAsRead> | null, readonly StandingLevel[], string]>([
  ['the notice', null, [level(1, 1500)], 'bay:b:noticeId'],
  ['its first beam', { firstBeam: null }, [level(1, 1500), level(2, 3000)], 'notice:n:firstBeamMm'],
  ['its greatest gap', { greatestGap: null }, [level(1, 1500), level(2, 3000)], 'notice:n:greatestGapMm'],
  ['its number of levels', { levels: null }, [level(1, 1500), level(2, 3000)], 'notice:n:levels'],
  ['its number of unit loads', { unitLoadsPerLevel: null }, [level(1, 1500), level(2, 3000)], 'notice:n:unitLoadsPerLevel'],
  ['its beam type', { beamType: null }, [level(1, 1500), level(2, 3000)], 'notice:n:beamTypeId'],
  ['a beam type', {}, [level(1, 1500, { beamType: null }), level(2, 3000)], 'level:l1:beamTypeId'],
  ['whether locks are there', {}, [level(1, 1500), level(2, 3000, { locks: 'unknown' })], 'level:l2:locks'],
])('without %s it is not assessable', (_, notice, levels, field) => {
  const found = match(levels, notice);
  expect(found.verdict).toBe('not-assessable');
  expect(found.missing.map((one) => one.field)).toEqual([field]);
});

test('every departure is told at once', () => {
  const found = match([level(1, 1600, { locks: 'no' }), level(2, 3200)]);
  expect(found.missing.map(({ field }) => field)).toEqual(['level:l1:heightMm', 'level:l1:locks', 'level:l2:heightMm']);
});

const flags = (part: Partial<SiteFlagsInput> = {}) =>
  siteFlags({
    place,
    bay: 'bay A1',
    seismic: 'no',
    outdoors: 'no',
    siteField: 'site:s:',
    twoDeep: 'no',
    runField: 'run:r:',
    frames: [
      { name: 'frame F1', anchored: 'yes', field: 'frame:f1:' },
      { name: 'frame F2', anchored: 'yes', field: 'frame:f2:' },
    ],
    parts: [{ name: 'load notice LN-1', maker: 'Invented Storage Works', sourceKnown: true, field: 'notice:n:' }],
    ...part,
  });

test('a bay without open flags is within', () => {
  expect(flags().map(({ verdict }) => verdict)).toEqual(['within']);
});

test.each<[string, Partial<SiteFlagsInput>, string]>([
  ['an earthquake region', { seismic: 'yes' }, 'site:s:seismic'],
  ['an unknown region', { seismic: 'unknown' }, 'site:s:seismic'],
  ['a rack outdoors', { outdoors: 'yes' }, 'site:s:outdoors'],
  ['a rack perhaps outdoors', { outdoors: 'unknown' }, 'site:s:outdoors'],
  ['goods two deep', { twoDeep: 'yes' }, 'run:r:twoDeep'],
  ['goods perhaps two deep', { twoDeep: 'unknown' }, 'run:r:twoDeep'],
  ['an unanchored frame', { frames: [{ name: 'frame F1', anchored: 'no', field: 'frame:f1:' }] }, 'frame:f1:anchored'],
  ['a frame perhaps unanchored', { frames: [{ name: 'frame F1', anchored: 'unknown', field: 'frame:f1:' }] }, 'frame:f1:anchored'],
  ['an unknown maker', { parts: [{ name: 'beam type B', maker: ' ', sourceKnown: true, field: 'beamType:b:' }] }, 'beamType:b:maker'],
  [
    'a rating without an origin',
    { parts: [{ name: 'beam type B', maker: 'M', sourceKnown: false, field: 'beamType:b:' }] },
    'beamType:b:source',
  ],
])('%s stops a pass', (_, part, field) => {
  const found = flags(part);
  expect(found.map(({ verdict }) => verdict)).toEqual(['not-assessable']);
  expect(found[0]?.missing.map((one) => one.field)).toEqual([field]);
  expect(found[0]?.missing[0]?.how.length).toBeGreaterThan(20);
});

test.each(['', ' ', 'unknown', 'Not known', '?', '-'])('a maker entered as "%s" is no maker', (maker) => {
  expect(flags({ parts: [{ name: 'beam type B', maker, sourceKnown: true, field: 'beamType:b:' }] })[0]?.verdict).toBe('not-assessable');
});

test('each flag is a finding of its own', () => {
  expect(flags({ seismic: 'yes', outdoors: 'yes', twoDeep: 'unknown' })).toHaveLength(3);
});
