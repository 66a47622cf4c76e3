import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import type { Site } from '../../src-core/site/site';
import { Saving } from '../../src-renderer/state/saving.svelte';
import { MemoryHost } from './memory-host';
import { smallSite } from './sites';

let host: MemoryHost;
let site: Site;
let saving: Saving;
const renamed = (name: string): Site => ({ ...site, name });
const journal = () => host.kept.get('site')?.journal.map(({ edit, body }) => ({ edit, name: (JSON.parse(body) as Site).name })) ?? [];

beforeEach(async () => {
  vi.useFakeTimers();
  host = new MemoryHost();
  site = smallSite();
  const { revision, savedAt } = await host.saveSite({ id: 'site', body: JSON.stringify(site), baseRevision: null });
  saving = new Saving({ host, id: 'site', revision, savedAt, onDisk: site, write: (value) => Promise.resolve(JSON.stringify(value)) });
});
afterEach(() => {
  saving.close();
  vi.useRealTimers();
});

test('what was read is saved; an edit is not; undone to what was read it is saved again', () => {
  expect(saving.stateOf(site)).toBe('saved');
  expect(saving.stateOf(renamed('B'))).toBe('unsaved');
  expect(saving.stateOf(site)).toBe('saved');
});

test('an edit is in the journal within two seconds, however fast others follow', async () => {
  const edits = Array.from({ length: 40 }, (_, i) => renamed(`name ${i}`));
  for (const [i, value] of edits.entries()) {
    saving.edited(value, `edit ${i}`);
    await vi.advanceTimersByTimeAsync(100);
    const newest = journal().at(-1)?.name ?? 'name -1';
    expect(i - Number(newest.slice(5))).toBeLessThanOrEqual(20);
  }
  await vi.advanceTimersByTimeAsync(2000);
  expect(journal().at(-1)?.name).toBe('name 39');
  // Each entry is the whole site: four seconds of editing make four of them, not forty.
  expect(journal()).toHaveLength(4);
  expect(journal().flatMap(({ edit }) => edit.split('; '))).toEqual(edits.map((_, i) => `edit ${i}`));
  expect(saving.unjournalled).toBe(false);
});

test('an edit made while a save is under way is journalled after it, on the new revision', async () => {
  let finish: () => void = () => undefined;
  host.waiting.set('saveSite', new Promise((resolve) => (finish = resolve)));
  const saved = saving.save(renamed('B'));
  await vi.advanceTimersByTimeAsync(0);
  expect(saving.stateOf(renamed('B'))).toBe('saving');
  const later = renamed('C');
  saving.edited(later, 'to C');
  await vi.advanceTimersByTimeAsync(3000);
  finish();
  expect(await saved).toBe(true);
  await vi.advanceTimersByTimeAsync(2000);
  expect(journal()).toEqual([{ edit: 'to C', name: 'C' }]);
  expect(host.kept.get('site')?.journal[0]?.baseRevision).toBe('2');
  expect(saving.stateOf(later)).toBe('unsaved');
});

test('an edit that reached the journal before a save that does not hold it is journalled again', async () => {
  let finish: () => void = () => undefined;
  host.waiting.set('appendJournal', new Promise((resolve) => (finish = resolve)));
  saving.edited(renamed('B'), 'to B');
  await vi.advanceTimersByTimeAsync(600);
  const first = saving.save(renamed('B'));
  saving.edited(renamed('C'), 'to C');
  const second = saving.save(renamed('C'));
  saving.edited(renamed('D'), 'to D');
  finish();
  expect(await Promise.all([first, second])).toEqual([true, true]);
  await vi.advanceTimersByTimeAsync(2000);
  expect(journal()).toEqual([{ edit: 'to D', name: 'D' }]);
});

test('a failed save leaves the site unsaved with the reason, and the next one can succeed', async () => {
  const edited = renamed('B');
  host.failing.set('saveSite', { code: 'disk-full', message: 'The disk is full.' });
  saving.edited(edited, 'to B');
  expect(await saving.save(edited)).toBe(false);
  expect(saving.stateOf(edited)).toBe('failed');
  expect(saving.failure).toEqual({ code: 'disk-full', message: 'The disk is full.' });
  expect(saving.stateOf(site)).toBe('saved');
  host.failing.clear();
  expect(await saving.save(edited)).toBe(true);
  expect(saving.stateOf(edited)).toBe('saved');
  expect(saving.failure).toBeNull();
});

test('a site that cannot be written is a failed save, not a lost one', async () => {
  const broken = new Saving({
    host,
    id: 'site',
    revision: '1',
    savedAt: null,
    onDisk: site,
    write: () => Promise.reject(new RangeError('cannot write it')),
  });
  expect(await broken.save(renamed('B'))).toBe(false);
  expect(broken.failure?.message).toBe('cannot write it');
  expect(host.kept.get('site')?.revision).toBe(1);
});

test('a save on a revision that someone else has replaced is refused as stale and overwrites nothing', async () => {
  await host.saveSite({ id: 'site', body: 'theirs', baseRevision: '1' });
  expect(await saving.save(renamed('B'))).toBe(false);
  expect(saving.failure?.code).toBe('stale');
  expect(host.kept.get('site')?.body).toBe('theirs');
});

test('a journal that fails is tried again and says so meanwhile; no edit is left out', async () => {
  host.failing.set('appendJournal', { code: 'folder-gone', message: 'The folder is gone.' });
  saving.edited(renamed('B'), 'to B');
  await vi.advanceTimersByTimeAsync(1000);
  expect(saving.journalFailure?.code).toBe('folder-gone');
  expect(saving.unjournalled).toBe(true);
  host.failing.clear();
  saving.edited(renamed('C'), 'to C');
  await vi.advanceTimersByTimeAsync(6000);
  expect(saving.journalFailure).toBeNull();
  expect(journal()).toEqual([{ edit: 'to B; to C', name: 'C' }]);
});

test('undoing back to what is on disk clears the journal: nothing is left to recover', async () => {
  saving.edited(renamed('B'), 'to B');
  await vi.advanceTimersByTimeAsync(1000);
  expect(journal()).toHaveLength(1);
  saving.edited(site, 'Undo: to B');
  await vi.advanceTimersByTimeAsync(1000);
  expect(journal()).toEqual([]);
});

test('settled waits until the last edit is in the journal', async () => {
  saving.edited(renamed('B'), 'to B');
  await saving.settled();
  expect(journal()).toEqual([{ edit: 'to B', name: 'B' }]);
});
