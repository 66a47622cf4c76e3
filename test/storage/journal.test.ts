import { mkdirSync, readFileSync, utimesSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readSite } from '../../src-core/site/read';
import { writeSite } from '../../src-core/site/write';
import { sha256 } from '../../src-main/store/checked-site';
import { foldersIn, machineTag } from '../../src-main/store/file-names';
import { nodeFs, type FsPort } from '../../src-main/store/fs-port';
import { Journal } from '../../src-main/store/journal';
import { changeLine, replay, wholeLine } from '../../src-main/store/journal-lines';
import { withTimeLimit } from '../../src-main/store/time-limit';
import { clock, contentOf, newFolder } from './folder';

let session = 0;
const placesIn = (folder: string, fs: FsPort = nodeFs) => {
  const { journal, leftOut } = foldersIn(folder);
  return [{ fs, folder: journal, leftOut }];
};
const journalIn = (folder: string, fs: FsPort = nodeFs) =>
  new Journal({ places: placesIn(folder, fs), session: `t${++session}`, now: clock() });

const edit = (body: string, words = body, base: string | null = 'r1') => ({ id: 's', baseRevision: base, body, edit: words });
const files = (folder: string) => Object.keys(contentOf(folder));

describe('lines', () => {
  const said = { at: '2026-12-01T08:00:00.000Z', edit: 'Move pallet', base: 'r1' };

  test('a chain of changes adds up to the last body', () => {
    const bodies = ['{"a":1,"b":2}', '{"a":1,"b":3}', '{"a":1}', '', 'ää😀', 'ä😁', 'ä😁ä😁', 'ä😁'];
    const lines = bodies.map((body, i) => (i === 0 ? wholeLine(said, body, []) : changeLine(said, bodies[i - 1] ?? '', body)));
    bodies.forEach((body, i) => expect(replay(lines.slice(0, i + 1).join(''))?.body).toBe(body));
  });

  test('any two bodies: the change leads from one to the other', () => {
    const letters = fc.string({ unit: fc.constantFrom('a', 'b', '{', '"', '\n', '\\', '😀') });
    fc.assert(
      fc.property(letters, letters, (before, after) => {
        expect(replay(wholeLine(said, before, []) + changeLine(said, before, after))?.body).toBe(after);
      }),
      { numRuns: 1000 },
    );
  });

  test('a change is as long as what changed, not as the body', () => {
    const body = `{"notes":"${'x'.repeat(100_000)}","n":1}`;
    expect(changeLine(said, body, body.replace('"n":1', '"n":2')).length).toBeLessThan(300);
  });

  test('a torn last line is passed over, wherever it is torn', () => {
    const text = wholeLine(said, '{"n":1}', []) + changeLine({ ...said, edit: 'second' }, '{"n":1}', '{"n":2}');
    const firstLine = wholeLine(said, '{"n":1}', []).length;
    for (let at = firstLine + 2; at < text.length - 1; at++)
      expect(replay(text.slice(0, at))).toMatchObject({ body: '{"n":1}', edits: ['Move pallet'], damagedLines: 1 });
  });

  test('a damaged line and those that build on it are counted, and a whole body goes on from there', () => {
    const lines = [
      wholeLine({ ...said, edit: '1' }, 'one', []),
      changeLine({ ...said, edit: '2' }, 'one', 'two').replace('two', 'tow'),
      changeLine({ ...said, edit: '3' }, 'two', 'three'),
    ];
    expect(replay(lines.join(''))).toMatchObject({ body: 'one', edits: ['1'], damagedLines: 2 });
    const whole = wholeLine({ ...said, edit: '4' }, 'four', ['1', '2', '3']);
    expect(replay(lines.join('') + whole)).toMatchObject({ body: 'four', edits: ['1', '2', '3', '4'], damagedLines: 2 });
  });

  test('unsaved edits of the first version come back as a site of the present one', () => {
    const { site } = JSON.parse(readFileSync(join(import.meta.dirname, '../fixtures/site-v1.tallybeam.json'), 'utf8')) as { site: object };
    const json = JSON.stringify({ ...said, whole: JSON.stringify(site), edits: [] });
    const line = `\n${sha256(json).slice(0, 16)} ${json}\n`;
    const before = JSON.stringify(site);
    const after = before.replace('"notes":"', '"notes":"Moved. ');
    const found = replay(line + changeLine({ ...said, edit: 'Change notes' }, before, after));
    const reading = readSite(JSON.parse(found?.body ?? 'null'));
    if (!reading.ok) throw new Error(JSON.stringify(reading.problems));
    expect(reading.site.notes).toMatch(/^Moved. /);
    expect(writeSite(reading.site)).toBe(found?.body);
    expect(found).toMatchObject({ edits: ['Move pallet', 'Change notes'], damagedLines: 0 });
  });

  test('what a first journal holds that is no site is given back as it is', () => {
    for (const whole of ['rubbish', '{"runs":3}']) {
      const json = JSON.stringify({ ...said, whole, edits: [] });
      expect(replay(`${sha256(json).slice(0, 16)} ${json}\n`)?.body).toBe(whole);
    }
  });

  test('nothing usable is nothing', () => {
    for (const text of ['', '\n\n', 'rubbish', '0123456789abcdef {"whole":"x"}', changeLine(said, 'a', 'b')])
      expect(replay(text)).toBeNull();
  });

  test('whatever one byte is changed to, the body is one that was there', () => {
    const bodies = ['{"n":1}', '{"n":12}', '{"n":123}'];
    const text = wholeLine(said, '{"n":1}', []) + changeLine(said, '{"n":1}', '{"n":12}') + changeLine(said, '{"n":12}', '{"n":123}');
    for (let at = 0; at < text.length; at++) {
      for (const letter of ['\n', '0', 'x', '"']) {
        const state = replay(text.slice(0, at) + letter + text.slice(at + 1));
        if (state !== null) expect(bodies).toContain(state.body);
      }
    }
  });
});

describe('after a crash', () => {
  test('the edits are offered with their names, time and the revision they were made on', async () => {
    const folder = newFolder();
    const journal = journalIn(folder);
    await journal.append(edit('one', 'Add bay'));
    await journal.append(edit('two', 'Move pallet'));
    expect(await journalIn(folder).recovered('s', 'saved')).toEqual({
      body: 'two',
      editedAt: expect.stringMatching(/^2026-12-01T08:00:0\d/) as string,
      edits: ['Add bay', 'Move pallet'],
      baseRevision: 'r1',
      damagedLines: 0,
      // Another opening in this very process, as another page of one server is.
      otherPage: true,
    });
    // The same page, which reads its site again.
    expect(await journal.recovered('s', 'saved')).toMatchObject({ body: 'two', otherPage: false });
    expect(await journalIn(folder).recovered('other', 'saved')).toBeNull();
  });

  test('nothing is offered after a save, after undoing to the saved state, or where the save was all but finished', async () => {
    const folder = newFolder();
    for (const end of ['saved', 'clear', 'crash'] as const) {
      const journal = journalIn(folder);
      await journal.append(edit('two'));
      if (end === 'saved') await journal.saved('s', 'two');
      if (end === 'clear') await journal.clear('s');
      expect(await journalIn(folder).recovered('s', end === 'clear' ? 'one' : 'two')).toBeNull();
      expect(files(folder)).toEqual([]);
    }
  });

  test('edits after a save are told without those before it', async () => {
    const folder = newFolder();
    const journal = journalIn(folder);
    await journal.append(edit('two', 'before'));
    await journal.saved('s', 'two');
    await journal.append(edit('three', 'after', 'r2'));
    expect(await journalIn(folder).recovered('s', 'two')).toMatchObject({ body: 'three', edits: ['after'], baseRevision: 'r2' });
  });

  test('taken up and saved, they are gone', async () => {
    const folder = newFolder();
    await journalIn(folder).append(edit('two'));
    const journal = journalIn(folder);
    await journal.recovered('s', 'one');
    await journal.append(edit('two', 'Take up recovered changes'));
    await journal.append(edit('three'));
    await journal.saved('s', 'three');
    expect(files(folder)).toEqual([]);
  });

  test('taken up, they are in one journal only, with the names of all edits', async () => {
    const folder = newFolder();
    await journalIn(folder).append(edit('two'));
    const journal = journalIn(folder);
    await journal.recovered('s', 'one');
    await journal.append(edit('two', 'Take up recovered changes'));
    await journal.append(edit('three'));
    expect(files(folder)).toHaveLength(1);
    const edits = ['two', 'Take up recovered changes', 'three'];
    expect(await journalIn(folder).recovered('s', 'one')).toMatchObject({ body: 'three', edits });
  });

  test('taken up just before the program ended again, they are offered once', async () => {
    const folder = newFolder();
    await journalIn(folder).append(edit('two'));
    const [name = ''] = files(folder);
    const text = readFileSync(join(folder, name), 'utf8');
    const journal = journalIn(folder);
    await journal.recovered('s', 'one');
    await journal.append(edit('two', 'Take up recovered changes'));
    await journal.append(edit('three'));
    writeFileSync(join(folder, name), text);
    const next = journalIn(folder);
    expect(await next.recovered('s', 'one')).toMatchObject({ body: 'three' });
    await next.clear('s');
    expect(await next.recovered('s', 'one')).toBeNull();
  });

  test('taken up and dropped again, they are put away as well', async () => {
    const folder = newFolder();
    await journalIn(folder).append(edit('two'));
    const journal = journalIn(folder);
    await journal.recovered('s', 'one');
    await journal.append(edit('two', 'Take up recovered changes'));
    await journal.clear('s');
    expect(files(folder)).toEqual([expect.stringContaining('left-out/s.')]);
  });

  test('left out, they are put away where they can be brought back by hand', async () => {
    const folder = newFolder();
    await journalIn(folder).append(edit('two'));
    const [name] = files(folder);
    const journal = journalIn(folder);
    await journal.recovered('s', 'one');
    await journal.clear('s');
    expect(files(folder)).toEqual([name?.replace('journal/', 'journal/left-out/')]);
    expect(await journalIn(folder).recovered('s', 'one')).toBeNull();
  });

  test('passed over, they are offered again, even after other edits were saved or undone', async () => {
    const folder = newFolder();
    await journalIn(folder).append(edit('two'));
    const journal = journalIn(folder);
    await journal.recovered('s', 'one');
    await journal.append(edit('other'));
    await journal.clear('s');
    await journal.append(edit('another'));
    await journal.saved('s', 'another');
    expect(await journalIn(folder).recovered('s', 'another')).toMatchObject({ body: 'two' });
  });

  test('reading the site again while it is edited changes nothing', async () => {
    const folder = newFolder();
    const journal = journalIn(folder);
    await journal.append(edit('two'));
    expect(await journal.recovered('s', 'one')).toMatchObject({ body: 'two' });
    await journal.append(edit('three'));
    expect(await journalIn(folder).recovered('s', 'one')).toMatchObject({ body: 'three', edits: ['two', 'three'] });
    await journal.saved('s', 'three');
    expect(files(folder)).toEqual([]);
  });

  test('of two earlier runs the later is offered first, then the other', async () => {
    const folder = newFolder();
    const start = clock();
    const at = (name: string) => new Journal({ places: placesIn(folder), session: name, now: start });
    await at('first').append(edit('two'));
    await at('second').append(edit('three'));
    const journal = at('third');
    expect(await journal.recovered('s', 'one')).toMatchObject({ body: 'three' });
    await journal.clear('s');
    expect(await journal.recovered('s', 'one')).toMatchObject({ body: 'two' });
  });

  test('a journal in which nothing can be used is put away and told', async () => {
    const folder = newFolder();
    await journalIn(folder).append(edit('two'));
    const path = join(folder, files(folder)[0] ?? '');
    writeFileSync(path, readFileSync(path, 'utf8').replace('two', 'tow'));
    const journal = journalIn(folder);
    expect(await journal.recovered('s', 'one')).toBeNull();
    expect(journal.notices).toEqual([expect.stringMatching(/^A journal of unsaved changes was damaged \(1 of 1 lines\)/)]);
    expect(files(folder)).toEqual([expect.stringContaining('left-out')]);
  });
});

describe('other programs', () => {
  test('what a running one is writing is not offered; once it ended or fell silent, it is', async () => {
    const folder = newFolder();
    mkdirSync(join(folder, 'journal'));
    const said = { at: '2026-12-01T08:00:00.000Z', edit: 'Move pallet', base: 'r1' };
    const path = join(folder, 'journal', `s.${machineTag}-${process.ppid}-aa-1.journal`);
    const elsewhere = join(folder, 'journal', 's.00000000-1-aa-1.journal');
    for (const name of [path, elsewhere]) writeFileSync(name, wholeLine(said, 'theirs', []));
    expect(await journalIn(folder).recovered('s', 'one')).toBeNull();
    const before = new Date(Date.now() - 120_000);
    utimesSync(elsewhere, before, before);
    expect(await journalIn(folder).recovered('s', 'one')).toMatchObject({ body: 'theirs' });
    writeFileSync(path.replace(String(process.ppid), String(2 ** 30)), wholeLine({ ...said, at: '2026-12-02T08:00:00.000Z' }, 'ended', []));
    expect(await journalIn(folder).recovered('s', 'one')).toMatchObject({ body: 'ended' });
  });

  test('two pages that edit one site do not lose each other’s edits', async () => {
    const folder = newFolder();
    const [one, two] = [journalIn(folder), journalIn(folder)];
    await one.append(edit('one'));
    await two.append(edit('two'));
    await one.saved('s', 'one');
    expect(await journalIn(folder).recovered('s', 'one')).toMatchObject({ body: 'two' });
  });
});

describe('trouble', () => {
  test('an edit after another page put the journal away still stands for itself', async () => {
    const folder = newFolder();
    const [one, two] = [journalIn(folder), journalIn(folder)];
    await one.append(edit('one'));
    await two.recovered('s', 'zero');
    await two.clear('s');
    await one.append(edit('two'));
    await one.append(edit('three'));
    expect(await journalIn(folder).recovered('s', 'zero')).toMatchObject({ body: 'three', damagedLines: 0 });
  });

  test('what a write that failed half-way left is cut off, and the next edit stands for itself', async () => {
    const folder = newFolder();
    let fail = false;
    const fs: FsPort = {
      ...nodeFs,
      append: async (path) => {
        const file = await nodeFs.append(path);
        const write = async (bytes: Uint8Array) => {
          await file.write(fail ? bytes.slice(0, bytes.length - 9) : bytes);
          if (fail) throw Object.assign(new Error('full'), { code: 'ENOSPC' });
        };
        return { ...file, write };
      },
    };
    const journal = journalIn(folder, fs);
    await journal.append(edit('one'));
    fail = true;
    await expect(journal.append(edit('two'))).rejects.toMatchObject({
      code: 'disk-full',
      message: expect.stringContaining('not in the journal yet') as string,
    });
    fail = false;
    await journal.append(edit('three'));
    expect(await journalIn(folder).recovered('s', 'zero')).toMatchObject({ body: 'three', edits: ['one', 'three'], damagedLines: 0 });
  });

  test('where the sites folder does not answer, the edit is on this machine within two seconds', async () => {
    const [sites, own] = [newFolder(), newFolder()];
    let stalled = false;
    const never = () => new Promise<never>(() => undefined);
    const fs: FsPort = { ...nodeFs, append: (path) => (stalled ? never() : nodeFs.append(path)) };
    const places = [
      ...placesIn(sites, withTimeLimit(fs, { quick: 200, bytes: 200 })),
      { fs: nodeFs, folder: join(own, 'journal'), leftOut: join(own, 'journal', 'left-out') },
    ];
    const journal = new Journal({ places, session: 'a', now: clock() });
    await journal.append(edit('one'));
    stalled = true;
    const began = performance.now();
    await journal.append(edit('two'));
    await journal.append(edit('three'));
    expect(performance.now() - began).toBeLessThan(2000);
    const next = new Journal({ places: [...placesIn(sites), ...places.slice(1)], session: 'b', now: clock('2026-12-02T08:00:00.000Z') });
    expect(await next.recovered('s', 'zero')).toMatchObject({ body: 'three', edits: ['one', 'two', 'three'] });
    await next.append(edit('three'));
    await next.saved('s', 'three');
    expect([...files(sites), ...files(own)]).toEqual([]);
  });

  test('a long journal is written anew with its last state', async () => {
    const folder = newFolder();
    const journal = journalIn(folder);
    const body = (n: number) => `${n}${'x'.repeat(3_000_000)}${n}`;
    for (let n = 0; n < 12; n++) await journal.append(edit(body(n), `edit ${n}`));
    const [path] = files(folder);
    expect(readFileSync(join(folder, path ?? '')).length).toBeLessThan(30_000_000);
    const found = await journalIn(folder).recovered('s', '');
    expect(found?.body).toBe(body(11));
    expect(found?.edits).toHaveLength(12);
  });
});
