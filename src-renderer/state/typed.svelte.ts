/** What is typed into forms and counts for nothing yet. It is kept beside the site, so that it outlives its form. */
import { SvelteMap } from 'svelte/reactivity';
import { everyId } from '../../src-core/site/lookup';
import type { Site } from '../../src-core/site/site';
import type { Reading } from '../../src-core/units/format';

/** Text typed into a field, and the units and locale it was typed in. */
export interface Draft {
  readonly text: string;
  readonly reading: Reading;
  /** What the field is called. */
  readonly label: string;
}

/** What is filled in by half: a row of a table, a survey, new goods. */
interface Half {
  /** What it is called: "Span 3". */
  readonly label: string;
  readonly typed: object;
}

/** Fields are named `kind:id:field`. */
export class Typed {
  /** Text that could not be taken over yet, by its field. */
  readonly drafts = new SvelteMap<string, Draft>();
  /** What is half filled in, by its field. */
  readonly halves = new SvelteMap<string, Half>();

  /** All of it by name, each once, as far as what it was typed for still stands in the site. */
  unfinishedIn(site: Site): readonly string[] {
    const standing = everyId(site);
    const here = (key: string) => {
      const [, id] = key.split(':');
      return id === undefined || standing.includes(id);
    };
    const labels = [...this.halves, ...this.drafts].flatMap(([key, { label }]) => (here(key) ? [label] : []));
    return labels.filter((label, i) => labels.indexOf(label) === i);
  }

  /** Forgets what was typed in a field and in the rows under it. */
  drop(field: string): void {
    for (const kept of [this.halves, this.drafts])
      for (const key of [...kept.keys()]) if (key === field || key.startsWith(`${field}.`)) kept.delete(key);
  }
}
