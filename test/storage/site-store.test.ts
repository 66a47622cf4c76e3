import { createHash } from 'node:crypto';
import { copyFileSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { readSite } from '../../src-core/site/read';
import { foldersIn, machineTag } from '../../src-main/store/file-names';
import { nodeFs } from '../../src-main/store/fs-port';
import { sweep } from '../../src-main/store/sweep';
import { contentOf, newFolder, siteText, storeIn } from './folder';
import { bodyOf, numbered, numberIn } from './make';

const first = { id: 's', body: bodyOf('s', 1), baseRevision: null };
const failure = async (promise: Promise<unknown>): Promise<{ code: unknown; message: string }> => {
  try {
    await promise;
  } catch (error) {
    return error as { code: unknown; message: string };
  }
  throw new Error('was expected to be refused');
};

describe('saving and reading', () => {
  test('a saved site is read back with its text, time, and the hash of its bytes as revision', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    const saved = await store.save(first);
    const read = await store.read('s');
    expect(read).toMatchObject({ ...saved, text: siteText(folder) });
    expect(read.site).toEqual(numbered('s', 1));
    expect(saved.revision).toBe(createHash('sha256').update(siteText(folder)).digest('hex'));
    expect(readdirSync(folder).sort()).toEqual(['locks', 's.tallybeam.json']);
    expect(readdirSync(join(folder, 'locks'))).toEqual([]);
  });

  test('equal sites saved at equal times are equal files, byte for byte', async () => {
    const folders = [newFolder(), newFolder()];
    for (const folder of folders) await storeIn(folder).save(first);
    expect(siteText(folders[0] ?? '')).toBe(siteText(folders[1] ?? ''));
  });

  test('a site that is not right is not saved, and all that is wrong is listed', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    const body = JSON.stringify({ ...numbered('s', 1), units: 'furlongs', seismic: 7 });
    expect(readSite(JSON.parse(body)).ok).toBe(false);
    const { code, message } = await failure(store.save({ ...first, body }));
    expect(code).toBe('bad-request');
    expect(message).toMatch(/^Not saved, because the site is not right\. units: .*"furlongs"[^]*seismic: /);
    for (const bad of ['', '{', '[]', 'null', first.body.replace('"name":', '"name":"Other","name":')])
      expect((await failure(store.save({ ...first, body: bad }))).code).toBe('bad-request');
    expect(contentOf(folder)).toEqual({});
  });

  test('a body under the id of another site is refused', async () => {
    expect((await failure(storeIn(newFolder()).save({ ...first, id: 'other' }))).message).toContain('its id is s, not other');
  });

  test('the same site in another layout is written in the one form', async () => {
    const folder = newFolder();
    await storeIn(folder).save({ ...first, body: JSON.stringify(JSON.parse(first.body), null, 2) });
    expect(siteText(folder)).toContain(`"site":${first.body}}`);
  });

  test.each(['../s', 'a/b', 'a\\b', '.', '', 'con', 'LPT1', 'a'.repeat(65), 's\0', '__proto__'])('%j is no id of a site', async (id) => {
    const store = storeIn(newFolder());
    for (const call of [() => store.read(id), () => store.save({ ...first, id }), () => store.remove(id, ''), () => store.generations(id)])
      expect((await failure((async () => call())())).code).toBe('bad-request');
  });
});

describe('two at once', () => {
  test('a save on a revision that is not there any more is refused, and the other state stays', async () => {
    const folder = newFolder();
    const [one, two] = [storeIn(folder), storeIn(folder)];
    const { revision } = await one.save(first);
    const theirs = await two.save({ id: 's', body: bodyOf('s', 2), baseRevision: revision });
    const { code, message } = await failure(one.save({ id: 's', body: bodyOf('s', 3), baseRevision: revision }));
    expect(code).toBe('stale');
    expect(message).toBe('Not saved, because another window or program saved the site since it was opened here.');
    expect(numberIn(siteText(folder))).toBe(2);
    await one.save({ id: 's', body: bodyOf('s', 3), baseRevision: theirs.revision });
    expect(numberIn(siteText(folder))).toBe(3);
  });

  test('a file changed or removed by hand is noticed', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    const { revision } = await store.save(first);
    writeFileSync(join(folder, 's.tallybeam.json'), siteText(folder).replace('Test', 'Best'));
    expect((await failure(store.save({ ...first, baseRevision: revision }))).code).toBe('stale');
    rmSync(join(folder, 's.tallybeam.json'));
    const { code, message } = await failure(store.save({ ...first, baseRevision: revision }));
    expect(code).toBe('stale');
    expect(message).toContain('was removed or moved elsewhere');
  });

  test('a new site never takes the place of one that is there', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    await store.save(first);
    expect((await failure(store.save({ ...first, body: bodyOf('s', 2) }))).code).toBe('stale');
    expect(numberIn(siteText(folder))).toBe(1);
  });

  test('of many saves at once on one revision exactly one is taken', async () => {
    const folder = newFolder();
    const { revision } = await storeIn(folder).save(first);
    const results = await Promise.allSettled(
      Array.from({ length: 12 }, (_, i) => storeIn(folder).save({ id: 's', body: bodyOf('s', 10 + i), baseRevision: revision })),
    );
    const taken = results.flatMap((result, i) => (result.status === 'fulfilled' ? [10 + i] : []));
    expect(taken).toEqual([numberIn(siteText(folder))]);
    for (const result of results) if (result.status === 'rejected') expect((result.reason as { code: string }).code).toBe('stale');
  });
});

describe('invalid files', () => {
  const damaged = async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    await store.save(first);
    const text = siteText(folder).replace('state 1', 'state 9');
    writeFileSync(join(folder, 's.tallybeam.json'), text);
    return { folder, store, text };
  };

  test('are listed with what is wrong, refused when read, and left as they are', async () => {
    const { folder, store, text } = await damaged();
    const [entry] = await store.list();
    expect(entry).toMatchObject({ id: 's', bays: null, revision: createHash('sha256').update(text).digest('hex') });
    expect(entry?.problem).toMatch(/^checksum: Does not match the file/);
    const { code, message } = await failure(store.read('s'));
    expect(code).toBe('altered');
    expect(message).toContain('s.tallybeam.json cannot be opened; its file was left as it is.');
    expect(siteText(folder)).toBe(text);
  });

  test('are set aside when the user saves over them, and stay there', async () => {
    const { folder, store, text } = await damaged();
    const [entry] = await store.list();
    let { revision } = await store.save({ id: 's', body: bodyOf('s', 2), baseRevision: entry?.revision ?? null });
    for (let n = 3; n < 20; n++) ({ revision } = await store.save({ id: 's', body: bodyOf('s', n), baseRevision: revision }));
    expect(Object.entries(contentOf(folder)).filter(([path]) => path.startsWith('set-aside'))).toEqual([
      [expect.stringMatching(/^set-aside\/s-[0-9a-f]{16}\.tallybeam\.json$/), text],
    ]);
  });

  test('of a newer program are told by their version', async () => {
    const folder = newFolder();
    writeFileSync(join(folder, 's.tallybeam.json'), '{"format":"tallybeam-site","version":99,"program":"3.0.0"}');
    const { code, message } = await failure(storeIn(folder).read('s'));
    expect(code).toBe('newer-version');
    expect(message).toContain('written by Tallybeam 3.0.0');
  });

  test('with bytes that are no text are told as damaged', async () => {
    const folder = newFolder();
    writeFileSync(join(folder, 's.tallybeam.json'), Buffer.from([0x7b, 0xff, 0xfe]));
    expect(await failure(storeIn(folder).read('s'))).toMatchObject({
      code: 'altered',
      message: expect.stringContaining('no UTF-8') as string,
    });
  });

  test('that are copies made outside the program are told as such', async () => {
    const folder = newFolder();
    await storeIn(folder).save(first);
    copyFileSync(join(folder, 's.tallybeam.json'), join(folder, 's-copy.tallybeam.json'));
    copyFileSync(join(folder, 's.tallybeam.json'), join(folder, 'North hall (2).tallybeam.json'));
    mkdirSync(join(folder, 'x.tallybeam.json'));
    const list = await storeIn(folder).list();
    expect(list.map(({ id, problem }) => [id.replace(/^file-.*/, 'file-'), problem === null])).toEqual([
      ['file-', false],
      ['s', true],
      ['s-copy', false],
    ]);
    expect(list[2]?.problem).toContain('Import it to have it as a site of its own');
    expect((await failure(storeIn(folder).read('s-copy'))).code).toBe('unreadable');
  });
});

describe('earlier states', () => {
  test('every save keeps the state that it replaces; the last ten stay', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    let revision: string | null = null;
    for (let n = 1; n <= 15; n++) ({ revision } = await store.save({ id: 's', body: bodyOf('s', n), baseRevision: revision }));
    const kept = await store.generations('s');
    const numbers = await Promise.all(kept.map(async ({ id }) => numberIn(await store.readGeneration('s', id))));
    expect(numbers).toEqual([14, 13, 12, 11, 10, 9, 8, 7, 6, 5]);
    expect(kept[0]?.bytes).toBe((await store.readGeneration('s', kept[0]?.id ?? '')).length);
    expect(kept.map(({ savedAt }) => savedAt)).toEqual(
      kept
        .map(({ savedAt }) => savedAt)
        .sort()
        .reverse(),
    );
  });

  test('beyond those, the last of each day stays for thirty days', async () => {
    const store = storeIn(newFolder());
    const folder = store.folders.sites;
    let revision: string | null = null;
    let n = 0;
    // Three saves a day for forty days.
    for (let day = 0; day < 40; day++) {
      for (const hour of ['08', '12', '16']) {
        const now = new Date(Date.parse(`2026-10-01T${hour}:00:00.000Z`) + day * 86_400_000);
        ({ revision } = await storeIn(folder, nodeFs, () => now).save({ id: 's', body: bodyOf('s', ++n), baseRevision: revision }));
      }
    }
    const kept = (await store.generations('s')).map(({ savedAt }) => savedAt.slice(0, 13));
    const latest = kept.slice(0, 10);
    expect(latest).toEqual([
      '2026-11-09T12',
      '2026-11-09T08',
      '2026-11-08T16',
      '2026-11-08T12',
      '2026-11-08T08',
      '2026-11-07T16',
      '2026-11-07T12',
      '2026-11-07T08',
      '2026-11-06T16',
      '2026-11-06T12',
    ]);
    const daily = kept.slice(10);
    expect(daily).toEqual(
      Array.from({ length: 27 }, (_, i) => `${new Date(Date.parse('2026-11-05') - i * 86_400_000).toISOString().slice(0, 10)}T16`),
    );
  });

  test('one that was damaged or is gone is told, and its name cannot lead elsewhere', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    const { revision } = await store.save(first);
    await store.save({ id: 's', body: bodyOf('s', 2), baseRevision: revision });
    const [kept] = await store.generations('s');
    const path = join(folder, 'earlier', 's', `${kept?.id}.tallybeam.json`);
    writeFileSync(path, readFileSync(path, 'utf8').replace('state 1', 'state 7'));
    expect((await failure(store.readGeneration('s', kept?.id ?? ''))).code).toBe('altered');
    rmSync(path);
    expect((await failure(store.readGeneration('s', kept?.id ?? ''))).code).toBe('not-found');
    expect((await failure(store.readGeneration('s', '../../s'))).code).toBe('bad-request');
    expect(await store.generations('never-saved')).toEqual([]);
  });

  test('a file edited in place later does not change the state that was kept', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    const { revision } = await store.save(first);
    await store.save({ id: 's', body: bodyOf('s', 2), baseRevision: revision });
    writeFileSync(join(folder, 's.tallybeam.json'), 'spoilt');
    const [kept] = await store.generations('s');
    expect(numberIn(await store.readGeneration('s', kept?.id ?? ''))).toBe(1);
  });

  test('are copied where the file system has no links', async () => {
    const folder = newFolder();
    const noLinks = { ...nodeFs, link: () => Promise.reject(Object.assign(new Error('no links'), { code: 'EPERM' })) };
    const store = storeIn(folder, noLinks);
    const { revision } = await store.save(first);
    await store.save({ id: 's', body: bodyOf('s', 2), baseRevision: revision });
    const [kept] = await store.generations('s');
    expect(numberIn(await store.readGeneration('s', kept?.id ?? ''))).toBe(1);
  });
});

describe('removing, importing', () => {
  test('a removed site lies in the removed folder and can be brought back by hand', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    const { revision } = await store.save(first);
    const text = siteText(folder);
    expect((await failure(store.remove('s', '0'.repeat(64)))).code).toBe('stale');
    await store.remove('s', revision);
    expect(await store.list()).toEqual([]);
    expect((await failure(store.remove('s', revision))).code).toBe('not-found');
    const [name] = readdirSync(join(folder, 'removed'));
    renameSync(join(folder, 'removed', name ?? ''), join(folder, 's.tallybeam.json'));
    expect((await store.read('s')).text).toBe(text);
  });

  test('an imported site keeps its id, or gets a new one where that is taken', async () => {
    const store = storeIn(newFolder());
    const elsewhere = newFolder();
    await storeIn(elsewhere).save(first);
    const file = siteText(elsewhere);
    expect(await store.importText(file, false)).toBe('s');
    const second = await store.importText(file, false);
    expect(second).toMatch(/^[0-9a-f-]{36}$/);
    expect((await store.read(second)).site).toEqual({ ...numbered('s', 1), id: second });
    expect((await store.list()).length).toBe(2);
  });

  test('a file edited by hand is imported only when that is said', async () => {
    const elsewhere = newFolder();
    await storeIn(elsewhere).save(first);
    const edited = siteText(elsewhere).replace('Test depot', 'Best depot');
    const store = storeIn(newFolder());
    const { code, message } = await failure(store.importText(edited, false));
    expect(code).toBe('altered');
    expect(message).toContain('import it as unchecked');
    expect((await store.read(await store.importText(edited, true))).site.name).toBe('Best depot');
    expect((await failure(store.importText(edited.replace('"units":"metric"', '"units":"cubits"'), true))).message).toContain(
      'site.units: ',
    );
  });
});

describe('folders', () => {
  test('one that is gone is told as gone, by every call, and is not made anew', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    const { revision } = await store.save(first);
    rmSync(folder, { recursive: true });
    for (const call of [
      store.list(),
      store.read('s'),
      store.save({ ...first, baseRevision: revision }),
      store.save(first),
      store.remove('s', revision),
    ]) {
      const { code, message } = await failure(call);
      expect(code).toBe('folder-gone');
      expect(message).toContain('Connect the drive or network share again');
    }
    expect(() => readdirSync(folder)).toThrow('ENOENT');
  });

  test('a site that is not in a folder that is there is told as such', async () => {
    expect(await failure(storeIn(newFolder()).read('s'))).toMatchObject({ code: 'not-found' });
  });

  test('the list gives name, time, size and bays, reads only changed files again, and sorts by name', async () => {
    const folder = newFolder();
    let reads = 0;
    const store = storeIn(folder, { ...nodeFs, read: (path) => (path.includes('.lock') ? undefined : reads++, nodeFs.read(path)) });
    await store.save(first);
    await store.save({ id: 'a', body: bodyOf('a', 1).replace('Test depot', 'Zinc store'), baseRevision: null });
    writeFileSync(join(folder, 'notes.txt'), 'not a site');
    reads = 0;
    const list = await store.list();
    expect(list.map(({ name, bays, problem }) => ({ name, bays, problem }))).toEqual([
      { name: 'Test depot', bays: 0, problem: null },
      { name: 'Zinc store', bays: 0, problem: null },
    ]);
    expect(list[0]).toMatchObject({ id: 's', bytes: siteText(folder).length, savedAt: (await store.read('s')).savedAt });
    expect(reads).toBe(3);
    await store.list();
    expect(reads).toBe(3);
  });

  test('temporary files of ended programs are swept at the start; those of running ones stay', async () => {
    const folder = newFolder();
    const temp = (machine: string, pid: number) => `s.tallybeam.json.${machine}-${pid}-0123456789ab.temp`;
    mkdirSync(join(folder, 'earlier', 's'), { recursive: true });
    // No system gives out a process number as high.
    const ended = temp(machineTag, 2 ** 30);
    const running = temp(machineTag, process.ppid);
    const elsewhere = temp('00000000', 1);
    mkdirSync(join(folder, 'locks'));
    for (const name of [ended, running, elsewhere, join('earlier', 's', ended), join('locks', 's.lock'), 'x.temp'])
      writeFileSync(join(folder, name), 'half');
    await sweep(nodeFs, foldersIn(folder), new Date());
    expect(Object.keys(contentOf(folder)).sort()).toEqual([running, elsewhere, join('locks', 's.lock'), 'x.temp'].sort());
    await sweep(nodeFs, foldersIn(folder), new Date(Date.now() + 2 * 3600_000));
    expect(Object.keys(contentOf(folder))).toEqual(['x.temp']);
  });
});
