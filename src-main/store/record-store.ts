/**
 * The frozen records of a site: a chain of lines that only grows, the contents of each in a file of its
 * own, and the end that was last acknowledged. Chains that came in packages and went on apart from the
 * site's own are kept beside it in the same form, and nothing is added to them here.
 */
import { join } from 'node:path';
import type { AppendRecord, OtherRecords, RecordsOnDisk } from '../../src-core/host';
import { isRecord } from '../../src-core/site/fields';
import { sealRecord, verifyChain, writeRecord, type ChainHead, type ChainVerdict, type FrozenRecord } from '../../src-core/visit/records';
import type { BesideStore } from './beside-store';
import { sha256 } from './checked-site';
import type { FsPort } from './fs-port';
import { HostError, telling } from '../trouble';
import { Turns } from './turns';
import { addSurely } from './whole-file';

export interface RecordStoreOptions {
  readonly fs: FsPort;
  readonly beside: BesideStore;
  readonly program: string;
  readonly now: () => Date;
}

/** Names a chain that is kept apart; null is the site's own. */
export type ChainId = string | null;

export interface KeptChain {
  readonly id: ChainId;
  readonly lines: readonly string[];
  readonly verdict: ChainVerdict;
}

const NEWLINE = 0x0a;
const CHAIN_ID = /^[0-9a-f]{16}$/;
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
        const [own, ...others] = await this.#chains(siteId);
        return {
          ...(own === undefined ? NONE : toldOf(own)),
          others: others.map((chain): OtherRecords => ({ chain: chain.id ?? '', ...toldOf(chain) })),
        };
      }),
    );
  }

  /** Every chain with its contents verified, the site's own first. */
  chains(siteId: string): Promise<readonly KeptChain[]> {
    return this.#turns.take(siteId, () => this.#chains(siteId));
  }

  /** For what may not come between two records. */
  turn<T>(siteId: string, task: () => Promise<T>): Promise<T> {
    return this.#turns.take(siteId, task);
  }

  /** As `chains`, for whoever has the turn. */
  async chainsInTurn(siteId: string): Promise<readonly KeptChain[]> {
    return this.#chains(siteId);
  }

  /** The contents of a record as bytes; null where they are gone. */
  bytesOf(siteId: string, number: number, chain: ChainId): Promise<Uint8Array | null> {
    return this.#options.beside.read(this.#contentsPath(siteId, number, chain));
  }

  async #chains(siteId: string): Promise<readonly KeptChain[]> {
    const others = (await this.#options.beside.otherChains(siteId)).filter((id) => CHAIN_ID.test(id)).toSorted();
    const chains: KeptChain[] = [];
    for (const id of [null, ...others]) chains.push({ id, ...(await this.#verified(siteId, true, id)) });
    return chains;
  }

  /** The contents of one record. @throws HostError `altered` if they are not as they were written */
  contents(siteId: string, number: number, chain: ChainId = null): Promise<string> {
    return telling('The record could not be read', async () => {
      if (chain !== null && !CHAIN_ID.test(chain)) throw new HostError('bad-request', 'There is no such list of records.');
      const { verdict } = await this.#verified(siteId, false, chain);
      const record = verdict.records[number - 1];
      const bytes = record && (await this.bytesOf(siteId, number, chain));
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
      this.#inTurnAndAlone(siteId, async () => {
        const { fs, beside, program, now } = this.#options;
        if (draft.siteId !== siteId) throw new HostError('bad-request', 'The record was not kept: it is of another site.');
        const { verdict } = await this.#verified(siteId, false, null);
        if (!verdict.whole) throw new HostError('altered', `The record was not kept. ${verdict.message}`);
        const record = this.#sealed({ ...draft, program, at: now().toISOString() }, contents, verdict.records.at(-1) ?? null);
        await beside.write(this.#contentsPath(siteId, record.number, null), encode(contents));
        await beside.makeFolders(this.#folder(siteId, null));
        const path = this.#chainPath(siteId, null);
        const before = (await beside.read(path))?.length ?? 0;
        const file = await fs.append(path);
        try {
          await addSurely(file, before, encode(`${writeRecord(record)}\n`));
        } finally {
          await file.close();
        }
        await fs.syncFolder(this.#folder(siteId, null));
        await beside.write(this.#headPath(siteId, null), encode(headText(record)));
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

  /** Two pages, and two programs, must not put a record behind the same one. */
  #inTurnAndAlone<T>(siteId: string, task: () => Promise<T>): Promise<T> {
    return this.#turns.take(siteId, () => this.#options.beside.locked(siteId, task));
  }

  async #verified(siteId: string, withContents: boolean, chain: ChainId): Promise<Omit<KeptChain, 'id'>> {
    const lines = await this.#lines(siteId, chain);
    const contents = new Map<number, string>();
    if (withContents)
      for (let number = 1; number <= lines.length; number++) {
        const bytes = await this.bytesOf(siteId, number, chain);
        // Hashed as bytes: text that is no UTF-8 any more must not pass for what it was.
        if (bytes !== null) contents.set(number, sha256(bytes));
      }
    const head = await this.#head(siteId, chain);
    return { lines, verdict: verifyChain(lines, sha256, withContents ? (number) => contents.get(number) ?? null : null, head) };
  }

  /** Lines of the chain. One without its end was cut off before it was acknowledged; it is set aside and left out. */
  async #lines(siteId: string, chain: ChainId): Promise<readonly string[]> {
    const { beside } = this.#options;
    const bytes = await beside.read(this.#chainPath(siteId, chain));
    if (bytes === null || bytes.length === 0) return [];
    const end = bytes.lastIndexOf(NEWLINE) + 1;
    const whole = new TextDecoder().decode(bytes.subarray(0, end));
    if (end < bytes.length && !(await this.#isAcknowledged(siteId, whole.split('\n').length, chain))) {
      const cutOff = `cut-off-${sha256(bytes.subarray(end)).slice(0, 16)}.txt`;
      await beside.write(join(this.#folder(siteId, chain), cutOff), bytes.subarray(end));
      await beside.write(this.#chainPath(siteId, chain), bytes.subarray(0, end));
      return whole.split('\n').slice(0, -1);
    }
    const text = new TextDecoder().decode(bytes);
    return text.endsWith('\n') ? text.slice(0, -1).split('\n') : text.split('\n');
  }

  async #isAcknowledged(siteId: string, number: number, chain: ChainId): Promise<boolean> {
    const head = await this.#head(siteId, chain);
    return head !== null && (head === 'damaged' || head.number >= number);
  }

  async #head(siteId: string, chain: ChainId): Promise<ChainHead | 'damaged' | null> {
    const bytes = await this.#options.beside.read(this.#headPath(siteId, chain));
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

  #folder = (siteId: string, chain: ChainId): string => this.#options.beside.folderOf(siteId, ...chainFolder(chain));
  #chainPath = (siteId: string, chain: ChainId): string => join(this.#folder(siteId, chain), CHAIN_FILE);
  #headPath = (siteId: string, chain: ChainId): string => join(this.#folder(siteId, chain), HEAD_FILE);
  #contentsPath = (siteId: string, number: number, chain: ChainId): string => join(this.#folder(siteId, chain), contentsFile(number));
}

export const CHAIN_FILE = 'chain.jsonl';
export const HEAD_FILE = 'head.json';
export const contentsFile = (number: number): string => `${String(number).padStart(6, '0')}.json`;
/** Folder of a chain below that of its site. */
export const chainFolder = (chain: ChainId): readonly string[] => (chain === null ? ['records'] : ['records-of', chain]);
export const headText = ({ number, hash }: ChainHead): string => JSON.stringify({ number, hash });

const NONE = { records: [], altered: null, message: null };

const toldOf = ({ verdict }: KeptChain): Omit<RecordsOnDisk, 'others'> =>
  verdict.whole
    ? { records: verdict.records, altered: null, message: null }
    : { records: verdict.records, altered: verdict.altered, message: verdict.message };
