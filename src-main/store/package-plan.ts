/** What bringing a package in puts where, and what that means in words. Nothing is written here. */
import { joinChains, type ChainStep } from '../../src-core/package/chains';
import { joinFollowUps, joinVisits, withPhotoNames } from '../../src-core/package/join';
import type { IfVisitDiffers } from '../../src-core/package/package';
import { readFollowUp, writeFollowUp } from '../../src-core/visit/follow-up';
import { readVisit, writeVisit } from '../../src-core/visit/read-visit';
import type { BesideStore } from './beside-store';
import { sha256 } from './checked-site';
import type { Placing } from './incoming';
import type { PackageContents } from './package-contents';
import { CHAIN_FILE, chainFolder, contentsFile, HEAD_FILE, headText, type ChainId, type RecordStore } from './record-store';
import { HostError } from '../trouble';

export interface Plan {
  readonly placings: readonly Placing[];
  readonly says: readonly string[];
  /** What becomes of visits that are here in another state, by the choice that was made. */
  readonly saysOfChoice: readonly string[];
  /** Names of the visits that are here in another state. */
  readonly visitsDiffer: readonly string[];
}

export interface Places {
  readonly beside: BesideStore;
  readonly records: RecordStore;
}

const encode = (text: string): Uint8Array => new TextEncoder().encode(text);

/**
 * For whoever has the turn at the site's visits and records.
 * @param siteId where it is to go: the package's own site, or a new one
 * @throws HostError where what is here cannot be relied on
 */
export async function planOf(contents: PackageContents, siteId: string, choice: IfVisitDiffers, places: Places): Promise<Plan> {
  const plan = new PlanMaker(siteId, places);
  const names = await plan.photos(contents.photos);
  await plan.visits(contents, names, choice);
  await plan.followUp(contents);
  await plan.chains(contents);
  return plan;
}

class PlanMaker implements Plan {
  readonly placings: Placing[] = [];
  readonly says: string[] = [];
  readonly saysOfChoice: string[] = [];
  readonly visitsDiffer: string[] = [];
  readonly #siteId: string;
  readonly #places: Places;

  constructor(siteId: string, places: Places) {
    this.#siteId = siteId;
    this.#places = places;
  }

  /** @returns new names of photos whose names other pictures have here */
  async photos(photos: PackageContents['photos']): Promise<ReadonlyMap<string, string>> {
    const names = new Map<string, string>();
    let added = 0;
    for (const [file, bytes] of photos) {
      const hash = sha256(bytes);
      const there = await this.#hashAt('photos', file);
      const name = there === null || there === hash ? file : `${hash.slice(0, 32)}.${file.split('.').at(-1) ?? ''}`;
      if (name !== file) {
        names.set(file, name);
        this.says.push(`Photo ${file} has the name of another picture here: both are kept, and this one gets a name of its own.`);
      }
      if (there === hash || (name !== file && (await this.#hashAt('photos', name)) === hash)) continue;
      this.#put(['photos', name], bytes, null);
      added++;
    }
    if (added > 0) this.says.push(`${counted(added, 'photo')} added.`);
    return names;
  }

  async visits({ visits }: PackageContents, names: ReadonlyMap<string, string>, choice: IfVisitDiffers): Promise<void> {
    const kept = await this.#places.beside.visits(this.#siteId);
    const ours = new Map(kept.map(({ id, text, problem }) => [id, problem === null ? asWritten(text) : text]));
    const theirs = visits.map((visit) => withPhotoNames({ ...visit, siteId: this.#siteId }, names));
    const steps = joinVisits(ours, theirs, choice, writeVisit, (visit, attempt) => sha256(`${attempt} ${writeVisit(visit)}`).slice(0, 32));
    for (const step of steps) {
      const { visit } = step;
      const to = ['visits', `${visit.id}.json`];
      if (step.kind === 'add') this.#put(to, encode(writeVisit(visit)), null);
      if (step.kind === 'beside') {
        this.#put(to, encode(writeVisit(visit)), null);
        this.visitsDiffer.push(theirs.find(({ id }) => id === step.of)?.name ?? visit.name);
        this.saysOfChoice.push(`A visit is here in another state: both are kept, the one from the package as “${visit.name}”.`);
      }
      if (step.kind === 'replace') {
        const here = kept.find(({ id }) => id === visit.id);
        const before = await this.#places.beside.read(this.#places.beside.folderOf(this.#siteId, ...to));
        if (here === undefined || before === null) continue;
        await this.#putAside(`visit-${visit.id}`, before);
        this.#put(to, encode(writeVisit(visit)), here.revision);
        this.visitsDiffer.push(visit.name);
        this.saysOfChoice.push(`“${visit.name}” takes the place of its state here, which is put aside.`);
      }
    }
    const count = (kind: string) => steps.filter((step) => step.kind === kind).length;
    if (count('add') > 0) this.says.unshift(`${counted(count('add'), 'visit')} added.`);
    if (count('here') > 0) this.says.push(`${counted(count('here'), 'visit')} here already, the same.`);
  }

  async followUp({ followUp }: PackageContents): Promise<void> {
    if (followUp === null) return;
    const theirs = { ...followUp, siteId: this.#siteId };
    const kept = await this.#places.beside.followUp(this.#siteId);
    if (kept === null) {
      this.#put(['follow-up.json'], encode(writeFollowUp(theirs)), null);
      this.says.push('The follow-up comes with it: closed actions, reduced loads and the rhythm of visits.');
      return;
    }
    if (kept.text === writeFollowUp(theirs)) return;
    const reading = kept.problem === null ? readFollowUp(JSON.parse(kept.text)) : null;
    if (!reading?.ok) throw new HostError('unreadable', `The follow-up that is here cannot be read. ${kept.problem ?? ''}`);
    const { book, leftOut } = joinFollowUps(reading.document, theirs);
    const joined = writeFollowUp(book);
    if (joined !== kept.text) {
      this.#put(['follow-up.json'], encode(joined), kept.revision);
      this.says.push('Closed actions and reduced loads of both are kept.');
    }
    if (leftOut.length === 0) return;
    await this.#putAside('follow-up', encode(writeFollowUp(theirs)));
    this.says.push(`The follow-up here stays where the two differ (${leftOut.join('; ')}); that of the package is put aside whole.`);
  }

  async chains({ chains }: PackageContents): Promise<void> {
    const kept = await this.#places.records.chainsInTurn(this.#siteId);
    for (const { verdict } of kept)
      if (!verdict.whole) throw new HostError('altered', `The records that are here are not whole. ${verdict.message}`);
    const steps = joinChains(
      kept.map(({ verdict }) => verdict.records.map(({ hash }) => hash)),
      chains.map(({ records }) => records.map(({ hash }) => hash)),
    );
    const ids: ChainId[] = kept.map(({ id }) => id);
    for (const [i, step] of steps.entries()) {
      const chain = chains[i];
      if (chain === undefined) continue;
      if (step.kind !== 'here') {
        // The first record that no other chain has names it, wherever it goes on from there.
        if (step.kind === 'apart') ids[step.at] = (chain.records[step.from]?.hash ?? '').slice(0, 16);
        await this.#putChain(ids[step.at] ?? null, chain, step.kind === 'continues' ? step.from : 0);
      }
      this.#sayChain(step, chain.records.length);
    }
  }

  async #putChain(id: ChainId, { lines, records, contents }: PackageContents['chains'][number], from: number): Promise<void> {
    const last = records.at(-1);
    if (last === undefined) return;
    const folder = chainFolder(id);
    for (let i = from; i < lines.length; i++) await this.#replace([...folder, contentsFile(i + 1)], contents[i] ?? new Uint8Array());
    await this.#replace([...folder, CHAIN_FILE], encode(`${lines.join('\n')}\n`));
    await this.#replace([...folder, HEAD_FILE], encode(headText(last)));
  }

  #sayChain(step: ChainStep, count: number): void {
    if (count === 0) return;
    if (step.kind === 'here') this.says.push(`${counted(count, 'record')} here already, verified and the same.`);
    else if (step.kind === 'continues')
      this.says.push(
        step.from === 0
          ? `${counted(count, 'record')} added.`
          : `${counted(count - step.from, 'record')} put behind the ${step.from} that are here.`,
      );
    else
      this.says.push(
        `Records were made both here and there${step.from > 0 ? ` since record ${step.from}` : ''}: those of the package are kept as a list of their own, verified by itself.`,
      );
  }

  async #putAside(name: string, bytes: Uint8Array): Promise<void> {
    await this.#replace(['put-aside', `${name}-${sha256(bytes).slice(0, 16)}.json`], bytes);
  }

  /** A file that may be replaced, by this one, if it is not the same. */
  async #replace(to: readonly string[], bytes: Uint8Array): Promise<void> {
    const there = await this.#hashAt(...to);
    if (there !== sha256(bytes)) this.#put(to, bytes, there);
  }

  #put(to: readonly string[], bytes: Uint8Array, replaces: string | null): void {
    this.placings.push({ to: ['beside', this.#siteId, ...to].join('/'), bytes, replaces });
  }

  async #hashAt(...to: readonly string[]): Promise<string | null> {
    const bytes = await this.#places.beside.read(this.#places.beside.folderOf(this.#siteId, ...to));
    return bytes === null ? null : sha256(bytes);
  }
}

/** In the form of today, so that a visit that an earlier program wrote is known as the same. */
function asWritten(text: string): string {
  const reading = readVisit(JSON.parse(text));
  return reading.ok ? writeVisit(reading.document) : text;
}

const counted = (count: number, noun: string): string => (count === 1 ? `1 ${noun} is` : `${count} ${noun}s are`);
