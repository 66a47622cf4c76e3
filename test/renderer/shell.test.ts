import { beforeEach, expect, test } from 'vitest';
import { editSite } from '../../src-core/site/edits';
import { newSite } from '../../src-core/site/new-site';
import { writeSite } from '../../src-core/site/write';
import type { OpenSite } from '../../src-renderer/state/open-site.svelte';
import { Shell } from '../../src-renderer/state/shell.svelte';
import { MemoryHost } from './memory-host';
import { fileOf } from './opened';
import { smallSite } from './sites';

/** A memory host that gives out whole files, as the real ones do. */
class FileHost extends MemoryHost {
  override async readSite(id: string) {
    const site = await super.readSite(id);
    return { ...site, text: fileOf(site.text) };
  }
}

let host: FileHost;
let shell: Shell;

beforeEach(async () => {
  host = new FileHost();
  await host.saveSite({ id: 'site', body: writeSite(smallSite()), baseRevision: null });
  shell = new Shell(host, null, () => '2026-12-01');
  await shell.start();
});

async function opened(): Promise<OpenSite> {
  await shell.openSite('site');
  if (shell.open === null) throw new Error(`the site did not open: ${shell.trouble?.message}`);
  return shell.open;
}
const rename = (open: OpenSite, name: string) => open.edit('Rename', (site) => editSite(site, { name }));
const nameOnDisk = (id = 'site') => (JSON.parse(host.kept.get(id)?.body ?? '{}') as { name?: string }).name;

test('a new site is on disk at once, open, and first among the recent ones', async () => {
  await shell.newSite('  North store ');
  expect(shell.open?.site.name).toBe('North store');
  expect(shell.open?.saved).toBe('saved');
  const id = shell.open?.id ?? '';
  expect(nameOnDisk(id)).toBe('North store');
  expect(shell.preferences?.recentSiteIds[0]).toBe(id);
});

test('a site that was changed elsewhere is not overwritten: the save is refused and both are still there', async () => {
  const open = await opened();
  rename(open, 'Mine');
  await host.saveSite({ id: 'site', body: writeSite(newSite('site', 'Theirs')), baseRevision: '1' });
  expect(await open.save()).toBe(false);
  expect(open.saved).toBe('failed');
  expect(open.saving.failure?.code).toBe('stale');
  expect(nameOnDisk()).toBe('Theirs');
  expect(open.site.name).toBe('Mine');
});

test('a save that is refused as stale asks what is to become of the two states', async () => {
  const open = await opened();
  rename(open, 'Mine');
  await host.saveSite({ id: 'site', body: writeSite(newSite('site', 'Theirs')), baseRevision: '1' });
  await shell.save();
  expect(shell.dialog).toEqual({ kind: 'stale' });
});

async function staleSite(): Promise<OpenSite> {
  const open = await opened();
  rename(open, 'Mine');
  await host.saveSite({ id: 'site', body: writeSite(newSite('site', 'Theirs')), baseRevision: '1' });
  await open.save();
  return open;
}

test('of two states one can be put in the place of the other, knowingly', async () => {
  const open = await staleSite();
  await shell.saveOver();
  expect(nameOnDisk()).toBe('Mine');
  expect(open.saved).toBe('saved');
});

test('of two states the own one can be kept as a copy beside the other', async () => {
  await staleSite();
  await shell.saveCopy();
  expect(nameOnDisk()).toBe('Theirs');
  expect(shell.open?.site.name).toBe('Mine (copy)');
  expect(nameOnDisk(shell.open?.id)).toBe('Mine (copy)');
  expect(shell.open?.saved).toBe('saved');
});

test('of two states the other can be opened and the own one dropped', async () => {
  await staleSite();
  await shell.reopen();
  expect(shell.open?.site.name).toBe('Theirs');
  expect(shell.open?.saved).toBe('saved');
});

test('edits that were journalled but not saved are offered when the site is opened again', async () => {
  const open = await opened();
  rename(open, 'Renamed');
  await open.saving.settled();
  // The program ends here without closing the site.
  const next = new Shell(host, null, () => '2026-12-01');
  await next.start();
  await next.openSite('site');
  const dialog = next.dialog;
  expect(dialog).toMatchObject({ kind: 'recovered', problem: null, recovered: { edits: ['Rename'], baseRevision: '1' } });
  expect(dialog?.kind === 'recovered' && dialog.site?.name).toBe('Renamed');
  expect(next.open?.site.name).toBe('Harbour shed');
});

/** A program that ended after an edit had reached the journal, started again. */
async function recoveredShell(): Promise<Shell> {
  const open = await opened();
  rename(open, 'Renamed');
  await open.saving.settled();
  const next = new Shell(host, null, () => '2026-12-01');
  await next.start();
  await next.openSite('site');
  return next;
}

test('recovered edits that are taken up are one undoable edit, and saved like any other', async () => {
  const next = await recoveredShell();
  const { dialog } = next;
  if (dialog?.kind !== 'recovered' || dialog.site === null) throw new Error('nothing was recovered');
  next.takeUp(dialog.site, dialog.recovered.baseRevision);
  expect(next.dialog).toBeNull();
  expect(next.open?.site.name).toBe('Renamed');
  expect(next.open?.saved).toBe('unsaved');
  next.open?.undo();
  expect(next.open?.saved).toBe('saved');
  next.open?.redo();
  await next.save();
  expect(nameOnDisk()).toBe('Renamed');
});

test('recovered edits of a revision that was replaced meanwhile overwrite nothing: saving them asks', async () => {
  const next = await recoveredShell();
  const { dialog } = next;
  if (dialog?.kind !== 'recovered' || dialog.site === null) throw new Error('nothing was recovered');
  await host.saveSite({ id: 'site', body: writeSite(newSite('site', 'Theirs')), baseRevision: '1' });
  next.takeUp(dialog.site, dialog.recovered.baseRevision);
  await next.save();
  expect(next.dialog).toEqual({ kind: 'stale' });
  expect(nameOnDisk()).toBe('Theirs');
});

test('recovered edits that are left out are gone from the journal', async () => {
  const next = await recoveredShell();
  await next.leaveOut();
  expect(next.open?.saved).toBe('saved');
  expect(host.kept.get('site')?.journal).toEqual([]);
});

test('leaving with unsaved edits asks; kept aside they are still in the journal, thrown away they are not', async () => {
  let open = await opened();
  rename(open, 'Renamed');
  shell.leave();
  expect(shell.dialog).toEqual({ kind: 'leave' });
  await shell.closeSite();
  expect(shell.open).toBeNull();
  expect(host.kept.get('site')?.journal).toHaveLength(1);
  open = await opened();
  rename(open, 'Renamed again');
  await shell.discardAndClose();
  expect(host.kept.get('site')?.journal).toHaveLength(0);
  expect(nameOnDisk()).toBe('Harbour shed');
});

test('leaving a saved site asks nothing', async () => {
  await opened();
  shell.leave();
  expect(shell.dialog).toBeNull();
});

test.each([
  ['no JSON', 'weights.txt', 'a,b,c', /not JSON/],
  ['another format', 'x.json', '{"format":"other"}', /format/],
  ['a newer file', 'x.json', '{"format":"tallybeam-site","version":99,"program":"9.0.0"}', /version 99/],
])('a file with %s is refused with its problems and nothing is taken in', async (_, name, text, message) => {
  await shell.importFile(new File([text], name));
  expect(shell.dialog).toMatchObject({ kind: 'problems', name, problems: [expect.stringMatching(message)] });
  expect(shell.open).toBeNull();
  expect(host.calls).not.toContain('importSite');
});

test('every problem of a site file is told with its place', async () => {
  const site = { ...smallSite(), seismic: 'perhaps', floors: 'none' };
  await shell.importFile(new File([fileOf(JSON.stringify(site))], 'x.json'));
  const problems = shell.dialog?.kind === 'problems' ? shell.dialog.problems : [];
  expect(problems).toEqual([expect.stringMatching(/^seismic: /), expect.stringMatching(/^floors: /)]);
});

test('a file that was edited by hand is taken only when that is said', async () => {
  const text = fileOf(writeSite(smallSite()));
  host.failing.set('importSite', { code: 'altered', message: 'Does not match.' });
  await shell.importFile(new File([text], 'edited.json'));
  expect(shell.dialog).toEqual({ kind: 'altered', name: 'edited.json', text });
  expect(shell.trouble).toBeNull();
});

test('a call that fails is told and changes nothing', async () => {
  host.failing.set('readSite', { code: 'folder-gone', message: 'The sites folder is gone. Plug it in again.' });
  await shell.openSite('site');
  expect(shell.open).toBeNull();
  expect(shell.trouble).toEqual({ code: 'folder-gone', message: 'The sites folder is gone. Plug it in again.' });
});

test('forms come up beside the drawing; entries of libraries stay in their own screen where that is up', async () => {
  const open = await opened();
  shell.show('help');
  open.openField('notice:notice:bayKg');
  expect(shell.screen).toBe('rack');
  shell.show('libraries');
  open.openTask('unitLoad', 'crate');
  expect(shell.screen).toBe('libraries');
  open.openTask('bay', open.bay?.id ?? '');
  expect(shell.screen).toBe('rack');
});
