import { expect, test } from 'vitest';
import { auditSite } from '../../../src-core/audit/audit';
import { editFrame, editRun } from '../../../src-core/site/edits';
import { findFrame, findLevel } from '../../../src-core/site/lookup';
import { readSite } from '../../../src-core/site/read';
import type { Site } from '../../../src-core/site/site';
import { actionsOf, isUrgent, stillOpen, type OpenAction } from '../../../src-core/visit/actions';
import { carryIntoSite } from '../../../src-core/visit/carry';
import { answer, finishBay, markLock, recordDamage, recordPlumb, recordSag, restInOrder, seeNotice } from '../../../src-core/visit/edits';
import { closeAction, newFollowUp, recordReduction, type FollowUp } from '../../../src-core/visit/follow-up';
import { offLoadList } from '../../../src-core/visit/off-load';
import { repaired } from '../../../src-core/visit/repair';
import { startVisit, type Visit } from '../../../src-core/visit/visit';
import { plain } from '../plain';
import { siteOf, withRun } from './make-run';
import { bend } from './make-visit';

const BAY = 'A-bay-2';

function visitOn(started: string, id = started): Visit {
  return startVisit({
    id,
    siteId: 'site',
    name: 'Round',
    kind: 'weekly',
    person: 'R. W.',
    started,
    bays: [{ runId: 'run-A', bayId: BAY }],
  });
}

const finish = (visit: Visit): Visit => finishBay(visit, BAY, { person: 'R. W.', date: visit.started });

function actions(site: Site, visits: readonly Visit[], today: string, followUp: FollowUp = newFollowUp('site')): readonly OpenAction[] {
  return actionsOf({ site, audit: auditSite(site, today), visits, followUp, today });
}

const lock = { levelId: 'A2-level-1', beam: 'front', end: 'left' } as const;

test('a missing lock asks for a new one at once, and for its level to stay empty', () => {
  const [action, ...others] = actions(siteOf(), [finish(markLock(visitOn('2026-06-02'), BAY, lock, true))], '2026-06-04');
  expect(others).toEqual([]);
  expect(action).toMatchObject({ kind: 'replace-lock', found: '2026-06-02', age: 2, levels: [{ levelId: 'A2-level-1' }] });
  expect(action && isUrgent(action)).toBe(true);
  expect(plain(action?.says ?? [])).toContain('left end of the front beam of level 1 of bay A2');
});

test('locks missing without saying where empty every level of the bay', () => {
  const [action] = actions(siteOf(), [finish(answer(visitOn('2026-06-02'), BAY, 'locks', 'no'))], '2026-06-02');
  expect(action?.levels.map(({ levelId }) => levelId)).toEqual(['A2-level-1', 'A2-level-2']);
});

test('a finding keeps its day until a later visit finds it in order', () => {
  const first = finish(answer(markLock(visitOn('2026-06-02'), BAY, lock, true), BAY, 'floor', 'no'));
  const again = finish(answer(markLock(visitOn('2026-06-09'), BAY, lock, true), BAY, 'anchors', 'no'));
  const clear = finish(restInOrder(visitOn('2026-06-16'), BAY));
  const found = (visits: readonly Visit[]) =>
    actions(siteOf(), visits, '2026-06-20')
      .map(({ id, found: day }) => `${id.split('@')[0] ?? ''} ${day}`)
      .toSorted();
  expect(found([again, first])).toEqual([`anchors:${BAY} 2026-06-09`, `floor:${BAY} 2026-06-02`, 'lock:A2-level-1:front:left 2026-06-02']);
  expect(found([first, again, clear])).toEqual([]);
});

test('an unfinished bay says nothing yet', () => {
  expect(actions(siteOf(), [markLock(visitOn('2026-06-02'), BAY, lock, true)], '2026-06-02')).toEqual([]);
});

test('a finding that comes back after it was closed is a new one', () => {
  const first = finish(answer(visitOn('2026-06-02', 'v1'), BAY, 'floor', 'no'));
  const back = finish(answer(visitOn('2026-06-09', 'v2'), BAY, 'floor', 'no'));
  const id = `floor:${BAY}@v1`;
  const book = closeAction(newFollowUp('site'), { actionId: id, date: '2026-06-05', person: 'M. Mason', how: 'Joint filled' });
  const closed = actions(siteOf(), [first], '2026-06-06', book);
  expect(closed.map(({ closed: by }) => by?.person)).toEqual(['M. Mason']);
  expect(stillOpen(closed)).toEqual([]);
  expect(stillOpen(actions(siteOf(), [first, back], '2026-06-10', book)).map((one) => [one.id, one.found])).toEqual([
    [`floor:${BAY}@v2`, '2026-06-09'],
  ]);
});

test('no notice, the wrong one, or a rack that is not as it says leave no rating', () => {
  const seen = (part: Parameters<typeof seeNotice>[2]) =>
    actions(siteOf(), [finish(seeNotice(visitOn('2026-06-02'), BAY, part))], '2026-06-02');
  // The notice allows the first beam up to 1 500 mm, gaps up to 1 500 mm and is for 1 level.
  expect(seen({ there: 'yes', matches: 'yes', firstBeamMm: 1500, greatestGapMm: 1500, levels: 1, beams: 'yes' })).toEqual([]);
  for (const [part, words] of [
    [{ there: 'no' }, 'No load notice is fixed'],
    [{ matches: 'no' }, 'not this bay’s'],
    [{ beams: 'no' }, 'another type'],
    [{ firstBeamMm: 1501 }, 'at 1501 mm'],
    [{ greatestGapMm: 1550 }, '1550 mm'],
    [{ levels: 2 }, '2 beam levels'],
  ] as const) {
    const [action] = seen(part);
    expect(action?.kind).toBe('notice');
    expect(plain(action?.says ?? [])).toContain(words);
    expect(plain(action?.says ?? [])).toContain('No rating holds here');
  }
});

test('red empties both bays and the tied ones behind; the list names each level once with its goods', () => {
  let site = withRun(siteOf({ bays: 3 }), { name: 'B', bays: 3 });
  site = editRun(site, 'run-A', { backToBack: { runId: 'run-B', gapMm: 200, rowSpacers: 'yes' } });
  const { frameId: _, on: __, ...torn } = bend({ torn: true });
  site = editFrame(site, 'A-frame-2', { damages: [torn, { ...torn, id: 'd2', member: 'bracing' }] });
  const list = offLoadList(site, actions(site, [], '2026-06-02'));
  expect(list.map(({ bayName, level, what }) => `${bayName} ${level} ${what}`)).toEqual([
    ...['A1 1', 'A1 2', 'A2 1', 'A2 2', 'B2 1', 'B2 2', 'B3 1', 'B3 2'].map((place) => `${place} unload`),
  ]);
  expect(list[0]).toMatchObject({ goods: '3 × Tiles', goodsKg: 1860, runName: 'A' });
  expect(list[0]?.because).toHaveLength(2);
});

test.each(['yes', 'unknown', 'no'] as const)('row spacers %s: finding, action and off-load list name the same bays', (rowSpacers) => {
  let site = withRun(siteOf({ bays: 3 }), { name: 'B', bays: 3 });
  site = editRun(site, 'run-A', { backToBack: { runId: 'run-B', gapMm: 200, rowSpacers } });
  const { frameId: _, on: __, ...torn } = bend({ torn: true });
  site = editFrame(site, 'A-frame-2', { damages: [torn] });
  const [action] = actions(site, [], '2026-06-02');
  const finding = auditSite(site, '2026-06-02').runs[0]?.frames[1]?.findings.find(({ check }) => check === 'damage');
  const [told, found] = [plain(action?.says ?? []), plain(finding?.says ?? [])];
  const bays = new Set(offLoadList(site, actions(site, [], '2026-06-02')).map(({ bayName }) => bayName));
  expect(bays.has('B2') && bays.has('B3')).toBe(rowSpacers !== 'no');
  // Mirrored: behind A's second frame of four stands B's third.
  expect(found.includes('the bays at frame B-F3 behind it')).toBe(rowSpacers !== 'no');
  expect(told.includes('bay B2 and bay B3')).toBe(rowSpacers !== 'no');
  for (const text of [told, found])
    expect(text.includes('Whether row spacers tie run B behind it to this frame is not known, so it counts as tied.')).toBe(
      rowSpacers === 'unknown',
    );
});

test('“unload” goes before “do not reload”, and closed actions ask for nothing', () => {
  const { frameId: _, on: __, ...amber } = bend({ acrossMm: 0 });
  const site = editFrame(siteOf(), 'A-frame-2', { damages: [amber] });
  const visit = finish(markLock(visitOn('2026-06-02'), BAY, lock, true));
  const open = actions(site, [visit], '2026-06-02');
  expect(offLoadList(site, open).map(({ bayName, level, what }) => `${bayName} ${level} ${what}`)).toEqual([
    'A1 1 do-not-reload',
    'A1 2 do-not-reload',
    'A2 1 unload',
    'A2 2 do-not-reload',
  ]);
  const book = closeAction(newFollowUp('site'), {
    actionId: 'damage:d1',
    date: '2026-06-03',
    person: 'F. Fitter',
    how: 'Upright replaced',
  });
  const mended = repaired(site, 'd1');
  expect(offLoadList(mended, actions(mended, [visit], '2026-06-03', book)).map(({ bayName, level }) => `${bayName} ${level}`)).toEqual([
    'A2 1',
  ]);
});

test('an engineer’s reduced load stands beside the action until its day, and takes nothing from it', () => {
  const { frameId: _, on: __, ...red } = bend({ alongMm: 11, acrossMm: 0 });
  const site = editFrame(siteOf(), 'A-frame-2', { damages: [red] });
  const book = recordReduction(newFollowUp('site'), {
    id: 'r1',
    frameId: 'A-frame-2',
    says: 'Lowest level only, 400 kg a pair',
    engineer: 'E. Ngineer',
    until: '2026-06-30',
    recordedBy: 'R. W.',
    recordedOn: '2026-06-03',
  });
  const on = (today: string) => actions(site, [], today, book)[0];
  expect(on('2026-06-30')).toMatchObject({ kind: 'unload', reductions: [{ holds: true, reduction: { engineer: 'E. Ngineer' } }] });
  expect(on('2026-07-01')).toMatchObject({ kind: 'unload', reductions: [{ holds: false }] });
  expect(offLoadList(site, actions(site, [], '2026-06-03', book))).toHaveLength(4);
});

test('what a visit measured is carried into the site, once, and can be read back', () => {
  let visit = recordDamage(visitOn('2026-06-02'), BAY, bend({ frameId: 'A-frame-2' }));
  visit = recordPlumb(visit, BAY, { frameId: 'A-frame-3', alongMm: 12, acrossMm: 1, heightMm: 3000, loaded: true });
  visit = finish(answer(markLock(visit, BAY, lock, true), BAY, 'anchors', 'no'));
  const site = carryIntoSite(siteOf(), visit, BAY);
  expect(carryIntoSite(site, visit, BAY)).toBe(site);
  expect(readSite(site)).toMatchObject({ ok: true });
  expect(findFrame(site, 'A-frame-2').frame).toMatchObject({ anchored: 'no', damages: [{ id: 'd1', alongMm: 8, acrossMm: 4 }] });
  expect(findFrame(site, 'A-frame-3').frame.plumb).toEqual({ alongMm: 12, acrossMm: 1, heightMm: 3000, loaded: true });
  expect(findFrame(site, 'A-frame-1').frame.anchored).toBe('yes');
  expect([findLevel(site, 'A2-level-1').level.locks, findLevel(site, 'A2-level-2').level.locks]).toEqual(['no', 'yes']);
  expect(repaired(site, 'd1').runs[0]?.frames[1]?.damages).toEqual([]);
});

test('what was not looked at leaves the site as it was', () => {
  const site = siteOf();
  expect(carryIntoSite(site, finish(visitOn('2026-06-02')), BAY)).toBe(site);
  // Everything in order, as the site has it already.
  expect(carryIntoSite(site, finish(restInOrder(visitOn('2026-06-02'), BAY)), BAY)).toBe(site);
});

test('a beam out of use by its set, and one that sags too far, empty their level', () => {
  const sag = (loadedMm: number, unloadedMm: number) =>
    finish(recordSag(visitOn('2026-06-02'), BAY, { levelId: 'A2-level-1', beam: 'front', loadedMm, unloadedMm, sidewaysMm: null }));
  expect(actions(siteOf(), [sag(17, 4)], '2026-06-02')).toMatchObject([{ kind: 'out-of-use', levels: [{ levelId: 'A2-level-1' }] }]);
  expect(actions(siteOf(), [sag(14, 1)], '2026-06-02')).toMatchObject([{ kind: 'unload', levels: [{ levelId: 'A2-level-1' }] }]);
  expect(actions(siteOf(), [sag(13, 1)], '2026-06-02')).toEqual([]);
});

test('a notice that is not there is not also unreadable', () => {
  const seen = finish(seeNotice(visitOn('2026-06-02'), BAY, { there: 'no', matches: 'no' }));
  const says = plain(actions(siteOf(), [seen], '2026-06-03')[0]?.says ?? []);
  expect(says).toContain('No load notice is fixed to bay A2.');
  expect(says).not.toContain('cannot be read');
});
