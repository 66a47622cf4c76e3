/** Lists, objects with exactly the keys they should have, and objects of several kinds. */
import { article, isRecord, listed, quote, refuse, report, unwritable, type Field, type Reader } from './field';

export function list<T>(plural: string, field: Field<T>, most: number, least = 0): Field<readonly T[]> {
  const expects = `a list of ${least > 0 ? `${least} to ` : 'at most '}${most} ${plural}`;
  return {
    expects,
    read: (value, reader) => {
      if (!Array.isArray(value)) return refuse(reader, expects, value);
      if (value.length < least || value.length > most) refuse(reader, expects, value);
      const { steps, depth } = reader;
      for (let i = 0; i < value.length; i++) {
        steps[depth] = i;
        reader.depth = depth + 1;
        field.read(value[i], reader);
      }
      reader.depth = depth;
    },
    canonical: (value) => {
      if (value.length < least || value.length > most) unwritable(expects, value);
      let copy: T[] | null = null;
      for (let i = 0; i < value.length; i++) {
        const item = value[i] as T;
        const canonical = field.canonical(item);
        if (!Object.is(canonical, item)) copy ??= [...value];
        if (copy !== null) copy[i] = canonical;
      }
      return copy ?? value;
    },
  };
}

export type FieldsOf<T> = { readonly [K in keyof T]-?: Field<T[K]> };

/** What the fields of a record must be to each other, told about a record that may still be faulty. */
type Also = (value: Readonly<Record<string, unknown>>, reader: Reader) => void;

/** An object with exactly these keys, written in this order. */
export function record<T extends object>(noun: string, fields: FieldsOf<T>, also?: Also): Field<T> {
  const keys = Object.keys(fields) as (keyof T & string)[];
  const each = keys.map((key) => fields[key] as Field<unknown>);
  const known = new Set<string>(keys);
  const expects = `${article(noun)} ${noun}`;
  return {
    expects,
    read: (value, reader) => {
      if (!isRecord(value)) return refuse(reader, `an object that describes ${expects}`, value);
      const { steps, depth } = reader;
      let there = 0;
      for (let i = 0; i < keys.length; i++) {
        const key = keys[i] as string;
        const field = each[i] as Field<unknown>;
        const content = value[key];
        steps[depth] = key;
        reader.depth = depth + 1;
        if (content === undefined) report(reader, `Is missing. Add it: ${field.expects}.`);
        else {
          there++;
          field.read(content, reader);
        }
      }
      reader.depth = depth;
      if (countKeys(value) !== there) reportUnknown(value, noun, known, reader);
      also?.(value, reader);
    },
    canonical: (value) => {
      let asIs = true;
      let there = 0;
      for (const key in value) if (key !== keys[there++]) asIs = false;
      if (there !== keys.length) unwritable(`${expects} with the keys ${listed(keys, 'and')} and no other`, value);
      const canonical = {} as T;
      for (let i = 0; i < keys.length; i++) {
        const key = keys[i] as keyof T;
        const content = value[key];
        canonical[key] = (each[i] as Field<unknown>).canonical(content) as T[keyof T];
        if (!Object.is(canonical[key], content)) asIs = false;
      }
      return asIs ? value : canonical;
    },
  };
}

function countKeys(value: object): number {
  let count = 0;
  for (const _ in value) count++;
  return count;
}

function reportUnknown(value: object, noun: string, known: ReadonlySet<string>, reader: Reader): void {
  for (const key of Object.keys(value)) {
    if (known.has(key)) continue;
    const message = `No ${noun} has this key: it has ${listed([...known], 'and')}. Remove it or correct its name.`;
    report(reader, message, key);
  }
}

type Variants<T, Tag extends keyof T & string> = {
  readonly [K in T[Tag] & string]: Field<T extends unknown ? (K extends T[Tag] ? T : never) : never>;
};

/** A record of one of several kinds, told apart by the field `tag`. */
export function variant<T extends object, Tag extends keyof T & string>(noun: string, tag: Tag, kinds: Variants<T, Tag>): Field<T> {
  const byKind = new Map(Object.entries(kinds) as [string, Field<T>][]);
  const wanted = `one of ${listed(
    [...byKind.keys()].map((kind) => `"${kind}"`),
    'or',
  )}`;
  const expects = `${article(noun)} ${noun}`;
  return {
    expects,
    read: (value, reader) => {
      if (!isRecord(value)) return refuse(reader, `an object that describes ${expects}`, value);
      const kind = value[tag];
      const field = typeof kind === 'string' ? byKind.get(kind) : undefined;
      if (field) return field.read(value, reader);
      if (kind === undefined) report(reader, `Is missing. Add it: ${wanted}.`, tag);
      else report(reader, `Must be ${wanted}, but is ${quote(kind)}. Correct it.`, tag);
    },
    canonical: (value) => (byKind.get(String(value[tag])) ?? unwritable(`${expects} of a known ${tag}`, value)).canonical(value),
  };
}
