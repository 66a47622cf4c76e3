/**
 * Strict reading of a site from its file's JSON: every problem with its place, none guessed away.
 *
 * What is impossible on the rack (goods that overlap, stand off the end or would tip) is no problem
 * of the file: the audit finds it.
 */
import { startReading, type Problem, type Reader } from './field';
import { LIMITS } from './limits';
import { site as siteField } from './schema';
import type { Site } from './site';

export type { Problem } from './field';

export type SiteReading = { readonly ok: true; readonly site: Site } | { readonly ok: false; readonly problems: readonly Problem[] };

/**
 * The site in parsed JSON. The answer is the given data itself, checked throughout, not a copy.
 * Keys that stand twice in the file's text are gone once it is parsed and cannot be seen here.
 */
export function readSite(json: unknown): SiteReading {
  let reader = startReading();
  siteField.read(json, reader);
  const repeated = standingTwice(reader.ids);
  if (repeated.size > 0) {
    // Read once more, now knowing which ids to watch, to tell both places of each.
    reader = startReading(repeated);
    siteField.read(json, reader);
  }
  const problems = [...reader.problems, ...dangling(reader)];
  if (problems.length === 0) return { ok: true, site: json as Site };
  if (problems.length <= LIMITS.problems) return { ok: false, problems };
  const more = `There are more problems than the first ${LIMITS.problems}, which are listed. Mend these first.`;
  return { ok: false, problems: [...problems.slice(0, LIMITS.problems), { path: '', message: more }] };
}

/** References whose target is not in the site, or is something else. */
function dangling({ references, targets }: Reader): readonly Problem[] {
  return references.flatMap(({ id, noun, path }) => {
    const owner = targets.get(id);
    if (owner === noun) return [];
    const found = owner === undefined ? `no ${noun} of this site has the id` : `not a ${noun} but a ${owner} has the id`;
    return [
      {
        path,
        message: `Must be the id of a ${noun}, but ${found} ${JSON.stringify(id.slice(0, LIMITS.idLength))}. Add it or name another.`,
      },
    ];
  });
}

function standingTwice(ids: readonly string[]): ReadonlySet<string> {
  if (new Set(ids).size === ids.length) return new Set();
  const once = new Set<string>();
  return new Set(ids.filter((id) => once.size === once.add(id).size));
}
