/** A site from text: a whole site file, or its bare body as the journal keeps it. Problems come as sentences. */
import { readUnchecked } from '../../src-core/site/envelope';
import { readSite } from '../../src-core/site/read';
import type { Site } from '../../src-core/site/site';

export type FileReading = { readonly ok: true; readonly site: Site } | { readonly ok: false; readonly problems: readonly string[] };

interface Problem {
  readonly path: string;
  readonly message: string;
}

const sentence = ({ path, message }: Problem): string => (path === '' ? message : `${path}: ${message}`);

/** The host has proved the checksum of what it gives out; here the layout and the site itself are read. */
export function readSiteFile(text: string): FileReading {
  const file = readUnchecked(text);
  return file.ok ? siteIn(file.site) : { ok: false, problems: file.problems.map(sentence) };
}

export function readBody(body: string): FileReading {
  try {
    return siteIn(JSON.parse(body));
  } catch (error) {
    return { ok: false, problems: [`This is no whole site: ${error instanceof Error ? error.message : String(error)}`] };
  }
}

function siteIn(json: unknown): FileReading {
  const reading = readSite(json);
  return reading.ok ? reading : { ok: false, problems: reading.problems.map(sentence) };
}
