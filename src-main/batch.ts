/**
 * Checks site files without a window: `npm run check-sites -- FILE… [--json] [--unchecked]`.
 *
 * Exit 0 if every bay of every file is within or close, 1 if any is over, not assessable or not
 * possible, 2 if a file or the command itself cannot be read. It only reads and never writes a file.
 */
import { createHash } from 'node:crypto';
import { readFileSync, statSync } from 'node:fs';
import { auditSite } from '../src-core/audit/audit';
import { readSiteFile, readUnchecked, SITE_FILE_BYTES } from '../src-core/site/envelope';
import { readSite, type Problem } from '../src-core/site/read';
import type { Site } from '../src-core/site/site';
import { CAUTIONS, FOOTER_CAUTIONS } from '../src-core/words/cautions';
import { reportLines, reportOf } from './batch-report';

const USAGE = `Checks the bays of site files against the ratings entered in them.

  npm run check-sites -- FILE… [--json] [--unchecked]

  --json       the results as one JSON document
  --unchecked  take files that were edited by hand: their checksum is not compared
  --help       this text

Ends with 0 if everything is within or close, 1 if anything is over, not assessable or not possible,
2 if a file cannot be read. No file is ever changed.`;

const FLAGS = ['--json', '--unchecked', '--help'];

type FileReading = { readonly ok: true; readonly site: Site } | { readonly ok: false; readonly problems: readonly Problem[] };

const hash = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

function readText(path: string): { readonly text: string } | { readonly problem: string } {
  try {
    const stat = statSync(path);
    if (stat.isDirectory()) return { problem: 'Is a folder. Name the site files in it.' };
    if (stat.size > SITE_FILE_BYTES)
      return { problem: `Is larger than ${SITE_FILE_BYTES / 1024 / 1024} MiB, more than any site file. Check that it is the right file.` };
    return { text: new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(readFileSync(path)) };
  } catch (error) {
    if (error instanceof TypeError) return { problem: 'Is not text in UTF-8. Choose a file that was saved by Tallybeam.' };
    const code = error instanceof Error && 'code' in error ? error.code : undefined;
    if (code === 'ENOENT' || code === 'ENOTDIR') return { problem: 'There is no such file. Check its name and folder.' };
    if (code === 'EACCES' || code === 'EPERM') return { problem: 'May not be read. Ask for the right to read it.' };
    return { problem: `Cannot be read: ${error instanceof Error ? error.message : String(error)}.` };
  }
}

function readFile(path: string, unchecked: boolean): FileReading {
  const read = readText(path);
  if ('problem' in read) return { ok: false, problems: [{ path: '', message: read.problem }] };
  const file = unchecked ? readUnchecked(read.text) : readSiteFile(read.text, hash);
  if (file.ok) return inFile(readSite(file.site));
  if (file.fault !== 'altered') return { ok: false, problems: file.problems };
  // What else is wrong with a file that was changed is worth knowing at once.
  const beyond = readUnchecked(read.text);
  const others = beyond.ok ? inFile(readSite(beyond.site)) : beyond;
  const hint = { path: '', message: 'To check it as it now stands, add --unchecked.' };
  return { ok: false, problems: [...file.problems, ...(others.ok ? [hint] : others.problems)] };
}

/** Problems of the site inside, with their places as in the whole file. */
const inFile = (reading: ReturnType<typeof readSite>): FileReading =>
  reading.ok
    ? reading
    : { ok: false, problems: reading.problems.map(({ path, message }) => ({ path: path === '' ? 'site' : `site.${path}`, message })) };

function today(): string {
  const now = new Date();
  const two = (value: number) => String(value).padStart(2, '0');
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}

function main(args: readonly string[]): number {
  if (args.includes('--help')) {
    console.log(USAGE);
    return 0;
  }
  const files = args.filter((arg) => !arg.startsWith('-'));
  const unknown = args.find((arg) => arg.startsWith('-') && !FLAGS.includes(arg));
  if (unknown !== undefined || files.length === 0) {
    console.error(unknown === undefined ? 'No site file is named.' : `There is no option ${unknown}.`);
    console.error(`\n${USAGE}`);
    return 2;
  }
  const json = args.includes('--json');
  const date = today();
  let exit = 0;
  const results = files.map((file) => {
    const reading = readFile(file, args.includes('--unchecked'));
    if (!reading.ok) {
      exit = 2;
      if (!json)
        for (const { path, message } of reading.problems) console.error([file, path, message].filter((part) => part !== '').join(': '));
      return { file, read: false, problems: reading.problems };
    }
    const report = reportOf(reading.site, auditSite(reading.site, date));
    if (report.verdict !== 'within' && report.verdict !== 'close') exit = Math.max(exit, 1);
    if (!json) console.log([file, ...reportLines(report, reading.site)].join('\n'));
    return { file, read: true, ...report };
  });
  if (json) console.log(JSON.stringify({ checkedOn: date, files: results, cautions: CAUTIONS.map(({ says }) => says) }, null, 2));
  else console.log(FOOTER_CAUTIONS.join(' '));
  return exit;
}

process.exitCode = main(process.argv.slice(2));
