/** Packages made of what is kept here, and what is in packages brought in. */
import { randomUUID } from 'node:crypto';
import type { MadePackage, PackageCounts, PackageLook, TakenPackage, TakePackage } from '../../src-core/host';
import { nameOfPart } from '../../src-core/package/parts';
import { writeSite } from '../../src-core/site/write';
import { readVisit } from '../../src-core/visit/read-visit';
import type { Visit } from '../../src-core/visit/visit';
import type { BesideStore } from './beside-store';
import { canNameFile, siteFileName } from './file-names';
import type { Incoming, Placing } from './incoming';
import type { PackageContents } from './package-contents';
import { writePackage } from './package-file';
import { planOf, type Plan } from './package-plan';
import type { RecordStore } from './record-store';
import type { SiteStore } from './site-store';
import { HostError, telling } from '../trouble';

export interface PackageStoreOptions {
  readonly store: SiteStore;
  readonly beside: BesideStore;
  readonly records: RecordStore;
  readonly incoming: Incoming;
  readonly program: string;
  readonly now: () => Date;
}

export interface Made {
  readonly bytes: Uint8Array;
  readonly told: MadePackage;
}

const NOT_MADE = 'The package was not made';
const NOT_TAKEN = 'The package was not brought in';

export class PackageStore {
  readonly #options: PackageStoreOptions;

  constructor(options: PackageStoreOptions) {
    this.#options = options;
  }

  /** @throws HostError that names what cannot be read or relied on: no package is made that would be refused elsewhere */
  make(siteId: string, withPhotos: boolean): Promise<Made> {
    const { store, program, now } = this.#options;
    return telling(NOT_MADE, async () => {
      const { site } = await store.read(siteId);
      return this.#inTurn(siteId, async () => {
        const { parts, visits, names } = await instead(NOT_MADE, () => this.#gather(siteId, withPhotos));
        const bytes = writePackage(parts, { program, madeAt: now().toISOString(), siteId, siteName: site.name });
        const records = [...parts.keys()].filter((name) => /^records(-\d+)?\/\d/.test(name)).length;
        return { bytes, told: { bytes: bytes.length, ...countsOf(visits, withPhotos ? names : []), records } };
      });
    });
  }

  look(contents: PackageContents): Promise<PackageLook> {
    return telling(NOT_TAKEN, async () => {
      const { site, visits, photos, chains, madeAt } = contents;
      const records = chains.reduce((sum, chain) => sum + chain.records.length, 0);
      return { siteName: site.name, madeAt, ...countsOf(visits, [...photos.keys()]), records, here: await this.#here(contents) };
    });
  }

  take(contents: PackageContents, how: TakePackage): Promise<TakenPackage> {
    return telling(NOT_TAKEN, async () => {
      // So that what an earlier import left half way is not built upon.
      await this.#options.incoming.finish(this.#options.now());
      if (how.as === 'copy') return this.#asCopy(contents);
      const { id } = contents.site;
      if (!(await this.#options.store.has(id)))
        throw new HostError('not-found', `${NOT_TAKEN}: its site is not here any more. Bring it in as a site of its own.`);
      return this.#place(id, contents, [], (plan) => plan, how.ifVisitDiffers);
    });
  }

  async #here(contents: PackageContents): Promise<PackageLook['here']> {
    const { id } = contents.site;
    const { store } = this.#options;
    if (!canNameFile(id) || !(await store.has(id))) return null;
    const nothing = { steps: [], visitsDiffer: [] };
    try {
      const { site } = await store.read(id);
      const { says, visitsDiffer } = await this.#inTurn(id, () => planOf(contents, id, 'keep-both', this.#options));
      const same = writeSite(site) === writeSite(contents.site);
      const racks = same
        ? 'The racks and goods are the same here.'
        : 'The racks and goods here stay as they are; those in the package differ. To have those as well, bring it in as a site of its own.';
      return { name: site.name, steps: [...says, racks], visitsDiffer, problem: null };
    } catch (error) {
      if (error instanceof HostError && ['altered', 'unreadable', 'newer-version'].includes(error.code))
        return { name: contents.site.name, ...nothing, problem: `${error.message}\nIt can be brought in as a site of its own.` };
      throw error;
    }
  }

  async #asCopy(contents: PackageContents): Promise<TakenPackage> {
    const { store, beside } = this.#options;
    const own = contents.site.id;
    // What is still kept beside a site that was removed belongs to that one.
    const free = canNameFile(own) && !(await store.has(own)) && !(await beside.keepsAnything(own));
    const id = free ? own : randomUUID();
    const file = { to: siteFileName(id), bytes: store.fileOf({ ...contents.site, id }), replaces: null };
    const says = [`${contents.site.name} is brought in as a site of its own.`];
    return this.#place(id, contents, says, (placings) => [...placings, file]);
  }

  /** @param more the site's file comes last: before it is there, nothing of the rest is seen */
  #place(
    id: string,
    contents: PackageContents,
    says: readonly string[],
    more: (placings: readonly Placing[]) => readonly Placing[],
    choice: Parameters<typeof planOf>[2] = 'keep-both',
  ): Promise<TakenPackage> {
    const { beside, incoming } = this.#options;
    return this.#inTurn(id, async () => {
      const plan: Plan = await instead(NOT_TAKEN, () => planOf(contents, id, choice, this.#options));
      await incoming.place(more(plan.placings), (task) => beside.locked(id, task));
      return { id, done: [...says, ...plan.says, ...plan.saysOfChoice] };
    });
  }

  #inTurn<T>(siteId: string, task: () => Promise<T>): Promise<T> {
    const { beside, records } = this.#options;
    return beside.turn(siteId, () => records.turn(siteId, task));
  }

  async #gather(siteId: string, withPhotos: boolean) {
    const { store, beside, records } = this.#options;
    const parts = new Map<string, Uint8Array>();
    const encode = (text: string) => new TextEncoder().encode(text);
    parts.set(nameOfPart({ kind: 'site' }), encode((await store.read(siteId)).text));
    const followUp = await beside.followUp(siteId);
    if (followUp !== null) parts.set(nameOfPart({ kind: 'follow-up' }), encode(sound('The follow-up', followUp)));
    const visits: Visit[] = [];
    for (const kept of await beside.visits(siteId)) {
      const text = sound(`Visit ${kept.id}`, kept);
      const reading = readVisit(JSON.parse(text));
      if (reading.ok) visits.push(reading.document);
      parts.set(nameOfPart({ kind: 'visit', id: kept.id }), encode(text));
    }
    const names = await beside.photoNames(siteId);
    for (const file of withPhotos ? names : []) {
      const bytes = await beside.read(beside.folderOf(siteId, 'photos', file));
      if (bytes !== null) parts.set(nameOfPart({ kind: 'photo', file }), bytes);
    }
    for (const [i, { id, lines, verdict }] of (await records.chainsInTurn(siteId)).entries()) {
      if (!verdict.whole) throw new HostError('altered', verdict.message);
      if (lines.length === 0) continue;
      const chain = i + 1;
      parts.set(nameOfPart({ kind: 'chain', chain }), encode(`${lines.join('\n')}\n`));
      for (const { number } of verdict.records) {
        const bytes = await records.bytesOf(siteId, number, id);
        if (bytes !== null) parts.set(nameOfPart({ kind: 'record', chain, number }), bytes);
      }
    }
    return { parts, visits, names };
  }
}

/** What could not be read on the way is told as the reason why the whole was not done. */
async function instead<T>(notDone: string, task: () => Promise<T>): Promise<T> {
  try {
    return await task();
  } catch (error) {
    throw error instanceof HostError ? new HostError(error.code, `${notDone}. ${error.message}`, error) : error;
  }
}

function sound(what: string, { text, problem }: { readonly text: string; readonly problem: string | null }): string {
  if (problem === null) return text;
  throw new HostError(
    'unreadable',
    `${what} cannot be read: ${problem} Take its file from a copy of the sites folder, or move it out of there; then export again.`,
  );
}

function countsOf(visits: readonly Visit[], photos: readonly string[]): Omit<PackageCounts, 'records'> {
  const named = new Set(visits.flatMap(({ bays }) => bays.flatMap((bay) => bay.photos.map(({ file }) => file))));
  for (const file of photos) named.delete(file);
  return { visits: visits.length, photos: photos.length, photosMissing: named.size };
}
