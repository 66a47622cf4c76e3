/**
 * What a package may hold: names from this list and no other, so that no name in a package can lead
 * anywhere on a disk.
 *
 *   listing.json                       what is in it, each part with its size and checksum
 *   site.tallybeam.json                the site's file
 *   follow-up.json
 *   visits/<visit>.json
 *   photos/<photo>.jpg, .png, .webp
 *   records/chain.jsonl, 000001.json …
 *   records-2/chain.jsonl, 000001.json …   a further chain of records, kept apart
 */
import { isId } from '../site/fields';

export const LISTING_NAME = 'listing.json';
export const SITE_PART = 'site.tallybeam.json';
export const FOLLOW_UP_PART = 'follow-up.json';
export const PICTURE_ENDS = ['jpg', 'png', 'webp'] as const;
/** More chains than machines ever hand one site round. */
const MOST_CHAINS = 99;

export type Part =
  | { readonly kind: 'site' | 'follow-up' }
  | { readonly kind: 'visit'; readonly id: string }
  | { readonly kind: 'photo'; readonly file: string }
  /** `chain` counts from 1, the site's own. */
  | { readonly kind: 'chain'; readonly chain: number }
  | { readonly kind: 'record'; readonly chain: number; readonly number: number };

const PHOTO = new RegExp(`^(.+)\\.(?:${PICTURE_ENDS.join('|')})$`);

/** Whether a name is one under which a photo is kept. */
export const isPhotoName = (file: string): boolean => isId(PHOTO.exec(file)?.[1]);

/** What a name in a package stands for; null for any other than the names above. */
export function partNamed(name: string): Part | null {
  if (name === SITE_PART) return { kind: 'site' };
  if (name === FOLLOW_UP_PART) return { kind: 'follow-up' };
  const [, folder = '', file = ''] = /^([a-z0-9-]+)\/([^/]+)$/.exec(name) ?? [];
  if (folder === 'visits') {
    const id = file.endsWith('.json') ? file.slice(0, -'.json'.length) : '';
    return isId(id) ? { kind: 'visit', id } : null;
  }
  if (folder === 'photos') return isPhotoName(file) ? { kind: 'photo', file } : null;
  const chain = chainIn(folder);
  if (chain === null) return null;
  if (file === 'chain.jsonl') return { kind: 'chain', chain };
  const number = /^\d{6}\.json$/.test(file) ? Number(file.slice(0, 6)) : 0;
  return number > 0 ? { kind: 'record', chain, number } : null;
}

function chainIn(folder: string): number | null {
  if (folder === 'records') return 1;
  const chain = /^records-[1-9]\d?$/.test(folder) ? Number(folder.slice('records-'.length)) : 0;
  return chain >= 2 && chain <= MOST_CHAINS ? chain : null;
}

/** The name of a part, which `partNamed` reads back. */
export function nameOfPart(part: Part): string {
  switch (part.kind) {
    case 'site':
      return SITE_PART;
    case 'follow-up':
      return FOLLOW_UP_PART;
    case 'visit':
      return `visits/${part.id}.json`;
    case 'photo':
      return `photos/${part.file}`;
    case 'chain':
      return `${chainFolder(part.chain)}/chain.jsonl`;
    case 'record':
      return `${chainFolder(part.chain)}/${String(part.number).padStart(6, '0')}.json`;
  }
}

const chainFolder = (chain: number): string => (chain === 1 ? 'records' : `records-${chain}`);

/** A part as messages name it. */
export function partWords(part: Part): string {
  switch (part.kind) {
    case 'site':
      return 'the site';
    case 'follow-up':
      return 'the follow-up';
    case 'visit':
      return `visit ${part.id}`;
    case 'photo':
      return `photo ${part.file}`;
    case 'chain':
      return part.chain === 1 ? 'the list of records' : `the list of records ${part.chain}`;
    case 'record':
      return part.chain === 1 ? `record ${part.number}` : `record ${part.number} of list ${part.chain}`;
  }
}
