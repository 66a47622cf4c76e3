/**
 * The host over HTTP, for a browser on this machine and nobody else: bound to 127.0.0.1, with the
 * exact Host and Origin and a secret asked of every call. Other pages in the same browser, other
 * programs on the machine and other machines are all taken for strangers.
 */
import { timingSafeEqual } from 'node:crypto';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { Host } from '../src-core/host';
import { answerCall, HOST_PATH, KEY_HEADER, TAB_HEADER, type HostAnswer } from '../src-core/host-wire';
import { PAGE_HEADERS } from './csp';
import { pageFileAt, type PageFile } from './page-files';

export interface CarrierOptions {
  readonly files: ReadonlyMap<string, PageFile>;
  /** The secret that the page must send with every call. */
  readonly key: string;
  /** The host of one tab. */
  readonly hostFor: (tab: string) => Host;
  /** Largest call, bytes. */
  readonly limit?: number;
}

/** A site of the largest size, its quotation marks escaped. */
const CALL_BYTES = 128 * 1024 * 1024;
const TAB = /^[0-9a-z-]{1,64}$/;

class Refusal extends Error {
  readonly status: number;
  readonly answer: HostAnswer;

  constructor(status: number, code: 'refused' | 'bad-request' | 'too-large' | 'not-found', message: string) {
    super(message);
    this.status = status;
    this.answer = { ok: false, code, message };
  }
}

/** A server that is not listening yet. */
export function makeServer(options: CarrierOptions): Server {
  const server = createServer({ maxHeaderSize: 16 * 1024, requestTimeout: 120_000, headersTimeout: 10_000 }, (request, response) => {
    answer(options, server, request, response).catch((error: unknown) => {
      const refusal = error instanceof Refusal ? error : new Refusal(500, 'refused', 'The program failed at this call.');
      // What is left of a call that was refused is not waited for.
      if (!request.complete) response.setHeader('connection', 'close');
      send(response, refusal.status, refusal.answer);
    });
  });
  return server;
}

async function answer(options: CarrierOptions, server: Server, request: IncomingMessage, response: ServerResponse): Promise<void> {
  const own = authorityOf(server);
  if (request.headers.host !== own) throw new Refusal(403, 'refused', `Only ${own} is answered here.`);
  const url = request.url ?? '';
  if (!url.startsWith(HOST_PATH)) return sendFile(options, own, request, response);
  if (request.method !== 'POST') throw new Refusal(405, 'bad-request', 'Calls are made by POST.');
  if (request.headers.origin !== `http://${own}`) throw new Refusal(403, 'refused', 'Only the program’s own page may call it.');
  if (!isSame(request.headers[KEY_HEADER], options.key))
    throw new Refusal(
      403,
      'refused',
      'This page has no key to the program. Open the address that the program printed, with all that stands after "#".',
    );
  if (!/^application\/json(;\s*charset=utf-8)?$/i.test(request.headers['content-type'] ?? ''))
    throw new Refusal(415, 'bad-request', 'Calls carry JSON.');
  const tab = request.headers[TAB_HEADER] ?? 'page';
  if (typeof tab !== 'string' || !TAB.test(tab))
    throw new Refusal(400, 'bad-request', 'The page named its tab in a way that is not known.');
  const given = parsed(await bodyOf(request, options.limit ?? CALL_BYTES));
  send(response, 200, await answerCall(options.hostFor(tab), url.slice(HOST_PATH.length), given));
}

function authorityOf(server: Server): string {
  const address = server.address();
  return typeof address === 'object' && address !== null ? `127.0.0.1:${address.port}` : '';
}

function isSame(given: string | readonly string[] | undefined, key: string): boolean {
  const [one, other] = [Buffer.from(typeof given === 'string' ? given : ''), Buffer.from(key)];
  return one.length === other.length && timingSafeEqual(one, other);
}

async function bodyOf(request: IncomingMessage, limit: number): Promise<string> {
  const tooLarge = new Refusal(413, 'too-large', `What was sent is larger than ${Math.floor(limit / 1024 / 1024)} MiB.`);
  if (Number(request.headers['content-length'] ?? 0) > limit) throw tooLarge;
  const pieces: Buffer[] = [];
  let size = 0;
  for await (const piece of request as AsyncIterable<Buffer>) {
    size += piece.length;
    if (size > limit) throw tooLarge;
    pieces.push(piece);
  }
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(pieces));
  } catch {
    throw new Refusal(400, 'bad-request', 'What was sent is no UTF-8 text.');
  }
}

function parsed(body: string): unknown {
  try {
    return JSON.parse(body);
  } catch {
    throw new Refusal(400, 'bad-request', 'What was sent is no JSON.');
  }
}

function sendFile({ files }: CarrierOptions, own: string, request: IncomingMessage, response: ServerResponse): void {
  const { origin, 'sec-fetch-site': site, 'sec-fetch-mode': mode } = request.headers;
  if (request.method !== 'GET' && request.method !== 'HEAD') throw new Refusal(405, 'bad-request', 'Files of the page are read by GET.');
  // The page may be opened from anywhere; its parts may be loaded by itself only.
  const foreign =
    (origin !== undefined && origin !== `http://${own}`) || (site !== undefined && !['same-origin', 'none'].includes(String(site)));
  if (foreign && mode !== 'navigate') throw new Refusal(403, 'refused', 'Only the program’s own page may load its parts.');
  const file = pageFileAt(files, request.url ?? '');
  if (file === null) throw new Refusal(404, 'not-found', 'There is no such file of the page.');
  response.writeHead(200, { ...PAGE_HEADERS, 'content-type': file.type, 'content-length': file.bytes.length });
  response.end(request.method === 'HEAD' ? undefined : file.bytes);
}

function send(response: ServerResponse, status: number, body: HostAnswer): void {
  if (response.headersSent) return void response.destroy();
  response.writeHead(status, { ...PAGE_HEADERS, 'content-type': 'application/json; charset=utf-8' });
  response.end(JSON.stringify(body));
}
