/**
 * What the status region says: what was done, and what it did to level and bay as soon as that is
 * known. The newest words win; nothing that is out of date is said late.
 */
import type { RunAudit } from '../src-core/audit/types';
import type { Id } from '../src-core/site/site';
import { VERDICT_WORDS } from '../src-core/words/verdict-words';

export interface SaidPlace {
  readonly runId: Id;
  readonly bayId: Id;
  readonly levelId: Id | null;
}

/** What was done is said without its verdict if that takes longer than this, ms. */
const PATIENCE = 250;

export class Speaker {
  said = $state('');
  #waiting: { readonly place: SaidPlace; readonly text: string } | null = null;
  #timer: ReturnType<typeof setTimeout> | null = null;

  say(text: string): void {
    this.#forget();
    this.#put(text);
  }

  /** @param audit findings of the run, if they are of the site as it stands; null while they are on their way */
  sayDone(place: SaidPlace, text: string, audit: RunAudit | null): void {
    this.#forget();
    if (audit !== null) return this.#put(`${text} ${verdicts(place, audit)}`);
    this.#waiting = { place, text };
    this.#timer = setTimeout(() => {
      this.#put(text);
      this.#waiting = { place, text: '' };
    }, PATIENCE);
  }

  audited(audit: RunAudit): void {
    const waiting = this.#waiting;
    if (waiting?.place.runId !== audit.runId) return;
    this.#forget();
    this.#put(`${waiting.text} ${verdicts(waiting.place, audit)}`.trim());
  }

  close(): void {
    this.#forget();
  }

  #forget(): void {
    if (this.#timer !== null) clearTimeout(this.#timer);
    this.#timer = null;
    this.#waiting = null;
  }

  #put(text: string): void {
    // The same words twice are said twice only if the text differs.
    this.said = text === this.said ? `${text}\u00a0` : text;
  }
}

function verdicts({ bayId, levelId }: SaidPlace, audit: RunAudit): string {
  const bay = audit.bays.find((one) => one.bayId === bayId);
  const level = bay?.levels.find((one) => one.levelId === levelId);
  const words: string[] = [];
  if (level) words.push(`Level: ${VERDICT_WORDS[level.verdict].word.toLowerCase()}.`);
  if (bay) words.push(`Bay: ${VERDICT_WORDS[bay.verdict].word.toLowerCase()}.`);
  return words.join(' ');
}
