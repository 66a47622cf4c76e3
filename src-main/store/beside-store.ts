/**
 * What is kept beside a site, in a folder of its own: visits, the follow-up, photos and the chained
 * records. Every file is replaced whole or not at all; records are only ever added.
 *
 *   beside/<site>/visits/<visit>.json
 *   beside/<site>/follow-up.json
 *   beside/<site>/photos/<photo>.jpg
 *   beside/<site>/records/chain.jsonl, head.json, 000001.json …
 *   beside/<site>/records-of/<chain>/…   chains that came in packages and went on apart
 *   beside/<site>/put-aside/…            what something else took the place of
 */
import { dirname, join } from 'node:path';
import type { PhotoRequest, KeptText, SaveFollowUp, SaveVisit } from '../../src-core/host';
import type { PICTURE_ENDS } from '../../src-core/package/parts';
import { isPhotoName } from '../../src-core/package/parts';
import { readFollowUp, writeFollowUp } from '../../src-core/visit/follow-up';
import type { DocumentReading } from '../../src-core/visit/read-document';
import { readVisit, writeVisit } from '../../src-core/visit/read-visit';
import { sentences, revisionOf } from './checked-site';
import { checkedId, type Folders } from './file-names';
import { systemCode, type FsPort } from './fs-port';
import { withLock } from './lock';
import { HostError, telling } from '../trouble';
import { Turns } from './turns';
import { renameOver, writeBeside } from './whole-file';

/** Larger than any photo a telephone takes, and small enough to be carried at once. */
export const PHOTO_BYTES = 24 * 1024 * 1024;
const DOCUMENT_END = '.json';

/** First bytes of the kinds of picture that the page can show, and the end of their names. */
const PICTURES: readonly (readonly [end: (typeof PICTURE_ENDS)[number], starts: readonly number[]])[] = [
  ['jpg', [0xff, 0xd8, 0xff]],
  ['png', [0x89, 0x50, 0x4e, 0x47]],
  ['webp', [0x52, 0x49, 0x46, 0x46]],
];

/** The end of a picture's name as its first bytes tell it; null if they are no picture's. */
export const pictureEnd = (bytes: Uint8Array): (typeof PICTURE_ENDS)[number] | null =>
  PICTURES.find(([, starts]) => starts.every((byte, i) => bytes[i] === byte))?.[0] ?? null;

export class BesideStore {
  readonly #fs: FsPort;
  readonly #folder: string;
  readonly #locks: string;
  readonly #turns = new Turns();

  constructor(fs: FsPort, folders: Folders) {
    this.#fs = fs;
    this.#folder = folders.beside;
    this.#locks = folders.locks;
  }

  /** Changes beside one site, one after another in this program. */
  turn<T>(siteId: string, task: () => Promise<T>): Promise<T> {
    return this.#turns.take(checkedId(siteId), task);
  }

  /** For changes that no other program may make at the same time. */
  async locked<T>(siteId: string, task: () => Promise<T>): Promise<T> {
    await this.#fs.makeFolder(this.#locks);
    return withLock(this.#fs, join(this.#locks, `${checkedId(siteId)}.beside.lock`), task);
  }

  folderOf(siteId: string, ...parts: readonly string[]): string {
    return join(this.#folder, checkedId(siteId), ...parts);
  }

  /** Every visit of the site, those included that cannot be read: what is wrong with them is told then. */
  visits(siteId: string): Promise<readonly KeptText[]> {
    return telling('The visits could not be listed', async () => {
      const folder = this.folderOf(siteId, 'visits');
      const ids = (await this.#namesIn(folder))
        .filter((name) => name.endsWith(DOCUMENT_END))
        .map((name) => name.slice(0, -DOCUMENT_END.length));
      const kept: KeptText[] = [];
      for (const id of ids.toSorted()) {
        const found = await this.#document(join(folder, id + DOCUMENT_END), id, readVisit);
        if (found !== null) kept.push(found);
      }
      return kept;
    });
  }

  followUp(siteId: string): Promise<KeptText | null> {
    return telling('The follow-up could not be read', () => this.#document(this.#followUpPath(siteId), 'follow-up', readFollowUp));
  }

  /** @throws HostError `stale` if another revision is there; then, as after any other error, the file is as it was */
  saveVisit({ siteId, visitId, body, baseRevision }: SaveVisit): Promise<{ readonly revision: string }> {
    return telling('The visit was not saved', () => {
      const visit = checked('The visit was not saved', body, readVisit);
      if (visit.id !== visitId || visit.siteId !== siteId)
        throw new HostError('bad-request', `The visit was not saved: it says it is ${visit.id} of site ${visit.siteId}.`);
      return this.#replace(
        siteId,
        this.folderOf(siteId, 'visits', checkedId(visitId) + DOCUMENT_END),
        writeVisit(visit),
        baseRevision,
        'The visit',
      );
    });
  }

  saveFollowUp({ siteId, body, baseRevision }: SaveFollowUp): Promise<{ readonly revision: string }> {
    return telling('The follow-up was not saved', () => {
      const book = checked('The follow-up was not saved', body, readFollowUp);
      if (book.siteId !== siteId) throw new HostError('bad-request', `The follow-up was not saved: it says it is of site ${book.siteId}.`);
      return this.#replace(siteId, this.#followUpPath(siteId), writeFollowUp(book), baseRevision, 'The follow-up');
    });
  }

  /** Keeps a photo under its id; what it really is, its first bytes tell. @returns the name under which it is kept */
  addPhoto({ siteId, photoId, base64 }: PhotoRequest): Promise<{ readonly file: string }> {
    return telling('The photo was not kept', async () => {
      const bytes = new Uint8Array(Buffer.from(base64, 'base64'));
      if (bytes.length > PHOTO_BYTES)
        throw new HostError(
          'too-large',
          `The photo was not kept: it is larger than ${PHOTO_BYTES / 1024 / 1024} MiB. Make it smaller and attach it again.`,
        );
      const end = pictureEnd(bytes);
      if (end === null)
        throw new HostError(
          'bad-request',
          'The photo was not kept: it is no JPEG, PNG or WebP picture. Save it as one and attach it again.',
        );
      const file = `${checkedId(photoId)}.${end}`;
      await this.write(this.folderOf(siteId, 'photos', file), bytes);
      return { file };
    });
  }

  /** Names of the photos that are kept beside the site. */
  async photoNames(siteId: string): Promise<readonly string[]> {
    return (await this.#namesIn(this.folderOf(siteId, 'photos'))).filter(isPhotoName).toSorted();
  }

  /** Whether anything is kept beside a site of that id, even if the site itself is gone. */
  async keepsAnything(siteId: string): Promise<boolean> {
    return (await this.#namesIn(this.folderOf(siteId))).length > 0;
  }

  /** @returns the photo's bytes in base64 */
  readPhoto(siteId: string, file: string): Promise<string> {
    return telling('The photo could not be read', async () => {
      const [, id = '', end = ''] = /^(.*)\.([a-z]+)$/.exec(file) ?? [];
      if (!PICTURES.some(([known]) => known === end))
        throw new HostError('bad-request', 'A photo is named by its id and ends in .jpg, .png or .webp.');
      const bytes = await this.read(this.folderOf(siteId, 'photos', `${checkedId(id)}.${end}`));
      if (bytes === null)
        throw new HostError('not-found', `The photo ${file} is no longer beside the site. Take it from a copy of the sites folder.`);
      return Buffer.from(bytes).toString('base64');
    });
  }

  // ---------------------------------------------------------------- files

  /** The file's bytes; null where there is none. */
  async read(path: string): Promise<Uint8Array | null> {
    try {
      return await this.#fs.read(path);
    } catch (error) {
      if (systemCode(error) === 'ENOENT') return null;
      throw error;
    }
  }

  /** Puts the file there whole, and returns once it is on the disk. */
  async write(path: string, bytes: Uint8Array): Promise<void> {
    await this.makeFolders(dirname(path));
    const temp = await writeBeside(this.#fs, path, bytes);
    try {
      await renameOver(this.#fs, temp, path);
    } catch (error) {
      await this.#fs.remove(temp).catch(() => undefined);
      throw error;
    }
    await this.#fs.syncFolder(dirname(path));
  }

  /** Names of the folders in `records-of`. */
  otherChains(siteId: string): Promise<readonly string[]> {
    return this.#namesIn(this.folderOf(siteId, 'records-of'));
  }

  /** The folder and those above it, as far up as that of everything beside the sites. */
  async makeFolders(folder: string): Promise<void> {
    const below = folder
      .slice(this.#folder.length)
      .split(/[\\/]/)
      .filter((part) => part !== '');
    let path = this.#folder;
    await this.#fs.makeFolder(path);
    for (const part of below) {
      path = join(path, part);
      await this.#fs.makeFolder(path);
    }
  }

  #followUpPath(siteId: string): string {
    return this.folderOf(siteId, `follow-up${DOCUMENT_END}`);
  }

  async #namesIn(folder: string): Promise<readonly string[]> {
    try {
      return await this.#fs.list(folder);
    } catch (error) {
      if (systemCode(error) === 'ENOENT') return [];
      throw error;
    }
  }

  async #document<T>(path: string, id: string, read: (json: unknown) => DocumentReading<T>): Promise<KeptText | null> {
    const bytes = await this.read(path);
    if (bytes === null) return null;
    const text = new TextDecoder().decode(bytes);
    return { id, text, revision: revisionOf(bytes), problem: problemOf(text, read) };
  }

  #replace(siteId: string, path: string, text: string, baseRevision: string | null, what: string): Promise<{ readonly revision: string }> {
    return this.turn(siteId, async () => {
      const present = await this.read(path);
      const revision = present === null ? null : revisionOf(present);
      const bytes = new TextEncoder().encode(text);
      // An answer that was lost on its way: it is there already.
      if (revision === revisionOf(bytes)) return { revision };
      if (revision !== baseRevision)
        throw new HostError('stale', `${what} was not saved, because another window or program changed it since it was opened here.`);
      await this.write(path, bytes);
      return { revision: revisionOf(bytes) };
    });
  }
}

function problemOf<T>(text: string, read: (json: unknown) => DocumentReading<T>): string | null {
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    return `It is damaged: ${error instanceof Error ? error.message : String(error)}. Its file was left as it is.`;
  }
  const reading = read(json);
  return reading.ok ? null : sentences(reading.problems);
}

function checked<T>(notDone: string, body: string, read: (json: unknown) => DocumentReading<T>): T {
  let json: unknown;
  try {
    json = JSON.parse(body);
  } catch (error) {
    throw new HostError('bad-request', `${notDone}: what was sent is no JSON (${error instanceof Error ? error.message : String(error)}).`);
  }
  const reading = read(json);
  if (!reading.ok) throw new HostError('bad-request', `${notDone}, because it is not right. ${sentences(reading.problems)}`);
  return reading.document;
}
