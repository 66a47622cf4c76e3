/**
 * What people type that is awkward: signs of other keyboards, pasted text, other countries' separators,
 * sums, ranges and slips. Values are exact products of the typed number and the factor of its unit (NIST
 * SP 811, Appendix B), rounded once to a double; computed with Python's fractions module.
 */
import { expect, test } from 'vitest';
import { readEntry } from '../../../src-core/units/entry';
import { entryText, type Reading } from '../../../src-core/units/format';
import type { QuantityKind } from '../../../src-core/units/quantity';

const metric = (locale: string): Reading => ({ units: 'metric', locale });
const en = metric('en-GB');
const us: Reading = { units: 'us', locale: 'en-US' };
const de = metric('de-DE');
const fr = metric('fr-FR');

type Row<Expected> = readonly [reading: Reading, kind: QuantityKind, text: string, expected: Expected];

const good: readonly Row<number>[] = [
  // marks of feet and inches from other keyboards and pages
  [us, 'length', '3\'6"', 1066.8],
  [us, 'length', "3'6", 1066.8],
  [us, 'length', '3´6´´', 1066.8],
  [us, 'length', '3`6', 1066.8],
  [us, 'length', '3 \' 6 "', 1066.8],
  [us, 'length', '3\' 6 1/2"', 1079.5],
  [us, 'length', '3 ft, 6 in', 1066.8],
  [us, 'length', '3 ft and 6 in', 1066.8],
  [us, 'length', '3 ft. 6 in.', 1066.8],
  [us, 'length', '3 FT 6 IN', 1066.8],
  [us, 'length', '8 foot 10', 2692.4],
  [us, 'length', '8 feet10inches', 2692.4],
  [us, 'length', '12 1/2"', 317.5],
  [us, 'length', '12-1/2"', 317.5],
  [us, 'length', '12½"', 317.5],
  [us, 'length', '1 1/2 in', 38.1],
  [us, 'length', '7–7/16"', 188.9125],
  [us, 'length', '40 1/8', 1019.175],
  [us, 'length', '10 ft 11 63/64 in', 3352.403125],
  [us, 'length', '5/8', 15.875],
  [us, 'length', '3½ ft', 1066.8],
  [en, 'length', '106.3"', 2700.02],
  [us, 'length', '2.5 m', 2500],
  [us, 'length', '-0.1 in', -2.54],
  [us, 'mass', '5 lbs, 8 oz', 2.494758035],
  // units as they are written
  [en, 'mass', '950 kilogrammes', 950],
  [en, 'mass', '500 grammes', 0.5],
  [en, 'mass', '2 T', 2000],
  [en, 'mass', '2 t.', 2000],
  [en, 'mass', '2 metric tons', 2000],
  [us, 'mass', '2.2 US tons', 1995.806428],
  [us, 'mass', '3500#', 1587.573295],
  [us, 'mass', '3,500 lbm', 1587.573295],
  [us, 'mass', '2200.5 lbs.', 998.130010185],
  [us, 'mass', '1000 kg', 1000],
  [en, 'mass', '1 1/2 t', 1500],
  [en, 'mass', '½ t', 500],
  [en, 'percent', '5 per cent', 5],
  [en, 'ratio', '1/3', 0.3333333333333333],
  [en, 'ratio', '2/3', 0.6666666666666666],
  [en, 'count', '3.0', 3],
  // pasted text and full-width digits
  [en, 'mass', '９５０', 950],
  [en, 'mass', '９５０ｋｇ', 950],
  [en, 'mass', '１．２ t', 1200],
  [en, 'mass', '\u200b950', 950],
  [en, 'mass', '950\u200b kg', 950],
  [en, 'mass', '\u202a950 kg\u202c', 950],
  [en, 'mass', '950\n', 950],
  [en, 'mass', '1\t234', 1234],
  // separators: de, fr, and others by their own locale
  [de, 'mass', '1.234,5 kg', 1234.5],
  [de, 'mass', '1.234.567,891 kg', 1234567.891],
  [de, 'mass', '1\u202f234,5', 1234.5],
  [fr, 'mass', '1 234,5', 1234.5],
  [fr, 'mass', '1\u00a0234,5 kg', 1234.5],
  [fr, 'mass', '1\u202f234,5 kg', 1234.5],
  [fr, 'mass', '1\u2009234,5', 1234.5],
  [fr, 'mass', '0,5 t', 500],
  [metric('sv-SE'), 'mass', '1 234,5', 1234.5],
  [metric('es-ES'), 'mass', '1.234,5', 1234.5],
  [metric('pl-PL'), 'mass', '1234,5', 1234.5],
  [metric('de-CH'), 'mass', "1'234.5", 1234.5],
  [metric('en-ZA'), 'mass', '1 234,5', 1234.5],
  // a fourth decimal tells that decimals are meant
  [en, 'mass', '12.3450', 12.345],
  [us, 'mass', '220.4623', 100.000017152651],
  [en, 'mass', '0.125', 0.125],
];

const bad: readonly Row<RegExp>[] = [
  // a thousand, or a thousandth
  [en, 'mass', '1.234', /“1\.234” can be read as 1\.2340 or as 1234\. Type the one that is meant/],
  [en, 'mass', '12.345 kg', /can be read as 12\.3450 or as 12345/],
  [us, 'mass', '1.234 lb', /can be read as 1\.2340 or as 1234/],
  [de, 'mass', '1,234', /“1,234” can be read as 1,2340 or as 1234/],
  [fr, 'mass', '1,234', /can be read as 1,2340 or as 1234/],
  [en, 'count', '1.000', /can be read as 1\.0000 or as 1000/],
  [us, 'length', '1,234 ft', /can be read as 1\.234 or as 1234/],
  [us, 'length', '3 ft 6,5 in', /Type 6\.5 for “6,5”/],
  [metric('pt-PT'), 'mass', '1.234,5', /In Portuguese numbers the decimal sign is a comma\. Type 1234,5/],
  [metric('en-ZA'), 'mass', '1234.5', /In English \(South Africa\) numbers the decimal sign is a comma\. Type 1234,5/],
  // tons
  [en, 'mass', '2 ton', /may be tonnes \(1000 kg\), short tons \(2000 lb\) or long tons/],
  [us, 'mass', '1,000 tons', /may be tonnes|can be read as/],
  [en, 'mass', '2 Mg', /“Mg” is not a unit of mass that is known here/],
  // exponents, sums, ranges, and guesses
  [en, 'mass', '1.2e+3 kg', /is written with an exponent\. Write the number out in full/],
  [en, 'mass', '1.2×10^3', /is written with an exponent/],
  [en, 'mass', '10^3', /is written with an exponent/],
  [en, 'mass', '950+20', /holds more than one number/],
  [en, 'mass', '950–1000', /holds more than one number/],
  [en, 'mass', '950 ± 5 kg', /holds more than one number/],
  [en, 'mass', '2 x 950', /holds more than one number/],
  [en, 'mass', '~950', /does not begin with a number/],
  [en, 'mass', '<= 950 kg', /does not begin with a number/],
  [en, 'mass', '(950)', /does not begin with a number/],
  [en, 'mass', '950 kg max', /“kg max” is not a unit of mass/],
  [en, 'mass', '?', /“\?” does not begin with a number/],
  [en, 'mass', 'n/a', /does not begin with a number/],
  // only a unit, only a sign, two units
  [en, 'mass', 'kg', /“kg” does not begin with a number/],
  [en, 'mass', '-', /“-” does not begin with a number/],
  [en, 'mass', '.', /does not begin with a number/],
  [en, 'mass', '\u200b', /^Nothing is typed/],
  [en, 'mass', '950 kg kg', /is not a unit of mass/],
  [en, 'mass', '950 kg 2 t', /holds more than one number/],
  [en, 'length', '2 m 70', /holds more than one number/],
  [us, 'mass', '5 st 3 lb', /holds more than one number/],
  [us, 'mass', '5 lb 16 oz', /has 16 oz or more beside lb/],
  [us, 'force', '350 lb', /“350 lb” is a mass, but a force is wanted here/],
  [us, 'mass', '2.2 kips', /is a force, but a mass is wanted here/],
  // digits where no number has them
  [en, 'mass', '9 5 0', /are not where a number has them/],
  [en, 'mass', '1,000,00', /thousands in groups of three/],
  [en, 'mass', '950.', /are not where a number has them/],
  [en, 'mass', '1_000', /holds more than one number/],
  [us, 'length', '77/8', /“77\/8” is no fraction of a rule/],
  [us, 'length', '1⅓"', /“1\/3” is no fraction of a rule/],
  [us, 'length', '7 8/8', /is no fraction of a rule/],
  [en, 'ratio', '1/0', /is no fraction of a rule/],
  [us, 'length', '10 3/8 ft 2 in', /has a part of a ft and in beside it/],
  [us, 'length', '3 ft 6 in 2', /after ft only in can follow/],
];

test('at least 80 inputs, none of them twice', () => {
  const all = [...good, ...bad].map(([reading, kind, text]) => `${reading.locale} ${reading.units} ${kind} ${text}`);
  expect(all.length).toBeGreaterThanOrEqual(80);
  expect(new Set(all).size).toBe(all.length);
});

test.each(good)('%o %s: “%s” is taken as %d', (reading, kind, text, expected) => {
  expect(readEntry(text, kind, reading)).toEqual({ ok: true, value: expected });
});

test.each(bad)('%o %s: “%s” is refused, saying %s', (reading, kind, text, expected) => {
  expect(readEntry(text, kind, reading)).toEqual({ ok: false, message: expect.stringMatching(expected) });
});

test('no field shows a number that would be refused as doubtful if it were typed', () => {
  for (const reading of [en, us, de, fr]) {
    for (const value of [1.234, 12.345, 100, 123.4567, 0.125, 999.999]) {
      for (const kind of ['mass', 'length'] as const) {
        const text = entryText(value, kind, reading);
        expect(readEntry(text, kind, reading), `${text} ${kind} ${reading.locale}`).toMatchObject({ ok: true });
      }
    }
  }
});
