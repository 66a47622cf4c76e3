/** The audit worker's work without a thread: messages are cloned both ways as if there were one, and kept to be counted. */
import { AuditDesk } from '../../src-renderer/auditing/audit-desk';
import type { WorkerLike } from '../../src-renderer/auditing/audit-link';
import type { FromWorker, ToWorker } from '../../src-renderer/auditing/audit-protocol';

export class CloningWorker implements WorkerLike {
  onmessage: WorkerLike['onmessage'] = null;
  onerror: WorkerLike['onerror'] = null;
  readonly toWorker: ToWorker[] = [];
  readonly fromWorker: FromWorker[] = [];
  #underWay: FromWorker[] = [];
  #desk: AuditDesk;
  #idle: () => void = () => undefined;

  constructor() {
    this.#desk = new AuditDesk(
      (message) => {
        const copy = structuredClone(message);
        this.fromWorker.push(copy);
        this.#underWay.push(copy);
        if (copy.kind === 'done') this.#idle();
      },
      () => Promise.resolve(),
    );
  }

  postMessage(message: ToWorker): void {
    const copy = structuredClone(message);
    this.toWorker.push(copy);
    this.#desk.take(copy);
  }

  /** Sends a change and waits until the desk has nothing left to do. */
  async workedOff(change: () => void): Promise<void> {
    const done = new Promise<void>((resolve) => (this.#idle = resolve));
    change();
    await done;
  }

  /** Takes up what is on its way to the page. */
  underWay(): readonly FromWorker[] {
    const messages = this.#underWay;
    this.#underWay = [];
    return messages;
  }

  deliver(messages: readonly FromWorker[] = this.underWay()): void {
    for (const data of messages) this.onmessage?.({ data } as MessageEvent<FromWorker>);
  }

  forget(): void {
    this.toWorker.length = 0;
    this.fromWorker.length = 0;
  }

  terminate(): void {
    this.#underWay = [];
  }
}
