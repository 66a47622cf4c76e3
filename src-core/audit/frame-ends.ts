/** Collects what hangs on an upright frame from the bays on both its sides. */
import type { Missing } from '../checks/finding';
import type { Legs } from '../checks/floor';
import { frameLevels, legsOf, type FrameBeamEnd, type FrameLevel } from '../checks/frame-loads';
import { distinctMissing } from '../checks/make-finding';
import { massWeighing } from '../units/quantity';
import type { BayWork, FrameWork, LevelWork, SiteContext } from './context';
import { beamMass, deckMass, frameMass, levelOfBay } from './parts';

export interface FrameContents {
  readonly levels: readonly FrameLevel[];
  /** Of the frame itself, kg; 0 where it is not known, and then named in `missing`. */
  readonly massKg: number;
  /** Masses and measures that are not known; whatever they belong to is left out of `levels`. */
  readonly missing: readonly Missing[];
  /** Of them, those of the goods and of the rack's own parts. */
  readonly goodsMissing: readonly Missing[];
  readonly ownMissing: readonly Missing[];
  /** Goods that cannot stand as they were entered. */
  readonly impossible: boolean;
}

type Side = 'left' | 'right';

export const nameOfFrame = ({ frame }: FrameWork): string => `frame ${frame.name}`;

/** The bays at a frame with the side on which each stands. */
export const baysOf = ({ left, right }: FrameWork): readonly { readonly side: Side; readonly bay: BayWork }[] => [
  ...(left === null ? [] : [{ side: 'left' as const, bay: left }]),
  ...(right === null ? [] : [{ side: 'right' as const, bay: right }]),
];

export function frameContents(context: SiteContext, work: FrameWork): FrameContents {
  const ends: FrameBeamEnd[] = [];
  const own = frameMass(work.frame, work.type);
  const ownMissing: Missing[] = [...own.missing];
  const goodsMissing: Missing[] = [];
  let impossible = false;
  for (const { side, bay } of baysOf(work))
    for (const level of bay.levels) {
      const beam = beamMass(bay, level);
      const deck = deckMass(bay, level);
      ownMissing.push(...beam.missing, ...deck.missing);
      goodsMissing.push(...level.missing);
      if (level.effects === null && level.missing.length === 0) impossible = true;
      ends.push(beamEnd(bay, level, side, beam.kg, deck.kg));
    }
  return {
    levels: frameLevels(ends, context.rules.value.levelMatch),
    massKg: own.kg,
    missing: distinctMissing([...goodsMissing, ...ownMissing]),
    goodsMissing: distinctMissing(goodsMissing),
    ownMissing: distinctMissing(ownMissing),
    impossible,
  };
}

/** The bay to the left of a frame rests on it with its right beam ends. */
function beamEnd(bay: BayWork, level: LevelWork, side: Side, beamKg: number, deckKg: number): FrameBeamEnd {
  const { effects } = level;
  const reaction = (beam: 'front' | 'rear') =>
    effects === null ? 0 : massWeighing(side === 'left' ? effects[beam].reactionRight : effects[beam].reactionLeft);
  return {
    name: levelOfBay(bay, level),
    side,
    height: level.level.heightMm,
    goodsFrontKg: reaction('front'),
    goodsRearKg: reaction('rear'),
    beamKg: beamKg / 2,
    deckKg: deckKg / 4,
  };
}

/** Goods that the bay on one side puts on the frame, kg. */
export const goodsOn = ({ levels }: FrameContents, side: Side): number =>
  levels.reduce((sum, { ends }) => ends.reduce((all, end) => (end.side === side ? all + end.goodsFrontKg + end.goodsRearKg : all), sum), 0);

/** The legs at the floor; null as soon as one mass is not known or goods cannot stand as they were entered. */
export const legsFor = ({ levels, massKg, missing, impossible }: FrameContents): Legs | null =>
  missing.length > 0 || impossible ? null : legsOf(levels, massKg);
