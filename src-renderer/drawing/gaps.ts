/** Gaps along a beam level that the rule set asks for, which placing catches at. */
import type { ResolvedRules, RuleKey } from '../../src-core/checks/rule-sets';

export interface Gaps {
  /** Goods to upright, and goods to goods, mm. */
  readonly upright: number;
  readonly loads: number;
}

const BANDS: readonly { readonly upTo: number; readonly upright: RuleKey; readonly loads: RuleKey }[] = [
  { upTo: 3000, upright: 'clearanceUprightTo3m', loads: 'clearanceLoadsTo3m' },
  { upTo: 6000, upright: 'clearanceUprightTo6m', loads: 'clearanceLoadsTo6m' },
  { upTo: 9000, upright: 'clearanceUprightTo9m', loads: 'clearanceLoadsTo9m' },
  { upTo: Infinity, upright: 'clearanceUprightTo13m', loads: 'clearanceLoadsTo13m' },
];

/** For a level whose beam stands `height` mm above the floor. */
export function gapsAt(rules: ResolvedRules, height: number): Gaps {
  const band = BANDS.find(({ upTo }) => height <= upTo);
  if (band === undefined) throw new RangeError(`height must be a number, got ${height}`);
  return { upright: rules.value[band.upright], loads: rules.value[band.loads] };
}
