import { afterEach, expect, test } from 'vitest';
import { writeSite } from '../../src-core/site/write';
import { COMMANDS } from '../../src-renderer/commands';
import { changeLevel, nudge } from '../../src-renderer/goods-moves';
import type { OpenSite } from '../../src-renderer/open-site.svelte';
import { Shell } from '../../src-renderer/shell.svelte';
import { writeSiteFile } from '../../src-core/site/envelope';
import { MemoryHost } from './memory-host';
import { smallSite } from './sites';

let opened: OpenSite | null = null;
afterEach(() => opened?.close());

/** Two crates 800 mm wide stand at 75 and 950 mm on the lowest level of an entry of 2700 mm; trucks are not known, so gaps are 75 mm. */
async function openSite(pushing: boolean): Promise<OpenSite> {
  const site = smallSite();
  const host = new MemoryHost();
  const body = writeSiteFile(writeSite(site), { program: '0.1.0', savedAt: '2026-12-01T12:00:00.000Z' }, () => '0'.repeat(64));
  await host.saveSite({ id: site.id, body, baseRevision: null });
  const shell = new Shell(host, null, () => '2026-12-01');
  await shell.start();
  await shell.openSite(site.id);
  const { open } = shell;
  if (open === null) throw new Error('the site did not open');
  opened = open;
  if (pushing) COMMANDS.find((one) => one.id === 'push-apart')?.run({ shell, open });
  return open;
}

const places = (open: OpenSite, level = 0) =>
  Object.fromEntries((open.site.runs[0]?.bays[0]?.levels[level]?.placements ?? []).map((one) => [one.id, one.atMm]));
const levelId = (open: OpenSite, level: number) => open.site.runs[0]?.bays[0]?.levels[level]?.id ?? '';
const verdict = (open: OpenSite) => open.levelAudit?.verdict;

test('goods put down onto others stay there and are not possible, unless pushing apart is chosen', async () => {
  const open = await openSite(false);
  open.move('p1', { levelId: levelId(open, 0), atMm: 500 });
  expect(places(open)).toEqual({ p1: 500, p2: 950 });
  expect(verdict(open)).toBe('not-possible');
});

test('pushed apart, neighbours keep the gap of 75 mm, in one step of undo', async () => {
  const open = await openSite(true);
  const before = open.site;
  open.move('p1', { levelId: levelId(open, 0), atMm: 500 });
  // 500 + 800 + 75.
  expect(places(open)).toEqual({ p1: 500, p2: 1375 });
  expect(verdict(open)).not.toBe('not-possible');
  open.undo();
  expect(open.site).toBe(before);
});

test('a move tried, then put down, ends as the move itself', async () => {
  const moved = await openSite(true);
  moved.move('p2', { levelId: levelId(moved, 0), atMm: 20 });
  const wanted = places(moved);
  moved.close();
  const tried = await openSite(true);
  tried.tryMove('p2', { levelId: levelId(tried, 0), atMm: 20 });
  expect(places(tried)).toEqual(wanted);
  tried.keepTrial('p2');
  expect(places(tried)).toEqual(wanted);
});

test('keys and changing level push apart as well', async () => {
  const open = await openSite(true);
  open.select({ placementIds: ['p1'] });
  nudge(open, 100);
  expect(places(open)).toEqual({ p1: 175, p2: 1050 });
  open.move('p2', { levelId: levelId(open, 1), atMm: 300 });
  open.select({ placementIds: ['p1'] });
  changeLevel(open, 1);
  // p1 keeps to 175; p2, to its right, stands at 175 + 800 + 75.
  expect(places(open, 1)).toEqual({ p1: 175, p2: 1050 });
});

test('where the goods do not fit beside each other the move is refused and nothing changes', async () => {
  const open = await openSite(true);
  open.edit('Widen', (site) => ({ ...site, unitLoads: site.unitLoads.map((one) => ({ ...one, widthMm: 1400 })) }));
  open.move('p2', { levelId: levelId(open, 1), atMm: 0 });
  const before = open.site;
  open.select({ placementIds: ['p1'] });
  open.pickUp('p1');
  expect(open.move('p1', { levelId: levelId(open, 1), atMm: 100 })).toMatch(/do not fit beside each other/);
  expect(open.site).toBe(before);
  expect(open.said).toMatch(/Take one off first/);
});
