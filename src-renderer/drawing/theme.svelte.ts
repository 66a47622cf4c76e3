/** The tokens as canvas can use them, the size of a rem, and signals that fire when they change. */
import { createSubscriber } from 'svelte/reactivity';

/** Whatever may change a colour: theme, forced colours, and paper. */
const QUERIES = ['(prefers-color-scheme: dark)', '(forced-colors: active)', 'print'];

export interface Inks {
  readonly ink: string;
  readonly soft: string;
  readonly load: string;
  readonly loadFill: string;
  readonly over: string;
}

// Reading a computed style makes the browser lay out what it would have laid out later with the rest,
// so both are read once and kept until they may have changed.
let inks: Inks | null = null;
let rem: number | null = null;

const watchTheme = createSubscriber((update) => {
  const changed = () => {
    inks = null;
    update();
  };
  inks = null;
  const queries = QUERIES.map((query) => matchMedia(query));
  for (const query of queries) query.addEventListener('change', changed);
  const root = new MutationObserver(changed);
  root.observe(document.documentElement, { attributeFilter: ['data-theme'] });
  return () => {
    for (const query of queries) query.removeEventListener('change', changed);
    root.disconnect();
  };
});

const watchRoot = createSubscriber((update) => {
  const changed = () => {
    rem = null;
    update();
  };
  rem = null;
  const root = new MutationObserver(changed);
  root.observe(document.documentElement, { attributeFilter: ['style', 'class'] });
  addEventListener('resize', changed);
  return () => {
    root.disconnect();
    removeEventListener('resize', changed);
  };
});

/** The page's colours now. Read in an effect or a derived, they are read again when the theme changes. */
export function pageInks(): Inks {
  watchTheme();
  inks ??= readInks(document.body);
  return inks;
}

function readInks(element: HTMLElement): Inks {
  const probe = element.appendChild(document.createElement('span'));
  const colour = (token: string): string => {
    // A custom property answers with its own text, light-dark() and all; a real property with the colour.
    probe.style.color = `var(--${token})`;
    return getComputedStyle(probe).color;
  };
  const found = { ink: colour('ink'), soft: colour('soft'), load: colour('load'), loadFill: colour('load-fill'), over: colour('over') };
  probe.remove();
  return found;
}

/** One rem in px, followed as the text size changes. */
export function rootSize(): number {
  watchRoot();
  rem ??= parseFloat(getComputedStyle(document.documentElement).fontSize);
  return rem;
}
