/**
 * Days of the calendar as ISO dates (YYYY-MM-DD), without clock or time zone: a day is a day, however
 * many hours it has, so that a change of the clocks moves no date.
 */

/** Days from 1 January 1970, negative before it. Howard Hinnant's civil calendar arithmetic. */
function dayNumber(date: string): number {
  const [, y, m, d] = /^(\d{4})-(\d{2})-(\d{2})$/.exec(date) ?? [];
  const year = Number(y);
  const month = Number(m);
  const day = Number(d);
  if (!(month >= 1 && month <= 12 && day >= 1 && day <= daysIn(year, month)))
    throw new RangeError(`a date must be a day of the calendar as YYYY-MM-DD, got ${JSON.stringify(date)}`);
  // The year runs from March, so that a leap day is its last.
  const yearFromMarch = month > 2 ? year : year - 1;
  const era = Math.floor(yearFromMarch / 400);
  const yearOfEra = yearFromMarch - era * 400;
  const dayOfYear = Math.floor((153 * ((month + 9) % 12) + 2) / 5) + day - 1;
  return era * 146_097 + yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear - 719_468;
}

function dateOf(dayNo: number): string {
  const shifted = dayNo + 719_468;
  const era = Math.floor(shifted / 146_097);
  const dayOfEra = shifted - era * 146_097;
  const yearOfEra = Math.floor(
    (dayOfEra - Math.floor(dayOfEra / 1_460) + Math.floor(dayOfEra / 36_524) - Math.floor(dayOfEra / 146_096)) / 365,
  );
  const dayOfYear = dayOfEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const monthFromMarch = Math.floor((5 * dayOfYear + 2) / 153);
  const day = dayOfYear - Math.floor((153 * monthFromMarch + 2) / 5) + 1;
  const month = monthFromMarch < 10 ? monthFromMarch + 3 : monthFromMarch - 9;
  const year = yearOfEra + era * 400 + (month <= 2 ? 1 : 0);
  return isoDate(year, month, day);
}

const isoDate = (year: number, month: number, day: number): string =>
  `${String(year).padStart(4, '0')}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`;

function daysIn(year: number, month: number): number {
  if (month === 2) return year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0) ? 29 : 28;
  return [4, 6, 9, 11].includes(month) ? 30 : 31;
}

/**
 * The day so many days later, or earlier with a negative number.
 * @throws RangeError if `date` is no day of the calendar
 * @example addDays('2028-02-01', 28) → '2028-02-29', a leap year
 */
export const addDays = (date: string, days: number): string => dateOf(dayNumber(date) + days);

/**
 * Days from one day to another; negative if `to` is earlier.
 * @throws RangeError if either is no day of the calendar
 */
export const daysBetween = (from: string, to: string): number => dayNumber(to) - dayNumber(from);

/**
 * The same day of a later month, or that month's last day where it is shorter.
 * @throws RangeError if `date` is no day of the calendar
 * @example addMonths('2028-02-29', 12) → '2029-02-28'
 */
export function addMonths(date: string, months: number): string {
  dayNumber(date);
  const [year, month, day] = date.split('-').map(Number) as [number, number, number];
  const count = year * 12 + month - 1 + months;
  const toYear = Math.floor(count / 12);
  const toMonth = (count % 12) + 1;
  return isoDate(toYear, toMonth, Math.min(day, daysIn(toYear, toMonth)));
}

const MONTHS = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'];

/** "2026-05-03" → "3 May 2026"; anything else as it stands. */
export function dateWords(date: string): string {
  const [year, month, day] = date.split('-').map(Number);
  const name = MONTHS[(month ?? 0) - 1];
  return year === undefined || day === undefined || name === undefined ? date : `${day} ${name} ${year}`;
}
