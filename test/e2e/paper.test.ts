/** Every kind of paper with 1 bay and with 200, on A4 and Letter, in both unit systems, as a PDF reader finds it. */
import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { PAPER_KINDS, type PaperKind } from '../../src-core/paper/paper';
import { editFrame } from '../../src-core/site/edits';
import type { Site } from '../../src-core/site/site';
import { attachPhoto, finishBay, recordDamage } from '../../src-core/visit/edits';
import { writeVisit } from '../../src-core/visit/read-visit';
import { startVisit, type Visit } from '../../src-core/visit/visit';
import { BesideStore } from '../../src-main/store/beside-store';
import { foldersIn } from '../../src-main/store/file-names';
import { nodeFs } from '../../src-main/store/fs-port';
import { SiteStore } from '../../src-main/store/site-store';
import { VERSION } from '../../src-main/version';
import { PAPER_TITLES } from '../../src-renderer/paper/titles';
import { siteOf } from '../core/visit/make-run';
import { greyPng } from './grey-png';
import { pageFaults } from './paper-pages';
import { hardSite, hardVisit } from './paper-site';
import { pdfFacts, pdfImages, pdfPages, pdfStructure, squeezed } from './poppler';
import { closeBrowser, startProgram, type Program } from './program';
import { choice, command, eventually, field, type, withProgram } from './steps';

afterAll(closeBrowser);

/** A run in which every fourth frame is bent, by a little more each time. */
function damagedSite(bays: number): Site {
  let site = siteOf({ bays });
  for (let n = 1; n <= bays; n += 4)
    site = editFrame(site, `A-frame-${n}`, {
      damages: [
        {
          id: `d${n}`,
          member: 'upright-front',
          alongMm: 4 + (n % 8),
          acrossMm: 1,
          gaugeMm: 1000,
          torn: false,
          note: '',
          found: '2026-11-20',
        },
      ],
    });
  return site;
}

function visitOf(bays: number): Visit {
  const all = Array.from({ length: bays }, (_, i) => ({ runId: 'run-A', bayId: `A-bay-${i + 1}` }));
  let visit = startVisit({
    id: 'v',
    siteId: 'site',
    name: `Round of ${bays}`,
    kind: 'weekly',
    person: 'R. Walker',
    started: '2026-11-30',
    bays: all,
  });
  for (let n = 1; n <= bays; n++) {
    if (n % 4 === 1)
      visit = recordDamage(visit, `A-bay-${n}`, {
        id: `d${n}`,
        on: 'frame',
        frameId: `A-frame-${n}`,
        member: 'upright-front',
        alongMm: 4 + (n % 8),
        acrossMm: 1,
        gaugeMm: 1000,
        torn: false,
        note: '',
        found: '2026-11-20',
      });
    visit = finishBay(visit, `A-bay-${n}`, { person: 'R. Walker', date: '2026-11-30' });
  }
  return visit;
}

type Sheet = 'A4' | 'Letter';
type Units = 'kilograms and millimetres' | 'pounds and inches';

/** Chooses the paper and prints it as the program does. @returns the PDF's path */
async function printedIn(folder: string, page: Page, kind: PaperKind, sheet: Sheet, units: Units): Promise<string> {
  await choice(page, 'Paper').selectOption({ label: PAPER_TITLES[kind] });
  await choice(page, 'Sheet').selectOption({ label: sheet });
  await choice(page, 'Units').selectOption({ label: units });
  await page.getByRole('article', { name: new RegExp(`^${PAPER_TITLES[kind]}, `) }).waitFor();
  return pdfOf(page, join(folder, `${kind}-${sheet}.pdf`));
}

async function pdfOf(page: Page, path: string): Promise<string> {
  await page.pdf({ path, tagged: true, outline: true, preferCSSPageSize: true, printBackground: true });
  return path;
}

/** Points to a tenth of a millimetre. */
const SIZES = { A4: [595, 842], Letter: [612, 792] } as const;
const WIDE: readonly PaperKind[] = ['off-load-list', 'site-register'];

describe.each([1, 200])('%i bays', (bays) => {
  let folder = '';
  let program: Program;

  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), 'tallybeam-paper-'));
    await new SiteStore({ fs: nodeFs, folder, program: '0.1.0' }).add(damagedSite(bays));
    await new BesideStore(nodeFs, foldersIn(folder)).saveVisit({
      siteId: 'site',
      visitId: 'v',
      body: writeVisit(visitOf(bays)),
      baseRevision: null,
    });
    program = await startProgram({}, folder);
    const { page } = program;
    page.setDefaultTimeout(60_000);
    await page
      .getByRole('button', { name: /^Test depot/ })
      .first()
      .click();
    await page.locator('[data-bay]').first().waitFor();
    await command(page, 'Paper: print');
  });
  afterAll(async () => {
    await program.close();
    await rm(folder, { recursive: true, force: true });
  });

  const printed = (page: Page, kind: PaperKind, sheet: Sheet, units: Units) => printedIn(folder, page, kind, sheet, units);

  test.each(PAPER_KINDS)(
    '%s: its foot on every page, heads repeated, tagged, nothing cut off, all in lines',
    { timeout: 240_000 },
    async (kind) => {
      const { page, complaints } = program;
      const path = await printed(page, kind, 'A4', 'kilograms and millimetres');
      const facts = pdfFacts(path);
      const pages = pdfPages(path);
      expect(facts.tagged).toBe(true);
      expect(facts.title).toMatch(new RegExp(`^${PAPER_TITLES[kind]}: .*Test depot`));
      expect(facts.pages).toBe(pages.length);
      if (bays === 200 && kind === 'site-register') expect(pages.length).toBeGreaterThan(5);
      const size = WIDE.includes(kind) ? SIZES.A4.toReversed() : SIZES.A4;
      for (const [width, height] of facts.sizes) expect([Math.round(width), Math.round(height)]).toEqual(size);
      expect(pdfImages(path)).toEqual([]);

      const checksum = /checksum ([0-9a-f]{16})/.exec(pages[0] ?? '')?.[1] ?? 'none';
      pages.forEach((text, i) => {
        const words = squeezed(text);
        for (const needed of [
          `Page${i + 1}of${pages.length}`,
          `Testdepot·sitechecksum${checksum}`,
          `Tallybeam${VERSION}`,
          'Ruleset:European',
          'Beamspan:clearentrybetweenuprights',
          'Ratings:',
          'Notchecked:',
          'Whenindoubt,unloadfirst.',
          'Achangetotherackmakesthispapervoid.',
        ])
          expect(words, `${kind}, page ${i + 1}`).toContain(needed);
      });
      expect(await cutOff(page)).toEqual([]);
      expect(await pageFaults(page, path)).toEqual([]);
      expect(complaints).toEqual([]);
    },
  );

  test('heads stand on every page that a table goes on to, and no row is lost or told twice', async () => {
    const { page } = program;
    const path = await printed(page, 'site-register', 'A4', 'kilograms and millimetres');
    const pages = pdfPages(path).map(squeezed);
    const rows = pages.map((text) =>
      [...text.matchAll(/A(\d+)(?:Within|Close|Over|Notassessable|Notpossible)/g)].map(([, n]) => Number(n)),
    );
    expect(rows.flat()).toEqual(Array.from({ length: bays }, (_, i) => i + 1));
    rows.forEach((there, i) => {
      if (there.length > 0) expect(pages[i], `page ${i + 1}`).toContain('BayVerdictDecidedby');
      // A head has more than one row under it, unless the table has but one.
      if (bays > 1 && there.length > 0) expect(there.length, `page ${i + 1}`).toBeGreaterThan(1);
    });
  });

  test('Letter in pounds and inches', { timeout: 240_000 }, async () => {
    const { page } = program;
    for (const kind of ['bay-sheet', 'site-register'] as const) {
      const path = await printed(page, kind, 'Letter', 'pounds and inches');
      const size = WIDE.includes(kind) ? SIZES.Letter.toReversed() : SIZES.Letter;
      for (const [width, height] of pdfFacts(path).sizes) expect([Math.round(width), Math.round(height)]).toEqual(size);
      // 1 860 kg a level is 4 100.6 lb, two levels 8 201.2 lb.
      expect(pdfPages(path).join('')).toMatch(kind === 'bay-sheet' ? /4,101\slb/ : /8,201\slb/);
    }
  });

  test('tables, headings and lists are told to assistive technology as such', async () => {
    const { page } = program;
    const structure = pdfStructure(await printed(page, 'visit-report', 'A4', 'kilograms and millimetres'));
    for (const kind of ['H1', 'H2', 'Table', 'TR', 'TH', 'TD', 'L', 'LI']) expect(structure).toMatch(new RegExp(`^\\s*${kind}\\b`, 'm'));
    for (const heads of ['Column', 'Row']) expect(structure).toContain(`/Scope /${heads}`);
  });

  test('a drawing is told in words, and the language is named', async () => {
    const { page } = program;
    const path = await printed(page, 'bay-sheet', 'A4', 'kilograms and millimetres');
    expect(pdfStructure(path)).toMatch(/^\s*Figure\b/m);
    const bytes = await readFile(path, 'latin1');
    expect(bytes).toContain('/Alt (Front view of bay A1 to scale');
    expect(bytes).toContain('/Lang (en)');
  });
});

describe.each([
  ['european', 'A4', 'kilograms and millimetres'],
  ['united-states', 'Letter', 'pounds and inches'],
] as const)('long names, damage and what is not known: %s, %s, %s', (set, sheet, units) => {
  let folder = '';
  let program: Program;

  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), 'tallybeam-paper-'));
    const site = hardSite(set);
    await new SiteStore({ fs: nodeFs, folder, program: '0.1.0' }).add(site);
    const beside = new BesideStore(nodeFs, foldersIn(folder));
    const photos = await Promise.all(
      SHAPES.map(async ([width, height], i) => {
        const base64 = greyPng(width, height).toString('base64');
        const { file } = await beside.addPhoto({ siteId: site.id, photoId: `p${i}`, base64 });
        return { id: `p${i}`, file, original: `IMG_${width}x${height}.png`, taken: '2026-11-30T09:12:44', note: '' };
      }),
    );
    const body = writeVisit(hardVisit(site, photos));
    await beside.saveVisit({ siteId: site.id, visitId: 'v', body, baseRevision: null });
    program = await startProgram({}, folder);
    const { page } = program;
    page.setDefaultTimeout(60_000);
    await page
      .getByRole('button', { name: /^Zentrallager/ })
      .first()
      .click();
    await page.locator('[data-bay]').first().waitFor();
    await command(page, 'Paper: print');
    await choice(page, 'Of').selectOption({ label: 'run B, bay B2' });
  });
  afterAll(async () => {
    await program.close();
    await rm(folder, { recursive: true, force: true });
  });

  test.each(PAPER_KINDS)('%s', { timeout: 120_000 }, async (kind) => {
    const { page, complaints } = program;
    const path = await printedIn(folder, page, kind, sheet, units);
    expect(await cutOff(page)).toEqual([]);
    expect(await pageFaults(page, path)).toEqual([]);
    expect(complaints).toEqual([]);
  });

  test('photos of every shape are whole, and none has under 300 dots to the inch', { timeout: 120_000 }, async () => {
    const { page } = program;
    await printedIn(folder, page, 'visit-report', sheet, units);
    await eventually(() => page.locator('.paper .photos img').evaluateAll((all) => all.every((image) => image.clientWidth > 0))).toBe(true);
    const images = pdfImages(await pdfOf(page, join(folder, 'photos.pdf')));
    // A picture on two pages would be listed twice.
    expect(images.map(({ width, height }) => [width, height])).toEqual(SHAPES);
    for (const { perInch } of images) expect(perInch).toBeGreaterThanOrEqual(299);
    const tallest = await page.locator('.paper .photos img').evaluateAll((all) => Math.max(...all.map((image) => image.clientHeight)));
    // 68 mm at 96 px to the inch.
    expect(tallest).toBeLessThanOrEqual(258);
  });

  test('a record of a bay that was changed since is void on every page, and says which record it is', { timeout: 120_000 }, async () => {
    const { page } = program;
    await choice(page, 'Paper').selectOption({ label: PAPER_TITLES['bay-sheet'] });
    await page.getByRole('article', { name: /^Bay sheet, Bay B2/ }).waitFor();
    await page.getByRole('button', { name: 'Keep as a record' }).click();
    const head = join(folder, 'beside/halverwick/records/head.json');
    await eventually(() => readFile(head, 'utf8').catch(() => '')).toContain('"number":1');
    await page.getByRole('button', { name: '← Back to the bay' }).click();
    await command(page, 'Bay: clear entry');
    await type(field(page, 'Clear entry'), '2650 mm');
    await command(page, 'Records');
    await page.getByRole('button', { name: /^1 Check: Bay sheet/ }).click();
    await page.getByText('Void.', { exact: false }).first().waitFor();
    const path = await pdfOf(page, join(folder, 'record.pdf'));
    const hash = /"hash":"([0-9a-f]{16})/.exec(await readFile(head, 'utf8'))?.[1] ?? 'none';
    pdfPages(path).forEach((text, i) => {
      const words = squeezed(text);
      expect(words, `page ${i + 1}`).toMatch(/^VOID·Baysheet:BayB2/);
      expect(words, `page ${i + 1}`).toContain(`record1,hash${hash}`);
    });
    expect(await pageFaults(page, path)).toEqual([]);
  });
});

/** Width and height of photos: lying, upright, small, long, tall. */
const SHAPES = [
  [1600, 1200],
  [1200, 1600],
  [320, 240],
  [3000, 700],
  [600, 2400],
] as const;

test('photos are printed at 300 dots to the inch or more', async () => {
  const folder = await mkdtemp(join(tmpdir(), 'tallybeam-photo-'));
  try {
    await new SiteStore({ fs: nodeFs, folder, program: '0.1.0' }).add(siteOf({ bays: 1 }));
    const beside = new BesideStore(nodeFs, foldersIn(folder));
    const { file } = await beside.addPhoto({ siteId: 'site', photoId: 'p', base64: greyPng(1600, 1200).toString('base64') });
    let visit = startVisit({
      id: 'v',
      siteId: 'site',
      name: 'One bay',
      kind: 'event',
      person: '',
      started: '2026-11-30',
      bays: [{ runId: 'run-A', bayId: 'A-bay-1' }],
    });
    visit = attachPhoto(visit, 'A-bay-1', { id: 'p', file, original: 'IMG_1.png', taken: '', note: 'front left' });
    await beside.saveVisit({ siteId: 'site', visitId: 'v', body: writeVisit(visit), baseRevision: null });
    await withProgram(
      async ({ page }) => {
        await page
          .getByRole('button', { name: /^Test depot/ })
          .first()
          .click();
        await page.locator('[data-bay]').first().waitFor();
        await command(page, 'Paper: print');
        await choice(page, 'Paper').selectOption({ label: PAPER_TITLES['visit-report'] });
        const photo = page.getByRole('img', { name: /front left/ });
        await eventually(() => photo.evaluate((image) => image instanceof HTMLImageElement && image.complete && image.naturalWidth)).toBe(
          1600,
        );
        const path = join(folder, 'report.pdf');
        await page.pdf({ path, tagged: true, outline: true, preferCSSPageSize: true, printBackground: true });
        expect(pdfImages(path)).toMatchObject([{ width: 1600, height: 1200 }]);
        expect(pdfImages(path)[0]?.perInch).toBeGreaterThanOrEqual(300);
        expect(pdfPages(path).join('')).toContain('front left (IMG_1.png)');
      },
      {},
      folder,
    );
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
});

/**
 * Text of the paper that reaches past its own cell or past the sheet, as it is laid out for print: print
 * shrinks every page by what is wider than the sheet. And drawings higher than a page, which are torn.
 */
async function cutOff(page: Page): Promise<string[]> {
  await page.emulateMedia({ media: 'print' });
  const faults = await page.evaluate(() => {
    const paper = document.querySelector('.paper');
    if (paper === null) return ['there is no paper'];
    const edge = paper.getBoundingClientRect().right + 1;
    // A Letter page on its side holds 216 mm less its margins of 16 and 38 mm, at 96 px to the inch.
    const tallest = (162 / 25.4) * 96;
    return [...paper.querySelectorAll('td, th, p, li, dd, dt, text, figcaption, table, h1, h2, h3, caption, svg, img')].flatMap(
      (element) => {
        const box = element.getBoundingClientRect();
        const out =
          box.right > edge ||
          (['svg', 'IMG'].includes(element.tagName) && box.height > tallest) ||
          (!(element instanceof SVGElement) && element.scrollWidth > element.clientWidth + 2 && element.clientWidth > 0);
        return out ? [`${element.tagName} "${element.textContent?.slice(0, 60)}"`] : [];
      },
    );
  });
  await page.emulateMedia({ media: null });
  return faults.slice(0, 10);
}
