/** Visits, follow-up, photos and records in memory, with revisions and the chain as on a disk. */
import { createHash } from 'node:crypto';
import type { Host, HostFailure, KeptText } from '../../src-core/host';
import { sealRecord, type FrozenRecord } from '../../src-core/visit/records';

const hash = (text: string) => createHash('sha256').update(text).digest('hex');
const stale = (): never => {
  throw { code: 'stale', message: 'It was changed elsewhere.' } satisfies HostFailure;
};

export function memoryBeside(call: (name: string) => Promise<void>) {
  const documents = new Map<string, KeptText>();
  const photos = new Map<string, string>();
  const contents: string[] = [];
  const records: FrozenRecord[] = [];

  function save(id: string, text: string, baseRevision: string | null) {
    if ((documents.get(id)?.revision ?? null) !== baseRevision) stale();
    const revision = hash(text);
    documents.set(id, { id, text, revision, problem: null });
    return { revision };
  }

  return {
    listVisits: async () => {
      await call('listVisits');
      return [...documents.values()].filter(({ id }) => id !== 'follow-up');
    },
    saveVisit: async ({ visitId, body, baseRevision }) => {
      await call('saveVisit');
      return save(visitId, body, baseRevision);
    },
    readFollowUp: async () => {
      await call('readFollowUp');
      return documents.get('follow-up') ?? null;
    },
    saveFollowUp: async ({ body, baseRevision }) => {
      await call('saveFollowUp');
      return save('follow-up', body, baseRevision);
    },
    addPhoto: async ({ photoId, base64 }) => {
      await call('addPhoto');
      photos.set(`${photoId}.jpg`, base64);
      return { file: `${photoId}.jpg` };
    },
    readPhoto: async (_, file) => {
      await call('readPhoto');
      return photos.get(file) ?? '';
    },
    listRecords: async () => {
      await call('listRecords');
      return { records: [...records], altered: null, message: null, others: [] };
    },
    readRecord: async (_, number) => {
      await call('readRecord');
      return contents[number - 1] ?? '';
    },
    appendRecord: async ({ draft, contents: text }) => {
      await call('appendRecord');
      const record = sealRecord({ ...draft, program: '0.0.0', at: '2026-12-01T12:00:00.000Z' }, text, records.at(-1) ?? null, hash);
      records.push(record);
      contents.push(text);
      return record;
    },
  } satisfies Partial<Host>;
}
