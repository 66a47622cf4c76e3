import { expect, test, vi } from 'vitest';
import { nodeFs, type FsPort } from '../../src-main/store/fs-port';
import { withTimeLimit } from '../../src-main/store/time-limit';
import { contentOf, newFolder, siteText, storeIn } from './folder';
import { bodyOf, numberIn } from './make';

const LIMITS = { quick: 300, bytes: 400 };

/** A folder whose chosen call hangs until it is let go. */
function hanging(call: keyof FsPort) {
  let letGo = (): void => undefined;
  let asked = 0;
  const fs: FsPort = {
    ...nodeFs,
    [call]: async (...given: never[]) => {
      asked++;
      await new Promise<void>((resolve) => (letGo = resolve));
      return (nodeFs[call] as (...args: never[]) => Promise<unknown>)(...given);
    },
  };
  return { fs: withTimeLimit(fs, LIMITS), letGo: () => letGo(), asked: () => asked };
}

test.each(['list', 'read', 'makeFolder', 'create', 'rename', 'link', 'syncFolder'] as const)(
  'a folder that does not answer to %s is told within the limit',
  async (call) => {
    const folder = newFolder();
    const first = await storeIn(folder).save({ id: 's', body: bodyOf('s', 1), baseRevision: null });
    const { fs } = hanging(call);
    const store = storeIn(folder, fs);
    const began = performance.now();
    const task = ['list', 'facts'].includes(call)
      ? store.list()
      : store.save({ id: 's', body: bodyOf('s', 2), baseRevision: first.revision });
    await expect(task).rejects.toMatchObject({
      code: 'timed-out',
      message: expect.stringContaining('the sites folder does not answer (ETIMEDOUT). Check the drive or network') as string,
    });
    expect(performance.now() - began).toBeLessThan(2000);
  },
);

test('a file that does not answer is listed with its problem', async () => {
  const folder = newFolder();
  await storeIn(folder).save({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  const [entry] = await storeIn(folder, hanging('facts').fs).list();
  expect(entry?.problem).toContain('the sites folder does not answer (ETIMEDOUT)');
});

test('while one call hangs no other is started, and all goes on once it answers', async () => {
  const folder = newFolder();
  await storeIn(folder).save({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  const { fs, letGo, asked } = hanging('list');
  const store = storeIn(folder, fs);
  await expect(store.list()).rejects.toMatchObject({ code: 'timed-out' });
  for (let i = 0; i < 5; i++) await expect(store.list()).rejects.toMatchObject({ code: 'timed-out' });
  await expect(store.read('s')).rejects.toMatchObject({ code: 'timed-out' });
  expect(asked()).toBe(1);
  letGo();
  await vi.waitFor(async () => expect(numberIn((await store.read('s')).text)).toBe(1), 5000);
});

test('a rename that was answered too late is known as our own at the next save', async () => {
  const folder = newFolder();
  const { revision } = await storeIn(folder).save({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  const { fs, letGo } = hanging('rename');
  const store = storeIn(folder, fs);
  await expect(store.save({ id: 's', body: bodyOf('s', 2), baseRevision: revision })).rejects.toMatchObject({ code: 'timed-out' });
  letGo();
  await vi.waitFor(() => expect(numberIn(siteText(folder))).toBe(2), 5000);
  await vi.waitFor(() => store.list(), 5000);
  const again = store.save({ id: 's', body: bodyOf('s', 3), baseRevision: revision });
  const letting = setInterval(letGo, 10);
  await again;
  clearInterval(letting);
  expect(numberIn(siteText(folder))).toBe(3);
});

test('a file that was opened too late is closed again', async () => {
  let closed = 0;
  let letGo = (): void => undefined;
  const fs = withTimeLimit(
    {
      ...nodeFs,
      append: async (path) => {
        await new Promise<void>((resolve) => (letGo = resolve));
        const file = await nodeFs.append(path);
        return { ...file, close: () => (closed++, file.close()) };
      },
    },
    LIMITS,
  );
  const folder = newFolder();
  await expect(fs.append(`${folder}/late`)).rejects.toMatchObject({ code: 'ETIMEDOUT' });
  letGo();
  await vi.waitFor(() => expect(closed).toBe(1), 5000);
  expect(Object.keys(contentOf(folder))).toEqual(['late']);
});
