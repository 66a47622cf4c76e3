/** Sites opened as the page opens them, for its tests; each is closed when its test ends. */
import { afterEach } from 'vitest';
import { writeSiteFile } from '../../src-core/site/envelope';
import type { Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import type { WorkerLike } from '../../src-renderer/auditing/audit-link';
import { OpenSite } from '../../src-renderer/state/open-site.svelte';
import { Shell } from '../../src-renderer/state/shell.svelte';
import { MemoryHost } from './memory-host';
import { smallSite } from './sites';

const TODAY = '2026-12-01';
const opened: OpenSite[] = [];
afterEach(() => {
  for (const open of opened.splice(0)) open.close();
});

/** Not on any disk yet, and without the shell around it. */
export function openedSite(site: Site = smallSite()): OpenSite {
  const open = new OpenSite({ host: new MemoryHost(), id: site.id, site, revision: null, savedAt: null, today: () => TODAY });
  opened.push(open);
  return open;
}

/** On the disk of a host, whose file is the site’s text alone. */
export async function savedSite(
  site: Site = smallSite(),
  makeWorker: (() => WorkerLike) | null = null,
): Promise<{ readonly open: OpenSite; readonly host: MemoryHost }> {
  const host = new MemoryHost();
  const { revision, savedAt } = await host.saveSite({ id: site.id, body: writeSite(site), baseRevision: null });
  const open = new OpenSite({ host, id: site.id, site, revision, savedAt, makeWorker, today: () => TODAY });
  opened.push(open);
  return { open, host };
}

/** A site's file as the hosts give it out; they prove the checksum, and the page only reads what is inside. */
export const fileOf = (body: string): string =>
  writeSiteFile(body, { program: '0.1.0', savedAt: '2026-12-01T12:00:00.000Z' }, () => '0'.repeat(64));

/** The program started on a host that keeps this site, with the site open. */
export async function shellOn(site: Site = smallSite()): Promise<{ readonly shell: Shell; readonly open: OpenSite }> {
  const host = new MemoryHost();
  await host.saveSite({ id: site.id, body: fileOf(writeSite(site)), baseRevision: null });
  const shell = new Shell(host, null, () => TODAY);
  await shell.start();
  await shell.openSite(site.id);
  const { open } = shell;
  if (open === null) throw new Error(`the site did not open: ${shell.trouble?.message}`);
  opened.push(open);
  return { shell, open };
}
