import type { Site } from '../../src-core/site/site';
import { writeSite } from '../../src-core/site/write';
import type { WorkerLike } from '../../src-renderer/auditing/audit-link';
import type { FromWorker } from '../../src-renderer/auditing/audit-protocol';
import { applyChange } from '../../src-renderer/state/site-change';

/** A worker that keeps the site by the changes it is sent, cloned as on their way to a thread, and writes it; it audits nothing. */
export function writingWorker(): WorkerLike {
  let site: Site | null = null;
  const worker: WorkerLike = {
    onmessage: null,
    onerror: null,
    terminate: () => undefined,
    postMessage: (message) => {
      if (message.kind === 'change') site = applyChange(site, structuredClone(message.change));
      else worker.onmessage?.({ data: { kind: 'written', ask: message.ask, body: site && writeSite(site) } } as MessageEvent<FromWorker>);
    },
  };
  return worker;
}
