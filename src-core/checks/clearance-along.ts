/**
 * Room between the goods of a level and from goods to uprights, by the class of truck and the height of
 * the level, on the goods' real outline: overhang past the pallet is in their width, lean comes on top.
 */
import { lengthOf } from '../units/quantity';
import { clearanceKeys, GREATEST_HEIGHT, LOADED_BY_WORDS, type ClearanceKeys, type LoadedBy } from './clearance-rules';
import { say, type Finding, type Missing, type Place, type Text, type WorkedStep } from './finding';
import { finding, notAssessable, utilisationOf } from './make-finding';
import { inside } from './phrase';
import { TOUCH, type Outline } from './placement';
import { ruleValue, sourceOf, type ResolvedRules, type RuleKey } from './rule-sets';
import { above, put } from './worked-values';

export interface LeaningOutline extends Outline {
  /** Offset of the goods' top, mm, to the right positive. */
  readonly lean: number;
}

/** What puts the goods away, and what to fill in where that is not known or has no clearances so high up. */
export interface Handling {
  readonly loadedBy: LoadedBy;
  readonly missing: Missing;
}

export interface ClearanceAlongInput {
  readonly place: Place;
  readonly level: string;
  /** Floor to the top of the beams, mm; 0 for the floor. */
  readonly height: number;
  /** Free width between the uprights, mm. */
  readonly clearEntry: number;
  readonly goods: readonly LeaningOutline[];
  readonly handling: Handling;
  readonly rules: ResolvedRules;
}

/**
 * Free width that goods standing side by side need between the uprights: a gap at each end and one
 * between each two of them.
 * @example two 1 200 wide with gaps of 75 → 2 625; three 800 wide → 2 700
 */
export const clearEntryNeeded = (widths: readonly number[], toUpright: number, betweenLoads: number): number =>
  widths.reduce((sum, width) => sum + width, 0) + (widths.length > 0 ? 2 * toUpright + (widths.length - 1) * betweenLoads : 0);

interface Gap {
  readonly between: string;
  readonly placementId: string;
  readonly room: number;
  /** Lean that was taken off the room between the outlines. */
  readonly lean: number;
  readonly rule: RuleKey;
}

/** One finding for each gap that is too small; else one for the tightest. */
export function clearanceAlong(input: ClearanceAlongInput): readonly Finding[] {
  const { place, level, height, goods, handling } = input;
  if (goods.length === 0) return [within(place, say`No goods stand on ${inside(level)}.`)];
  if (handling.loadedBy === 'by-hand')
    return [within(place, say`Goods on ${inside(level)} are put away by hand, which needs no truck’s clearance.`)];
  const keys = clearanceKeys(handling.loadedBy, height);
  if (keys === null) return [notAssessable('clearance-along', place, [withoutClearances(handling, height)])];
  const { value } = input.rules;
  const gaps = gapsOf(input, keys);
  const over = gaps.filter(({ room, rule }) => room < value[rule] - TOUCH);
  if (over.length > 0) return over.map((gap) => judge(input, keys, gap));
  const tightest = gaps.reduce((most, one) => (one.room * value[most.rule] < most.room * value[one.rule] ? one : most));
  return [judge(input, keys, tightest)];
}

const within = (place: Place, says: Text): Finding => finding({ check: 'clearance-along', place, verdict: 'within', says: () => says });

/** What is missing where no clearance is stated: the class of truck, or a value for a level so high. */
export function withoutClearances({ loadedBy, missing }: Handling, height: number): Missing {
  if (loadedBy === 'unknown' || loadedBy === 'by-hand') return missing;
  const most = GREATEST_HEIGHT[loadedBy] / 1000;
  return {
    input: `clearances of ${LOADED_BY_WORDS[loadedBy]} for goods ${Number((height / 1000).toFixed(3))} m up`,
    how: `The rule set states none above ${most} m for this class. Ask the suppliers of the rack and the truck for theirs, and leave this check out with what they say as the reason.`,
    field: missing.field,
  };
}

/** Gaps between neighbours that meet across the depth, and from each end of such a row to its upright. */
function gapsOf({ goods, clearEntry }: ClearanceAlongInput, keys: ClearanceKeys): readonly Gap[] {
  const sorted = [...goods].sort((a, b) => a.from - b.from);
  const gaps: Gap[] = [];
  sorted.forEach((one, i) => {
    const meets = (other: LeaningOutline) => Math.min(one.front, other.front) - Math.max(one.rear, other.rear) > TOUCH;
    const leanLeft = Math.max(0, -one.lean);
    const leanRight = Math.max(0, one.lean);
    if (!sorted.slice(0, i).some(meets))
      gaps.push({
        between: `the left upright and ${one.name}`,
        placementId: one.placementId,
        room: one.from - leanLeft,
        lean: leanLeft,
        rule: keys.upright,
      });
    const next = sorted.slice(i + 1).find(meets);
    if (next === undefined)
      gaps.push({
        between: `${one.name} and the right upright`,
        placementId: one.placementId,
        room: clearEntry - one.to - leanRight,
        lean: leanRight,
        rule: keys.upright,
      });
    else {
      const lean = leanRight + Math.max(0, -next.lean);
      gaps.push({
        between: `${one.name} and ${next.name}`,
        placementId: next.placementId,
        room: next.from - one.to - lean,
        lean,
        rule: keys.loads,
      });
    }
  });
  return gaps;
}

function judge(input: ClearanceAlongInput, keys: ClearanceKeys, gap: Gap): Finding {
  const { place, level, rules, clearEntry, goods } = input;
  const needed = rules.value[gap.rule];
  const room = Math.max(0, gap.room);
  const met = gap.room >= needed - TOUCH;
  const widths = goods.map(({ from, to }) => to - from);
  return finding({
    check: 'clearance-along',
    place: { ...place, placementId: gap.placementId },
    // A clearance already holds what trucks need: met is met, without a band below it.
    verdict: met ? 'within' : 'over',
    utilisation: met ? Math.min(1, utilisationOf(needed, room)) : utilisationOf(needed, room),
    demand: lengthOf(needed),
    allowed: lengthOf(gap.room),
    says: () =>
      met
        ? say`The tightest gap on ${inside(level)}, between ${gap.between}, leaves ${lengthOf(gap.room)} of the ${lengthOf(needed)} needed.`
        : say`Between ${gap.between} there is ${gap.room < 0 ? say`no room` : say`${lengthOf(gap.room)}`}, and ${lengthOf(needed)} is needed. Move them apart, or put fewer or narrower goods here.`,
    worked: () => worked(gap, needed, rules),
    notes: () => {
      const needs = clearEntryNeeded(widths, rules.value[keys.upright], rules.value[keys.loads]);
      const row = say`Side by side these goods need a clear entry of ${lengthOf(needs)}; the bay has ${lengthOf(clearEntry)}.`;
      return [row, say`Clearance: ${sourceOf(rules, gap.rule)}. A fire code may ask for more.`];
    },
  });
}

function worked(gap: Gap, needed: number, rules: ResolvedRules): readonly WorkedStep[] {
  const room: WorkedStep = {
    what: `Room between ${gap.between}`,
    formula: 'c − l',
    values: [
      put('c', 'gap between the outlines at their foot', lengthOf(gap.room + gap.lean), 'goods and where they stand'),
      put('l', 'lean into the gap', lengthOf(gap.lean), 'goods'),
    ],
    result: { symbol: 'a', quantity: lengthOf(gap.room) },
    source: 'clearance holds for the real outline of the load',
  };
  if (!(gap.room > TOUCH)) return [room];
  return [
    room,
    {
      what: 'Needed over there',
      formula: 'c_needed / a',
      values: [ruleValue(rules, gap.rule, 'c_needed'), above('a', 'room between them', lengthOf(gap.room))],
      result: { symbol: 'r', quantity: { value: needed / gap.room, kind: 'ratio' } },
      source: sourceOf(rules, gap.rule),
    },
  ];
}
