import { expect, test } from 'vitest';
import { attachPhoto, finishBay, markLock, recordDamage, recordPlumb, recordSag, seeNotice, sign } from '../../../src-core/visit/edits';
import { readVisit, writeVisit } from '../../../src-core/visit/read-visit';
import type { Visit } from '../../../src-core/visit/visit';
import { bend, round } from './make-visit';

function full(): Visit {
  const by = { person: 'R. Walker', date: '2026-06-02' };
  let visit = recordDamage(round, 'bay1', bend());
  visit = recordDamage(visit, 'bay1', {
    id: 'd2',
    on: 'beam',
    levelId: 'level1',
    beam: 'rear',
    member: 'connector',
    torn: true,
    note: 'weld',
    found: '2026-06-02',
  });
  visit = markLock(visit, 'bay1', { levelId: 'level1', beam: 'front', end: 'left' }, true);
  visit = recordSag(visit, 'bay1', { levelId: 'level1', beam: 'front', loadedMm: 17, unloadedMm: 4, sidewaysMm: null });
  visit = recordPlumb(visit, 'bay1', { frameId: 'frame1', alongMm: -4, acrossMm: 0, heightMm: 4500, loaded: true });
  visit = attachPhoto(visit, 'bay1', { id: 'p1', file: 'p1.jpg', original: 'IMG 1.JPG', taken: '', note: 'front left' });
  visit = seeNotice(visit, 'bay1', { there: 'no' });
  visit = finishBay(finishBay(visit, 'bay1', by), 'bay2', by);
  return sign(visit, { person: 'R. Walker', role: '', date: '2026-06-02' });
}

test.each([
  ['new', round],
  ['full and signed', full()],
])('a %s visit comes back as it was written, byte for byte', (_, visit) => {
  const text = writeVisit(visit);
  const reading = readVisit(JSON.parse(text));
  if (!reading.ok) throw new Error(JSON.stringify(reading.problems));
  expect(reading.document).toEqual(visit);
  expect(writeVisit(reading.document)).toBe(text);
});

/** A copy with one thing changed at a path. */
function damaged(path: readonly (string | number)[], value: unknown): unknown {
  const json = JSON.parse(writeVisit(full()));
  let at = json;
  for (const step of path.slice(0, -1)) at = at[step];
  const last = path.at(-1) ?? '';
  if (value === undefined) delete at[last];
  else at[last] = value;
  return json;
}

test.each([
  [['version'], 3, 'version', 'newer program'],
  [['version'], 0, 'version', 'from 2 to 2'],
  [['name'], ' ', 'name', 'visible'],
  [['kind'], 'monthly', 'kind', '"weekly"'],
  [['started'], '2026-02-30', 'started', 'YYYY-MM-DD'],
  [['bays', 0, 'checklist', 'locks'], 'maybe', 'bays[0].checklist.locks', '"not-looked-at"'],
  [['bays', 0, 'checklist', 'floor'], undefined, 'bays[0].checklist.floor', 'missing'],
  [['bays', 0, 'damages', 0, 'on'], 'floor', 'bays[0].damages[0].on', '"frame" or "beam"'],
  [['bays', 0, 'damages', 0, 'alongMm'], -1, 'bays[0].damages[0].alongMm', 'from 0'],
  [['bays', 0, 'damages', 0, 'alongMm'], '8', 'bays[0].damages[0].alongMm', 'without quotation marks'],
  [['bays', 0, 'damages', 0, 'gaugeMm'], 0, 'bays[0].damages[0].gaugeMm', 'above 0'],
  [['bays', 0, 'damages', 1, 'id'], 'd1', 'bays[0].damages[1].id', 'bays[0].damages[0].id'],
  [['bays', 0, 'damages', 1, 'extra'], 1, 'bays[0].damages[1].extra', 'Remove it'],
  [['bays', 0, 'photos', 0, 'file'], '', 'bays[0].photos[0].file', 'visible'],
  [['bays', 1, 'bayId'], 'bay1', 'bays[1].bayId', 'twice'],
  [['bays', 1, 'runId'], '../etc', 'bays[1].runId', 'id of a run'],
  [['signed', 'person'], '', 'signed.person', 'visible'],
] as const)('%j as %j is told with its place', (path, value, place, words) => {
  const reading = readVisit(damaged(path, value));
  if (reading.ok) throw new Error('it was taken');
  expect(reading.problems.map((one) => one.path)).toContain(place);
  expect(reading.problems.find((one) => one.path === place)?.message).toContain(words);
});

test.each([null, 7, 'visit', [], {}])('%j is no visit', (json) => {
  expect(readVisit(json).ok).toBe(false);
});
