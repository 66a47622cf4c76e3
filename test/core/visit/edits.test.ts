import { expect, test } from 'vitest';
import {
  addBay,
  answer,
  attachPhoto,
  bayOf,
  finishBay,
  leaveOutBay,
  markLock,
  note,
  recordDamage,
  recordPlumb,
  recordSag,
  removeDamage,
  removePhoto,
  removePlumb,
  restInOrder,
  resumeBay,
  seeNotice,
  sign,
  unfinishedBays,
} from '../../../src-core/visit/edits';
import { CHECKLIST } from '../../../src-core/visit/visit';
import { bend, round } from './make-visit';

const by = { person: 'R. Walker', date: '2026-06-02' };
const signature = { person: 'R. Walker', role: 'shift lead', date: '2026-06-02' };

test('a new visit has looked at nothing', () => {
  for (const bay of round.bays) {
    expect(CHECKLIST.map((item) => bay.checklist[item])).toEqual(CHECKLIST.map(() => 'not-looked-at'));
    expect(bay.finished).toBe(false);
  }
});

test('an answer changes its bay only, and the old visit not at all', () => {
  const after = answer(round, 'bay1', 'anchors', 'no');
  expect(bayOf(after, 'bay1').checklist.anchors).toBe('no');
  expect(bayOf(after, 'bay2')).toBe(bayOf(round, 'bay2'));
  expect(bayOf(round, 'bay1').checklist.anchors).toBe('not-looked-at');
});

test('“all the rest in order” leaves given answers alone', () => {
  const { checklist } = bayOf(restInOrder(answer(round, 'bay1', 'floor', 'no'), 'bay1'), 'bay1');
  expect(checklist).toMatchObject({ locks: 'yes', anchors: 'yes', plumb: 'yes', floor: 'no' });
});

test('a missing lock answers the question about locks, and is counted once', () => {
  const lock = { levelId: 'level1', beam: 'front', end: 'left' } as const;
  const once = markLock(round, 'bay1', lock, true);
  expect(bayOf(once, 'bay1').checklist.locks).toBe('no');
  expect(bayOf(markLock(once, 'bay1', { ...lock }, true), 'bay1').missingLocks).toHaveLength(1);
  expect(bayOf(markLock(once, 'bay1', lock, false), 'bay1').missingLocks).toEqual([]);
});

test('recording a damage again replaces it', () => {
  const twice = recordDamage(recordDamage(round, 'bay1', bend()), 'bay1', bend({ alongMm: 6 }));
  expect(bayOf(twice, 'bay1').damages).toEqual([bend({ alongMm: 6 })]);
  expect(bayOf(removeDamage(twice, 'bay1', 'd1'), 'bay1').damages).toEqual([]);
});

test('a beam has one sag reading; without any figure it goes', () => {
  const reading = { levelId: 'level1', beam: 'front', loadedMm: 17, unloadedMm: null, sidewaysMm: null } as const;
  const loaded = recordSag(round, 'bay1', reading);
  const both = recordSag(loaded, 'bay1', { ...reading, unloadedMm: 4 });
  expect(bayOf(both, 'bay1').sags).toEqual([{ ...reading, unloadedMm: 4 }]);
  expect(bayOf(recordSag(both, 'bay1', { ...reading, loadedMm: null }), 'bay1').sags).toEqual([]);
});

test('notice, plumb, photos and notes are kept with the bay', () => {
  const plumb = { frameId: 'frame1', alongMm: 12, acrossMm: -3, heightMm: 4500, loaded: true };
  const photo = { id: 'p1', file: 'p1.jpg', original: 'IMG_0012.JPG', taken: '2026-06-02T09:14:00', note: '' };
  let visit = seeNotice(round, 'bay1', { there: 'yes', firstBeamMm: 1500 });
  visit = recordPlumb(recordPlumb(visit, 'bay1', { ...plumb, alongMm: 9 }), 'bay1', plumb);
  visit = note(attachPhoto(visit, 'bay1', photo), 'bay1', 'Aisle blocked on arrival.');
  expect(bayOf(visit, 'bay1')).toMatchObject({
    notice: { there: 'yes', matches: 'not-looked-at', firstBeamMm: 1500 },
    plumb: [plumb],
    photos: [photo],
    notes: 'Aisle blocked on arrival.',
  });
  expect(bayOf(removePlumb(removePhoto(visit, 'bay1', 'p1'), 'bay1', 'frame1'), 'bay1')).toMatchObject({ plumb: [], photos: [] });
});

test('a finished bay is taken up again before it changes', () => {
  const finished = finishBay(round, 'bay1', by);
  expect(bayOf(finished, 'bay1')).toMatchObject({ finished: true, ...by });
  expect(unfinishedBays(finished).map(({ bayId }) => bayId)).toEqual(['bay2']);
  expect(() => note(finished, 'bay1', 'later')).toThrow('"bay1"');
  expect(bayOf(note(resumeBay(finished, 'bay1'), 'bay1', 'later'), 'bay1').notes).toBe('later');
});

test('a visit is signed only when every bay is finished, and is closed from then on', () => {
  const one = finishBay(round, 'bay1', by);
  expect(() => sign(one, signature)).toThrow('"bay2"');
  const signed = sign(finishBay(one, 'bay2', by), signature);
  expect(signed.signed).toEqual(signature);
  for (const change of [
    () => resumeBay(signed, 'bay1'),
    () => note(signed, 'bay1', 'x'),
    () => addBay(signed, 'run1', 'bay3'),
    () => sign(signed, signature),
    () => leaveOutBay(signed, 'bay1'),
  ])
    expect(change).toThrow('2026-06-02');
  expect(() => sign({ ...round, bays: [] }, signature)).toThrow('no bay');
});

test('bays are added once and left out by name', () => {
  const more = addBay(round, 'run1', 'bay3');
  expect(more.bays.map(({ bayId }) => bayId)).toEqual(['bay1', 'bay2', 'bay3']);
  expect(() => addBay(more, 'run1', 'bay3')).toThrow('"bay3"');
  expect(leaveOutBay(more, 'bay2').bays.map(({ bayId }) => bayId)).toEqual(['bay1', 'bay3']);
  expect(() => leaveOutBay(round, 'nowhere')).toThrow('"nowhere"');
});
