/**
 * Chains of records from two machines. A chain is only ever continued, never interleaved: each record
 * holds the hash of the one before it, so records of two machines cannot stand in one chain without
 * being written anew, and then they would prove nothing.
 *
 *   theirs goes on where ours ends  → what is new is put behind ours
 *   ours goes on where theirs ends  → nothing to do
 *   both went on after a common part → theirs is kept whole, as a chain of its own beside ours
 */

/** The hashes of a chain's records, from the first. */
export type ChainHashes = readonly string[];

export type ChainStep =
  /** Everything in it is here. */
  | { readonly kind: 'here' }
  /** Goes on from the chain `at`, after its `from` records. */
  | { readonly kind: 'continues'; readonly at: number; readonly from: number }
  /** Shares the first `from` records with ours and is kept beside it, as the chain `at`. */
  | { readonly kind: 'apart'; readonly at: number; readonly from: number };

/**
 * What becomes of each chain that is brought in.
 * @param ours the chains that are here, the site's own first; may be empty chains
 * @param theirs those that are brought in, in any order
 * @returns a step for each of `theirs`; `at` counts from 0 in `ours`, new ones behind them
 */
export function joinChains(ours: readonly ChainHashes[], theirs: readonly ChainHashes[]): readonly ChainStep[] {
  const chains = ours.length > 0 ? [...ours] : [[]];
  return theirs.map((their): ChainStep => {
    if (chains.some((our) => startsWith(our, their))) return { kind: 'here' };
    const at = chains.findIndex((our) => startsWith(their, our));
    if (at >= 0) {
      const from = chains[at]?.length ?? 0;
      chains[at] = their;
      return { kind: 'continues', at, from };
    }
    chains.push(their);
    return { kind: 'apart', at: chains.length - 1, from: Math.max(...chains.slice(0, -1).map((our) => common(our, their))) };
  });
}

/** Each record's hash covers all before it, so equal hashes at one place mean equal chains up to there. */
const startsWith = (long: ChainHashes, short: ChainHashes): boolean =>
  short.length === 0 || (short.length <= long.length && long[short.length - 1] === short.at(-1));

function common(one: ChainHashes, other: ChainHashes): number {
  let count = 0;
  while (count < Math.min(one.length, other.length) && one[count] === other[count]) count++;
  return count;
}
