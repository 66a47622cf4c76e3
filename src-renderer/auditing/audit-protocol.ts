/** What the page and its audit worker say to each other; site and findings cross as changes only. */
import type { Id } from '../../src-core/site/site';
import type { AuditChange, SiteChange } from '../state/site-change';

export type ToWorker =
  | { readonly kind: 'change'; readonly version: number; readonly today: string; readonly change: SiteChange }
  | { readonly kind: 'write'; readonly ask: number };

export type FromWorker =
  | { readonly kind: 'audit'; readonly version: number; readonly change: AuditChange }
  | { readonly kind: 'trouble'; readonly version: number; readonly runId: Id; readonly message: string }
  | { readonly kind: 'done'; readonly version: number }
  | { readonly kind: 'written'; readonly ask: number; /** Null where the site could not be written. */ readonly body: string | null };
