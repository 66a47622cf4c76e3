/** Finds text on the page that cannot be read where it stands: cut off, pushed out of the window, or under other text. */
import type { Page } from 'playwright-core';

/** One line a fault; empty where everything can be read, by scrolling its own container where it has one. */
export const lostText = (page: Page): Promise<string[]> =>
  page.evaluate(() => {
    /** Rounding of boxes to pixels, px. */
    const SLACK = 1.5;
    /** Line boxes are taller than their letters: text overlaps where it does so by more than this, px. */
    const TOUCH = 3;
    const faults: string[] = [];
    const root = document.documentElement;
    if (root.scrollWidth > window.innerWidth) {
      const widest = [...document.body.querySelectorAll('*')].toSorted(
        (a, b) => b.getBoundingClientRect().right - a.getBoundingClientRect().right,
      )[0];
      faults.push(`the page is ${root.scrollWidth} px wide in a window of ${window.innerWidth} px: ${widest?.outerHTML.slice(0, 120)}`);
    }

    interface Written {
      readonly text: string;
      readonly element: Element;
      readonly box: DOMRect;
      readonly layer: Element | null;
    }
    const written: Written[] = [];
    const modal = document.querySelector('dialog[open]') ?? document.querySelector(':popover-open');
    const unseen = (element: Element): boolean =>
      element.closest('.unseen, option, script, style, title') !== null || !element.checkVisibility({ opacityProperty: true });

    const walker = document.createTreeWalker(modal ?? document.body, NodeFilter.SHOW_TEXT);
    for (let node = walker.nextNode(); node !== null; node = walker.nextNode()) {
      const element = node.parentElement;
      const text = node.textContent?.trim() ?? '';
      if (element === null || text === '' || unseen(element)) continue;
      const range = document.createRange();
      range.selectNodeContents(node);
      for (const rect of range.getClientRects()) {
        if (rect.width < 1 || rect.height < 1) continue;
        const seen = clipped(element, rect, text);
        if (seen !== null) written.push({ text, element, box: seen, layer: layerOf(element) });
      }
    }

    /** What of the text can be seen now; null where it has to be scrolled to. Says so where no scrolling brings it out. */
    function clipped(element: Element, rect: DOMRect, text: string): DOMRect | null {
      let { left, right, top, bottom } = rect;
      let scrolls = false;
      for (let one: Element | null = element; one !== null && one !== root; one = one.parentElement) {
        const style = getComputedStyle(one);
        const box = one.getBoundingClientRect();
        const cuts = (overflow: string) => overflow === 'hidden' || overflow === 'clip';
        const rolls = (overflow: string) => overflow === 'auto' || overflow === 'scroll';
        const outX = left < box.left - SLACK || right > box.right + SLACK;
        const outY = top < box.top - SLACK || bottom > box.bottom + SLACK;
        const told = style.textOverflow === 'ellipsis' && one.getAttribute('title') === one.textContent?.trim();
        if (((cuts(style.overflowX) && outX) || (cuts(style.overflowY) && outY)) && !told)
          faults.push(`"${text.slice(0, 60)}" is cut off by <${one.tagName.toLowerCase()} class="${one.getAttribute('class') ?? ''}">`);
        if (rolls(style.overflowX) || rolls(style.overflowY)) scrolls = true;
        if (style.overflowX !== 'visible') [left, right] = [Math.max(left, box.left), Math.min(right, box.right)];
        if (style.overflowY !== 'visible') [top, bottom] = [Math.max(top, box.top), Math.min(bottom, box.bottom)];
        if (right - left < 1 || bottom - top < 1) return null;
        if (style.position === 'fixed') break;
      }
      if (!scrolls && (left < -SLACK || right > window.innerWidth + SLACK))
        faults.push(`"${text.slice(0, 60)}" stands outside the window, at ${Math.round(left)} to ${Math.round(right)} px`);
      return new DOMRect(left, top, right - left, bottom - top);
    }

    /** What floats over the rest while it is scrolled. */
    function layerOf(element: Element): Element | null {
      for (let one: Element | null = element; one !== null; one = one.parentElement)
        if (['sticky', 'fixed'].includes(getComputedStyle(one).position)) return one;
      return null;
    }

    written.forEach((a, i) => {
      for (const b of written.slice(i + 1)) {
        if (a.element === b.element || a.layer !== b.layer) continue;
        const wide = Math.min(a.box.right, b.box.right) - Math.max(a.box.left, b.box.left);
        const high = Math.min(a.box.bottom, b.box.bottom) - Math.max(a.box.top, b.box.top);
        if (wide > TOUCH && high > TOUCH)
          faults.push(`"${a.text.slice(0, 40)}" and "${b.text.slice(0, 40)}" overlap by ${Math.round(wide)} × ${Math.round(high)} px`);
      }
    });

    for (const input of document.querySelectorAll<HTMLInputElement>('input[inputmode="decimal"]')) {
      if (input.checkVisibility() && input.scrollWidth > input.clientWidth + 1)
        faults.push(`the number "${input.value}" does not fit its field "${input.labels?.[0]?.textContent ?? ''}"`);
    }
    return [...new Set(faults)];
  });
