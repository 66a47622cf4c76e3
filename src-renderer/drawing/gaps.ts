/** Gaps along a beam level that the rule set asks for, which placing catches at. */
import { clearanceKeys, type LoadedBy } from '../../src-core/checks/clearance-rules';
import type { ResolvedRules } from '../../src-core/checks/rule-sets';

export interface Gaps {
  /** Goods to upright, and goods to goods, mm. */
  readonly upright: number;
  readonly loads: number;
}

/**
 * For a level whose beam stands `height` mm above the floor. Where nothing is asked for there, goods
 * catch touching; where it is not known what puts them away, at the gaps of the common trucks.
 */
export function gapsAt(rules: ResolvedRules, loadedBy: LoadedBy, height: number): Gaps {
  const keys = clearanceKeys(loadedBy === 'unknown' ? 'class-400' : loadedBy, height);
  return keys === null ? { upright: 0, loads: 0 } : { upright: rules.value[keys.upright], loads: rules.value[keys.loads] };
}
