/** Times and sizes as people say them. */

/** "today 14:02", or the date where it was another day; `exactly` with its seconds, where two may be near. */
export function sayTime(iso: string, locale: string, now = new Date(), exactly = false): string {
  const time = new Date(iso);
  if (Number.isNaN(time.getTime())) return 'at an unknown time';
  const clock = time.toLocaleTimeString(locale, { hour: 'numeric', minute: '2-digit', ...(exactly ? { second: '2-digit' } : {}) });
  if (time.toDateString() === now.toDateString()) return `today ${clock}`;
  return `${time.toLocaleDateString(locale, { day: 'numeric', month: 'short', year: 'numeric' })} ${clock}`;
}

export function sayBytes(bytes: number, locale: string): string {
  const [size, unit] = bytes < 1e6 ? [bytes / 1e3, 'kB'] : [bytes / 1e6, 'MB'];
  return `${size.toLocaleString(locale, { maximumSignificantDigits: 2 })} ${unit}`;
}

export const countOf = (count: number, one: string, many = `${one}s`): string => `${count} ${count === 1 ? one : many}`;
