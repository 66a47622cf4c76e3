/** A library as choices, with words for "none". */
import type { Id } from '../../src-core/site/site';

export const libraryOptions = (
  items: readonly { readonly id: Id; readonly name: string }[],
  none: string,
): readonly { readonly value: Id | null; readonly name: string }[] => [
  { value: null, name: none },
  ...items.map((item) => ({ value: item.id, name: item.name })),
];
