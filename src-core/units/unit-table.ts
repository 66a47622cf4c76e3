/**
 * Every unit that can be shown or typed, by kind of quantity, with its exact factor.
 *
 * Source of the factors: inch, pound and standard gravity as in quantity.ts (NIST SP 811, Appendix B,
 * exact by definition); short ton 2 000 lb, long ton 2 240 lb, kip 1 000 lbf, ounce 1/16 lb.
 */
import { exact, over, times, toNumber, type Exact } from './exact';
import { KG_PER_POUND, MM_PER_INCH, STANDARD_GRAVITY, type QuantityKind, type UnitSystem } from './quantity';

export type Doubt = 'thousands' | 'decimals' | null;

export interface Unit {
  /** As it is shown. */
  readonly symbol: string;
  /** Other ways to type it, as `unitKey` gives them. */
  readonly also: readonly string[];
  /** Core units in one of it. */
  readonly factor: Exact;
  readonly perUnit: number;
  /**
   * What is doubtful in a number of it such as "1,234": a thousand tonnes, or metres, is no likely
   * number on a rack, and nobody measures thousandths of a millimetre or weighs goods for a rack to the
   * gram. "1.234" kg taken for 1.234 kg where 1 234 kg was meant would let an overload pass.
   */
  readonly doubt: Doubt;
}

const unit = (symbol: string, factor: Exact | string, also: readonly string[] = [], doubt: Doubt = null): Unit => {
  const exactly = typeof factor === 'string' ? exact(factor) : factor;
  return { symbol, also, factor: exactly, perUnit: toNumber(exactly), doubt };
};

const one = exact('1');
const mm = one;
const m = exact('1000');
const inch = exact(String(MM_PER_INCH));
const ft = times(inch, exact('12'));
const lb = exact(String(KG_PER_POUND));
const gravity = exact(String(STANDARD_GRAVITY));
const lbf = times(lb, gravity);
const kip = times(lbf, exact('1000'));
const kN = exact('1000');
const square = (length: Exact) => times(length, length);
const cube = (length: Exact) => times(square(length), length);

export const UNITS: Readonly<Record<QuantityKind, readonly Unit[]>> = {
  length: [
    unit('mm', mm, ['millimetre', 'millimetres', 'millimeter', 'millimeters'], 'decimals'),
    unit('cm', '10', ['centimetre', 'centimetres', 'centimeter', 'centimeters']),
    unit('m', m, ['metre', 'metres', 'meter', 'meters'], 'thousands'),
    unit('in', inch, ['"', 'inch', 'inches', 'ins']),
    unit('ft', ft, ["'", 'foot', 'feet'], 'thousands'),
  ],
  mass: [
    unit('kg', one, ['kgs', 'kilo', 'kilos', 'kilogram', 'kilograms', 'kilogramme', 'kilogrammes'], 'decimals'),
    unit('g', '0.001', ['gram', 'grams', 'gramme', 'grammes']),
    unit('t', '1000', ['tonne', 'tonnes', 'metricton', 'metrictons'], 'thousands'),
    unit('lb', lb, ['lbs', 'lbm', '#', 'pound', 'pounds'], 'decimals'),
    unit('oz', over(lb, exact('16')), ['ounce', 'ounces']),
    unit('short ton', times(lb, exact('2000')), ['shortton', 'shorttons', 'uston', 'ustons'], 'thousands'),
    unit('long ton', times(lb, exact('2240')), ['longton', 'longtons'], 'thousands'),
  ],
  force: [
    unit('kN', kN, [], 'thousands'),
    unit('N', one, ['newton', 'newtons']),
    unit('daN', '10'),
    unit('kgf', gravity),
    unit('lbf', lbf),
    unit('kip', kip, ['kips'], 'thousands'),
  ],
  lineLoad: [
    unit('kN/m', one, [], 'thousands'),
    unit('N/mm', one),
    unit('N/m', '0.001'),
    unit('lbf/ft', over(lbf, ft), ['plf']),
    unit('lbf/in', over(lbf, inch)),
  ],
  lineMass: [unit('kg/m', over(one, m)), unit('kg/mm', one), unit('t/m', one, [], 'thousands'), unit('lb/ft', over(lb, ft), ['lbs/ft'])],
  moment: [
    unit('kN·m', times(kN, m), [], 'thousands'),
    unit('N·m', m),
    unit('N·mm', one),
    unit('lbf·ft', times(lbf, ft), ['ftlbf', 'ft-lbf']),
    unit('lbf·in', times(lbf, inch), ['inlbf', 'in-lbf']),
    unit('kip·ft', times(kip, ft), ['ftkip', 'ft-kip'], 'thousands'),
    unit('kip·in', times(kip, inch), ['inkip', 'in-kip'], 'thousands'),
  ],
  massMoment: [
    unit('kg·m', m),
    unit('kg·mm', one),
    unit('lb·ft', times(lb, ft), ['ftlb', 'ft-lb']),
    unit('lb·in', times(lb, inch), ['inlb', 'in-lb']),
  ],
  stress: [
    unit('N/mm²', one, ['mpa']),
    unit('kN/m²', '0.001', ['kpa']),
    unit('Pa', '0.000001', ['n/m2']),
    unit('psi', over(lbf, square(inch)), ['lbf/in2']),
    unit('ksi', over(kip, square(inch)), ['kip/in2'], 'thousands'),
    unit('psf', over(lbf, square(ft)), ['lbf/ft2']),
  ],
  areaMass: [
    unit('kg/m²', over(one, square(m))),
    unit('t/m²', over(exact('1000'), square(m)), [], 'thousands'),
    unit('psf', over(lb, square(ft)), ['lb/ft2', 'lbs/ft2']),
  ],
  density: [
    unit('kg/m³', over(one, cube(m))),
    unit('t/m³', over(exact('1000'), cube(m)), [], 'thousands'),
    unit('g/cm³', over(exact('0.001'), exact('1000')), ['kg/l', 'kg/dm3'], 'thousands'),
    unit('lb/ft³', over(lb, cube(ft)), ['lbs/ft3', 'pcf']),
  ],
  area: [
    unit('mm²', one),
    unit('cm²', '100'),
    unit('m²', square(m), [], 'thousands'),
    unit('in²', square(inch), ['sqin']),
    unit('ft²', square(ft), ['sqft'], 'thousands'),
  ],
  secondMoment: [unit('cm⁴', '10000'), unit('mm⁴', one), unit('in⁴', square(square(inch)))],
  sectionModulus: [unit('cm³', '1000'), unit('mm³', one), unit('in³', cube(inch))],
  rigidity: [
    unit('kN·m²', times(kN, square(m))),
    unit('N·mm²', one),
    unit('kip·in²', times(kip, square(inch))),
    unit('lbf·in²', times(lbf, square(inch))),
  ],
  sagRigidity: [
    unit('kN·m³', times(kN, cube(m))),
    unit('N·mm³', one),
    unit('kip·in³', times(kip, cube(inch))),
    unit('lbf·in³', times(lbf, cube(inch))),
  ],
  stiffness: [
    unit('kN·m/rad', times(kN, m)),
    unit('N·m/rad', m),
    unit('N·mm/rad', one),
    unit('kip·in/rad', times(kip, inch)),
    unit('lbf·in/rad', times(lbf, inch)),
  ],
  // Pi to more digits than a double holds: the one factor that no fraction gives.
  angle: [
    unit('°', over(exact('3.14159265358979323846264338327950288'), exact('180')), ['deg', 'degree', 'degrees']),
    unit('rad', one),
    unit('mrad', '0.001'),
  ],
  ratio: [unit('', one), unit('%', '0.01', ['percent', 'pct'])],
  percent: [unit('%', one, ['percent', 'pct'])],
  count: [unit('', one, [], 'decimals')],
};

/** What a kind of quantity is called. */
export const KIND_NOUNS: Readonly<Record<QuantityKind, string>> = {
  length: 'length',
  mass: 'mass',
  force: 'force',
  lineLoad: 'force per length',
  lineMass: 'mass per length',
  moment: 'moment',
  massMoment: 'mass times length',
  stress: 'pressure or stress',
  areaMass: 'mass per area',
  density: 'density',
  area: 'area',
  secondMoment: 'second moment of area',
  sectionModulus: 'section modulus',
  rigidity: 'bending rigidity',
  sagRigidity: 'sag times bending rigidity',
  stiffness: 'rotational stiffness',
  angle: 'angle',
  ratio: 'ratio',
  percent: 'percentage',
  count: 'count',
};

/** Symbols shown: metric, then US customary. */
const SHOWN: Readonly<Record<QuantityKind, readonly [metric: string, us: string]>> = {
  length: ['mm', 'in'],
  mass: ['kg', 'lb'],
  force: ['kN', 'lbf'],
  lineLoad: ['kN/m', 'lbf/ft'],
  lineMass: ['kg/m', 'lb/ft'],
  moment: ['kN·m', 'lbf·ft'],
  massMoment: ['kg·m', 'lb·ft'],
  stress: ['N/mm²', 'psi'],
  areaMass: ['kg/m²', 'psf'],
  density: ['kg/m³', 'lb/ft³'],
  area: ['mm²', 'in²'],
  secondMoment: ['cm⁴', 'in⁴'],
  sectionModulus: ['cm³', 'in³'],
  rigidity: ['kN·m²', 'kip·in²'],
  sagRigidity: ['kN·m³', 'kip·in³'],
  stiffness: ['kN·m/rad', 'kip·in/rad'],
  angle: ['°', '°'],
  ratio: ['', ''],
  percent: ['%', '%'],
  count: ['', ''],
};

const bySymbol = (kind: QuantityKind, symbol: string): Unit => {
  const found = UNITS[kind].find((one) => one.symbol === symbol);
  if (!found) throw new RangeError(`no unit ${symbol} of ${kind}`);
  return found;
};

const shownUnits = Object.fromEntries(
  Object.entries(SHOWN).map(([kind, [metric, us]]) => [
    kind,
    { metric: bySymbol(kind as QuantityKind, metric), us: bySymbol(kind as QuantityKind, us) },
  ]),
) as Readonly<Record<QuantityKind, Readonly<Record<UnitSystem, Unit>>>>;

/** Base plates are shown in mm² or in², floors from about a square foot on in m² or ft². */
const LARGE_AREA = 100_000;
const largeAreas = { metric: bySymbol('area', 'm²'), us: bySymbol('area', 'ft²') };

/** The unit in which fields and labels show this kind. */
export const fieldUnit = (kind: QuantityKind, units: UnitSystem): Unit => shownUnits[kind][units];

/** The unit in which this value is shown: the field's, but for large areas. */
export const shownUnit = (kind: QuantityKind, value: number, units: UnitSystem): Unit =>
  kind === 'area' && Math.abs(value) >= LARGE_AREA ? largeAreas[units] : shownUnits[kind][units];

/** A unit as typed, brought to the one spelling that the table knows: "kN m", "kN*m" and "kN·m" are one. */
export const unitKey = (typed: string): string =>
  typed
    .toLowerCase()
    .replaceAll(' per ', '/')
    .replace(/[\s·⋅*^]/g, '')
    .replaceAll('²', '2')
    .replaceAll('³', '3')
    .replaceAll('⁴', '4')
    .replace(/\.+$/, '');

/** The unit of this kind that the key names; null if there is none. */
export const unitNamed = (kind: QuantityKind, key: string): Unit | null =>
  UNITS[kind].find((one) => unitKey(one.symbol) === key || one.also.includes(key)) ?? null;

/** The first kind that has a unit of this name; null if no kind has. */
export const kindNamed = (key: string): QuantityKind | null =>
  key === '' ? null : ((Object.keys(UNITS) as QuantityKind[]).find((kind) => unitNamed(kind, key) !== null) ?? null);
