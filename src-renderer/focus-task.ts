/** Brings the focus to the form that was asked for. */
import { tick } from 'svelte';
import type { Task } from './open-site.svelte';

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
