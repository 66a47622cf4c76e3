/** Runs the audit off the page's thread. */
import { AuditDesk } from './audit-desk';
import type { ToWorker } from './audit-protocol';

const desk = new AuditDesk((message) => self.postMessage(message));

self.onmessage = (event: MessageEvent<ToWorker>) => desk.take(event.data);
