/** Puts `Host` on the page, method by method, and nothing else of Electron. */
import { contextBridge, ipcRenderer } from 'electron';
import type { Host } from '../src-core/host';
import { hostOver, type HostAnswer } from '../src-core/host-wire';
import { channelOf } from './window/channels';

const UNHEARD: HostAnswer = {
  ok: false,
  code: 'failed',
  message: 'The program did not take this call. Try again; if it stays so, start the program again. Unsaved changes are in the journal.',
};

contextBridge.exposeInMainWorld(
  'tallybeam',
  hostOver(async (method, given) => {
    try {
      return (await ipcRenderer.invoke(channelOf(method), given)) as HostAnswer;
    } catch {
      return UNHEARD;
    }
  }, true) satisfies Host,
);
