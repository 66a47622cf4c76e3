/**
 * What every host promises, whoever carries it: the same suite is run against the host itself, over
 * IPC and over HTTP.
 */
import { describe, expect, test } from 'vitest';
import type { Host, HostFailure } from '../../src-core/host';
import { HOST_METHODS } from '../../src-core/host-wire';
import { bodyOf, numbered, numberIn } from '../storage/make';
import { fill, packageOf, PHOTO, recordOf, send } from './make-package';

export interface Carried {
  readonly host: Host;
  /** The host of a page that is loaded after this one. */
  readonly nextPage: () => Promise<Host>;
  readonly writeFile: (name: string, text: string) => void;
}

const failure = async (call: Promise<unknown>): Promise<HostFailure> => {
  try {
    await call;
  } catch (error) {
    const { code, message } = error as HostFailure;
    return { code, message };
  }
  throw new Error('was expected to be refused');
};

export function hostContract(name: string, inWindow: boolean, carry: () => Promise<Carried>): void {
  describe(`the host ${name}`, () => {
    test('offers every method, and only a window saves PDFs and chooses folders', async () => {
      const { host } = await carry();
      for (const method of HOST_METHODS)
        expect(typeof host[method], method).toBe(['savePdf', 'chooseSitesFolder'].includes(method) && !inWindow ? 'object' : 'function');
      expect(host.savePdf === null).toBe(!inWindow);
      expect(host.chooseSitesFolder === null).toBe(!inWindow);
    });

    test('says what it is', async () => {
      const { host } = await carry();
      expect(await host.about()).toEqual({
        version: expect.stringMatching(/^\d+\.\d+\.\d+$/) as string,
        carrier: inWindow ? 'window' : 'browser',
        sitesFolder: expect.stringMatching(/\S/) as string,
        notices: [],
      });
    });

    test('keeps a site from its first save to its removal', async () => {
      const { host } = await carry();
      expect(await host.listSites()).toEqual([]);
      const first = await host.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
      const second = await host.saveSite({ id: 's', body: bodyOf('s', 2), baseRevision: first.revision });
      const [entry] = await host.listSites();
      expect(entry).toMatchObject({
        id: 's',
        name: 'Test depot',
        revision: second.revision,
        savedAt: second.savedAt,
        bays: 0,
        problem: null,
      });
      const site = await host.readSite('s');
      expect(site).toMatchObject({ id: 's', ...second, recovered: null });
      expect(numberIn(site.text)).toBe(2);
      const [generation] = await host.listGenerations('s');
      expect(generation?.savedAt).toBe(first.savedAt);
      expect(numberIn(await host.readGeneration('s', generation?.id ?? ''))).toBe(1);
      expect((await failure(host.removeSite('s', first.revision))).code).toBe('stale');
      expect(await host.removeSite('s', second.revision)).toBeUndefined();
      expect(await host.listSites()).toEqual([]);
    });

    test('refuses a save on a revision that is not there any more, as a code and a sentence', async () => {
      const { host } = await carry();
      const { revision } = await host.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
      await host.saveSite({ id: 's', body: bodyOf('s', 2), baseRevision: revision });
      expect(await failure(host.saveSite({ id: 's', body: bodyOf('s', 3), baseRevision: revision }))).toEqual({
        code: 'stale',
        message: 'Not saved, because another window or program saved the site since it was opened here.',
      });
      expect(numberIn((await host.readSite('s')).text)).toBe(2);
    });

    test('offers edits that were not saved to the page that is loaded next', async () => {
      const { host, nextPage } = await carry();
      const { revision } = await host.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
      expect(await host.appendJournal({ id: 's', baseRevision: revision, body: bodyOf('s', 2), edit: 'Add bay' })).toBeUndefined();
      await host.appendJournal({ id: 's', baseRevision: revision, body: bodyOf('s', 3), edit: 'Move pallet' });
      const next = await nextPage();
      const { recovered } = await next.readSite('s');
      expect(recovered).toMatchObject({ body: bodyOf('s', 3), edits: ['Add bay', 'Move pallet'], baseRevision: revision, damagedLines: 0 });
      expect(await next.clearJournal('s')).toBeUndefined();
      expect((await (await nextPage()).readSite('s')).recovered).toBeNull();
    });

    test('offers nothing after a save', async () => {
      const { host, nextPage } = await carry();
      const { revision } = await host.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
      await host.appendJournal({ id: 's', baseRevision: revision, body: bodyOf('s', 2), edit: 'Add bay' });
      await host.saveSite({ id: 's', body: bodyOf('s', 2), baseRevision: revision });
      expect((await (await nextPage()).readSite('s')).recovered).toBeNull();
    });

    test('imports a file, tells one that was edited by hand, and takes it when told to', async () => {
      const { host } = await carry();
      await host.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
      const { text } = await host.readSite('s');
      const copy = await host.importSite(text);
      expect(copy).not.toBe('s');
      const edited = text.replace('Test depot', 'Best depot');
      expect((await failure(host.importSite(edited))).code).toBe('altered');
      const taken = await host.importSite(edited, true);
      expect((await host.listSites()).map(({ id, name: named }) => [id, named])).toEqual(
        expect.arrayContaining([
          ['s', 'Test depot'],
          [copy, 'Test depot'],
          [taken, 'Best depot'],
        ]),
      );
      expect(await failure(host.importSite('weight;level'))).toMatchObject({
        code: 'unreadable',
        message: expect.stringContaining('not JSON') as string,
      });
    });

    test('hands a site over with its visits, photos and records, whole and in pieces', async () => {
      const { host, nextPage } = await carry();
      // Larger than one piece of a package.
      const photo = Buffer.concat([PHOTO, Buffer.alloc(8 * 1024 * 1024, 0x5a)]);
      await fill(host, photo);
      expect(await host.makePackage('s', true)).toMatchObject({ visits: 1, photos: 1, photosMissing: 0, records: 2 });
      const file = await packageOf(host);
      expect(file.length).toBeGreaterThan(photo.length);
      expect(await host.dropPackage()).toBeUndefined();
      expect((await failure(host.readPackage(0))).code).toBe('bad-request');

      const next = await nextPage();
      const look = await send(next, file);
      expect(look).toMatchObject({ siteName: 'Test depot', visits: 1, photos: 1, photosMissing: 0, records: 2 });
      expect(look.here).toMatchObject({ name: 'Test depot', visitsDiffer: [], problem: null });
      const { id, done } = await next.takePackage({ as: 'copy' });
      expect(id).not.toBe('s');
      expect(done).toContain('2 records are added.');
      expect((await next.listVisits(id)).map((visit) => [visit.id, visit.problem])).toEqual([['v1', null]]);
      expect(Buffer.from(await next.readPhoto(id, 'p1.jpg'), 'base64').equals(photo)).toBe(true);
      const { records, altered, others } = await next.listRecords(id);
      expect([records.length, altered, others]).toEqual([2, null, []]);
      expect(await next.readRecord(id, 2)).toBe(recordOf(2).contents);
      expect((await next.readFollowUp(id))?.text).toContain('E. Engineer');
      // The same once more, into the site that is here: everything is there already.
      await send(next, file);
      const again = await next.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' });
      expect(again).toEqual({
        id: 's',
        done: ['1 visit is here already, the same.', '2 records are here already, verified and the same.'],
      });
    }, 60_000);

    test('refuses pieces of a package that do not follow each other, and what is no package', async () => {
      const { host } = await carry();
      await host.sendPackage(0, 'AAAA');
      expect((await failure(host.sendPackage(7, 'AAAA'))).code).toBe('bad-request');
      expect(await failure(host.lookAtPackage())).toMatchObject({
        code: 'altered',
        message: expect.stringContaining('not brought in') as string,
      });
      expect((await failure(host.takePackage({ as: 'copy' }))).code).toBe('bad-request');
      for (const wrong of [{ as: 'merge' }, { as: 'join' }, { as: 'copy', id: '../x' }, null])
        expect((await failure(host.takePackage(wrong as never))).code, JSON.stringify(wrong)).toBe('bad-request');
    });

    test('adds the demo once', async () => {
      const { host } = await carry();
      const id = await host.addDemoSite();
      expect(await host.addDemoSite()).toBe(id);
      const [entry, ...others] = await host.listSites();
      expect(others).toEqual([]);
      expect(entry?.problem).toBeNull();
      expect(entry?.bays).toBeGreaterThanOrEqual(12);
    });

    test('keeps preferences, and those of them that cannot be are refused', async () => {
      const { host, nextPage } = await carry();
      expect(await host.readPreferences()).toEqual({ theme: 'system', textScale: 100, recentSiteIds: [], person: '', locale: 'und' });
      const change = { theme: 'dark', textScale: 150, person: 'A. Planner', recentSiteIds: ['s'], locale: 'de-DE' } as const;
      expect(await host.savePreferences(change)).toEqual(change);
      expect(await (await nextPage()).readPreferences()).toEqual(change);
      for (const wrong of [{ theme: 'neon' }, { textScale: 1e9 }, { locale: '../' }, { recentSiteIds: ['../x'] }, { colour: 1 }, null, []])
        expect((await failure(host.savePreferences(wrong as object))).code, JSON.stringify(wrong)).toBe('bad-request');
      expect(await host.readPreferences()).toEqual(change);
    });

    test('refuses a site that is not right, with every problem', async () => {
      const { host } = await carry();
      const body = JSON.stringify({ ...numbered('s', 1), units: 'cubits', seismic: 'maybe' });
      const { code, message } = await failure(host.saveSite({ id: 's', body, baseRevision: null }));
      expect(code).toBe('bad-request');
      expect(message).toMatch(/units: [^]*seismic: /);
      expect(await host.listSites()).toEqual([]);
    });

    test('tells what is not there, what is newer and what is damaged', async () => {
      const { host, writeFile } = await carry();
      expect((await failure(host.readSite('nowhere'))).code).toBe('not-found');
      writeFile('new.tallybeam.json', '{"format":"tallybeam-site","version":99,"program":"9.0.0"}');
      expect((await failure(host.readSite('new'))).code).toBe('newer-version');
      writeFile('bad.tallybeam.json', '{"format":"tallybeam-site","version":1,');
      expect((await failure(host.readSite('bad'))).code).toBe('altered');
      expect((await host.listSites()).map(({ problem }) => typeof problem)).toEqual(['string', 'string']);
    });

    test('takes a site as large as a whole warehouse', async () => {
      const { host } = await carry();
      const body = bodyOf('s', 1, 25_000);
      expect(body.length).toBeGreaterThan(5_000_000);
      const { revision } = await host.saveSite({ id: 's', body, baseRevision: null });
      expect(await host.readSite('s')).toMatchObject({ revision, recovered: null });
    }, 60_000);
  });
}
