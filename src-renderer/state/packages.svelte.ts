/**
 * Packages of a site with its visits and records: on their way between a file and the host, piece by
 * piece, with how far that is; what is asked and said about them. Can be given up at any time.
 */
import type { Host, HostFailure, MadePackage, PackageLook, TakePackage } from '../../src-core/host';
import { PACKAGE_PIECE } from '../../src-core/host-wire';
import { PACKAGE_BYTES } from '../../src-core/package/package';
import { base64Of, bytesOf } from './base64';
import { failureOf } from '../host';
import { fileNameOf, offerFile } from './offer-file';
import { countOf, sayBytes } from '../say';
import type { Shell } from './shell.svelte';

export interface Progress {
  readonly doing: string;
  /** From 0 to 1; null while it cannot be told. */
  readonly share: number | null;
  /** False once it is done whole or not at all. */
  readonly canStop: boolean;
}

/** What a package begins with: a ZIP's mark. No site file does. */
const MARK = [0x50, 0x4b];
/** Wait before it is shown how far something is, ms: what is done sooner would only flicker. */
const SHOWN_AFTER = 300;
const GIVEN_UP = new Error('given up');

export class Packages {
  progress = $state.raw<Progress | null>(null);
  readonly #shell: Shell;
  #givenUp = false;

  constructor(shell: Shell) {
    this.#shell = shell;
  }

  get #host(): Host {
    return this.#shell.host;
  }

  /** Stops before the next piece. What was on its way is dropped, and nothing is changed. */
  giveUp = (): void => {
    this.#givenUp = true;
  };

  /** Reads a package; one whose site is not here is brought in at once, of another it is asked what to do. */
  async bringIn(file: File): Promise<void> {
    const shell = this.#shell;
    const look = await this.#whileShown(() => this.#send(file));
    if (look === null) shell.said = NOTHING;
    else if (look.here === null) await this.take({ as: 'copy' });
    else shell.dialog = { kind: 'package', look };
  }

  /** Brings in the package that was looked at, and opens what it became. */
  take = (how: TakePackage): Promise<void> =>
    this.#shell.attempt(async () => {
      const shell = this.#shell;
      shell.dialog = null;
      const taken = await this.#whileShown(() => {
        this.#tell('Putting everything in its place', null, false);
        return this.#host.takePackage(how);
      });
      if (taken === null) return;
      const { id, done } = taken;
      shell.sites = await this.#host.listSites();
      await shell.openSite(id);
      if (shell.open === null) return;
      shell.open.say(['Brought in.', ...done].join(' '));
      // Unsaved changes that were found come first: they are asked about.
      if (shell.dialog !== null) return;
      shell.show('visits');
      shell.dialog = { kind: 'package-done', done };
    });

  /** The package is not wanted. */
  leave = (): Promise<void> =>
    this.#shell.attempt(async () => {
      this.#shell.dialog = null;
      await this.#host.dropPackage();
      this.#shell.said = NOTHING;
    });

  /** The open site with its visits, photos and records as one file, all as they lie on the disk. */
  export = (withPhotos = true): Promise<void> =>
    this.#shell.attempt(async () => {
      const shell = this.#shell;
      const { open } = shell;
      shell.dialog = null;
      if (open === null) return;
      if (shell.unsavedBeside()) throw UNSAVED_BESIDE;
      if (open.saved !== 'saved' && !(await open.save())) return;
      try {
        const fetched = await this.#whileShown(() => this.#fetch(open.id, withPhotos));
        if (fetched === null) return open.say('Nothing was exported.');
        offerFile(fetched.file, `${fileNameOf(open.site.name)}.tallybeam.zip`);
        open.say(`Exported ${sayContents(fetched.made)}, ${sayBytes(fetched.made.bytes, open.locale)}.${sayMissing(fetched.made)}`);
      } catch (error) {
        if (!(withPhotos && failureOf(error).code === 'too-large')) throw error;
        shell.dialog = { kind: 'without-photos' };
      }
    });

  /** @returns what the host made of it */
  async #send(file: Blob): Promise<PackageLook> {
    if (file.size > PACKAGE_BYTES)
      throw {
        code: 'too-large',
        message: `The file is larger than ${PACKAGE_BYTES / 1024 / 1024} MiB, more than any package. Check that it is the right one.`,
      } satisfies HostFailure;
    for (let from = 0; from === 0 || from < file.size; from += PACKAGE_PIECE) {
      this.#tell('Reading the file', from / file.size);
      const piece = new Uint8Array(await file.slice(from, from + PACKAGE_PIECE).arrayBuffer());
      await this.#host.sendPackage(from, base64Of(piece));
    }
    this.#tell('Verifying every part', null);
    const look = await this.#host.lookAtPackage();
    this.#tell('Verifying every part', null);
    return look;
  }

  async #fetch(siteId: string, withPhotos: boolean): Promise<{ readonly made: MadePackage; readonly file: Blob }> {
    this.#tell('Putting the site, its visits and its records together', null);
    const made = await this.#host.makePackage(siteId, withPhotos);
    const pieces: BlobPart[] = [];
    for (let size = 0; size < made.bytes;) {
      this.#tell('Writing the file', size / made.bytes);
      const piece = bytesOf(await this.#host.readPackage(size));
      if (piece.length === 0) throw { code: 'failed', message: 'The package broke off on its way. Export it again.' } satisfies HostFailure;
      pieces.push(piece);
      size += piece.length;
    }
    await this.#host.dropPackage();
    return { made, file: new Blob(pieces, { type: 'application/zip' }) };
  }

  #tell(doing: string, share: number | null, canStop = true): void {
    if (this.#givenUp && canStop) throw GIVEN_UP;
    this.progress = { doing, share, canStop };
  }

  /** @returns null where it was given up */
  async #whileShown<T>(task: () => Promise<T>): Promise<T | null> {
    const shell = this.#shell;
    this.#givenUp = false;
    const timer = setTimeout(() => (shell.dialog = { kind: 'working' }), SHOWN_AFTER);
    try {
      return await task();
    } catch (error) {
      await this.#host.dropPackage().catch(() => undefined);
      if (error === GIVEN_UP) return null;
      throw error;
    } finally {
      clearTimeout(timer);
      this.progress = null;
      if (shell.dialog?.kind === 'working') shell.dialog = null;
    }
  }
}

export const UNSAVED_BESIDE: HostFailure = {
  code: 'failed',
  message: 'A visit or its follow-up is not on the disk yet. Wait until it is saved, or sort out why it is not.',
};

const NOTHING = 'Nothing was brought in.';

/** "3 visits, 4 photos and 2 records" */
export const sayContents = ({ visits, photos, records }: Pick<PackageLook, 'visits' | 'photos' | 'records'>): string =>
  `${countOf(visits, 'visit')}, ${countOf(photos, 'photo')} and ${countOf(records, 'record')}`;

/** A sentence about photos that are not with their visits; empty where there are none. */
export const sayMissing = ({ photosMissing: missing }: Pick<PackageLook, 'photosMissing'>): string =>
  missing === 0 ? '' : ` ${countOf(missing, 'photo')} that visits name ${missing === 1 ? 'is' : 'are'} not in it.`;

/** Whether a file is a package, by its first bytes and not by its name. */
export async function isPackage(file: Blob): Promise<boolean> {
  const start = new Uint8Array(await file.slice(0, MARK.length).arrayBuffer());
  return MARK.every((byte, i) => start[i] === byte);
}
