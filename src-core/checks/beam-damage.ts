/**
 * What the damages recorded on the beams of a level ask for: unload it, whatever was measured.
 *
 * Source: facts M-27 and F-82 (limits in millimetres are for uprights and bracing; dents, buckles, tears,
 * splits and cracked welds are covered by none: replace) and F-87 (United States: unload on any visible
 * damage). How far a beam may sag is another check.
 */
import { dateWords } from '../units/dates';
import { say, type BeamSide, type Finding, type Place, type Text } from './finding';
import { finding } from './make-finding';
import { opening } from './phrase';
import { RULE_SET_TITLES, type ResolvedRules, type RuleSetName } from './rule-sets';

export interface FoundBeamDamage {
  readonly id: string;
  readonly beam: BeamSide;
  readonly member: 'beam' | 'connector';
  /** Dent, buckle, tear, split or cracked weld. */
  readonly torn: boolean;
  readonly note: string;
  /** ISO date on which it was found; empty = not known. */
  readonly found: string;
}

export interface BeamDamageInput {
  readonly place: Place;
  /** "level 2 of bay A1". */
  readonly level: string;
  readonly damages: readonly FoundBeamDamage[];
  readonly rules: ResolvedRules;
}

/** "the front beam of level 2 of bay A1", "a connector of the front beam of level 2 of bay A1". */
export const damagedPart = ({ beam, member }: Pick<FoundBeamDamage, 'beam' | 'member'>, level: string): string =>
  member === 'beam' ? `the ${beam} beam of ${level}` : `a connector of the ${beam} beam of ${level}`;

/** What is to be done about any damage of a beam or its connectors, in one sentence. */
export const unloadForBeam = (level: string): Text =>
  say`Unload ${level} at once, bar it from reloading, and have the beam replaced by the maker’s own.`;

/** One finding for each damage, always over; none where no damage is recorded. */
export const beamDamage = ({ place, level, damages, rules }: BeamDamageInput): readonly Finding[] =>
  damages.map((damage) =>
    finding({
      check: 'damage',
      place: { ...place, beam: damage.beam },
      verdict: 'over',
      says: () => {
        const part = opening(damagedPart(damage, level));
        const note = damage.note.trim() === '' ? '' : ` (${damage.note.trim()})`;
        const found = damage.found === '' ? 'The day on which it was found is not known.' : `Found on ${dateWords(damage.found)}.`;
        return say`${part}${note} ${whyRed(damage, rules.set)} ${unloadForBeam(level)} ${found}`;
      },
      notes: () => [
        say`A competent person confirms the class. No share of its rating is left to a damaged beam, and none is taken off by this program.`,
      ],
    }),
  );

/** The rest of a sentence that begins with the part. */
export function whyRed({ torn }: Pick<FoundBeamDamage, 'torn'>, set: RuleSetName): string {
  if (torn) return 'has a dent, buckle, tear, split or cracked weld, which no millimetres excuse: red.';
  return set === 'united-states'
    ? `is damaged, and the ${RULE_SET_TITLES[set]} rule set asks to unload on any visible damage.`
    : 'is damaged. No limit is published that would excuse damage of a beam or its connectors, so it counts as red.';
}
