/**
 * Saves a small site, then one that does not fit; says what was answered and what is on the disk.
 * Argument: the sites folder, on a disk with little room or under a limit to the size of files.
 */
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { foldersIn } from '../../src-main/store/file-names';
import { nodeFs } from '../../src-main/store/fs-port';
import { Journal } from '../../src-main/store/journal';
import { SiteStore } from '../../src-main/store/site-store';
import { bodyOf } from './make';

const [folder = ''] = process.argv.slice(2);
const TOO_MANY = 12_000;

export interface FullDiskReport {
  readonly save: { readonly code?: string; readonly message?: string };
  readonly journal: { readonly code?: string; readonly message?: string };
  readonly fileUnchanged: boolean;
  readonly journalStillReads: boolean;
  readonly temporary: number;
  /** Whether the small site could be saved again afterwards. */
  readonly savedAgain: boolean;
}

const refusal = async (task: Promise<unknown>): Promise<{ code?: string; message?: string }> => {
  try {
    await task;
    return {};
  } catch (error) {
    const { code, message } = error as { code: string; message: string };
    return { code, message };
  }
};

const store = new SiteStore({ fs: nodeFs, folder, program: '0.1.0' });
const { journal, leftOut } = foldersIn(folder);
const journalOf = (session: string) => new Journal({ places: [{ fs: nodeFs, folder: journal, leftOut }], session, now: () => new Date() });
const path = join(folder, 's.tallybeam.json');

const { revision } = await store.save({ id: 's', body: bodyOf('s', 1), baseRevision: null });
const before = readFileSync(path);
const edits = journalOf('a');
await edits.append({ id: 's', baseRevision: revision, body: bodyOf('s', 2), edit: 'Edit 2' });
const full = { id: 's', baseRevision: revision, body: bodyOf('s', 3, TOO_MANY) };
const save = await refusal(store.save(full));
const appended = await refusal(edits.append({ ...full, edit: 'Edit 3' }));
const fileUnchanged = readFileSync(path).equals(before);
const found = await journalOf('b').recovered('s', bodyOf('s', 1));
const savedAgain = (await refusal(store.save({ id: 's', body: bodyOf('s', 4), baseRevision: revision }))).code === undefined;
const report: FullDiskReport = {
  save,
  journal: appended,
  fileUnchanged,
  journalStillReads: found?.body === bodyOf('s', 2),
  temporary: readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((name) => name.endsWith('.temp')).length,
  savedAgain,
};
process.stdout.write(JSON.stringify(report));
