/** The site as JSON in its one canonical form: fixed order of keys, no spaces, so that equal sites give equal bytes. */
import { site as siteField } from './schema';
import type { Site } from './site';

/** @throws RangeError if the site holds what `readSite` would refuse in a single value, quoting it */
export const writeSite = (site: Site): string => JSON.stringify(siteField.canonical(site));
