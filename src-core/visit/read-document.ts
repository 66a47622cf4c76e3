/** Reading and writing of what is kept beside the site: strict, versioned, every problem with its place. */
import { isRecord, quote, report, startReading, type Field, type Problem } from '../site/fields';
import { isId } from '../site/ids';
import { LIMITS } from '../site/limits';

export interface DocumentKind<T> {
  /** "visit" */
  readonly noun: string;
  readonly version: number;
  /** The document with its version. */
  readonly field: Field<T & { readonly version: number }>;
  /** One step a version, from the given one to the next, on a copy; where the document is not as it must be it stays so. */
  readonly steps?: Readonly<Record<number, (json: Readonly<Record<string, unknown>>) => unknown>>;
}

export type DocumentReading<T> =
  { readonly ok: true; readonly document: T } | { readonly ok: false; readonly problems: readonly Problem[] };

/** The document in parsed JSON; the answer's parts are the given data itself. An earlier version is raised, a newer one refused by its number. */
export function readDocument<T extends object>(kind: DocumentKind<T>, given: unknown): DocumentReading<T> {
  const { noun, version, field } = kind;
  const json = raised(kind, given);
  if (isRecord(json) && typeof json.version === 'number' && json.version > version) {
    const message = `This ${noun} was saved by a newer program (file version ${json.version}; this program reads up to ${version}). Open it there, or update this program.`;
    return { ok: false, problems: [{ path: 'version', message }] };
  }
  let reader = startReading();
  field.read(json, reader);
  const once = new Set<string>();
  const repeated = reader.ids.filter((id) => once.size === once.add(id).size);
  if (repeated.length > 0) {
    reader = startReading(repeated);
    field.read(json, reader);
  }
  if (reader.problems.length > 0) return { ok: false, problems: reader.problems.slice(0, LIMITS.problems) };
  const { version: _, ...document } = json as T & { version: number };
  return { ok: true, document: document as unknown as T };
}

function raised<T extends object>({ version, steps = {} }: DocumentKind<T>, given: unknown): unknown {
  let json = given;
  while (isRecord(json) && typeof json.version === 'number' && json.version < version) {
    const step = steps[json.version];
    if (step === undefined) break;
    json = step(json);
  }
  return json;
}

/**
 * One canonical form: equal documents give equal bytes.
 * @throws RangeError if the document holds what `readDocument` would refuse in a single value, quoting it
 */
export const writeDocument = <T extends object>({ version, field }: DocumentKind<T>, document: T): string =>
  JSON.stringify(field.canonical({ version, ...document }));

/** The id of something in the site, which need not be there any more. */
export function namedId(noun: string): Field<string> {
  const expects = `the id of a ${noun}`;
  return {
    expects,
    read: (value, reader) => {
      if (!isId(value)) report(reader, `Must be ${expects}, but is ${quote(value)}. Correct it.`);
    },
    canonical: (value) => {
      if (!isId(value)) throw new RangeError(`cannot write ${quote(value)}: it must be ${expects}`);
      return value;
    },
  };
}
