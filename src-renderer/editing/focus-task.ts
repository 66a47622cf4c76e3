/** Brings the focus to the form that was asked for, or to what is left beside something that was taken out. */
import { tick } from 'svelte';
import type { Neighbour } from './neighbours';
import type { Task } from '../state/tasks';

export async function focusTask({ kind, id, field }: Task): Promise<void> {
  await tick();
  const target = field === null ? firstField(`${kind}:${id}`) : fieldNamed(field);
  target?.scrollIntoView({ block: 'nearest' });
  target?.focus();
}

const all = (selector: string): HTMLElement[] => [...document.querySelectorAll<HTMLElement>(selector)];

/** The field itself; of a table its first empty cell, else the button that adds a row. */
function fieldNamed(field: string): HTMLElement | null {
  const cells = all(`[data-field^="${CSS.escape(field)}."]`);
  const empty = cells.find((cell) => cell instanceof HTMLInputElement && cell.value === '');
  return empty ?? document.querySelector<HTMLElement>(`[data-field="${CSS.escape(field)}"]`) ?? cells[0] ?? null;
}

/** The first field of a form; forms without named fields stand beside the drawing. */
function firstField(of: string): HTMLElement | null {
  return all(`[data-field^="${CSS.escape(of)}:"]`)[0] ?? document.querySelector<HTMLElement>('[data-form] :is(input, select, textarea)');
}

/**
 * After something was taken out: its neighbour in the drawing or the list that is on screen, else the
 * bay that is chosen, else the content itself; never the page's body.
 */
export async function focusNeighbour({ on, id }: Neighbour['focus']): Promise<void> {
  await tick();
  const selectors = [
    { placement: `[data-placement="${CSS.escape(id)}"]`, level: '', bay: '', run: '', nothing: '' }[on],
    // In the table of the layout: the same row's place, or the run's.
    `[data-row="${on}:${CSS.escape(id)}"]`,
    // In the drawing: the level that is chosen now, or the bay in the strip.
    on === 'bay' || on === 'run' ? '' : '[data-level][aria-current="true"]',
    '[data-bay][aria-selected="true"]',
    '[data-row="nothing"]',
    'main button.main',
    'main',
  ].filter((selector) => selector !== '');
  for (const selector of selectors) {
    const found = document.querySelector<HTMLElement>(selector);
    found?.focus();
    if (found !== null && document.activeElement === found) return;
  }
}
