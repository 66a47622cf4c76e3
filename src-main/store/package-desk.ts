/** The one package that a page has made or is sending: carried in pieces, so that neither carrier needs it in one message. */
import type { MadePackage, PackageLook, TakenPackage, TakePackage } from '../../src-core/host';
import { PACKAGE_PIECE } from '../../src-core/host-wire';
import { PACKAGE_BYTES } from '../../src-core/package/package';
import { contentsOf, type PackageContents } from './package-contents';
import { readPackage } from './package-file';
import type { PackageStore } from './package-store';
import { HostError } from '../trouble';

/** How long a package is kept that nobody asks for: a page may be gone without a word, ms. */
const KEPT = 15 * 60_000;

export class PackageDesk {
  readonly #store: () => PackageStore;
  #made: Uint8Array | null = null;
  #pieces: Uint8Array[] = [];
  #contents: PackageContents | null = null;
  #timer: NodeJS.Timeout | null = null;

  /** @param store that of the folder in use */
  constructor(store: () => PackageStore) {
    this.#store = store;
  }

  async make(siteId: string, withPhotos: boolean): Promise<MadePackage> {
    this.drop();
    const { bytes, told } = await this.#store().make(siteId, withPhotos);
    this.#made = bytes;
    this.#keepAWhile();
    return told;
  }

  async read(from: number): Promise<string> {
    if (this.#made === null) throw gone('export it again');
    this.#keepAWhile();
    return Buffer.from(this.#made.subarray(from, from + PACKAGE_PIECE)).toString('base64');
  }

  async send(from: number, base64: string): Promise<void> {
    if (from === 0) this.drop();
    const there = this.#pieces.reduce((sum, piece) => sum + piece.length, 0);
    if (from !== there) throw gone('bring the file in again');
    const piece = new Uint8Array(Buffer.from(base64, 'base64'));
    if (there + piece.length > PACKAGE_BYTES)
      throw new HostError(
        'too-large',
        `The file is larger than ${PACKAGE_BYTES / 1024 / 1024} MiB, more than any package. Check that it is the right one.`,
      );
    this.#contents = null;
    this.#pieces.push(piece);
    this.#keepAWhile();
  }

  async look(): Promise<PackageLook> {
    if (this.#contents === null) {
      const file = new Uint8Array(Buffer.concat(this.#pieces));
      // It may be large, and its parts are copies: what is not needed any more goes at once.
      this.#pieces = [];
      this.#contents = contentsOf(readPackage(file));
    }
    this.#keepAWhile();
    return this.#store().look(this.#contents);
  }

  async take(how: TakePackage): Promise<TakenPackage> {
    if (this.#contents === null) throw gone('bring the file in again');
    const taken = await this.#store().take(this.#contents, how);
    this.drop();
    return taken;
  }

  #keepAWhile(): void {
    this.#timer?.refresh();
    this.#timer ??= setTimeout(() => this.drop(), KEPT).unref();
  }

  drop(): void {
    if (this.#timer !== null) clearTimeout(this.#timer);
    this.#timer = null;
    this.#made = null;
    this.#pieces = [];
    this.#contents = null;
  }
}

const gone = (mend: string): HostError => new HostError('bad-request', `The package is not kept here any more: ${mend}.`);
