/** Follows worked calculations by hand: every formula with its own values, every result carried on. */
import { expect } from 'vitest';
import type { Finding, WorkedStep } from '../../src-core/checks/finding';
import { evaluate } from './evaluate';

/** The worked calculation of a finding; where it ends in the utilisation, that is the finding's own. */
export function expectWorked(finding: Finding): void {
  expectSteps(finding.check, finding.worked);
  const last = finding.worked.at(-1);
  if (finding.utilisation !== null && last?.result.symbol === 'u' && finding.check !== 'full-complement')
    near(last.result.quantity.value, finding.utilisation, `${finding.check}: the last line is the utilisation`);
}

/**
 * Fails unless every line's result is what its formula gives, every symbol of a formula is listed with an
 * origin, and a symbol that an earlier line gave keeps that line's value.
 */
export function expectSteps(name: string, worked: readonly WorkedStep[]): void {
  const given = new Map<string, number>();
  expect(worked.length, `${name} has no worked calculation`).toBeGreaterThan(0);
  for (const step of worked) {
    const symbols: Record<string, number> = {};
    for (const { symbol, quantity, from, is } of step.values) {
      expect(from.length, `${name}, ${step.what}: origin of ${symbol}`).toBeGreaterThan(0);
      expect(is.length).toBeGreaterThan(0);
      symbols[symbol] = quantity.value;
      const earlier = given.get(symbol);
      if (earlier !== undefined) near(quantity.value, earlier, `${name}, ${step.what}: ${symbol} as an earlier line gave it`);
    }
    const { symbol, quantity } = step.result;
    near(quantity.value, evaluate(step.formula, symbols), `${name}, ${step.what}: ${step.formula}`);
    expect(step.source.length).toBeGreaterThan(0);
    given.set(symbol, quantity.value);
  }
}

/** Relative to 1e-9, or absolutely where both are next to nothing. */
function near(actual: number, expected: number, message: string): void {
  expect(Math.abs(actual - expected), `${message}: ${actual} instead of ${expected}`).toBeLessThanOrEqual(1e-9 * Math.abs(expected) + 1e-9);
}
