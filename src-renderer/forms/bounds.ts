/** What a typed number may be, in the core's unit of its kind, and the sentence that says so. */
import { formatQuantity, type Reading } from '../../src-core/units/format';
import { quantity, type QuantityKind } from '../../src-core/units/quantity';

export interface Bounds {
  readonly least?: number | undefined;
  readonly above?: number | undefined;
  readonly most?: number | undefined;
  /** Without decimals. */
  readonly whole?: boolean | undefined;
}

/** What is wrong with the number and how to mend it; null where nothing is. */
export function boundMessage(
  label: string,
  value: number,
  kind: QuantityKind,
  { least, above, most, whole }: Bounds,
  reading: Reading,
): string | null {
  const said = (limit: number) => formatQuantity(quantity(kind, limit), reading);
  if (whole && !Number.isInteger(value)) return `${label} is a whole number. Type one without decimals.`;
  if (above !== undefined && !(value > above))
    return `${label} must be more than ${said(above)}, not ${said(value)}. Check the number and its sign.`;
  if (least !== undefined && !(value >= least))
    return `${label} must be at least ${said(least)}, not ${said(value)}. Check the number and its sign.`;
  if (most !== undefined && !(value <= most))
    return `${label} must be at most ${said(most)}, not ${said(value)}. Check the number and its unit.`;
  return null;
}

/**
 * A number kept in the file in another unit than the core's, such as kg per m for kg per mm. Twelve
 * digits are kept, so that going there and back changes nothing.
 */
export const scaled = (value: number, factor: number): number => Number((value * factor).toPrecision(12));
