import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import { sealRecord, verifyChain, writeRecord, type FrozenRecord, type RecordDraft } from '../../../src-core/visit/records';

const hash = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex');

const draft = (n: number): RecordDraft => ({
  kind: 'visit',
  title: `Visit ${n} – “aisle 4”`,
  at: `2026-06-0${n}T08:00:00.000Z`,
  person: 'R. Walker',
  program: '0.1.0',
  siteId: 's1',
  siteName: 'Müller depot',
  siteChecksum: hash(`site ${n}`),
  ruleSet: 'European',
  bayIds: ['bay1'],
});

function chainOf(count: number): { records: FrozenRecord[]; lines: string[]; contents: string[] } {
  const records: FrozenRecord[] = [];
  const contents = Array.from({ length: count }, (_, i) => `{"figures":${i}}`);
  for (let n = 1; n <= count; n++) records.push(sealRecord(draft(n), contents[n - 1] ?? '', records.at(-1) ?? null, hash));
  return { records, contents, lines: records.map(writeRecord) };
}

const headOf = ({ records }: { records: FrozenRecord[] }) => {
  const last = records.at(-1);
  return last ? { number: last.number, hash: last.hash } : null;
};

test('an untouched chain verifies, records in order', () => {
  const chain = chainOf(4);
  const verdict = verifyChain(chain.lines, hash, (n) => hash(chain.contents[n - 1] ?? ''), headOf(chain));
  expect(verdict).toEqual({ whole: true, records: chain.records });
  expect(chain.records.map(({ number }) => number)).toEqual([1, 2, 3, 4]);
  expect(verifyChain([], hash)).toEqual({ whole: true, records: [] });
});

test('one byte edited anywhere in the records’ file names the record', () => {
  const chain = chainOf(3);
  const bytes = Buffer.from(chain.lines.join('\n'), 'utf8');
  let at = 0;
  const ends = chain.lines.map((line) => (at += Buffer.byteLength(line, 'utf8') + 1));
  for (let i = 0; i < bytes.length; i++) {
    const edited = Buffer.from(bytes);
    edited[i] = (edited[i] ?? 0) ^ 1;
    const verdict = verifyChain(edited.toString('utf8').split('\n'), hash);
    const record = ends.findIndex((end) => i < end) + 1;
    expect(verdict, `byte ${i}`).toMatchObject({ whole: false, altered: record });
    expect(verdict.whole ? '' : verdict.message).toContain(`Record ${record} `);
    expect(verdict.records).toHaveLength(record - 1);
  }
});

test('one byte edited in the contents names the record', () => {
  const chain = chainOf(3);
  const contents = [...chain.contents];
  contents[1] = '{"figures":9}';
  expect(verifyChain(chain.lines, hash, (n) => hash(contents[n - 1] ?? ''))).toMatchObject({ whole: false, altered: 2 });
  expect(verifyChain(chain.lines, hash, (n) => (n === 3 ? null : hash(chain.contents[n - 1] ?? '')))).toMatchObject({
    whole: false,
    altered: 3,
  });
});

test('a record rewritten with a fresh hash of its own is betrayed by the next one', () => {
  const { records, lines, contents } = chainOf(3);
  const forged = sealRecord({ ...draft(2), person: 'Somebody Else' }, contents[1] ?? '', records[0] ?? null, hash);
  const verdict = verifyChain([lines[0] ?? '', writeRecord(forged), lines[2] ?? ''], hash);
  expect(verdict).toMatchObject({ whole: false, altered: 2 });
});

test('records taken out, turned round or cut off are noticed', () => {
  const chain = chainOf(3);
  const [one = '', two = '', three = ''] = chain.lines;
  expect(verifyChain([one, three], hash)).toMatchObject({ altered: 2 });
  expect(verifyChain([two, one, three], hash)).toMatchObject({ altered: 1 });
  expect(verifyChain([two, three], hash)).toMatchObject({ altered: 1 });
  expect(verifyChain([one, two], hash, null, headOf(chain))).toMatchObject({ altered: 3 });
  // Without the head nothing tells that there was a third.
  expect(verifyChain([one, two], hash)).toMatchObject({ whole: true });
});

test('a whole chain rewritten from the middle does not meet the acknowledged end', () => {
  const chain = chainOf(3);
  const forged = sealRecord({ ...draft(3), person: 'Somebody Else' }, chain.contents[2] ?? '', chain.records[1] ?? null, hash);
  expect(verifyChain([...chain.lines.slice(0, 2), writeRecord(forged)], hash, null, headOf(chain))).toMatchObject({
    whole: false,
    altered: 3,
  });
});

test('a damaged note of the end is told, and is no proof against the records', () => {
  const verdict = verifyChain(chainOf(3).lines, hash, null, 'damaged');
  expect(verdict).toMatchObject({ whole: false, altered: 4 });
  expect(verdict.records).toHaveLength(3);
});

test('a head that is one behind, as after a program that ended in between, is no fault', () => {
  const chain = chainOf(3);
  const second = chain.records[1];
  expect(verifyChain(chain.lines, hash, null, { number: 2, hash: second?.hash ?? '' })).toMatchObject({ whole: true });
});

test('a record that could not be read back is not written', () => {
  expect(() => sealRecord({ ...draft(1), title: ' ' }, '', null, hash)).toThrow(RangeError);
  expect(() => sealRecord({ ...draft(1), bayIds: ['../x'] }, '', null, hash)).toThrow('../x');
});
