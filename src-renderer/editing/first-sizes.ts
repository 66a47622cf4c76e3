/**
 * Sizes proposed before anybody has stated any, in numbers that are round in the units of whoever
 * looks. Lengths in mm. Common practice, no source: clear entries of 2 700 mm and 96 in are usual.
 */
import { evenPlan, type BayPlan } from '../../src-core/site/new-site';
import type { UnitSystem } from '../../src-core/units/quantity';

export interface FirstSizes {
  readonly clearEntryMm: number;
  /** From the floor to the first beam, and from beam to beam. */
  readonly pitchMm: number;
  /** Heights of frames go in such steps. */
  readonly frameStepMm: number;
}

const SIZES: Readonly<Record<UnitSystem, FirstSizes>> = {
  metric: { clearEntryMm: 2700, pitchMm: 1500, frameStepMm: 100 },
  // 96 in, 60 in, 4 in.
  us: { clearEntryMm: 2438.4, pitchMm: 1524, frameStepMm: 101.6 },
};

export const firstSizes = (units: UnitSystem): FirstSizes => SIZES[units];

/** For the first bay of a run: everything that nobody has stated is not known. */
export const firstBay = (units: UnitSystem): BayPlan => {
  const { clearEntryMm, pitchMm, frameStepMm } = SIZES[units];
  return evenPlan({
    clearEntryMm,
    levels: 3,
    firstBeamMm: pitchMm,
    pitchMm,
    frameStepMm,
    noticeId: null,
    beamTypeId: null,
    frameTypeId: null,
  });
};
