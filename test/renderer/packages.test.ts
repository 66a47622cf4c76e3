import { beforeEach, describe, expect, test, vi } from 'vitest';
import type { PackageLook } from '../../src-core/host';
import { writeSiteFile } from '../../src-core/site/envelope';
import { writeSite } from '../../src-core/site/write';
import * as offering from '../../src-renderer/state/offer-file';
import { sayContents, sayMissing } from '../../src-renderer/state/packages.svelte';
import { Shell } from '../../src-renderer/state/shell.svelte';
import { MemoryHost } from './memory-host';
import { smallSite } from './sites';

const fileOf = (body: string) => writeSiteFile(body, { program: '0.1.0', savedAt: '2026-12-01T12:00:00.000Z' }, () => '0'.repeat(64));
const PACKAGE = Uint8Array.from([0x50, 0x4b, 3, 4, ...Array.from({ length: 40 }, (_, i) => i)]);
const packageFile = (name = 'depot.tallybeam.zip', bytes = PACKAGE) => new File([bytes], name);

let host: MemoryHost;
let shell: Shell;

beforeEach(async () => {
  host = new MemoryHost();
  await host.saveSite({ id: 'site', body: fileOf(writeSite(smallSite())), baseRevision: null });
  shell = new Shell(host, null, () => '2026-12-01');
  await shell.start();
});

const here: NonNullable<PackageLook['here']> = { name: 'Depot', steps: ['1 visit is added.'], visitsDiffer: [], problem: null };

describe('bringing in', () => {
  test('a package is known by its content, whatever its name, and one of a new site is brought in and opened at its visits', async () => {
    await shell.importFile(packageFile('round.json'));
    expect(Array.from(host.packed)).toEqual(Array.from(PACKAGE));
    expect(host.taken).toEqual({ as: 'copy' });
    expect([shell.open?.id, shell.screen]).toEqual(['taken', 'visits']);
    expect(shell.open?.said).toBe('Brought in. 1 visit is added.');
    expect(shell.dialog).toEqual({ kind: 'package-done', done: ['1 visit is added.'] });
  });

  test('a site file is one under any name', async () => {
    await shell.importFile(new File([fileOf(writeSite(smallSite()))], 'depot.zip'));
    expect(host.calls).toContain('importSite');
    expect(host.calls).not.toContain('sendPackage');
  });

  test('of a site that is here already it is asked, and nothing is done before the answer', async () => {
    host.look = { ...host.look, here };
    await shell.importFile(packageFile());
    expect(shell.dialog).toMatchObject({ kind: 'package', look: { here: { steps: ['1 visit is added.'] } } });
    expect(host.taken).toBeNull();
    await shell.packages.take({ as: 'join', ifVisitDiffers: 'take-theirs' });
    expect(host.taken).toEqual({ as: 'join', ifVisitDiffers: 'take-theirs' });
    expect(shell.dialog?.kind).toBe('package-done');
  });

  test('one that is not wanted is dropped', async () => {
    host.look = { ...host.look, here };
    await shell.importFile(packageFile());
    await shell.packages.leave();
    expect(host.calls.at(-1)).toBe('dropPackage');
    expect([shell.dialog, shell.said, host.taken]).toEqual([null, 'Nothing was brought in.', null]);
  });

  test('a damaged one is told in the words of the host, and nothing is kept of it', async () => {
    host.failing.set('lookAtPackage', { code: 'altered', message: 'visit v1: checksum differs' });
    await shell.importFile(packageFile());
    expect(shell.trouble?.message).toContain('visit v1: checksum differs');
    expect([shell.dialog, shell.packages.progress, shell.busy, host.calls.at(-1)]).toEqual([null, null, false, 'dropPackage']);
  });

  test('it can be given up on the way', async () => {
    let goOn: () => void = () => undefined;
    host.waiting.set('sendPackage', new Promise((resolve) => (goOn = resolve)));
    const importing = shell.importFile(packageFile());
    await vi.waitFor(() => expect(shell.dialog?.kind).toBe('working'));
    expect(shell.packages.progress).toEqual({ doing: 'Reading the file', share: 0, canStop: true });
    shell.packages.giveUp();
    goOn();
    await importing;
    expect([shell.dialog, host.taken, shell.said, shell.trouble]).toEqual([null, null, 'Nothing was brought in.', null]);
    expect(host.calls).not.toContain('lookAtPackage');
  });

  test('a file far too large for a site, or for a package, is not read at all', async () => {
    for (const file of [new File(['{"format'], 'huge.json'), packageFile()]) {
      Object.defineProperty(file, 'size', { value: 1e9 });
      await shell.importFile(file);
      expect(shell.trouble?.code, file.name).toBe('too-large');
    }
    expect(host.calls.filter((call) => ['sendPackage', 'importSite'].includes(call))).toEqual([]);
  });
});

describe('exporting', () => {
  const offered: { readonly name: string; readonly bytes: number[] }[] = [];
  beforeEach(() => {
    offered.length = 0;
    vi.spyOn(offering, 'offerFile').mockImplementation((content, name) => {
      void content.arrayBuffer().then((bytes) => offered.push({ name, bytes: [...new Uint8Array(bytes)] }));
    });
    host.packed = PACKAGE;
  });

  test('the pieces come together as one file under the name of the site, and what is in it is said', async () => {
    await shell.openSite('site');
    await shell.packages.export();
    await vi.waitFor(() => expect(offered).toHaveLength(1));
    expect(offered[0]).toEqual({ name: 'Harbour-shed.tallybeam.zip', bytes: [...PACKAGE] });
    expect(shell.open?.said).toMatch(/^Exported 1 visit, 0 photos and 2 records, /);
    expect(host.calls.at(-1)).toBe('dropPackage');
  });

  test('a visit that is not on the disk yet is waited for, with words', async () => {
    await shell.openSite('site');
    shell.unsavedBeside = () => true;
    await shell.packages.export();
    expect(shell.trouble?.message).toContain('not on the disk yet');
    expect(host.calls).not.toContain('makePackage');
  });

  test('photos that are too many are offered to be left out', async () => {
    await shell.openSite('site');
    host.failing.set('makePackage', { code: 'too-large', message: 'too large' });
    await shell.packages.export();
    expect([shell.dialog, shell.trouble]).toEqual([{ kind: 'without-photos' }, null]);
    await shell.packages.export(false);
    expect([shell.dialog, shell.trouble?.message]).toEqual([null, 'too large']);
  });
});

test('what is in a package is said in numbers', () => {
  const look = { visits: 1, photos: 3, photosMissing: 1, records: 0 };
  expect(sayContents(look)).toBe('1 visit, 3 photos and 0 records');
  expect(sayMissing(look)).toBe(' 1 photo that visits name is not in it.');
  expect(sayMissing({ photosMissing: 0 })).toBe('');
});
