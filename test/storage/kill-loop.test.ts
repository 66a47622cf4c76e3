import { expect, test } from 'vitest';
import { killLoop } from './kill';

test('25 kills in the middle of editing and saving lose nothing that was answered as done', async () => {
  const report = await killLoop(25, 'store', Date.now() % 1000);
  console.log(`kills: ${JSON.stringify(report)}`);
  expect(report).toMatchObject({ kills: 25, unreadable: 0, lostSaves: 0, lostEdits: 0, temporaryAfterStart: 0 });
  expect(report.saves).toBeGreaterThan(10);
  expect(report.edits).toBeGreaterThan(10);
});

test('the loop bites: a writer that writes over the old file is found out', async () => {
  expect((await killLoop(12, 'naive')).unreadable).toBeGreaterThan(0);
});
