import { resolve } from 'node:path';
import { gzipSync } from 'node:zlib';
import { createBuilder, type Rollup } from 'vite';
import { beforeAll, expect, test } from 'vitest';

/** kB gzipped, script only: what is read before the list of sites stands, and from there to the first bay with its diagrams. */
const BEFORE_THE_LIST = 90;
const TO_THE_FIRST_BAY = 330;

let chunks: ReadonlyMap<string, Rollup.OutputChunk>;

// Built anew and in memory: what lies in dist/ may be older.
beforeAll(async () => {
  const builder = await createBuilder({
    configFile: resolve(import.meta.dirname, '../../vite.config.ts'),
    logLevel: 'error',
    environments: { client: { build: { write: false } } },
  });
  const { client } = builder.environments;
  if (client === undefined) throw new Error('vite.config.ts builds no page');
  const built = (await builder.build(client)) as Rollup.RollupOutput;
  chunks = new Map(built.output.flatMap((one) => (one.type === 'chunk' ? [[one.fileName, one] as const] : [])));
}, 120_000);

/** Files that must be read before this one can run, itself among them. */
function needed(file: string, known = new Set<string>()): ReadonlySet<string> {
  if (known.has(file)) return known;
  known.add(file);
  for (const other of chunks.get(file)?.imports ?? []) needed(other, known);
  return known;
}

function fileOf(holds: (chunk: Rollup.OutputChunk) => boolean): string {
  const found = [...chunks.values()].find(holds);
  if (found === undefined) throw new Error(`no such file among ${[...chunks.keys()].join(', ')}`);
  return found.fileName;
}

const kilobytes = (files: Iterable<string>): number =>
  [...files].reduce((sum, file) => sum + gzipSync(chunks.get(file)?.code ?? '').length, 0) / 1000;

const modules = (files: Iterable<string>): readonly string[] => [...files].flatMap((file) => Object.keys(chunks.get(file)?.modules ?? {}));

const start = () => needed(fileOf(({ isEntry }) => isEntry));
const holding = (module: string) => needed(fileOf(({ modules: own }) => Object.keys(own).some((id) => id.endsWith(module))));

test(`what is read before the list of sites stands is at most ${BEFORE_THE_LIST} kB`, () => {
  expect(kilobytes(start())).toBeLessThan(BEFORE_THE_LIST);
});

test(`up to the first bay with its diagrams at most ${TO_THE_FIRST_BAY} kB are read`, () => {
  const files = new Set([...start(), ...holding('/SiteScreen.svelte'), ...holding('/drawing/line-chart.ts')]);
  expect(kilobytes(files)).toBeLessThan(TO_THE_FIRST_BAY);
});

test('diagrams, checks, papers and screens are not read before the list of sites stands', () => {
  const read = modules(start());
  for (const part of ['node_modules/chart.js/', '/src-renderer/SiteScreen.svelte', '/src-core/audit/', '/src-core/paper/'])
    expect(
      read.filter((id) => id.includes(part)),
      part,
    ).toEqual([]);
  expect(read.filter((id) => /\/src-renderer\/screens\/(?!LazyScreen)/.test(id))).toEqual([]);
});

test('paper, visits and records are not read before they are asked for or nothing else is to be done', () => {
  const read = modules(holding('/SiteScreen.svelte'));
  for (const screen of ['Visits', 'Paper', 'Records', 'Layout', 'Run', 'History', 'Help'])
    expect(
      read.some((id) => id.includes(`/screens/${screen}Screen.svelte`)),
      screen,
    ).toBe(false);
});
