/**
 * What people type, and what must come of it. Values are exact products of the typed decimal and the
 * factor of its unit (NIST SP 811, Appendix B), rounded once to a double; computed with Python's
 * fractions module. Words of the refusals are our own.
 */
import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { readEntry } from '../../../src-core/units/entry';
import { entryText, type Reading } from '../../../src-core/units/format';
import { UNIT_OF, type QuantityKind } from '../../../src-core/units/quantity';

const en: Reading = { units: 'metric', locale: 'en-GB' };
const us: Reading = { units: 'us', locale: 'en-US' };
const de: Reading = { units: 'metric', locale: 'de-DE' };
const deUs: Reading = { units: 'us', locale: 'de-DE' };
const fr: Reading = { units: 'metric', locale: 'fr-FR' };
const swiss: Reading = { units: 'metric', locale: 'de-CH' };
const nowhere: Reading = { units: 'metric', locale: '' };

type Row<Expected> = readonly [reading: Reading, kind: QuantityKind, text: string, expected: Expected];

const good: readonly Row<number>[] = [
  // bare numbers take the field's unit
  [en, 'mass', '950', 950],
  [en, 'mass', '0', 0],
  [en, 'mass', '  950  ', 950],
  [en, 'mass', '007', 7],
  [en, 'length', '2700', 2700],
  [us, 'mass', '1', 0.45359237],
  [us, 'length', '96', 2438.4],
  [us, 'length', '106.5', 2705.1],
  [us, 'force', '350', 1556.877565341175],
  [en, 'force', '12', 12_000],
  [us, 'moment', '1000', 1_355_817.948_331_400_3],
  [en, 'moment', '2.5', 2_500_000],
  [en, 'ratio', '0.9', 0.9],
  [en, 'percent', '5', 5],
  [en, 'count', '3', 3],
  [de, 'ratio', '0,4', 0.4],
  // units of mass
  [en, 'mass', '950 kg', 950],
  [en, 'mass', '950kg', 950],
  [en, 'mass', '950 KG', 950],
  [en, 'mass', '950 kgs', 950],
  [en, 'mass', '950 kg.', 950],
  [en, 'mass', '950 kilograms', 950],
  [en, 'mass', '1.2 t', 1200],
  [us, 'mass', '1.2 t', 1200],
  [en, 'mass', '1.2t', 1200],
  [en, 'mass', '2 tonnes', 2000],
  [en, 'mass', '500 g', 0.5],
  [en, 'mass', '2 short tons', 1814.369_48],
  [en, 'mass', '1 long ton', 1016.046_908_8],
  [us, 'mass', '2,200 lb', 997.903_214],
  [en, 'mass', '2,200 lb', 997.903_214],
  [us, 'mass', '2200 lbs', 997.903_214],
  [us, 'mass', '2200 pounds', 997.903_214],
  [us, 'mass', '2,200.5 lb', 998.130_010_185],
  [us, 'mass', '4,400', 1995.806_428],
  [us, 'mass', '1/2 lb', 0.226_796_185],
  [us, 'mass', '5 lb 8 oz', 2.494_758_035],
  [us, 'mass', '1 oz', 0.028_349_523_125],
  // units of length
  [en, 'length', '2700 mm', 2700],
  [en, 'length', '2700mm', 2700],
  [en, 'length', '270 cm', 2700],
  [en, 'length', '2.7 m', 2700],
  [en, 'length', '2.7 metres', 2700],
  [en, 'length', '1.234 m', 1234],
  [en, 'length', '96 in', 2438.4],
  [en, 'length', '106.5 in', 2705.1],
  [us, 'length', '96 inches', 2438.4],
  [us, 'length', '96"', 2438.4],
  [us, 'length', '96″', 2438.4],
  [us, 'length', '96 in.', 2438.4],
  [us, 'length', '1 ft', 304.8],
  [us, 'length', "1'", 304.8],
  [us, 'length', '1 foot', 304.8],
  [us, 'length', '3.5 ft', 1066.8],
  [us, 'length', '3 ft 6 in', 1066.8],
  [en, 'length', '3 ft 6 in', 1066.8],
  [us, 'length', '3ft6in', 1066.8],
  [us, 'length', '3 feet 6 inches', 1066.8],
  [us, 'length', '3\' 6"', 1066.8],
  [us, 'length', '3’ 6”', 1066.8],
  [us, 'length', "3' 6''", 1066.8],
  [us, 'length', '3\'-6"', 1066.8],
  [us, 'length', '3′6″', 1066.8],
  [us, 'length', '8 ft 10', 2692.4],
  [us, 'length', '8\' 10 1/2"', 2705.1],
  [us, 'length', '8 ft 10½ in', 2705.1],
  [us, 'length', '6 1/2 in', 165.1],
  [us, 'length', '6-1/2 in', 165.1],
  [us, 'length', '6½"', 165.1],
  [us, 'length', '6 ½"', 165.1],
  [us, 'length', '6 1/2', 165.1],
  [us, 'length', '6 5/16 in', 160.3375],
  [us, 'length', '3/4 in', 19.05],
  [us, 'length', '¾"', 19.05],
  [us, 'length', '1/64 in', 0.396_875],
  [us, 'length', '0 ft 6 in', 152.4],
  // thousands and decimals as each locale has them
  [en, 'mass', '1 250', 1250],
  [en, 'mass', '1\u202f250', 1250],
  [en, 'mass', '1\u00a0250', 1250],
  [en, 'mass', '1,250', 1250],
  [en, 'mass', '1,250.5 kg', 1250.5],
  [en, 'mass', '1 250.5', 1250.5],
  [en, 'mass', '12,345,678', 12_345_678],
  [en, 'mass', '.5', 0.5],
  [en, 'mass', '0.5', 0.5],
  [en, 'mass', '1.2340', 1.234],
  [en, 'mass', '1.234 t', 1234],
  [de, 'mass', '1,2 t', 1200],
  [de, 'mass', '1,234 t', 1234],
  [de, 'mass', '1.250', 1250],
  [de, 'mass', '1.250,5', 1250.5],
  [de, 'mass', '1 250,5', 1250.5],
  [de, 'mass', '12.345.678', 12_345_678],
  [de, 'mass', '0,5', 0.5],
  [de, 'mass', ',5', 0.5],
  [de, 'mass', '2.200 lb', 997.903_214],
  [de, 'length', '2,7 m', 2700],
  [de, 'length', '2700,5', 2700.5],
  [deUs, 'length', '106,5', 2705.1],
  [deUs, 'length', '3 ft 6,5 in', 1079.5],
  [fr, 'mass', '1,2 t', 1200],
  [fr, 'mass', '1 250', 1250],
  [fr, 'mass', '1\u202f250,5', 1250.5],
  [fr, 'mass', '12 345 678', 12_345_678],
  [fr, 'length', '2,75 m', 2750],
  [swiss, 'mass', '1’250.5', 1250.5],
  [swiss, 'mass', "1'250", 1250],
  [nowhere, 'mass', '1250', 1250],
  [nowhere, 'mass', '1.5', 1.5],
  [nowhere, 'mass', '1,5', 1.5],
  [nowhere, 'mass', '1,234.5', 1234.5],
  [nowhere, 'mass', '1.234,5', 1234.5],
  [nowhere, 'mass', '1.2340', 1.234],
  // signs; whether a negative number may stand there is the field's to say
  [en, 'length', '-50', -50],
  [en, 'length', '−50 mm', -50],
  [en, 'length', '- 50', -50],
  [en, 'length', '+50', 50],
  [en, 'length', '-0', 0],
  [us, 'length', '-3 ft 6 in', -1066.8],
  // other kinds
  [en, 'force', '12 kN', 12_000],
  [en, 'force', '12000 N', 12_000],
  [en, 'force', '2 kips', 8896.443_230_521],
  [en, 'force', '100 kgf', 980.665],
  [en, 'force', '10 daN', 100],
  [en, 'lineLoad', '3 kN/m', 3],
  [us, 'lineLoad', '250 lbf/ft', 3.648_475_734_301_591],
  [us, 'lineLoad', '250 plf', 3.648_475_734_301_591],
  [en, 'lineMass', '650 kg/m', 0.65],
  [en, 'lineMass', '650 kg per m', 0.65],
  [us, 'lineMass', '100 lb/ft', 0.148_816_394_356_955_37],
  [en, 'moment', '10 kN·m', 10_000_000],
  [en, 'moment', '10 kNm', 10_000_000],
  [en, 'moment', '10 kN*m', 10_000_000],
  [us, 'moment', '2 kip·ft', 2_711_635.896_662_800_6],
  [en, 'massMoment', '880 kg·m', 880_000],
  [us, 'massMoment', '100 lb·ft', 13_825.495_437_6],
  [en, 'stress', '235 N/mm²', 235],
  [en, 'stress', '235 MPa', 235],
  [en, 'stress', '235 n/mm2', 235],
  [en, 'stress', '7.5 kN/m²', 0.0075],
  [us, 'stress', '36,000 psi', 248.211_262_554_061],
  [us, 'stress', '50 ksi', 344.737_864_658_418_06],
  [us, 'stress', '250 psf', 0.011_970_064_745_083_96],
  [us, 'areaMass', '250 psf', 0.001_220_606_909_095_762_6],
  [en, 'areaMass', '500 kg/m²', 0.0005],
  [en, 'density', '510 kg/m³', 5.1e-7],
  [us, 'density', '40 lb/ft³', 6.407_385_349_584_056e-7],
  [en, 'area', '100 cm²', 10_000],
  [us, 'area', '16 in²', 10_322.56],
  [us, 'area', '100 sq ft', 9_290_304],
  [en, 'secondMoment', '92.7 cm⁴', 927_000],
  [en, 'secondMoment', '927016 mm⁴', 927_016],
  [us, 'secondMoment', '2.23 in^4', 928_196.079_088],
  [us, 'sectionModulus', '1.4', 22_941.8896],
  [us, 'rigidity', '60000', 172_188_879_438.087_86],
  [us, 'stiffness', '500', 56_492_414.513_808_35],
  [en, 'stiffness', '50 kN·m/rad', 50_000_000],
  [en, 'angle', '1.5 °', 0.026_179_938_779_914_945],
  [en, 'ratio', '90 %', 0.9],
  [en, 'percent', '5 %', 5],
];

const bad: readonly Row<RegExp>[] = [
  // two readings
  [en, 'mass', '1,234 t', /“1,234” can be read as 1\.234 or as 1234\. Type the one that is meant\./],
  [de, 'mass', '1.234 t', /“1\.234” can be read as 1,234 or as 1234/],
  [en, 'length', '2,700 m', /can be read as 2\.700 or as 2700/],
  [de, 'length', '2.700 m', /can be read as 2,700 or as 2700/],
  [en, 'force', '1,234', /can be read as 1\.234 or as 1234/],
  [en, 'length', '2.700', /“2\.700” can be read as 2\.7000 or as 2700/],
  [de, 'length', '2,700 mm', /“2,700” can be read as 2,7000 or as 2700/],
  [fr, 'mass', '1.234', /can be read as 1,2340 or as 1234/],
  [nowhere, 'mass', '1,234', /can be read as 1\.2340 or as 1234/],
  [nowhere, 'mass', '1.234', /can be read as 1\.2340 or as 1234/],
  [en, 'mass', '2 ton', /may be tonnes \(1000 kg\), short tons \(2000 lb\) or long tons \(2240 lb\)\. Type t, short ton or long ton/],
  [us, 'mass', '2 tons', /short tons \(2000 lb\)/],
  // signs that the locale does not have
  [en, 'mass', '1,2 t', /In English numbers the decimal sign is a point\. Type 1\.2 for “1,2”/],
  [us, 'mass', '1,5', /Type 1\.5 for “1,5”/],
  [en, 'mass', '0,800', /Type 0\.800 for “0,800”/],
  [en, 'mass', '1.234,5', /In English numbers the decimal sign is a point\. Type 1234\.5 for “1\.234,5”/],
  [en, 'mass', '1.234.567', /Type 1234567 for “1\.234\.567”/],
  [de, 'mass', '1.2 t', /In German numbers the decimal sign is a comma\. Type 1,2 for “1\.2”/],
  [de, 'mass', '1,234.5', /Type 1234,5 for “1,234\.5”/],
  [de, 'mass', '12.34', /Type 12,34 for “12\.34”/],
  [fr, 'mass', '1.5', /In French numbers the decimal sign is a comma\. Type 1,5 for “1\.5”/],
  [fr, 'mass', '1.234,5', /Type 1234,5 for “1\.234,5”/],
  [en, 'mass', "1'250", /Type 1250 for “1'250”/],
  // signs that no locale has so
  [en, 'mass', '12 50', /The signs in “12 50” are not where a number has them/],
  [en, 'mass', '1,23,456', /thousands in groups of three/],
  [en, 'mass', '1..5', /one decimal sign/],
  [en, 'mass', '1.5.2', /one decimal sign/],
  [en, 'mass', '5.', /“5\.” are not where a number has them/],
  [de, 'mass', '1.2345,6', /a decimal comma/],
  [en, 'mass', '1,2345', /Type 1\.2345 for “1,2345”/],
  // wrong unit
  [en, 'length', '950 kg', /“950 kg” is a mass, but a length is wanted here\. Type the number alone or with mm, cm, m, in or ft/],
  [en, 'mass', '2700 mm', /“2700 mm” is a length, but a mass is wanted here\. Type the number alone or with kg, g, t, lb/],
  [us, 'mass', '3 ft 6 in', /holds more than one number/],
  [en, 'force', '500 lb', /“500 lb” is a mass, but a force is wanted here\. Type the number alone or with kN, N, daN, kgf, lbf or kip/],
  [en, 'mass', '12 kN', /is a force, but a mass is wanted here/],
  [en, 'length', '300 mm²', /is an area, but a length is wanted here/],
  [en, 'moment', '10 kg·m', /is a mass times length, but a moment is wanted here/],
  [en, 'lineMass', '3 kN/m', /is a force per length, but a mass per length is wanted here/],
  [en, 'mass', '5 %', /is a ratio, but a mass is wanted here/],
  [en, 'mass', '5 stone', /“stone” is not a unit of mass that is known here\. Type the number alone or with kg/],
  [en, 'length', '5 yards', /“yards” is not a unit of length that is known here/],
  [en, 'count', '3 pallets', /Only a number is wanted here\. Type it without “pallets”/],
  [en, 'count', '2.5', /“2\.5” is no whole number/],
  // no number, or more than one
  [en, 'mass', '', /^Nothing is typed\. Type a number, alone for kg or with its unit\.$/],
  [us, 'length', '   ', /alone for in or with its unit/],
  [en, 'ratio', '', /^Nothing is typed\. Type a number\.$/],
  [en, 'mass', 'heavy', /“heavy” does not begin with a number/],
  [en, 'mass', 'kg 950', /does not begin with a number/],
  [en, 'mass', 'NaN', /does not begin with a number/],
  [en, 'mass', 'Infinity', /does not begin with a number/],
  [en, 'mass', '--5', /does not begin with a number/],
  [en, 'mass', '$5', /does not begin with a number/],
  [en, 'mass', '1e3', /is written with an exponent\. Write the number out in full/],
  [en, 'mass', '1e999', /is written with an exponent/],
  [en, 'mass', '950 kg 20', /holds more than one number/],
  [en, 'length', '2 m 70 cm', /holds more than one number\. Type one number with one unit/],
  [en, 'length', '100-200', /is not a unit of length|holds more than one number/],
  [en, 'length', '1200 x 800', /holds more than one number/],
  [en, 'mass', '0x1F', /is not a unit of mass|holds more than one number/],
  [en, 'mass', '9'.repeat(80), /longer than any number/],
  // feet, inches and fractions
  [us, 'length', '3 ft 14 in', /has 12 in or more beside ft\. Type whole ft and less than 12 in/],
  [us, 'length', '3.5 ft 6 in', /has a part of a ft and in beside it\. Type whole ft before in/],
  [us, 'length', '3 ft 6 cm', /after ft only in can follow\. Type it as 3 ft 6 in/],
  [us, 'length', '6 in 3 ft', /holds more than one number/],
  [us, 'length', '1/3 in', /“1\/3” is no fraction of a rule\. Type halves, quarters, eighths/],
  [us, 'length', '5/4 in', /each less than one/],
  [us, 'length', '1/0 in', /is no fraction of a rule/],
  [us, 'length', '3 ft 6 1/3 in', /is no fraction of a rule/],
];

test('the tables hold at least 150 inputs, in both unit systems and three locales', () => {
  const all = [...good, ...bad];
  expect(all.length).toBeGreaterThanOrEqual(150);
  expect(new Set(all.map(([reading, kind, text]) => `${reading.locale} ${reading.units} ${kind} ${text}`)).size).toBe(all.length);
});

test.each(good)('%o %s: “%s” is taken as %d', (reading, kind, text, expected) => {
  expect(readEntry(text, kind, reading)).toEqual({ ok: true, value: expected });
});

test.each(bad)('%o %s: “%s” is refused, saying %s', (reading, kind, text, expected) => {
  expect(readEntry(text, kind, reading)).toEqual({ ok: false, message: expect.stringMatching(expected) });
});

test('a refusal says what to type instead and ends as a sentence', () => {
  for (const [reading, kind, text] of bad) {
    const entry = readEntry(text, kind, reading);
    expect(entry.ok ? '' : entry.message).toMatch(/(Type|Write) .*\.$/);
  }
});

test('whatever is typed, there is a finite number or a refusal', () => {
  const piece = fc.oneof(fc.constantFrom(...'0123456789.,\'" -+/½²', 'kg', 'ft', 'in', 'mm', 't', ' '), fc.string({ maxLength: 3 }));
  fc.assert(
    fc.property(
      fc.array(piece, { maxLength: 12 }).map((pieces) => pieces.join('')),
      fc.constantFrom(...(Object.keys(UNIT_OF) as QuantityKind[])),
      fc.constantFrom(en, us, de, deUs, fr, swiss, nowhere),
      (text, kind, reading) => {
        const entry = readEntry(text, kind, reading);
        expect(entry.ok ? Number.isFinite(entry.value) : entry.message.length > 20).toBe(true);
      },
    ),
    { numRuns: 5000 },
  );
});

test('what a field shows is read as that value again, in every kind, unit system and locale', () => {
  const value = fc.oneof(
    fc.integer({ min: -100_000, max: 100_000 }).map((n) => n / 1000 || 0),
    fc.double({ min: -1e6, max: 1e6, noNaN: true }).filter((x) => x === 0 || Math.abs(x) > 1e-6),
  );
  fc.assert(
    fc.property(
      value,
      fc.constantFrom('length', 'mass', 'force', 'moment', 'stress', 'ratio') as fc.Arbitrary<QuantityKind>,
      fc.constantFrom(en, us, de, deUs, fr),
      (shown, kind, reading) => {
        const entry = readEntry(entryText(shown, kind, reading), kind, reading);
        // Six significant figures at least, but in inches and pounds no finer than 0.001 in and 0.1 lb
        // and at least one figure; exactly where six decimals hold the number.
        expect(entry.ok).toBe(true);
        const finest = reading.units === 'metric' ? undefined : { length: 0.0005 * 25.4, mass: 0.05 * 0.45359237 }[kind as string];
        const six = Math.max(Math.abs(shown) * 5.1e-6, 1e-12);
        const bound = finest === undefined ? six : Math.max(six, Math.min(finest * 1.001, Math.abs(shown) / 2));
        if (entry.ok) expect(Math.abs(entry.value - shown)).toBeLessThanOrEqual(bound);
      },
    ),
    { numRuns: 5000 },
  );
});

test('a number typed in one unit system is shown in the other and back without drifting', () => {
  // Whole inches, pounds, millimetres and kilograms keep every digit, however often the view is switched.
  fc.assert(
    fc.property(fc.integer({ min: 0, max: 4000 }), fc.constantFrom('length', 'mass') as fc.Arbitrary<QuantityKind>, (n, kind) => {
      for (const reading of [en, us]) {
        const first = readEntry(String(n), kind, reading);
        expect(first.ok).toBe(true);
        if (!first.ok) return;
        expect(entryText(first.value, kind, reading)).toBe(String(n));
        const again = readEntry(entryText(first.value, kind, reading), kind, reading);
        expect(again).toEqual(first);
      }
    }),
  );
});
