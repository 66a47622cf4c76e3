/** The loopback host: the same program for a browser on this machine. */
import { randomBytes } from 'node:crypto';
import { once } from 'node:events';
import { join } from 'node:path';
import Conf from 'conf';
import { KEY_IN_ADDRESS } from '../src-core/host-wire';
import { readDemo } from './demo';
import { makeServer } from './http';
import { Machine, type PageHost } from './local-host';
import { readPageFiles } from './page-files';
import { Settings } from './settings';
import { userFolder } from './user-folder';
import { VERSION } from './version';

export interface ServeOptions {
  readonly sitesFolder: string | null;
  /** Settings, and journals of folders that do not answer; if left out, a folder within the sites folder that was named. */
  readonly ownFolder?: string;
  /** The built page. */
  readonly rendererFolder: string;
  /** 0 for any that is free. */
  readonly port?: number;
  readonly now?: () => Date;
  /** Fixed in tests only. */
  readonly key?: string;
}

export interface Serving {
  /** With the key after `#`: whoever has it can use the program. */
  readonly address: string;
  readonly port: number;
  readonly sitesFolder: string;
  close(): Promise<void>;
}

/** Tabs whose hosts are kept ready; one that was idle longest is forgotten, its journal stays. */
const TABS = 40;

/** @throws Error where the page is not built, the port is taken or the sites folder cannot be made */
export async function startServe(options: ServeOptions): Promise<Serving> {
  const { sitesFolder, rendererFolder, port = 0, now = () => new Date(), key = randomBytes(24).toString('base64url') } = options;
  const ownFolder = options.ownFolder ?? (sitesFolder === null ? userFolder() : join(sitesFolder, 'own'));
  const files = readPageFiles(rendererFolder);
  const settings = new Settings(ownFolder, (cwd, configName) => new Conf({ cwd, configName, clearInvalidConfig: false }), now);
  const machine = await Machine.start({ ownFolder, sitesFolder, settings, version: VERSION, carrier: 'browser', demo: readDemo, now });

  const tabs = new Map<string, PageHost>();
  const hostFor = (tab: string): PageHost => {
    const host = tabs.get(tab) ?? machine.page();
    // The map keeps the order in which entries were set: the first is the one idle longest.
    tabs.delete(tab);
    tabs.set(tab, host);
    const [oldest] = tabs;
    if (tabs.size > TABS && oldest !== undefined) {
      oldest[1].close();
      tabs.delete(oldest[0]);
    }
    return host;
  };

  const server = makeServer({ files, key, hostFor });
  server.listen({ host: '127.0.0.1', port, exclusive: true });
  await once(server, 'listening');
  const address = server.address();
  const taken = typeof address === 'object' && address !== null ? address.port : port;
  return {
    address: `http://127.0.0.1:${taken}/${KEY_IN_ADDRESS}${key}`,
    port: taken,
    sitesFolder: machine.sitesFolder,
    close: async () => {
      const closed = once(server, 'close');
      server.close();
      server.closeAllConnections();
      tabs.forEach((host) => host.close());
      await closed;
    },
  };
}
