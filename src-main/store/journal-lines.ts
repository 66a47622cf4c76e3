/**
 * The lines of a journal and what they add up to. Each line stands for one edit: the whole body, or
 * the one stretch in which it differs from the line before. A line that is torn or damaged is
 * noticed by its checksum and passed over, with those that build on it.
 */
import { raiseSite, SITE_VERSION } from '../../src-core/site/migrations';
import { readSite } from '../../src-core/site/read';
import { writeSite } from '../../src-core/site/write';
import { sha256 } from './checked-site';

export interface Edit {
  readonly at: string;
  /** What was done, in words. */
  readonly edit: string;
  /** Revision of the site's file on which the edits were made. */
  readonly base: string | null;
  /** Name of the journal whose edits were taken up with this line: it has nothing to say any more. */
  readonly tookUp?: string;
}

type Line = Edit &
  /** `version` of the site's form; the first journals named none. */
  (
    | { readonly whole: string; readonly edits: readonly string[]; readonly version?: number }
    /** Keep the first `keep` letters, leave out `cut`, put `put` there; `from` and `to` prove the bodies. */
    | { readonly keep: number; readonly cut: number; readonly put: string; readonly from: string; readonly to: string }
  );

export interface Replay {
  readonly body: string;
  readonly editedAt: string;
  readonly edits: readonly string[];
  readonly base: string | null;
  /** Names of journals whose edits are in this one. */
  readonly tookUp: readonly string[];
  readonly damagedLines: number;
}

const shortHash = (text: string): string => sha256(text).slice(0, 16);

// A line break before as well as after: what a failed write left behind cannot run into the next line.
const framed = (line: Line): string => {
  const json = JSON.stringify(line);
  return `\n${shortHash(json)} ${json}\n`;
};

/** @param edits what was done before, since the file that these edits build on */
export const wholeLine = (edit: Edit, body: string, edits: readonly string[]): string =>
  framed({ ...edit, whole: body, edits, version: SITE_VERSION });

/** The line that turns one body into the next. */
export function changeLine(edit: Edit, before: string, body: string): string {
  const shorter = Math.min(before.length, body.length);
  let keep = 0;
  while (keep < shorter && before.charCodeAt(keep) === body.charCodeAt(keep)) keep++;
  let same = 0;
  while (same < shorter - keep && before.charCodeAt(before.length - 1 - same) === body.charCodeAt(body.length - 1 - same)) same++;
  const put = body.slice(keep, body.length - same);
  return framed({ ...edit, keep, cut: before.length - same - keep, put, from: shortHash(before), to: shortHash(body) });
}

/** What a journal's text adds up to; null if not one of its lines can be used. */
export function replay(text: string): Replay | null {
  let body: string | null = null;
  let last: Edit | null = null;
  let edits: readonly string[] = [];
  let damagedLines = 0;
  let version = SITE_VERSION;
  const tookUp: string[] = [];
  for (const written of text.split('\n')) {
    if (written === '') continue;
    const line = readLine(written);
    const next: string | null = line === null ? null : bodyAfter(line, body);
    if (line === null || next === null) {
      damagedLines++;
      continue;
    }
    if ('whole' in line) version = line.version ?? 1;
    edits = [...('whole' in line ? line.edits : edits), line.edit];
    body = next;
    last = line;
    if (line.tookUp !== undefined) tookUp.push(line.tookUp);
  }
  return body === null || last === null
    ? null
    : { body: raised(body, version), editedAt: last.at, edits, base: last.base, tookUp, damagedLines };
}

/** The body in the present form, so that unsaved edits outlive a newer program. */
function raised(body: string, version: number): string {
  if (version >= SITE_VERSION) return body;
  try {
    const reading = readSite(raiseSite(JSON.parse(body), version));
    return reading.ok ? writeSite(reading.site) : body;
  } catch {
    // No site at all: whoever is offered it says so, and the other journals are still read.
    return body;
  }
}

/** Only lines that this program wrote have the right checksum, so their content is as it writes it. */
function readLine(written: string): Line | null {
  const json = written.slice(17);
  if (written[16] !== ' ' || shortHash(json) !== written.slice(0, 16)) return null;
  try {
    return JSON.parse(json) as Line;
  } catch {
    return null;
  }
}

function bodyAfter(line: Line, before: string | null): string | null {
  if ('whole' in line) return line.whole;
  if (before === null || shortHash(before) !== line.from) return null;
  const after = before.slice(0, line.keep) + line.put + before.slice(line.keep + line.cut);
  return shortHash(after) === line.to ? after : null;
}
