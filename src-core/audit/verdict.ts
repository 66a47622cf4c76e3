/** One verdict out of several findings, and the finding that makes it. */
import { compareVerdicts, worstVerdict, type Finding, type Verdict } from '../checks/finding';

/** The worst of the findings that count; nothing that counts is "not assessable". */
export const verdictOfFindings = (findings: readonly Finding[]): Verdict =>
  worstVerdict(findings.filter(({ counts }) => counts).map(({ verdict }) => verdict));

/**
 * The finding that makes the verdict: the worst, "over" before "not assessable", and of equals the one
 * used furthest.
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
  return (one.utilisation ?? -1) > (other.utilisation ?? -1);
}
