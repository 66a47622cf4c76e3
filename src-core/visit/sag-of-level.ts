/** Joins a sag reading with what the site and its audit know of the level. */
import { dateWords } from '../units/dates';
import type { LevelAudit } from '../audit/types';
import { fixityOf } from '../checks/pair';
import { resolveRules } from '../checks/rule-sets';
import { findLevel } from '../site/lookup';
import type { Site } from '../site/site';
import { judgeSag, type SagJudgement } from './sag';
import type { SagReading } from './visit';

/**
 * The reading judged, or null where the span is not known, without which no limit is.
 * @throws RangeError if the site has no such level
 */
export function judgeSagOfLevel(site: Site, audit: LevelAudit, reading: SagReading): SagJudgement | null {
  const { level, levelIndex, bay } = findLevel(site, reading.levelId);
  const { span, effects, totalKg, ratedKg } = audit;
  if (span === null) return null;
  const type = site.beamTypes.find(({ id }) => id === level.beamTypeId);
  const notice = site.notices.find(({ id }) => id === bay.noticeId);
  const rigidity =
    type === undefined || type.secondMomentMm4 === null || type.elasticModulusNPerMm2 === null
      ? null
      : type.secondMomentMm4 * type.elasticModulusNPerMm2;
  const stiffness = type?.connectorNmmPerRad ?? null;
  return judgeSag({
    beam: `the ${reading.beam} beam of level ${levelIndex + 1} of bay ${bay.name}`,
    span,
    spanFrom: site.rules.span === 'clear-entry' ? `clear entry of bay ${bay.name}` : `upright centre to upright centre of bay ${bay.name}`,
    loadedMm: reading.loadedMm,
    unloadedMm: reading.unloadedMm,
    sidewaysMm: reading.sidewaysMm,
    section:
      rigidity === null || type === undefined
        ? null
        : {
            rigidity,
            from: `section of beam type ${type.name}`,
            fixity: stiffness === null ? null : fixityOf(stiffness, rigidity, span),
          },
    declared: effects === null || totalKg === null ? null : { load: effects.loads[reading.beam], kg: totalKg },
    rated:
      ratedKg === null
        ? null
        : {
            kg: ratedKg,
            from:
              notice === undefined
                ? 'rating of the beam type'
                : `load notice ${notice.name}${notice.issued === '' ? '' : `, issued ${dateWords(notice.issued)}`}`,
          },
    rules: resolveRules(site.rules),
  });
}
