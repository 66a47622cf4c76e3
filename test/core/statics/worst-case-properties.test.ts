/** What holds for the worst case of every row of unit loads. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { solveBeam } from '../../../src-core/statics/beam';
import type { BeamLoad } from '../../../src-core/statics/load';
import { worstMoment, worstReaction, worstSag } from '../../../src-core/statics/worst-case';
import { arrangedLoad, type LooseBeam, type LooseLoad } from '../../../src-core/statics/worst-case-loads';
import { expectClose } from '../../close';
import { loose, looseBeam } from '../loose';

const shape = (width: number): fc.Arbitrary<BeamLoad> =>
  fc.oneof(
    fc.tuple(fc.integer({ min: 0, max: 8 }), fc.integer({ min: 0, max: 8 })).map(([wFrom, wTo]) => ({
      lines: [{ from: 0, to: width, wFrom, wTo }],
      points: [],
    })),
    fc.array(fc.tuple(fc.integer({ min: 0, max: 4 }), fc.integer({ min: 1, max: 9 })), { minLength: 1, maxLength: 4 }).map((all) => ({
      lines: all.map(([k, w]) => ({ from: (k * width) / 5, to: ((k + 1) * width) / 5, wFrom: w, wTo: w })),
      points: [{ at: width / 3, force: 100 }],
    })),
  );

const rowOfShapes = fc
  .array(
    fc
      .record({ gap: fc.constantFrom(0, 30, 75, 120), width: fc.integer({ min: 300, max: 700 }) })
      .chain(({ gap, width }) => fc.record({ gap: fc.constant(gap), width: fc.constant(width), load: shape(width) })),
    { minLength: 1, maxLength: 4 },
  )
  .map((all) => {
    let edge = 0;
    return all.map(({ gap, width, load }) => {
      const at = edge + gap;
      edge = at + width;
      return loose(load, width, at);
    });
  });
const SPAN = 3300;
const effects = (beam: LooseBeam, loads: readonly LooseLoad[]) => ({
  moment: worstMoment(beam, loads).moment,
  left: worstReaction(beam, loads, 'left').force,
  right: worstReaction(beam, loads, 'right').force,
  sag: worstSag(beam, loads).sag,
});
const statedEffects = (beam: LooseBeam, loads: readonly LooseLoad[]) => {
  const { sagging, reactionLeft, reactionRight, deflection } = solveBeam(
    beam,
    arrangedLoad(
      loads,
      loads.map(() => 0),
      SPAN,
    ),
  );
  return { moment: sagging.moment, left: reactionLeft, right: reactionRight, sag: deflection.sag };
};
const KEYS = ['moment', 'left', 'right', 'sag'] as const;

test('without tolerance and without more weight it is the stated case', () => {
  fc.assert(
    fc.property(rowOfShapes, (loads) => {
      const beam = looseBeam(SPAN, 0);
      const worst = effects(beam, loads);
      const stated = statedEffects(beam, loads);
      for (const key of KEYS) expectClose(worst[key], stated[key], 1e-12, undefined, key);
    }),
    { numRuns: 300 },
  );
});

test('it is never less than stated, and grows with tolerance and with weight', () => {
  fc.assert(
    fc.property(rowOfShapes, fc.integer({ min: 1, max: 60 }), fc.integer({ min: 0, max: 60 }), (loads, t, more) => {
      const stated = statedEffects(looseBeam(SPAN, 0), loads);
      const small = effects(looseBeam(SPAN, t), loads);
      const great = effects(looseBeam(SPAN, t + more), loads);
      const heavy = effects(
        looseBeam(SPAN, t),
        loads.map((one, i) => ({ ...one, factor: 1 + i / 50 })),
      );
      for (const key of KEYS) {
        expect(small[key], key).toBeGreaterThanOrEqual(stated[key] * (1 - 1e-12));
        expect(great[key], key).toBeGreaterThanOrEqual(small[key] * (1 - 1e-10));
        expect(heavy[key], key).toBeGreaterThanOrEqual(small[key] * (1 - 1e-10));
      }
    }),
    { numRuns: 300 },
  );
});

test('a rack seen from behind has the same worst case, with its ends exchanged', () => {
  fc.assert(
    fc.property(rowOfShapes, fc.integer({ min: 0, max: 100 }), (loads, t) => {
      const turned = loads.map(({ load: { lines, points }, width, at, factor }) =>
        loose(
          {
            lines: lines.map(({ from, to, wFrom, wTo }) => ({ from: width - to, to: width - from, wFrom: wTo, wTo: wFrom })),
            points: points.map((one) => ({ ...one, at: width - one.at })),
          },
          width,
          SPAN - at - width,
          factor,
        ),
      );
      const one = effects(looseBeam(SPAN, t), loads);
      const other = effects(looseBeam(SPAN, t), turned);
      expectClose(other.moment, one.moment, 1e-11);
      expectClose(other.sag, one.sag, 1e-11);
      expectClose(other.left, one.right, 1e-11);
      expectClose(other.right, one.left, 1e-11);
    }),
    { numRuns: 300 },
  );
});

test('the arrangement that is given does what is said of it, and none of its unit loads overlap', () => {
  fc.assert(
    fc.property(rowOfShapes, fc.integer({ min: 0, max: 150 }), (loads, t) => {
      const beam = looseBeam(SPAN, t);
      const { moment, at, shifts, apart } = worstMoment(beam, loads);
      const { sagging } = solveBeam(beam, arrangedLoad(loads, shifts, SPAN));
      expectClose(sagging.moment, moment, 1e-11);
      expect(at).toBeGreaterThanOrEqual(sagging.from - 1e-3);
      expect(at).toBeLessThanOrEqual(sagging.to + 1e-3);
      expect(apart).toBe(true);
      shifts.forEach((shift, i) => {
        expect(Math.abs(shift)).toBeLessThanOrEqual(t + 1e-9);
        const edge = (k: number) => (loads[k] as LooseLoad).at + (shifts[k] as number);
        if (i > 0) expect(edge(i)).toBeGreaterThanOrEqual(edge(i - 1) + (loads[i - 1] as LooseLoad).width - 1e-6);
      });
    }),
    { numRuns: 300 },
  );
});
