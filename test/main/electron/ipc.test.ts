import fc from 'fast-check';
import type { WebContents as ElectronContents } from 'electron';
import { afterAll, beforeEach, describe, expect, test } from 'vitest';
import type { Host } from '../../../src-core/host';
import { HOST_METHODS, type HostAnswer, type HostMethod } from '../../../src-core/host-wire';
import { channelOf } from '../../../src-main/window/channels';
import { carryHost } from '../../../src-main/window/ipc';
import { HostError } from '../../../src-main/trouble';
import { standIn, WebContents, type StandInFrame } from '../electron-stand-in';

const REVISION = 'a'.repeat(64);
/** Arguments that each method takes. */
const GOOD: Readonly<Record<HostMethod, readonly unknown[]>> = {
  about: [],
  listSites: [],
  readSite: ['depot'],
  saveSite: [{ id: 'depot', body: '{}', baseRevision: null }],
  removeSite: ['depot', REVISION],
  importSite: ['{}', false],
  addDemoSite: [],
  listGenerations: ['depot'],
  readGeneration: ['depot', '2026-05-04T080000Z'],
  appendJournal: [{ id: 'depot', baseRevision: REVISION, body: '{}', edit: 'Move drums' }],
  clearJournal: ['depot'],
  listVisits: ['depot'],
  saveVisit: [{ siteId: 'depot', visitId: 'v1', body: '{}', baseRevision: null }],
  readFollowUp: ['depot'],
  saveFollowUp: [{ siteId: 'depot', body: '{}', baseRevision: REVISION }],
  addPhoto: [{ siteId: 'depot', photoId: 'p1', base64: 'AA==' }],
  readPhoto: ['depot', 'p1.jpg'],
  listRecords: ['depot'],
  readRecord: ['depot', 1, '0123456789abcdef'],
  appendRecord: [{ siteId: 'depot', draft: {}, contents: '{}' }],
  makePackage: ['depot', true],
  readPackage: [0],
  sendPackage: [0, 'AAAA'],
  lookAtPackage: [],
  takePackage: [{ as: 'join', ifVisitDiffers: 'keep-both' }],
  dropPackage: [],
  readPreferences: [],
  savePreferences: [{ theme: 'dark' }],
  savePdf: ['Depot'],
  chooseSitesFolder: [],
};

/** These are about the one package that is kept for the page. */
const WITHOUT_ID: readonly string[] = ['readPackage', 'sendPackage', 'takePackage'] satisfies readonly HostMethod[];

const heard: { method: string; given: readonly unknown[] }[] = [];
let answer: (method: string) => Promise<unknown> = async (method) => `${method} done`;
const host = new Proxy({} as Host, {
  get:
    (_target, method) =>
    (...given: unknown[]) => {
      heard.push({ method: String(method), given });
      return answer(String(method));
    },
});

const contents = new WebContents();
contents.mainFrame.url = 'app://tallybeam/index.html';
const carrier = carryHost(contents as unknown as ElectronContents, () => host);
afterAll(() => standIn.handlers.clear());
beforeEach(() => {
  heard.length = 0;
  answer = async (method) => `${method} done`;
});

type Sender = { sender: unknown; senderFrame: StandInFrame | null };
const own: Sender = { sender: contents, senderFrame: contents.mainFrame };
const call = (method: HostMethod, from: Sender, ...sent: unknown[]): Promise<HostAnswer> => {
  const handler = standIn.handlers.get(channelOf(method)) as ((event: Sender, ...sent: unknown[]) => Promise<HostAnswer>) | undefined;
  if (handler === undefined) throw new Error(`${method} has no channel`);
  return handler(from, ...sent);
};

const frameAt = (url: string, more: Partial<StandInFrame> = {}): Sender => ({
  sender: contents,
  senderFrame: { ...contents.mainFrame, url, ...more },
});
const STRANGERS: readonly (readonly [string, Sender])[] = [
  ['a frame that is gone', { sender: contents, senderFrame: null }],
  ['a frame within the page', frameAt('app://tallybeam/index.html', { parent: contents.mainFrame, frameTreeNodeId: 2 })],
  ['a frame within another, whatever its number', frameAt('app://tallybeam/index.html', { parent: contents.mainFrame })],
  ['a second main frame', frameAt('app://tallybeam/index.html', { frameTreeNodeId: 2 })],
  ['a frame that was detached', frameAt('app://tallybeam/index.html', { detached: true })],
  ['a web page', frameAt('https://evil/index.html')],
  ['a file', frameAt('file:///index.html')],
  ['a look-alike host', frameAt('app://tallybeam.evil/index.html')],
  ['a host behind ours as a user name', frameAt('app://tallybeam@evil/index.html')],
  ['our host with a port', frameAt('app://tallybeam:8080/index.html')],
  ['another scheme', frameAt('apps://tallybeam/index.html')],
  ['a made-up document', frameAt('data:text/html,x')],
  ['an empty page', frameAt('about:blank')],
  ['no address', frameAt('')],
  ['another window', { sender: new WebContents(), senderFrame: contents.mainFrame }],
  [
    'a frame that cannot be asked any more',
    {
      sender: contents,
      senderFrame: Object.defineProperty({ ...contents.mainFrame }, 'url', {
        get: () => {
          throw new Error('Render frame was disposed before WebFrameMain could be accessed');
        },
      }),
    },
  ],
];

test('there is one channel for each method of Host and no other', () => {
  expect([...standIn.handlers.keys()].sort()).toEqual(HOST_METHODS.map(channelOf).sort());
  expect(Object.keys(GOOD).sort()).toEqual([...HOST_METHODS].sort());
});

describe.each(HOST_METHODS)('%s', (method) => {
  test('is done for our own page', async () => {
    expect(await call(method, own, GOOD[method])).toEqual({ ok: true, value: `${method} done` });
    expect(heard).toEqual([{ method, given: GOOD[method] }]);
  });

  test.each(STRANGERS)('is refused to %s, in words, and nothing is done', async (_name, from) => {
    expect(await call(method, from, GOOD[method])).toEqual({
      ok: false,
      code: 'refused',
      message: 'Only the program’s own page may call it.',
    });
    expect(heard).toEqual([]);
  });

  test('is refused without a list of arguments, with too many, and with any that cannot be', async () => {
    for (const sent of [undefined, null, 'text', 7, {}, { length: 0 }])
      expect(await call(method, own, sent)).toMatchObject({ ok: false, code: 'bad-request' });
    expect(await call(method, own, [...GOOD[method], 'one more'])).toMatchObject({ ok: false, code: 'bad-request' });
    for (const bad of ['../depot', 'a/b', 'a\\b', '', '\0', 'x'.repeat(65)])
      if (['readSite', 'listGenerations', 'clearJournal', 'listVisits', 'readFollowUp', 'listRecords'].includes(method))
        expect([bad, await call(method, own, [bad])]).toMatchObject([bad, { ok: false, code: 'bad-request' }]);
    expect(heard).toEqual([]);
  });

  test('answers whatever is sent, and no id that reaches the host could be a path', async () => {
    const ids = ['id', 'siteId', 'visitId', 'photoId'];
    const strings = fc.oneof(fc.string(), fc.constantFrom('depot', '../x', 'a/b', 'C:\\x', '\0', '__proto__', 'con', REVISION));
    const record = fc.dictionary(fc.constantFrom(...ids, 'body', 'baseRevision', 'edit', 'contents', 'draft', 'base64', 'theme'), strings);
    const sent = fc.oneof(fc.array(fc.oneof(strings, record, fc.anything()), { maxLength: 3 }), fc.anything());
    await fc.assert(
      fc.asyncProperty(sent, async (given) => {
        heard.length = 0;
        const got = await call(method, own, given);
        expect(got.ok ? 'value' in got : got.code === 'bad-request' && got.message.endsWith('.')).toBe(true);
        for (const one of heard) {
          const [first] = one.given;
          const named = typeof first === 'object' && first !== null ? ids.map((id) => (first as Record<string, unknown>)[id]) : [first];
          if (![...WITHOUT_ID, 'importSite', 'savePdf', 'savePreferences'].includes(method))
            for (const id of named) if (id !== undefined) expect(id).toMatch(/^[A-Za-z0-9_-]{1,64}$/);
        }
      }),
      { numRuns: 1000 },
    );
  });
});

test('what the host refuses comes back as its code and sentence, what it fails at as a fault of the program', async () => {
  answer = async () => {
    throw new HostError('stale', 'Depot was saved by someone else.');
  };
  expect(await call('readSite', own, ['depot'])).toEqual({ ok: false, code: 'stale', message: 'Depot was saved by someone else.' });
  answer = async () => {
    throw new TypeError('x is not a function');
  };
  expect(await call('readSite', own, ['depot'])).toMatchObject({ ok: false, code: 'failed' });
});

test('the carrier is settled once the calls that came in are answered', async () => {
  let finish: () => void = () => undefined;
  answer = () => new Promise((resolve) => (finish = () => resolve('late')));
  const slow = call('saveSite', own, GOOD.saveSite);
  let settled = false;
  const waiting = carrier.settled().then(() => (settled = true));
  await new Promise((resolve) => setTimeout(resolve, 20));
  expect(settled).toBe(false);
  finish();
  await waiting;
  expect(await slow).toEqual({ ok: true, value: 'late' });
});
