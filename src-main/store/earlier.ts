/** Earlier states of each site: kept when a save replaces them, thinned out as they grow old. */
import { join } from 'node:path';
import type { Generation } from '../../src-core/host';
import { checkedId, generationId, readGenerationId, SITE_FILE_END, type Folders, type GenerationName } from './file-names';
import { systemCode, type FsPort } from './fs-port';
import { HostError } from '../trouble';
import { keepAs } from './whole-file';

const KEPT_LATEST = 10;
const KEPT_DAYS = 30;
const DAY = 24 * 60 * 60 * 1000;

const folderOf = (folders: Folders, id: string): string => join(folders.earlier, checkedId(id));

interface Kept extends GenerationName {
  readonly id: string;
}

/** From the latest to the oldest. */
async function keptOf(fs: FsPort, folders: Folders, id: string): Promise<readonly Kept[]> {
  let names: readonly string[];
  try {
    names = await fs.list(folderOf(folders, id));
  } catch (error) {
    if (systemCode(error) === 'ENOENT') return [];
    throw error;
  }
  return names
    .flatMap((name) => {
      const own = name.endsWith(SITE_FILE_END) ? name.slice(0, -SITE_FILE_END.length) : '';
      const parts = readGenerationId(own);
      return parts === null ? [] : [{ ...parts, id: own }];
    })
    .sort((a, b) => b.order - a.order);
}

export interface State {
  readonly path: string;
  readonly bytes: Uint8Array;
  readonly savedAt: string;
  readonly revision: string;
}

/** Keeps the state that is about to be replaced; one that is kept already is not kept twice. */
export async function keepEarlier(fs: FsPort, folders: Folders, id: string, state: State): Promise<void> {
  await fs.makeFolder(folders.earlier);
  await fs.makeFolder(folderOf(folders, id));
  const [latest] = await keptOf(fs, folders, id);
  if (latest?.revision === state.revision.slice(0, 16)) return;
  const name = generationId({ order: (latest?.order ?? 0) + 1, savedAt: state.savedAt, revision: state.revision });
  await keepAs(fs, state.path, state.bytes, join(folderOf(folders, id), name + SITE_FILE_END));
}

/**
 * Which of the kept states may go: all but the latest ten and, for thirty days, the last of each day.
 * @param kept from the latest to the oldest
 */
function outlived(kept: readonly GenerationName[], now: Date): readonly number[] {
  const days = new Set<string>();
  return kept.flatMap(({ savedAt }, i) => {
    const day = savedAt.slice(0, 10);
    const firstOfDay = !days.has(day);
    days.add(day);
    const age = now.getTime() - Date.parse(savedAt);
    return i < KEPT_LATEST || (firstOfDay && age <= KEPT_DAYS * DAY) ? [] : [i];
  });
}

export async function thinOut(fs: FsPort, folders: Folders, id: string, now: Date): Promise<void> {
  const kept = await keptOf(fs, folders, id);
  for (const at of outlived(kept, now)) {
    const old = kept[at];
    if (old) await fs.remove(join(folderOf(folders, id), old.id + SITE_FILE_END));
  }
}

export async function listEarlier(fs: FsPort, folders: Folders, id: string): Promise<readonly Generation[]> {
  const generations: Generation[] = [];
  for (const kept of await keptOf(fs, folders, id)) {
    try {
      const { bytes } = await fs.facts(join(folderOf(folders, id), kept.id + SITE_FILE_END));
      generations.push({ id: kept.id, savedAt: kept.savedAt, bytes });
    } catch (error) {
      // Thinned out by another program meanwhile.
      if (systemCode(error) !== 'ENOENT') throw error;
    }
  }
  return generations;
}

export async function readEarlier(fs: FsPort, folders: Folders, id: string, generation: string): Promise<Uint8Array> {
  if (readGenerationId(generation) === null)
    throw new HostError('bad-request', 'An earlier state is named by its number, time and revision.');
  try {
    return await fs.read(join(folderOf(folders, id), generation + SITE_FILE_END));
  } catch (error) {
    if (systemCode(error) !== 'ENOENT') throw error;
    throw new HostError('not-found', 'This earlier state is not kept any more. Look at the list again.', error);
  }
}
