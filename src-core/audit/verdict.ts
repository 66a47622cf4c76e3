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
 * The finding that makes the verdict: the worst, "over" before "not assessable", and of equals the one
 * used furthest, strength before fit.
 */
export function governingOf(findings: readonly Finding[]): Finding | null {
  let most: Finding | null = null;
  for (const one of findings) if (one.counts && (most === null || outweighs(one, most))) most = one;
  return most;
}

function outweighs(one: Finding, other: Finding): boolean {
  const heavier = compareVerdicts(one.verdict, other.verdict);
  if (heavier !== 0) return heavier > 0;
  if (one.verdict !== other.verdict) return one.verdict === 'over';
  const fits = OF_FIT.has(one.check);
  // What is not possible is so because of where it stands.
  if (fits !== OF_FIT.has(other.check)) return fits === (one.verdict === 'not-possible');
  return (one.utilisation ?? -1) > (other.utilisation ?? -1);
}
