/** The invented depot that ships with the program. */
import text from '../assets/demo.tallybeam.json?raw';
import type { Site } from '../src-core/site/site';
import { checkImport } from './store/checked-site';

/** @throws Error if the file that was built in is faulty, which a test would have told */
export async function readDemo(): Promise<Site> {
  const reading = checkImport(text, false);
  if (!reading.ok) throw new Error(`the demo site is faulty: ${JSON.stringify(reading.problems)}`);
  return reading.site;
}
