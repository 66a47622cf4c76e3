/**
 * npm run cases -- FILE…
 * The beam solver against files of reference cases. Exit code 0: all within each file's tolerances;
 * 1: any exceeded; 2: a file cannot be read.
 */
import { resolve } from 'node:path';
import { reportCases } from './report-cases';

const files = process.argv.slice(2);
if (files.length === 0) {
  console.error('Which file? Usage: npm run cases -- FILE…   (the open cases are test/reference/beam-cases-open.json)');
  process.exitCode = 2;
}
for (const file of files) {
  const path = resolve(process.env['INIT_CWD'] ?? '.', file);
  process.exitCode = Math.max(
    Number(process.exitCode ?? 0),
    reportCases(path, (line) => console.log(line)),
  );
}
