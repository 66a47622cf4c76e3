/** Where a stated number came from, as a phrase for worked calculations and print. */
import type { Source } from '../site/site';

const KIND: Readonly<Record<Source['kind'], string>> = {
  notice: 'read from the load notice',
  maker: 'maker',
  drawing: 'drawing',
  engineer: 'engineer',
  weighed: 'weighed',
  measured: 'measured',
  declared: 'declared',
  wms: 'stock system',
  estimated: 'estimated',
  unknown: 'source not known',
};

const MONTHS = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'];

/** "weighed (scale 2), 3 May 2026, A. Fitter". */
export function sourceWords(source: Source): string {
  const kind = source.detail === '' ? KIND[source.kind] : `${KIND[source.kind]} (${source.detail})`;
  return [kind, dateWords(source.date), source.person].filter((part) => part !== '').join(', ');
}

/** "2026-05-03" → "3 May 2026"; anything else as it stands. */
export function dateWords(date: string): string {
  const [year, month, day] = date.split('-').map(Number);
  const name = MONTHS[(month ?? 0) - 1];
  return year === undefined || day === undefined || name === undefined ? date : `${day} ${name} ${year}`;
}
