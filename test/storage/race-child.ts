/** One of two programs that save the same site at the same moment; started by races.test.ts. */
import { nodeFs, type FsPort, type OpenFile } from '../../src-main/store/fs-port';
import { SiteStore } from '../../src-main/store/site-store';
import { bodyOf } from './make';

export interface Round {
  readonly folder: string;
  readonly n: number;
  readonly baseRevision: string;
  /** Both start at this time, ms. */
  readonly at: number;
  /** For the control: the lock is never found taken. */
  readonly lockless: boolean;
}

const nothing = async (): Promise<void> => undefined;
const NOTHING: OpenFile = { write: nothing, sync: nothing, size: async () => 0, cut: nothing, close: nothing };
const withoutLocks: FsPort = {
  ...nodeFs,
  create: async (path) => (path.endsWith('.lock') ? NOTHING : nodeFs.create(path)),
  link: async (from, to) => (to.endsWith('.lock') ? undefined : nodeFs.link(from, to)),
};

process.on('message', (round: Round) => {
  const store = new SiteStore({ fs: round.lockless ? withoutLocks : nodeFs, folder: round.folder, program: '0.1.0' });
  while (Date.now() < round.at);
  store.save({ id: 's', body: bodyOf('s', round.n), baseRevision: round.baseRevision }).then(
    () => process.send?.('saved'),
    (error: { code?: string }) => process.send?.(error.code ?? 'failed'),
  );
});
process.send?.('ready');
