/** Room between the goods and the beam above them, as it sags under its own load. */
import { lengthOf, ratioOf } from '../units/quantity';
import { withoutClearances, type Handling } from './clearance-along';
import { clearanceKeys } from './clearance-rules';
import { say, type Finding, type Missing, type Place, type WorkedStep } from './finding';
import { finding, notAssessable, utilisationOf } from './make-finding';
import { inside } from './phrase';
import { TOUCH } from './placement';
import { ruleValue, sourceOf, type ResolvedRules, type RuleKey } from './rule-sets';
import { above, put } from './worked-values';

export interface BeamAbove {
  /** "level 2". */
  readonly level: string;
  /** Floor to its top, mm. */
  readonly top: number;
  /** Height of the beam, mm; null = not known. */
  readonly beamHeight: number | null;
  readonly missing: readonly Missing[];
  /** How far it hangs through under its own goods, mm. */
  readonly sag: number;
  /** "computed from the goods on it", "its limit, span over 200". */
  readonly sagFrom: string;
}

export interface ClearanceAboveInput {
  readonly place: Place;
  readonly level: string;
  /** Floor to the top of the beams on which the goods stand, mm; 0 for the floor. */
  readonly height: number;
  readonly goods: readonly { readonly placementId: string; readonly name: string; readonly height: number }[];
  /** Null where nothing is above. */
  readonly beam: BeamAbove | null;
  readonly handling: Handling;
  readonly rules: ResolvedRules;
}

/** One finding for each unit load that stands too high; else one for the tallest. */
export function clearanceAbove(input: ClearanceAboveInput): readonly Finding[] {
  const { place, level, goods, beam, handling, height, rules } = input;
  const within = (says: () => Finding['says']): readonly Finding[] => [
    finding({ check: 'clearance-above', place, verdict: 'within', says }),
  ];
  if (goods.length === 0) return within(() => say`No goods stand on ${inside(level)}.`);
  if (beam === null) return within(() => say`No beam is above ${inside(level)}. Roof, lights and sprinklers are not part of this check.`);
  const { beamHeight } = beam;
  const keys = clearanceKeys(handling.loadedBy, height);
  const byHand = handling.loadedBy === 'by-hand';
  const missing = [
    ...(beamHeight === null ? beam.missing : []),
    ...(keys === null && !byHand ? [withoutClearances(handling, height)] : []),
  ];
  if (beamHeight === null || missing.length > 0) return [notAssessable('clearance-above', place, missing)];
  const rule = keys?.above ?? null;
  const most = beam.top - beamHeight - height - beam.sag - (rule === null ? 0 : rules.value[rule]);
  const tall = goods.filter((one) => one.height > most + TOUCH);
  if (tall.length > 0) return tall.map((one) => judge(input, one, beam, beamHeight, rule));
  const tallest = goods.reduce((highest, one) => (one.height > highest.height ? one : highest));
  return [judge(input, tallest, beam, beamHeight, rule)];
}

/** @param rule null for goods put away by hand, which only have to fit */
function judge(
  { place, level, height, rules }: ClearanceAboveInput,
  goods: ClearanceAboveInput['goods'][number],
  beam: BeamAbove,
  beamHeight: number,
  rule: RuleKey | null,
): Finding {
  const needed = rule === null ? 0 : rules.value[rule];
  const opening = beam.top - beamHeight - height;
  const room = opening - beam.sag - goods.height;
  const met = room >= needed - TOUCH;
  const fits = goods.height <= opening + TOUCH;
  const used = utilisationOf(needed, Math.max(0, room));
  return finding({
    check: 'clearance-above',
    place: { ...place, placementId: goods.placementId },
    verdict: met ? 'within' : fits ? 'over' : 'not-possible',
    utilisation: met ? Math.min(1, used) : used,
    demand: lengthOf(needed),
    allowed: lengthOf(room),
    says: () =>
      met
        ? say`The tallest goods on ${inside(level)}, ${goods.name}, leave ${lengthOf(room)} under the beam of ${beam.level} as it sags; ${lengthOf(needed)} is needed.`
        : fits
          ? say`${goods.name} leaves ${room < 0 ? say`no room` : say`${lengthOf(room)}`} under the beam of ${beam.level} as it sags, and ${lengthOf(needed)} is needed. Stack it lower by ${lengthOf(needed - room)}, or put it where there is more height.`
          : say`${goods.name} is ${lengthOf(goods.height)} high and the opening under the beam of ${beam.level} only ${lengthOf(opening)}: it cannot stand here.`,
    worked: () => worked({ height, beam, beamHeight, goods, rule, room, needed, rules }),
    notes: () => [
      say`The beam above is taken to hang through by ${lengthOf(beam.sag)}: ${beam.sagFrom}. Decks lying on top of beams are not taken off; measure the height above the deck.`,
      ...(rule === null
        ? [say`Put away by hand: no truck’s clearance is needed.`]
        : [say`Clearance: ${sourceOf(rules, rule)}. A fire code may ask for more.`]),
    ],
  });
}

interface Worked {
  readonly height: number;
  readonly beam: BeamAbove;
  readonly beamHeight: number;
  readonly goods: { readonly name: string; readonly height: number };
  readonly rule: RuleKey | null;
  readonly room: number;
  readonly needed: number;
  readonly rules: ResolvedRules;
}

function worked({ height, beam, beamHeight, goods, rule, room, needed, rules }: Worked): readonly WorkedStep[] {
  const left: WorkedStep = {
    what: `Room above ${goods.name}`,
    formula: 'h_above − h_beam − d − h_level − h',
    values: [
      put('h_above', `top of the beam of ${beam.level}`, lengthOf(beam.top), 'bay'),
      put('h_beam', 'its height', lengthOf(beamHeight), 'beam type'),
      put('d', 'its sag', lengthOf(beam.sag), beam.sagFrom),
      put('h_level', 'top of the beams under the goods', lengthOf(height), 'bay'),
      put('h', `height of ${goods.name}`, lengthOf(goods.height), 'goods'),
    ],
    result: { symbol: 'a', quantity: lengthOf(room) },
    source: 'the beam above is taken as it hangs',
  };
  if (rule === null || !(room > TOUCH)) return [left];
  return [
    left,
    {
      what: 'Needed over there',
      formula: 'c_needed / a',
      values: [ruleValue(rules, rule, 'c_needed'), above('a', 'room above the goods', lengthOf(room))],
      result: { symbol: 'r', quantity: ratioOf(needed / room) },
      source: sourceOf(rules, rule),
    },
  ];
}
