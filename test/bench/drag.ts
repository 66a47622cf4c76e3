/**
 * npm run bench:page [-- FOLDER of another built page]
 * Drags and nudges goods in the built page in Chromium, in a site of 100 placements and in two of 10,000: long tasks of
 * the page's thread during the drag, and its processor time from an edit to its painted findings. No test:
 * what else runs on the machine lengthens tasks.
 */
import { createHash } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { loadavg, tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { chromium, type Browser, type CDPSession, type Page } from 'playwright-core';
import { writeSiteFile } from '../../src-core/site/envelope';
import { writeSite } from '../../src-core/site/write';
import { startServe } from '../../src-main/serve-app';
import { CHROMIUM_ARGS, chromiumPath } from '../e2e/chromium';
import { depotOf, placementsOf, type Depot } from './large-site';

const DEPOTS: readonly Depot[] = [
  { runs: 2, bays: 5, paired: true },
  { runs: 20, bays: 50, paired: true },
  { runs: 1, bays: 1000, paired: false },
];
const NUDGES = 20;
const rendererFolder = resolve(process.argv[2] ?? join(import.meta.dirname, '../../dist/renderer'));

interface Figures {
  readonly opened: readonly number[];
  readonly drag: readonly number[];
  readonly nudge: readonly number[];
  readonly workMs: number;
}

/** Durations of the page's tasks over 50 ms since this was last asked, ms. */
const longTasks = (page: Page): Promise<readonly number[]> =>
  page.evaluate(() => {
    const kept = globalThis as unknown as { longTasks: number[] };
    const tasks = kept.longTasks.map(Math.round);
    kept.longTasks = [];
    return tasks;
  });

async function taskTime(session: CDPSession): Promise<number> {
  const { metrics } = await session.send('Performance.getMetrics');
  return 1000 * (metrics.find(({ name }) => name === 'TaskDuration')?.value ?? NaN);
}

const checked = (page: Page) => page.locator('section[aria-label="Findings"][aria-busy="false"]').waitFor();

async function measure(browser: Browser, depot: Depot): Promise<Figures> {
  const sitesFolder = await mkdtemp(join(tmpdir(), 'tallybeam-bench-'));
  const hash = (text: string) => createHash('sha256').update(text).digest('hex');
  const text = writeSiteFile(writeSite(depotOf(depot)), { program: '0.1.0', savedAt: '2026-05-04T08:00:00.000Z' }, hash);
  await writeFile(join(sitesFolder, 'depot.tallybeam.json'), text);
  const serving = await startServe({ sitesFolder, rendererFolder, port: 0 });
  const page = await browser.newPage({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce' });
  page.setDefaultTimeout(240_000);
  try {
    await page.addInitScript(() => {
      const kept = globalThis as unknown as { longTasks: number[] };
      kept.longTasks = [];
      new PerformanceObserver((list) => kept.longTasks.push(...list.getEntries().map(({ duration }) => duration))).observe({
        type: 'longtask',
      });
    });
    await page.goto(serving.address);
    await page.getByRole('button', { name: 'Large depot' }).first().click();
    await page.locator('[data-bay="R1-3"]').click();
    await checked(page);
    const opened = await longTasks(page);
    const goods = page.locator('[data-placement="R1-3-l2-g1"]');
    const box = await goods.boundingBox();
    if (box === null) throw new Error('the goods are not in the drawing');
    const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
    await page.mouse.move(x, y);
    await page.mouse.down();
    await page.mouse.move(x + 8, y);
    for (let i = 0; i < 90; i += 1) {
      await page.mouse.move(x + 10 + (i % 30), y - 2 * (i % 40));
      await page.waitForTimeout(12);
    }
    await page.mouse.up();
    await checked(page);
    // What the edit leaves to be done later, the journal, belongs to it.
    await page.waitForTimeout(2500);
    const drag = await longTasks(page);
    const session = await page.context().newCDPSession(page);
    await session.send('Performance.enable', { timeDomain: 'threadTicks' });
    await goods.focus();
    const works: number[] = [];
    for (let i = 0; i < NUDGES; i += 1) {
      const before = await taskTime(session);
      await page.keyboard.press(i % 2 === 0 ? 'Alt+ArrowRight' : 'Alt+ArrowLeft');
      await page.evaluate(() => new Promise((painted) => requestAnimationFrame(() => setTimeout(painted, 0))));
      await checked(page);
      works.push((await taskTime(session)) - before);
    }
    const nudge = await longTasks(page);
    return { opened, drag, nudge, workMs: works.toSorted((a, b) => a - b)[NUDGES >> 1] ?? NaN };
  } finally {
    await page.close();
    await serving.close();
    await rm(sitesFolder, { recursive: true, force: true });
  }
}

const told = (tasks: readonly number[]): string => (tasks.length === 0 ? 'none' : `${tasks.length}, longest ${Math.max(...tasks)} ms`);

const browser = await chromium.launch({ executablePath: chromiumPath(), args: CHROMIUM_ARGS });
try {
  const all: Figures[] = [];
  for (const depot of DEPOTS) {
    const figures = await measure(browser, depot);
    all.push(figures);
    console.log(`\n${placementsOf(depot)} placements in ${depot.runs} runs (machine’s load ${loadavg()[0]?.toFixed(1)})`);
    console.log(
      `  tasks over 50 ms   opening: ${told(figures.opened)};  dragging: ${told(figures.drag)};  nudging: ${told(figures.nudge)}`,
    );
    console.log(
      `  work of one nudge  ${figures.workMs.toFixed(1)} ms of the page’s thread, ${(figures.workMs / (all[0]?.workMs ?? NaN)).toFixed(2)} times the first`,
    );
  }
} finally {
  await browser.close();
}
