/**
 * Reading a number by the separators of a locale, exactly, and refusing what can be read in two ways.
 * "1,234" is 1 234 in English and 1.234 in German; a slip between them is a factor of a thousand.
 */
import { exact, type Exact } from './exact';
import { isLocale } from './format';
import type { Doubt } from './unit-table';

/** One way to read the signs in a number. */
interface Candidate {
  readonly decimal: '.' | ',' | null;
  readonly group: string | null;
  readonly whole: string;
  readonly decimals: string;
}

/** How a locale writes numbers; null for a locale that is not known. */
interface Marks {
  readonly decimal: string;
  /** What stands between thousands; a space may in any locale. */
  readonly group: string;
  readonly language: string;
}

export type Numeral = { readonly ok: true; readonly value: Exact } | { readonly ok: false; readonly message: string };

const marks = new Map<string, Marks | null>();

function marksOf(locale: string): Marks | null {
  let found = marks.get(locale);
  if (found === undefined) {
    found = locale !== '' && isLocale(locale) ? readMarks(locale) : null;
    marks.set(locale, found);
  }
  return found;
}

function readMarks(locale: string): Marks {
  const parts = new Intl.NumberFormat(locale, { numberingSystem: 'latn', useGrouping: 'always' }).formatToParts(1_234_567.5);
  const mark = (wanted: string) => parts.find(({ type }) => type === wanted)?.value.replace('’', "'") ?? '';
  return { decimal: mark('decimal'), group: mark('group'), language: languageOf(locale, mark('decimal')) };
}

/** The language alone, where its country writes as it does elsewhere: "English", but "English (South Africa)". */
function languageOf(locale: string, decimal: string): string {
  const [language = locale] = locale.split('-');
  const usual = new Intl.NumberFormat(language).formatToParts(0.5).find(({ type }) => type === 'decimal')?.value;
  return new Intl.DisplayNames('en', { type: 'language' }).of(usual === decimal ? language : locale) ?? locale;
}

/** Digits in groups of three, one sign between them: "1 250", "12.345.678". */
const GROUPS = /^[1-9]\d{0,2}([ .,'])\d{3}(?:\1\d{3})*$/;

/** Every way in which the signs make sense, in whatever locale. */
function candidatesOf(text: string): readonly Candidate[] {
  return ([null, '.', ','] as const).flatMap((decimal) => {
    const [before = '', decimals = '', ...more] = decimal === null ? [text, '0'] : text.split(decimal);
    const group = GROUPS.exec(before)?.[1] ?? null;
    if (more.length > 0 || !/^\d+$/.test(decimals) || (group === null && !/^\d*$/.test(before))) return [];
    const whole = before.replaceAll(/\D/g, '') || '0';
    return [{ decimal, group, whole, decimals: decimal === null ? '' : decimals }];
  });
}

const plain = ({ whole, decimals }: Candidate, sign: string): string => (decimals === '' ? whole : whole + sign + decimals);

/**
 * @param text digits with points, commas, apostrophes and spaces; no sign, no unit
 * @param doubt which reading of a number such as "1,234" is not likely in its unit
 */
export function readNumeral(text: string, locale: string, doubt: Doubt): Numeral {
  const own = marksOf(locale);
  const candidates = candidatesOf(text);
  const allowed = candidates.filter(
    ({ decimal, group }) =>
      own === null || ((decimal === null || decimal === own.decimal) && (group === null || group === ' ' || group === own.group)),
  );
  const [first] = allowed;
  const unlikely = candidates.length > 1 && doubt !== null && (first?.decimal === null ? 'thousands' : 'decimals') === doubt;
  const doubtful = allowed.length > 1 || unlikely;
  if (first !== undefined && !doubtful) return { ok: true, value: exact(plain(first, '.')) };
  return { ok: false, message: refusal(text, candidates, own, doubt) };
}

function refusal(text: string, candidates: readonly Candidate[], own: Marks | null, doubt: Doubt): string {
  const [first, second] = candidates;
  const sign = own?.decimal ?? '.';
  if (first === undefined)
    return `The signs in “${text}” are not where a number has them: one decimal sign, thousands in groups of three. Type only digits and, where it needs one, a decimal ${sign === ',' ? 'comma' : 'point'}.`;
  if (second === undefined) {
    const why = own === null ? '' : `In ${own.language} numbers the decimal sign is a ${sign === ',' ? 'comma' : 'point'}. `;
    return `${why}Type ${plain(first, sign)} for “${text}”.`;
  }
  // Where three decimals would be doubtful again a fourth tells.
  const fourth = own === null || doubt === 'decimals' ? '0' : '';
  const ways = [second, first].map((one) => (one.decimals === '' ? one.whole : plain(one, sign) + fourth));
  return `“${text}” can be read as ${ways.join(' or as ')}. Type the one that is meant.`;
}
