/** A package that is brought in while the program is stopped, the disk fails or the power goes: all of it is there afterwards, or nothing. */
import { cpSync, mkdirSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import type { Host, HostFailure } from '../../src-core/host';
import { note } from '../../src-core/visit/edits';
import { foldersIn } from '../../src-main/store/file-names';
import { nodeFs, type FsPort } from '../../src-main/store/fs-port';
import { Incoming, type Placing } from '../../src-main/store/incoming';
import { startMachine, temporaryFolder } from '../main/machine';
import { fill, packageOf, recordOf, save, seen, send } from '../main/make-package';
import { faultyFs } from './faulty-fs';
import { contentOf } from './folder';
import { drawn } from './make';
import { afterPowerCut, MemoryDisk, unsynced, type Fate } from './memory-fs';

const encode = (text: string) => new TextEncoder().encode(text);
const HOW = [{ as: 'join', ifVisitDiffers: 'take-theirs' }, { as: 'copy' }] as const;

/** What the page sees of every site, whatever its id. */
async function whole(host: Host): Promise<string> {
  const sites = await host.listSites();
  const told = await Promise.all(
    sites.map(async ({ id, name, problem }) => {
      const [visits, { records, altered, others }, followUp] = [
        await host.listVisits(id),
        await host.listRecords(id),
        await host.readFollowUp(id),
      ];
      const photos = await Promise.all(visits.flatMap(({ text }) => (text.includes('p1.jpg') ? [host.readPhoto(id, 'p1.jpg')] : [])));
      const noId = (text: string) => text.replaceAll(id, 'ID');
      return {
        name,
        problem,
        visits: visits.map(({ text }) => noId(text)),
        records,
        altered,
        others,
        followUp: noId(followUp?.text ?? ''),
        photos,
      };
    }),
  );
  return told
    .map((one) => JSON.stringify(one))
    .toSorted()
    .join('\n');
}

/** A sites folder, and a package that adds a visit and a record to it and changes a visit. */
async function begin(): Promise<{ top: string; file: Buffer; before: string }> {
  const top = temporaryFolder();
  const { machine, sites } = await startMachine(top);
  const host = machine.page();
  await fill(host);
  const elsewhere = temporaryFolder();
  mkdirSync(join(elsewhere, 'sites'));
  cpSync(sites, join(elsewhere, 'sites'), { recursive: true });
  const other = (await startMachine(elsewhere)).machine.page();
  await save(other, note(seen(), 'bay1', 'later'), (await other.listVisits('s'))[0]?.revision ?? null);
  await save(other, seen({ id: 'v2', name: 'Another' }));
  await other.appendRecord(recordOf(3));
  return { top, file: await packageOf(other), before: await whole(host) };
}

function copied(top: string): string {
  const folder = temporaryFolder();
  cpSync(top, folder, { recursive: true });
  return folder;
}

const startedAgain = async (top: string): Promise<Host> => (await startMachine(top)).machine.page();

/** From its call `at` on nothing reaches the disk any more, as after a kill. */
function stoppingFs(at: number): { readonly fs: FsPort; readonly calls: () => number } {
  let calls = 0;
  const real = faultyFs(nodeFs, null);
  const call =
    <A extends unknown[], T>(task: (...given: A) => Promise<T>) =>
    async (...given: A): Promise<T> => {
      if (calls++ >= at) throw Object.assign(new Error('the program was stopped'), { code: 'ESTOPPED' });
      return task(...given);
    };
  const opened = async (open: ReturnType<FsPort['create']>) => {
    const file = await open;
    return { write: call(file.write), sync: call(file.sync), size: call(file.size), cut: call(file.cut), close: () => file.close() };
  };
  const { read, facts, list, makeFolder, create, append, rename, link, remove, touch, syncFolder } = real.fs;
  const fs: FsPort = {
    read: call(read),
    facts: call(facts),
    list: call(list),
    makeFolder: call(makeFolder),
    create: call((path) => opened(create(path))),
    append: call((path) => opened(append(path))),
    rename: call(rename),
    link: call(link),
    remove: call(remove),
    touch: call(touch),
    syncFolder: call(syncFolder),
  };
  return { fs, calls: () => calls };
}

/** Whichever file system is in force when it is called. */
const through = (fs: () => FsPort): FsPort =>
  Object.fromEntries(
    Object.keys(nodeFs).map((name) => [
      name,
      (...given: never[]) => (fs()[name as keyof FsPort] as (...all: never[]) => unknown)(...given),
    ]),
  ) as unknown as FsPort;

const partsLeft = (folder: string): readonly string[] => {
  const sites = join(folder, 'sites');
  return readdirSync(sites).includes('incoming') ? readdirSync(join(sites, 'incoming')) : [];
};

describe.each(HOW)('brought in as $as', (how) => {
  /** What is there once it is brought in without any trouble. */
  async function afterwards(top: string, file: Buffer): Promise<string> {
    const host = await startedAgain(copied(top));
    await send(host, file);
    await host.takePackage(how);
    return whole(host);
  }

  test('a program stopped at any moment leaves the old state or the new one, and no parts', async () => {
    const { top, file, before } = await begin();
    const after = await afterwards(top, file);
    expect(after).not.toBe(before);
    let [old, fresh] = [0, 0];
    for (let at = 0, ended = false; !ended; at++) {
      const folder = copied(top);
      let stop = stoppingFs(Infinity);
      const { machine } = await startMachine(folder, { fs: through(() => stop.fs) });
      const host = machine.page();
      await send(host, file);
      stop = stoppingFs(at);
      ended = await host.takePackage(how).then(
        () => true,
        () => false,
      );
      const next = await startedAgain(folder);
      const now = await whole(next);
      expect([before, after], `stopped at call ${at}`).toContain(now);
      if (now === before) old++;
      else fresh++;
      expect(partsLeft(folder)).toEqual([]);
      expect((await next.about()).notices).toEqual([]);
      // Whatever was left, the same package can be brought in again.
      if (at % 10 === 0) {
        await send(next, file);
        await next.takePackage(how);
      }
    }
    expect(old).toBeGreaterThan(20);
    expect(fresh).toBeGreaterThan(5);
  });

  test.each(['ENOSPC', 'EIO', 'short write', 'EPERM'])(
    '%s at any call leaves the old state or the new one, with a message',
    async (kind) => {
      const { top, file, before } = await begin();
      const after = await afterwards(top, file);
      // A rename that is not allowed is tried for two seconds.
      const step = kind === 'EPERM' ? 11 : 4;
      for (let at = 0, ended = false; !ended; at += step) {
        const folder = copied(top);
        let faulty = faultyFs(nodeFs, null);
        const { machine } = await startMachine(folder, { fs: through(() => faulty.fs) });
        const host = machine.page();
        await send(host, file);
        faulty = faultyFs(nodeFs, { at, kind, stays: true });
        const answer = await host.takePackage(how).then(
          () => null,
          (error: HostFailure) => error.message,
        );
        ended = faulty.calls.length <= at;
        faulty = faultyFs(nodeFs, null);
        const now = await whole(await startedAgain(folder));
        expect([before, after], `call ${at}`).toContain(now);
        if (answer === null) expect(now, `call ${at}`).toBe(after);
        else
          expect(answer).toMatch(
            /^(The package was not brought in|Nothing was brought in|Not done, because|Not everything of the package is in its place)/,
          );
        expect(partsLeft(folder)).toEqual([]);
      }
    },
  );
});

test('after a power cut at any moment either every file is in its place or none', async () => {
  const folders = foldersIn('/sites');
  const old = { 'beside/s/a.json': 'old a', 'beside/s/b.json': 'old b' };
  const placings: readonly Placing[] = [
    { to: 'beside/s/visits/v.json', bytes: encode('new visit'), replaces: null },
    { to: 'beside/s/records/000001.json', bytes: encode('new record '.repeat(100)), replaces: null },
    { to: 's.tallybeam.json', bytes: encode('new site'), replaces: null },
  ];
  const start = new Map(Object.entries(old).map(([path, text]) => [`/sites/${path}`, encode(text)]));
  const disk = MemoryDisk.holding(start);
  await new Incoming(disk.fs, folders).place(placings, (task) => task());
  const random = drawn(99);
  let [none, all, states] = [0, 0, 0];
  for (let length = 0; length <= disk.operations.length; length++) {
    const prefix = disk.operations.slice(0, length);
    const open = unsynced(prefix);
    for (let draw = 0; draw < 12; draw++) {
      const fates = new Map<number, Fate>(
        open.map((i) => [
          i,
          draw === 0 ? 'kept' : draw === 1 || random() < 0.5 ? 'lost' : prefix[i]?.kind === 'data' && random() < 0.5 ? { cut: 5 } : 'kept',
        ]),
      );
      const found = MemoryDisk.holding(new Map([...start, ...afterPowerCut(prefix, fates)]));
      const told = await new Incoming(found.fs, folders).finish(new Date());
      const there = placings.filter(({ to }) => found.names().includes(`/sites/${to}`));
      states++;
      if (there.length === 0) none++;
      else {
        all++;
        expect(there.length, `after ${length} operations`).toBe(placings.length);
        for (const { to, bytes } of placings) expect(await found.fs.read(`/sites/${to}`)).toEqual(bytes);
      }
      expect(told).toEqual([]);
      for (const [path, text] of Object.entries(old)) expect(await found.fs.read(`/sites/${path}`)).toEqual(encode(text));
    }
  }
  expect(states).toBeGreaterThan(300);
  expect(none).toBeGreaterThan(50);
  expect(all).toBeGreaterThan(50);
});

describe('what was left half way', () => {
  const folders = (top: string) => foldersIn(top);

  test('is finished beside a file that changed meanwhile, not over it, and that is told', async () => {
    const top = temporaryFolder();
    const places = folders(top);
    const failing: FsPort = {
      ...nodeFs,
      rename: (from, to) => (to.endsWith('v.json') ? Promise.reject(new Error('stopped')) : nodeFs.rename(from, to)),
    };
    const placing = { to: 'beside/s/v.json', bytes: encode('from the package'), replaces: null };
    await expect(new Incoming(failing, places).place([placing], (task) => task())).rejects.toThrow('stopped');
    const file = await nodeFs.create(join(places.beside, 's', 'v.json'));
    await file.write(encode('of another program'));
    await file.close();
    const told = await new Incoming(nodeFs, places).finish(new Date());
    expect(told).toEqual([expect.stringMatching(/^beside\/s\/v\.json was changed while a package was brought in\. .*set-aside/)]);
    const content = contentOf(top);
    expect(content['beside/s/v.json']).toBe('of another program');
    expect(Object.entries(content).find(([path]) => path.startsWith('set-aside'))?.[1]).toBe('from the package');
  });

  test('a note that someone else wrote leads nowhere else', async () => {
    const top = temporaryFolder();
    const places = folders(top);
    for (const to of ['../evil.json', 'beside/../../evil.json', '/etc/evil', 'beside/s/../../x.json', 'own/settings.json'])
      await expect(new Incoming(nodeFs, places).place([{ to, bytes: encode('x'), replaces: null }], (task) => task())).rejects.toThrow(
        'is no place',
      );
    expect(contentOf(top)).toEqual({});
  });
});
