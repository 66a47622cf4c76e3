import type { Quantity } from './quantity';

/**
 * A sentence with its figures kept as quantities, so that it reads in the units of whoever looks.
 * Build it with `say`.
 */
export type Text = readonly (string | Quantity)[];

/** say`Level 2 carries ${massOf(1990)}.` */
export function say(parts: TemplateStringsArray, ...values: readonly (string | number | Quantity | Text)[]): Text {
  const text: (string | Quantity)[] = [];
  const push = (part: string | Quantity) => {
    const last = text.at(-1);
    if (typeof part === 'string' && typeof last === 'string') text[text.length - 1] = last + part;
    else if (part !== '') text.push(part);
  };
  parts.forEach((part, i) => {
    push(part);
    const value = values[i];
    if (value === undefined) return;
    if (typeof value === 'number') push(String(value));
    else if (Array.isArray(value)) (value as Text).forEach(push);
    else push(value as string | Quantity);
  });
  return text;
}
