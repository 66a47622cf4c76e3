import fc from 'fast-check';
import { expect, test } from 'vitest';
import { evenMasses, type LoadedBeam, type PairInput } from '../../../src-core/checks/pair';
import { mostKg, runnerShares } from '../../../src-core/checks/runners';
import { solveBeam } from '../../../src-core/statics/beam';
import type { BeamLoad } from '../../../src-core/statics/load';
import { weightOf } from '../../../src-core/units/quantity';

const SPAN = 2700;
const PINNED = { kind: 'pinned' } as const;

function beam(load: BeamLoad): LoadedBeam {
  const answer = solveBeam({ span: SPAN, rigidity: 2e11, left: PINNED, right: PINNED }, load);
  return { load, answer, even: evenMasses(answer, 2e11, 0) };
}
const pair = (load: BeamLoad, fixity = 0) => {
  const one = beam(load);
  return { span: SPAN, fixity, front: one, rear: one } as unknown as PairInput;
};

/** Side by side from the left: widths with gaps, masses, and lines that stand the same from both edges. */
const row = fc.array(
  fc.record({
    gap: fc.double({ min: 0, max: 300, noNaN: true }),
    width: fc.double({ min: 200, max: 1200, noNaN: true }),
    massKg: fc.double({ min: 1, max: 1500, noNaN: true }),
    lines: fc.integer({ min: 1, max: 5 }),
    inset: fc.double({ min: 0, max: 0.49, noNaN: true }),
  }),
  { minLength: 1, maxLength: 4 },
);

test('no spread on lines about the same centre does more than the bound says', () => {
  fc.assert(
    fc.property(row, fc.constantFrom('flexible' as const, 'rigid' as const), (goods, spread) => {
      let at = 0;
      const standing = goods.flatMap((one) => {
        const from = at + one.gap;
        at = from + one.width;
        return at <= SPAN ? [{ ...one, from }] : [];
      });
      fc.pre(standing.length > 0);
      const half = (massKg: number) => weightOf(massKg) / 2;
      const even: BeamLoad = {
        lines: standing.map(({ from, width, massKg }) => ({
          from,
          to: from + width,
          wFrom: half(massKg) / width,
          wTo: half(massKg) / width,
        })),
        points: [],
      };
      const onLines: BeamLoad = {
        lines: [],
        points: standing.flatMap(({ from, width, massKg, lines, inset }) =>
          runnerShares(lines, spread).map((share, i) => ({
            at: from + width * (lines === 1 ? 0.5 : inset + ((1 - 2 * inset) * i) / (lines - 1)),
            force: share * half(massKg),
          })),
        ),
      };
      const bound = mostKg({
        stated: pair(even),
        onLines: standing.map(({ massKg, width }) => ({ massKg, width, frontShare: 0.5, centred: true })),
      });
      const { bending, deflection } = beam(onLines).even;
      expect(Math.max(bending, deflection)).toBeLessThanOrEqual(bound * (1 + 1e-9));
    }),
    { numRuns: 2000 },
  );
});

test('the bound is reached by a point at mid-span: 2 W by bending', () => {
  // 800 kg even on 800 mm at mid-span: W·(2 − 800/2 700) and W·800/2 700 more make 2 W, the point's own
  const w = weightOf(400) / 800;
  const even = pair({ lines: [{ from: 950, to: 1750, wFrom: w, wTo: w }], points: [] });
  expect(mostKg({ stated: even, onLines: [{ massKg: 800, width: 800, frontShare: 0.5, centred: true }] })).toBeCloseTo(1600, 9);
});

test('there is no bound for sprung ends or lines off the centre', () => {
  const goods = { massKg: 800, width: 800, frontShare: 0.5, centred: true };
  const w = weightOf(400) / 800;
  const load = { lines: [{ from: 950, to: 1750, wFrom: w, wTo: w }], points: [] };
  expect(mostKg({ stated: pair(load, 0.3), onLines: [goods] })).toBe(Infinity);
  expect(mostKg({ stated: pair(load), onLines: [{ ...goods, centred: false }] })).toBe(Infinity);
});
