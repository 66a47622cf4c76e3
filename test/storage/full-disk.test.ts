import { spawnSync } from 'node:child_process';
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { bundled } from './bundled';
import { newFolder } from './folder';
import type { FullDiskReport } from './full-disk-child';

test('where the system itself gives no more room, the old file stays and the user is told', async () => {
  const folder = newFolder();
  const sites = join(folder, 'sites');
  mkdirSync(sites);
  const child = await bundled('full-disk-child', join(folder, 'child'));
  // No file may grow beyond 1000 KiB: writes stop in the middle, as on a full disk.
  const { stdout, stderr } = spawnSync('sh', ['-c', 'ulimit -f 2000 && exec "$0" "$1" "$2"', process.execPath, child, sites], {
    encoding: 'utf8',
  });
  expect(stderr).toBe('');
  const report = JSON.parse(stdout) as FullDiskReport;
  expect(report).toEqual({
    save: { code: 'disk-full', message: expect.stringMatching(/^Not saved, because .* \(EFBIG\)\. Free some space/) as string },
    journal: { code: 'disk-full', message: expect.stringContaining('The change is not in the journal yet, because') as string },
    fileUnchanged: true,
    journalStillReads: true,
    temporary: 0,
    savedAgain: true,
  });
});
