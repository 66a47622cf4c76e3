/** Kills a program in the middle of its work, again and again, and looks at what it left. */
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdirSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { makerOfTemp } from '../../src-main/store/file-names';
import { nodeFs } from '../../src-main/store/fs-port';
import { JournalFiles, latestOf } from '../../src-main/store/journal-files';
import { SiteStore } from '../../src-main/store/site-store';
import { bundled } from './bundled';
import { bodyOf, drawn, numberIn } from './make';

export interface KillReport {
  readonly kills: number;
  readonly unreadable: number;
  /** Saves that were answered as done and were not there afterwards. */
  readonly lostSaves: number;
  /** Edits that were answered as journalled and were neither saved nor offered afterwards. */
  readonly lostEdits: number;
  /** Temporary files that were still there once the program had started again. */
  readonly temporaryAfterStart: number;
  /** What the kills left for the next start to clear up: proof that they struck in the middle. */
  readonly temporaryAfterKill: number;
  readonly tornLines: number;
  readonly saves: number;
  readonly edits: number;
}

interface Said {
  readonly saved: number;
  readonly edited: number;
  readonly saves: number;
  readonly edits: number;
}

async function runAndKill(child: string, folder: string, writer: string, delay: number, onStart: (pid: number) => void): Promise<Said> {
  const program = spawn(process.execPath, [child, folder, writer], { stdio: ['ignore', 'pipe', 'pipe'] });
  let out = '';
  let err = '';
  let started = false;
  program.stderr.on('data', (piece: Buffer) => (err += piece.toString()));
  program.stdout.on('data', (piece: Buffer) => {
    out += piece.toString();
    if (started || !out.includes('started')) return;
    started = true;
    onStart(program.pid ?? 0);
    setTimeout(() => program.kill('SIGKILL'), delay);
  });
  const [, signal] = (await once(program, 'close')) as [number | null, string | null];
  if (signal !== 'SIGKILL') throw new Error(`the program ended by itself: ${err}`);
  // The last line may be torn.
  const lines = out.slice(0, out.lastIndexOf('\n')).split('\n');
  const numbers = (word: string) => lines.flatMap((line) => (line.startsWith(`${word} `) ? [Number(line.split(' ')[1])] : []));
  const [saved, edited] = [numbers('saved'), numbers('edited')];
  return { saved: saved.at(-1) ?? 0, edited: edited.at(-1) ?? 0, saves: saved.length, edits: edited.length };
}

/** @param running the program that may be writing one of its own just now */
const temporary = (folder: string, running = 0): number =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((name) => {
    const maker = makerOfTemp(name);
    return maker !== null && maker.pid !== running;
  }).length;

export async function killLoop(
  kills: number,
  writer: 'store' | 'naive',
  seed = 1,
  say: (words: string) => void = () => undefined,
): Promise<KillReport> {
  const top = mkdtempSync(join(tmpdir(), 'kills-'));
  const folder = join(top, 'data');
  const sites = join(folder, 'sites');
  const draw = drawn(seed);
  const report = {
    kills: 0,
    unreadable: 0,
    lostSaves: 0,
    lostEdits: 0,
    temporaryAfterStart: 0,
    temporaryAfterKill: 0,
    tornLines: 0,
    saves: 0,
    edits: 0,
  };
  let saved = 0;
  let edited = 0;
  try {
    const child = await bundled('kill-child', join(top, 'child'));
    const store = new SiteStore({ fs: nodeFs, folder: sites, program: '0.1.0' });
    const places = [{ fs: nodeFs, folder: join(sites, 'journal'), leftOut: join(top, 'unused') }];
    /** From a site that is there; also after a fault, so that it is not counted again and again. */
    const begin = async (): Promise<void> => {
      rmSync(folder, { recursive: true, force: true });
      mkdirSync(sites, { recursive: true });
      await store.save({ id: 's', body: bodyOf('s', 1), baseRevision: null });
      saved = edited = 1;
    };
    await begin();
    while (report.kills < kills) {
      const said = await runAndKill(child, folder, writer, draw() < 0.1 ? 0 : draw() * 300, (pid) => {
        report.temporaryAfterStart += temporary(sites, pid);
      });
      report.kills++;
      report.temporaryAfterKill += temporary(sites);
      report.saves += said.saves;
      report.edits += said.edits;
      saved = Math.max(saved, said.saved);
      edited = Math.max(edited, said.edited, saved);
      const text = await store.read('s').then(
        (read) => read.text,
        () => null,
      );
      if (text === null) {
        report.unreadable++;
        await begin();
        continue;
      }
      const found = latestOf(await new JournalFiles(places).find('s'));
      const onDisk = numberIn(text);
      const offered = numberIn(found?.state.body ?? '');
      if (onDisk < saved) report.lostSaves++;
      if (Math.max(onDisk, offered) < edited) report.lostEdits++;
      report.tornLines += found?.state.damagedLines ?? 0;
      saved = onDisk;
      edited = Math.max(onDisk, offered);
      if (report.kills % 100 === 0) say(`${report.kills} kills: ${JSON.stringify(report)}`);
    }
    return report;
  } finally {
    rmSync(top, { recursive: true, force: true });
  }
}

export const isSound = (report: KillReport): boolean =>
  report.unreadable + report.lostSaves + report.lostEdits + report.temporaryAfterStart === 0;
