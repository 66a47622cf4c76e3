/** What stands in the site is open whatever was said of it, and what was put right does not come back by itself. */
import { expect, test } from 'vitest';
import { auditSite } from '../../../src-core/audit/audit';
import { editFrame } from '../../../src-core/site/edits';
import { findFrame, findLevel } from '../../../src-core/site/lookup';
import type { Site } from '../../../src-core/site/site';
import { actionsOf, stillOpen, type OpenAction } from '../../../src-core/visit/actions';
import { finishInto, lostDamages, withLost } from '../../../src-core/visit/carry';
import { answer, markLock, recordDamage, recordSag, resumeBay } from '../../../src-core/visit/edits';
import { doneList } from '../../../src-core/visit/done';
import { closeAction, newFollowUp, type FollowUp } from '../../../src-core/visit/follow-up';
import { afterClosing } from '../../../src-core/visit/repair';
import { startVisit, type Visit } from '../../../src-core/visit/visit';
import { plain } from '../plain';
import { siteOf } from './make-run';
import { bend } from './make-visit';

const BAY = 'A-bay-2';
const LEVEL = 'A2-level-1';
const TODAY = '2026-06-20';
const NONE = newFollowUp('site');

const visitOn = (day: string, bays: readonly string[] = [BAY]): Visit =>
  startVisit({
    id: day,
    siteId: 'site',
    name: 'Round',
    kind: 'weekly',
    person: 'R. W.',
    started: day,
    bays: bays.map((bayId) => ({ runId: 'run-A', bayId })),
  });

const finish = (site: Site, visit: Visit, followUp: FollowUp = NONE, bayId = BAY) =>
  finishInto(site, visit, { bayId, person: 'R. W.', date: visit.started, followUp, newId: () => 'new' });

const open = (site: Site, visits: readonly Visit[], followUp = NONE): readonly OpenAction[] =>
  stillOpen(actionsOf({ site, audit: auditSite(site, TODAY), visits, followUp, today: TODAY }));

/** The first open action done: what the site and the book are after it. */
function done(site: Site, visits: readonly Visit[], book = NONE, which = 0): { readonly site: Site; readonly book: FollowUp } {
  const actions = open(site, visits, book);
  const action = actions[which];
  if (action === undefined) throw new Error('an open action was expected');
  const closing = { actionId: action.id, date: '2026-06-05', person: 'F. Fitter', how: 'Part replaced' };
  return { site: afterClosing(site, action, actions), book: closeAction(book, closing) };
}

const damaged = { ...bend({ id: 'd9', frameId: 'A-frame-2', alongMm: 12, acrossMm: 0 }) };
const dent = { id: 'dent', on: 'beam', levelId: LEVEL, beam: 'front', member: 'beam', torn: true, note: '', found: '2026-06-02' } as const;
const deep = { levelId: LEVEL, beam: 'front', loadedMm: 14, unloadedMm: 1, sidewaysMm: 0 } as const;

test.each([
  ['damage of a frame', (visit: Visit) => recordDamage(visit, BAY, damaged)],
  ['damage of a beam', (visit: Visit) => recordDamage(visit, BAY, dent)],
  ['a sag', (visit: Visit) => recordSag(visit, BAY, { ...deep, unloadedMm: 4 })],
  ['a level sagging under its goods', (visit: Visit) => recordSag(visit, BAY, deep)],
])('%s that was closed and stands in the site again is open again, as often as that happens', (_, record) => {
  const { site, visit } = finish(siteOf(), record(visitOn('2026-06-02')));
  const first = done(site, [visit]);
  expect(open(first.site, [visit], first.book)).toEqual([]);
  // The removal undone: the verdict is over again, and so there is something to do.
  const [back, ...more] = open(site, [visit], first.book);
  expect(more).toEqual([]);
  expect(back?.id).not.toBe(first.book.closings[0]?.actionId);
  const second = done(site, [visit], first.book);
  expect(second.site).toEqual(first.site);
  expect(open(second.site, [visit], second.book)).toEqual([]);
  const [third] = open(site, [visit], second.book);
  expect(second.book.closings.map(({ actionId }) => actionId)).not.toContain(third?.id);
});

test('damage that stands although it was said to be repaired says who said so, and when', () => {
  const { site, visit } = finish(siteOf(), recordDamage(visitOn('2026-06-02'), BAY, damaged));
  const { book } = done(site, [visit]);
  expect(plain(open(site, [visit], book)[0]?.says ?? [])).toContain(
    'F. Fitter said on 5 June 2026 that this was done (Part replaced), and it stands in the site all the same.',
  );
});

test('a frame that was set plumb is to be measured again, and a lean measured later is open again', () => {
  const leaning = editFrame(siteOf(), 'A-frame-2', { plumb: { alongMm: 60, acrossMm: 0, heightMm: 3000, loaded: true } });
  const first = done(leaning, []);
  expect(findFrame(first.site, 'A-frame-2').frame.plumb).toBeNull();
  expect(open(first.site, [], first.book)).toEqual([]);
  expect(open(leaning, [], first.book).map(({ kind }) => kind)).toEqual(['re-plumb']);
});

test('a level is locked again once each of its missing locks is replaced', () => {
  const lock = { levelId: LEVEL, beam: 'front', end: 'left' } as const;
  const seen = markLock(markLock(visitOn('2026-06-02'), BAY, lock, true), BAY, { ...lock, end: 'right' }, true);
  const { site, visit } = finish(siteOf(), seen);
  const locks = (of: Site) => findLevel(of, LEVEL).level.locks;
  expect(locks(site)).toBe('no');
  const one = done(site, [visit]);
  expect(locks(one.site)).toBe('no');
  const both = done(one.site, [visit], one.book);
  expect(locks(both.site)).toBe('yes');
  expect(open(both.site, [visit], both.book)).toEqual([]);
});

test('a frame is anchored again once no bay beside it misses anchors', () => {
  const bays = ['A-bay-1', BAY];
  let visit = visitOn('2026-06-02', bays);
  for (const bay of bays) visit = answer(visit, bay, 'anchors', 'no');
  const left = finish(siteOf(), visit, NONE, 'A-bay-1');
  const { site, visit: seen } = finish(left.site, left.visit);
  const anchored = (of: Site) => of.runs[0]?.frames.slice(0, 3).map((frame) => frame.anchored);
  expect(anchored(site)).toEqual(['no', 'no', 'no']);
  const one = done(site, [seen]);
  expect(anchored(one.site)).toEqual(['yes', 'no', 'no']);
  expect(anchored(done(one.site, [seen], one.book).site)).toEqual(['yes', 'yes', 'yes']);
});

test('a level that was unloaded does not sag again by an old reading when its bay is finished once more', () => {
  const { site, visit } = finish(siteOf(), recordSag(visitOn('2026-06-02'), BAY, deep));
  const relieved = done(site, [visit]);
  const more = finish(relieved.site, resumeBay(visit, BAY), relieved.book);
  expect(findLevel(more.site, LEVEL).level.sags).toMatchObject([{ beam: 'front', loadedMm: null, unloadedMm: 1, sidewaysMm: 0 }]);
  // Read again: that counts.
  const read = finish(relieved.site, recordSag(resumeBay(visit, BAY), BAY, { ...deep, loadedMm: 9 }), relieved.book);
  expect(findLevel(read.site, LEVEL).level.sags).toMatchObject([{ loadedMm: 9, unloadedMm: 1 }]);
});

test('what was carried and undone is told as lost until it is put back; what was closed is not', () => {
  const before = siteOf();
  const { site, visit } = finish(before, recordDamage(recordDamage(visitOn('2026-06-02'), BAY, damaged), BAY, dent));
  const lost = (of: Site, book = NONE) => lostDamages(of, visit, book).map(({ id }) => id);
  expect(lost(site)).toEqual([]);
  expect(lost(before)).toEqual(['d9', 'dent']);
  expect(withLost(before, lostDamages(before, visit, NONE))).toEqual(site);
  const first = done(site, [visit]);
  expect(lost(first.site, first.book)).toEqual([]);
  // One of the two repaired, and the visit undone all the same: only the other one is lost.
  expect(lost(before, first.book)).toHaveLength(1);
  // Nothing is lost with the bay or frame itself.
  expect(lostDamages({ ...before, runs: [] }, visit, NONE)).toEqual([]);
  expect(lostDamages(before, resumeBay(visit, BAY), NONE)).toEqual([]);
});

test('what was done is told with who and how, though the damage has left the site', () => {
  const { site, visit } = finish(
    siteOf(),
    recordSag(recordDamage(recordDamage(visitOn('2026-06-02'), BAY, damaged), BAY, dent), BAY, { ...deep, unloadedMm: 4 }),
  );
  let now = { site, book: NONE };
  for (let i = 0; i < 3; i++) now = done(now.site, [visit], now.book);
  expect(open(now.site, [visit], now.book)).toEqual([]);
  const actions = actionsOf({ site: now.site, audit: auditSite(now.site, TODAY), visits: [visit], followUp: now.book, today: TODAY });
  const list = (visits: readonly Visit[]) => doneList(now.site, visits, now.book, actions).map(({ what }) => plain(what));
  expect(list([visit]).toSorted()).toEqual([
    'Damage: front upright of frame A-F2.',
    'Damage: the front beam of level 1 of bay A2.',
    // The visit still says of the sag what was found.
    expect.stringContaining('Unloaded, the front beam of level 1 of bay A2 stays bent down by 4 mm'),
  ]);
  const later = doneList(now.site, [], now.book, []).map(({ what }) => plain(what));
  expect(later.toSorted()).toEqual(['Damage of a beam.', 'Damage of a frame.', 'Sag: the front beam of level 1 of bay A2.']);
  expect(doneList(now.site, [visit], now.book, actions)[0]?.closing).toMatchObject({ person: 'F. Fitter', how: 'Part replaced' });
});
