/** Carries `Host` over IPC: who asks, what was sent, and a plain answer to every call. */
import { ipcMain, type IpcMainInvokeEvent, type WebContents } from 'electron';
import type { Host } from '../../src-core/host';
import { answerCall, HOST_METHODS, type HostAnswer } from '../../src-core/host-wire';
import { isOwnAddress } from './app-protocol';
import { channelOf } from './channels';

export interface Carrier {
  /** Resolves when every call that has come in so far is answered. */
  settled(): Promise<void>;
}

const STRANGER: HostAnswer = { ok: false, code: 'refused', message: 'Only the program’s own page may call it.' };

/**
 * Answers the calls of one window's page.
 * @param host the host of the page as it is loaded at the moment
 */
export function carryHost(contents: WebContents, host: () => Host): Carrier {
  const running = new Set<Promise<unknown>>();
  for (const method of HOST_METHODS) {
    ipcMain.handle(channelOf(method), async (event, given: unknown): Promise<HostAnswer> => {
      if (!isOwnPage(event, contents)) return STRANGER;
      const call = answerCall(host(), method, given);
      running.add(call);
      try {
        return await call;
      } finally {
        running.delete(call);
      }
    });
  }
  return {
    settled: async () => {
      await Promise.allSettled(running);
    },
  };
}

/** Whether the call comes from the main frame of that window, with our own page in it. */
function isOwnPage({ sender, senderFrame }: IpcMainInvokeEvent, contents: WebContents): boolean {
  try {
    return (
      sender === contents &&
      senderFrame !== null &&
      !senderFrame.detached &&
      senderFrame.parent === null &&
      senderFrame.frameTreeNodeId === contents.mainFrame.frameTreeNodeId &&
      isOwnAddress(senderFrame.url)
    );
  } catch {
    // A frame that is gone cannot be asked what it was.
    return false;
  }
}
