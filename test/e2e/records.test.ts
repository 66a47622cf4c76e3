/** Records on the page: kept, compared, told as void after a change, and the one that somebody altered is named. */
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test } from 'vitest';
import { nodeFs } from '../../src-main/store/fs-port';
import { SiteStore } from '../../src-main/store/site-store';
import { siteOf } from '../core/visit/make-run';
import { closeBrowser } from './program';
import { command, eventually, field, plain, type, withProgram } from './steps';

afterAll(closeBrowser);

test(
  'two checks of a bay are kept and compared; the older is void; one altered byte is told with its record',
  { timeout: 120_000 },
  async () => {
    const folder = await mkdtemp(join(tmpdir(), 'tallybeam-records-'));
    const records = join(folder, 'beside/site/records');
    try {
      await new SiteStore({ fs: nodeFs, folder, program: '0.1.0' }).add(siteOf({ bays: 2 }));
      await withProgram(
        async ({ page }) => {
          const keep = async (number: number) => {
            await command(page, 'Paper: print');
            await page.getByRole('article', { name: /^Bay sheet, Bay A1/ }).waitFor();
            await page.getByRole('button', { name: 'Keep as a record' }).click();
            await eventually(() => readFile(join(records, 'head.json'), 'utf8').catch(() => '')).toContain(`"number":${number}`);
          };
          await page
            .getByRole('button', { name: /^Test depot/ })
            .first()
            .click();
          await page.locator('[data-bay]').first().waitFor();
          await keep(1);
          await page.getByRole('button', { name: '← Back to the bay' }).click();
          await command(page, 'Bay: clear entry');
          await type(field(page, 'Clear entry'), '2650');
          await keep(2);

          await command(page, 'Records');
          await page.getByText('All 2 are as they were written.').waitFor();
          await page.getByRole('button', { name: /^1 Check: Bay sheet/ }).click();
          await page.getByText('Void.', { exact: false }).first().waitFor();
          const changed = page.getByRole('row', { name: /run A · bay A1 · clear entry/ });
          expect(plain(await changed.innerText()).replace(/\s+/g, ' ')).toContain('2 700 mm 2 650 mm');
          // The paper of the first record is shown as it was.
          expect(plain(await page.getByRole('article', { name: /^Bay sheet, Bay A1/ }).innerText())).toContain('2 700 mm');
          await page.getByRole('button', { name: /^Compare record 2/ }).click();
          await page.getByRole('heading', { name: /^From record 1,/ }).waitFor();
          await page.getByRole('row', { name: /run A · bay A1 · clear entry/ }).waitFor();
          await page.getByRole('button', { name: /^1 Check/ }).click();
          await page.getByText('it still holds', { exact: false }).waitFor();

          // Somebody changes one byte of what was found.
          const path = join(records, '000001.json');
          const bytes = await readFile(path);
          const at = bytes.indexOf('"verdict":"') + '"verdict":"'.length;
          const edited = Buffer.from(bytes);
          edited[at] = (edited[at] ?? 0) ^ 1;
          await writeFile(path, edited);
          await page.getByRole('button', { name: 'Verify again' }).click();
          await page.getByText('Record 1 is not as it was written.').waitFor();
          await writeFile(path, bytes);
          const chain = await readFile(join(records, 'chain.jsonl'), 'utf8');
          await writeFile(join(records, 'chain.jsonl'), chain.replace('"number":2', '"number":3'));
          await page.getByRole('button', { name: 'Verify again' }).click();
          await page.getByText('Record 2 is not as it was written.').waitFor();
        },
        {},
        folder,
      );
    } finally {
      await rm(folder, { recursive: true, force: true });
    }
  },
);
