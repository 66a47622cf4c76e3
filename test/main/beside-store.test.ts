import { copyFileSync, existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync, appendFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import type { AppendRecord } from '../../src-core/host';
import { closeAction, newFollowUp, writeFollowUp } from '../../src-core/visit/follow-up';
import { note } from '../../src-core/visit/edits';
import { writeVisit } from '../../src-core/visit/read-visit';
import { BesideStore, PHOTO_BYTES } from '../../src-main/store/beside-store';
import { foldersIn } from '../../src-main/store/file-names';
import { nodeFs } from '../../src-main/store/fs-port';
import { RecordStore } from '../../src-main/store/record-store';
import { sweep } from '../../src-main/store/sweep';
import { round } from '../core/visit/make-visit';
import { clock, newFolder } from '../storage/folder';

const storeIn = (folder: string): BesideStore => new BesideStore(nodeFs, foldersIn(folder));
const recordsIn = (folder: string): RecordStore => new RecordStore({ fs: nodeFs, beside: storeIn(folder), program: '0.1.0', now: clock() });

const failure = async (task: Promise<unknown>): Promise<{ code: unknown; message: string }> => {
  try {
    await task;
  } catch (error) {
    return error as { code: unknown; message: string };
  }
  throw new Error('was expected to be refused');
};

const first = { siteId: 's1', visitId: 'v1', body: writeVisit(round), baseRevision: null };

describe('visits', () => {
  test('a saved visit is listed with its text and revision, and changes under it', async () => {
    const store = storeIn(newFolder());
    expect(await store.visits('s1')).toEqual([]);
    const { revision } = await store.saveVisit(first);
    expect(await store.visits('s1')).toEqual([{ id: 'v1', text: first.body, revision, problem: null }]);
    const body = writeVisit(note(round, 'bay1', 'later'));
    const next = await store.saveVisit({ ...first, body, baseRevision: revision });
    expect(await store.visits('s1')).toEqual([{ id: 'v1', text: body, revision: next.revision, problem: null }]);
    expect(await store.visits('s2')).toEqual([]);
  });

  test('a save on a revision that is gone is refused, and the other state stays', async () => {
    const store = storeIn(newFolder());
    const { revision } = await store.saveVisit(first);
    // The same once more is there already.
    expect(await store.saveVisit(first)).toEqual({ revision });
    const other = { ...first, body: writeVisit(note(round, 'bay1', 'ours')) };
    expect(await failure(store.saveVisit(other))).toMatchObject({ code: 'stale', message: expect.stringContaining('another window') });
    expect((await store.visits('s1'))[0]?.text).toBe(first.body);
  });

  test('a visit that is not right is not saved, with everything that is wrong', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    const bad = await failure(store.saveVisit({ ...first, body: first.body.replace('"weekly"', '"monthly"') }));
    expect(bad).toMatchObject({ code: 'bad-request', message: expect.stringContaining('kind:') });
    expect(await failure(store.saveVisit({ ...first, body: '{' }))).toMatchObject({ code: 'bad-request' });
    expect(await failure(store.saveVisit({ ...first, visitId: 'v2' }))).toMatchObject({ message: expect.stringContaining('v1') });
    expect(existsSync(join(folder, 'beside', 's1', 'visits'))).toBe(false);
  });

  test('a damaged visit is listed with what is wrong, and left as it is', async () => {
    const folder = newFolder();
    const store = storeIn(folder);
    await store.saveVisit(first);
    const path = join(folder, 'beside', 's1', 'visits', 'v1.json');
    writeFileSync(path, '{"version":1');
    expect((await store.visits('s1'))[0]).toMatchObject({ id: 'v1', problem: expect.stringContaining('damaged') });
    expect(readFileSync(path, 'utf8')).toBe('{"version":1');
  });

  test.each(['../s1', 'con', '', 'a/b'])('%j names no site and no visit', async (id) => {
    const store = storeIn(newFolder());
    for (const call of [() => store.visits(id), () => store.saveVisit({ ...first, siteId: id }), () => store.readPhoto('s1', `${id}.jpg`)])
      expect((await failure((async () => call())())).code).toBe('bad-request');
  });

  test('what a program that was stopped left beside a site is swept at the next start', async () => {
    const folder = newFolder();
    await storeIn(folder).saveVisit(first);
    const left = join(folder, 'beside', 's1', 'visits', `v1.json.${'0'.repeat(8)}-1-${'0'.repeat(12)}.temp`);
    writeFileSync(left, 'half');
    await sweep(nodeFs, foldersIn(folder), new Date(Date.now() + 2 * 60 * 60 * 1000));
    expect(readdirSync(join(folder, 'beside', 's1', 'visits'))).toEqual(['v1.json']);
  });
});

test('the follow-up is kept beside its own site', async () => {
  const store = storeIn(newFolder());
  expect(await store.followUp('s1')).toBeNull();
  const book = closeAction(newFollowUp('s1'), { actionId: 'damage:d', date: '2026-06-02', person: 'F.', how: 'replaced' });
  const { revision } = await store.saveFollowUp({ siteId: 's1', body: writeFollowUp(book), baseRevision: null });
  expect(await store.followUp('s1')).toMatchObject({ text: writeFollowUp(book), revision, problem: null });
  expect(await failure(store.saveFollowUp({ siteId: 's2', body: writeFollowUp(book), baseRevision: null }))).toMatchObject({
    message: expect.stringContaining('s1'),
  });
});

describe('photos', () => {
  const jpeg = Buffer.from([0xff, 0xd8, 0xff, 0xe0, 1, 2, 3]).toString('base64');

  test('a photo comes back byte for byte, under an end that its bytes tell', async () => {
    const store = storeIn(newFolder());
    expect(await store.addPhoto({ siteId: 's1', photoId: 'p1', base64: jpeg })).toEqual({ file: 'p1.jpg' });
    expect(await store.readPhoto('s1', 'p1.jpg')).toBe(jpeg);
    expect(await failure(store.readPhoto('s1', 'p2.jpg'))).toMatchObject({ code: 'not-found' });
    expect(await failure(store.readPhoto('s1', 'p1.exe'))).toMatchObject({ code: 'bad-request' });
  });

  test('what is no picture, or too large, is refused with what to do', async () => {
    const store = storeIn(newFolder());
    const text = Buffer.from('<script>').toString('base64');
    expect(await failure(store.addPhoto({ siteId: 's1', photoId: 'p', base64: text }))).toMatchObject({
      message: expect.stringContaining('JPEG, PNG or WebP'),
    });
    const large = Buffer.alloc(PHOTO_BYTES + 1, 0xff).toString('base64');
    expect(await failure(store.addPhoto({ siteId: 's1', photoId: 'p', base64: large }))).toMatchObject({ code: 'too-large' });
  });
});

describe('records', () => {
  const request = (n: number): AppendRecord => ({
    siteId: 's1',
    draft: {
      kind: 'check',
      title: `Check ${n}`,
      person: 'R. W.',
      siteId: 's1',
      siteName: 'Dépôt',
      siteChecksum: 'ab'.repeat(32),
      ruleSet: 'European',
      bayIds: ['bay1'],
    },
    contents: `{"site":{},"bayIds":["bay1"],"figures":"é${n}"}`,
  });
  const folderOf = (folder: string) => join(folder, 'beside', 's1', 'records');

  async function three(): Promise<string> {
    const folder = newFolder();
    const records = recordsIn(folder);
    for (const n of [1, 2, 3]) await records.append(request(n));
    return folder;
  }

  test('records are numbered, carry program and time, and are whole for another run of the program', async () => {
    const folder = await three();
    const { records, altered } = await recordsIn(folder).list('s1');
    expect(altered).toBeNull();
    expect(records.map(({ number, title, program, at }) => [number, title, program, at.slice(0, 4)])).toEqual([
      [1, 'Check 1', '0.1.0', '2026'],
      [2, 'Check 2', '0.1.0', '2026'],
      [3, 'Check 3', '0.1.0', '2026'],
    ]);
    expect(await recordsIn(folder).contents('s1', 2)).toBe(request(2).contents);
    expect(await recordsIn(newFolder()).list('s1')).toEqual({ records: [], altered: null, message: null, others: [] });
  });

  test('one edited byte of any of its files is told with the record', async () => {
    const folder = await three();
    for (const name of readdirSync(folderOf(folder))) {
      const path = join(folderOf(folder), name);
      const bytes = readFileSync(path);
      for (const at of [0, Math.floor(bytes.length / 2), bytes.length - 2]) {
        const edited = Buffer.from(bytes);
        edited[at] = (edited[at] ?? 0) ^ 1;
        writeFileSync(path, edited);
        const { altered, message, records } = await recordsIn(folder).list('s1');
        expect(altered, `${name}, byte ${at}`).not.toBeNull();
        if (/^\d/.test(name)) expect(altered).toBe(Number(name.slice(0, 6)));
        expect(message).toMatch(name === 'head.json' ? /head\.json|Record \d/ : new RegExp(`^Record ${altered} `));
        expect(records.length).toBeLessThan(name === 'head.json' ? 4 : 3);
        // The chain itself is verified before each record; contents when the records are shown.
        if (!/^\d/.test(name)) expect((await failure(recordsIn(folder).append(request(4)))).code).toBe('altered');
      }
      writeFileSync(path, bytes);
      expect((await recordsIn(folder).list('s1')).altered).toBeNull();
    }
  });

  test('bytes that are no text any more do not pass for what they were', async () => {
    const folder = newFolder();
    const records = recordsIn(folder);
    await records.append({ ...request(1), contents: '{"site":{},"bayIds":[],"figures":"\uFFFD"}' });
    const path = join(folderOf(folder), '000001.json');
    const bytes = readFileSync(path);
    const at = bytes.indexOf(0xef);
    writeFileSync(path, Buffer.concat([bytes.subarray(0, at), Buffer.from([0xff]), bytes.subarray(at + 3)]));
    expect(await recordsIn(folder).list('s1')).toMatchObject({ altered: 1 });
    expect(await failure(recordsIn(folder).contents('s1', 1))).toMatchObject({ code: 'altered' });
  });

  test('records cut off at the end are missed', async () => {
    const folder = await three();
    const path = join(folderOf(folder), 'chain.jsonl');
    writeFileSync(path, readFileSync(path, 'utf8').split('\n').slice(0, 2).join('\n') + '\n');
    expect(await recordsIn(folder).list('s1')).toMatchObject({ altered: 3, message: expect.stringContaining('no longer there') });
  });

  test('a line that was cut off before it was acknowledged is set aside, and the next record follows the last whole one', async () => {
    const folder = await three();
    appendFileSync(join(folderOf(folder), 'chain.jsonl'), '{"version":1,"number":4,"ki');
    const records = recordsIn(folder);
    expect(await records.list('s1')).toMatchObject({ altered: null, records: { length: 3 } });
    expect((await records.append(request(4))).number).toBe(4);
    expect(readdirSync(folderOf(folder)).filter((name) => name.startsWith('cut-off-'))).toHaveLength(1);
  });

  test('a program that ended before it noted the end goes on', async () => {
    const folder = await three();
    const head = join(folderOf(folder), 'head.json');
    const before = join(folder, 'head-before.json');
    copyFileSync(head, before);
    await recordsIn(folder).append(request(4));
    copyFileSync(before, head);
    expect(await recordsIn(folder).list('s1')).toMatchObject({ altered: null, records: { length: 4 } });
    expect((await recordsIn(folder).append(request(5))).number).toBe(5);
  });

  test('contents left by an append that never got its line are written over', async () => {
    const folder = newFolder();
    mkdirSync(folderOf(folder), { recursive: true });
    writeFileSync(join(folderOf(folder), '000001.json'), 'left');
    await recordsIn(folder).append(request(1));
    expect(await recordsIn(folder).contents('s1', 1)).toBe(request(1).contents);
  });

  test('contents that are gone are told', async () => {
    const folder = await three();
    rmSync(join(folderOf(folder), '000002.json'));
    expect(await recordsIn(folder).list('s1')).toMatchObject({ altered: 2, message: expect.stringContaining('their file is gone') });
    expect(await failure(recordsIn(folder).contents('s1', 2))).toMatchObject({ code: 'not-found' });
  });

  test('many records asked for at once are kept one after the other', async () => {
    const folder = newFolder();
    const records = recordsIn(folder);
    const kept = await Promise.all([1, 2, 3, 4, 5].map((n) => records.append(request(n))));
    expect(kept.map(({ number }) => number).toSorted()).toEqual([1, 2, 3, 4, 5]);
    expect((await records.list('s1')).altered).toBeNull();
  });

  test('a record of another site, or one that could not be read back, is refused', async () => {
    const records = recordsIn(newFolder());
    expect(await failure(records.append({ ...request(1), siteId: 's2' }))).toMatchObject({ code: 'bad-request' });
    const unnamed = { ...request(1), draft: { ...request(1).draft, title: ' ' } };
    expect(await failure(records.append(unnamed))).toMatchObject({ code: 'bad-request' });
  });
});
