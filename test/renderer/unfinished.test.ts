import { afterEach, expect, test } from 'vitest';
import { removeEntry } from '../../src-core/site/edits';
import { writeSiteFile } from '../../src-core/site/envelope';
import { writeSite } from '../../src-core/site/write';
import type { OpenSite } from '../../src-renderer/open-site.svelte';
import { Shell } from '../../src-renderer/shell.svelte';
import { MemoryHost } from './memory-host';
import { smallSite } from './sites';

let opened: OpenSite | null = null;
afterEach(() => opened?.close());

async function openSite(): Promise<{ shell: Shell; open: OpenSite }> {
  const site = { ...smallSite(), unitLoads: [...smallSite().unitLoads] };
  const host = new MemoryHost();
  const body = writeSiteFile(writeSite(site), { program: '0.1.0', savedAt: '2026-12-01T12:00:00.000Z' }, () => '0'.repeat(64));
  await host.saveSite({ id: site.id, body, baseRevision: null });
  const shell = new Shell(host, null, () => '2026-12-01');
  await shell.start();
  await shell.openSite(site.id);
  const { open } = shell;
  if (open === null) throw new Error('the site did not open');
  opened = open;
  return { shell, open };
}

test('what is filled in by half is named, and leaving the site asks first', async () => {
  const { shell, open } = await openSite();
  open.halves.set('notice:notice:levelKg', { label: 'Rated: height 3', typed: { heightMm: 1800 } });
  open.drafts.set('bay:gone:clearEntryMm', { text: '1e3', reading: open.reading, label: 'Clear entry' });
  expect(open.unfinished).toEqual(['Rated: height 3']);
  const bayId = open.bay?.id ?? '';
  open.drafts.set(`bay:${bayId}:clearEntryMm`, { text: '1e3', reading: open.reading, label: 'Clear entry' });
  expect(open.unfinished).toEqual(['Rated: height 3', 'Clear entry']);
  shell.leave();
  expect(shell.dialog).toEqual({ kind: 'leave' });
  shell.close();
  open.dropTyped('notice:notice:levelKg');
  open.dropTyped(`bay:${bayId}:clearEntryMm`);
  shell.leave();
  await expect.poll(() => shell.open).toBeNull();
});

test('dropping a table drops the cells typed in it, and nothing beside it', async () => {
  const { open } = await openSite();
  const draft = (label: string) => ({ text: '5', reading: open.reading, label });
  open.drafts.set('notice:notice:table.2.heightMm', draft('Height 3'));
  open.drafts.set('notice:notice:tables', draft('Another'));
  open.halves.set('notice:notice:table', { label: 'Row 3', typed: {} });
  open.dropTyped('notice:notice:table');
  expect(open.unfinished).toEqual(['Another']);
});

test('what was typed for an entry that is gone is no longer asked about', async () => {
  const { open } = await openSite();
  open.edit('Bays without notice', (site) => ({
    ...site,
    runs: site.runs.map((run) => ({ ...run, bays: run.bays.map((bay) => ({ ...bay, noticeId: null })) })),
  }));
  open.halves.set('notice:notice:levelKg', { label: 'Row', typed: {} });
  open.edit('Delete', (site) => removeEntry(site, 'notices', 'notice'));
  expect(open.unfinished).toEqual([]);
  open.undo();
  expect(open.unfinished).toEqual(['Row']);
});
