/** Room between goods that stand back to back in two runs, and whether they could push each other through. */
import { lengthOf, ratioOf } from '../units/quantity';
import { type Handling } from './clearance-along';
import { say, type Finding, type Missing, type Place, type Text, type WorkedStep } from './finding';
import { finding, notAssessable, utilisationOf } from './make-finding';
import { inside } from './phrase';
import { TOUCH } from './placement';
import { ruleQuantity, ruleValue, sourceOf, type ResolvedRules } from './rule-sets';
import { above, put } from './worked-values';

/** Goods seen from behind. Lengths in mm. */
export interface BackOfGoods {
  readonly placementId: string;
  readonly name: string;
  /** Floor to foot and to top. */
  readonly bottom: number;
  readonly top: number;
  /** Along the bay in front, from its left upright. */
  readonly from: number;
  readonly to: number;
  /** How far they reach past the rear face of their own frame, lean included; negative where they stand inside it. */
  readonly past: number;
}

export interface ClearanceAcrossInput {
  readonly place: Place;
  readonly level: string;
  readonly goods: readonly BackOfGoods[];
  /** Null where nothing stands behind this run. */
  readonly behind: {
    readonly run: string;
    /** Free gap from frame to frame, mm. */
    readonly gap: number;
    readonly goods: readonly BackOfGoods[];
  } | null;
  readonly handling: Handling;
  /** What is needed to know where the goods end: frame types. */
  readonly missing: readonly Missing[];
  readonly rules: ResolvedRules;
}

export function clearanceAcross(input: ClearanceAcrossInput): Finding {
  const { place, level, goods, behind, handling, missing, rules } = input;
  const within = (says: () => Text): Finding => finding({ check: 'clearance-across', place, verdict: 'within', says });
  if (behind === null) return within(() => say`Nothing stands behind this run.`);
  if (goods.length === 0) return within(() => say`No goods stand on ${inside(level)}.`);
  const lacking = [...missing, ...(handling.loadedBy === 'unknown' ? [handling.missing] : [])];
  if (lacking.length > 0) return notAssessable('clearance-across', place, lacking);
  const tightest = tightestPair(goods, behind.goods, behind.gap);
  if (tightest === null) return within(() => say`No goods of run ${behind.run} stand behind those on ${inside(level)}.`);
  const { front, rear, room } = tightest;
  const byHand = handling.loadedBy === 'by-hand';
  const needed = byHand ? 0 : rules.value.clearanceBackToBack;
  const met = room >= needed - TOUCH;
  const used = utilisationOf(needed, Math.max(0, room));
  const pushes = room < rules.value.pushThroughGap - TOUCH;
  return finding({
    check: 'clearance-across',
    place: { ...place, placementId: front.placementId },
    verdict: met ? 'within' : room < -TOUCH ? 'not-possible' : 'over',
    utilisation: met ? Math.min(1, used) : used,
    demand: lengthOf(needed),
    allowed: lengthOf(room),
    says: () => {
      const pair = say`Between ${front.name} on ${inside(level)} and ${rear.name} in run ${behind.run} behind it`;
      if (met) return say`${pair} there is ${lengthOf(room)} of the ${lengthOf(needed)} needed.`;
      if (room < -TOUCH)
        return say`${front.name} on ${inside(level)} and ${rear.name} in run ${behind.run} stand in each other by ${lengthOf(-room)}. Move them to the front.`;
      return say`${pair} there is ${lengthOf(room)}, and ${lengthOf(needed)} is needed. Move them towards their aisles, or widen the gap between the runs.`;
    },
    worked: () => worked(front, rear, behind.gap, room, needed, rules),
    notes: () => [
      ...(pushes
        ? [
            say`Below ${ruleQuantity(rules, 'pushThroughGap')} a push-through stop is needed, so that goods put away here push none out behind (${sourceOf(rules, 'pushThroughGap')}).`,
          ]
        : []),
      byHand
        ? say`Put away by hand: no truck’s clearance is needed.`
        : say`Clearance: ${sourceOf(rules, 'clearanceBackToBack')}. Flue spaces of a fire code may be larger and govern.`,
    ],
  });
}

interface Pair {
  readonly front: BackOfGoods;
  readonly rear: BackOfGoods;
  readonly room: number;
}

/** Of goods that stand behind each other in height and along the bay. */
function tightestPair(goods: readonly BackOfGoods[], behind: readonly BackOfGoods[], gap: number): Pair | null {
  let tightest: Pair | null = null;
  for (const front of goods)
    for (const rear of behind) {
      const meets =
        Math.min(front.top, rear.top) - Math.max(front.bottom, rear.bottom) > TOUCH &&
        Math.min(front.to, rear.to) - Math.max(front.from, rear.from) > TOUCH;
      const room = gap - front.past - rear.past;
      if (meets && (tightest === null || room < tightest.room)) tightest = { front, rear, room };
    }
  return tightest;
}

function worked(
  front: BackOfGoods,
  rear: BackOfGoods,
  gap: number,
  room: number,
  needed: number,
  rules: ResolvedRules,
): readonly WorkedStep[] {
  const left: WorkedStep = {
    what: 'Room between the goods',
    formula: 'b − o1 − o2',
    values: [
      put('b', 'gap between the frames of the two runs', lengthOf(gap), 'run'),
      put('o1', `overhang of ${front.name} past its frame, lean included`, lengthOf(front.past), 'goods and where they stand'),
      put('o2', `overhang of ${rear.name} past its frame, lean included`, lengthOf(rear.past), 'goods and where they stand'),
    ],
    result: { symbol: 'a', quantity: lengthOf(room) },
    source: 'clearance holds for the real outline of the load',
  };
  if (!(room > TOUCH) || needed === 0) return [left];
  return [
    left,
    {
      what: 'Needed over there',
      formula: 'c_needed / a',
      values: [ruleValue(rules, 'clearanceBackToBack', 'c_needed'), above('a', 'room between the goods', lengthOf(room))],
      result: { symbol: 'r', quantity: ratioOf(needed / room) },
      source: sourceOf(rules, 'clearanceBackToBack'),
    },
  ];
}
