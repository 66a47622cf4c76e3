/** Load notices, beam and frame ratings and floors as they stand in the file. */
import { choice, list, nullable, number, ownId, record, reference, text, type Field } from './fields';
import { LIMITS } from './limits';
import { aLength, aMass, aName, aRating, ascending, source } from './schema-goods';
import type { BeamType, Floor, FrameType, LoadNotice } from './site';

const maker = text(LIMITS.nameLength);
const stated = (unit: string, most: number): Field<number | null> => nullable(number({ unit, above: 0, most }), 'where it is not stated');
const lengthStated = stated('mm', LIMITS.lengthMm);
const ratingStated = nullable(aRating, 'where none is stated');
const stress = stated('N/mm²', LIMITS.stressNPerMm2);
const force = stated('N', LIMITS.forceN);

export const notice = record<LoadNotice>('load notice', {
  id: ownId('load notice'),
  name: aName,
  maker,
  issued: text(LIMITS.nameLength),
  levelKg: list('ratings', ratingStated, LIMITS.levelsInBay),
  unitLoadsPerLevel: nullable(number({ least: 1, most: LIMITS.goodsOnLevel, whole: true }), 'where it is not stated'),
  unitLoadKg: ratingStated,
  bayKg: ratingStated,
  frameKg: ratingStated,
  firstBeamMm: lengthStated,
  greatestGapMm: lengthStated,
  levels: nullable(number({ least: 1, most: LIMITS.levelsInBay, whole: true }), 'where it is not stated'),
  beamTypeId: nullable(reference('beam type'), 'where it is not stated'),
  source,
});

export const beamType = record<BeamType>(
  'beam type',
  {
    id: ownId('beam type'),
    name: aName,
    maker,
    heightMm: aLength,
    widthMm: aLength,
    massKgPerM: nullable(number({ unit: 'kg per m', least: 0, most: LIMITS.lineKgPerM })),
    connectorsKg: nullable(aMass),
    ratings: list('ratings', record('rating by span', { spanMm: aLength, pairKg: aRating }), LIMITS.rows),
    endKg: ratingStated,
    secondMomentMm4: stated('mm⁴', LIMITS.secondMomentMm4),
    sectionModulusMm3: stated('mm³', LIMITS.sectionModulusMm3),
    elasticModulusNPerMm2: stress,
    designStressNPerMm2: stress,
    connectorNmmPerRad: nullable(number({ unit: 'N·mm per rad', least: 0, most: LIMITS.stiffnessNmmPerRad })),
    source,
  },
  (value, reader) => ascending(value, 'ratings', 'spanMm', true, 'Ratings go from the shortest span to the longest', reader),
);

export const frameType = record<FrameType>(
  'frame type',
  {
    id: ownId('frame type'),
    name: aName,
    maker,
    depthMm: aLength,
    uprightWidthMm: aLength,
    massKg: nullable(aMass),
    tableBy: choice(['greatest-height', 'storey-height']),
    table: list('rows', record('row of the frame table', { heightMm: aLength, ratedKg: aRating }), LIMITS.rows),
    plateWidthMm: lengthStated,
    plateDepthMm: lengthStated,
    holePitchMm: lengthStated,
    source,
  },
  (value, reader) => ascending(value, 'table', 'heightMm', true, 'The frame table goes from the least height to the greatest', reader),
);

export const floor = record<Floor>('floor', {
  id: ownId('floor'),
  name: aName,
  kind: choice(['ground-slab', 'suspended', 'unknown']),
  legN: force,
  pressureNPerMm2: stress,
  legPairN: force,
  areaNPerMm2: stress,
  thicknessMm: lengthStated,
  source,
});
