/**
 * What a field of the site's file may hold. One description of a field serves three ends: reading
 * strictly, saying what was expected, and putting it into the one form in which it is written.
 *
 * Nothing is repaired or guessed. A problem names its place and quotes what stands there.
 */
import { LIMITS } from './limits';

/** Something in a file that cannot be taken, as plain data. */
export interface Problem {
  /** Where, as `runs[2].bays[0].name`; empty for the file as a whole. */
  readonly path: string;
  /** What is wrong there and how to mend it. */
  readonly message: string;
}

/** What one reading gathers on its way. */
export interface Reader {
  /** Keys and indices that lead to the value being read: the first `depth` of them. */
  readonly steps: (string | number)[];
  depth: number;
  readonly problems: Problem[];
  /** Every id met. Whether one stands twice is asked of them all at the end, which is much faster. */
  readonly ids: string[];
  /** Ids that others may refer to, with the noun of their owner. */
  readonly targets: Map<string, string>;
  /** On a second reading: the ids that stand twice, each with where it stands first once that is known. */
  readonly repeated: Map<string, string>;
  /** References whose target had not been met yet. */
  readonly references: { readonly id: string; readonly noun: string; readonly path: string }[];
}

export interface Field<T> {
  /** What it may hold, as it follows "must be". */
  readonly expects: string;
  /** `wanted` is said in place of `expects` where the field is part of a wider one. */
  readonly read: (value: unknown, reader: Reader, wanted?: string) => void;
  /**
   * The same value as it is written: keys in order, no minus zero. It is given back itself where it is so already.
   * @throws RangeError if the value could not be read back
   */
  readonly canonical: (value: T) => T;
}

export const startReading = (repeated: Iterable<string> = []): Reader => ({
  steps: [],
  depth: 0,
  problems: [],
  ids: [],
  targets: new Map(),
  repeated: new Map(Array.from(repeated, (id) => [id, ''])),
  references: [],
});

/** `runs[2].bays[0].name`; a key that is no plain word is quoted. */
export function pathText(path: readonly (string | number)[]): string {
  let text = '';
  for (const step of path) {
    if (typeof step === 'number') text += `[${step}]`;
    else if (/^[A-Za-z]\w*$/.test(step)) text += text === '' ? step : `.${step}`;
    else text += `[${quote(step)}]`;
  }
  return text;
}

/** The value as a message quotes it, never long. */
export function quote(value: unknown): string {
  if (typeof value === 'string') return JSON.stringify(value.length > 40 ? `${value.slice(0, 40)}…` : value);
  if (Array.isArray(value)) return value.length === 1 ? 'a list of 1' : `a list of ${value.length}`;
  if (typeof value === 'object' && value !== null) return 'an object';
  return String(value);
}

/** Where the value being read stands, or a value `below` it. */
export const placeOf = (reader: Reader, ...below: readonly (string | number)[]): string =>
  pathText([...reader.steps.slice(0, reader.depth), ...below]);

export function report(reader: Reader, message: string, ...below: readonly (string | number)[]): void {
  if (reader.problems.length <= LIMITS.problems) reader.problems.push({ path: placeOf(reader, ...below), message });
}

/** What to do about a value of the wrong kind. */
function mend(expects: string, value: unknown): string {
  if (value === null) return 'null means "not known", which this may not be. State it.';
  if (typeof value === 'string' && expects.startsWith('a number')) return 'Write the plain number, without quotation marks or unit.';
  if (typeof value === 'number' && !Number.isFinite(value)) return 'That is beyond what a number can hold. Correct it.';
  return 'Correct it.';
}

export const refuse = (reader: Reader, expects: string, value: unknown): void =>
  report(reader, `Must be ${expects}, but is ${quote(value)}. ${mend(expects, value)}`);

export const unwritable = (expects: string, value: unknown): never => {
  throw new RangeError(`cannot write ${quote(value)}: it must be ${expects}`);
};

// ---------------------------------------------------------------- single values

export interface Bounds {
  /** Unit as it stands in the message; empty for a bare number. */
  readonly unit?: string;
  readonly least?: number;
  readonly above?: number;
  readonly most: number;
  readonly whole?: boolean;
}

export function number({ unit, least, above, most, whole = false }: Bounds): Field<number> {
  const low = above !== undefined ? `above ${above} and at most ${most}` : `from ${least ?? -most} to ${most}`;
  const expects = `${whole ? 'a number without decimals' : 'a number'}${unit ? ` of ${unit}` : ''} ${low}`;
  const floor = above ?? least ?? -most;
  const holds = (value: unknown): value is number =>
    typeof value === 'number' &&
    value <= most &&
    (above === undefined ? value >= floor : value > floor) &&
    (!whole || Number.isInteger(value));
  return {
    expects,
    read: (value, reader, wanted = expects) => {
      if (!holds(value)) refuse(reader, wanted, value);
    },
    // Minus zero is zero, and is written so: equal sites give equal bytes.
    canonical: (value) => (holds(value) ? value || 0 : unwritable(expects, value)),
  };
}

export function text(most: number, { visible = false } = {}): Field<string> {
  const expects = `text of at most ${most} letters${visible ? ', at least one of them visible' : ''}`;
  const holds = (value: unknown): value is string => typeof value === 'string' && value.length <= most && !(visible && value.trim() === '');
  return {
    expects,
    read: (value, reader, wanted = expects) => {
      if (!holds(value)) refuse(reader, wanted, value);
    },
    canonical: (value) => (holds(value) ? value : unwritable(expects, value)),
  };
}

const DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];

/** Whether this is a day of the calendar, as YYYY-MM-DD. */
function isDate(value: string): boolean {
  const [, year = '', month = '', day = ''] = /^(\d{4})-(\d{2})-(\d{2})$/.exec(value) ?? [];
  const leap = Number(year) % 4 === 0 && (Number(year) % 100 !== 0 || Number(year) % 400 === 0);
  const days = DAYS[Number(month) - 1];
  return days !== undefined && Number(day) >= 1 && Number(day) <= (month === '02' && leap ? 29 : days);
}

export const date: Field<string> = (() => {
  const expects = 'a date as YYYY-MM-DD, or empty text where none was given';
  const holds = (value: unknown): value is string => typeof value === 'string' && (value === '' || isDate(value));
  return {
    expects,
    read: (value, reader, wanted = expects) => {
      if (!holds(value)) refuse(reader, wanted, value);
    },
    canonical: (value) => (holds(value) ? value : unwritable(expects, value)),
  };
})();

export function choice<T extends string>(values: readonly T[]): Field<T> {
  // The checks and rules are many; a message that names them all would not be read.
  const quoted = values.map((value) => `"${value}"`);
  const expects = `one of ${values.length > 12 ? `${quoted.slice(0, 6).join(', ')} or ${values.length - 6} others` : listed(quoted, 'or')}`;
  const known: ReadonlySet<unknown> = new Set(values);
  return {
    expects,
    read: (value, reader, wanted = expects) => {
      if (!known.has(value)) refuse(reader, wanted, value);
    },
    canonical: (value) => (known.has(value) ? value : unwritable(expects, value)),
  };
}

export const flag: Field<boolean> = {
  expects: 'true or false',
  read: (value, reader) => {
    if (typeof value !== 'boolean') refuse(reader, flag.expects, value);
  },
  canonical: (value) => (typeof value === 'boolean' ? value : unwritable(flag.expects, value)),
};

/** "not known" or, where that is what it means, "none". */
export function nullable<T>(field: Field<T>, meaning = 'where it is not known'): Field<T | null> {
  const expects = `${field.expects}, or null ${meaning}`;
  return {
    expects,
    read: (value, reader) => {
      if (value !== null) field.read(value, reader, expects);
    },
    canonical: (value) => (value === null ? null : field.canonical(value)),
  };
}

export const isRecord = (value: unknown): value is Readonly<Record<string, unknown>> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

export const article = (noun: string): string => (/^[aeiou]/.test(noun) && !noun.startsWith('uni') ? 'an' : 'a');

/** "a, b or c" */
export function listed(words: readonly string[], last: string): string {
  if (words.length < 2) return words.join('');
  return `${words.slice(0, -1).join(', ')} ${last} ${words.at(-1)}`;
}
