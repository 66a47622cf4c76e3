/**
 * The class of a damaged frame member: green, amber or red by its bend against the rule set's limit on
 * a straightedge. Dents, buckles, tears, splits and cracked welds are never judged by millimetres.
 *
 * Source: facts M-27 and F-77 to F-87 (FEM 10.2.04 and EN 15635 as restated; ANSI MH16.1 as restated).
 */
import { addDays, daysBetween } from '../units/dates';
import type { Missing } from './finding';
import type { ResolvedRules, RuleKey } from './rule-sets';

type DamagedMember = 'upright-front' | 'upright-rear' | 'bracing' | 'base-plate';

export const MEMBER_WORDS: Readonly<Record<DamagedMember, string>> = {
  'upright-front': 'front upright',
  'upright-rear': 'rear upright',
  bracing: 'bracing',
  'base-plate': 'base plate',
};

export interface FoundDamage {
  readonly id: string;
  readonly member: DamagedMember;
  /** Bow over the gauge length, mm, along the beams and in the plane of the frame; null = not measured. */
  readonly alongMm: number | null;
  readonly acrossMm: number | null;
  readonly gaugeMm: number;
  /** Dent, buckle, tear, split or cracked weld. */
  readonly torn: boolean;
  /** ISO date on which it was found; empty = not known. */
  readonly found: string;
}

/** "Unclassed" = something is not known, or no limit is published; it never counts as green. */
export type DamageClass = 'green' | 'amber' | 'red' | 'unclassed';

/** One direction of a bend against its limit. */
export interface Bend {
  readonly direction: 'along' | 'across';
  readonly rule: RuleKey;
  readonly measuredMm: number;
  readonly limitMm: number;
  /** Measured over limit. */
  readonly ratio: number;
  readonly class: 'green' | 'amber' | 'red';
}

export interface DamageJudged {
  readonly class: DamageClass;
  /** Why it is red without regard to millimetres, or why it is unclassed. */
  readonly because: 'measured' | 'torn' | 'any-damage' | 'too-long-amber' | 'no-limit' | 'not-known';
  /** The directions that were measured and have a limit; the worse one first. */
  readonly bends: readonly Bend[];
  /** Last day on which an amber damage is amber (ISO); null for other classes or where the day it was found is not known. */
  readonly lastAmberDay: string | null;
  readonly missing: readonly Missing[];
}

/** A bend exactly at its limit is green; this is the rounding of the computation. */
const ROUNDING = 1e-12;

/**
 * @param today ISO date
 * @throws RangeError if a date given is no day of the calendar
 * @example 8 mm along over 1 000 mm in the European set → 1.6 times 5 mm, amber
 */
export function classOfDamage(damage: FoundDamage, rules: ResolvedRules, today: string): DamageJudged {
  const { member, torn, found } = damage;
  const bends = bendsOf(damage, rules);
  const judged = (result: Pick<DamageJudged, 'class' | 'because'> & Partial<DamageJudged>): DamageJudged => ({
    bends,
    lastAmberDay: null,
    missing: [],
    ...result,
  });
  if (torn) return judged({ class: 'red', because: 'torn' });
  if (anyDamageIsRed(rules)) return judged({ class: 'red', because: 'any-damage' });
  if (member === 'base-plate') return judged({ class: 'unclassed', because: 'no-limit', missing: [judgement(damage)] });
  const worst = bends[0];
  if (worst?.class === 'red') return judged({ class: 'red', because: 'measured' });
  const missing = notMeasured(damage);
  if (missing.length > 0 || worst === undefined) return judged({ class: 'unclassed', because: 'not-known', missing });
  if (worst.class === 'green') return judged({ class: 'green', because: 'measured' });
  if (found === '') return judged({ class: 'amber', because: 'measured', missing: [dayFound(damage)] });
  // A site may count in parts of a week; a day that has begun is not a whole one.
  const lastAmberDay = addDays(found, Math.floor(7 * rules.value.amberWeeks));
  return daysBetween(lastAmberDay, today) > 0
    ? judged({ class: 'red', because: 'too-long-amber', lastAmberDay })
    : judged({ class: 'amber', because: 'measured', lastAmberDay });
}

/** A set that allows no bend at all asks to unload on any visible damage. */
const anyDamageIsRed = ({ value }: ResolvedRules): boolean =>
  value.damageUprightAlong === 0 && value.damageUprightAcross === 0 && value.damageBracing === 0;

/** Pro rata for gauges shorter than 1 m; a longer gauge allows no more than 1 m does. */
function bendsOf({ member, alongMm, acrossMm, gaugeMm }: FoundDamage, rules: ResolvedRules): readonly Bend[] {
  if (member === 'base-plate') return [];
  const part = Math.min(gaugeMm, 1000) / 1000;
  const bend = (direction: Bend['direction'], measuredMm: number | null, rule: RuleKey): readonly Bend[] => {
    if (measuredMm === null) return [];
    const limitMm = rules.value[rule] * part;
    const ratio = limitMm > 0 ? measuredMm / limitMm : measuredMm > 0 ? Infinity : 0;
    const red = ratio > rules.value.damageRedFactor * (1 + ROUNDING);
    return [{ direction, rule, measuredMm, limitMm, ratio, class: red ? 'red' : ratio > 1 + ROUNDING ? 'amber' : 'green' }];
  };
  const bracing = member === 'bracing';
  return [
    ...bend('along', alongMm, bracing ? 'damageBracing' : 'damageUprightAlong'),
    ...bend('across', acrossMm, bracing ? 'damageBracing' : 'damageUprightAcross'),
  ].sort((a, b) => b.ratio - a.ratio);
}

function notMeasured({ id, member, alongMm, acrossMm }: FoundDamage): readonly Missing[] {
  const how = 'Hold a straightedge of 1 m to the member, in this direction, and measure the greatest gap. Enter 0 where it is straight.';
  return [
    ...(alongMm === null ? [{ input: `bend of the ${MEMBER_WORDS[member]} along the run`, how, field: `damage:${id}:alongMm` }] : []),
    ...(acrossMm === null
      ? [{ input: `bend of the ${MEMBER_WORDS[member]} in the plane of the frame`, how, field: `damage:${id}:acrossMm` }]
      : []),
  ];
}

const judgement = ({ id }: FoundDamage): Missing => ({
  input: 'a competent person’s judgement of the base plate',
  how: 'No limit in millimetres is published for base plates: have a competent person judge it, have it repaired, and then take the damage off.',
  field: `damage:${id}:member`,
});

const dayFound = ({ id, member }: FoundDamage): Missing => ({
  input: `the day on which the damage of the ${MEMBER_WORDS[member]} was found`,
  how: 'Enter the date of the report or of the inspection: amber damage counts as red after some weeks.',
  field: `damage:${id}:found`,
});
