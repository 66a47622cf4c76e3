/**
 * Steps that raise a site's JSON from one version of the file to the next: on data of the reader's own,
 * nothing dropped, nothing guessed. What an older version does not say is not known.
 */
import { isRecord } from './fields';

/** Bay templates, hole pitch of frames, damage and sag of beams came with version 2. */
function toVersion2(site: unknown): unknown {
  if (!isRecord(site)) return site;
  const { runs, ...rest } = site;
  return {
    bayTemplates: [],
    ...rest,
    ...('frameTypes' in site ? { frameTypes: each(site['frameTypes'], withHolePitch) } : {}),
    ...('runs' in site ? { runs: each(runs, (run) => at(run, 'bays', (bay) => at(bay, 'levels', withBeamsSeen))) } : {}),
  };
}

type Things = Readonly<Record<string, unknown>>;

/** Changes every record of a list; what is not as it should be is left for the reader to tell of. */
const each = (list: unknown, change: (one: Things) => unknown): unknown =>
  Array.isArray(list) ? list.map((one: unknown) => (isRecord(one) ? change(one) : one)) : list;

const at = (one: Things, key: string, change: (part: Things) => unknown): unknown =>
  key in one ? { ...one, [key]: each(one[key], change) } : one;

const withHolePitch = ({ source, ...rest }: Things): unknown => ({
  holePitchMm: null,
  ...rest,
  ...(source === undefined ? {} : { source }),
});

const withBeamsSeen = ({ placements, ...rest }: Things): unknown => ({
  beamDamages: [],
  sags: [],
  ...rest,
  ...(placements === undefined ? {} : { placements }),
});

/** One step raises a site by one version, from the key's. */
export const STEPS: Readonly<Record<number, (site: unknown) => unknown>> = { 1: toVersion2 };

export const SITE_VERSION = 2;

/** The site's JSON of an earlier version as one of the present; a later version is given back as it is. */
export function raiseSite(site: unknown, version: number): unknown {
  let raised = site;
  for (let from = version; from < SITE_VERSION; from++) raised = STEPS[from]?.(raised) ?? raised;
  return raised;
}
