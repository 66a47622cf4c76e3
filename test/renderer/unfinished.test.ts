import { expect, test } from 'vitest';
import { removeEntry } from '../../src-core/site/edits';
import { shellOn } from './opened';

test('what is filled in by half is named, and leaving the site asks first', async () => {
  const { shell, open } = await shellOn();
  open.typed.halves.set('notice:notice:levelKg', { label: 'Rated: height 3', typed: { heightMm: 1800 } });
  open.typed.drafts.set('bay:gone:clearEntryMm', { text: '1e3', reading: open.reading, label: 'Clear entry' });
  expect(open.unfinished).toEqual(['Rated: height 3']);
  const bayId = open.bay?.id ?? '';
  open.typed.drafts.set(`bay:${bayId}:clearEntryMm`, { text: '1e3', reading: open.reading, label: 'Clear entry' });
  expect(open.unfinished).toEqual(['Rated: height 3', 'Clear entry']);
  shell.leave();
  expect(shell.dialog).toEqual({ kind: 'leave' });
  shell.close();
  open.typed.drop('notice:notice:levelKg');
  open.typed.drop(`bay:${bayId}:clearEntryMm`);
  shell.leave();
  await expect.poll(() => shell.open).toBeNull();
});

test('dropping a table drops the cells typed in it, and nothing beside it', async () => {
  const { open } = await shellOn();
  const draft = (label: string) => ({ text: '5', reading: open.reading, label });
  open.typed.drafts.set('notice:notice:table.2.heightMm', draft('Height 3'));
  open.typed.drafts.set('notice:notice:tables', draft('Another'));
  open.typed.halves.set('notice:notice:table', { label: 'Row 3', typed: {} });
  open.typed.drop('notice:notice:table');
  expect(open.unfinished).toEqual(['Another']);
});

test('what was typed for an entry that is gone is no longer asked about', async () => {
  const { open } = await shellOn();
  open.edit('Bays without notice', (site) => ({
    ...site,
    runs: site.runs.map((run) => ({ ...run, bays: run.bays.map((bay) => ({ ...bay, noticeId: null })) })),
  }));
  open.typed.halves.set('notice:notice:levelKg', { label: 'Row', typed: {} });
  open.edit('Delete', (site) => removeEntry(site, 'notices', 'notice'));
  expect(open.unfinished).toEqual([]);
  open.undo();
  expect(open.unfinished).toEqual(['Row']);
});
