/**
 * npm run bench [-- level | worst | edit | page [FOLDER of another built page]]
 * All parts or the named one, then one line for each claim. Ratios within one run; where time is named, it
 * is the processor's, which other programs on the machine do not lengthen.
 */
import { editBench } from './edit.bench';
import { levelBench } from './level.bench';
import { pageBench } from './page.bench';
import { worstCaseBench } from './worst-case.bench';

const PARTS = {
  level: () => Promise.resolve(levelBench()),
  worst: () => Promise.resolve(worstCaseBench()),
  edit: editBench,
  page: () => pageBench(process.argv[3] ?? null),
} as const;

async function run(): Promise<void> {
  const named = process.argv[2];
  const parts = Object.entries(PARTS).filter(([name]) => named === undefined || name === named);
  if (parts.length === 0) throw new Error(`no part "${named}"; there are ${Object.keys(PARTS).join(', ')}`);
  const claims: string[] = [];
  for (const [, part] of parts) claims.push(...(await part()));
  console.log(`\n${claims.join('\n')}`);
}

await run();
