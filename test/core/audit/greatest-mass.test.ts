import fc from 'fast-check';
import { expect, test } from 'vitest';
import { greatestMass, type Trial } from '../../../src-core/audit/greatest-mass';
import { expectClose } from '../../close';

type Check = (kg: number) => number;

/** @param jumps a mass above which something without figures is not met */
function search(checks: Readonly<Record<string, Check>>, first: number, jumps = Infinity, most = 1e6) {
  let count = 0;
  const attempt = (kg: number): Trial => {
    count += 1;
    const beyond = new Map(Object.entries(checks).map(([name, check]) => [name, check(kg)]));
    return { kg, met: kg <= jumps && [...beyond.values()].every((by) => by <= 1e-12), beyond };
  };
  const steps = greatestMass(attempt, attempt(0), first, most);
  for (;;) {
    const { done, value } = steps.next();
    if (done) return { limit: value, count };
  }
}

test('straight checks are met up to the least of their limits, in a few trials', () => {
  const { limit, count } = search({ a: (kg) => kg / 640 - 1, b: (kg) => (kg + 300) / 2000 - 1 }, 1000);
  expectClose(limit?.met.kg ?? null, 640, 1e-12);
  expect(count).toBeLessThanOrEqual(5);
});

test('a check that is flat at its limit does not stop anything', () => {
  const { limit } = search({ full: () => 0, a: (kg) => kg / 50 - 1 }, 10);
  expectClose(limit?.met.kg ?? null, 50, 1e-12);
});

test('a check that comes in late is met up to where it starts to matter', () => {
  // The heaviest of several unit loads: 700 kg stand there, 800 kg are allowed
  const { limit } = search({ heaviest: (kg) => Math.max(700, kg) / 800 - 1 }, 10);
  expectClose(limit?.met.kg ?? null, 800, 1e-12);
});

test('a jump without figures is found to the last digits', () => {
  const { limit } = search({ a: (kg) => kg / 1e4 - 1 }, 100, 123.456789);
  expectClose(limit?.met.kg ?? null, 123.456789, 2e-12);
  expect(limit?.missed.kg).toBeGreaterThan(123.456789);
});

test('where nothing is ever too much there is no limit', () => {
  expect(search({ a: () => -0.5 }, 10).limit).toBeNull();
  expect(search({}, 10).limit).toBeNull();
});

test('a small mass on what is loaded heavily already is found as exactly as that check is', () => {
  // 9 999 of 10 000 kg are there: a relative rounding of 1e-12 there is 1e-8 kg here
  const { limit } = search({ a: (kg) => (9999 + kg) / 10_000 - 1 }, 500);
  expectClose(limit?.met.kg ?? null, 1, 2e-8);
});

test('curved checks are met up to the root that a quadratic has', () => {
  const curved = fc.record({
    square: fc.double({ min: 1e-9, max: 1e-3, noNaN: true }),
    slope: fc.double({ min: 1e-6, max: 1e-1, noNaN: true }),
  });
  fc.assert(
    fc.property(fc.array(curved, { minLength: 1, maxLength: 6 }), fc.double({ min: 1e-3, max: 1e5, noNaN: true }), (all, first) => {
      const checks = Object.fromEntries(all.map(({ square, slope }, i) => [`c${i}`, (kg: number) => (square * kg + slope) * kg - 1]));
      // The root of a·m² + b·m − 1 in the form that loses no digits
      const roots = all.map(({ square, slope }) => 2 / (slope + Math.sqrt(slope * slope + 4 * square)));
      const { limit, count } = search(checks, first);
      expectClose(limit?.met.kg ?? null, Math.min(...roots), 1e-11);
      expect(count).toBeLessThanOrEqual(40);
    }),
    { numRuns: 1000 },
  );
});
