/**
 * The one unit system inside the core (mm, N, kg, s) and the exact factors at its edge.
 *
 * A `Quantity` is a number with its kind; the kind fixes the core's unit, listed in `UNIT_OF`.
 * Source of the factors: international yard and pound agreement of 1959 and CGPM 1901 (standard
 * gravity), both as given in NIST SP 811, Appendix B; exact by definition.
 */

/** Standard gravity, m/s². Exact by definition. */
export const STANDARD_GRAVITY = 9.80665;
/** Exact by definition. */
export const MM_PER_INCH = 25.4;
/** Exact by definition. */
export const KG_PER_POUND = 0.45359237;

/** The core's unit of each kind of quantity. */
export const UNIT_OF = {
  length: 'mm',
  mass: 'kg',
  force: 'N',
  lineLoad: 'N/mm',
  lineMass: 'kg/mm',
  moment: 'N·mm',
  massMoment: 'kg·mm',
  stress: 'N/mm²',
  areaMass: 'kg/mm²',
  density: 'kg/mm³',
  area: 'mm²',
  secondMoment: 'mm⁴',
  sectionModulus: 'mm³',
  rigidity: 'N·mm²',
  /** A sag times EI. */
  sagRigidity: 'N·mm³',
  stiffness: 'N·mm/rad',
  angle: 'rad',
  ratio: '1',
  percent: '%',
  count: '1',
} as const;

export type QuantityKind = keyof typeof UNIT_OF;

/** A number in the core's unit of its kind. */
export interface Quantity {
  readonly value: number;
  readonly kind: QuantityKind;
}

export type UnitSystem = 'metric' | 'us';

export const lengthOf = (value: number): Quantity => ({ value, kind: 'length' });
export const massOf = (value: number): Quantity => ({ value, kind: 'mass' });
export const forceOf = (value: number): Quantity => ({ value, kind: 'force' });
export const momentOf = (value: number): Quantity => ({ value, kind: 'moment' });
export const ratioOf = (value: number): Quantity => ({ value, kind: 'ratio' });
export const countOf = (value: number): Quantity => ({ value, kind: 'count' });
export const quantity = (kind: QuantityKind, value: number): Quantity => ({ value, kind });

/** Weight in N of a mass in kg. */
export const weightOf = (massKg: number): number => massKg * STANDARD_GRAVITY;
/** Mass in kg that weighs this many N. */
export const massWeighing = (force: number): number => force / STANDARD_GRAVITY;
