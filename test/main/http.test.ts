import { request as httpRequest, type IncomingHttpHeaders } from 'node:http';
import { connect } from 'node:net';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, test } from 'vitest';
import { KEY_HEADER, TAB_HEADER } from '../../src-core/host-wire';
import { CONTENT_SECURITY_POLICY } from '../../src-main/csp';
import { makeServer } from '../../src-main/http';
import { readPageFiles } from '../../src-main/page-files';
import { startServe, type Serving } from '../../src-main/serve-app';
import { hostOverHttp } from '../../src-renderer/host';
import { hostContract } from './host-contract';
import { startMachine, temporaryFolder } from './machine';

const running: { close(): unknown }[] = [];
afterEach(async () => {
  for (const one of running.splice(0)) await one.close();
});

/** A page of three files, served as the program serves its own. */
async function serve(): Promise<{ serving: Serving; top: string; origin: string; key: string }> {
  const top = temporaryFolder();
  const renderer = join(top, 'page');
  mkdirSync(join(renderer, 'assets'), { recursive: true });
  writeFileSync(join(renderer, 'index.html'), '<!doctype html><title>Page</title>');
  writeFileSync(join(renderer, 'assets', 'page-abc.js'), 'export {};');
  writeFileSync(join(renderer, 'assets', 'page-abc.js.map'), 'no file of the page');
  const serving = await startServe({ sitesFolder: join(top, 'sites'), rendererFolder: renderer });
  running.push(serving);
  const [origin = '', key = ''] = serving.address.split('/#key=');
  return { serving, top, origin, key };
}

interface Answer {
  readonly status: number;
  readonly headers: IncomingHttpHeaders;
  readonly body: string;
}

/** A request as it is written, with no header put right by the way. */
function ask(port: number, method: string, path: string, headers: Record<string, string>, body?: string | Buffer): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const request = httpRequest({ host: '127.0.0.1', port, method, path, headers, setHost: false, agent: false }, (response) => {
      const pieces: Buffer[] = [];
      response.on('data', (piece: Buffer) => pieces.push(piece));
      response.on('end', () =>
        resolve({ status: response.statusCode ?? 0, headers: response.headers, body: Buffer.concat(pieces).toString() }),
      );
      response.on('error', reject);
    });
    request.on('error', reject);
    request.end(body);
  });
}

hostContract('over HTTP, by the page’s own carrier', false, async () => {
  const { serving, top, origin, key } = await serve();
  const page = () => {
    const kept = new Map<string, string>();
    return hostOverHttp({
      location: { hash: `#key=${key}`, pathname: '/', search: '' },
      history: { replaceState: () => undefined },
      storage: { getItem: (name) => kept.get(name) ?? null, setItem: (name, value) => void kept.set(name, value) },
      fetch: (path, init) => fetch(origin + String(path), { ...init, headers: { ...init?.headers, origin } }),
    });
  };
  expect(serving.sitesFolder).toBe(join(top, 'sites'));
  return {
    host: page(),
    nextPage: async () => page(),
    writeFile: (name, text) => writeFileSync(join(serving.sitesFolder, name), text),
  };
});

describe('calls', () => {
  const calling = async () => {
    const { serving, origin, key } = await serve();
    const host = `127.0.0.1:${serving.port}`;
    const right = { host, origin, [KEY_HEADER]: key, 'content-type': 'application/json' };
    return { port: serving.port, right };
  };

  test('the page’s own call is answered', async () => {
    const { port, right } = await calling();
    const { status, body, headers } = await ask(port, 'POST', '/host/listSites', right, '[]');
    expect([status, body]).toEqual([200, '{"ok":true,"value":[]}']);
    expect(headers['access-control-allow-origin']).toBeUndefined();
  });

  test.each<[string, Record<string, string | null>]>([
    ['no Host', { host: null }],
    ['another Host', { host: 'localhost' }],
    ['the right name and another port', { host: '127.0.0.1:1' }],
    ['a Host that was made to point here', { host: 'evil.example' }],
    ['no Origin', { origin: null }],
    ['Origin "null"', { origin: 'null' }],
    ['another Origin', { origin: 'https://evil.example' }],
    ['another port of this machine as Origin', { origin: 'http://127.0.0.1:1' }],
    ['https as Origin', { origin: 'https://127.0.0.1' }],
    ['no key', { [KEY_HEADER]: null }],
    ['an empty key', { [KEY_HEADER]: '' }],
    ['another key', { [KEY_HEADER]: 'x'.repeat(32) }],
    ['the key as a cookie', { [KEY_HEADER]: null, cookie: 'key=x' }],
  ])('with %s: refused, and nothing done', async (_, wrong) => {
    const { port, right } = await calling();
    const headers = Object.fromEntries(Object.entries({ ...right, ...wrong }).filter((one): one is [string, string] => one[1] !== null));
    const { status, body } = await ask(port, 'POST', '/host/addDemoSite', headers, '[]');
    // A request without Host is stopped by Node itself.
    expect(status).toBe('host' in wrong && wrong['host'] === null ? 400 : 403);
    if (status === 403) expect(JSON.parse(body)).toMatchObject({ ok: false, code: 'refused' });
    expect((await ask(port, 'POST', '/host/listSites', right, '[]')).body).toBe('{"ok":true,"value":[]}');
  });

  test.each<[string, string, Record<string, string>, string | Buffer, number]>([
    ['by GET', 'GET', {}, '', 405],
    ['by OPTIONS, as other origins ask beforehand', 'OPTIONS', { 'access-control-request-method': 'POST' }, '', 405],
    ['of a form', 'POST', { 'content-type': 'application/x-www-form-urlencoded' }, 'a=b', 415],
    ['of plain text', 'POST', { 'content-type': 'text/plain' }, '[]', 415],
    ['that is no JSON', 'POST', {}, '[', 400],
    ['that is no text', 'POST', {}, Buffer.from([0x5b, 0xff, 0x5d]), 400],
    ['with a tab that leads elsewhere', 'POST', { [TAB_HEADER]: '../x' }, '[]', 400],
  ])('a call %s is refused', async (_, method, more, body, expected) => {
    const { port, right } = await calling();
    const answer = await ask(port, method, '/host/listSites', { ...right, ...more }, body);
    expect(answer.status).toBe(expected);
    expect(answer.headers['access-control-allow-origin']).toBeUndefined();
    expect(answer.headers['access-control-allow-methods']).toBeUndefined();
  });

  test.each([
    ['/host/constructor', '[]'],
    ['/host/__proto__', '[]'],
    ['/host/close', '[]'],
    ['/host/', '[]'],
    ['/host/listSites/', '[]'],
    ['/host/readSite', '["../s"]'],
    ['/host/readSite', '[{"toString":1}]'],
    ['/host/readSite', '["s","t"]'],
    ['/host/listSites', '{"length":0}'],
    ['/host/savePdf', '["x"]'],
    ['/host/chooseSitesFolder', '[]'],
  ])('%s with %s is answered with a refusal', async (path, body) => {
    const { port, right } = await calling();
    const answer = await ask(port, 'POST', path, right, body);
    expect(JSON.parse(answer.body)).toMatchObject({ ok: false, code: expect.stringMatching(/^(bad-request|refused)$/) as string });
  });

  test('what is larger than the limit is refused, whether it says so beforehand or not', async () => {
    const top = temporaryFolder();
    const { machine } = await startMachine(top);
    const server = makeServer({ files: new Map(), key: 'k', hostFor: () => machine.page(), limit: 1000 });
    running.push(server);
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    const address = server.address();
    const port = typeof address === 'object' && address !== null ? address.port : 0;
    const headers = {
      host: `127.0.0.1:${port}`,
      origin: `http://127.0.0.1:${port}`,
      [KEY_HEADER]: 'k',
      'content-type': 'application/json',
    };
    const body = JSON.stringify(['x'.repeat(2000)]);
    const said = await ask(port, 'POST', '/host/importSite', { ...headers, 'content-length': String(body.length) }, body);
    expect([said.status, JSON.parse(said.body)]).toMatchObject([413, { ok: false, code: 'too-large' }]);
    const unsaid = await ask(port, 'POST', '/host/importSite', { ...headers, 'transfer-encoding': 'chunked' }, body);
    expect(unsaid.status).toBe(413);
    expect((await ask(port, 'POST', '/host/listSites', headers, '[]')).status).toBe(200);
  });

  test('only this machine is answered: the server is bound to 127.0.0.1', async () => {
    const { serving } = await serve();
    await new Promise<void>((resolve, reject) => {
      // Another address of this machine, where a server bound to all of them would answer.
      const socket = connect({ host: '127.0.0.2', port: serving.port }, () => reject(new Error('it answered')));
      socket.on('error', () => resolve());
    });
  });
});

describe('files of the page', () => {
  test('come with the policy and are the files that were built', async () => {
    const { serving, top } = await serve();
    const host = `127.0.0.1:${serving.port}`;
    const page = await ask(serving.port, 'GET', '/', { host });
    expect(page.status).toBe(200);
    expect(page.headers['content-security-policy']).toBe(CONTENT_SECURITY_POLICY);
    expect(page.headers['x-content-type-options']).toBe('nosniff');
    expect(page.body).toBe(readFileSync(join(top, 'page', 'index.html'), 'utf8'));
    const script = await ask(serving.port, 'GET', '/assets/page-abc.js?v=1', { host });
    expect([script.status, script.headers['content-type']]).toEqual([200, 'text/javascript; charset=utf-8']);
    expect((await ask(serving.port, 'HEAD', '/', { host })).body).toBe('');
  });

  test.each([
    ['another program’s page', { origin: 'https://evil.example' }, 403],
    ['a script tag elsewhere', { 'sec-fetch-site': 'cross-site', 'sec-fetch-mode': 'no-cors' }, 403],
    ['another port of this machine', { 'sec-fetch-site': 'same-site', 'sec-fetch-mode': 'cors' }, 403],
    ['a link that was followed', { 'sec-fetch-site': 'cross-site', 'sec-fetch-mode': 'navigate' }, 200],
    ['the address bar', { 'sec-fetch-site': 'none', 'sec-fetch-mode': 'navigate' }, 200],
    ['the page itself', { 'sec-fetch-site': 'same-origin', 'sec-fetch-mode': 'cors' }, 200],
  ])('asked for by %s', async (_, more, expected) => {
    const { serving } = await serve();
    expect((await ask(serving.port, 'GET', '/assets/page-abc.js', { host: `127.0.0.1:${serving.port}`, ...more })).status).toBe(expected);
  });

  test('files of other kinds and anything outside the list are not there', async () => {
    const { serving } = await serve();
    const host = `127.0.0.1:${serving.port}`;
    for (const path of ['/assets/page-abc.js.map', '/assets', '/assets/', '/../sites/s.tallybeam.json', '//', '/host', '/index.html/']) {
      expect((await ask(serving.port, 'GET', path, { host })).status, path).toBe(404);
    }
    expect((await ask(serving.port, 'DELETE', '/', { host })).status).toBe(405);
  });

  test('a page that was not built is told, with the command', () => {
    expect(() => readPageFiles(join(temporaryFolder(), 'nowhere'))).toThrow('Build it with "npm run build"');
  });
});

test('a fixed clock gives equal files, byte for byte, to tests that need them', async () => {
  const texts: string[] = [];
  for (let i = 0; i < 2; i++) {
    const top = temporaryFolder();
    mkdirSync(join(top, 'page'));
    writeFileSync(join(top, 'page', 'index.html'), 'page');
    const now = () => new Date('2026-12-01T08:00:00.000Z');
    const serving = await startServe({ sitesFolder: join(top, 'sites'), rendererFolder: join(top, 'page'), now, key: 'k' });
    running.push(serving);
    const headers = {
      host: `127.0.0.1:${serving.port}`,
      origin: `http://127.0.0.1:${serving.port}`,
      [KEY_HEADER]: 'k',
      'content-type': 'application/json',
    };
    const { body } = await ask(serving.port, 'POST', '/host/addDemoSite', headers, '[]');
    texts.push(readFileSync(join(serving.sitesFolder, `${(JSON.parse(body) as { value: string }).value}.tallybeam.json`), 'utf8'));
  }
  expect(texts[0]).toBe(texts[1]);
});
