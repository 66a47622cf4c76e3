/** Unit loads that may each stand a little off their marks, for tests of the worst case. */
import type { BeamEnd } from '../../src-core/statics/beam';
import type { BeamLoad } from '../../src-core/statics/load';
import type { LooseBeam, LooseLoad } from '../../src-core/statics/worst-case-loads';

export const EI = 2e11;
const PINNED: BeamEnd = { kind: 'pinned' };

export const looseBeam = (span: number, tolerance: number, end: BeamEnd = PINNED): LooseBeam => ({
  span,
  rigidity: EI,
  left: end,
  right: end,
  from: 0,
  to: span,
  tolerance,
});
export const even = (width: number, weight: number): BeamLoad => ({
  lines: [{ from: 0, to: width, wFrom: weight / width, wTo: weight / width }],
  points: [],
});
export const loose = (load: BeamLoad, width: number, at: number, factor = 1): LooseLoad => ({ load, width, at, factor });
