/** The beams of a level under the arrangement of its goods that bends one of them most, for drawing. */
import type { LevelWork } from '../../src-core/audit/context';
import { looseGoods } from '../../src-core/audit/loose-goods';
import { fixityOf } from '../../src-core/checks/pair';
import type { ResolvedRules } from '../../src-core/checks/rule-sets';
import type { Bay } from '../../src-core/site/site';
import { solveBeam } from '../../src-core/statics/beam';
import type { BeamShown, BeamView } from './diagram';

/**
 * Null where nothing may be otherwise than stated, or the beam in sight is not the one that is bent most.
 * Together, the two are drawn in the arrangement that is worst for one of them.
 */
export function worstBending(rules: ResolvedRules, bay: Bay, work: LevelWork, view: BeamView): BeamShown | null {
  const { effects, span } = work;
  if (effects === null || span === null) return null;
  const { rigidity, end, front, rear } = effects;
  const fixity = end.kind === 'sprung' ? fixityOf(end.stiffness, rigidity, span) : 0;
  const loose = looseGoods({ rules }, { bay }, work, effects, span, fixity);
  if (loose === null) return null;
  const worst = loose.worst('bending');
  const beams = loose.beams(worst);
  if (view !== 'pair') {
    // Where both carry alike, either may be the worse.
    const side = view === 'both' || front === rear ? worst.side : view;
    if (side !== worst.side) return null;
    return { beam: view === 'both' ? side : view, answer: beams[side].answer };
  }
  const load = {
    lines: [...beams.front.load.lines, ...beams.rear.load.lines],
    points: [...beams.front.load.points, ...beams.rear.load.points],
  };
  const both = end.kind === 'sprung' ? { kind: end.kind, stiffness: 2 * end.stiffness } : end;
  return { beam: 'pair', answer: solveBeam({ span, rigidity: 2 * rigidity, left: both, right: both }, load) };
}
