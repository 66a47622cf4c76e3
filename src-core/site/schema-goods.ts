/** Pallets and unit loads as they stand in the file. What does not fit together in size is for the audit to find. */
import { choice, date, list, nullable, number, ownId, record, reference, report, text, variant, type Field, type Reader } from './fields';
import { LIMITS } from './limits';
import type { Answer, BearingShape, DepthShape, Pallet, Slope, Source, SteppedColumn, UnitLoad } from './site';

export const aLength = number({ unit: 'mm', above: 0, most: LIMITS.lengthMm });
export const aLengthOrZero = number({ unit: 'mm', least: 0, most: LIMITS.lengthMm });
/** Sign included: a position may be off either end, which is a finding and no fault of the file. */
export const aPosition = number({ unit: 'mm', most: LIMITS.lengthMm });
export const aMass = number({ unit: 'kg', least: 0, most: LIMITS.massKg });
/** A rating of nothing would be a blank taken for a number. */
export const aRating = number({ unit: 'kg', above: 0, most: LIMITS.massKg });
export const aName = text(LIMITS.nameLength, { visible: true });
export const someText = text(LIMITS.detailLength);
export const answer = choice<Answer>(['yes', 'no', 'unknown']);

const lineMass = number({ unit: 'kg per m', least: 0, most: LIMITS.lineKgPerM });
const density = number({ unit: 'kg per m³', above: 0, most: LIMITS.densityKgPerM3 });
const ratio = number({ least: 0, most: LIMITS.ratio });
const share = nullable(number({ least: 0, most: LIMITS.ratio }), 'where it is to be found by statics');

export const source = record<Source>('source', {
  kind: choice(['notice', 'maker', 'drawing', 'engineer', 'weighed', 'measured', 'declared', 'wms', 'estimated', 'unknown']),
  detail: someText,
  person: text(LIMITS.nameLength),
  date,
});

export const pallet = record<Pallet>('pallet', {
  id: ownId('pallet'),
  name: aName,
  lengthMm: aLength,
  widthMm: aLength,
  heightMm: aLength,
  massKg: nullable(aMass),
  boards: choice(['along-length', 'along-width', 'full', 'none']),
  runners: list('runners', record('runner', { centreMm: aLengthOrZero, widthMm: aLength }), LIMITS.rows),
  ratedKg: nullable(aRating),
  source,
});

// A column says its mass, or height and density; which of the two is told by its keys.
const columnByMass = record<Extract<SteppedColumn, { massKg: number }>>('column', { widthMm: aLength, massKg: aMass });
const columnByDensity = record<Extract<SteppedColumn, { heightMm: number }>>('column', {
  widthMm: aLength,
  heightMm: aLengthOrZero,
  densityKgPerM3: density,
});
const column: Field<SteppedColumn> = {
  expects: 'a column',
  read: (value, reader) =>
    (typeof value === 'object' && value !== null && 'massKg' in value ? columnByMass : columnByDensity).read(value, reader),
  canonical: (value) => ('massKg' in value ? columnByMass.canonical(value) : columnByDensity.canonical(value)),
};

const slope = variant<Slope, 'by'>('slope', 'by', {
  intensities: record('slope by intensities', { by: choice(['intensities']), leftKgPerM: lineMass, rightKgPerM: lineMass }),
  heights: record('slope by heights', { by: choice(['heights']), leftMm: aLengthOrZero, rightMm: aLengthOrZero }),
  ratio: record('slope by ratio', { by: choice(['ratio']), rightOverLeft: ratio }),
  'end-and-slope': record('slope by end and slope', {
    by: choice(['end-and-slope']),
    end: choice(['left', 'right']),
    endKgPerM: lineMass,
    changeKgPerM2: number({ unit: 'kg per m²', most: LIMITS.lineKgPerM }),
  }),
});

const bearing = variant<BearingShape, 'kind'>('bearing shape', 'kind', {
  even: record('even shape', { kind: choice(['even']) }),
  stepped: record('stepped shape', { kind: choice(['stepped']), columns: list('columns', column, LIMITS.rows, 1) }),
  sloped: record('sloped shape', { kind: choice(['sloped']), slope }),
  profile: record(
    'profile',
    {
      kind: choice(['profile']),
      points: list('points', record('point', { xMm: aLengthOrZero, heightMm: aLengthOrZero }), LIMITS.rows, 2),
      densityKgPerM3: nullable(density, 'where the mass is stated'),
    },
    (value, reader) => ascending(value, 'points', 'xMm', false, 'The points of a profile go from left to right', reader),
  ),
  bearers: record('shape on bearers', {
    kind: choice(['bearers']),
    bearers: list('bearers', record('bearer', { centreMm: aLengthOrZero, widthMm: aLength, share }), LIMITS.rows, 1),
  }),
  feet: record('shape on feet', {
    kind: choice(['feet']),
    feet: list('feet', record('foot', { xMm: aLengthOrZero, share }), LIMITS.rows, 1),
  }),
});

const across = variant<DepthShape, 'kind'>('depth shape', 'kind', {
  even: record('even depth', { kind: choice(['even']) }),
  stepped: record('stepped depth', {
    kind: choice(['stepped']),
    columns: list('columns', record('column across', { depthMm: aLength, massKg: aMass }), LIMITS.rows, 1),
  }),
  sloped: record('sloped depth', { kind: choice(['sloped']), rearOverFront: ratio }),
  centre: record('stated centre', { kind: choice(['centre']), towardsFrontMm: aPosition }),
});

export const unitLoad = record<UnitLoad>('unit load', {
  id: ownId('unit load'),
  name: aName,
  widthMm: aLength,
  depthMm: aLength,
  heightMm: aLength,
  goodsKg: nullable(aMass),
  massUncertaintyPercent: number({ unit: 'per cent', least: 0, most: 100 }),
  massSource: source,
  palletId: nullable(reference('pallet'), 'where there is none'),
  palletFace: choice(['width', 'length']),
  bearing,
  across,
  contact: choice(['flat', 'rims', 'wheels', 'feet', 'lying-round']),
  chocked: answer,
  leanMm: aPosition,
});

/** Tells of rows that are out of order. `strict` also tells of two alike. */
export function ascending(
  value: Readonly<Record<string, unknown>>,
  rows: string,
  key: string,
  strict: boolean,
  rule: string,
  reader: Reader,
): void {
  const entries = value[rows];
  if (!Array.isArray(entries)) return;
  for (let i = 1; i < entries.length; i++) {
    const before: unknown = (entries[i - 1] as Readonly<Record<string, unknown>> | null)?.[key];
    const here: unknown = (entries[i] as Readonly<Record<string, unknown>> | null)?.[key];
    if (typeof before !== 'number' || typeof here !== 'number' || (strict ? here > before : here >= before)) continue;
    const found = here === before ? `two have ${here}` : `${here} comes after ${before}`;
    report(reader, `${rule}, but ${found}. Put them in order or correct the number.`, rows, i, key);
  }
}
