/** What the parts of a package say: every one read as strictly as the file it comes from, and named where it is not right. */
import { keyFaults } from '../../src-core/site/json-keys';
import type { Site } from '../../src-core/site/site';
import { partNamed, partWords } from '../../src-core/package/parts';
import { readFollowUp, type FollowUp } from '../../src-core/visit/follow-up';
import type { DocumentReading } from '../../src-core/visit/read-document';
import { readVisit } from '../../src-core/visit/read-visit';
import { verifyChain, type FrozenRecord } from '../../src-core/visit/records';
import type { Visit } from '../../src-core/visit/visit';
import { PHOTO_BYTES, pictureEnd } from './beside-store';
import { checkBytes, sentences, sha256 } from './checked-site';
import { canNameFile } from './file-names';
import { damaged, textOf, type OpenedPackage } from './package-file';
import { HostError } from '../trouble';

export interface PackedChain {
  readonly lines: readonly string[];
  readonly records: readonly FrozenRecord[];
  /** Contents of record 1, 2 … */
  readonly contents: readonly Uint8Array[];
}

export interface PackageContents {
  readonly madeAt: string;
  readonly site: Site;
  readonly followUp: FollowUp | null;
  readonly visits: readonly Visit[];
  readonly photos: ReadonlyMap<string, Uint8Array>;
  /** The site's own first. */
  readonly chains: readonly PackedChain[];
}

/** @throws HostError that names every part that cannot be taken, and why */
export function contentsOf({ listing, parts }: OpenedPackage): PackageContents {
  const problems: string[] = [];
  const visits: Visit[] = [];
  const photos = new Map<string, Uint8Array>();
  const lists = new Map<number, Uint8Array>();
  const records = new Map<string, Uint8Array>();
  let site: Site | null = null;
  let followUp: FollowUp | null = null;
  let newer = false;

  for (const [name, bytes] of parts) {
    const part = partNamed(name);
    if (part === null) continue;
    const wrong = (why: string) => void problems.push(`${partWords(part)}: ${why}`);
    const document = <T>(read: (json: unknown) => DocumentReading<T>): T | null => {
      const reading = readText(bytes, read);
      if (typeof reading !== 'string') return reading.document;
      wrong(reading);
      return null;
    };
    switch (part.kind) {
      case 'site': {
        const reading = checkBytes(bytes);
        if (!reading.ok) {
          newer ||= reading.code === 'newer-version';
          wrong(sentences(reading.problems, 5));
        } else if (reading.site.id !== listing.siteId) wrong(`it is ${reading.site.id}, and the listing says ${listing.siteId}`);
        else site = reading.site;
        break;
      }
      case 'follow-up':
        followUp = document(readFollowUp);
        if (followUp !== null && followUp.siteId !== listing.siteId) wrong(`it is of site ${followUp.siteId}`);
        break;
      case 'visit': {
        const visit = document(readVisit);
        if (visit === null) break;
        if (visit.id !== part.id || visit.siteId !== listing.siteId) wrong(`it says it is ${visit.id} of site ${visit.siteId}`);
        else if (!canNameFile(visit.id)) wrong('its id names no file on some systems');
        else visits.push(visit);
        break;
      }
      case 'photo':
        if (!canNameFile(part.file.replace(/\.[a-z]+$/, ''))) wrong('its id names no file on some systems');
        else if (pictureEnd(bytes) !== part.file.split('.').at(-1)) wrong('it is not the kind of picture that its name says');
        else if (bytes.length > PHOTO_BYTES) wrong(`it is larger than ${PHOTO_BYTES / 1024 / 1024} MiB`);
        photos.set(part.file, bytes);
        break;
      case 'chain':
        lists.set(part.chain, bytes);
        break;
      case 'record':
        records.set(`${part.chain}/${part.number}`, bytes);
    }
  }

  const chains = [...lists].sort(([a], [b]) => a - b).map(([chain, bytes]) => chainOf(chain, bytes, records, problems));
  for (const left of records.keys()) problems.push(`record ${left.split('/')[1] ?? ''}: no list of records names it`);
  if (site === null && problems.length === 0) problems.push('the site: is missing');
  if (newer) throw new HostError('newer-version', `The package was not brought in.\n${problems.join('\n')}`);
  if (problems.length > 0 || site === null) throw damaged(problems);
  return { madeAt: listing.madeAt, site, followUp, visits, photos, chains };
}

/** Takes the chain's records out of `records`, so that what is left there belongs to none. */
function chainOf(chain: number, bytes: Uint8Array, records: Map<string, Uint8Array>, problems: string[]): PackedChain {
  const list = partWords({ kind: 'chain', chain });
  const text = textOf(bytes) ?? '';
  const lines = text.split('\n').slice(0, -1);
  if (!text.endsWith('\n')) problems.push(`${list}: breaks off`);
  const contents = lines.flatMap((_, i) => records.get(`${chain}/${i + 1}`) ?? []);
  const verdict = verifyChain(lines, sha256, (number) => {
    const one = records.get(`${chain}/${number}`);
    return one === undefined ? null : sha256(one);
  });
  lines.forEach((_, i) => records.delete(`${chain}/${i + 1}`));
  if (!verdict.whole) problems.push(`${partWords({ kind: 'record', chain, number: verdict.altered })}: ${verdict.message}`);
  return { lines, records: verdict.records, contents };
}

function readText<T>(bytes: Uint8Array, read: (json: unknown) => DocumentReading<T>): { readonly document: T } | string {
  const text = textOf(bytes);
  if (text === null) return 'holds bytes that are no text';
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    return error instanceof Error ? error.message : String(error);
  }
  const faults = keyFaults(text);
  if (faults.length > 0) return sentences(faults, 5);
  const reading = read(json);
  return reading.ok ? { document: reading.document } : sentences(reading.problems, 5);
}
