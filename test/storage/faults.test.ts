/** Every call of a save, a journal line and a removal made to fail, with every fault that disks answer. */
import { describe, expect, test } from 'vitest';
import { foldersIn } from '../../src-main/store/file-names';
import { nodeFs, type FsPort } from '../../src-main/store/fs-port';
import { Journal } from '../../src-main/store/journal';
import { HostError } from '../../src-main/trouble';
import { faultyFs } from './faulty-fs';
import { clock, contentOf, newFolder, siteText, storeIn } from './folder';
import { bodyOf, numberIn } from './make';

const KINDS = ['ENOSPC', 'EIO', 'short write', 'EPERM', 'EBUSY', 'EROFS', 'ENAMETOOLONG'];
const SAYS: Readonly<Record<string, RegExp>> = {
  ENOSPC: /because there is no room left for it \(ENOSPC\)\. Free some space/,
  EIO: /because the disk reported a fault \(EIO\)\. Check the disk/,
  'short write': /because there is no room left for it \(ENOSPC\)\. Free some space/,
  EPERM: /because the system does not allow it \(EPERM\)\. Check who may write/,
  EBUSY: /because another program holds the file \(EBUSY\)\. Close the program/,
  EROFS: /because the disk is write-protected \(EROFS\)\. Check who may write/,
  ENAMETOOLONG: /because the path of the file is too long for the system \(ENAMETOOLONG\)\. Choose a sites folder/,
};
/** A rename that stays held is tried for two seconds; enough cases without that are tried below. */
const slow = (kind: string, name: string | undefined, stays: boolean) => stays && name === 'rename' && ['EPERM', 'EBUSY'].includes(kind);

/** A site saved three times, and its fourth save through a faulty file system. */
async function fourthSave(wrap: (fs: FsPort) => FsPort) {
  const folder = newFolder();
  let revision: string | null = null;
  for (let n = 1; n <= 3; n++) ({ revision } = await storeIn(folder).save({ id: 's', body: bodyOf('s', n), baseRevision: revision }));
  const before = siteText(folder);
  const store = storeIn(folder, wrap(nodeFs), clock('2026-12-02T08:00:00.000Z'));
  const save = (n: number) => store.save({ id: 's', body: bodyOf('s', n), baseRevision: revision });
  return { folder, before, save };
}

async function callsOf(task: (wrap: (fs: FsPort) => FsPort) => Promise<unknown>): Promise<readonly string[]> {
  let calls: readonly string[] = [];
  await task((fs) => {
    const watched = faultyFs(fs, null);
    calls = watched.calls;
    return watched.fs;
  });
  return calls;
}

const saveCalls = await callsOf(async (wrap) => (await fourthSave(wrap)).save(4));

describe.each(KINDS)('%s', (kind) => {
  test.each([
    ['at one call', false],
    ['from one call on', true],
  ])(`in a save, %s: saved, or the old file byte for byte and a clear message`, async (_, stays) => {
    let refused = 0;
    for (const [at, name] of saveCalls.entries()) {
      if (slow(kind, name, stays)) continue;
      const { folder, before, save } = await fourthSave((fs) => faultyFs(fs, { at, kind, stays }).fs);
      const place = `${kind} at call ${at}, ${name}`;
      try {
        const { revision } = await save(4);
        expect(numberIn(siteText(folder)), place).toBe(4);
        expect((await storeIn(folder).read('s')).revision, place).toBe(revision);
      } catch (error) {
        refused++;
        expect(siteText(folder), place).toBe(before);
        expect(error, place).toBeInstanceOf(HostError);
        expect((error as HostError).message, place).toMatch(SAYS[kind] ?? /never/);
        expect((error as HostError).message, place).toMatch(/^Not saved, /);
      }
      // Whatever happened, the site can be saved once the disk is well again, and nothing was lost on the way.
      const now = await storeIn(folder).read('s');
      await storeIn(folder).save({ id: 's', body: bodyOf('s', 5), baseRevision: now.revision });
      const kept = Object.entries(contentOf(folder)).flatMap(([path, text]) => (path.startsWith('earlier') ? [numberIn(text)] : []));
      expect(kept, place).toEqual(expect.arrayContaining([1, 2, numberIn(now.text)]));
    }
    // Only what comes after the file is safe, or can be done in another way, may fail unnoticed.
    expect(refused, `${refused} of ${saveCalls.length}`).toBeGreaterThan(kind === 'short write' ? 0 : saveCalls.length / 2);
  });

  test('in a first save: saved, or no file at all', async () => {
    const first = (folder: string, fs: FsPort) => storeIn(folder, fs).save({ id: 's', body: bodyOf('s', 1), baseRevision: null });
    const calls = await callsOf((wrap) => first(newFolder(), wrap(nodeFs)));
    for (const at of calls.keys()) {
      const folder = newFolder();
      const saved = await first(folder, faultyFs(nodeFs, { at, kind, stays: false }).fs).then(
        () => true,
        () => false,
      );
      expect(Object.keys(contentOf(folder)).includes('s.tallybeam.json'), `call ${at}`).toBe(saved);
      if (!saved) await first(folder, nodeFs);
      expect(numberIn(siteText(folder))).toBe(1);
    }
  });

  test('in the journal: the edit is there, or a clear message and the next one stands for itself', async () => {
    const write = async (folder: string, fs: FsPort): Promise<readonly number[]> => {
      const { journal, leftOut } = foldersIn(folder);
      const own = new Journal({ places: [{ fs, folder: journal, leftOut }], session: 'a', now: clock() });
      const done: number[] = [];
      for (let n = 1; n <= 4; n++) {
        try {
          await own.append({ id: 's', baseRevision: 'r', body: bodyOf('s', n), edit: `Edit ${n}` });
          done.push(n);
        } catch (error) {
          expect((error as HostError).message).toMatch(SAYS[kind] ?? /never/);
        }
      }
      return done;
    };
    const calls = await callsOf((wrap) => write(newFolder(), wrap(nodeFs)));
    for (const at of calls.keys()) {
      const folder = newFolder();
      const done = await write(folder, faultyFs(nodeFs, { at, kind, stays: false }).fs);
      const { journal, leftOut } = foldersIn(folder);
      const found = await new Journal({ places: [{ fs: nodeFs, folder: journal, leftOut }], session: 'b', now: clock() }).recovered(
        's',
        '',
      );
      expect(numberIn(found?.body ?? ''), `call ${at}`).toBeGreaterThanOrEqual(done.at(-1) ?? 0);
    }
  });

  test('in a removal: removed whole, or still there', async () => {
    const calls = await callsOf(async (wrap) => {
      const { folder } = await fourthSave((fs) => fs);
      await storeIn(folder, wrap(nodeFs)).remove('s', (await storeIn(folder).read('s')).revision);
    });
    for (const at of calls.keys()) {
      const { folder, before } = await fourthSave((fs) => fs);
      const { revision } = await storeIn(folder).read('s');
      const removal = storeIn(folder, faultyFs(nodeFs, { at, kind, stays: false }).fs).remove('s', revision);
      const removed = await removal.then(
        () => true,
        (error: HostError) => (expect(error.message).toMatch(/^Not removed, /), false),
      );
      expect(Object.keys(contentOf(folder)).includes('s.tallybeam.json'), `call ${at}`).toBe(!removed);
      const there = Object.entries(contentOf(folder)).filter(([path, text]) => !path.startsWith('earlier') && text === before);
      expect(there.length, `call ${at}`).toBe(1);
    }
  });
});

test('a file held by another program for a moment is waited for', async () => {
  let held = 4;
  const fs: FsPort = {
    ...nodeFs,
    rename: (from, to) => (held-- > 0 ? Promise.reject(Object.assign(new Error('held'), { code: 'EBUSY' })) : nodeFs.rename(from, to)),
  };
  const { folder, save } = await fourthSave(() => fs);
  await save(4);
  expect(numberIn(siteText(folder))).toBe(4);
});

test('a file held for good is told after about two seconds, and the old one is untouched', async () => {
  const at = saveCalls.indexOf('rename');
  const { folder, before, save } = await fourthSave((fs) => faultyFs(fs, { at, kind: 'EBUSY', stays: true }).fs);
  const began = performance.now();
  await expect(save(4)).rejects.toMatchObject({ code: 'failed', message: expect.stringMatching(SAYS['EBUSY'] ?? /never/) as string });
  expect(performance.now() - began).toBeGreaterThan(1800);
  expect(performance.now() - began).toBeLessThan(6000);
  expect(siteText(folder)).toBe(before);
  expect(Object.keys(contentOf(folder)).filter((path) => path.endsWith('.temp'))).toEqual([]);
});
