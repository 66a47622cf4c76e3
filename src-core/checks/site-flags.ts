/**
 * Conditions that no calculation here answers and that stop a pass: earthquake, wind, an unanchored
 * frame, parts of an unknown maker, a rating without an origin, goods two deep.
 *
 * Source: facts M-34 and M-35 and section 1.5; EN 16681 and local codes for earthquake.
 */
import { say, type Finding, type Missing, type Place, type Text } from './finding';
import { finding, notAssessable } from './make-finding';
import { listed } from './phrase';

type Answer = 'yes' | 'no' | 'unknown';

/** A part whose rating the bay relies on. */
export interface RatedPart {
  /** "beam type B 120", "load notice LN-4". */
  readonly name: string;
  readonly maker: string;
  readonly sourceKnown: boolean;
  /** Prefix of its fields: `beamType:id:`. */
  readonly field: string;
}

export interface SiteFlagsInput {
  readonly place: Place;
  readonly bay: string;
  readonly seismic: Answer;
  readonly outdoors: Answer;
  /** Field of the site, prefix `site:id:`. */
  readonly siteField: string;
  readonly twoDeep: Answer;
  /** Prefix `run:id:`. */
  readonly runField: string;
  readonly frames: readonly { readonly name: string; readonly anchored: Answer; readonly field: string }[];
  readonly parts: readonly RatedPart[];
}

interface Flag {
  readonly says: Text;
  readonly missing: Missing;
}

/** One finding for each flag; one that says there is none. */
export function siteFlags(input: SiteFlagsInput): readonly Finding[] {
  const flags = [...siteWide(input), ...input.frames.flatMap(anchoring), ...input.parts.flatMap(origin)];
  if (flags.length === 0)
    return [
      finding({
        check: 'site-flags',
        place: input.place,
        verdict: 'within',
        says: () =>
          say`Nothing about ${input.bay} stops a check: no earthquake region, not outdoors, goods one deep, frames anchored, makers and origins of ratings known.`,
      }),
    ];
  return flags.map(({ says, missing }) => notAssessable('site-flags', input.place, [missing], { says: () => says }));
}

function siteWide({ seismic, outdoors, siteField, twoDeep, runField }: SiteFlagsInput): readonly Flag[] {
  const flags: Flag[] = [];
  if (seismic === 'yes')
    flags.push({
      says: say`The site lies in an earthquake region. Earthquake is not part of any check here: an engineer has to judge the rack.`,
      missing: {
        input: 'an engineer’s proof for earthquake',
        how: 'Have the rack judged by EN 16681 or the local code, and leave this check out with that proof as the reason.',
        field: `${siteField}seismic`,
      },
    });
  if (seismic === 'unknown')
    flags.push({
      says: say`Whether the site lies in an earthquake region is not known.`,
      missing: {
        input: 'whether it is an earthquake region',
        how: 'Look it up in the local building code, and answer.',
        field: `${siteField}seismic`,
      },
    });
  if (outdoors === 'yes')
    flags.push({
      says: say`The rack stands outdoors or in the wind. Wind, snow and weather are not part of any check here: an engineer has to judge the rack.`,
      missing: {
        input: 'an engineer’s proof for wind and weather',
        how: 'Have the rack judged by an engineer, and leave this check out with that proof as the reason.',
        field: `${siteField}outdoors`,
      },
    });
  if (outdoors === 'unknown')
    flags.push({
      says: say`Whether the rack stands outdoors or in the wind is not known.`,
      missing: { input: 'whether it stands outdoors or in the wind', how: 'Answer it for this site.', field: `${siteField}outdoors` },
    });
  if (twoDeep === 'yes')
    flags.push({
      says: say`Goods stand two deep. Each pair of beams is judged by itself, but placement and clearances for two deep are the supplier’s to state.`,
      missing: {
        input: 'the supplier’s clearances and placement tolerance for two-deep storage',
        how: 'Ask the supplier for them, enter them among the rules, and leave this check out with that as the reason.',
        field: `${runField}twoDeep`,
      },
    });
  if (twoDeep === 'unknown')
    flags.push({
      says: say`Whether goods stand two deep is not known.`,
      missing: { input: 'whether goods stand two deep', how: 'Look from the side of the run, and answer.', field: `${runField}twoDeep` },
    });
  return flags;
}

function anchoring({ name, anchored, field }: SiteFlagsInput['frames'][number]): readonly Flag[] {
  if (anchored === 'yes') return [];
  const missing: Missing = {
    input: `floor anchors of ${name}`,
    how:
      anchored === 'no'
        ? 'Unload it and have it anchored as the maker says: ratings take anchors for granted.'
        : 'Look at both base plates for their anchors, and answer.',
    field: `${field}anchored`,
  };
  return [
    {
      says:
        anchored === 'no'
          ? say`${name} is not anchored to the floor. Ratings take anchors for granted, so none holds: unload it and have it anchored.`
          : say`Whether ${name} is anchored to the floor is not known.`,
      missing,
    },
  ];
}

/** Left empty, or said to be unknown in words. */
const unnamed = (maker: string): boolean => /^(|unknown|not known|none|-|\?+)$/i.test(maker.trim());

function origin({ name, maker, sourceKnown, field }: RatedPart): readonly Flag[] {
  const unknown = [...(unnamed(maker) ? ['maker'] : []), ...(sourceKnown ? [] : ['origin of its numbers'])];
  if (unknown.length === 0) return [];
  return [
    {
      says: say`Of the ${name}, the ${listed(unknown)} is not known. Look-alike parts behave differently, and a rating without an origin is none.`,
      missing: {
        input: `${listed(unknown)} of the ${name}`,
        how: 'Find the maker’s mark, notice, drawing or order, and enter it. Where it cannot be found, strength has to be shown by calculation or test.',
        field: `${field}${unnamed(maker) ? 'maker' : 'source'}`,
      },
    },
  ];
}
