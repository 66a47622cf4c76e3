import type { Text } from '../../src-core/checks/finding';
import { UNIT_OF } from '../../src-core/units/quantity';

/** A sentence with its figures as they are, six digits at most, in the core's units. */
export const plain = (text: Text): string =>
  text
    .map((part) => (typeof part === 'string' ? part : `${Number(part.value.toPrecision(6))} ${UNIT_OF[part.kind]}`.replace(/ 1$/, '')))
    .join('');
