/**
 * What `JSON.parse` passes over in silence: a key that stands twice in one object (the last one
 * would win), and nesting so deep that a later step could not follow it.
 */
import { pathText, quote, type Problem } from './fields';

/** A site nests 12 deep. */
const DEEPEST = 64;
const MOST = 100;

interface Open {
  readonly keys: Set<string> | null;
  step: string | number;
}

/** @param text JSON that `JSON.parse` has accepted */
export function keyFaults(text: string): readonly Problem[] {
  const problems: Problem[] = [];
  const open: Open[] = [];
  const place = () => pathText(open.map(({ step }) => step));
  for (let at = 0; at < text.length && problems.length < MOST; at++) {
    const letter = text[at];
    const inner = open.at(-1);
    if (letter === '"') {
      const end = endOfString(text, at);
      if (inner?.keys && isKey(text, end)) {
        const key = String(JSON.parse(text.slice(at, end)));
        inner.step = key;
        if (inner.keys.has(key)) problems.push({ path: place(), message: `The key ${quote(key)} stands twice. Remove one of the two.` });
        inner.keys.add(key);
      }
      at = end - 1;
    } else if (letter === '{' || letter === '[') {
      open.push(letter === '{' ? { keys: new Set(), step: '' } : { keys: null, step: 0 });
      if (open.length > DEEPEST) return [...problems, { path: '', message: 'Is nested deeper than any site. Take a copy of the file.' }];
    } else if (letter === '}' || letter === ']') {
      open.pop();
    } else if (letter === ',' && typeof inner?.step === 'number') {
      inner.step++;
    }
  }
  return problems;
}

/** Just after the closing quotation mark of the string that begins at `start`. */
function endOfString(text: string, start: number): number {
  let at = start + 1;
  while (at < text.length && text[at] !== '"') at += text[at] === '\\' ? 2 : 1;
  return at + 1;
}

function isKey(text: string, end: number): boolean {
  let at = end;
  while (' \t\n\r'.includes(text[at] ?? 'x')) at++;
  return text[at] === ':';
}
