import { expect, test } from 'vitest';
import { auditSite } from '../../../src-core/audit/audit';
import { editFrame } from '../../../src-core/site/edits';
import type { Site } from '../../../src-core/site/site';
import { actionsOf } from '../../../src-core/visit/actions';
import { finishBay, sign } from '../../../src-core/visit/edits';
import {
  closeAction,
  newFollowUp,
  readFollowUp,
  recordReduction,
  setResponsible,
  setRhythm,
  writeFollowUp,
  type FollowUp,
} from '../../../src-core/visit/follow-up';
import { repaired } from '../../../src-core/visit/repair';
import { duesOf, todayList } from '../../../src-core/visit/rounds';
import { startVisit, type Visit, type VisitKind } from '../../../src-core/visit/visit';
import { siteOf } from './make-run';
import { bend } from './make-visit';

function visitOf(kind: VisitKind, date: string, finished: readonly number[], all: readonly number[] = finished): Visit {
  const bays = all.map((n) => ({ runId: 'run-A', bayId: `A-bay-${n}` }));
  const visit = startVisit({ id: `${kind}-${date}`, siteId: 'site', name: kind, kind, person: 'R. W.', started: date, bays });
  const walked = finished.reduce((one, n) => finishBay(one, `A-bay-${n}`, { person: 'R. W.', date }), visit);
  return finished.length === all.length ? sign(walked, { person: 'R. W.', role: '', date }) : walked;
}

const book = newFollowUp('site');

test('a bay is due a week after its last visit and twelve months after its last inspection', () => {
  const dues = duesOf(siteOf(), [visitOf('yearly', '2026-01-31', [1]), visitOf('weekly', '2026-06-02', [1, 2], [1, 2, 3])], book);
  expect(dues.map(({ visited, nextVisit, inspected, nextInspection }) => [visited, nextVisit, inspected, nextInspection])).toEqual([
    ['2026-06-02', '2026-06-09', '2026-01-31', '2027-01-31'],
    ['2026-06-02', '2026-06-09', null, null],
    [null, null, null, null],
  ]);
});

test('an inspection counts as a visit; the later day counts, whatever the order of the visits', () => {
  const [due] = duesOf(
    siteOf(),
    [visitOf('weekly', '2026-06-09', [1]), visitOf('yearly', '2026-06-16', [1]), visitOf('event', '2026-06-12', [1])],
    book,
  );
  expect(due).toMatchObject({ visited: '2026-06-16', nextVisit: '2026-06-23', nextInspection: '2027-06-16' });
});

test('another rhythm needs its reason', () => {
  const fortnight = setRhythm(book, { visitDays: 14, inspectionMonths: 6, reason: 'risk assessment RA-7' });
  expect(duesOf(siteOf(), [visitOf('yearly', '2026-06-02', [1])], fortnight)[0]).toMatchObject({
    nextVisit: '2026-06-16',
    nextInspection: '2026-12-02',
  });
  expect(() => setRhythm(book, { visitDays: 14, inspectionMonths: 12, reason: ' ' })).toThrow('reason');
  expect(() => setRhythm(book, { visitDays: 0, inspectionMonths: 12, reason: 'x' })).toThrow('got 0');
});

const today = (site: Site, visits: readonly Visit[], day: string, followUp: FollowUp = book) =>
  todayList(site, visits, followUp, actionsOf({ site, audit: auditSite(site, day), visits, followUp, today: day }), day);

test('the list for today: what is urgent, what is due, what to resume, where to walk', () => {
  const { frameId: _, on: __, ...amber } = bend({ alongMm: 8, acrossMm: 0 });
  let site = editFrame(siteOf(), 'A-frame-1', { damages: [amber] });
  site = editFrame(site, 'A-frame-4', { damages: [{ ...amber, id: 'd2', torn: true }] });
  const visits = [visitOf('yearly', '2026-01-05', [1, 2, 3]), visitOf('weekly', '2026-06-24', [1, 2], [1, 2, 3])];
  const list = today(site, visits, '2026-06-30');
  expect(list.map((item) => item.kind)).toEqual(['action', 'action', 'resume', 'visit']);
  // Torn since 2 June; amber since 2 June, whose last day is today.
  expect(list[0]).toMatchObject({ action: { id: 'damage:d2', kind: 'unload' } });
  expect(list[1]).toMatchObject({ action: { id: 'damage:d1', kind: 'do-not-reload' }, daysLate: 0 });
  expect(list[2]).toMatchObject({ unfinished: 1, daysLate: 6 });
  // Bay 3 was last seen in January; bays 1 and 2 are due tomorrow.
  expect(list[3]).toMatchObject({ bays: [{ name: 'A3' }], daysLate: 169 });
  expect(today(site, visits, '2026-06-29').map((item) => item.kind)).toEqual(['action', 'resume', 'visit']);
});

test('bays that were never seen are due now, in one walk a run', () => {
  const list = today(siteOf(), [], '2026-06-02');
  expect(list).toMatchObject([
    { kind: 'inspection', daysLate: null, run: { name: 'A' } },
    { kind: 'visit', daysLate: null },
  ]);
  expect(list[0]?.kind === 'inspection' && list[0].bays.length).toBe(3);
});

test('a visit that is walked but not signed waits for its signature', () => {
  const visit = { ...visitOf('yearly', '2026-06-02', [1, 2, 3]), signed: null };
  expect(today(siteOf(), [visit], '2026-06-03')).toMatchObject([{ kind: 'resume', unfinished: 0 }]);
});

test('closed actions are not on the list', () => {
  const { frameId: _, on: __, ...torn } = bend({ torn: true });
  const site = editFrame(siteOf(), 'A-frame-1', { damages: [torn] });
  const visits = [visitOf('yearly', '2026-06-02', [1, 2, 3])];
  expect(today(site, visits, '2026-06-03')).toHaveLength(1);
  const closed = closeAction(book, { actionId: 'damage:d1', date: '2026-06-03', person: 'F. Fitter', how: 'Upright replaced' });
  expect(today(repaired(site, 'd1'), visits, '2026-06-03', closed)).toEqual([]);
});

test('the follow-up comes back from its file as it was, and faults are told with their place', () => {
  let full = setResponsible(book, 'P. Responsible');
  full = closeAction(full, { actionId: 'damage:d1', date: '2026-06-03', person: 'F. Fitter', how: 'Upright replaced' });
  full = recordReduction(full, {
    id: 'r1',
    frameId: 'A-frame-2',
    says: '400 kg',
    engineer: 'E. Ngineer',
    until: '2026-06-30',
    recordedBy: '',
    recordedOn: '2026-06-03',
  });
  const text = writeFollowUp(full);
  expect(readFollowUp(JSON.parse(text))).toEqual({ ok: true, document: full });
  const bad = JSON.parse(text);
  bad.rhythm.visitDays = 0;
  bad.reductions[0].until = '30 June';
  const reading = readFollowUp(bad);
  expect(reading.ok ? [] : reading.problems.map(({ path }) => path)).toEqual(['rhythm.visitDays', 'reductions[0].until']);
});

test('nothing is closed twice, and nothing without a name; no reduced load without an engineer and an end', () => {
  const closing = { actionId: 'damage:d1', date: '2026-06-03', person: 'F. Fitter', how: 'Upright replaced' };
  expect(() => closeAction(closeAction(book, closing), closing)).toThrow('F. Fitter');
  expect(() => closeAction(book, { ...closing, how: '' })).toThrow('how');
  const reduction = { id: 'r', frameId: 'f', says: '400 kg', engineer: 'E.', until: '2026-06-30', recordedBy: '', recordedOn: '' };
  expect(() => recordReduction(book, { ...reduction, engineer: '' })).toThrow('engineer');
  expect(() => recordReduction(book, { ...reduction, until: '' })).toThrow('until');
});
