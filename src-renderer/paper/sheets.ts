import type { UnitSystem } from '../../src-core/units/quantity';

export type Sheet = 'a4' | 'letter';

/** Where people weigh in pounds they print on Letter. */
export const usualSheet = (units: UnitSystem): Sheet => (units === 'us' ? 'letter' : 'a4');
