/** A long list in parts of so many entries at most, for what is written part by part. */
export function inChunks<T>(all: readonly T[], most: number): readonly (readonly T[])[] {
  const count = Math.ceil(all.length / most);
  return Array.from({ length: count }, (_, i) => all.slice(i * most, (i + 1) * most));
}
