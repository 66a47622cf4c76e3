import { expect, test } from 'vitest';
import { entryText, formatExact, formatQuantity, formatText, formatValue, unitName, type Reading } from '../../../src-core/units/format';
import { forceOf, lengthOf, massOf, momentOf, quantity, ratioOf, UNIT_OF, type QuantityKind } from '../../../src-core/units/quantity';
import { say } from '../../../src-core/units/text';

const en: Reading = { units: 'metric', locale: 'en-GB' };
const us: Reading = { units: 'us', locale: 'en-US' };
const de: Reading = { units: 'metric', locale: 'de-DE' };
const fr: Reading = { units: 'metric', locale: 'fr-FR' };

/** Narrow no-break space between thousands, no-break space before the unit. */
const n = '\u202f';
const s = '\u00a0';

// What must be shown; the rule is in the file's head. Conversions by exact factors, checked by hand.
test.each<[number, QuantityKind, Reading, string]>([
  [2679, 'mass', en, `2${n}679${s}kg`],
  [1990, 'mass', en, `1${n}990${s}kg`],
  [2488.888_89, 'mass', en, `2${n}489${s}kg`],
  [833.333_33, 'mass', en, `833${s}kg`],
  [12.5, 'mass', en, `12.5${s}kg`],
  [12.345, 'mass', en, `12.3${s}kg`],
  [2687.5, 'length', en, `2${n}687.5${s}mm`],
  [1287.4615, 'length', en, `1${n}287${s}mm`],
  [12.431, 'length', en, `12.4${s}mm`],
  [9, 'length', en, `9${s}mm`],
  [13.5, 'length', en, `13.5${s}mm`],
  [9.996, 'length', en, `10.0${s}mm`],
  [999.96, 'length', en, `1${n}000${s}mm`],
  [-50, 'length', en, `−50${s}mm`],
  [0, 'length', en, `0${s}mm`],
  [-0, 'length', en, `0${s}mm`],
  [-1e-9, 'length', us, `0${s}in`],
  [12_000, 'force', en, `12${s}kN`],
  [12_345, 'force', en, `12.3${s}kN`],
  [50, 'force', en, `0.05${s}kN`],
  [4_119_000, 'force', en, `4${n}119${s}kN`],
  [3.648_48, 'lineLoad', en, `3.65${s}kN/m`],
  [0.45, 'lineMass', en, `450${s}kg/m`],
  [8_237_586, 'moment', en, `8.24${s}kN·m`],
  [880_000, 'massMoment', en, `880${s}kg·m`],
  [248.211, 'stress', en, `248${s}N/mm²`],
  [0.0005, 'areaMass', en, `500${s}kg/m²`],
  [5.1e-7, 'density', en, `510${s}kg/m³`],
  [10_000, 'area', en, `10${n}000${s}mm²`],
  [3_240_000, 'area', en, `3.24${s}m²`],
  [927_016, 'secondMoment', en, `92.7${s}cm⁴`],
  [15_432, 'sectionModulus', en, `15.4${s}cm³`],
  [194_673_360_000, 'rigidity', en, `195${s}kN·m²`],
  [50_000_000, 'stiffness', en, `50${s}kN·m/rad`],
  [0.026_18, 'angle', en, '1.50°'],
  [0.96, 'ratio', en, '0.96'],
  [0.959_92, 'ratio', en, '0.960'],
  [1.3043, 'ratio', en, '1.30'],
  [1, 'ratio', en, '1'],
  [200, 'ratio', en, '200'],
  [96, 'percent', en, `96${s}%`],
  [3, 'count', en, '3'],
  // United States: commas, pounds and inches
  [997.903_214, 'mass', us, `2,200${s}lb`],
  [1000, 'mass', us, `2,205${s}lb`],
  [2438.4, 'length', us, `96${s}in`],
  [2700, 'length', us, `106.3${s}in`],
  [165.1, 'length', us, `6.5${s}in`],
  [76.2, 'length', us, `3${s}in`],
  [160.3375, 'length', us, `6.31${s}in`],
  [1556.877_565, 'force', us, `350${s}lbf`],
  [3.648_475_734_3, 'lineLoad', us, `250${s}lbf/ft`],
  [1_355_817.948, 'moment', us, `1,000${s}lbf·ft`],
  [13_825.495_437_6, 'massMoment', us, `100${s}lb·ft`],
  [248.211_262_554, 'stress', us, `36,000${s}psi`],
  [0.001_220_606_909_1, 'areaMass', us, `250${s}psf`],
  [10_322.56, 'area', us, `16${s}in²`],
  [9_290_304, 'area', us, `100${s}ft²`],
  // other locales keep their own separators
  [1990, 'mass', de, `1.990${s}kg`],
  [12.5, 'mass', de, `12,5${s}kg`],
  [1990, 'mass', fr, `1${n}990${s}kg`],
  [12.5, 'mass', fr, `12,5${s}kg`],
])('%d as %s is shown as it should be', (value, kind, reading, shown) => {
  expect(formatQuantity({ value, kind }, reading)).toBe(shown);
});

test('number and unit come apart for tables', () => {
  expect(formatValue(massOf(1990), en)).toEqual({ number: `1${n}990`, unit: 'kg' });
  expect(formatValue(ratioOf(0.5), en)).toEqual({ number: '0.5', unit: '' });
});

test('the exact value shows every digit', () => {
  expect(formatExact(massOf(2488.888_888_888_9), en)).toBe(`2${n}488.8888888889${s}kg`);
  expect(formatExact(lengthOf(2700), us)).toBe(`106.299212598425${s}in`);
  expect(formatExact(forceOf(12_345.678), en)).toBe(`12.345678${s}kN`);
});

test('a sentence reads in the units of whoever looks', () => {
  const text = say`Level 2 carries ${massOf(1990)}, bending ${momentOf(8_000_000)}.`;
  expect(formatText(text, en)).toBe(`Level 2 carries 1${n}990${s}kg, bending 8${s}kN·m.`);
  expect(formatText(text, us)).toBe(`Level 2 carries 4,387${s}lb, bending 5,900${s}lbf·ft.`);
});

test('what cannot be reached is infinite, and NaN is a fault', () => {
  expect(formatQuantity(ratioOf(Infinity), en)).toBe('∞');
  expect(formatQuantity(massOf(-Infinity), en)).toBe(`−∞${s}kg`);
  expect(() => formatQuantity(massOf(Number.NaN), en)).toThrow(RangeError);
});

test('a locale that is not known shows numbers as metric English does', () => {
  for (const locale of ['', 'xx-invalid-locale-tag-!', '???'])
    expect(formatQuantity(massOf(1990.5), { units: 'metric', locale })).toMatch(/^1.990\.5\u00a0kg$/);
});

test('every kind of quantity can be shown and named in both systems', () => {
  for (const kind of Object.keys(UNIT_OF) as QuantityKind[])
    for (const reading of [en, us]) {
      expect(formatQuantity(quantity(kind, 1234), reading)).toMatch(/\d/);
      expect(unitName(kind, reading)).toBe(formatValue(quantity(kind, 1), reading).unit);
    }
});

test('a field shows the number without grouping', () => {
  expect(entryText(2700, 'length', en)).toBe('2700');
  expect(entryText(2700, 'length', us)).toBe('106.299');
  expect(entryText(2705.1, 'length', us)).toBe('106.5');
  expect(entryText(1250.5, 'mass', de)).toBe('1250,5');
  expect(entryText(12.345, 'length', en)).toBe('12.3450');
});

test('in a field inches go to 0.001 and pounds to 0.1, unless finer was stated, and something is never shown as nothing', () => {
  const inch = 25.4;
  const pound = 0.45359237;
  expect(entryText(4500, 'length', us)).toBe('177.165');
  expect(entryText(1166, 'length', us)).toBe('45.906');
  expect(entryText(2, 'length', us)).toBe('0.079');
  expect(entryText(0.001, 'length', us)).toBe('0.00004');
  expect(entryText(0.0625 * inch, 'length', us)).toBe('0.0625');
  expect(entryText(96 * inch, 'length', us)).toBe('96');
  expect(entryText(1000, 'mass', us)).toBe('2204.6');
  expect(entryText(0.01, 'mass', us)).toBe('0.02');
  expect(entryText(2200.25 * pound, 'mass', us)).toBe('2200.25');
});
