/** The load notice against the rack as it was measured at a visit. Source: facts M-31 (common practice). */
import { say, type Text } from '../checks/finding';
import type { Bay, LoadNotice } from '../site/site';
import { lengthOf } from '../units/quantity';
import type { NoticeSeen } from './visit';

/**
 * What does not agree; each item makes the notice's ratings not valid for the bay. Empty where nothing
 * is known to differ, which is no proof that it matches.
 * @param notice the bay's notice in the site; null where the site knows none
 */
export function noticeDiffers(notice: LoadNotice | null, bay: Bay, seen: NoticeSeen): readonly Text[] {
  const differs: Text[] = [];
  if (seen.there === 'no') differs.push(say`No load notice is fixed to bay ${bay.name}.`);
  // A notice that is not there is neither this bay's nor another's.
  else if (seen.matches === 'no') differs.push(say`The load notice at bay ${bay.name} cannot be read or is not this bay’s.`);
  if (seen.beams === 'no') differs.push(say`Beams of another type than the load notice’s are in bay ${bay.name}.`);
  if (notice === null) return differs;
  const { firstBeamMm, greatestGapMm, levels } = notice;
  if (seen.firstBeamMm !== null && firstBeamMm !== null && seen.firstBeamMm > firstBeamMm)
    differs.push(
      say`The first beam of bay ${bay.name} is at ${lengthOf(seen.firstBeamMm)}; its load notice allows up to ${lengthOf(firstBeamMm)}.`,
    );
  if (seen.greatestGapMm !== null && greatestGapMm !== null && seen.greatestGapMm > greatestGapMm)
    differs.push(
      say`The greatest gap between beams of bay ${bay.name} is ${lengthOf(seen.greatestGapMm)}; its load notice allows up to ${lengthOf(greatestGapMm)}.`,
    );
  if (seen.levels !== null && levels !== null && seen.levels !== levels)
    differs.push(say`Bay ${bay.name} has ${seen.levels} beam levels; its load notice is for ${levels}.`);
  return differs;
}
