/**
 * The greatest sagging moment and the greatest deflection of a beam under loads that act downwards.
 *
 * Under such loads the shear never rises from left to right, so the moment has one highest place, or one
 * level stretch. Where the moment sags the rotation falls, and it passes zero once, so there is one
 * greatest deflection, and it lies where the moment sags.
 */
import { zeroOfFallingRotation, zeroOfFallingShear } from './polynomial';
import type { Sections } from './sections';
import { deflectionIn, momentIn, rotationIn, type Segment } from './segment';

/** A place on the beam: a segment and the distance from its left end. */
interface At {
  readonly index: number;
  readonly s: number;
}

export interface Sagging {
  readonly moment: number;
  readonly from: number;
  readonly to: number;
  readonly at: At;
}

/**
 * Shear smaller than this part of what it is made of is rounding and counts as zero. Masses and places
 * reach the core with some roundings each; a real shear of this size changes the moment in its 14th digit.
 */
const SHEAR_ROUNDING = 64 * Number.EPSILON;

/** A level stretch shorter than this part of the span is reported as one place. */
const SHORTEST_STRETCH = 1e-9;

/** @param span mm; the segments fill it */
export function greatestSagging(segments: readonly Segment[], sections: Sections, span: number): Sagging {
  const last = segments.length - 1;
  /** L·V at a section, exactly zero where it cannot be told from zero. */
  const shear = (section: number): number => {
    const value = (sections.b[section] as number) - (sections.a[section] as number);
    return Math.abs(value) <= SHEAR_ROUNDING * (sections.size[section] as number) ? 0 : value;
  };
  let i = 0;
  while (i < last && shear(2 * i + 1) > 0) i++;
  const segment = segments[i] as Segment;
  const start = shear(2 * i);
  const end = shear(2 * i + 1);
  if (start > 0 && end < 0) {
    const s = zeroOfFallingShear(start / span, end / span, segment.wFrom, segment.wTo, segment.length);
    const place = segment.from + s;
    return { moment: Math.max(momentIn(segment, s), 0), from: place, to: place, at: { index: i, s } };
  }
  // At a breakpoint: where a point load takes the shear through zero, or where it has just become zero.
  const first = start > 0 ? Math.min(i + 1, last) : i;
  let next = first;
  while (next <= last && shear(2 * next) === 0 && shear(2 * next + 1) === 0) next++;
  const { from, moment } = segments[first] as Segment;
  const to = next > last ? span : (segments[next] as Segment).from;
  const level = to - from > SHORTEST_STRETCH * span;
  return { moment: Math.max(moment, 0), from, to: level ? to : from, at: { index: first, s: 0 } };
}

/**
 * Starts at the highest moment and walks towards the root of the rotation: on that way the rotation falls
 * or rises all along, even where an end is held and the rotation is zero there too. mm, down.
 */
export function greatestDeflection(segments: readonly Segment[], highest: At, rigidity: number): { sag: number; at: number } {
  let { index, s } = highest;
  const end = (i: number): number => (segments[i] as Segment).length;
  const rotation = rotationIn(segments[index] as Segment, s, rigidity);
  if (rotation > 0) {
    while (index < segments.length - 1 && (segments[index + 1] as Segment).rotation > 0) {
      index++;
      s = 0;
    }
  } else if (rotation < 0) {
    while (index > 0 && (segments[index] as Segment).rotation < 0) {
      index--;
      s = end(index);
    }
  }
  const segment = segments[index] as Segment;
  const { moment, shear, wFrom, wTo, length } = segment;
  const root =
    rotation === 0
      ? s
      : zeroOfFallingRotation(
          segment.rotation * rigidity,
          moment,
          shear,
          wFrom,
          (wTo - wFrom) / length,
          rotation > 0 ? s : 0,
          rotation > 0 ? length : s,
          s,
          Number.EPSILON * (segment.from + length),
        );
  return { sag: Math.max(deflectionIn(segment, root, rigidity), 0), at: segment.from + root };
}
