/** Bay scenario S10, the safety officer's bay, from its capture at the rack to the printed report. */
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, expect, test } from 'vitest';
import type { Paper } from '../../src-core/paper/paper';
import { editLevel, removePlacements } from '../../src-core/site/edits';
import type { Site } from '../../src-core/site/site';
import type { formatText } from '../../src-core/units/format';
import { formatQuantity } from '../../src-core/units/format';
import { readContents } from '../../src-core/visit/contents';
import type { Visit } from '../../src-core/visit/visit';
import { nodeFs } from '../../src-main/store/fs-port';
import { SiteStore } from '../../src-main/store/site-store';
import { blockWords, METRIC } from '../core/paper/words';
import { s10Site } from '../core/visit/make-s10';
import { pdfFacts, pdfImages, pdfPages, squeezed } from './poppler';
import { closeBrowser } from './program';
import { choice, command, eventually, field, type, withProgram } from './steps';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';

afterAll(closeBrowser);

/** The rack as it is drawn up, before anybody has looked what stands in it: no goods, locks not known. */
function rackOnly(): Site {
  const site = s10Site();
  const levels = site.runs.flatMap(({ bays }) => bays.flatMap((bay) => bay.levels));
  const empty = removePlacements(
    site,
    levels.flatMap(({ placements }) => placements.map(({ id }) => id)),
  );
  return levels.reduce((after, { id }) => editLevel(after, id, { locks: 'unknown' }), empty);
}

async function openVisits(page: Page): Promise<void> {
  await page
    .getByRole('button', { name: /Test depot/ })
    .first()
    .click();
  await page.locator('[data-bay]').first().waitFor();
  await page.locator('[data-bay="A-bay-2"]').click();
  await command(page, 'Visits');
}

const answer = (page: Page, question: string, words: string) =>
  page
    .getByRole('group', { name: new RegExp(`^${question}`) })
    .getByRole('radio', { name: words, exact: true })
    .check();

/** The whole of scenario S10 as it is found at the rack. */
async function capture(page: Page): Promise<void> {
  await choice(page, 'Kind').selectOption({ label: 'Visit after an event' });
  await choice(page, 'Bays').selectOption({ label: 'bay A2 only' });
  await type(field(page, 'Visited by'), 'S. Officer');
  await page.getByRole('button', { name: 'Begin the visit' }).click();
  await page.getByRole('heading', { name: 'Bay A2', exact: true }).waitFor();

  await answer(page, 'Beam locks', 'No');
  await page.getByRole('checkbox', { name: 'No lock at level 1, front beam, left end' }).check();
  await answer(page, 'Load notice', 'No');
  await page.getByRole('button', { name: /^All the rest is in order/ }).click();

  await page.getByRole('button', { name: 'Record damage' }).click();
  await choice(page, 'Damaged part').selectOption({ label: 'Front upright of the left frame, A-F2' });
  await type(field(page, 'Bow along the run'), '8');
  await type(field(page, 'Bow in the frame’s plane'), '4');
  await page.getByText('1.6 times the 5 mm allowed along the run; 1.33 times the 3 mm allowed', { exact: false }).waitFor();
  await page.getByRole('button', { name: 'Record damage' }).click();
  const diagonal = page.getByRole('group', { name: 'Damage' }).last();
  await choice(diagonal, 'Damaged part').selectOption({ label: 'Bracing of the left frame, A-F2' });
  await type(field(diagonal, 'Bow along the run'), '12');
  await type(field(diagonal, 'Bow in the frame’s plane'), '0');

  await page.getByText('What stands here').click();
  await type(field(page, 'How many on level 1'), '3');
  await page.getByText('Sag of beams').click();
  await type(field(page, 'Loaded sag of level 1, front beam'), '17');
  await type(field(page, 'Unloaded sag of level 1, front beam'), '4');
  await page.getByText('29.6 % of the allowed sag', { exact: false }).waitFor();
  await page.getByText('Notice against the rack').click();
  await choice(page, 'Notice fixed to the bay').selectOption({ label: 'No' });
}

test('S10 from capture to the printed report: every figure of the PDF is the core’s', { timeout: 240_000 }, async () => {
  const folder = await mkdtemp(join(tmpdir(), 'tallybeam-s10-'));
  try {
    await new SiteStore({ fs: nodeFs, folder, program: '0.1.0' }).add(rackOnly());
    await withProgram(
      async ({ page }) => {
        await openVisits(page);
        await capture(page);
        await page.getByRole('button', { name: 'Finish this bay and go on' }).click();
        await page.getByRole('button', { name: 'Sign and keep as a record' }).click();
        await page.getByText('This visit is signed').waitFor();
        await eventually(() => readFile(join(folder, 'beside/site/records/head.json'), 'utf8').catch(() => '')).toContain('"number":1');
        await page.getByRole('button', { name: 'Visit report…' }).click();
        await page.getByRole('heading', { name: /^Visit after an event, bay A2/, level: 1 }).waitFor();
        await page.pdf({ path: join(folder, 'report.pdf'), tagged: true, outline: true, preferCSSPageSize: true, printBackground: true });
      },
      {},
      folder,
    );

    const contents = readContents(await readFile(join(folder, 'beside/site/records/000001.json'), 'utf8'));
    const paper = contents.paper as Paper;
    expectScenario(paper, (contents.figures as { visit: Visit }).visit);
    const pages = pdfPages(join(folder, 'report.pdf'));
    const printed = pages.map(squeezed).join('');
    const missing = figuresOf(paper).filter((figure) => !printed.includes(squeezed(figure)));
    expect(missing).toEqual([]);
    const rows = paper.blocks.filter(({ kind }) => kind === 'table' || kind === 'facts').flatMap((block) => blockWords(block, METRIC));
    const lost = rows.flatMap((row) => row.split(' | ')).filter((cell) => !printed.includes(squeezed(cell).replace(/^.*?:(?=.)/, '')));
    expect(lost).toEqual([]);

    const facts = pdfFacts(join(folder, 'report.pdf'));
    expect(facts.tagged).toBe(true);
    expect(facts.pages).toBe(pages.length);
    expect(pdfImages(join(folder, 'report.pdf'))).toEqual([]);
    pages.forEach((text, i) => {
      const page = squeezed(text);
      for (const words of [
        `Page${i + 1}of${pages.length}`,
        'Testdepot',
        paper.foot.checksum.slice(0, 16),
        'Ruleset:European',
        'Beamspan:clearentry',
        'Notchecked:',
      ])
        expect(page, `page ${i + 1}`).toContain(words);
    });
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
});

/** What the scenario says of the bay, in the frozen paper and the frozen visit. */
function expectScenario(paper: Paper, visit: Visit): void {
  const words = paper.blocks.flatMap((block) => blockWords(block, METRIC)).join('\n');
  // S10: 13.5 mm allowed, set 29.6 %, EI 194.67 kN·m², 12.43 mm, 1 945.9 kg, ratio 1.046; three significant figures in print.
  for (const figure of [
    '13.5 mm',
    '29.6 %',
    '195 kN·m²',
    '12.4 mm',
    '1 946 kg',
    '1.05 times',
    '1.6 along, 1.33 across',
    '1 860 kg is declared',
  ])
    expect(words).toContain(figure);
  for (const done of [
    '3 amber bends on frame A-F2',
    'Unload every level of bay A1 and bay A2',
    'Take both beams out',
    'No load notice is fixed',
  ])
    expect(words.toLowerCase()).toContain(done.toLowerCase());
  expect(visit.bays[0]).toMatchObject({
    checklist: { locks: 'no', notices: 'no', anchors: 'yes', floor: 'yes' },
    missingLocks: [{ levelId: 'A2-level-1', beam: 'front', end: 'left' }],
    damages: [
      { member: 'upright-front', frameId: 'A-frame-2', alongMm: 8, acrossMm: 4, gaugeMm: 1000 },
      { member: 'bracing', frameId: 'A-frame-2', alongMm: 12, acrossMm: 0, gaugeMm: 1000 },
    ],
    sags: [{ levelId: 'A2-level-1', beam: 'front', loadedMm: 17, unloadedMm: 4 }],
    notice: { there: 'no' },
  });
}

/** Every figure of a paper, in sentences, cells and worked lines, as it is printed. */
function figuresOf(paper: Paper): readonly string[] {
  return paper.blocks.flatMap((block): readonly string[] => {
    const ofText = (text: Parameters<typeof formatText>[0]) =>
      text.flatMap((part) => (typeof part === 'string' ? [] : [formatQuantity(part, METRIC)]));
    switch (block.kind) {
      case 'paragraph':
        return ofText(block.text);
      case 'list':
        return block.items.flatMap(ofText);
      case 'facts':
        return block.facts.flatMap(({ value }) => (Array.isArray(value) ? ofText(value) : []));
      case 'table':
        return block.rows.flatMap((row) => row.flatMap((cell) => (Array.isArray(cell) ? ofText(cell) : [])));
      case 'worked':
        return block.steps.flatMap(({ values, result }) => [
          ...values.map(({ quantity }) => formatQuantity(quantity, METRIC)),
          formatQuantity(result.quantity, METRIC),
        ]);
      default:
        return [];
    }
  });
}
