/**
 * What differs between two pieces of plain data, place by place, in words: for comparing two records,
 * and for telling that a report is older than a change.
 */
import { lengthOf, massOf, forceOf, quantity, type Quantity } from '../units/quantity';

export interface Difference {
  /** "run A · bay A1 · level 2 · height". */
  readonly where: string;
  /** Null where there is nothing on that side. */
  readonly before: Shown | null;
  readonly after: Shown | null;
}

/** A value as it is shown: a quantity where its key says the unit, else text. */
export type Shown = string | Quantity;

/**
 * Differences in order of place. Lists of things with ids are matched by id, others by position.
 * A thing that is new or gone is one difference, not one for each of its parts.
 */
export function differences(before: unknown, after: unknown): readonly Difference[] {
  const found: Difference[] = [];
  compare(before, after, [], found);
  return found;
}

type Path = readonly string[];

function compare(before: unknown, after: unknown, path: Path, found: Difference[]): void {
  if (Object.is(before, after)) return;
  if (Array.isArray(before) && Array.isArray(after)) return compareLists(before, after, path, found);
  if (isObject(before) && isObject(after)) {
    for (const key of new Set([...Object.keys(before), ...Object.keys(after)])) {
      // Ids match things up; they are nothing to read.
      if (key !== 'id') compare(before[key], after[key], [...path, key], found);
    }
    return;
  }
  found.push({ where: placeOf(path), before: shown(before, path), after: shown(after, path) });
}

function compareLists(before: readonly unknown[], after: readonly unknown[], path: Path, found: Difference[]): void {
  const noun = singular(path.at(-1) ?? '');
  const parent = path.slice(0, -1);
  const identified = [...before, ...after].every((one) => idOf(one) !== null);
  if (!identified) {
    for (let i = 0; i < Math.max(before.length, after.length); i++)
      compare(before[i], after[i], [...parent, label(noun, after[i] ?? before[i], i)], found);
    return;
  }
  const earlier = new Map(before.map((one) => [idOf(one), one]));
  const later = new Map(after.map((one) => [idOf(one), one]));
  before.forEach((one, i) => {
    if (!later.has(idOf(one))) found.push({ where: placeOf([...parent, label(noun, one, i)]), before: 'there', after: null });
  });
  after.forEach((one, i) => {
    const at = [...parent, label(noun, one, i)];
    if (!earlier.has(idOf(one))) found.push({ where: placeOf(at), before: null, after: 'there' });
    else compare(earlier.get(idOf(one)), one, at, found);
  });
}

type Things = Readonly<Record<string, unknown>>;

const isObject = (value: unknown): value is Things => typeof value === 'object' && value !== null && !Array.isArray(value);

/** What a thing of a list is told by: its own id, or that of what it speaks of. */
function idOf(one: unknown): string | null {
  if (!isObject(one)) return null;
  for (const key of ['id', 'levelId', 'bayId', 'frameId', 'beam']) {
    const value = one[key];
    if (typeof value === 'string') return [value, ...['beam', 'check', 'end'].map((more) => one[more] ?? '')].join(' ');
  }
  return null;
}

/** "bay A1" where it has a name, else "level 2". */
function label(noun: string, one: unknown, index: number): string {
  const name = isObject(one) && typeof one['name'] === 'string' && one['name'].trim() !== '' ? one['name'] : String(index + 1);
  return `${noun} ${name}`;
}

const IRREGULAR: Readonly<Record<string, string>> = {
  entries: 'entry',
  feet: 'foot',
  damages: 'damage',
  notices: 'load notice',
  bays: 'bay',
};

const singular = (plural: string): string => IRREGULAR[plural] ?? words(plural).replace(/s$/, '');

const UNITS: readonly (readonly [suffix: RegExp, of: (value: number) => Quantity])[] = [
  [/KgPerM$/, (value) => quantity('lineMass', value / 1000)],
  [/KgPerM3$/, (value) => quantity('density', value / 1e9)],
  [/Mm4$/, (value) => quantity('secondMoment', value)],
  [/Mm3$/, (value) => quantity('sectionModulus', value)],
  [/NPerMm2$/, (value) => quantity('stress', value)],
  [/NmmPerRad$/, (value) => quantity('stiffness', value)],
  [/Percent$/, (value) => quantity('percent', value)],
  [/Mm$/, lengthOf],
  [/Kg$/, massOf],
  [/N$/, forceOf],
];

/** "clearEntryMm" → "clear entry". */
function words(key: string): string {
  const bare = UNITS.reduce((name, [suffix]) => name.replace(suffix, ''), key).replace(/Id$/, '');
  return (bare === '' ? 'value' : bare)
    .replace(/([a-z0-9])([A-Z])/g, '$1 $2')
    .replace(/-/g, ' ')
    .toLowerCase();
}

/** Labels of things ("bay A1") stand as they are; bare keys are put into words. */
const placeOf = (path: Path): string => path.map((step) => (step.includes(' ') ? step : words(step))).join(' · ');

function shown(value: unknown, path: Path): Shown | null {
  if (value === undefined) return null;
  if (value === null) return 'not known';
  if (typeof value === 'number') {
    const key = path.at(-1) ?? '';
    const unit = UNITS.find(([suffix]) => suffix.test(key));
    return unit ? unit[1](value) : String(value);
  }
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'string') return value === '' ? 'nothing' : value;
  return Array.isArray(value) ? `${value.length} entries` : 'there';
}
