/** What a record holds: the inputs and the figures, as JSON text; how two compare, and when one is void. */
import { isRecord } from '../site/fields';
import { raiseSite, SITE_VERSION } from '../site/migrations';
import type { Id, Site } from '../site/site';
import { differences, type Difference } from './differences';
import { extractOf } from './extract';

export interface RecordContents {
  /** The part of the site that it is about, as it stood. */
  readonly site: Site;
  readonly bayIds: readonly Id[];
  /** What was found: an audit's verdicts and figures, or a visit with its actions. Plain data. */
  readonly figures: unknown;
  /** The paper that was made of it, as data; null where there was none. */
  readonly paper: unknown;
}

/** @throws RangeError if the site has none of the bays */
export const contentsText = (site: Site, bayIds: readonly Id[], figures: unknown, paper: unknown = null): string =>
  JSON.stringify({ version: SITE_VERSION, site: extractOf(site, bayIds), bayIds, figures, paper });

/**
 * @throws RangeError if the text is not the contents of a record; one that verified always is
 */
export function readContents(text: string): RecordContents {
  const json: unknown = JSON.parse(text);
  if (!isRecord(json) || !['site', 'bayIds', 'figures', 'paper'].every((key) => key in json))
    throw new RangeError('the text holds no site, bays, figures and paper of a record');
  const { version, bayIds, figures, paper } = json;
  // The first records named no version.
  const site = raiseSite(json['site'], typeof version === 'number' ? version : 1);
  return { site, bayIds, figures, paper } as RecordContents;
}

/** What differs from an earlier to a later record: first of the inputs, then of the figures. */
export function compareRecords(
  before: RecordContents,
  after: RecordContents,
): { readonly inputs: readonly Difference[]; readonly figures: readonly Difference[] } {
  return { inputs: differences(before.site, after.site), figures: differences(before.figures, after.figures) };
}

/**
 * What has changed at the rack since a record: with anything in it the record is void, because a report
 * older than a change proves nothing of what stands there now. Empty while it still holds.
 *
 * A bay that is gone counts as a change. Names and notes of the site as a whole, and the units in which
 * it is shown, do not.
 * @param what `goods: false` for a report on the rack itself, which goods that come and go leave standing
 */
export function voidBy(record: RecordContents, site: Site, what: { readonly goods: boolean } = { goods: true }): readonly Difference[] {
  const there = new Set(site.runs.flatMap((run) => run.bays.map(({ id }) => id)));
  if (!record.bayIds.some((id) => there.has(id))) return [{ where: 'every bay of this record', before: 'there', after: null }];
  const asNow = ({ name: _, notes: __, units: ___, ...rest }: Site) => (what.goods ? rest : withoutGoods(rest));
  return differences(asNow(record.site), asNow(extractOf(site, record.bayIds)));
}

const withoutGoods = ({ runs, unitLoads: _, pallets: __, ...rest }: Omit<Site, 'name' | 'notes' | 'units'>) => ({
  ...rest,
  runs: runs.map((run) => ({
    ...run,
    bays: run.bays.map(({ onFloor: ___, ...bay }) => ({
      ...bay,
      levels: bay.levels.map(({ placements: ____, ...level }) => level),
    })),
  })),
});
