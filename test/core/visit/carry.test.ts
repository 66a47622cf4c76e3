/** What a visit found at beams goes into the site, counts there, is told once, and leaves it when it is put right. */
import { expect, test } from 'vitest';
import { auditBay, auditSite } from '../../../src-core/audit/audit';
import { findFrame, findLevel } from '../../../src-core/site/lookup';
import { readSite } from '../../../src-core/site/read';
import type { Site } from '../../../src-core/site/site';
import { actionsOf, stillOpen, type OpenAction } from '../../../src-core/visit/actions';
import { carryIntoSite, finishInto } from '../../../src-core/visit/carry';
import { finishBay, recordDamage, recordSag, removeDamage, resumeBay } from '../../../src-core/visit/edits';
import { closeAction, newFollowUp, type FollowUp } from '../../../src-core/visit/follow-up';
import { readVisit, writeVisit } from '../../../src-core/visit/read-visit';
import { afterClosing } from '../../../src-core/visit/repair';
import { startVisit, type BeamDamage, type SagReading, type Visit } from '../../../src-core/visit/visit';
import { plain } from '../plain';
import { siteOf } from './make-run';
import { bend } from './make-visit';

const BAY = 'A-bay-2';
const LEVEL = 'A2-level-1';
const NONE = newFollowUp('site');

const visitOn = (day: string, id = day): Visit =>
  startVisit({
    id,
    siteId: 'site',
    name: 'Round',
    kind: 'weekly',
    person: 'R. W.',
    started: day,
    bays: [{ runId: 'run-A', bayId: BAY }],
  });

const dent = (part: Partial<BeamDamage> = {}): BeamDamage => ({
  id: 'dent',
  on: 'beam',
  levelId: LEVEL,
  beam: 'front',
  member: 'beam',
  torn: true,
  note: '',
  found: '2026-06-02',
  ...part,
});

const reading = (part: Partial<SagReading> = {}): SagReading => ({
  levelId: LEVEL,
  beam: 'front',
  loadedMm: 10,
  unloadedMm: 4,
  sidewaysMm: 0,
  ...part,
});

let ids = 0;
const finish = (site: Site, visit: Visit, followUp: FollowUp = NONE) =>
  finishInto(site, visit, { bayId: BAY, person: 'R. W.', date: visit.started, followUp, newId: () => `new-${(ids += 1)}` });

const again = (visit: Visit) => resumeBay(visit, BAY);
const level = (site: Site, id = LEVEL) => findLevel(site, id).level;
const verdict = (site: Site, day = '2026-06-02') => auditBay(site, 'run-A', BAY, day).levels[0]?.verdict;

function actions(site: Site, visits: readonly Visit[], followUp = NONE, today = '2026-06-20'): readonly OpenAction[] {
  return actionsOf({ site, audit: auditSite(site, today), visits, followUp, today });
}

const close = (action: OpenAction | undefined, book = NONE): FollowUp =>
  closeAction(book, { actionId: action?.id ?? '', date: '2026-06-05', person: 'F. Fitter', how: 'Beams replaced' });

test('damage and sag of beams are carried once, make the bay over, and can be read back', () => {
  const plainSite = siteOf();
  const before = verdict(plainSite);
  const seen = recordSag(recordDamage(visitOn('2026-06-02'), BAY, dent()), BAY, reading());
  const { site, visit } = finish(plainSite, seen);
  expect(level(site).beamDamages).toEqual([{ id: 'dent', beam: 'front', member: 'beam', torn: true, note: '', found: '2026-06-02' }]);
  expect(level(site).sags).toEqual([{ beam: 'front', loadedMm: 10, unloadedMm: 4, sidewaysMm: 0, found: '2026-06-02' }]);
  expect(carryIntoSite(site, visit, BAY)).toBe(site);
  expect(readSite(site)).toMatchObject({ ok: true });
  const reread = readVisit(JSON.parse(writeVisit(visit)));
  expect(reread).toEqual({ ok: true, document: visit });
  expect(before).not.toBe('over');
  expect(verdict(site)).toBe('over');
});

test('each is told once, from the site, since the visit that first found it', () => {
  const first = finish(siteOf(), recordSag(recordDamage(visitOn('2026-06-02', 'v1'), BAY, dent()), BAY, reading()));
  const second = finish(first.site, recordSag(visitOn('2026-06-09', 'v2'), BAY, reading({ unloadedMm: 5 })));
  const told = actions(second.site, [first.visit, second.visit]);
  expect(told.map(({ id, kind, found, levels }) => [id, kind, found, levels.map(({ levelId }) => levelId)])).toEqual([
    ['beam-damage:dent', 'unload', '2026-06-02', [LEVEL]],
    [`sag:${LEVEL}:front@v1`, 'out-of-use', '2026-06-02', [LEVEL]],
  ]);
  expect(plain(told[1]?.says ?? [])).toContain('stays bent down by 5 mm');
  expect(plain(told[1]?.says ?? []).match(/take both beams out/g)).toHaveLength(1);
});

test('what is entered in the site without any visit is told as well', () => {
  const { site } = finish(siteOf(), recordSag(recordDamage(visitOn('2026-06-02'), BAY, dent()), BAY, reading()));
  expect(actions(site, []).map(({ kind, found }) => [kind, found])).toEqual([
    ['unload', '2026-06-02'],
    ['out-of-use', '2026-06-02'],
  ]);
});

test('a later reading of the same beam replaces the earlier one; what it did not measure stays', () => {
  const first = finish(
    siteOf(),
    recordSag(recordSag(visitOn('2026-06-02'), BAY, reading()), BAY, reading({ beam: 'rear', unloadedMm: 1 })),
  );
  const whole = finish(first.site, recordSag(visitOn('2026-06-09'), BAY, reading({ loadedMm: 9, unloadedMm: 1, sidewaysMm: 2 })));
  expect(level(whole.site).sags).toEqual([
    { beam: 'front', loadedMm: 9, unloadedMm: 1, sidewaysMm: 2, found: '2026-06-09' },
    { beam: 'rear', loadedMm: 10, unloadedMm: 1, sidewaysMm: 0, found: '2026-06-02' },
  ]);
  const part = finish(first.site, recordSag(visitOn('2026-06-09'), BAY, reading({ loadedMm: 9, unloadedMm: null, sidewaysMm: null })));
  expect(level(part.site).sags[0]).toEqual({ beam: 'front', loadedMm: 9, unloadedMm: 4, sidewaysMm: 0, found: '2026-06-09' });
  expect(verdict(part.site)).toBe('over');
  // An earlier visit that is finished again does not put its old reading over a later one.
  expect(carryIntoSite(whole.site, first.visit, BAY)).toBe(whole.site);
});

test('taken up again, what was amended, moved or taken out is so in the site too', () => {
  const seen = recordSag(
    recordDamage(recordDamage(visitOn('2026-06-02'), BAY, dent()), BAY, bend({ frameId: 'A-frame-2' })),
    BAY,
    reading(),
  );
  const first = finish(siteOf(), seen);
  let visit = again(first.visit);
  visit = recordDamage(visit, BAY, dent({ levelId: 'A2-level-2', beam: 'rear' }));
  visit = recordDamage(visit, BAY, bend({ frameId: 'A-frame-3' }));
  visit = recordSag(visit, BAY, reading({ unloadedMm: null }));
  const moved = finish(first.site, visit);
  expect(level(moved.site).beamDamages).toEqual([]);
  expect(level(moved.site, 'A2-level-2').beamDamages).toMatchObject([{ id: 'dent', beam: 'rear' }]);
  expect(findFrame(moved.site, 'A-frame-2').frame.damages).toEqual([]);
  expect(findFrame(moved.site, 'A-frame-3').frame.damages).toMatchObject([{ id: 'd1' }]);
  expect(level(moved.site).sags).toMatchObject([{ loadedMm: 10, unloadedMm: null }]);
  expect(readSite(moved.site)).toMatchObject({ ok: true });
  const empty = recordSag(removeDamage(removeDamage(again(moved.visit), BAY, 'dent'), BAY, 'd1'), BAY, {
    ...reading({ loadedMm: null, unloadedMm: null, sidewaysMm: null }),
  });
  const out = finish(moved.site, empty);
  expect(level(out.site, 'A2-level-2').beamDamages).toEqual([]);
  expect(findFrame(out.site, 'A-frame-3').frame.damages).toEqual([]);
  expect(level(out.site).sags).toEqual([]);
  expect(actions(out.site, [out.visit])).toEqual([]);
});

test('a damage that the site knew before stays when a visit that measured it again takes it out', () => {
  const first = finish(siteOf(), recordDamage(visitOn('2026-06-02'), BAY, bend({ frameId: 'A-frame-2' })));
  const measured = finish(first.site, recordDamage(visitOn('2026-06-09'), BAY, bend({ frameId: 'A-frame-2', alongMm: 9 })));
  const out = finish(measured.site, removeDamage(again(measured.visit), BAY, 'd1'));
  expect(findFrame(out.site, 'A-frame-2').frame.damages).toMatchObject([{ id: 'd1', alongMm: 9 }]);
});

test.each(['dent', 'd1'])('%s, closed: taken up again as it was, it stays repaired; measured anew, it is a new finding', (id) => {
  const found = id === 'dent' ? dent() : bend({ frameId: 'A-frame-2', acrossMm: 0 });
  const first = finish(siteOf(), recordDamage(visitOn('2026-06-02'), BAY, found));
  const [action] = actions(first.site, [first.visit]);
  const book = close(action);
  const mended = action ? afterClosing(first.site, action) : first.site;
  expect(stillOpen(actions(mended, [first.visit], book))).toEqual([]);
  const same = finish(mended, again(first.visit), book);
  expect(same.site).toBe(mended);
  expect(stillOpen(actions(same.site, [same.visit], book))).toEqual([]);

  const anew = finish(mended, recordDamage(again(first.visit), BAY, { ...found, note: 'hit again' }), book);
  const open = stillOpen(actions(anew.site, [anew.visit], book));
  expect(open).toHaveLength(1);
  expect(open[0]?.id).not.toBe(action?.id);
  expect(auditSite(anew.site, '2026-06-20').runs[0]?.bays[1]?.verdict).not.toBe('within');
  // And once more, with nothing changed: still one, still the same.
  const more = finish(anew.site, again(anew.visit), book);
  expect(more.site).toBe(anew.site);
  expect(stillOpen(actions(more.site, [more.visit], book)).map((one) => one.id)).toEqual(open.map((one) => one.id));
});

test('undone and finished again, what was not closed is carried again', () => {
  const before = siteOf();
  const first = finish(before, recordDamage(visitOn('2026-06-02'), BAY, dent()));
  expect(finish(before, again(first.visit)).site).toEqual(first.site);
});

test('repairing brings the verdict back: the damage, the bent pair, the sagging level', () => {
  const before = verdict(siteOf());
  const seen = recordSag(recordDamage(visitOn('2026-06-02'), BAY, dent()), BAY, reading({ beam: 'rear' }));
  const first = finish(siteOf(), recordSag(seen, BAY, reading({ unloadedMm: 1 })));
  const [damage, bent, ...others] = actions(first.site, [first.visit]);
  if (damage === undefined || bent === undefined) throw new Error('two actions expected');
  expect(others).toEqual([]);
  const mended = afterClosing(first.site, damage);
  expect(level(mended).beamDamages).toEqual([]);
  expect(verdict(mended)).toBe('over');
  const replaced = afterClosing(mended, bent);
  // Both beams went out, so the readings of both are of no use any more.
  expect(level(replaced).sags).toEqual([]);
  expect(verdict(replaced)).toBe(before);
  const book = close(bent, close(damage));
  expect(stillOpen(actions(replaced, [first.visit], book))).toEqual([]);
  // Taken up again as it was, the old readings do not come back to the new beams.
  expect(finish(replaced, again(first.visit), book).site).toBe(replaced);
  // Read anew and bent again: a new finding.
  const later = finish(replaced, recordSag(visitOn('2026-06-09', 'v2'), BAY, reading()), book);
  expect(stillOpen(actions(later.site, [first.visit, later.visit], book)).map(({ id, found }) => [id, found])).toEqual([
    [`sag:${LEVEL}:front@v2`, '2026-06-09'],
  ]);
});

test('a level that sagged too far and was unloaded is to be read again, not within', () => {
  const first = finish(siteOf(), recordSag(visitOn('2026-06-02'), BAY, reading({ loadedMm: 14, unloadedMm: 1 })));
  const [action] = actions(first.site, [first.visit]);
  expect(action).toMatchObject({ kind: 'unload' });
  const relieved = action ? afterClosing(first.site, action) : first.site;
  expect(level(relieved).sags).toEqual([{ beam: 'front', loadedMm: null, unloadedMm: 1, sidewaysMm: 0, found: '2026-06-02' }]);
  expect(verdict(relieved)).toBe('not-assessable');
  expect(stillOpen(actions(relieved, [first.visit], close(action)))).toEqual([]);
});

test('a bay that an earlier program finished still says what it found at beams, until the site knows of it', () => {
  const seen = recordSag(recordDamage(visitOn('2026-06-02', 'v1'), BAY, dent()), BAY, reading());
  const json = JSON.parse(writeVisit(finishBay(seen, BAY, { person: 'R. W.', date: '2026-06-02' })));
  json.version = 1;
  for (const bay of json.bays) delete bay.carried;
  const old = readVisit(json);
  if (!old.ok) throw new Error(JSON.stringify(old.problems));
  expect(actions(siteOf(), [old.document]).map(({ id, kind }) => [id, kind])).toEqual([
    ['beam:dent@v1', 'unload'],
    [`sag:${LEVEL}:front@v1`, 'out-of-use'],
  ]);
  const { site, visit } = finish(siteOf(), again(old.document));
  expect(actions(site, [visit]).map(({ id }) => id)).toEqual(['beam-damage:dent', `sag:${LEVEL}:front@v1`]);
});

test('an action closed in an earlier program stays closed', () => {
  const seen = finishBay(recordDamage(visitOn('2026-06-02', 'v1'), BAY, dent()), BAY, { person: 'R. W.', date: '2026-06-02' });
  const [action] = actions(siteOf(), [seen]);
  expect(stillOpen(actions(siteOf(), [seen], close(action)))).toEqual([]);
});
