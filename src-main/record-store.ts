/**
 * The frozen records of a site: a chain of lines that only grows, the contents of each in a file of its
 * own, and the end that was last acknowledged.
 */
import { join } from 'node:path';
import type { AppendRecord, RecordsOnDisk } from '../src-core/host';
import { isRecord } from '../src-core/site/fields';
import { sealRecord, verifyChain, writeRecord, type ChainHead, type ChainVerdict, type FrozenRecord } from '../src-core/visit/records';
import type { BesideStore } from './beside-store';
import { sha256 } from './checked-site';
import type { FsPort } from './fs-port';
import { HostError, telling } from './trouble';
import { Turns } from './turns';
import { addSurely } from './whole-file';

export interface RecordStoreOptions {
  readonly fs: FsPort;
  readonly beside: BesideStore;
  readonly program: string;
  readonly now: () => Date;
}

const NEWLINE = 0x0a;
const encode = (text: string): Uint8Array => new TextEncoder().encode(text);

export class RecordStore {
  readonly #options: RecordStoreOptions;
  readonly #turns = new Turns();

  constructor(options: RecordStoreOptions) {
    this.#options = options;
  }

  /** Every record with its contents verified: whether all are as they were written, and if not, which is the first that is not. */
  list(siteId: string): Promise<RecordsOnDisk> {
    return telling('The records could not be read', () =>
      this.#turns.take(siteId, async () => {
        const verdict = await this.#verified(siteId, true);
        return verdict.whole
          ? { records: verdict.records, altered: null, message: null }
          : { records: verdict.records, altered: verdict.altered, message: verdict.message };
      }),
    );
  }

  /** The contents of one record. @throws HostError `altered` if they are not as they were written */
  contents(siteId: string, number: number): Promise<string> {
    return telling('The record could not be read', async () => {
      const verdict = await this.#verified(siteId, false);
      const record = verdict.records[number - 1];
      const bytes = record && (await this.#options.beside.read(this.#contentsPath(siteId, number)));
      if (!record || !bytes) throw new HostError('not-found', `Record ${number} is not beside the site, or cannot be relied on.`);
      if (sha256(bytes) !== record.contentsHash)
        throw new HostError('altered', `Record ${number} had its contents altered after it was written.`);
      return new TextDecoder().decode(bytes);
    });
  }

  /**
   * Seals a record behind the last one. Its contents are on the disk before its line is, and its line
   * before it is acknowledged; a chain that is not whole takes no further record.
   */
  append({ siteId, draft, contents }: AppendRecord): Promise<FrozenRecord> {
    return telling('The record was not kept', () =>
      this.#turns.take(siteId, async () => {
        const { fs, beside, program, now } = this.#options;
        if (draft.siteId !== siteId) throw new HostError('bad-request', 'The record was not kept: it is of another site.');
        const verdict = await this.#verified(siteId, false);
        if (!verdict.whole) throw new HostError('altered', `The record was not kept. ${verdict.message}`);
        const record = this.#sealed({ ...draft, program, at: now().toISOString() }, contents, verdict.records.at(-1) ?? null);
        await beside.write(this.#contentsPath(siteId, record.number), encode(contents));
        await beside.makeFolders(this.#folder(siteId));
        const path = this.#chainPath(siteId);
        const before = (await beside.read(path))?.length ?? 0;
        const file = await fs.append(path);
        try {
          await addSurely(file, before, encode(`${writeRecord(record)}\n`));
        } finally {
          await file.close();
        }
        await fs.syncFolder(this.#folder(siteId));
        await beside.write(
          this.#headPath(siteId),
          encode(JSON.stringify({ number: record.number, hash: record.hash } satisfies ChainHead)),
        );
        return record;
      }),
    );
  }

  #sealed(...given: Parameters<typeof sealRecord> extends [...infer Rest, unknown] ? Rest : never): FrozenRecord {
    try {
      return sealRecord(...given, sha256);
    } catch (error) {
      if (error instanceof RangeError) throw new HostError('bad-request', `The record was not kept: ${error.message}.`, error);
      throw error;
    }
  }

  async #verified(siteId: string, withContents: boolean): Promise<ChainVerdict> {
    const lines = await this.#lines(siteId);
    const contents = new Map<number, string>();
    if (withContents)
      for (let number = 1; number <= lines.length; number++) {
        const bytes = await this.#options.beside.read(this.#contentsPath(siteId, number));
        // Hashed as bytes: text that is no UTF-8 any more must not pass for what it was.
        if (bytes !== null) contents.set(number, sha256(bytes));
      }
    const head = await this.#head(siteId);
    return verifyChain(lines, sha256, withContents ? (number) => contents.get(number) ?? null : null, head);
  }

  /** Lines of the chain. One without its end was cut off before it was acknowledged; it is set aside and left out. */
  async #lines(siteId: string): Promise<readonly string[]> {
    const { beside } = this.#options;
    const bytes = await beside.read(this.#chainPath(siteId));
    if (bytes === null || bytes.length === 0) return [];
    const end = bytes.lastIndexOf(NEWLINE) + 1;
    const whole = new TextDecoder().decode(bytes.subarray(0, end));
    if (end < bytes.length && !(await this.#isAcknowledged(siteId, whole.split('\n').length))) {
      await beside.write(join(this.#folder(siteId), `cut-off-${sha256(bytes.subarray(end)).slice(0, 16)}.txt`), bytes.subarray(end));
      await beside.write(this.#chainPath(siteId), bytes.subarray(0, end));
      return whole.split('\n').slice(0, -1);
    }
    const text = new TextDecoder().decode(bytes);
    return text.endsWith('\n') ? text.slice(0, -1).split('\n') : text.split('\n');
  }

  async #isAcknowledged(siteId: string, number: number): Promise<boolean> {
    const head = await this.#head(siteId);
    return head !== null && (head === 'damaged' || head.number >= number);
  }

  async #head(siteId: string): Promise<ChainHead | 'damaged' | null> {
    const bytes = await this.#options.beside.read(this.#headPath(siteId));
    if (bytes === null) return null;
    try {
      const json: unknown = JSON.parse(new TextDecoder().decode(bytes));
      if (isRecord(json) && typeof json.number === 'number' && typeof json.hash === 'string')
        return { number: json.number, hash: json.hash };
    } catch {
      // No JSON: damaged, as below.
    }
    return 'damaged';
  }

  #folder = (siteId: string): string => this.#options.beside.folderOf(siteId, 'records');
  #chainPath = (siteId: string): string => join(this.#folder(siteId), 'chain.jsonl');
  #headPath = (siteId: string): string => join(this.#folder(siteId), 'head.json');
  #contentsPath = (siteId: string, number: number): string => join(this.#folder(siteId), `${String(number).padStart(6, '0')}.json`);
}
