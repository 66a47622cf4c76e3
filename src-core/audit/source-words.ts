/** Where a stated number came from, as a phrase for worked calculations and print. */
import type { Source } from '../site/site';
import { dateWords } from '../units/dates';

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

/** "weighed (scale 2), 3 May 2026, A. Fitter". */
export function sourceWords(source: Source): string {
  const kind = source.detail === '' ? KIND[source.kind] : `${KIND[source.kind]} (${source.detail})`;
  return [kind, dateWords(source.date), source.person].filter((part) => part !== '').join(', ');
}
