/** Ids: unique in the whole site, and the references by which its parts name each other. */
import { placeOf, quote, refuse, report, unwritable, type Field, type Reader } from './field';
import { LIMITS } from './limits';

/** Ids are used in file names and in `kind:id:field`, so they keep to letters, digits, - and _. */
const ID = new RegExp(`^[A-Za-z0-9][A-Za-z0-9_-]{0,${LIMITS.idLength - 1}}$`);
/** Names that every plain object already answers to. */
const RESERVED: ReadonlySet<string> = new Set(Object.getOwnPropertyNames(Object.prototype));
const ID_EXPECTS = `an id of at most ${LIMITS.idLength} letters, digits, "-" and "_", starting with a letter or digit`;

export const isId = (value: unknown): value is string => typeof value === 'string' && ID.test(value) && !RESERVED.has(value);

const canonicalId = (value: string): string => (isId(value) ? value : unwritable(ID_EXPECTS, value));

/** Things that others in the site refer to. */
type Target = 'pallet' | 'unit load' | 'load notice' | 'beam type' | 'frame type' | 'floor' | 'bay template' | 'run';

/** The id of its owner, unique in the whole site; `noun` says of what, where others may refer to it. */
export function ownId(noun: Target | null = null): Field<string> {
  return {
    expects: ID_EXPECTS,
    read: (value, reader) => {
      if (!isId(value)) return refuse(reader, ID_EXPECTS, value);
      reader.ids.push(value);
      if (noun !== null) reader.targets.set(value, noun);
      if (reader.repeated.size > 0) tellRepeated(value, reader);
    },
    canonical: canonicalId,
  };
}

function tellRepeated(id: string, reader: Reader): void {
  const first = reader.repeated.get(id);
  if (first === '') reader.repeated.set(id, placeOf(reader));
  else if (first !== undefined) report(reader, `The id ${quote(id)} already stands at ${first}. Give one of the two an id of its own.`);
}

/** The id of something else in the site, which must be there and be a `noun`. */
export function reference(noun: Target): Field<string> {
  const expects = `the id of a ${noun}`;
  return {
    expects,
    read: (value, reader, wanted = expects) => {
      if (typeof value !== 'string') refuse(reader, wanted, value);
      else if (reader.targets.get(value) !== noun) reader.references.push({ id: value, noun, path: placeOf(reader) });
    },
    canonical: canonicalId,
  };
}
