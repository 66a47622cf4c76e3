/** The built main process, preload and launcher, run on Node with a stand-in in Electron's place. */
import { execFile, spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { promisify } from 'node:util';
import { createContext, runInContext } from 'node:vm';
import ts from 'typescript';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { HOST_METHODS } from '../../../src-core/host-wire';
import { CONTENT_SECURITY_POLICY } from '../../../src-main/csp';
import { channelOf } from '../../../src-main/window/channels';
import { programName } from '../../../src-main/window/electron-program';
import { LOCKS } from '../../../src-main/window/window';
import { buildInto } from './built';

const folder = mkdtempSync(join(tmpdir(), 'built-window-'));
const preloadText = () => readFileSync(join(folder, 'dist', 'preload', 'preload.cjs'), 'utf8');
beforeAll(() => buildInto(folder), 120_000);
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const run = async (env: NodeJS.ProcessEnv): Promise<Record<string, unknown>> => {
  const { stdout } = await promisify(execFile)(process.execPath, [join(folder, 'run-main.mjs')], { env: { ...process.env, ...env } });
  return JSON.parse(stdout) as Record<string, unknown>;
};

describe('the built preload', () => {
  test('is one CommonJS file that requires electron and nothing else', () => {
    expect(readdirSync(join(folder, 'dist', 'preload'))).toEqual(['preload.cjs']);
    const required: string[] = [];
    const others: string[] = [];
    const look = (node: ts.Node): void => {
      if (ts.isCallExpression(node) && ts.isIdentifier(node.expression) && node.expression.text === 'require')
        required.push(node.arguments.map((one) => (ts.isStringLiteralLike(one) ? one.text : '?')).join());
      if (ts.isImportDeclaration(node) || ts.isExportDeclaration(node) || ts.isImportTypeNode(node)) others.push(node.getText());
      if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) others.push(node.getText());
      ts.forEachChild(node, look);
    };
    look(ts.createSourceFile('preload.cjs', preloadText(), ts.ScriptTarget.Latest, true, ts.ScriptKind.JS));
    expect(required).toEqual(['electron']);
    expect(others).toEqual([]);
  });

  test('puts exactly Host on the page: no event, no channel name, no way to send anything else', async () => {
    const exposed: [string, Record<string, unknown>][] = [];
    const sent: unknown[][] = [];
    const answers: unknown[] = [];
    // All that the preload touches of Electron; anything more would be undefined here, and fail.
    const electron = {
      contextBridge: { exposeInMainWorld: (name: string, what: Record<string, unknown>) => exposed.push([name, what]) },
      ipcRenderer: {
        invoke: async (...given: unknown[]) => {
          sent.push(given);
          const answer = answers.shift();
          if (answer instanceof Error) throw answer;
          return answer;
        },
      },
    };
    const require = (name: string): unknown => {
      if (name === 'electron') return electron;
      throw new Error(`required ${name}`);
    };
    runInContext(preloadText(), createContext({ require, exports: {}, module: { exports: {} } }));
    expect(exposed).toHaveLength(1);
    const [[name, host] = ['', {}]] = exposed;
    expect(name).toBe('tallybeam');
    expect(Object.keys(host).sort()).toEqual([...HOST_METHODS].sort());
    for (const method of HOST_METHODS) {
      const call = host[method] as (...given: unknown[]) => Promise<unknown>;
      sent.length = 0;
      answers.push({ ok: true, value: `${method} done` });
      const value = await call('a', 'b', 'c', 'd');
      expect([undefined, `${method} done`]).toContain(value);
      expect([method, sent.length, sent[0]?.[0], Array.isArray(sent[0]?.[1])]).toEqual([method, 1, channelOf(method), true]);
      answers.push({ ok: false, code: 'stale', message: 'Saved by another.' });
      await expect(call()).rejects.toEqual({ code: 'stale', message: 'Saved by another.' });
      answers.push(new Error(`Error invoking remote method '${channelOf(method)}'`));
      await expect(call()).rejects.toMatchObject({ code: 'failed', message: expect.not.stringContaining('host:') as string });
    }
  });
});

describe('the built main process', () => {
  test('starts, opens one locked window on the page, and does its work for it and nobody else', async () => {
    const own = join(folder, 'own');
    const sites = join(folder, 'sites');
    const told = await run({ TALLYBEAM_FOLDER: own, TALLYBEAM_SITES: sites });
    expect(told).toMatchObject({
      beforeReady: {
        schemes: [{ scheme: 'app', privileges: { standard: true, secure: true, supportFetchAPI: true } }],
        sandboxed: true,
        windows: 0,
      },
      page: '<!doctype html><title>the page</title>',
      policy: CONTENT_SECURITY_POLICY,
      about: { carrier: 'window', sitesFolder: sites, notices: [] },
      sites: [null],
      missing: { code: 'not-found' },
      stranger: { ok: false, code: 'refused' },
      saved: true,
      userData: own,
      download: true,
      permission: false,
      openHandler: { action: 'deny' },
      storeChannel: 0,
      menus: 1,
      exposed: ['tallybeam'],
      methods: expect.arrayContaining([...HOST_METHODS]) as string[],
    });
    expect(told['channels']).toEqual(HOST_METHODS.map(channelOf));
    expect(told['window']).toMatchObject({
      show: false,
      webPreferences: { ...LOCKS, preload: join(folder, 'dist', 'preload', 'preload.cjs') },
    });
    // Loaded once, shown when ready, and brought to the front by the second start, whatever that was given.
    expect(told['did']).toEqual(['load app://tallybeam/index.html', 'show', 'show', 'focus']);
    // It was told to quit during a save, and did so after it.
    expect([told['quitsWhileSaving'], told['quits']]).toEqual([0, 1]);
    // A page that crashed is loaded again once the user has been told.
    expect([told['dialogs'], told['reloads']]).toEqual([['message'], 1]);
    expect(readdirSync(sites).filter((name) => name.endsWith('.tallybeam.json'))).toHaveLength(1);
  });

  test('a second one opens nothing and ends', async () => {
    expect(await run({ TALLYBEAM_FOLDER: join(folder, 'second'), SECOND: '1' })).toEqual({ quits: 1, schemes: 0, windows: 0 });
  });

  test('where it cannot start it says why and ends', async () => {
    const blocked = join(folder, 'a file');
    writeFileSync(blocked, '');
    const told = await run({ TALLYBEAM_FOLDER: join(folder, 'third'), TALLYBEAM_SITES: join(blocked, 'sites') });
    expect(told['exits']).toEqual([1]);
    expect(told['dialogs']).toMatchObject([{ kind: 'error', options: { title: 'Tallybeam could not start' } }]);
  });
});

describe('the built launcher', () => {
  const start = (args: readonly string[], env: NodeJS.ProcessEnv) => {
    const { DISPLAY: _d, WAYLAND_DISPLAY: _w, ...rest } = process.env;
    const child = spawn(process.execPath, [join(folder, 'dist', 'main', 'start.js'), ...args], {
      env: { ...rest, TALLYBEAM_FOLDER: join(folder, 'launcher'), ...env },
      stdio: ['ignore', 'pipe', 'inherit'],
    });
    const said = { text: '' };
    child.stdout.on('data', (piece: Buffer) => (said.text += piece.toString()));
    const served = async (): Promise<string> => {
      for (let i = 0; i < 1500 && !/http:\S+\n/.test(said.text); i += 1) await new Promise((resolve) => setTimeout(resolve, 10));
      return /http:\/\/\S+/.exec(said.text)?.[0] ?? '';
    };
    return { child, said, served };
  };

  test.each([
    ['a browser was asked for', ['--browser'], {}],
    ...(process.platform === 'linux' ? ([['there is no display here', [], {}]] as const) : []),
  ] as const)('says that %s, serves the page in the foreground and ends when told to', async (why, args, env) => {
    const { child, said, served } = start([...args, '--sites', join(folder, 'served')], env);
    const [address = ''] = (await served()).split('#');
    expect(said.text.split('\n')[0]).toBe(`No window, because ${why}. The same program is served to a browser instead.`);
    expect(await (await fetch(address)).text()).toBe('<!doctype html><title>the page</title>');
    child.kill('SIGTERM');
    expect(await once(child, 'exit')).toEqual([0, null]);
  });

  // A program in Electron's place, named by Electron's own variable; started as root, the window is not tried.
  const inPlace = (text: string): NodeJS.ProcessEnv => {
    const place = mkdtempSync(join(folder, 'electron-'));
    const program = join(place, programName(process.platform));
    mkdirSync(dirname(program), { recursive: true });
    writeFileSync(program, `#!/bin/sh\n${text}\n`, { mode: 0o755 });
    return { DISPLAY: ':99', ELECTRON_OVERRIDE_DIST_PATH: place, ELECTRON_RUN_AS_NODE: '1' };
  };
  const asRoot = process.getuid?.() === 0;

  test('passes the window’s end on, or as root says why there is none', async () => {
    const ran = join(folder, 'ran');
    const { child, said, served } = start([], inPlace(`echo "$1 \${ELECTRON_RUN_AS_NODE-unset}" > "${ran}"; exit 0`));
    if (asRoot) {
      await served();
      expect(said.text).toContain('Electron’s sandbox does not run as root');
      child.kill('SIGTERM');
      expect(await once(child, 'exit')).toEqual([0, null]);
      expect(existsSync(ran)).toBe(false);
    } else {
      expect(await once(child, 'exit')).toEqual([0, null]);
      expect(readFileSync(ran, 'utf8')).toBe(`${folder}/ unset\n`);
    }
  });

  test('serves the page where Electron ends before a window came up', async () => {
    const { child, said, served } = start([], inPlace('exit 127'));
    await served();
    expect(said.text).toMatch(
      asRoot
        ? /Electron’s sandbox does not run as root/
        : /^No window, because Electron ended before a window came up \(exit code 127\)\./m,
    );
    child.kill('SIGTERM');
    expect(await once(child, 'exit')).toEqual([0, null]);
  });
});
