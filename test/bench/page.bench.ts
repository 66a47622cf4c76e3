/**
 * Drags and nudges goods in the built page in Chromium, in a site of 100 placements and in two of 10,000, turn by
 * turn: the longest tasks of the page's thread, and its work from an edit to its painted findings. No test: it
 * takes a minute, and needs a machine that is not too busy.
 */
import { createHash } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { chromium, type Browser, type CDPSession, type Page } from 'playwright-core';
import { createBuilder } from 'vite';
import { writeSiteFile } from '../../src-core/site/envelope';
import { writeSite } from '../../src-core/site/write';
import { startServe, type Serving } from '../../src-main/serve-app';
import { CHROMIUM_ARGS, installedChromium } from '../e2e/chromium';
import { depotOf, placementsOf, type Depot } from './large-site';

const DEPOTS: readonly Depot[] = [
  { runs: 2, bays: 5, paired: true },
  { runs: 20, bays: 50, paired: true },
  { runs: 1, bays: 1000, paired: false },
];
/** Nudges that are measured, after others by which the machine has warmed up to them. */
const NUDGES = 20;
const FIRST = 6;
/** ms: a task this long is felt. */
const LONG = 50;

interface Task {
  /** ms on the clock, and of the processor. */
  readonly wall: number;
  readonly work: number;
}

class OpenPage {
  readonly works: number[] = [];
  /** The longest task of each phase. */
  readonly tasks = new Map<string, Task>();

  private constructor(
    readonly depot: Depot,
    readonly page: Page,
    private readonly browser: Browser,
    private readonly session: CDPSession,
    private readonly serving: Serving,
    private readonly sitesFolder: string,
  ) {}

  static async start(browser: Browser, rendererFolder: string, depot: Depot): Promise<OpenPage> {
    const sitesFolder = await mkdtemp(join(tmpdir(), 'tallybeam-bench-'));
    const hash = (text: string) => createHash('sha256').update(text).digest('hex');
    const text = writeSiteFile(writeSite(depotOf(depot)), { program: '0.1.0', savedAt: '2026-05-04T08:00:00.000Z' }, hash);
    await writeFile(join(sitesFolder, 'depot.tallybeam.json'), text);
    const serving = await startServe({ sitesFolder, rendererFolder, port: 0 });
    const page = await browser.newPage({ viewport: { width: 1440, height: 900 }, reducedMotion: 'reduce' });
    page.setDefaultTimeout(240_000);
    const session = await page.context().newCDPSession(page);
    await session.send('Performance.enable', { timeDomain: 'threadTicks' });
    return new OpenPage(depot, page, browser, session, serving, sitesFolder);
  }

  async close(): Promise<void> {
    await this.page.close();
    await this.serving.close();
    await rm(this.sitesFolder, { recursive: true, force: true });
  }

  /** Notes the longest task of the page's thread in a phase. */
  async #noting(phase: string, act: () => Promise<void>): Promise<void> {
    await this.browser.startTracing(this.page, { categories: ['disabled-by-default-devtools.timeline'] });
    await act();
    const { traceEvents } = JSON.parse((await this.browser.stopTracing()).toString()) as { traceEvents: readonly TraceEvent[] };
    const all = tasksOf(traceEvents);
    this.tasks.set(
      phase,
      all.reduce((most, one) => (one.work > most.work ? one : most), { wall: 0, work: 0 }),
    );
  }

  checked(): Promise<void> {
    return this.page.locator('section[aria-label="Findings"][aria-busy="false"]').waitFor();
  }

  async open(): Promise<void> {
    await this.page.goto(this.serving.address);
    await this.page.getByRole('button', { name: 'Large depot' }).first().waitFor();
    await this.page.waitForTimeout(1000);
    await this.#noting('opening', async () => {
      await this.page.getByRole('button', { name: 'Large depot' }).first().click();
      await this.page.locator('[data-bay="R1-3"]').click();
      await this.checked();
    });
  }

  async drag(): Promise<void> {
    const { page } = this;
    const box = await page.locator(MOVED).boundingBox();
    if (box === null) throw new Error('the goods are not in the drawing');
    const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
    await this.#noting('dragging', async () => {
      await page.mouse.move(x, y);
      await page.mouse.down();
      await page.mouse.move(x + 8, y);
      for (let i = 0; i < 90; i += 1) {
        await page.mouse.move(x + 10 + (i % 30), y - 2 * (i % 40));
        await page.waitForTimeout(12);
      }
      await page.mouse.up();
      await this.checked();
      // What the edit leaves to be done later, the journal, belongs to it.
      await page.waitForTimeout(2500);
    });
  }

  async nudge(i: number): Promise<void> {
    const { page } = this;
    await page.bringToFront();
    const before = await this.#taskTime();
    await page.keyboard.press(i % 2 === 0 ? 'Alt+ArrowRight' : 'Alt+ArrowLeft');
    await page.evaluate(() => new Promise((painted) => requestAnimationFrame(() => setTimeout(painted, 0))));
    await this.checked();
    const work = (await this.#taskTime()) - before;
    if (i >= FIRST) this.works.push(work);
  }

  async #taskTime(): Promise<number> {
    const { metrics } = await this.session.send('Performance.getMetrics');
    return 1000 * (metrics.find(({ name }) => name === 'TaskDuration')?.value ?? NaN);
  }
}

const MOVED = '[data-placement="R1-3-l2-g1"]';

/** What a browser's trace says of one event, µs. */
interface TraceEvent {
  readonly name: string;
  readonly pid: number;
  readonly tid: number;
  readonly dur?: number;
  /** Left out where the system does not tell a thread's own time. */
  readonly tdur?: number;
  readonly args: { readonly name?: string };
}

function tasksOf(events: readonly TraceEvent[]): readonly Task[] {
  const thread = ({ pid, tid }: TraceEvent) => `${pid} ${tid}`;
  const pages = new Set(events.filter(({ name, args }) => name === 'thread_name' && args.name === 'CrRendererMain').map(thread));
  return events
    .filter((event) => event.name === 'RunTask' && pages.has(thread(event)))
    .map(({ dur = 0, tdur = dur }) => ({ wall: dur / 1000, work: tdur / 1000 }));
}

const median = (all: readonly number[]): number => all.toSorted((a, b) => a - b)[all.length >> 1] ?? NaN;

async function builtPage(): Promise<string> {
  const builder = await createBuilder({ configFile: resolve(import.meta.dirname, '../../vite.config.ts'), logLevel: 'error' });
  await builder.buildApp();
  return resolve(import.meta.dirname, '../../dist/renderer');
}

/**
 * @param folder of a page that is built already; null builds this one
 * @returns the claims, each as a line with its goal
 */
export async function pageBench(folder: string | null): Promise<readonly string[]> {
  const executablePath = installedChromium();
  if (executablePath === null)
    return ['On the page: NOT MEASURED, because there is no Chromium on this machine. Install it, or name it in CHROMIUM_PATH.'];
  const rendererFolder = folder === null ? await builtPage() : resolve(folder);
  const browser = await chromium.launch({ executablePath, args: CHROMIUM_ARGS });
  const pages: OpenPage[] = [];
  try {
    for (const depot of DEPOTS) {
      const one = await OpenPage.start(browser, rendererFolder, depot);
      pages.push(one);
      await one.open();
      await one.drag();
      await one.page.locator(MOVED).focus();
    }
    // Turn by turn, so that whatever slows the machine slows all.
    for (let i = 0; i < FIRST + NUDGES; i += 1) for (const one of pages) await one.nudge(i);
  } finally {
    for (const one of pages) await one.close();
    await browser.close();
  }
  return claimsOf(pages);
}

function claimsOf(pages: readonly OpenPage[]): readonly string[] {
  const work = (one: OpenPage | undefined) => median(one?.works ?? []);
  console.log('\nOn the page, in Chromium: a nudge to its painted findings, as times of the first row; the longest task of each phase');
  for (const one of pages) {
    const phases = [...one.tasks].map(([phase, task]) => `${phase} ${task.work.toFixed(0)} ms (${task.wall.toFixed(0)} on the clock)`);
    const times = (work(one) / work(pages[0])).toFixed(2);
    console.log(`${`${placementsOf(one.depot)} in ${one.depot.runs} runs`.padEnd(22)} ${times}   ${phases.join(', ')}`);
  }
  const [, runs, single] = pages;
  const ratios = [runs, single].map((one) => (work(one) / work(pages[0])).toFixed(2)).join(' / ');
  const longest = (phase: string) => Math.max(...pages.map(({ tasks }) => tasks.get(phase)?.work ?? NaN));
  return [
    `From an edit to its painted verdict, 10,000 placements against 100, in 20 runs / in one run: ${ratios} times the work (goal at most 2)`,
    `Longest task during a drag, and until the edit is in the journal: ${longest('dragging').toFixed(0)} ms of the processor (goal at most ${LONG})`,
    `Longest task while a site opens: ${longest('opening').toFixed(0)} ms of the processor (goal at most ${LONG})`,
  ];
}
