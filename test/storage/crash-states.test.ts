/**
 * Power cuts at every point of saving and journalling. For every prefix of the operations that were
 * recorded, what was not synced is dropped, cut at 512 bytes or kept in part, and the program is
 * started on what is left.
 */
import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import type { FsPort } from '../../src-main/store/fs-port';
import { foldersIn } from '../../src-main/store/file-names';
import { Journal } from '../../src-main/store/journal';
import { SiteStore } from '../../src-main/store/site-store';
import { clock } from './folder';
import { bodyOf, drawn, numberIn } from './make';
import { afterPowerCut, MemoryDisk, unsynced, type Fate, type Operation } from './memory-fs';

const { journal: folder, leftOut } = foldersIn('/sites');
const storeOn = (fs: FsPort) => new SiteStore({ fs, folder: '/sites', program: '0.1.0', now: clock() });
const journalOn = (fs: FsPort, session: string) => new Journal({ places: [{ fs, folder, leftOut }], session, now: clock() });

/** What was answered as done after so many operations. */
interface Promised {
  readonly operations: number;
  readonly saved: number;
  readonly edited: number;
}

/** Saves state 1, then edits and saves in turn up to state 27, where the last edits are not saved. */
async function work(disk: MemoryDisk, store = storeOn(disk.fs)): Promise<readonly Promised[]> {
  const journal = journalOn(disk.fs, 'a');
  const promised: Promised[] = [{ operations: 0, saved: 0, edited: 0 }];
  let revision: string | null = null;
  let saved = 0;
  for (let n = 1; n <= 27; n++) {
    const body = bodyOf('s', n, 12);
    if (n % 4 === 1 && n < 27) {
      await journal.saving({ id: 's', body, baseRevision: revision });
      ({ revision } = await store.save({ id: 's', body, baseRevision: revision }));
      saved = n;
      promised.push({ operations: disk.operations.length, saved, edited: n });
      await journal.saved('s', body);
    } else {
      await journal.append({ id: 's', baseRevision: revision, body, edit: `Edit ${n}` });
    }
    promised.push({ operations: disk.operations.length, saved, edited: n });
  }
  return promised;
}

/** Every way in which the operations that were not synced may have gone, up to some draws. */
function fatesOf(operations: readonly Operation[], draw: () => number): readonly ReadonlyMap<number, Fate>[] {
  const open = unsynced(operations);
  const all = (fate: Fate) => new Map<number, Fate>(open.map((i) => [i, fate]));
  const fates: ReadonlyMap<number, Fate>[] = [new Map(), all('lost')];
  for (const i of open) {
    fates.push(new Map([[i, 'lost']]), new Map([...all('lost'), [i, 'kept']]));
    const operation = operations[i];
    if (operation?.kind !== 'data') continue;
    for (let cut = 512; cut < operation.bytes.length; cut += 512) fates.push(new Map([[i, { cut }]]));
  }
  for (let i = 0; i < 6 && open.length > 1; i++) fates.push(new Map(open.map((one) => [one, draw() < 0.5 ? 'lost' : 'kept'])));
  return fates;
}

interface Outcome {
  readonly states: number;
  readonly faults: readonly string[];
}

async function examine(operations: readonly Operation[], promised: readonly Promised[], mostFaults = Infinity): Promise<Outcome> {
  const draw = drawn(20261201);
  const seen = new Set<string>();
  const faults: string[] = [];
  for (let length = 0; length <= operations.length && faults.length < mostFaults; length++) {
    const before = promised.filter((one) => one.operations <= length).at(-1);
    const after = promised.find((one) => one.operations > length) ?? before;
    if (before === undefined || after === undefined) throw new Error('nothing was promised');
    for (const fates of fatesOf(operations.slice(0, length), draw)) {
      const contents = afterPowerCut(operations.slice(0, length), fates);
      const hash = createHash('sha256').update(`${before.saved} ${before.edited}`);
      for (const [path, bytes] of [...contents].sort()) hash.update(path).update(bytes);
      const state = hash.digest('hex');
      if (seen.has(state)) continue;
      seen.add(state);
      const fault = await start(contents, before, after);
      if (fault !== null) faults.push(`after ${length} operations: ${fault}`);
    }
  }
  return { states: seen.size, faults };
}

/** Starts on what is left, as the program does; says what is wrong with what it finds. */
async function start(contents: ReadonlyMap<string, Uint8Array>, before: Promised, after: Promised): Promise<string | null> {
  const { fs } = MemoryDisk.holding(contents);
  let text = '';
  let body = '';
  try {
    const read = await storeOn(fs).read('s');
    text = read.text;
    body = text.slice(text.indexOf('"site":') + 7, -1);
  } catch (error) {
    const { code, message } = error as { code: string; message: string };
    if (!(before.saved === 0 && ['not-found', 'folder-gone'].includes(code))) return message;
  }
  const saved = text === '' ? 0 : numberIn(text);
  if (saved !== before.saved && saved !== after.saved) return `state ${saved} was opened, not ${before.saved} or ${after.saved}`;
  const recovered = await journalOn(fs, 'b').recovered('s', body);
  const edited = recovered === null ? saved : numberIn(recovered.body);
  // What is offered may be what was saved last, but never older than what was promised.
  if (edited < before.edited && saved < before.edited) return `edit ${before.edited} was promised, only ${edited} came back`;
  if (recovered !== null && edited < saved) return `edit ${edited} was offered though ${saved} is saved`;
  return null;
}

test('at least 500 states after a power cut: each opens as the old or the new site, and no promised edit is lost', async () => {
  const disk = new MemoryDisk();
  const promised = await work(disk);
  const { states, faults } = await examine(disk.operations, promised);
  console.log(`power cuts: ${states} states after ${disk.operations.length} operations, ${faults.length} faults`);
  expect(faults).toEqual([]);
  expect(states).toBeGreaterThanOrEqual(500);
});

test.each<[string, (fs: FsPort) => FsPort]>([
  [
    'that does not sync the file',
    (fs) => ({ ...fs, create: async (path) => ({ ...(await fs.create(path)), sync: async () => undefined }) }),
  ],
  ['that does not sync the folder', (fs) => ({ ...fs, syncFolder: async () => undefined })],
])('the examination bites: a writer %s is found out', async (_, careless) => {
  const disk = new MemoryDisk();
  const promised = await work(disk, storeOn(careless(disk.fs)));
  expect((await examine(disk.operations, promised, 1)).faults).not.toEqual([]);
});

test('the examination bites: a writer that writes over the file in place is found out', async () => {
  const disk = new MemoryDisk();
  const store = storeOn(disk.fs);
  store.save = async ({ body }) => {
    const source = new MemoryDisk();
    const other = storeOn(source.fs);
    const saved = await other.save({ id: 's', body, baseRevision: null }).catch(() => null);
    const bytes = await source.fs.read('/sites/s.tallybeam.json');
    await disk.fs.remove('/sites/s.tallybeam.json').catch(() => undefined);
    const file = await disk.fs.create('/sites/s.tallybeam.json');
    await file.write(bytes);
    return saved ?? { revision: '', savedAt: '' };
  };
  const promised = await work(disk, store);
  expect((await examine(disk.operations, promised, 1)).faults).not.toEqual([]);
});
