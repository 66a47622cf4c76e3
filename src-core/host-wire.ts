/**
 * How `Host` is carried to the page, the same over IPC and HTTP: one call by name with plain
 * arguments, one plain answer. What comes from the page is checked here before the host sees it.
 */
import type { Host, HostErrorCode, HostFailure, Preferences } from './host';
import { IF_VISIT_DIFFERS } from './package/package';
import { isId } from './site/fields';

export type HostMethod = keyof Host;

export type HostAnswer = { readonly ok: true; readonly value: unknown } | ({ readonly ok: false } & HostFailure);

/** Over HTTP: POST to this path and the method's name, the arguments as a JSON list. */
export const HOST_PATH = '/host/';
/** Over HTTP: the secret that stands after `#key=` in the address that the program prints. */
export const KEY_HEADER = 'x-tallybeam-key';
export const KEY_IN_ADDRESS = '#key=';
/** Over HTTP: an id that the page makes each time it is loaded, so that each load has a journal of its own. */
export const TAB_HEADER = 'x-tallybeam-tab';

/** Bytes of a package that are carried at once: a multiple of three, so that pieces of base64 end where bytes do. */
export const PACKAGE_PIECE = 6 * 1024 * 1024;

const LONGEST_NAME = 200;

type Check = (value: unknown) => boolean;

const text =
  (longest: number): Check =>
  (value) =>
    typeof value === 'string' && value.length <= longest;
/** The text of a site; how large it may be, the store says with a reason. */
const siteText: Check = (value) => typeof value === 'string';
const revision: Check = (value) => typeof value === 'string' && /^[0-9a-f]{64}$/.test(value);
const revisionOrNone: Check = (value) => value === null || revision(value);
const siteId: Check = isId;
const generationId: Check = (value) => typeof value === 'string' && /^[0-9A-Za-z-]{1,80}$/.test(value);
const listOf =
  (item: Check, most: number): Check =>
  (value) =>
    Array.isArray(value) && value.length <= most && value.every((one) => item(one));
const optional =
  (check: Check): Check =>
  (value) =>
    value === undefined || value === null || check(value);
const flag: Check = (value) => typeof value === 'boolean';
const whole: Check = (value) => typeof value === 'number' && Number.isSafeInteger(value) && value >= 0;
const chainId: Check = (value) => typeof value === 'string' && /^[0-9a-f]{16}$/.test(value);
const takePackage: Check = (value) =>
  object({ as: (as) => as === 'copy' })(value) ||
  object({ as: (as) => as === 'join', ifVisitDiffers: (choice) => IF_VISIT_DIFFERS.some((known) => known === choice) })(value);

/** A plain object with these keys and no other; with `partly`, not all of them. */
const object =
  (fields: Readonly<Record<string, Check>>, partly = false): Check =>
  (value) => {
    if (typeof value !== 'object' || value === null || Array.isArray(value)) return false;
    const entries = Object.entries(value);
    return (
      (partly || entries.length === Object.keys(fields).length) &&
      entries.every(([key, content]) => Object.hasOwn(fields, key) && fields[key]?.(content) === true)
    );
  };

/** What is in it is checked where it is used. */
const anyObject: Check = (value) => typeof value === 'object' && value !== null && !Array.isArray(value);

const PREFERENCES: Readonly<Record<keyof Preferences, Check>> = {
  theme: (value) => value === 'system' || value === 'light' || value === 'dark',
  textScale: (value) => typeof value === 'number' && value >= 50 && value <= 300,
  recentSiteIds: listOf(siteId, 100),
  person: text(LONGEST_NAME),
  locale: (value) => typeof value === 'string' && /^[A-Za-z]{2,3}(-[A-Za-z0-9]{2,8}){0,4}$/.test(value),
};
/** Whether a value may stand as this preference. */
export const isPreference = (key: keyof Preferences, value: unknown): boolean => PREFERENCES[key](value);

/** Every method with what its arguments must be. */
const ARGUMENTS: Readonly<Record<HostMethod, readonly Check[]>> = {
  about: [],
  listSites: [],
  readSite: [siteId],
  saveSite: [object({ id: siteId, body: siteText, baseRevision: revisionOrNone })],
  removeSite: [siteId, revision],
  importSite: [siteText, optional(flag)],
  addDemoSite: [],
  listGenerations: [siteId],
  readGeneration: [siteId, generationId],
  appendJournal: [object({ id: siteId, baseRevision: revisionOrNone, body: siteText, edit: text(100_000) })],
  clearJournal: [siteId],
  listVisits: [siteId],
  saveVisit: [object({ siteId, visitId: siteId, body: siteText, baseRevision: revisionOrNone })],
  readFollowUp: [siteId],
  saveFollowUp: [object({ siteId, body: siteText, baseRevision: revisionOrNone })],
  addPhoto: [object({ siteId, photoId: siteId, base64: siteText })],
  readPhoto: [siteId, text(LONGEST_NAME)],
  listRecords: [siteId],
  readRecord: [siteId, whole, optional(chainId)],
  appendRecord: [object({ siteId, draft: anyObject, contents: siteText })],
  makePackage: [siteId, flag],
  readPackage: [whole],
  sendPackage: [whole, text(PACKAGE_PIECE * 2)],
  lookAtPackage: [],
  takePackage: [takePackage],
  dropPackage: [],
  readPreferences: [],
  savePreferences: [object(PREFERENCES, true)],
  savePdf: [text(LONGEST_NAME)],
  chooseSitesFolder: [],
};
export const HOST_METHODS = Object.keys(ARGUMENTS) as readonly HostMethod[];

const isHostMethod = (name: unknown): name is HostMethod => typeof name === 'string' && Object.hasOwn(ARGUMENTS, name);

/** What is wrong with a call's arguments, as a sentence; null if nothing is. */
export function argumentFault(method: HostMethod, given: readonly unknown[]): string | null {
  const checks = ARGUMENTS[method];
  if (given.length > checks.length) return `${method} takes ${checks.length} arguments, got ${given.length}.`;
  const at = checks.findIndex((check, i) => !check(given[i]));
  return at < 0 ? null : `${method} was called with an argument ${at + 1} that it cannot take.`;
}

/** Calls the host by name, after checking the arguments; never rejects. */
export async function answerCall(host: Host, method: unknown, given: unknown): Promise<HostAnswer> {
  if (!isHostMethod(method)) return failed('bad-request', 'The page asked for something this program does not offer.');
  if (!Array.isArray(given)) return failed('bad-request', `${method} was called without a list of arguments.`);
  const fault = argumentFault(method, given);
  if (fault !== null) return failed('bad-request', fault);
  const call = host[method] as ((...args: unknown[]) => Promise<unknown>) | null;
  if (call === null) return failed('refused', `${method} is not offered here.`);
  try {
    return { ok: true, value: (await call.apply(host, given)) ?? null };
  } catch (error) {
    return { ok: false, ...failureFrom(error) };
  }
}

/** The host that answers through `carry`; a call that is refused rejects with a plain `HostFailure`. */
export function hostOver(carry: (method: HostMethod, given: readonly unknown[]) => Promise<HostAnswer>, inWindow: boolean): Host {
  const ask = async <T>(method: HostMethod, ...given: readonly unknown[]): Promise<T> => {
    const answer = await carry(method, given);
    if (answer.ok) return answer.value as T;
    const failure: HostFailure = { code: answer.code, message: answer.message };
    throw failure;
  };
  const nothing = async (method: HostMethod, ...given: readonly unknown[]): Promise<void> => {
    await ask(method, ...given);
  };
  return {
    about: () => ask('about'),
    listSites: () => ask('listSites'),
    readSite: (id) => ask('readSite', id),
    saveSite: (request) => ask('saveSite', request),
    removeSite: (id, baseRevision) => nothing('removeSite', id, baseRevision),
    importSite: (file, unchecked = false) => ask('importSite', file, unchecked),
    addDemoSite: () => ask('addDemoSite'),
    listGenerations: (id) => ask('listGenerations', id),
    readGeneration: (id, generation) => ask('readGeneration', id, generation),
    appendJournal: (request) => nothing('appendJournal', request),
    clearJournal: (id) => nothing('clearJournal', id),
    listVisits: (siteId) => ask('listVisits', siteId),
    saveVisit: (request) => ask('saveVisit', request),
    readFollowUp: (siteId) => ask('readFollowUp', siteId),
    saveFollowUp: (request) => ask('saveFollowUp', request),
    addPhoto: (request) => ask('addPhoto', request),
    readPhoto: (siteId, file) => ask('readPhoto', siteId, file),
    listRecords: (siteId) => ask('listRecords', siteId),
    readRecord: (siteId, number, chain = null) => ask('readRecord', siteId, number, chain),
    appendRecord: (request) => ask('appendRecord', request),
    makePackage: (siteId, withPhotos) => ask('makePackage', siteId, withPhotos),
    readPackage: (from) => ask('readPackage', from),
    sendPackage: (from, base64) => nothing('sendPackage', from, base64),
    lookAtPackage: () => ask('lookAtPackage'),
    takePackage: (how) => ask('takePackage', how),
    dropPackage: () => nothing('dropPackage'),
    readPreferences: () => ask('readPreferences'),
    savePreferences: (change) => ask('savePreferences', change),
    savePdf: inWindow ? (name) => ask('savePdf', name) : null,
    chooseSitesFolder: inWindow ? () => ask('chooseSitesFolder') : null,
  };
}

const failed = (code: HostErrorCode, message: string): HostAnswer => ({ ok: false, code, message });

/** A fault of the program itself is told as one: its text may help whoever mends it. */
function failureFrom(error: unknown): HostFailure {
  if (error instanceof Error) {
    const { code } = error as { code?: unknown };
    if (error.name === 'HostError') return { code: code as HostErrorCode, message: error.message };
    return { code: 'failed', message: `The program failed at this: ${error.message}` };
  }
  return { code: 'failed', message: 'The program failed at this and gave no reason.' };
}
