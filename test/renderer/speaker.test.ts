import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import type { RunAudit } from '../../src-core/audit/types';
import { Speaker } from '../../src-renderer/speaker.svelte';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

const PLACE = { runId: 'r', bayId: 'b', levelId: 'l' };
const level = { levelId: 'l', verdict: 'close', governing: null, totalKg: 1, span: 1, effects: null, ratedKg: 1, findings: [] } as const;
const bay = { bayId: 'b', verdict: 'over', governing: null, totalKg: 1, levels: [level], findings: [] } as const;
const AUDIT: RunAudit = { runId: 'r', verdict: 'over', bays: [bay], frames: [], findings: [], notChecked: [] };

test('what was done is said together with its verdicts where they are known or come soon', () => {
  const speaker = new Speaker();
  speaker.sayDone(PLACE, 'Crate moved.', AUDIT);
  expect(speaker.said).toBe('Crate moved. Level: close. Bay: over.');
  speaker.sayDone(PLACE, 'Crate turned.', null);
  expect(speaker.said).toBe('Crate moved. Level: close. Bay: over.');
  vi.advanceTimersByTime(100);
  speaker.audited(AUDIT);
  expect(speaker.said).toBe('Crate turned. Level: close. Bay: over.');
});

test('where the verdicts take long, what was done is said at once and they follow alone', () => {
  const speaker = new Speaker();
  speaker.sayDone(PLACE, 'Crate moved.', null);
  vi.advanceTimersByTime(300);
  expect(speaker.said).toBe('Crate moved.');
  speaker.audited({ ...AUDIT, runId: 'another' });
  expect(speaker.said).toBe('Crate moved.');
  speaker.audited(AUDIT);
  expect(speaker.said).toBe('Level: close. Bay: over.');
  speaker.audited(AUDIT);
  expect(speaker.said).toBe('Level: close. Bay: over.');
});

test('newer words put away verdicts that are still on their way', () => {
  const speaker = new Speaker();
  speaker.sayDone(PLACE, 'Crate moved.', null);
  speaker.say('Undone: Move Crate.');
  vi.advanceTimersByTime(1000);
  speaker.audited(AUDIT);
  expect(speaker.said).toBe('Undone: Move Crate.');
});

test('the same words said again are a change, so that they are read out again', () => {
  const speaker = new Speaker();
  speaker.say('This is the floor of the bay.');
  const first = speaker.said;
  speaker.say('This is the floor of the bay.');
  expect(speaker.said).not.toBe(first);
  expect(speaker.said.trim()).toBe(first);
});
