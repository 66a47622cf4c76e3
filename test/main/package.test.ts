/** Packages of a site with its visits, photos and records: made in one sites folder, brought into another. */
import { readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import type { Host, HostFailure } from '../../src-core/host';
import { closeAction, newFollowUp, readFollowUp, writeFollowUp } from '../../src-core/visit/follow-up';
import { finishBay, note } from '../../src-core/visit/edits';
import { readVisit, writeVisit } from '../../src-core/visit/read-visit';
import type { Visit } from '../../src-core/visit/visit';
import { bodyOf } from '../storage/make';
import { book, failure, fill, flipped, machineWith, packageOf, PHOTO, recordOf, save, seen, send } from './make-package';
import { startMachine, temporaryFolder } from './machine';

const GOLDEN_HASHES = [
  '22ab1ab0d34ddc4e272f7219c1bc648e394e6e6d335f7a090fcff9a1000fa579',
  '3d96509de2ef90d54c424f0df94507443958c0116840e6b432770425cd2ac314',
];

const newHost = async (): Promise<Host> => (await startMachine(temporaryFolder())).machine.page();

const visitsOf = async (host: Host, siteId = 's'): Promise<readonly Visit[]> =>
  (await host.listVisits(siteId)).map(({ text }) => {
    const reading = readVisit(JSON.parse(text));
    if (!reading.ok) throw new Error(reading.problems[0]?.message);
    return reading.document;
  });

/** Everything that a site holds, as the page sees it. */
async function everything(host: Host, id: string) {
  const followUp = await host.readFollowUp(id);
  const visits = await host.listVisits(id);
  const photos = await Promise.all(visits.length > 0 ? [host.readPhoto(id, 'p1.jpg')] : []);
  const { records, altered } = await host.listRecords(id);
  const contents = await Promise.all(records.map(({ number }) => host.readRecord(id, number)));
  return {
    followUp: followUp?.text,
    visits: visits.map(({ text }) => text),
    photos,
    hashes: records.map(({ hash }) => hash),
    altered,
    contents,
  };
}

describe('from one sites folder to another', () => {
  test('a visit unfinished on one machine is resumed on another, with its photo, and comes back', async () => {
    const office = await newHost();
    await fill(office);
    const laptop = await newHost();
    expect((await send(laptop, await packageOf(office))).here).toBeNull();
    const { id } = await laptop.takePackage({ as: 'copy' });
    expect(id).toBe('s');
    expect(await everything(laptop, 's')).toEqual(await everything(office, 's'));

    const [unfinished] = await laptop.listVisits('s');
    const [before] = await visitsOf(laptop);
    if (before === undefined || unfinished === undefined) throw new Error('the visit did not arrive');
    expect(before.bays.map(({ finished }) => finished)).toEqual([false, false]);
    const resumed = finishBay(note(before, 'bay1', 'resumed on the laptop'), 'bay1', { person: 'L. Laptop', date: '2026-06-03' });
    await save(laptop, resumed, unfinished.revision);
    await laptop.appendRecord(recordOf('by the laptop'));
    await save(laptop, seen({ id: 'v2', name: 'Second round' }));

    const look = await send(office, await packageOf(laptop));
    expect(look.here).toMatchObject({ visitsDiffer: ['Week 23, aisle 4'], problem: null });
    expect(look.here?.steps.join('\n')).toMatch(/1 visit is added\.[^]*1 record is put behind the 2 that are here/);
    await office.takePackage({ as: 'join', ifVisitDiffers: 'take-theirs' });
    expect(await everything(office, 's')).toEqual(await everything(laptop, 's'));
    const records = await office.listRecords('s');
    expect([records.records.length, records.altered, records.others]).toEqual([3, null, []]);
    expect(await office.readRecord('s', 3)).toBe(recordOf('by the laptop').contents);
    // The chain goes on here from what came from there.
    expect((await office.appendRecord(recordOf('at the office'))).number).toBe(4);
    expect((await office.listRecords('s')).altered).toBeNull();
  });

  test('frozen records verify on the other machine, and an edit there is noticed and named as ever', async () => {
    const { host } = await machineWith();
    const top = temporaryFolder();
    const { machine, sites } = await startMachine(top);
    const other = machine.page();
    await send(other, await packageOf(host));
    await other.takePackage({ as: 'copy' });
    expect(await other.listRecords('s')).toMatchObject({ altered: null });
    const path = join(sites, 'beside', 's', 'records', '000002.json');
    writeFileSync(path, flipped(readFileSync(path), 5));
    expect(await other.listRecords('s')).toMatchObject({ altered: 2, message: expect.stringContaining('Record 2') as string });
    // Such records are handed to nobody unnoticed.
    expect(await failure(other.makePackage('s', true))).toMatchObject({
      code: 'altered',
      message: expect.stringContaining('Record 2') as string,
    });
  });

  test('a copy beside the site that is here has everything under its own id', async () => {
    const { host } = await machineWith();
    await send(host, await packageOf(host));
    const { id } = await host.takePackage({ as: 'copy' });
    expect(id).not.toBe('s');
    const [visit] = await visitsOf(host, id);
    expect([visit?.siteId, visit?.id]).toEqual([id, 'v1']);
    expect((await host.readFollowUp(id))?.problem).toBeNull();
    expect((await everything(host, id)).hashes).toEqual((await everything(host, 's')).hashes);
    expect((await host.listSites()).map(({ problem }) => problem)).toEqual([null, null]);
  });

  test('what is still kept beside a removed site is not mixed with a package of it', async () => {
    const { host } = await machineWith();
    const file = await packageOf(host);
    await host.removeSite('s', (await host.readSite('s')).revision);
    await send(host, file);
    expect((await host.takePackage({ as: 'copy' })).id).not.toBe('s');
    expect(await visitsOf(host)).toHaveLength(1);
  });

  test('photos can be left out, and that is counted', async () => {
    const { host } = await machineWith();
    expect(await host.makePackage('s', false)).toMatchObject({ photos: 0, photosMissing: 1 });
    const other = await newHost();
    expect(await send(other, await packageOf(host, 's', false))).toMatchObject({ photos: 0, photosMissing: 1 });
    await other.takePackage({ as: 'copy' });
    expect(await visitsOf(other)).toHaveLength(1);
  });

  test('what could not be read elsewhere is not exported, and is named', async () => {
    const { host, sites } = await machineWith();
    writeFileSync(join(sites, 'beside', 's', 'visits', 'v1.json'), '{"version":1');
    expect(await failure(host.makePackage('s', true))).toMatchObject({
      code: 'unreadable',
      message: expect.stringContaining('Visit v1') as string,
    });
  });
});

describe('into the site that is here', () => {
  test('a visit in another state is kept beside the one here, once', async () => {
    const { host } = await machineWith();
    const other = await newHost();
    await fill(other);
    const [visit] = await other.listVisits('s');
    await save(other, note(seen(), 'bay2', 'elsewhere'), visit?.revision ?? null);
    const file = await packageOf(other);
    for (let times = 0; times < 2; times++) {
      await send(host, file);
      await host.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' });
      expect((await visitsOf(host)).map(({ name }) => name).toSorted()).toEqual(['Week 23, aisle 4', 'Week 23, aisle 4 (brought in)']);
    }
  });

  test('one whose place is taken is put aside as it was', async () => {
    const { host, sites } = await machineWith();
    const other = await newHost();
    await fill(other);
    const before = readFileSync(join(sites, 'beside', 's', 'visits', 'v1.json'));
    await save(other, note(seen(), 'bay2', 'elsewhere'), (await other.listVisits('s'))[0]?.revision ?? null);
    await send(host, await packageOf(other));
    await host.takePackage({ as: 'join', ifVisitDiffers: 'take-theirs' });
    expect((await visitsOf(host))[0]?.bays[1]?.notes).toBe('elsewhere');
    const [aside] = readdirSync(join(sites, 'beside', 's', 'put-aside'));
    expect(readFileSync(join(sites, 'beside', 's', 'put-aside', aside ?? '')).equals(before)).toBe(true);
  });

  test('a photo never overwrites another of the same name', async () => {
    const { host } = await machineWith();
    const other = await newHost();
    const theirs = Buffer.concat([PHOTO, Buffer.from('another picture')]);
    await fill(other, theirs);
    await send(host, await packageOf(other));
    await host.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' });
    expect(await host.readPhoto('s', 'p1.jpg')).toBe(PHOTO.toString('base64'));
    const brought = (await visitsOf(host)).find(({ id }) => id !== 'v1');
    const file = brought?.bays[0]?.photos[0]?.file ?? '';
    expect(file).not.toBe('p1.jpg');
    expect(await host.readPhoto('s', file)).toBe(theirs.toString('base64'));
  });

  test('a follow-up that says otherwise loses nothing: both are on the disk, and what differs is told', async () => {
    const { host, sites } = await machineWith();
    const closing = { actionId: 'a', date: '2026-06-02', how: 'replaced' };
    const revision = (await host.readFollowUp('s'))?.revision ?? null;
    await host.saveFollowUp({
      siteId: 's',
      body: writeFollowUp(closeAction(book, { ...closing, person: 'Ours' })),
      baseRevision: revision,
    });
    const other = await newHost();
    await other.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
    const theirs = closeAction(closeAction(newFollowUp('s'), { ...closing, person: 'Theirs' }), {
      ...closing,
      actionId: 'b',
      person: 'Theirs',
    });
    await other.saveFollowUp({ siteId: 's', body: writeFollowUp(theirs), baseRevision: null });
    const look = await send(host, await packageOf(other));
    expect(look.here?.steps.join('\n')).toContain('here by Ours and there by Theirs');
    await host.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' });
    const joined = readFollowUp(JSON.parse((await host.readFollowUp('s'))?.text ?? ''));
    if (!joined.ok) throw new Error('the follow-up cannot be read');
    expect(joined.document.closings.map(({ actionId, person }) => [actionId, person])).toEqual([
      ['a', 'Ours'],
      ['b', 'Theirs'],
    ]);
    expect(joined.document.reductions).toHaveLength(1);
    const [aside] = readdirSync(join(sites, 'beside', 's', 'put-aside'));
    expect(readFileSync(join(sites, 'beside', 's', 'put-aside', aside ?? ''), 'utf8')).toBe(writeFollowUp(theirs));
  });

  test('records made both here and there: theirs are kept as a list of their own that is verified by itself', async () => {
    const { host, sites } = await machineWith();
    const other = await newHost();
    await send(other, await packageOf(host));
    await other.takePackage({ as: 'copy' });
    await host.appendRecord(recordOf('here'));
    await other.appendRecord(recordOf('there'));
    const look = await send(host, await packageOf(other));
    expect(look.here?.steps.join('\n')).toContain('both here and there since record 2');
    await host.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' });

    const { records, altered, others } = await host.listRecords('s');
    expect([records.map(({ title }) => title), altered]).toEqual([['Check 1', 'Check 2', 'Check here'], null]);
    const [apart] = others;
    expect([others.length, apart?.altered, apart?.records.map(({ title }) => title)]).toEqual([
      1,
      null,
      ['Check 1', 'Check 2', 'Check there'],
    ]);
    const chain = apart?.chain ?? '';
    expect(await host.readRecord('s', 3, chain)).toBe(recordOf('there').contents);
    expect(await host.readRecord('s', 3)).toBe(recordOf('here').contents);

    // It goes on there, and comes again: that list is continued, ours is not touched.
    await other.appendRecord(recordOf('there again'));
    await send(host, await packageOf(other));
    await host.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' });
    const later = await host.listRecords('s');
    expect([later.records.length, later.others.length, later.others[0]?.records.length, later.others[0]?.altered]).toEqual([3, 1, 4, null]);

    // Both lists travel on, and to whoever made one of them the other comes as a list apart.
    await send(other, await packageOf(host));
    await other.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' });
    const there = await other.listRecords('s');
    expect([there.records.length, there.others.map((one) => [one.records.at(-1)?.title, one.altered])]).toEqual([
      4,
      [['Check here', null]],
    ]);

    const path = join(sites, 'beside', 's', 'records-of', chain, '000003.json');
    writeFileSync(path, flipped(readFileSync(path), 3));
    const altogether = await host.listRecords('s');
    expect([altogether.altered, altogether.others[0]?.altered]).toEqual([null, 3]);
  });

  test('records here that are not whole take none from elsewhere; it can be brought in apart', async () => {
    const { host, sites } = await machineWith();
    const file = await packageOf(host);
    writeFileSync(join(sites, 'beside', 's', 'records', '000001.json'), 'altered');
    const look = await send(host, file);
    expect(look.here?.problem).toMatch(/Record 1 had its contents altered[^]*as a site of its own/);
    expect((await failure(host.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' }))).code).toBe('altered');
    expect((await host.takePackage({ as: 'copy' })).id).not.toBe('s');
  });

  test('racks and goods that differ are told, and those here stay', async () => {
    const { host } = await machineWith();
    const other = await newHost();
    await other.saveSite({ id: 's', body: bodyOf('s', 7), baseRevision: null });
    expect((await send(host, await packageOf(other))).here?.steps.join('\n')).toContain('those in the package differ');
    const { revision } = await host.readSite('s');
    await host.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' });
    expect((await host.readSite('s')).revision).toBe(revision);
  });
});

test('a package of version 1 is taken for ever', async () => {
  const host = await newHost();
  const look = await send(host, readFileSync(join(import.meta.dirname, '../fixtures/package-v1.tallybeam.zip')));
  expect(look).toEqual({
    siteName: 'Test depot',
    madeAt: '2026-12-01T08:00:00.000Z',
    visits: 1,
    photos: 1,
    photosMissing: 0,
    records: 2,
    here: null,
  });
  const { id } = await host.takePackage({ as: 'copy' });
  const { photos, hashes, altered, contents } = await everything(host, id);
  expect(photos).toEqual([PHOTO.toString('base64')]);
  expect([altered, contents]).toEqual([null, [recordOf(1).contents, recordOf(2).contents]]);
  // The hashes are on paper that was handed out: they never change.
  expect(hashes).toEqual(GOLDEN_HASHES);
  const [visit] = await visitsOf(host, id);
  expect([visit?.name, visit?.bays.length, visit?.bays[0]?.photos[0]?.note]).toEqual(['Week 23, aisle 4', 2, 'left upright']);
});

describe('two programs on one folder', () => {
  test('records that both keep at once are all in one chain', async () => {
    const top = temporaryFolder();
    const one = (await startMachine(top)).machine.page();
    const other = (await startMachine(top)).machine.page();
    await fill(one);
    await Promise.all([1, 2, 3, 4].flatMap((n) => [one.appendRecord(recordOf(`a${n}`)), other.appendRecord(recordOf(`b${n}`))]));
    const { records, altered } = await one.listRecords('s');
    expect([records.length, altered]).toEqual([10, null]);
  });

  test('a package brought in while the other keeps records loses none of either, or says so and changes nothing', async () => {
    const source = await newHost();
    await fill(source);
    await source.appendRecord(recordOf('brought in'));
    await save(source, seen({ id: 'v9', name: 'Brought in' }));
    const file = await packageOf(source);
    for (let round = 0; round < 15; round++) {
      const top = temporaryFolder();
      const one = (await startMachine(top)).machine.page();
      const other = (await startMachine(top)).machine.page();
      await fill(one);
      await send(one, file);
      const taking = one.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' }).then(
        () => true,
        (error: HostFailure) => {
          expect(error.code).toBe('stale');
          return false;
        },
      );
      const [taken, kept] = await Promise.all([
        taking,
        other.appendRecord(recordOf(`kept ${round}`)),
        other.saveVisit({ siteId: 's', visitId: 'v8', body: writeVisit(seen({ id: 'v8' })), baseRevision: null }),
      ]);
      const { records, others, altered } = await one.listRecords('s');
      const titles = [...records, ...others.flatMap((list) => list.records)].map(({ title }) => title);
      expect([altered, ...others.map((list) => list.altered)].every((fault) => fault === null)).toBe(true);
      expect(titles).toContain(kept.title);
      const ids = (await one.listVisits('s')).map(({ id }) => id);
      expect([titles.includes('Check brought in'), ids.includes('v9'), ids.includes('v8')]).toEqual([taken, taken, true]);
    }
  });
});

test('what was sent is gone after it was dropped, and for the page that is loaded next', async () => {
  const { host } = await machineWith();
  await send(host, await packageOf(host));
  await host.dropPackage();
  expect((await failure(host.takePackage({ as: 'copy' }))).message).toContain('bring the file in again');
});

test('a site that was removed between looking and bringing in is told', async () => {
  const { host, sites } = await machineWith();
  await send(host, await packageOf(host));
  rmSync(join(sites, 's.tallybeam.json'));
  expect((await failure(host.takePackage({ as: 'join', ifVisitDiffers: 'keep-both' }))).message).toContain('as a site of its own');
});
