/**
 * Which of many things that stand side by side are drawn: those in sight and one window's width beyond
 * them, so that a run of a thousand bays costs no more than one of fifty.
 */
import type { Attachment } from 'svelte/attachments';

/** Left edge of each thing of these widths, and the right edge of the last. */
export function edgesOf(widths: readonly number[]): readonly number[] {
  let at = 0;
  return [0, ...widths.map((width) => (at += width))];
}

/**
 * Indices of what lies between two places, and those that are drawn wherever they lie, in order.
 * @param edges as `edgesOf` gives them, ascending
 * @param always indices out of range are passed over
 */
export function between(edges: readonly number[], from: number, to: number, always: readonly number[] = []): readonly number[] {
  const count = edges.length - 1;
  const first = firstBeyond(edges, from);
  const seen: number[] = [];
  for (let i = first; i < count && (edges[i] ?? Infinity) < to; i += 1) seen.push(i);
  for (const i of always) if (i >= 0 && i < count && !seen.includes(i)) seen.push(i);
  return seen.toSorted((a, b) => a - b);
}

/** Index of the first thing whose right edge lies beyond a place. */
function firstBeyond(edges: readonly number[], place: number): number {
  let low = 0;
  let high = edges.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((edges[middle + 1] ?? Infinity) > place) high = middle;
    else low = middle + 1;
  }
  return low;
}

/** px across that are taken to be in sight before it is laid out. */
const USUAL = 1400;

/** A part of the page that scrolls sideways, attached with `{@attach sight.watch}`. */
export class InSight {
  /** px across, as it was last laid out. */
  width = $state(USUAL);
  /** px that are scrolled out at the left. */
  left = 0;
  /** In steps of half a width, so that scrolling draws anew only now and then. */
  #step = $state(0);

  /** @param place px that are in sight first */
  constructor(place = 0) {
    this.#step = Math.max(0, Math.floor((2 * place) / USUAL) - 1);
  }

  readonly watch: Attachment<HTMLElement> = (element) => {
    const look = () => {
      this.left = element.scrollLeft;
      this.width = Math.max(1, element.clientWidth);
      this.#step = Math.floor((2 * this.left) / this.width);
    };
    const size = new ResizeObserver(look);
    size.observe(element);
    element.addEventListener('scroll', look, { passive: true });
    return () => {
      size.disconnect();
      element.removeEventListener('scroll', look);
    };
  };

  /** Indices to be drawn of the things with these edges, and `always` wherever they stand. */
  drawn(edges: readonly number[], always: readonly number[] = []): readonly number[] {
    const half = this.width / 2;
    return between(edges, (this.#step - 2) * half, (this.#step + 5) * half, always);
  }
}
