/** Runs the beam solver over a file of reference cases and says how far off it is at worst. */
import { readFileSync } from 'node:fs';
import { compareCase, isWithin, type CaseResult, type Comparison } from './compare';
import { readCases, UnreadableCases, type CaseFile } from './read-cases';

/**
 * @returns the exit code: 0 all within the file's tolerances, 1 any exceeded or refused, 2 unreadable
 */
export function reportCases(path: string, print: (line: string) => void): 0 | 1 | 2 {
  let file: CaseFile;
  try {
    file = readCases(readFileSync(path, 'utf8'));
  } catch (error) {
    if (!(error instanceof UnreadableCases) && !isFileError(error)) throw error;
    print(`Cannot read ${path}: ${error.message}`);
    return 2;
  }
  const results = file.cases.map((one) => compareCase(one, file.tolerances));
  print(`${file.title}: ${path}`);
  print('');
  for (const line of table(results)) print(line);
  print('');
  let failed = 0;
  for (const { id, comparisons, unknown, refused } of results) {
    if (refused !== null) print(`${id}  refused: ${refused}`);
    for (const one of comparisons.filter((each) => !isWithin(each)))
      print(
        `${id}  ${one.quantity} is ${one.got}, expected ${one.expected}: off by ${exponent(one.error)}, allowed ${exponent(one.allowed)}`,
      );
    if (unknown.length > 0) print(`${id}  not compared, unknown to this runner: ${unknown.join(', ')}`);
    if (refused !== null || !comparisons.every(isWithin)) failed++;
  }
  const values = results.reduce((sum, { comparisons }) => sum + comparisons.length, 0);
  print(
    `cases: ${results.length}, values: ${values}, ${failed === 0 ? 'all within the tolerances of the file' : `cases outside: ${failed}`}`,
  );
  return failed === 0 ? 0 : 1;
}

const isFileError = (error: unknown): error is NodeJS.ErrnoException => error instanceof Error && 'code' in error;

/** One row a quantity: its worst error, as a part of its scale and against what is allowed. */
function table(results: readonly CaseResult[]): string[] {
  const worst = new Map<string, { one: Comparison; id: string; count: number }>();
  for (const { id, comparisons } of results)
    for (const one of comparisons) {
      const before = worst.get(one.quantity);
      const isWorse = before === undefined || one.error / one.allowed > before.one.error / before.one.allowed;
      worst.set(one.quantity, { ...(isWorse ? { one, id } : before), count: (before?.count ?? 0) + 1 });
    }
  const rows = [...worst].map(([quantity, { one, id, count }]) => [
    quantity,
    String(count),
    exponent(one.error),
    exponent(one.allowed),
    id,
    isWithin(one) ? 'within' : 'EXCEEDED',
  ]);
  const all = [['quantity', 'values', 'worst error', 'allowed', 'in case', ''], ...rows];
  const widths = all[0]?.map((_, column) => Math.max(...all.map((row) => row[column]?.length ?? 0))) ?? [];
  return all.map((row) =>
    row
      .map((cell, column) => cell.padEnd(widths[column] ?? 0))
      .join('  ')
      .trimEnd(),
  );
}

const exponent = (value: number): string => (value === 0 ? '0' : value.toExponential(1));
