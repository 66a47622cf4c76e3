/** What the bays' own parts weigh and measure, and what to enter where that is not known. */
import type { Missing } from '../checks/finding';
import type { Frame, FrameType, LoadNotice } from '../site/site';
import type { BayWork, LevelWork } from './context';
import { frameTypesMissing } from './level-work';

/** A mass, or what is missing of it. Kg. */
export interface PartMass {
  /** 0 where it is not known, and then named in `missing`. */
  readonly kg: number;
  readonly missing: readonly Missing[];
}

const known = (kg: number): PartMass => ({ kg, missing: [] });

/** "level 2 of bay A1". */
export const levelOfBay = ({ bay }: BayWork, { index }: LevelWork): string => `level ${index + 1} of bay ${bay.name}`;

/** One beam of a level with its two connectors: its mass per metre over the clear entry. */
export function beamMass(bay: BayWork, work: LevelWork): PartMass {
  const { beamType, level } = work;
  if (beamType === null)
    return {
      kg: 0,
      missing: [
        {
          input: `beam type of ${levelOfBay(bay, work)}`,
          how: 'Choose the beam type, or add one with its mass, so that the beams’ own mass is counted.',
          field: `level:${level.id}:beamTypeId`,
        },
      ],
    };
  const missing: Missing[] = [];
  const lacks = (input: string, how: string, field: string) =>
    missing.push({ input: `${input} of ${beamType.name}`, how, field: `beamType:${beamType.id}:${field}` });
  if (beamType.massKgPerM === null) lacks('mass per metre', 'Weigh a beam, or take it from the maker’s sheet.', 'massKgPerM');
  if (beamType.connectorsKg === null)
    lacks(
      'mass of the end connectors',
      'Weigh a beam, or take it from the maker’s sheet; 0 if the mass per metre has them in.',
      'connectorsKg',
    );
  return { kg: ((beamType.massKgPerM ?? 0) * bay.bay.clearEntryMm) / 1000 + (beamType.connectorsKg ?? 0), missing };
}

/** Deck or support bars of a level. */
export function deckMass(bay: BayWork, work: LevelWork): PartMass {
  const { deck, id } = work.level;
  if (deck.kind === 'none') return known(0);
  if (deck.massKg !== null) return known(deck.massKg);
  return {
    kg: 0,
    missing: [
      {
        input: `mass of the ${deck.kind === 'support-bars' ? 'support bars' : 'deck'} on ${levelOfBay(bay, work)}`,
        how: 'Weigh one panel or bar and count them, or take it from the maker’s sheet.',
        field: `level:${id}:deck.massKg`,
      },
    ],
  };
}

/** The frame itself. */
export function frameMass(frame: Frame, type: FrameType | null): PartMass {
  if (type === null) return { kg: 0, missing: frameTypesMissing([{ frame, type }]) };
  if (type.massKg !== null) return known(type.massKg);
  return {
    kg: 0,
    missing: [
      {
        input: `mass of frame type ${type.name}`,
        how: 'Take it from the maker’s sheet, or weigh a spare frame.',
        field: `frameType:${type.id}:massKg`,
      },
    ],
  };
}

/** Depth of the bay's frames, outside to outside, mm; both must be known. */
export function frameDepths({ frames, frameTypes }: BayWork): {
  readonly shallower: number | null;
  readonly deeper: number | null;
  readonly missing: readonly Missing[];
} {
  const [left, right] = frameTypes;
  if (left === null || right === null)
    return {
      shallower: null,
      deeper: null,
      missing: frameTypesMissing([
        { frame: frames[0], type: left },
        { frame: frames[1], type: right },
      ]),
    };
  return { shallower: Math.min(left.depthMm, right.depthMm), deeper: Math.max(left.depthMm, right.depthMm), missing: [] };
}

/** Whether the origin of a rating is one that can be relied on: someone answers for it. */
export const originKnown = ({ source }: Pick<LoadNotice, 'source'>): boolean => source.kind !== 'unknown' && source.kind !== 'estimated';
