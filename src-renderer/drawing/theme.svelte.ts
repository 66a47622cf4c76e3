/** The tokens as canvas can use them, and a signal that fires when they change. */
import { createSubscriber } from 'svelte/reactivity';

/** Whatever may change a colour: theme, forced colours, and paper. */
const QUERIES = ['(prefers-color-scheme: dark)', '(forced-colors: active)', 'print'];

const watchTheme = createSubscriber((update) => {
  const queries = QUERIES.map((query) => matchMedia(query));
  for (const query of queries) query.addEventListener('change', update);
  const root = new MutationObserver(update);
  root.observe(document.documentElement, { attributeFilter: ['data-theme'] });
  return () => {
    for (const query of queries) query.removeEventListener('change', update);
    root.disconnect();
  };
});

export interface Inks {
  readonly ink: string;
  readonly soft: string;
  readonly load: string;
  readonly loadFill: string;
  readonly over: string;
}

/** Colours as they are at `element` now. Read in an effect or a derived, it is read again when the theme changes. */
export function inksAt(element: HTMLElement): Inks {
  watchTheme();
  const colour = (token: string): string => {
    // A custom property answers with its own text, light-dark() and all; a real property with the colour.
    element.style.color = `var(--${token})`;
    const found = getComputedStyle(element).color;
    element.style.removeProperty('color');
    return found;
  };
  return { ink: colour('ink'), soft: colour('soft'), load: colour('load'), loadFill: colour('load-fill'), over: colour('over') };
}

const watchRoot = createSubscriber((update) => {
  const root = new MutationObserver(update);
  root.observe(document.documentElement, { attributeFilter: ['style', 'class'] });
  addEventListener('resize', update);
  return () => {
    root.disconnect();
    removeEventListener('resize', update);
  };
});

/** One rem in px, followed as the text size changes. */
export function rootSize(): number {
  watchRoot();
  return parseFloat(getComputedStyle(document.documentElement).fontSize);
}
