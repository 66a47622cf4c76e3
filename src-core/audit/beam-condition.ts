/** The checks of what was found at a level's beams: their damage, and how far they sag. */
import { beamDamage } from '../checks/beam-damage';
import { beamSag } from '../checks/beam-sag';
import type { Finding } from '../checks/finding';
import type { LevelRating } from '../checks/level-rating';
import { notAssessable } from '../checks/make-finding';
import { asked, type BayWork, type LevelWork, type SiteContext } from './context';
import { frameTypesMissing } from './level-work';
import { levelOfBay } from './parts';
import { sagInput } from './sag-input';

/** Nothing where neither damage nor a reading is recorded: beams are taken to be as the maker made them. */
export function beamConditionFindings(context: SiteContext, bay: BayWork, work: LevelWork, rated: LevelRating): readonly Finding[] {
  const { level, place } = work;
  const { rules, site } = context;
  return [
    ...(asked(context, 'beam-sag') ? level.sags : []).map((reading): Finding => {
      const at = { ...place, beam: reading.beam };
      if (work.span === null) return notAssessable('beam-sag', at, spanMissing(bay));
      return beamSag({
        place: at,
        sag: sagInput({
          rules,
          spanBy: site.rules.span,
          bay: bay.bay,
          level,
          index: work.index,
          beamType: work.beamType,
          span: work.span,
          effects: work.effects,
          totalKg: work.totalKg,
          rated: rated.kg === null ? null : { kg: rated.kg, from: rated.from },
          reading,
          found: reading.found,
        }),
      });
    }),
    ...(asked(context, 'damage') ? beamDamage({ place, level: levelOfBay(bay, work), damages: level.beamDamages, rules }) : []),
  ];
}

const spanMissing = ({ frames, frameTypes }: BayWork) =>
  frameTypesMissing([
    { frame: frames[0], type: frameTypes[0] },
    { frame: frames[1], type: frameTypes[1] },
  ]);
