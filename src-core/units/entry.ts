/**
 * Reading what people type into a field for a quantity: "1.2 t", "950 kg", "3 ft 6 in", "6 1/2 in".
 *
 * Numbers go by the reader's locale; a bare number is in the field's own unit. What can be read in
 * two ways, or is no quantity of the kind, is refused with a sentence that says what to type instead.
 */
import { exact, over, plus, times, toNumber, type Exact } from './exact';
import type { Reading } from './format';
import { readNumeral } from './numerals';
import type { QuantityKind } from './quantity';
import { fieldUnit, KIND_NOUNS, kindNamed, unitKey, unitNamed, UNITS, type Unit } from './unit-table';

export type Entry = { readonly ok: true; readonly value: number } | { readonly ok: false; readonly message: string };

/** Longer text is no number that anyone means. */
const LONGEST = 60;

/** Signs such as ½. */
const FRACTION_SIGNS = /[¼-¾⅐-⅞]/g;
/** Marks without width or of writing direction, as they come along with pasted text. */
const UNSEEN = /[\u00ad\u200b-\u200f\u2060\u2066-\u2069\u202a-\u202e\ufeff]/g;

/** Digits with any signs between them, or a fraction with or without a whole number before it. */
const LEADING_FRACTION = /^(?:(\d+)(?: |-| - ))?(\d+) ?\/ ?(\d+)/;
const LEADING_NUMBER = /^(?:\d|[.,](?=\d))(?:[\d.,]| (?=\d)|'(?=\d{3}(?!\d)))*/;

/** Units that are written one after the other, with how many of the smaller make the larger. */
const PAIRS = [
  { kind: 'length', large: 'ft', small: 'in', most: 12 },
  { kind: 'mass', large: 'lb', small: 'oz', most: 16 },
] as const;

type Part = { readonly ok: true; readonly value: Exact; readonly rest: string } | { readonly ok: false; readonly message: string };

const refuse = (message: string): { readonly ok: false; readonly message: string } => ({ ok: false, message });

/**
 * The value in the core's unit of its kind, correctly rounded from the exact product.
 * Sign and size are for the caller to judge.
 */
export function readEntry(text: string, kind: QuantityKind, reading: Reading): Entry {
  const typed = plainText(text);
  if (typed === '') return refuse(`Nothing is typed. Type a number${example(kind, reading)}.`);
  if (typed.length > LONGEST) return refuse(`This is longer than any number. Type a number${example(kind, reading)}.`);
  const [, sign = '', unsigned = ''] = /^([+-]?) ?(.*)$/.exec(typed) ?? [];
  const entry = readUnsigned(unsigned, text.trim(), kind, reading);
  if (!entry.ok) return entry;
  return { ok: true, value: sign === '-' && entry.value !== 0 ? -entry.value : entry.value };
}

function readUnsigned(typed: string, text: string, kind: QuantityKind, reading: Reading): Entry {
  const unitText = afterNumber(typed);
  if (unitText === null) return refuse(`“${text}” does not begin with a number. Type a number${example(kind, reading)}.`);
  const pair = PAIRS.find((one) => one.kind === kind);
  const compound = pair && splitCompound(unitText, pair.large);
  const unit = compound ? unitNamed(kind, pair.large) : unitOf(unitText, kind, reading);
  if (!unit) return refuse(unitMessage(text, unitText, kind));
  // Shares are often thirds; a rule has none.
  const first = readPart(typed, reading, unit, kind === 'ratio');
  if (!first.ok) return first;
  const value = times(first.value, unit.factor);
  if (compound) return readCompound(value, first.value, compound, text, pair, reading);
  if (kind === 'count' && first.value.n % first.value.d !== 0n)
    return refuse(`“${text}” is no whole number. Type a number without decimals.`);
  return { ok: true, value: toNumber(value) };
}

function plainText(text: string): string {
  return (
    text
      .replaceAll(UNSEEN, '')
      .replaceAll(FRACTION_SIGNS, (sign) => ` ${sign.normalize('NFKC')}`)
      // Typed for the marks of feet and inches where a keyboard has nothing better.
      .replaceAll(/[´`]/g, "'")
      .normalize('NFKC')
      .replaceAll(/[−–—]/g, '-')
      .replaceAll('⁄', '/')
      .replaceAll(/[“”″]|''|′′/g, '"')
      .replaceAll(/[‘’′]/g, "'")
      .replaceAll(/\s+/g, ' ')
      .trim()
  );
}

/** What stands after the leading number; null where there is none. */
function afterNumber(typed: string): string | null {
  const number = (LEADING_FRACTION.exec(typed) ?? LEADING_NUMBER.exec(typed))?.[0];
  return number === undefined ? null : typed.slice(number.length).trim();
}

/** The leading number, whole, decimal or with a fraction, and what follows it. */
function readPart(typed: string, { locale }: Reading, unit: Unit, anyFraction = false): Part {
  const fraction = LEADING_FRACTION.exec(typed);
  if (fraction) {
    const [all, whole = '0', top = '', bottom = ''] = fraction;
    const rest = typed.slice(all.length).trim();
    const ofRule = ['2', '4', '8', '16', '32', '64'].includes(bottom) && Number(top) < Number(bottom);
    if (!ofRule && !(anyFraction && Number(bottom) > 0))
      return refuse(
        `“${top}/${bottom}” is no fraction of a rule. Type halves, quarters, eighths, down to 64ths, each less than one; or decimals.`,
      );
    return { ok: true, value: plus(exact(whole), over(exact(top), exact(bottom))), rest };
  }
  const number = LEADING_NUMBER.exec(typed)?.[0] ?? '';
  const numeral = readNumeral(number, locale, unit.doubt);
  return numeral.ok ? { ...numeral, rest: typed.slice(number.length).trim() } : numeral;
}

function unitOf(unitText: string, kind: QuantityKind, { units }: Reading): Unit | null {
  return unitText === '' ? fieldUnit(kind, units) : unitNamed(kind, unitKey(unitText));
}

/** `6 in` of `ft 6 in`; null where no second number follows the larger unit. */
function splitCompound(unitText: string, large: string): string | null {
  const [, name = '', second] = /^([a-z'"]+)\.?(?:,(?= )| and(?= ))? ?-? ?(\d.*|[.,]\d.*)$/i.exec(unitText) ?? [];
  const kind = large === 'ft' ? 'length' : 'mass';
  return second !== undefined && unitNamed(kind, unitKey(name))?.symbol === large ? second : null;
}

function readCompound(
  value: Exact,
  firstNumber: Exact,
  second: string,
  text: string,
  { kind, large, small, most }: (typeof PAIRS)[number],
  reading: Reading,
): Entry {
  const unit = unitNamed(kind, small);
  const name = unitKey(afterNumber(second) ?? '');
  if (!unit || (name !== '' && unitNamed(kind, name)?.symbol !== small))
    return refuse(`“${text}” has two numbers, but after ${large} only ${small} can follow. Type it as 3 ${large} 6 ${small}.`);
  const part = readPart(second, reading, unit);
  if (!part.ok) return part;
  if (firstNumber.n % firstNumber.d !== 0n)
    return refuse(`“${text}” has a part of a ${large} and ${small} beside it. Type whole ${large} before ${small}.`);
  if (part.value.n >= part.value.d * BigInt(most))
    return refuse(`“${text}” has ${most} ${small} or more beside ${large}. Type whole ${large} and less than ${most} ${small}.`);
  return { ok: true, value: toNumber(plus(value, times(part.value, unit.factor))) };
}

/** Why no unit of this kind is named, and which are. */
function unitMessage(text: string, unitText: string, kind: QuantityKind): string {
  const key = unitKey(unitText);
  const symbols = UNITS[kind].map(({ symbol }) => symbol).filter((symbol) => symbol !== '');
  const instead =
    symbols.length === 0
      ? 'Type the number alone.'
      : `Type the number alone or with ${symbols.slice(0, -1).join(', ')}${symbols.length > 1 ? ' or ' : ''}${symbols.at(-1)}.`;
  if (kind === 'mass' && /^tons?$/.test(key))
    return `“${text}” may be tonnes (1000 kg), short tons (2000 lb) or long tons (2240 lb). Type t, short ton or long ton.`;
  if (/^(e[+-]?\d|\^)/.test(unitText.toLowerCase()) || /^[x×*·] ?10 ?\^/.test(unitText))
    return `“${text}” is written with an exponent. Write the number out in full.`;
  if (/\d.*\d/.test(unitText.replace(/[a-z]\d$/i, '')) || /\d/.test(unitText.charAt(0)) || / \d/.test(unitText))
    return `“${text}” holds more than one number. Type one number with one unit.`;
  const other = kindNamed(key);
  if (other !== null && other !== kind)
    return `“${text}” is ${aOr(KIND_NOUNS[other])}, but ${aOr(KIND_NOUNS[kind])} is wanted here. ${instead}`;
  if (symbols.length === 0) return `Only a number is wanted here. Type it without “${unitText}”.`;
  return `“${unitText}” is not a unit of ${KIND_NOUNS[kind]} that is known here. ${instead}`;
}

const aOr = (noun: string): string => `${/^[aeiou]/.test(noun) ? 'an' : 'a'} ${noun}`;

const example = (kind: QuantityKind, { units }: Reading): string => {
  const { symbol } = fieldUnit(kind, units);
  return symbol === '' ? '' : `, alone for ${symbol} or with its unit`;
};
