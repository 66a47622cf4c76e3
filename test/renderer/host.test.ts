import { createServer, type IncomingMessage, type Server } from 'node:http';
import { afterEach, expect, test } from 'vitest';
import { answerCall, HOST_METHODS, HOST_PATH, KEY_HEADER, TAB_HEADER } from '../../src-core/host-wire';
import { failureOf, hostOverHttp, type BrowserParts } from '../../src-renderer/host';
import { MemoryHost } from './memory-host';

let server: Server | null = null;
afterEach(() => {
  server?.closeAllConnections();
  server?.close();
  server = null;
});

interface Asked {
  readonly path: string;
  readonly headers: IncomingMessage['headers'];
}

/** A program that answers over a real socket, and what a page needs to reach it. */
async function program(answer: (request: Asked, body: string) => Promise<string>): Promise<{ parts: BrowserParts; asked: Asked[] }> {
  const asked: Asked[] = [];
  server = createServer((request, response) => {
    let body = '';
    request.on('data', (chunk: Buffer) => (body += chunk.toString()));
    request.on('end', () => {
      const one = { path: request.url ?? '', headers: request.headers };
      asked.push(one);
      void answer(one, body).then((text) => response.end(text));
    });
  });
  await new Promise<void>((resolve) => server?.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  const port = typeof address === 'object' && address !== null ? address.port : 0;
  return { parts: browser(`http://127.0.0.1:${port}`), asked };
}

function browser(origin: string, hash = '#key=s3cret'): BrowserParts & { readonly shown: string[]; readonly kept: Map<string, string> } {
  const kept = new Map<string, string>();
  const shown: string[] = [];
  return {
    location: { hash, pathname: '/', search: '' },
    history: { replaceState: (_data, _unused, url) => void shown.push(String(url)) },
    storage: { getItem: (key) => kept.get(key) ?? null, setItem: (key, value) => void kept.set(key, value) },
    fetch: (path, init) => fetch(origin + String(path), init),
    shown,
    kept,
  };
}

test('a call reaches the host by name with its arguments and brings its answer back', async () => {
  const memory = new MemoryHost();
  const { parts, asked } = await program(async ({ path }, body) =>
    JSON.stringify(await answerCall(memory, path.slice(HOST_PATH.length), JSON.parse(body))),
  );
  const host = hostOverHttp(parts);
  expect(await host.readPreferences()).toMatchObject({ theme: 'system' });
  expect(await host.savePreferences({ theme: 'dark' })).toMatchObject({ theme: 'dark' });
  const { revision } = await host.saveSite({ id: 'a', body: '{}', baseRevision: null });
  expect(revision).toBe('1');
  expect(asked.map(({ path }) => path)).toEqual(['/host/readPreferences', '/host/savePreferences', '/host/saveSite']);
});

test('a refusal of the host comes back as its code and sentence', async () => {
  const { parts } = await program(async () => JSON.stringify({ ok: false, code: 'disk-full', message: 'The disk is full. Make room.' }));
  await expect(hostOverHttp(parts).listSites()).rejects.toEqual({ code: 'disk-full', message: 'The disk is full. Make room.' });
});

test('the secret is sent as a header, kept for the tab, and leaves the address bar', async () => {
  const { parts, asked } = await program(async () => JSON.stringify({ ok: true, value: [] }));
  const page = parts as ReturnType<typeof browser>;
  await hostOverHttp(page).listSites();
  expect(asked[0]?.headers[KEY_HEADER]).toBe('s3cret');
  expect(page.shown).toEqual(['/']);
  // A reload has no secret in its address any more.
  const again = { ...page, location: { hash: '', pathname: '/', search: '' } };
  await hostOverHttp(again).listSites();
  expect(asked[1]?.headers[KEY_HEADER]).toBe('s3cret');
  // Each load of the page has a journal of its own, also in a tab that was doubled.
  expect(asked[1]?.headers[TAB_HEADER]).not.toBe(asked[0]?.headers[TAB_HEADER]);
  expect(asked[0]?.headers[TAB_HEADER]).toMatch(/^[0-9a-f-]{36}$/);
});

test('a program that was stopped is a failure that says what to do', async () => {
  const { parts } = await program(async () => '');
  server?.close();
  server?.closeAllConnections();
  await expect(hostOverHttp(parts).listSites()).rejects.toMatchObject({
    code: 'timed-out',
    message: expect.stringMatching(/start the program/),
  });
});

test.each([['a page of an error'], [''], ['{"value":[]}'], ['null']])('an answer that is none, %j, is a failure', async (text) => {
  const { parts } = await program(async () => text);
  await expect(hostOverHttp(parts).listSites()).rejects.toMatchObject({ code: 'failed' });
});

test('in a browser there is neither a PDF of its own nor a choice of folder', () => {
  const host = hostOverHttp(browser('http://127.0.0.1:1'));
  expect(host.savePdf).toBeNull();
  expect(host.chooseSitesFolder).toBeNull();
  expect(Object.keys(host).toSorted()).toEqual([...HOST_METHODS].toSorted());
});

test('whatever a call rejects with is told as a code and a sentence', () => {
  expect(failureOf({ code: 'stale', message: 'Changed elsewhere.' })).toEqual({ code: 'stale', message: 'Changed elsewhere.' });
  expect(failureOf(new Error('broken'))).toEqual({ code: 'failed', message: 'broken' });
  expect(failureOf({ code: 'no such code', message: 'x' })).toEqual({ code: 'failed', message: 'x' });
  for (const nothing of [null, undefined, 7, '', new Error('')]) {
    expect(failureOf(nothing).code).toBe('failed');
    expect(failureOf(nothing).message).toMatch(/\.$/);
  }
});
