/** The contract of every host, over IPC: through the preload as the page calls it, to a machine on a real folder. */
import type { WebContents as ElectronContents } from 'electron';
import type { Host } from '../../../src-core/host';
import { carryHost } from '../../../src-main/window/ipc';
import '../../../src-main/preload';
import { hostContract } from '../host-contract';
import { startMachine, temporaryFolder } from '../machine';
import { standIn, WebContents } from '../electron-stand-in';

const exposed = standIn.exposed.get('tallybeam') as unknown as Host;

hostContract('over IPC, by the preload', true, async () => {
  const { machine, writeFile } = await startMachine(temporaryFolder(), { carrier: 'window' });
  let page = machine.page({ savePdf: async () => ({ saved: false }), chooseSitesFolder: () => page.about() });
  const contents = new WebContents();
  contents.mainFrame.url = 'app://tallybeam/index.html';
  standIn.handlers.clear();
  carryHost(contents as unknown as ElectronContents, () => page);
  standIn.invoke = async (channel, ...sent) => {
    const handler = standIn.handlers.get(channel) as ((event: object, ...sent: unknown[]) => unknown) | undefined;
    if (handler === undefined) throw new Error(`No handler registered for '${channel}'`);
    return handler({ sender: contents, senderFrame: contents.mainFrame }, ...sent);
  };
  const nextPage = async (): Promise<Host> => {
    page.close();
    page = machine.page({ savePdf: null, chooseSitesFolder: null });
    return exposed;
  };
  return { host: exposed, nextPage, writeFile };
});
