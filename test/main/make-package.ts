/** A site with a visit, a photo, a follow-up and records, and packages of it, through the host as a page does it. */
import type { AppendRecord, Host, HostFailure, PackageLook } from '../../src-core/host';
import { recordReduction, newFollowUp, writeFollowUp } from '../../src-core/visit/follow-up';
import { writeVisit } from '../../src-core/visit/read-visit';
import type { Visit } from '../../src-core/visit/visit';
import { bodyOf } from '../storage/make';
import { round } from '../core/visit/make-visit';
import { startMachine, temporaryFolder } from './machine';

export const PHOTO = Buffer.from([0xff, 0xd8, 0xff, 0xe0, 1, 2, 3, 4]);

/** The round of two bays with one photo, of site `s`. */
export const seen = (part: Partial<Visit> = {}): Visit => ({
  ...round,
  siteId: 's',
  bays: round.bays.map((bay, i) =>
    i === 0 ? { ...bay, photos: [{ id: 'p1', file: 'p1.jpg', original: 'IMG 1.jpg', taken: '', note: 'left upright' }] } : bay,
  ),
  ...part,
});

export const recordOf = (n: number | string, siteId = 's'): AppendRecord => ({
  siteId,
  draft: {
    kind: 'check',
    title: `Check ${n}`,
    person: 'R. Walker',
    siteId,
    siteName: 'Test depot',
    siteChecksum: 'ab'.repeat(32),
    ruleSet: 'European',
    bayIds: ['bay1'],
  },
  contents: `{"site":{},"bayIds":["bay1"],"figures":"é${n}","paper":null}`,
});

export const save = (host: Host, visit: Visit, baseRevision: string | null = null) =>
  host.saveVisit({ siteId: visit.siteId, visitId: visit.id, body: writeVisit(visit), baseRevision });

export const book = recordReduction(newFollowUp('s'), {
  id: 'r1',
  frameId: 'frame1',
  says: '500 kg a level',
  engineer: 'E. Engineer',
  until: '2026-09-01',
  recordedBy: 'R. Walker',
  recordedOn: '2026-06-02',
});

/** Site `s` with all of it. */
export async function fill(host: Host, photo: Buffer = PHOTO): Promise<void> {
  await host.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  await host.addPhoto({ siteId: 's', photoId: 'p1', base64: photo.toString('base64') });
  await save(host, seen());
  await host.saveFollowUp({ siteId: 's', body: writeFollowUp(book), baseRevision: null });
  await host.appendRecord(recordOf(1));
  await host.appendRecord(recordOf(2));
}

/** The package of a site, read piece by piece. */
export async function packageOf(host: Host, siteId = 's', withPhotos = true): Promise<Buffer> {
  const { bytes } = await host.makePackage(siteId, withPhotos);
  const pieces: Buffer[] = [];
  let size = 0;
  while (size < bytes) {
    const piece = Buffer.from(await host.readPackage(size), 'base64');
    if (piece.length === 0) throw new Error(`the package ends after ${size} of ${bytes} bytes`);
    pieces.push(piece);
    size += piece.length;
  }
  return Buffer.concat(pieces);
}

const PIECE = 3 * 1024 * 1024;

export async function send(host: Host, file: Uint8Array): Promise<PackageLook> {
  for (let from = 0; from === 0 || from < file.length; from += PIECE)
    await host.sendPackage(from, Buffer.from(file.subarray(from, from + PIECE)).toString('base64'));
  return host.lookAtPackage();
}

/** A machine on a folder of its own, with the site. */
export async function machineWith(): Promise<{ host: Host; sites: string }> {
  const { machine, sites } = await startMachine(temporaryFolder());
  const host = machine.page();
  await fill(host);
  return { host, sites };
}

export const failure = async (call: Promise<unknown>): Promise<HostFailure> => {
  try {
    await call;
  } catch (error) {
    const { code, message } = error as HostFailure;
    return { code, message };
  }
  throw new Error('was expected to be refused');
};

/** One bit of one byte changed. */
export const flipped = (bytes: Uint8Array, at: number, bit = 1): Uint8Array => bytes.map((byte, i) => (i === at ? byte ^ bit : byte));
