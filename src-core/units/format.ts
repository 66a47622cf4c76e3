/**
 * Quantities as people read them, in the units and with the separators of whoever looks.
 *
 * Results are given to three significant figures, but never with less than their whole digits:
 * 12.43 mm is 12.4 mm, 2 488.9 kg is 2 489 kg. A number that is short as it stands is given as it
 * stands, without trailing zeros, as stated lengths and masses are: 13.5 mm, 2 687.5 mm.
 */
import type { Quantity, QuantityKind, UnitSystem } from './quantity';
import type { Text } from './text';
import { fieldUnit, shownUnit } from './unit-table';

/** How someone reads: units on screen and paper, and the locale of the numbers, such as "en-GB". */
export interface Reading {
  readonly units: UnitSystem;
  readonly locale: string;
}

const NARROW_SPACE = '\u202f';
const NO_BREAK_SPACE = '\u00a0';
/** Two numbers this near, relatively, differ by the rounding of a conversion only. */
const SAME = 1e-9;
const SIGNIFICANT = 3;
/** Smaller ones are shown as 0: nothing that anyone measures is left there. */
const MOST_DECIMALS = 6;
/** Decimals of a length or mass that somebody may have stated. */
const STATED_DECIMALS: Readonly<Record<string, number>> = { in: 3, lb: 2 };
/** A whole inch is too coarse for a beam length or a gap, however long. */
const LEAST_DECIMALS: Readonly<Record<string, number>> = { in: 1 };

/** Numbers as they were stated differ by the last digits of a double only. */
const STATED = 1e-12;

const near = (a: number, b: number, same = SAME): boolean => Math.abs(a - b) <= same * Math.abs(b);

/** Least and most decimals that a number is shown with. */
function decimalsOf(value: number, kind: QuantityKind, symbol: string): readonly [least: number, most: number] {
  const rounded = Number(value.toPrecision(SIGNIFICANT));
  const magnitude = rounded === 0 ? 0 : Math.floor(Math.log10(Math.abs(rounded)));
  const decimals = Math.min(MOST_DECIMALS, Math.max(LEAST_DECIMALS[symbol] ?? 0, SIGNIFICANT - 1 - magnitude));
  if (Math.abs(value) < 0.5 * 10 ** -MOST_DECIMALS) return [0, 0];
  if (near(rounded, value)) return [0, decimals];
  if (kind === 'length' || kind === 'mass') {
    const stated = STATED_DECIMALS[symbol] ?? 1;
    if (near(Number(value.toFixed(stated)), value)) return [0, stated];
  }
  return [decimals, decimals];
}

const formats = new Map<string, Intl.NumberFormat>();

/** Making one takes some fifty times as long as using it. */
function numberFormat(locale: string, least: number, most: number, grouped: boolean): Intl.NumberFormat {
  const key = `${locale} ${least} ${most} ${grouped}`;
  let format = formats.get(key);
  if (!format) {
    const known = locale !== '' && isLocale(locale) ? locale : 'en-GB';
    const useGrouping = grouped ? 'always' : false;
    format = new Intl.NumberFormat(known, {
      minimumFractionDigits: least,
      maximumFractionDigits: most,
      useGrouping,
      numberingSystem: 'latn',
    });
    formats.set(key, format);
  }
  return format;
}

/** Whether numbers of this locale are known, rather than taken from the machine's own. */
export function isLocale(locale: string): boolean {
  try {
    return Intl.NumberFormat.supportedLocalesOf(locale).length > 0;
  } catch {
    return false;
  }
}

/** In metric English the thousands stand apart by a narrow space, as ISO 80000-1 has it; a comma would be misread abroad. */
const spaced = ({ units, locale }: Reading): boolean => units === 'metric' && (locale === '' || /^en\b/i.test(locale));

function written(value: number, least: number, most: number, reading: Reading, grouped = true): string {
  if (Number.isNaN(value)) throw new RangeError('there is no way to write NaN: a number that is not known is null');
  const format = numberFormat(reading.locale, least, most, grouped);
  if (!Number.isFinite(value)) return value < 0 ? '−∞' : '∞';
  // What rounds to nothing is 0, not −0.
  const shown = Math.abs(value) < 0.5 * 10 ** -most ? 0 : value;
  return format
    .formatToParts(shown)
    .map(({ type, value: part }) => {
      if (type === 'minusSign') return '−';
      return type === 'group' && spaced(reading) ? NARROW_SPACE : part;
    })
    .join('');
}

/** Number and unit apart, for tables whose head holds the unit. */
export function formatValue({ value, kind }: Quantity, reading: Reading): { readonly number: string; readonly unit: string } {
  const { symbol, perUnit } = shownUnit(kind, value, reading.units);
  const shown = value / perUnit;
  return { number: written(shown, ...decimalsOf(shown, kind, symbol), reading), unit: symbol };
}

/** The number with its unit: "1 990 kg". The spaces do not break over lines. */
export function formatQuantity(quantity: Quantity, reading: Reading): string {
  const { number, unit } = formatValue(quantity, reading);
  return withUnit(number, unit);
}

/** Every digit that the number holds, with its unit. */
export function formatExact({ value, kind }: Quantity, reading: Reading): string {
  const { symbol, perUnit } = shownUnit(kind, value, reading.units);
  // Fifteen digits: the last one or two of a double are noise once it has been converted.
  const shown = Number((value / perUnit).toPrecision(15));
  return withUnit(written(shown, 0, 20, reading), symbol);
}

const withUnit = (number: string, unit: string): string => {
  if (unit === '') return number;
  return unit === '°' ? number + unit : number + NO_BREAK_SPACE + unit;
};

/** A sentence with its figures in the units of whoever reads. */
export const formatText = (text: Text, reading: Reading): string =>
  text.map((part) => (typeof part === 'string' ? part : formatQuantity(part, reading))).join('');

/** The unit in which fields take a bare number of this kind; empty for a pure number. */
export const unitName = (kind: QuantityKind, { units }: Pick<Reading, 'units'>): string => fieldUnit(kind, units).symbol;

/** Decimals in a field of what was stated in millimetres or kilograms: nobody measures finer. */
const FIELD_DECIMALS: Readonly<Record<string, number>> = { in: 3, lb: 1 };

/**
 * The number alone as it stands in a field, without grouping: exactly where that takes no more than
 * six decimals; else a length to 0.001 in and a mass to 0.1 lb, anything else to six significant
 * figures. Left as it is it changes nothing: the stored value stays. Typed again it is read as any other.
 */
export function entryText(value: number, kind: QuantityKind, reading: Reading): string {
  const { perUnit, doubt, symbol } = fieldUnit(kind, reading.units);
  const shown = value / perUnit;
  const same = symbol in FIELD_DECIMALS ? STATED : SAME;
  const exactly = [0, 1, 2, 3, 4, 5, 6].find((decimals) => near(Number(shown.toFixed(decimals)), shown, same));
  const decimals = exactly ?? roundedDecimals(shown, symbol);
  // Three decimals of a millimetre would be taken for thousands; a fourth tells.
  const least = doubt === 'decimals' && decimals >= 3 ? 4 : 0;
  return written(shown, least, Math.max(least, decimals), reading, false);
}

/** Never so few that something is shown as nothing. */
function roundedDecimals(shown: number, symbol: string): number {
  const significant = (figures: number) => Math.min(20, Math.max(0, figures - 1 - Math.floor(Math.log10(Math.abs(shown)))));
  const most = FIELD_DECIMALS[symbol];
  return most === undefined ? significant(6) : Math.max(Math.min(most, significant(6)), significant(1));
}
