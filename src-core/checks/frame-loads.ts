/**
 * What an upright frame carries, storey by storey from the top down: the beam ends of both bays, the
 * beams' and decks' own mass, and the frame's own above the foot of each storey.
 */

/** One end of a level's two beams at this frame. Masses in kg on the front and the rear post. */
export interface FrameBeamEnd {
  /** "level 2 of bay A1". */
  readonly name: string;
  /** On which side of the frame the bay stands. */
  readonly side: 'left' | 'right';
  /** Floor to the top of the beams, mm. */
  readonly height: number;
  /** Goods and pallets, by the reactions of the two beams. */
  readonly goodsFrontKg: number;
  readonly goodsRearKg: number;
  /** Half of one beam, and a quarter of the deck: alike on both posts. */
  readonly beamKg: number;
  readonly deckKg: number;
}

/** Beam ends of both sides that count as one level of the frame. */
export interface FrameLevel {
  /** Of its ends, mm; they differ by no more than the rule set's tolerance. */
  readonly lowest: number;
  readonly highest: number;
  readonly ends: readonly FrameBeamEnd[];
}

export interface Storey {
  /** Floor or lower beams to upper beams, mm. */
  readonly from: number;
  readonly to: number;
  /** Unsupported height, mm: the greatest that can be read between its two levels. */
  readonly height: number;
  /** Carried in it, at its foot, kg. */
  readonly frontKg: number;
  readonly rearKg: number;
}

/** Groups beam ends into the frame's levels, from the lowest up. */
export function frameLevels(ends: readonly FrameBeamEnd[], tolerance: number): readonly FrameLevel[] {
  const sorted = [...ends].sort((a, b) => a.height - b.height);
  const levels: { lowest: number; highest: number; ends: FrameBeamEnd[] }[] = [];
  for (const end of sorted) {
    const last = levels.at(-1);
    // Two levels of one bay are two levels, however near.
    if (last !== undefined && end.height - last.lowest <= tolerance + 1e-6 && !last.ends.some(({ side }) => side === end.side)) {
      last.ends.push(end);
      last.highest = end.height;
    } else levels.push({ lowest: end.height, highest: end.height, ends: [end] });
  }
  return levels;
}

export const endFrontKg = ({ goodsFrontKg, beamKg, deckKg }: FrameBeamEnd): number => goodsFrontKg + beamKg + deckKg;
export const endRearKg = ({ goodsRearKg, beamKg, deckKg }: FrameBeamEnd): number => goodsRearKg + beamKg + deckKg;

/** Part of a frame's own mass that stands above a height. */
export const frameMassAbove = (massKg: number, frameHeight: number, height: number): number =>
  massKg * Math.max(0, Math.min(1, 1 - height / frameHeight));

/**
 * From the floor up; the last one ends at the topmost beams, above which the frame carries only itself.
 * A frame without beams has no storey.
 * @param massKg of the frame itself
 * @param frameHeight mm
 */
export function storeysOf(levels: readonly FrameLevel[], massKg: number, frameHeight: number): readonly Storey[] {
  const storeys: Storey[] = [];
  let front = 0;
  let rear = 0;
  for (let i = levels.length - 1; i >= 0; i--) {
    const level = levels[i] as FrameLevel;
    const below = levels[i - 1];
    const from = below?.highest ?? 0;
    for (const end of level.ends) {
      front += endFrontKg(end);
      rear += endRearKg(end);
    }
    const own = frameMassAbove(massKg, frameHeight, from) / 2;
    storeys.unshift({
      from,
      to: level.highest,
      height: level.highest - (below?.lowest ?? 0),
      frontKg: front + own,
      rearKg: rear + own,
    });
  }
  return storeys;
}

/** Total kg on the front and rear leg at the floor, the whole frame included. */
export function legsOf(levels: readonly FrameLevel[], massKg: number): { readonly frontKg: number; readonly rearKg: number } {
  const ends = levels.flatMap((level) => level.ends);
  return {
    frontKg: ends.reduce((sum, end) => sum + endFrontKg(end), 0) + massKg / 2,
    rearKg: ends.reduce((sum, end) => sum + endRearKg(end), 0) + massKg / 2,
  };
}
