import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { nodeFs, type FsPort } from '../../src-main/store/fs-port';
import { Settings } from '../../src-main/settings';
import { bodyOf, numberIn } from '../storage/make';
import { hostContract } from './host-contract';
import { openConf, startMachine, temporaryFolder } from './machine';

hostContract('itself', false, async () => {
  const { machine, writeFile } = await startMachine(temporaryFolder());
  return { host: machine.page(), nextPage: async () => machine.page(), writeFile };
});

test('a site whose file is gone while its journal is there is put back at the start, and that is told', async () => {
  const top = temporaryFolder();
  const { machine, sites } = await startMachine(top);
  const page = machine.page();
  const { revision } = await page.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  await page.appendJournal({ id: 's', baseRevision: revision, body: bodyOf('s', 2), edit: 'Add bay' });
  rmSync(join(sites, 's.tallybeam.json'));
  const next = (await startMachine(top)).machine.page();
  expect((await next.about()).notices).toEqual([expect.stringMatching(/^The file of "Test depot" was gone, .* It was put back/)]);
  const site = await next.readSite('s');
  expect(numberIn(site.text)).toBe(2);
  expect(site.recovered).toBeNull();
});

test('a removed site is not brought back by a journal that an earlier run left', async () => {
  const top = temporaryFolder();
  const first = (await startMachine(top)).machine.page();
  const { revision } = await first.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  await first.appendJournal({ id: 's', baseRevision: revision, body: bodyOf('s', 2), edit: 'Add bay' });
  const { machine, sites } = await startMachine(top);
  await machine.page().removeSite('s', revision);
  const next = (await startMachine(top)).machine.page();
  expect(await next.listSites()).toEqual([]);
  expect((await next.about()).notices).toEqual([]);
  expect(readdirSync(join(sites, 'journal', 'left-out'))).toHaveLength(1);
});

test('a chosen sites folder that is missing is not made, and is told by every call', async () => {
  const top = temporaryFolder();
  const share = join(top, 'share');
  mkdirSync(join(top, 'own'));
  const settings = new Settings(join(top, 'own'), openConf);
  settings.set({ sitesFolder: share });
  const { machine } = await startMachine(top, { sitesFolder: null, settings });
  await expect(machine.page().listSites()).rejects.toMatchObject({ code: 'folder-gone' });
  expect(existsSync(share)).toBe(false);
  expect((await machine.page().about()).sitesFolder).toBe(share);
});

test('another sites folder is used at once and remembered', async () => {
  const top = temporaryFolder();
  const other = join(top, 'other');
  mkdirSync(other);
  const { machine, ownFolder } = await startMachine(top, { sitesFolder: null });
  expect(machine.sitesFolder).toBe(join(ownFolder, 'sites'));
  const page = machine.page();
  await page.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  await machine.useFolder(other);
  expect(await page.listSites()).toEqual([]);
  await page.saveSite({ id: 't', body: bodyOf('t', 1), baseRevision: null });
  expect(readdirSync(other)).toContain('t.tallybeam.json');
  expect((await startMachine(top, { sitesFolder: null })).machine.sitesFolder).toBe(other);
});

test('while the sites folder does not answer, edits reach this machine and are offered once it is back', async () => {
  const top = temporaryFolder();
  const hash = (text: string) => createHash('sha256').update(text).digest('hex').slice(0, 16);
  let stalled = false;
  const fs: FsPort = {
    ...nodeFs,
    append: (path) => (stalled && path.startsWith(join(top, 'sites')) ? new Promise<never>(() => undefined) : nodeFs.append(path)),
  };
  const { machine, sites, ownFolder } = await startMachine(top, { fs });
  const page = machine.page();
  const { revision } = await page.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  stalled = true;
  const began = performance.now();
  await page.appendJournal({ id: 's', baseRevision: revision, body: bodyOf('s', 2), edit: 'Add bay' });
  expect(performance.now() - began).toBeLessThan(2000);
  expect(readdirSync(join(ownFolder, 'journal', hash(sites)))).toHaveLength(1);
  const { recovered } = await (await startMachine(top)).machine.page().readSite('s');
  expect(recovered?.body).toBe(bodyOf('s', 2));
});

test('a sites folder that does not answer at the start is told, and does not keep the program from coming up', async () => {
  const top = temporaryFolder();
  const fs: FsPort = { ...nodeFs, list: () => new Promise<never>(() => undefined) };
  const began = performance.now();
  const { machine } = await startMachine(top, { fs, limits: { quick: 4000, bytes: 4000 } });
  expect(performance.now() - began).toBeLessThan(4000);
  await expect(machine.page().listSites()).rejects.toMatchObject({ code: 'timed-out' });
});

test('a damaged site with a damaged journal still lets the other sites be', async () => {
  const top = temporaryFolder();
  const { machine, sites } = await startMachine(top);
  const page = machine.page();
  await page.saveSite({ id: 's', body: bodyOf('s', 1), baseRevision: null });
  await page.saveSite({ id: 't', body: bodyOf('t', 1), baseRevision: null });
  writeFileSync(join(sites, 's.tallybeam.json'), 'spoilt');
  mkdirSync(join(sites, 'journal'), { recursive: true });
  writeFileSync(join(sites, 'journal', 's.00000000-1-aa-1.journal'), 'spoilt');
  const next = (await startMachine(top)).machine.page();
  await expect(next.readSite('s')).rejects.toMatchObject({ code: 'unreadable' });
  expect(numberIn((await next.readSite('t')).text)).toBe(1);
});
