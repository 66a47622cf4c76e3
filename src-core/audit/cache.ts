/**
 * Remembers the parts of earlier audits, so that an edit rechecks only what it touched. Sites are
 * immutable: a part is up to date exactly as long as everything it was made from is the same value.
 */
export interface AuditCache {
  /**
   * What was made last under this kind and key, if it was made from the same things; else makes it.
   * @param key the value whose part this is; when it is gone, so is what was remembered of it
   */
  remember<T>(kind: string, key: object, from: readonly unknown[], make: () => T): T;
}

interface Remembered {
  readonly from: readonly unknown[];
  readonly made: unknown;
}

export function createAuditCache(): AuditCache {
  const kinds = new Map<string, WeakMap<object, Remembered>>();
  return {
    remember<T>(kind: string, key: object, from: readonly unknown[], make: () => T): T {
      const known = kinds.get(kind) ?? new WeakMap<object, Remembered>();
      kinds.set(kind, known);
      const last = known.get(key);
      if (last !== undefined && last.from.length === from.length && last.from.every((one, i) => Object.is(one, from[i])))
        return last.made as T;
      const made = make();
      known.set(key, { from, made });
      return made;
    },
  };
}
