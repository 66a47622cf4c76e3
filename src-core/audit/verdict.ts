/** One verdict out of several findings, and the finding that makes it. */
import { compareVerdicts, worstVerdict, type CheckName, type Finding, type Verdict } from '../checks/finding';

/** Checks of room and order: their figures are no share of a strength, so they govern only where no other check does. */
const OF_FIT: ReadonlySet<CheckName> = new Set<CheckName>([
  'placement',
  'tipping',
  'positions',
  'overhang',
  'clearance-along',
  'clearance-above',
  'clearance-across',
  'notice-match',
  'heavy-low',
  'frame-imbalance',
]);

/** The worst of the findings that count; nothing that counts is "not assessable". */
export const verdictOfFindings = (findings: readonly Finding[]): Verdict =>
  worstVerdict(findings.filter(({ counts }) => counts).map(({ verdict }) => verdict));

/**
 * The finding that makes the verdict: the heaviest that counts.
 */
export function governingOf(findings: readonly Finding[]): Finding | null {
  let most: Finding | null = null;
  for (const one of findings) if (one.counts && (most === null || compareFindings(one, most) < 0)) most = one;
  return most;
}

/**
 * Order of weight, heaviest first: what counts before what only informs, the worse verdict, "over"
 * before "not assessable", strength before fit, and of equals the one used furthest.
 */
export function compareFindings(one: Finding, other: Finding): number {
  if (one.counts !== other.counts) return one.counts ? -1 : 1;
  const lighter = compareVerdicts(other.verdict, one.verdict);
  if (lighter !== 0) return lighter;
  if (one.verdict !== other.verdict) return one.verdict === 'over' ? -1 : 1;
  const fits = OF_FIT.has(one.check);
  // What is not possible is so because of where it stands.
  if (fits !== OF_FIT.has(other.check)) return fits === (one.verdict === 'not-possible') ? -1 : 1;
  return (other.utilisation ?? -1) - (one.utilisation ?? -1);
}
