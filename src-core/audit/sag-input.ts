/** Joins a sag reading with what the site and its audit know of the level. */
import { fixityOf } from '../checks/pair';
import type { ResolvedRules } from '../checks/rule-sets';
import type { SagInput } from '../checks/sag';
import type { Bay, BeamSag, BeamType, Level, Rules } from '../site/site';
import type { LevelAudit } from './types';

export interface SagOfBeam extends Pick<LevelAudit, 'effects' | 'totalKg'> {
  readonly rules: ResolvedRules;
  readonly spanBy: Rules['span'];
  readonly bay: Bay;
  readonly level: Level;
  /** 0 for the lowest. */
  readonly index: number;
  readonly beamType: BeamType | null;
  readonly span: number;
  readonly rated: SagInput['rated'];
  readonly reading: Omit<BeamSag, 'found'>;
  /** ISO day of the reading, empty where it is not known; null while it is being read. */
  readonly found: string | null;
}

export function sagInput({ reading, bay, level, index, beamType, span, effects, totalKg, ...at }: SagOfBeam): SagInput {
  const rigidity =
    beamType === null || beamType.secondMomentMm4 === null || beamType.elasticModulusNPerMm2 === null
      ? null
      : beamType.secondMomentMm4 * beamType.elasticModulusNPerMm2;
  const stiffness = beamType?.connectorNmmPerRad ?? null;
  return {
    beam: `the ${reading.beam} beam of level ${index + 1} of bay ${bay.name}`,
    span,
    spanFrom: at.spanBy === 'clear-entry' ? `clear entry of bay ${bay.name}` : `upright centre to upright centre of bay ${bay.name}`,
    loadedMm: reading.loadedMm,
    unloadedMm: reading.unloadedMm,
    sidewaysMm: reading.sidewaysMm,
    found: at.found,
    field: `level:${level.id}:sags.${reading.beam}.`,
    section:
      rigidity === null || beamType === null
        ? null
        : {
            rigidity,
            from: `section of beam type ${beamType.name}`,
            fixity: stiffness === null ? null : fixityOf(stiffness, rigidity, span),
          },
    declared: effects === null || totalKg === null ? null : { load: effects.loads[reading.beam], kg: totalKg },
    rated: at.rated,
    rules: at.rules,
  };
}
