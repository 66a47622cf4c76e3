/** The quick bound of the worst case, and both beams in the arrangement that is given. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { loosePair, type LooseGoods, type LoosePairInput } from '../../../src-core/checks/loose-pair';
import { evenMasses } from '../../../src-core/checks/pair';
import { pairLoads } from '../../../src-core/goods/pair';
import { solveBeam, type BeamEnd } from '../../../src-core/statics/beam';
import { expectClose } from '../../close';

const SPAN = 3300;
const EI = 2e11;
const PINNED: BeamEnd = { kind: 'pinned' };
const EFFECTS = ['bending', 'endShear', 'deflection'] as const;

const rowOfGoods: fc.Arbitrary<readonly LooseGoods[]> = fc
  .array(
    fc.record({
      gap: fc.integer({ min: 0, max: 120 }),
      width: fc.integer({ min: 200, max: 700 }),
      wFrom: fc.integer({ min: 0, max: 9 }),
      wTo: fc.integer({ min: 0, max: 9 }),
      frontShare: fc.constantFrom(0, 0.1, 0.5, 0.5, 0.62, 1),
      percent: fc.constantFrom(0, 2, 10, 100),
    }),
    { minLength: 1, maxLength: 4 },
  )
  .map((all) => {
    let edge = 0;
    return all.map(({ gap, width, wFrom, wTo, frontShare, percent }) => {
      const at = edge + gap;
      edge = at + width;
      return {
        load: { lines: [{ from: 0, to: width, wFrom, wTo }], points: [{ at: width / 4, force: 50 }] },
        width,
        at,
        frontShare,
        percent,
      };
    });
  });

const inputOf = (goods: readonly LooseGoods[], tolerance: number, beamDistance: number | null): LoosePairInput => ({
  goods,
  span: SPAN,
  rigidity: EI,
  end: PINNED,
  fixity: 0,
  from: 0,
  to: SPAN,
  tolerance,
  beamDistance,
});

function stated(goods: readonly LooseGoods[]) {
  const loads = pairLoads(goods.map((one, i) => ({ ...one, id: `${i}`, widthMm: one.width, mirrored: false })));
  const beam = (load: typeof loads.front) => {
    const answer = solveBeam({ span: SPAN, rigidity: EI, left: PINNED, right: PINNED }, load);
    return { load, answer, even: evenMasses(answer, EI, 0) };
  };
  return { front: beam(loads.front), rear: beam(loads.rear) };
}

test('the bound that spares the solving is never below the worst case', () => {
  fc.assert(
    fc.property(rowOfGoods, fc.integer({ min: 0, max: 500 }), fc.constantFrom(null, 800, 1050), (goods, tolerance, distance) => {
      const pair = loosePair(inputOf(goods, tolerance, distance));
      const before = stated(goods);
      for (const effect of EFFECTS) {
        const worst = pair.worst(effect).kg;
        expect(pair.most(effect, before), effect).toBeGreaterThanOrEqual(worst * (1 - 1e-12));
        expect(worst, effect).toBeGreaterThanOrEqual(Math.max(before.front.even[effect], before.rear.even[effect]) * (1 - 1e-10));
      }
    }),
    { numRuns: 1500 },
  );
});

test('without tolerance and with sure masses it is the stated case', () => {
  fc.assert(
    fc.property(rowOfGoods, (goods) => {
      const sure = goods.map((one) => ({ ...one, percent: 0 }));
      const pair = loosePair(inputOf(sure, 0, 1050));
      const before = stated(sure);
      for (const effect of EFFECTS)
        expectClose(pair.worst(effect).kg, Math.max(before.front.even[effect], before.rear.even[effect]), 1e-12, undefined, effect);
    }),
    { numRuns: 500 },
  );
});

test('the beams that go into its worked calculation do what is said of the worse one, and carry all the goods together', () => {
  fc.assert(
    fc.property(rowOfGoods, fc.integer({ min: 0, max: 120 }), (goods, tolerance) => {
      const pair = loosePair(inputOf(goods, tolerance, 1050));
      const weight = goods.reduce((sum, { width, load, percent }) => {
        const [line] = load.lines;
        return sum + (1 + percent / 100) * (50 + (width * ((line?.wFrom ?? 0) + (line?.wTo ?? 0))) / 2);
      }, 0);
      for (const effect of EFFECTS) {
        const worst = pair.worst(effect);
        const beams = pair.beams(worst);
        expectClose(beams[worst.side].even[effect], worst.kg, 1e-10);
        expectClose(beams.front.answer.resultant + beams.rear.answer.resultant, weight, 1e-12);
      }
    }),
    { numRuns: 500 },
  );
});
