/** Names of everything in a sites folder, and back from names to what they mean. */
import { createHash, randomBytes } from 'node:crypto';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { isId } from '../../src-core/site/fields';
import { HostError } from '../trouble';

export const SITE_FILE_END = '.tallybeam.json';
const TEMP_END = '.temp';

/** Names that Windows keeps for devices, whatever follows the dot. */
const DEVICE = /^(con|prn|aux|nul|com\d|lpt\d)$/i;

/** Whether the id can name a file on every system. */
export const canNameFile = (id: unknown): id is string => isId(id) && !DEVICE.test(id);

/** @throws HostError where the id could lead out of the folder or names no file on some system */
export function checkedId(id: string): string {
  if (canNameFile(id)) return id;
  throw new HostError('bad-request', 'A site id is 1 to 64 letters, digits, "-" and "_", and no device name of Windows.');
}

export interface Folders {
  readonly sites: string;
  readonly earlier: string;
  readonly removed: string;
  readonly setAside: string;
  readonly journal: string;
  readonly leftOut: string;
  readonly locks: string;
  /** What is being brought in, until it is in its places. */
  readonly incoming: string;
  /** Visits, photos and records, a folder for each site. */
  readonly beside: string;
}

export const foldersIn = (sites: string): Folders => ({
  sites,
  earlier: join(sites, 'earlier'),
  removed: join(sites, 'removed'),
  setAside: join(sites, 'set-aside'),
  journal: join(sites, 'journal'),
  leftOut: join(sites, 'journal', 'left-out'),
  locks: join(sites, 'locks'),
  incoming: join(sites, 'incoming'),
  beside: join(sites, 'beside'),
});

export const siteFileName = (id: string): string => `${checkedId(id)}${SITE_FILE_END}`;

/** The id in a site file's name; null if it is no name that the program gives. */
export function idInName(name: string): string | null {
  const id = name.endsWith(SITE_FILE_END) ? name.slice(0, -SITE_FILE_END.length) : '';
  return canNameFile(id) ? id : null;
}

/** Which machine and which run of the program a temporary file or journal belongs to. */
export interface Maker {
  readonly machine: string;
  readonly pid: number;
}
export const machineTag = createHash('sha256').update(hostname()).digest('hex').slice(0, 8);
export const thisMaker: Maker = { machine: machineTag, pid: process.pid };

export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    // EPERM: it is there, but it is someone else's.
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}

export const tempName = (name: string): string => `${name}.${machineTag}-${process.pid}-${randomBytes(6).toString('hex')}${TEMP_END}`;

/** Who left a temporary file; null if it is no name of one. */
export function makerOfTemp(name: string): Maker | null {
  const [, machine, pid] = /\.([0-9a-f]{8})-(\d+)-[0-9a-f]{12}\.temp$/.exec(name) ?? [];
  return machine === undefined ? null : { machine, pid: Number(pid) };
}

/** `20261201T083000123Z`, for names; the same backwards. */
export const stampOf = (iso: string): string => iso.replace(/[-:.]/g, '');
function isoOf(stamp: string): string {
  return stamp.replace(/^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)(\d{3})Z$/, '$1-$2-$3T$4:$5:$6.$7Z');
}

/** An earlier state: its place in the order of replacing, when it was saved, the start of its revision. */
export interface GenerationName {
  readonly order: number;
  readonly savedAt: string;
  readonly revision: string;
}
export const generationId = ({ order, savedAt, revision }: GenerationName): string =>
  `${String(order).padStart(6, '0')}-${stampOf(savedAt)}-${revision.slice(0, 16)}`;

export function readGenerationId(id: string): GenerationName | null {
  const [, order, stamp, revision] = /^(\d{6,12})-(\d{8}T\d{9}Z)-([0-9a-f]{16})$/.exec(id) ?? [];
  if (order === undefined || stamp === undefined || revision === undefined) return null;
  return { order: Number(order), savedAt: isoOf(stamp), revision };
}
