/** Do the goods stand on the level: inside its ends and clear of each other. */
import { lengthOf } from '../units/quantity';
import { say, type Finding, type Place } from './finding';
import { finding } from './make-finding';
import { inside } from './phrase';

/** Outline of goods as they stand, mm: x from the left upright's face, depth in front of the middle of the beams. */
export interface Outline {
  readonly placementId: string;
  readonly name: string;
  readonly from: number;
  readonly to: number;
  readonly rear: number;
  readonly front: number;
}

export interface PlacementInput {
  readonly place: Place;
  /** "Level 2", "The floor of bay 3". */
  readonly level: string;
  /** Free width between the uprights, mm. */
  readonly clearEntry: number;
  readonly goods: readonly Outline[];
}

/** Goods that touch are apart; this is the rounding of entered positions, mm. */
export const TOUCH = 1e-6;

/** One finding for each fault, or one that says there is none. */
export function placement(input: PlacementInput): readonly Finding[] {
  const { place, level, clearEntry, goods } = input;
  const faults: Finding[] = [];
  const fault = (placementId: string, says: () => ReturnType<typeof say>) =>
    faults.push(finding({ check: 'placement', place: { ...place, placementId }, verdict: 'not-possible', says }));

  for (const { placementId, name, from, to } of goods) {
    if (from < -TOUCH)
      fault(placementId, () => say`${name} reaches ${lengthOf(-from)} past the left end of ${inside(level)}. Move it to the right.`);
    if (to > clearEntry + TOUCH)
      fault(
        placementId,
        () => say`${name} reaches ${lengthOf(to - clearEntry)} past the right end of ${inside(level)}. Move it to the left.`,
      );
  }
  for (const [left, right] of overlapping(goods)) {
    const along = Math.min(left.to, right.to) - right.from;
    fault(right.placementId, () => say`${left.name} and ${right.name} stand in each other by ${lengthOf(along)}. Move one of them.`);
  }
  if (faults.length > 0) return faults;
  const says = () =>
    goods.length === 0 ? say`${level} is empty.` : say`Everything on ${inside(level)} stands inside its ends and clear of its neighbours.`;
  return [finding({ check: 'placement', place, verdict: 'within', says })];
}

/** Pairs that overlap along the bay and across the rack, from left to right. */
function overlapping(goods: readonly Outline[]): readonly (readonly [Outline, Outline])[] {
  const sorted = [...goods].sort((a, b) => a.from - b.from);
  const pairs: [Outline, Outline][] = [];
  sorted.forEach((left, i) => {
    for (let j = i + 1; j < sorted.length; j++) {
      const right = sorted[j];
      if (right === undefined || right.from >= left.to - TOUCH) break;
      if (Math.min(left.front, right.front) - Math.max(left.rear, right.rear) > TOUCH) pairs.push([left, right]);
    }
  });
  return pairs;
}
