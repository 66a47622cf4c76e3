/**
 * The reader's rules for one part of a site, for what is typed or put together: whatever an edit
 * takes can be saved and read again.
 */
import { startReading, type Field, type Problem, type Reader } from './field';
import { ENTRY_NOUNS, everyId, LIBRARIES } from './lookup';
import { bay, bayTemplate, frame, level, placement, rules, run, site as wholeSite } from './schema';
import { pallet, unitLoad } from './schema-goods';
import { beamType, floor, frameType, notice } from './schema-ratings';
import type { Id, Site } from './site';

const PARTS = {
  site: wholeSite,
  rules,
  run,
  bay,
  frame,
  level,
  placement,
  pallet,
  unitLoad,
  notice,
  beamType,
  frameType,
  floor,
  bayTemplate,
} as const;
export type PartName = keyof typeof PARTS;
export type Part<K extends PartName> = (typeof PARTS)[K] extends Field<infer T> ? T : never;

function readPart(part: PartName, value: unknown): Reader {
  const reader = startReading();
  PARTS[part].read(value, reader);
  return reader;
}

/** What the reader would say of this part, with places inside it. Whether what it refers to exists is not asked. */
export const problemsIn = (part: PartName, value: unknown): readonly Problem[] => readPart(part, value).problems;

/**
 * The part as given, if it can stand in the site.
 * @param before the part that it replaces, whose ids it keeps; null for a new one
 * @throws RangeError saying what cannot be taken and where
 */
export function requirePart<K extends PartName>(site: Site, part: K, value: Part<K>, before: Part<K> | null): Part<K> {
  const { problems, ids, references } = readPart(part, value);
  const first = problems[0];
  if (first) throw new RangeError(`${first.path === '' ? 'This' : first.path}: ${first.message}`);
  const was = before === null ? null : readPart(part, before);
  // What was referred to before is there still; a bay may hold many goods and the library be long.
  const known = new Set(was?.references.map(({ id }) => id));
  for (const { id, noun } of references)
    if (!known.has(id) && !exists(site, noun, id))
      throw new RangeError(`There is no ${noun} with the id ${JSON.stringify(id)} in this site.`);
  requireNewIds(site, ids, was?.ids ?? []);
  return value;
}

function requireNewIds(site: Site, ids: readonly Id[], kept: readonly Id[]): void {
  const old = new Set(kept);
  const added = new Set(ids.filter((id) => !old.has(id)));
  const twice = new Set(ids).size < ids.length ? ids.find((id, i) => ids.indexOf(id) < i) : undefined;
  const taken = twice ?? (added.size > 0 ? everyId(site).find((id) => added.has(id)) : undefined);
  if (taken !== undefined) throw new RangeError(`The id ${JSON.stringify(taken)} is used already. Give another.`);
}

function exists(site: Site, noun: string, id: Id): boolean {
  if (noun === 'run') return site.runs.some((one) => one.id === id);
  const library = LIBRARIES.find((key) => ENTRY_NOUNS[key] === noun);
  return library !== undefined && site[library].some((entry) => entry.id === id);
}
