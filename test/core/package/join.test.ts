import { describe, expect, test } from 'vitest';
import { joinFollowUps, joinVisits, withPhotoNames } from '../../../src-core/package/join';
import { closeAction, newFollowUp, recordReduction, setResponsible, setRhythm, type FollowUp } from '../../../src-core/visit/follow-up';
import { readVisit, writeVisit } from '../../../src-core/visit/read-visit';
import { note } from '../../../src-core/visit/edits';
import type { Visit } from '../../../src-core/visit/visit';
import { round } from '../visit/make-visit';

const here = (...visits: readonly Visit[]) => new Map(visits.map((visit) => [visit.id, writeVisit(visit)]));
const copyId = (visit: Visit, attempt: number) => `${visit.id}-copy${attempt}`;

describe('visits', () => {
  const changed = note(round, 'bay1', 'seen on the laptop');

  test('one that is unknown here is added, the same is here already', () => {
    expect(joinVisits(here(), [round], 'keep-both', writeVisit, copyId)).toEqual([{ kind: 'add', visit: round }]);
    expect(joinVisits(here(round), [round], 'take-theirs', writeVisit, copyId)).toEqual([{ kind: 'here', visit: round }]);
  });

  test('one in another state stands beside the one here under a name of its own, once however often it comes', () => {
    const [step] = joinVisits(here(round), [changed], 'keep-both', writeVisit, copyId);
    expect(step).toMatchObject({ kind: 'beside', of: 'v1', visit: { id: 'v1-copy0', name: 'Week 23, aisle 4 (brought in)' } });
    const copy = step?.visit ?? round;
    expect(readVisit(JSON.parse(writeVisit(copy))).ok).toBe(true);
    expect(joinVisits(here(round, copy), [changed], 'keep-both', writeVisit, copyId)).toEqual([{ kind: 'here', visit: copy }]);
    // The copy was worked on here meanwhile: it is not touched either.
    const worked = note(copy, 'bay2', 'more');
    expect(joinVisits(here(round, worked), [changed], 'keep-both', writeVisit, copyId)).toMatchObject([
      { kind: 'beside', visit: { id: 'v1-copy1' } },
    ]);
  });

  test('or it takes the place of the one here, where that is chosen', () => {
    expect(joinVisits(here(round), [changed], 'take-theirs', writeVisit, copyId)).toEqual([{ kind: 'replace', visit: changed }]);
  });

  test('a name of the greatest length can be told apart too', () => {
    const long = { ...round, name: 'x'.repeat(200) };
    const [step] = joinVisits(here(long), [{ ...changed, name: long.name }], 'keep-both', writeVisit, copyId);
    expect(step?.visit.name).toMatch(/^x+ \(brought in\)$/);
    expect(() => writeVisit(step?.visit ?? round)).not.toThrow();
    // Cut in the middle of a letter that takes two code units.
    const wide = { ...round, name: '🏗'.repeat(100) };
    const [cut] = joinVisits(here(wide), [{ ...changed, name: wide.name }], 'keep-both', writeVisit, copyId);
    expect(cut?.visit.name).toMatch(/^🏗+ \(brought in\)$/u);
  });

  test('photos under other names are found again', () => {
    const photo = { id: 'p', file: 'p.jpg', original: '', taken: '', note: '' };
    const visit = { ...round, bays: round.bays.map((bay) => ({ ...bay, photos: [photo] })) };
    expect(withPhotoNames(visit, new Map([['p.jpg', 'q.jpg']])).bays[1]?.photos[0]?.file).toBe('q.jpg');
    expect(withPhotoNames(visit, new Map([['other.jpg', 'q.jpg']]))).toBe(visit);
  });
});

describe('follow-up', () => {
  const empty = newFollowUp('s1');
  const closed = (id: string, person: string) => (book: FollowUp) =>
    closeAction(book, { actionId: id, date: '2026-06-02', person, how: 'replaced' });
  const reduced = (id: string, says: string) => (book: FollowUp) =>
    recordReduction(book, { id, frameId: 'f', says, engineer: 'E.', until: '2026-09-01', recordedBy: '', recordedOn: '' });

  test('closed actions and reduced loads of both are kept, each once', () => {
    const ours = reduced('r1', '500 kg')(closed('a', 'A.')(empty));
    const theirs = reduced('r2', '400 kg')(closed('b', 'B.')(closed('a', 'A.')(empty)));
    const { book, leftOut } = joinFollowUps(ours, theirs);
    expect(book.closings.map(({ actionId }) => actionId)).toEqual(['a', 'b']);
    expect(book.reductions.map(({ id }) => id)).toEqual(['r1', 'r2']);
    expect(leftOut).toEqual([]);
  });

  test('where the two say different things of one, ours stays and every difference is told', () => {
    const rhythm = { visitDays: 14, inspectionMonths: 12, reason: 'risk assessment' };
    const ours = setResponsible(reduced('r', '500 kg')(closed('a', 'A.')(empty)), 'O. Ours');
    const theirs = setRhythm(setResponsible(reduced('r', '400 kg')(closed('a', 'B.')(empty)), 'T. Theirs'), rhythm);
    const { book, leftOut } = joinFollowUps(ours, theirs);
    expect(book).toEqual(ours);
    expect(leftOut).toHaveLength(4);
    expect(leftOut.join('; ')).toMatch(/here by A\. and there by B\..*E\. reads otherwise.*rhythm.*T\. Theirs/);
    expect(joinFollowUps(empty, theirs).book.responsible).toBe('T. Theirs');
  });
});
