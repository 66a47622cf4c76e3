/** The built program for a browser, run as a user runs it. */
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdirSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { build } from 'vite';
import { afterEach, beforeAll, afterAll, describe, expect, test, vi } from 'vitest';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { KEY_HEADER } from '../../src-core/host-wire';
import { readWishes } from '../../src-main/serve-command';
import { bodyOf } from '../storage/make';
import { temporaryFolder } from './machine';

const folder = mkdtempSync(join(tmpdir(), 'built-'));
const program = join(folder, 'main', 'serve.mjs');
beforeAll(async () => {
  await build({
    configFile: false,
    logLevel: 'silent',
    ssr: { noExternal: true },
    build: {
      ssr: true,
      outDir: join(folder, 'main'),
      rollupOptions: { input: join(import.meta.dirname, '../../src-main/serve.ts'), output: { entryFileNames: 'serve.mjs' } },
    },
  });
  mkdirSync(join(folder, 'renderer'));
  writeFileSync(join(folder, 'renderer', 'index.html'), 'page');
}, 60_000);
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const running: ChildProcess[] = [];
afterEach(() => running.splice(0).forEach((child) => child.kill('SIGKILL')));

function run(args: readonly string[], own = temporaryFolder()) {
  const child = spawn(process.execPath, [program, ...args], {
    env: { ...process.env, TALLYBEAM_FOLDER: own },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  running.push(child);
  const said = { out: '', err: '' };
  child.stdout.on('data', (piece: Buffer) => (said.out += piece.toString()));
  child.stderr.on('data', (piece: Buffer) => (said.err += piece.toString()));
  const address = async (): Promise<string> => {
    while (!/http:\S+\n/.test(`${said.out}\n`)) {
      await new Promise((resolve) => setTimeout(resolve, 10));
      if (child.exitCode !== null) throw new Error(said.err);
    }
    return /http:\/\/\S+/.exec(said.out)?.[0] ?? '';
  };
  return { child, said, address };
}

async function call(address: string, method: string, ...given: unknown[]): Promise<unknown> {
  const [origin = '', key = ''] = address.split('/#key=');
  const headers = { origin, 'content-type': 'application/json', [KEY_HEADER]: key };
  const response = await fetch(`${origin}/host/${method}`, { method: 'POST', headers, body: JSON.stringify(given) });
  return ((await response.json()) as { value: unknown }).value;
}

test('it prints where it is and where the sites are, and nothing else with --quiet', async () => {
  const sites = temporaryFolder();
  const { said, address } = run(['--sites', sites]);
  expect(await address()).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/#key=[\w-]{32}$/);
  await vi.waitFor(() => expect(said.out).toContain(`Sites are in ${sites}.`), 10_000);
  const quiet = run(['--sites', sites, '--quiet']);
  expect(`${await quiet.address()}\n`).toBe(quiet.said.out);
});

test.each(['SIGTERM', 'SIGINT'] as const)('%s ends it cleanly', async (signal) => {
  const { child, address } = run(['--sites', temporaryFolder()]);
  await address();
  child.kill(signal);
  expect(await once(child, 'exit')).toEqual([0, null]);
});

test('killed in the middle of editing and started again, it offers the edits', async () => {
  const sites = temporaryFolder();
  const { child, address } = run(['--sites', sites]);
  const first = await address();
  const { revision } = (await call(first, 'saveSite', { id: 's', body: bodyOf('s', 1), baseRevision: null })) as { revision: string };
  for (const n of [2, 3]) await call(first, 'appendJournal', { id: 's', baseRevision: revision, body: bodyOf('s', n), edit: `Edit ${n}` });
  child.kill('SIGKILL');
  await once(child, 'exit');
  const site = await call(await run(['--sites', sites]).address(), 'readSite', 's');
  expect(site).toMatchObject({
    revision,
    recovered: { body: bodyOf('s', 3), edits: ['Edit 2', 'Edit 3'], baseRevision: revision, otherPage: false },
  });
});

test('without a folder named, the sites are in the user’s own', async () => {
  const own = temporaryFolder();
  const { said, address } = run([], own);
  await address();
  await vi.waitFor(() => expect(said.out).toContain(`Sites are in ${join(own, 'sites')}.`), 10_000);
});

test('a port that is taken is told with what to do', async () => {
  const other = createServer();
  other.listen(0, '127.0.0.1');
  await once(other, 'listening');
  const address = other.address();
  const port = typeof address === 'object' && address !== null ? address.port : 0;
  const { child, said } = run(['--port', String(port), '--sites', temporaryFolder()]);
  expect(await once(child, 'exit')).toEqual([1, null]);
  expect(said.err).toBe(`Port ${port} is taken. Choose another with --port, or leave it out for any free one.\n`);
  other.close();
});

describe('what was asked for', () => {
  test('is read from the line, else from the environment', () => {
    expect(readWishes([], {})).toEqual({ port: 0, sites: null, quiet: false });
    expect(readWishes(['--port', '4173', '--sites', '/a/b', '--quiet'], {})).toEqual({ port: 4173, sites: '/a/b', quiet: true });
    expect(readWishes([], { TALLYBEAM_PORT: '99', TALLYBEAM_SITES: '/c' })).toEqual({ port: 99, sites: '/c', quiet: false });
  });

  test.each([['--port', 'x'], ['--port', '65536'], ['--port', '-1'], ['--fast'], ['folder']])('%j %j is refused', (...given) => {
    expect(() => readWishes(given, {})).toThrow();
  });
});
