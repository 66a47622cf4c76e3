/** Small joints of English sentences. */
import type { Text } from '../units/text';

/** "a", "a and b", "a, b and c". */
export const listed = (parts: readonly string[]): string =>
  parts.length < 2 ? (parts[0] ?? '') : `${parts.slice(0, -1).join(', ')} and ${parts[parts.length - 1]}`;

/** "level 2" → "Level 2", to open a sentence. */
export const opening = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/** "Level 2" → "level 2", inside a sentence. */
export const inside = (words: string): string => words.charAt(0).toLowerCase() + words.slice(1);

/** Sentences one after the other. */
export const joined = (texts: readonly Text[]): Text => texts.flatMap((text, i) => (i === 0 ? [...text] : [' ', ...text]));
