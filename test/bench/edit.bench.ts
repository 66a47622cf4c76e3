/**
 * The work from an edit to its findings in a site of 10,000 placements against the same edit in one of 100,
 * in one run: the edit, the findings of the bay that is looked at, and the way through the audit worker and
 * back with every message cloned. Medians of processor time; read the ratios. What is rechecked is counted.
 */
import { auditBay, auditFrame } from '../../src-core/audit/audit';
import { createAuditCache } from '../../src-core/audit/cache';
import { movePlacement } from '../../src-core/site/edits';
import type { Site } from '../../src-core/site/site';
import { AuditLink } from '../../src-renderer/auditing/audit-link';
import { CloningWorker } from '../renderer/cloning-worker';
import { depotOf, placementsOf, type Depot } from './large-site';

const TODAY = '2026-12-01';
const EDITS = 41;
/** Edits before the machine has warmed up to them. */
const FIRST = 10;

const MOVED = 'R1-3-l2-g1';
const LEVEL = 'R1-3-l2';

/** ms of processor time, which others on the machine do not lengthen. */
const clock = (): number => process.cpuUsage().user / 1000 + process.cpuUsage().system / 1000;
const median = (all: readonly number[]): number => all.toSorted((a, b) => a - b)[all.length >> 1] ?? NaN;

interface Bench {
  readonly depot: Depot;
  /** ms each. */
  readonly here: number[];
  readonly worker: number[];
  /** Bays sent, and bays and frames that came back, in all edits. */
  sent: number;
  bays: number;
  frames: number;
  edit(atMm: number, measured: boolean): Promise<void>;
}

async function benchOf(depot: Depot): Promise<Bench> {
  let site: Site = depotOf(depot);
  const near = createAuditCache();
  const worker = new CloningWorker();
  const nothing = () => undefined;
  const link = new AuditLink(
    () => worker,
    () => TODAY,
    {
      audited: nothing,
      done: nothing,
      trouble: (_, message) => {
        throw new Error(message);
      },
    },
    near,
  );
  await worker.workedOff(() => link.update(site));
  worker.deliver();
  worker.forget();
  const bench: Bench = {
    depot,
    here: [],
    worker: [],
    sent: 0,
    bays: 0,
    frames: 0,
    edit: async (atMm, measured) => {
      worker.forget();
      const began = clock();
      site = movePlacement(site, MOVED, { levelId: LEVEL, atMm });
      // What is shown is written out whole, calculations and all.
      structuredClone([
        auditBay(site, 'R1', 'R1-3', TODAY, near),
        ...['R1-f3', 'R1-f4'].map((frame) => auditFrame(site, 'R1', frame, TODAY, near)),
      ]);
      const shown = clock();
      await worker.workedOff(() => link.update(site));
      worker.deliver();
      const ended = clock();
      if (!measured) return;
      bench.here.push(shown - began);
      bench.worker.push(ended - shown);
      for (const message of worker.toWorker)
        if (message.kind === 'change') bench.sent += message.change.runs.reduce((sum, run) => sum + run.bays.changed.length, 0);
      for (const message of worker.fromWorker)
        if (message.kind === 'audit') {
          bench.bays += message.change.bays.changed.length;
          bench.frames += message.change.frames.changed.length;
        }
    },
  };
  return bench;
}

const each = (count: number): string => (count / EDITS).toFixed(1);
const row = (cells: readonly string[]): string => cells.map((cell, i) => (i === 0 ? cell.padEnd(34) : cell.padStart(14))).join('');

/** @returns how many times the work of an edit in the small site it is in the large one */
async function compare(title: string, small: Depot, large: Depot): Promise<number> {
  const benches = [await benchOf(small), await benchOf(large)] as const;
  // Turn by turn, so that whatever slows the machine slows both.
  for (let i = 0; i < FIRST + EDITS; i++) for (const one of benches) await one.edit(100 + 10 * (i % 50), i >= FIRST);
  console.log(`\n${title}`);
  console.log(row(['placements', 'edit', 'worker', 'all', 'bays sent', 'bays back', 'frames back']));
  const all = benches.map(({ here, worker }) => here.map((ms, i) => ms + (worker[i] ?? NaN)));
  const ratio = (pick: (bench: Bench, i: number) => readonly number[], i: number) =>
    median(pick(benches[i] ?? benches[0], i)) / median(pick(benches[0], 0));
  benches.forEach((one, i) => {
    const times = [ratio(({ here }) => here, i), ratio(({ worker }) => worker, i), ratio((_, at) => all[at] ?? [], i)].map((times) =>
      times.toFixed(2),
    );
    console.log(row([`${placementsOf(one.depot)} in ${one.depot.runs} runs`, ...times, each(one.sent), each(one.bays), each(one.frames)]));
  });
  return ratio((_, at) => all[at] ?? [], 1);
}

/** @returns the claims, each as a line with its goal */
export async function editBench(): Promise<readonly string[]> {
  console.log('\nAn edit, without the page: from the edit to its findings here and back from the audit worker, as times of the first row');
  const runs = await compare(
    'runs of 50 bays in pairs back to back',
    { runs: 2, bays: 5, paired: true },
    { runs: 20, bays: 50, paired: true },
  );
  const one = await compare('one run of all bays', { runs: 1, bays: 10, paired: false }, { runs: 1, bays: 1000, paired: false });
  return [
    `From an edit to its findings, 10,000 placements against 100, in 20 runs / in one run: ${runs.toFixed(2)} / ${one.toFixed(2)} times the work (goal at most 2)`,
  ];
}
