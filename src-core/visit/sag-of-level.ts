/** A sag reading of a visit, judged by what the site and its audit know of the level. */
import { sagInput } from '../audit/sag-input';
import type { LevelAudit } from '../audit/types';
import { resolveRules } from '../checks/rule-sets';
import { judgeSag, type SagJudgement } from '../checks/sag';
import { findLevel } from '../site/lookup';
import type { Site } from '../site/site';
import { dateWords } from '../units/dates';
import type { SagReading } from './visit';

/**
 * The reading judged, or null where the span is not known, without which no limit is.
 * @throws RangeError if the site has no such level
 */
export function judgeSagOfLevel(site: Site, audit: LevelAudit, reading: SagReading): SagJudgement | null {
  const { level, levelIndex, bay } = findLevel(site, reading.levelId);
  const { span, effects, totalKg, ratedKg } = audit;
  if (span === null) return null;
  const notice = site.notices.find(({ id }) => id === bay.noticeId);
  const from =
    notice === undefined
      ? 'rating of the beam type'
      : `load notice ${notice.name}${notice.issued === '' ? '' : `, issued ${dateWords(notice.issued)}`}`;
  return judgeSag(
    sagInput({
      rules: resolveRules(site.rules),
      spanBy: site.rules.span,
      bay,
      level,
      index: levelIndex,
      beamType: site.beamTypes.find(({ id }) => id === level.beamTypeId) ?? null,
      span,
      effects,
      totalKg,
      rated: ratedKg === null ? null : { kg: ratedKg, from },
      reading,
      found: null,
    }),
  );
}
