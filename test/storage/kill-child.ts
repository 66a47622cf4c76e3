/**
 * A program that edits and saves one site as fast as it can and says what was answered as done, until
 * it is killed. Arguments: the folder, and `store` or `naive`.
 */
import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { writeSiteFile } from '../../src-core/site/envelope';
import { sha256 } from '../../src-main/store/checked-site';
import { Machine } from '../../src-main/local-host';
import { Settings } from '../../src-main/settings';
import { bodyOf, numbered, numberIn } from './make';

/** A third of a megabyte, so that a save takes long enough to be interrupted. */
const PALLETS = 1000;
const [folder = '', writer = 'store'] = process.argv.slice(2);

// Written at once, so that the parent has read all that was said before the kill.
const say = (words: string): void => void process.stdout.write(`${words}\n`);

async function withStore(): Promise<void> {
  const settings = new Settings(join(folder, 'own'), () => ({ get: () => undefined, set: () => undefined }));
  const machine = await Machine.start({
    ownFolder: join(folder, 'own'),
    sitesFolder: join(folder, 'sites'),
    settings,
    version: '0.1.0',
    carrier: 'browser',
    demo: async () => numbered('demo', 0),
  });
  const page = machine.page();
  let baseRevision: string | null = null;
  let n = 0;
  if ((await page.listSites()).length > 0) {
    const { revision, text, recovered } = await page.readSite('s');
    baseRevision = revision;
    n = numberIn(text);
    if (recovered !== null) {
      n = numberIn(recovered.body);
      await page.appendJournal({ id: 's', baseRevision, body: recovered.body, edit: 'Take up' });
    }
  }
  say(`started ${n}`);
  for (;;) {
    n++;
    const body = bodyOf('s', n, PALLETS);
    if (n % 4 === 0 || baseRevision === null) {
      baseRevision = (await page.saveSite({ id: 's', body, baseRevision })).revision;
      say(`saved ${n}`);
    } else {
      await page.appendJournal({ id: 's', baseRevision, body, edit: `Edit ${n}` });
      say(`edited ${n}`);
    }
  }
}

/** The control: what many programs do, one write over the old file, as often as it will go; a file that takes a few writes. */
async function naively(): Promise<void> {
  const path = join(folder, 'sites', 's.tallybeam.json');
  const text = writeSiteFile(bodyOf('s', 1, 12 * PALLETS), { program: '0.1.0', savedAt: new Date().toISOString() }, sha256);
  say('started 1');
  for (;;) {
    await writeFile(path, text);
    say('saved 1');
  }
}

await (writer === 'naive' ? naively() : withStore());
