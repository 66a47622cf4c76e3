import { expect, test, vi } from 'vitest';
import { readContents } from '../../src-core/visit/contents';
import { finishBay, markLock, note, sign } from '../../src-core/visit/edits';
import { closeAction, setResponsible } from '../../src-core/visit/follow-up';
import { readVisit } from '../../src-core/visit/read-visit';
import { startVisit, type Visit } from '../../src-core/visit/visit';
import { OpenSite } from '../../src-renderer/state/open-site.svelte';
import { Rounds } from '../../src-renderer/state/rounds.svelte';
import { siteOf } from '../core/visit/make-run';
import { MemoryHost } from './memory-host';

const TODAY = '2026-06-02';

function opened(host = new MemoryHost()): { host: MemoryHost; rounds: Rounds } {
  const site = siteOf();
  host.kept.set(site.id, { body: '', revision: 1, journal: [] });
  const open = new OpenSite({ host, id: site.id, site, revision: '1', savedAt: null, makeWorker: null, today: () => TODAY });
  return { host, rounds: new Rounds(host, open) };
}

const visit: Visit = startVisit({
  id: 'v1',
  siteId: 'site',
  name: 'Round',
  kind: 'weekly',
  person: 'R. W.',
  started: TODAY,
  bays: [{ runId: 'run-A', bayId: 'A-bay-1' }],
});

async function onDisk(host: MemoryHost): Promise<Visit | null> {
  const [kept] = await host.listVisits();
  const reading = kept ? readVisit(JSON.parse(kept.text)) : null;
  return reading?.ok ? reading.document : null;
}

test('every change of a visit is put beside the site, and another run of the program goes on with it', async () => {
  const { host, rounds } = opened();
  await rounds.load();
  rounds.addVisit(visit);
  rounds.edit((one) => note(one, 'A-bay-1', 'first'));
  rounds.edit((one) => note(one, 'A-bay-1', 'second'));
  expect(rounds.saved).toBe(false);
  await rounds.settled();
  expect(rounds.saved).toBe(true);
  expect((await onDisk(host))?.bays[0]?.notes).toBe('second');
  const again = opened(host).rounds;
  await again.load();
  expect(again.visits.map(({ bays }) => bays[0]?.notes)).toEqual(['second']);
});

test('changes that wait are sent once, as they are by then', async () => {
  const { host, rounds } = opened();
  await rounds.load();
  rounds.addVisit(visit);
  await rounds.settled();
  const before = host.calls.filter((name) => name === 'saveVisit').length;
  for (let n = 0; n < 20; n++) rounds.edit((one) => note(one, 'A-bay-1', `text ${n}`));
  await rounds.settled();
  expect(host.calls.filter((name) => name === 'saveVisit').length - before).toBeLessThanOrEqual(2);
  expect((await onDisk(host))?.bays[0]?.notes).toBe('text 19');
});

test('what could not be saved is said, kept, and tried again', async () => {
  vi.useFakeTimers();
  try {
    const { host, rounds } = opened();
    await rounds.load();
    host.failing.set('saveVisit', { code: 'disk-full', message: 'There is no room left.' });
    rounds.addVisit(visit);
    await rounds.settled();
    expect(rounds.failure?.message).toBe('There is no room left.');
    expect(rounds.saved).toBe(false);
    host.failing.delete('saveVisit');
    await vi.advanceTimersByTimeAsync(6_000);
    await rounds.settled();
    expect(rounds.saved).toBe(true);
    expect(rounds.failure).toBeNull();
    expect(await onDisk(host)).not.toBeNull();
  } finally {
    vi.useRealTimers();
  }
});

test('a visit that was changed elsewhere is not written over', async () => {
  const { host, rounds } = opened();
  await rounds.load();
  rounds.addVisit(visit);
  await rounds.settled();
  const other = opened(host).rounds;
  await other.load();
  other.visitId = 'v1';
  other.edit((one) => note(one, 'A-bay-1', 'theirs'));
  await other.settled();
  rounds.edit((one) => note(one, 'A-bay-1', 'ours'));
  await rounds.settled();
  expect(rounds.failure?.code).toBe('stale');
  expect((await onDisk(host))?.bays[0]?.notes).toBe('theirs');
  rounds.visitId = 'v1';
  await rounds.sortOut('v2');
  await rounds.settled();
  expect(rounds.visits.map(({ id, bays }) => [id, bays[0]?.notes])).toEqual([
    ['v1', 'theirs'],
    ['v2', 'ours'],
  ]);
  expect(rounds.saved).toBe(true);
  rounds.close();
});

test('what two windows do to the follow-up is kept of both', async () => {
  const { host, rounds } = opened();
  await rounds.load();
  const other = opened(host).rounds;
  await other.load();
  const closing = (actionId: string) => ({ actionId, date: TODAY, person: 'F. Fitter', how: 'replaced' });
  other.editFollowUp((book) => closeAction(book, closing('theirs')));
  await other.settled();
  rounds.editFollowUp((book) => setResponsible(closeAction(book, closing('ours')), 'P. Responsible'));
  await rounds.settled();
  expect(rounds.failure).toBeNull();
  expect(rounds.followUp).toMatchObject({ responsible: 'P. Responsible', closings: [{ actionId: 'theirs' }, { actionId: 'ours' }] });
});

test('a visit that cannot be read is told and left alone; the others are there', async () => {
  const host = new MemoryHost();
  const { rounds } = opened(host);
  await host.saveVisit({ siteId: 'site', visitId: 'good', body: JSON.stringify({ version: 1, ...visit, id: 'good' }), baseRevision: null });
  const list = await host.listVisits();
  Object.assign(host, { listVisits: async () => [...list, { id: 'bad', text: '{', revision: 'r', problem: 'It is damaged.' }] });
  await rounds.load();
  expect(rounds.visits.map(({ id }) => id)).toEqual(['good']);
  expect(rounds.unreadable).toEqual([{ name: 'Visit bad', problem: 'It is damaged.' }]);
});

test('findings of a finished bay stand among the actions and on the list for today', async () => {
  const { rounds } = opened();
  await rounds.load();
  rounds.addVisit(visit);
  rounds.edit((one) => markLock(one, 'A-bay-1', { levelId: 'A1-level-1', beam: 'front', end: 'left' }, true));
  expect(rounds.actions).toEqual([]);
  rounds.edit((one) => finishBay(one, 'A-bay-1', { person: 'R. W.', date: TODAY }));
  expect(rounds.actions.map(({ kind }) => kind)).toEqual(['replace-lock']);
  expect(rounds.today[0]).toMatchObject({ kind: 'action' });
  rounds.edit((one) => sign(one, { person: 'R. W.', role: '', date: TODAY }));
  expect(rounds.today.some(({ kind }) => kind === 'resume')).toBe(false);
});

test('a record carries the site as it stands, its checksum and what was found', async () => {
  const { host, rounds } = opened();
  await rounds.load();
  const record = await rounds.freeze({
    kind: 'check',
    title: 'Check',
    person: 'R. W.',
    bayIds: ['A-bay-1'],
    figures: { verdict: 'within' },
    paper: null,
  });
  expect(record).toMatchObject({ number: 1, siteName: 'Test depot', ruleSet: 'European' });
  expect(record?.siteChecksum).toMatch(/^[0-9a-f]{64}$/);
  expect(readContents(await host.readRecord('site', 1))).toMatchObject({ figures: { verdict: 'within' }, bayIds: ['A-bay-1'] });
  expect(rounds.records?.records).toHaveLength(1);
  host.failing.set('appendRecord', { code: 'altered', message: 'Record 1 was altered.' });
  expect(await rounds.freeze({ kind: 'check', title: 'Check', person: '', bayIds: ['A-bay-1'], figures: null, paper: null })).toBeNull();
  expect(rounds.failure?.message).toBe('Record 1 was altered.');
});
