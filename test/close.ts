import { expect } from 'vitest';

/**
 * Fails unless two numbers agree within `tolerance` times `scale`, which is by default the expected
 * number itself: moments in N·mm run to millions, so absolute digits say nothing.
 */
export function expectClose(actual: number | null, expected: number, tolerance = 1e-12, scale = Math.abs(expected), what = ''): void {
  if (actual !== null && Math.abs(actual - expected) <= tolerance * scale) return;
  expect.fail(`${what} is ${actual}, expected ${expected} within ${tolerance * scale}`.trim());
}
