import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { afterEach, expect, test } from 'vitest';
import { machineTag } from '../../src-main/store/file-names';
import { nodeFs, type FsPort } from '../../src-main/store/fs-port';
import { withLock } from '../../src-main/store/lock';
import { newFolder, siteText, storeIn } from './folder';
import { bodyOf, numberIn } from './make';
import type { Round } from './race-child';

const children: ChildProcess[] = [];
afterEach(() => children.splice(0).forEach((child) => child.kill()));

async function start(): Promise<ChildProcess> {
  const child = fork(join(import.meta.dirname, 'race-child.ts'), { execArgv: ['--import', 'tsx'] });
  children.push(child);
  await once(child, 'message');
  return child;
}

/** Both programs save on the same revision, round after round. */
async function race(rounds: number, lockless: boolean): Promise<readonly string[]> {
  const folder = newFolder();
  const programs = await Promise.all([start(), start()]);
  let { revision } = await storeIn(folder).save({ id: 's', body: bodyOf('s', 0), baseRevision: null });
  const outcomes: string[] = [];
  for (let round = 1; round <= rounds; round++) {
    const at = Date.now() + 12;
    const answers = await Promise.all(
      programs.map(async (program, i) => {
        const task: Round = { folder, n: 2 * round + i, baseRevision: revision, at, lockless };
        const answer = once(program, 'message');
        program.send(task);
        return (await answer)[0] as string;
      }),
    );
    const onDisk = numberIn(siteText(folder)) - 2 * round;
    const told = [...answers].sort().join(' and ');
    outcomes.push(answers[onDisk] === 'saved' ? told : `${told}, but the other is on disk`);
    ({ revision } = await storeIn(folder).read('s'));
  }
  return outcomes;
}

test('in 100 races of two programs on one site, one is saved, the other told, and nothing is overwritten', async () => {
  const outcomes = await race(100, false);
  const wrong = outcomes.filter((outcome) => outcome !== 'saved and stale');
  console.log(`races: ${outcomes.length}, silently overwritten ${wrong.length}`);
  expect(wrong).toEqual([]);
  expect(outcomes).toHaveLength(100);
});

test('the race bites: without the lock, saves are overwritten silently', async () => {
  expect(await race(40, true)).toContain('saved and saved');
});

test.each([
  ['of a program that has ended', JSON.stringify({ machine: machineTag, pid: 2 ** 30, token: 'x' })],
  ['of an earlier run with the same number', JSON.stringify({ machine: machineTag, pid: process.pid, token: 'x' })],
])('a lock %s is broken at once', async (_, text) => {
  const folder = newFolder();
  mkdirSync(join(folder, 'locks'));
  writeFileSync(join(folder, 'locks', 's.lock'), text);
  const began = performance.now();
  await storeIn(folder).save({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  expect(performance.now() - began).toBeLessThan(1000);
  expect(existsSync(join(folder, 'locks', 's.lock'))).toBe(false);
});

test('a lock is never there without its owner’s name, at whatever call the program ends', async () => {
  const texts: string[] = [];
  const path = join(newFolder(), 's.lock');
  const looking: FsPort = Object.fromEntries(
    Object.entries(nodeFs).map(([name, call]) => [
      name,
      async (...given: never[]) => {
        if (existsSync(path)) texts.push(readFileSync(path, 'utf8'));
        return (call as (...args: never[]) => Promise<unknown>)(...given);
      },
    ]),
  ) as unknown as FsPort;
  await withLock(looking, path, async () => texts.push(readFileSync(path, 'utf8')));
  expect(texts.length).toBeGreaterThan(1);
  for (const text of texts) expect(JSON.parse(text)).toMatchObject({ machine: machineTag, pid: process.pid });
});

test('where the file system has no links, one still holds the lock after another', async () => {
  const path = join(newFolder(), 's.lock');
  const noLinks: FsPort = { ...nodeFs, link: () => Promise.reject(Object.assign(new Error('no links'), { code: 'EPERM' })) };
  let inside = 0;
  const hold = () =>
    withLock(noLinks, path, async () => {
      expect(++inside).toBe(1);
      await new Promise((resolve) => setTimeout(resolve, 5));
      inside--;
    });
  await Promise.all([hold(), hold(), hold()]);
  expect(readdirSync(dirname(path))).toEqual([]);
});

const QUICK = { hold: 100, abandoned: 200, wait: 5000 };

test.each([
  ['of a program on another machine', JSON.stringify({ machine: '00000000', pid: 1, token: 'x' })],
  ['torn while it was written', '{"machine":'],
])('a lock %s is broken once it has stayed the same for long', async (_, text) => {
  const path = join(newFolder(), 's.lock');
  writeFileSync(path, text);
  const began = performance.now();
  expect(await withLock(nodeFs, path, async () => 'done', QUICK)).toBe('done');
  expect(performance.now() - began).toBeGreaterThan(150);
});

test('many that find the same abandoned lock hold it one after another', async () => {
  const path = join(newFolder(), 's.lock');
  writeFileSync(path, JSON.stringify({ machine: machineTag, pid: 2 ** 30, token: 'x' }));
  let inside = 0;
  let most = 0;
  await Promise.all(
    Array.from({ length: 20 }, () =>
      withLock(nodeFs, path, async () => {
        most = Math.max(most, ++inside);
        await new Promise((resolve) => setTimeout(resolve, 3));
        inside--;
      }),
    ),
  );
  expect(most).toBe(1);
});

test('a lock that stays taken is told; a holder that was too slow gives up', async () => {
  const path = join(newFolder(), 's.lock');
  let release = (): void => undefined;
  const held = withLock(nodeFs, path, () => new Promise<void>((resolve) => (release = resolve)));
  await new Promise((resolve) => setTimeout(resolve, 20));
  const impatient = withLock(nodeFs, path, async () => undefined, { ...QUICK, abandoned: 60_000, wait: 300 });
  await expect(impatient).rejects.toMatchObject({
    code: 'timed-out',
    message: expect.stringContaining('another program is saving this site') as string,
  });
  release();
  await held;
  const slow = withLock(
    nodeFs,
    path,
    async (lock) => {
      await new Promise((resolve) => setTimeout(resolve, 150));
      lock.stillHeld();
    },
    QUICK,
  );
  await expect(slow).rejects.toMatchObject({ code: 'timed-out', message: expect.stringContaining('answered too slowly') as string });
});
