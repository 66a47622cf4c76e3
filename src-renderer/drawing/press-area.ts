/** Where goods in the bay's drawing are pressed. Lengths in px, but for those of the goods. */
import type { Standing } from './snap';

/** What a finger needs. */
const LEAST = 24;

/**
 * Goods narrower than a finger are wide enough to press, but only half-way to the next: a press goes to what it points at.
 * @param others what else stands on the level; what stands in the same place is not heeded
 * @param rate px per mm
 * @returns from the left edge of the goods to that of the area, to the left, and the area's width
 */
export function pressAcross(
  goods: Standing,
  others: readonly Standing[],
  rate: number,
): { readonly before: number; readonly width: number } {
  const end = goods.at + goods.width;
  const left = Math.max(-Infinity, ...others.map((one) => one.at + one.width).filter((mm) => mm <= goods.at));
  const right = Math.min(Infinity, ...others.map((one) => one.at).filter((mm) => mm >= end));
  const wanted = Math.max(0, LEAST - goods.width * rate) / 2;
  const before = Math.min(wanted, ((goods.at - left) * rate) / 2);
  const after = Math.min(wanted, ((right - end) * rate) / 2);
  return { before, width: before + goods.width * rate + after };
}

/** Top and height of the area over goods of this height that stand at `bottom`. */
export const pressUp = (bottom: number, height: number): { readonly top: number; readonly height: number } => ({
  top: Math.min(bottom - height, bottom - LEAST),
  height: Math.max(LEAST, height),
});
